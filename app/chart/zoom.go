package chart

// Window is the stretch of time that charts show, within what there is.
type Window struct {
	From, To    float64 // what is shown
	First, Last float64 // what there is
	least       float64 // the shortest stretch
}

// NewWindow shows all of a stretch; it does not zoom in closer than least.
func NewWindow(first, last, least float64) Window {
	return Window{first, last, first, last, least}
}

// Whole says whether all there is is shown.
func (w Window) Whole() bool { return w.From <= w.First && w.To >= w.Last }

// Zoom returns the window shrunk or, with a factor above 1, widened around a
// time that keeps its place.
func (w Window) Zoom(around, factor float64) Window {
	whole := w.Last - w.First
	length := min(max((w.To-w.From)*factor, min(w.least, whole)), whole)
	share := 0.5
	if w.To > w.From {
		share = min(max((around-w.From)/(w.To-w.From), 0), 1)
	}
	w.From = around - share*length
	w.To = w.From + length
	return w.held()
}

// Reveal returns the window moved so far that a time is in it.
func (w Window) Reveal(at float64) Window {
	if at < w.From {
		w.From, w.To = at, at+w.To-w.From
	} else if at > w.To {
		w.From, w.To = at-(w.To-w.From), at
	}
	return w.held()
}

// held moves the window back to where there is something.
func (w Window) held() Window {
	length := w.To - w.From
	w.From = min(max(w.From, w.First), w.Last-length)
	w.To = w.From + length
	return w
}

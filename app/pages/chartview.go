package pages

import (
	"math"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/widget"

	"anodewright/app/chart"
)

// chartView paints a chart. The mouse over it reads it. What else it does is up
// to its page: a press or a drag picks a time, the wheel and the keys + and -
// zoom.
type chartView struct {
	widget.BaseWidget
	moved   func(at float64)         // the mouse is over a time
	left    func()                   // it went away
	pick    func(at float64)         // a time was pressed
	keyed   func(key *fyne.KeyEvent) // a key that moves
	zoom    func(at, factor float64) // NaN: around what is picked
	whole   func()                   // all of the time is to be shown
	chart   *chart.Chart
	drawing *chart.Drawing
	laid    laidFor
	cursor  float64 // a time
	shown   bool
	focused bool
}

// laidFor is what a drawing depends on.
type laidFor struct {
	chart *chart.Chart
	size  fyne.Size
	em    float32
}

// newChartView returns a view that tells where the mouse is on it.
func newChartView(moved func(at float64)) *chartView {
	v := &chartView{
		moved: moved, left: func() {}, pick: func(float64) {}, keyed: func(*fyne.KeyEvent) {}, zoom: func(_, _ float64) {}, whole: func() {},
	}
	v.ExtendBaseWidget(v)
	return v
}

func (v *chartView) set(c *chart.Chart) {
	v.chart = c
	v.Refresh()
}

// point shows the cursor at a time.
func (v *chartView) point(at float64, shown bool) {
	if v.cursor != at || v.shown != shown {
		v.cursor, v.shown = at, shown
		v.Refresh()
	}
}

// at is the time at a place, if it lies in the plot.
func (v *chartView) at(x float32) (float64, bool) {
	if v.drawing == nil {
		return 0, false
	}
	return v.drawing.At(x)
}

// MouseIn implements desktop.Hoverable.
func (v *chartView) MouseIn(e *desktop.MouseEvent) { v.MouseMoved(e) }

// MouseMoved reads the chart under the mouse.
func (v *chartView) MouseMoved(e *desktop.MouseEvent) {
	if at, ok := v.at(e.Position.X); ok {
		v.moved(at)
	}
}

// MouseOut implements desktop.Hoverable.
func (v *chartView) MouseOut() { v.left() }

// MouseDown picks the time under the mouse and takes the keyboard.
func (v *chartView) MouseDown(e *desktop.MouseEvent) {
	if c := fyne.CurrentApp().Driver().CanvasForObject(v); c != nil {
		c.Focus(v)
	}
	v.move(e.Position.X)
}

// MouseUp implements desktop.Mouseable.
func (v *chartView) MouseUp(*desktop.MouseEvent) {}

// Dragged picks along.
func (v *chartView) Dragged(e *fyne.DragEvent) { v.move(e.Position.X) }

// DragEnd implements fyne.Draggable.
func (v *chartView) DragEnd() {}

func (v *chartView) move(x float32) {
	if at, ok := v.at(x); ok {
		v.pick(at)
	}
}

// Scrolled zooms around the mouse.
func (v *chartView) Scrolled(e *fyne.ScrollEvent) {
	at, ok := v.at(e.Position.X)
	if !ok || e.Scrolled.DY == 0 {
		return
	}
	factor := 0.8
	if e.Scrolled.DY < 0 {
		factor = 1.25
	}
	v.zoom(at, factor)
}

// FocusGained implements fyne.Focusable.
func (v *chartView) FocusGained() {
	v.focused = true
	v.Refresh()
}

// FocusLost implements fyne.Focusable.
func (v *chartView) FocusLost() {
	v.focused = false
	v.Refresh()
}

// TypedRune zooms at + and -, and shows all of the time at 0.
func (v *chartView) TypedRune(r rune) {
	switch r {
	case '+', '=':
		v.zoom(math.NaN(), 0.5)
	case '-':
		v.zoom(math.NaN(), 2)
	case '0':
		v.whole()
	}
}

// TypedKey hands the keys that move to the page.
func (v *chartView) TypedKey(key *fyne.KeyEvent) {
	switch key.Name {
	case fyne.KeyPlus, fyne.KeyMinus, fyne.KeyEqual, fyne.Key0:
		// they come as runes, too
	default:
		v.keyed(key)
	}
}

// CreateRenderer implements fyne.Widget.
func (v *chartView) CreateRenderer() fyne.WidgetRenderer { return &chartRenderer{v: v} }

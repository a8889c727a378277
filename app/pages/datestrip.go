package pages

import (
	"math"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/widget"

	"anodewright/anodes/plan"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// dateStrip is the time from the last docking to the horizon with what
// happens in it, and a cursor that is dragged or moved by keys.
type dateStrip struct {
	widget.BaseWidget
	from, to hull.Date
	cursor   hull.Date
	marks    []stripMark
	focused  bool

	moved func(hull.Date)
	hover func(words string) // of the mark under the mouse; empty for none

	over    string
	objects []fyne.CanvasObject
}

// markKind is what a mark on the strip stands for.
type markKind int

const (
	markDocking markKind = iota
	markOrder
	markToday
	markSurvey
)

// stripMark is something that happens on a day. Its label stands beside it
// where there is room; its words are shown when the mouse is on it.
type stripMark struct {
	date  hull.Date
	kind  markKind
	label string
	words string
}

func newDateStrip(moved func(hull.Date), hover func(string)) *dateStrip {
	s := &dateStrip{moved: moved, hover: hover}
	s.ExtendBaseWidget(s)
	return s
}

// set shows an asset's time, with what a plan says about it if there is one.
func (s *dateStrip) set(a *hull.Asset, o *plan.Outcome, today, cursor hull.Date) {
	s.from, s.to, s.cursor = a.Start(), a.Horizon, cursor
	s.marks = stripMarks(a, o, today)
	s.Refresh()
}

// point moves the cursor without telling.
func (s *dateStrip) point(d hull.Date) {
	if d != s.cursor {
		s.cursor = d
		s.Refresh()
	}
}

// stripMarks are an asset's marks, those whose labels matter most first.
func stripMarks(a *hull.Asset, o *plan.Outcome, today hull.Date) []stripMark {
	var all []stripMark
	orders := map[hull.Date]hull.Date{} // by docking, the earliest
	if o != nil {
		today = o.Today
		for _, l := range o.Order {
			if by, ok := orders[l.Docking]; l.Ordered > 0 && (!ok || l.OrderBy < by) {
				orders[l.Docking] = l.OrderBy
			}
		}
	}
	for _, d := range a.Ahead() {
		day := session.Day(d.Date)
		words := session.Words(d.Kind) + " " + day
		if d.Kind == hull.DryDock {
			words = say.T("docking %s", day)
		}
		all = append(all, stripMark{d.Date, markDocking, day, words})
		if by, ok := orders[d.Date]; ok {
			label := say.T("order by %s", session.Day(by))
			all = append(all, stripMark{by, markOrder, label, say.T("%s for %s", label, words)})
		}
	}
	all = append(all, stripMark{today, markToday, say.T("today"), say.T("today, %s", session.Day(today))})
	found := map[hull.Date]int{}
	for _, r := range a.Readings {
		if found[r.Date]++; found[r.Date] == 1 {
			all = append(all, stripMark{r.Date, markSurvey, say.T("survey"), ""})
		}
	}
	var in []stripMark
	for _, m := range all {
		if m.kind == markSurvey {
			m.words = say.T("survey %s, %s", session.Day(m.date), countOf(found[m.date], say.T("reading"), say.T("readings")))
		}
		if m.date >= a.Start() && m.date <= a.Horizon {
			in = append(in, m)
		}
	}
	return in
}

// margin is the room left of the first and right of the last day.
func (s *dateStrip) margin() float32 { return look.Px(22) }

// x is where a day lies.
func (s *dateStrip) x(d hull.Date) float32 {
	if s.to <= s.from {
		return s.margin()
	}
	return s.margin() + (s.Size().Width-2*s.margin())*float32(d-s.from)/float32(s.to-s.from)
}

// day is the day at a place, bounded by the strip's ends.
func (s *dateStrip) day(x float32) hull.Date {
	width := s.Size().Width - 2*s.margin()
	if width <= 0 {
		return s.from
	}
	share := float64(min(max((x-s.margin())/width, 0), 1))
	return s.from + hull.Date(math.Round(share*float64(s.to-s.from)))
}

// move sets the cursor and tells.
func (s *dateStrip) move(d hull.Date) {
	d = min(max(d, s.from), s.to)
	if d == s.cursor {
		return
	}
	s.cursor = d
	s.Refresh()
	s.moved(d)
}

// MouseDown takes the cursor to the mouse, and the keyboard to the strip.
func (s *dateStrip) MouseDown(e *desktop.MouseEvent) {
	if c := fyne.CurrentApp().Driver().CanvasForObject(s); c != nil {
		c.Focus(s)
	}
	s.move(s.day(e.Position.X))
}

// MouseUp implements desktop.Mouseable.
func (s *dateStrip) MouseUp(*desktop.MouseEvent) {}

// Dragged moves the cursor along.
func (s *dateStrip) Dragged(e *fyne.DragEvent) { s.move(s.day(e.Position.X)) }

// DragEnd implements fyne.Draggable.
func (s *dateStrip) DragEnd() {}

// Cursor shows that the strip is dragged sideways.
func (s *dateStrip) Cursor() desktop.Cursor { return desktop.HResizeCursor }

// MouseIn implements desktop.Hoverable.
func (s *dateStrip) MouseIn(e *desktop.MouseEvent) { s.MouseMoved(e) }

// MouseMoved tells what the mark under the mouse is.
func (s *dateStrip) MouseMoved(e *desktop.MouseEvent) {
	words, nearest := "", look.Px(6)
	for _, m := range s.marks {
		if d := abs(s.x(m.date) - e.Position.X); d < nearest {
			words, nearest = m.words, d
		}
	}
	s.tell(words)
}

// MouseOut implements desktop.Hoverable.
func (s *dateStrip) MouseOut() { s.tell("") }

func (s *dateStrip) tell(words string) {
	if words != s.over {
		s.over = words
		s.hover(words)
	}
}

// FocusGained implements fyne.Focusable.
func (s *dateStrip) FocusGained() {
	s.focused = true
	s.Refresh()
}

// FocusLost implements fyne.Focusable.
func (s *dateStrip) FocusLost() {
	s.focused = false
	s.Refresh()
}

// TypedRune implements fyne.Focusable.
func (s *dateStrip) TypedRune(rune) {}

// TypedKey moves the cursor: left and right by a month, page up and down by a
// year, up and down to the next mark, home and end to the ends.
func (s *dateStrip) TypedKey(key *fyne.KeyEvent) {
	switch key.Name {
	case fyne.KeyLeft:
		s.move(s.cursor.AddMonths(-1))
	case fyne.KeyRight:
		s.move(s.cursor.AddMonths(1))
	case fyne.KeyPageUp:
		s.move(s.cursor.AddMonths(-12))
	case fyne.KeyPageDown:
		s.move(s.cursor.AddMonths(12))
	case fyne.KeyUp:
		s.move(s.mark(-1))
	case fyne.KeyDown:
		s.move(s.mark(1))
	case fyne.KeyHome:
		s.move(s.from)
	case fyne.KeyEnd:
		s.move(s.to)
	default:
		look.Forward(s, key)
	}
}

// mark is the nearest mark's day before or after the cursor.
func (s *dateStrip) mark(way hull.Date) hull.Date {
	best := s.cursor
	for _, m := range s.marks {
		if d := (m.date - s.cursor) * way; d > 0 && (best == s.cursor || d < (best-s.cursor)*way) {
			best = m.date
		}
	}
	return best
}

// CreateRenderer implements fyne.Widget.
func (s *dateStrip) CreateRenderer() fyne.WidgetRenderer { return &stripRenderer{s} }

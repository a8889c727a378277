package grid

import (
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/test"

	"anodewright/app/look"
)

func TestSelectBringsIntoView(t *testing.T) {
	for _, scale := range []float32{1, 1.5} {
		g, _, w := show(t, scale, 100)
		g.Select(80, 1)
		pos, size := g.cell(g.layout(), 80, 1)
		l := g.layout()
		if pos.Y < l.body.Y || pos.Y+size.Height > l.body.Y+l.view.Height {
			t.Errorf("scale %v: row 80 at %v of a body from %v, %v high", scale, pos.Y, l.body.Y, l.view.Height)
		}
		w.Resize(fyne.NewSize(250*scale, 200*scale))
		g.Select(0, 3)
		l = g.layout()
		pos, size = g.cell(l, 0, 3)
		if pos.X < 0 || pos.X+size.Width > l.view.Width+0.01 {
			t.Errorf("scale %v: column 3 at %v, %v wide, in a view of %v", scale, pos.X, size.Width, l.view.Width)
		}
	}
}

func TestStickyColumnStays(t *testing.T) {
	g, _, w := show(t, 1, 10, Sticky())
	w.Resize(fyne.NewSize(300, 300))
	g.scrollBy(100, 0)
	if g.offset.X != 100 {
		t.Fatalf("scrolled by %v, want 100", g.offset.X)
	}
	if pos, _ := g.cell(g.layout(), 0, 0); pos.X != 0 {
		t.Errorf("the sticky column is at %v", pos.X)
	}
	click(g, 4, 0)
	wantSelected(t, g, 4, 0)
	if g.offset.X != 100 {
		t.Errorf("a click on the sticky column scrolled to %v", g.offset.X)
	}
	// the wheel works over the sticky column too
	test.Scroll(w.Canvas(), fyne.NewPos(20, 100), 50, 0)
	if g.offset.X != 50 {
		t.Errorf("the wheel went to %v, want 50", g.offset.X)
	}
	// a column under the sticky one is brought out from under it
	g.scrollBy(100, 0)
	g.Select(4, 1)
	if pos, _ := g.cell(g.layout(), 4, 1); pos.X < g.layout().sticky {
		t.Errorf("column 1 at %v lies under the sticky one", pos.X)
	}
}

func TestWheelStopsAtTheEnds(t *testing.T) {
	g, _, w := show(t, 1, 20)
	test.Scroll(w.Canvas(), fyne.NewPos(50, 100), 0, 500)
	if g.offset.Y != 0 {
		t.Errorf("above the first row: %v", g.offset.Y)
	}
	test.Scroll(w.Canvas(), fyne.NewPos(50, 100), 0, -5000)
	l := g.layout()
	if got, want := g.offset.Y, l.content.Height-l.view.Height; got != want {
		t.Errorf("at the end: %v, want %v", got, want)
	}
	withShift(t)
	w.Resize(fyne.NewSize(250, 300))
	test.Scroll(w.Canvas(), fyne.NewPos(50, 100), 0, -30)
	if g.offset.X != 30 {
		t.Errorf("with Shift the wheel went sideways by %v, want 30", g.offset.X)
	}
}

func TestBarDragsAndPages(t *testing.T) {
	g, _, _ := show(t, 1, 100)
	if !g.barV.Visible() || g.barH.Visible() {
		t.Fatalf("bars: upright %v, level %v", g.barV.Visible(), g.barH.Visible())
	}
	ev := &fyne.DragEvent{Dragged: fyne.NewDelta(0, 1000)}
	g.barV.Dragged(ev)
	l := g.layout()
	if got, want := g.offset.Y, l.content.Height-l.view.Height; got != want {
		t.Errorf("dragged to %v, want the end %v", got, want)
	}
	down := &desktop.MouseEvent{}
	down.Position = fyne.NewPos(2, 2)
	g.barV.MouseDown(down)
	if got, want := g.offset.Y, l.content.Height-2*l.view.Height; got != want {
		t.Errorf("a click above the thumb went to %v, want %v", got, want)
	}
}

func TestOnlyRowsInViewAreAskedFor(t *testing.T) {
	look.Apply(test.NewTempApp(t), look.Light, 1)
	c := &counting{zones: newZones(10000)}
	g := New(zoneCols, c)
	w := test.NewTempWindow(t, g)
	w.Resize(fyne.NewSize(500, 300))
	c.asked = 0
	g.Refresh()
	// 8 rows of 4 cells fit into 300 pixels
	if c.asked == 0 || c.asked > 2*8*4 {
		t.Errorf("%d cells asked for", c.asked)
	}
}

type counting struct {
	*zones
	asked int
}

func (c *counting) Cell(row, col int) Cell {
	c.asked++
	return c.zones.Cell(row, col)
}

func TestHiddenAndShownAgainKeepsState(t *testing.T) {
	look.Apply(test.NewTempApp(t), look.Light, 1)
	g := New(zoneCols, newZones(50))
	box := container.NewStack(g)
	w := test.NewTempWindow(t, box)
	w.Resize(fyne.NewSize(400, 300))
	g.Select(30, 1)
	off := g.offset
	g.Hide()
	w.Resize(fyne.NewSize(401, 300))
	g.Show()
	wantSelected(t, g, 30, 1)
	if g.offset.Y != off.Y {
		t.Errorf("the place went from %v to %v", off, g.offset)
	}
}

func BenchmarkRefresh(b *testing.B) {
	look.Apply(test.NewTempApp(b), look.Light, 1)
	var cols []Column
	for range 4 {
		cols = append(cols, zoneCols[0], zoneCols[1], zoneCols[2])
	}
	g := New(cols, wide{newZones(10000)})
	w := test.NewTempWindow(b, g)
	w.Resize(fyne.NewSize(1100, 700))
	y := float32(0)
	for b.Loop() {
		y++
		g.offset.Y = y
		g.Refresh()
	}
}

// wide repeats the zones' first three columns.
type wide struct{ *zones }

func (w wide) Cell(row, col int) Cell { return w.zones.Cell(row, col%3) }

func TestGridWithoutRoomDrawsNothingNegative(t *testing.T) {
	g, _, w := show(t, 1, 50)
	for _, size := range []fyne.Size{{}, {Width: 30, Height: 20}, {Width: 200, Height: 41}, {Width: 5, Height: 300}} {
		g.Resize(size)
		g.Refresh()
		var look func(o fyne.CanvasObject)
		look = func(o fyne.CanvasObject) {
			if s := o.Size(); s.Width < 0 || s.Height < 0 {
				t.Errorf("at %v a %T has the size %v", size, o, s)
			}
			if wid, ok := o.(fyne.Widget); ok && o.Visible() {
				for _, part := range test.WidgetRenderer(wid).Objects() {
					look(part)
				}
			}
		}
		look(g)
		w.Canvas().Capture() // the software painter panics at negative sizes
	}
}

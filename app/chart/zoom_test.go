package chart

import (
	"math"
	"testing"
)

func TestZoomKeepsThePlaceUnderThePointer(t *testing.T) {
	w := NewWindow(0, 1000, 30)
	in := w.Zoom(250, 0.5)
	if in.From != 125 || in.To != 625 {
		t.Errorf("from %v to %v, want 125 to 625: 250 stays at a quarter", in.From, in.To)
	}
	if back := in.Zoom(250, 2); !back.Whole() {
		t.Errorf("zoomed out again: %v to %v", back.From, back.To)
	}
	for range 20 {
		in = in.Zoom(990, 0.5)
	}
	if math.Abs(in.To-in.From-30) > 1e-9 || in.To > 1000 {
		t.Errorf("closest: %v to %v, want 30 long", in.From, in.To)
	}
	if out := in.Zoom(500, 1e6); !out.Whole() {
		t.Errorf("widest: %v to %v", out.From, out.To)
	}
}

func TestRevealMovesNoFurtherThanNeeded(t *testing.T) {
	w := NewWindow(0, 1000, 30).Zoom(500, 0.2)
	for at, want := range map[float64][2]float64{450: {400, 600}, 300: {300, 500}, 700: {500, 700}, -50: {0, 200}, 2000: {800, 1000}} {
		if r := w.Reveal(at); math.Abs(r.From-want[0]) > 1e-9 || math.Abs(r.To-want[1]) > 1e-9 {
			t.Errorf("%v is shown in %v to %v, want %v", at, r.From, r.To, want)
		}
	}
}

func TestZoomedSeriesIsCutAtTheEdges(t *testing.T) {
	c := sample() // 0, 10, 5 at 0, 50, 100
	c.From, c.To, c.Levels, c.Marks = 25, 75, nil, nil
	c.Dots = []Dot{{X: 10, Y: 1}, {X: 60, Y: 4, Low: 3, High: 5}}
	d := c.Lay(900, 200, 12)
	var first, last Line
	found := 0
	for _, l := range d.Lines {
		switch {
		case l.Role == First && first.X1 == 0:
			first = l
			last = l
		case l.Role == First:
			last = l
		case l.Role == Found:
			found++
		}
	}
	near := func(what string, got, want float32) {
		t.Helper()
		if math.Abs(float64(got-want)) > 0.1 {
			t.Errorf("%s: %v, want %v", what, got, want)
		}
	}
	near("left end", first.X1, d.plot.x)
	near("left height", first.Y1, d.y(5))
	near("right end", last.X2, d.plot.x+d.plot.w)
	near("right height", last.Y2, d.y(7.5))
	if found != 3 {
		t.Errorf("%d lines of readings, want a cross and a range: 3", found)
	}
}

func TestSteps(t *testing.T) {
	s := Steps("asks", First, []float64{0, 10, 30}, []float64{4, 7})
	want := Series{Name: "asks", Role: First, X: []float64{0, 10, 10, 30}, Y: []float64{4, 4, 7, 7}}
	for i := range want.X {
		if s.X[i] != want.X[i] || s.Y[i] != want.Y[i] {
			t.Fatalf("got %v %v, want %v %v", s.X, s.Y, want.X, want.Y)
		}
	}
}

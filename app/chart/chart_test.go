package chart

import (
	"fmt"
	"strings"
	"testing"
)

func TestTicks(t *testing.T) {
	for _, c := range []struct {
		low, high float64
		n         int
		want      string
	}{
		{0, 10, 5, "0 2 4 6 8 10"},
		{0, 1, 4, "0.0 0.5 1.0"},
		{-1.05, -0.65, 4, "-1.0 -0.9 -0.8 -0.7"},
		{0, 1234, 6, "0 500 1000"},
		{3, 3, 4, ""},
	} {
		var words []string
		for _, tick := range Ticks(c.low, c.high, c.n) {
			words = append(words, tick.Text)
		}
		if got := strings.Join(words, " "); got != c.want {
			t.Errorf("%g to %g in %d: got %q, want %q", c.low, c.high, c.n, got, c.want)
		}
	}
}

func sample() *Chart {
	return &Chart{
		Title: "Current, A", From: 0, To: 100, Series: []Series{{"asks", First, []float64{0, 50, 100}, []float64{0, 10, 5}}},
		Levels: []Level{{8, "limit"}}, Marks: []Mark{{50, "docking", Event}}, XTicks: []Tick{{0, "2024"}, {100, "2025"}},
	}
}

// Everything drawn lies within the size it was laid out in.
func TestLayStaysInside(t *testing.T) {
	for _, size := range [][2]float32{{300, 120}, {900, 200}, {1600, 400}, {40, 20}} {
		d := sample().Lay(size[0], size[1], 12)
		for _, l := range d.Lines {
			for _, x := range []float32{l.X1, l.X2} {
				if x < 0 || x > size[0] {
					t.Errorf("%v: a line at x %g", size, x)
				}
			}
			for _, y := range []float32{l.Y1, l.Y2} {
				if y < 0 || y > size[1] {
					t.Errorf("%v: a line at y %g", size, y)
				}
			}
		}
	}
}

func TestPlacesAndTimes(t *testing.T) {
	d := sample().Lay(900, 200, 12)
	for _, at := range []float64{0, 25, 100} {
		back, ok := d.At(d.Cursor(at).X1)
		if !ok || back < at-0.01 || back > at+0.01 {
			t.Errorf("time %g is read back as %g, %v", at, back, ok)
		}
	}
	if _, ok := d.At(1); ok {
		t.Error("a place on the axis is read as a time")
	}
	if top, bottom := d.y(10), d.y(0); top >= bottom {
		t.Errorf("10 is drawn at %g, 0 at %g: want the larger above", top, bottom)
	}
}

func TestRead(t *testing.T) {
	if got := fmt.Sprint(sample().Read(60)); got != "[asks 10]" {
		t.Errorf("got %s", got)
	}
}

// A dashed line covers about half of its length.
func TestSecondSeriesIsDashed(t *testing.T) {
	c := sample()
	c.Series[0].Role, c.Levels, c.Marks = Second, nil, nil
	covered := float32(0)
	for _, l := range c.Lay(900, 200, 12).Lines {
		if l.Role == Second {
			covered += l.X2 - l.X1
		}
	}
	d := c.Lay(900, 200, 12)
	if whole := d.x(100) - d.x(0); covered < 0.4*whole || covered > 0.6*whole {
		t.Errorf("dashes cover %.0f of %.0f", covered, whole)
	}
}

package chart

import "testing"

// The word of a mark near the axis stands right of its line, clear of the
// axis' figures; elsewhere left of it.
func TestWordOfMarkKeepsOffTheAxis(t *testing.T) {
	for at, anchor := range map[float64]float32{1: 0, 60: 1} {
		c := sample()
		c.Marks = []Mark{{X: at, Text: "today", Role: Today}}
		d := c.Lay(400, 160, 12)
		found := false
		for _, x := range d.Texts {
			if x.Text != "today" {
				continue
			}
			found = true
			if x.Anchor != anchor {
				t.Errorf("at %v: anchor %v", at, x.Anchor)
			}
			if left := x.X - x.Anchor*0.62*12*5; left < d.plot.x {
				t.Errorf("at %v: it begins at %v, the plot at %v", at, left, d.plot.x)
			}
		}
		if !found {
			t.Errorf("at %v: no word", at)
		}
	}
}

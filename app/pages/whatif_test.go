package pages

import (
	"math"
	"testing"

	"anodewright/app/look"
)

// What if is computed once someone looks, and anew after an edit.
func TestWhatIfOnTheDockingsPage(t *testing.T) {
	f := shown(t, look.Light, 1, small, fleet()...)
	f.s.Select(f.s.Fleet()[0].ID)
	p := f.open(t, "Dockings").(*dockings)
	settle(f)
	if len(p.whatIf.of) != 0 {
		t.Fatal("decisions are weighed before anyone looks")
	}
	p.why.card.Hide()
	p.whatIf.card.Show()
	f.Update()
	settle(f)
	all, known := f.s.Decisions()
	if !known || len(all) < 5 {
		t.Fatalf("known %v: %v", known, all)
	}
	wants(t, f, "What if?", "Fewer dockings", "Price of confidence", all[0].Text)
	for _, d := range all {
		if !math.IsNaN(d.Difference) {
			wants(t, f, signed(d.Difference)+" "+f.s.Asset().Currency)
		}
	}
	o := f.s.Outcome()
	must(t, f.s.Pin(o.Pin(0, 0)))
	settle(f)
	settle(f)
	if again, known := f.s.Decisions(); !known || &again[0] == &all[0] {
		t.Error("after a pin the old decisions are shown")
	}
}

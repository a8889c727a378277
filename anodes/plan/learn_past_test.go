package plan_test

import (
	"math"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/hull"
)

// shut closes the next docking of an asset as drafted, but for what change
// makes of it.
func shut(t *testing.T, a *hull.Asset, change func(*hull.Closing)) *hull.Asset {
	t.Helper()
	c := plan.Compute(a, december).DraftClosing(a.Ahead()[0].Date, 0)
	if change != nil {
		change(&c)
	}
	next, faults := hull.Close(a, c)
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	return next
}

// sameFactor allows for 1 %: circuits learn from each other, and in those of
// several zones each zone's share of the charge is that of the sets fitted now.
func sameFactor(a, b *plan.LearnedFactor) bool {
	near := func(x, y float64) bool { return math.Abs(x/y-1) < 0.01 }
	return a != nil && b != nil && near(a.Median, b.Median) && near(a.Low, b.Low) && near(a.High, b.High)
}

// Closing a docking at which nobody looked loses nothing of what the readings
// before had taught, over two dockings.
func TestClosingKeepsWhatWasLearned(t *testing.T) {
	for i, a := range fleet(t) {
		before := plan.Compute(a, december)
		once := shut(t, a, nil)
		after := plan.Compute(once, december)
		learned := 0
		for z := range a.Zones {
			if l := before.Zones[z].Learned; l != nil && len(after.Zones[z].Zone.Fitted) > 0 && alone(a, z) {
				learned++
				if !sameFactor(l, after.Zones[z].Learned) {
					t.Errorf("%s, %s: before %+v, after %+v", a.Name, a.Zones[z].ID, l, after.Zones[z].Learned)
				}
			}
		}
		if i == 0 && learned == 0 {
			t.Error("nothing was compared")
		}
		if len(once.Ahead()) < 2 {
			continue
		}
		twice := plan.Compute(shut(t, once, nil), december)
		for z := range a.Zones {
			if l := after.Zones[z].Learned; l != nil && len(twice.Zones[z].Zone.Fitted) > 0 && alone(a, z) && !sameFactor(l, twice.Zones[z].Learned) {
				t.Errorf("%s, %s: after one docking %+v, after two %+v", a.Name, a.Zones[z].ID, l, twice.Zones[z].Learned)
			}
		}
	}
}

// alone reports whether no other zone with anodes is in a zone's circuit.
func alone(a *hull.Asset, zone int) bool {
	for i := range a.Zones {
		if i != zone && len(a.Zones[i].Fitted) > 0 && a.CircuitName(&a.Zones[i]) == a.CircuitName(&a.Zones[zone]) {
			return false
		}
	}
	return true
}

// What is found at a docking teaches: anodes that wasted more than expected
// raise the factor and narrow its range, unless nobody looked.
func TestWhatADockingFoundTeaches(t *testing.T) {
	find := func(share float64, how hull.Evidence) *plan.LearnedFactor {
		a := fleet(t)[0]
		a.Readings = nil
		next := shut(t, a, func(c *hull.Closing) {
			for i := range c.Sets {
				if c.Sets[i].How = hull.Forecasted; c.Sets[i].Zone == a.Zones[0].ID {
					from := a.Zones[0].Fitted[0].Wastage
					c.Sets[i].Wastage, c.Sets[i].How = from+share*(c.Expected[i].Median-from), how
				}
			}
		})
		return plan.Compute(next, december).Zones[0].Learned
	}
	if l := find(1.4, hull.Forecasted); l != nil {
		t.Errorf("nobody looked, but %+v was learned", l)
	}
	more, less := find(1.4, hull.Surveyed), find(0.7, hull.Surveyed)
	prior := plan.Compute(fleet(t)[0], december).Before()
	if more == nil || less == nil || more.Median < 1.1 || less.Median > 0.9 || more.High/more.Low > 0.8*prior.High/prior.Low {
		t.Errorf("found more %+v, less %+v, before %+v", more, less, prior)
	}
}

// A coating put on since hides what the steel asked for before: nothing is
// learned from then.
func TestNothingIsLearnedUnderAnUnknownCoat(t *testing.T) {
	a := fleet(t)[0]
	next := shut(t, a, nil)
	if plan.Compute(next, december).Zones[0].Learned == nil {
		t.Fatal("nothing was learned")
	}
	for i := range next.Zones {
		if next.CircuitName(&next.Zones[i]) == next.CircuitName(&next.Zones[0]) {
			next.Zones[i].Coating.Applied = next.LastDocking
		}
	}
	if l := plan.Compute(next, december).Zones[0].Learned; l != nil && l.Readings > 0 {
		t.Errorf("learned %+v", l)
	}
}

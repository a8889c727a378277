package hull_test

import (
	"math"
	"slices"
	"testing"

	"anodewright/hull"
)

// In dock the asset carries what was found, nothing is done yet, and the
// docking is the first ahead; its steel asks for what it would have anyway.
func TestInDock(t *testing.T) {
	a, c := carrier(), closing()
	next, faults := hull.InDock(a, c)
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	side := []hull.Fitted{
		{Pattern: "slab", Count: 23, Fitted: on("2024-03-15"), Wastage: 0.2}, {Pattern: "slab", Count: 10, Fitted: on("2019-03-15"), Wastage: 0.7},
	}
	if got := next.Zones[0].Fitted; !slices.Equal(got, side) {
		t.Errorf("fitted %+v, want %+v", got, side)
	}
	ahead := next.Ahead()
	if next.Start() != on("2027-03-14") || len(ahead) != 2 || ahead[0].Date != c.Date || len(ahead[0].Works) != 1 || ahead[1].Date != on("2029-03-15") {
		t.Errorf("from %s, dockings %+v", next.Start(), ahead)
	}
	a.Dockings[0].Works = c.Works
	before, after := hull.Demand(a), hull.Demand(next)
	for k := 1; k < len(a.Intervals()); k++ {
		if x, y := before[0].Own[k], after[0].Own[k]; math.Abs(x.Mean-y.Mean) > 1e-12*x.Mean || math.Abs(x.Final-y.Final) > 1e-12*x.Final {
			t.Errorf("interval %d: %+v in dock, %+v before", k, y, x)
		}
	}
}

// A docking on another day than listed moves; one after the last asks for a
// next.
func TestInDockOnAnotherDay(t *testing.T) {
	c := closing()
	c.Date, c.Docking = on("2027-05-01"), on("2027-03-15")
	next, faults := hull.InDock(carrier(), c)
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	if ahead := next.Ahead(); len(ahead) != 2 || ahead[0].Date != c.Date || ahead[0].FixedCost != carrier().Dockings[0].FixedCost {
		t.Errorf("dockings %+v", ahead)
	}
	c.Date = on("2024-03-15")
	if _, faults := hull.InDock(carrier(), c); len(faults) != 1 || faults[0].Path != "date" {
		t.Errorf("faults %v", faults)
	}
	c.Date, c.Sets = on("2027-05-01"), c.Sets[:1]
	if _, faults := hull.InDock(carrier(), c); len(faults) != 1 || faults[0].Path != "sets" {
		t.Errorf("faults %v", faults)
	}
}

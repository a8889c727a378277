package hull_test

import (
	"slices"
	"testing"

	"anodewright/hull"
)

// The worked figures of the exchange format: 2080 m2 of category III and 20 m2
// of bare steel in temperate water, three years, then a touch-up of half.
func TestDemandOfTheExample(t *testing.T) {
	a := works(hull.Work{Coating: hull.TouchUp, Share: ptr(0.5)})
	a.Zones[0].WettedArea, a.Zones[0].BareArea = 2100, 20
	propeller := steel("propeller")
	propeller.Surface, propeller.WettedArea, propeller.Depth, propeller.HeldBy = hull.CopperAlloy, 19, 5, "side"
	propeller.Coating = hull.Coating{Category: hull.CategoryNone}
	a.Zones = append(a.Zones, propeller)
	d := demands(t, a)
	near(t, "initial", d[0].Own[0].Initial, 12.32)
	near(t, "mean", d[0].Own[0].Mean, 9.904)
	near(t, "final", d[0].Own[0].Final, 17.7424)
	near(t, "held, initial", d[1].Own[0].Initial, 3.8)
	near(t, "held, breakdown of no coating", d[1].Breakdown[0].Mean, 1)
	near(t, "with what it holds", d[0].Total[0].Mean, 9.904+1.9)
	near(t, "held in all", d[1].Total[0].Mean, 1.9)
}

// A zone's demand reaches its host and its host's host; an unbonded zone hands
// on neither its own nor what it holds.
func TestHeldChains(t *testing.T) {
	a := vessel()
	for i, id := range []string{"keel", "bottom", "shaft", "blade", "alone"} {
		z := steel(id)
		z.Coating = hull.Coating{Category: hull.CategoryNone}
		z.WettedArea = float64(10 * (i + 1)) // 10 to 50 m2, mean 1 to 5 A
		a.Zones = append(a.Zones, z)
	}
	zone := func(id string) *hull.Zone { z, _ := a.Zone(id); return z }
	zone("side").Coating = hull.Coating{Category: hull.CategoryNone}
	zone("side").WettedArea = 100
	zone("keel").HeldBy = "bottom"  // before its host in the file
	zone("bottom").HeldBy = "side"  //
	zone("blade").HeldBy = "shaft"  // a chain that ends in
	zone("shaft").HeldBy = "bottom" // an unbonded zone
	zone("shaft").Bonded = false
	d := demands(t, a)
	index := func(id string) int { return slices.IndexFunc(a.Zones, func(z hull.Zone) bool { return z.ID == id }) }
	for id, want := range map[string]float64{"side": 10 + 2 + 1, "bottom": 2 + 1, "keel": 1, "shaft": 3 + 4, "blade": 4, "alone": 5} {
		for k := range a.Intervals() {
			near(t, id, d[index(id)].Total[k].Mean, want)
		}
	}
	for id, want := range map[string][]string{"side": {"keel", "bottom"}, "bottom": {"keel"}, "shaft": {"blade"}, "alone": nil} {
		var got []string
		for _, i := range a.Held(index(id)) {
			got = append(got, a.Zones[i].ID)
		}
		if !slices.Equal(got, want) {
			t.Errorf("%s holds %v, want %v", id, got, want)
		}
	}
	zone("shaft").Bonded = true
	near(t, "side, all bonded", demands(t, a)[index("side")].Total[0].Mean, 10+2+1+3+4)
	zone("blade").Bonded = false
	near(t, "side, the last one not", demands(t, a)[index("side")].Total[0].Mean, 10+2+1+3)
}

func TestIntervals(t *testing.T) {
	a := vessel()
	a.Dockings = append([]hull.Docking{{Date: on("2022-01-01"), Kind: hull.DryDock}, {Date: a.LastDocking, Kind: hull.DryDock}}, a.Dockings...)
	want := []hull.Interval{
		{From: on("2024-03-15"), To: on("2027-03-15")}, {From: on("2027-03-15"), To: on("2029-03-15")}, {From: on("2029-03-15"), To: on("2034-03-15")},
	}
	if got := a.Intervals(); !slices.Equal(got, want) {
		t.Errorf("got %v", got)
	}
	near(t, "hours", want[0].Hours(), 1095*24)
	near(t, "years", want[0].Years(), 3)
	if n := len(hull.Demand(a)[0].Own); n != 3 {
		t.Errorf("%d intervals of demand", n)
	}
	a.Dockings = a.Dockings[:1]
	if got := a.Intervals(); len(got) != 1 || got[0].To != a.Horizon {
		t.Errorf("no docking ahead: %v", got)
	}
}

// The plan starts at the last docking, else at the latest fitting, else in
// service.
func TestStart(t *testing.T) {
	a := vessel()
	a.Zones[0].Fitted = []hull.Fitted{{Pattern: "slab", Count: 1, Fitted: on("2019-05-01")}, {Pattern: "slab", Count: 1, Fitted: on("2018-05-01")}}
	if a.Start() != on("2024-03-15") {
		t.Errorf("with a last docking: %s", a.Start())
	}
	a.LastDocking = 0
	if a.Start() != on("2019-05-01") {
		t.Errorf("without one: %s", a.Start())
	}
	a.Zones[0].Fitted = nil
	if a.Start() != a.InService {
		t.Errorf("with nothing fitted: %s", a.Start())
	}
}

// Works of dockings before the last one are done and told by the coating.
func TestWorksOfPastDockingsDoNotCount(t *testing.T) {
	a := vessel()
	before := demands(t, a)[0].Breakdown[0]
	past := made(func(d *hull.Docking) { d.Date = on("2022-01-01") })
	past.Works = []hull.Work{{Zone: "side", Coating: hull.Found, Breakdown: ptr(0.9)}}
	a.Dockings = append([]hull.Docking{past}, a.Dockings...)
	if got := demands(t, a)[0].Breakdown[0]; got != before {
		t.Errorf("breakdown %v, want %v", got, before)
	}
}

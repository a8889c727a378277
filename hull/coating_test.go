package hull_test

import (
	"math"
	"testing"

	"anodewright/hull"
)

// The mean of an interval is the integral of the breakdown law, whether the
// coating is broken down altogether before, within or after it, or never.
func TestMeanBreakdownAgainstQuadrature(t *testing.T) {
	for _, c := range []struct {
		a, b           float64
		before, length int // days: coating age at the start, interval
	}{
		{0.02, 0.012, 0, 1825},
		{0.02, 0.012, 1825, 1825},
		{0.1, 0.1, 0, 15 * 365},
		{0.1, 0.1, 5 * 365, 5 * 365}, // broken down at 9 years
		{0.1, 0.1, 9 * 365, 365},     // from the very start
		{0.1, 0.1, 8 * 365, 365},     // at the very end
		{0.1, 0.1, 12 * 365, 7},
		{0.05, 0.025, 37, 1},
		{0, 1, 0, 730},
		{1, 0, 100, 1000},
		{1, 1, 100, 1000},
		{0.3, 0, 100, 1000}, // never
		{0, 0, 100, 1000},
	} {
		a := vessel()
		a.Horizon = a.LastDocking + hull.Date(c.length)
		a.Dockings[0].Date, a.Dockings = on("2020-01-01"), a.Dockings[:1]
		a.Zones[0].Coating = hull.Coating{Category: hull.CategoryOwn, Applied: a.LastDocking - hull.Date(c.before), A: &c.a, B: &c.b}
		got := demands(t, a)[0].Breakdown[0]
		law := func(days float64) float64 { return min(1, c.a+c.b*(float64(c.before)+days)/365) }
		const steps = 100000
		sum := 0.0
		for i := range steps {
			sum += law((float64(i) + 0.5) * float64(c.length) / steps)
		}
		if want := sum / steps; math.Abs(got.Mean-want) > 1e-8 {
			t.Errorf("a %g, b %g from day %d over %d days: mean %.10g, by quadrature %.10g", c.a, c.b, c.before, c.length, got.Mean, want)
		}
		near(t, "initial", got.Initial, law(0))
		near(t, "final", got.Final, law(float64(c.length)))
	}
}

// With no date of the coat it is as old as the asset; constants of its own win
// over the category's, and steel deeper than 30 m has the lower slope.
func TestBreakdownConstants(t *testing.T) {
	none := hull.CategoryNone
	for _, c := range []struct {
		what   string
		coat   hull.Coating
		depth  float64
		aa, bb float64
	}{
		{"I", hull.Coating{Category: hull.CategoryI}, 30, 0.10, 0.10},
		{"II", hull.Coating{Category: hull.CategoryII}, 30, 0.05, 0.025},
		{"III", hull.Coating{Category: hull.CategoryIII}, 30, 0.02, 0.012},
		{"I deeper", hull.Coating{Category: hull.CategoryI}, 30.001, 0.10, 0.05},
		{"II deeper", hull.Coating{Category: hull.CategoryII}, 30.001, 0.05, 0.015},
		{"III deeper", hull.Coating{Category: hull.CategoryIII}, 30.001, 0.02, 0.008},
		{"a its own", hull.Coating{Category: hull.CategoryIII, A: ptr(0.2)}, 10, 0.2, 0.012},
		{"b its own", hull.Coating{Category: hull.CategoryIII, B: ptr(0.2)}, 10, 0.02, 0.2},
		{"own", hull.Coating{Category: hull.CategoryOwn, A: ptr(0.0), B: ptr(0.5)}, 10, 0, 0.5},
		{"none", hull.Coating{Category: none}, 10, 1, 0},
	} {
		z := steel("side")
		z.Coating, z.Depth = c.coat, c.depth
		a, b := z.BreakdownConstants()
		if a != c.aa || b != c.bb || z.Coated() != (c.coat.Category != none) {
			t.Errorf("%s: a %g, b %g, coated %v; want %g and %g", c.what, a, b, z.Coated(), c.aa, c.bb)
		}
	}
	v := vessel()
	v.Zones[0].Coating.Applied = 0
	age := v.LastDocking.Years(v.InService)
	near(t, "a coat as old as the ship", demands(t, v)[0].Breakdown[0].Initial, 0.02+0.012*age)
}

// works is a vessel whose coating, category III, was new at the last docking,
// with works at the first docking ahead, three years on.
func works(ws ...hull.Work) *hull.Asset {
	a := vessel()
	for i := range ws {
		ws[i].Zone = "side"
	}
	a.Dockings[0].Works = ws
	return a
}

func TestCoatingWorks(t *testing.T) {
	first, second := vessel().Dockings[0].Date, vessel().Dockings[1].Date
	old := 0.02 + 0.012*first.Years(vessel().LastDocking) // just before the works
	years := second.Years(first)
	for _, c := range []struct {
		what          string
		works         []hull.Work
		initial, rate float64
	}{
		{"nothing", nil, old, 0.012},
		{"touch-up of half", []hull.Work{{Coating: hull.TouchUp, Share: ptr(0.5)}}, old / 2, 0.012},
		{"touch-up of all", []hull.Work{{Coating: hull.TouchUp, Share: ptr(1.0)}}, 0, 0.012},
		{"touch-up of nothing", []hull.Work{{Coating: hull.TouchUp, Share: ptr(0.0)}}, old, 0.012},
		{"recoat as before", []hull.Work{{Coating: hull.Recoat}}, 0.02, 0.012},
		{"recoat with another", []hull.Work{{Coating: hull.Recoat, Category: hull.CategoryI}}, 0.1, 0.1},
		{"recoat with its own", []hull.Work{{Coating: hull.Recoat, A: ptr(0.01), B: ptr(0.02)}}, 0.01, 0.02},
		{"recoat with its own b", []hull.Work{{Coating: hull.Recoat, Category: hull.CategoryII, B: ptr(0.02)}}, 0.05, 0.02},
		{"part-recoat", []hull.Work{{Coating: hull.PartRecoat, Share: ptr(0.25)}}, 0.75*old + 0.25*0.02, 0.012},
		{"part-recoat with another", []hull.Work{{Coating: hull.PartRecoat, Share: ptr(0.25), Category: hull.CategoryI}}, 0.75*old + 0.25*0.1, 0.012},
		{"found", []hull.Work{{Coating: hull.Found, Breakdown: ptr(0.15)}}, 0.15, 0.012},
		{"clean", []hull.Work{{Coating: hull.Clean}}, old, 0.012},
		// In their order: found and then mended is not mended and then found.
		{"found, then touched up", []hull.Work{{Coating: hull.Found, Breakdown: ptr(0.2)}, {Coating: hull.TouchUp, Share: ptr(0.5)}}, 0.1, 0.012},
		{"touched up, then found", []hull.Work{{Coating: hull.TouchUp, Share: ptr(0.5)}, {Coating: hull.Found, Breakdown: ptr(0.2)}}, 0.2, 0.012},
		{"recoated, then touched up", []hull.Work{{Coating: hull.Recoat, Category: hull.CategoryI}, {Coating: hull.TouchUp, Share: ptr(0.5)}}, 0.05, 0.1},
		{"touched up twice", []hull.Work{{Coating: hull.TouchUp, Share: ptr(0.5)}, {Coating: hull.TouchUp, Share: ptr(0.5)}}, old / 4, 0.012},
	} {
		d := demands(t, works(c.works...))[0]
		near(t, c.what+": before the works", d.Breakdown[0].Final, old)
		near(t, c.what+": after", d.Breakdown[1].Initial, c.initial)
		near(t, c.what+": mean after", d.Breakdown[1].Mean, c.initial+c.rate*years/2)
		near(t, c.what+": two years on", d.Breakdown[1].Final, c.initial+c.rate*years)
		// The last docking has no works: it goes on growing.
		near(t, c.what+": after the next docking", d.Breakdown[2].Initial, d.Breakdown[1].Final)
	}
}

// Works mend the coating, not the bare area, and only the zone that they name.
func TestWorksLeaveTheBareAreaAndOtherZones(t *testing.T) {
	a := works(hull.Work{Coating: hull.TouchUp, Share: ptr(1.0)})
	a.Zones[0].BareArea = 10
	other := steel("other")
	other.Coating.Applied = a.LastDocking
	a.Zones = append(a.Zones, other)
	d := demands(t, a)
	// Temperate, to 30 m: 200 mA/m2 at first.
	near(t, "bare area after a touch-up of all", d[0].Own[1].Initial, 0.2*10)
	near(t, "zone without works", d[1].Breakdown[1].Initial, d[1].Breakdown[0].Final)
}

// Ship practice: density by the coating's age; a touch-up or part-recoat of
// share s leaves (1-s) of the age, a recoat none, found and clean all of it.
func TestAgeOfShipPractice(t *testing.T) {
	first, second := vessel().Dockings[0].Date, vessel().Dockings[1].Date
	old := first.Years(vessel().LastDocking)
	between := second.Years(first)
	for _, c := range []struct {
		what  string
		works []hull.Work
		age   float64
	}{
		{"nothing", nil, old},
		{"touch-up", []hull.Work{{Coating: hull.TouchUp, Share: ptr(0.4)}}, 0.6 * old},
		{"part-recoat", []hull.Work{{Coating: hull.PartRecoat, Share: ptr(0.4)}}, 0.6 * old},
		{"recoat", []hull.Work{{Coating: hull.Recoat}}, 0},
		{"found", []hull.Work{{Coating: hull.Found, Breakdown: ptr(0.5)}}, old},
		{"clean", []hull.Work{{Coating: hull.Clean}}, old},
		{"touched up twice", []hull.Work{{Coating: hull.TouchUp, Share: ptr(0.5)}, {Coating: hull.TouchUp, Share: ptr(0.5)}}, old / 4},
	} {
		a := works(c.works...)
		a.Basis.Densities = hull.HullPractice
		a.Zones[0].BareArea = 10
		d := demands(t, a)[0].Own
		// 90 m2 of paint at 10 + 1.5 a year, 10 m2 bare in temperate water.
		near(t, c.what+": initial", d[1].Initial, 0.09*(10+1.5*c.age)+2)
		near(t, c.what+": mean", d[1].Mean, 0.09*(10+1.5*(c.age+between/2))+1)
		near(t, c.what+": final", d[1].Final, 0.09*(10+1.5*(c.age+between))+1.3)
	}
	a := works()
	a.Basis.Densities, a.Basis.PracticeI0, a.Basis.PracticePerYear = hull.HullPractice, 4, 0.5
	near(t, "the user's figures", demands(t, a)[0].Own[0].Final, 0.1*(4+0.5*old))
}

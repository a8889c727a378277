package hull_test

import (
	"fmt"
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"anodewright/hull"
)

// The waters of random assets, warmest first.
var climates = []hull.Water{sea("tropic", 26), sea("sub", 15), sea("temperate", 9), sea("arctic", 3)}

func drawShares(t *rapid.T, label string) []hull.WaterShare {
	ids := []string{"tropic", "sub", "temperate", "arctic"}
	n := rapid.IntRange(1, 3).Draw(t, label+" waters")
	ids = rapid.Permutation(ids).Draw(t, label+" order")[:n]
	weights, sum := make([]float64, n), 0.0
	for i := range weights {
		weights[i] = rapid.Float64Range(0.05, 1).Draw(t, label+" weight")
		sum += weights[i]
	}
	var shares []hull.WaterShare
	for i, id := range ids {
		shares = append(shares, hull.WaterShare{Water: id, Share: weights[i] / sum})
	}
	return shares
}

func drawService(t *rapid.T, start hull.Date, label string) []hull.Service {
	var ss []hull.Service
	from := start - 300
	for range rapid.IntRange(0, 3).Draw(t, label+" changes") {
		from += hull.Date(rapid.IntRange(1, 1200).Draw(t, label+" after"))
		s := hull.Service{From: from}
		if s.Waters = drawShares(t, label); rapid.Bool().Draw(t, label+" way") {
			s.UnderWayFactor = ptr(rapid.Float64Range(0.5, 2).Draw(t, label+" factor"))
		}
		ss = append(ss, s)
	}
	return ss
}

func drawCoating(t *rapid.T, start hull.Date) hull.Coating {
	c := hull.Coating{
		Category: rapid.SampledFrom([]hull.Category{hull.CategoryI, hull.CategoryII, hull.CategoryIII, hull.CategoryOwn, hull.CategoryNone}).Draw(t, "category"),
		Applied:  start - hull.Date(rapid.IntRange(0, 4000).Draw(t, "coating age")),
	}
	if c.Category == hull.CategoryOwn {
		c.A, c.B = ptr(rapid.Float64Range(0, 1).Draw(t, "a")), ptr(rapid.Float64Range(0, 0.3).Draw(t, "b"))
	}
	return c
}

func drawWork(t *rapid.T, zone string) hull.Work {
	w := hull.Work{Zone: zone, Coating: rapid.SampledFrom([]hull.CoatingWork{hull.TouchUp, hull.Recoat, hull.PartRecoat, hull.Found, hull.Clean}).Draw(t, "work")}
	switch w.Coating {
	case hull.TouchUp, hull.PartRecoat:
		w.Share = ptr(rapid.Float64Range(0, 1).Draw(t, "share"))
	case hull.Found:
		w.Breakdown = ptr(rapid.Float64Range(0, 1).Draw(t, "found"))
	}
	return w
}

// drawVessel is a random valid asset of one to four zones, some held by the
// first.
func drawVessel(t *rapid.T) *hull.Asset {
	a := vessel()
	a.Waters = slices.Clone(climates)
	a.Service = drawService(t, a.LastDocking, "trade")
	a.Basis.Densities = rapid.SampledFrom([]hull.DensityRule{hull.OffshoreCode, hull.HullPractice}).Draw(t, "rule")
	a.Zones = nil
	for i := range rapid.IntRange(1, 4).Draw(t, "zones") {
		z := steel(fmt.Sprint("z", i))
		z.WettedArea = rapid.Float64Range(1, 3000).Draw(t, "area")
		z.BareArea = z.WettedArea * rapid.Float64Range(0, 1).Draw(t, "bare share")
		z.Depth = rapid.SampledFrom([]float64{0, 5, 30, 31, 100, 101, 300, 301, 2000}).Draw(t, "depth")
		z.Surface = rapid.SampledFrom([]hull.Surface{hull.CarbonSteel, hull.CopperAlloy, hull.Galvanised, hull.Reinforcement}).Draw(t, "surface")
		z.Coating = drawCoating(t, a.LastDocking)
		z.Waters = drawShares(t, "zone")
		z.UnderWayFactor = rapid.Float64Range(0.5, 2).Draw(t, "way")
		z.ImmersedShare = rapid.Float64Range(0.1, 1).Draw(t, "immersed")
		z.Wells = rapid.IntRange(0, 2).Draw(t, "wells")
		if rapid.Bool().Draw(t, "own service") {
			z.Service = drawService(t, a.LastDocking, "own")
		}
		if i > 0 && rapid.Bool().Draw(t, "held") {
			z.HeldBy = fmt.Sprint("z", rapid.IntRange(0, i-1).Draw(t, "host"))
		}
		z.Bonded = rapid.Bool().Draw(t, "bonded")
		a.Zones = append(a.Zones, z)
	}
	for i := range a.Dockings {
		for range rapid.IntRange(0, 2).Draw(t, "works") {
			zone := rapid.SampledFrom(a.Zones).Draw(t, "work on").ID
			a.Dockings[i].Works = append(a.Dockings[i].Works, drawWork(t, zone))
		}
	}
	if faults := hull.Check(a); len(faults) > 0 {
		t.Fatalf("a random asset is at fault:\n%v", faults)
	}
	return a
}

// atLeast fails where some zone asks for less than before.
func atLeast(t *rapid.T, what string, after, before []hull.ZoneDemand) {
	for i := range before {
		for k := range before[i].Own {
			for _, x := range [][2]hull.Current{{after[i].Own[k], before[i].Own[k]}, {after[i].Total[k], before[i].Total[k]}} {
				below := func(a, b float64) bool { return !(a >= b*(1-1e-12)) }
				if below(x[0].Initial, x[1].Initial) || below(x[0].Mean, x[1].Mean) || below(x[0].Final, x[1].Final) {
					t.Fatalf("%s: zone %d asks in interval %d for %v, before for %v", what, i, k, x[0], x[1])
				}
			}
		}
	}
}

func TestMoreSteelAsksForNoLess(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a := drawVessel(t)
		before := hull.Demand(a)
		z := &a.Zones[rapid.IntRange(0, len(a.Zones)-1).Draw(t, "zone")]
		z.WettedArea += rapid.Float64Range(0, 500).Draw(t, "more")
		atLeast(t, "more steel", hull.Demand(a), before)
		// Paint worn off asks for no less by the code; ship practice has a
		// figure for paint only.
		if a.Basis.Densities == hull.OffshoreCode {
			before = hull.Demand(a)
			z.BareArea += (z.WettedArea - z.BareArea) * rapid.Float64Range(0, 1).Draw(t, "worn off")
			atLeast(t, "less paint", hull.Demand(a), before)
		}
	})
}

func TestWorseCoatingAsksForNoLess(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a := drawVessel(t)
		before := hull.Demand(a)
		z := &a.Zones[rapid.IntRange(0, len(a.Zones)-1).Draw(t, "zone")]
		worse := rapid.SampledFrom([]string{"a", "b", "older", "category"}).Draw(t, "worse")
		aa, bb := z.BreakdownConstants()
		switch worse {
		case "a":
			aa = min(1, aa+rapid.Float64Range(0, 1).Draw(t, "a more"))
			z.Coating.A, z.Coating.B = &aa, &bb
		case "b":
			bb = min(1, bb+rapid.Float64Range(0, 0.5).Draw(t, "b more"))
			z.Coating.A, z.Coating.B = &aa, &bb
		case "older":
			z.Coating.Applied -= hull.Date(rapid.IntRange(0, 3000).Draw(t, "days"))
		case "category":
			switch z.Coating.Category {
			case hull.CategoryIII:
				z.Coating.Category = hull.CategoryII
			case hull.CategoryII:
				z.Coating.Category = hull.CategoryI
			}
		}
		atLeast(t, "a worse coating, "+worse, hull.Demand(a), before)
	})
}

// Reinforcement apart, whose densities fall with the temperature.
func TestColderWaterAsksForNoLess(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a := drawVessel(t)
		for i := range a.Zones {
			if a.Zones[i].Surface == hull.Reinforcement {
				a.Zones[i].Surface = hull.CarbonSteel
			}
		}
		before := hull.Demand(a)
		w := &a.Waters[rapid.IntRange(0, len(a.Waters)-1).Draw(t, "water")]
		w.Temperature = ptr(max(-1.9, *w.Temperature-rapid.Float64Range(0, 25).Draw(t, "colder")))
		atLeast(t, "colder water", hull.Demand(a), before)
	})
}

// A docking without works changes nothing: the means of the parts, weighed by
// time, are the mean of the whole, and the ends stay what they were.
func TestMeansOfPartsAddUp(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a := drawVessel(t)
		whole := hull.Demand(a)
		ivs := a.Intervals()
		k := rapid.IntRange(0, len(ivs)-1).Draw(t, "interval")
		cut := ivs[k].From + hull.Date(rapid.IntRange(1, int(ivs[k].To-ivs[k].From)-1).Draw(t, "cut"))
		a.Dockings = slices.Insert(a.Dockings, k, hull.Docking{Date: cut, Kind: hull.DryDock})
		parts := hull.Demand(a)
		share := float64(cut-ivs[k].From) / float64(ivs[k].To-ivs[k].From)
		same := func(what string, got, want float64) {
			if math.Abs(got-want) > 1e-9*math.Max(want, 1e-6) {
				t.Fatalf("%s: %.12g in parts, %.12g as a whole", what, got, want)
			}
		}
		for i := range whole {
			one, first, second := whole[i], parts[i].Total[k], parts[i].Total[k+1]
			same("mean demand", share*first.Mean+(1-share)*second.Mean, one.Total[k].Mean)
			same("initial demand", first.Initial, one.Total[k].Initial)
			same("final demand", second.Final, one.Total[k].Final)
			f, s := parts[i].Breakdown[k], parts[i].Breakdown[k+1]
			same("mean breakdown", share*f.Mean+(1-share)*s.Mean, one.Breakdown[k].Mean)
			same("breakdown at the cut", f.Final, s.Initial)
		}
	})
}

// What a zone holds for others is theirs: all own demands of bonded zones
// reach zones that are held by none, once each.
func TestTotalsAreOwnDemands(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a := drawVessel(t)
		for i := range a.Zones {
			a.Zones[i].Bonded = true
		}
		var own, total float64
		for i, d := range hull.Demand(a) {
			own += d.Own[0].Mean
			if a.Zones[i].HeldBy == "" {
				total += d.Total[0].Mean
			}
		}
		if math.Abs(own-total) > 1e-9*own {
			t.Fatalf("own demands of %g A, totals of %g A", own, total)
		}
	})
}

// Breakdown is a share, its mean lies between its ends, and time or years make
// no paint better.
func TestBreakdownIsAShare(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a := drawVessel(t)
		for i, d := range hull.Demand(a) {
			for k, b := range d.Breakdown {
				if !(0 <= b.Initial && b.Initial <= b.Mean+1e-12 && b.Mean <= b.Final+1e-12 && b.Final <= 1) {
					t.Fatalf("zone %d, interval %d: %v", i, k, b)
				}
			}
		}
	})
}

package renewal

import (
	"fmt"
	"math"
	"math/rand/v2"
	"testing"

	"anodewright/hull"
)

// randomAsset returns a small valid asset. Free ones cost nothing but, at
// some dockings, the shared cost, so that many plans cost the same.
func randomAsset(t *testing.T, seed uint64, dockings int, free bool) *hull.Asset {
	t.Helper()
	r := rand.New(rand.NewPCG(seed, 1))
	between := func(low, high float64) float64 { return low + (high-low)*r.Float64() }
	chance := func(p float64) bool { return r.Float64() < p }
	p := func(x float64) *float64 { return &x }

	a := &hull.Asset{
		Name: "Random", Kind: hull.Jacket, InService: hull.NewDate(2015, 1, 1), LastDocking: hull.NewDate(2020, 1, 1),
		Basis: hull.Basis{
			Densities: hull.OffshoreCode, Sizing: hull.CodeSizing, Reserve: 0.15, RenewAbove: between(0.3, 1), OutputWater: hull.MeanWater,
			PracticeI0: 10, PracticePerYear: 1.5, CurvePeak: 2.5,
		},
		Waters: []hull.Water{{ID: "w", Medium: hull.Seawater, Temperature: p(between(0, 28)), Salinity: p(between(20, 38))}},
		Costs:  hull.Costs{DiscountRate: between(0, 0.1), FitPerPiece: between(0, 150), RemovePerPiece: between(0, 60), PerZone: between(0, 2000)},
	}
	shapes := []hull.Shape{hull.LongSlender, hull.LongFlush, hull.ShortFlush}
	for i := range 1 + r.IntN(3) {
		m := hull.Pattern{
			ID: fmt.Sprint("p", i), Alloy: hull.Aluminium, Shape: shapes[r.IntN(3)], Length: between(0.8, 1.6), Width: between(0.1, 0.2),
			Height: between(0.06, 0.12), Radius: between(0.05, 0.1), Standoff: between(0.1, 0.4), Utilisation: between(0.7, 0.9),
			Price: between(50, 700), OrderMultiple: 1, Afloat: chance(0.7),
		}
		m.NetMass = 2700 * m.Length * m.Width * m.Height
		if chance(0.2) {
			m.Alloy = hull.Zinc
		}
		a.Patterns = append(a.Patterns, m)
	}
	for i := range 1 + r.IntN(3) {
		z := hull.Zone{
			ID: fmt.Sprint("z", i), Name: "Zone", Region: "brace", Surface: hull.CarbonSteel, WettedArea: between(20, 1200), Depth: between(1, 120),
			Coating: hull.Coating{Category: hull.CategoryIII}, Waters: []hull.WaterShare{{Water: "w", Share: 1}}, CountMultiple: 1 + r.IntN(3),
			Bonded: true, MixAlloys: chance(0.3), UnderWayFactor: 1, ImmersedShare: 1, Shielding: 1, MinCount: r.IntN(8),
		}
		if chance(0.3) {
			most := z.MinCount + 3 + r.IntN(40)
			z.MaxCount = &most
		}
		for range r.IntN(3) {
			m := a.Patterns[r.IntN(len(a.Patterns))]
			z.Fitted = append(z.Fitted, hull.Fitted{Pattern: m.ID, Count: 1 + r.IntN(80), Fitted: a.LastDocking, Wastage: between(0, 0.8)})
		}
		a.Zones = append(a.Zones, z)
	}
	date := a.LastDocking
	for range dockings {
		date += hull.Date(300 + r.IntN(1500))
		d := hull.Docking{Date: date, Kind: hull.DryDock, FixedCost: between(0, 9000)}
		switch {
		case chance(0.15):
			d.Kind = hull.InWater
		case chance(0.4):
			d.Kind, d.Mobilisation, d.DayRate = hull.Campaign, between(0, 4000), between(0, 6000)
			d.PiecesPerDay = []float64{1, 2.5, 3, 8, 0.7}[r.IntN(5)]
		}
		if share := between(0, 1); chance(0.4) {
			d.Works = []hull.Work{{Zone: a.Zones[0].ID, Coating: hull.TouchUp, Share: &share}}
		}
		a.Dockings = append(a.Dockings, d)
	}
	a.Horizon = date + hull.Date(300+r.IntN(1800))
	if free {
		a.Costs = hull.Costs{}
		for i := range a.Patterns {
			a.Patterns[i].Price = math.Round(between(0, 1.2)) * 500
		}
		for i := range a.Dockings {
			d := &a.Dockings[i]
			d.FixedCost = math.Round(d.FixedCost/9000) * 1000
			d.Mobilisation, d.DayRate = 0, 0
		}
	}
	if err := hull.Check(a).Err(); err != nil {
		t.Fatalf("seed %d is no valid asset: %v", seed, err)
	}
	return a
}

// solve solves an asset by its own demand and a demand factor of 1.
func solve(a *hull.Asset) (Result, []*zone) {
	demand := hull.Demand(a)
	totals, factors := make([][]hull.Current, len(a.Zones)), make([]float64, len(a.Zones))
	var zones []*zone
	for i := range a.Zones {
		totals[i], factors[i] = demand[i].Total, 1
		zones = append(zones, newZone(a, i, totals[i], 1))
	}
	return Solve(a, totals, factors), zones
}

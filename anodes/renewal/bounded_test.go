package renewal

import (
	"fmt"
	"math"
	"math/rand/v2"
	"syscall"
	"testing"

	"anodewright/hull"
)

// largeAsset has many zones, equal ones if asked for, dockings about every
// second year and twelve patterns.
func largeAsset(tb testing.TB, zones, dockings, patterns int, equal bool, seed uint64) *hull.Asset {
	tb.Helper()
	r := rand.New(rand.NewPCG(seed, 7))
	between := func(low, high float64) float64 { return low + (high-low)*r.Float64() }
	p := func(x float64) *float64 { return &x }
	a := &hull.Asset{
		Name: "Large", Kind: hull.Jacket, InService: hull.NewDate(2015, 1, 1), LastDocking: hull.NewDate(2020, 1, 1),
		Basis: hull.Basis{
			Densities: hull.OffshoreCode, Sizing: hull.CodeSizing, Reserve: 0.15, RenewAbove: 0.8, OutputWater: hull.MeanWater,
			PracticeI0: 10, PracticePerYear: 1.5, CurvePeak: 2.5,
		},
		Waters: []hull.Water{{ID: "w", Medium: hull.Seawater, Temperature: p(11), Salinity: p(34)}},
		Costs:  hull.Costs{DiscountRate: 0.04, FitPerPiece: 60, RemovePerPiece: 20, PerZone: 400},
	}
	shapes := []hull.Shape{hull.LongSlender, hull.LongFlush, hull.ShortFlush}
	for i := range patterns {
		m := hull.Pattern{
			ID: fmt.Sprint("p", i), Alloy: hull.Aluminium, Shape: shapes[i%3], Length: between(0.5, 1.6), Width: between(0.1, 0.2),
			Height: between(0.06, 0.12), Radius: between(0.05, 0.1), Standoff: between(0.1, 0.4), Utilisation: between(0.8, 0.9), OrderMultiple: 1,
		}
		m.NetMass = 2700 * m.Length * m.Width * m.Height
		m.Price = math.Round(40 + 6*m.NetMass*between(0.9, 1.1))
		a.Patterns = append(a.Patterns, m)
	}
	for i := range zones {
		area := between(100, 1500)
		if equal {
			area = 400
		}
		z := hull.Zone{
			ID: fmt.Sprint("z", i), Name: "Zone", Region: "brace", Surface: hull.CarbonSteel, WettedArea: area, Depth: 20,
			Coating: hull.Coating{Category: hull.CategoryIII}, Waters: []hull.WaterShare{{Water: "w", Share: 1}}, CountMultiple: 1,
			Bonded: true, UnderWayFactor: 1, ImmersedShare: 1, Shielding: 1,
		}
		n := 4 + int(area/40)
		z.Fitted = []hull.Fitted{{Pattern: "p0", Count: n, Fitted: a.LastDocking, Wastage: 0.2}}
		a.Zones = append(a.Zones, z)
	}
	date := a.LastDocking
	for range dockings {
		date += hull.Date(900)
		a.Dockings = append(a.Dockings, hull.Docking{Date: date, Kind: hull.DryDock, FixedCost: math.Round(between(2000, 9000))})
	}
	a.Horizon = date + 900
	if err := hull.Check(a).Err(); err != nil {
		tb.Fatal(err)
	}
	return a
}

// BenchmarkLimits is the plan of 40 zones, 8 dockings and 12 patterns within
// limits, with the gap that is left to its bound in percent.
func BenchmarkLimits(b *testing.B) {
	for _, equal := range []bool{true, false} {
		a := largeAsset(b, 40, 8, 12, equal, 0)
		pieces, money := 0, 0.0
		for _, u := range usedBy(a, problem(a).Solve().Best.Lines) {
			pieces, money = max(pieces, u.pieces), max(money, u.spent)
		}
		for _, l := range []Limits{{Pieces: pieces * 7 / 10}, {Budget: money * 0.7}, {Patterns: 2}, {Pieces: pieces * 8 / 10, Budget: money * 0.85, Patterns: 3}} {
			p := problem(a)
			p.Limits = l
			b.Run(fmt.Sprintf("equal %t, %d pieces, %.0f money, %d patterns", equal, l.Pieces, l.Budget, l.Patterns), func(b *testing.B) {
				start := processorTime()
				for b.Loop() {
					r := p.Solve()
					b.ReportMetric(100*(r.Best.Total/r.LowerBound-1), "%gap")
				}
				b.ReportMetric(float64(processorTime()-start)/1e6/float64(b.N), "cpu-ms/op")
			})
		}
	}
}

// BenchmarkSolve is the exact plan of 40 zones, 8 dockings and 12 patterns.
func BenchmarkSolve(b *testing.B) {
	a := largeAsset(b, 40, 8, 12, false, 0)
	p := problem(a)
	b.ReportAllocs()
	start := processorTime()
	for b.Loop() {
		p.Solve()
	}
	b.ReportMetric(float64(processorTime()-start)/1e6/float64(b.N), "cpu-ms/op")
}

// processorTime is what the process has used, in ns; others may use the
// machine, too.
func processorTime() int64 {
	var u syscall.Rusage
	syscall.Getrusage(syscall.RUSAGE_SELF, &u)
	return u.Utime.Nano() + u.Stime.Nano()
}

// BenchmarkSixteenDockings is the exact plan of 40 zones over 16 dockings.
func BenchmarkSixteenDockings(b *testing.B) {
	p := problem(largeAsset(b, 40, 16, 6, false, 1))
	start := processorTime()
	for b.Loop() {
		if r := p.Solve(); !r.Proven() {
			b.Fatal("not proven")
		}
	}
	b.ReportMetric(float64(processorTime()-start)/1e6/float64(b.N), "cpu-ms/op")
}

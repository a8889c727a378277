package plan_test

import (
	"context"
	"errors"
	"fmt"
	"math"
	"runtime"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// A fleet's plans are those of its assets one by one, each told once.
func TestFleetIsItsAssets(t *testing.T) {
	all := fleet(t)
	told := map[int]plan.MemberPlan{}
	err := plan.Fleet(context.Background(), 3*len(all), december, func(i int) (plan.Member, error) {
		return plan.Member{Asset: all[i%len(all)]}, nil
	}, func(p plan.MemberPlan) {
		if _, twice := told[p.Index]; twice {
			t.Errorf("%d is told twice", p.Index)
		}
		told[p.Index] = p
	})
	if err != nil || len(told) != 3*len(all) {
		t.Fatalf("%d plans, %v", len(told), err)
	}
	for i, p := range told {
		o := plan.Compute(all[i%len(all)], december)
		if math.Abs(p.Total-o.Money.Total) > 1e-6 || math.Abs(p.LowerBound-o.Money.LowerBound) > 1e-6 || len(p.Order) != len(o.Order) {
			t.Errorf("%s: total %v, bound %v and %d lines, alone %v, %v, %d", o.Asset.Name, p.Total, p.LowerBound, len(p.Order), o.Money.Total, o.Money.LowerBound, len(o.Order))
		}
		want, ok := o.OrderBy()
		if got, has := p.OrderBy(o.Today); got != want || has != ok {
			t.Errorf("%s: order by %v, alone %v", o.Asset.Name, got, want)
		}
	}
}

// Stored demand factors are those that the plan uses.
func TestFleetUsesStoredFactors(t *testing.T) {
	a := fleet(t)[0]
	total := func(factor float64) (total float64) {
		factors := make([]float64, len(a.Zones))
		for i := range factors {
			factors[i] = factor
		}
		err := plan.Fleet(context.Background(), 1, december,
			func(int) (plan.Member, error) { return plan.Member{Asset: a, Factors: factors}, nil },
			func(p plan.MemberPlan) { total = p.Total })
		if err != nil {
			t.Fatal(err)
		}
		return total
	}
	if one, more := total(1), total(1.3); math.Abs(one-plan.Compute(a, december).Money.Total) > 1e-6 || more <= one {
		t.Errorf("at 1 it costs %v, at 1.3 %v", one, more)
	}
}

// A fleet stops when it is told to, and at a member that cannot be had.
func TestFleetStops(t *testing.T) {
	a := fleet(t)[0]
	ctx, cancel := context.WithCancel(context.Background())
	defer cancel()
	n := 0
	err := plan.Fleet(ctx, 100000, december, func(int) (plan.Member, error) { return plan.Member{Asset: a}, nil }, func(plan.MemberPlan) {
		if n++; n == 3 {
			cancel()
		}
	})
	if !errors.Is(err, context.Canceled) || n != 3 {
		t.Errorf("cancelled after 3, %d were told: %v", n, err)
	}
	gone := errors.New("gone")
	err = plan.Fleet(context.Background(), 50, december, func(i int) (plan.Member, error) {
		if i == 7 {
			return plan.Member{}, gone
		}
		return plan.Member{Asset: a}, nil
	}, func(plan.MemberPlan) {})
	if !errors.Is(err, gone) {
		t.Errorf("without a member: %v", err)
	}
}

// BenchmarkFleet plans 1000 assets of 40 zones from stored demand factors, each
// decoded anew.
func BenchmarkFleet(b *testing.B) {
	a := assetfile.Clone(fleetOf(b))
	text := assetfile.Encode(a)
	factors := make([]float64, len(a.Zones))
	for b.Loop() {
		most := uint64(0)
		err := plan.Fleet(context.Background(), 1000, december, func(i int) (plan.Member, error) {
			own, err := assetfile.Decode(text)
			if err != nil {
				return plan.Member{}, err
			}
			f := make([]float64, len(factors))
			for k := range f {
				f[k] = 0.8 + 0.0005*float64((i+k)%1000)
			}
			return plan.Member{Asset: own, Factors: f}, nil
		}, func(p plan.MemberPlan) {
			if p.Index%100 == 0 {
				var m runtime.MemStats
				runtime.ReadMemStats(&m)
				most = max(most, m.Sys)
			}
		})
		if err != nil {
			b.Fatal(err)
		}
		b.ReportMetric(float64(most)/1e6, "MB")
	}
}

// fleetOf is the first demo asset with 40 zones.
func fleetOf(b *testing.B) *hull.Asset {
	a := demo(b)
	own := len(a.Zones)
	for i := 0; len(a.Zones) < 40; i++ {
		z := assetfile.Clone(a).Zones[i%own]
		if z.HeldBy != "" {
			continue
		}
		z.ID, z.Circuit = fmt.Sprint(z.ID, "-", i), ""
		z.WettedArea *= 0.6 + 0.02*float64(i)
		a.Zones = append(a.Zones, z)
	}
	a.Readings = nil
	if err := hull.Check(a).Err(); err != nil {
		b.Fatal(err)
	}
	return a
}

package against

import (
	"fmt"
	"math"
	"slices"
	"testing"
	"time"

	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

var today = hull.NewDate(2026, 12, 1)

// timed returns how long a call takes.
func timed(call func()) time.Duration {
	start := time.Now()
	call()
	return time.Since(start)
}

// once returns how long one of many equal calls takes.
func once(calls int, call func()) time.Duration {
	return timed(func() {
		for range calls {
			call()
		}
	}) / time.Duration(calls)
}

// faster reports both times and by how much ours is faster.
func faster(b *testing.B, ours, theirs time.Duration) {
	report(b, ours, theirs)
	b.ReportMetric(theirs.Seconds()/ours.Seconds(), "times-faster")
}

// longer reports both times and by how much ours takes longer.
func longer(b *testing.B, ours, theirs time.Duration) {
	report(b, ours, theirs)
	b.ReportMetric(ours.Seconds()/theirs.Seconds(), "times-as-long")
}

func report(b *testing.B, ours, theirs time.Duration) {
	b.ReportMetric(ours.Seconds()*1e3, "ours-ms")
	b.ReportMetric(theirs.Seconds()*1e3, "theirs-ms")
}

func demo(t testing.TB, n int) *hull.Asset {
	t.Helper()
	a, err := assetfile.Decode(assets.Demo()[n])
	if err != nil {
		t.Fatal(err)
	}
	return a
}

// sized is the demo ship with so many zones and so many dockings ahead, all a
// year and a half apart.
func sized(t testing.TB, zones, dockings int) *hull.Asset {
	t.Helper()
	a := demo(t, 0)
	own := slices.DeleteFunc(slices.Clone(a.Zones), func(z hull.Zone) bool { return len(z.Fitted) == 0 })
	a.Zones = a.Zones[:0]
	for n := range zones {
		z := own[n%len(own)]
		z.ID, z.Name = fmt.Sprint("zone-", n), fmt.Sprint("Zone ", n)
		z.Circuit = z.ID
		z.WettedArea *= 1 + 0.3*math.Sin(float64(n))
		z.BareArea = min(z.BareArea, z.WettedArea)
		a.Zones = append(a.Zones, z)
	}
	d := a.Ahead()[0]
	d.Works = nil
	a.Dockings, a.Readings, a.Closed, a.Ledger = nil, nil, nil, nil
	for n := range dockings {
		d.Date = a.Start() + hull.Date(900+540*n)
		a.Dockings = append(a.Dockings, d)
	}
	a.Horizon = d.Date + 540
	a.Service = nil
	if faults := hull.Check(a); len(faults) > 0 {
		t.Fatal(faults)
	}
	return assetfile.Clone(a)
}

func TestExponent(t *testing.T) {
	for _, p := range []float64{0.5, 1, 2} {
		sizes := []float64{10, 40, 160}
		var costs []float64
		for _, s := range sizes {
			costs = append(costs, 3*math.Pow(s, p))
		}
		if got := exponent(sizes, costs); math.Abs(got-p) > 1e-12 {
			t.Errorf("the exponent of a power %v is %v", p, got)
		}
	}
}

func TestBestTakesTurns(t *testing.T) {
	var order []int
	next := time.Duration(0)
	call := func(who int) func() time.Duration {
		return func() time.Duration { order = append(order, who); next++; return next }
	}
	if x, y := best(3, call(1), call(2)); x != 1 || y != 2 || !slices.Equal(order, []int{1, 2, 1, 2, 1, 2}) {
		t.Errorf("best %d and %d in the order %v", x, y, order)
	}
}

// The assets that cost is measured on are valid and as large as asked for.
func TestSized(t *testing.T) {
	if a := sized(t, 33, 5); len(a.Zones) != 33 || len(a.Ahead()) != 5 {
		t.Errorf("%d zones, %d dockings", len(a.Zones), len(a.Ahead()))
	}
}

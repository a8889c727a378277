package plan_test

import (
	"math"
	"strings"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

func demo(t testing.TB) *hull.Asset {
	t.Helper()
	a, err := assetfile.Decode(assets.Demo()[0])
	if err != nil {
		t.Fatal(err)
	}
	return a
}

// Every action of the demo ship pinned away costs something or cannot be; the
// pin stands, the difference is told, and what remains is proven cheapest.
func TestPins(t *testing.T) {
	a := demo(t)
	free := plan.Compute(a, hull.NewDate(2026, 12, 1))
	if free.Money.Free != free.Money.Total || len(free.Pins) != 0 {
		t.Fatalf("without pins: %+v, %v", free.Money, free.Pins)
	}
	stood := 0
	for _, l := range free.Schedule {
		pin := free.Pin(l.Zone, l.Docking)
		same := plan.Compute(a, hull.NewDate(2026, 12, 1), plan.WithPins([]renewal.Pin{pin}))
		if got, ok := same.PinAt(l.Zone, l.Docking); !ok || got.Refused != "" || math.Abs(got.Cost) > 1e-6 {
			t.Errorf("%+v: %+v, %v", pin, got, ok)
		}
		if l.Action == renewal.Keep {
			continue
		}
		other := renewal.Pin{Zone: pin.Zone, Docking: pin.Docking, Action: renewal.Keep}
		o := plan.Compute(a, hull.NewDate(2026, 12, 1), plan.WithPins([]renewal.Pin{other}))
		got, _ := o.PinAt(l.Zone, l.Docking)
		if got.Refused != "" {
			if math.Abs(o.Money.Total-free.Money.Total) > 1e-6 {
				t.Errorf("a refused pin changed the total to %v", o.Money.Total)
			}
			continue
		}
		stood++
		if k, ok := o.Action(l.Zone, l.Docking); ok && k.Action != renewal.Keep {
			t.Errorf("%+v: the plan does %v", other, k)
		}
		if math.Abs(o.Money.Free-free.Money.Total) > 1e-6 || math.Abs(o.Money.Total-o.Money.Free-got.Cost) > 1e-6 || got.Cost < -1e-6 || !o.Money.Proven {
			t.Errorf("%+v: %+v, cost %v, without %v", other, o.Money, got.Cost, free.Money.Total)
		}
		if !strings.Contains(string(o.LP()), "Minimize") || len(o.LP()) >= len(free.LP()) {
			t.Errorf("%+v: the LP file has as many columns as without", other)
		}
	}
	if stood == 0 {
		t.Error("no action of the demo ship can be left out")
	}
}

package survey

import (
	"testing"

	"anodewright/hull"
)

func TestGather(t *testing.T) {
	a := ship(
		on(day(2026, 6, 1), hull.Reading{WeighedWastage: []float64{0.3, 0.3}}),
		on(day(2027, 6, 1), hull.Reading{WeighedWastage: []float64{0.9}}), // after today
		on(day(2026, 7, 1), hull.Reading{Potentials: []hull.Measure{{Potential: -0.9}}}),
	)
	a.Zones[0].Circuit, a.Zones[0].Bonded = "hull", true
	a.Zones = append(a.Zones,
		hull.Zone{ID: "propeller", HeldBy: "side", Bonded: true},
		hull.Zone{ID: "rudder", Circuit: "hull", Bonded: true, Fitted: []hull.Fitted{{Pattern: "slab", Count: 2, Fitted: day(2024, 3, 15)}}},
		hull.Zone{ID: "shaft"},
		hull.Zone{ID: "tank", Bonded: true},
	)
	asked := 0
	g := Gather(a, day(2026, 12, 1), nil, func(zone, set int, date hull.Date) Predicted {
		asked++
		if zone != 0 || set != 0 || date != day(2026, 6, 1) {
			t.Errorf("asked for zone %d, set %d, %s", zone, set, date)
		}
		return Linear(0.2)
	}, nil)
	if len(g.Circuits) != 2 || len(g.Circuits[0].Zones) != 2 || len(g.Circuits[1].Zones) != 0 || asked != 1 {
		t.Fatalf("%d circuits, asked %d times: %+v", len(g.Circuits), asked, g)
	}
	for zone, want := range [][2]int{{0, 0}, {0, -1}, {0, 1}, {-1, -1}, {1, -1}} {
		if c, k := g.Find(a, zone); c != want[0] || k != want[1] {
			t.Errorf("zone %d is at %d, %d, want %v", zone, c, k, want)
		}
	}
	l := Learn(Standard(), g.Circuits)
	if l.Anodes != 2 || l.Circuits[0].Zones[0].Anodes != 2 || l.Circuits[0].Demand.Median() <= 1.1 {
		t.Errorf("two anodes wasted half as much again as predicted: %d anodes, median %.3f", l.Anodes, l.Circuits[0].Demand.Median())
	}
	if tank := l.Circuits[1].Demand; tank.Median() <= 1 || tank.SD >= 0.53 {
		t.Errorf("the circuit without readings should learn a little: median %.4f, sd %.4f", tank.Median(), tank.SD)
	}
}

package hull_test

import (
	"math"
	"strings"
	"testing"

	"anodewright/hull"
)

// The law begins with the time under water: of a ship at its last dry-docking,
// of what is never lifted when it came into service.
func TestImmersed(t *testing.T) {
	a := vessel()
	a.Basis.Decay = "warm-water"
	a.Dockings = []hull.Docking{{Date: a.Start() + 400, Kind: hull.InWater}, {Date: a.Start() + 800, Kind: hull.DryDock}}
	a.Horizon = a.Start() + 1200
	for kind, want := range map[hull.Kind][3]float64{hull.Ship: {10, 410, 10}, hull.Jacket: {0, 400, 800}} {
		a.Kind = kind
		c := hull.NewCourse(a)
		for k, days := range want {
			if kind == hull.Jacket {
				days += float64(a.Start()-a.InService) + 10
			}
			hours := 24 * days
			if got, want := c.Density(k, 10.0/hull.DaysPerYear), math.Pow(10, 3.13)*math.Pow(hours, -0.41)/1000; math.Abs(got-want) > 1e-9*want {
				t.Errorf("%s, interval %d: %.6f A/m2, want %.6f", kind, k, got, want)
			}
		}
	}
	first := hull.NewCourse(a)
	a.Kind = hull.Ship
	if got := hull.NewCourse(a).Density(0, 0); math.Abs(got-math.Pow(10, 3.13)*math.Pow(24, -0.41)/1000) > 1e-9 {
		t.Errorf("at the docking %.4f A/m2, want that of the first day", got)
	}
	if a.Basis.Decay = ""; hull.NewCourse(a).Density(0, 1) != 0 || first.Density(0, 1) == 0 {
		t.Error("a density without a law")
	}
	a.Basis.Decay = hull.OwnDecay
	if err := hull.Check(a).Err(); err == nil || !strings.Contains(err.Error(), "basis.decay_c") || !strings.Contains(err.Error(), "basis.decay_d") {
		t.Errorf("a law of one's own without constants: %v", err)
	}
}

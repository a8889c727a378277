package plan_test

import (
	"strings"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/hull"
)

// A measured resistivity far from the model's is questioned, one near it not.
func TestWaterResistivityIsQuestioned(t *testing.T) {
	for rho, want := range map[float64]bool{0.25: false, 0.30: false, 0.60: true, 0.05: true} {
		a := lively(t, hull.Reading{Date: hull.NewDate(2026, 6, 1), Zone: "side", Resistivity: &rho})
		text := captions(plan.Compute(a, 0))
		if got := strings.Contains(text, "water-resistivity: On 2026-06-01 the water was found at"); got != want {
			t.Errorf("%g ohm m: questioned %t, model %g\n%s", rho, got, a.Resistivity(&a.Zones[0], a.Readings[0].Date), text)
		}
	}
}

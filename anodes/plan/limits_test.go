package plan_test

import (
	"strings"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
)

// The yard of the demo ship fits at most so many pieces: the plan keeps to it,
// costs more and is proven; what nobody can keep to is told.
func TestLimits(t *testing.T) {
	a := demo(t)
	free := plan.Compute(a, december)
	fitted := func(o *plan.Outcome) int {
		most, at := 0, make([]int, len(a.Ahead()))
		for _, l := range o.Schedule {
			if l.Action != renewal.Keep {
				at[l.Docking] += l.Count
				most = max(most, at[l.Docking])
			}
		}
		return most
	}
	tighter := 0
	for most := fitted(free) - 1; most > 0; most -= 4 {
		o := plan.Compute(a, december, plan.WithLimits(renewal.Limits{Pieces: most}))
		if o.OverLimits != "" {
			if o.Money.Total != free.Money.Total {
				t.Errorf("at most %d: the plan without costs %v, want %v", most, o.Money.Total, free.Money.Total)
			}
			break
		}
		tighter++
		if got := fitted(o); got > most || o.Money.Total < free.Money.Total-1e-6 || !o.Money.Proven {
			t.Errorf("at most %d: %d are fitted for %+v, without limit for %v", most, got, o.Money, free.Money.Total)
		}
	}
	if tighter == 0 {
		t.Error("the demo ship's plan cannot be limited at all")
	}
	o := plan.Compute(a, december, plan.WithLimits(renewal.Limits{Budget: 1}))
	if !strings.HasPrefix(o.OverLimits, "no plan is within the limits: on 2027-03-08 the budget is short by ") || o.Limits != (renewal.Limits{}) {
		t.Errorf("with a budget of 1: %q", o.OverLimits)
	}
}

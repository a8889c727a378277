package plan_test

import (
	"math"
	"strings"
	"testing"

	"anodewright/anodes/order"
	"anodewright/anodes/plan"
	"anodewright/hull"
)

func lateDay(t *testing.T, s string) hull.Date {
	t.Helper()
	d, err := hull.ParseDate(s)
	if err != nil {
		t.Fatal(err)
	}
	return d
}

// twoPatterns is a quay wall with a pattern that comes late and one that comes
// in time.
func twoPatterns(t *testing.T) *hull.Asset {
	t.Helper()
	a := bareZones(t, "one")
	quick := a.Patterns[0]
	quick.ID, quick.Price, quick.LeadWeeks = "quick", 400, 2
	quick.NetMass, quick.Length = 60, 1.3
	a.Patterns = append(a.Patterns, quick)
	a.Today = lateDay(t, "2027-12-01") // 31 days before the docking
	return a
}

func TestLateOrderHasItsNextBest(t *testing.T) {
	a := twoPatterns(t)
	o := plan.Compute(a, 0)
	late := plan.LateOrders(o)
	if len(late) != 1 || late[0].Pattern.ID != "p" {
		t.Fatalf("late: %+v", late)
	}
	l := late[0]
	if want := int(a.Today - order.By(a.Dockings[0].Date, 8, 0)); l.LateDays != want {
		t.Errorf("late by %d days, want %d", l.LateDays, want)
	}
	if want := int(a.Dockings[0].Date-a.Today) - 8*7; l.Before != want || want >= 0 {
		t.Errorf("ordered today it comes %d days before the docking, want %d", l.Before, want)
	}
	in := l.Instead
	if in == nil || in.Pattern.ID != "quick" || in.OrderBy < a.Today {
		t.Fatalf("instead: %+v", in)
	}
	// By itself the quick pattern takes as many pieces.
	only := twoPatterns(t)
	only.Zones[0].Patterns = []string{"quick"}
	alone := plan.Compute(only, 0).Schedule
	if len(alone) != 1 || in.Pieces != alone[0].Count || in.More != float64(400*in.Pieces-300*l.Pieces) {
		t.Errorf("%d pieces instead, %g more; alone %+v", in.Pieces, in.More, alone)
	}
	if l.PutOff != nil {
		t.Errorf("put off to %+v, but no docking follows", l.PutOff)
	}
}

func TestNothingInsteadThatIsLateItself(t *testing.T) {
	a := twoPatterns(t)
	a.Today = lateDay(t, "2027-12-27")
	late := plan.LateOrders(plan.Compute(a, 0))
	if len(late) != 1 || late[0].Instead != nil {
		t.Fatalf("late: %+v", late)
	}
	a.Stock = append(a.Stock, hull.Stock{Pattern: "quick", Count: 500})
	late = plan.LateOrders(plan.Compute(a, 0))
	if in := late[0].Instead; in == nil || in.FromStock < in.Pieces {
		t.Errorf("enough lies in stock, instead: %+v", in)
	}
}

// What is late by its float alone still comes in time.
func TestLateByTheFloat(t *testing.T) {
	a := twoPatterns(t)
	a.Today, a.Costs.FloatWeeks = lateDay(t, "2027-10-01"), 6
	late := plan.LateOrders(plan.Compute(a, 0))
	if len(late) != 1 || late[0].LateDays != 6 || late[0].Before != 36 {
		t.Fatalf("late: %+v", late)
	}
	if words := late[0].NextBest(a); !strings.HasPrefix(words[0], "ordered today it still comes 36 days before the docking") {
		t.Errorf("next best: %q", words)
	}
}

// Putting a docking's anodes off costs what the plan without that docking
// does, and cannot be done where a zone is bare until then.
func TestPuttingOff(t *testing.T) {
	a := twoPatterns(t)
	a.Dockings = append(a.Dockings, hull.Docking{Date: lateDay(t, "2030-01-01"), Kind: hull.DryDock})
	late := plan.LateOrders(plan.Compute(a, 0))
	if len(late) != 1 || late[0].PutOff == nil || late[0].PutOff.Why == "" || !math.IsInf(late[0].PutOff.More, 1) {
		t.Fatalf("a bare wall can be put off: %+v", late)
	}
	// A set that lasts to the second docking but not to the horizon; working there
	// costs 5000 more.
	a.Dockings[1].FixedCost = 5000
	a.Zones[0].Fitted = []hull.Fitted{{Pattern: "p", Count: 24, Fitted: a.LastDocking, Wastage: 0.3}}
	o := plan.Compute(a, 0)
	late = plan.LateOrders(o)
	if len(late) != 1 || late[0].PutOff == nil {
		t.Fatalf("schedule %+v, late %+v", o.Schedule, late)
	}
	if p := late[0].PutOff; p.Why != "" || p.To != a.Dockings[1].Date || p.More < 1 || p.More > 5001 {
		t.Errorf("put off: %+v", p)
	}
}

package plan_test

import (
	"encoding/json"
	"maps"
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

// A plan made under pins and limits says so, in words and in the JSON; another
// has nothing to say.
func TestUnder(t *testing.T) {
	a := demo(t)
	free := plan.Compute(a, december)
	if got := free.Under(); len(got) != 0 {
		t.Errorf("without pins and limits: %q", got)
	}
	var l renewal.Line
	quay := map[string]int{}
	for _, m := range free.Schedule {
		if m.Action != renewal.Keep {
			l = m
			if m.Docking == 0 {
				quay[m.Pattern.ID] += m.Count
			}
		}
	}
	pin := renewal.Pin{Zone: a.Zones[l.Zone].ID, Docking: l.Date, Action: l.Action, Pattern: l.Pattern.ID}
	o := plan.Compute(a, december, plan.WithPins([]renewal.Pin{pin}), plan.WithLimits(renewal.Limits{Pieces: 5000, Patterns: 7}), plan.WithQuay(quay))
	if o.OverLimits != "" {
		t.Fatal(o.OverLimits)
	}
	text := strings.Join(o.Under(), "\n")
	for _, want := range []string{a.Zones[l.Zone].Name + " on " + l.Date.String() + " is pinned to " + string(l.Action) + " " + l.Pattern.ID, "at most 5000 pieces", "at most 7 patterns", "only what lies on the quay: "} {
		if !strings.Contains(text, want) {
			t.Errorf("%q does not say %q", text, want)
		}
	}
	b, err := json.Marshal(o)
	if err != nil {
		t.Fatal(err)
	}
	var got struct {
		Pins []struct {
			Zone, Action, Pattern string
			Cost                  float64
		}
		Limits struct {
			Pieces int            `json:"pieces_per_docking"`
			Most   int            `json:"patterns_per_order"`
			Quay   map[string]int `json:"quay"`
		}
	}
	if err := json.Unmarshal(b, &got); err != nil {
		t.Fatal(err)
	}
	if len(got.Pins) != 1 || got.Pins[0].Zone != pin.Zone || got.Pins[0].Action != string(pin.Action) || got.Limits.Pieces != 5000 || got.Limits.Most != 7 || !maps.Equal(got.Limits.Quay, quay) {
		t.Errorf("the JSON has %+v", got)
	}
	if b, _ := json.Marshal(free); strings.Contains(string(b), `"limits"`) || strings.Contains(string(b), `"pins"`) {
		t.Error("the JSON of a plan without them has pins or limits")
	}
}

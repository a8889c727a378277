package plan_test

import (
	"math"
	"strings"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// shipHeld is the ship of the exchange example, whose side holds the
// propeller, with one change.
func shipHeld(t *testing.T, change func(side, propeller *hull.Zone)) *hull.Asset {
	t.Helper()
	a, err := assetfile.Read("../../testdata/assets/tern-passage.json")
	if err != nil {
		t.Fatal(err)
	}
	change(&a.Zones[0], &a.Zones[1])
	if err := hull.Check(a).Err(); err != nil {
		t.Fatal(err)
	}
	return a
}

// Without a bond to the rest of the hull a zone's own anodes hold it, and what
// hangs on it, as they would with one: there is nothing else in the circuit.
func TestOwnAnodesHoldAZoneThatIsNotBonded(t *testing.T) {
	bonded := plan.Compute(shipHeld(t, func(_, _ *hull.Zone) {}), 0)
	alone := plan.Compute(shipHeld(t, func(side, _ *hull.Zone) { side.Bonded = false }), 0)
	for i := range bonded.Zones {
		for k, want := range bonded.Zones[i].Intervals {
			got := alone.Zones[i].Intervals[k]
			if got.State != want.State || math.Abs(got.Potential-want.Potential) > 1e-12 {
				t.Errorf("zone %d, interval %d: %s at %.4f V, with a bond %s at %.4f V", i, k, got.State, got.Potential, want.State, want.Potential)
			}
		}
	}
}

// What is not bonded to its host, or hangs on impressed current, has no
// forecast by anodes: it is neither sound nor short of them.
func TestNoForecastByAnodesThatDoNotHold(t *testing.T) {
	for what, change := range map[string]func(side, propeller *hull.Zone){
		"not bonded to its host": func(_, propeller *hull.Zone) { propeller.Bonded = false },
		"held by impressed current": func(side, _ *hull.Zone) {
			side.Fitted = nil
			side.Protection = &hull.Protection{Kind: hull.ImpressedCurrent, Anode: "mixed-oxide"}
		},
	} {
		o := plan.Compute(shipHeld(t, change), 0)
		for k, iv := range o.Zones[1].Intervals {
			if iv.State != "" || !math.IsNaN(iv.Potential) {
				t.Errorf("%s, interval %d: %s at %.3f V", what, k, iv.State, iv.Potential)
			}
		}
	}
}

// A docking that is past and not recorded is told, so that nobody plans on
// anodes that were perhaps never fitted.
func TestPastDockingIsTold(t *testing.T) {
	told := func(today hull.Date) (texts []string) {
		a := shipHeld(t, func(_, _ *hull.Zone) {})
		a.Today = today
		for _, c := range plan.Compute(a, 0).Cautions {
			if c.ID == "docking-past" {
				texts = append(texts, c.Text)
			}
		}
		return texts
	}
	if texts := told(hull.NewDate(2027, 3, 15)); len(texts) != 0 {
		t.Errorf("on the day: %q", texts)
	}
	if texts := told(hull.NewDate(2027, 3, 16)); len(texts) != 1 || !strings.Contains(texts[0], "2027-03-15") {
		t.Errorf("a day later: %q", texts)
	}
}

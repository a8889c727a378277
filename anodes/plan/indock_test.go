package plan_test

import (
	"math"
	"strings"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// What is found in dock changes what is done there: anodes hardly used stay,
// anodes nearly gone come off, with the pieces on the quay and no others.
func TestInDockPlansFromWhatIsFound(t *testing.T) {
	a := fleet(t)[0]
	a.Readings = nil
	o := plan.Compute(a, december)
	listed := a.Ahead()[0].Date
	draft := o.DraftClosing(listed, 0)
	pieces := func(found float64, quay map[string]int) (*plan.Outcome, map[string]renewal.Line) {
		c := draft
		c.Sets = append([]hull.ClosingSet(nil), draft.Sets...)
		for i := range c.Sets {
			c.Sets[i].Wastage, c.Sets[i].How = found, hull.Surveyed
		}
		in, faults := o.InDock(c, quay)
		if len(faults) > 0 {
			t.Fatal(faults)
		}
		lines := map[string]renewal.Line{}
		for _, l := range in.Schedule {
			if l.Docking == 0 {
				lines[in.Asset.Zones[l.Zone].ID] = l
			}
		}
		return in, lines
	}
	_, fresh := pieces(0.02, nil)
	_, gone := pieces(0.84, nil)
	if l := fresh["sea-chest-ps"]; l.Action != renewal.Keep {
		t.Errorf("hardly used: %+v", l)
	}
	for zone, l := range gone {
		if l.Action != renewal.Renew {
			t.Errorf("84 %% wasted, %s: %+v", zone, l)
		}
	}

	// With just the pieces that it took, the plan on the quay is the same and
	// leaves nothing; with one piece less of a pattern it is another one, or
	// says what it lacks.
	quay := map[string]int{}
	for _, l := range gone {
		quay[l.Pattern.ID] += l.Count
	}
	in, lines := pieces(0.84, quay)
	for zone, l := range lines {
		if g := gone[zone]; l.Count != g.Count || l.Pattern.ID != g.Pattern.ID {
			t.Errorf("%s: %d × %s with all on the quay, %d × %s with any stock", zone, l.Count, l.Pattern.ID, g.Count, g.Pattern.ID)
		}
	}
	for id, n := range in.LeftOnQuay() {
		if n != 0 {
			t.Errorf("%d × %s left", n, id)
		}
	}
	in, _ = pieces(0.84, map[string]int{})
	if !strings.Contains(in.OverLimits, "the pieces on the quay are not enough") || len(in.Lacks) == 0 {
		t.Errorf("an empty quay: %q", in.OverLimits)
	}
}

// A closing that follows the plan made in dock closes, puts on what the plan
// says, and keeps what was planned before beside it.
func TestFollowIn(t *testing.T) {
	for _, a := range fleet(t) {
		a.Readings = nil
		o := plan.Compute(a, december)
		c := o.DraftClosing(a.Ahead()[0].Date, 0)
		for i := range c.Sets {
			c.Sets[i].Wastage, c.Sets[i].How = 0.84, hull.Surveyed
		}
		in, faults := o.InDock(c, nil)
		if len(faults) > 0 {
			t.Fatal(a.Name, faults)
		}
		planned := len(c.Planned)
		in.FollowIn(&c)
		next, faults := hull.Close(a, c)
		if len(faults) > 0 {
			t.Fatal(a.Name, faults)
		}
		if got := next.Closed[len(next.Closed)-1].Planned; len(got) != planned {
			t.Errorf("%s: %d lines planned, %d kept", a.Name, planned, len(got))
		}
		on := 0
		for _, l := range in.Schedule {
			if l.Docking == 0 && l.Action != renewal.Keep {
				on += l.Count
			}
		}
		fitted := 0
		for _, z := range next.Zones {
			for _, f := range z.Fitted {
				if f.Fitted == c.Date {
					fitted += f.Count
				}
			}
		}
		if fitted != on || on == 0 {
			t.Errorf("%s: the plan puts on %d, fitted are %d", a.Name, on, fitted)
		}
		// What remains to be planned needs nothing more at once.
		if after := plan.Compute(next, december); len(after.Unmet) > len(in.Unmet) {
			t.Errorf("%s: %+v", a.Name, after.Unmet)
		}
	}
}

// A survey taken in dock counts once: what it found gone has left the sets of
// the plan made in dock and of the asset after the closing, and all that it
// looked at teaches.
func TestSurveyInDockCountsOnce(t *testing.T) {
	for _, late := range []hull.Date{-20, -1, 0, 2} {
		a := ternPassage(t)
		a.Readings = nil
		docking := a.Ahead()[0].Date
		a.Readings = []hull.Reading{{Date: docking + late, Zone: "side", WeighedWastage: []float64{0.35, 0.38, 0.3}, Fallen: 3, Gone: 1, Painted: 4}}
		a.Today = docking + 5
		o := plan.Compute(a, a.Today, plan.WithReadings())
		c := o.DraftClosing(docking, 0)
		in, faults := o.InDock(c, nil)
		if len(faults) > 0 {
			t.Fatal(faults)
		}
		in.FollowIn(&c)
		for i := range c.Sets {
			c.Sets[i].Off = 0 // so that they can be counted
		}
		next, faults := hull.Close(a, c)
		if len(faults) > 0 {
			t.Fatal(faults)
		}
		after := plan.Compute(next, next.Today, plan.WithReadings())
		for what, x := range map[string]*plan.Outcome{"in dock": in, "closed": after} {
			if giving, fitted := x.Pieces(0, 0); fitted != 20 || giving != 16 {
				t.Errorf("survey %d days late, %s: %d of %d give current, want 16 of 20", late, what, giving, fitted)
			}
			if l := x.Zones[0].Learned; l == nil || l.Anodes != 4 || math.Abs(l.Median/o.Zones[0].Learned.Median-1) > 0.01 {
				t.Errorf("survey %d days late, %s: learned %+v, before %+v", late, what, l, o.Zones[0].Learned)
			}
		}
	}
}

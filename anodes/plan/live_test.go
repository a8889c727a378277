package plan_test

import (
	"bytes"
	"math"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/hull"
)

// lively is the asset of testdata without works, with readings of counts.
func lively(t *testing.T, readings ...hull.Reading) *hull.Asset {
	a := ternPassage(t)
	for i := range a.Dockings {
		a.Dockings[i].Works = nil
	}
	a.Readings = readings
	return a
}

// Pieces gone and fallen leave on the day of the reading, with what they would
// still have given; the steel's charge comes from the others. By hand for one
// zone that stays below -0.80 V.
func TestPiecesThatLeave(t *testing.T) {
	day := hull.NewDate(2025, 9, 15)
	a := lively(t, hull.Reading{Date: day, Zone: "side", Gone: 3, Fallen: 5, NotSeen: 10})
	o := plan.Compute(a, 0)
	iv := o.Zones[0].Intervals[0]
	charge := func(from, to float64) float64 { // of both zones, in years since the start
		const a0, b, area, bare, propeller = 0.02, 0.012, 2080, 20, 1.9
		mean := a0 + b*(from+to)/2
		return ((area*mean+bare)*0.1 + propeller) * (to - from) * 8760
	}
	turn, end := day.Years(iv.From), iv.Years()
	want := charge(0, turn)/(24*45*2000) + charge(turn, end)/(16*45*2000)
	if len(iv.Fitted) != 1 || iv.Fitted[0].Count != 16 || math.Abs(iv.Fitted[0].Wastage-want) > 1e-8 {
		t.Fatalf("fitted %+v, by hand 16 pieces wasted to %.9f", iv.Fitted, want)
	}
	if ratio := iv.Output / iv.Fitted[0].Wastage; ratio <= 0 {
		t.Errorf("output %v", iv.Output)
	}
	for _, l := range o.Schedule {
		if l.Zone == 0 && l.Action == "renew" && l.Removed != 16 && l.Docking == 0 {
			t.Errorf("%d pieces taken off, but 16 are there", l.Removed)
		}
	}
	// Between two samples on the day of the reading the output falls by a third.
	course := o.Course(0)
	found := false
	for n := 1; n < len(course); n++ {
		if course[n].Date == day && course[n-1].Date == day {
			found = true
			if got := course[n].Gives / course[n-1].Gives; math.Abs(got-16./24) > 1e-9 {
				t.Errorf("output falls to %.4f of what it was", got)
			}
		}
	}
	if !found {
		t.Errorf("no two samples on %s", day)
	}
}

// Painted pieces neither give nor waste until a docking cleans them.
func TestPaintedPiecesRest(t *testing.T) {
	day := hull.NewDate(2025, 9, 15)
	a := lively(t, hull.Reading{Date: day, Zone: "side", Painted: 6})
	a.Dockings[0].Works = []hull.Work{{Zone: "side", Coating: hull.Clean}}
	pins := []plan.Option{}
	o := plan.Compute(a, 0, pins...)
	iv := o.Zones[0].Intervals[0]
	if len(iv.Fitted) != 2 || iv.Fitted[0].Count != 18 || iv.Fitted[1].Count != 6 || !iv.Fitted[1].Painted || iv.Fitted[0].Painted {
		t.Fatalf("fitted %+v, want 18 and 6 painted over", iv.Fitted)
	}
	at := hull.Date(0)
	for _, s := range o.Course(0) {
		if s.Date == day && at == 0 {
			at = s.Date
			if math.Abs(s.Wastage-iv.Fitted[1].Wastage) > 1e-9 {
				t.Errorf("painted over at %.6f, then at %.6f: they wasted on", s.Wastage, iv.Fitted[1].Wastage)
			}
		}
	}
	if iv.Fitted[0].Wastage <= iv.Fitted[1].Wastage {
		t.Errorf("the others wasted to %.4f, the painted ones to %.4f", iv.Fitted[0].Wastage, iv.Fitted[1].Wastage)
	}
	// Once cleaned they waste again, where the set stays.
	if l, ok := o.Action(0, 0); ok && l.Action == "add" {
		next := o.Zones[0].Intervals[1].Fitted
		if len(next) != 3 || next[1].Painted || next[1].Wastage <= iv.Fitted[1].Wastage {
			t.Errorf("after the cleaning %+v", next)
		}
	} else {
		t.Errorf("the plan does %+v at the first docking", l)
	}
	// Without the cleaning they stay silent.
	a.Dockings[0].Works = nil
	o = plan.Compute(a, 0)
	for k, iv := range o.Zones[0].Intervals {
		for _, g := range iv.Fitted {
			if k > 0 && g.Set == 0 && g.Painted && g.Wastage != o.Zones[0].Intervals[0].Fitted[1].Wastage {
				t.Errorf("interval %d: painted pieces wasted to %.4f", k, g.Wastage)
			}
		}
	}
}

// What no reading tells changes nothing: neither pieces not seen or not wasted
// nor the counts of a reading before the last docking.
func TestCountsThatChangeNothing(t *testing.T) {
	without := marshal(t, plan.Compute(lively(t), 0))
	for what, r := range map[string]hull.Reading{
		"not seen":       {Date: hull.NewDate(2025, 9, 15), Zone: "side", NotSeen: 20},
		"before docking": {Date: hull.NewDate(2024, 3, 15), Zone: "side", Gone: 5, Painted: 4},
	} {
		o := plan.Compute(lively(t, r), 0)
		o.Cautions = plan.Compute(lively(t), 0).Cautions
		if with := marshal(t, o); !bytes.Equal(with, without) {
			t.Errorf("%s: another outcome", what)
		}
	}
}

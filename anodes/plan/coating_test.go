package plan_test

import (
	"bytes"
	"encoding/json"
	"math"
	"strings"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/hull"
)

func painted(t *testing.T, percent float64, readings ...hull.Reading) *hull.Asset {
	a := lively(t, append(readings, hull.Reading{Date: hull.NewDate(2026, 6, 1), Zone: "side", CoatingPercent: &percent})...)
	a.Zones[0].MaxCount = nil
	return a
}

func unread(a *hull.Asset) *hull.Asset {
	b := *a
	b.Readings = nil
	return &b
}

// A coating reading moves the zone's constants between the design's and what it
// found, by hand, where the plan learns; else it stands beside them.
func TestCoatingReadingsUpdateTheConstants(t *testing.T) {
	a := painted(t, 8)
	beside, used := plan.Compute(a, 0), plan.Compute(a, 0, plan.WithReadings())
	design := 0.02 + 0.012*hull.NewDate(2026, 6, 1).Years(a.Start())
	const scatter, reading = 0.7 * 0.7, 0.3 * 0.3
	times := math.Exp(math.Log(0.08/design) * scatter / (scatter + reading))
	for _, o := range []*plan.Outcome{beside, used} {
		c := o.Zones[0].Coating
		if c == nil || c.Surveys != 1 || math.Abs(c.Times.Median/times-1) > 1e-4 || math.Abs(c.A-0.02*times) > 1e-5 || math.Abs(c.B-0.012*times) > 1e-5 || c.WasA != 0.02 || c.WasB != 0.012 {
			t.Fatalf("%+v, by hand %.4f times", c, times)
		}
		if !(c.Times.Low < times && times < c.Times.High) || o.Zones[1].Coating != nil {
			t.Errorf("range %+v; the propeller %+v", c.Times, o.Zones[1].Coating)
		}
		if text := captions(o); !strings.Contains(text, "coating-learned: 1 survey of the coating: broken down") {
			t.Errorf("cautions:\n%s", text)
		}
	}
	none := plan.Compute(unread(a), 0)
	for k := range none.Intervals {
		was, without, with := none.Zones[0].Intervals[k], beside.Zones[0].Intervals[k], used.Zones[0].Intervals[k]
		if without.Demand != was.Demand || without.Breakdown != was.Breakdown {
			t.Errorf("interval %d: a reading alone changes the demand", k)
		}
		if math.Abs(with.Breakdown.Final/was.Breakdown.Final-times) > 1e-4 || with.Demand.Mean <= was.Demand.Mean {
			t.Errorf("interval %d: breakdown %.4f, by the design %.4f", k, with.Breakdown.Final, was.Breakdown.Final)
		}
	}
	if beside.Money.Total != none.Money.Total || used.Money.Total <= none.Money.Total {
		t.Errorf("cost %v without, %v beside, %v with it", none.Money.Total, beside.Money.Total, used.Money.Total)
	}
	var j struct {
		Zones []struct {
			Coating *struct {
				Surveys       int
				Before, After struct{ A, B float64 }
			} `json:"learned_coating"`
		}
	}
	if err := json.Unmarshal(marshal(t, beside), &j); err != nil || j.Zones[0].Coating == nil || j.Zones[1].Coating != nil ||
		j.Zones[0].Coating.Before.A != 0.02 || math.Abs(j.Zones[0].Coating.After.B-0.012*times) > 1e-5 {
		t.Errorf("JSON %+v, %v", j, err)
	}
	if bytes.Contains(marshal(t, none), []byte("learned_coating")) {
		t.Error("learned from nothing")
	}
	figures := ""
	for _, s := range used.Explain(0) {
		figures += s.Figure + "\n"
	}
	if !strings.Contains(figures, "coating breakdown constant b by the readings\n") {
		t.Errorf("the trace has no constants by the readings:\n%s", figures)
	}
}

// A coat that is still to come keeps its own constants, and a reading of a
// coat that is gone tells nothing.
func TestCoatingReadingsEndWithTheCoat(t *testing.T) {
	a := painted(t, 15)
	a.Dockings[0].Works = []hull.Work{{Zone: "side", Coating: hull.Recoat}}
	used, none := plan.Compute(a, 0, plan.WithReadings()), plan.Compute(a, 0)
	if now, was := used.Zones[0].Intervals, none.Zones[0].Intervals; now[0].Breakdown == was[0].Breakdown || now[1].Breakdown != was[1].Breakdown {
		t.Errorf("before the new coat %+v, by the design %+v; after it %+v and %+v", now[0].Breakdown, was[0].Breakdown, now[1].Breakdown, was[1].Breakdown)
	}
	a.Today = hull.NewDate(2028, 1, 1)
	a.Readings[0].Date = hull.NewDate(2027, 12, 1)
	if c := plan.Compute(a, 0).Zones[0].Coating; c != nil {
		t.Errorf("a reading of the coat to come teaches %+v of the present one", c)
	}
}

// The demand factor is learned given the coating: what the paint explains is
// not laid on the densities.
func TestDemandFactorGivenTheCoating(t *testing.T) {
	weighed := hull.Reading{Date: hull.NewDate(2026, 6, 1), Zone: "side", WeighedWastage: []float64{0.18, 0.18, 0.18, 0.18}}
	alone := plan.Compute(lively(t, weighed), 0).Zones[0].Learned.Median
	given := plan.Compute(painted(t, 10, weighed), 0).Zones[0].Learned.Median
	if alone < 1.6 || given > 0.75*alone || given < 0.7 {
		t.Errorf("factor %.3f by the anodes alone, %.3f given the coating", alone, given)
	}
}

// What the design makes of a reading's day stays the design's, whatever the
// paint was found like.
func TestPredictedIsTheDesigns(t *testing.T) {
	weighed := hull.Reading{Date: hull.NewDate(2026, 6, 1), Zone: "side", WeighedWastage: []float64{0.1}}
	alone, _ := plan.Compute(lively(t, weighed), 0).Predicted(0)
	beside, ok := plan.Compute(painted(t, 10, weighed), 0).Predicted(0)
	if !ok || alone != beside {
		t.Errorf("predicted %.6f, with a coating reading %.6f", alone, beside)
	}
}

package plan_test

import (
	"encoding/json"
	"math"
	"strings"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/hull"
)

// At the end of each interval the forecast tells what one piece gives, what a
// survey should find with its range, and whether the steel could be polarised
// anew, with both figures.
func TestForecastTellsWhatASurveyFinds(t *testing.T) {
	a := lively(t)
	a.Zones[0].Fitted[0].Count = 70 // enough at either end of the range
	o := plan.Compute(a, 0)
	iv := o.Zones[0].Intervals[0]
	g := iv.Fitted[0]
	// Below -0.80 V the pieces together give the final mean demand.
	demand := 0.1*(2080*(0.02+0.012*iv.Years())+20) + 1.9
	if math.Abs(70*g.Current-demand) > 1e-6*demand {
		t.Errorf("70 pieces give %.6f A each, the steel takes %.6f A", g.Current, demand)
	}
	taken := func(theta float64) float64 { return theta * iv.Total.Mean * iv.Hours() / (70 * 45 * 2000) }
	for what, x := range map[string][2]float64{"low": {g.Low, taken(0.42)}, "high": {g.High, taken(2.39)}} {
		if math.Abs(x[0]/x[1]-1) > 0.02 {
			t.Errorf("%s end of what a survey finds: %.4f, by hand %.4f", what, x[0], x[1])
		}
	}
	var j struct {
		Zones []struct {
			Intervals []struct {
				Fitted []struct {
					Count   int
					Low     float64 `json:"wastage_end_low"`
					Mid     float64 `json:"wastage_end"`
					High    float64 `json:"wastage_end_high"`
					Current float64 `json:"current_end_a"`
				}
				Repolarise struct {
					Gives float64 `json:"gives_a"`
					Asks  float64 `json:"asks_a"`
					Could bool
				}
			}
		}
	}
	if err := json.Unmarshal(marshal(t, o), &j); err != nil {
		t.Fatal(err)
	}
	k := j.Zones[0].Intervals[0]
	if f := k.Fitted[0]; f.Low != g.Low || f.Mid != g.Wastage || f.High != g.High || f.Current != g.Current || f.Count != 70 {
		t.Errorf("JSON %+v of %+v", f, g)
	}
	if r := k.Repolarise; r.Gives != iv.Repolarise.Gives || r.Asks != iv.Repolarise.Asks || r.Could != (r.Gives >= r.Asks) || r.Asks <= demand {
		t.Errorf("JSON %+v of %+v", r, iv.Repolarise)
	}
	text := ""
	for _, s := range o.Explain(0) {
		text += s.Figure + " " + s.Formula + "\n"
	}
	for _, want := range []string{
		"wastage that a survey on 2027-03-15 should find on 70 pieces of al-45", "current of one of them on 2027-03-15",
		"the circuit's anodes could give on 2027-03-15", "to polarise the steel anew: they could",
	} {
		if !strings.Contains(text, want) {
			t.Errorf("no %q in\n%s", want, text)
		}
	}
	// What one piece gives falls as the set wastes at a demand that grows.
	for _, s := range o.Course(0) {
		if s.Date < hull.NewDate(2027, 3, 15) && math.Abs(70*s.Piece-s.Asks) > 1e-6*s.Asks {
			t.Errorf("%s: 70 pieces give %.4f A each, the circuit asks %.4f A", s.Date, s.Piece, s.Asks)
		}
	}
}

// Potentials tell of the current on their day, by hand for a flush slab, and
// leave the factor and what remains of the anodes as they are.
func TestPotentialsTellOfCurrent(t *testing.T) {
	weighed := hull.Reading{Date: hull.NewDate(2026, 6, 1), Zone: "side", WeighedWastage: []float64{0.1}}
	without := plan.Compute(lively(t, weighed), 0, plan.WithReadings())
	weighed.Potentials = []hull.Measure{{Potential: -0.94, Electrode: "ag-agcl-seawater"}, {Potential: -0.96, Electrode: "ag-agcl-seawater"}}
	o := plan.Compute(lively(t, weighed), 0, plan.WithReadings())
	found := false
	for _, s := range o.Explain(0) {
		if s.Figure != "current of one al-45 by the potentials read on 2026-06-01" {
			continue
		}
		found = true
		rho := o.Asset.Resistivity(o.Zones[0].Zone, weighed.Date)
		least, most := 0.100/(rho/(0.9+0.13)), 0.100/(rho/(1+0.15)) // of a worn and of a new slab: rho / (length + width)
		if s.Value < least || s.Value > most {
			t.Errorf("%.4f A, want between %.4f and %.4f", s.Value, least, most)
		}
	}
	if !found {
		t.Error("the trace says nothing of the potentials")
	}
	if a, b := without.Zones[0].Learned, o.Zones[0].Learned; a.Median != b.Median || a.High != b.High || without.Zones[0].Intervals[0].Fitted[0].High != o.Zones[0].Intervals[0].Fitted[0].High {
		t.Errorf("potentials change what remains: %+v, %+v", a, b)
	}
}

// The range is that of the factor which the forecast is made with: readings
// that the plan does not use leave it, and the forecast lies within it.
func TestRangeIsOfTheForecastsOwnFactor(t *testing.T) {
	a := ternPassage(t)
	a.Readings = nil
	want := plan.Compute(a, 0).Zones[0].Intervals
	a.Readings = []hull.Reading{{Date: hull.NewDate(2026, 6, 1), Zone: "side", WeighedWastage: []float64{0.6, 0.62, 0.65}}}
	o, learned := plan.Compute(a, 0), plan.Compute(a, 0, plan.WithReadings())
	for k, iv := range o.Zones[0].Intervals {
		for n, g := range iv.Fitted {
			w := want[k].Fitted[n]
			if math.Abs(g.Low-w.Low) > 1e-9 || math.Abs(g.High-w.High) > 1e-9 {
				t.Errorf("to %s: %.4f to %.4f with readings not used, without %.4f to %.4f", iv.To, g.Low, g.High, w.Low, w.High)
			}
		}
		for n, g := range learned.Zones[0].Intervals[k].Fitted {
			if !(g.Low <= g.Wastage && g.Wastage <= g.High) {
				t.Errorf("to %s, group %d: learned %.4f not within %.4f to %.4f", iv.To, n, g.Wastage, g.Low, g.High)
			}
		}
	}
	if now, then := learned.Zones[0].Intervals[0].Fitted[0], o.Zones[0].Intervals[0].Fitted[0]; now.Low <= then.Low || *o.Zones[0].Intervals[0].SpentProbability != *learned.Zones[0].Intervals[0].SpentProbability {
		t.Errorf("learned from %.4f, by design from %.4f", now.Low, then.Low)
	}
}

// The second verdict: what the anodes give at their wastage by the protective
// potential, against the initial density on what is bare at that time.
func TestRepolariseByHand(t *testing.T) {
	iv := plan.Compute(ternPassage(t), 0).Zones[0].Intervals[0]
	asks := 0.2*(2080*(0.02+0.012*iv.Years())+20) + 0.2*19 // with the propeller
	g := iv.Fitted[0]
	resistance := (iv.Potential + 1.05) / g.Current
	if r := iv.Repolarise; math.Abs(r.Asks/asks-1) > 1e-9 || math.Abs(r.Gives/(24*0.25/resistance)-1) > 1e-9 || r.Could() {
		t.Errorf("gives %.4f A, asks %.4f A, could %v; by hand %.4f and %.4f", r.Gives, r.Asks, r.Could(), 24*0.25/resistance, asks)
	}
}

// A change of trade changes the water about the anodes from its day on.
func TestForecastFollowsTheWater(t *testing.T) {
	a := ternPassage(t)
	before := plan.Compute(a, 0).Zones[0].Intervals[0]
	salty := a.Resistivity(&a.Zones[0], a.Start())
	double := 2 * salty
	fresh := a.Waters[0]
	fresh.ID, fresh.Resistivity, fresh.Salinity = "estuary", &double, nil
	a.Waters = append(a.Waters, fresh)
	a.Zones[0].Fitted[0].Count = 60
	a.Service = []hull.Service{{From: hull.NewDate(2026, 3, 15), Waters: []hull.WaterShare{{Water: "estuary", Share: 1}}}}
	after := plan.Compute(a, 0).Zones[0].Intervals[0]
	drop := func(iv plan.ZoneInterval) float64 { return (iv.Potential + 1.05) / iv.Fitted[0].Current }
	if x := drop(after) / drop(before); x < 1.85 || x > 2.01 { // less wasted, so a little less resistance
		t.Errorf("resistance %.3f times that of the sea", x)
	}
}

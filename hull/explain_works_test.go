package hull

import (
	"math"
	"strings"
	"testing"
)

// The steps of works and of mixed waters are recomputed from the inputs that
// they show.
func TestExplainWorksFromTheirInputs(t *testing.T) {
	half, a := 0.25, 0.04
	z := &Zone{ID: "side", Coating: Coating{Category: CategoryIII}, WettedArea: 100, Depth: 5}
	day := func(s string) Date { d, _ := ParseDate(s); return d }
	before := coat{from: day("2020-01-01"), base: 0.02, slope: 0.012, age: 0}
	d := day("2024-12-30") // 1825 days
	for _, c := range []struct {
		w    Work
		want float64
	}{
		{Work{Zone: "side", Coating: TouchUp, Share: &half}, 0.75 * 0.08},
		{Work{Zone: "side", Coating: PartRecoat, Share: &half, A: &a}, 0.75*0.08 + 0.25*0.04},
		{Work{Zone: "side", Coating: Recoat}, 0.02},
		{Work{Zone: "side", Coating: Found, Breakdown: &a}, 0.04},
	} {
		s := before.explainWork(c.w, before.after(c.w, z, d), d)
		if math.Abs(s.Value-c.want) > 1e-12 {
			t.Errorf("%s: %v, want %v", c.w.Coating, s.Value, c.want)
		}
		if got := s.Inputs[0].Value; math.Abs(got-0.08) > 1e-12 {
			t.Errorf("%s: fc just before %v, want 0.08", c.w.Coating, got)
		}
		if c.w.Coating == PartRecoat && math.Abs(s.Inputs[2].Value-a) > 1e-12 {
			t.Errorf("a of the new paint %v, want %v", s.Inputs[2].Value, a)
		}
	}
	tr := new(Trace)
	c := &calculation{trace: tr}
	c.explainWorks(z, before, &Docking{Date: d, Works: []Work{
		{Zone: "side", Coating: Clean}, {Zone: "other", Coating: Recoat}, {Zone: "side", Coating: TouchUp, Share: &half},
	}})
	if len(tr.Steps) != 1 || !strings.Contains(tr.Steps[0].Figure, "touch-up on 2024-12-30") {
		t.Errorf("steps %+v, want the touch-up alone", tr.Steps)
	}
}

func TestExplainMixFromItsInputs(t *testing.T) {
	r1, r2 := 0.2, 0.4
	a := &Asset{
		Basis:  Basis{OutputWater: MeanWater},
		Waters: []Water{{ID: "sea", Resistivity: &r1}, {ID: "fjord", Resistivity: &r2}},
	}
	z := &Zone{ID: "side", Waters: []WaterShare{{"sea", 0.5}, {"fjord", 0.5}}}
	s := ExplainMix(a, z, 0)
	sum := 0.0
	for i := 0; i < len(s.Inputs); i += 2 {
		sum += s.Inputs[i].Value / s.Inputs[i+1].Value
	}
	if len(s.Inputs) != 4 || math.Abs(s.Value*sum-1) > 1e-12 || math.Abs(s.Value-0.8/3) > 1e-12 {
		t.Errorf("mean water: %+v", s)
	}
	a.Basis.OutputWater = WorstWater
	if s := ExplainMix(a, z, 0); s.Value != 0.4 || !strings.Contains(s.Formula, "largest") {
		t.Errorf("worst water: %+v", s)
	}
}

package plan_test

import (
	"math"
	"strings"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// Every figure of the trace is the outcome's own, and each says its source.
func TestExplainAgreesWithTheOutcome(t *testing.T) {
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			t.Fatal(err)
		}
		o := plan.Compute(a, hull.NewDate(2026, 12, 1))
		for i, z := range o.Zones {
			steps := map[string]hull.Step{}
			for _, s := range o.Explain(i) {
				steps[s.Figure] = s
				if s.Formula == "" || s.Source == "" || s.Confidence == "" && s.Source != "no coating" {
					t.Errorf("%s, %s: %s does not say where it comes from: %+v", a.Name, z.Zone.ID, s.Figure, s)
				}
			}
			for _, iv := range z.Intervals {
				when := ", to " + iv.To.String()
				for word, want := range map[string]float64{"initial": iv.Demand.Initial, "mean": iv.Demand.Mean, "final": iv.Demand.Final} {
					s, ok := steps["own current demand, "+word+when]
					if !ok || s.Value != want {
						t.Errorf("%s, %s: %s demand %v in the trace, %v in the outcome", a.Name, z.Zone.ID, word, s.Value, want)
					}
					// The inputs give the figure, where nothing changes within the interval.
					if strings.HasPrefix(s.Formula, "i (") && !strings.Contains(s.Formula, "time-weighted") && z.Zone.Nobler == nil {
						in := map[string]float64{}
						for _, x := range s.Inputs {
							in[x.Name] = x.Value
						}
						got := in["i"]*(in["coated area"]*in["fc"]+in["bare area"])*in["under-way factor"]*in["immersed share"]/1000 + in["drains"]
						if math.Abs(got-want) > 1e-9*math.Max(1, want) {
							t.Errorf("%s, %s: the inputs of the %s demand give %v, not %v", a.Name, z.Zone.ID, word, got, want)
						}
					}
				}
			}
			for _, l := range o.Schedule {
				if l.Zone == i && l.Governs != "" {
					name := string(l.Action) + " " + l.Pattern.ID + " on " + l.Date.String() + " to " + l.Until.String() + ": pieces"
					if s := steps[name]; s.Value != float64(l.Count) {
						t.Errorf("%s, %s: %s is %v in the trace, %d in the plan", a.Name, z.Zone.ID, name, s.Value, l.Count)
					}
				}
			}
		}
	}
}

package plan

import (
	"fmt"

	"anodewright/anodes"
	"anodewright/hull"
)

// Explain returns where the figures of a zone come from, step by step: its
// demand, the output of the patterns that its plan uses, and what each
// criterion asks for in every action.
func (o *Outcome) Explain(zone int) []hull.Step {
	a := o.Asset
	z := &o.Zones[zone]
	var steps []hull.Step
	for _, s := range z.Zone.Waters {
		w, _ := a.Water(s.Water)
		steps = append(steps, hull.ExplainWater(w))
	}
	steps = append(steps, hull.ExplainDemand(o.steel(), zone)...)
	for _, iv := range z.Intervals {
		for _, other := range []struct {
			rule string
			c    *hull.Current
		}{{"offshore code", &iv.ByCode}, {"ship practice", iv.ByPractice}, {"class rule by sea area", iv.BySeaArea}} {
			if other.c != nil {
				steps = append(steps, hull.Step{
					Figure: fmt.Sprintf("own current demand by the %s, mean, to %s", other.rule, iv.To), Value: other.c.Mean, Unit: "A",
					Formula: "what this rule would give", Source: other.rule, Confidence: "for comparison",
				})
			}
		}
	}
	for _, h := range a.Held(zone) {
		held := &o.Zones[h]
		for _, iv := range held.Intervals {
			for _, d := range []struct {
				word string
				amps float64
			}{{"initial", iv.Demand.Initial}, {"mean", iv.Demand.Mean}, {"final", iv.Demand.Final}} {
				steps = append(steps, hull.Step{
					Figure: fmt.Sprintf("demand held for %s, %s, to %s", held.Zone.ID, d.word, iv.To), Value: d.amps, Unit: "A",
					Formula: "the held zone's own demand", Source: "held_by", Confidence: "computed",
				})
			}
		}
	}
	steps = append(steps, o.explainCoating(zone)...)
	steps = append(steps, o.explainFactor(zone)...)
	steps = append(steps, o.explainCurve(zone)...)
	steps = append(steps, o.explainForecast(zone)...)
	steps = append(steps, o.explainPotentials(zone)...)
	explained := map[string]bool{}
	for _, l := range o.Schedule {
		if l.Zone != zone || l.Pattern == nil || l.Governs == "" {
			continue
		}
		if !explained[l.Pattern.ID] {
			explained[l.Pattern.ID] = true
			if len(z.Zone.Waters) > 1 {
				steps = append(steps, hull.ExplainMix(a, z.Zone, l.Date))
			}
			steps = append(steps, anodes.Explain(l.Pattern, a.Medium(z.Zone), a.Resistivity(z.Zone, l.Date), z.Zone.Shielding)...)
		}
		action := fmt.Sprintf("%s %s on %s to %s: ", l.Action, l.Pattern.ID, l.Date, l.Until)
		const clause = "DNV-RP-B401, 7.7"
		for _, c := range []struct {
			name, formula string
			q             float64
		}{
			{"pieces by mass", "charge of the mean demand / (net mass × utilisation × capacity)", l.Need.ByMass},
			{"pieces by renewal limit", "charge up to the last docking passed / (net mass × renew_above × capacity)", l.Need.ByRenewAbove},
			{"pieces by initial current", "initial demand / output new", l.Need.ByInitial},
			{"pieces by final current", "largest final demand / output worn", l.Need.ByFinal},
		} {
			steps = append(steps, hull.Step{Figure: action + c.name, Value: c.q, Formula: c.formula, Source: clause, Confidence: "read in a secondary text"})
		}
		steps = append(steps, hull.Step{
			Figure: action + "pieces", Value: float64(l.Count), Formula: "largest of these (" + l.Governs + " governs), rounded up, to steps of the count multiple",
			Inputs: []hull.Input{{Name: "least count", Value: float64(z.Zone.MinCount)}, {Name: "steps of", Value: float64(z.Zone.CountMultiple)}},
			Source: clause, Confidence: "read in a secondary text",
		})
	}
	if z.Protection != nil {
		steps = append(steps, z.Protection.Steps...)
	}
	return steps
}

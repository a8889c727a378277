package plan

import (
	"fmt"

	"anodewright/anodes"
	"anodewright/anodes/survey"
	"anodewright/hull"
)

// explainForecast tells what the forecast makes of a zone at the end of each
// interval: what a survey should find, and whether the steel could be polarised
// anew.
func (o *Outcome) explainForecast(zone int) (steps []hull.Step) {
	for _, iv := range o.Zones[zone].Intervals {
		if iv.State == "" {
			continue
		}
		on := "on " + iv.To.String()
		for _, g := range iv.Fitted {
			what := fmt.Sprintf("%d pieces of %s", g.Count, g.Pattern.ID)
			if g.Painted {
				what += ", painted over"
			}
			steps = append(steps, hull.Step{
				Figure: fmt.Sprintf("wastage that a survey %s should find on %s", on, what), Value: 100 * g.Wastage, Unit: "%",
				Formula: "current in time / (net mass × capacity), by " + o.factorWords(),
				Inputs:  []hull.Input{{Name: "low, 5 %", Value: 100 * g.Low, Unit: "%"}, {Name: "high, 95 %", Value: 100 * g.High, Unit: "%"}},
				Source:  "forecast", Confidence: "computed",
			}, hull.Step{
				Figure: fmt.Sprintf("current of one of them %s", on), Value: g.Current, Unit: "A",
				Formula: "(potential of the steel - that of the anode) / resistance as wasted",
				Inputs:  []hull.Input{{Name: "potential of the steel", Value: iv.Potential, Unit: "V"}},
				Source:  "forecast", Confidence: "computed",
			})
		}
		could := "they could"
		if !iv.Repolarise.Could() {
			could = "they could not"
		}
		steps = append(steps, hull.Step{
			Figure: "the circuit's anodes could give " + on, Value: iv.Repolarise.Gives, Unit: "A",
			Formula: "output at today's wastage, against initial density × area × breakdown to polarise the steel anew: " + could,
			Inputs:  []hull.Input{{Name: "it would take", Value: iv.Repolarise.Asks, Unit: "A"}},
			Source:  "forecast", Confidence: "computed",
		})
	}
	return steps
}

// explainPotentials tells what the potentials that a survey measured say of the
// current of the zone's pieces on that day. They say nothing of the mass left.
func (o *Outcome) explainPotentials(zone int) (steps []hull.Step) {
	a, z := o.Asset, &o.Asset.Zones[zone]
	for i := range a.Readings {
		r := &a.Readings[i]
		if r.Zone != z.ID || !survey.Stands(r) || len(r.Potentials) == 0 {
			continue
		}
		set := survey.Set(z, r)
		wastage, ok := o.Predicted(i)
		if set < 0 || !ok {
			continue
		}
		mean := 0.0
		for _, m := range r.Potentials {
			mean += anodes.Potential(m) / float64(len(r.Potentials))
		}
		p, _ := a.Pattern(z.Fitted[set].Pattern)
		metal := anodes.MetalOf(p, a.Medium(z))
		rho := a.Resistivity(z, r.Date)
		if r.Resistivity != nil {
			rho = *r.Resistivity
		}
		resistance := anodes.ResistanceAt(p, rho, wastage) + p.SeriesResist
		steps = append(steps, hull.Step{
			Figure: fmt.Sprintf("current of one %s by the potentials read on %s", p.ID, r.Date),
			Value:  z.Shielding * max(0, mean-metal.Potential) / resistance, Unit: "A",
			Formula: "(potential read - that of the anode) / resistance at the wastage predicted; it tells nothing of the mass left",
			Inputs: []hull.Input{
				{Name: "potential read, mean", Value: mean, Unit: "V"}, {Name: "of the anode", Value: metal.Potential, Unit: "V"},
				{Name: "resistance", Value: resistance, Unit: "ohm"}, {Name: "wastage predicted", Value: 100 * wastage, Unit: "%"},
			},
			Source: "readings; DNV-RP-B401, 7.8", Confidence: "computed",
		})
	}
	return steps
}

package plan

import (
	"fmt"

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

package hull

import (
	"fmt"

	"anodewright/assets"
)

// ExplainDemand returns the steps by which a zone's own demand comes about in
// every interval.
func ExplainDemand(a *Asset, i int) []Step {
	t := new(Trace)
	c := newCalculation(a, a.Basis.Densities, t)
	n := len(c.ivs)
	c.zone(&a.Zones[i], ZoneDemand{Breakdown: make([]Breakdown, n), Own: make([]Current, n)})
	return t.Steps
}

// explain adds the steps of one interval to the trace, if there is one.
func (c *calculation) explain(z *Zone, k int, coat coat, zd ZoneDemand, drains float64, practice bool) {
	if c.trace == nil {
		return
	}
	iv := c.ivs[k]
	when := fmt.Sprintf("%s to %s", iv.From, iv.To)
	coated := z.WettedArea - z.BareArea
	shares, underWay := c.a.ServiceAt(z, iv.From)
	bare := c.weighed(z, shares)
	for _, s := range shares {
		source, confidence := c.a.DensitySource(z, c.rule, s.Water)
		c.trace.Add(Step{
			Figure: "current density, mean, " + when + ", " + s.Water, Value: bare.Mean, Unit: "mA/m2",
			Formula: "by the table, weighed by the shares of waters",
			Inputs:  []Input{{"share of " + s.Water, s.Share, ""}, {"depth", z.Depth, "m"}},
			Source:  source, Confidence: confidence,
		})
	}
	source, confidence := "the coating's own constants", "entered"
	if row, ok := assets.Get("code-coating").Row(string(z.Coating.Category)); ok {
		source, confidence = assets.Get("code-coating").Source()+", category "+row.Name, row.Confidence
	} else if !z.Coated() {
		source = "no coating"
	}
	c.trace.Add(Step{
		Figure: "breakdown factor, mean, " + when, Value: zd.Breakdown[k].Mean,
		Formula: "mean of min(1, a + b t) by exact integration",
		Inputs: []Input{
			{"a, just after the last work", coat.base, ""}, {"b", coat.slope, "1/year"},
			{"t at start", iv.From.Years(coat.from), "years"}, {"t at end", iv.To.Years(coat.from), "years"},
		},
		Source: source, Confidence: confidence,
	})
	step := Step{
		Figure: "own current demand, mean, " + when, Value: zd.Own[k].Mean, Unit: "A",
		Formula: "i (coated area fc + bare area) under-way factor × immersed share / 1000 + drains",
		Inputs: []Input{
			{"i", bare.Mean, "mA/m2"}, {"coated area", coated, "m2"}, {"fc", zd.Breakdown[k].Mean, ""}, {"bare area", z.BareArea, "m2"},
			{"under-way factor", underWay, ""}, {"immersed share", z.ImmersedShare, ""}, {"drains", drains, "A"},
		},
		Source: "DNV-RP-B401, 7.4", Confidence: "read in a secondary text",
	}
	if practice {
		step.Formula = "(i0 + growth × coating age) whole painted area, bare area at the code's density"
		step.Inputs = append([]Input{
			{"i0", c.a.Basis.PracticeI0, "mA/m2"}, {"growth", c.a.Basis.PracticePerYear, "mA/m2 per year"},
			{"coating age at mid-interval", (coat.ageAt(iv.From) + coat.ageAt(iv.To)) / 2, "years"},
		}, step.Inputs[1:]...)
		step.Source, step.Confidence = "ship practice", "common practice, no source"
	}
	c.trace.Add(step)
}

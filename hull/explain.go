package hull

import "anodewright/assets"

// ExplainDemand returns the steps by which a zone's own demand comes about in
// every interval.
func ExplainDemand(a *Asset, i int) []Step {
	t := new(Trace)
	c := newCalculation(a, a.Basis.Densities, t)
	n := len(c.ivs)
	c.zone(&a.Zones[i], ZoneDemand{Breakdown: make([]Breakdown, n), Own: make([]Current, n)})
	return t.Steps
}

// explain adds the steps of one interval to the trace.
func (c *calculation) explain(z *Zone, k int, coat coat, zd ZoneDemand, drains float64, practice bool) {
	iv := c.ivs[k]
	when := "to " + iv.To.String()
	coated := z.WettedArea - z.BareArea
	shares, underWay := c.a.ServiceAt(z, iv.From)
	bare := c.weighed(z, shares)
	first, last := coat.ageAt(iv.From), coat.ageAt(iv.To)
	for _, m := range []struct {
		word                       string
		density, fc, factor, value float64
		age                        float64
	}{
		{"initial", bare.Initial, zd.Breakdown[k].Initial, 1, zd.Own[k].Initial, first},
		{"mean", bare.Mean, zd.Breakdown[k].Mean, z.ImmersedShare, zd.Own[k].Mean, (first + last) / 2},
		{"final", bare.Final, zd.Breakdown[k].Final, 1, zd.Own[k].Final, last},
	} {
		for _, s := range shares {
			source, confidence := c.a.DensitySource(z, OffshoreCode, s.Water)
			if !practice {
				source, confidence = c.a.DensitySource(z, c.rule, s.Water)
			}
			c.trace.Add(Step{
				Figure: "current density of bare steel, " + m.word + ", " + when + ", " + s.Water, Value: m.density, Unit: "mA/m2",
				Formula: "by the table, weighed by the shares of waters",
				Inputs:  []Input{{"share of " + s.Water, s.Share, ""}, {"depth", z.Depth, "m"}},
				Source:  source, Confidence: confidence,
			})
		}
		c.trace.Add(coat.explain(z, m.word, when, m.fc, iv))
		step := Step{
			Figure: "own current demand, " + m.word + ", " + when, Value: m.value, Unit: "A",
			Formula: "i (coated area fc + bare area) under-way factor × immersed share / 1000 + drains",
			Inputs: []Input{
				{"i", m.density, "mA/m2"}, {"coated area", coated, "m2"}, {"fc", m.fc, ""}, {"bare area", z.BareArea, "m2"},
				{"under-way factor", underWay, ""}, {"immersed share", m.factor, ""}, {"drains", drains, "A"},
			},
			Source: "DNV-RP-B401, 7.4", Confidence: "read in a secondary text",
		}
		if practice {
			step.Formula = "((i0 + growth × coating age) painted area + i bare area) under-way factor × immersed share / 1000 + drains"
			step.Inputs = append([]Input{
				{"i0", c.a.Basis.PracticeI0, "mA/m2"}, {"growth", c.a.Basis.PracticePerYear, "mA/m2 per year"}, {"coating age", m.age, "years"},
			}, step.Inputs...)
			step.Source, step.Confidence = "ship practice", "common practice, no source"
		}
		if z.Nobler != nil {
			step.Inputs = append(step.Inputs, Input{"nobler metal, counted as bare", z.Nobler.Area, "m2"})
		}
		if c.a.nextChange(z, iv.From, iv.To) < iv.To {
			step.Formula += "; time-weighted over the changes of service in the interval"
		}
		c.trace.Add(step)
	}
}

// explain is the step of one breakdown factor.
func (c coat) explain(z *Zone, word, when string, value float64, iv Interval) Step {
	source, confidence := "the coating's own constants", "entered"
	if row, ok := assets.Get("code-coating").Row(string(z.Coating.Category)); ok {
		source, confidence = assets.Get("code-coating").Source()+", category "+row.Name, row.Confidence
	} else if !z.Coated() {
		source = "no coating"
	}
	formula := "min(1, a + b t)"
	if word == "mean" {
		formula = "mean of min(1, a + b t) by exact integration"
	}
	return Step{
		Figure: "breakdown factor, " + word + ", " + when, Value: value, Formula: formula,
		Inputs: []Input{
			{"a, just after the last work", c.base, ""}, {"b", c.slope, "1/year"},
			{"t at start", iv.From.Years(c.from), "years"}, {"t at end", iv.To.Years(c.from), "years"},
		},
		Source: source, Confidence: confidence,
	}
}

// ExplainWater returns the step by which a water's resistivity comes about.
func ExplainWater(w *Water) Step {
	s := Step{Figure: "resistivity of " + w.ID, Value: w.Resist(), Unit: "ohm m"}
	add := func(name string, x *float64, unit string) {
		if x != nil {
			s.Inputs = append(s.Inputs, Input{name, *x, unit})
		}
	}
	switch {
	case w.Resistivity != nil:
		s.Formula, s.Source, s.Confidence = "as measured", "entered", "entered"
		return s
	case w.Conductivity25 != nil:
		s.Formula, s.Source, s.Confidence = "1/(k25 (1 + 0.0191 (T - 25)))", "Standard Methods 2510", "from memory"
		add("k25", w.Conductivity25, "uS/cm")
	default:
		s.Formula, s.Source, s.Confidence = "PSS-78, solved for the conductivity", "UNESCO technical papers in marine science 44", "read"
		add("salinity", w.Salinity, "")
	}
	add("temperature", w.Temperature, "degC")
	if w.Medium == Sediment && w.Porosity != nil {
		s.Formula += ", times the formation factor porosity^-1.315"
		s.Source += "; Erchul 1972"
		add("porosity", w.Porosity, "")
	}
	return s
}

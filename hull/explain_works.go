package hull

// explainWorks adds the steps of a docking's works on a zone's coating, whose
// state just before them is before.
func (c *calculation) explainWorks(z *Zone, before coat, d *Docking) {
	for _, w := range d.Works {
		if w.Zone != z.ID {
			continue
		}
		after := before.after(w, z, d.Date)
		if w.Coating != Clean && after != before {
			c.trace.Add(before.explainWork(w, after, d.Date))
		}
		before = after
	}
}

// explainWork is the step of one work on date d that makes the coating after
// out of c.
func (c coat) explainWork(w Work, after coat, d Date) Step {
	s := Step{
		Figure: "breakdown factor just after " + string(w.Coating) + " on " + d.String(), Value: min(1, after.base),
		Inputs: []Input{{"fc just before", c.at(d), ""}},
		Source: "the works of the docking", Confidence: "entered",
	}
	share := func() {
		s.Inputs = append(s.Inputs, Input{"share s", *w.Share, ""})
		s.Source, s.Confidence = "the share of the damage that is mended, taken off the breakdown", "common practice, no source"
	}
	switch w.Coating {
	case TouchUp:
		s.Formula = "(1 - s) fc just before"
		share()
	case PartRecoat:
		s.Formula = "(1 - s) fc just before + s a of the new paint"
		share()
		if *w.Share > 0 {
			s.Inputs = append(s.Inputs, Input{"a of the new paint", (after.base - (1-*w.Share)*c.at(d)) / *w.Share, ""})
		}
	case Recoat:
		s.Formula = "a of the new paint"
	case Found:
		s.Formula = "what the survey found, in place of the model's"
	}
	return s
}

// ExplainMix returns the step by which the resistivity around a zone's anodes
// comes about on date d from those of its waters.
func ExplainMix(a *Asset, z *Zone, d Date) Step {
	s := Step{
		Figure: "resistivity for the anodes of " + z.ID + ", " + d.String(), Value: a.Resistivity(z, d), Unit: "ohm m",
		Formula: "1 / sum of share / resistivity over the zone's waters", Source: "basis.output_water mean", Confidence: "entered",
	}
	if a.Basis.OutputWater != MeanWater {
		s.Formula = "largest among the waters with a share of at least 0.1"
		s.Source = "basis.output_water " + string(a.Basis.OutputWater)
	}
	shares, _ := a.ServiceAt(z, d)
	for _, share := range shares {
		w, _ := a.Water(share.Water)
		s.Inputs = append(s.Inputs, Input{"share of " + w.ID, share.Share, ""}, Input{"resistivity of " + w.ID, w.Resist(), "ohm m"})
	}
	return s
}

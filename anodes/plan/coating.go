package plan

import (
	"fmt"

	"anodewright/anodes/survey"
	"anodewright/hull"
)

// LearnedCoating is what the coating readings of a zone teach of its breakdown
// constants.
type LearnedCoating struct {
	Times    Factor // true constants over the design's; the median is used
	Surveys  int    // days on which the coating was looked at
	A, B     float64
	WasA     float64 // of the design
	WasB     float64 // per year
	Last     hull.Date
	OnLast   float64 // breakdown on the day of the last survey, by the readings
	WasThere float64 // and by the design
}

// learnCoatings infers the breakdown of every zone's coating, and makes the
// asset as it is by that.
func (o *Outcome) learnCoatings() {
	a := o.Asset
	o.coatings = make([]*LearnedCoating, len(a.Zones))
	for i := range a.Zones {
		z := &a.Zones[i]
		found := survey.CoatingReadings(a, z, o.Today)
		if len(found) == 0 {
			continue
		}
		p := survey.LearnCoating(survey.StandardCoating(), found)
		c := &LearnedCoating{Times: Factor{Median: p.Median(), Used: p.Median()}, Surveys: len(found)}
		c.Times.Low, c.Times.High = p.Range()
		c.WasA, c.WasB = z.BreakdownConstants()
		c.A, c.B = c.WasA*c.Times.Used, c.WasB*c.Times.Used
		last := found[len(found)-1]
		c.Last, c.OnLast, c.WasThere = last.Date, last.Predicted(c.Times.Used), last.Predicted(1)
		o.coatings[i] = c
	}
	o.taught = o.coated(a)
}

// coated is a variant of the asset, of the same zones, with the coatings as the
// readings teach them.
func (o *Outcome) coated(a *hull.Asset) *hull.Asset {
	times := make([]float64, len(a.Zones))
	for i := range times {
		times[i] = 1
		if i < len(o.coatings) && o.coatings[i] != nil {
			times[i] = o.coatings[i].Times.Used
		}
	}
	return a.WithCoatings(times)
}

// BreakdownConstants returns the constants a and b (per year) of a zone's
// present coating that the plan counts with.
func (o *Outcome) BreakdownConstants(zone int) (a, b float64) {
	return o.steel().Zones[zone].BreakdownConstants()
}

// steel is the asset whose steel asks for current: with the coatings as
// designed, or as the readings teach them where the plan learns.
func (o *Outcome) steel() *hull.Asset {
	if o.Learns {
		return o.bySurveys()
	}
	return o.Asset
}

// bySurveys is the asset with the coatings as the readings teach them.
func (o *Outcome) bySurveys() *hull.Asset {
	if o.taught != nil {
		return o.taught
	}
	return o.Asset
}

// Text tells what is learned of a coating.
func (c *LearnedCoating) Text() string {
	return fmt.Sprintf("%s of the coating: broken down %.3g %% on %s, the design says %.3g %%; constants a %.3g and b %.3g a year in place of %.3g and %.3g, %.2f times (90 %% range %.2f to %.2f)",
		counted(c.Surveys, "survey", "surveys"), 100*c.OnLast, c.Last, 100*c.WasThere, c.A, c.B, c.WasA, c.WasB, c.Times.Median, c.Times.Low, c.Times.High)
}

// explainCoating says where the constants by the readings come from.
func (o *Outcome) explainCoating(zone int) []hull.Step {
	c := o.Zones[zone].Coating
	if c == nil {
		return nil
	}
	m := survey.StandardCoating()
	var steps []hull.Step
	for _, s := range []struct {
		name     string
		now, was float64
		unit     string
	}{{"a", c.A, c.WasA, ""}, {"b", c.B, c.WasB, "per year"}} {
		step := hull.Step{
			Figure: "coating breakdown constant " + s.name + " by the readings", Value: s.now, Unit: s.unit,
			Formula: "design constant × median factor after the readings",
			Inputs: []hull.Input{
				{Name: "design constant", Value: s.was, Unit: s.unit}, {Name: "factor, median", Value: c.Times.Median},
				{Name: "low, 5 %", Value: c.Times.Low}, {Name: "high, 95 %", Value: c.Times.High},
				{Name: "spread of ln(factor) before", Value: m.Scatter}, {Name: "spread of a survey", Value: m.Reading},
			},
			Source: counted(c.Surveys, "survey", "surveys") + " of the coating", Confidence: "computed; spreads by our own judgement",
		}
		if !o.Learns {
			step.Figure += ", not used"
		}
		steps = append(steps, step)
	}
	return steps
}

// coatingsLearned says what the coating readings suggest.
func (c *raiser) coatingsLearned() {
	for i := range c.o.Zones {
		l := c.o.Zones[i].Coating
		if l == nil {
			continue
		}
		text := l.Text() + "."
		if c.o.Learns {
			text += " Plan and forecast use it."
		} else {
			text += " The plan does not use it until planning with readings is switched on."
		}
		c.add("coating-learned", i, text, "coating readings, lognormal; spreads by our own judgement", "computed")
	}
}

package hull

import (
	"fmt"
	"math"

	"anodewright/assets"
)

// Range returns the share of the coated area that a surveyor's word stands
// for: GOOD below 3 %, FAIR from 3 to 20 %, POOR above 20 % (class practice,
// from memory), with the source and how sure it is.
func (c Condition) Range() (from, to float64, source, confidence string) {
	t := assets.Get("condition-words")
	r, ok := t.Row(string(c))
	if !ok {
		panic("hull: no condition " + string(c))
	}
	return t.Value(r.Name, "from") / 100, t.Value(r.Name, "to") / 100, t.Source(), r.Confidence
}

// ConditionOf returns the word for a breakdown.
func ConditionOf(breakdown float64) Condition {
	for _, word := range Condition("").Words() {
		if _, to, _, _ := Condition(word).Range(); breakdown < to || word == "FAIR" && breakdown == to {
			return Condition(word)
		}
	}
	return "POOR"
}

// BreakdownOn returns the model's breakdown factor of a zone's coating on a
// date, with the works of the dockings up to then, and whether there is one: a
// zone has to have a coating, and that date must not be before it.
func (a *Asset) BreakdownOn(z *Zone, d Date) (float64, bool) {
	c := a.coatClosed(z, a.Start(), d)
	if !z.Coated() || d < c.from {
		return 0, false
	}
	for _, docking := range a.Ahead() {
		if docking.Date <= d {
			c = c.afterDocking(z, &docking)
		}
	}
	return c.at(d), true
}

// CoatingDoubt says how far what a survey found of a zone's coating is from
// the model's breakdown on that date, or nothing where they agree. A word
// disagrees when the model lies outside its range; a percentage when it is
// more than twice or less than half the model's and more than 3 points away
// (common practice, no source).
func (a *Asset) CoatingDoubt(z *Zone, r Reading) (text, source, confidence string) {
	model, ok := a.BreakdownOn(z, r.Date)
	if !ok {
		return "", "", ""
	}
	if r.CoatingPercent != nil {
		found := *r.CoatingPercent / 100
		if (found > 2*model || found < model/2) && math.Abs(found-model) > 0.03 {
			return fmt.Sprintf("the survey found %.3g %% of the coating broken down, the model counts with %.3g %%", 100*found, 100*model),
				"breakdown law of the zone's coating", "common practice, no source"
		}
		return "", "", ""
	}
	if r.CoatingWord != "" && ConditionOf(model) != r.CoatingWord {
		from, to, source, confidence := r.CoatingWord.Range()
		return fmt.Sprintf("the survey calls the coating %s (%.3g to %.3g %% broken down), the model counts with %.3g %%", r.CoatingWord, 100*from, 100*to, 100*model),
			source, confidence
	}
	return "", "", ""
}

package plan

import (
	"fmt"
	"math"
	"strings"

	"anodewright/anodes/survey"
	"anodewright/hull"
)

// factorWords says which demand factor the forecast is made with.
func (o *Outcome) factorWords() string {
	if o.Learns && o.learned != nil {
		return "the factor learned from readings"
	}
	return "the design figures"
}

// explainFactor says where the zone's demand factors come from.
func (o *Outcome) explainFactor(zone int) []hull.Step {
	z := &o.Zones[zone]
	step := func(figure, formula string, f Factor, source, confidence string) hull.Step {
		return hull.Step{
			Figure: figure, Value: f.Used, Formula: formula,
			Inputs: []hull.Input{{Name: "confidence", Value: o.Asset.Basis.ConfidenceLevel()}, {Name: "low, 5 %", Value: f.Low}, {Name: "high, 95 %", Value: f.High}},
			Source: source, Confidence: confidence,
		}
	}
	const used, learned = "demand factor used", "demand factor by the readings"
	byPrior := step(used, "exp(tau × normal quantile of the confidence), without readings", priorFactor(o.Asset.Basis.ConfidenceLevel()), "site scatter of offshore surveys", "published")
	l := z.Learned
	if l == nil {
		return []hull.Step{byPrior}
	}
	byReadings := step(learned, "quantile of the factor after the readings, at the confidence", l.Factor,
		fmt.Sprintf("%d readings of %d anodes of the circuit", l.Readings, l.Anodes), "computed")
	if !o.Learns {
		byReadings.Figure += ", not used"
		return []hull.Step{byPrior, byReadings}
	}
	byReadings.Figure = used
	byPrior.Figure = "demand factor without readings, not used"
	return []hull.Step{byReadings, byPrior}
}

// readings says what the readings suggest, what the plan makes of it, and what
// about them is in doubt.
func (c *raiser) readings() {
	o, a := c.o, c.o.Asset
	stand := 0
	for i := range a.Readings {
		if survey.Stands(&a.Readings[i]) {
			stand++
		}
	}
	if stand+len(o.past) == 0 {
		return
	}
	if o.learned == nil {
		c.add("readings", -1, fmt.Sprintf("%s kept, but none tells of the wastage of anodes that are fitted now: the plan rests on the design figures.", counted(stand, "reading is", "readings are")), "program", "computed")
	} else {
		for i, name := range o.learned.gathered.Names {
			c.circuitLearned(name, i)
		}
	}
	c.coatingsLearned()
	for i := range a.Zones {
		c.counts(i)
	}
	for _, q := range o.Questions() {
		zone := -1
		for i := range a.Zones {
			if a.Zones[i].ID == a.Readings[q.Reading].Zone {
				zone = i
			}
		}
		c.add("reading-question", zone, q.Text+" Correct the reading, or confirm it with the surveyor; it stands until then.", "readings compared with each other and with what is fitted", "computed")
	}
}

// circuitLearned says what the readings of one circuit suggest.
func (c *raiser) circuitLearned(name string, circuit int) {
	l := c.o.learned
	readings := 0
	for _, z := range l.gathered.Circuits[circuit].Zones {
		readings += len(z.Found)
	}
	if readings == 0 {
		return
	}
	f := &l.learned.Circuits[circuit]
	low, high := f.Demand.Range()
	before, verb := priorFactor(0.5), "suggest"
	if readings == 1 {
		verb = "suggests"
	}
	text := fmt.Sprintf("Circuit %s: %s of %s %s that the steel takes %.2f times the design figures (90 %% range %.2f to %.2f; without readings %.2f to %.2f).",
		name, counted(readings, "reading", "readings"), counted(f.Anodes, "anode", "anodes"), verb, f.Demand.Median(), low, high, before.Low, before.High)
	if x := math.Log(f.Demand.Median()); x < survey.Nodes()[0] || x > -survey.Nodes()[0] {
		text += " No demand differs so much from its design by chance: look for another cause, as an area, a coating or a drain that is not as entered, or anodes that give no current or came off."
	}
	if c.o.Learns {
		text += " Plan and forecast use it."
	} else {
		text += " The plan does not use it: it rests on the design figures until planning with readings is switched on."
	}
	c.add("readings", -1, text, "readings, lognormal scatter of sites and anodes", "computed")
}

// counts: pieces that readings found gone, fallen or painted over are not
// counted from then on.
func (c *raiser) counts(i int) {
	z := &c.o.Asset.Zones[i]
	for set, f := range z.Fitted {
		p := survey.Count(c.o.Asset, z, set, c.o.Today)
		var lost []string
		for _, what := range []struct {
			n    int
			word string
		}{{p.Gone, "gone"}, {p.Fallen, "fallen"}, {p.Painted, "painted over"}} {
			if what.n > 0 {
				lost = append(lost, fmt.Sprintf("%d %s", what.n, what.word))
			}
		}
		if lost != nil {
			c.add("reading-count", i, fmt.Sprintf("By the readings %s of the %d pieces of %s; %d give current now. Plan and forecast count by that from the day of the reading on; painted ones count again once a docking cleans them.",
				strings.Join(lost, ", "), f.Count, f.Pattern, p.Giving), "readings", "computed")
		}
	}
}

func counted(n int, one, many string) string {
	if n == 1 {
		return "1 " + one
	}
	return fmt.Sprintf("%d %s", n, many)
}

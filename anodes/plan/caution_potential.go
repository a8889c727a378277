package plan

import (
	"fmt"
	"strings"

	"anodewright/anodes"
	"anodewright/anodes/survey"
	"anodewright/hull"
)

// found raises what readings say that does not fit: a potential outside the
// criterion of its zone, a coating whose condition is not the model's, and a
// water of another resistivity. It questions, and blocks nothing.
func (c *raiser) found() {
	a := c.o.Asset
	for _, r := range a.Readings {
		for i := range a.Zones {
			if a.Zones[i].ID == r.Zone && survey.Stands(&r) {
				c.potentials(i, r)
				c.coating(i, r)
				c.water(i, r)
			}
		}
	}
}

// potentials judges the potentials of one reading by the criterion of the
// zone's metal.
func (c *raiser) potentials(zone int, r hull.Reading) {
	k := anodes.CriterionOf(c.o.Asset, c.o.Zones[zone].Zone)
	byVerdict := map[anodes.Verdict][]string{}
	for _, m := range r.Potentials {
		v := k.Judge(anodes.Potential(m))
		byVerdict[v] = append(byVerdict[v], anodes.MeasureText(m))
	}
	for _, v := range []anodes.Verdict{anodes.UnderProtected, anodes.OverProtected} {
		if texts := byVerdict[v]; texts != nil {
			c.add(string(v), zone, fmt.Sprintf("Reading of %s: %s: %s. %s wants %s Ag/AgCl.", r.Date, few(texts), v, capital(k.Metal), k.Text()), k.Source, k.Confidence)
		}
	}
}

// coating compares the condition that a reading found with the model's.
func (c *raiser) coating(zone int, r hull.Reading) {
	z := c.o.Zones[zone].Zone
	if text, source, confidence := c.o.Asset.CoatingDoubt(z, r); text != "" {
		c.add("coating-condition", zone, fmt.Sprintf("On %s %s. If the survey is right, enter it as a docking's work (found) or correct the coating's constants.", r.Date, text), source, confidence)
	}
}

// resistivityApart is by how many times a measured resistivity may differ from
// the model's before it is questioned (common practice, no source).
const resistivityApart = 1.25

// water compares the resistivity that a reading found with the model's.
func (c *raiser) water(zone int, r hull.Reading) {
	if r.Resistivity == nil {
		return
	}
	z := c.o.Zones[zone].Zone
	found, model := *r.Resistivity, c.o.Asset.Resistivity(z, r.Date)
	if found <= model*resistivityApart && found >= model/resistivityApart {
		return
	}
	c.add("water-resistivity", zone, fmt.Sprintf("On %s the water was found at %.3g ohm m, the model counts with %.3g ohm m: an anode there gives %.0f %% of what is planned. Correct the water if this is its usual state.", r.Date, found, model, 100*model/found), "output goes with 1/resistivity", "computed")
}

// freshWater raises waters without salt among those that a zone counted as in
// the sea lies in at any time.
func (c *raiser) freshWater(i int) {
	z := c.o.Zones[i].Zone
	if _, own := z.Hold().(hull.ByAnodes); !own {
		return
	}
	for k := range c.o.Asset.Waters {
		w := &c.o.Asset.Waters[k]
		if w.Medium == hull.Seawater && w.Conductivity25 != nil && w.Resist() > freshFrom && everIn(c.o.Asset, z, w) {
			name := ShortWater{Water: w}.Name()
			c.add("fresh-water", i, fmt.Sprintf("%s is fresh water (%.3g Ω m): aluminium and zinc anodes may passivate there, and are counted at their seawater figures.", name, w.Resist()), "trade", "common practice, no source")
		}
	}
}

// freshFrom is the resistivity in ohm m from which water is called fresh: that
// of a salinity of about 2.
const freshFrom = 3.0

// few joins at most three texts and says how many more there are.
func few(texts []string) string {
	if len(texts) <= 3 {
		return strings.Join(texts, ", ")
	}
	return fmt.Sprintf("%s and %d more", strings.Join(texts[:3], ", "), len(texts)-3)
}

// capital writes a text with a large first letter.
func capital(s string) string { return strings.ToUpper(s[:1]) + s[1:] }

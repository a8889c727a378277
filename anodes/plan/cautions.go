package plan

import (
	"fmt"
	"slices"
	"strings"

	"anodewright/anodes"
	"anodewright/hull"
)

// Caution is something that a person has to know or check. It never blocks
// the plan.
type Caution struct {
	ID         string
	Zone       int // -1: the whole asset
	Text       string
	Source     string
	Confidence string
}

// Closing is the sentence that every export ends with.
const Closing = "These figures support planning. The class, the local code and a qualified corrosion engineer decide."

// Usual returns the cautions of the trade that hold for every fitting of
// anodes.
func Usual() []Caution {
	const common = "common practice, no source"
	return []Caution{
		{"hot-work", -1, "Weld anodes only with a gas-free certificate and a hot-work permit; not on the boundaries of fuel tanks. Paint on the back of the plate burns: make it good.", "class and yard practice", common},
		{"fixing", -1, "Fix by continuous weld, or by bolts with lock nuts on welded supports; the insert must hold the anode when it is wasted.", "LR Rules for Ships, Pt 3 Ch 2, 3.3", "read"},
		{"no-paint", -1, "Never paint an anode: a painted one gives no current.", "trade", common},
		{"welding-return", -1, "Welding afloat: the return lead goes to the ship under repair itself, insulated from pier and other hulls.", "TB 55-1900-204-24", "read"},
		{"closed-spaces", -1, "Closed spaces with anodes or impressed current hold hydrogen: vent them before entry.", "IACS Common Structural Rules, Pt 2 Ch 2 Sec 2", "read"},
	}
}

// AllCautions returns the cautions that the plan raises, then those that hold
// for every fitting of anodes.
func (o *Outcome) AllCautions() []Caution { return slices.Concat(o.Cautions, Usual()) }

// cautions returns the cautions that this plan raises.
func cautions(o *Outcome) []Caution {
	c := raiser{o: o}
	a := o.Asset
	for i := range o.Zones {
		c.zone(i)
		c.safety(i)
		c.shortWater(i)
		c.freshWater(i)
		c.concerns(i)
	}
	c.protections()
	c.found()
	c.alloys()
	c.berth()
	c.circuits()
	c.practice()
	c.wettedArea()
	c.castings()
	for _, d := range a.Ahead() {
		if d.Date < o.Today {
			c.add("docking-past", -1, fmt.Sprintf("The docking of %s is past, and the plan still counts on what it says for it: enter what was done as the sets fitted, and that date as the last docking.", d.Date), "program", "computed")
		}
	}
	for _, l := range o.Order {
		if l.LateDays > 0 && l.Docking >= o.Today {
			c.add("late", -1, fmt.Sprintf("The order of %d %s for %s is late by %d days (order by %s).", l.Ordered, l.Pattern.ID, l.Docking, l.LateDays, l.OrderBy), "lead time of the pattern", "entered")
		}
	}
	if a.Basis.Sizing == hull.ForecastSizing {
		c.notSound()
	}
	c.readings()
	return c.out
}

type raiser struct {
	o   *Outcome
	out []Caution
}

func (c *raiser) add(id string, zone int, text, source, confidence string) {
	c.out = append(c.out, Caution{id, zone, text, source, confidence})
}

func (c *raiser) zone(i int) {
	z := &c.o.Zones[i]
	a, zone := c.o.Asset, z.Zone
	for _, p := range a.Patterns {
		if why := z.Refused[p.ID]; why != "" {
			source, confidence := anodes.RefusalSource(a, zone, &p)
			c.add("refused", i, fmt.Sprintf("Pattern %s is not offered: %s.", p.ID, why), source, confidence)
		}
	}
	if !zone.Bonded {
		c.add("unbonded", i, "Not bonded: no anode elsewhere protects it, and it may corrode where current leaves it. Earth the shaft or bond the rudder.", "trade", "common practice, no source")
	}
	for k := range a.Waters {
		w := &a.Waters[k]
		if own(zone) && w.Medium == hull.Seawater && w.Salinity != nil && *w.Salinity < 10 && everIn(a, zone, w) {
			c.add("brackish", i, fmt.Sprintf("%s has a salinity of %g: alloys are counted at their seawater potentials, which brackish water may not give.", w.ID, *w.Salinity), "trade", "common practice, no source")
		}
	}
	if a.Medium(zone) == hull.Soil && zone.OwnDensities == nil {
		c.add("soil-density", i, "The code has no current density for soil; the sediment figure of 20 mA/m² is used. MIL-HDBK-1004/10, Table 1, lists 11 to 270 mA/m² for bare steel in soil, and up to 430 with anaerobic bacteria: enter the zone's own.", "MIL-HDBK-1004/10, Table 1", "read")
	}
	if len(zone.Fitted) > 0 {
		if zi := z.Intervals[0]; zi.State == Short || zi.State == Spent {
			when := "before anything can be done at that docking"
			if len(a.Ahead()) == 0 {
				when = "and no docking is ahead at which anything could be done"
			}
			c.add("before-docking", i, fmt.Sprintf("The anodes fitted now are forecast %s by %s, %s.", strings.TrimSpace(string(zi.State)+" "+zi.Cause), zi.To, when), "forecast with "+c.o.factorWords(), "computed")
		}
	}
}

// practice: where the code's mean demand on a ship's paint is below what ship
// practice counts with.
func (c *raiser) practice() {
	a := c.o.Asset
	if a.Kind != hull.Ship || a.Basis.Densities == hull.HullPractice {
		return
	}
	byCode, byPractice := 0.0, 0.0
	for _, z := range c.o.Zones {
		if iv := z.Intervals[0]; iv.ByPractice != nil {
			byCode += iv.ByCode.Mean
			byPractice += iv.ByPractice.Mean
		}
	}
	if byCode < byPractice {
		c.add("practice", -1, fmt.Sprintf("The offshore code's mean demand of the painted zones up to %s is %.1f A; ship practice counts with %.1f A. Compare with what your anodes really lost.", c.o.Intervals[0].To, byCode, byPractice), "ship practice", "common practice, no source")
	}
}

// circuits: aluminium and zinc in one circuit.
func (c *raiser) circuits() {
	alloys := map[string]map[hull.Alloy]bool{}
	var names []string
	for i := range c.o.Zones {
		z := &c.o.Zones[i]
		name, ok := c.o.circuitOf(z.Zone)
		if !ok {
			continue
		}
		if alloys[name] == nil {
			alloys[name] = map[hull.Alloy]bool{}
			names = append(names, name)
		}
		for _, iv := range z.Intervals {
			for _, g := range iv.Fitted {
				alloys[name][g.Pattern.Alloy] = true
			}
		}
	}
	for _, name := range names {
		if alloys[name][hull.Aluminium] && alloys[name][hull.Zinc] {
			c.add("mixed-alloys", -1, fmt.Sprintf("Circuit %s has aluminium and zinc anodes: aluminium, the more negative, holds the zinc back and wastes first.", name), "trade", "common practice, no source")
		}
	}
}

// usesAlloy reports whether the zone carries the alloy at any time.
func usesAlloy(z *Zone, alloy hull.Alloy) bool {
	for _, iv := range z.Intervals {
		for _, g := range iv.Fitted {
			if g.Pattern.Alloy == alloy {
				return true
			}
		}
	}
	return false
}

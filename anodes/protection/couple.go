package protection

import (
	"fmt"
	"slices"

	"anodewright/assets"
	"anodewright/hull"
)

// Couple is the result of a nobler metal beside steel: a layer or fitting on
// the zone's own steel, or a zone of nobler metal that hangs on another's.
// While anodes or impressed current hold both it costs current; where nothing
// does the bare steel pays.
type Couple struct {
	Metal        string           `json:"metal"`
	Area         float64          `json:"noble_area_m2"`
	Steel        string           `json:"steel_zone"`       // whose bare steel is the small anode
	BareFrom     string           `json:"bare_steel_from"`  // entered or breakdown
	HeldBy       *string          `json:"held_by"`          // the zone whose anodes or current carry the drain; null: none
	DrivingLeast float64          `json:"driving_least_v"`  // between the noble metal and steel, both free
	DrivingMost  float64          `json:"driving_most_v"`   //
	FreeLoss     *float64         `json:"free_um_per_year"` // of steel alone that nothing holds, at most
	Intervals    []CoupleInterval `json:"intervals"`
}

// CoupleInterval is a couple in one docking interval.
type CoupleInterval struct {
	From      hull.Date `json:"from"`
	To        hull.Date `json:"to"`
	Drain     Triple    `json:"drain_a"`       // what the noble metal takes of the protection
	BareSteel *float64  `json:"bare_steel_m2"` // null: none
	Ratio     *float64  `json:"area_ratio"`    // noble over bare
	Loss      *float64  `json:"steel_loss_um_per_year"`
}

// CoupleLoss returns the current density in mA/m2 that the cathode current of
// a noble area puts on the bare steel beside it, and the thickness in um that
// it takes off a year: i = noble area x density/bare area, Faraday's law.
// It holds where oxygen limits the cathode, so that its current hardly
// depends on the steel's potential, and where nothing else holds the steel.
func CoupleLoss(noble, density, bare float64) (i, loss float64) {
	i = noble * density / bare
	return i, i * LossPerDensity("iron")
}

// couple computes the result of zone i, which has a nobler metal on or beside
// its steel.
func (c *calculation) couple(i int) *Couple {
	z := &c.a.Zones[i]
	without := *c.a
	without.Zones = slices.Clone(c.a.Zones)
	without.Zones[i].Nobler = nil
	rest := hull.Demand(&without)[i].Own
	r := c.newCouple(z.Nobler.Metal, z.Nobler.Area, i, i)
	r.BareFrom = "entered"
	if z.Nobler.BareSteel == 0 {
		r.BareFrom = "breakdown"
	}
	for k, iv := range c.ivs {
		bare := z.Nobler.BareSteel
		if bare == 0 {
			bare = c.bareSteel(i, k)
		}
		own := c.demand[i].Own[k]
		drain := hull.Current{Initial: own.Initial - rest[k].Initial, Mean: own.Mean - rest[k].Mean, Final: own.Final - rest[k].Final}
		c.coupleInterval(r, iv, drain, bare)
	}
	return r
}

// heldCouple computes the result of zone i, of nobler metal, that hangs on
// the anodes of another zone.
func (c *calculation) heldCouple(i, host int) *Couple {
	z := &c.a.Zones[i]
	metal := hull.NobleMetal("copper-alloy")
	if z.Surface == hull.Stainless {
		metal = "stainless-steel"
	}
	r := c.newCouple(metal, z.WettedArea, i, host)
	r.BareFrom = "breakdown"
	for k, iv := range c.ivs {
		c.coupleInterval(r, iv, c.demand[i].Own[k], c.bareSteel(host, k))
	}
	return r
}

// newCouple begins the couple of the nobler metal of zone noble with the
// steel of zone steel.
func (c *calculation) newCouple(metal hull.NobleMetal, area float64, noble, steel int) *Couple {
	t := assets.Get("galvanic-series")
	z := &c.a.Zones[steel]
	r := &Couple{
		Metal: string(metal), Area: area, Steel: z.ID, HeldBy: c.holder(noble), FreeLoss: freeCorrosion(c.a.Medium(z)),
		DrivingLeast: t.Value(string(metal), "most negative") - t.Value("steel", "least negative"),
		DrivingMost:  t.Value(string(metal), "least negative") - t.Value("steel", "most negative"),
	}
	row, _ := t.Row(string(metal))
	c.trace.Add(hull.Step{
		Figure: "galvanic couple of " + string(metal) + " and steel, at most", Value: r.DrivingMost, Unit: "V", Formula: "difference of free potentials",
		Inputs: []hull.Input{
			{Name: string(metal) + " from", Value: t.Value(string(metal), "least negative"), Unit: "V"}, {Name: "to", Value: t.Value(string(metal), "most negative"), Unit: "V"},
			{Name: "steel from", Value: t.Value("steel", "least negative"), Unit: "V"}, {Name: "to", Value: t.Value("steel", "most negative"), Unit: "V"},
		},
		Source: t.Source(), Confidence: row.Confidence,
	})
	return r
}

func (c *calculation) coupleInterval(r *Couple, iv hull.Interval, drain hull.Current, bare float64) {
	ci := CoupleInterval{From: iv.From, To: iv.To, Drain: Triple(drain)}
	if bare > 0 {
		ratio := r.Area / bare
		i, loss := CoupleLoss(r.Area, drain.Mean*1000/r.Area, bare)
		ci.BareSteel, ci.Ratio, ci.Loss = &bare, known(ratio), known(loss)
		c.trace.Add(hull.Step{
			Figure: fmt.Sprintf("loss of bare steel beside %s where nothing holds it, %s to %s", r.Metal, iv.From, iv.To), Value: loss, Unit: "um/year",
			Formula: "noble area × density / bare area × Faraday's equivalent of iron",
			Inputs: []hull.Input{
				{Name: "noble area", Value: r.Area, Unit: "m2"}, {Name: "density on it", Value: drain.Mean * 1000 / r.Area, Unit: "mA/m2"},
				{Name: "bare steel", Value: bare, Unit: "m2"}, {Name: "density on the bare steel", Value: i, Unit: "mA/m2"}, {Name: "Faraday's equivalent", Value: LossPerDensity("iron"), Unit: "um/year per mA/m2"},
			},
			Source: assets.Get("faraday").Source(), Confidence: "computed",
		})
	}
	r.Intervals = append(r.Intervals, ci)
}

// holder returns the zone whose anodes or impressed current hold zone i, nil
// where none does.
func (c *calculation) holder(i int) *string {
	z := &c.a.Zones[i]
	switch h := z.Hold().(type) {
	case hull.ByCoat:
		return nil
	case hull.ByZone:
		if !z.Bonded {
			return nil
		}
		return &h.Host
	}
	return &z.ID
}

// bareSteel returns the bare steel in m2 of a zone on average over interval k:
// its bare area and what its coating has broken down.
func (c *calculation) bareSteel(i, k int) float64 {
	z := &c.a.Zones[i]
	if z.Surface == hull.CopperAlloy || z.Surface == hull.Stainless {
		return 0
	}
	return z.BareArea + (z.WettedArea-z.BareArea)*c.demand[i].Breakdown[k].Mean
}

// freeCorrosion returns what steel that nothing holds loses at most in a
// year, in um, in seawater and sediment; nothing where there is no figure.
func freeCorrosion(medium hull.Medium) *float64 {
	if medium != hull.Seawater && medium != hull.Sediment {
		return nil
	}
	x := assets.Get("free-corrosion").Value("steel in seawater", "most")
	return &x
}

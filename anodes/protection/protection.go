// Package protection is what holds steel other than sacrificial anodes in
// water, and what burdens them: coats of zinc, nobler metal beside steel,
// impressed current, and rods in soil or mud. Each has a result of its own
// beside the plan.
//
// Units are SI with amperes, ampere hours, kg per ampere-year, um per year
// and years of 365 days; resistivities are in ohm m, potentials in V against
// Ag/AgCl/seawater where nothing else is said.
package protection

import (
	"math"

	"anodewright/hull"
)

// Result is the other protections of one zone. Each part is nil where it does
// not concern the zone; at least one is not.
//
// In JSON a zone's "protection" is an object of the parts "zinc_coat",
// "nobler", "impressed_current" and "soil_rods", each as its type says, and
// "unbonded", a sentence, where the zone's steel is cut off from what should
// hold it. Parts that do not concern the zone are absent; a figure that does
// not exist is null.
type Result struct {
	Coat      *ZincCoat   `json:"zinc_coat,omitempty"`
	Couple    *Couple     `json:"nobler,omitempty"`
	Impressed *Impressed  `json:"impressed_current,omitempty"`
	Rods      *Rods       `json:"soil_rods,omitempty"`
	Unbonded  string      `json:"unbonded,omitempty"`
	Steps     []hull.Step `json:"-"` // where the figures come from
}

// Triple is a current in A at the start of an interval, on average and at
// its end.
type Triple struct {
	Initial float64 `json:"initial"`
	Mean    float64 `json:"mean"`
	Final   float64 `json:"final"`
}

// known returns a figure, nil for one that is not finite.
func known(x float64) *float64 {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return nil
	}
	return &x
}

// calculation is one computation of a result.
type calculation struct {
	a      *hull.Asset
	ivs    []hull.Interval
	demand []hull.ZoneDemand
	factor float64
	trace  *hull.Trace
}

// Of returns the other protections of zone i of a valid asset, nil where none
// concerns it. demand is the asset's own; factor multiplies it where anodes
// and currents are sized.
func Of(a *hull.Asset, demand []hull.ZoneDemand, factor float64, i int) *Result {
	c := &calculation{a, a.Intervals(), demand, factor, new(hull.Trace)}
	z := &a.Zones[i]
	r := new(Result)
	switch z.Hold().(type) {
	case hull.ByCoat:
		r.Coat = c.zincCoat(i)
	case hull.ByImpressedCurrent:
		r.Impressed = c.impressed(i)
	case hull.ByAnodes:
		if m := a.Medium(z); m == hull.Soil || m == hull.Sediment {
			r.Rods = c.rods(i)
		}
	case hull.ByZone:
		if z.Surface == hull.CopperAlloy || z.Surface == hull.Stainless {
			r.Couple = c.heldCouple(i, c.index(z.HeldBy))
		}
		if !z.Bonded {
			r.Unbonded = unbonded(a, z)
		}
	}
	if z.Nobler != nil {
		r.Couple = c.couple(i)
	}
	if r.Coat == nil && r.Couple == nil && r.Impressed == nil && r.Rods == nil && r.Unbonded == "" {
		return nil
	}
	r.Steps = c.trace.Steps
	return r
}

// index returns the place of a zone that is known to exist.
func (c *calculation) index(id string) int {
	for i := range c.a.Zones {
		if c.a.Zones[i].ID == id {
			return i
		}
	}
	panic("protection: no zone " + id)
}

// unbonded names a shaft or rudder that no metal connects to its host.
func unbonded(a *hull.Asset, z *hull.Zone) string {
	host, _ := a.Zone(z.HeldBy)
	what := z.Name + " is"
	switch z.Region {
	case "propeller":
		what = z.Name + ": the shaft is not earthed and"
	case "rudder":
		what = z.Name + ": the rudder is not bonded and"
	}
	return what + " cut off from the anodes of " + host.Name + ": it takes no current from them and is not protected."
}

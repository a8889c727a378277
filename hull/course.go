package hull

import "slices"

// Course is the current demand of every zone as it runs in time, by the mean
// densities of the asset's basis: what a forecast integrates.
type Course struct {
	c     *calculation
	coats [][]coat // by zone and interval

	law      decay
	decays   []bool // by zone: its bare steel takes current by the law
	immersed []Date // by interval; nil without a law
}

// NewCourse returns the course of an asset's demand.
func NewCourse(a *Asset) *Course {
	c := &Course{c: newCalculation(a, a.Basis.Densities, nil)}
	for i := range a.Zones {
		z := &a.Zones[i]
		coats := make([]coat, len(c.c.ivs))
		coats[0] = a.coatAtStart(z, c.c.ivs[0].From)
		for k := 1; k < len(coats); k++ {
			coats[k] = coats[k-1].afterDocking(z, &c.c.ahead[k-1])
		}
		c.coats = append(c.coats, coats)
		c.decays = append(c.decays, c.c.decays(z))
	}
	if law, ok := a.Basis.decay(); ok {
		c.law = law
		for k := range c.c.ivs {
			c.immersed = append(c.immersed, a.immersed(k))
		}
	}
	return c
}

// Breaks returns the times within interval k, in years since its start, at
// which the demand of one of the zones changes its law: a change of service,
// or a coating broken down altogether. They rise, from 0 to the interval's
// length.
func (c *Course) Breaks(zones []int, k int) []float64 {
	iv := c.c.ivs[k]
	breaks := []float64{0, iv.Years()}
	for _, i := range zones {
		z := &c.c.a.Zones[i]
		for d := c.c.a.nextChange(z, iv.From, iv.To); d < iv.To; d = c.c.a.nextChange(z, d, iv.To) {
			breaks = append(breaks, d.Years(iv.From))
		}
		if coat := c.coats[i][k]; coat.slope > 0 {
			if t := (1-coat.base)/coat.slope - iv.From.Years(coat.from); t > 0 && t < iv.Years() {
				breaks = append(breaks, t)
			}
		}
	}
	if c.immersed != nil {
		const first = firstHours / 24.0 / DaysPerYear
		if t := first - iv.From.Years(c.immersed[k]); t > 0 && t < iv.Years() {
			breaks = append(breaks, t)
		}
	}
	slices.Sort(breaks)
	return slices.Compact(breaks)
}

// Density is the density in A/m2 that bare steel has by the basis's decay law at
// a time of interval k, in years since its start; 0 without a law.
func (c *Course) Density(k int, t float64) float64 {
	if c.immersed == nil {
		return 0
	}
	return c.law.density(c.Immersed(k, t)) / 1000
}

// Immersed is for how many hours the steel has been under water at a time of
// interval k, in years since its start; 0 without a decay law.
func (c *Course) Immersed(k int, t float64) float64 {
	if c.immersed == nil {
		return 0
	}
	return (c.c.ivs[k].From.Years(c.immersed[k]) + t) * DaysPerYear * 24
}

// Decays reports whether the decay law holds for a zone.
func (c *Course) Decays(i int) bool { return c.decays[i] }

// Line returns the zone's demand in A at the ends of a stretch between two
// breaks of interval k. from and to are in years since the interval's start.
// It includes drains and, for tanks, the share of the time under water.
func (c *Course) Line(i, k int, from, to float64) (first, last float64) {
	flat, bare := c.Parts(i, k, from, to)
	return flat[0] + bare[0]*c.Density(k, from), flat[1] + bare[1]*c.Density(k, to)
}

// Parts is Line in two parts, both straight lines within the stretch: flat is a
// current in A, bare the area in m2 that takes Density.
func (c *Course) Parts(i, k int, from, to float64) (flat, bare [2]float64) {
	a, z := c.c.a, &c.c.a.Zones[i]
	iv, coat := c.c.ivs[k], c.coats[i][k]
	// The service of the stretch is that in force at its middle.
	middle := iv.From + Date((from+to)/2*DaysPerYear)
	shares, underWay := a.ServiceAt(z, middle)
	density := c.c.weighed(z, shares).Mean
	falls := c.decays[i]
	steel := density // what is left of the flat density where the law replaces it
	if falls {
		steel = c.c.tables.perDegree * z.heat()
	}
	since := iv.From.Years(coat.from)
	scale := underWay * z.ImmersedShare
	for n, t := range [2]float64{from, to} {
		paint := (z.WettedArea - z.BareArea) * min(1, coat.base+coat.slope*(since+t))
		area, current := z.BareArea+paint, 0.0
		if a.Basis.Densities == HullPractice && PracticeApplies(a, z) {
			area = z.BareArea
			current = (z.WettedArea - z.BareArea) * a.Basis.practice(coat.age+since+t)
		}
		current += area * steel
		if z.Nobler != nil {
			current += z.Nobler.Area * density
		}
		flat[n] = current*scale/1000 + z.Drains + float64(z.Wells)*c.c.tables.wellDrain
		if falls {
			bare[n] = area * scale
		}
	}
	return flat, bare
}

// Repolarising returns the zone's demand in A with the initial density at a
// time of interval k, in years since its start: what it would take to
// polarise the steel anew then.
func (c *Course) Repolarising(i, k int, t float64) float64 {
	z := &c.c.a.Zones[i]
	iv, coat := c.c.ivs[k], c.coats[i][k]
	shares, underWay := c.c.a.ServiceAt(z, min(iv.From+Date(t*DaysPerYear), iv.To-1))
	metal := z.BareArea
	if z.Nobler != nil {
		metal += z.Nobler.Area
	}
	fc := min(1, coat.base+coat.slope*(iv.From.Years(coat.from)+t))
	return c.c.weighed(z, shares).Initial*((z.WettedArea-z.BareArea)*fc+metal)*underWay/1000 + z.Drains + float64(z.Wells)*c.c.tables.wellDrain
}

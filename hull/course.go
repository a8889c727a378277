package hull

import "slices"

// Course is the current demand of every zone as it runs in time, by the mean
// densities of the asset's basis: what a forecast integrates.
type Course struct {
	c     *calculation
	coats [][]coat // by zone and interval
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
	slices.Sort(breaks)
	return slices.Compact(breaks)
}

// Line returns the zone's demand in A at the ends of a stretch between two
// breaks of interval k, between which it is a straight line. from and to are
// in years since the interval's start. It includes drains and, for tanks, the
// share of the time under water.
func (c *Course) Line(i, k int, from, to float64) (first, last float64) {
	a, z := c.c.a, &c.c.a.Zones[i]
	iv, coat := c.c.ivs[k], c.coats[i][k]
	// The service of the stretch is that in force at its middle.
	middle := iv.From + Date((from+to)/2*DaysPerYear)
	shares, underWay := a.ServiceAt(z, middle)
	bare := c.c.weighed(z, shares).Mean
	since := iv.From.Years(coat.from)
	coated, metal := z.WettedArea-z.BareArea, z.BareArea
	if z.Nobler != nil {
		metal += z.Nobler.Area
	}
	at := func(t float64) float64 {
		paint := bare * min(1, coat.base+coat.slope*(since+t))
		if a.Basis.Densities == HullPractice && PracticeApplies(a, z) {
			paint = a.Basis.practice(coat.age + since + t)
		}
		return (coated*paint+bare*metal)*underWay*z.ImmersedShare/1000 + z.Drains + float64(z.Wells)*c.c.tables.wellDrain
	}
	return at(from), at(to)
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

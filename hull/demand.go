package hull

import "slices"

// Current is a current demand in A: just after the docking that starts an
// interval, on average over it, and just before the next.
type Current struct{ Initial, Mean, Final float64 }

// Plus adds two demands.
func (c Current) Plus(d Current) Current {
	return Current{c.Initial + d.Initial, c.Mean + d.Mean, c.Final + d.Final}
}

// Times multiplies a demand.
func (c Current) Times(f float64) Current {
	return Current{f * c.Initial, f * c.Mean, f * c.Final}
}

// ZoneDemand is what one zone asks for in each docking interval.
type ZoneDemand struct {
	Breakdown []Breakdown // of the coated part; 1 where there is no coating
	Own       []Current   // the zone's own
	Total     []Current   // with the zones that it holds; Own itself where it holds none
}

// Demand returns the current demand of every zone, in the order of the
// asset's zones, in every interval of Intervals, by the asset's own basis.
func Demand(a *Asset) []ZoneDemand { return DemandBy(a, a.Basis.Densities) }

// DemandBy is Demand by another rule for the densities, to show beside the
// asset's own.
func DemandBy(a *Asset, rule DensityRule) []ZoneDemand {
	c := newCalculation(a, rule, nil)
	n, zones := len(c.ivs), len(a.Zones)
	zs := make([]ZoneDemand, zones)
	breakdown, currents := make([]Breakdown, n*zones), make([]Current, n*zones)
	for i := range zs {
		own := currents[i*n : (i+1)*n : (i+1)*n]
		zs[i] = ZoneDemand{Breakdown: breakdown[i*n : (i+1)*n : (i+1)*n], Own: own, Total: own}
		c.zone(&a.Zones[i], zs[i])
	}
	for i := range a.Zones {
		a.hosts(i, func(host int) {
			if &zs[host].Total[0] == &zs[host].Own[0] {
				zs[host].Total = slices.Clone(zs[host].Own)
			}
			for k, own := range zs[i].Own {
				zs[host].Total[k] = zs[host].Total[k].Plus(own)
			}
		})
	}
	return zs
}

// hosts calls f for every zone whose anodes zone i hangs on: its host, its
// host's host and so on, as far as each is bonded.
func (a *Asset) hosts(i int, f func(host int)) {
	for steps := 0; a.Zones[i].HeldBy != "" && a.Zones[i].Bonded && steps < len(a.Zones); steps++ {
		for h := range a.Zones {
			if a.Zones[h].ID == a.Zones[i].HeldBy {
				i = h
				break
			}
		}
		f(i)
	}
}

// Held returns the indices of the zones that hang on zone i's anodes, directly
// or through another held zone. An unbonded zone and what it holds hang on
// none.
func (a *Asset) Held(i int) []int {
	var held []int
	for j := range a.Zones {
		a.hosts(j, func(host int) {
			if host == i {
				held = append(held, j)
			}
		})
	}
	return held
}

// calculation is one computation of demands.
type calculation struct {
	a      *Asset
	rule   DensityRule
	ivs    []Interval
	years  []float64 // of the boundaries, since the first
	ahead  []Docking
	tables *reference
	waters []surroundings // in the order of the asset's waters
	trace  *Trace

	// The mix of waters that the densities were last weighed for.
	mixZone *Zone
	mix     *WaterShare
	bare    Densities
}

func newCalculation(a *Asset, rule DensityRule, t *Trace) *calculation {
	c := &calculation{a: a, rule: rule, ivs: a.Intervals(), ahead: a.Ahead(), tables: tables(), trace: t}
	for _, iv := range c.ivs {
		c.years = append(c.years, iv.From.Years(c.ivs[0].From))
	}
	c.years = append(c.years, c.ivs[len(c.ivs)-1].To.Years(c.ivs[0].From))
	for i := range a.Waters {
		c.waters = append(c.waters, c.tables.surroundings(&a.Waters[i]))
	}
	return c
}

// zone computes a zone's own demand: i*(coated*fc + bare) for initial, mean
// and final, the means time-weighted over the changes of service within an
// interval, and drains on top (DNV-RP-B401, 7.4).
func (c *calculation) zone(z *Zone, zd ZoneDemand) {
	drains := z.Drains + float64(z.Wells)*c.tables.wellDrain
	practice := c.rule == HullPractice && PracticeApplies(c.a, z)
	changes := len(c.a.Service)+len(z.Service) > 0
	coat := c.a.coatAtStart(z, c.ivs[0].From)
	bare, underWay := c.weighed(z, z.Waters), z.UnderWayFactor
	start := c.ivs[0].From
	since := start.Years(coat.from) // the coat's date to the start
	var whole, part stretch
	for k, iv := range c.ivs {
		if k > 0 && len(c.ahead[k-1].Works) > 0 {
			if c.trace != nil {
				c.explainWorks(z, coat, &c.ahead[k-1])
			}
			coat = coat.afterDocking(z, &c.ahead[k-1])
			since = start.Years(coat.from)
		}
		coat.over(since+c.years[k], since+c.years[k+1], &whole)
		zd.Breakdown[k] = whole.Breakdown
		if z.BareArea >= z.WettedArea {
			zd.Breakdown[k] = Breakdown{1, 1, 1} // no part is coated
		}
		var own Current
		if !changes {
			own = c.stretch(z, &whole, bare, underWay, practice)
		}
		for from := iv.From; changes && from < iv.To; {
			to := c.a.nextChange(z, from, iv.To)
			shares, underWay := c.a.ServiceAt(z, from)
			coat.over(from.Years(coat.from), to.Years(coat.from), &part)
			s := c.stretch(z, &part, c.weighed(z, shares), underWay, practice)
			if from == iv.From {
				own.Initial = s.Initial
			}
			own.Mean += s.Mean * float64(to-from) / float64(iv.To-iv.From)
			own.Final = s.Final
			from = to
		}
		zd.Own[k] = Current{own.Initial + drains, own.Mean + drains, own.Final + drains}
		if c.trace != nil {
			c.explain(z, k, coat, zd, drains, practice)
		}
	}
}

// stretch is the demand of a time of unchanged service: bare is the zone's
// densities in it.
func (c *calculation) stretch(z *Zone, t *stretch, bare Densities, underWay float64, practice bool) Current {
	coated, metal := z.WettedArea-z.BareArea, z.BareArea
	if z.Nobler != nil {
		metal += z.Nobler.Area
	}
	var cur Current
	if practice {
		b := &c.a.Basis
		cur = Current{
			coated * b.practice(t.ageFirst),
			coated * b.practice((t.ageFirst+t.ageLast)/2),
			coated * b.practice(t.ageLast),
		}
	} else {
		cur = Current{bare.Initial * coated * t.Initial, bare.Mean * coated * t.Mean, bare.Final * coated * t.Final}
	}
	f := underWay / 1000
	return Current{
		(cur.Initial + bare.Initial*metal) * f,
		(cur.Mean + bare.Mean*metal) * f * z.ImmersedShare,
		(cur.Final + bare.Final*metal) * f,
	}
}

// practice is ship practice's density over the whole painted area, mA/m2, at
// a coating age in years.
func (b *Basis) practice(age float64) float64 { return b.PracticeI0 + b.PracticePerYear*max(0, age) }

// weighed returns the densities of a zone's bare surface in mA/m2, weighed by
// its shares of waters.
func (c *calculation) weighed(z *Zone, shares []WaterShare) Densities {
	if c.mixZone == z && c.mix == &shares[0] {
		return c.bare
	}
	var bare Densities
	for _, s := range shares {
		for i := range c.waters {
			if c.waters[i].w.ID == s.Water {
				d := z.density(c.tables, c.rule, c.waters[i])
				bare.Initial += s.Share * d.Initial
				bare.Mean += s.Share * d.Mean
				bare.Final += s.Share * d.Final
				break
			}
		}
	}
	c.mixZone, c.mix, c.bare = z, &shares[0], bare
	return bare
}

// PracticeApplies reports whether ship practice has a figure for the zone: a
// coated zone in seawater without densities of its own.
func PracticeApplies(a *Asset, z *Zone) bool {
	return z.OwnDensities == nil && z.Coated() && a.Medium(z) == Seawater
}

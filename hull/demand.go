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
	Total     []Current   // with the zones that it holds
}

// Demand returns the current demand of every zone, in the order of the
// asset's zones, in every interval of Intervals, by the asset's own basis.
func Demand(a *Asset) []ZoneDemand { return DemandBy(a, a.Basis.Densities) }

// DemandBy is Demand by another rule for the densities, to show beside the
// asset's own.
func DemandBy(a *Asset, rule DensityRule) []ZoneDemand {
	ivs := a.Intervals()
	zs := make([]ZoneDemand, len(a.Zones))
	for i := range a.Zones {
		zs[i] = a.zoneDemand(&a.Zones[i], ivs, rule)
	}
	for i := range a.Zones {
		zs[i].Total = slices.Clone(zs[i].Own)
		for _, h := range a.Held(&a.Zones[i]) {
			for k, c := range zs[h].Own {
				zs[i].Total[k] = zs[i].Total[k].Plus(c)
			}
		}
	}
	return zs
}

// Held returns the indices of the zones that hang on z's anodes, directly or
// through another held zone. An unbonded zone and what it holds hang on none.
func (a *Asset) Held(z *Zone) []int {
	var held []int
	for i := range a.Zones {
		h := &a.Zones[i]
		for range a.Zones {
			if h.HeldBy == "" || !h.Bonded {
				break
			}
			if h.HeldBy == z.ID {
				held = append(held, i)
				break
			}
			h, _ = a.Zone(h.HeldBy)
		}
	}
	return held
}

// zoneDemand computes a zone's own demand: i*(coated*fc + bare) for initial,
// mean and final, the means time-weighted over the changes of service within
// an interval (DNV-RP-B401, 7.4).
func (a *Asset) zoneDemand(z *Zone, ivs []Interval, rule DensityRule) ZoneDemand {
	zd := ZoneDemand{Breakdown: make([]Breakdown, len(ivs)), Own: make([]Current, len(ivs))}
	drains := z.Drains + float64(z.Wells)*wellDrain()
	coats := a.coats(z, ivs)
	for k, iv := range ivs {
		c := coats[k]
		zd.Breakdown[k] = Breakdown{c.at(iv.From), c.mean(iv.From, iv.To), c.at(iv.To)}
		var own Current
		for from := iv.From; from < iv.To; {
			to := a.nextChange(z, from, iv.To)
			s := a.segment(z, c, from, to, rule)
			if from == iv.From {
				own.Initial = s.Initial
			}
			own.Mean += s.Mean * float64(to-from) / float64(iv.To-iv.From)
			own.Final = s.Final
			from = to
		}
		zd.Own[k] = own.Plus(Current{drains, drains, drains})
	}
	return zd
}

// segment is the demand of a stretch of unchanged service.
func (a *Asset) segment(z *Zone, c coat, from, to Date, rule DensityRule) Current {
	shares, underWay := a.ServiceAt(z, from)
	var bare Densities // mA/m2
	if z.OwnDensities != nil {
		bare = *z.OwnDensities
	} else {
		for _, s := range shares {
			w, _ := a.Water(s.Water)
			d := z.density(rule, w)
			bare.Initial += s.Share * d.Initial
			bare.Mean += s.Share * d.Mean
			bare.Final += s.Share * d.Final
		}
	}
	coated := z.WettedArea - z.BareArea
	var cur Current
	if rule == HullPractice && PracticeApplies(a, z) {
		b := a.Basis
		practice := func(age float64) float64 { return b.PracticeI0 + b.PracticePerYear*max(0, age) }
		first, last := c.ageAt(from), c.ageAt(to)
		cur = Current{
			coated*practice(first) + bare.Initial*z.BareArea,
			coated*practice((first+last)/2) + bare.Mean*z.BareArea,
			coated*practice(last) + bare.Final*z.BareArea,
		}
	} else {
		cur = Current{
			bare.Initial * (coated*c.at(from) + z.BareArea),
			bare.Mean * (coated*c.mean(from, to) + z.BareArea),
			bare.Final * (coated*c.at(to) + z.BareArea),
		}
	}
	cur = cur.Times(underWay / 1000)
	cur.Mean *= z.ImmersedShare
	return cur
}

// PracticeApplies reports whether ship practice has a figure for the zone: a
// coated zone in seawater without densities of its own.
func PracticeApplies(a *Asset, z *Zone) bool {
	return z.OwnDensities == nil && z.Coated() && a.Medium(z) == Seawater
}

// ServiceAt returns the waters and the under-way factor in force for a zone
// on a date: the zone's own latest change, else the asset's latest, else what
// the zone says. An asset's change of waters concerns the zones of its medium.
func (a *Asset) ServiceAt(z *Zone, d Date) ([]WaterShare, float64) {
	shares, underWay := z.Waters, z.UnderWayFactor
	for _, changes := range [][]Service{a.Service, z.Service} {
		for _, s := range changes {
			if s.From > d {
				break
			}
			if len(s.Waters) > 0 {
				if w, _ := a.Water(s.Waters[0].Water); w.Medium == a.Medium(z) {
					shares = s.Waters
				}
			}
			if s.UnderWayFactor != nil {
				underWay = *s.UnderWayFactor
			}
		}
	}
	return shares, underWay
}

// nextChange returns the first change of service after d, at most end.
func (a *Asset) nextChange(z *Zone, d, end Date) Date {
	for _, changes := range [][]Service{a.Service, z.Service} {
		for _, s := range changes {
			if s.From > d && s.From < end {
				end = s.From
			}
		}
	}
	return end
}

// Resistivity returns the resistivity in ohm m that sets the output of the
// zone's anodes on a date: the mean by conductance of its waters, or the
// worst of those with a share of a tenth or more.
func (a *Asset) Resistivity(z *Zone, d Date) float64 {
	shares, _ := a.ServiceAt(z, d)
	var conductance, worst, worstAny float64
	for _, s := range shares {
		w, _ := a.Water(s.Water)
		rho := w.Resist()
		conductance += s.Share / rho
		worstAny = max(worstAny, rho)
		if s.Share >= 0.1 {
			worst = max(worst, rho)
		}
	}
	switch {
	case a.Basis.OutputWater == MeanWater:
		return 1 / conductance
	case worst > 0:
		return worst
	}
	return worstAny
}

package hull

// ServiceAt returns the waters and the under-way factor in force for a zone
// on a date: the zone's own latest change, else the asset's latest, else what
// the zone says. An asset's change of waters concerns the zones of its medium.
func (a *Asset) ServiceAt(z *Zone, d Date) ([]WaterShare, float64) {
	shares, underWay := z.Waters, z.UnderWayFactor
	for _, s := range a.Service {
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
	for _, s := range z.Service {
		if s.From > d {
			break
		}
		if len(s.Waters) > 0 {
			shares = s.Waters
		}
		if s.UnderWayFactor != nil {
			underWay = *s.UnderWayFactor
		}
	}
	return shares, underWay
}

// nextChange returns the first change of service after d, at most end.
func (a *Asset) nextChange(z *Zone, d, end Date) Date {
	for _, s := range a.Service {
		if s.From > d && s.From < end {
			end = s.From
		}
	}
	for _, s := range z.Service {
		if s.From > d && s.From < end {
			end = s.From
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

package plan

import (
	"math"

	"anodewright/anodes"
	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// ZoneSlope is the slope view of a zone with what it holds in one interval:
// see [anodes.Slope].
type ZoneSlope struct {
	hull.Interval
	Start, End anodes.Slope
	// Needs is the product of resistance and net mass, ohm kg, of pieces that
	// last the interval at its mean current and the start's S; Has is what the
	// pieces have. Where Has is above Needs there is mass to spare.
	Needs, Has float64
}

// Slope returns the slope view of a zone interval by interval; nothing for a
// zone without anodes of its own. It sees bare steel at the interval's mean
// current and the anodes under the plan, at the start and at the end as wasted
// as they then are. Anodes of several potentials count as one of their mean by
// conductance. Zones of the same circuit that hold themselves are left out.
func (o *Outcome) Slope(zone int) []ZoneSlope {
	z := &o.Zones[zone]
	if _, own := z.Zone.Hold().(hull.ByAnodes); !own {
		return nil
	}
	var views []ZoneSlope
	for k := range z.Intervals {
		iv := &z.Intervals[k]
		current := iv.Total.Mean * z.Factor.Median
		before, start, end := o.begin(zone, k), o.Asset.Resistivity(z.Zone, iv.From), o.Asset.Resistivity(z.Zone, iv.To-1)
		first, last := o.bareSteel(zone, k)
		conductance, potential := conductanceOf(before, start, z.Zone.Shielding)
		v := ZoneSlope{Interval: iv.Interval, Start: anodes.SlopeOf(first, current, potential, conductance)}
		conductance, potential = conductanceOf(iv.Fitted, end, z.Zone.Shielding)
		v.End = anodes.SlopeOf(last, current, potential, conductance)
		pieces, mass, charge := 0.0, 0.0, 0.0
		for _, g := range before {
			n := float64(g.Count)
			pieces += n
			mass += n * g.Pattern.NetMass
			charge += n * g.Pattern.NetMass * max(0, g.Pattern.Utilisation-g.Wastage) * g.metal.Capacity
			v.Has += n * g.Pattern.NetMass * (anodes.ResistanceAt(g.Pattern, start, g.Wastage) + g.Pattern.SeriesResist)
		}
		v.Has /= pieces
		// What is left of C u in place of that of new pieces.
		v.Needs = anodes.SlopeMass(v.Start.Density, iv.Hours(), v.Start.S*z.Zone.Shielding, charge/mass, 1)
		views = append(views, v)
	}
	return views
}

// begin returns the anodes of a zone at the start of an interval, after the
// docking there.
func (o *Outcome) begin(zone, interval int) []Group {
	z := &o.Zones[zone]
	var groups []Group
	if interval == 0 {
		for _, f := range z.Zone.Fitted {
			p, _ := o.Asset.Pattern(f.Pattern)
			groups = append(groups, o.group(zone, p, f.Count, f.Wastage))
		}
		return groups
	}
	l, acts := o.Action(zone, interval-1)
	acts = acts && l.Action != renewal.Keep
	if !acts || l.Action == renewal.Add {
		groups = append(groups, z.Intervals[interval-1].Fitted...)
	}
	if acts {
		groups = append(groups, o.group(zone, l.Pattern, l.Count, 0))
	}
	return groups
}

// bareSteel returns the area in m2 of a zone and what it holds that takes
// current as bare steel does, at the start and the end of an interval: the
// coated area times the share broken down, and the bare area.
func (o *Outcome) bareSteel(zone, interval int) (first, last float64) {
	for _, i := range append(o.Asset.Held(zone), zone) {
		z, b := o.Zones[i].Zone, o.Zones[i].Intervals[interval].Breakdown
		coated := z.WettedArea - z.BareArea
		first += coated*b.Initial + z.BareArea
		last += coated*b.Final + z.BareArea
	}
	return first, last
}

// conductanceOf returns sum(n/R) in A/V of groups with their shielding, and
// their mean potential; NaN where no group gives current.
func conductanceOf(groups []Group, rho, shielding float64) (conductance, potential float64) {
	sum := 0.0
	for _, g := range groups {
		if g.spent() {
			continue
		}
		c := shielding * float64(g.Count) / (anodes.ResistanceAt(g.Pattern, rho, g.Wastage) + g.Pattern.SeriesResist)
		conductance += c
		sum += c * g.metal.Potential
	}
	if conductance == 0 {
		return 0, math.NaN()
	}
	return conductance, sum / conductance
}

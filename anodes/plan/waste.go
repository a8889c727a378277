package plan

import (
	"slices"

	"anodewright/anodes/forecast"
	"anodewright/hull"
)

// point is a circuit at one time; giving says which groups give current then.
type point struct {
	forecast.Point
	giving []bool
}

// waste lets the circuit's anodes waste through interval k: see run. On the
// day of a reading that finds pieces gone, fallen or painted over there are
// two points: before and after.
func (o *Outcome) waste(c *circuit, course *hull.Course, k int, times []float64) []point {
	iv := o.Intervals[k]
	breaks := append(course.Breaks(c.zones, k), times...)
	var turns []float64
	for _, g := range c.groups {
		for _, d := range g.lot.Turns(iv.From, iv.To) {
			turns = append(turns, d.Years(iv.From))
		}
	}
	breaks = append(breaks, turns...)
	slices.Sort(breaks)
	breaks = slices.Compact(breaks)
	c.groups = slices.Clone(c.groups)
	var points []point
	from := 0
	for b := 1; b < len(breaks); b++ {
		if b == len(breaks)-1 || slices.Contains(turns, breaks[b]) {
			points = append(points, o.wasteEvenly(c, course, k, breaks[from:b+1])...)
			from = b
		}
	}
	if end := breaks[len(breaks)-1]; slices.Contains(turns, end) {
		points = append(points, o.wasteEvenly(c, course, k, []float64{end, end})...)
	}
	return points
}

// wasteEvenly is waste over breaks between which the same groups give current.
func (o *Outcome) wasteEvenly(c *circuit, course *hull.Course, k int, breaks []float64) []point {
	a, iv := o.Asset, o.Intervals[k]
	c.giving = c.givesFrom(iv, breaks[0])
	c.inRows()
	var live []int
	var groups []forecast.Group
	for j, g := range c.groups {
		if !c.giving[j] {
			continue
		}
		live = append(live, j)
		groups = append(groups, forecast.Group{
			// Shielding scales what a piece gives, not the metal that is there.
			Count: float64(g.Count) * a.Zones[g.zone].Shielding, Mass: g.Pattern.NetMass / a.Zones[g.zone].Shielding,
			Capacity: g.metal.Capacity, Potential: g.metal.Potential, Utilisation: g.Pattern.Utilisation,
			Factor: g.current, Wastage: g.Wastage, Shape: g.shape(), Series: g.Pattern.SeriesResist,
		})
	}
	var stretches []forecast.Stretch
	for b := 1; b < len(breaks); b++ {
		stretches = append(stretches, c.stretch(o, course, k, live, breaks[b-1], breaks[b]))
	}
	var points []point
	for _, p := range forecast.Run(steelCurve(o.Asset.Basis), groups, stretches, c.state) {
		if len(live) < len(c.groups) {
			all := p
			all.Wastage, all.Current = make([]float64, len(c.groups)), make([]float64, len(c.groups))
			for j, g := range c.groups {
				all.Wastage[j] = g.Wastage
			}
			for n, j := range live {
				all.Wastage[j], all.Current[j] = p.Wastage[n], p.Current[n]
			}
			p = all
		}
		points = append(points, point{p, c.giving})
	}
	last := points[len(points)-1]
	c.state = forecast.State{Potential: last.Potential, Charge: last.Charge, SteelLoss: last.SteelLoss}
	for j := range c.groups {
		g := &c.groups[j]
		g.Wastage, g.Current = last.Wastage[j], last.Current[j]/float64(g.Count)
	}
	return points
}

// givesFrom tells which groups give current from a time of an interval on, in
// years since its start; at its end, how they come to the docking.
func (c *circuit) givesFrom(iv hull.Interval, time float64) []bool {
	day, before := iv.From+hull.Date(time*hull.DaysPerYear+0.5), time >= iv.Years()
	giving := make([]bool, len(c.groups))
	for j := range c.groups {
		giving[j] = c.groups[j].lot.Gives(day, before)
	}
	return giving
}

// inRows counts for every group of a fitted set the pieces of the set that
// give current with it.
func (c *circuit) inRows() {
	for j := range c.groups {
		g := &c.groups[j]
		if g.Set < 0 {
			continue
		}
		g.row = 0
		for i, h := range c.groups {
			if c.giving[i] && h.zone == g.zone && h.Set == g.Set {
				g.row += h.Count
			}
		}
	}
}

// there are the groups that a zone carries at the end of an interval, the day
// given: the pieces of one set together as far as they fared alike.
func (c *circuit) there(zone int, day hull.Date) (all []Group) {
	for j, g := range c.groups {
		if g.zone != zone || !g.lot.LiveOn(day) {
			continue
		}
		g.Painted = !c.giving[j]
		at := slices.IndexFunc(all, func(h Group) bool { return g.Set >= 0 && g.Set == h.Set && g.lot.Alike(&h.lot, day) })
		if at < 0 {
			all = append(all, g)
		} else {
			all[at].Count += g.Count
		}
	}
	return all
}

// carries reports whether any pieces are there on a day.
func (c *circuit) carries(day hull.Date) bool {
	return slices.ContainsFunc(c.groups, func(g Group) bool { return g.lot.LiveOn(day) })
}

// stretch is the demand and the waters about some of the groups between two
// breaks of an interval.
func (c *circuit) stretch(o *Outcome, course *hull.Course, k int, groups []int, from, to float64) forecast.Stretch {
	theta := c.factor(o)
	var flat, bare [2]float64
	for _, i := range c.zones {
		current, area := course.Parts(i, k, from, to)
		for n := range flat {
			flat[n] += theta * current[n]
			bare[n] += theta * area[n]
		}
	}
	line := func(ends [2]float64, t float64) float64 {
		if to == from {
			return ends[0]
		}
		return ends[0] + (ends[1]-ends[0])*(t-from)/(to-from)
	}
	s := forecast.Stretch{From: from, To: to, Demand: func(t float64) float64 { return line(flat, t) }}
	if bare != [2]float64{} {
		s.Demand = func(t float64) float64 { return line(flat, t) + line(bare, t)*course.Density(k, t) }
	}
	middle := o.Intervals[k].From + hull.Date((from+to)/2*hull.DaysPerYear)
	middle = min(middle, o.Intervals[k].To-1)
	for _, j := range groups {
		s.Resistivity = append(s.Resistivity, o.Asset.Resistivity(&o.Asset.Zones[c.groups[j].zone], middle))
	}
	return s
}

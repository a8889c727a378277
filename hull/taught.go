package hull

import "slices"

// BreakdownFound returns the model's breakdown factor of a zone's coating on
// the day of a survey, before the works of that day, by a factor that the
// constants of the coating which the zone has now are multiplied with; later
// coats keep theirs. It is not ok where the zone has no coating, or that day
// lies before it.
func (a *Asset) BreakdownFound(z *Zone, d Date) (breakdown func(times float64) float64, ok bool) {
	applied := a.coatApplied(z, a.Start())
	if !z.Coated() || d < applied.from {
		return nil, false
	}
	type done struct {
		on    Date
		works []Work
	}
	var all []done
	add := func(on Date, works []Work) {
		if on > applied.from && on < d && slices.ContainsFunc(works, func(w Work) bool { return w.Zone == z.ID }) {
			all = append(all, done{on, works})
		}
	}
	for i := range a.Closed {
		add(a.Closed[i].Date, a.Closed[i].Works)
	}
	ahead := a.Ahead()
	for i := range ahead {
		add(ahead[i].Date, ahead[i].Works)
	}
	return func(times float64) float64 {
		c := applied
		c.base, c.slope = c.base*times, c.slope*times
		for _, w := range all {
			c = c.afterWorks(z, w.works, w.on)
		}
		return c.at(d)
	}, true
}

// WithCoatings returns the asset as it is when the constants of every zone's
// present coating are multiplied by a factor. Coats that are to come keep
// theirs. It is the asset itself where all factors are 1.
func (a *Asset) WithCoatings(times []float64) *Asset {
	if !slices.ContainsFunc(times, func(x float64) bool { return x != 1 }) {
		return a
	}
	b := *a
	b.Zones = slices.Clone(a.Zones)
	b.Dockings, b.Closed = slices.Clone(a.Dockings), slices.Clone(a.Closed)
	for i, x := range times {
		if x == 1 {
			continue
		}
		z := &b.Zones[i]
		was, growth := z.BreakdownConstants()
		now, faster := was*x, growth*x
		z.Coating.A, z.Coating.B = &now, &faster
		for k := range b.Dockings {
			b.Dockings[k].Works = newCoats(b.Dockings[k].Works, z.ID, was, growth)
		}
		for k := range b.Closed {
			b.Closed[k].Works = newCoats(b.Closed[k].Works, z.ID, was, growth)
		}
	}
	return &b
}

// newCoats writes down the constants of a zone's coats to come that are those
// of its present one.
func newCoats(works []Work, zone string, a, b float64) []Work {
	all := slices.Clone(works)
	for i := range all {
		w := &all[i]
		if w.Zone != zone || w.Category != "" || w.Coating != Recoat && w.Coating != PartRecoat {
			continue
		}
		if w.A == nil {
			w.A = &a
		}
		if w.B == nil {
			w.B = &b
		}
	}
	return all
}

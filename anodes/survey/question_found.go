package survey

import (
	"slices"

	"anodewright/anodes"
	"anodewright/hull"
)

// Potentials, V against Ag/AgCl/seawater, beyond which a measured one is taken
// for a slip of sign or electrode (our own judgement): steel that corrodes
// freely is more negative than -0.40 V, metals that keep themselves passive
// than +0.30 V; no anode of aluminium or zinc draws steel below -1.20 V, and
// magnesium and impressed current seldom below -1.60 V.
const (
	leastNegative        = -0.40
	leastNegativePassive = 0.30
	mostNegative         = -1.20
	mostNegativeStrong   = -1.60
)

// potentials: such as the zone's metal can have in water.
func (q *questioner) potentials(i int) {
	r := &q.a.Readings[i]
	z, ok := q.a.Zone(r.Zone)
	if !ok {
		return
	}
	low, high := mostNegative, leastNegative
	switch z.Surface {
	case hull.Stainless, hull.CopperAlloy, hull.Reinforcement:
		high = leastNegativePassive
	}
	magnesium := func(p hull.Pattern) bool { return p.Alloy == hull.Magnesium }
	impressed := func(z hull.Zone) bool { _, is := z.Hold().(hull.ByImpressedCurrent); return is }
	if slices.ContainsFunc(q.a.Patterns, magnesium) || slices.ContainsFunc(q.a.Zones, impressed) {
		low = mostNegativeStrong
	}
	for _, m := range r.Potentials {
		if v := anodes.Potential(m); v < low || v > high {
			q.ask(i, "no metal of the zone can have %s; the sign or the electrode is in doubt", anodes.MeasureText(m))
		}
	}
}

// coating: percentage and word agree, and what is broken down does not mend
// itself.
func (q *questioner) coating(i int) {
	r := &q.a.Readings[i]
	if r.CoatingPercent == nil {
		return
	}
	found := *r.CoatingPercent
	if r.CoatingWord != "" {
		if from, to, _, _ := r.CoatingWord.Range(); found/100 < from-1e-9 || found/100 > to+1e-9 {
			q.ask(i, "%.3g %% of the coating broken down is not %s", found, r.CoatingWord)
		}
	}
	var before *hull.Reading
	for k := range q.a.Readings {
		o := &q.a.Readings[k]
		if o.Zone == r.Zone && Stands(o) && o.CoatingPercent != nil && o.Date < r.Date && (before == nil || o.Date > before.Date) {
			before = o
		}
	}
	if before == nil || found > *before.CoatingPercent/2 || found > *before.CoatingPercent-3 || q.painted(r.Zone, before.Date, r.Date) {
		return
	}
	q.ask(i, "less of the coating is broken down (%.3g %%) than on %s (%.3g %%), and no work on it is known since", found, before.Date, *before.CoatingPercent)
}

// painted reports whether a zone's coating was worked on from one day to
// another.
func (q *questioner) painted(zone string, from, to hull.Date) bool {
	in := func(day hull.Date, works []hull.Work) bool {
		return from <= day && day <= to && slices.ContainsFunc(works, func(w hull.Work) bool { return w.Zone == zone && w.Coating != hull.Clean })
	}
	z, _ := q.a.Zone(zone)
	return from <= z.Coating.Applied && z.Coating.Applied <= to ||
		slices.ContainsFunc(q.a.Dockings, func(d hull.Docking) bool { return in(d.Date, d.Works) }) ||
		slices.ContainsFunc(q.a.Closed, func(d hull.Closed) bool { return in(d.Date, d.Works) })
}

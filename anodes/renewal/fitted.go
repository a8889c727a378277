package renewal

import (
	"slices"

	"anodewright/hull"
)

// fittedAt returns the fitted set as it is at boundary i, by the charge that
// it gave until then: in every interval the mean demand, but no more than its
// output new. The pieces that readings found gone or fallen count up to their
// day, those painted over only until then and from their cleaning on.
func (z *zone) fittedAt(i int) old { return z.fittedSets()[i] }

// fittedSets returns the fitted set as it is at every boundary.
func (z *zone) fittedSets() []old {
	if z.known != nil {
		return z.known
	}
	end := z.end()
	flat := make([]float64, 2*end+2*len(z.fitted))
	base := old{times: 1, outWorn: flat[:end], outWornEnd: flat[end : 2*end]}
	left, given := flat[2*end:][:len(z.fitted)], flat[2*end+len(z.fitted):]
	for j := range z.fitted {
		g := &z.fitted[j]
		if g.spent() {
			continue // it gives nothing more
		}
		n := float64(g.count)
		left[j] = n * (g.usable - g.full*g.wastage)
		for k := range end {
			if g.lot.Gives(z.date(k), false) {
				base.outWorn[k] += n * g.outWorn[k]
			}
			if g.lot.Gives(z.date(k+1), true) {
				base.outWornEnd[k] += n * g.outWornEnd[k]
			}
		}
	}
	all := make([]old, end+1)
	for i := range all {
		if i > 0 {
			base.short += z.give(i-1, left, given)
		}
		o, at := base, z.date(i)
		full, gone := 0.0, 0.0
		for j := range z.fitted {
			g := &z.fitted[j]
			n := float64(g.count)
			if g.lot.LiveOn(at) {
				o.mixed = o.mixed || o.pieces > 0 && o.alloy != g.p.Alloy
				o.pieces, o.alloy = o.pieces+g.count, g.p.Alloy
			}
			if g.lot.Gives(at, false) {
				o.left += left[j]
				full += n * g.full
				gone += n*g.full*g.wastage + given[j]
			}
		}
		if full > 0 {
			o.wastage = gone / full
		}
		o.leftTo = z.leftTo(i, left)
		all[i] = o
	}
	return all
}

// leftTo returns what is left at boundary i in the pieces that give current
// then and still at each later boundary; nil where no piece ever leaves.
func (z *zone) leftTo(i int, left []float64) (to []float64) {
	if !slices.ContainsFunc(z.fitted, func(g group) bool { return g.lot.Leaves != 0 || g.lot.Painted != nil }) {
		return nil
	}
	to = make([]float64, z.end()+1)
	for j := range z.fitted {
		lot := &z.fitted[j].lot
		for k := i; k <= z.end(); k++ {
			if lot.Gives(z.date(i), false) && (k == i || lot.Gives(z.date(k), true)) {
				to[k] += left[j]
			}
		}
	}
	return to
}

func (g *group) spent() bool { return g.wastage >= g.p.Utilisation }

// give takes from the fitted set what it gives in interval k: the pieces that
// give current share it by what they have left. What they have not got is
// returned.
func (z *zone) give(k int, left, given []float64) (short float64) {
	from, to := z.date(k), z.date(k+1)
	turns := []hull.Date{from, to}
	for j := range z.fitted {
		turns = append(turns, z.fitted[j].lot.Turns(from, to-1)...)
	}
	slices.Sort(turns)
	turns = slices.Compact(turns)
	for n := 1; n < len(turns); n++ {
		out, all := 0.0, 0.0
		for j := range z.fitted {
			if g := &z.fitted[j]; !g.spent() && g.lot.Gives(turns[n-1], false) {
				out += float64(g.count) * g.outNew[k]
				all += left[j]
			}
		}
		q := min(z.demand[k].Mean, out) * z.hours[k] * (float64(turns[n]-turns[n-1]) / float64(to-from))
		for j := range z.fitted {
			if g := &z.fitted[j]; !g.spent() && g.lot.Gives(turns[n-1], false) {
				share := float64(g.count) * g.outNew[k] / out
				if all > 0 {
					share = left[j] / all
				}
				left[j] -= min(q, all) * share
				given[j] += q * share
			}
		}
		short += max(0, q-all)
	}
	return short
}

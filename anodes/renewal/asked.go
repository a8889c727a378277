package renewal

import (
	"anodewright/hull"
)

// Asked is a number of pieces that a zone asks for at a docking.
type Asked struct {
	Docking int // among the dockings ahead, from 0
	Pattern *hull.Pattern
	Count   int
	Whole   bool // in place of the set that is there, though only an add is planned
}

// Asker tells what one zone would ask for if its demand were another than the
// plan's: each planned action with the same pattern, docking and span, sized
// anew, and pieces for a fitted set that would not last as long as planned.
type Asker struct {
	z     *zone
	plain []hull.Current // at the demand factor 1
	lines []Line         // of the zone, by docking
}

// Asker returns the asker of one of the problem's zones by the lines of a
// plan, nil where the plan does nothing with the zone.
func (p Problem) Asker(zone int, plan []Line) *Asker {
	a := &Asker{}
	for _, l := range plan {
		if l.Zone == zone {
			a.lines = append(a.lines, l)
		}
	}
	if len(a.lines) == 0 {
		return nil
	}
	a.z = newZone(p.Asset, zone, p.Demand[zone], 1)
	a.plain = append(a.plain, a.z.demand...)
	return a
}

// At returns what the zone asks for at a demand factor. keeps sizes by the
// forecast at that factor, nil by the code. A count stays within the zone's
// max_count, so that it is what could be fitted.
func (a *Asker) At(factor float64, keeps Keeps) []Asked {
	z := a.z
	z.keeps = keeps
	for k := range z.demand {
		z.demand[k] = a.plain[k].Times(factor)
	}
	var all []Asked
	set := stock{kept: true, count: z.fittedAt(0).pieces}
	for i, l := range a.lines {
		at, until := l.Docking+1, z.boundary(l.Until)
		if i+1 < len(a.lines) && (l.Action == Keep || a.lines[i+1].Action == Add) {
			until = a.lines[i+1].Docking + 1
		}
		switch l.Action {
		case Keep:
			if short, ok := a.shortKeep(until, set); ok {
				all = append(all, short)
			}
		case Renew:
			m := z.pieceOf(l.Pattern.ID)
			s, _ := z.newSet(m, at, until)
			all = append(all, Asked{l.Docking, l.Pattern, a.most(s.count, l.Count), false})
			set = stock{from: at, to: until, piece: m.inRow(l.Count), count: l.Count}
		case Add:
			m := z.pieceOf(l.Pattern.ID)
			n, whole := z.onTop(set, m, at, until)
			all = append(all, Asked{l.Docking, l.Pattern, a.most(n, l.Count), whole})
		}
	}
	return all
}

// shortKeep is what is asked for where the fitted set does not last to a
// boundary: at the last docking that it does last to, in the pattern of most
// of its pieces if that is offered, else in the first that is.
func (a *Asker) shortKeep(to int, set stock) (Asked, bool) {
	z := a.z
	for reach := to; reach > 0; reach-- {
		if _, ok := z.keep(reach); !ok {
			continue
		}
		if reach == to {
			return Asked{}, false
		}
		if m, ok := z.patternAt(reach); ok {
			set.to = reach
			n, whole := z.onTop(set, m, reach, to)
			return Asked{reach - 1, m.p, a.most(n, set.count), whole}, true
		}
	}
	return Asked{}, false
}

// patternAt is the pattern that may be fitted at a boundary: that of most of the
// fitted pieces, else the first of those offered.
func (z *zone) patternAt(i int) (m *piece, ok bool) {
	fitted := z.largestGroup()
	for _, o := range z.offered {
		if !z.mayFit(o, i) {
			continue
		}
		if o.p == fitted {
			return o, true
		}
		if !ok {
			m, ok = o, true
		}
	}
	return m, ok
}

// onTop is how many pieces a set needs at boundary i to last to j: beside its
// own if that is open, else in place of the whole set.
func (z *zone) onTop(set stock, m *piece, i, j int) (count int, whole bool) {
	if s, ok := z.addTo(set, m, i, j); ok {
		return s.addCount, false
	}
	s, _ := z.newSet(m, i, j)
	return s.count, true
}

// most bounds a count by the zone's max_count, and by many times what is
// planned, so that a demand that no number of pieces can meet is no overflow.
func (a *Asker) most(n, planned int) int {
	n = min(n, 20*planned+100)
	if most := a.z.z.MaxCount; most != nil {
		n = min(n, *most)
	}
	return n
}

// Instead returns how many pieces of another pattern the action planned at a
// docking would take in place of its own, at the demand factor, and whether it
// may be so: the pattern is offered to the zone, can be fitted there and stays
// within its max_count.
func (a *Asker) Instead(docking int, p *hull.Pattern, factor float64, keeps Keeps) (int, bool) {
	z := a.z
	z.keeps = keeps
	for k := range z.demand {
		z.demand[k] = a.plain[k].Times(factor)
	}
	set := stock{kept: true, count: z.fittedAt(0).pieces}
	for i, l := range a.lines {
		at, until := l.Docking+1, z.boundary(l.Until)
		if l.Docking == docking && l.Action != Keep {
			for _, m := range z.offered {
				if m.p != p {
					continue
				}
				if l.Action == Add {
					s, ok := z.addTo(set, m, at, until)
					return s.addCount, ok
				}
				if i+1 < len(a.lines) && a.lines[i+1].Action == Add {
					until = a.lines[i+1].Docking + 1
				}
				s, ok := z.newSet(m, at, until)
				return s.count, ok
			}
			return 0, false
		}
		if l.Action == Renew {
			set = stock{from: at, to: until, piece: z.pieceOf(l.Pattern.ID).inRow(l.Count), count: l.Count}
		}
	}
	return 0, false
}

package renewal

import (
	"slices"

	"anodewright/hull"
)

// Size sizes the given actions anew, by the code's criteria, for an asset and its demand: zone,
// docking, action, pattern and date until stay, and so does a count that is
// itself pinned; count, needs, pieces taken
// off and cost follow. It asks neither whether an action is still the cheapest
// nor whether it is allowed. demand and factors are those of [Solve]; the
// lines have to be those of a plan of the same zones, dockings and patterns.
func Size(a *hull.Asset, demand [][]hull.Current, factors []float64, pinned []Line) []Line {
	sized := slices.Clone(pinned)
	for i := range a.Zones {
		var own []*Line
		for k := range sized {
			if sized[k].Zone == i {
				own = append(own, &sized[k])
			}
		}
		if len(own) > 0 {
			newZone(a, i, demand[i], factors[i]).size(own)
		}
	}
	return sized
}

// size sizes one zone's actions, which come by docking.
func (z *zone) size(own []*Line) {
	set := stock{kept: true, count: z.fittedAt(1).pieces}
	for k, l := range own {
		at, until := l.Docking+1, z.boundary(l.Until)
		switch l.Action {
		case Keep:
			l.Count = set.count
		case Renew:
			if set.kept {
				set.count = z.fittedAt(at).pieces
			}
			removed := set.pieces()
			to := until
			if k+1 < len(own) && own[k+1].Action == Add {
				to = own[k+1].Docking + 1
			}
			m := z.pieceOf(l.Pattern.ID)
			set, _ = z.newSet(m, at, to)
			if l.Governs == "pinned" {
				set.count, set.piece, set.governs = l.Count, m.inRow(l.Count), l.Governs
			}
			l.Count, l.Removed, l.Need, l.Governs = set.count, removed, set.need, set.governs
			l.Cost = z.worth[at] * z.actionCost(set.piece, set.count, removed)
		case Add:
			m := z.pieceOf(l.Pattern.ID)
			o := set.oldAt(z, at)
			n, need, _ := z.addCount(&o, m, at, until)
			for row := 1; m.mutual != nil && n > row && n <= longestRow; {
				row = n
				n, need, _ = z.addCount(&o, m.inRow(row), at, until)
			}
			pinned := l.Governs == "pinned"
			if pinned {
				n = l.Count
			}
			set.add, set.addPiece, set.addCount = at, m.inRow(n), n
			l.Count, l.Need = n, need
			if !pinned {
				_, l.Governs = need.Largest()
			}
			l.Cost = z.worth[at] * z.actionCost(m, n, 0)
		}
	}
}

// pieceOf returns the offered pattern of an id.
func (z *zone) pieceOf(id string) *piece {
	for _, m := range z.offered {
		if m.p.ID == id {
			return m
		}
	}
	p, ok := z.a.Pattern(id)
	if !ok {
		panic("renewal: no pattern " + id)
	}
	rho, rhoEnd := make([]float64, z.end()), make([]float64, z.end())
	for k, iv := range z.a.Intervals() {
		rho[k], rhoEnd[k] = z.a.Resistivity(z.z, iv.From), z.a.Resistivity(z.z, iv.To-1)
	}
	return newPiece(z.a, z.z, p, rho, rhoEnd)
}

// boundary returns the number of the boundary on a date.
func (z *zone) boundary(d hull.Date) int {
	for k := range z.end() + 1 {
		if z.date(k) == d {
			return k
		}
	}
	panic("renewal: no docking on " + d.String())
}

package renewal

import (
	"math"

	"anodewright/hull"
)

// Limits are what may be done at one docking at most; a 0 is no limit.
type Limits struct {
	Pieces   int     // fitted
	Budget   float64 // undiscounted money: pieces, fitting, removal, zones, fixed and campaign cost
	Patterns int     // ordered
}

// limiter knows what may be done at every docking, and weighs plans by it.
type limiter struct {
	Limits
	quay  []int // pieces of each pattern at the first docking; nil: no limit
	ahead []hull.Docking
	worth []float64      // of money at a boundary
	index map[string]int // of a pattern
	// over, if not 0, lets plans go over the limits at this cost for a piece
	// that is not on the quay, a pattern, or a whole limit on pieces or money.
	over float64
}

func newLimiter(a *hull.Asset, z *zone, l Limits, quay map[string]int) *limiter {
	m := &limiter{Limits: l, ahead: a.Ahead(), worth: z.worth, index: map[string]int{}}
	for i := range a.Patterns {
		m.index[a.Patterns[i].ID] = i
		if quay != nil {
			m.quay = append(m.quay, quay[a.Patterns[i].ID])
		}
	}
	return m
}

// uses is what zones use at the dockings ahead.
type uses struct {
	pieces []int
	spent  []float64 // undiscounted, without shared and day costs
	of     [][]int   // pieces by docking and pattern
}

func (m *limiter) nothing() *uses {
	u := &uses{pieces: make([]int, len(m.ahead)), spent: make([]float64, len(m.ahead)), of: make([][]int, len(m.ahead))}
	for k := range u.of {
		u.of[k] = make([]int, len(m.index))
	}
	return u
}

// act is what a set does at a boundary.
type act struct {
	boundary, pieces, pattern int
	spent                     float64
}

// acts lists what a set does at the dockings, its removal last.
func (m *limiter) acts(z *zone, s stock) (acts [3]act) {
	if !s.kept {
		acts[0] = act{s.from, s.count, m.index[s.piece.p.ID], z.actionCost(s.piece, s.count, 0)}
	}
	if s.add > 0 {
		acts[1] = act{s.add, s.addCount, m.index[s.addPiece.p.ID], z.actionCost(s.addPiece, s.addCount, 0)}
	}
	if s.to < z.end() {
		acts[2] = act{boundary: s.to, spent: float64(s.pieces()) * z.a.Costs.RemovePerPiece}
	}
	return acts
}

func (u *uses) add(acts [3]act) {
	for _, a := range acts {
		if a.boundary > 0 {
			u.pieces[a.boundary-1] += a.pieces
			u.spent[a.boundary-1] += a.spent
			u.of[a.boundary-1][a.pattern] += a.pieces
		}
	}
}

// patterns counts those ordered for a docking.
func (u *uses) patterns(k int) int {
	n := 0
	for _, pieces := range u.of[k] {
		if pieces > 0 {
			n++
		}
	}
	return n
}

// shared returns the discounted cost of dockings with work, and whether all
// that is used is within the limits. Where plans may go over them, what that
// costs is part of the cost.
func (m *limiter) shared(u *uses) (cost float64, within bool) {
	within = true
	beyond := func(by float64) {
		within = within && m.over > 0
		cost += m.over * by
	}
	for k, n := range u.pieces {
		spent := u.spent[k]
		if n > 0 {
			once := sharedCost(m.ahead[k]) + DayCost(m.ahead[k], n)
			cost += m.worth[k+1] * once
			spent += once
		}
		if m.Pieces > 0 && n > m.Pieces {
			beyond(float64(n-m.Pieces) / float64(m.Pieces))
		}
		if m.Budget > 0 && !covers(m.Budget, spent) {
			beyond((spent - m.Budget) / m.Budget)
		}
		if p := u.patterns(k); m.Patterns > 0 && p > m.Patterns {
			beyond(float64(p - m.Patterns))
		}
		for p := range m.quay {
			if k == 0 && u.of[0][p] > m.quay[p] {
				beyond(float64(u.of[0][p] - m.quay[p]))
			}
		}
	}
	return cost, within
}

// cost returns what a plan costs, +Inf where it is not within the limits.
func (m *limiter) cost(zones []options, paths [][]stock) float64 {
	u, bare := m.nothing(), 0.0
	for i := range zones {
		for _, s := range paths[i] {
			u.add(m.acts(zones[i].z, s))
			priced := zones[i].z.span(s)
			bare += priced.cost - priced.days
		}
	}
	shared, within := m.shared(u)
	if !within {
		return math.Inf(1)
	}
	return bare + shared
}

// usesLess reports whether a span uses no more than another of anything that
// may be limited.
func (z *zone) usesLess(b, a *span) bool {
	less := func(x, y *piece, n, most int, boundary int) bool {
		if n == 0 || most == 0 {
			return n <= most
		}
		if x.p != y.p && (z.limits.Patterns > 0 || z.quay && boundary == 1) {
			return false
		}
		return n <= most && float64(n)*x.cost <= float64(most)*y.cost
	}
	return (a.kept || less(b.piece, a.piece, b.count, a.count, a.from)) && b.pieces() <= a.pieces() &&
		less(b.addPiece, a.addPiece, b.addCount, a.addCount, a.add)
}

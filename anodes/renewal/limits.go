package renewal

import (
	"cmp"
	"math"
	"math/bits"
	"slices"

	"anodewright/hull"
)

// Limits are what may be done at one docking at most; a 0 is no limit.
type Limits struct {
	Pieces   int     // fitted
	Budget   float64 // undiscounted money: pieces, fitting, removal, zones, fixed and campaign cost
	Patterns int     // ordered
}

// limiter finds the cheapest plan within limits at a set of open dockings. It
// goes through the zones and, within a zone, from boundary to boundary, and
// keeps of all ways to a boundary those that no other makes needless: one that
// costs no more and uses no more at any docking. What the zones still to come
// cost without limits bounds each way.
type limiter struct {
	Limits
	ahead []hull.Docking
	quay  []int          // pieces of each pattern at the first docking; nil: no limit
	bit   map[string]int // of a pattern
	words int            // of 64 bits that the patterns of a docking take
	beam  int            // ways kept at a boundary; 0: all
	steps int
}

// mostCompared bounds the work of the search within limits, in comparisons of
// two ways: some seconds.
const mostCompared = 20_000_000

func newLimiter(a *hull.Asset, l Limits, quay map[string]int) *limiter {
	m := &limiter{Limits: l, ahead: a.Ahead(), bit: map[string]int{}, words: (len(a.Patterns) + 63) / 64}
	for i := range a.Patterns {
		m.bit[a.Patterns[i].ID] = i
		if quay != nil {
			m.quay = append(m.quay, quay[a.Patterns[i].ID])
		}
	}
	return m
}

// within reports whether a plan is within the limits.
func (m *limiter) within(zones []options, paths [][]stock) bool {
	n := len(m.ahead)
	l := &label{pieces: make([]int, n), spent: make([]float64, n), ordered: make([]uint64, n*m.words), quay: slices.Clone(m.quay)}
	for k := range zones {
		for _, s := range paths[k] {
			next, ok := m.after(l, zones[k].z, k, &span{stock: s})
			if !ok {
				return false
			}
			l = next
		}
	}
	return len(zones) == 0 || !math.IsInf(m.whole(l, zones[0].z), 1)
}

// label is a way to a boundary of a zone, with what it uses.
type label struct {
	bare, cost float64 // discounted, without and with the pieces' shares of days
	pieces     []int   // by docking ahead
	spent      []float64
	ordered    []uint64 // patterns, words by docking
	quay       []int    // left there, by pattern
	zone       int
	span       *span
	prev       *label
}

// beats reports whether l makes m needless.
func (l *label) beats(m *label) bool {
	if l.bare > m.bare+tie/1000 {
		return false
	}
	for k := range l.pieces {
		if l.pieces[k] > m.pieces[k] || l.spent[k] > m.spent[k]*(1+slack) {
			return false
		}
	}
	for k := range l.ordered {
		if l.ordered[k]&^m.ordered[k] != 0 {
			return false
		}
	}
	for p := range l.quay {
		if l.quay[p] < m.quay[p] {
			return false
		}
	}
	return true
}

// after returns the label after a span, and whether it is within the limits.
func (m *limiter) after(w *label, z *zone, n int, s *span) (*label, bool) {
	next := &label{
		bare: w.bare + s.cost - s.days, cost: w.cost + s.cost, zone: n, span: s, prev: w,
		pieces: slices.Clone(w.pieces), spent: slices.Clone(w.spent), ordered: slices.Clone(w.ordered), quay: slices.Clone(w.quay),
	}
	act := func(boundary int, p piece, count int) bool {
		k := boundary - 1
		if next.pieces[k] == 0 {
			next.spent[k] += sharedCost(m.ahead[k])
		}
		next.pieces[k] += count
		next.spent[k] += z.actionCost(p, count, 0) + float64(count)*z.dayRate(boundary)/z.worth[boundary]
		if m.Patterns > 0 {
			bit := m.bit[p.p.ID]
			next.ordered[k*m.words+bit/64] |= 1 << (bit % 64)
			if m.patterns(next, k) > m.Patterns {
				return false
			}
		}
		if k == 0 && m.quay != nil {
			left := &next.quay[m.bit[p.p.ID]]
			if *left -= count; *left < 0 {
				return false
			}
		}
		return (m.Pieces == 0 || next.pieces[k] <= m.Pieces) && m.pays(next.spent[k])
	}
	if !s.kept && !act(s.from, s.piece, s.count) || s.add > 0 && !act(s.add, s.addPiece, s.addCount) {
		return nil, false
	}
	if s.to < z.end() {
		next.spent[s.to-1] += float64(s.stock.pieces()) * z.a.Costs.RemovePerPiece
		if !m.pays(next.spent[s.to-1]) {
			return nil, false
		}
	}
	return next, true
}

func (m *limiter) pays(spent float64) bool { return m.Budget == 0 || covers(m.Budget, spent) }

// patterns counts those ordered for a docking.
func (m *limiter) patterns(l *label, k int) int {
	n := 0
	for _, w := range l.ordered[k*m.words : (k+1)*m.words] {
		n += bits.OnesCount64(w)
	}
	return n
}

// whole returns a label's cost with whole days, +Inf where the budget does not
// pay for them.
func (m *limiter) whole(l *label, z *zone) float64 {
	cost := l.cost
	for k, n := range l.pieces {
		over := DayCost(m.ahead[k], n) - float64(n)*z.dayRate(k+1)/z.worth[k+1]
		if !m.pays(l.spent[k] + over) {
			return math.Inf(1)
		}
		cost += z.worth[k+1] * over
	}
	return cost
}

// least returns the least cost of the zones on the open dockings, without
// shared costs, and their sets. It is +Inf where none costs at most limit or
// the search takes too long.
func (m *limiter) least(zones []options, open []bool, limit float64) (float64, [][]stock) {
	values, rest := make([][]float64, len(zones)), 0.0
	for k := range zones {
		values[k], _ = zones[k].values(open)
		rest += values[k][0]
	}
	n := len(m.ahead)
	from := []*label{{pieces: make([]int, n), spent: make([]float64, n), ordered: make([]uint64, n*m.words), quay: slices.Clone(m.quay)}}
	for k := range zones {
		rest -= values[k][0]
		end := zones[k].end
		fronts := make([][]*label, end+1)
		fronts[0] = from
		for i := range end {
			if m.beam > 0 && len(fronts[i]) > m.beam {
				slices.SortStableFunc(fronts[i], func(a, b *label) int { return cmp.Compare(a.cost, b.cost) })
				fronts[i] = fronts[i][:m.beam]
			}
			for _, w := range fronts[i] {
				spans := zones[k].at(i)
				for n := range spans {
					s := &spans[n]
					if !s.uses(open, end) || w.cost+s.cost+values[k][s.to]+rest > limit+tie {
						continue
					}
					if m.steps += 1 + 2*len(fronts[s.to]); m.steps > mostCompared {
						return math.Inf(1), nil
					}
					next, ok := m.after(w, zones[k].z, k, s)
					if !ok || slices.ContainsFunc(fronts[s.to], func(l *label) bool { return l.beats(next) }) {
						continue
					}
					fronts[s.to] = append(slices.DeleteFunc(fronts[s.to], func(l *label) bool { return next.beats(l) }), next)
				}
			}
		}
		from = fronts[end]
	}
	least, paths := math.Inf(1), make([][]stock, len(zones))
	var best *label
	for _, l := range from {
		if len(zones) == 0 {
			return 0, paths
		}
		if c := m.whole(l, zones[0].z); c < least-tie {
			least, best = c, l
		}
	}
	for ; best != nil && best.prev != nil; best = best.prev {
		paths[best.zone] = append(paths[best.zone], best.span.stock)
	}
	for _, p := range paths {
		slices.Reverse(p)
	}
	return least, paths
}

// usesLess reports whether a span uses no more than another of anything that
// may be limited.
func (z *zone) usesLess(b, a span) bool {
	if z.limits.Patterns > 0 && (b.piece.p != a.piece.p || b.addPiece.p != a.addPiece.p) {
		return false
	}
	if z.quay && (!a.kept && a.from == 1 && b.piece.p != a.piece.p || a.add == 1 && b.addPiece.p != a.addPiece.p) {
		return false
	}
	return b.count <= a.count && b.addCount <= a.addCount &&
		float64(b.count)*b.piece.cost <= float64(a.count)*a.piece.cost && float64(b.addCount)*b.addPiece.cost <= float64(a.addCount)*a.addPiece.cost
}

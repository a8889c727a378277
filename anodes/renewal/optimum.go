package renewal

import (
	"math"
	"slices"

	"anodewright/hull"
)

// tie is the difference in money below which two plans cost the same.
const tie = 1e-6

// span is one way to go from one boundary to another: a set, what it costs,
// and the docking of its add, 0 without.
type span struct {
	stock
	cost float64
}

// options holds a zone's spans. start are those of the fitted set, from[i]
// those of a set renewed at i; each is in the order in which spans of equal
// cost are preferred: earliest next action first, then patterns in order.
type options struct {
	z     *zone
	start []span
	from  [][]span
}

// spans lists every way of going on, the cheapest pattern of each kind. With
// day rates the cost of a piece carries its share of a day, so that the sum
// never exceeds the true cost.
func (z *zone) spans() options {
	o := options{z: z, from: make([][]span, z.end())}
	for j := 1; j <= z.end(); j++ {
		s, ok := z.keep(j)
		if ok {
			o.start = append(o.start, span{s, z.spanCost(s)})
		}
		if ok && j < z.end() {
			o.start = append(o.start, z.adds(s, j)...)
		}
	}
	for i := 1; i < z.end(); i++ {
		for j := i + 1; j <= z.end(); j++ {
			var best []span
			for _, m := range z.offered {
				s, ok := z.newSet(m, i, j)
				if !ok {
					continue
				}
				best = append(best, span{s, z.spanCost(s)})
				if j < z.end() {
					o.from[i] = append(o.from[i], z.adds(s, j)...)
				}
			}
			if len(best) > 0 {
				o.from[i] = append(o.from[i], first(best))
			}
		}
		o.from[i] = prune(o.from[i])
	}
	o.start = prune(o.start)
	return o
}

// adds lists the ways of adding to a set at boundary i, one for each end.
func (z *zone) adds(s stock, i int) []span {
	var all []span
	for j := i + 1; j <= z.end(); j++ {
		var best []span
		for _, m := range z.offered {
			if t, ok := z.addTo(s, m, i, j); ok {
				best = append(best, span{t, z.spanCost(t)})
			}
		}
		if len(best) > 0 {
			all = append(all, first(best))
		}
	}
	return all
}

// first returns the cheapest span, the first of those that tie.
func first(ss []span) span {
	best := ss[0]
	for _, s := range ss[1:] {
		if s.cost < best.cost-tie {
			best = s
		}
	}
	return best
}

// prune keeps the first of the cheapest spans with the same add and end, and
// sorts by next action, then end.
func prune(ss []span) []span {
	var kept []span
	for _, s := range ss {
		at := slices.IndexFunc(kept, func(k span) bool { return k.add == s.add && k.to == s.to })
		switch {
		case at < 0:
			kept = append(kept, s)
		case s.cost < kept[at].cost-tie:
			kept[at] = s
		}
	}
	slices.SortStableFunc(kept, func(a, b span) int {
		if d := a.next() - b.next(); d != 0 {
			return d
		}
		return a.to - b.to
	})
	return kept
}

// next is the boundary of the span's next action after its start.
func (s span) next() int {
	if s.add > 0 {
		return s.add
	}
	return s.to
}

// spanCost is what a set costs from its fitting to its removal, without the
// shared costs of dockings.
func (z *zone) spanCost(s stock) float64 {
	cost := 0.0
	if !s.kept {
		cost += z.worth[s.from] * (z.actionCost(s.piece, s.count, 0) + z.dayShare(s.from, s.count))
	}
	if s.add > 0 {
		cost += z.worth[s.add] * (z.actionCost(s.addPiece, s.addCount, 0) + z.dayShare(s.add, s.addCount))
	}
	if s.to < z.end() {
		cost += z.worth[s.to] * float64(s.pieces()) * z.a.Costs.RemovePerPiece
	}
	return cost
}

func (z *zone) dayShare(boundary, n int) float64 {
	d := z.ahead[boundary-1]
	if d.Kind != hull.Campaign || d.PiecesPerDay <= 0 {
		return 0
	}
	return d.DayRate * float64(n) / d.PiecesPerDay
}

// best returns the zone's least cost when only the open dockings are worked
// on, and its sets if asked for. It is +Inf when the zone cannot be held.
func (o *options) best(open []bool, sets bool) (float64, []stock) {
	end := o.z.end()
	value := make([]float64, end+1)
	choice := make([]int, end)
	pick := func(ss []span) (float64, int) {
		least, at := math.Inf(1), -1
		for n, s := range ss {
			if s.add > 0 && !open[s.add] || s.to < end && !open[s.to] {
				continue
			}
			if c := s.cost + value[s.to]; c < least-tie {
				least, at = c, n
			}
		}
		return least, at
	}
	for i := end - 1; i >= 1; i-- {
		value[i], choice[i] = math.Inf(1), -1
		if open[i] {
			value[i], choice[i] = pick(o.from[i])
		}
	}
	least, at := pick(o.start)
	if !sets || at < 0 {
		return least, nil
	}
	path := []stock{o.start[at].stock}
	for i := path[0].to; i < end; i = path[len(path)-1].to {
		path = append(path, o.from[i][choice[i]].stock)
	}
	return least, path
}

// holds reports whether any plan holds the zone, with every docking open.
func (o *options) holds() bool {
	cost, _ := o.best(slices.Repeat([]bool{true}, o.z.end()), false)
	return !math.IsInf(cost, 1)
}

// search looks through the sets of dockings to work on, deciding one docking
// after the other. A branch's bound is the cost of its zones with every
// undecided docking open and free of shared cost.
type search struct {
	options []options
	fixed   []float64 // shared cost of docking i, discounted
	open    []bool
	best    float64
	chosen  []bool
}

// cheapest returns the sets of every zone in the cheapest plan, and a bound
// that no plan is below: with day rates the cost of whole days is not in it.
func cheapest(a *hull.Asset, zones []options) ([][]stock, float64) {
	n := len(a.Ahead())
	s := search{options: zones, fixed: make([]float64, n+1), open: slices.Repeat([]bool{true}, n+1), best: math.Inf(1)}
	for _, o := range zones {
		for i := 1; i <= n; i++ {
			s.fixed[i] = o.z.worth[i] * sharedCost(o.z.ahead[i-1])
		}
	}
	s.branch(1, 0)
	paths := make([][]stock, len(zones))
	for i := range s.options {
		_, paths[i] = s.options[i].best(s.chosen, true)
	}
	return paths, s.best
}

func (s *search) branch(i int, fixed float64) {
	cost := fixed
	for k := range s.options {
		c, _ := s.options[k].best(s.open, false)
		cost += c
	}
	if cost > s.best+tie || math.IsInf(cost, 1) {
		return
	}
	if i == len(s.open) {
		if cost < s.best-tie || s.chosen == nil || preferred(s.open, s.chosen) {
			s.best = min(s.best, cost)
			s.chosen = slices.Clone(s.open)
		}
		return
	}
	s.branch(i+1, fixed+s.fixed[i])
	s.open[i] = false
	s.branch(i+1, fixed)
	s.open[i] = true
}

// preferred reports whether a is the better of two sets of dockings at equal
// cost: fewer dockings, then earlier ones.
func preferred(a, b []bool) bool {
	count := func(open []bool) (n int) {
		for _, o := range open[1:] {
			if o {
				n++
			}
		}
		return n
	}
	if na, nb := count(a), count(b); na != nb {
		return na < nb
	}
	for i := range a {
		if a[i] != b[i] {
			return a[i]
		}
	}
	return false
}

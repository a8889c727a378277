package renewal

import (
	"cmp"
	"math"
	"slices"

	"anodewright/hull"
)

// tie is the difference in money below which two plans cost the same.
const tie = 1e-6

// span is one way to go from one boundary to another: a set, what it costs
// with its share of the days of campaigns, that share, and the docking of its
// add, 0 without.
type span struct {
	stock
	cost, days float64
}

// options holds a zone's spans. start are those of the fitted set, from[i]
// those of a set renewed at i.
type options struct {
	z     *zone // that the spans are of
	end   int   // the boundary of the horizon
	start []span
	from  [][]span
	quick *quick // if it is known
}

// span prices a set from its fitting to its removal, without the shared costs
// of dockings.
func (z *zone) span(s stock) span {
	days := z.days(&s)
	return span{s, z.cost(&s) + days, days}
}

// days is the share that a set has in the days of campaigns.
func (z *zone) days(s *stock) float64 {
	days := 0.0
	if !s.kept {
		days += z.dayRate(s.from) * float64(s.count)
	}
	if s.add > 0 {
		days += z.dayRate(s.add) * float64(s.addCount)
	}
	return days
}

// cost is a set's without a share of days.
func (z *zone) cost(s *stock) float64 {
	cost := 0.0
	if !s.kept {
		cost += z.worth[s.from] * z.actionCost(s.piece, s.count, 0)
	}
	if s.add > 0 {
		cost += z.worth[s.add] * z.actionCost(s.addPiece, s.addCount, 0)
	}
	if s.to < z.end() {
		cost += z.worth[s.to] * float64(s.pieces()) * z.a.Costs.RemovePerPiece
	}
	return cost
}

// dayRate is a piece's share of a day's cost at a boundary, discounted; 0
// where no days are paid.
func (z *zone) dayRate(boundary int) float64 {
	d := z.ahead[boundary-1]
	if d.Kind != hull.Campaign || d.PiecesPerDay <= 0 {
		return 0
	}
	return z.worth[boundary] * d.DayRate / d.PiecesPerDay
}

// best returns the zone's least cost when only the open dockings are worked
// on, and its sets if asked for. It is +Inf when the zone cannot be held.
func (o *options) best(open []bool, sets bool) (float64, []stock) {
	value, choice := o.values(open)
	if !sets || choice[0] < 0 {
		return value[0], nil
	}
	return value[0], o.path(0, choice)
}

// path returns the sets from boundary i on.
func (o *options) path(i int, choice []int) []stock {
	var path []stock
	for ; i < o.end; i = path[len(path)-1].to {
		path = append(path, o.at(i)[choice[i]].stock)
	}
	return path
}

// values returns the least cost from every boundary on, +Inf where there is no
// way, and the first span of that way.
func (o *options) values(open []bool) (value []float64, choice []int) {
	end := o.end
	value, choice = make([]float64, end+1), make([]int, end)
	for i := end - 1; i >= 0; i-- {
		value[i], choice[i] = math.Inf(1), -1
		if i > 0 && !open[i] {
			continue
		}
		for n, s := range o.at(i) {
			if !s.uses(open, end) {
				continue
			}
			c := s.cost + value[s.to]
			if c < value[i]-tie {
				value[i], choice[i] = c, n
			} else if c <= value[i]+tie && choice[i] >= 0 {
				old := o.path(i, choice)
				if before(append([]stock{s.stock}, o.path(s.to, choice)...), old, end) {
					choice[i] = n
				}
			}
		}
	}
	return value, choice
}

// at returns the spans that start at boundary i.
func (o *options) at(i int) []span {
	if i == 0 {
		return o.start
	}
	return o.from[i]
}

// uses reports whether a span works on open dockings only.
func (s span) uses(open []bool, end int) bool {
	return (s.add == 0 || open[s.add]) && (s.to == end || open[s.to])
}

// reach returns the last boundary that a row of sets can hold the zone up to.
func (o *options) reach() int {
	end := o.end
	held := make([]bool, end+1)
	held[0] = true
	last := 0
	for i := range end {
		if !held[i] {
			continue
		}
		for _, s := range o.at(i) {
			held[s.to] = true
			last = max(last, s.to)
		}
	}
	return last
}

// search looks through the sets of dockings to work on, deciding one docking
// after the other. What working at a docking costs is shared among the zones,
// so that a branch's bound is the cost of its zones, each by itself, with every
// undecided docking open at its share.
type search struct {
	options []options
	quick   []quick
	fixed   []float64 // shared cost of docking i, discounted
	shares  shares
	open    []bool // docking i is open or undecided
	left    int    // dockings that may still be opened
	best    float64
	chosen  []bool    // nil: there is no plan
	days    *days     // nil: a part of a day costs its part
	paths   [][]stock // of the best plan, where days are whole
}

// newSearch returns a search among dockings with these shared costs, that of
// docking 1 first, at most so many of them and none of the closed ones.
func newSearch(zones []options, fixed []float64, most int, closed []int) *search {
	s := &search{
		options: zones,
		fixed:   append([]float64{0}, fixed...),
		open:    slices.Repeat([]bool{true}, len(fixed)+1),
		left:    most,
		best:    math.Inf(1),
	}
	for _, i := range closed {
		s.open[i] = false
	}
	for i := range zones {
		if q := zones[i].quick; q != nil {
			s.quick = append(s.quick, q.copy())
		} else {
			s.quick = append(s.quick, newQuick(&zones[i]))
		}
	}
	return s
}

// run searches for the best set of dockings.
func (s *search) run() {
	best := s.best
	s.shares = s.split()
	s.best = min(best, s.best)
	s.branch(1, 0)
}

// cheapest returns the sets of every zone in the cheapest plan, and a bound
// that no plan is below. Without day rates the bound is the plan's cost; with
// them it is so unless the search for whole days takes too long. Where so few
// dockings leave no plan, or none up to the limit in money, there are no sets
// and the bound is +Inf.
func cheapest(a *hull.Asset, zones []options, most int, closed []int, limit float64, limits Limits, quay map[string]int) ([][]stock, float64) {
	fixed := make([]float64, len(a.Ahead()))
	for k, d := range a.Ahead() {
		if len(zones) > 0 {
			fixed[k] = zones[0].z.worth[k+1] * sharedCost(d)
		}
	}
	s := newSearch(zones, fixed, most, closed)
	s.best = limit
	s.run()
	if s.chosen == nil {
		return nil, math.Inf(1)
	}
	paths := make([][]stock, len(zones))
	for i := range s.options {
		_, paths[i] = s.options[i].best(s.chosen, true)
	}
	best := s.best
	if d := newDays(a, zones); d != nil {
		paths, best = s.wholeDays(d, paths, newSearch(zones, fixed, most, closed))
	}
	if len(zones) > 0 && (limits != (Limits{}) || quay != nil) {
		m := newLimiter(a, zones[0].z, limits, quay)
		if math.IsInf(m.cost(zones, paths), 1) {
			open := newSearch(zones, fixed, most, closed).open
			return newRelaxed(m, zones, open, most).search(limit)
		}
	}
	return paths, best
}

func (s *search) branch(i int, fixed float64) {
	cost := fixed + s.least(i)
	if cost > s.best+tie || math.IsInf(cost, 1) {
		return
	}
	if i < len(s.open) && i > 1 && s.least(1) > s.best+tie {
		return // with the decided dockings, too, at shares
	}
	if i == len(s.open) {
		var paths [][]stock
		if s.days != nil {
			cost, paths = s.days.least(s.options, s.open, s.best-fixed)
			cost += fixed
		}
		if cost < s.best-tie || cost <= s.best+tie && !math.IsInf(cost, 1) && (s.chosen == nil || preferred(s.open, s.chosen)) {
			s.best = min(s.best, cost)
			s.chosen, s.paths = slices.Clone(s.open), paths
		}
		return
	}
	if !s.open[i] {
		s.branch(i+1, fixed) // closed from the outset
		return
	}
	if s.left > 0 {
		s.left--
		s.branch(i+1, fixed+s.fixed[i])
		s.left++
	}
	s.open[i] = false
	s.branch(i+1, fixed)
	s.open[i] = true
}

// shared returns the shared cost of the open dockings.
func (s *search) shared(open []bool) float64 {
	cost := 0.0
	for i, o := range open {
		if o {
			cost += s.fixed[i] // none at boundary 0
		}
	}
	return cost
}

// preferred reports whether a is the better of two sets of dockings at equal
// cost: fewer dockings, then earlier ones.
func preferred(a, b []bool) bool {
	at := func(open []bool) (at []int) {
		for i := 1; i < len(open); i++ {
			if open[i] {
				at = append(at, i)
			}
		}
		return at
	}
	x, y := at(a), at(b)
	if len(x) != len(y) {
		return len(x) < len(y)
	}
	return slices.Compare(x, y) < 0
}

// before reports whether a is the better of two rows of a zone's sets at equal
// cost: earlier actions, then patterns in the asset's order, then fewer adds.
func before(a, b []stock, end int) bool {
	actions := func(sets []stock) (at, patterns []int, adds int) {
		for _, s := range sets {
			if !s.kept {
				at, patterns = append(at, s.from), append(patterns, s.piece.order)
			}
			if s.add > 0 {
				at, patterns = append(at, s.add), append(patterns, s.addPiece.order)
				adds++
			}
		}
		return append(at, end), patterns, adds
	}
	atA, patternsA, addsA := actions(a)
	atB, patternsB, addsB := actions(b)
	return cmp.Or(slices.Compare(atA, atB), slices.Compare(patternsA, patternsB), addsA-addsB) < 0
}

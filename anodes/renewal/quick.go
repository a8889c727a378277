package renewal

import (
	"math"
	"slices"
)

// quick is a zone's spans as the search for dockings sees them.
type quick struct {
	end   int
	first []int // of the spans that start at a boundary, and their number
	spans []step
	value []float64 // scratch
	next  []int
}

// step is a span: where it ends, the docking of its add, 0 without, its cost.
type step struct {
	to, add int
	cost    float64
}

func newQuick(o *options) quick {
	n := len(o.start)
	for _, spans := range o.from {
		n += len(spans)
	}
	q := quick{end: o.end, spans: make([]step, 0, n), value: make([]float64, o.end+1), next: make([]int, o.end)}
	for i := range o.end {
		q.first = append(q.first, len(q.spans))
		for _, s := range o.at(i) {
			q.spans = append(q.spans, step{s.to, s.add, s.cost})
		}
	}
	q.first = append(q.first, len(q.spans))
	return q
}

// copy returns one that may be used beside the other.
func (q quick) copy() quick {
	q.value, q.next = make([]float64, q.end+1), make([]int, q.end)
	return q
}

// least returns the least cost on the open dockings, with a price for working
// at each; +Inf where the zone cannot be held.
func (q *quick) least(open []bool, price []float64) float64 {
	q.value[q.end] = 0
	for i := q.end - 1; i >= 0; i-- {
		least, next := math.Inf(1), -1
		if i == 0 || open[i] {
			for n := q.first[i]; n < q.first[i+1]; n++ {
				s := &q.spans[n]
				c := s.cost + q.value[s.to]
				if c >= least {
					continue
				}
				if s.add > 0 {
					if !open[s.add] {
						continue
					}
					c += price[s.add]
				}
				if s.to < q.end {
					c += price[s.to]
				}
				if c < least {
					least, next = c, n
				}
			}
		}
		q.value[i], q.next[i] = least, next
	}
	return q.value[0]
}

// works calls f with every docking of the way that least found.
func (q *quick) works(f func(docking int)) {
	for i := 0; i < q.end; {
		s := &q.spans[q.next[i]]
		if s.add > 0 {
			f(s.add)
		}
		if s.to < q.end {
			f(s.to)
		}
		i = s.to
	}
}

// shares are what every zone is charged for working at a docking. Together
// they never exceed what the docking costs, so that zones that each do what is
// best for them pay no more than any plan costs.
type shares [][]float64

// mostSplits bounds the search for good shares.
const mostSplits = 30

// split shares the dockings' costs so that the bound is as high as it easily
// gets: a zone that works at a docking is charged more, one that does not
// less. The plan that the zones' ways make is the first of the search.
func (s *search) split() shares {
	zones, boundaries := len(s.quick), len(s.open)
	at := make(shares, zones)
	for n := range at {
		at[n] = make([]float64, boundaries)
		for k, f := range s.fixed {
			at[n][k] = f / float64(zones)
		}
	}
	best, bound := clone(at), math.Inf(-1)
	works, users := make([][]bool, zones), make([]int, boundaries)
	for n := range works {
		works[n] = make([]bool, boundaries)
	}
	open, none := make([]bool, boundaries), make([]float64, boundaries)
	pace := 1.0
	for range mostSplits {
		sum := 0.0
		clear(users)
		for n := range s.quick {
			clear(works[n])
			sum += s.quick[n].least(s.open, at[n])
			if math.IsInf(sum, 1) {
				return best
			}
			s.quick[n].works(func(k int) {
				works[n][k] = true
				users[k]++
			})
		}
		if sum > bound {
			bound = sum
			for n := range at {
				copy(best[n], at[n])
			}
		} else {
			pace *= 0.8
		}
		plan, opened := 0.0, 0
		for k := range open {
			open[k] = users[k] > 0
			if open[k] {
				plan += s.fixed[k]
				opened++
			}
		}
		for n := range s.quick {
			plan += s.quick[n].least(open, none)
		}
		if s.days == nil && opened <= s.left {
			s.best = min(s.best, plan)
		}
		gap, square := min(plan, s.best)-sum, 0.0
		for _, u := range users {
			square += float64(u) * float64(zones-u) / float64(zones)
		}
		if gap <= tie || square == 0 || pace < 0.02 {
			break
		}
		step := pace * gap / square
		for k, u := range users {
			if u == 0 || u == zones || s.fixed[k] == 0 {
				continue
			}
			total := 0.0
			for n := range at {
				if works[n][k] {
					at[n][k] += step * float64(zones-u) / float64(zones)
				} else {
					at[n][k] = max(0, at[n][k]-step*float64(u)/float64(zones))
				}
				total += at[n][k]
			}
			for n := range at {
				at[n][k] *= s.fixed[k] / total
			}
		}
	}
	return best
}

func clone(s shares) shares {
	c := slices.Clone(s)
	for i := range c {
		c[i] = slices.Clone(c[i])
	}
	return c
}

// least returns what the zones cost at least, each by itself: with the
// dockings before docking i decided, at their full cost elsewhere, and the
// others at the zones' shares.
func (s *search) least(i int) float64 {
	cost := 0.0
	price := make([]float64, len(s.open))
	for n := range s.quick {
		if s.shares != nil {
			copy(price[i:], s.shares[n][i:])
		}
		cost += s.quick[n].least(s.open, price)
	}
	return cost
}

package renewal

import (
	"math"
	"slices"
	"testing"
)

// With dockings closed, fewer dockings or one pattern the plan is the cheapest
// of all that can be listed under that limit, and the alternative to an action
// the cheapest of all that do not have it.
func TestLimitedPlanIsTheCheapestOfAll(t *testing.T) {
	closed, fewer, only, others := 0, 0, 0, 0
	for seed := range uint64(300) {
		a := randomAsset(t, seed, 1+int(seed%4), false)
		best, zones := solve(a)
		if len(best.Best.Unmet) > 0 {
			continue
		}
		cheapestOf := func(wanted func([]Line) bool, most int) float64 {
			per, all := make([][]candidate, len(zones)), 1
			for i, z := range zones {
				per[i] = candidates(a, z, wanted)
				all *= max(1, len(per[i]))
			}
			if all > 20_000 {
				return math.NaN()
			}
			least := math.Inf(1)
			for mask := range 1 << len(a.Ahead()) {
				if n := ones(mask); n != most && most >= 0 {
					continue
				}
				some := make([][]candidate, len(per))
				for i := range per {
					for _, c := range per[i] {
						if most < 0 || !slices.ContainsFunc(c.at, func(k int) bool { return mask>>k&1 == 0 }) {
							some[i] = append(some[i], c)
						}
					}
				}
				b, _ := brute(a, zones, some)
				least = min(least, b.total)
				if most < 0 {
					break
				}
			}
			return least
		}
		check := func(what string, got, want float64, n *int) {
			switch {
			case math.IsNaN(want):
			case got != want && !(math.Abs(got-want) <= 1e-6*max(1, math.Abs(want))):
				t.Errorf("seed %d: %s: total %v, cheapest of all %v", seed, what, got, want)
			case !math.IsInf(want, 1):
				*n++
			}
		}
		p := problem(a)
		p.Closed = []int{int(seed) % len(a.Ahead())}
		check("closed", p.Solve().Best.Total, cheapestOf(func(ls []Line) bool {
			return !slices.ContainsFunc(ls, func(l Line) bool { return l.Action != Keep && l.Docking == p.Closed[0] })
		}, -1), &closed)

		p = problem(a)
		p.Fewer = 1
		check("fewer", p.Solve().Best.Total, cheapestOf(func([]Line) bool { return true }, len(a.Ahead())-1), &fewer)

		p = problem(a)
		p.Only = a.Patterns[0].ID
		if one := p.Solve(); len(one.Best.Unmet) == 0 {
			check("only", one.Best.Total, cheapestOf(func(ls []Line) bool {
				return !slices.ContainsFunc(ls, func(l Line) bool { return l.Action != Keep && l.Pattern.ID != p.Only })
			}, -1), &only)
		}

		if len(best.Best.Lines) > 6 || best.Best.Total < 1 {
			continue
		}
		within := 0.2
		alternatives := problem(a).Alternatives(best.Best, within)
		for _, l := range best.Best.Lines {
			if l.Action == Keep {
				continue
			}
			want := cheapestOf(func(ls []Line) bool {
				return !slices.ContainsFunc(ls, func(k Line) bool {
					return k.Zone == l.Zone && k.Docking == l.Docking && k.Action == l.Action && k.Pattern.ID == l.Pattern.ID
				})
			}, -1)
			i := slices.IndexFunc(alternatives, func(k Alternative) bool { return k.Instead.Zone == l.Zone && k.Instead.Docking == l.Docking })
			got := math.Inf(1)
			if i >= 0 {
				got = alternatives[i].Total
			}
			if want > best.Best.Total*(1+within) {
				want = math.Inf(1)
			}
			check("another action", got, want, &others)
		}
	}
	t.Logf("%d closed, %d fewer, %d of one pattern, %d other actions", closed, fewer, only, others)
	if closed < 80 || fewer < 80 || only < 80 || others < 80 {
		t.Errorf("%d closed, %d fewer, %d of one pattern, %d other actions: too few to say anything", closed, fewer, only, others)
	}
}

// ones counts the bits that are set.
func ones(mask int) int {
	n := 0
	for ; mask > 0; mask &= mask - 1 {
		n++
	}
	return n
}

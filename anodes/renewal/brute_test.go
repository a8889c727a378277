package renewal

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"testing"

	"anodewright/hull"
)

// rows lists every row of sets that holds a zone from the first docking to
// the horizon, straight from the rules on sets.
func rows(z *zone) [][]stock {
	var all [][]stock
	var extend func(row []stock, at int)
	take := func(row []stock, s stock) {
		extend(append(slices.Clone(row), s), s.to)
		for j := s.to + 1; j <= z.end(); j++ {
			for _, m := range z.offered {
				if t, ok := z.addTo(s, m, s.to, j); ok {
					extend(append(slices.Clone(row), t), j)
				}
			}
		}
	}
	extend = func(row []stock, at int) {
		if at == z.end() {
			all = append(all, row)
			return
		}
		for j := at + 1; j <= z.end(); j++ {
			for _, m := range z.offered {
				if s, ok := z.newSet(m, at, j); ok {
					take(row, s)
				}
			}
		}
	}
	for j := 1; j <= z.end(); j++ {
		if s, ok := z.keep(j); ok {
			take(nil, s)
		}
	}
	return all
}

// candidate is the best of a zone's rows with the same actions and pieces.
type candidate struct {
	cost     float64
	at       []int // dockings worked on, from 0
	pieces   []int // fitted there
	patterns []string
}

// candidates lists those of a zone whose actions are wanted.
func candidates(a *hull.Asset, z *zone, wanted func([]Line) bool) []candidate {
	found := map[string]candidate{}
	for _, row := range rows(z) {
		var c candidate
		lines := z.lines(row)
		if !wanted(lines) {
			continue
		}
		for _, l := range lines {
			c.cost += l.Cost
			if l.Action != Keep {
				c.at, c.pieces, c.patterns = append(c.at, l.Docking), append(c.pieces, l.Count), append(c.patterns, l.Pattern.ID)
			}
		}
		key := fmt.Sprint(c.at)
		for i, k := range c.at {
			if a.Ahead()[k].Kind == hull.Campaign {
				key += fmt.Sprint(" ", k, ":", c.pieces[i])
			}
		}
		old, ok := found[key]
		if !ok || c.cost < old.cost-tie || c.cost <= old.cost+tie && slices.Compare(c.patterns, old.patterns) < 0 {
			found[key] = c
		}
	}
	var all []candidate
	for _, c := range found {
		all = append(all, c)
	}
	return all
}

// whole is a plan of all zones as the tie rule sees it.
type whole struct {
	total    float64
	dockings int
	actions  []int
	patterns []string
}

func (p whole) compare(q whole) int {
	return cmp.Or(p.dockings-q.dockings, slices.Compare(p.actions, q.actions), slices.Compare(p.patterns, q.patterns))
}

func newWhole(total float64, actions []int, patterns []string) whole {
	slices.Sort(actions)
	dockings := len(slices.Compact(slices.Clone(actions)))
	return whole{total, dockings, append(actions, math.MaxInt), patterns}
}

// brute returns the best of all plans, first by cost, then by the tie rule,
// and how many were compared; none where a zone has no candidate.
func brute(a *hull.Asset, zones []*zone, per [][]candidate) (best whole, compared int) {
	var tied []whole
	least := math.Inf(1)
	var choose func(i int, cost float64, at, pieces []int, patterns []string)
	choose = func(i int, cost float64, at, pieces []int, patterns []string) {
		if i < len(per) {
			for _, c := range per[i] {
				choose(i+1, cost+c.cost, append(slices.Clip(at), c.at...), append(slices.Clip(pieces), c.pieces...), append(slices.Clip(patterns), c.patterns...))
			}
			return
		}
		compared++
		for k, d := range a.Ahead() {
			n := 0
			for j := range at {
				if at[j] == k {
					n += pieces[j]
				}
			}
			if n > 0 {
				cost += zones[0].worth[k+1] * d.FixedCost
				if d.Kind == hull.Campaign {
					cost += zones[0].worth[k+1] * d.Mobilisation
					if d.DayRate > 0 {
						cost += zones[0].worth[k+1] * d.DayRate * math.Ceil(float64(n)/d.PiecesPerDay-1e-9)
					}
				}
			}
		}
		if cost > least+tie {
			return
		}
		least = min(least, cost)
		tied = append(tied, newWhole(cost, slices.Clone(at), slices.Clone(patterns)))
	}
	choose(0, 0, nil, nil, nil)
	tied = slices.DeleteFunc(tied, func(p whole) bool { return p.total > least+tie })
	if len(tied) == 0 {
		return whole{total: math.Inf(1)}, compared
	}
	return slices.MinFunc(tied, whole.compare), compared
}

// The plan is the cheapest of all that can be listed, by the tie rule among
// equals; the bound is its cost; and neither simple rule is cheaper.
func TestPlanIsTheCheapestOfAll(t *testing.T) {
	solved, unmet, paidByDay := 0, 0, 0
	for seed := range uint64(1500) {
		a := randomAsset(t, seed, 1+int(seed%4), seed%5 == 0)
		got, zones := solve(a)
		per := make([][]candidate, len(zones))
		all := 1
		for i, z := range zones {
			per[i] = candidates(a, z, func([]Line) bool { return true })
			all *= len(per[i])
		}
		if all > 200_000 {
			continue
		}
		want, _ := brute(a, zones, per)
		if math.IsInf(want.total, 1) != (len(got.Best.Unmet) > 0) {
			t.Errorf("seed %d: unmet %v, cheapest of all %v", seed, got.Best.Unmet, want.total)
		}
		if len(got.Best.Unmet) > 0 {
			unmet++
			continue
		}
		solved++
		near := 1e-6 * max(1, want.total)
		if math.Abs(got.Best.Total-want.total) > near {
			t.Errorf("seed %d: total %v, cheapest of all %v", seed, got.Best.Total, want.total)
		}
		if math.Abs(got.LowerBound-want.total) > near || !got.Proven() {
			t.Errorf("seed %d: bound %v, cheapest of all %v", seed, got.LowerBound, want.total)
		}
		if got.RenewAll < got.Best.Total-near || got.AsLate < got.Best.Total-near {
			t.Errorf("seed %d: total %v, simple rules %v and %v", seed, got.Best.Total, got.RenewAll, got.AsLate)
		}
		var actions []int
		var patterns []string
		for i := range zones {
			for _, l := range got.Best.Lines {
				if l.Zone == i && l.Action != Keep {
					actions, patterns = append(actions, l.Docking), append(patterns, l.Pattern.ID)
					if a.Ahead()[l.Docking].DayRate > 0 {
						paidByDay++
					}
				}
			}
		}
		if chosen := newWhole(0, actions, patterns); chosen.compare(want) != 0 {
			t.Errorf("seed %d: of plans that cost the same, %+v was chosen instead of %+v", seed, chosen, want)
		}
	}
	if solved < 1000 || unmet < 50 || paidByDay < 300 {
		t.Errorf("%d solved, %d unmet, %d actions paid by the day: too few to say anything", solved, unmet, paidByDay)
	}
}

// With parts of days in place of whole ones, the search is a bound.
func TestPartsOfDaysAreABound(t *testing.T) {
	below := 0
	for seed := range uint64(300) {
		a := randomAsset(t, seed, 1+int(seed%4), false)
		got, zones := solve(a)
		if len(got.Best.Unmet) > 0 {
			continue
		}
		parts := 0.0
		for _, z := range zones {
			o := z.spans()
			open := slices.Repeat([]bool{true}, z.end())
			c, _ := o.best(open, false)
			parts += c
		}
		if parts > got.LowerBound+1e-6 {
			t.Errorf("seed %d: zones alone cost %v, the bound is %v", seed, parts, got.LowerBound)
		}
		if parts < got.LowerBound-1e-6 {
			below++
		}
	}
	if below == 0 {
		t.Error("no case in which shared costs or whole days matter")
	}
}

// One zone and one docking ahead: a larger zone never costs less. With more
// dockings it may, since a larger set can be less wasted when something may be
// added to it.
func TestMoreAreaNeverCostsLess(t *testing.T) {
	compared := 0
	for seed := range uint64(400) {
		a := randomAsset(t, seed, 1, false)
		a.Zones = a.Zones[:1]
		small, _ := solve(a)
		a.Zones[0].WettedArea *= 1.17
		large, _ := solve(a)
		if len(large.Best.Unmet) > 0 {
			continue
		}
		if len(small.Best.Unmet) > 0 {
			t.Errorf("seed %d: only the larger zone can be held", seed)
			continue
		}
		compared++
		if large.Best.Total < small.Best.Total-1e-6 {
			t.Errorf("seed %d: %v m2 cost %v, less than %v for a smaller zone", seed, a.Zones[0].WettedArea, large.Best.Total, small.Best.Total)
		}
	}
	if compared < 200 {
		t.Errorf("only %d compared", compared)
	}
}

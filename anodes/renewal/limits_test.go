package renewal

import (
	"math"
	"math/rand/v2"
	"testing"

	"anodewright/hull"
)

// used is what a plan uses at one docking.
type used struct {
	pieces   int
	spent    float64
	patterns map[string]int // pieces
}

// usedBy adds up what lines use by docking, straight from prices.
func usedBy(a *hull.Asset, lines []Line) []used {
	all := make([]used, len(a.Ahead()))
	for _, l := range lines {
		if l.Action == Keep {
			continue
		}
		u := &all[l.Docking]
		if u.patterns == nil {
			u.patterns = map[string]int{}
		}
		u.patterns[l.Pattern.ID] += l.Count
		u.pieces += l.Count
		u.spent += float64(l.Count)*(l.Pattern.Price+a.Costs.FitPerPiece) + float64(l.Removed)*a.Costs.RemovePerPiece + a.Costs.PerZone
	}
	for k, d := range a.Ahead() {
		if u := &all[k]; u.pieces > 0 {
			u.spent += d.FixedCost + d.Mobilisation
			if d.DayRate > 0 {
				u.spent += d.DayRate * math.Ceil(float64(u.pieces)/d.PiecesPerDay-1e-9)
			}
		}
	}
	return all
}

// within reports whether what is used at every docking is within the limits,
// and at the first of them within what lies on the quay.
func within(all []used, l Limits, quay map[string]int) bool {
	if quay != nil && len(all) > 0 {
		for id, n := range all[0].patterns {
			if n > quay[id] {
				return false
			}
		}
	}
	for _, u := range all {
		if l.Pieces > 0 && u.pieces > l.Pieces || l.Budget > 0 && u.spent > l.Budget*(1+1e-9) || l.Patterns > 0 && len(u.patterns) > l.Patterns {
			return false
		}
	}
	return true
}

// allLines lists what can be done in every zone, none where that is more than
// so many plans.
func allLines(zones []*zone, most int) (lines [][][]Line) {
	all := 1
	for _, z := range zones {
		var of [][]Line
		for _, r := range rows(z) {
			of = append(of, z.lines(r))
		}
		lines = append(lines, of)
		all *= len(of)
	}
	if all > most {
		return nil
	}
	return lines
}

// cheapestWithin is the least cost of all plans within limits that can be
// listed, +Inf where there is none.
func cheapestWithin(a *hull.Asset, zones []*zone, lines [][][]Line, limits Limits, quay map[string]int) float64 {
	want := math.Inf(1)
	var choose func(i int, taken []Line)
	choose = func(i int, taken []Line) {
		if i < len(lines) {
			for _, ls := range lines[i] {
				choose(i+1, append(taken[:len(taken):len(taken)], ls...))
			}
			return
		}
		u := usedBy(a, taken)
		if !within(u, limits, quay) {
			return
		}
		cost := 0.0
		for _, l := range taken {
			cost += l.Cost
		}
		for k, d := range a.Ahead() {
			if u[k].pieces > 0 {
				cost += zones[0].worth[k+1] * (d.FixedCost + d.Mobilisation)
				if d.DayRate > 0 {
					cost += zones[0].worth[k+1] * d.DayRate * math.Ceil(float64(u[k].pieces)/d.PiecesPerDay-1e-9)
				}
			}
		}
		want = min(want, cost)
	}
	choose(0, nil)
	return want
}

// Within limits the plan is the cheapest of all that can be listed.
func TestPlanWithinLimitsIsTheCheapestOfAll(t *testing.T) {
	dearer, none := 0, 0
	for seed := range uint64(1000) {
		a := randomAsset(t, seed, 1+int(seed%3), false)
		free, zones := solve(a)
		if len(free.Best.Unmet) > 0 {
			continue
		}
		lines := allLines(zones, 20_000)
		if lines == nil {
			continue
		}
		r := rand.New(rand.NewPCG(seed, 3))
		most := used{}
		for _, u := range usedBy(a, free.Best.Lines) {
			most.pieces, most.spent = max(most.pieces, u.pieces), max(most.spent, u.spent)
		}
		share := 0.7 + 0.4*r.Float64()
		limits := []Limits{
			{Pieces: max(1, int(float64(most.pieces)*share))}, {Budget: most.spent*share + 1}, {Patterns: 1},
			{Pieces: max(1, int(float64(most.pieces)*(share+0.3))), Budget: most.spent*(share+0.3) + 1, Patterns: 2},
		}[seed/3%4]
		want := cheapestWithin(a, zones, lines, limits, nil)
		p := problem(a)
		p.Limits = limits
		got := p.Solve()
		switch {
		case math.IsInf(want, 1):
			none++
			if !math.IsInf(got.Best.Total, 1) || got.Proven() {
				t.Errorf("seed %d: %+v: total %v, but there is no plan", seed, limits, got.Best.Total)
			}
			continue
		case want > free.Best.Total+1:
			dearer++
		}
		near := 1e-6 * max(1, want)
		if math.Abs(got.Best.Total-want) > near || math.Abs(got.LowerBound-want) > near {
			t.Errorf("seed %d: %+v: total %v, bound %v, cheapest of all %v", seed, limits, got.Best.Total, got.LowerBound, want)
		}
		if !within(usedBy(a, got.Best.Lines), limits, nil) {
			t.Errorf("seed %d: %+v: the plan is not within", seed, limits)
		}
	}
	t.Logf("%d dearer, %d without a plan", dearer, none)
	if dearer < 50 || none < 60 {
		t.Errorf("%d dearer, %d without a plan: too few to say anything", dearer, none)
	}
}

package renewal

import (
	"math"
	"math/rand/v2"
	"testing"
)

// With the pieces on the quay as the only stock of the first docking the plan
// is the cheapest of all that can be listed; where there is none, what is
// lacking is more than nothing and would do.
func TestPlanFromTheQuayIsTheCheapestOfAll(t *testing.T) {
	same, dearer, none := 0, 0, 0
	for seed := range uint64(1200) {
		a := randomAsset(t, seed, 1+int(seed%3), false)
		free, zones := solve(a)
		if len(free.Best.Unmet) > 0 {
			continue
		}
		lines := allLines(zones, 20_000)
		if lines == nil {
			continue
		}
		r := rand.New(rand.NewPCG(seed, 4))
		quay := map[string]int{}
		for _, l := range free.Best.Lines {
			if l.Docking == 0 && l.Action != Keep {
				quay[l.Pattern.ID] += int(float64(l.Count) * (0.6 + 0.6*r.Float64()))
			}
		}
		if other := a.Patterns[r.IntN(len(a.Patterns))].ID; r.IntN(2) == 0 {
			quay[other] += r.IntN(30)
		}
		limits := Limits{}
		if seed%5 == 0 {
			limits.Pieces = 1 + r.IntN(60)
		}
		p := problem(a)
		p.Quay, p.Limits = quay, limits
		got := p.Solve()
		want := cheapestWithin(a, zones, lines, limits, quay)
		near := 1e-6 * max(1, want)
		switch {
		case math.IsInf(want, 1):
			none++
			if !math.IsInf(got.Best.Total, 1) || got.Proven() {
				t.Errorf("seed %d: %v: total %v, but there is no plan", seed, quay, got.Best.Total)
			}
			if limits == (Limits{}) {
				if len(got.Lacks) == 0 {
					t.Errorf("seed %d: %v: nothing is said to be lacking", seed, quay)
				}
				for _, l := range got.Lacks {
					quay[l.Pattern] += l.Pieces
					if l.Pieces < 1 || l.Docking != 0 {
						t.Errorf("seed %d: %+v", seed, l)
					}
				}
				if enough := p.Solve(); math.IsInf(enough.Best.Total, 1) {
					t.Errorf("seed %d: with %+v there is still no plan", seed, got.Lacks)
				}
			}
			continue
		case want > free.Best.Total+1:
			dearer++
		default:
			same++
		}
		if math.Abs(got.Best.Total-want) > near || math.Abs(got.LowerBound-want) > near || len(got.Lacks) > 0 {
			t.Errorf("seed %d: %v: total %v, bound %v, cheapest of all %v", seed, quay, got.Best.Total, got.LowerBound, want)
		}
		if !within(usedBy(a, got.Best.Lines), limits, quay) {
			t.Errorf("seed %d: %v: the plan takes more than there is", seed, quay)
		}
	}
	t.Logf("%d cost the same, %d more, %d have no plan", same, dearer, none)
	if same < 50 || dearer < 30 || none < 50 {
		t.Errorf("%d cost the same, %d more, %d have no plan: too few to say anything", same, dearer, none)
	}
}

package renewal

import (
	"math"
	"testing"
)

// The spans that a plain zone lists are as good as all that there are: on any
// open dockings the least cost is the same.
func TestPlainSpansAreEnough(t *testing.T) {
	compared := 0
	for seed := range uint64(400) {
		a := randomAsset(t, seed, 2+int(seed%4), false)
		for i := range a.Dockings {
			a.Dockings[i].DayRate = 0
		}
		_, zones := solve(a)
		for _, z := range zones {
			if !z.plain() {
				t.Fatalf("seed %d: not plain", seed)
			}
			few := z.spans()
			z.quay = true // lists all that may be of use where kinds are limited
			all := z.spans()
			z.quay = false
			p, q := newQuick(&few), newQuick(&all)
			price := make([]float64, z.end()+1)
			for mask := range 1 << (z.end() - 1) {
				open := []bool{true}
				for k := range z.end() - 1 {
					open = append(open, mask>>k&1 == 1)
				}
				x, y := p.least(open, price), q.least(open, price)
				if x != y && !(math.Abs(x-y) <= 1e-6) {
					t.Errorf("seed %d, dockings %v: %v, of all %v", seed, open, x, y)
				}
				compared++
			}
			for i := range few.end {
				for _, s := range few.at(i) {
					if math.Abs(s.cost-z.cost(&s.stock)) > 1e-9 || s.add > 0 && s.addCount == 0 {
						t.Errorf("seed %d: %+v", seed, s.stock)
					}
				}
			}
		}
	}
	if compared < 3000 {
		t.Errorf("only %d compared", compared)
	}
}

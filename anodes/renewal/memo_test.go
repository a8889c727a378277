package renewal

import (
	"fmt"
	"math/rand/v2"
	"reflect"
	"sync"
	"testing"

	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// shown is all of a result, written so that equal ones are equal texts.
func shown(r Result) string {
	text := fmt.Sprint(r.Best.Total, r.LowerBound, r.RenewAll, r.AsLate, r.Free, r.Best.Docking, r.Best.Unmet)
	for _, l := range r.Best.Lines {
		l2 := l
		l2.Pattern = nil
		text += fmt.Sprintln(l2, l.Pattern)
	}
	return text
}

// With a memo every plan after every edit is what it is without, names the
// asset's own patterns, and plans may share one at the same time.
func TestMemoChangesNothing(t *testing.T) {
	edits := 0
	for seed := range uint64(60) {
		a := randomAsset(t, seed, 1+int(seed%4), false)
		r := rand.New(rand.NewPCG(seed, 6))
		memo := new(Memo)
		var all sync.WaitGroup
		for range 8 {
			next := assetfile.Clone(a)
			z := &next.Zones[r.IntN(len(next.Zones))]
			switch r.IntN(5) {
			case 0:
				z.WettedArea *= 0.9 + 0.3*r.Float64()
			case 1:
				z.MinCount = r.IntN(9)
			case 2:
				next.Costs.PerZone += 10
			case 3:
				next.Patterns[0].Price *= 0.9 + 0.2*r.Float64()
			case 4:
				next.Zones[0], next.Zones[len(next.Zones)-1] = next.Zones[len(next.Zones)-1], next.Zones[0]
			}
			if hull.Check(next).Err() != nil {
				continue
			}
			a = next
			edits++
			all.Go(func() {
				p := problem(next)
				want := p.Solve()
				p.Memo = memo
				got := p.Solve()
				if shown(got) != shown(want) {
					t.Errorf("seed %d: with a memo\n%s\nwithout\n%s", seed, shown(got), shown(want))
				}
				for _, l := range got.Best.Lines {
					if own, _ := next.Pattern(l.Pattern.ID); own != l.Pattern || !reflect.DeepEqual(own, l.Pattern) {
						t.Errorf("seed %d: a line names the pattern of another asset", seed)
					}
				}
			})
		}
		all.Wait()
	}
	if edits < 200 {
		t.Errorf("only %d edits", edits)
	}
}

// BenchmarkEdit is the plan of 200 zones after one of them was edited.
func BenchmarkEdit(b *testing.B) {
	a := largeAsset(b, 200, 8, 12, false, 0)
	p := problem(a)
	p.Memo = new(Memo)
	p.Solve()
	start := processorTime()
	for b.Loop() {
		z := &a.Zones[100]
		z.WettedArea += 0.01
		p.Demand[100] = hull.Demand(a)[100].Total
		p.Solve()
	}
	b.ReportMetric(float64(processorTime()-start)/1e6/float64(b.N), "cpu-ms/op")
}

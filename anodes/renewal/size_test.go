package renewal_test

import (
	"math"
	"testing"

	"anodewright/anodes/renewal"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

func demandOf(a *hull.Asset) (totals [][]hull.Current, factors []float64) {
	for _, d := range hull.Demand(a) {
		totals, factors = append(totals, d.Total), append(factors, 1)
	}
	return totals, factors
}

// The actions of a plan sized anew are the plan; on more steel they need more.
func TestSizeOfPinnedActions(t *testing.T) {
	actions, more := 0, 0
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			t.Fatal(err)
		}
		demand, factors := demandOf(a)
		best := renewal.Solve(a, demand, factors).Best
		for k, got := range renewal.Size(a, demand, factors, best.Lines) {
			want := best.Lines[k]
			actions++
			if got.Count != want.Count || got.Removed != want.Removed || got.Need != want.Need || math.Abs(got.Cost-want.Cost) > 1e-9*want.Cost {
				t.Errorf("%s: sized anew %+v, planned %+v", a.Name, got, want)
			}
		}
		for i := range factors {
			factors[i] = 1.5
		}
		for k, got := range renewal.Size(a, demand, factors, best.Lines) {
			if got.Action != renewal.Renew {
				continue
			}
			more += got.Count - best.Lines[k].Count
			if got.Count < best.Lines[k].Count {
				t.Errorf("%s: half as much demand again needs %d pieces in place of %d", a.Name, got.Count, best.Lines[k].Count)
			}
		}
	}
	if more == 0 {
		t.Error("more demand changes no count")
	}
	if actions < 10 {
		t.Errorf("%d actions, want those of five plans", actions)
	}
}

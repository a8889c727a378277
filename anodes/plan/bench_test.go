package plan_test

import (
	"testing"

	"anodewright/anodes/plan"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// BenchmarkCompute is the whole outcome of each asset of the demo fleet.
func BenchmarkCompute(b *testing.B) {
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			b.Fatal(err)
		}
		b.Run(a.Name, func(b *testing.B) {
			for b.Loop() {
				plan.Compute(a, hull.NewDate(2026, 12, 1))
			}
		})
	}
}

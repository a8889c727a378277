package against

import (
	"fmt"
	"path/filepath"
	"testing"
	"time"

	"anodewright/anodes/plan"
	"anodewright/storage"
)

// grown measures the cost at every size and reports it and the exponent.
func grown(b *testing.B, unit string, sizes []int, cost func(size int) time.Duration) {
	for b.Loop() {
		var x, y []float64
		for _, n := range sizes {
			took := cost(n)
			x, y = append(x, float64(n)), append(y, took.Seconds())
			b.ReportMetric(took.Seconds()*1e3, fmt.Sprintf("ms-at-%d-%s", n, unit))
		}
		b.ReportMetric(exponent(x, y), "exponent")
	}
}

func least(runs int, call func()) time.Duration {
	best := timed(call)
	for range runs - 1 {
		best = min(best, timed(call))
	}
	return best
}

// BenchmarkZones is the whole outcome by the number of zones.
func BenchmarkZones(b *testing.B) {
	grown(b, "zones", []int{10, 50, 250, 1000, 2000}, func(n int) time.Duration {
		a := sized(b, n, 4)
		return least(2, func() { plan.Compute(a, today) })
	})
}

// BenchmarkDockings is the whole outcome by the number of dockings ahead.
func BenchmarkDockings(b *testing.B) {
	grown(b, "dockings", []int{2, 4, 8, 16}, func(n int) time.Duration {
		a := sized(b, 10, n)
		return least(2, func() { plan.Compute(a, today) })
	})
}

// BenchmarkAssets is the list of a register, opened and read, by the number of
// its assets.
func BenchmarkAssets(b *testing.B) {
	grown(b, "assets", []int{10, 100, 1000, 10_000}, func(n int) time.Duration {
		path := filepath.Join(b.TempDir(), "register.anodewright")
		r, err := storage.Open(path)
		if err != nil {
			b.Fatal(err)
		}
		a := sized(b, 10, 4)
		for i := range n {
			a.Name = fmt.Sprint("Ship ", i)
			if _, err := r.Add(a, ""); err != nil {
				b.Fatal(err)
			}
		}
		r.Close()
		return least(3, func() {
			r, err := storage.Open(path)
			if err != nil {
				b.Fatal(err)
			}
			if list, err := r.List(); err != nil || len(list) != n {
				b.Fatalf("%d assets, %v", len(list), err)
			}
			r.Close()
		})
	})
}

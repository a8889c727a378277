// Package against measures the program against others doing the same work in
// the same run: an integrator, a solver, an office suite, a blank window. Its
// benchmarks, one a file, are run by "go run ./cmd/dev bench". Each does both
// in turns, checks that the results agree, and reports the medians as ours-ms
// and theirs-ms in milliseconds, their ratio as times-faster or times-as-long,
// and how cost grows as an exponent. Without the other program a benchmark is
// skipped.
package against

import (
	"math"
	"slices"
	"time"
)

// median returns the median time of runs of both, in turns, so that whatever
// else the machine does slows both alike.
func median(runs int, ours, theirs func() time.Duration) (x, y time.Duration) {
	var a, b []time.Duration
	for range runs {
		a, b = append(a, ours()), append(b, theirs())
	}
	slices.Sort(a)
	slices.Sort(b)
	return a[len(a)/2], b[len(b)/2]
}

// exponent returns the p of the best fit of cost to c * size^p: least squares
// of the logarithms.
func exponent(sizes, costs []float64) float64 {
	var n, x, y, xx, xy float64
	for i := range sizes {
		u, v := math.Log(sizes[i]), math.Log(costs[i])
		n, x, y, xx, xy = n+1, x+u, y+v, xx+u*u, xy+u*v
	}
	return (n*xy - x*y) / (n*xx - x*x)
}

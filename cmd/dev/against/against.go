// Package against measures the program against others doing the same work in
// the same run: an integrator, a solver, an office suite, a blank window. Its
// benchmarks, one a file, are run by "go run ./cmd/dev bench". Each does both
// in turns, checks that the results agree, and reports the best times as
// ours-ms and theirs-ms in milliseconds, their ratio as times-faster or times-as-long,
// and how cost grows as an exponent. Without the other program a benchmark is
// skipped.
package against

import (
	"math"
	"time"
)

// best returns the shortest times of runs of both, in turns: that which whatever
// else the machine does has slowed least.
func best(runs int, ours, theirs func() time.Duration) (x, y time.Duration) {
	x, y = math.MaxInt64, math.MaxInt64
	for range runs {
		x, y = min(x, ours()), min(y, theirs())
	}
	return x, y
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

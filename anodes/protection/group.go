package protection

import "math"

// GroupFactor returns p(n) of a row of n equal rods at equal spacing: the sum
// of what each adds to the others' potential,
// p(n) = 1/(2 pi) 2/n^2 sum_{k=1}^{n-1} (n-k)/k (Sunde 1949; tabulated in
// MIL-HDBK-1004/10, 9.4, per ft and ohm cm). It is not monotone: p(2), p(3),
// p(4) are 0.0796, 0.0884, 0.0862. n is at least 1.
func GroupFactor(n int) float64 {
	// The sum is n H(n-1) - (n-1), H the harmonic numbers.
	harmonic := 0.0
	for k := 1; k < n; k++ {
		harmonic += 1 / float64(k)
	}
	x := float64(n)
	return (x*harmonic - (x - 1)) / (math.Pi * x * x)
}

// GroupResistance returns the resistance in ohm of a row of n equal vertical
// rods of resistance r1 (ohm) each, at a spacing (m) in a medium of rho
// ohm m: R_n = R_1/n + rho p(n)/s. A spacing of 0 is one that is not known:
// the rods then count as far from each other.
func GroupResistance(r1, rho, spacing float64, n int) float64 {
	r := r1 / float64(n)
	if spacing > 0 {
		r += rho * GroupFactor(n) / spacing
	}
	return r
}

// CountForResistance returns the exact number of rods whose row has the
// resistance most (ohm) where the group factor is held at p:
// n = R_1/(R_most - rho p/s) (MIL-HDBK-1004/10, 9.4). It is infinite where
// the neighbours alone make more than most.
func CountForResistance(r1, rho, spacing, p, most float64) float64 {
	left := most - rho*p/spacing
	if left <= 0 {
		return math.Inf(1)
	}
	return r1 / left
}

// mostRods bounds the search for a count.
const mostRods = 10000

// countForOutput returns the smallest row that gives a current (A) at a
// driving voltage (V), and whether any of up to mostRods rods does.
func countForOutput(r1, rho, spacing, driving, current float64) (int, bool) {
	harmonic := 0.0 // as in GroupFactor, kept from row to row
	for n := 1; n <= mostRods; n++ {
		x := float64(n)
		r := r1 / x
		if spacing > 0 {
			r += rho * (x*harmonic - (x - 1)) / (math.Pi * x * x) / spacing
		}
		if driving/r >= current*(1-1e-9) {
			return n, true
		}
		harmonic += 1 / x
	}
	return 0, false
}

// LineSpacing returns the distance in m between n anodes spread evenly along
// a line of a length in m (TM 5-811-7, App. C).
func LineSpacing(length float64, n int) float64 { return length / float64(n) }

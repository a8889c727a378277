package survey

import "math"

// Given returns mean and sd of the logarithm of a zone's local factor where
// the logarithm of its circuit's demand factor is x, taking the two as normal
// together. demand is what is known of the circuit's factor.
func (l Local) Given(demand Posterior, x float64) (mean, sd float64) {
	variance := demand.SD * demand.SD
	if variance <= 0 {
		return l.Factor.Mean, l.Factor.SD
	}
	slope := l.covariance / variance
	left := l.Factor.SD*l.Factor.SD - slope*l.covariance
	if left < 1e-9*l.Factor.SD*l.Factor.SD {
		left = 0
	}
	return l.Factor.Mean + slope*(x-demand.Mean), math.Sqrt(left)
}

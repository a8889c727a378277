package survey

import "math"

// Predicted is the wastage that the model predicts for one set of anodes at
// one date, by the logarithm of the demand factor at its zone: what a forecast
// gives whose demand is multiplied by e^x. It never falls with x. It has to go
// on beyond the utilisation factor, where a forecast stops: Interpolate sees to
// that.
type Predicted func(x float64) float64

// Linear is a wastage in proportion to the demand factor: atOne is that at a
// factor of 1. It holds for anodes new at the start that give what the steel
// asks.
func Linear(atOne float64) Predicted { return LinearFrom(0, atOne) }

// LinearFrom is a wastage that was start when the demand began and has grown
// by growth at a factor of 1.
func LinearFrom(start, growth float64) Predicted {
	return func(x float64) float64 { return start + growth*math.Exp(x) }
}

// Nodes returns the logarithms of the demand factor at which a forecast is
// best run for Interpolate: about the factors from 0.2 to 5.
func Nodes() []float64 { return []float64{-1.6, -1.1, -0.7, -0.35, 0, 0.35, 0.7, 1.1, 1.6} }

// leastWastage stands for none, so that it has a logarithm.
const leastWastage = 1e-9

// Interpolate returns a smooth wastage through those of a few forecasts,
// which never falls: a monotone cubic of ln(wastage) in x (Fritsch and
// Carlson, SIAM Journal on Numerical Analysis 17, 1980, 238-246). nodes rise.
// A wastage at the utilisation factor only says that the set was spent before:
// from the last one below it the curve goes on with its last slope, or steeper
// where it has to pass the utilisation factor before the next node; below the
// first node it goes on with its first slope.
func Interpolate(nodes, wastage []float64, utilisation float64) Predicted {
	var x, y []float64
	least := 0.0 // slope to the first node at which it is spent
	for i, w := range wastage {
		if w >= utilisation*(1-1e-9) {
			if len(x) == 0 { // spent at every factor: no slope is known
				x, y = append(x, nodes[i]), append(y, math.Log(utilisation))
			} else {
				last := len(x) - 1
				least = (math.Log(utilisation) - y[last]) / (nodes[i] - x[last])
			}
			break
		}
		v := math.Log(max(w, leastWastage))
		if len(y) > 0 {
			v = max(v, y[len(y)-1])
		}
		x, y = append(x, nodes[i]), append(y, v)
	}
	n := len(x)
	if n == 1 { // as if in proportion to the factor
		return func(at float64) float64 { return math.Exp(y[0] + at - x[0]) }
	}
	slope := tangents(x, y)
	beyond := max(slope[n-1], least)
	return func(at float64) float64 {
		switch {
		case at <= x[0]:
			return math.Exp(y[0] + slope[0]*(at-x[0]))
		case at >= x[n-1]:
			return math.Exp(y[n-1] + beyond*(at-x[n-1]))
		}
		i := 1
		for x[i] < at {
			i++
		}
		h := x[i] - x[i-1]
		t := (at - x[i-1]) / h
		u := 1 - t
		return math.Exp(u*u*(1+2*t)*y[i-1] + t*t*(1+2*u)*y[i] + h*t*u*(u*slope[i-1]-t*slope[i]))
	}
}

// tangents returns slopes at the nodes that keep the cubic monotone: within,
// the harmonic mean of the slopes beside; at the ends, the slope beside.
func tangents(x, y []float64) []float64 {
	n := len(x)
	beside := make([]float64, n-1)
	for i := range beside {
		beside[i] = (y[i+1] - y[i]) / (x[i+1] - x[i])
	}
	m := make([]float64, n)
	m[0], m[n-1] = beside[0], beside[n-2]
	for i := 1; i < n-1; i++ {
		a, b := beside[i-1], beside[i]
		if a > 0 && b > 0 {
			ha, hb := x[i]-x[i-1], x[i+1]-x[i]
			wa, wb := ha+2*hb, 2*ha+hb
			m[i] = (wa + wb) / (wa/b + wb/a) // weights as for unequal steps
		}
	}
	return m
}

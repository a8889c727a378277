package forecast

import (
	"math"
	"slices"
)

// balance finds the potential at which the anodes give what the steel takes.
type balance struct {
	curve  Curve
	groups []Group
	spent  []bool
	g      []float64 // conductance of each group at its wastage, A/V
	breaks []float64 // where the balance's slope may change, rising
}

func newBalance(c Curve, groups []Group) *balance {
	b := &balance{curve: c, groups: groups, spent: make([]bool, len(groups)), g: make([]float64, len(groups))}
	for _, k := range c.knots {
		b.breaks = append(b.breaks, k.e)
	}
	for _, g := range groups {
		b.breaks = append(b.breaks, g.Potential)
	}
	slices.Sort(b.breaks)
	b.breaks = slices.Compact(b.breaks)
	return b
}

// conduct sets the conductances for a state.
func (b *balance) conduct(wastage, rho []float64) {
	for j := range b.groups {
		b.g[j] = 0
		if !b.spent[j] {
			g := &b.groups[j]
			b.g[j] = g.Factor * g.Count / (rho[j]*g.Shape(wastage[j]) + g.Series)
		}
	}
}

// excess is what the anodes would give beyond what the steel takes.
func (b *balance) excess(e, demand float64) float64 {
	sum := 0.0
	for j := range b.g {
		if e > b.groups[j].Potential {
			sum += b.g[j] * (e - b.groups[j].Potential)
		}
	}
	return sum - demand*b.curve.at(e)
}

// potential returns the balancing potential nearest to the one before. The
// balance is a straight line between breaks, so each root is exact. With no
// anode giving current the steel is at its corrosion potential.
func (b *balance) potential(demand, before float64) float64 {
	best, found := Corrosion, false
	take := func(e float64) {
		if !found || math.Abs(e-before) < math.Abs(best-before) {
			best, found = e, true
		}
	}
	low := b.breaks[0]
	fLow := b.excess(low, demand)
	if fLow == 0 && demand > 0 {
		take(low)
	}
	for _, high := range b.breaks[1:] {
		if high > Corrosion {
			high = Corrosion
		}
		fHigh := b.excess(high, demand)
		if fLow < 0 && fHigh >= 0 || fLow > 0 && fHigh <= 0 {
			take(low + (high-low)*fLow/(fLow-fHigh))
		}
		low, fLow = high, fHigh
		if high == Corrosion {
			break
		}
	}
	return best
}

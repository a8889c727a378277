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
	takes  []float64 // the curve there
	at     []int     // the break of each group's potential
	sum    []float64 // conductance of the groups of each break
	events []float64 // the breaks that the potential may pass
}

func newBalance(c Curve, groups []Group) *balance {
	n := len(groups)
	b := &balance{curve: c, groups: groups, spent: make([]bool, n), g: make([]float64, n), at: make([]int, n)}
	for _, k := range c.knots {
		b.breaks = append(b.breaks, k.e)
	}
	for _, g := range groups {
		b.breaks = append(b.breaks, g.Potential)
	}
	slices.Sort(b.breaks)
	b.breaks = slices.Compact(b.breaks)
	b.takes, b.sum = make([]float64, len(b.breaks)), make([]float64, len(b.breaks))
	for i, e := range b.breaks {
		b.takes[i] = c.at(e)
		if e < Corrosion {
			b.events = append(b.events, e)
		}
	}
	for j, g := range groups {
		b.at[j], _ = slices.BinarySearch(b.breaks, g.Potential)
	}
	return b
}

// conduct sets the conductances for a state.
func (b *balance) conduct(wastage, rho []float64) {
	clear(b.sum)
	for j := range b.groups {
		b.g[j] = 0
		if !b.spent[j] {
			g := &b.groups[j]
			b.g[j] = g.Factor * g.Count / (rho[j]*g.Shape(wastage[j]) + g.Series)
			b.sum[b.at[j]] += b.g[j]
		}
	}
}

// potential returns the balancing potential nearest to the one before. What
// the anodes would give beyond what the steel takes is a straight line between
// breaks, so each root is exact. With no anode giving current the steel is at
// its corrosion potential; steel that takes none is at that of its most
// negative anode.
func (b *balance) potential(demand, before float64) float64 {
	if demand <= 0 {
		return b.idle()
	}
	best, found := Corrosion, false
	take := func(e float64) {
		if !found || math.Abs(e-before) < math.Abs(best-before) {
			best, found = e, true
		}
	}
	low := b.breaks[0]
	g, ge := b.sum[0], b.sum[0]*low // of the groups below: conductance, and times potential
	fLow := -demand * b.takes[0]
	if fLow == 0 {
		take(low)
	}
	for i, high := range b.breaks[1:] {
		takes := b.takes[i+1]
		if high > Corrosion {
			high, takes = Corrosion, 0
		}
		fHigh := g*high - ge - demand*takes
		if fLow < 0 && fHigh >= 0 || fLow > 0 && fHigh <= 0 {
			take(low + (high-low)*fLow/(fLow-fHigh))
		}
		if high == Corrosion {
			break
		}
		g, ge = g+b.sum[i+1], ge+b.sum[i+1]*high
		low, fLow = high, fHigh
	}
	return best
}

// idle is the potential of steel that takes no current.
func (b *balance) idle() float64 {
	for i, g := range b.sum {
		if g > 0 {
			return min(b.breaks[i], Corrosion)
		}
	}
	return Corrosion
}

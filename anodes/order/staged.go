package order

import (
	"anodewright/hull"
)

// RushFactor is what a piece costs that is bought in a rush over its usual
// price, where the asset does not say: our own choice, to be edited.
const RushFactor = 3.0

// The quantiles of a need that a staged purchase names: what is nearly surely
// needed, and what is nearly surely enough.
const (
	SureOf   = 0.05
	EnoughOf = 0.95
)

// Staged is how to buy the pieces of one pattern for one docking in two
// stages: some now, before anyone has seen the old anodes, and the rest, if it
// is needed, from the dock floor. Spares are not part of it.
type Staged struct {
	Docking hull.Date
	Pattern *hull.Pattern
	OrderBy hull.Date // of what is ordered now
	Planned int       // pieces that the plan fits
	Need    Need      // pieces that may be needed
	// Worn is the probability that some set, to be kept or added to by the
	// plan, proves too worn for that, so that the whole of it has to be renewed.
	Worn  float64
	Wrong Few // what a wrong number costs, a piece

	Surely int // needed with 95 %
	Now    int // to have before the docking: the fractile's quantity
	AtMost int // needed with 5 %

	FromStock int     // of Now
	Ordered   int     // to be bought now, up to the pattern's order multiple
	Expected  float64 // cost of pieces left over and of pieces missing with Now
}

// Wait is how many pieces can wait for the dock floor.
func (s Staged) Wait() int { return max(0, s.AtMost-s.Now) }

// Enough is the probability that Now is enough.
func (s Staged) Enough() float64 { return s.Need.UpTo(s.Now) }

// Wrong returns what a piece too many and a piece too few cost of a pattern:
// too many is its price and freight less what is recovered, too few what a
// rush costs beyond them.
func Wrong(c *hull.Costs, p *hull.Pattern) Few {
	landed := p.Price + c.FreightPerKg*p.Gross()
	return Few{TooMany: landed - c.Recovered*p.Price, TooFew: (Rush(c) - 1) * landed}
}

// Rush is the rush factor of an asset's costs.
func Rush(c *hull.Costs) float64 {
	if c.RushFactor != nil {
		return *c.RushFactor
	}
	return RushFactor
}

// Stage decides how much of a need to buy now. What stock gives of it is taken
// from stock.
func Stage(a *hull.Asset, docking hull.Date, p *hull.Pattern, planned int, need Need, stock map[string]int) Staged {
	s := Staged{
		Docking: docking, Pattern: p, OrderBy: By(docking, p.LeadWeeks, a.Costs.FloatWeeks), Planned: planned, Need: need, Wrong: Wrong(&a.Costs, p),
		Surely: need.Quantile(SureOf), AtMost: need.Quantile(EnoughOf),
	}
	s.Now = need.Quantile(s.Wrong.Fractile())
	s.Expected = s.Wrong.Expected(need, s.Now)
	s.FromStock = min(stock[p.ID], s.Now)
	stock[p.ID] -= s.FromStock
	s.Ordered = upTo(s.Now-s.FromStock, p.OrderMultiple)
	return s
}

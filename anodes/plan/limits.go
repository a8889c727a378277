package plan

import (
	"math"

	"anodewright/anodes/renewal"
)

// WithLimits keeps the plan within limits at every docking. Where no plan is
// within them the outcome says so and is that of the plan without.
func WithLimits(l renewal.Limits) Option { return func(o *options) { o.limits = l } }

// solveWithin solves a problem within its limits if that can be done.
func (o *Outcome) solveWithin(p renewal.Problem) renewal.Result {
	r := p.Solve()
	if !math.IsInf(r.Best.Total, 1) {
		o.Limits = p.Limits
		return r
	}
	o.OverLimits = "no plan is within the limits"
	if !math.IsInf(r.LowerBound, 1) {
		o.OverLimits = "no plan within the limits was found in the time there is"
	}
	p.Limits = renewal.Limits{}
	return p.Solve()
}

package plan

import (
	"fmt"
	"maps"
	"math"
	"strings"

	"anodewright/anodes/renewal"
)

// WithLimits keeps the plan within limits at every docking. Where no plan is
// within them the outcome says so and is that of the plan without.
func WithLimits(l renewal.Limits) Option { return func(o *options) { o.limits = l } }

// WithQuay plans with what lies on the quay, pieces by pattern id, as the only
// stock of the first docking ahead: a pattern that is not named has none. Nil
// is no limit. Where no plan gets by with it the outcome says which zone lacks
// what and is that of the plan without.
func WithQuay(pieces map[string]int) Option {
	return func(o *options) { o.quay = maps.Clone(pieces) }
}

// WithMemo plans with what a memo keeps of earlier plans of the asset, and the
// same result.
func WithMemo(m *renewal.Memo) Option { return func(o *options) { o.memo = m } }

// solveWithin solves a problem within its limits if that can be done.
func (o *Outcome) solveWithin(p renewal.Problem) renewal.Result {
	r := p.Solve()
	if !math.IsInf(r.Best.Total, 1) {
		o.Limits, o.Quay = p.Limits, p.Quay
		return r
	}
	o.Lacks = r.Lacks
	switch {
	case !math.IsInf(r.LowerBound, 1):
		o.OverLimits = "no plan within the limits was found in the time there is"
	case len(r.Lacks) > 0 && p.Limits == (renewal.Limits{}):
		o.OverLimits = "the pieces on the quay are not enough: " + o.lacking(r.Lacks)
	case len(r.Lacks) > 0:
		o.OverLimits = "no plan is within the limits: " + o.lacking(r.Lacks)
	default:
		o.OverLimits = "no plan is within the limits"
	}
	p.Limits, p.Quay = renewal.Limits{}, nil
	return p.Solve()
}

// lacking writes what the plan nearest to the limits is over them.
func (o *Outcome) lacking(lacks []renewal.Lack) string {
	var all []string
	for _, l := range lacks {
		zone, date := o.Asset.Zones[l.Zone].Name, o.Asset.Ahead()[l.Docking].Date
		switch l.Criterion {
		case renewal.OnQuay:
			all = append(all, fmt.Sprintf("%s lacks %d of %s on %s", zone, l.Pieces, l.Pattern, date))
		case renewal.OfPieces:
			all = append(all, fmt.Sprintf("on %s %d pieces more than may be fitted are needed, most of all by %s", date, l.Pieces, zone))
		case renewal.OfBudget:
			all = append(all, fmt.Sprintf("on %s the budget is short by %.0f, most of all for %s", date, math.Ceil(l.Money), zone))
		case renewal.OfPatterns:
			all = append(all, fmt.Sprintf("on %s %d more patterns have to be ordered, one of them for %s", date, l.Patterns, zone))
		}
	}
	return strings.Join(all, "; ")
}

// LimitTexts says which limits the plan keeps to, a line each.
func (o *Outcome) LimitTexts() (all []string) {
	l := o.Limits
	if l.Pieces > 0 {
		all = append(all, fmt.Sprintf("at most %d pieces fitted at a docking", l.Pieces))
	}
	if l.Budget > 0 {
		all = append(all, fmt.Sprintf("at most %.0f %s spent at a docking, undiscounted", l.Budget, o.Asset.Currency))
	}
	if l.Patterns > 0 {
		all = append(all, fmt.Sprintf("at most %d patterns ordered for a docking", l.Patterns))
	}
	if o.Quay == nil || len(o.Asset.Ahead()) == 0 {
		return all
	}
	var on []string
	for _, p := range o.Asset.Patterns {
		if n := o.Quay[p.ID]; n > 0 {
			on = append(on, fmt.Sprintf("%d × %s", n, p.ID))
		}
	}
	if len(on) == 0 {
		on = append(on, "nothing")
	}
	return append(all, fmt.Sprintf("on %s only what lies on the quay: %s", o.Asset.Ahead()[0].Date, strings.Join(on, " + ")))
}

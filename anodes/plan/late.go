package plan

import (
	"fmt"
	"math"
	"strings"

	"anodewright/anodes/order"
	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// Late is an order that should have been out, with what is next best.
type Late struct {
	order.Line
	// Before is how many days before the docking the pieces come if they are
	// ordered today; below 0: too late.
	Before  int
	Instead *Instead // a pattern in time for the docking; nil: there is none
	PutOff  *PutOff  // leaving the anodes of this docking alone; nil: it is the last
}

// Instead is another pattern that can be had in time.
type Instead struct {
	Pattern   *hull.Pattern
	Pieces    int
	FromStock int       // of pieces and spares
	OrderBy   hull.Date // of what is not in stock
	More      float64   // money for pieces and fitting beyond what is planned, undiscounted
}

// PutOff is a docking at which nothing is done with anodes.
type PutOff struct {
	To   hull.Date // the next docking
	More float64   // what the cheapest plan then costs more, discounted; +Inf: see Why
	Why  string    // why it cannot be done
}

// LateOrders returns the orders that are late for dockings still to come.
func LateOrders(o *Outcome) []Late {
	var late []Late
	off := map[hull.Date]*PutOff{}
	for _, l := range o.Order {
		if l.LateDays == 0 || l.Docking < o.Today {
			continue
		}
		if _, known := off[l.Docking]; !known {
			off[l.Docking] = o.putOff(l.Docking)
		}
		before := order.By(l.Docking, l.Pattern.LeadWeeks, 0) - o.Today
		late = append(late, Late{l, int(before), o.instead(l), off[l.Docking]})
	}
	return late
}

// instead finds the cheapest pattern that every zone of a late line may have
// in its place and that is in stock or can still be ordered.
func (o *Outcome) instead(l order.Line) *Instead {
	a := o.Asset
	stock := order.InStock(a)
	for _, x := range o.Order {
		stock[x.Pattern.ID] -= x.FromStock
	}
	docking := o.dockingOn(l.Docking)
	p := o.problem()
	var best *Instead
	for i := range a.Patterns {
		other := &a.Patterns[i]
		if other == l.Pattern {
			continue
		}
		pieces, ok := o.piecesInstead(p, docking, l.Pattern, other)
		if !ok {
			continue
		}
		n := pieces + order.Spares(a, other, pieces)
		x := &Instead{
			Pattern: other, Pieces: pieces, FromStock: min(stock[other.ID], n), OrderBy: order.By(l.Docking, other.LeadWeeks, a.Costs.FloatWeeks),
			More: float64(pieces)*fitted(a, other) - float64(l.Pieces)*fitted(a, l.Pattern),
		}
		if x.FromStock < n && x.OrderBy < o.Today {
			continue
		}
		if best == nil || x.More < best.More {
			best = x
		}
	}
	return best
}

// piecesInstead is how many pieces of another pattern the actions of a docking
// take in place of one, and whether all of them may.
func (o *Outcome) piecesInstead(p renewal.Problem, docking int, planned, other *hull.Pattern) (int, bool) {
	pieces := 0
	for _, l := range o.Schedule {
		if l.Docking != docking || l.Action == renewal.Keep || l.Pattern != planned {
			continue
		}
		factor := o.Zones[l.Zone].Factor.Used
		n, ok := p.Asker(l.Zone, o.Schedule).Instead(docking, other, factor, o.keepsAt(l.Zone, factor))
		if !ok {
			return 0, false
		}
		pieces += n
	}
	return pieces, pieces > 0
}

// putOff plans without anything being done at a docking; nil where none
// follows.
func (o *Outcome) putOff(date hull.Date) *PutOff {
	ahead := o.Asset.Ahead()
	docking := o.dockingOn(date)
	if docking < 0 || docking+1 >= len(ahead) {
		return nil
	}
	off := &PutOff{To: ahead[docking+1].Date, More: math.Inf(1)}
	p := o.problem()
	p.Closed, p.Pins = []int{docking}, nil
	r := p.Solve()
	switch {
	case !math.IsInf(r.Best.Total, 1):
		off.More = r.Best.Total - o.Money.Total
	case o.Limits == (renewal.Limits{}):
		off.Why = "what is fitted does not hold every zone until then"
	default:
		off.Why = "no plan without this docking is within the limits"
	}
	return off
}

// dockingOn is the place of a date among the dockings ahead, -1 where it has
// none.
func (o *Outcome) dockingOn(date hull.Date) int {
	for k, d := range o.Asset.Ahead() {
		if d.Date == date {
			return k
		}
	}
	return -1
}

// fitted is the price of a piece and of fitting it.
func fitted(a *hull.Asset, p *hull.Pattern) float64 {
	if p.FitPerPiece != nil {
		return p.Price + *p.FitPerPiece
	}
	return p.Price + a.Costs.FitPerPiece
}

// NextBest says in words what is next best for a late order.
func (l Late) NextBest(a *hull.Asset) []string {
	var all []string
	if l.Before >= 0 {
		all = append(all, fmt.Sprintf("ordered today it still comes %d days before the docking, out of the float", l.Before))
	}
	switch in := l.Instead; {
	case in == nil:
		all = append(all, "no other pattern that all its zones may have comes in time")
	case in.FromStock >= in.Pieces:
		all = append(all, fmt.Sprintf("%d pieces of %s instead, which lie in stock: %s", in.Pieces, in.Pattern.ID, moreMoney(in.More, a.Currency)))
	default:
		all = append(all, fmt.Sprintf("%d pieces of %s instead, to be ordered by %s: %s", in.Pieces, in.Pattern.ID, in.OrderBy, moreMoney(in.More, a.Currency)))
	}
	switch off := l.PutOff; {
	case off == nil:
	case off.Why != "":
		all = append(all, fmt.Sprintf("not to be put off to %s: %s", off.To, off.Why))
	default:
		all = append(all, fmt.Sprintf("leave the anodes alone until %s: %s", off.To, moreMoney(off.More, a.Currency)))
	}
	return all
}

// moreMoney is a difference of cost in words.
func moreMoney(x float64, currency string) string {
	word := "more"
	if x < 0 {
		word = "less"
	}
	return strings.Join(strings.Fields(fmt.Sprintf("%.0f %s %s", math.Abs(x), currency, word)), " ")
}

// Package order turns a plan into what has to be bought: one line a docking
// and pattern, with spares, what lies in stock, freight, and the date by which
// the order must be out; how much of an uncertain need to buy before anyone
// has seen the old anodes; and the orders of a whole fleet by month.
//
// Masses are kg, money is in the asset's currency and not discounted, lead
// times are weeks.
package order

import (
	"math"

	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// SpareShare is the share of spare pieces ordered with a set, rounded up,
// where the asset says nothing else: common practice, no source.
const SpareShare = 0.05

// Line is one pattern to order for one docking.
type Line struct {
	Docking   hull.Date
	Pattern   *hull.Pattern
	Pieces    int // that the plan fits
	Spares    int
	FromStock int     // of pieces and spares
	Ordered   int     // to be bought, up to the pattern's order multiple
	Net       float64 // kg of what is bought
	Gross     float64 // kg, likewise
	Price     float64 // of what is bought, undiscounted
	Freight   float64 // of what is bought, by its gross mass
	OrderBy   hull.Date
	LateDays  int // that the order-by date lies before today; 0 if not late
}

// Lines returns the order lines of a plan's actions by docking and pattern, in
// the order of dockings and of the asset's patterns. Stock serves the first
// docking that needs it.
func Lines(a *hull.Asset, plan []renewal.Line, today hull.Date) []Line {
	stock := InStock(a)
	var lines []Line
	for _, d := range a.Ahead() {
		for i := range a.Patterns {
			p := &a.Patterns[i]
			n := 0
			for _, l := range plan {
				if l.Action != renewal.Keep && l.Date == d.Date && l.Pattern.ID == p.ID {
					n += l.Count
				}
			}
			if n == 0 {
				continue
			}
			l := Line{Docking: d.Date, Pattern: p, Pieces: n, OrderBy: By(d.Date, p.LeadWeeks, a.Costs.FloatWeeks)}
			l.Spares = Spares(a, p, n)
			l.FromStock = min(stock[p.ID], n+l.Spares)
			stock[p.ID] -= l.FromStock
			l.Ordered = upTo(n+l.Spares-l.FromStock, p.OrderMultiple)
			l.Net = float64(l.Ordered) * p.NetMass
			l.Gross = float64(l.Ordered) * p.Gross()
			l.Price = float64(l.Ordered) * p.Price
			l.Freight = l.Gross * a.Costs.FreightPerKg
			if l.Ordered > 0 && l.OrderBy < today {
				l.LateDays = int(today - l.OrderBy)
			}
			lines = append(lines, l)
		}
	}
	return lines
}

// InStock returns how many pieces of each pattern lie in stock, by its id.
func InStock(a *hull.Asset) map[string]int {
	stock := map[string]int{}
	for _, s := range a.Stock {
		stock[s.Pattern] += s.Count
	}
	return stock
}

// Spares returns how many spares go with n pieces of a pattern at a docking:
// the pattern's own count or share, else the asset's share.
func Spares(a *hull.Asset, p *hull.Pattern, n int) int {
	if p.SpareCount != nil {
		return *p.SpareCount
	}
	return int(math.Ceil(ShareOfSpares(a, p)*float64(n) - 1e-9))
}

// ShareOfSpares is the share of the pieces that a pattern without a count of
// its own is ordered more.
func ShareOfSpares(a *hull.Asset, p *hull.Pattern) float64 {
	switch {
	case p != nil && p.SpareShare != nil:
		return *p.SpareShare
	case a.Costs.SpareShare != nil:
		return *a.Costs.SpareShare
	}
	return SpareShare
}

// Total is what all that is bought for one docking comes to.
type Total struct {
	Docking                           hull.Date
	Pieces, Spares, FromStock, Bought int
	Net, Gross, Price                 float64
	Freight                           float64   // by mass, and once for the order
	OrderBy                           hull.Date // of the first of its lines that buys something; 0: none does
	LateDays                          int       // of the latest of its lines
}

// Totals adds lines up by docking, in their order. What the freight of an
// order costs beside its mass is paid once a docking for which something is
// bought.
func Totals(a *hull.Asset, lines []Line) []Total {
	var all []Total
	for _, l := range lines {
		if len(all) == 0 || all[len(all)-1].Docking != l.Docking {
			all = append(all, Total{Docking: l.Docking})
		}
		t := &all[len(all)-1]
		if l.Ordered > 0 {
			if t.Bought == 0 {
				t.Freight += a.Costs.FreightPerOrder
			}
			if t.OrderBy.IsZero() || l.OrderBy < t.OrderBy {
				t.OrderBy = l.OrderBy
			}
		}
		t.add(l.Pieces, l.Spares, l.FromStock, l.Ordered, l.Net, l.Gross, l.Price, l.Freight)
		t.LateDays = max(t.LateDays, l.LateDays)
	}
	return all
}

// Sum adds totals of dockings up to one, without a docking of its own.
func Sum(all []Total) Total {
	var sum Total
	for _, t := range all {
		sum.add(t.Pieces, t.Spares, t.FromStock, t.Bought, t.Net, t.Gross, t.Price, t.Freight)
	}
	return sum
}

func (t *Total) add(pieces, spares, stock, bought int, net, gross, price, freight float64) {
	t.Pieces, t.Spares, t.FromStock, t.Bought = t.Pieces+pieces, t.Spares+spares, t.FromStock+stock, t.Bought+bought
	t.Net, t.Gross, t.Price, t.Freight = t.Net+net, t.Gross+gross, t.Price+price, t.Freight+freight
}

// By returns the last date to order for a docking: the docking less lead time
// and float, in weeks.
func By(docking hull.Date, leadWeeks, floatWeeks float64) hull.Date {
	return docking - hull.Date(math.Ceil(7*(leadWeeks+floatWeeks)))
}

// upTo raises n to a multiple.
func upTo(n, multiple int) int { return (n + multiple - 1) / multiple * multiple }

// Package order turns a plan into what has to be bought: one line a docking
// and pattern, with spares, what lies in stock, and the date by which the
// order must be out.
package order

import (
	"math"

	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// SpareShare is the share of spare pieces ordered with a set, rounded up:
// common practice, no source.
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
	OrderBy   hull.Date
	LateDays  int // that the order-by date lies before today; 0 if not late
}

// Lines returns the order lines of a plan's actions by docking and pattern, in
// the order of dockings and of the asset's patterns. Stock serves the first
// docking that needs it.
func Lines(a *hull.Asset, plan []renewal.Line, today hull.Date) []Line {
	stock := map[string]int{}
	for _, s := range a.Stock {
		stock[s.Pattern] += s.Count
	}
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
			l.Spares = int(math.Ceil(SpareShare * float64(n)))
			l.FromStock = min(stock[p.ID], n+l.Spares)
			stock[p.ID] -= l.FromStock
			l.Ordered = upTo(n+l.Spares-l.FromStock, p.OrderMultiple)
			l.Net = float64(l.Ordered) * p.NetMass
			l.Gross = float64(l.Ordered) * p.Gross()
			l.Price = float64(l.Ordered) * p.Price
			if l.Ordered > 0 && l.OrderBy < today {
				l.LateDays = int(today - l.OrderBy)
			}
			lines = append(lines, l)
		}
	}
	return lines
}

// By returns the last date to order for a docking: the docking less lead time
// and float, in weeks.
func By(docking hull.Date, leadWeeks, floatWeeks float64) hull.Date {
	return docking - hull.Date(math.Ceil(7*(leadWeeks+floatWeeks)))
}

func upTo(n, multiple int) int { return (n + multiple - 1) / multiple * multiple }

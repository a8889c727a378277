package workbook

import (
	"fmt"
	"slices"
	"strconv"

	"anodewright/anodes"
	"anodewright/anodes/order"
	"anodewright/hull"
)

// order writes what has to be bought, one line a docking and pattern.
func (b *book) order() {
	s := b.sheet("Order", "anodes to order", 18)
	s.line(lead, fmt.Sprintf("Spares are %s of the pieces, rounded up. Stock serves the first docking that needs it. Prices are not discounted.", percentWords(order.SpareShare)))
	if len(b.o.Unmet) > 0 {
		s.line(warning, "Zones that cannot be held are not in this order; see the sheet Schedule.")
	}
	head := s.header(
		column{head: "Order by", format: date}, column{head: "Late", format: late, most: 20}, column{head: "Docking", format: date},
		column{head: "Item no", most: 20}, column{head: "Pattern", most: 20}, column{head: "Name", most: 30},
		column{head: "Alloy", most: 18}, column{head: "Fixing", most: 22},
		column{head: "Pieces", format: whole}, column{head: "Spares", format: whole}, column{head: "From stock", format: whole}, column{head: "To buy", format: whole},
		column{head: "Net mass, kg", format: one}, column{head: "Gross mass, kg", format: one},
		column{head: b.money("Unit price"), format: two}, column{head: b.money("Price"), format: two},
		column{head: "Specification", most: 40}, column{head: "Certificate", most: 20},
	)
	const toBuy, unitPrice = 11, 14
	first := s.next
	sums := map[int]float64{8: 0, 9: 0, 10: 0, toBuy: 0, 12: 0, 13: 0, 15: 0}
	calc := b.cells.calc
	served := make([][]num, len(b.a.Patterns)) // from stock, by the lines above
	for _, l := range b.o.Order {
		p := l.Pattern
		k := b.patternIndex(p.ID)
		in, more := b.cells.patterns[k], calc.patterns[k]
		cell := func(col int, v float64) num { return s.ref(col, s.next, v) }
		pieces, spares, stock, buy := cell(8, float64(l.Pieces)), cell(9, float64(l.Spares)), cell(10, float64(l.FromStock)), cell(toBuy, float64(l.Ordered))
		docking := slices.IndexFunc(b.a.Ahead(), func(d hull.Docking) bool { return d.Date == l.Docking })
		s.row(l.OrderBy, b.late(l), l.Docking, p.ItemNo, p.ID, p.Name, alloyWords(p.Alloy), p.Fixing,
			s.formed(pieces.v, "SUMIFS(#1,#2,"+strconv.Itoa(docking+1)+",#3,"+strconv.Itoa(k+1)+")", calc.counts, calc.dockingNumbers, calc.patternNumbers),
			s.formed(spares.v, "ROUNDUP(#1*#2,0)", b.figure("Spare_share"), pieces),
			s.formed(stock.v, "MIN(#1-#2,#3+#4)", more.stock, plus(served[k]), pieces, spares),
			s.formed(buy.v, "ROUNDUP((#1+#2-#3)/#4,0)*#4", pieces, spares, stock, more.multiple),
			s.formed(l.Net, "#1*#2", buy, in.net), s.formed(l.Gross, "#1*#2", buy, in.gross), in.price.live(),
			live{at(toBuy, s.next) + "*" + at(unitPrice, s.next), l.Price}, anodes.SpecificationText(p), p.Certificate)
		served[k] = append(served[k], stock)
		for c, v := range map[int]float64{
			8: float64(l.Pieces), 9: float64(l.Spares), 10: float64(l.FromStock), toBuy: float64(l.Ordered), 12: l.Net, 13: l.Gross, 15: l.Price,
		} {
			sums[c] += v
		}
	}
	if s.next == first {
		s.line(lead, "Nothing has to be ordered.")
	} else {
		s.totals("Total", first, sums)
		s.overTheMost()
	}
	s.finish(page{frozenRows: head, frozenCols: 1, firstTitle: head, lastTitle: head})
}

// overTheMost says under the order whether it is for more pieces than the zones
// may carry, as an order can become when inputs are changed.
func (s *sheet) overTheMost() {
	var over []num
	for _, a := range s.cells.calc.actions {
		if a.over.at != "" {
			over = append(over, a.over)
		}
	}
	if len(over) == 0 {
		return
	}
	sum := plus(over)
	s.put(0, s.next, sum.live(), style{look: figure, format: carried})
	s.check(s.f.MergeCell(s.name, at(0, s.next), at(7, s.next)))
	s.next++
	s.flag(0, s.next-1)
}

// late returns the days that an order is late, or why it is not.
func (b *book) late(l order.Line) any {
	switch {
	case l.Ordered == 0:
		return "nothing to buy"
	case l.Docking < b.o.Today:
		return "docking is past"
	}
	return l.LateDays
}

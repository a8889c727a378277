package workbook

import (
	"slices"
	"strconv"

	"anodewright/anodes"
	"anodewright/anodes/order"
	"anodewright/hull"
)

// The columns of an order.
const (
	orderDocking  = 2
	orderPieces   = 8
	orderShare    = 9
	orderSpares   = 10
	orderStock    = 11
	orderToBuy    = 12
	orderNet      = 13
	orderGross    = 14
	orderUnit     = 15
	orderPrice    = 16
	orderFreight  = 17
	orderLastText = 19
)

// order writes what has to be bought, one line a docking and pattern, then by
// docking, what is next best of what is late, and the staged purchase.
func (b *book) order() {
	s := b.sheet("Order", "anodes to order", orderLastText+1)
	s.line(lead, "Spares are a share of the pieces, rounded up, or a count of the pattern's own. Stock serves the first docking that needs it. To buy: what is left of pieces and spares, rounded up to how the pattern is bought. Prices are not discounted; freight stands apart.")
	if len(b.o.Unmet) > 0 {
		s.line(warning, "Zones that cannot be held are not in this order; see the sheet Schedule.")
	}
	s.lateOrders()
	head := s.header(
		column{head: "Order by", format: date}, column{head: "Late", format: late, most: 20}, column{head: "Docking", format: date},
		column{head: "Item no", most: 20}, column{head: "Pattern", most: 20}, column{head: "Name", most: 30},
		column{head: "Alloy", most: 18}, column{head: "Fixing", most: 22},
		column{head: "Pieces", format: whole}, column{head: "Spares, share", format: percent}, column{head: "Spares", format: whole},
		column{head: "From stock", format: whole}, column{head: "To buy", format: whole},
		column{head: "Net mass, kg", format: one}, column{head: "Gross mass, kg", format: one},
		column{head: b.money("Unit price"), format: two}, column{head: b.money("Price"), format: two}, column{head: b.money("Freight by mass"), format: two},
		column{head: "Specification", most: 40}, column{head: "Certificate", most: 20},
	)
	first := s.next
	sums := map[int]float64{}
	calc := b.cells.calc
	served := make([][]num, len(b.a.Patterns)) // from stock, by the lines above
	for _, l := range b.o.Order {
		p := l.Pattern
		k := b.patternIndex(p.ID)
		in, more := b.cells.patterns[k], calc.patterns[k]
		cell := func(col int, v float64) num { return s.ref(col, s.next, v) }
		pieces, spares, stock, buy := cell(orderPieces, float64(l.Pieces)), cell(orderSpares, float64(l.Spares)), cell(orderStock, float64(l.FromStock)), cell(orderToBuy, float64(l.Ordered))
		gross := cell(orderGross, l.Gross)
		docking := slices.IndexFunc(b.a.Ahead(), func(d hull.Docking) bool { return d.Date == l.Docking })
		share, count := s.sparesCells(l, pieces, spares)
		s.row(l.OrderBy, b.late(l), l.Docking, p.ItemNo, p.ID, p.Name, alloyWords(p.Alloy), p.Fixing,
			s.formed(pieces.v, "SUMIFS(#1,#2,"+strconv.Itoa(docking+1)+",#3,"+strconv.Itoa(k+1)+")", calc.counts, calc.dockingNumbers, calc.patternNumbers),
			share, count,
			s.formed(stock.v, "MIN(#1-#2,#3+#4)", more.stock, plus(served[k]), pieces, spares),
			s.formed(buy.v, "ROUNDUP((#1+#2-#3)/#4,0)*#4", pieces, spares, stock, more.multiple),
			s.formed(l.Net, "#1*#2", buy, in.net), s.formed(l.Gross, "#1*#2", buy, in.gross), in.price.live(),
			live{at(orderToBuy, s.next) + "*" + at(orderUnit, s.next), l.Price},
			s.formed(l.Freight, "#1*#2", gross, b.figure("Freight_per_kg")), anodes.SpecificationText(p), p.Certificate)
		served[k] = append(served[k], stock)
		for c, v := range map[int]float64{
			orderPieces: float64(l.Pieces), orderSpares: float64(l.Spares), orderStock: float64(l.FromStock), orderToBuy: float64(l.Ordered),
			orderNet: l.Net, orderGross: l.Gross, orderPrice: l.Price, orderFreight: l.Freight,
		} {
			sums[c] += v
		}
	}
	if s.next == first {
		s.line(lead, "Nothing has to be ordered.")
	} else {
		last := s.next - 1
		s.totals("Total", first, sums)
		s.overTheMost()
		s.byDocking(first, last)
	}
	s.staged()
	s.finish(page{frozenRows: head, frozenCols: 1, firstTitle: head, lastTitle: head})
}

// sparesCells are the share of spares of a line and their count: the share of
// the basis or of the pattern, or a count that the pattern states.
func (s *sheet) sparesCells(l order.Line, pieces, spares num) (share, count any) {
	switch p := l.Pattern; {
	case p.SpareCount != nil:
		return nil, input{*p.SpareCount}
	case p.SpareShare != nil:
		share = input{*p.SpareShare}
	default:
		share = s.figure("Spare_share").live()
	}
	// Rounded up, but for a product a hair above a whole number.
	return share, s.formed(spares.v, "0-INT(0.00000001-#1*#2)", s.ref(orderShare, s.next, 0), pieces)
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
	s.merges = append(s.merges, [2]string{at(0, s.next), at(7, s.next)})
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

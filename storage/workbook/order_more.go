package workbook

import (
	"fmt"
	"strings"

	"anodewright/anodes/order"
	"anodewright/anodes/plan"
)

// lateOrders says above the order which lines are late, and what is next best.
func (s *sheet) lateOrders() {
	for _, l := range plan.LateOrders(s.o) {
		days := fmt.Sprintf("%d days", l.LateDays)
		if l.LateDays == 1 {
			days = "1 day"
		}
		s.line(warning, fmt.Sprintf("The order of %d %s for %s is late by %s. Next best: %s.", l.Ordered, l.Pattern.ID, l.Docking, days, strings.Join(l.NextBest(s.a), "; ")))
	}
}

// byDocking adds the lines from first to last up by docking, with the freight
// that is paid once for each.
func (s *sheet) byDocking(first, last int) {
	s.gap()
	s.part()
	s.line(section, "By docking")
	blank := column{}
	s.header(
		column{head: "First order by", format: date}, blank, column{head: "Docking", format: date}, blank, blank, blank, blank, blank,
		column{head: "Pieces", format: whole}, blank, column{head: "Spares", format: whole}, column{head: "From stock", format: whole}, column{head: "To buy", format: whole},
		column{head: "Net mass, kg", format: one}, column{head: "Gross mass, kg", format: one},
		column{head: s.money("Freight of the order"), format: two}, column{head: s.money("Price"), format: two}, column{head: s.money("Freight in all"), format: two},
	)
	from := s.next
	sums := map[int]float64{}
	for _, t := range order.Totals(s.a, s.o.Order) {
		row := s.next
		sum := func(col int, v float64) live {
			sums[col] += v
			return live{fmt.Sprintf("SUMIF(%s:%s,%s,%s:%s)", absolute(orderDocking, first), absolute(orderDocking, last), at(orderDocking, row), absolute(col, first), absolute(col, last)), v}
		}
		once := 0.0
		if t.Bought > 0 {
			once = s.a.Costs.FreightPerOrder
		}
		byMass := sum(orderFreight, t.Freight-once)
		sums[orderUnit] += once
		sums[orderFreight] += once
		var by any
		if !t.OrderBy.IsZero() {
			by = t.OrderBy
		}
		s.row(by, nil, t.Docking, nil, nil, nil, nil, nil,
			sum(orderPieces, float64(t.Pieces)), nil, sum(orderSpares, float64(t.Spares)), sum(orderStock, float64(t.FromStock)), sum(orderToBuy, float64(t.Bought)),
			sum(orderNet, t.Net), sum(orderGross, t.Gross),
			s.formed(once, "MIN(1,#1)*#2", s.ref(orderToBuy, row, float64(t.Bought)), s.figure("Freight_per_order")), sum(orderPrice, t.Price),
			live{at(orderUnit, row) + "+" + byMass.formula, t.Freight})
	}
	s.totals("Total", from, sums)
}

// staged writes how much to order before anyone has seen the old anodes.
func (s *sheet) staged() {
	all := s.o.Staged
	if all == nil {
		all = plan.Stage(s.o)
	}
	if len(all) == 0 {
		return
	}
	s.gap()
	s.part()
	s.line(section, "Staged purchase")
	c := &s.a.Costs
	s.line(lead, fmt.Sprintf("What to order before anyone has seen the old anodes, and what can wait for the dock floor, as computed and without spares. A piece bought in a rush costs %g times its price and freight (our own choice where the asset file says nothing), and %s of the price of one too many comes back. The needs spread as the demand factor does.", order.Rush(c), percentWords(c.Recovered)))
	blank := column{}
	s.header(
		column{head: "Order by", format: date}, blank, column{head: "Docking", format: date}, column{head: "Item no", most: 20}, column{head: "Pattern", most: 20}, column{head: "Name", most: 30},
		column{head: "Alloy", most: 18}, blank,
		column{head: "Planned", format: whole}, column{head: "To have is enough with", format: percent}, column{head: "Needed with 95 %", format: whole},
		column{head: "To have then", format: whole}, column{head: "Order now", format: whole}, column{head: "Can wait", format: whole}, column{head: "From stock", format: whole},
		column{head: s.money("One too many"), format: two}, column{head: s.money("One too few"), format: two}, column{head: s.money("Expected loss"), format: two},
		column{head: "Set too worn to be kept or added to", format: text, most: 40},
	)
	for _, x := range all {
		worn := ""
		if x.Worn >= 0.01 {
			worn = fmt.Sprintf("with %.0f %%; then the whole set is renewed", 100*x.Worn)
		}
		p := x.Pattern
		s.row(x.OrderBy, nil, x.Docking, p.ItemNo, p.ID, p.Name, alloyWords(p.Alloy), nil, x.Planned, x.Enough(), x.Surely, x.Now, x.Ordered, x.Wait(), x.FromStock,
			x.Wrong.TooMany, x.Wrong.TooFew, x.Expected, worn)
	}
}

package workbook

import (
	"fmt"

	"anodewright/anodes/renewal"
)

// money writes what the plan costs, docking by docking, and what the two
// simple rules would.
func (b *book) moneySheet() {
	s := b.sheet("Money", "money", 10)
	rate := "not discounted"
	if b.a.Costs.DiscountRate > 0 {
		rate = fmt.Sprintf("discounted to %s at %s a year", b.a.Start(), percentWords(b.a.Costs.DiscountRate))
	}
	s.line(lead, "All sums "+rate+". Coating works, spares and what is left at the horizon are not counted. Costs of the plan follow the inputs of this workbook; the simple rules are as computed.")
	if len(b.o.Unmet) > 0 {
		s.line(warning, "Zones that cannot be held are not in these sums; see the sheet Schedule.")
	}
	head := s.header(column{head: "Docking", format: date}, column{head: "Kind", most: 16}, column{head: "Zones worked on", format: whole},
		column{head: "Pieces on", format: whole}, column{head: "Pieces off", format: whole},
		column{head: b.money("Pieces, fitting, access"), format: whole, most: 20}, column{head: b.money("Shared"), format: whole, most: 16}, column{head: b.money("Docking"), format: whole, most: 16},
		column{head: "Share of all", format: percent}, column{head: b.money("So far"), format: whole, most: 16})
	first := s.next
	sums := map[int]float64{2: 0, 3: 0, 4: 0, 5: 0, 6: 0, 7: 0}
	c := b.cells.calc
	var costs []float64
	for k, d := range b.a.Ahead() {
		var on, off, cost []num
		zones := 0
		for i, l := range b.o.Schedule {
			if l.Docking == k && l.Action != renewal.Keep {
				zones++
				on, off, cost = append(on, c.actions[i].count), append(off, c.actions[i].off), append(cost, c.actions[i].cost)
			}
		}
		shared := num{at: "0"}
		if k < len(c.dockings) {
			shared = c.dockings[k].shared
		}
		row := s.next
		p, q, m := plus(on), plus(off), plus(cost)
		sums[2] += float64(zones)
		for col, n := range map[int]num{3: p, 4: q, 5: m, 6: shared} {
			sums[col] += n.v
		}
		sums[7] += m.v + shared.v
		costs = append(costs, m.v+shared.v)
		s.row(d.Date, plain(d.Kind), zones, p.live(), q.live(), m.live(), shared.live(), live{at(5, row) + "+" + at(6, row), m.v + shared.v}, nil,
			live{fmt.Sprintf("SUM(H$%d:%s)", first, at(7, row)), sums[7]})
	}
	if s.next == first {
		s.line(lead, "There is no docking ahead.")
	} else {
		s.totals("Total", first, sums)
		s.shares(first, costs)
	}
	s.rules(s.ref(7, s.next-1, b.o.Money.Total), s.next > first)
	s.finish(page{frozenRows: head, frozenCols: 1, firstTitle: head, lastTitle: head})
}

// shares writes each docking's part of the total, where there is one.
func (s *sheet) shares(first int, costs []float64) {
	total := s.next - 1
	if s.o.Money.Total <= 0 {
		return
	}
	for k, cost := range costs {
		share := live{fmt.Sprintf("IF(H$%d>0,%s/H$%d,0)", total, at(7, first+k), total), cost / s.o.Money.Total}
		s.put(8, first+k, share, style{look: body, format: percent})
	}
}

// rules compares the plan with the two simple rules.
func (s *sheet) rules(total num, planned bool) {
	s.gap()
	s.part()
	s.line(section, "Against simple rules")
	s.header(column{head: "Rule", most: 34}, column{head: s.money("Cost"), format: whole, most: 16}, column{head: s.money("The plan saves"), format: whole, most: 16}, column{head: "Of the rule", format: percent})
	m := s.o.Money
	plan := any(m.Total)
	if planned {
		plan = total.live()
	}
	s.row("This plan", plan)
	if known(m.LowerBound) {
		s.row("Lower bound: no plan can cost less", m.LowerBound)
	}
	for _, r := range []struct {
		name string
		cost float64
	}{{"Renew all at every docking", m.RenewAll}, {"Renew as late as possible", m.AsLate}} {
		if !known(r.cost) {
			s.row(r.name, "not possible")
			continue
		}
		row := s.next
		values := []any{r.name, r.cost, s.formed(r.cost-m.Total, at(1, row)+"-#1", total)}
		if r.cost > 0 {
			values = append(values, live{at(2, row) + "/" + at(1, row), (r.cost - m.Total) / r.cost})
		}
		s.row(values...)
	}
}

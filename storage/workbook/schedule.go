package workbook

import (
	"fmt"
	"math"
	"slices"

	"github.com/xuri/excelize/v2"

	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// zonesPerPage is how many zones of the matrix are printed under one heading,
// zonesFirst how many below the particulars where not all find room.
const zonesPerPage, zonesFirst = 24, 16

// schedule writes what is done to which zone at which docking: as a matrix,
// and as a list with masses and costs.
func (b *book) schedule() {
	ahead := b.a.Ahead()
	s := b.sheet("Schedule", "anode schedule", max(14, 2+len(ahead)))
	total := s.particulars()
	if len(b.o.Unmet) > 0 {
		s.gap()
		s.line(section, "Zones that cannot be held")
		for _, u := range b.o.Unmet {
			s.line(warning, b.unmet(u))
		}
	}
	s.gap()
	s.matrix(ahead)
	s.pieceMatrix(ahead)
	s.gap()
	s.part()
	head := s.list(ahead)
	if s.cells.cost.at != "" {
		s.settle()
		s.replace(total, s.cells.cost.at)
	}
	s.finish(page{frozenRows: 1, frozenCols: 2, firstTitle: head, lastTitle: head})
}

// particulars writes which asset this is, as of when, and what it costs. It
// returns the cell of the cost.
func (s *sheet) particulars() (total num) {
	o, a := s.o, s.a
	s.columns = []column{{most: 30}, {most: 24}}
	fact := func(name string, v any, f format, note string) {
		s.cell(0, s.next, name, style{look: label, format: text})
		if t, ok := v.(string); ok && note == "" {
			s.across(1, 4, s.next, t, figure)
		} else {
			s.cell(1, s.next, v, style{look: figure, format: f})
		}
		if note != "" {
			s.across(2, 7, s.next, note, figure)
		}
		s.next++
	}
	fact("Asset", a.Name, text, "")
	fact("Kind", plain(a.Kind), text, "")
	fact("As of", o.Today, date, "")
	fact("Last docking", a.Start(), date, "")
	fact("Horizon", a.Horizon, date, "")
	worth := ""
	if a.Costs.DiscountRate > 0 {
		worth = fmt.Sprintf("discounted to the last docking at %s a year", percentWords(a.Costs.DiscountRate))
	}
	total = s.ref(1, s.next, o.Money.Total)
	fact(s.money("Cost of this plan"), o.Money.Total, whole, joined("; ", s.proof(), worth))
	const not = "not possible"
	if !o.Money.Proven && known(o.Money.LowerBound) {
		fact(s.money("Lower bound"), o.Money.LowerBound, whole, "no plan can cost less")
	}
	for _, line := range s.o.Under() {
		fact("Planned under", line, text, "")
	}
	fact(s.money("Renew all at every docking"), or(o.Money.RenewAll, not), whole, "a simple rule, for comparison")
	fact(s.money("Renew as late as possible"), or(o.Money.AsLate, not), whole, "a simple rule, for comparison")
	return total
}

// proof says how good the plan is.
func (s *sheet) proof() string {
	switch {
	case len(s.o.Unmet) > 0:
		return "without the zones that cannot be held"
	case s.o.Money.Proven:
		return "proven cheapest"
	case math.IsNaN(s.o.Money.LowerBound):
		return "nothing to plan"
	}
	return "the best plan found, not proven cheapest"
}

// matrix writes zones by dockings.
func (s *sheet) matrix(ahead []hull.Docking) {
	s.line(section, "By zone")
	s.line(lead, "keep: the fitted set stays past this docking. -: nothing to do at this docking.")
	columns := []column{{head: "Zone", most: 24}, {head: "Fitted now", most: 24}}
	for i, d := range ahead {
		columns = append(columns, column{group: fmt.Sprintf("Docking %d, %s", i+1, plain(d.Kind)), format: text, most: 18})
	}
	for i := range s.a.Zones {
		if i == 0 || i >= zonesFirst && (i-zonesFirst)%zonesPerPage == 0 {
			if i > 0 {
				s.part()
			}
			s.header(columns...)
			for k, d := range ahead {
				s.cell(2+k, s.next-1, d.Date, style{look: head, format: date})
			}
		}
		z := &s.a.Zones[i]
		now := s.fittedNow(z)
		if s.held(z) != "" && len(z.Fitted) == 0 {
			now = "-"
		}
		row := []any{s.names[i], now}
		for k := range ahead {
			row = append(row, s.action(i, k))
		}
		s.row(row...)
	}
}

// overListed is the column of the list with the pieces over a zone's most.
const overListed = 12

// limited reports whether any action may fit no more than so many pieces.
func (b *book) limited() bool {
	return slices.ContainsFunc(b.cells.calc.actions, func(a calcAction) bool { return a.over.at != "" })
}

// flag puts a colour behind the words of a column where a limit is passed,
// from a row on.
func (s *sheet) flag(col, first int) {
	if s.next == first {
		return
	}
	id, err := s.f.NewConditionalStyle(&excelize.Style{Font: &excelize.Font{Bold: true, Color: fault}, Fill: excelize.Fill{Type: "pattern", Pattern: 1, Color: []string{faultPale}}})
	s.check(err)
	s.check(s.f.SetConditionalFormat(s.name, at(col, first)+":"+at(col, s.next-1),
		[]excelize.ConditionalFormatOptions{{Type: "cell", Criteria: ">", Value: "0", Format: &id}}))
}

// list writes the actions with their masses and costs, the cost that a
// docking's actions share on a line of its own, and returns the heading's row.
func (s *sheet) list(ahead []hull.Docking) int {
	s.line(section, "By docking")
	columns := []column{
		{head: "Docking", format: date}, {head: "Zone", most: 24}, {head: "Action", most: 18}, {head: "Pattern", most: 22},
		{head: "Pieces to fit", format: whole}, {head: "Pieces that stay", format: whole}, {head: "Pieces taken off", format: whole},
		{head: "Net mass to fit, kg", format: one}, {head: "Gross mass to fit, kg", format: one},
		{head: "Count governed by", most: 16}, {head: "Lasts until", format: date}, {head: s.money("Cost"), format: whole},
	}
	limited := s.limited()
	if limited {
		columns = append(columns, column{head: "Of the zone's most", format: limit})
	}
	fitted := len(columns)
	if len(s.cells.calc.stays) > 0 {
		columns = append(columns, column{head: "The fitted set", format: stay})
	}
	head := s.header(columns...)
	first := s.next
	sums := map[int]float64{4: 0, 6: 0, 7: 0, 8: 0, 11: 0}
	for k, d := range ahead {
		worked := false
		for i, l := range s.o.Schedule {
			if l.Docking != k {
				continue
			}
			row := []any{l.Date, s.names[l.Zone], string(l.Action), patternName(l.Pattern), nil, nil, nil, nil, nil, s.governs(l.Governs), l.Until, l.Cost}
			if l.Action == renewal.Keep {
				row[5], row[11] = l.Count, some(l.Cost)
			} else {
				worked = true
				n := float64(l.Count)
				cells, p := s.cells.calc.actions[i], s.cells.patterns[s.patternIndex(l.Pattern.ID)]
				row[4], row[6], row[11] = cells.count.live(), cells.off.live(), cells.cost.live()
				row[7] = s.formed(n*l.Pattern.NetMass, "#1*#2", cells.count, p.net)
				row[8] = s.formed(n*l.Pattern.Gross(), "#1*#2", cells.count, p.gross)
				if cells.over.at != "" {
					row = append(row, cells.over.live())
				}
				sums[4] += n
				sums[6] += float64(l.Removed)
				sums[7] += n * l.Pattern.NetMass
				sums[8] += n * l.Pattern.Gross()
			}
			sums[11] += l.Cost
			if cell, ok := s.cells.calc.stays[i]; ok {
				row = append(row, make([]any, fitted-len(row))...)
				row = append(row, cell.live())
			}
			s.row(row...)
		}
		if worked && k < len(s.o.Money.Docking) {
			what := "shared cost"
			if d.Kind == hull.Campaign {
				what = "campaign cost"
			}
			s.row(d.Date, "all zones worked on", what, nil, nil, nil, nil, nil, nil, nil, nil, s.cells.calc.dockings[k].shared.live())
			sums[11] += s.o.Money.Docking[k]
		}
	}
	if s.next == first {
		why := "no zone can be held by anodes of its own"
		if len(ahead) == 0 {
			why = "there is no docking ahead"
		}
		s.line(lead, "Nothing is planned: "+why+".")
		return head
	}
	s.totals("Total", first, sums)
	if limited {
		s.flag(overListed, first)
	}
	if len(s.cells.calc.stays) > 0 {
		s.flag(fitted, first)
	}
	s.cells.cost = s.ref(11, s.next-1, s.o.Money.Total)
	return head
}

// pieceMatrix writes the pieces to fit by zone and docking, with totals.
func (s *sheet) pieceMatrix(ahead []hull.Docking) {
	if s.fitting(len(s.o.Schedule)) == 0 {
		return
	}
	s.gap()
	s.part()
	s.line(section, "Pieces to fit")
	s.line(lead, "These counts, the list below, the order and the money follow the inputs of this workbook; the words above are the plan as issued.")
	columns := []column{{head: "Zone", most: 24}}
	for i, d := range ahead {
		columns = append(columns, column{head: fmt.Sprintf("%d: %s", i+1, d.Date), format: whole, most: 18})
	}
	columns = append(columns, column{head: "Total", format: whole})
	s.header(columns...)
	first, rows := s.next, 0
	sums := map[int]float64{1 + len(ahead): 0}
	for zone := range s.a.Zones {
		row := make([]any, len(columns))
		row[0] = s.names[zone]
		sum := 0.0
		for i, l := range s.o.Schedule {
			if l.Zone == zone && fits(l) {
				row[1+l.Docking] = s.cells.calc.actions[i].count.live()
				sums[1+l.Docking] += float64(l.Count)
				sum += float64(l.Count)
			}
		}
		if sum == 0 {
			continue
		}
		if rows++; rows > zonesPerPage && rows%zonesPerPage == 1 {
			s.part()
			s.header(columns...)
		}
		row[len(row)-1] = live{fmt.Sprintf("SUM(%s:%s)", at(1, s.next), at(len(ahead), s.next)), sum}
		sums[len(row)-1] += sum
		s.row(row...)
	}
	s.totals("Total", first, sums)
}

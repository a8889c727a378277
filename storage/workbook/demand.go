package workbook

import (
	"strings"

	"anodewright/anodes/plan"
	"anodewright/hull"
)

// stateFills are pale forms of the program's colours of the states.
var stateFills = []struct {
	state plan.State
	fill  string
}{{plan.Sound, "D6E9EB"}, {plan.Thin, "F6E3B8"}, {plan.Short, "EBC9D8"}, {plan.Spent, "D5D1CB"}}

// demand writes the current demand of every zone in every interval, and what
// its anodes give at the interval's end.
func (b *book) demand() {
	s := b.sheet("Demand", "current demand and output", 26)
	s.line(lead, "Currents in A: just after the docking that starts the interval, on average, and just before its end. Breakdown is the share of a coated area that acts as bare steel. "+
		"The plan multiplies the demand by the factor. Thin: reserve below "+percentWords(b.a.Basis.Reserve)+". Short: of current. Spent: wasted to the utilisation factor.")
	columns := []column{{head: "Zone", most: 24}, {head: "From", format: date}, {head: "To", format: date}}
	triple := func(name string, f format) {
		for _, h := range []string{"initial", "mean", "final"} {
			columns = append(columns, column{group: name, head: h, format: f, most: 9})
		}
	}
	triple("Breakdown", three)
	triple("Own demand, A", two)
	triple("With the zones it holds, A", two)
	triple("Own by the offshore code, A", two)
	triple("Own by ship practice, A", two)
	triple("Own by sea area, A", two)
	columns = append(columns,
		column{head: "Demand factor", format: two}, column{head: "Output at end, A", format: two, most: 9},
		column{head: "Wastage at end", most: 36}, column{head: "State at end", most: 8}, column{head: "Cause", most: 22},
	)
	const state = 24
	first := s.header(columns...)
	rows := s.next
	b.cells.demand = map[int]int{}
	for i := range b.o.Zones {
		z := &b.o.Zones[i]
		held := b.held(z.Zone)
		b.cells.demand[i] = s.next
		for k, iv := range z.Intervals {
			row := []any{b.names[i], iv.From, iv.To}
			current := func(c hull.Current) { row = append(row, c.Initial, c.Mean, c.Final) }
			cells := b.cells.calc.intervals[i][k]
			for _, three := range [][3]num{cells.breakdown, cells.own, cells.total} {
				for _, n := range three {
					row = append(row, n.live())
				}
			}
			current(iv.ByCode)
			if iv.ByPractice != nil {
				current(*iv.ByPractice)
			} else {
				row = append(row, "no figure", nil, nil)
			}
			if iv.BySeaArea != nil {
				current(*iv.BySeaArea)
			} else {
				row = append(row, "no figure", nil, nil)
			}
			row = append(row, z.Factor.Used)
			if held != "" {
				row = append(row, nil, nil, "-", held)
			} else {
				row = append(row, iv.Output, wastages(iv.Fitted), string(iv.State), cause(iv))
			}
			s.row(row...)
		}
	}
	s.colourStates(state, rows)
	s.finish(page{frozenRows: rows - 1, frozenCols: 3, firstTitle: first, lastTitle: rows - 1})
}

// cause says why a zone is not sound, in words that stand alone.
func cause(iv plan.ZoneInterval) string {
	if strings.HasPrefix(iv.Cause, "of ") {
		return string(iv.State) + " " + iv.Cause
	}
	return iv.Cause
}

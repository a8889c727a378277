package workbook

import (
	"fmt"

	"github.com/xuri/excelize/v2"
)

// forecast writes what the plan leads to: wastage, potential and state of
// every zone at the end of each interval, just before what is done there.
func (b *book) forecast() {
	s := b.sheet("Forecast", "forecast", max(13, 1+len(b.o.Intervals)))
	s.line(lead, "As planned, at the median demand factor, just before each docking. It does not follow changes in this workbook: the program calculates it. Potentials against Ag/AgCl/seawater; steel loss is of bare steel while it is short of current.")
	s.wastageMatrix()
	s.gap()
	s.part()
	s.line(section, "Zone by zone")
	spent := false
	for i := range b.o.Zones {
		for _, iv := range b.o.Zones[i].Intervals {
			spent = spent || iv.SpentProbability != nil
		}
	}
	columns := []column{
		{head: "Zone", most: 24}, {head: "At", format: date}, {head: "Anodes and their wastage", most: 38}, {head: "Output, A", format: two}, {head: "Asked for, A", format: two},
		{head: "Potential, V", format: three}, {head: "State", most: 8}, {head: "Cause", most: 26}, {head: "Steel loss, mm", format: three},
		{head: "To polarise anew, A", format: two},
	}
	if spent {
		columns = append(columns, column{head: "Spent, probability", format: percent}, column{head: "A survey finds, 90 % range", most: 20}, column{head: "Current of a piece, A", most: 14})
	}
	head := s.header(columns...)
	first := s.next
	for i := range b.o.Zones {
		z := &b.o.Zones[i]
		for _, iv := range z.Intervals {
			row := []any{b.names[i], iv.To}
			if held := b.held(z.Zone); held != "" && z.Zone.HeldBy == "" {
				s.row(append(row, nil, nil, nil, nil, "-", held)...)
				continue
			}
			var output, potential any
			if len(iv.Fitted) > 0 {
				output = iv.Output
			}
			if known(iv.Potential) {
				potential = iv.Potential
			}
			row = append(row, wastages(iv.Fitted), output, iv.Total.Final*z.Factor.Median, potential, string(iv.State), cause(iv), iv.SteelLoss, iv.Repolarise.Asks)
			if z.Zone.HeldBy != "" {
				row[4], row[7] = iv.Demand.Final*z.Factor.Median, joined("; ", "held by "+b.zoneName(z.Zone.HeldBy), cause(iv))
			}
			if p := iv.SpentProbability; p != nil {
				row = append(row, *p, ranges(iv.Fitted), currents(iv.Fitted))
			}
			s.row(row...)
		}
	}
	s.colourStates(6, first)
	s.finish(page{frozenRows: 1, frozenCols: 2, firstTitle: head, lastTitle: head})
}

// wastageMatrix writes the wastage of each zone's anodes together, by the net
// mass, at the end of each interval.
func (s *sheet) wastageMatrix() {
	s.line(section, "Wastage at each docking")
	s.line(lead, "Of a zone's anodes together, by net mass, before the docking's work.")
	columns := []column{{head: "Zone", most: 24}}
	for _, iv := range s.o.Intervals {
		columns = append(columns, column{head: iv.To.String(), format: percent, most: 12})
	}
	row := s.header(columns...)
	s.cells.wastage.head = row
	s.cells.wastage.first = s.next
	for i := range s.o.Zones {
		z := &s.o.Zones[i]
		if s.held(z.Zone) != "" {
			continue
		}
		values := []any{s.names[i]}
		for _, iv := range z.Intervals {
			mass, gone := 0.0, 0.0
			for _, g := range iv.Fitted {
				m := float64(g.Count) * g.Pattern.NetMass
				mass, gone = mass+m, gone+m*g.Wastage
			}
			if mass == 0 {
				values = append(values, nil)
			} else {
				values = append(values, gone/mass)
			}
		}
		s.row(values...)
		s.cells.wastage.zones = append(s.cells.wastage.zones, i)
	}
	if len(s.cells.wastage.zones) == 0 {
		s.line(lead, "No zone has anodes of its own.")
	}
}

// colourStates puts the states' colours behind their words, from a row on.
func (s *sheet) colourStates(col, first int) {
	if s.next == first {
		return
	}
	for _, c := range stateFills {
		id, err := s.f.NewConditionalStyle(&excelize.Style{Fill: excelize.Fill{Type: "pattern", Pattern: 1, Color: []string{c.fill}}})
		s.check(err)
		s.check(s.f.SetConditionalFormat(s.name, fmt.Sprintf("%s:%s", at(col, first), at(col, s.next-1)),
			[]excelize.ConditionalFormatOptions{{Type: "cell", Criteria: "==", Value: fmt.Sprintf("%q", string(c.state)), Format: &id}}))
	}
}

// wastageCells are where the wastage of each zone stands on the sheet
// Forecast.
type wastageCells struct {
	head, first int
	zones       []int
}

package workbook

import (
	"fmt"
	"strings"

	"anodewright/hull"
)

// protections writes what holds or burdens zones beside anodes in water: coats
// of zinc, impressed current, nobler metal, rods in soil.
func (b *book) protections() {
	s := b.sheet("Protections", "other protections", 12)
	s.line(lead, "Coats of zinc, impressed current, nobler metal beside steel, rods in soil: each with its own result beside the plan. Losses of steel are of bare steel that nothing holds, at most.")
	var zones []int
	for i := range b.o.Zones {
		if b.o.Zones[i].Protection != nil {
			zones = append(zones, i)
		}
	}
	if len(zones) == 0 {
		s.line(lead, "No zone has any.")
		s.finish(page{frozenRows: 1, firstTitle: 1, lastTitle: 1})
		return
	}
	s.protectionWords(zones)
	s.protectionIntervals(zones)
	s.rodOutputs(zones)
	s.protectionSteps(zones)
	s.finish(page{frozenRows: 1, firstTitle: 1, lastTitle: 1})
}

// protectionWords writes each result in sentences, across the sheet.
func (s *sheet) protectionWords(zones []int) {
	for _, i := range zones {
		r := s.o.Zones[i].Protection
		s.gap()
		s.part()
		s.line(section, s.names[i]+": "+r.Heading())
		for _, sentence := range r.Words() {
			s.line(lead, sentence)
		}
	}
}

// protectionIntervals writes what each result says of the docking intervals.
func (s *sheet) protectionIntervals(zones []int) {
	s.gap()
	s.part()
	s.line(section, "By docking interval")
	s.header(
		column{head: "Zone", most: 24}, column{head: "From", format: date}, column{head: "To", format: date}, column{head: "What", most: 30},
		column{group: "Current, A", head: "initial", format: two}, column{group: "Current, A", head: "mean", format: two}, column{group: "Current, A", head: "final", format: two},
		column{head: "Zinc left at end, µm", format: one, most: 10}, column{head: "Area ratio", format: two, most: 8},
		column{head: "Steel loss, µm a year", format: one, most: 12}, column{head: "Steel loss, mm", format: three, most: 12}, column{head: "Charge missing, Ah", format: whole, most: 12},
	)
	for _, i := range zones {
		r := s.o.Zones[i].Protection
		if r.Coat != nil {
			for _, iv := range r.Coat.Intervals {
				var a, b, c any
				what := "zinc " + string(iv.State)
				if d := iv.Demand; d != nil {
					a, b, c = d.Initial, d.Mean, d.Final
					what += fmt.Sprintf(", unheld from %s on", iv.BareFrom)
				}
				s.row(s.names[i], iv.From, iv.To, what, a, b, c, iv.Left, nil, nil, figureOf(iv.SteelLoss), nil)
			}
		}
		if r.Impressed != nil {
			for _, iv := range r.Impressed.Intervals {
				d := iv.Demand
				s.row(s.names[i], iv.From, iv.To, "demand held; missing while it is off", d.Initial, d.Mean, d.Final, nil, nil, nil, figureOf(iv.SteelLoss), iv.Charge)
			}
		}
		if r.Couple != nil {
			for _, iv := range r.Couple.Intervals {
				d := iv.Drain
				s.row(s.names[i], iv.From, iv.To, "drain of "+plain(r.Couple.Metal)+"; loss unheld", d.Initial, d.Mean, d.Final, nil, figureOf(iv.Ratio), figureOf(iv.Loss), nil, nil)
			}
		}
	}
}

// rodOutputs writes what one rod gives in soils of other resistivities.
func (s *sheet) rodOutputs(zones []int) {
	first := true
	for _, i := range zones {
		r := s.o.Zones[i].Protection
		if r.Rods == nil {
			continue
		}
		if first {
			first = false
			s.gap()
			s.part()
			s.line(section, "Output of one new rod against the resistivity of the soil")
			s.header(column{head: "Zone", most: 24}, column{head: "Pattern", most: 12}, column{head: "Alloy", most: 14}, column{head: "By", most: 30},
				column{head: "Soil, ohm m", format: one, most: 10}, column{head: "Output, A", format: three, most: 10})
		}
		for _, rod := range r.Rods.Patterns {
			for _, at := range rod.Against {
				s.row(s.names[i], rod.Pattern, alloyWords(rod.Alloy), "rod formula, driving voltage", at.Resistivity, at.Output)
				if at.Handbook != nil {
					s.row(s.names[i], rod.Pattern, alloyWords(rod.Alloy), "handbook, size factor", at.Resistivity, *at.Handbook)
				}
			}
		}
	}
}

// protectionSteps writes where the figures come from, a sentence each.
func (s *sheet) protectionSteps(zones []int) {
	s.gap()
	s.part()
	s.line(section, "Where these figures come from")
	for _, i := range zones {
		for _, step := range s.o.Zones[i].Protection.Steps {
			sentence := fmt.Sprintf("%s: %s = %s. Formula: %s", s.names[i], step.Figure, strings.TrimSpace(fmt.Sprintf("%.5g %s", step.Value, step.Unit)), step.Formula)
			if with := inputs(step); with != "" {
				sentence += ", with " + with
			}
			s.line(lead, fmt.Sprintf("%s. Source: %s (%s).", sentence, step.Source, sure(step.Confidence)))
		}
	}
}

// inputs lists what went into a figure.
func inputs(step hull.Step) string {
	var parts []string
	for _, in := range step.Inputs {
		parts = append(parts, strings.TrimSpace(fmt.Sprintf("%s %.5g %s", in.Name, in.Value, in.Unit)))
	}
	return strings.Join(parts, ", ")
}

// figureOf returns a figure, or nothing where it does not exist.
func figureOf(x *float64) any {
	if x == nil {
		return nil
	}
	return *x
}

package workbook

import (
	"fmt"
	"strconv"
	"strings"

	"anodewright/anodes"
	"anodewright/anodes/survey"
	"anodewright/hull"
)

// readings writes what surveyors found, what it teaches of the demand, and
// what about it is in doubt.
func (b *book) readings() {
	s := b.sheet("Readings", "readings and what they teach", 19)
	s.line(lead, "Wastage is the share of the net mass gone. Predicted: by the design figures, on the day of the reading. Potentials stand as they were read, then against Ag/AgCl/seawater.")
	head := s.header(
		column{head: "Date", format: date}, column{head: "Zone", most: 24}, column{head: "Pattern", most: 16}, column{head: "Fitted", format: date}, column{head: "By", most: 24},
		column{head: "Found", most: 36}, column{head: "Found on average", format: percent}, column{head: "Predicted", format: percent},
		column{head: "Gone", format: whole}, column{head: "Not wasted", format: whole}, column{head: "Fallen", format: whole}, column{head: "Painted over", format: whole}, column{head: "Not seen", format: whole},
		column{head: "Potentials as read, V", most: 24}, column{head: "V Ag/AgCl", most: 18},
		column{head: "Coating broken down", most: 12}, column{head: "Water, ohm m", format: three}, column{head: "Kind", most: 12},
		column{head: "How, note", most: 30},
	)
	for i := range b.a.Readings {
		r := &b.a.Readings[i]
		kind, found, average := foundBy(r)
		var predicted, water any
		if w, ok := b.o.Predicted(i); ok {
			predicted = w
		}
		if r.Resistivity != nil {
			water = *r.Resistivity
		}
		asRead, converted := potentials(r)
		s.row(r.Date, b.zoneName(r.Zone), r.Pattern, r.Fitted, r.By, found, average, predicted,
			someCount(r.Gone), someCount(r.NotWasted), someCount(r.Fallen), someCount(r.Painted), someCount(r.NotSeen),
			asRead, converted, coatingFound(r), water, kind, joined("; ", withdrawn(r), r.How, r.Note))
	}
	if len(b.a.Readings) == 0 {
		s.line(lead, "No readings are kept.")
	}
	b.learned(s)
	s.finish(page{frozenRows: head, frozenCols: 2, firstTitle: head, lastTitle: head})
}

// learned writes the demand factor of every zone that carries anodes, and the
// questions about readings.
func (b *book) learned(s *sheet) {
	s.gap()
	s.part()
	s.line(section, "Demand factor: the true demand over the design figure, with its 90 % range")
	if b.o.Learns {
		s.line(lead, "This plan uses the factor that the readings teach.")
	} else {
		s.line(lead, "This plan rests on the design figures; what the readings teach stands beside it.")
	}
	s.header(
		column{head: "Circuit"}, column{head: "Zone", most: 24}, column{head: "Readings of the circuit", format: whole}, column{head: "Anodes read", format: whole}, column{head: "Without readings", most: 24},
		column{head: "By the readings", most: 36}, column{head: "Plan uses", format: two}, column{head: "Spent at next docking", format: percent},
	)
	before := b.o.Before()
	for i := range b.o.Zones {
		z := &b.o.Zones[i]
		if len(z.Zone.Fitted) == 0 {
			continue
		}
		values := []any{b.a.CircuitName(z.Zone), b.names[i], nil, nil, factorRange(before.Median, before.Low, before.High), "nothing", z.Factor.Used, nil}
		if l := z.Learned; l != nil {
			values[2], values[3], values[5] = l.Readings, l.Anodes, factorRange(l.Median, l.Low, l.High)
		}
		if d, ok := b.o.NextDocking(); ok {
			for _, iv := range z.Intervals {
				if iv.To == d.Date && iv.SpentProbability != nil {
					values[7] = *iv.SpentProbability
				}
			}
		}
		s.row(values...)
	}
	questions := b.o.Questions()
	if len(questions) == 0 {
		return
	}
	s.gap()
	s.part()
	s.line(section, "To be settled with the surveyor")
	for _, q := range questions {
		s.line(warning, q.Text)
	}
}

// withdrawn says of a reading that counts no more since when.
func withdrawn(r *hull.Reading) string {
	if survey.Stands(r) {
		return ""
	}
	return "withdrawn on " + r.Withdrawn.String()
}

func factorRange(median, low, high float64) string {
	return fmt.Sprintf("%.2f (%.2f to %.2f)", median, low, high)
}

// foundBy returns how the wastage was told, in words what was found, and the
// average of the anodes looked at singly.
func foundBy(r *hull.Reading) (kind, found string, average any) {
	var parts []string
	mean := func(xs []float64, unit float64) any {
		sum := 0.0
		for _, x := range xs {
			sum += x * unit
			parts = append(parts, strconv.FormatFloat(100*x*unit, 'f', decimalsOf(100*x*unit), 64))
		}
		return sum / float64(len(xs))
	}
	switch {
	case len(r.WeighedWastage) > 0:
		average = mean(r.WeighedWastage, 1)
		return "weighed", strings.Join(parts, ", ") + " %", average
	case len(r.Percent) > 0:
		average = mean(r.Percent, 0.01)
		return "seen", strings.Join(parts, ", ") + " %", average
	case len(r.Measured) > 0:
		for _, m := range r.Measured {
			parts = append(parts, fmt.Sprintf("%g × %g m", m.Girth, m.Length))
		}
		return "measured", "girth × length " + strings.Join(parts, ", "), nil
	case r.Grades != nil:
		for i, n := range r.Grades.Counts {
			class := "from " + percentWords(r.Grades.Bounds[i])
			if i+1 < len(r.Grades.Bounds) {
				class = strings.TrimSuffix(percentWords(r.Grades.Bounds[i]), " %") + " to " + percentWords(r.Grades.Bounds[i+1])
			}
			parts = append(parts, fmt.Sprintf("%s: %d", class, n))
		}
		return "graded", strings.Join(parts, "; "), nil
	}
	return "", "", nil
}

// potentials writes the potentials of a reading as read and converted.
func potentials(r *hull.Reading) (asRead, converted string) {
	var read, against []string
	for _, m := range r.Potentials {
		read = append(read, fmt.Sprintf("%.3f %s", m.Potential, anodes.ElectrodeName(m.Electrode)))
		against = append(against, fmt.Sprintf("%.3f", anodes.Potential(m)))
	}
	return strings.Join(read, "; "), strings.Join(against, "; ")
}

// coatingFound writes what a reading says of the coating.
func coatingFound(r *hull.Reading) string {
	var parts []string
	if r.CoatingPercent != nil {
		parts = append(parts, percentWords(*r.CoatingPercent/100))
	}
	if r.CoatingWord != "" {
		parts = append(parts, string(r.CoatingWord))
	}
	return strings.Join(parts, ", ")
}

// someCount is a count, or nothing where it is 0.
func someCount(n int) any {
	if n == 0 {
		return nil
	}
	return n
}

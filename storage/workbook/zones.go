package workbook

import (
	"fmt"
	"strings"

	"anodewright/hull"
)

// zones writes the steel: what each zone is and how it is held.
func (b *book) zones() {
	s := b.sheet("Zones", "zones", 20)
	s.line(lead, fmt.Sprintf("As at the last docking, %s. Breakdown of a coating: a + b × age in years, at most 1. Resistivity: %s. On yellow: inputs, which the demand, the pieces and the order follow.", b.a.Start(), b.outputWater()))
	head := s.header(
		column{head: "Zone", most: 24}, column{head: "Id", most: 14}, column{head: "Region", most: 12}, column{head: "Surface", most: 12},
		column{head: "Wetted, m²", format: one, entry: true}, column{head: "Bare, m²", format: one, entry: true}, column{head: "Coated, m²", format: one}, column{head: "Depth, m", format: one},
		column{head: "Coating category", most: 8}, column{head: "a", format: three, entry: true}, column{head: "b, per year", format: three, entry: true}, column{head: "Coating applied", format: date, entry: true},
		column{head: "Waters and shares", most: 24}, column{head: "Resistivity, ohm m", format: three},
		column{head: "Held by", most: 20}, column{head: "Circuit", most: 12}, column{head: "Fitted now, and what of it was gone", most: 40},
		column{head: "Least count", format: whole, entry: true}, column{head: "Count by", format: whole, entry: true}, column{head: "Most", format: whole, most: 10, entry: true},
	)
	first := s.next
	sums := map[int]float64{4: 0, 5: 0, 6: 0}
	for i := range b.a.Zones {
		z := &b.a.Zones[i]
		bare := z.BareArea
		if !z.Coated() {
			bare = z.WettedArea
		}
		var ca, cb, applied, most any
		row := s.next
		var in zoneCells
		in.wetted, in.bare.v = s.ref(4, row, z.WettedArea), z.BareArea
		bareCell := any(live{at(4, row), bare})
		in.a.v, in.b.v = b.o.BreakdownConstants(i)
		since := z.Coating.Applied
		if since.IsZero() {
			since = min(b.a.InService, b.a.Start())
		}
		in.applied.v = serial(since)
		if z.Coated() {
			in.bare = s.ref(5, row, z.BareArea)
			bareCell = input{bare}
			in.a, in.b = s.ref(9, row, in.a.v), s.ref(10, row, in.b.v)
			ca, cb, applied = input{in.a.v}, input{in.b.v}, input{since}
			if since >= firstDate {
				in.applied = s.ref(11, row, in.applied.v)
			}
		}
		most = "no limit"
		if z.MaxCount != nil {
			most = input{*z.MaxCount}
			in.most = s.ref(19, row, float64(*z.MaxCount))
		}
		least, steps := any(input{z.MinCount}), any(input{z.CountMultiple})
		in.least, in.steps = s.ref(17, row, float64(z.MinCount)), s.ref(18, row, float64(z.CountMultiple))
		if b.held(z) != "" {
			least, steps, most = nil, nil, nil
		}
		b.cells.zones = append(b.cells.zones, in)
		s.row(b.names[i], z.ID, plain(z.Region), plain(z.Surface),
			input{z.WettedArea}, bareCell, live{at(4, row) + "-" + at(5, row), z.WettedArea - bare}, z.Depth,
			string(z.Coating.Category), ca, cb, applied,
			b.waters(z.Waters), or(b.a.Resistivity(z, b.a.Start()), "not known"),
			b.heldBy(z), b.a.CircuitName(z), b.fittedAndGone(z),
			least, steps, most)
		sums[4] += z.WettedArea
		sums[5] += bare
		sums[6] += z.WettedArea - bare
	}
	s.totals("Total", first, sums)
	s.finish(page{frozenRows: head, frozenCols: 1, firstTitle: head, lastTitle: head})
}

// heldBy says what holds a zone: anodes, another zone, or what else.
func (b *book) heldBy(z *hull.Zone) string {
	how := protection(z)
	switch {
	case z.HeldBy != "":
		how = b.zoneName(z.HeldBy)
	case how == "":
		how = "its own anodes"
	}
	if !z.Bonded {
		how += ", not bonded"
	}
	return how
}

// fittedAndGone lists the sets that a zone carries, when they were fitted and
// what share of their mass was gone at the last docking.
func (b *book) fittedAndGone(z *hull.Zone) string {
	var parts []string
	for _, f := range z.Fitted {
		p, _ := b.a.Pattern(f.Pattern)
		parts = append(parts, fmt.Sprintf("%s, %s, %s", pieces(f.Count, p), f.Fitted, percentWords(f.Wastage)))
	}
	if len(parts) == 0 {
		return "none"
	}
	return strings.Join(parts, "\n")
}

func (b *book) outputWater() string {
	if b.a.Basis.OutputWater == hull.WorstWater {
		return "that of the worst water with a share of a tenth or more"
	}
	return "the mean of the waters by conductance"
}

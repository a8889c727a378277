package workbook

import (
	"anodewright/anodes"
	"anodewright/hull"
)

// patterns writes the castings that the plan chooses from, with what they
// give in the water of the first zone that they are for.
func (b *book) patterns() {
	s := b.sheet("Patterns", "anode patterns", 23)
	s.line(lead, "Resistance of one piece new, and worn to its utilisation factor, at the resistivity shown. Potential against Ag/AgCl/seawater, closed circuit. On yellow: inputs, which the pieces and the order follow.")
	head := s.header(
		column{head: "Pattern", most: 18}, column{head: "Name", most: 28}, column{head: "Alloy", most: 18}, column{head: "Shape", most: 14}, column{head: "Fixing", most: 20},
		column{head: "Length, m", format: three, entry: true}, column{head: "Width, m", format: three, entry: true}, column{head: "Height, m", format: three, entry: true},
		column{head: "Radius, m", format: three, entry: true}, column{head: "Girth, m", format: three, entry: true}, column{head: "Diameter, m", format: three, entry: true}, column{head: "Exposed area, m²", format: three, entry: true},
		column{head: "Net mass, kg", format: one, entry: true}, column{head: "Gross mass, kg", format: one, entry: true}, column{head: "Utilisation", format: two, entry: true},
		column{head: "Capacity, Ah/kg", format: whole, entry: true}, column{head: "Potential, V", format: two, entry: true},
		column{head: "For", most: 22}, column{head: "Resistivity, ohm m", format: three, most: 10}, column{head: "New, ohm", format: four, most: 10}, column{head: "Worn, ohm", format: four, most: 10},
		column{head: b.money("Price"), format: two, entry: true}, column{head: "Lead time, weeks", format: one},
	)
	for i := range b.a.Patterns {
		p := &b.a.Patterns[i]
		zone := b.zoneOf(p)
		z := &b.a.Zones[zone]
		rho, metal := b.a.Resistivity(z, b.a.Start()), anodes.MetalOf(p, b.a.Medium(z))
		s.row(p.ID, p.Name, alloyWords(p.Alloy), plain(p.Shape), p.Fixing,
			input{some(p.Length)}, input{some(p.Width)}, input{some(p.Height)}, input{some(p.Radius)}, input{some(p.Girth)}, input{some(p.Diameter)}, input{some(p.ExposedArea)},
			input{p.NetMass}, input{p.Gross()}, input{p.Utilisation}, input{metal.Capacity}, input{metal.Potential},
			b.names[zone], or(rho, "not known"), or(anodes.ResistanceNew(p, rho), "not known"), or(anodes.ResistanceWorn(p, rho), "not known"),
			input{p.Price}, p.LeadWeeks)
		cell := func(col int, v float64) num { return s.ref(col, s.next-1, v) }
		b.cells.patterns = append(b.cells.patterns, patternCells{
			length: cell(5, p.Length), width: cell(6, p.Width), height: cell(7, p.Height), radius: cell(8, p.Radius),
			girth: cell(9, p.Girth), diameter: cell(10, p.Diameter), area: cell(11, p.ExposedArea),
			net: cell(12, p.NetMass), gross: cell(13, p.Gross()), utilisation: cell(14, p.Utilisation),
			capacity: cell(15, metal.Capacity), potential: cell(16, metal.Potential), price: cell(21, p.Price),
			rho: cell(18, rho), ohmNew: cell(19, anodes.ResistanceNew(p, rho)), ohmWorn: cell(20, anodes.ResistanceWorn(p, rho)),
		})
	}
	s.finish(page{frozenRows: head, frozenCols: 1, firstTitle: head, lastTitle: head})
}

// zoneOf returns the first zone that a pattern is offered for, else the first
// that carries it, else the first of all.
func (b *book) zoneOf(p *hull.Pattern) int {
	for i := range b.a.Zones {
		z := &b.a.Zones[i]
		if b.held(z) != "" {
			continue
		}
		offered, _ := anodes.Offered(b.a, z)
		for _, q := range offered {
			if q == p {
				return i
			}
		}
	}
	for i := range b.a.Zones {
		for _, f := range b.a.Zones[i].Fitted {
			if f.Pattern == p.ID {
				return i
			}
		}
	}
	return 0
}

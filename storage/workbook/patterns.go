package workbook

import (
	"anodewright/anodes"
	"anodewright/hull"
)

// patterns writes the castings that the plan chooses from, with what they
// give in the water of the first zone that they are for.
func (b *book) patterns() {
	s := b.sheet("Patterns", "anode patterns", 23)
	s.line(lead, "Resistance of one piece new, and worn to its utilisation factor, at the resistivity shown. Potential against Ag/AgCl/seawater, closed circuit.")
	head := s.header(
		column{head: "Pattern", most: 18}, column{head: "Name", most: 28}, column{head: "Alloy", most: 18}, column{head: "Shape", most: 14}, column{head: "Fixing", most: 20},
		column{head: "Length, m", format: three}, column{head: "Width, m", format: three}, column{head: "Height, m", format: three},
		column{head: "Radius, m", format: three}, column{head: "Girth, m", format: three}, column{head: "Diameter, m", format: three}, column{head: "Exposed area, m²", format: three},
		column{head: "Net mass, kg", format: one}, column{head: "Gross mass, kg", format: one}, column{head: "Utilisation", format: two},
		column{head: "Capacity, Ah/kg", format: whole}, column{head: "Potential, V", format: two},
		column{head: "For", most: 22}, column{head: "Resistivity, ohm m", format: three, most: 10}, column{head: "New, ohm", format: four, most: 10}, column{head: "Worn, ohm", format: four, most: 10},
		column{head: b.money("Price"), format: two}, column{head: "Lead time, weeks", format: one},
	)
	for i := range b.a.Patterns {
		p := &b.a.Patterns[i]
		zone := b.zoneOf(p)
		z := &b.a.Zones[zone]
		rho, metal := b.a.Resistivity(z, b.a.Start()), anodes.MetalOf(p, b.a.Medium(z))
		s.row(p.ID, p.Name, alloyWords(p.Alloy), plain(p.Shape), p.Fixing,
			some(p.Length), some(p.Width), some(p.Height), some(p.Radius), some(p.Girth), some(p.Diameter), some(p.ExposedArea),
			p.NetMass, p.Gross(), p.Utilisation, metal.Capacity, metal.Potential,
			b.names[zone], or(rho, "not known"), or(anodes.ResistanceNew(p, rho), "not known"), or(anodes.ResistanceWorn(p, rho), "not known"),
			p.Price, p.LeadWeeks)
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

package workbook

import (
	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// calcCells are the cells of the sheet Calculation that others refer to.
type calcCells struct {
	zones     []calcZone
	coats     [][]calcCoat // by zone and interval
	intervals [][]calcInterval
	patterns  []calcPattern
	fitted    [][]calcGroup
	outputs   map[outputKey][]calcOutput // by interval
	actions   []calcAction               // by line of the schedule
	adds      map[int]addCells           // likewise
	stays     map[int]num                // likewise: 1 where a fitted set may not stay
	dockings  []calcDocking
	// The columns of all actions: their count, docking and pattern by number.
	counts, dockingNumbers, patternNumbers num
}

// calculation writes the chain from the steel to the order as formulas: the
// breakdown of the coatings, the demand, what each criterion asks for, the
// count of pieces and the costs. What is done to which zone at which docking
// with which pattern stands fixed, as planned.
func (b *book) calculation() {
	s := b.sheet("Calculation", "calculation", overColumn+1)
	s.line(lead, "The chain from steel to order as live formulas: breakdown, demand, charge, criteria, pieces, cost. Inputs are on yellow, here and on Zones, Patterns and Basis and cautions; change them and recalculate. "+
		"The plan stays as it is: zone, docking, action, pattern and until when. Pieces over a zone's most and fitted sets that may no longer stay are said so; whether another plan would then be cheaper, the program has to say.")
	s.line(lead, "Fixed values: dates, current densities weighed by the waters, resistivities, the demand factor, and how much the rods of a row in soil hinder each other at the count planned. Forecast and potentials on other sheets are as planned.")
	s.zoneFigures()
	s.coats()
	s.demands()
	s.patternFigures()
	s.fittedSets()
	s.outputs()
	s.actions()
	s.dockings()
	s.stays()
	s.finish(page{frozenRows: 1, frozenCols: 1, firstTitle: 1, lastTitle: 1})
}

// block starts a table of the calculation.
func (s *sheet) block(name, note string, columns ...column) {
	s.gap()
	s.part()
	s.line(section, name)
	if note != "" {
		s.line(lead, note)
	}
	s.header(columns...)
}

// calcZone are the figures of a zone.
type calcZone struct {
	coated, metal, a, b, applied, immersed, drains, factor, shielding num
}

func (s *sheet) zoneFigures() {
	s.block("Zones", "Metal counts as bare: bare steel and nobler metal. Drains are those to wells and other structures.",
		column{head: "Zone", most: 34}, column{head: "Wetted, m²", format: two}, column{head: "Bare, m²", format: two}, column{head: "Nobler metal, m²", format: two, entry: true},
		column{head: "Coated, m²", format: two}, column{head: "Metal, m²", format: two}, column{head: "a", format: four}, column{head: "b, per year", format: four}, column{head: "Coating applied", format: date},
		column{head: "Immersed share", format: three, entry: true}, column{head: "Drains, A", format: three, entry: true}, column{head: "Demand factor", format: four, entry: true}, column{head: "Shielding", format: three, entry: true})
	for i := range s.a.Zones {
		z, in := &s.a.Zones[i], s.cells.zones[i]
		nobler := 0.0
		if z.Nobler != nil {
			nobler = z.Nobler.Area
		}
		r := s.record(s.names[i])
		var c calcZone
		wetted, bare, noble := r.of(in.wetted), r.of(in.bare), r.in(nobler)
		c.coated = r.by(wetted.v-bare.v, "#1-#2", wetted, bare)
		c.metal = r.by(bare.v+noble.v, "#1+#2", bare, noble)
		c.a, c.b, c.applied = r.of(in.a), r.of(in.b), r.of(in.applied)
		c.immersed, c.drains = r.in(z.ImmersedShare), r.in(drains(s.a, i))
		c.factor, c.shielding = r.in(s.o.Zones[i].Factor.Used), r.in(z.Shielding)
		r.done()
		s.cells.calc.zones = append(s.cells.calc.zones, c)
	}
}

// fits reports whether a line of the schedule fits pieces.
func fits(l renewal.Line) bool { return l.Action == renewal.Renew || l.Action == renewal.Add }

// steel returns the demand of a square metre of a zone's bare steel in waters,
// in mA, without factors: the densities weighed by the waters' shares.
func steel(a *hull.Asset, z *hull.Zone, shares []hull.WaterShare) hull.Current {
	bare := *z
	bare.WettedArea, bare.BareArea, bare.Nobler, bare.Drains, bare.Wells = 1000, 1000, nil, 0, 0
	return alone(a, bare, shares)
}

// drains returns what a zone's drains take, in A.
func drains(a *hull.Asset, zone int) float64 {
	bare := a.Zones[zone]
	bare.WettedArea, bare.BareArea, bare.Nobler = 0, 0, nil
	return alone(a, bare, bare.Waters).Mean
}

// alone returns the demand of a zone by itself in unchanged service.
func alone(a *hull.Asset, z hull.Zone, shares []hull.WaterShare) hull.Current {
	only := *a
	z.Waters, z.Service, z.HeldBy, z.UnderWayFactor, z.ImmersedShare = shares, nil, "", 1, 1
	only.Zones, only.Service, only.Dockings = []hull.Zone{z}, nil, nil
	return hull.Demand(&only)[0].Own[0]
}

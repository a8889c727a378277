package workbook

import (
	"fmt"
	"math"
	"strings"

	"anodewright/anodes"
	rods "anodewright/anodes/protection"
	"anodewright/anodes/renewal"
	"anodewright/anodes/survey"
	"anodewright/hull"
)

// calcPattern are a pattern's figures beside those on the sheet Patterns.
// shapeNew and shapeWorn are resistance over resistivity, 1/m.
type calcPattern struct{ series, multiple, stock, cost, shapeNew, shapeWorn num }

// patternFigures writes the resistance of every pattern, new and worn, from
// its dimensions, by the formula of its shape.
func (s *sheet) patternFigures() {
	s.block("Patterns", "Shape is resistance over resistivity. Worn to the utilisation factor: length 0.9 L, section of what metal and insert remain; side is the radius, the width or the diameter by shape, or the exposed area of a short flush anode.",
		column{head: "Pattern", most: 24}, column{head: "Shape", most: 14}, column{head: "Stand-off, m", format: three, entry: true}, column{head: "Insert, m³", format: four, entry: true}, column{head: "Metal, kg/m³", format: whole, entry: true},
		column{head: "Cable, ohm", format: four, entry: true}, column{head: "Bought by", format: whole, entry: true}, column{head: "In stock", format: whole, entry: true}, column{head: "Fitting a piece", format: two, entry: true}, column{head: "Cost of a piece fitted", format: two},
		column{head: "Side new", format: four}, column{head: "Length worn, m", format: four}, column{head: "Section worn, m²", format: four}, column{head: "Side worn", format: four},
		column{head: "Shape new, 1/m", format: four}, column{head: "Shape worn, 1/m", format: four})
	var standing []slender
	stock := map[string]int{}
	for _, v := range s.a.Stock {
		stock[v.Pattern] += v.Count
	}
	for i := range s.a.Patterns {
		p, in := &s.a.Patterns[i], s.cells.patterns[i]
		r := s.record(patternName(p), plain(p.Shape))
		var c calcPattern
		standoff, insert := r.in(p.Standoff), r.in(p.InsertVolume)
		density := r.in(anodes.MetalOf(p, hull.Seawater).Density)
		c.series, c.multiple, c.stock = r.in(p.SeriesResist), r.in(float64(p.OrderMultiple)), r.in(float64(stock[p.ID]))
		fit := s.figure("Fit_per_piece")
		if p.FitPerPiece != nil {
			fit = r.in(*p.FitPerPiece)
		} else {
			fit = r.by(fit.v, "#1", fit)
		}
		c.cost = r.by(p.Price+fit.v, "#1+#2", in.price, fit)
		var f slender
		c.shapeNew, c.shapeWorn, f = r.shapes(p, in, standoff, insert, density)
		r.done()
		if f.length[0].at != "" {
			f.pattern = i
			standing = append(standing, f)
		}
		s.cells.calc.patterns = append(s.cells.calc.patterns, c)
	}
	s.slenders(standing)
	for i, c := range s.cells.calc.patterns {
		s.ohms(i, c)
	}
}

// slender are a stand-off anode's dimensions, new and worn.
type slender struct {
	pattern      int
	length, side [2]num
	standoff     num
}

// slenders writes the resistance of stand-off anodes, by their proportions and
// their distance to the steel.
func (s *sheet) slenders(all []slender) {
	if len(all) == 0 {
		return
	}
	s.block("Stand-off anodes", "Long: ln(4l/r) - 1; short: ln((2l/r)(1+q)) + r/(2l) - q, q the root of 1 + (r/2l)²; over 2πl. From 0.30 m of clear distance as it is, from 0.15 m times 1.3, below as a plate 1/(l + 2r).",
		column{head: "Pattern", most: 24}, column{head: "State", most: 10}, column{head: "Length, m", format: four}, column{head: "Radius, m", format: four},
		column{head: "q", format: four}, column{head: "Long", format: four}, column{head: "Short", format: four}, column{head: "By proportions", format: four}, column{head: "For distance", format: two},
		column{head: "Standing off, 1/m", format: four}, column{head: "As a plate, 1/m", format: four}, column{head: "Shape, 1/m", format: four})
	for _, f := range all {
		p, c := &s.a.Patterns[f.pattern], &s.cells.calc.patterns[f.pattern]
		for k, v := range [2]float64{anodes.ResistanceNew(p, 1), anodes.ResistanceWorn(p, 1)} {
			r := s.record(patternName(p), [2]string{"new", "worn"}[k])
			l, side := r.by(f.length[k].v, "#1", f.length[k]), r.by(f.side[k].v, "#1", f.side[k])
			h := side.v / (2 * l.v)
			q := r.by(math.Sqrt(1+h*h), "SQRT(1+(#2/(2*#1))^2)", l, side)
			long := r.by(math.Log(4*l.v/side.v)-1, "LN(4*#1/#2)-1", l, side)
			short := r.by(math.Log(2*l.v/side.v*(1+q.v))+h-q.v, "LN(2*#1/#2*(1+#3))+#2/(2*#1)-#3", l, side, q)
			term, more := short.v, 1.0
			if l.v >= 4*side.v {
				term = long.v
			}
			if p.Standoff < 0.30 {
				more = 1.3
			}
			by := r.by(term, "IF(#1>=4*#2,#3,#4)", l, side, long, short)
			factor := r.by(more, "IF(#1>=0.3,1,1.3)", f.standoff)
			off := r.by(more*term/(2*math.Pi*l.v), "#1*#2/(2*PI()*#3)", factor, by, l)
			plate := r.by(1/(l.v+2*side.v), "1/(#1+2*#2)", l, side)
			shape := r.by(v, "IF(#1<0.15,#2,#3)", f.standoff, plate, off)
			if k == 0 {
				c.shapeNew = shape
			} else {
				c.shapeWorn = shape
			}
			r.done()
		}
	}
}

// ohms turns the resistances on the sheet Patterns into formulas.
func (b *book) ohms(pattern int, c calcPattern) {
	in := b.cells.patterns[pattern]
	if !known(in.rho.v) {
		return
	}
	b.replace(in.ohmNew, in.rho.at+"*"+c.shapeNew.at)
	b.replace(in.ohmWorn, in.rho.at+"*"+c.shapeWorn.at)
}

// shapes writes the columns from the new side to the worn shape; of a
// stand-off anode, which has a table of its own, it returns the dimensions.
func (r *record) shapes(p *hull.Pattern, in patternCells, standoff, insert, density num) (isNew, worn num, off slender) {
	valueNew, valueWorn := anodes.ResistanceNew(p, 1), anodes.ResistanceWorn(p, 1)
	switch p.Shape {
	case hull.Stated:
		r.blank(4)
		return r.in(p.ShapeFactor), r.in(p.ShapeFactorWorn), off
	case hull.ShortFlush, hull.Bracelet:
		side := p.ExposedArea
		if side <= 0 {
			side = p.Length*p.Width + 2*p.Height*(p.Length+p.Width)
		}
		face := p.ExposedArea
		if p.Length > 0 && p.Width > 0 {
			face = p.Length * p.Width
		}
		a := r.by(side, "IF(#1>0,#1,#2*#3+2*#4*(#2+#3))", in.area, in.length, in.width, in.height)
		r.blank(2)
		w := r.by(face, "IF(AND(#2>0,#3>0),#2*#3,#1)", in.area, in.length, in.width)
		const mccoy = "0.315/SQRT(#1)"
		return r.by(valueNew, mccoy, a), r.by(valueWorn, mccoy, w), off
	}
	radius := p.Radius
	if radius <= 0 {
		radius = p.Girth / (2 * math.Pi)
	}
	var side num
	switch {
	case p.Shape == hull.LongFlush:
		side = r.by(p.Width, "#1", in.width)
	case p.Shape == hull.SoilRod:
		side = r.by(p.Diameter, "#1", in.diameter)
	default:
		side = r.by(radius, "IF(#1>0,#1,#2/6.283185307179586)", in.radius, in.girth)
	}
	length := r.by(0.9*p.Length, "0.9*#1", in.length)
	left := ((1-p.Utilisation)*p.NetMass/density.v + p.InsertVolume) / length.v
	if left <= 0 {
		left = 1e-8
	}
	const remains = "((1-#1)*#2/#3+#4)/#5"
	section := r.by(left, "IF("+remains+"<=0,1E-8,"+remains+")", in.utilisation, in.net, density, insert, length)
	var rest num
	switch {
	case p.Shape == hull.LongFlush:
		rest = r.by(2*math.Sqrt(2*left/math.Pi), "2*SQRT(2*#1/PI())", section)
	case p.Shape == hull.SoilRod:
		rest = r.by(2*math.Sqrt(left/math.Pi), "2*SQRT(#1/PI())", section)
	default:
		side := math.Sqrt(left / math.Pi)
		if p.Standoff < 0.15 {
			side = math.Sqrt(2 * left / math.Pi)
		}
		rest = r.by(side, "SQRT(#1*IF(#2<0.15,2,1)/3.141592653589793)", section, standoff)
	}
	switch p.Shape {
	case hull.LongFlush:
		const lloyd = "1/(#1+#2)"
		return r.by(valueNew, lloyd, in.length, side), r.by(valueWorn, lloyd, length, rest), off
	case hull.SoilRod:
		const dwight = "(LN(8*#1/#2)-1)/(2*PI()*#1)"
		return r.by(valueNew, dwight, in.length, side), r.by(valueWorn, dwight, length, rest), off
	}
	off = slender{length: [2]num{in.length, length}, side: [2]num{side, rest}, standoff: standoff}
	return num{}, num{}, off
}

// calcGroup are pieces of one fitted set that fare alike. works are those that
// are not spent, left their usable charge at the last docking.
type calcGroup struct {
	count, works, left num
	wastage, capacity  num
	set                int // of the zone's fitted sets
	lot                survey.Lot
}

// fittedSets writes what the zones with anodes carry at the last docking, the
// pieces of a set apart that readings found gone or painted over since.
func (s *sheet) fittedSets() {
	s.block("Fitted sets at the last docking", "A spent piece is one wasted to its utilisation factor: it gives nothing more. Pieces that readings found gone or fallen count up to their day, those painted over not until a docking cleans them.",
		column{head: "Zone", most: 34}, column{head: "Pattern", most: 24}, column{head: "Fitted", format: whole, entry: true}, column{head: "Wastage", format: three, entry: true},
		column{head: "Capacity, Ah/kg", format: whole}, column{head: "Not spent", format: whole}, column{head: "Usable charge left, Ah", format: whole},
		column{head: "Gone from", format: date}, column{head: "Painted over", most: 24})
	s.cells.calc.fitted = make([][]calcGroup, len(s.a.Zones))
	for i := range s.a.Zones {
		z := &s.a.Zones[i]
		if s.held(z) != "" {
			continue
		}
		for set, f := range z.Fitted {
			k := s.patternIndex(f.Pattern)
			p, in := &s.a.Patterns[k], s.cells.patterns[k]
			for _, lot := range survey.Lots(s.a, z, set) {
				r := s.record(s.names[i], patternName(p))
				g := calcGroup{set: set, lot: lot}
				g.count, g.wastage = r.in(float64(lot.Count)), r.in(f.Wastage)
				g.capacity = r.of(s.capacity(k, z))
				works, left := 0.0, 0.0
				if f.Wastage < p.Utilisation {
					works = float64(lot.Count)
					left = works * p.NetMass * g.capacity.v * (p.Utilisation - f.Wastage)
				}
				g.works = r.by(works, "IF(#1>=#2,0,#3)", g.wastage, in.utilisation, g.count)
				g.left = r.by(left, "#1*#2*#3*(#4-#5)", g.works, in.net, g.capacity, in.utilisation, g.wastage)
				r.values = append(r.values, lot.Leaves, spans(lot.Painted))
				r.done()
				s.cells.calc.fitted[i] = append(s.cells.calc.fitted[i], g)
			}
		}
	}
}

// spans says when pieces are painted over.
func spans(all []survey.Span) string {
	var parts []string
	for _, p := range all {
		to := "on"
		if p.Cleaned != 0 {
			to = "to " + p.Cleaned.String()
		}
		parts = append(parts, "from "+p.From.String()+" "+to)
	}
	return strings.Join(parts, "; ")
}

func (b *book) patternIndex(id string) int {
	for k := range b.a.Patterns {
		if b.a.Patterns[k].ID == id {
			return k
		}
	}
	panic("workbook: no pattern " + id)
}

// capacity and potential return a pattern's entries where they are those of
// the zone's medium, else the figures of that medium.
func (b *book) capacity(pattern int, z *hull.Zone) num {
	m := anodes.MetalOf(&b.a.Patterns[pattern], b.a.Medium(z))
	return cellOr(b.cells.patterns[pattern].capacity, m.Capacity)
}

func (b *book) potential(pattern int, z *hull.Zone) num {
	m := anodes.MetalOf(&b.a.Patterns[pattern], b.a.Medium(z))
	return cellOr(b.cells.patterns[pattern].potential, m.Potential)
}

func cellOr(n num, v float64) num {
	if n.v == v {
		return n
	}
	return num{v: v}
}

// outputKey is a pattern in a zone, in rows of so many rods; 0 where pieces
// do not hinder each other.
type outputKey struct{ zone, pattern, row int }

// calcOutput is what one piece gives in an interval.
type calcOutput struct{ isNew, worn, wornEnd, forFinal num }

func (b *book) key(zone int, p *hull.Pattern, n int) outputKey {
	if p.Shape != hull.SoilRod || p.Spacing <= 0 {
		n = 0
	}
	return outputKey{zone, b.patternIndex(p.ID), n}
}

// outputs writes the output of one piece of every pattern in every zone that
// the actions use it in.
func (s *sheet) outputs() {
	s.block("Output of one piece", "Resistivity at the start and the end of the interval. Pieces for the final current: the demand at the interval's end over the worn output.",
		column{head: "Zone", most: 34}, column{head: "Pattern", most: 24}, column{head: "From", format: date}, column{head: "Driving, V", format: three},
		column{head: "ohm m at start", format: four, entry: true}, column{head: "ohm m at end", format: four, entry: true}, column{head: "Row of rods, 1/m", format: four, entry: true},
		column{head: "New, A", format: four}, column{head: "Worn at start, A", format: four}, column{head: "Worn at end, A", format: four}, column{head: "Pieces for final", format: four})
	s.cells.calc.outputs = map[outputKey][]calcOutput{}
	for _, l := range s.o.Schedule {
		if fits(l) {
			s.output(s.key(l.Zone, l.Pattern, l.Count))
		}
		if l.Action == renewal.Renew {
			continue
		}
		if old, ok := s.setBefore(l); ok {
			s.output(s.key(l.Zone, old.Pattern, old.Count))
			continue
		}
		for _, f := range s.a.Zones[l.Zone].Fitted {
			s.output(s.key(l.Zone, &s.a.Patterns[s.patternIndex(f.Pattern)], f.Count))
		}
	}
}

// setBefore returns the renewal whose set is there at an action; not ok where
// it is the fitted set.
func (b *book) setBefore(l renewal.Line) (set renewal.Line, ok bool) {
	for _, m := range b.o.Schedule {
		if m.Zone == l.Zone && m.Docking < l.Docking && m.Action == renewal.Renew {
			set, ok = m, true
		}
	}
	return set, ok
}

func (s *sheet) output(key outputKey) {
	if s.cells.calc.outputs[key] != nil {
		return
	}
	z, p := &s.a.Zones[key.zone], &s.a.Patterns[key.pattern]
	c, in, shielding := s.cells.calc.patterns[key.pattern], s.potential(key.pattern, z), s.cells.calc.zones[key.zone].shielding
	var all []calcOutput
	for k, iv := range s.o.Intervals {
		r := s.record(s.names[key.zone], patternName(p))
		var out calcOutput
		r.on(iv.From)
		protective := s.figure("Protective_potential")
		var drive num
		if in.at == "" {
			drive = r.by(protective.v-in.v, fmt.Sprintf("#1-(%g)", in.v), protective)
		} else {
			drive = r.by(protective.v-in.v, "#1-#2", protective, in)
		}
		rho, rhoEnd := r.in(s.a.Resistivity(z, iv.From)), r.in(s.a.Resistivity(z, iv.To-1))
		row := 0.0
		if key.row > 1 {
			row = float64(key.row) * rods.GroupFactor(key.row) / p.Spacing
		}
		mutual := r.in(row)
		give := func(rho, shape num) num {
			return r.by(shielding.v*drive.v/(rho.v*(shape.v+row)+c.series.v), "#1*#2/(#3*(#4+#5)+#6)", shielding, drive, rho, shape, mutual, c.series)
		}
		out.isNew, out.worn, out.wornEnd = give(rho, c.shapeNew), give(rho, c.shapeWorn), give(rhoEnd, c.shapeWorn)
		final := s.cells.calc.intervals[key.zone][k].need[2]
		out.forFinal = r.by(final.v/out.wornEnd.v, "#1/#2", final, out.wornEnd)
		r.done()
		all = append(all, out)
	}
	s.cells.calc.outputs[key] = all
}

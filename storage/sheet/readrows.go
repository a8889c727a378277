package sheet

import (
	"slices"

	"anodewright/hull"
)

// rows reads the rows of zones and sets.
func (r *reader) rows() {
	girths, lengths := map[key][]content{}, map[key][]content{}
	for _, l := range r.lines {
		if !l.part.ofZone() && !l.part.ofSet() {
			continue
		}
		filled, any := l.first()
		if !any {
			continue
		}
		if _, ok := r.a.Zone(l.zone); !ok {
			r.p.fault(filled, "the asset has no zone "+l.zone+" any more")
			continue
		}
		pattern, ok := r.a.Pattern(l.pattern)
		if l.part.ofSet() && !ok {
			r.p.fault(filled, "the asset has no pattern "+l.pattern+" any more")
			continue
		}
		f := r.findings(l.key)
		switch l.part {
		case potentialPart:
			r.potentials(f, l)
		case coatingPart:
			r.coating(f, l)
		case remarkPart:
			r.remark(f, l)
		case countPart:
			r.counts(f, l)
		case eyePart:
			for _, c := range l.given() {
				if x, why := c.perCent(); why != "" {
					r.p.fault(c, why)
				} else {
					f.eye = append(f.eye, x)
					f.at("seen", c.Box)
				}
			}
		case weighPart:
			for _, c := range l.given() {
				kg, why := c.kilograms()
				w := 0.0
				if why == "" {
					w, why = wastageOf(pattern, kg)
				}
				if why != "" {
					r.p.fault(c, why)
				} else {
					f.weighed = append(f.weighed, w)
					f.at("weighed", c.Box)
				}
			}
		case girthPart:
			girths[setOf(l.key)] = append(girths[setOf(l.key)], l.padded()...)
		case lengthPart:
			lengths[setOf(l.key)] = append(lengths[setOf(l.key)], l.padded()...)
		}
	}
	for _, k := range r.order {
		r.measured(r.at[k], girths[k], lengths[k])
	}
}

// setOf is the key of the findings that a row adds to: of its set, or of its
// zone.
func setOf(k key) key {
	k.part = ""
	return k
}

func (r *reader) findings(k key) *findings {
	k = setOf(k)
	f := r.at[k]
	if f == nil {
		f = &findings{zone: k.zone, pattern: k.pattern, fitted: k.fitted, date: r.date, dated: r.dated, by: r.by, how: r.how}
		r.at[k] = f
		r.order = append(r.order, k)
	}
	return f
}

// given returns the boxes in which something stands.
func (l line) given() (list []content) {
	for _, c := range l.boxes {
		if !c.empty() {
			list = append(list, c)
		}
	}
	return list
}

// padded returns all boxes of the row, those behind the last filled one too.
func (l line) padded() []content {
	list := append([]content(nil), l.boxes...)
	for len(list) < boxes {
		list = append(list, content{Box: Box{l.sheet, cellName(firstBox+len(list), l.row)}})
	}
	return list
}

// box returns the content of the n-th box.
func (l line) box(n int) content {
	if n < len(l.boxes) {
		return l.boxes[n]
	}
	return content{Box: Box{l.sheet, cellName(firstBox+n, l.row)}}
}

// stray finds fault with what stands between the boxes of a row.
func (r *reader) stray(l line, places ...int) {
	for n, c := range l.boxes {
		if !c.empty() && !slices.Contains(places, n) {
			r.p.fault(c, "nothing is asked for here")
		}
	}
}

func (r *reader) potentials(f *findings, l line) {
	e := r.electrode
	if c := l.box(electrodeBox); !c.empty() {
		named, why := c.electrode()
		if why != "" {
			r.p.fault(c, why)
			return
		}
		e = named
	}
	places := []int{electrodeBox}
	for n := range potentialBoxes {
		places = append(places, n)
		c := l.box(n)
		if c.empty() {
			continue
		}
		m, why := c.volts(e)
		if why != "" {
			r.p.fault(c, why)
			continue
		}
		f.potentials = append(f.potentials, m)
		f.at("zone", c.Box)
	}
	r.stray(l, places...)
}

func (r *reader) coating(f *findings, l line) {
	if c := l.box(brokenBox); !c.empty() {
		x, why := c.perCent()
		if twice := f.coating != nil; why == "" && twice {
			why = "want it once for the zone"
		}
		if why != "" {
			r.p.fault(c, why)
		} else {
			f.coating = &x
			f.at("zone", c.Box)
		}
	}
	if c := l.box(wordBox); !c.empty() {
		word, why := c.condition()
		if why != "" {
			r.p.fault(c, why)
		} else {
			f.word = word
			f.at("zone", c.Box)
		}
	}
	if c := l.box(waterBox); !c.empty() {
		x, why := c.resistivity()
		if why != "" {
			r.p.fault(c, why)
		} else {
			f.resistivity = &x
			f.at("zone", c.Box)
		}
	}
	r.stray(l, brokenBox, wordBox, waterBox)
}

func (r *reader) remark(f *findings, l line) {
	c, _ := l.first()
	text, why := c.words(maxText)
	if why != "" {
		r.p.fault(c, why)
		return
	}
	f.note = text
	f.at("zone", c.Box)
}

// counts reads pieces by quarters of wastage, then those of countNames.
func (r *reader) counts(f *findings, l line) {
	var places []int
	for i := range quarters {
		places = append(places, i)
		c := l.box(i)
		if c.empty() {
			continue
		}
		n, why := c.pieces()
		if why != "" {
			r.p.fault(c, why)
			continue
		}
		if f.grades == nil {
			f.grades = &hull.Grades{Bounds: append([]float64(nil), quarters...), Counts: make([]int, len(quarters))}
		}
		f.grades.Counts[i] += n
		f.at("graded", c.Box)
	}
	for i := range countNames {
		places = append(places, countBox+i)
		c := l.box(countBox + i)
		if c.empty() {
			continue
		}
		n, why := c.pieces()
		if why != "" {
			r.p.fault(c, why)
			continue
		}
		f.counts[i] += n
		f.counted = f.counted || n > 0
		f.at("counted", c.Box)
	}
	if f.grades != nil && f.grades.Counts[0]+f.grades.Counts[1]+f.grades.Counts[2]+f.grades.Counts[3] == 0 {
		f.grades = nil
	}
	r.stray(l, places...)
}

// measured pairs girths and lengths, box by box.
func (r *reader) measured(f *findings, girths, lengths []content) {
	at := func(list []content, i int) content {
		if i < len(list) {
			return list[i]
		}
		return content{}
	}
	pattern, ok := r.a.Pattern(f.pattern)
	if !ok {
		return
	}
	for i := range max(len(girths), len(lengths)) {
		g, l := at(girths, i), at(lengths, i)
		if g.empty() && l.empty() {
			continue
		}
		if g.empty() || l.empty() {
			lone, other := g, "length"
			if g.empty() {
				lone, other = l, "girth"
			}
			r.p.fault(lone, "want the "+other+" of this piece too")
			continue
		}
		girth, why := g.metres(1000)
		if why != "" {
			r.p.fault(g, why)
		}
		length, why2 := l.metres(1000)
		if why2 != "" {
			r.p.fault(l, why2)
		}
		if why != "" || why2 != "" {
			continue
		}
		m, why := measured(pattern, girth, length)
		if why != "" {
			r.p.fault(g, why)
			continue
		}
		f.measured = append(f.measured, m)
		f.at("measured", g.Box)
		f.at("measured", l.Box)
	}
}

package sheet

import (
	"fmt"
	"strings"

	"anodewright/anodes/survey"
	"anodewright/hull"
)

// csvRow is a line being read.
type csvRow struct {
	record
	p       *Preview
	a       *hull.Asset
	columns map[string]int

	from1904 bool // the workbook's dates
}

// cell returns what stands in a column, empty where there is none.
func (r *csvRow) cell(title string) content {
	c := content{Box: Box{Cell: fmt.Sprintf("line %d, %s", r.line, title)}}
	i, ok := r.columns[title]
	if !ok || i >= len(r.cells) {
		return c
	}
	if r.boxes != nil {
		c = r.boxes[i]
	}
	// An apostrophe keeps a text that a spreadsheet might take for a formula.
	c.text = strings.TrimPrefix(strings.TrimSpace(r.cells[i]), "'")
	if len(c.text) > maxText {
		r.p.fault(c, fmt.Sprintf("want at most %d letters", maxText))
		c.text = ""
	}
	return c
}

// each gives the single figures of a cell that holds several.
func (r *csvRow) each(title string, do func(c content) string) {
	cell := r.cell(title)
	if cell.empty() {
		return
	}
	if cell.number || cell.odd {
		if why := do(cell); why != "" {
			r.p.fault(cell, why)
		}
		return
	}
	text := strings.NewReplacer("\u00a0", " ", " %", "%").Replace(cell.text)
	for _, part := range strings.FieldsFunc(text, func(c rune) bool { return c == ' ' || c == ';' || c == '|' || c == '\n' || c == '\t' }) {
		c := content{Box: cell.Box, text: part}
		if c.empty() {
			continue
		}
		if why := do(c); why != "" {
			r.p.fault(c, why)
		}
	}
}

// one reads a cell of one value.
func (r *csvRow) one(title string, do func(c content) string) {
	if c := r.cell(title); !c.empty() {
		if why := do(c); why != "" {
			r.p.fault(c, why)
		}
	}
}

// read reads the line. A line on which nothing was found is none.
func (r *csvRow) read() (*findings, key) {
	if !r.tells() {
		return nil, key{}
	}
	f := &findings{}
	if c := r.cell("asset"); !c.empty() && !strings.EqualFold(strings.TrimSpace(c.text), r.a.Name) {
		r.p.fault(c, "the line is of another asset than "+r.a.Name)
		return nil, key{}
	} else if !c.empty() {
		r.p.Asset = r.a.Name
	}
	z := r.zone()
	if z == nil {
		return nil, key{}
	}
	f.zone = z.ID
	if c := r.cell("date"); c.empty() {
		r.p.fault(c, "want the date of the survey")
	} else if d, why := c.day(r.from1904); why != "" {
		r.p.fault(c, why)
	} else {
		f.date, f.dated = d, true
	}
	r.one("by", func(c content) (why string) { f.by, why = c.words(200); return why })
	if !r.set(f, z) {
		return nil, key{}
	}
	k := key{zone: f.zone, pattern: f.pattern, fitted: f.fitted}
	r.one("pieces", func(c content) (why string) { k.count, why = c.pieces(); return why })
	r.wastage(f, z)
	r.counts(f)
	r.ofZone(f)
	r.one("how", func(c content) (why string) { f.how, why = c.words(200); return why })
	r.one("note", func(c content) (why string) {
		f.note, why = c.words(maxText)
		f.at("zone", c.Box)
		return why
	})
	return f, k
}

// tells reports whether anything was found.
func (r *csvRow) tells() bool {
	for _, title := range csvColumns[8:] {
		if title != "electrode" && !r.cell(title).empty() {
			return true
		}
	}
	return false
}

// zone finds the zone by its id, else by its name.
func (r *csvRow) zone() *hull.Zone {
	c := r.cell("zone")
	name := strings.TrimSpace(c.text)
	if z, ok := r.a.Zone(name); ok {
		return z
	}
	var found *hull.Zone
	for i := range r.a.Zones {
		if z := &r.a.Zones[i]; strings.EqualFold(z.ID, name) || strings.EqualFold(z.Name, name) {
			if found != nil {
				r.p.fault(c, "want the id of the zone, as several have this name")
				return nil
			}
			found = z
		}
	}
	if found == nil {
		r.p.fault(c, "want the id or the name of one of the asset's zones")
	}
	return found
}

// set finds the pattern and the date of fitting; where the zone has only one
// set that it can be, they need not be there.
func (r *csvRow) set(f *findings, z *hull.Zone) bool {
	ok := true
	r.one("pattern", func(c content) string {
		name := strings.TrimSpace(c.text)
		for _, p := range r.a.Patterns {
			if strings.EqualFold(p.ID, name) || p.Name != "" && strings.EqualFold(p.Name, name) {
				f.pattern = p.ID
				return ""
			}
		}
		ok = false
		return "want the id or the name of one of the asset's patterns"
	})
	r.one("fitted", func(c content) (why string) {
		f.fitted, why = c.day(r.from1904)
		ok = ok && why == ""
		return why
	})
	single := 0
	for _, s := range z.Fitted {
		if (f.pattern == "" || s.Pattern == f.pattern) && (f.fitted.IsZero() || s.Fitted == f.fitted) {
			single++
		}
	}
	if single == 1 && r.tellsOfPieces() {
		s := z.Fitted[survey.Set(z, &hull.Reading{Pattern: f.pattern, Fitted: f.fitted})]
		f.pattern, f.fitted = s.Pattern, s.Fitted
	}
	return ok
}

func (r *csvRow) tellsOfPieces() bool {
	for _, title := range csvColumns[8:21] {
		if !r.cell(title).empty() {
			return true
		}
	}
	return false
}

// wastage reads what was found of single pieces.
func (r *csvRow) wastage(f *findings, z *hull.Zone) {
	pattern, known := r.a.Pattern(f.pattern)
	if set := survey.Set(z, &hull.Reading{Pattern: f.pattern, Fitted: f.fitted}); !known && set >= 0 {
		pattern, known = r.a.Pattern(z.Fitted[set].Pattern)
	}
	r.each("weighed_wastage", func(c content) string {
		x, why := c.share()
		if why == "" {
			f.weighed = append(f.weighed, x)
			f.at("weighed", c.Box)
		}
		return why
	})
	r.each("weighed_kg", func(c content) string {
		kg, why := c.kilograms()
		if why == "" && !known {
			why = "want the pattern too, or the mass of a new piece is not known"
		}
		if why != "" {
			return why
		}
		x, why := wastageOf(pattern, kg)
		if why == "" {
			f.weighed = append(f.weighed, x)
			f.at("weighed", c.Box)
		}
		return why
	})
	r.each("percent", func(c content) string {
		x, why := c.perCent()
		if why == "" {
			f.eye = append(f.eye, x)
			f.at("seen", c.Box)
		}
		return why
	})
	r.sizes(f, pattern, "girth_m", "length_m", 1)
	r.sizes(f, pattern, "girth_mm", "length_mm", 1000)
	r.one("grades", func(c content) string {
		g, why := parseGrades(c.text)
		if why == "" {
			f.grades = g
			f.at("graded", c.Box)
		}
		return why
	})
}

// sizes pairs the girths and the lengths of two columns.
func (r *csvRow) sizes(f *findings, p *hull.Pattern, girth, length string, perMetre float64) {
	read := func(title string) (list []float64) {
		r.each(title, func(c content) string {
			x, why := c.metres(perMetre)
			if why == "" {
				list = append(list, x)
			}
			return why
		})
		return list
	}
	girths, lengths := read(girth), read(length)
	at := r.cell(girth)
	if len(girths) != len(lengths) {
		r.p.fault(at, fmt.Sprintf("want as many girths as lengths, got %d and %d", len(girths), len(lengths)))
		return
	}
	for i := range girths {
		m, why := hull.Measured{Girth: girths[i], Length: lengths[i]}, "want the pattern too, or the size of a new piece is not known"
		if p != nil {
			m, why = measured(p, girths[i], lengths[i])
		}
		if why != "" {
			r.p.fault(at, why)
			continue
		}
		f.measured = append(f.measured, m)
		f.at("measured", at.Box)
		f.at("measured", r.cell(length).Box)
	}
}

func (r *csvRow) counts(f *findings) {
	for i, title := range countColumns {
		r.one(title, func(c content) string {
			n, why := c.pieces()
			if why == "" {
				f.counts[i] = n
				f.counted = f.counted || n > 0
				f.at("counted", c.Box)
			}
			return why
		})
	}
}

// ofZone reads potentials, coating and water.
func (r *csvRow) ofZone(f *findings) {
	e := hull.SilverChloride
	r.one("electrode", func(c content) string {
		named, why := c.electrode()
		if why == "" {
			e = named
		}
		return why
	})
	if cell := r.cell("potentials"); !cell.empty() {
		for _, text := range potentialTexts(cell.text) {
			c := content{Box: cell.Box, text: text}
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
	}
	r.one("coating_percent", func(c content) string {
		x, why := c.perCent()
		if why == "" {
			f.coating = &x
			f.at("zone", c.Box)
		}
		return why
	})
	r.one("coating_word", func(c content) (why string) {
		f.word, why = c.condition()
		f.at("zone", c.Box)
		return why
	})
	r.one("water_resistivity_ohm_m", func(c content) string {
		x, why := c.resistivity()
		if why == "" {
			f.resistivity = &x
			f.at("zone", c.Box)
		}
		return why
	})
}

// potentialTexts parts several potentials: by semicolons, else by blanks where
// no names of electrodes are among them.
func potentialTexts(text string) []string {
	if e, _ := cutElectrode(text); strings.Contains(text, ";") || e != "" {
		return strings.Split(text, ";")
	}
	return strings.Fields(text)
}

// parseGrades reads counts by class of wastage, the last class open above:
// 0-25-50-75: 0 5 3 0, the bounds in per cent. Four counts alone are of these
// classes.
func parseGrades(text string) (*hull.Grades, string) {
	const want = "want bounds in per cent and a count for each class, such as 0-25-50-75: 0 5 3 0"
	g := &hull.Grades{}
	bounds, counts, found := strings.Cut(text, ":")
	if !found {
		g.Bounds, counts = append(g.Bounds, quarters...), bounds
	} else {
		for _, part := range strings.FieldsFunc(bounds, func(r rune) bool { return r == '-' || r == '–' || r == ' ' || r == '%' }) {
			x, unit, why := content{text: part}.figure()
			if why != "" || unit != "" || x < 0 || x > 100 || len(g.Bounds) > 0 && x/100 <= g.Bounds[len(g.Bounds)-1] {
				return nil, want
			}
			g.Bounds = append(g.Bounds, tidy(x/100))
		}
	}
	for _, part := range strings.FieldsFunc(counts, func(r rune) bool { return r == ' ' || r == ';' || r == '|' }) {
		n, why := content{text: part}.pieces()
		if why != "" {
			return nil, want
		}
		g.Counts = append(g.Counts, n)
	}
	if len(g.Counts) == 0 || len(g.Counts) != len(g.Bounds) {
		return nil, want
	}
	return g, ""
}

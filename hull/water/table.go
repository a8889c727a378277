package water

import (
	"slices"
	"strings"
	"sync"
	"unicode"

	"anodewright/assets"
)

// The media of the tables' entries, in the words of the asset file.
const (
	seawater = "seawater"
	fresh    = "fresh"
	sediment = "sediment"
	soil     = "soil"
)

// Range is a figure's mean over the year or place and the bounds it moves in.
type Range struct{ Low, Mean, High float64 }

// Entry is one sea area, river or lake, sediment or soil of the reference
// tables: what a user picks from to make a water of his own. A nil range is a
// figure that the source does not have.
type Entry struct {
	ID             string // the name in small letters, figures and hyphens
	Name           string
	Medium         string
	Salinity       *Range // practical salinity
	Temperature    *Range // degC: annual mean, coldest and warmest month
	Conductivity25 *Range // uS/cm at 25 degC
	// Resistivity in ohm m: of seawater at the mean, warm and salt, and cold
	// and fresh (PSS-78); of a river or lake likewise, at 15 degC where no
	// temperature is known; of sediment and soil as the source has it.
	Resistivity Range
	// Stated says that the source gives the resistivity itself.
	Stated     bool
	Source     string
	Confidence string
	Note       string
}

// Entries returns all entries: sea areas, the codes' seawater, rivers and
// lakes, sediments, soils. The slice is not to be changed.
func Entries() []Entry { return entries() }

// Find returns the entry of this name or id, whatever the case of its
// letters.
func Find(name string) (Entry, bool) {
	for _, e := range entries() {
		if strings.EqualFold(e.Name, name) || strings.EqualFold(e.ID, name) {
			return e, true
		}
	}
	return Entry{}, false
}

// Search returns the entries whose name, medium or source have all words of
// the query, whatever their case; all entries for an empty query.
func Search(query string) []Entry {
	words := strings.Fields(strings.ToLower(query))
	var found []Entry
	for _, e := range entries() {
		text := strings.ToLower(e.Name + " " + e.Medium + " " + e.Source)
		if !slices.ContainsFunc(words, func(w string) bool { return !strings.Contains(text, w) }) {
			found = append(found, e)
		}
	}
	return found
}

var entries = sync.OnceValue(func() []Entry {
	var es []Entry
	es = append(es, seaAreas()...)
	es = append(es, stated("code-resistivity", seawater)...)
	es = append(es, rivers()...)
	es = append(es, stated("sediments", sediment)...)
	es = append(es, stated("soils", soil)...)
	return es
})

func seaAreas() []Entry {
	return each("sea-areas", func(c cells, e *Entry) {
		e.Medium = seawater
		e.Salinity = c.span("salinity", "salinity min", "salinity max")
		e.Temperature = c.span("temperature", "coldest month", "warmest month")
		if e.Temperature == nil {
			e.Resistivity = at15(Resistivity, *e.Salinity)
			return
		}
		s, t := e.Salinity, e.Temperature
		e.Resistivity = Range{Resistivity(s.High, t.High), Resistivity(s.Mean, t.Mean), Resistivity(s.Low, t.Low)}
	})
}

// at15 is a range of resistivity where no temperature is known: at 15 degC.
func at15(resistivity func(x, t90 float64) float64, x Range) Range {
	return Range{resistivity(x.High, 15), resistivity(x.Mean, 15), resistivity(x.Low, 15)}
}

func rivers() []Entry {
	return each("rivers", func(c cells, e *Entry) {
		e.Medium = fresh
		e.Conductivity25 = c.span("conductivity", "conductivity min", "conductivity max")
		e.Temperature = c.span("temperature", "temperature min", "temperature max")
		if e.Temperature == nil {
			e.Resistivity = at15(FreshResistivity, *e.Conductivity25)
			return
		}
		k, t := e.Conductivity25, e.Temperature
		e.Resistivity = Range{FreshResistivity(k.High, t.High), FreshResistivity(k.Mean, t.Mean), FreshResistivity(k.Low, t.Low)}
	})
}

// stated returns the entries of a table that gives the resistivity itself.
func stated(table, medium string) []Entry {
	return each(table, func(c cells, e *Entry) {
		e.Medium, e.Stated = medium, true
		if r := c.span("resistivity", "resistivity min", "resistivity max"); r != nil {
			e.Resistivity = *r
		} else {
			x := *c["resistivity"]
			e.Resistivity = Range{x, x, x}
		}
	})
}

// eachRow is the clause of a table whose rows have sources of their own, in
// their notes.
const eachRow = "named with each row"

// cells are the values of a table's row by column.
type cells map[string]*float64

// span returns a range of three columns, nil where the row lacks one.
func (c cells) span(mean, low, high string) *Range {
	m, l, h := c[mean], c[low], c[high]
	if m == nil || l == nil || h == nil {
		return nil
	}
	return &Range{*l, *m, *h}
}

// each makes an entry of every row of a table.
func each(table string, fill func(cells, *Entry)) []Entry {
	t := assets.Get(table)
	var es []Entry
	for _, row := range t.Rows {
		c := cells{}
		for i, v := range row.Values {
			c[t.Columns[i]] = v
		}
		e := Entry{ID: idOf(row.Name), Name: row.Name, Source: t.Source(), Confidence: row.Confidence, Note: row.Note}
		if t.Clause == eachRow && row.Note != "" {
			e.Source, e.Note = row.Note, ""
		}
		fill(c, &e)
		es = append(es, e)
	}
	return es
}

// idOf makes an id of a name: small letters and figures, hyphens for the rest.
func idOf(name string) string {
	parts := strings.FieldsFunc(strings.ToLower(name), func(r rune) bool {
		return r > unicode.MaxASCII || !unicode.IsLetter(r) && !unicode.IsDigit(r)
	})
	return strings.Join(parts, "-")
}

// Severity says how corrosive a soil of this resistivity in ohm m is to bare
// steel: common practice, no source.
func Severity(rho float64) string {
	rows := assets.Get("soil-severity").Rows
	for _, r := range rows {
		if rho > *r.Values[0] {
			return r.Name
		}
	}
	return rows[len(rows)-1].Name
}

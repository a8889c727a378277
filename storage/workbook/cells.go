package workbook

import (
	"strings"

	"github.com/xuri/excelize/v2"

	"anodewright/hull"
)

// cells are those that formulas of other sheets refer to.
type cells struct {
	zones    []zoneCells
	patterns []patternCells
	figures  map[string]num // of the basis, by their defined names
	calc     calcCells
	cost     num // of the plan, on the sheet Schedule
	wastage  wastageCells
	demand   map[int]int // first row of a zone on the sheet Demand
}

// zoneCells are a zone's entries on the sheet Zones. bare is that of the
// coated part's formula; a cell without an address is not on the sheet.
type zoneCells struct{ wetted, bare, a, b, applied, least, steps, most num }

// patternCells are a pattern's entries on the sheet Patterns.
type patternCells struct {
	length, width, height, radius, girth, diameter, area num
	net, gross, utilisation, capacity, potential, price  num
	rho, ohmNew, ohmWorn                                 num // ohm m, ohm
}

// define names a cell, for formulas and for people.
func (b *book) define(name string, n num) {
	b.check(b.f.SetDefinedName(&excelize.DefinedName{Name: name, RefersTo: n.at}))
	if b.cells.figures == nil {
		b.cells.figures = map[string]num{}
	}
	b.cells.figures[name] = num{name, n.v}
}

// figure returns a figure of the basis.
func (b *book) figure(name string) num {
	n, ok := b.cells.figures[name]
	if !ok {
		panic("workbook: no cell is named " + name)
	}
	return n
}

// formed writes a formula: every #n is replaced by the nth cell's address,
// short within the sheet that the formula stands on.
func (s *sheet) formed(v float64, pattern string, args ...num) live {
	var b strings.Builder
	for i := 0; i < len(pattern); i++ {
		if pattern[i] != '#' {
			b.WriteByte(pattern[i])
			continue
		}
		n := 0
		for ; i+1 < len(pattern) && '0' <= pattern[i+1] && pattern[i+1] <= '9'; i++ {
			n = 10*n + int(pattern[i+1]-'0')
		}
		at := args[n-1].at
		if strings.Contains(at, s.own) {
			at = strings.ReplaceAll(at, s.own, "")
		}
		b.WriteString(at)
	}
	return live{b.String(), v}
}

// cellsFrom returns the address of the cells from first to last, in one column.
func cellsFrom(first, last num) num {
	_, cell, _ := strings.Cut(last.at, "!")
	return num{at: first.at + ":" + cell}
}

// replace makes a formula of a figure that stands already.
func (b *book) replace(n num, formula string) {
	name, cell, _ := strings.Cut(strings.ReplaceAll(n.at, "$", ""), "!")
	name = strings.Trim(name, "'")
	col, row, err := excelize.CellNameToCoordinates(cell)
	b.check(err)
	id, err := b.f.GetCellStyle(name, cell)
	b.check(err)
	for st, known := range b.styles {
		if known == id {
			s := b.blankSheet(name, col)
			s.put(col-1, row, s.formed(n.v, formula), st)
			s.settle()
			return
		}
	}
}

// plus adds cells up; 0 without any.
func plus(all []num) num {
	if len(all) == 0 {
		return num{at: "0"}
	}
	if len(all) == 1 {
		return all[0]
	}
	sum := num{}
	var parts []string
	for _, n := range all {
		parts = append(parts, n.at)
		sum.v += n.v
	}
	sum.at = "(" + strings.Join(parts, "+") + ")"
	return sum
}

// record is one row of a table of the sheet Calculation, from the left.
type record struct {
	*sheet
	values []any
}

func (s *sheet) record(values ...any) *record { return &record{s, values} }

// blank leaves cells free.
func (r *record) blank(n int) {
	for range n {
		r.values = append(r.values, nil)
	}
}

// in adds an entry, by adds a formula; both return their cell.
func (r *record) in(v float64) num {
	r.values = append(r.values, input{v})
	return r.ref(len(r.values)-1, r.next, v)
}

// fixed adds a value that no one has to change.
func (r *record) fixed(v float64) num {
	r.values = append(r.values, v)
	return r.ref(len(r.values)-1, r.next, v)
}

func (r *record) on(d hull.Date) num {
	v := serial(d)
	if d < firstDate {
		return r.in(v)
	}
	r.values = append(r.values, d)
	return r.ref(len(r.values)-1, r.next, v)
}

func (r *record) by(v float64, pattern string, args ...num) num {
	r.values = append(r.values, r.formed(v, pattern, args...))
	return r.ref(len(r.values)-1, r.next, v)
}

// of adds what stands in another cell, or an entry where there is none.
func (r *record) of(n num) num {
	if n.at == "" {
		return r.in(n.v)
	}
	return r.by(n.v, "#1", n)
}

// done writes the row.
func (r *record) done() { r.row(r.values...) }

package workbook

import (
	"fmt"
	"math"
	"strconv"

	"github.com/xuri/excelize/v2"

	"anodewright/anodes/plan"
	"anodewright/hull"
)

// book is the workbook being written. The first error stays; what follows it
// does no harm.
type book struct {
	f      *excelize.File
	o      *plan.Outcome
	a      *hull.Asset
	names  []string // of the zones, in their order, each once
	styles map[style]int
	cells  cells // that formulas of other sheets refer to
	err    error

	revision int64 // of the asset; 0: not said
}

func (b *book) check(err error) {
	if b.err == nil {
		b.err = err
	}
}

// column is one column of a table.
type column struct {
	entry  bool   // its cells are entries
	group  string // heading over this and the following columns of the same group
	head   string
	format format
	most   float64 // widest that text makes the column; 0: as wide as needed
}

// live is a formula with its value.
type live struct {
	formula string
	value   float64
}

// input is a value that a person may change: formulas follow it.
type input struct{ value any }

// num is a cell that formulas refer to, by its whole address or a defined
// name, with its value.
type num struct {
	at string
	v  float64
}

// live is a formula with its value, which shows a cell of another sheet.
func (n num) live() live { return live{n.at, n.v} }

// sheet writes one worksheet from the top down.
type sheet struct {
	*book
	name    string
	next    int // row, from 1
	cols    int // of the whole sheet
	columns []column
	widths  []float64
	texts   []span // what may need more than one line
	parts   []int  // rows before which a page may be broken
	own     string // the name as formulas refer to it
	runs    []run  // by column: styles that wait to be written
	merges  [][2]string
}

// span is a text in one cell, or in several that are merged.
type span struct {
	row, first, last int // columns
	text             string
	style            style
}

// sheet starts a worksheet that is so many columns wide, with its title.
func (b *book) sheet(name, heading string, cols int) *sheet {
	s := b.blankSheet(name, cols)
	s.line(title, joined(": ", b.a.Name, heading))
	return s
}

func (b *book) blankSheet(name string, cols int) *sheet {
	return &sheet{book: b, name: name, own: "'" + name + "'!", next: 1, cols: cols, widths: make([]float64, cols), runs: make([]run, cols)}
}

// run are cells of a column, one below the other, of one style.
type run struct{ style, first, last int }

// styled gives a cell its style: with those around it, when the run ends, which
// is much faster than cell by cell.
func (s *sheet) styled(col, row, style int) {
	r := &s.runs[col]
	if r.last > 0 && r.style == style && row == r.last+1 {
		r.last = row
		return
	}
	s.settleColumn(col)
	*r = run{style, row, row}
}

func (s *sheet) settleColumn(col int) {
	if r := s.runs[col]; r.last > 0 {
		s.check(s.f.SetCellStyle(s.name, at(col, r.first), at(col, r.last), r.style))
	}
}

// settle writes the styles and merges that wait.
func (s *sheet) settle() {
	for c := range s.runs {
		s.settleColumn(c)
		s.runs[c] = run{}
	}
	for _, m := range s.merges {
		s.check(s.f.MergeCell(s.name, m[0], m[1]))
	}
	s.merges = nil
}

// ref returns the whole address of a cell of the sheet, its column counted
// from 0, with its value.
func (s *sheet) ref(col, row int, v float64) num {
	return num{s.own + absolute(col, row), v}
}

// at returns the name of a cell, its column counted from 0.
func at(col, row int) string {
	return letters(col) + strconv.Itoa(row)
}

// absolute is the name of a cell that stays when it is copied.
func absolute(col, row int) string { return "$" + letters(col) + "$" + strconv.Itoa(row) }

// letters are the name of a column, counted from 0.
func letters(col int) string {
	const abc = "ABCDEFGHIJKLMNOPQRSTUVWXYZ"
	if col < len(abc) {
		return abc[col : col+1]
	}
	return letters(col/len(abc)-1) + abc[col%len(abc):col%len(abc)+1]
}

// put writes a value and its style. A string is always text; a date that the
// spreadsheet's calendar does not have is text; a figure that does not exist
// is left blank.
func (s *sheet) put(col, row int, v any, st style) {
	cell := at(col, row)
	if in, ok := v.(input); ok {
		v, st.use = in.value, entry
	}
	if _, ok := v.(live); ok {
		st.use = formula
	}
	s.styled(col, row, s.style(st))
	switch v := v.(type) {
	case nil:
	case string:
		if v = clean(v); v != "" {
			s.check(s.f.SetCellStr(s.name, cell, escape(v)))
		}
	case int:
		s.check(s.f.SetCellInt(s.name, cell, int64(v)))
	case float64:
		if known(v) {
			s.check(s.f.SetCellFloat(s.name, cell, v, -1, 64))
		}
	case hull.Date:
		switch {
		case v.IsZero():
		case v < firstDate:
			s.check(s.f.SetCellStr(s.name, cell, v.String()))
		default:
			s.check(s.f.SetCellFloat(s.name, cell, serial(v), -1, 64))
		}
	case live:
		if known(v.value) {
			s.check(s.f.SetCellFloat(s.name, cell, v.value, -1, 64))
		}
		s.check(s.f.SetCellFormula(s.name, cell, v.formula))
	default:
		panic(fmt.Sprintf("workbook: no cell for a %T", v))
	}
}

// cell writes one cell of a table.
func (s *sheet) cell(col, row int, v any, st style) {
	s.put(col, row, v, st)
	s.measure(col, v, st)
	if in, ok := v.(input); ok {
		v = in.value
	}
	if t, ok := v.(string); ok && t != "" && (st.format.left() || st.look == head) {
		s.texts = append(s.texts, span{row, col, col, clean(t), st})
	}
}

// across writes a text into merged cells of a row.
func (s *sheet) across(first, last, row int, t string, l look) {
	s.put(first, row, t, style{look: l, format: text})
	if last > first {
		s.merges = append(s.merges, [2]string{at(first, row), at(last, row)})
	}
	s.texts = append(s.texts, span{row, first, last, clean(t), style{look: l, format: text}})
}

// measure widens the column for a value, up to what the column may be.
func (s *sheet) measure(col int, v any, st style) {
	const least, mostFigure, mostLabel = 5, 60, 30
	padding := 2.4 // beside a figure
	if st.format.left() {
		padding = 3.2 // with the indent of a text
	}
	if in, ok := v.(input); ok {
		v = in.value
	}
	w, most := 0.0, 0.0
	if col < len(s.columns) {
		most = s.columns[col].most
	}
	switch v := v.(type) {
	case string:
		if most == 0 {
			most = mostLabel
		}
		w = min(longestLine(clean(v)), most)
		if st.look == head {
			w = longestWord(v)
		}
	case hull.Date:
		w = float64(len(datePattern))
	case int:
		w = width(st.format.shown(float64(v)))
	case float64:
		w = width(st.format.shown(v))
	case live:
		w = width(st.format.shown(v.value))
	}
	if st.look.bold() {
		w *= bolder
	}
	s.widths[col] = max(s.widths[col], least, min(w, mostFigure)+padding)
}

// line writes a sentence across the whole sheet.
func (s *sheet) line(l look, sentence string) {
	s.across(0, s.cols-1, s.next, sentence, l)
	s.next++
}

// gap leaves a row free.
func (s *sheet) gap() { s.next++ }

// header starts a table: its headings, and a row above for groups where there
// are any. It returns the first row of the headings.
func (s *sheet) header(columns ...column) int {
	s.columns = columns
	first := s.next
	if groups := s.groups(); len(groups) > 0 {
		for c := range columns {
			s.put(c, s.next, nil, style{look: group, format: text})
		}
		for _, g := range groups {
			s.across(g[0], g[1], s.next, columns[g[0]].group, group)
		}
		s.next++
	}
	for c, col := range columns {
		if col.entry {
			col.head += ", input"
		}
		s.cell(c, s.next, col.head, style{look: head, format: col.format})
	}
	s.next++
	return first
}

// groups returns the first and the last column of each group of columns.
func (s *sheet) groups() (groups [][2]int) {
	for c, col := range s.columns {
		switch {
		case col.group == "":
		case c > 0 && s.columns[c-1].group == col.group:
			groups[len(groups)-1][1] = c
		default:
			groups = append(groups, [2]int{c, c})
		}
	}
	return groups
}

// row writes one row of the table and returns its number.
func (s *sheet) row(values ...any) int { return s.write(body, values) }

func (s *sheet) write(l look, values []any) int {
	for c, v := range values {
		s.cell(c, s.next, v, style{look: l, format: s.columns[c].format})
	}
	s.next++
	return s.next - 1
}

// totals writes a row of sums over the rows from first on: under each column
// named, the live sum with the value given. name is what the row says.
func (s *sheet) totals(name string, first int, sums map[int]float64) {
	last := s.next - 1
	values := make([]any, len(s.columns))
	values[0] = name
	for c, v := range sums {
		if last >= first {
			values[c] = live{fmt.Sprintf("SUM(%s:%s)", at(c, first), at(c, last)), v}
		} else {
			values[c] = 0
		}
	}
	s.write(total, values)
}

// known reports whether a figure exists.
func known(x float64) bool { return !math.IsNaN(x) && !math.IsInf(x, 0) }

// or returns the figure, or the word where it does not exist.
func or(x float64, word string) any {
	if known(x) {
		return x
	}
	return word
}

// some returns the figure, or nothing where it is zero: not given.
func some(x float64) any {
	if x == 0 {
		return nil
	}
	return x
}

// firstDate is the first day that all spreadsheets count alike: before it
// stands the 29 February 1900 that never was.
var firstDate = hull.NewDate(1900, 3, 1)

// serial returns a date as spreadsheets count it.
func serial(d hull.Date) float64 { return float64(d-firstDate) + 61 }

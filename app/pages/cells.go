package pages

import (
	"math"
	"strconv"
	"strings"

	"anodewright/app/grid"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// fieldRows is a table of the items of one of the asset's lists: a row an
// item, a column a field.
type fieldRows struct {
	f      *Frame
	list   session.List
	fields []session.Field
}

func (r fieldRows) columns(widths ...float32) []grid.Column {
	var cols []grid.Column
	for i, f := range r.fields {
		cols = append(cols, grid.Column{
			ID: f.Key, Title: say.T(f.Title), Unit: f.UnitIn(r.f.s.Asset()), Width: widths[i], Right: f.Number, Edit: true, Choices: r.choices(f), Fill: i == 0,
		})
	}
	return cols
}

// showUnits puts the units into the heads of a grid of these rows, whose money
// follows the asset's currency.
func (r fieldRows) showUnits(g *grid.Grid) {
	for i, f := range r.fields {
		g.SetUnit(i, f.UnitIn(r.f.s.Asset()))
	}
}

func (r fieldRows) choices(f session.Field) func(int) []string {
	if f.Choices == nil {
		return nil
	}
	return func(int) []string { return f.Choices(r.f.s.Asset()) }
}

func (r fieldRows) Rows() int {
	a := r.f.s.Asset()
	switch {
	case a == nil:
		return 0
	case r.list == session.Zones:
		return len(a.Zones)
	case r.list == session.Waters:
		return len(a.Waters)
	case r.list == session.Patterns:
		return len(a.Patterns)
	case r.list == session.Readings:
		return len(a.Readings)
	}
	return len(a.Dockings)
}

func (r fieldRows) Cell(row, col int) grid.Cell {
	text, fault := r.f.s.Text(r.list, row, r.fields[col])
	if fault == "" && r.fields[col].Number {
		text = grouped(brief(r.fields[col], text))
	}
	return grid.Cell{Text: text, Fault: say.Sentence(fault), Bold: col == 0}
}

// EditText is what the editor starts with: the plain text.
func (r fieldRows) EditText(row, col int) string {
	text, _ := r.f.s.Text(r.list, row, r.fields[col])
	return text
}

func (r fieldRows) Commit(row, col int, text string) {
	r.f.report(r.f.s.SetText(r.list, row, r.fields[col], text))
}

// fieldLines is a table of the fields of one item: a row a field.
type fieldLines struct {
	f      *Frame
	list   session.List
	item   func() int // -1: none
	fields []session.Field
}

func (l fieldLines) columns() []grid.Column {
	return []grid.Column{
		{ID: "field", Title: say.T("Field"), Width: 148},
		{ID: "value", Title: say.T("Value"), Width: 101, Edit: true, Fill: true, Choices: func(row int) []string {
			if c := l.fields[row].Choices; c != nil {
				return c(l.f.s.Asset())
			}
			return nil
		}},
	}
}

func (l fieldLines) Rows() int {
	if l.f.s.Asset() == nil || l.item() < 0 {
		return 0
	}
	return len(l.fields)
}

func (l fieldLines) Cell(row, col int) grid.Cell {
	f := l.fields[row]
	if col == 0 {
		return grid.Cell{Text: say.T(f.Title), Sub: f.UnitIn(l.f.s.Asset()), Muted: true}
	}
	text, fault := l.f.s.Text(l.list, l.item(), f)
	return grid.Cell{Text: text, Fault: say.Sentence(fault)}
}

func (l fieldLines) Commit(row, col int, text string) {
	l.f.report(l.f.s.SetText(l.list, l.item(), l.fields[row], text))
}

// brief is a number's text with no more figures than tell it, where another
// unit than the stored one makes many of them.
func brief(f session.Field, text string) string {
	if f.Quantity == say.Plain || !say.US() {
		return text
	}
	x, err := session.ParseNumber(text)
	if err != nil {
		return text
	}
	return briefly(x)
}

// briefly writes a figure with three figures, or as many as its whole part has.
func briefly(x float64) string {
	if x == 0 {
		return "0"
	}
	decimals := min(max(2-int(math.Floor(math.Log10(math.Abs(x)))), 0), 6)
	s := strconv.FormatFloat(x, 'f', decimals, 64)
	if strings.Contains(s, ".") {
		s = strings.TrimSuffix(strings.TrimRight(s, "0"), ".")
	}
	return say.Decimal(s)
}

// whole writes a figure of SI in full, and in another unit briefly.
func whole(q say.Quantity, x float64) string {
	if say.US() && q != say.Plain {
		return grouped(briefly(q.Show(x)))
	}
	return grouped(session.ShownNumber(q, x))
}

// grouped puts blanks between the thousands of a plain number.
func grouped(text string) string {
	plain := strings.Replace(text, say.Decimal("."), ".", 1)
	x, err := strconv.ParseFloat(plain, 64)
	if err != nil {
		return text
	}
	_, frac, _ := strings.Cut(plain, ".")
	return session.Figure(x, len(frac))
}

// fixed is a table to be read: its cells are made anew at every update.
type fixed struct {
	cells [][]grid.Cell
}

func (t *fixed) Rows() int { return len(t.cells) }

func (t *fixed) Cell(row, col int) grid.Cell {
	if row < len(t.cells) && col < len(t.cells[row]) {
		return t.cells[row][col]
	}
	return grid.Cell{}
}

func (t *fixed) Commit(int, int, string) {}

// triple writes initial, mean and final of a demand.
func triple(c hull.Current) string {
	return amperes(c.Initial) + " / " + amperes(c.Mean) + " / " + amperes(c.Final)
}

// amperes writes a current with three figures, but whole amperes from 100 on.
func amperes(x float64) string {
	switch {
	case x < 9.995:
		return session.Figure(x, 2)
	case x < 99.95:
		return session.Figure(x, 1)
	}
	return session.Figure(x, 0)
}

// percents writes a share in per cent with one decimal, but 100 as it is.
func percents(share float64) string {
	if share > 0.9995 {
		return session.Figure(100*share, 0)
	}
	return session.Figure(100*share, 1)
}

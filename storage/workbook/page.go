package workbook

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"github.com/xuri/excelize/v2"

	"anodewright/anodes/plan"
)

// page is how a sheet scrolls and prints.
type page struct {
	frozenRows, frozenCols int
	firstTitle, lastTitle  int // rows that every printed page begins with
}

// finish ends a sheet with the closing sentence and sets widths, panes and
// print.
func (s *sheet) finish(p page) {
	s.gap()
	s.line(closing, plan.Closing)
	s.settle()
	s.layOut(p)
	s.freeze(p)
	s.print(p)
	s.protect()
}

// protect keeps formulas from being overwritten by accident. There is no
// password; every other cell, its format, and rows and columns stay free.
func (s *sheet) protect() {
	s.check(s.f.ProtectSheet(s.name, &excelize.SheetProtectionOptions{
		SelectLockedCells: true, SelectUnlockedCells: true, FormatCells: true, FormatColumns: true, FormatRows: true,
		InsertColumns: true, InsertRows: true, InsertHyperlinks: true, Sort: true, AutoFilter: true, EditObjects: true, EditScenarios: true,
	}))
}

// digit is the width of a digit of the body, in digits of the workbook's own
// font, which measures columns.
const digit = 9.0 / 11 * 1.03

// rowHeight is the height of a row of one line, in points.
const rowHeight = 13.5

// layOut sets the widths of the columns, and the heights of rows whose text
// takes more than one line, which not every spreadsheet finds by itself.
func (s *sheet) layOut(p page) {
	for c, w := range s.widths {
		s.widths[c] = max(w, 5)
		name, err := excelize.ColumnNumberToName(c + 1)
		s.check(err)
		s.check(s.f.SetColWidth(s.name, name, name, s.widths[c]*digit))
	}
	heights := map[int]float64{}
	for _, t := range s.texts {
		l, size := t.style.look, t.style.look.size()
		room := -1.2 // the cell's margins
		if t.style.format.left() {
			room = -2.7 // with its indent
		}
		for c := t.first; c <= t.last; c++ {
			room += s.widths[c]
		}
		room *= 9 / size
		if l.bold() {
			room /= bolder
		}
		n, h := lines(t.text, room), 0.0
		if n > 1 || l == title || l == section || l == closing {
			h = float64(n)*size*1.2 + 3
		}
		if l == section || l == closing {
			h += 8 // room above
		}
		const tallest = 409
		heights[t.row] = max(heights[t.row], min(tallest, h))
	}
	for row, h := range heights {
		if h > 0 {
			s.check(s.f.SetRowHeight(s.name, row, h))
		}
	}
	s.paginate(heights, p)
	grid, zoom := false, 100.0
	high, own := rowHeight, true
	s.check(s.f.SetSheetProps(s.name, &excelize.SheetPropsOptions{DefaultRowHeight: &high, CustomHeight: &own}))
	s.check(s.f.SetSheetView(s.name, 0, &excelize.ViewOptions{ShowGridLines: &grid, ZoomScale: &zoom}))
}

func (s *sheet) freeze(p page) {
	corner := at(p.frozenCols, p.frozenRows+1)
	pane := "bottomRight"
	if p.frozenCols == 0 {
		pane = "bottomLeft"
	}
	s.check(s.f.SetPanes(s.name, &excelize.Panes{
		Freeze: true, XSplit: p.frozenCols, YSplit: p.frozenRows, TopLeftCell: corner, ActivePane: pane,
		Selection: []excelize.Selection{{SQRef: corner, ActiveCell: corner, Pane: pane}},
	}))
}

// print: A4 landscape, as wide as the page, with asset, revision, date, sheet
// and page on each.
func (s *sheet) print(p page) {
	const a4 = 9
	size, orientation, wide, high, fit := a4, "landscape", 1, 0, true
	s.check(s.f.SetPageLayout(s.name, &excelize.PageLayoutOptions{Size: &size, Orientation: &orientation, FitToWidth: &wide, FitToHeight: &high}))
	s.check(s.f.SetSheetProps(s.name, &excelize.SheetPropsOptions{FitToPage: &fit}))
	side, top, edge := 0.4, 0.75, 0.3 // inches
	s.check(s.f.SetPageMargins(s.name, &excelize.PageLayoutMarginsOptions{
		Left: &side, Right: &side, Top: &top, Bottom: &top, Header: &edge, Footer: &edge,
	}))
	// A size has to stand before, never next to, a text that may begin with a
	// digit.
	issue := "As of " + s.o.Today.String()
	if s.revision > 0 {
		issue = fmt.Sprintf("Revision %d, as of %s", s.revision, s.o.Today)
	}
	s.check(s.f.SetHeaderFooter(s.name, &excelize.HeaderFooterOptions{
		OddHeader: `&L&9&"-,Bold"` + headerText(s.a.Name) + `&C&9&"-,Regular"` + issue + `&R&9&"-,Regular"` + s.name,
		OddFooter: `&L&8` + plan.Closing + `&R&8Page &P of &N`,
	}))
	if p.firstTitle > 0 {
		s.check(s.f.SetDefinedName(&excelize.DefinedName{
			Name: "_xlnm.Print_Titles", Scope: s.name, RefersTo: fmt.Sprintf("'%s'!$%d:$%d", s.name, p.firstTitle, p.lastTitle),
		}))
	}
}

// headerText is text as a page header shows it: short, on one line, its
// ampersands doubled.
func headerText(name string) string {
	name = cut(strings.Join(strings.Fields(clean(name)), " "), 80)
	return strings.ReplaceAll(name, "&", "&&")
}

// part says that the next row starts a part of the sheet, to be kept on one
// page where it can be.
func (s *sheet) part() { s.parts = append(s.parts, s.next) }

// paginate breaks pages before the parts that do not fit on what is left of
// a page, below the rows that every page repeats. heights are those of the
// rows that are not rowHeight.
func (s *sheet) paginate(heights map[int]float64, p page) {
	const pageWidth, pageHeight = 842 - 2*0.4*72, 595 - 2*0.75*72 // points, within the margins
	wide := 0.0
	for _, w := range s.widths {
		const digitPixels, padding, pointsPerPixel = 8, 5, 0.75
		wide += (w*digit*digitPixels + padding) * pointsPerPixel
	}
	room := pageHeight * max(1, wide/pageWidth) * 0.97
	height := func(from, to int) float64 {
		sum := 0.0
		for r := from; r < to; r++ {
			sum += max(rowHeight, heights[r])
		}
		return sum
	}
	starts := append(slices.Clone(s.parts), s.next)
	repeated := func(row int) float64 { // on a page that begins with a row
		if p.firstTitle == 0 || row <= p.lastTitle {
			return 0
		}
		return height(p.firstTitle, p.lastTitle+1)
	}
	used := height(1, starts[0])
	for i, from := range starts[:len(starts)-1] {
		own := height(from, starts[i+1])
		// What is longer than a page runs on from where there is half a page.
		titles := repeated(from)
		if used > titles && used+own > room && (titles+own <= room || used > room/2) {
			s.check(s.f.InsertPageBreak(s.name, at(0, from)))
			used = titles
		}
		if used += own; used > room {
			used = titles + math.Mod(used-room, room-titles)
		}
	}
}

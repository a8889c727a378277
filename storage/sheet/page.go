package sheet

import (
	"fmt"
	"math"
	"strconv"

	"github.com/xuri/excelize/v2"

	"anodewright/storage/workbook"
)

const (
	fontName = "Arial"
	accent   = "0F5C6E"
	pale     = "E3EFF1"
	ink      = "1D2B3A"
	muted    = "5A646F"
	edge     = "8A949E"
	paper    = "FFFBEB"
)

// look is what a cell is for; it decides how it is written.
type look int

const (
	titleLook look = iota
	zoneLook
	setLook
	headLook
	labelLook
	betweenLook
	noteLook
	stepLook
	cautionLook
	hiddenLook
	boxLook    // to be filled in
	wordLook   // a box with a drop-down
	remarkLook // a box for text
	dateLook   // a box for a date
	toldLook   // a formula
)

// style returns the workbook's id of a look, made at first use. Boxes may be
// filled in; all else is locked, without a password.
func (w *writer) style(l look) int {
	if id, ok := w.styles[l]; ok {
		return id
	}
	font := &excelize.Font{Family: fontName, Size: 9, Color: ink}
	s := &excelize.Style{
		Font: font, Alignment: &excelize.Alignment{Vertical: "center", WrapText: true, Horizontal: "left"},
		Protection: &excelize.Protection{Locked: true},
	}
	fill := func(colour string) { s.Fill = excelize.Fill{Type: "pattern", Pattern: 1, Color: []string{colour}} }
	switch l {
	case titleLook:
		font.Bold, font.Size, font.Color = true, 15, accent
		s.Alignment.WrapText = false
	case zoneLook:
		font.Bold, font.Size, font.Color = true, 11, accent
		s.Alignment.WrapText = false
		fill(pale)
	case setLook:
		font.Bold = true
		s.Alignment.WrapText, s.Alignment.Vertical = false, "bottom"
	case headLook:
		font.Size, font.Color = 8, muted
		s.Alignment.Horizontal, s.Alignment.Vertical = "center", "bottom"
	case labelLook:
		s.Alignment.Horizontal, s.Alignment.WrapText = "right", false
		s.Alignment.Indent = 1
	case betweenLook:
		font.Color = muted
		s.Alignment.Horizontal, s.Alignment.Indent = "right", 1
	case noteLook:
		font.Color = muted
	case cautionLook:
		font.Bold = true
	case boxLook, wordLook, remarkLook, dateLook:
		fill(paper)
		for _, side := range []string{"left", "top", "right", "bottom"} {
			s.Border = append(s.Border, excelize.Border{Type: side, Color: edge, Style: 1})
		}
		s.Protection.Locked = false
		if l == boxLook {
			s.Alignment.Horizontal = "right"
		}
		if l == dateLook {
			format := "yyyy-mm-dd"
			s.CustomNumFmt = &format
		}
	case toldLook:
		font.Color = muted
		s.Alignment.Horizontal = "center"
		format := "0;-0;;@" // no 0, for paper
		s.CustomNumFmt = &format
	}
	id, err := w.f.NewStyle(s)
	w.check(err)
	w.styles[l] = id
	return id
}

// numbers lets the boxes of the row hold numbers between two values alone.
func (w *writer) numbers(first, last int, least, most any, kind excelize.DataValidationType, title, hint string) {
	v := excelize.NewDataValidation(true)
	v.SetSqref(cellName(firstBox+first, w.row) + ":" + cellName(firstBox+last, w.row))
	w.check(v.SetRange(least, most, kind, excelize.DataValidationOperatorBetween))
	v.SetInput(title, hint)
	v.SetError(excelize.DataValidationErrorStyleStop, title, fmt.Sprintf("A number from %v to %v, or nothing.", least, most))
	w.check(w.f.AddDataValidation(w.sheet, v))
}

// choose lets a box of the row hold one of the words of a list alone.
func (w *writer) choose(box int, list, title, hint string) {
	v := excelize.NewDataValidation(true)
	v.SetSqref(cellName(firstBox+box, w.row))
	v.SetSqrefDropList("=" + list)
	v.SetInput(title, hint)
	v.SetError(excelize.DataValidationErrorStyleStop, title, "One of the words of the list, or nothing.")
	w.check(w.f.AddDataValidation(w.sheet, v))
}

// Heights of rows in points: high enough to write in by hand, and two zones with
// a set each on a page.
const (
	titleHeight = 20.0
	noteHeight  = 13.0
	gapHeight   = 8.0
	zoneHeight  = 16.0
	setHeight   = 14.0
	headHeight  = 22.0
	boxHeight   = 16.5

	// What a printed page holds below the repeated titles, less a margin for
	// programs that print rows a bit higher.
	pageHeight = 0.99*(595-2*0.7*72) - titleHeight - noteHeight
)

// breakBefore starts a new page where a block of this height does not fit on
// what is left of this one. A block higher than a page runs on.
func (w *writer) breakBefore(height float64) {
	if w.used > 0 && w.used+height > pageHeight {
		w.check(w.f.InsertPageBreak(w.sheet, cellName(0, w.row+1)))
		w.used = 0
	}
	w.used = math.Mod(w.used+height, pageHeight)
}

// setUp ends a sheet: widths (the last is that of all columns that follow),
// panes, print and protection. titles is how many rows every page begins with.
func (w *writer) setUp(widths []float64, titles int) {
	for c := 0; c <= lastCol; c++ {
		name, err := excelize.ColumnNumberToName(c + 1)
		w.check(err)
		width := widths[min(c, len(widths)-1)]
		if width == 0 {
			w.check(w.f.SetColVisible(w.sheet, name, false))
			continue
		}
		w.check(w.f.SetColWidth(w.sheet, name, name, width))
	}
	const a4 = 9
	size, orientation, wide, high, yes, no := a4, "landscape", 1, 0, true, false
	w.check(w.f.SetPageLayout(w.sheet, &excelize.PageLayoutOptions{Size: &size, Orientation: &orientation, FitToWidth: &wide, FitToHeight: &high}))
	w.check(w.f.SetSheetProps(w.sheet, &excelize.SheetPropsOptions{FitToPage: &yes}))
	side, top, head := 0.4, 0.7, 0.3 // inches
	w.check(w.f.SetPageMargins(w.sheet, &excelize.PageLayoutMarginsOptions{
		Left: &side, Right: &side, Top: &top, Bottom: &top, Header: &head, Footer: &head, Horizontally: &yes,
	}))
	of := "Revision " + strconv.FormatInt(w.tie.Revision, 10)
	if w.tie.Revision == 0 {
		of = ""
	}
	w.check(w.f.SetHeaderFooter(w.sheet, &excelize.HeaderFooterOptions{
		OddHeader: `&L&9&"-,Bold"` + workbook.HeaderText(w.a.Name) + `&R&9&"-,Regular"Anode survey, docking of ` + w.docking.String(),
		OddFooter: `&L&8` + of + `&C&8Surveyor ____________________  Date ____________&R&8Page &P of &N`,
	}))
	if titles > 0 {
		w.check(w.f.SetDefinedName(&excelize.DefinedName{
			Name: "_xlnm.Print_Titles", Scope: w.sheet, RefersTo: fmt.Sprintf("'%s'!$%d:$%d", w.sheet, 1, titles),
		}))
		corner := cellName(0, titles+1)
		w.check(w.f.SetPanes(w.sheet, &excelize.Panes{
			Freeze: true, YSplit: titles, TopLeftCell: corner, ActivePane: "bottomLeft",
			Selection: []excelize.Selection{{SQRef: corner, ActiveCell: corner, Pane: "bottomLeft"}},
		}))
	}
	w.check(w.f.SetSheetView(w.sheet, 0, &excelize.ViewOptions{ShowGridLines: &no}))
	w.check(w.f.ProtectSheet(w.sheet, &excelize.SheetProtectionOptions{
		SelectLockedCells: true, SelectUnlockedCells: true, FormatCells: true, FormatColumns: true, FormatRows: true,
		InsertRows: true, DeleteRows: true,
	}))
}

package workbook

import (
	"math"
	"strconv"
	"strings"

	"github.com/xuri/excelize/v2"
)

const (
	datePattern = "yyyy-mm-dd"
	fontName    = "Arial"
)

// The colours: the program's own accent on warm paper. A state's fill always
// stands behind the state's word.
const (
	accent     = "0F5C6E"
	accentPale = "E3EFF1"
	ink        = "1D2B3A"
	muted      = "5A646F"
	rule       = "D9D6CC"
	paper      = "F0EEE7"
	fault      = "A4262C"
	faultPale  = "F6DADA"
	entryFill  = "FFF6D6"
)

// look is what a cell is for.
type look int

const (
	body look = iota
	title
	lead    // a sentence under the title
	section // the title of a part of a sheet
	group   // heading over several columns
	head    // heading of one column
	label   // of a figure beside it
	figure  // beside a label
	total
	warning // a sentence that must not be overlooked
	closing
)

// format is how a cell's value is shown.
type format int

const (
	text format = iota
	whole
	one // decimals
	two
	three
	four
	percent
	date
	late    // days, in words
	limit   // pieces over what may be, in words
	carried // the same, as a sentence
	stay    // 1 where a fitted set may not stay, in words
)

// left reports whether a format stands at the left of its column.
func (f format) left() bool { return f == text || f == date }

// patterns in the spreadsheet's own language, and the decimals of each.
var numberFormats = map[format]struct {
	pattern  string
	decimals int
}{
	whole: {"#,##0", 0}, one: {"#,##0.0", 1}, two: {"#,##0.00", 2}, three: {"#,##0.000", 3}, four: {"#,##0.0000", 4},
	percent: {"0.0%", 1}, date: {datePattern, 0},
	late:    {`[=0]"in time";[=1]"late by 1 day";"late by "0" days"`, 0},
	limit:   {`[=0]"within the most";"over the most by "0`, 0},
	stay:    {`[=0]"may stay";"may not stay"`, 0},
	carried: {`[=0]"No zone carries more pieces than it may.";"These are more pieces than the zones may carry, see the sheet Schedule: over by "0`, 0},
}

// style is one combination of look and format; there are no others.
type style struct {
	look   look
	format format
	use    use
}

// use is what a person may do with a cell: anything, but for formulas, which
// are locked. Entries are marked as what the formulas follow.
type use int

const (
	open use = iota
	entry
	formula
)

// style returns the workbook's id of a style, made at first use.
func (b *book) style(s style) int {
	if id, ok := b.styles[s]; ok {
		return id
	}
	font := &excelize.Font{Family: fontName, Size: s.look.size(), Color: ink}
	e := &excelize.Style{Font: font, Alignment: &excelize.Alignment{Vertical: "top", WrapText: true, Horizontal: "left"}}
	if !s.format.left() {
		e.Alignment.Horizontal = "right"
		e.Alignment.WrapText = s.look == head
	} else if s.look == body || s.look == head || s.look == group || s.look == total {
		e.Alignment.Indent = 1 // away from a figure on its left
	}
	if n, ok := numberFormats[s.format]; ok {
		e.CustomNumFmt = &n.pattern
	}
	fill := func(colour string) { e.Fill = excelize.Fill{Type: "pattern", Pattern: 1, Color: []string{colour}} }
	line := func(side, colour string, kind int) {
		e.Border = append(e.Border, excelize.Border{Type: side, Color: colour, Style: kind})
	}
	const thin, medium = 1, 2
	switch s.look {
	case body:
		line("bottom", rule, thin)
	case title:
		font.Bold, font.Color = true, accent
	case lead:
		font.Color = muted
	case section:
		font.Bold, font.Color = true, accent
		e.Alignment.Vertical = "bottom"
	case group:
		font.Bold, font.Color = true, accent
		fill(accentPale)
		line("left", "FFFFFF", medium)
	case head:
		font.Bold = true
		e.Alignment.Vertical = "bottom"
		fill(accentPale)
		line("bottom", accent, medium)
	case label:
		font.Color = muted
	case figure:
		e.Alignment.Horizontal = "left"
	case total:
		font.Bold = true
		fill(paper)
		line("top", accent, thin)
	case warning:
		font.Bold, font.Color = true, fault
	case closing:
		font.Italic, font.Color = true, muted
		e.Alignment.Vertical = "bottom"
	}
	if s.use == entry {
		fill(entryFill)
	}
	e.Protection = &excelize.Protection{Locked: s.use == formula}
	id, err := b.f.NewStyle(e)
	b.check(err)
	b.styles[s] = id
	return id
}

// size returns the size of the look's letters, in points.
func (l look) size() float64 {
	switch l {
	case title:
		return 15
	case section:
		return 11
	}
	return 9
}

// bold reports whether the look's letters are bold, and so wider.
func (l look) bold() bool {
	switch l {
	case title, section, group, head, total, warning:
		return true
	}
	return false
}

// shown returns about what a number looks like in a format, to measure it.
func (f format) shown(x float64) string {
	switch f {
	case date:
		return datePattern
	case late:
		if x == 0 {
			return "in time"
		}
		return "late by " + strconv.Itoa(int(x)) + " days"
	case limit:
		return "over the most by " + strconv.Itoa(int(x))
	case stay:
		return "may not stay"
	case percent:
		return strconv.FormatFloat(100*x, 'f', 1, 64) + "%"
	}
	s := strconv.FormatFloat(math.Abs(x), 'f', numberFormats[f].decimals, 64)
	n := len(s)
	if i := strings.IndexByte(s, '.'); i >= 0 {
		n = i
	}
	return "-" + s + strings.Repeat(",", (n-1)/3)
}

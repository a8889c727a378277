package sheet

import (
	"encoding/json"
	"errors"
	"fmt"
	"strings"
	"unicode/utf8"

	"github.com/xuri/excelize/v2"

	"anodewright/hull"
)

// ReadFile reads a filled survey sheet, or a CSV file of readings, for an
// asset: which is known by its ending, .xlsx or not. tie is what the asset is
// now. An error says that the file is none of these at all, or is of another
// asset; what is wrong with single cells is in the preview.
func ReadFile(path string, a *hull.Asset, tie Tie, today hull.Date) (*Preview, error) {
	content, err := load(path)
	if err != nil {
		return nil, err
	}
	if isWorkbook(content) {
		return Read(content, a, tie, today)
	}
	return ReadCSV(content, a, today)
}

// isWorkbook reports whether a file is a zip or one of the old binary files of
// office programs, which Open refuses in its own words.
func isWorkbook(content []byte) bool {
	return strings.HasPrefix(string(content[:min(4, len(content))]), "PK\x03\x04") || strings.HasPrefix(string(content[:min(4, len(content))]), "\xd0\xcf\x11\xe0")
}

var errNoSheet = errors.New("the workbook is no survey sheet of this program: its hidden sheet is missing, and there is no table with zone and date")

// Read reads a filled survey sheet, or a workbook with a table of readings by
// column names, as ReadCSV reads it.
func Read(content []byte, a *hull.Asset, tie Tie, today hull.Date) (p *Preview, err error) {
	defer recovered(&err)
	f, err := Open(content)
	if err != nil {
		return nil, err
	}
	defer f.Close()
	r := &reader{f: f, a: a, p: &Preview{}, at: map[key]*findings{}, electrode: hull.SilverChloride, percents: map[int]bool{}}
	if props, err := f.GetWorkbookProps(); err == nil && props.Date1904 != nil {
		r.from1904 = *props.Date1904
	}
	if err := r.collect(); errors.Is(err, errNoSheet) {
		return r.table(today)
	} else if err != nil {
		return nil, err
	}
	if err := r.tied(tie); err != nil {
		return nil, err
	}
	r.cover()
	r.rows()
	r.dateless()
	for _, k := range r.order {
		r.p.Readings = append(r.p.Readings, r.at[k].readings()...)
	}
	r.p.setsNow(a, r.order)
	r.p.Judge(a, today)
	return r.p, nil
}

// reader collects what a workbook says.
type reader struct {
	f        *excelize.File
	a        *hull.Asset
	p        *Preview
	tieText  string
	lines    []line
	order    []key // of the findings
	at       map[key]*findings
	from1904 bool
	percents map[int]bool // by the id of a style: it shows per cent

	by, how   string
	date      hull.Date
	dated     bool
	electrode hull.Electrode
}

// line is a row of boxes with its key. The boxes are those of the columns from
// firstBox on, as they stand, empty ones among them.
type line struct {
	key
	sheet string
	row   int
	boxes []content
}

// collect finds the rows with keys on all sheets, whatever these are called.
func (r *reader) collect() error {
	filled := 0
	for _, sheet := range r.f.GetSheetList() {
		rows, err := r.f.GetRows(sheet, excelize.Options{RawCellValue: true})
		if err != nil {
			continue // a sheet of charts
		}
		for i, cells := range rows {
			if len(cells) < 2 {
				continue
			}
			if cells[0] == (key{part: tiePart}).text() {
				r.tieText = cells[1]
				continue
			}
			k, ok := parseKey(cells[0])
			if !ok {
				continue
			}
			l := line{key: k, sheet: sheet, row: i + 1}
			for c := firstBox; c < len(cells); c++ {
				text := cells[c]
				if text == labels[k.part][c-firstBox] || k.part == countPart && c == firstBox+toldBox {
					text = "" // what the sheet itself says
				}
				box, err := r.box(sheet, c, i+1, text)
				if err != nil {
					return err
				}
				if l.boxes = append(l.boxes, box); !box.empty() {
					filled++
				}
				if filled > maxFilled {
					return fmt.Errorf("there are more than %d boxes filled in", maxFilled)
				}
			}
			r.lines = append(r.lines, l)
		}
	}
	if r.tieText == "" {
		return errNoSheet
	}
	return nil
}

// table reads a workbook that is a table by column names, as a CSV file that
// was saved as one.
func (r *reader) table(today hull.Date) (*Preview, error) {
	for _, sheet := range r.f.GetSheetList() {
		rows, err := r.f.GetRows(sheet, excelize.Options{RawCellValue: true})
		if err != nil || len(rows) == 0 {
			continue
		}
		columns, is, err := header(record{line: 1, cells: rows[0]})
		if !is {
			continue
		}
		if err != nil {
			return nil, err
		}
		var list []record
		filled := 0
		for i, cells := range rows {
			line := record{line: i + 1, cells: cells, boxes: make([]content, len(cells))}
			for c, text := range cells {
				if line.boxes[c], err = r.box(sheet, c, i+1, text); err != nil {
					return nil, err
				}
				if strings.TrimSpace(text) != "" {
					filled++
				}
			}
			if filled > maxFilled {
				return nil, fmt.Errorf("there are more than %d boxes filled in", maxFilled)
			}
			list = append(list, line)
		}
		return readTable(list, columns, r.a, today, r.from1904), nil
	}
	return nil, errNoSheet
}

// box returns what stands in a cell and how it is meant.
func (r *reader) box(sheet string, col, row int, text string) (content, error) {
	cell := cellName(col, row)
	c := content{Box: Box{sheet, cell}, text: text}
	if strings.TrimSpace(text) == "" {
		return c, nil
	}
	kind, err := r.f.GetCellType(sheet, cell)
	if err != nil {
		return c, errDamaged
	}
	switch kind {
	case excelize.CellTypeNumber, excelize.CellTypeUnset, excelize.CellTypeDate:
		c.number = true
	case excelize.CellTypeBool, excelize.CellTypeError:
		c.odd = true
	}
	if c.number {
		id, err := r.f.GetCellStyle(sheet, cell)
		if err != nil {
			return c, errDamaged
		}
		c.percent = r.showsPercent(id)
	}
	return c, nil
}

// showsPercent reports whether a style shows its number in per cent.
func (r *reader) showsPercent(id int) bool {
	if is, known := r.percents[id]; known {
		return is
	}
	s, err := r.f.GetStyle(id)
	is := err == nil && s != nil && (s.NumFmt == 9 || s.NumFmt == 10 || s.CustomNumFmt != nil && strings.Contains(unquoted(*s.CustomNumFmt), "%"))
	r.percents[id] = is
	return is
}

// unquoted takes out of a number format what it shows as it is.
func unquoted(format string) string {
	var b strings.Builder
	quoted, next := false, false
	for _, c := range format {
		switch {
		case next:
			next = false
		case c == '"':
			quoted = !quoted
		case quoted:
		case c == '\\':
			next = true
		default:
			b.WriteRune(c)
		}
	}
	return b.String()
}

// tied reads the hidden sheet: of which asset the workbook is, and of which
// revision.
func (r *reader) tied(now Tie) error {
	var t tied
	if json.Unmarshal([]byte(r.tieText), &t) != nil || t.Format != format {
		return errNoSheet
	}
	if t.Version > version {
		return fmt.Errorf("the survey sheet comes from a newer version of the program (form %d; this one reads %d)", t.Version, version)
	}
	sameID := t.ID != "" && t.ID == now.ID
	switch {
	case !sameID && t.Asset != r.a.Name:
		return fmt.Errorf("the survey sheet is of another asset: it was made for %.60q, and this is %.60q", t.Asset, r.a.Name)
	case sameID && t.Asset != r.a.Name:
		r.p.warn("The asset was called %s when the sheet was made.", t.Asset)
	case !sameID && t.ID != "" && now.ID != "":
		r.p.warn("The sheet was made from another entry or register; it is of an asset of the same name.")
	}
	if sameID && t.Revision != now.Revision {
		r.p.warn("The sheet was made from revision %d of the asset, which is now at revision %d: every set is compared with what is fitted now.", t.Revision, now.Revision)
	}
	r.p.Asset, r.p.Docking = t.Asset, t.Docking
	return nil
}

// cover reads who looked, when, and with which electrode.
func (r *reader) cover() {
	var note string
	for _, l := range r.lines {
		c, ok := l.first()
		if !ok {
			continue
		}
		var why string
		switch l.part {
		case byPart:
			r.by, why = c.words(200)
		case datePart:
			if r.date, why = c.day(r.from1904); why == "" {
				r.dated = true
			}
		case electrodePart:
			var e hull.Electrode
			if e, why = c.electrode(); why == "" {
				r.electrode = e
			}
		case methodPart:
			r.how, why = c.words(200)
		case notePart:
			note, why = c.words(maxText)
		}
		if why != "" {
			r.p.fault(c, why)
		}
	}
	if note != "" {
		r.p.warn("Remark on the cover, which no reading keeps: %s", note)
	}
}

// dateless finds fault with findings of no date.
func (r *reader) dateless() {
	if r.dated || len(r.order) == 0 {
		return
	}
	for _, l := range r.lines {
		if _, given := l.first(); l.part == datePart && !given {
			r.p.Faults = append(r.p.Faults, Fault{Box: Box{l.sheet, cellName(firstBox, l.row)}, Why: "want the date of the survey"})
			return
		}
	}
}

// first returns the first box in which something stands.
func (l line) first() (content, bool) {
	for _, c := range l.boxes {
		if !c.empty() {
			return c, true
		}
	}
	return content{}, false
}

// words reads a text of so many letters at most.
func (c content) words(most int) (string, string) {
	s := strings.TrimSpace(c.text)
	if n := utf8.RuneCountInString(s); n > most {
		return "", fmt.Sprintf("want at most %d letters", most)
	}
	return s, ""
}

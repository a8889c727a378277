package sheet

import (
	"bytes"
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"slices"
	"strings"
	"unicode/utf8"

	"anodewright/hull"
)

// csvColumns are the titles that a CSV file of readings may have, in the order
// of the template: the names of the asset file's fields, with the masses and
// sizes that a surveyor may have instead. Blanks stand for underscores.
var csvColumns = []string{
	"asset", "zone", "pattern", "fitted", "pieces", "date", "by", "how",
	"weighed_wastage", "weighed_kg", "percent", "girth_m", "length_m", "girth_mm", "length_mm", "grades",
	"gone", "not_wasted", "fallen", "painted", "not_seen",
	"potentials", "electrode", "coating_percent", "coating_word", "water_resistivity_ohm_m", "note",
}

// countColumns are the titles of countNames.
var countColumns = [5]string{"gone", "not_wasted", "fallen", "painted", "not_seen"}

// IsCSV reports whether a text is a CSV file of readings: by its header, which
// names a zone and a date.
func IsCSV(text []byte) bool {
	text, err := checked(text)
	if err != nil {
		return false
	}
	_, _, err = split(text)
	return err == nil
}

// ReadCSV reads a CSV file of readings, a line a set or zone. The columns are
// parted by semicolons, tabs or commas. Several figures of one cell are parted
// by blanks or semicolons: 11,5 % 14 %.
func ReadCSV(text []byte, a *hull.Asset, today hull.Date) (*Preview, error) {
	text, err := checked(text)
	if err != nil {
		return nil, err
	}
	rows, columns, err := split(text)
	if err != nil {
		return nil, err
	}
	return readTable(rows, columns, a, today, false), nil
}

// readTable reads the lines below a header.
func readTable(rows []record, columns map[string]int, a *hull.Asset, today hull.Date, from1904 bool) *Preview {
	p := &Preview{}
	for title := range columns {
		if !slices.Contains(csvColumns, title) {
			p.warn("The column %.40q is not used.", title)
		}
	}
	slices.Sort(p.Warnings)
	var keys []key
	for _, row := range rows[1:] {
		r := &csvRow{p: p, a: a, record: row, columns: columns, from1904: from1904}
		if row.boxes == nil && len(row.cells) != len(rows[0].cells) {
			p.Faults = append(p.Faults, Fault{Box: Box{Cell: fmt.Sprintf("line %d", row.line)}, Found: fmt.Sprint(len(row.cells)),
				Why: fmt.Sprintf("want %d cells as in the header (a decimal comma needs semicolons between the cells)", len(rows[0].cells))})
			continue
		}
		if f, k := r.read(); f != nil {
			p.Readings = append(p.Readings, f.readings()...)
			keys = append(keys, k)
		}
	}
	p.setsNow(a, keys)
	p.Judge(a, today)
	return p
}

// checked refuses what is no UTF-8 text of a sensible size, and takes off the
// mark that some programs put before it.
func checked(text []byte) ([]byte, error) {
	if len(text) > MaxSize {
		return nil, tooLarge(int64(len(text)))
	}
	text = bytes.TrimPrefix(text, []byte("\xef\xbb\xbf"))
	if !utf8.Valid(text) || bytes.IndexByte(text, 0) >= 0 {
		return nil, errors.New("the file is no text in UTF-8; save it as CSV UTF-8")
	}
	if len(bytes.TrimSpace(text)) == 0 {
		return nil, errors.New("the file is empty")
	}
	return text, nil
}

// record is one line of cells.
type record struct {
	line  int
	cells []string
	boxes []content // of a workbook; else nil
}

// split parts a text into records by the delimiter under which the first line
// is a header, and says where the columns of each title are.
func split(text []byte) (rows []record, columns map[string]int, err error) {
	err = errors.New("the file has no header with zone and date, as a CSV file of readings has")
	for _, delimiter := range ";\t," {
		rows, e := records(text, delimiter)
		if e != nil {
			continue
		}
		columns, is, e := header(rows[0])
		if is {
			return rows, columns, e
		}
	}
	return nil, nil, err
}

// header says where the columns of each title are, if a line is the header of
// a table of readings. No title may be there twice.
func header(row record) (columns map[string]int, is bool, err error) {
	columns = map[string]int{}
	for i, title := range row.cells {
		title = strings.Join(strings.FieldsFunc(strings.ToLower(title), func(r rune) bool { return r == ' ' || r == '_' || r == '\u00a0' }), "_")
		if title == "" {
			continue
		}
		if _, known := columns[title]; known {
			err = fmt.Errorf("line %d: the column %.40q is there twice", row.line, title)
		}
		columns[title] = i
	}
	_, zone := columns["zone"]
	_, date := columns["date"]
	return columns, zone && date, err
}

func records(text []byte, delimiter rune) ([]record, error) {
	c := csv.NewReader(bytes.NewReader(text))
	c.Comma, c.FieldsPerRecord, c.LazyQuotes = delimiter, -1, true
	var rows []record
	for {
		cells, err := c.Read()
		if err == io.EOF {
			break
		}
		if err != nil {
			return nil, err
		}
		line, _ := c.FieldPos(0)
		if len(cells) > maxCols {
			return nil, fmt.Errorf("line %d has more than %d cells", line, maxCols)
		}
		if slices.ContainsFunc(cells, func(s string) bool { return strings.TrimSpace(s) != "" }) {
			rows = append(rows, record{line: line, cells: cells})
		}
		if len(rows) > maxRows {
			return nil, fmt.Errorf("there are more than %d lines", maxRows)
		}
	}
	if rows == nil {
		return nil, errors.New("there is no cell with a text")
	}
	return rows, nil
}

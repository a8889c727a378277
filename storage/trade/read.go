// Package trade reads a ship's trading pattern: a CSV table of ports or sea
// areas with the days spent in each, from a log or a schedule, and turns it
// into shares of waters.
//
// A file has a header with one column that names the place (area, sea area,
// water, port, place or name) and a column of days, or two of dates (from, to).
// The columns are parted by semicolons, tabs or commas; a number may have a
// decimal comma or point; dates are YYYY-MM-DD, with a time of day if need be.
// Nothing is guessed: what cannot be read is a fault with its line, and a place
// that is neither one of the asset's waters nor in the reference table is
// listed for the user to decide.
package trade

import (
	"bytes"
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"os"
	"slices"
	"strings"
	"unicode"
	"unicode/utf8"

	"anodewright/hull"
)

// Limits of a file: far above any real trading pattern.
const (
	MaxSize  = 4 << 20 // bytes
	maxLines = 20000
	maxName  = 200 // letters
	maxDays  = 36525
	maxShown = 20 // faults
)

// Pattern is a trading pattern as the file has it.
type Pattern struct {
	Stays []Stay
	// Ignored are the titles of columns that say nothing of place or time.
	Ignored []string
}

// Stay is a time at one place.
type Stay struct {
	Name string
	Days float64
	Line int // of the file, from 1
}

// Fault is one thing wrong with a file.
type Fault struct {
	Line   int    // from 1; 0: the whole file
	Column string // its title; empty: the whole line
	Want   string
	Got    string
}

// Error writes the fault as one line.
func (f Fault) Error() string {
	var at []string
	if f.Line > 0 {
		at = append(at, fmt.Sprintf("line %d", f.Line))
	}
	if f.Column != "" {
		at = append(at, f.Column)
	}
	s := "want " + f.Want
	if at != nil {
		s = strings.Join(at, ", ") + ": " + s
	}
	if f.Got != "" {
		s += ", got " + f.Got
	}
	return s
}

// Faults are all faults found in one go, in the order of the lines.
type Faults []Fault

// Error writes one fault a line, and how many more there are.
func (fs Faults) Error() string {
	var lines []string
	for i, f := range fs {
		if i == maxShown {
			lines = append(lines, fmt.Sprintf("and %d more", len(fs)-maxShown))
			break
		}
		lines = append(lines, f.Error())
	}
	return strings.Join(lines, "\n")
}

// ReadFile reads a trading pattern from a file.
func ReadFile(path string) (Pattern, error) {
	f, err := os.Open(path)
	if err != nil {
		return Pattern{}, err
	}
	defer f.Close()
	if info, err := f.Stat(); err != nil {
		return Pattern{}, err
	} else if !info.Mode().IsRegular() {
		return Pattern{}, fmt.Errorf("%s is not a file", path)
	}
	return Read(f)
}

// Read reads a trading pattern. What is wrong comes back as Faults.
func Read(r io.Reader) (Pattern, error) {
	text, err := io.ReadAll(io.LimitReader(r, MaxSize+1))
	if err != nil {
		return Pattern{}, err
	}
	text, err = checkText(text)
	if err != nil {
		return Pattern{}, err
	}
	rows, delimiter, err := split(text)
	if err != nil {
		return Pattern{}, err
	}
	c, ignored, err := header(rows[0])
	if err != nil {
		return Pattern{}, err
	}
	t := table{columns: c, comma: delimiter == ','}
	for _, row := range rows[1:] {
		t.row(row)
	}
	t.overlaps()
	if len(t.faults) == 0 && len(t.stays) == 0 {
		t.fault(0, "", "at least one line with a place and its days", "")
	}
	if len(t.faults) > 0 {
		slices.SortStableFunc(t.faults, func(a, b Fault) int { return a.Line - b.Line })
		return Pattern{}, t.faults
	}
	return Pattern{Stays: t.stays, Ignored: ignored}, nil
}

// checkText refuses what is no UTF-8 text of a sensible size, and takes off
// the mark that some programs put before it.
func checkText(text []byte) ([]byte, error) {
	const utf8Text = "text in UTF-8; save it as CSV UTF-8"
	if len(text) > MaxSize {
		return nil, Faults{{Want: fmt.Sprintf("a file of at most %d MB", MaxSize>>20)}}
	}
	for _, mark := range []string{"\xff\xfe", "\xfe\xff"} {
		if bytes.HasPrefix(text, []byte(mark)) {
			return nil, Faults{{Want: utf8Text, Got: "UTF-16"}}
		}
	}
	text = bytes.TrimPrefix(text, []byte("\xef\xbb\xbf"))
	for i := 0; i < len(text); {
		r, size := utf8.DecodeRune(text[i:])
		if r == utf8.RuneError && size == 1 || r == 0 {
			return nil, Faults{{Line: 1 + bytes.Count(text[:i], []byte("\n")), Want: utf8Text, Got: fmt.Sprintf("byte %#02x", text[i])}}
		}
		i += size
	}
	if len(bytes.TrimSpace(text)) == 0 {
		return nil, Faults{{Want: "a header and lines", Got: "an empty file"}}
	}
	return text, nil
}

// record is one line of cells.
type record struct {
	line  int
	cells []string
}

func (r record) blank() bool {
	return !slices.ContainsFunc(r.cells, func(c string) bool { return strings.TrimSpace(c) != "" })
}

// split parts the text into records by the delimiter under which the first
// line is a header. Blank records are left out.
func split(text []byte) ([]record, rune, error) {
	var firstErr error
	for _, delimiter := range ";\t," {
		rows, err := records(text, delimiter)
		if err == nil {
			if _, _, err = header(rows[0]); err == nil {
				return rows, delimiter, nil
			}
		}
		if firstErr == nil || bytes.ContainsRune(firstLine(text), delimiter) {
			firstErr = err
		}
	}
	return nil, 0, firstErr
}

func firstLine(text []byte) []byte {
	line, _, _ := bytes.Cut(text, []byte("\n"))
	return line
}

func records(text []byte, delimiter rune) ([]record, error) {
	c := csv.NewReader(bytes.NewReader(text))
	c.Comma, c.FieldsPerRecord = delimiter, -1
	var rows []record
	for {
		cells, err := c.Read()
		if err == io.EOF {
			break
		}
		var bad *csv.ParseError
		if errors.As(err, &bad) {
			return nil, Faults{{Line: bad.StartLine, Want: "quotes in pairs, around whole cells"}}
		}
		if err != nil {
			return nil, err
		}
		line, _ := c.FieldPos(0)
		if row := (record{line, cells}); !row.blank() {
			rows = append(rows, row)
		}
		if len(rows) > maxLines {
			return nil, Faults{{Line: line, Want: fmt.Sprintf("at most %d lines", maxLines)}}
		}
	}
	if rows == nil {
		return nil, Faults{{Want: "a header and lines", Got: "no cell with a text"}}
	}
	return rows, nil
}

// columns are the places of the columns in a record, -1 for none.
type columns struct {
	width                int
	name, days, from, to int
	titles               []string
}

// The titles by which a column is known, the better ones first.
var (
	nameTitles = []string{"area", "sea area", "water", "port", "place", "name"}
	daysTitles = []string{"days"}
	fromTitles = []string{"from", "arrival", "start"}
	toTitles   = []string{"to", "until", "departure", "end"}
)

// header finds the columns of place and time, and the titles of the others.
func header(row record) (columns, []string, error) {
	c := columns{width: len(row.cells)}
	for _, cell := range row.cells {
		c.titles = append(c.titles, tidy(cell))
	}
	find := func(titles []string) int {
		for _, title := range titles {
			for i, t := range c.titles {
				if strings.EqualFold(strings.ReplaceAll(t, "_", " "), title) {
					return i
				}
			}
		}
		return -1
	}
	c.name, c.days, c.from, c.to = find(nameTitles), find(daysTitles), find(fromTitles), find(toTitles)
	if c.name < 0 || c.days < 0 && (c.from < 0 || c.to < 0) {
		return c, nil, Faults{{
			Line: row.line, Want: "a header with port, area or name, and days or from and to",
			Got: fmt.Sprintf("%.60q", strings.Join(c.titles, " | ")),
		}}
	}
	seen := map[string]bool{}
	var ignored []string
	for i, t := range c.titles {
		if key := strings.ToLower(t); t != "" && seen[key] {
			return c, nil, Faults{{Line: row.line, Want: "each title once", Got: fmt.Sprintf("%q twice", t)}}
		} else {
			seen[key] = true
		}
		if t != "" && i != c.name && i != c.days && i != c.from && i != c.to {
			ignored = append(ignored, t)
		}
	}
	return c, ignored, nil
}

// tidy takes off blanks at the ends and makes one of several within.
func tidy(s string) string { return strings.Join(strings.Fields(s), " ") }

// table collects the stays and faults of the lines.
type table struct {
	columns
	comma  bool // parted by commas
	stays  []Stay
	spans  []span
	faults Faults
}

func (t *table) fault(line int, column, want, got string) {
	t.faults = append(t.faults, Fault{line, column, want, got})
}

func (t *table) row(r record) {
	if len(r.cells) != t.width {
		want := fmt.Sprintf("%d cells as in the header", t.width)
		if t.comma && len(r.cells) > t.width {
			want += " (a number with a decimal comma needs quotes, or semicolons between the cells)"
		}
		t.fault(r.line, "", want, fmt.Sprint(len(r.cells)))
		return
	}
	before := len(t.faults)
	name := t.place(r)
	days := t.time(r)
	if len(t.faults) == before {
		t.stays = append(t.stays, Stay{name, days, r.line})
	}
}

func (t *table) place(r record) string {
	raw := r.cells[t.name]
	name := tidy(raw)
	switch {
	case name == "":
		t.fault(r.line, t.titles[t.name], "the name of a port or area", "nothing")
	case utf8.RuneCountInString(name) > maxName:
		t.fault(r.line, t.titles[t.name], fmt.Sprintf("a name of at most %d letters", maxName), fmt.Sprint(utf8.RuneCountInString(name)))
	case strings.ContainsFunc(raw, func(c rune) bool { return unicode.IsControl(c) && c != '\t' }):
		t.fault(r.line, t.titles[t.name], "a name on one line", fmt.Sprintf("%.40q", raw))
	}
	return name
}

// time returns the days of a line: as given, else from its dates. Where both
// are given they have to agree to a day.
func (t *table) time(r record) float64 {
	given, dated := 0.0, 0.0
	hasDays := t.days >= 0 && strings.TrimSpace(r.cells[t.days]) != ""
	hasDates := t.from >= 0 && t.to >= 0 && (strings.TrimSpace(r.cells[t.from]) != "" || strings.TrimSpace(r.cells[t.to]) != "")
	before := len(t.faults)
	if hasDates {
		if s, ok := t.span(r); ok {
			dated = s.days()
			t.spans = append(t.spans, s)
		}
	}
	if hasDays {
		x, err := parseDays(r.cells[t.days])
		if err != nil {
			t.fault(r.line, t.titles[t.days], err.Error(), fmt.Sprintf("%.40q", r.cells[t.days]))
		}
		given = x
	}
	switch {
	case len(t.faults) > before:
		return 0
	case !hasDays && !hasDates && t.days >= 0:
		t.fault(r.line, t.titles[t.days], "a number of days above 0", "nothing")
	case !hasDays && !hasDates:
		t.fault(r.line, t.titles[t.from], "a date as YYYY-MM-DD", "nothing")
	case hasDays && hasDates && (given > dated+1 || given < dated-1):
		t.fault(r.line, t.titles[t.days], fmt.Sprintf("the %.4g days between its dates", dated), fmt.Sprintf("%.4g", given))
	}
	if hasDays {
		return given
	}
	return dated
}

func (t *table) span(r record) (span, bool) {
	s := span{line: r.line}
	ok := true
	for _, end := range []struct {
		column int
		at     *moment
	}{{t.from, &s.from}, {t.to, &s.to}} {
		m, err := parseMoment(r.cells[end.column])
		if err != nil {
			t.fault(r.line, t.titles[end.column], err.Error(), fmt.Sprintf("%.40q", r.cells[end.column]))
			ok = false
		}
		*end.at = m
	}
	if ok && s.to <= s.from {
		t.fault(r.line, t.titles[t.to], "a time after "+s.from.String(), s.to.String())
		ok = false
	}
	if ok && s.days() > maxDays {
		t.fault(r.line, t.titles[t.to], fmt.Sprintf("at most %d days from %s", maxDays, s.from), s.to.String())
		ok = false
	}
	return s, ok
}

// overlaps finds stays at two places at one time.
func (t *table) overlaps() {
	spans := slices.Clone(t.spans)
	slices.SortStableFunc(spans, func(a, b span) int { return int(a.from - b.from) })
	for i := 1; i < len(spans); i++ {
		if last := spans[i-1]; spans[i].from < last.to {
			t.fault(spans[i].line, t.titles[t.from], fmt.Sprintf("a time not before %s, when the stay of line %d ends", last.to, last.line), spans[i].from.String())
		}
		if spans[i].to < spans[i-1].to {
			spans[i].to, spans[i].line = spans[i-1].to, spans[i-1].line
		}
	}
}

// moment is a time in minutes since the start of day 1 of the calendar.
type moment int64

func (m moment) String() string {
	s := hull.Date(m / (24 * 60)).String()
	if rest := m % (24 * 60); rest != 0 {
		s += fmt.Sprintf(" %02d:%02d", rest/60, rest%60)
	}
	return s
}

// span is the time of a stay.
type span struct {
	line     int
	from, to moment
}

func (s span) days() float64 { return float64(s.to-s.from) / (24 * 60) }

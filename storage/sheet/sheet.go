// Package sheet is the survey sheet: an Excel workbook that goes out to the
// surveyor of a docking, on paper or on a laptop, and comes back with what was
// found. The same can come as CSV, by column names.
//
// Write makes the workbook: a cover, and a block for each zone with its fitted
// sets. Every row that is to be filled in carries a key in a hidden column, so
// that rows may be moved, copied or left out; a hidden sheet ties the workbook
// to an asset and its revision. Read turns a file into a Preview: the readings
// understood, each with the cells that it comes from, and every cell that was
// not understood, with the reason. Nothing is stored here.
//
// Units stand beside the boxes: wastage and coating in per cent, masses in kg
// with the insert, girth and length in mm, potentials in V, resistivity in
// ohm m. A mass becomes wastage by the pattern's new mass with insert and its
// net mass. A figure that could mean two things, such as 0.12 in a box for per
// cent, is refused.
//
// A file from outside is looked over before it is opened: see Open.
package sheet

import (
	"encoding/json"
	"fmt"
	"strings"
	"unicode/utf16"

	"anodewright/hull"
)

// Tie is what a survey sheet was made from: an asset of a register, by its id
// there, and its revision. An asset file has neither; its name has to do.
type Tie struct {
	ID       string `json:"id,omitempty"`
	Revision int64  `json:"revision,omitempty"`
}

// tied is the text of the hidden sheet.
type tied struct {
	Format  string    `json:"format"`
	Version int       `json:"version"`
	Asset   string    `json:"asset"`
	Docking hull.Date `json:"docking"`
	Tie
}

const (
	format  = "anodewright-survey-sheet"
	version = 1
)

// key says what a row of boxes is for. It stands in the hidden column A.
type key struct {
	part    part
	zone    string
	pattern string    // of sets only
	fitted  hull.Date // of sets only
	count   int       // pieces fitted when the sheet was made
}

// part is what the boxes of a row hold.
type part string

const (
	tiePart       part = "tie"
	byPart        part = "by"
	datePart      part = "date"
	methodPart    part = "method"
	electrodePart part = "electrode"
	notePart      part = "note"

	potentialPart part = "potential" // of a zone
	coatingPart   part = "coating"
	remarkPart    part = "remark"

	countPart  part = "count" // of a set
	eyePart    part = "eye"
	weighPart  part = "weigh"
	girthPart  part = "girth"
	lengthPart part = "length"
)

func (p part) ofZone() bool { return p == potentialPart || p == coatingPart || p == remarkPart }

func (p part) ofSet() bool {
	return p == countPart || p == eyePart || p == weighPart || p == girthPart || p == lengthPart
}

// text writes the key in ASCII letters alone, as a JSON list.
func (k key) text() string {
	list := []any{k.part}
	switch {
	case k.part.ofZone():
		list = append(list, k.zone)
	case k.part.ofSet():
		list = append(list, k.zone, k.pattern, k.fitted.String(), k.count)
	}
	return ascii(list)
}

// parseKey reads what text writes.
func parseKey(s string) (k key, ok bool) {
	var list []any
	if !strings.HasPrefix(s, `["`) || json.Unmarshal([]byte(s), &list) != nil {
		return k, false
	}
	at := func(i int) string {
		if i < len(list) {
			if s, ok := list[i].(string); ok {
				return s
			}
		}
		return ""
	}
	k.part, k.zone, k.pattern = part(at(0)), at(1), at(2)
	switch {
	case k.part.ofZone():
		return k, k.zone != ""
	case k.part.ofSet():
		if len(list) != 5 {
			return k, false
		}
		d, err := hull.ParseDate(at(3))
		n, number := list[4].(float64)
		k.fitted, k.count = d, int(n)
		return k, err == nil && number && n >= 0 && n <= 1e6 && k.zone != ""
	}
	switch k.part {
	case byPart, datePart, methodPart, electrodePart, notePart:
		return k, true
	}
	return k, false
}

// ascii writes a value as JSON without letters that a program between might
// change.
func ascii(v any) string {
	text, err := json.Marshal(v)
	if err != nil {
		panic("sheet: " + err.Error()) // only own types come here
	}
	var b strings.Builder
	for _, u := range utf16.Encode([]rune(string(text))) {
		if u < 0x7F {
			b.WriteByte(byte(u))
		} else {
			fmt.Fprintf(&b, `\u%04x`, u)
		}
	}
	return b.String()
}

// Box is where something stands in a file.
type Box struct {
	Sheet string // empty in a CSV file
	Cell  string // such as D12; in a CSV file the line and the column's title
}

// String writes the place for people: Survey!D12.
func (b Box) String() string {
	if b.Sheet == "" {
		return b.Cell
	}
	return b.Sheet + "!" + b.Cell
}

// Fault is one cell that was not understood.
type Fault struct {
	Box
	Found string // what stands there
	Why   string
}

// Error writes the fault as one line.
func (f Fault) Error() string {
	s := f.Why
	if f.Found != "" {
		s += fmt.Sprintf(", got %.60q", f.Found)
	}
	if at := f.Box.String(); at != "" {
		s = at + ": " + s
	}
	return s
}

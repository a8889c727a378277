package workbook

import (
	"iter"
	"regexp"
	"strings"
	"unicode"
	"unicode/utf8"
)

// mostText is the most UTF-16 units of text in one cell.
const mostText = 32767

// clean returns text that a workbook can hold and show: valid Unicode without
// control characters, which XML cannot hold, and short enough for a cell. What
// it begins with does not matter: a text is always written as a text.
func clean(s string) string {
	if simple(s) {
		return s
	}
	s = strings.ToValidUTF8(s, "\uFFFD")
	s = strings.Map(func(r rune) rune {
		switch {
		case r == '\n':
			return r
		case unicode.IsControl(r), r == '\u2028', r == '\u2029':
			return ' '
		case r&0xFFFE == 0xFFFE, r >= 0xFDD0 && r <= 0xFDEF: // no characters
			return '\uFFFD'
		}
		return r
	}, s)
	return cut(s, mostText)
}

// simple reports whether a text is short and of printable ASCII alone, as most
// are.
func simple(s string) bool {
	for i := range len(s) {
		if s[i] < ' ' || s[i] > '~' {
			return false
		}
	}
	return len(s) <= mostText
}

var escaped = regexp.MustCompile(`^_x[0-9A-Fa-f]{4}_`)

// escape writes a text so that a reader of workbooks, to whom _x0041_ is the
// letter A, reads what it says. excelize does not do so for shared strings.
func escape(s string) string {
	if !strings.Contains(s, "_x") {
		return s
	}
	var b strings.Builder
	for i := range len(s) {
		if s[i] == '_' && escaped.MatchString(s[i:]) {
			b.WriteString("_x005F_")
		} else {
			b.WriteByte(s[i])
		}
	}
	return b.String()
}

// cut shortens text to at most n UTF-16 units, the last of them an ellipsis.
func cut(s string, n int) string {
	units, end := 0, 0 // end: where the ellipsis would go
	for i, r := range s {
		w := 1
		if r > 0xFFFF {
			w = 2
		}
		if units+w > n {
			return s[:end] + "…"
		}
		units += w
		if units < n {
			end = i + utf8.RuneLen(r)
		}
	}
	return s
}

// width is about how many digits a line of text is wide; the letters of East
// Asia and pictures take two.
func width(s string) float64 {
	n := 0.0
	for _, r := range s {
		if r < utf8.RuneSelf {
			n += narrow[r]
		} else {
			n += letterWidth(r)
		}
	}
	return n
}

// narrow are the widths of ASCII.
var narrow = func() (all [utf8.RuneSelf]float64) {
	for r := range all {
		all[r] = letterWidth(rune(r))
	}
	return all
}()

func letterWidth(r rune) float64 {
	switch {
	case unicode.Is(unicode.Mn, r) || unicode.Is(unicode.Cf, r):
		return 0
	case r >= 0x1100 && r <= 0x115F, r >= 0x2E80 && r <= 0xD7A3, r >= 0xF900 && r <= 0xFAFF, r >= 0xFE30 && r <= 0xFE6F,
		r >= 0xFF00 && r <= 0xFF60, r >= 0x1F300:
		return 2
	case strings.ContainsRune(" iljtfI.,:;'|/", r):
		return 0.52
	case strings.ContainsRune("cksvxyz()r-", r):
		return 0.85
	case strings.ContainsRune("mwMW%…", r):
		return 1.6
	case unicode.IsUpper(r):
		return 1.25
	}
	return 1
}

// longestLine and longestWord measure wrapped text.
func longestLine(s string) float64 { return longest(strings.SplitSeq(s, "\n")) }
func longestWord(s string) float64 { return longest(strings.FieldsSeq(s)) }

func longest(parts iter.Seq[string]) float64 {
	n := 0.0
	for p := range parts {
		n = max(n, width(p))
	}
	return n
}

// bolder is how much wider bold letters are.
const bolder = 1.1

// lines returns how many lines a text takes in a column of the given width,
// broken between words where it can be.
func lines(s string, room float64) int {
	n, space := 0, narrow[' ']
	room = max(room, 1)
	if most := narrow['%'] * float64(len(s)); most <= room && !strings.Contains(s, "\n") {
		return 1
	}
	for part := range strings.SplitSeq(s, "\n") {
		n++
		used := 0.0
		for word := range strings.FieldsSeq(part) {
			w := width(word)
			if used > 0 && used+space+w > room {
				n++
				used = 0
			} else if used > 0 {
				used += space
			}
			for used += w; used > room; used -= room {
				n++
			}
		}
	}
	return n
}

// joined strings non-empty parts together.
func joined(sep string, parts ...string) string {
	var some []string
	for _, p := range parts {
		if p != "" {
			some = append(some, p)
		}
	}
	return strings.Join(some, sep)
}

// upperFirst starts a sentence.
func upperFirst(s string) string {
	r, n := utf8.DecodeRuneInString(s)
	if n == 0 {
		return s
	}
	return string(unicode.ToUpper(r)) + s[n:]
}

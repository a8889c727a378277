package session

import (
	"fmt"
	"math"
	"strconv"
	"strings"

	"anodewright/hull"
)

// ParseNumber reads a number as people write it: with a decimal point or
// comma and with blanks between thousands. A lone comma before three digits
// could be either and is refused.
func ParseNumber(text string) (float64, error) {
	s := strings.Map(func(r rune) rune {
		switch r {
		case ' ', '\u00a0', '\u2009', '\u202f', '\'':
			return -1
		case '\u2212':
			return '-'
		}
		return r
	}, text)
	comma, point := strings.LastIndexByte(s, ','), strings.LastIndexByte(s, '.')
	switch {
	case comma >= 0 && point >= 0:
		thousands := ","
		if comma > point {
			thousands = "."
		}
		s = strings.ReplaceAll(strings.ReplaceAll(s, thousands, ""), ",", ".")
	case comma >= 0:
		whole := strings.TrimLeft(s[:comma], "+-")
		if len(s)-comma-1 == 3 && len(whole) >= 1 && len(whole) <= 3 && whole != "0" {
			return 0, fmt.Errorf("want %s or %s: a comma before three digits can mean both", strings.ReplaceAll(s, ",", ""), strings.ReplaceAll(s, ",", "."))
		}
		s = strings.Replace(s, ",", ".", 1)
	}
	x, err := strconv.ParseFloat(s, 64)
	if err != nil || math.IsInf(x, 0) || math.IsNaN(x) || strings.ContainsAny(s, "xXpPiIn_") {
		return 0, fmt.Errorf("want a number, got %q", text)
	}
	return x, nil
}

// Number writes a number in full, for editing.
func Number(x float64) string { return strconv.FormatFloat(x, 'f', -1, 64) }

// Figure writes a number with the given decimals and thin blanks between
// thousands, for reading.
func Figure(x float64, decimals int) string {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return "–"
	}
	s := strconv.FormatFloat(math.Abs(x), 'f', decimals, 64)
	whole, frac, _ := strings.Cut(s, ".")
	var b strings.Builder
	if x < 0 && strings.Trim(s, "0.") != "" {
		b.WriteString("−")
	}
	for i, r := range whole {
		if i > 0 && (len(whole)-i)%3 == 0 {
			b.WriteRune('\u00a0')
		}
		b.WriteRune(r)
	}
	if frac != "" {
		b.WriteString("." + frac)
	}
	return b.String()
}

// Percent writes a share as a percentage.
func Percent(x float64) string { return Figure(100*x, 0) + " %" }

// Day writes a date as people read it: 15 Mar 2027.
func Day(d hull.Date) string {
	if d.IsZero() {
		return "–"
	}
	return d.Time().Format("2 Jan 2006")
}

// parsePercent reads "50 %", "50" or, without a sign, "0.5" as 0.5.
func parsePercent(text string) (float64, error) {
	s, sign := strings.CutSuffix(strings.TrimSpace(text), "%")
	x, err := ParseNumber(strings.TrimSpace(s))
	if err != nil {
		return 0, fmt.Errorf("want a share such as 50 %%, got %q", text)
	}
	if sign || x > 1 {
		return x / 100, nil
	}
	return x, nil
}

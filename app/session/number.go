package session

import (
	"errors"
	"fmt"
	"math"
	"regexp"
	"strconv"
	"strings"
	"time"

	"anodewright/app/say"
	"anodewright/hull"
)

// numberForm is a number as people write it: a sign, whole digits that may be
// grouped in threes, decimals behind a point or comma, an exponent.
var numberForm = regexp.MustCompile(`^([+-]?) ?(\d{1,3}(?: \d{3})+|\d{1,3}(?:,\d{3})+|\d{1,3}(?:\.\d{3})+|\d*)(?:([.,])(\d*))?([eE][+-]?\d+)?$`)

// ParseNumber reads a number as people write it: with a decimal point or
// comma, and with blanks, apostrophes, points or commas between thousands. A
// lone comma before three digits could be either and is refused; a lone point
// is a decimal point. Where decimals are written with a comma it is the point
// that is refused.
func ParseNumber(text string) (float64, error) {
	s := strings.TrimSpace(strings.Map(func(r rune) rune {
		switch r {
		case '\u00a0', '\u2009', '\u202f', '\'', '\u2019':
			return ' '
		case '\u2212':
			return '-'
		}
		return r
	}, text))
	if s == "" {
		return 0, errors.New("want a number, got nothing")
	}
	wrong := fmt.Errorf("want a number, got %q", text)
	m := numberForm.FindStringSubmatch(s)
	if m == nil {
		return 0, wrong
	}
	sign, whole, point, decimals, exponent := m[1], m[2], m[3], m[4], m[5]
	if first := strings.IndexAny(whole, " ,."); first >= 0 {
		groups := whole[first : first+1]
		plain := strings.ReplaceAll(whole, groups, "")
		once := strings.Count(whole, groups) == 1 && point == ""
		switch {
		case groups == point:
			return 0, wrong
		case once && groups == "," && !say.Comma() && whole[:first] != "0":
			return 0, fmt.Errorf("want %s%s or %s%s.%s: a comma before three digits can mean both", sign, plain, sign, whole[:first], whole[first+1:])
		case once && groups == "." && say.Comma() && whole[:first] != "0":
			return 0, fmt.Errorf("want %s%s or %s%s,%s: a point before three digits can mean both", sign, plain, sign, whole[:first], whole[first+1:])
		case once && groups != " ":
			whole, decimals = whole[:first], whole[first+1:]
		default:
			whole = plain
		}
	}
	if whole+decimals == "" {
		return 0, wrong
	}
	x, err := strconv.ParseFloat(sign+whole+"."+decimals+exponent, 64)
	if err != nil || math.IsInf(x, 0) {
		return 0, wrong
	}
	return x, nil
}

// Number writes a number in full, for editing.
func Number(x float64) string { return say.Decimal(strconv.FormatFloat(x, 'f', -1, 64)) }

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
		b.WriteString(say.Decimal("." + frac))
	}
	return b.String()
}

// Percent writes a share as a percentage.
func Percent(x float64) string { return Figure(100*x, 0) + " %" }

// Day writes a date as people read it: 15 Mar 2027, or as they chose.
func Day(d hull.Date) string {
	if d.IsZero() {
		return "–"
	}
	return say.Day(d.Time())
}

// parsePercent reads "50 %", "50" or, without a sign, "0.5" as 0.5. A lone 1
// could be the whole or a hundredth and is refused.
func parsePercent(text string) (float64, error) {
	s, sign := strings.CutSuffix(strings.TrimSpace(text), "%")
	x, err := ParseNumber(s)
	switch {
	case err != nil:
		return 0, fmt.Errorf("want a share such as 50 %%, got %q", text)
	case !sign && x == 1:
		return 0, errors.New("want 1 % or 100 %: 1 alone can mean both")
	case sign || x > 1:
		return x / 100, nil
	}
	return x, nil
}

// percentText writes a share so that parsePercent reads the same share.
func percentText(x float64) string {
	for decimals := range 13 {
		s := strconv.FormatFloat(100*x, 'f', decimals, 64)
		if p, err := strconv.ParseFloat(s, 64); err == nil && p/100 == x {
			return say.Decimal(s) + " %"
		}
	}
	return Number(100*x) + " %"
}

// ParseDay reads a date as 2027-03-15, as 15 Mar 2027 or as dates are written
// at present. Dates of figures alone in another order can be read in two ways
// and are refused.
func ParseDay(text string) (hull.Date, error) {
	s := strings.Join(strings.Fields(text), " ")
	if t, ok := say.ParseDay(s); ok {
		s = t.Format(time.DateOnly)
	}
	d, err := hull.ParseDate(s)
	if err != nil {
		return 0, fmt.Errorf("want a date such as 2027-03-15 or 15 Mar 2027, from 1800 to 2400, got %q", text)
	}
	return d, nil
}

package session

import (
	"fmt"
	"math"
	"strconv"
	"strings"

	"anodewright/app/say"
	"anodewright/hull"
)

// valuesField is the wastages of single anodes as one text, in per cent with
// or without the sign: "11 14 9.5". percent is how one per cent is kept.
func valuesField(key, title, unit, hint string, percent float64, v at[[]float64]) Field {
	return Field{
		Key: key, Title: title, Unit: unit, Hint: hint,
		Get: func(a *hull.Asset, i int) string { return valuesText(*v(a, i), percent) },
		Set: func(a *hull.Asset, i int, text string) (err error) {
			*v(a, i), err = parseValues(text, percent)
			return err
		},
	}
}

// perCent writes a figure in per cent so that it is read back as the same.
func perCent(x, percent float64) string {
	if percent == 1 {
		return Number(x)
	}
	return strings.TrimSuffix(percentText(x), " %")
}

func valuesText(xs []float64, percent float64) string {
	var parts []string
	for _, x := range xs {
		s := perCent(x, percent)
		if p := x / percent; p != 0 && p < 1 {
			s += "%" // else it would be taken for a share
		}
		parts = append(parts, s)
	}
	return strings.Join(parts, " ")
}

// parseValues reads what valuesText writes, also with commas or semicolons
// between the figures. A bare figure between 0 and 1 may be a share and is
// refused.
func parseValues(text string, percent float64) (xs []float64, err error) {
	text = strings.ReplaceAll(text, " %", "%")
	for _, part := range strings.FieldsFunc(text, func(r rune) bool { return r == ' ' || r == ';' || r == '\t' || r == '\u00a0' }) {
		s, sign := strings.CutSuffix(strings.TrimSuffix(part, ","), "%")
		if s == "" {
			continue
		}
		x, err := ParseNumber(s)
		switch {
		case err != nil:
			return nil, fmt.Errorf("want per cent of single anodes, such as 11 14 9.5, got %q", part)
		case !sign && x > 0 && x < 1:
			return nil, fmt.Errorf("want per cent: %s alone can mean %s %% or %s %%; write the sign", s, s, Number(math.Round(1e6*x)/1e4))
		case percent != 1:
			x /= 100
		}
		xs = append(xs, x)
	}
	return xs, nil
}

func measuredText(ms []hull.Measured) string {
	var parts []string
	for _, m := range ms {
		parts = append(parts, shownNumber(say.Size, m.Girth)+" × "+shownNumber(say.Size, m.Length))
	}
	return strings.Join(parts, "; ")
}

// parseMeasured reads what measuredText writes; a size shown as one of the
// present ones keeps that value.
func parseMeasured(text string, present []hull.Measured) (ms []hull.Measured, err error) {
	for _, part := range strings.Split(text, ";") {
		if strings.TrimSpace(part) == "" {
			continue
		}
		sizes := strings.FieldsFunc(part, func(r rune) bool { return r == '×' || r == 'x' || r == 'X' || r == '*' })
		wrong := fmt.Errorf("want girth × length in m, such as 0.585 × 2.34, got %q", strings.TrimSpace(part))
		if len(sizes) != 2 {
			return nil, wrong
		}
		was := hull.Measured{Girth: math.NaN(), Length: math.NaN()}
		if len(ms) < len(present) {
			was = present[len(ms)]
		}
		girth, err1 := parseShown(say.Size, strings.TrimSpace(sizes[0]), was.Girth)
		length, err2 := parseShown(say.Size, strings.TrimSpace(sizes[1]), was.Length)
		if err1 != nil || err2 != nil {
			return nil, wrong
		}
		ms = append(ms, hull.Measured{Girth: girth, Length: length})
	}
	return ms, nil
}

// gradesText writes classes of wastage with their counts: "0-25-50-75: 0 5 3
// 0", the bounds in per cent.
func gradesText(g *hull.Grades) string {
	if g == nil {
		return ""
	}
	var bounds, counts []string
	for _, b := range g.Bounds {
		bounds = append(bounds, perCent(b, 0.01))
	}
	for _, n := range g.Counts {
		counts = append(counts, strconv.Itoa(n))
	}
	return strings.Join(bounds, "-") + ": " + strings.Join(counts, " ")
}

// quarters are the classes of counts without bounds.
const quarters = "0-25-50-75"

// parseGrades reads what gradesText writes. Four counts without bounds are of
// quarters.
func parseGrades(text string) (*hull.Grades, error) {
	if strings.TrimSpace(text) == "" {
		return nil, nil
	}
	wrong := fmt.Errorf("want bounds in per cent and a count for each class, such as %s: 0 5 3 0, got %q", quarters, strings.TrimSpace(text))
	before, after, found := strings.Cut(text, ":")
	if !found {
		before, after = quarters, text
	}
	g := &hull.Grades{}
	for _, part := range strings.FieldsFunc(before, func(r rune) bool { return r == '-' || r == '–' || r == '/' || r == ' ' || r == '%' }) {
		x, err := ParseNumber(part)
		if err != nil {
			return nil, wrong
		}
		g.Bounds = append(g.Bounds, x/100)
	}
	for _, part := range strings.FieldsFunc(after, func(r rune) bool { return r == ' ' || r == ',' || r == ';' || r == '\t' }) {
		n, err := parseCount(part)
		if err != nil {
			return nil, wrong
		}
		g.Counts = append(g.Counts, n)
	}
	if len(g.Bounds) == 0 || len(g.Bounds) != len(g.Counts) {
		return nil, wrong
	}
	return g, nil
}

// coatingText writes how much of the coating is broken down, as a figure, a
// word or both.
func coatingText(r *hull.Reading) string {
	var parts []string
	if r.CoatingPercent != nil {
		parts = append(parts, Number(*r.CoatingPercent)+" %")
	}
	if r.CoatingWord != "" {
		parts = append(parts, string(r.CoatingWord))
	}
	return strings.Join(parts, " ")
}

// parseCoating reads what coatingText writes into a reading.
func parseCoating(r *hull.Reading, text string) error {
	r.CoatingPercent, r.CoatingWord = nil, ""
	rest := strings.TrimSpace(text)
	for _, word := range hull.Condition("").Words() {
		if n := len(rest) - len(word); n >= 0 && strings.EqualFold(rest[n:], word) {
			r.CoatingWord, rest = hull.Condition(word), strings.TrimSpace(rest[:n])
			break
		}
	}
	if rest = strings.TrimSpace(strings.TrimSuffix(rest, "%")); rest == "" {
		return nil
	}
	x, err := ParseNumber(rest)
	if err != nil || x < 0 || x > 100 {
		return fmt.Errorf("want per cent broken down, or GOOD, FAIR or POOR, got %q", strings.TrimSpace(text))
	}
	r.CoatingPercent = &x
	return nil
}

package session

import (
	"fmt"
	"math"
	"regexp"
	"slices"
	"strings"

	"anodewright/app/say"
	"anodewright/hull"
)

// Texts of the fields that hold lists, as people write them.

func splitList(text string) []string {
	var items []string
	for _, s := range strings.FieldsFunc(text, func(r rune) bool { return r == ',' || r == ';' || r == '+' }) {
		if s = strings.TrimSpace(s); s != "" {
			items = append(items, s)
		}
	}
	return items
}

func sharesText(ws []hull.WaterShare) string {
	var parts []string
	for _, w := range ws {
		if len(ws) == 1 && w.Share == 1 {
			return w.Water
		}
		parts = append(parts, w.Water+" "+percentText(w.Share))
	}
	return strings.Join(parts, " + ")
}

func parseShares(text string) ([]hull.WaterShare, error) {
	var ws []hull.WaterShare
	for _, part := range strings.FieldsFunc(text, func(r rune) bool { return r == '+' || r == ';' }) {
		id, share, found := strings.Cut(strings.TrimSpace(part), " ")
		w := hull.WaterShare{Water: id, Share: 1}
		if found {
			x, err := parsePercent(share)
			if err != nil {
				return nil, err
			}
			w.Share = x
		}
		ws = append(ws, w)
	}
	if len(ws) == 0 {
		return nil, fmt.Errorf("want at least one water, such as north-sea")
	}
	return ws, nil
}

func fittedText(fs []hull.Fitted) string {
	var parts []string
	for _, f := range fs {
		parts = append(parts, fmt.Sprintf("%d × %s %s %s", f.Count, f.Pattern, f.Fitted, percentText(f.Wastage)))
	}
	return strings.Join(parts, " + ")
}

var fittedForm = regexp.MustCompile(`^(\d+)\s*[x×*]\s*(\S+)\s+(\d{4}-\d{2}-\d{2})(?:\s+(\S.*))?$`)

func parseFitted(text string) ([]hull.Fitted, error) {
	var fs []hull.Fitted
	for _, part := range strings.FieldsFunc(text, func(r rune) bool { return r == '+' || r == ';' }) {
		part = strings.TrimSpace(part)
		m := fittedForm.FindStringSubmatch(part)
		if m == nil {
			return nil, fmt.Errorf("want pieces × pattern, date and wastage, such as 24 × al-45 2024-03-15 10 %%, got %q", part)
		}
		n, err := parseCount(m[1])
		if err != nil {
			return nil, err
		}
		f := hull.Fitted{Count: n, Pattern: m[2]}
		if f.Fitted, err = hull.ParseDate(m[3]); err != nil {
			return nil, err
		}
		if m[4] != "" {
			if f.Wastage, err = parsePercent(m[4]); err != nil {
				return nil, err
			}
		}
		fs = append(fs, f)
	}
	return fs, nil
}

func densitiesText(d *hull.Densities) string {
	return shownNumber(say.Density, d.Initial) + " / " + shownNumber(say.Density, d.Mean) + " / " + shownNumber(say.Density, d.Final)
}

// parseDensities reads what densitiesText writes; a part that is unchanged
// keeps its value.
func parseDensities(text string, present *hull.Densities) (*hull.Densities, error) {
	parts := strings.Split(text, "/")
	if strings.TrimSpace(text) == "" {
		return nil, nil
	}
	if len(parts) != 3 {
		return nil, fmt.Errorf("want initial / mean / final, such as 150 / 70 / 100, got %q", text)
	}
	d := hull.Densities{Initial: math.NaN(), Mean: math.NaN(), Final: math.NaN()}
	if present != nil {
		d = *present
	}
	for i, v := range []*float64{&d.Initial, &d.Mean, &d.Final} {
		x, err := parseShown(say.Density, strings.TrimSpace(parts[i]), *v)
		if err != nil {
			return nil, err
		}
		*v = x
	}
	return &d, nil
}

func worksText(ws []hull.Work) string {
	var parts []string
	for _, w := range ws {
		s := w.Zone + " " + string(w.Coating)
		if w.Share != nil {
			s += " " + percentText(*w.Share)
		}
		if w.Breakdown != nil {
			s += " " + percentText(*w.Breakdown)
		}
		if w.Category != "" {
			s += " " + string(w.Category)
		}
		if w.A != nil {
			s += " a=" + Number(*w.A)
		}
		if w.B != nil {
			s += " b=" + Number(*w.B)
		}
		parts = append(parts, s)
	}
	return strings.Join(parts, "; ")
}

// signed is a percent sign with the blanks before it.
var signed = regexp.MustCompile(`\s+%`)

func parseWorks(text string) ([]hull.Work, error) {
	var ws []hull.Work
	for _, part := range strings.Split(text, ";") {
		words := strings.Fields(signed.ReplaceAllString(part, "%"))
		if len(words) == 0 {
			continue
		}
		if len(words) < 2 {
			return nil, fmt.Errorf("want zone and work, such as side touch-up 50 %%, got %q", strings.TrimSpace(part))
		}
		w := hull.Work{Zone: words[0], Coating: hull.CoatingWork(words[1])}
		for _, word := range words[2:] {
			switch {
			case strings.HasPrefix(word, "a="), strings.HasPrefix(word, "b="):
				x, err := ParseNumber(word[2:])
				if err != nil {
					return nil, err
				}
				if word[0] == 'a' {
					w.A = &x
				} else {
					w.B = &x
				}
			case slices.Contains(hull.Category("").Words(), word):
				w.Category = hull.Category(word)
			default:
				x, err := parsePercent(word)
				if err != nil {
					return nil, err
				}
				if w.Coating == hull.Found {
					w.Breakdown = &x
				} else {
					w.Share = &x
				}
			}
		}
		ws = append(ws, w)
	}
	return ws, nil
}

package session

import (
	"fmt"
	"regexp"
	"strconv"
	"strings"

	"anodewright/hull"
)

// FittedColumn is one part of a fitted set that can be edited by itself.
type FittedColumn int

// The parts of a fitted set.
const (
	FittedPattern FittedColumn = iota
	FittedCount
	FittedDate
	FittedWastage
)

// fittedField is the field of a zone that holds its fitted sets as one text.
// The parts are edited through it, so that what is typed is kept, checked and
// shown as everywhere else.
func fittedField() Field {
	for _, f := range ZoneDetails() {
		if f.Key == "fitted" {
			return f
		}
	}
	panic("session: zones have no field fitted")
}

// fittedParts are the texts of the parts of a set.
type fittedParts [FittedWastage + 1]string

func partsOf(f hull.Fitted) fittedParts {
	return fittedParts{f.Pattern, strconv.Itoa(f.Count), f.Fitted.String(), percentText(f.Wastage)}
}

func (p fittedParts) text() string {
	return strings.TrimSpace(fmt.Sprintf("%s × %s %s %s", p[FittedCount], p[FittedPattern], p[FittedDate], p[FittedWastage]))
}

// FittedText returns what one part of the n-th fitted set of a zone shows: its
// value, or what was typed into it and has a fault, with the fault in words.
func (s *Session) FittedText(zone, n int, c FittedColumn) (text, fault string) {
	text, fault = s.fittedText(zone, n, c)
	if c == FittedDate {
		if d, err := hull.ParseDate(text); err == nil {
			text = dayToType(d)
		}
	}
	return text, fault
}

// fittedText is FittedText with dates as they are kept.
func (s *Session) fittedText(zone, n int, c FittedColumn) (text, fault string) {
	a := s.Asset()
	if a == nil || zone < 0 || zone >= len(a.Zones) || n < 0 || n >= len(a.Zones[zone].Fitted) {
		return "", ""
	}
	text = partsOf(a.Zones[zone].Fitted[n])[c]
	whole, fault := s.Text(Zones, zone, fittedField())
	if fault == "" {
		return text, ""
	}
	drafted, ok := splitFitted(whole)
	if !ok || len(drafted) != len(a.Zones[zone].Fitted) {
		return text, fault // the zone's text was changed as a whole
	}
	if drafted[n][c] == text {
		return text, ""
	}
	if own := partFault(c, drafted[n][c]); own != nil {
		fault = own.Error()
	}
	return drafted[n][c], fault
}

// partFault says what is wrong with the text of one part by itself.
func partFault(c FittedColumn, text string) (err error) {
	switch c {
	case FittedCount:
		_, err = parseCount(text)
	case FittedDate:
		_, err = ParseDay(text)
	case FittedWastage:
		_, err = parsePercent(text)
	}
	return err
}

// draftForm is a set as SetFitted writes it, with anything for its parts.
var draftForm = regexp.MustCompile(`^(.*?) × (\S*) (\S*)(?: (.*))?$`)

// splitFitted takes the text of a zone's sets apart without reading them.
func splitFitted(text string) (sets []fittedParts, ok bool) {
	for _, part := range strings.Split(text, " + ") {
		m := draftForm.FindStringSubmatch(part)
		if m == nil {
			return nil, false
		}
		sets = append(sets, fittedParts{m[2], m[1], m[3], m[4]})
	}
	return sets, true
}

// SetFitted sets one part of the n-th fitted set of a zone. A text with a
// fault is kept as a draft of the zone's fitted sets.
func (s *Session) SetFitted(zone, n int, c FittedColumn, text string) error {
	a := s.Asset()
	if a == nil || zone < 0 || zone >= len(a.Zones) || n < 0 || n >= len(a.Zones[zone].Fitted) {
		return nil
	}
	text = strings.Join(strings.Fields(text), " ")
	if c == FittedDate {
		if d, err := ParseDay(text); err == nil {
			text = d.String()
		}
	}
	var parts []string
	for i, f := range a.Zones[zone].Fitted {
		p := partsOf(f)
		if i == n {
			p[c] = text
		}
		parts = append(parts, p.text())
	}
	return s.SetText(Zones, zone, fittedField(), strings.Join(parts, " + "))
}

// AddFitted adds a set of one piece of a pattern to a zone, fitted at the last
// docking.
func (s *Session) AddFitted(zone int, pattern string) error {
	return s.Do("add a fitted set", func(a *hull.Asset) error {
		if zone < 0 || zone >= len(a.Zones) {
			return fmt.Errorf("no zone is selected")
		}
		a.Zones[zone].Fitted = append(a.Zones[zone].Fitted, hull.Fitted{Pattern: pattern, Count: 1, Fitted: a.Start()})
		return nil
	})
}

// RemoveFitted removes the n-th fitted set of a zone.
func (s *Session) RemoveFitted(zone, n int) error {
	return s.Do("remove a fitted set", func(a *hull.Asset) error {
		if zone < 0 || zone >= len(a.Zones) || n < 0 || n >= len(a.Zones[zone].Fitted) {
			return fmt.Errorf("no fitted set is selected")
		}
		a.Zones[zone].Fitted = remove(a.Zones[zone].Fitted, n)
		return nil
	})
}

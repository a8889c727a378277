package session

import (
	"fmt"
	"strings"

	"anodewright/hull"
)

// Changes of trade and lay-up as a line of text:
// "2027-06-01 baltic 40 % + north-sea 60 % under-way 0.8; 2028-01-01
// under-way 1". Each change has its date, then waters, an under-way factor or
// both.

const underWay = "under-way"

func serviceText(ss []hull.Service) string {
	var parts []string
	for _, s := range ss {
		part := s.From.String()
		if len(s.Waters) > 0 {
			part += " " + sharesText(s.Waters)
		}
		if s.UnderWayFactor != nil {
			part += " " + underWay + " " + Number(*s.UnderWayFactor)
		}
		parts = append(parts, part)
	}
	return strings.Join(parts, "; ")
}

func parseService(text string) ([]hull.Service, error) {
	var ss []hull.Service
	for _, part := range strings.Split(text, ";") {
		if strings.TrimSpace(part) == "" {
			continue
		}
		s, err := parseChange(strings.Fields(part))
		if err != nil {
			return nil, err
		}
		ss = append(ss, s)
	}
	return ss, nil
}

// parseChange reads one change from its words.
func parseChange(words []string) (hull.Service, error) {
	var s hull.Service
	var err error
	if s.From, words, err = leadingDay(words); err != nil {
		return s, err
	}
	mix := words
	for i, word := range words {
		if !strings.EqualFold(word, underWay) {
			continue
		}
		x, err := ParseNumber(strings.Join(words[i+1:], " "))
		if err != nil {
			return s, fmt.Errorf("%s: want a factor after %s, such as %s 0.8, got %q", s.From, underWay, underWay, strings.Join(words[i+1:], " "))
		}
		s.UnderWayFactor, mix = &x, words[:i]
		break
	}
	if len(mix) > 0 {
		if s.Waters, err = parseShares(strings.Join(mix, " ")); err != nil {
			return s, fmt.Errorf("%s: %w", s.From, err)
		}
	}
	if s.Waters == nil && s.UnderWayFactor == nil {
		return s, fmt.Errorf("%s: want waters with their shares, %s and a factor, or both", s.From, underWay)
	}
	return s, nil
}

// leadingDay reads a date from the first word, or the first three as in 15 Mar
// 2027, and returns the words behind it.
func leadingDay(words []string) (hull.Date, []string, error) {
	d, err := ParseDay(words[0])
	if err == nil {
		return d, words[1:], nil
	}
	if len(words) >= 3 {
		if d, long := ParseDay(strings.Join(words[:3], " ")); long == nil {
			return d, words[3:], nil
		}
	}
	return 0, nil, fmt.Errorf("want a date first, such as 2027-06-01 baltic 40 %% + north-sea 60 %% %s 0.8, got %q", underWay, strings.Join(words, " "))
}

// serviceField is the field of an asset's or zone's changes of service.
func serviceField(hint string, v at[[]hull.Service]) Field {
	return Field{
		Key: "service", Title: "Trade changes",
		Get: func(a *hull.Asset, i int) string { return serviceText(*v(a, i)) },
		Set: func(a *hull.Asset, i int, text string) (err error) {
			*v(a, i), err = parseService(text)
			return err
		},
		Hint: hint + " Date, waters with their shares, under-way factor: 2027-06-01 baltic 40 % + north-sea 60 % under-way 0.8; 2028-01-01 under-way 1. Empty: none.",
	}
}

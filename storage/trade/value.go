package trade

import (
	"errors"
	"fmt"
	"regexp"
	"strconv"
	"strings"

	"anodewright/hull"
)

var (
	numberForm = regexp.MustCompile(`^\+?(\d{1,6})(?:([.,])(\d{1,12}))?$`)
	momentForm = regexp.MustCompile(`^(\d{4}-\d{2}-\d{2})(?:[ T](\d{2}):(\d{2})(?::\d{2})?)?$`)
)

// parseDays reads a number of days with a decimal point or comma.
func parseDays(text string) (float64, error) {
	want := fmt.Errorf("a number of days above 0 and at most %d", maxDays)
	m := numberForm.FindStringSubmatch(strings.TrimSpace(text))
	if m == nil {
		return 0, want
	}
	if m[2] == "," && len(m[3]) == 3 && len(m[1]) <= 3 && m[1] != "0" {
		return 0, errors.New(m[1] + "." + m[3] + " or " + m[1] + m[3] + " (a comma before three figures can mean both)")
	}
	whole := m[1]
	if m[3] != "" {
		whole += "." + m[3]
	}
	x, err := strconv.ParseFloat(whole, 64)
	if err != nil || !(x > 0 && x <= maxDays) {
		return 0, want
	}
	return x, nil
}

// parseMoment reads a date, with a time of day if there is one.
func parseMoment(text string) (moment, error) {
	want := errors.New("a date as YYYY-MM-DD between 1800 and 2400, with a time as hh:mm if need be")
	m := momentForm.FindStringSubmatch(strings.TrimSpace(text))
	if m == nil {
		return 0, want
	}
	d, err := hull.ParseDate(m[1])
	if err != nil {
		return 0, want
	}
	hours, _ := strconv.Atoi("0" + m[2])
	minutes, _ := strconv.Atoi("0" + m[3])
	if hours > 23 || minutes > 59 {
		return 0, want
	}
	return moment(d)*24*60 + moment(60*hours+minutes), nil
}

package hull

import (
	"fmt"
	"time"
)

// Date is a calendar day in UTC. The zero Date means that no date is given.
type Date int32 // days since 0000-12-31, so that 0001-01-01 is 1

var dayZero = time.Date(0, time.December, 31, 0, 0, 0, 0, time.UTC)

// DaysPerYear is the year of the design codes: 365 days or 8760 hours.
const DaysPerYear = 365

// NewDate returns the day with the given year, month and day of month.
func NewDate(year int, month time.Month, day int) Date {
	return DateOf(time.Date(year, month, day, 0, 0, 0, 0, time.UTC))
}

// DateOf returns the calendar day of t as written in t's own zone.
func DateOf(t time.Time) Date {
	y, m, d := t.Date()
	return Date(time.Date(y, m, d, 0, 0, 0, 0, time.UTC).Unix()/86400 - dayZero.Unix()/86400)
}

// ParseDate reads YYYY-MM-DD.
func ParseDate(s string) (Date, error) {
	t, err := time.Parse(time.DateOnly, s)
	if err != nil || t.Year() < 1800 || t.Year() > 2400 {
		return 0, fmt.Errorf("want a date as YYYY-MM-DD between 1800 and 2400, got %q", s)
	}
	return DateOf(t), nil
}

// Time returns midnight UTC at the start of the day.
func (d Date) Time() time.Time { return dayZero.AddDate(0, 0, int(d)) }

// IsZero reports whether no date is given.
func (d Date) IsZero() bool { return d == 0 }

// String writes YYYY-MM-DD, or nothing for the zero Date.
func (d Date) String() string {
	if d == 0 {
		return ""
	}
	return d.Time().Format(time.DateOnly)
}

// MarshalText writes the date for JSON.
func (d Date) MarshalText() ([]byte, error) { return []byte(d.String()), nil }

// UnmarshalText reads the date from JSON.
func (d *Date) UnmarshalText(text []byte) (err error) {
	*d, err = ParseDate(string(text))
	return err
}

// Years returns the time from e to d in years of 365 days.
func (d Date) Years(e Date) float64 { return float64(d-e) / DaysPerYear }

// AddMonths returns the same day n months later, the last day of that month
// where the month is shorter (2023-08-31 and 6 months: 2024-02-29).
func (d Date) AddMonths(n int) Date {
	t := d.Time()
	first := time.Date(t.Year(), t.Month()+time.Month(n), 1, 0, 0, 0, 0, time.UTC)
	last := first.AddDate(0, 1, -1).Day()
	return DateOf(first.AddDate(0, 0, min(t.Day(), last)-1))
}

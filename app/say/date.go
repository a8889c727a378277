package say

import (
	"fmt"
	"regexp"
	"strings"
	"sync/atomic"
	"time"
)

// Dates is how dates are written.
type Dates string

// The ways to write a date. In words is the first: it cannot be misread.
const (
	InWords       Dates = ""    // 15 Mar 2027
	ISO           Dates = "iso" // 2027-03-15
	DayMonthYear  Dates = "dmy" // 15.03.2027
	MonthDayYear  Dates = "mdy" // 03/15/2027
	dateOfFigures       = `\d{4}-\d{2}-\d{2}`
)

var dates atomic.Value

// UseDates chooses how dates are written.
func UseDates(d Dates) { dates.Store(d) }

// DatesUsed returns how dates are written.
func DatesUsed() Dates {
	d, _ := dates.Load().(Dates)
	return d
}

// layout is the form of the dates that are written in figures.
func (d Dates) layout() string {
	switch d {
	case DayMonthYear:
		return "02.01.2006"
	case MonthDayYear:
		return "01/02/2006"
	}
	return time.DateOnly
}

// months are the short names of the months by language.
var months = map[string][12]string{
	"en": {"Jan", "Feb", "Mar", "Apr", "May", "Jun", "Jul", "Aug", "Sep", "Oct", "Nov", "Dec"},
	"es": {"ene", "feb", "mar", "abr", "may", "jun", "jul", "ago", "sep", "oct", "nov", "dic"},
}

// Month writes a month and its year: Mar 2027.
func Month(t time.Time) string {
	return fmt.Sprintf("%s %d", months[Language()][t.Month()-1], t.Year())
}

// Day writes a date to be read.
func Day(t time.Time) string {
	if d := DatesUsed(); d != InWords {
		return t.Format(d.layout())
	}
	return fmt.Sprintf("%d %s", t.Day(), Month(t))
}

// Moment writes a time of a day.
func Moment(t time.Time) string { return Day(t) + t.Format(" 15:04") }

// DayToType writes a date as it is edited: in figures.
func DayToType(t time.Time) string { return t.Format(DatesUsed().layout()) }

// ParseDay reads a date as YYYY-MM-DD, with the month's name in any of the
// languages, or in figures as dates are written at present. Figures in any
// other order could be read in two ways, and are refused.
func ParseDay(text string) (time.Time, bool) {
	s := strings.Join(strings.Fields(text), " ")
	for _, form := range []string{time.DateOnly, "2 Jan 2006", "2 January 2006"} {
		if t, err := time.Parse(form, s); err == nil {
			return t, true
		}
	}
	switch DatesUsed() {
	case DayMonthYear:
		if t, err := time.Parse("2.1.2006", s); err == nil {
			return t, true
		}
	case MonthDayYear:
		if t, err := time.Parse("1/2/2006", s); err == nil {
			return t, true
		}
	}
	if parts := strings.Split(s, " "); len(parts) == 3 {
		for i, name := range months[Language()] {
			if strings.EqualFold(parts[1], name) {
				t, err := time.Parse("2 Jan 2006", parts[0]+" "+months["en"][i]+" "+parts[2])
				return t, err == nil
			}
		}
	}
	return time.Time{}, false
}

var isoDate = regexp.MustCompile(`(^|[^\d-])(` + dateOfFigures + `)($|[^\d-])`)

// days writes the dates of a sentence as chosen.
func days(s string) string {
	d := DatesUsed()
	if d == InWords || d == ISO {
		return s
	}
	return isoDate.ReplaceAllStringFunc(s, func(found string) string {
		m := isoDate.FindStringSubmatch(found)
		t, err := time.Parse(time.DateOnly, m[2])
		if err != nil {
			return found
		}
		return m[1] + t.Format(d.layout()) + m[3]
	})
}

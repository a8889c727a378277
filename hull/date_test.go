package hull_test

import (
	"testing"
	"time"

	"anodewright/hull"
)

// Survey windows of a ship delivered on 2024-03-15: annual within three
// months of the anniversary, intermediate from three months before the second
// to three months after the third, bottom within 36 months, special at 60,
// extended dry-docking at 90.
func TestMonthsOfSurveys(t *testing.T) {
	delivery := on("2024-03-15")
	for months, want := range map[int]string{
		9: "2024-12-15", 15: "2025-06-15", 21: "2025-12-15", 39: "2027-06-15",
		36: "2027-03-15", 60: "2029-03-15", 90: "2031-09-15", 0: "2024-03-15", -3: "2023-12-15",
	} {
		if got := delivery.AddMonths(months); got != on(want) {
			t.Errorf("%d months after %s: got %s, want %s", months, delivery, got, want)
		}
	}
	if got := on("2026-09-15").AddMonths(36); got != on("2029-09-15") {
		t.Errorf("36 months after a bottom survey: got %s", got)
	}
}

func TestMonthsClipToMonthEnd(t *testing.T) {
	for _, c := range []struct {
		base   string
		months int
		want   string
	}{
		{"2023-08-31", 6, "2024-02-29"},
		{"2023-08-31", 30, "2026-02-28"},
		{"2023-08-31", 60, "2028-08-31"},
		{"2023-08-31", 90, "2031-02-28"},
		{"2024-02-29", 12, "2025-02-28"},
		{"2024-02-29", 48, "2028-02-29"},
		{"2023-12-31", 2, "2024-02-29"},
		{"2024-05-31", -1, "2024-04-30"},
		{"2024-01-31", -11, "2023-02-28"},
	} {
		if got := on(c.base).AddMonths(c.months); got != on(c.want) {
			t.Errorf("%s and %d months: got %s, want %s", c.base, c.months, got, c.want)
		}
	}
}

func TestYearsAreOf365Days(t *testing.T) {
	near(t, "five calendar years over a leap day", on("2029-03-15").Years(on("2024-03-15")), 1826.0/365)
	near(t, "3650 days", (on("2024-01-01") + 3650).Years(on("2024-01-01")), 10)
	near(t, "backwards", on("2024-01-01").Years(on("2024-01-11")), -10.0/365)
}

func TestDatesOfText(t *testing.T) {
	for _, s := range []string{"1800-01-01", "1999-12-31", "2000-02-29", "2024-02-29", "2400-12-31"} {
		if d := on(s); d.String() != s {
			t.Errorf("%s comes back as %s", s, d)
		}
	}
	for _, s := range []string{"", "2023-02-29", "2024-13-01", "2024-1-1", "15.03.2024", "1799-12-31", "2401-01-01", "2024-03-15T00:00:00Z"} {
		if d, err := hull.ParseDate(s); err == nil {
			t.Errorf("%q is read as %s", s, d)
		}
	}
}

// Every day of four centuries comes after the one before, by the calendar.
func TestDaysFollowTheCalendar(t *testing.T) {
	d := hull.NewDate(1999, time.December, 25)
	for t0 := d.Time(); t0.Year() < 2402; t0 = t0.AddDate(0, 0, 1) {
		if d.Time() != t0 || hull.DateOf(t0) != d {
			t.Fatalf("day %d is %s by the calendar, %s by its number", d, t0.Format(time.DateOnly), d)
		}
		d++
	}
}

// The day is the one on the calendar of the place, not in Greenwich.
func TestDateOfATimeElsewhere(t *testing.T) {
	east := time.FixedZone("east", 12*3600)
	if got := hull.DateOf(time.Date(2026, 12, 1, 3, 0, 0, 0, east)); got != on("2026-12-01") {
		t.Errorf("got %s", got)
	}
}

func TestNoDate(t *testing.T) {
	var d hull.Date
	if !d.IsZero() || d.String() != "" {
		t.Errorf("the date that is not given reads %q", d.String())
	}
	if on("2024-01-01").IsZero() {
		t.Error("a date counts as not given")
	}
}

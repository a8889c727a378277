package session_test

import (
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"anodewright/app/session"
	"anodewright/hull"
)

func TestNumbersAsPeopleWriteThem(t *testing.T) {
	for text, want := range map[string]float64{
		"2100": 2100, " 2100 ": 2100, "2 100": 2100, "2\u00a0100": 2100, "2\u202f100\t": 2100, "2'100": 2100, "2’100": 2100,
		"1234,5": 1234.5, "1 234,5": 1234.5, "1.234,5": 1234.5, "1,234.5": 1234.5, "1 234,567": 1234.567,
		"0,75": 0.75, "0,125": 0.125, "1234,567": 1234.567, "1.234": 1.234, "1,2345": 1.2345,
		"1,234,567": 1234567, "1.234.567": 1234567, "1.234.567,8": 1234567.8,
		"-3": -3, "−3": -3, "+3": 3, "- 3": -3, ".5": 0.5, ",5": 0.5, "5.": 5, "1e3": 1000, "1,5e-3": 0.0015,
	} {
		if got, err := session.ParseNumber(text); err != nil || got != want {
			t.Errorf("%q is read as %v, %v; want %v", text, got, err, want)
		}
	}
}

func TestNumbersThatAreNone(t *testing.T) {
	for _, text := range []string{
		"", " ", "abc", "12 34", "1 23", "1,23.5", "1.2.3", "1,2,3", "1.234.5", "1,234,5", "2 100 m", "0x10", "Inf", "NaN", "1_000",
		"1e400", "--3", "3-", ".", ",", "-", "1.234 567", "٣", "12,345.678.9", "e5",
	} {
		if got, err := session.ParseNumber(text); err == nil {
			t.Errorf("%q is read as %v", text, got)
		} else if !strings.HasPrefix(err.Error(), "want a number, got ") {
			t.Errorf("%q: %v", text, err)
		}
	}
}

func TestCommaBeforeThreeDigitsIsRefusedWithBothReadings(t *testing.T) {
	_, err := session.ParseNumber("-12,345")
	if err == nil || err.Error() != "want -12345 or -12.345: a comma before three digits can mean both" {
		t.Fatalf("error %v", err)
	}
	for text, want := range map[string]float64{"-12345": -12345, "-12.345": -12.345} {
		if got, err := session.ParseNumber(text); err != nil || got != want {
			t.Errorf("the reading %s that the error offers gives %v, %v", text, got, err)
		}
	}
}

func TestWrittenNumbersAreReadBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := rapid.Float64Range(-1e9, 1e9).Draw(t, "x")
		if got, err := session.ParseNumber(session.Number(x)); err != nil || got != x {
			t.Fatalf("%q is read as %v, %v", session.Number(x), got, err)
		}
		decimals := rapid.IntRange(0, 4).Draw(t, "decimals")
		shown := session.Figure(x, decimals)
		got, err := session.ParseNumber(shown)
		if err != nil || math.Abs(got-x) > 0.51*math.Pow10(-decimals) {
			t.Fatalf("%v is shown as %q, which is read as %v, %v", x, shown, got, err)
		}
	})
}

func TestDates(t *testing.T) {
	want := hull.NewDate(2027, 3, 5)
	for _, text := range []string{"2027-03-05", " 2027-03-05 ", "5 Mar 2027", "05 Mar 2027", "5 March 2027", "5  mar\u00a02027", session.Day(want)} {
		if got, err := session.ParseDay(text); err != nil || got != want {
			t.Errorf("%q is read as %v, %v", text, got, err)
		}
	}
	for _, text := range []string{"", "03/05/2027", "05.03.2027", "5-3-27", "2027-02-29", "30 Feb 2027", "2027", "1799-01-01", "2027-3-5x", "5 Mai 2027"} {
		if got, err := session.ParseDay(text); err == nil {
			t.Errorf("%q is read as %v", text, got)
		} else if !strings.Contains(err.Error(), "want a date such as 2027-03-15") {
			t.Errorf("%q: %v", text, err)
		}
	}
}

func TestFiguresForReading(t *testing.T) {
	for _, c := range []struct {
		x        float64
		decimals int
		want     string
	}{
		{1234567.891, 1, "1\u00a0234\u00a0567.9"}, {999.96, 1, "1\u00a0000.0"}, {-0.04, 1, "0.0"}, {-12, 0, "−12"},
		{math.NaN(), 2, "–"}, {math.Inf(1), 2, "–"},
	} {
		if got := session.Figure(c.x, c.decimals); got != c.want {
			t.Errorf("%v with %d decimals is %q, want %q", c.x, c.decimals, got, c.want)
		}
	}
	if session.Percent(0.8) != "80 %" || session.Day(0) != "–" || session.Day(hull.NewDate(2027, 3, 5)) != "5 Mar 2027" {
		t.Error("a share or a date is written in another way")
	}
}

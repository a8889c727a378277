package say

import (
	"math"
	"testing"
	"time"
)

func TestQuantitiesAreConvertedBothWays(t *testing.T) {
	t.Cleanup(func() { UseUS(false) })
	UseUS(true)
	for _, c := range []struct {
		q      Quantity
		si, us float64
		unit   string
	}{
		{Area, 1000, 10763.910417, "ft²"}, {Mass, 100, 220.462262, "lb"}, {Length, 10, 32.808399, "ft"}, {Size, 0.254, 10, "in"},
		{Thin, 25.4, 1, "in"}, {Film, 254, 10, "mil"}, {Density, 100, 9.290304, "mA/ft²"}, {Temperature, 20, 68, "°F"},
		{Temperature, -40, -40, "°F"}, {Resistivity, 0.25, 25, "Ω cm"}, {Capacity, 2000, 907.184740, "Ah/lb"}, {Volume, 1, 35.314667, "ft³"},
		{Bulk, 0.001, 61.023744, "in³"}, {Plain, 7, 7, ""},
	} {
		if got := c.q.Show(c.si); math.Abs(got-c.us) > 1e-6*math.Abs(c.us) {
			t.Errorf("%v: %v is shown as %v, want %v", c.q, c.si, got, c.us)
		}
		if got := c.q.Store(c.q.Show(c.si)); math.Abs(got-c.si) > 1e-12*math.Abs(c.si) {
			t.Errorf("%v: %v comes back as %v", c.q, c.si, got)
		}
		if got := c.q.Unit(); got != c.unit {
			t.Errorf("%v: unit %q, want %q", c.q, got, c.unit)
		}
	}
	UseUS(false)
	if Area.Show(3) != 3 || Area.Unit() != "m²" || Unit("kg") != "kg" {
		t.Error("SI is not shown as it is")
	}
}

func TestFiguresOfSentencesFollowTheUnits(t *testing.T) {
	speak(t, nil)
	t.Cleanup(func() { UseUS(false) })
	UseUS(true)
	for in, want := range map[string]string{
		"lists 11 to 270 mA/m² for steel": "lists 1 to 25.1 mA/ft² for steel",
		"from 30 up to 50 °C":             "from 86 up to 122 °F",
		"a flash point below 60 °C here":  "a flash point below 140 °F here",
		"3 m deep, 45 kg.":                "9.8 ft deep, 99 lb.",
		"5 mA and 3 months":               "5 mA and 3 months",
		"wetted_area_m2 900":              "wetted_area_m2 900",
		"about 2000 Ah/kg":                "about 907.2 Ah/lb",
	} {
		if got := Sentence(in); got != want {
			t.Errorf("%q: got %q, want %q", in, got, want)
		}
	}
}

func TestDatesAreWrittenAndReadAsChosen(t *testing.T) {
	t.Cleanup(func() { UseDates(InWords); Use("en") })
	day := time.Date(2027, 3, 5, 14, 30, 0, 0, time.UTC)
	for _, c := range []struct {
		as                     Dates
		read, typed, inMessage string
	}{
		{InWords, "5 Mar 2027", "2027-03-05", "by 2027-03-05."},
		{ISO, "2027-03-05", "2027-03-05", "by 2027-03-05."},
		{DayMonthYear, "05.03.2027", "05.03.2027", "by 05.03.2027."},
		{MonthDayYear, "03/05/2027", "03/05/2027", "by 03/05/2027."},
	} {
		UseDates(c.as)
		if got := Day(day); got != c.read {
			t.Errorf("%q: read as %q, want %q", c.as, got, c.read)
		}
		if got := DayToType(day); got != c.typed {
			t.Errorf("%q: typed as %q, want %q", c.as, got, c.typed)
		}
		if got := Sentence("by 2027-03-05."); got != c.inMessage {
			t.Errorf("%q: in a sentence %q, want %q", c.as, got, c.inMessage)
		}
		for _, text := range []string{"2027-03-05", "5 Mar 2027", c.typed, c.read} {
			if got, ok := ParseDay(text); !ok || got.Format(time.DateOnly) != "2027-03-05" {
				t.Errorf("%q: %q is read as %v, %v", c.as, text, got, ok)
			}
		}
	}
	if _, ok := ParseDay("05.03.2027"); ok {
		t.Error("a date in another order than the chosen one is read")
	}
	UseDates(InWords)
	Use("es")
	if got := Moment(day); got != "5 mar 2027 14:30" {
		t.Errorf("Spanish: %q", got)
	}
	for _, text := range []string{"5 ene 2027", "5 Jan 2027"} {
		if got, ok := ParseDay(text); !ok || got.Month() != time.January {
			t.Errorf("Spanish: %q is read as %v, %v", text, got, ok)
		}
	}
}

package hull

import (
	"math"
	"strings"
	"testing"
)

// Class practice: GOOD < 3 %, FAIR 3-20 %, POOR > 20 %.
func TestConditionWords(t *testing.T) {
	for breakdown, want := range map[float64]Condition{0: "GOOD", 0.0299: "GOOD", 0.03: "FAIR", 0.2: "FAIR", 0.201: "POOR", 1: "POOR"} {
		if got := ConditionOf(breakdown); got != want {
			t.Errorf("%g: got %s, want %s", breakdown, got, want)
		}
	}
	for word, want := range map[Condition][2]float64{"GOOD": {0, 0.03}, "FAIR": {0.03, 0.2}, "POOR": {0.2, 1}} {
		from, to, source, confidence := word.Range()
		if from != want[0] || to != want[1] || source == "" || confidence != "from memory" {
			t.Errorf("%s: %g to %g (%s, %s), want %v", word, from, to, source, confidence, want)
		}
	}
}

// coated is a ship with one zone of category III (a 0.02, b 0.012 per year),
// docked on 2024-03-15 with the coat new, and a docking on 2027-03-15.
func coated(t *testing.T) *Asset {
	t.Helper()
	day := func(s string) Date {
		d, err := ParseDate(s)
		if err != nil {
			t.Fatal(err)
		}
		return d
	}
	half := 0.5
	return &Asset{
		InService: day("2016-04-12"), LastDocking: day("2024-03-15"), Horizon: day("2034-03-15"),
		Zones:    []Zone{{ID: "side", Coating: Coating{Category: CategoryIII, Applied: day("2024-03-15")}}},
		Dockings: []Docking{{Date: day("2027-03-15"), Works: []Work{{Zone: "side", Coating: TouchUp, Share: &half}}}},
	}
}

func TestBreakdownOn(t *testing.T) {
	a := coated(t)
	z := &a.Zones[0]
	before, after := a.Dockings[0].Date-1, a.Dockings[0].Date
	years := before.Years(a.LastDocking)
	got, ok := a.BreakdownOn(z, before)
	if want := 0.02 + 0.012*years; !ok || math.Abs(got-want) > 1e-12 {
		t.Errorf("before the docking: %g, want %g", got, want)
	}
	got, ok = a.BreakdownOn(z, after)
	if want := 0.5 * (0.02 + 0.012*after.Years(a.LastDocking)); !ok || math.Abs(got-want) > 1e-12 {
		t.Errorf("after a touch-up of half: %g, want %g", got, want)
	}
	if _, ok := a.BreakdownOn(z, a.LastDocking-1); ok {
		t.Error("a date before the coat has a breakdown")
	}
	z.Coating.Category = CategoryNone
	if _, ok := a.BreakdownOn(z, after); ok {
		t.Error("bare steel has a breakdown of its coating")
	}
}

func TestCoatingDoubt(t *testing.T) {
	a := coated(t)
	z := &a.Zones[0]
	date := a.LastDocking + 2*365 // the model: 0.044
	percent := func(x float64) *float64 { return &x }
	for _, c := range []struct {
		what  string
		r     Reading
		doubt string
	}{
		{"word of the model's range", Reading{Date: date, CoatingWord: "FAIR"}, ""},
		{"a better word", Reading{Date: date, CoatingWord: "GOOD"}, "GOOD (0 to 3 %"},
		{"a worse word", Reading{Date: date, CoatingWord: "POOR"}, "counts with 4.4 %"},
		{"near", Reading{Date: date, CoatingPercent: percent(6)}, ""},
		{"twice, but within 3 points", Reading{Date: date, CoatingPercent: percent(1.5)}, ""},
		{"far", Reading{Date: date, CoatingPercent: percent(12)}, "found 12 %"},
		{"far below", Reading{Date: date, CoatingPercent: percent(0.5)}, "found 0.5 %"},
		{"nothing said", Reading{Date: date}, ""},
		{"before the coat", Reading{Date: a.LastDocking - 1, CoatingWord: "POOR"}, ""},
	} {
		text, source, confidence := a.CoatingDoubt(z, c.r)
		if c.doubt == "" && text != "" || !strings.Contains(text, c.doubt) {
			t.Errorf("%s: %q, want %q", c.what, text, c.doubt)
		}
		if text != "" && (source == "" || confidence == "") {
			t.Errorf("%s: source %q, confidence %q", c.what, source, confidence)
		}
	}
}

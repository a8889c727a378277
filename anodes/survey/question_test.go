package survey

import (
	"strings"
	"testing"
	"time"

	"anodewright/hull"
)

func day(y int, m time.Month, d int) hull.Date { return hull.NewDate(y, m, d) }

func ship(readings ...hull.Reading) *hull.Asset {
	return &hull.Asset{
		InService: day(2016, 4, 12), LastDocking: day(2024, 3, 15),
		Zones: []hull.Zone{{ID: "side", Fitted: []hull.Fitted{
			{Pattern: "slab", Count: 24, Fitted: day(2024, 3, 15)},
			{Pattern: "slab", Count: 6, Fitted: day(2020, 3, 15), Wastage: 0.4},
		}}},
		Patterns: []hull.Pattern{*slab()},
		Dockings: []hull.Docking{{Date: day(2027, 3, 15), Works: []hull.Work{{Zone: "side", Coating: hull.Clean}}}},
		Readings: readings,
	}
}

// on is a reading of the new set.
func on(date hull.Date, r hull.Reading) hull.Reading {
	r.Date, r.Zone, r.Fitted = date, "side", day(2024, 3, 15)
	return r
}

func TestQuestions(t *testing.T) {
	today := day(2026, 12, 1)
	y25, y26 := day(2025, 6, 1), day(2026, 6, 1)
	weighed := func(y ...float64) hull.Reading { return hull.Reading{WeighedWastage: y} }
	share := func(percent float64) *float64 { return &percent }
	old := weighed(0.3)
	old.Date, old.Zone, old.Fitted = y26, "side", day(2020, 3, 15)
	loose := weighed(0.5)
	loose.Date, loose.Zone, loose.Pattern = y26, "side", "slab"
	strange := on(y26, weighed(0.2))
	strange.Fitted = day(2022, 1, 1)
	for _, c := range []struct {
		name     string
		readings []hull.Reading
		at       int    // index of the reading asked about, -1: none
		word     string // of the question
	}{
		{"sound", []hull.Reading{on(y25, weighed(0.1, 0.12)), on(y26, weighed(0.2))}, -1, ""},
		{"less than last time", []hull.Reading{on(y26, weighed(0.2)), on(y25, weighed(0.3, 0.32))}, 0, "wasted less (20 %) than on 2025-06-01 (31 %)"},
		{"less than last time, by grades", []hull.Reading{on(y25, weighed(0.6)), on(y26, hull.Reading{Grades: &hull.Grades{Bounds: []float64{0, 0.25, 0.5}, Counts: []int{2, 2, 0}}})}, 1, "wasted less (12 to 38 %)"},
		{"grades that may be more", []hull.Reading{on(y25, weighed(0.3)), on(y26, hull.Reading{Grades: &hull.Grades{Bounds: []float64{0, 0.25, 0.5}, Counts: []int{2, 2, 0}}})}, -1, ""},
		{"less than at the last docking", []hull.Reading{old}, 0, "than at the last docking (40 %)"},
		{"one day, two kinds", []hull.Reading{on(y26, weighed(0.3)), on(y26, hull.Reading{NotWasted: 2})}, -1, ""},
		{"gone pieces are not seen again", []hull.Reading{on(y25, hull.Reading{Percent: []float64{20}, Gone: 3}), on(y26, hull.Reading{Percent: []float64{25}})}, -1, ""},
		{"too many pieces", []hull.Reading{on(y26, hull.Reading{WeighedWastage: []float64{0.3}, NotSeen: 24})}, 0, "accounts for 25 pieces"},
		{"too many after a loss", []hull.Reading{on(y25, hull.Reading{Fallen: 4}), on(y26, hull.Reading{NotSeen: 21})}, 1, "4 had gone or fallen before"},
		{"before fitting", []hull.Reading{on(day(2023, 1, 1), weighed(0.1))}, 0, "before its anodes were fitted"},
		{"after today", []hull.Reading{on(day(2026, 12, 2), weighed(0.1))}, 0, "after today"},
		{"no such set", []hull.Reading{strange}, 0, "no anodes fitted on 2022-01-01"},
		{"which set", []hull.Reading{loose}, 0, "several sets"},
		{"larger than new", []hull.Reading{on(y26, hull.Reading{Measured: []hull.Measured{{Girth: 0.8, Length: 1}}})}, 0, "more than a new anode"},
		{"the electrode", []hull.Reading{on(y26, hull.Reading{Potentials: []hull.Measure{{Potential: -0.95, Electrode: hull.ZincElectrode}}})}, 0, "-0.950 V zinc (-2.000 V Ag/AgCl)"},
		{"the sign", []hull.Reading{on(y26, hull.Reading{Potentials: []hull.Measure{{Potential: 0.95, Electrode: hull.SilverChloride}}})}, 0, "0.950 V"},
		{"a potential of zinc", []hull.Reading{on(y26, hull.Reading{Potentials: []hull.Measure{{Potential: 0.1, Electrode: hull.ZincElectrode}, {Potential: -0.55, Electrode: hull.SilverChloride}}})}, -1, ""},
		{"percentage and word", []hull.Reading{on(y26, hull.Reading{CoatingPercent: share(5), CoatingWord: "POOR"})}, 0, "5 % of the coating broken down is not POOR"},
		{"a word that fits", []hull.Reading{on(y26, hull.Reading{CoatingPercent: share(20), CoatingWord: "FAIR"})}, -1, ""},
		{"a coating that mends itself", []hull.Reading{on(y25, hull.Reading{CoatingPercent: share(12)}), on(y26, hull.Reading{CoatingPercent: share(4)})}, 1, "(4 %) than on 2025-06-01 (12 %)"},
		{"a coating about as it was", []hull.Reading{on(y25, hull.Reading{CoatingPercent: share(4)}), on(y26, hull.Reading{CoatingPercent: share(3)})}, -1, ""},
	} {
		got := Questions(ship(c.readings...), today)
		switch {
		case c.at < 0 && len(got) > 0:
			t.Errorf("%s: no question expected, got %+v", c.name, got)
		case c.at >= 0 && (len(got) != 1 || got[0].Reading != c.at || !strings.Contains(got[0].Text, c.word)):
			t.Errorf("%s: want one question of reading %d with %q, got %+v", c.name, c.at, c.word, got)
		}
	}
}

func TestCount(t *testing.T) {
	a := ship(
		on(day(2023, 1, 1), hull.Reading{Fallen: 9}), // the set is stated as it was later
		on(day(2025, 6, 1), hull.Reading{Fallen: 2, Painted: 3, NotSeen: 5}),
		on(day(2026, 6, 1), hull.Reading{Gone: 1, WeighedWastage: []float64{0.8}, NotSeen: 4}),
	)
	z := &a.Zones[0]
	for _, c := range []struct {
		at   hull.Date
		want Pieces
	}{
		{day(2025, 5, 31), Pieces{Fitted: 24, Live: 24, Giving: 24}},
		{day(2025, 6, 1), Pieces{Fitted: 24, Fallen: 2, Painted: 3, NotSeen: 5, Live: 22, Giving: 19}},
		{day(2026, 6, 1), Pieces{Fitted: 24, Fallen: 2, Gone: 1, Painted: 3, NotSeen: 4, Live: 21, Giving: 18}},
		{day(2027, 3, 15), Pieces{Fitted: 24, Fallen: 2, Gone: 1, NotSeen: 4, Live: 21, Giving: 21}},
	} {
		if got := Count(a, z, 0, c.at); got != c.want {
			t.Errorf("on %s: got %+v, want %+v", c.at, got, c.want)
		}
	}
	if got := Count(a, z, 1, day(2027, 1, 1)); got.Live != 6 {
		t.Errorf("the other set has %d pieces", got.Live)
	}
}

func TestUsable(t *testing.T) {
	today := day(2026, 12, 1)
	a := ship()
	for _, c := range []struct {
		date hull.Date
		want bool
	}{{day(2024, 3, 15), false}, {day(2024, 3, 16), true}, {today, true}, {today + 1, false}} {
		r := on(c.date, hull.Reading{WeighedWastage: []float64{0.1}})
		if got := Usable(a, &r, today); got != c.want {
			t.Errorf("a reading of %s is usable: %v", c.date, got)
		}
	}
}

// A coating that was worked on may be better than before.
func TestNoQuestionOfACoatingWorkedOn(t *testing.T) {
	before, after := 12.0, 2.0
	a := ship(on(day(2025, 6, 1), hull.Reading{CoatingPercent: &before}), on(day(2026, 6, 1), hull.Reading{CoatingPercent: &after}))
	a.Dockings = append([]hull.Docking{{Date: day(2026, 3, 1), Works: []hull.Work{{Zone: "side", Coating: hull.TouchUp}}}}, a.Dockings...)
	if got := Questions(a, day(2026, 12, 1)); len(got) > 0 {
		t.Errorf("after a touch-up: %+v", got)
	}
	a.Dockings[0].Works[0].Coating = hull.Clean
	if got := Questions(a, day(2026, 12, 1)); len(got) != 1 || got[0].Reading != 1 {
		t.Errorf("after cleaned anodes: %+v", got)
	}
}

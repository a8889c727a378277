package survey

import (
	"testing"

	"pgregory.net/rapid"

	"anodewright/hull"
)

func lotAsset(readings []hull.Reading, works ...hull.Date) *hull.Asset {
	a := &hull.Asset{
		InService: hull.NewDate(2020, 1, 1), LastDocking: hull.NewDate(2024, 1, 1), Horizon: hull.NewDate(2034, 1, 1),
		Patterns: []hull.Pattern{{ID: "slab"}},
		Zones:    []hull.Zone{{ID: "side", Fitted: []hull.Fitted{{Pattern: "slab", Count: 24, Fitted: hull.NewDate(2024, 1, 1)}}}},
		Readings: readings,
	}
	for _, d := range works {
		a.Dockings = append(a.Dockings, hull.Docking{Date: d, Works: []hull.Work{{Zone: "side", Coating: hull.Clean}}})
	}
	return a
}

func TestLots(t *testing.T) {
	day := func(y int) hull.Date { return hull.NewDate(y, 6, 1) }
	a := lotAsset([]hull.Reading{
		{Date: day(2023), Zone: "side", Gone: 5}, // the set is stated as it was at the last docking
		{Date: day(2025), Zone: "side", Gone: 1, Fallen: 1, Painted: 3, NotSeen: 10},
		{Date: day(2026), Zone: "side", Painted: 5, NotWasted: 4},
		{Date: day(2028), Zone: "side", Painted: 2},
	}, day(2027))
	lots := Lots(a, &a.Zones[0], 0)
	giving := func(d hull.Date, before bool) (n int) {
		for i := range lots {
			if lots[i].Gives(d, before) {
				n += lots[i].Count
			}
		}
		return n
	}
	for _, c := range []struct {
		d      hull.Date
		before bool
		want   int
	}{
		{day(2025) - 1, false, 24}, {day(2025), false, 19}, {day(2026), false, 17}, {day(2027) - 1, false, 17},
		{day(2027), true, 17}, {day(2027), false, 22}, {day(2028), false, 20}, {day(2033), false, 20},
	} {
		if got := giving(c.d, c.before); got != c.want {
			t.Errorf("%s, before the works %t: %d pieces give current, want %d of %+v", c.d, c.before, got, c.want, lots)
		}
	}
	if lots[0].Leaves != 0 || len(lots[0].Painted) != 0 || lots[0].Count != 15 {
		t.Errorf("first lot %+v, want the 15 that stay as fitted", lots[0])
	}
	a.Readings = a.Readings[:1]
	if lots = Lots(a, &a.Zones[0], 0); len(lots) != 1 || lots[0].Count != 24 || lots[0].Leaves != 0 || lots[0].Painted != nil {
		t.Errorf("without such readings: %+v", lots)
	}
}

// On every day the lots are what the readings up to it count.
func TestLotsAgreeWithCount(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		var readings []hull.Reading
		day := rapid.Custom(func(t *rapid.T) hull.Date {
			return hull.NewDate(2023, 6, 1) + hull.Date(200*rapid.IntRange(0, 15).Draw(t, "day"))
		})
		for range rapid.IntRange(0, 6).Draw(t, "readings") {
			n := func(what string) int { return rapid.IntRange(0, 9).Draw(t, what) }
			readings = append(readings, hull.Reading{Date: day.Draw(t, "date"), Zone: "side", Gone: n("gone"), Fallen: n("fallen"), Painted: n("painted")})
		}
		a := lotAsset(readings, hull.NewDate(2026, 2, 25), hull.NewDate(2029, 1, 1))
		lots := Lots(a, &a.Zones[0], 0)
		all := 0
		for _, l := range lots {
			all += l.Count
		}
		if all != 24 {
			t.Fatalf("%d pieces in %+v", all, lots)
		}
		for d := a.Start(); d < a.Horizon; d += 25 {
			want, live, giving := Count(a, &a.Zones[0], 0, d), 0, 0
			for i := range lots {
				if lots[i].LiveOn(d) {
					live += lots[i].Count
				}
				if lots[i].Gives(d, false) {
					giving += lots[i].Count
				}
			}
			if live != want.Live || giving != want.Giving {
				t.Fatalf("%s: %d live, %d giving of %+v, want %+v", d, live, giving, lots, want)
			}
		}
	})
}

// A withdrawn reading counts no more. What was found painted over before a
// docking that was closed, and not cleaned at it, still is.
func TestLotsAfterAClosedDocking(t *testing.T) {
	before := hull.NewDate(2023, 6, 1)
	a := lotAsset([]hull.Reading{
		{Date: before, Zone: "side", Painted: 3, Fallen: 2},
		{Date: hull.NewDate(2025, 6, 1), Zone: "side", Gone: 7, Withdrawn: hull.NewDate(2025, 7, 1)},
	})
	a.Zones[0].Fitted[0].Fitted = hull.NewDate(2021, 1, 1)
	giving := func() int { return Count(a, &a.Zones[0], 0, hull.NewDate(2026, 1, 1)).Giving }
	if n := giving(); n != 24 {
		t.Errorf("%d give current, want the 24 stated at the last docking", n)
	}
	a.Closed = []hull.Closed{{Date: a.LastDocking}}
	lots := Lots(a, &a.Zones[0], 0)
	if n := giving(); n != 21 || len(lots) != 2 || lots[1].Count != 3 || lots[1].Gives(a.Start(), false) {
		t.Errorf("%d give current of %+v, want 21: three are still painted over", n, lots)
	}
	a.Closed[0].Cleaned = []string{"side"}
	if n := giving(); n != 24 {
		t.Errorf("%d give current, want 24 once cleaned", n)
	}
}

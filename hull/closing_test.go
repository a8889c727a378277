package hull_test

import (
	"fmt"
	"math"
	"reflect"
	"slices"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"anodewright/hull"
)

// carrier is a vessel with two sets in its zone "side", and a zone "rudder"
// with none.
func carrier() *hull.Asset {
	a := vessel()
	a.Zones[0].Fitted = []hull.Fitted{
		{Pattern: "slab", Count: 24, Fitted: on("2024-03-15")},
		{Pattern: "slab", Count: 10, Fitted: on("2019-03-15"), Wastage: 0.3},
	}
	a.Zones = append(a.Zones, steel("rudder"))
	a.Stock = []hull.Stock{{Pattern: "slab", Count: 3}}
	return a
}

// closing is one of the first docking of a carrier: six pieces off, eight on.
func closing() hull.Closing {
	return hull.Closing{
		Date: on("2027-03-15"), By: "superintendent",
		Sets: []hull.ClosingSet{
			{Zone: "side", Pattern: "slab", Fitted: on("2024-03-15"), Found: 23, Wastage: 0.2, How: hull.Surveyed},
			{Zone: "side", Pattern: "slab", Fitted: on("2019-03-15"), Found: 10, Wastage: 0.7, How: hull.Forecasted, Off: 6},
		},
		On:      []hull.PutOn{{Zone: "side", Pattern: "slab", Count: 6}, {Zone: "rudder", Pattern: "slab", Count: 2}},
		Works:   []hull.Work{{Zone: "side", Coating: hull.TouchUp, Share: ptr(0.5)}},
		Cleaned: []string{"rudder"},
		Ordered: []hull.Stock{{Pattern: "slab", Count: 9}},
		Cost:    ptr(5000.0), PlannedCost: ptr(4500.0),
	}
}

func closed(t *testing.T, a *hull.Asset, c hull.Closing) *hull.Asset {
	t.Helper()
	next, faults := hull.Close(a, c)
	if len(faults) > 0 {
		t.Fatalf("the docking is not closed:\n%v", faults)
	}
	return next
}

func TestCloseWritesTheLedger(t *testing.T) {
	a := carrier()
	a.Today = on("2026-12-01")
	before := fmt.Sprintf("%+v", a)
	next := closed(t, a, closing())
	if after := fmt.Sprintf("%+v", a); after != before {
		t.Error("the asset before was changed")
	}
	var facts []string
	for _, f := range next.Ledger {
		facts = append(facts, fmt.Sprintf("%s %s %s %d of %s %.2g %s", f.Date, f.Deed, f.Zone, f.Count, f.Fitted, f.Wastage, f.How))
	}
	want := []string{
		"2024-03-15 fitted side 24 of 2024-03-15 0 ", "2019-03-15 fitted side 10 of 2019-03-15 0 ", "2024-03-15 found side 10 of 2019-03-15 0.3 ",
		"2027-03-15 found side 23 of 2024-03-15 0.2 surveyed", "2027-03-15 found side 10 of 2019-03-15 0.7 forecast",
		"2027-03-15 removed side 6 of 2019-03-15 0 ", "2027-03-15 fitted side 6 of 2027-03-15 0 ", "2027-03-15 fitted rudder 2 of 2027-03-15 0 ",
	}
	if !slices.Equal(facts, want) {
		t.Errorf("the ledger:\n%s\nwant\n%s", strings.Join(facts, "\n"), strings.Join(want, "\n"))
	}
	side := []hull.Fitted{
		{Pattern: "slab", Count: 23, Fitted: on("2024-03-15"), Wastage: 0.2}, {Pattern: "slab", Count: 4, Fitted: on("2019-03-15"), Wastage: 0.7},
		{Pattern: "slab", Count: 6, Fitted: on("2027-03-15")},
	}
	if !reflect.DeepEqual(next.Zones[0].Fitted, side) || next.Zones[1].Fitted[0].Count != 2 {
		t.Errorf("fitted: %+v, %+v", next.Zones[0].Fitted, next.Zones[1].Fitted)
	}
	if next.LastDocking != on("2027-03-15") || next.Today != next.LastDocking || len(next.Dockings) != 1 || next.Dockings[0].Date != on("2029-03-15") {
		t.Errorf("last docking %s, today %s, dockings %v", next.LastDocking, next.Today, next.Dockings)
	}
	// 3 on the shelf and 9 bought, 8 of them put on.
	if !slices.Equal(next.Stock, []hull.Stock{{Pattern: "slab", Count: 4}}) {
		t.Errorf("stock %v", next.Stock)
	}
	d := next.Closed[0]
	if d.Date != next.LastDocking || *d.Cost != 5000 || *d.PlannedCost != 4500 || d.By != "superintendent" || len(d.Works) != 1 {
		t.Errorf("closed: %+v", d)
	}
	if got := next.CleanedOn("rudder"); !slices.Equal(got, []hull.Date{on("2027-03-15")}) || next.CleanedOn("side") != nil {
		t.Errorf("cleaned: %v", got)
	}
}

// A second closing only adds to the ledger of the first.
func TestLedgerIsOnlyAddedTo(t *testing.T) {
	first := closed(t, carrier(), closing())
	c := hull.Closing{Date: on("2029-06-01"), Docking: on("2029-03-15"), Next: on("2031-09-01")}
	for _, z := range first.Zones {
		for _, f := range z.Fitted {
			c.Sets = append(c.Sets, hull.ClosingSet{Zone: z.ID, Pattern: f.Pattern, Fitted: f.Fitted, Found: f.Count, Wastage: 0.8, Off: f.Count})
		}
	}
	second := closed(t, first, c)
	if n := len(first.Ledger); len(second.Ledger) != n+8 || !slices.Equal(second.Ledger[:n], first.Ledger) {
		t.Errorf("%d facts after %d", len(second.Ledger), n)
	}
	if second.Zones[0].Fitted != nil || second.Zones[1].Fitted != nil {
		t.Errorf("all was taken off, but %v is fitted", second.Zones)
	}
	if len(second.Dockings) != 1 || second.Dockings[0].Date != on("2031-09-01") || second.Dockings[0].Works != nil || len(second.Closed) != 2 {
		t.Errorf("dockings %v, closed %v", second.Dockings, second.Closed)
	}
	if how := second.Ledger[len(first.Ledger)].How; how != hull.Surveyed {
		t.Errorf("found, nothing said of how: %q", how)
	}
}

func TestCloseFaults(t *testing.T) {
	for _, c := range []struct {
		what, fault string
		change      func(*hull.Asset, *hull.Closing)
	}{
		{"more off than found", "sets[1].off: want at most the 10 pieces found, got 11", func(_ *hull.Asset, c *hull.Closing) { c.Sets[1].Off = 11 }},
		{"no such pattern", `on[0].pattern: want the id of one of the asset's patterns, got "bar"`, func(_ *hull.Asset, c *hull.Closing) { c.On[0].Pattern = "bar" }},
		{"no such zone", `on[1].zone: want the id of one of the asset's zones, got "keel"`, func(_ *hull.Asset, c *hull.Closing) { c.On[1].Zone = "keel" }},
		{"held zone", "on[1].zone: want a zone that carries anodes of its own", func(a *hull.Asset, _ *hull.Closing) { a.Zones[1].HeldBy = "side" }},
		{"too early", "date: want a date after the last docking 2024-03-15, got 2024-03-15", func(_ *hull.Asset, c *hull.Closing) { c.Date = on("2024-03-15") }},
		{"no date", "date: want a date as YYYY-MM-DD, got nothing", func(_ *hull.Asset, c *hull.Closing) { c.Date = 0 }},
		{"wastage above 1", "sets[0].wastage: want a number from 0 to 1, got 1.2", func(_ *hull.Asset, c *hull.Closing) { c.Sets[0].Wastage = 1.2 }},
		{"wastage no number", "sets[0].wastage: want a number from 0 to 1, got NaN", func(_ *hull.Asset, c *hull.Closing) { c.Sets[0].Wastage = math.NaN() }},
		{"a set left out", "sets: want what was found of every set; none is missing, got nothing of 10 slab fitted on 2019-03-15, 30 % wasted in side", func(_ *hull.Asset, c *hull.Closing) { c.Sets = c.Sets[:1] }},
		{"a set twice", "sets[2]: want another set than that of sets[0]", func(_ *hull.Asset, c *hull.Closing) { c.Sets = append(c.Sets, c.Sets[0]) }},
		{"not listed", "docking: want the date of one of the asset's dockings ahead, got 2028-01-01", func(_ *hull.Asset, c *hull.Closing) { c.Docking = on("2028-01-01") }},
		{"none left", "next: want the date of the next docking: none is listed after 2029-03-15, got nothing", func(_ *hull.Asset, c *hull.Closing) { c.Docking, c.Date = on("2029-03-15"), on("2029-03-15") }},
		{"next before it", "next: want a date after this docking's", func(_ *hull.Asset, c *hull.Closing) { c.Next = c.Date }},
		{"horizon passed", "horizon: want a date after 2036-01-01, got 2034-03-15 as before", func(_ *hull.Asset, c *hull.Closing) { c.Next = on("2036-01-01") }},
		{"share missing", "works[0].share: want a number from 0 to 1", func(_ *hull.Asset, c *hull.Closing) { c.Works[0].Share = nil }},
		{"cleaned what", `cleaned[0]: want the id of one of the asset's zones, got "keel"`, func(_ *hull.Asset, c *hull.Closing) { c.Cleaned[0] = "keel" }},
		{"negative cost", "cost: want a number from 0 to 1000000000000, got -1", func(_ *hull.Asset, c *hull.Closing) { c.Cost = ptr(-1.0) }},
	} {
		a, k := carrier(), closing()
		c.change(a, &k)
		next, faults := hull.Close(a, k)
		if next != nil || len(faults) != 1 || !strings.HasPrefix(faults[0].Error(), c.fault) {
			t.Errorf("%s: faults\n%v\nwant %s", c.what, faults, c.fault)
		}
	}
}

// A docking done on another day than listed takes the listed one with it, and
// those that it passed over.
func TestCloseOnAnotherDay(t *testing.T) {
	c := closing()
	c.Docking, c.Date = on("2027-03-15"), on("2027-05-02")
	if next := closed(t, carrier(), c); next.LastDocking != c.Date || len(next.Dockings) != 1 {
		t.Errorf("last docking %s, dockings %v", next.LastDocking, next.Dockings)
	}
	c.Date, c.Next = on("2029-04-01"), on("2031-04-01")
	if next := closed(t, carrier(), c); len(next.Dockings) != 1 || next.Dockings[0].Date != c.Next {
		t.Errorf("dockings %v", next.Dockings)
	}
	a := carrier()
	a.Dockings[0].FixedCost, a.Dockings[0].Kind = 4000, hull.InWater
	next := closed(t, a, c)
	if d := next.Dockings[0]; d.FixedCost != 4000 || d.Kind != hull.InWater || next.Closed[0].Kind != hull.InWater {
		t.Errorf("the further docking is %+v, the closed one %s", d, next.Closed[0].Kind)
	}
}

func TestFittedSetsMustFollowFromTheLedger(t *testing.T) {
	for _, c := range []struct {
		what, fault string
		change      func(*hull.Asset)
	}{
		{"count", "zones[0].fitted: want what follows from the ledger: 23 slab fitted on 2024-03-15, 20 % wasted; 4 slab", func(a *hull.Asset) { a.Zones[0].Fitted[0].Count = 22 }},
		{"wastage", "zones[0].fitted: want what follows from the ledger", func(a *hull.Asset) { a.Zones[0].Fitted[0].Wastage = 0.25 }},
		{"missing", "zones[1].fitted: want what follows from the ledger: 2 slab fitted on 2027-03-15, got nothing", func(a *hull.Asset) { a.Zones[1].Fitted = nil }},
		{"too many off", "ledger[5].count: want at most the 10 pieces that the ledger leaves of slab fitted on 2019-03-15 in side, got 11", func(a *hull.Asset) { a.Ledger[5].Count = 11 }},
		{"zone gone", `ledger[7].zone: want the id of one of the asset's zones, got "rudder"`, func(a *hull.Asset) { a.Zones, a.Closed = a.Zones[:1], nil }},
		{"fitted later", "ledger[0].fitted: want a date not after the fact's own, 2024-03-15, got 2024-03-16", func(a *hull.Asset) { a.Ledger[0].Fitted++ }},
		{"after the docking", "ledger[7].date: want a date not after the last docking 2027-03-15; what is seen later is a reading, got 2027-03-16", func(a *hull.Asset) { a.Ledger[7].Date++ }},
		{"wastage of new", "ledger[0].wastage: want nothing: only what was found states a wastage, got 0.1", func(a *hull.Asset) { a.Ledger[0].Wastage = 0.1 }},
		{"closed later", "closed[0].date: want a date not after the last docking 2027-03-15, got 2027-03-16", func(a *hull.Asset) { a.Closed[0].Date++ }},
	} {
		a := closed(t, carrier(), closing())
		a.Zones = slices.Clone(a.Zones)
		c.change(a)
		if faults := hull.Check(a); len(faults) == 0 || !strings.HasPrefix(faults[0].Error(), c.fault) {
			t.Errorf("%s: faults\n%v\nwant %s", c.what, faults, c.fault)
		}
	}
	// In another order they are the same sets.
	a := closed(t, carrier(), closing())
	slices.Reverse(a.Zones[0].Fitted)
	if faults := hull.Check(a); len(faults) > 0 {
		t.Errorf("%v", faults)
	}
}

func TestCorrectionIsAFactOfItsOwn(t *testing.T) {
	a := closed(t, carrier(), closing())
	n := len(a.Ledger)
	before := slices.Clone(a.Ledger)
	a.Zones = slices.Clone(a.Zones)
	a.Zones[0].Fitted[0].Count = 20
	a.Zones[0].Fitted = slices.Delete(a.Zones[0].Fitted, 1, 2)
	a.Zones = a.Zones[:1]
	a.Closed = nil
	hull.Correct(a, "me", "miscounted")
	if !slices.Equal(a.Ledger[:n], before) || len(a.Ledger) != n+3 {
		t.Fatalf("the ledger: %+v", a.Ledger)
	}
	for i, want := range []hull.Fact{
		{Deed: hull.WasFound, Zone: "side", Fitted: on("2019-03-15"), Count: 0, Wastage: 0.7},
		{Deed: hull.WasFound, Zone: "side", Fitted: on("2024-03-15"), Count: 20, Wastage: 0.2},
		{Deed: hull.WasFound, Zone: "rudder", Fitted: on("2027-03-15"), Count: 0},
	} {
		want.Date, want.Pattern, want.By, want.Note = on("2027-03-15"), "slab", "me", "miscounted"
		if a.Ledger[n+i] != want {
			t.Errorf("fact %d: %+v, want %+v", i, a.Ledger[n+i], want)
		}
	}
	if faults := hull.Check(a); len(faults) > 0 {
		t.Errorf("%v", faults)
	}
	hull.Correct(a, "me", "again")
	if len(a.Ledger) != n+3 {
		t.Error("nothing was wrong, but facts were added")
	}
	without := carrier()
	if hull.Correct(without, "", ""); without.Ledger != nil {
		t.Error("an asset without a ledger got one")
	}
}

// Closing a docking changes nothing of what the steel asks for afterwards: the
// works of closed dockings stay in force, over several closings, by every rule
// and with any works.
func TestClosingLeavesLaterDemandAsItWas(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a := drawVessel(t)
		whole := hull.Demand(a)
		for n := range a.Dockings {
			d := a.Ahead()[0]
			c := hull.Closing{Date: d.Date, Works: d.Works}
			if len(a.Ahead()) == 1 {
				c.Next = d.Date + hull.Date(rapid.IntRange(1, int(a.Horizon-d.Date)-1).Draw(t, "next"))
			}
			next, faults := hull.Close(a, c)
			if len(faults) > 0 {
				t.Fatalf("the docking of %s is not closed:\n%v", d.Date, faults)
			}
			a = next
			after := hull.Demand(a)
			for i := range whole {
				same := func(what string, got, want float64) {
					if math.Abs(got-want) > 1e-12*math.Max(1, math.Abs(want)) {
						t.Fatalf("zone %d, %d closed: %s %.17g, before the closing %.17g", i, n+1, what, got, want)
					}
				}
				if c.Next != 0 { // the last interval is divided
					same("breakdown", after[i].Breakdown[0].Initial, whole[i].Breakdown[n+1].Initial)
					same("demand", after[i].Own[0].Initial, whole[i].Own[n+1].Initial)
					continue
				}
				for k := range after[i].Own {
					x, y := after[i], whole[i]
					same("initial breakdown", x.Breakdown[k].Initial, y.Breakdown[n+1+k].Initial)
					same("mean breakdown", x.Breakdown[k].Mean, y.Breakdown[n+1+k].Mean)
					same("final breakdown", x.Breakdown[k].Final, y.Breakdown[n+1+k].Final)
					same("initial demand", x.Total[k].Initial, y.Total[n+1+k].Initial)
					same("mean demand", x.Total[k].Mean, y.Total[n+1+k].Mean)
					same("final demand", x.Total[k].Final, y.Total[n+1+k].Final)
				}
			}
		}
	})
}

// Works count for the coating that was there, not for one applied later.
func TestClosedWorksAreOfTheCoatingThen(t *testing.T) {
	a := closed(t, carrier(), closing())
	z := &a.Zones[0]
	near(t, "touched up", demands(t, a)[0].Breakdown[0].Initial, 0.5*(0.02+0.012*on("2027-03-15").Years(on("2024-03-15"))))
	if got, ok := a.BreakdownOn(z, on("2027-03-14")); !ok || math.Abs(got-0.02-0.012*1094/365) > 1e-12 {
		t.Errorf("the day before: %g, %v", got, ok)
	}
	z.Coating.Applied = on("2027-03-15")
	near(t, "coated anew", demands(t, a)[0].Breakdown[0].Initial, 0.02)
}

// A ledger of very many sets is checked set by set, not each against each:
// that would outlast the test.
func TestLongLedger(t *testing.T) {
	a := carrier()
	a.Zones[0].Fitted = nil
	for i := range 60000 {
		a.Zones[0].Fitted = append(a.Zones[0].Fitted, hull.Fitted{Pattern: "slab", Count: 1, Fitted: a.LastDocking - hull.Date(i)})
	}
	a.Ledger = hull.Opening(a)
	if faults := hull.Check(a); len(faults) > 0 {
		t.Errorf("%d faults, the first: %v", len(faults), faults[0])
	}
}

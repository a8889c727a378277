package order

import (
	"testing"

	"anodewright/anodes/renewal"
	"anodewright/hull"
)

func on(s string) hull.Date {
	d, err := hull.ParseDate(s)
	if err != nil {
		panic(err)
	}
	return d
}

// shipyard is an asset of two patterns and two dockings.
func shipyard() *hull.Asset {
	a := &hull.Asset{
		InService: on("2020-01-01"), LastDocking: on("2024-03-15"), Horizon: on("2034-03-15"),
		Dockings: []hull.Docking{{Date: on("2027-03-15")}, {Date: on("2029-03-15")}},
		Costs:    hull.Costs{FloatWeeks: 2},
	}
	for _, id := range []string{"small", "large"} {
		p := hull.Pattern{}
		hull.SetDefaults(&p)
		p.ID, p.NetMass, p.GrossMass, p.Price, p.LeadWeeks = id, 20, 22, 100, 12
		a.Patterns = append(a.Patterns, p)
	}
	return a
}

// action is a line of a plan: what is done with a zone at a docking ahead.
func action(a *hull.Asset, docking int, do renewal.Action, pattern, count int) renewal.Line {
	return renewal.Line{Docking: docking, Date: a.Dockings[docking].Date, Action: do, Pattern: &a.Patterns[pattern], Count: count}
}

func TestOrderBy(t *testing.T) {
	for _, c := range []struct {
		docking     string
		lead, float float64
		want        string
	}{
		{"2029-03-15", 12, 2, "2028-12-07"},
		{"2027-03-15", 8, 2, "2027-01-04"},
		{"2027-03-15", 0, 0, "2027-03-15"},
		{"2027-03-15", 0.1, 0, "2027-03-14"}, // part of a day is a day earlier
		{"2027-03-15", 1.5, 0.5, "2027-03-01"},
		{"2028-03-01", 0, 1, "2028-02-23"},
	} {
		if got := By(on(c.docking), c.lead, c.float); got != on(c.want) {
			t.Errorf("%s less %g and %g weeks: got %s, want %s", c.docking, c.lead, c.float, got, c.want)
		}
	}
}

// Pieces of one pattern add up over zones; what is kept is not bought; lines
// come by docking and then by pattern.
func TestLinesByDockingAndPattern(t *testing.T) {
	a := shipyard()
	lines := Lines(a, []renewal.Line{
		action(a, 1, renewal.Renew, 1, 7),
		action(a, 0, renewal.Keep, 0, 50),
		action(a, 0, renewal.Renew, 1, 30),
		action(a, 0, renewal.Add, 1, 11),
		action(a, 0, renewal.Renew, 0, 4),
	}, on("2026-12-01"))
	type row struct {
		docking, pattern, orderBy string
		pieces, spares, ordered   int
		net, gross, price         float64
		fromStock, late           int
		sameAs                    *hull.Pattern
	}
	var got []row
	for _, l := range lines {
		got = append(got, row{l.Docking.String(), l.Pattern.ID, l.OrderBy.String(), l.Pieces, l.Spares, l.Ordered, l.Net, l.Gross, l.Price, l.FromStock, l.LateDays, l.Pattern})
	}
	want := []row{
		{"2027-03-15", "small", "2026-12-07", 4, 1, 5, 100, 110, 500, 0, 0, &a.Patterns[0]},
		{"2027-03-15", "large", "2026-12-07", 41, 3, 44, 880, 968, 4400, 0, 0, &a.Patterns[1]}, // 5 % of 41 is 2.05
		{"2029-03-15", "large", "2028-12-07", 7, 1, 8, 160, 176, 800, 0, 0, &a.Patterns[1]},
	}
	if len(got) != len(want) {
		t.Fatalf("%d lines: %+v", len(got), got)
	}
	for i := range want {
		if got[i] != want[i] {
			t.Errorf("line %d: got %+v, want %+v", i, got[i], want[i])
		}
	}
	if lines := Lines(a, []renewal.Line{action(a, 0, renewal.Keep, 0, 50)}, on("2026-12-01")); len(lines) != 0 {
		t.Errorf("a kept set is bought: %+v", lines)
	}
}

// A pattern comes in multiples, on the total of pieces and spares less stock.
func TestOrderMultiple(t *testing.T) {
	for _, c := range []struct{ pieces, multiple, stock, ordered int }{
		{10, 1, 0, 11}, {10, 4, 0, 12}, {11, 4, 0, 12}, {12, 4, 0, 16}, {1, 6, 0, 6},
		{10, 4, 3, 8}, {10, 4, 11, 0}, {10, 4, 10, 4}, {10, 4, 100, 0},
	} {
		a := shipyard()
		a.Patterns[0].OrderMultiple = c.multiple
		a.Stock = []hull.Stock{{Pattern: "small", Count: c.stock}}
		l := Lines(a, []renewal.Line{action(a, 0, renewal.Renew, 0, c.pieces)}, on("2026-12-01"))[0]
		if l.Ordered != c.ordered || l.Net != float64(c.ordered)*20 || l.Price != float64(c.ordered)*100 {
			t.Errorf("%d pieces in multiples of %d with %d in stock: %d ordered, %g kg, %g; want %d", c.pieces, c.multiple, c.stock, l.Ordered, l.Net, l.Price, c.ordered)
		}
		if l.FromStock+l.Ordered < l.Pieces+l.Spares || l.FromStock > c.stock {
			t.Errorf("%d pieces: %d from stock of %d, %d ordered", c.pieces, l.FromStock, c.stock, l.Ordered)
		}
	}
}

// Stock serves the first docking that needs it and is used up once, whatever
// the order of the plan's lines.
func TestStockIsUsedOnce(t *testing.T) {
	a := shipyard()
	a.Stock = []hull.Stock{{Pattern: "small", Count: 10}, {Pattern: "large", Count: 99}, {Pattern: "small", Count: 5}}
	lines := Lines(a, []renewal.Line{action(a, 1, renewal.Renew, 0, 10), action(a, 0, renewal.Renew, 0, 10)}, on("2026-12-01"))
	if len(lines) != 2 || lines[0].FromStock != 11 || lines[0].Ordered != 0 || lines[1].FromStock != 4 || lines[1].Ordered != 7 {
		t.Errorf("got %+v", lines)
	}
}

// What has to be ordered before today is late by the days between; on the very
// day it is not, and what comes from stock never is.
func TestLateness(t *testing.T) {
	a := shipyard()
	plan := []renewal.Line{action(a, 1, renewal.Renew, 0, 10)}
	for today, want := range map[string]int{"2028-12-06": 0, "2028-12-07": 0, "2028-12-08": 1, "2029-01-07": 31} {
		if got := Lines(a, plan, on(today))[0].LateDays; got != want {
			t.Errorf("as of %s: late by %d days, want %d", today, got, want)
		}
	}
	a.Stock = []hull.Stock{{Pattern: "small", Count: 11}}
	if got := Lines(a, plan, on("2029-01-07"))[0].LateDays; got != 0 {
		t.Errorf("all in stock, yet late by %d days", got)
	}
}

// Without a gross mass it is the net mass and the insert's steel.
func TestGrossMassOfAnOrder(t *testing.T) {
	a := shipyard()
	a.Patterns[0].GrossMass, a.Patterns[0].InsertVolume = 0, 0.001
	l := Lines(a, []renewal.Line{action(a, 0, renewal.Renew, 0, 19)}, on("2026-12-01"))[0]
	if want := 20 * (20 + 7.85); l.Gross != want {
		t.Errorf("gross mass %g kg, want %g", l.Gross, want)
	}
}

func stockOf(pattern string, n int) hull.Stock { return hull.Stock{Pattern: pattern, Count: n} }

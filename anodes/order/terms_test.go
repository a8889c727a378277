package order

import (
	"math"
	"testing"

	"anodewright/anodes/renewal"
)

func ptr[T any](v T) *T { return &v }

// A pattern's own count wins over its share, that over the asset's, and
// without any it is 5 % rounded up.
func TestSpares(t *testing.T) {
	for _, c := range []struct {
		count      *int
		own, asset *float64
		pieces     int
		want       int
	}{
		{nil, nil, nil, 14, 1},
		{nil, nil, nil, 20, 1},
		{nil, nil, nil, 21, 2},
		{nil, nil, ptr(0.0), 21, 0},
		{nil, nil, ptr(0.1), 60, 6}, // 0.1 times 60 is a little over 6 in binary
		{nil, ptr(0.25), ptr(0.1), 60, 15},
		{ptr(0), ptr(0.25), ptr(0.1), 60, 0},
		{ptr(7), nil, nil, 1, 7},
	} {
		a := shipyard()
		a.Costs.SpareShare = c.asset
		a.Patterns[0].SpareCount, a.Patterns[0].SpareShare = c.count, c.own
		l := Lines(a, []renewal.Line{action(a, 0, renewal.Renew, 0, c.pieces)}, on("2026-12-01"))[0]
		if l.Spares != c.want || l.Ordered != c.pieces+c.want {
			t.Errorf("%d pieces, count %v, shares %v and %v: %d spares, %d ordered; want %d spares", c.pieces, c.count, c.own, c.asset, l.Spares, l.Ordered, c.want)
		}
	}
}

// Freight goes by gross mass, and once for what is bought for a docking; the
// price stays that of the pieces.
func TestFreightAndTotals(t *testing.T) {
	a := shipyard()
	a.Costs.FreightPerKg, a.Costs.FreightPerOrder = 0.5, 300
	a.Patterns[1].LeadWeeks = 20
	plan := []renewal.Line{
		action(a, 0, renewal.Renew, 0, 10), action(a, 0, renewal.Renew, 1, 20), action(a, 1, renewal.Renew, 0, 10),
	}
	lines := Lines(a, plan, on("2026-12-01"))
	if got, want := lines[0].Freight, 0.5*11*22; got != want {
		t.Errorf("freight of 11 pieces of 22 kg at 0.5 a kg: %g, want %g", got, want)
	}
	if lines[0].Price != 1100 {
		t.Errorf("the price holds freight: %g", lines[0].Price)
	}
	totals := Totals(a, lines)
	if len(totals) != 2 {
		t.Fatalf("%d dockings: %+v", len(totals), totals)
	}
	first := totals[0]
	if first.Pieces != 30 || first.Spares != 2 || first.Bought != 32 || first.Price != 3200 || first.Gross != 32*22 || first.Freight != 0.5*32*22+300 {
		t.Errorf("first docking: %+v", first)
	}
	if first.OrderBy != lines[1].OrderBy || first.LateDays != lines[1].LateDays || first.LateDays == 0 {
		t.Errorf("the first docking's order is out by %s, late by %d days; its lines say %s and %d", first.OrderBy, first.LateDays, lines[1].OrderBy, lines[1].LateDays)
	}
	sum := Sum(totals)
	if sum.Bought != 43 || math.Abs(sum.Freight-(0.5*43*22+600)) > 1e-9 || sum.Price != 4300 {
		t.Errorf("in all: %+v", sum)
	}
}

// Where all comes from stock nothing is shipped.
func TestNothingBoughtCostsNoFreight(t *testing.T) {
	a := shipyard()
	a.Costs.FreightPerKg, a.Costs.FreightPerOrder = 0.5, 300
	a.Stock = append(a.Stock, stockOf("small", 50))
	totals := Totals(a, Lines(a, []renewal.Line{action(a, 0, renewal.Renew, 0, 10)}, on("2026-12-01")))
	if len(totals) != 1 || totals[0].Freight != 0 || totals[0].FromStock != 11 || !totals[0].OrderBy.IsZero() {
		t.Errorf("got %+v", totals)
	}
}

// Order dates clip to nothing and cross month ends and leap days by the
// calendar.
func TestOrderDatesAtMonthEnds(t *testing.T) {
	for _, c := range []struct {
		docking string
		weeks   float64
		want    string
	}{
		{"2027-03-31", 4, "2027-03-03"}, {"2027-03-31", 5, "2027-02-24"},
		{"2028-03-31", 5, "2028-02-25"}, {"2028-03-07", 1, "2028-02-29"}, {"2027-03-07", 1, "2027-02-28"},
		{"2027-01-01", 1, "2026-12-25"}, {"2027-01-31", 52, "2026-02-01"},
	} {
		if got := By(on(c.docking), c.weeks, 0); got != on(c.want) {
			t.Errorf("%s less %g weeks: %s, want %s", c.docking, c.weeks, got, c.want)
		}
	}
}

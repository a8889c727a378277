package order

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// member is a shipyard's order for its dockings, moved by some days.
func member(name, currency string, moved int, pieces ...int) Member {
	a := shipyard()
	a.Costs.FreightPerKg, a.Costs.FreightPerOrder = 0.1, 100
	var plan []renewal.Line
	for k := range a.Dockings {
		a.Dockings[k].Date += hull.Date(moved)
		for p, n := range pieces {
			if n > 0 {
				plan = append(plan, action(a, k, renewal.Renew, p, n))
			}
		}
	}
	today := on("2026-12-01")
	return Member{Name: name, Currency: currency, Today: today, Costs: a.Costs, Lines: Lines(a, plan, today)}
}

func TestCalendarByMonth(t *testing.T) {
	// Order by 2026-12-07 and 2028-12-07; the second ship 30 days later; the
	// third 20 days before, so that its first order is late.
	fleet := []Member{member("A", "EUR", 0, 10), member("B", "EUR", 30, 10, 4), member("C", "NOK", -20, 6)}
	c := CalendarOf(fleet, 2)
	var got []string
	for _, m := range c.Months {
		got = append(got, m.First.String())
	}
	want := []string{hull.Date(0).String(), "2026-12-01", "2027-01-01", "2028-11-01", "2028-12-01", "2029-01-01"}
	if len(got) != len(want) {
		t.Fatalf("months %v, want %v", got, want)
	}
	for i := range want {
		if got[i] != want[i] {
			t.Fatalf("months %v, want %v", got, want)
		}
	}
	if len(c.Late) != 1 || c.Late[0].Member != 2 || c.Late[0].LateDays != 14 {
		t.Errorf("late: %+v", c.Late)
	}
	january := c.Months[2]
	if len(january.Shares) != 1 || january.Shares[0].Member != 1 || january.Pieces != 11+5 || january.Money[0].Price != 1600 {
		t.Errorf("January: %+v", january)
	}
	// Freight once for the docking, whatever the number of patterns.
	if f := january.Money[0].Freight; math.Abs(f-(0.1*16*22+100)) > 1e-9 {
		t.Errorf("freight of January: %g", f)
	}
}

// Lines of one casting join where their dates lie close; pieces rounded up to
// multiples one by one are saved together.
func TestJoinedOrders(t *testing.T) {
	fleet := []Member{member("A", "EUR", 0, 10), member("B", "EUR", 14, 10), member("C", "EUR", 15, 6), member("D", "EUR", 14, 3)}
	for i := range fleet {
		for k := range fleet[i].Lines {
			l := &fleet[i].Lines[k]
			p := *l.Pattern
			p.OrderMultiple = 4
			if i == 3 {
				p.NetMass = 21 // another casting under the same name
			}
			l.Pattern, l.Ordered = &p, upTo(l.Ordered, 4)
		}
	}
	c := CalendarOf(fleet, 2)
	if len(c.Joins) != 2 {
		t.Fatalf("%d joined orders: %+v", len(c.Joins), c.Joins)
	}
	j := c.Joins[0]
	if len(j.Lines) != 2 || j.By != on("2026-12-07") || j.Last != on("2026-12-21") || j.Pieces != 24 || j.Joined != 24 {
		t.Errorf("first: %+v", j)
	}
	if c = CalendarOf(fleet, 3); len(c.Joins[0].Lines) != 3 || c.Joins[0].Pieces != 32 || c.Joins[0].Joined != 32 {
		t.Errorf("within three weeks: %+v", c.Joins[0])
	}
	if c = CalendarOf(fleet, 1); len(c.Joins) != 2 || c.Joins[0].Lines[0].Member != 1 {
		t.Errorf("within one week: %+v", c.Joins)
	}
	if c = CalendarOf(fleet[:1], 500); len(c.Joins) != 0 {
		t.Errorf("an asset joins itself: %+v", c.Joins)
	}
}

// However the fleet is made up, the months hold each bought piece and each
// price once, and no line is in two joined orders.
func TestCalendarLosesNothing(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		var fleet []Member
		for range rapid.IntRange(0, 6).Draw(t, "members") {
			fleet = append(fleet, member("x", rapid.SampledFrom([]string{"EUR", "NOK"}).Draw(t, "currency"), rapid.IntRange(-150, 400).Draw(t, "moved"),
				rapid.IntRange(0, 30).Draw(t, "small"), rapid.IntRange(0, 30).Draw(t, "large")))
		}
		c := CalendarOf(fleet, float64(rapid.IntRange(0, 60).Draw(t, "weeks")))
		pieces, price, want, wantPrice, lines := 0, 0.0, 0, 0.0, 0
		for _, m := range c.Months {
			pieces += m.Pieces
			for _, x := range m.Money {
				price += x.Price
			}
		}
		for _, m := range fleet {
			for _, l := range m.Lines {
				if l.Docking >= m.Today {
					want, wantPrice, lines = want+l.Ordered, wantPrice+l.Price, lines+1
				}
			}
		}
		if pieces != want || math.Abs(price-wantPrice) > 1e-6 {
			t.Fatalf("%d pieces for %g in the months, want %d for %g", pieces, price, want, wantPrice)
		}
		joined := 0
		for _, j := range c.Joins {
			joined += len(j.Lines)
			if j.Joined > j.Pieces {
				t.Fatalf("%d pieces together, %d one by one", j.Joined, j.Pieces)
			}
		}
		if joined > lines {
			t.Fatalf("%d lines joined of %d", joined, lines)
		}
	})
}

func BenchmarkCalendarOfAThousandAssets(b *testing.B) {
	var fleet []Member
	for i := range 1000 {
		fleet = append(fleet, member("x", "EUR", i, 1+i%40, i%25))
	}
	for b.Loop() {
		CalendarOf(fleet, 4)
	}
}

package session_test

import (
	"path/filepath"
	"testing"

	"anodewright/anodes/order"
	"anodewright/app/session"
	"anodewright/hull"
)

func TestSparesTypedAsCountOrShare(t *testing.T) {
	f := field(t, session.PatternFields(), "spare_share")
	a := demo(t)[0]
	for _, c := range []struct{ typed, shown string }{
		{"3", "3"}, {"10 %", "10 %"}, {"12.5%", "12.5 %"}, {"0", "0"}, {"", ""},
	} {
		if err := f.Set(a, 0, c.typed); err != nil {
			t.Errorf("%q: %v", c.typed, err)
		} else if got := f.Get(a, 0); got != c.shown {
			t.Errorf("%q is shown as %q, want %q", c.typed, got, c.shown)
		}
		if p := a.Patterns[0]; p.SpareCount != nil && p.SpareShare != nil {
			t.Errorf("%q leaves count and share", c.typed)
		}
		if faults := hull.Check(a); len(faults) > 0 {
			t.Errorf("%q: %v", c.typed, faults)
		}
	}
	for _, wrong := range []string{"-1", "1.5", "x", "-5 %"} {
		if err := f.Set(a, 0, wrong); err == nil && len(hull.Check(a)) == 0 {
			t.Errorf("%q is taken as %q", wrong, f.Get(a, 0))
		}
	}
}

func TestStockIsSetAndUndone(t *testing.T) {
	s, _ := ship(t)
	id := s.Asset().Patterns[0].ID
	was := s.StockOf(id)
	for _, n := range []string{"12", "0", "7"} {
		if err := s.SetStock(id, n); err != nil {
			t.Fatal(err)
		}
	}
	if got := s.StockOf(id); got != 7 {
		t.Errorf("%d in stock, want 7", got)
	}
	for _, wrong := range []string{"x", "-2", "1.5", ""} {
		if err := s.SetStock(id, wrong); err == nil {
			t.Errorf("%q is taken as %d", wrong, s.StockOf(id))
		}
	}
	for range 3 {
		if err := s.Undo(); err != nil {
			t.Fatal(err)
		}
	}
	if got := s.StockOf(id); got != was {
		t.Errorf("%d in stock after undo, want %d", got, was)
	}
}

// The purchase is that of the newest outcome, and is computed once for it.
func TestPurchaseFollowsTheOutcome(t *testing.T) {
	s, _ := ship(t)
	get := func() *session.Purchase {
		t.Helper()
		s.Wait()
		s.Purchase()
		s.Wait()
		p, known := s.Purchase()
		if !known || p == nil || len(p.Staged) == 0 {
			t.Fatalf("purchase %+v, known: %v", p, known)
		}
		return p
	}
	first := get()
	if again := get(); again != first {
		t.Error("computed twice for one outcome")
	}
	rush := field(t, session.OrderFields(), "costs.rush_factor")
	must(t, s.SetText(session.Whole, 0, rush, "20"))
	dear := get()
	if dear == first || dear.Staged[0].Wrong.Fractile() <= first.Staged[0].Wrong.Fractile() {
		t.Errorf("a dearer rush leaves the fractile at %g", dear.Staged[0].Wrong.Fractile())
	}
}

// The fleet's orders hold every computed asset; while the fleet rests only the
// open one is computed anew.
func TestFleetOrders(t *testing.T) {
	s := open(t, register(t, filepath.Join(t.TempDir(), "fleet.anodewright")))
	must(t, session.AddDemo(s))
	orders := func() *session.FleetOrders {
		s.Wait()
		s.FleetOrders(4)
		s.Wait()
		return s.FleetOrders(4)
	}
	progress := func(computed int, rests bool) {
		t.Helper()
		if n, of, r := s.FleetProgress(); n != computed || of != 5 || r != rests {
			t.Errorf("%d of %d assets computed, resting: %v; want %d", n, of, r, computed)
		}
	}
	f := orders()
	progress(5, false)
	if len(f.Fleet) != 5 || len(f.IDs) != 5 || len(f.Months) == 0 {
		t.Fatalf("%d assets, %d months", len(f.Fleet), len(f.Months))
	}
	if orders() != f {
		t.Error("made anew though nothing changed")
	}
	pieces, want := 0, 0
	for _, m := range f.Months {
		pieces += m.Pieces
	}
	for _, d := range order.Sorted(f.Fleet) {
		want += d.Ordered
	}
	if pieces != want || want == 0 {
		t.Errorf("%d pieces in the months, %d in the orders", pieces, want)
	}
	s.RestFleet(true)
	weeks := func(a *hull.Asset) error { a.Costs.FloatWeeks = 3; return nil }
	must(t, s.Do("float", weeks))
	s.Wait()
	progress(5, true) // the open one is computed all the same
	s.Select(f.IDs[1])
	must(t, s.Do("float", weeks))
	s.RestFleet(false)
	if f = orders(); f.Fleet[1].Costs.FloatWeeks != 3 {
		t.Errorf("after the rest: %+v", f.Fleet[1].Costs)
	}
	progress(5, false)
}

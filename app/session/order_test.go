package session_test

import (
	"testing"

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

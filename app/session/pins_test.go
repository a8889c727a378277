package session_test

import (
	"slices"
	"testing"

	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// Pins are kept with the register, per asset, and plan anew.
func TestPinsAreKept(t *testing.T) {
	s, r, zone := withReadings(t, hull.Reading{WeighedWastage: []float64{0.1, 0.12, 0.11, 0.1}})
	s.Wait()
	o := s.Outcome()
	if len(s.Pins()) != 0 || len(o.Pins) != 0 {
		t.Fatalf("a new asset has pins: %v", s.Pins())
	}
	before, _ := s.CanUndo()
	pin := o.Pin(zone, 0)
	must(t, s.Pin(pin))
	other := pin
	other.Action, other.Pattern = renewal.Renew, s.Asset().Patterns[0].ID
	must(t, s.Pin(other))
	s.Wait()
	if got := s.Outcome(); len(got.Pins) != 1 || got.Pins[0].Pin != other {
		t.Errorf("the plan has pins %+v, want the later one only", got.Pins)
	}
	if again := open(t, r); !slices.Equal(again.Pins(), []renewal.Pin{other}) {
		t.Errorf("opened again it has pins %v", again.Pins())
	}
	if undo, _ := s.CanUndo(); undo != before {
		t.Errorf("undo would take back %q, want %q", undo, before)
	}
	must(t, s.Unpin(pin.Zone, pin.Docking))
	s.Wait()
	if got := s.Outcome(); len(got.Pins) != 0 || got.Money.Total != o.Money.Total {
		t.Errorf("without the pin: %+v", got.Money)
	}
	must(t, s.Pin(pin))
	must(t, s.UnpinAll())
	if len(open(t, r).Pins()) != 0 {
		t.Error("pins are left")
	}
}

// A pin follows its docking to another day, back when that is undone, and so
// the reopened asset has it; a docking that is taken out takes no pin along.
func TestPinsFollowTheirDocking(t *testing.T) {
	s, r, zone := withReadings(t, hull.Reading{WeighedWastage: []float64{0.1, 0.12, 0.11, 0.1}})
	s.Wait()
	first, second := s.Outcome().Pin(zone, 0), s.Outcome().Pin(zone, 1)
	must(t, s.Pin(first))
	must(t, s.Pin(second))
	old := first.Docking
	i := slices.IndexFunc(s.Asset().Dockings, func(d hull.Docking) bool { return d.Date == old })
	must(t, s.Do("move a docking", func(a *hull.Asset) error {
		a.Dockings[i].Date = old.AddMonths(2)
		return nil
	}))
	moved := first
	moved.Docking = old.AddMonths(2)
	if got := s.Pins(); !slices.Equal(got, []renewal.Pin{moved, second}) {
		t.Errorf("moved, the pins are %v", got)
	}
	s.Wait()
	if o := s.Outcome(); len(o.Pins) != 2 || o.Pins[0].Refused != "" {
		t.Errorf("the plan has pins %+v", o.Pins)
	}
	if again := open(t, r); !slices.Equal(again.Pins(), []renewal.Pin{moved, second}) {
		t.Errorf("opened again it has pins %v", again.Pins())
	}
	must(t, s.Undo())
	if got := s.Pins(); !slices.Equal(got, []renewal.Pin{first, second}) {
		t.Errorf("undone, the pins are %v", got)
	}
	must(t, s.RemoveDocking(i))
	if got := s.Pins(); !slices.Equal(got, []renewal.Pin{first, second}) {
		t.Errorf("with the docking gone, the pins are %v", got)
	}
}

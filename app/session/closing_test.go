package session_test

import (
	"slices"
	"strings"
	"testing"

	"anodewright/anodes/renewal"
	"anodewright/app/session"
	"anodewright/hull"
)

// docked is a session over the demo ship with its next docking closed as
// drafted, but for what change makes of it.
func docked(t *testing.T, change func(c *hull.Closing)) (*session.Session, hull.Closing) {
	t.Helper()
	s, _ := ship(t)
	c, err := s.DraftClosing(0, 0)
	must(t, err)
	if change != nil {
		change(&c)
	}
	must(t, s.CloseDocking(c))
	return s, c
}

func TestCloseDockingIsOneStep(t *testing.T) {
	s, r := ship(t)
	before := s.Asset()
	first, _ := s.CanUndo()
	c, err := s.DraftClosing(0, 0)
	must(t, err)
	c.By = "superintendent"
	must(t, s.CloseDocking(c))
	after := s.Asset()
	if after.LastDocking != c.Date || len(after.Closed) != 1 || len(after.Ledger) == 0 || !equal(after, stored(t, s, r)) {
		t.Fatalf("last docking %s, %d closed, %d facts", after.LastDocking, len(after.Closed), len(after.Ledger))
	}
	undo, _ := s.CanUndo()
	if undo != "close the docking of 2027-03-08: pieces put on 24, taken off 8; zones with coating works 3; by superintendent" {
		t.Errorf("the step: %q", undo)
	}
	must(t, s.Undo())
	if again, _ := s.CanUndo(); !equal(s.Asset(), before) || again != first {
		t.Errorf("undone, the asset is another; next to undo %q, before %q", again, first)
	}
	must(t, s.Redo())
	if !equal(s.Asset(), after) {
		t.Error("done again, the asset is another")
	}
	if b := s.Closed(); len(b) != 1 || b[0].Closed.Date != c.Date {
		t.Errorf("closed: %+v", b)
	}
}

func TestFaultyClosingChangesNothing(t *testing.T) {
	s, _ := ship(t)
	before := s.Asset()
	c, err := s.DraftClosing(0, 0)
	must(t, err)
	c.Sets[0].Off = c.Sets[0].Found + 1
	faults, ok := s.CloseDocking(c).(hull.Faults)
	if _, found := faults.At("sets[0].off"); !ok || !found || s.Asset() != before {
		t.Errorf("faults %v", faults)
	}
}

func TestPinsOfAClosedDockingGo(t *testing.T) {
	s, _ := ship(t)
	ahead := s.Asset().Ahead()
	for _, d := range ahead[:2] {
		must(t, s.Pin(renewal.Pin{Zone: s.Asset().Zones[0].ID, Docking: d.Date, Action: renewal.Renew}))
	}
	c, err := s.DraftClosing(0, 0)
	must(t, err)
	must(t, s.CloseDocking(c))
	if pins := s.Pins(); len(pins) != 1 || pins[0].Docking != ahead[1].Date {
		t.Errorf("pins %+v", pins)
	}
}

// What is edited of the fitted sets of an asset with a ledger is a correction:
// a fact more, none changed.
func TestFittedEditsOfALedgerAreCorrections(t *testing.T) {
	s, _ := docked(t, nil)
	facts := slices.Clone(s.Asset().Ledger)
	check := func(what string, more int) {
		t.Helper()
		now := s.Asset().Ledger
		if len(now) != len(facts)+more || !slices.Equal(now[:len(facts)], facts) {
			t.Fatalf("%s: %d facts after %d", what, len(now), len(facts))
		}
		facts = slices.Clone(now)
	}
	count := s.Asset().Zones[0].Fitted[0].Count
	must(t, s.SetFitted(0, 0, session.FittedCount, "20"))
	if f := s.Asset().Ledger[len(facts)]; f.Deed != hull.WasFound || f.Count != 20 || f.Note != "corrected" || f.Date != s.Asset().LastDocking || count == 20 {
		t.Errorf("the correction: %+v", f)
	}
	check("a count", 1)
	must(t, s.SetFitted(0, 0, session.FittedWastage, "half of it"))
	check("a faulty text", 0)
	must(t, s.SetFitted(0, 0, session.FittedWastage, "31 %"))
	check("a wastage", 1)
	must(t, s.AddFitted(0, s.Asset().Zones[0].Fitted[0].Pattern))
	check("a set more", 1)
	sets := len(s.Asset().Zones[0].Fitted)
	must(t, s.RemoveFitted(0, 0))
	check("a set less", 1)
	if f := facts[len(facts)-1]; f.Count != 0 || len(s.Asset().Zones[0].Fitted) != sets-1 {
		t.Errorf("the set taken out: %+v", f)
	}
	must(t, s.SetText(session.Zones, 0, field(t, session.ZoneDetails(), "min_count"), "2"))
	check("another field", 0)
}

func TestPatternsOfALedgerKeepTheirName(t *testing.T) {
	s, c := docked(t, nil)
	old := c.On[0].Pattern
	i := slices.IndexFunc(s.Asset().Patterns, func(p hull.Pattern) bool { return p.ID == old })
	must(t, s.SetText(session.Patterns, i, field(t, session.PatternFields(), "id"), "renamed"))
	b := s.Closed()[0]
	if b.Pieces[0].Pattern != "renamed" || b.Pieces[0].Planned != b.Pieces[0].PutOn || b.Pieces[0].PutOn == 0 {
		t.Errorf("after the renaming: %+v", b.Pieces)
	}
	if err := s.RemovePattern(i); err == nil || !strings.Contains(err.Error(), "the as-built ledger names it") {
		t.Errorf("removed: %v", err)
	}
}

// A zone may leave the asset; the ledger says that nothing is left on it.
func TestZoneOfALedgerLeaves(t *testing.T) {
	s, _ := docked(t, nil)
	at := -1
	must(t, s.Do("a zone with anodes", func(a *hull.Asset) error {
		z := a.Zones[0]
		z.ID, z.Name, at = "spare", "Spare", len(a.Zones)
		a.Zones = append(a.Zones, z)
		return nil
	}))
	facts := len(s.Asset().Ledger)
	must(t, s.RemoveZone(at))
	left, _ := hull.FittedSets(s.Asset().Ledger)
	if len(s.Asset().Ledger) <= facts || len(left["spare"]) != 0 {
		t.Errorf("%d facts after %d; left %v", len(s.Asset().Ledger), facts, left)
	}
}

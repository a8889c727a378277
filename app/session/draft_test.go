package session_test

import (
	"strings"
	"testing"

	"anodewright/app/session"
)

func TestFaultyTextIsKeptAndStaysOut(t *testing.T) {
	s, r := ship(t)
	area, before := zoneField(t, "wetted_area_m2"), s.Asset()
	must(t, s.SetText(session.Zones, 0, area, "-3 dolphins"))
	s.Wait()
	check := func(when string, s *session.Session) {
		t.Helper()
		text, fault := s.Text(session.Zones, 0, area)
		if text != "-3 dolphins" || !strings.HasPrefix(fault, "want a number") {
			t.Errorf("%s: %q, fault %q", when, text, fault)
		}
		if s.Drafts() != 1 || !equal(s.Asset(), before) || !equal(stored(t, s, r), before) {
			t.Errorf("%s: %d drafts, or the asset changed", when, s.Drafts())
		}
		if undo, _ := s.CanUndo(); undo != "" {
			t.Errorf("%s: there is a step to undo: %s", when, undo)
		}
	}
	check("at once", s)
	if s.Outcome().Asset != s.Asset() {
		t.Error("the plan is of another asset")
	}
	check("opened again", open(t, r))
}

func TestFaultSaysWhatIsWanted(t *testing.T) {
	s, _ := ship(t)
	for _, c := range []struct{ key, text, fault string }{
		{"wetted_area_m2", "0", "want a number from 0.001"},
		{"wetted_area_m2", "1,234", "a comma before three digits can mean both"},
		{"bare_area_m2", "9e6", "want an area not above wetted_area_m2"},
		{"coating.category", "IV", "want "},
		{"held_by", "nobody", "want the id of another zone"},
		{"fitted", "3 × no-such 2020-01-01", "the id of one of the asset's patterns"},
	} {
		f := zoneField(t, c.key)
		must(t, s.SetText(session.Zones, 0, f, c.text))
		if text, fault := s.Text(session.Zones, 0, f); text != c.text || !strings.Contains(fault, c.fault) {
			t.Errorf("%s = %q: shown %q, fault %q", c.key, c.text, text, fault)
		}
	}
}

func TestRightTextClearsTheDraft(t *testing.T) {
	s, r := ship(t)
	area := zoneField(t, "wetted_area_m2")
	must(t, s.SetText(session.Zones, 0, area, "x"))
	must(t, s.SetText(session.Zones, 0, area, "1700"))
	if text, fault := s.Text(session.Zones, 0, area); text != "1700" || fault != "" || s.Drafts() != 0 {
		t.Errorf("%q, fault %q, %d drafts", text, fault, s.Drafts())
	}
	must(t, s.SetText(session.Zones, 0, area, "x"))
	must(t, s.SetText(session.Zones, 0, area, "1700")) // the value that it has
	if _, fault := s.Text(session.Zones, 0, area); fault != "" {
		t.Errorf("the old value back: fault %q", fault)
	}
	if kept, _ := r.Drafts(openID(t, s)); len(kept) != 0 {
		t.Errorf("the register keeps %v", kept)
	}
}

func TestDraftIsJudgedByTheNewestAsset(t *testing.T) {
	s, r := ship(t)
	area, bare := zoneField(t, "wetted_area_m2"), zoneField(t, "bare_area_m2")
	must(t, s.SetText(session.Zones, 0, area, "100"))
	must(t, s.SetText(session.Zones, 0, bare, "150"))
	must(t, s.SetText(session.Zones, 0, area, "200"))
	for when, s := range map[string]*session.Session{"at once": s, "opened again": open(t, r)} {
		text, fault := s.Text(session.Zones, 0, bare)
		if text != "150" || !strings.Contains(fault, "right now but not in the plan") || s.Asset().Zones[0].BareArea == 150 {
			t.Errorf("%s: %q, %q, bare area %v", when, text, fault, s.Asset().Zones[0].BareArea)
		}
	}
	must(t, s.Undo())
	if _, fault := s.Text(session.Zones, 0, bare); !strings.Contains(fault, "want an area not above") {
		t.Errorf("after undo the fault is %q", fault)
	}
	must(t, s.Redo())
	must(t, s.SetText(session.Zones, 0, bare, "150"))
	if s.Drafts() != 0 || stored(t, s, r).Zones[0].BareArea != 150 {
		t.Error("the same text entered again did not get in")
	}
}

func TestDraftGoesAndComesWithItsItem(t *testing.T) {
	s, r := ship(t)
	depth := zoneField(t, "depth_m")
	at, err := s.AddZone(0)
	must(t, err)
	must(t, s.SetText(session.Zones, at, depth, "deep"))
	must(t, s.RemoveZone(at))
	if s.Drafts() != 0 {
		t.Errorf("%d fields at fault that nobody can see", s.Drafts())
	}
	must(t, s.Undo())
	if text, fault := s.Text(session.Zones, at, depth); text != "deep" || fault == "" || s.Drafts() != 1 {
		t.Errorf("after undo: %q, %q", text, fault)
	}

	// A zone put before it does not take its draft.
	_, err = s.AddZone(0)
	must(t, err)
	if text, _ := s.Text(session.Zones, at+1, depth); text != "deep" {
		t.Errorf("one place further down: %q", text)
	}

	// A docking that is moved takes its draft along, and others leave it alone.
	date, cost := field(t, session.DockingFields(), "date"), field(t, session.DockingFields(), "fixed_cost")
	last := len(s.Asset().Dockings) - 1
	must(t, s.SetText(session.Dockings, last, cost, "much"))
	must(t, s.SetText(session.Dockings, last, date, s.Asset().Dockings[last].Date.AddMonths(1).String()))
	if text, fault := s.Text(session.Dockings, last, cost); text != "much" || fault == "" {
		t.Errorf("the moved docking: %q, %q", text, fault)
	}
	must(t, s.RemoveDocking(0))
	for when, s := range map[string]*session.Session{"at once": s, "opened again": open(t, r)} {
		if text, fault := s.Text(session.Dockings, last-1, cost); text != "much" || fault == "" {
			t.Errorf("%s: with a docking less: %q, %q", when, text, fault)
		}
	}
}

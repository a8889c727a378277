package session_test

import (
	"fmt"
	"path/filepath"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"anodewright/app/session"
	"anodewright/hull"
	"anodewright/hull/propose"
)

func TestAddAndRemoveZone(t *testing.T) {
	s, r := ship(t)
	n := len(s.Asset().Zones)
	at, err := s.AddZone(0)
	must(t, err)
	first, added := s.Asset().Zones[0], s.Asset().Zones[at]
	if at != 1 || len(s.Asset().Zones) != n+1 || added.Name == first.Name || added.ID == first.ID || len(added.Fitted) != 0 || added.WettedArea != first.WettedArea {
		t.Errorf("zone %d of %d is %s (%s) with %d sets", at, len(s.Asset().Zones), added.Name, added.ID, len(added.Fitted))
	}
	must(t, s.Do("give it works and readings", func(a *hull.Asset) error {
		share := 0.5
		a.Dockings[0].Works = append(a.Dockings[0].Works, hull.Work{Zone: added.ID, Coating: hull.TouchUp, Share: &share})
		a.Readings = append(a.Readings, hull.Reading{Date: a.Start().AddMonths(6), Zone: added.ID, WeighedWastage: []float64{0.1}})
		return nil
	}))
	works, readings := len(s.Asset().Dockings[0].Works), len(s.Asset().Readings)
	must(t, s.RemoveZone(at))
	a := stored(t, s, r)
	if _, there := a.Zone(added.ID); there || len(a.Dockings[0].Works) != works-1 || len(a.Readings) != readings-1 {
		t.Errorf("zone there: %v, %d works, %d readings", there, len(a.Dockings[0].Works), len(a.Readings))
	}
	must(t, s.Undo())
	if got := stored(t, s, r); len(got.Dockings[0].Works) != works || len(got.Readings) != readings {
		t.Error("undo did not bring works and readings back")
	}
}

func TestZoneThatHoldsAnotherStays(t *testing.T) {
	s, _ := ship(t)
	host := -1
	for _, z := range s.Asset().Zones {
		for i := range s.Asset().Zones {
			if s.Asset().Zones[i].ID == z.HeldBy {
				host = i
			}
		}
	}
	before := s.Asset()
	if err := s.RemoveZone(host); err == nil || !strings.Contains(err.Error(), "is held by this zone") {
		t.Errorf("error %v", err)
	}
	for _, i := range []int{-1, len(before.Zones)} {
		_, err := s.AddZone(i)
		if err == nil || s.RemoveZone(i) == nil || s.RemoveDocking(i) == nil {
			t.Errorf("zone %d can be added to or removed", i)
		}
	}
	if s.Asset() != before {
		t.Error("the asset changed")
	}
}

func TestLastZoneAndLastDockingStay(t *testing.T) {
	s, _ := ship(t)
	a, _, err := session.ProposedAsset("One Zone", propose.Form{Kind: hull.Ship}, today)
	must(t, err)
	a.Zones = a.Zones[:1]
	must(t, s.Add(a, "test"))
	if err := s.RemoveZone(0); err == nil {
		t.Error("the last zone was removed")
	}
	for len(s.Asset().Dockings) > 1 {
		must(t, s.RemoveDocking(0))
	}
	if err := s.RemoveDocking(0); err == nil {
		t.Error("the last docking was removed")
	}
}

func TestAddDockingMovesTheHorizon(t *testing.T) {
	s, r := ship(t)
	for range 4 {
		must(t, s.AddDocking())
		a := stored(t, s, r)
		last := a.Dockings[len(a.Dockings)-1].Date
		if before := a.Dockings[len(a.Dockings)-2].Date; last != before.AddMonths(30) || last >= a.Horizon {
			t.Fatalf("docking %s after %s, horizon %s", last, before, a.Horizon)
		}
	}
	n := len(s.Asset().Dockings)
	must(t, s.RemoveDocking(n-1))
	if len(stored(t, s, r).Dockings) != n-1 {
		t.Error("the docking is still there")
	}
}

// texts are what a person might type into any field.
var texts = []string{
	"", "0", "1", "2", "12,5", "300", "1 500", "-1", "1,234", "x", "yes", "no", "I", "III", "own", "2027-05-01", "1 Jun 2029",
	"50 %", "150 / 70 / 100", "24 × al-45 2024-03-15 10 %", "rudder", "vertical side",
}

// TestUndoAndRedoAreInverse makes random edits, and takes all of them back and
// does them again, comparing with the register at every step.
func TestUndoAndRedoAreInverse(t *testing.T) {
	r := register(t, filepath.Join(t.TempDir(), "fleet.anodewright"))
	s := open(t, r)
	all := demo(t)
	rapid.Check(t, func(t *rapid.T) {
		start := rapid.SampledFrom(all).Draw(t, "asset")
		must(t, s.Add(start, "test"))
		defer func() { must(t, s.Remove()) }()
		same := func(when string, want *hull.Asset) {
			if shown := s.Asset(); !equal(shown, want) || !equal(stored(t, s, r), shown) {
				t.Fatalf("%s: shown, stored and expected asset differ", when)
			}
		}
		states := []*hull.Asset{s.Asset()}
		for range rapid.IntRange(1, 12).Draw(t, "edits") {
			edit(t, s)
			if now := s.Asset(); now != states[len(states)-1] {
				states = append(states, now)
			}
			same("edit", states[len(states)-1])
			if err := hull.Check(s.Asset()).Err(); err != nil {
				t.Fatalf("the asset has faults: %v", err)
			}
		}
		for i := len(states) - 1; i > 0; i-- {
			same(fmt.Sprint("before undo ", i), states[i])
			must(t, s.Undo())
		}
		same("all undone", start)
		must(t, s.Undo()) // one more does nothing
		if undo, _ := s.CanUndo(); undo != "" {
			t.Fatalf("left to undo: %s", undo)
		}
		for i := 1; i < len(states); i++ {
			must(t, s.Redo())
			same(fmt.Sprint("redo ", i), states[i])
		}
		must(t, s.Redo())
		if _, redo := s.CanUndo(); redo != "" {
			t.Fatalf("left to redo: %s", redo)
		}
		same("all done again", states[len(states)-1])
	})
}

// edit makes one random edit; some are refused, as they would be of a person.
func edit(t *rapid.T, s *session.Session) {
	a := s.Asset()
	switch rapid.IntRange(0, 9).Draw(t, "kind") {
	case 0:
		s.AddZone(rapid.IntRange(0, len(a.Zones)-1).Draw(t, "zone"))
	case 1:
		s.RemoveZone(rapid.IntRange(0, len(a.Zones)-1).Draw(t, "zone"))
	case 2:
		s.AddDocking()
	case 3:
		s.RemoveDocking(rapid.IntRange(0, len(a.Dockings)-1).Draw(t, "docking"))
	case 4:
		s.AddWater()
	default:
		list := rapid.SampledFrom([]session.List{session.Whole, session.Zones, session.Waters, session.Dockings}).Draw(t, "list")
		l := lists(a)[list]
		f := rapid.SampledFrom(l.fields).Draw(t, "field")
		i := rapid.IntRange(0, l.n-1).Draw(t, "item")
		text := rapid.SampledFrom(texts).Draw(t, "text")
		if f.Choices != nil && rapid.Bool().Draw(t, "choose") {
			text = rapid.SampledFrom(f.Choices(a)).Draw(t, "choice")
		}
		must(t, s.SetText(list, i, f, text))
		if shown, fault := s.Text(list, i, f); fault != "" && shown != text {
			t.Fatalf("%s[%d].%s: %q is shown as %q with the fault %q", list, i, f.Key, text, shown, fault)
		}
	}
}

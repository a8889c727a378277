package session_test

import (
	"crypto/rand"
	"fmt"
	"path/filepath"
	"sync/atomic"
	"testing"
	"time"

	"pgregory.net/rapid"

	"anodewright/app/session"
	"anodewright/hull"
	"anodewright/storage"
)

func TestUndoGoesOnAfterReopening(t *testing.T) {
	s, r := ship(t)
	area, depth := zoneField(t, "wetted_area_m2"), zoneField(t, "depth_m")
	start := s.Asset()
	must(t, s.SetText(session.Zones, 0, area, "1001"))
	must(t, s.SetText(session.Zones, 0, depth, "3.5"))
	must(t, s.SetText(session.Zones, 0, area, "1002"))
	must(t, s.Undo())
	s.Wait()

	s = open(t, r) // the program starts again
	name := start.Zones[0].Name
	if undo, redo := s.CanUndo(); undo != name+": "+depth.Title || redo != name+": "+area.Title {
		t.Errorf("undo %q, redo %q", undo, redo)
	}
	must(t, s.Undo())
	if z := s.Asset().Zones[0]; z.WettedArea != 1001 || z.Depth != start.Zones[0].Depth {
		t.Errorf("after one undo: area %v, depth %v", z.WettedArea, z.Depth)
	}
	s.Wait()

	s = open(t, r)
	must(t, s.Undo())
	if !equal(s.Asset(), start) || !equal(stored(t, s, r), start) {
		t.Error("all taken back, it is another asset")
	}
	if undo, _ := s.CanUndo(); undo != "" {
		t.Errorf("adding the asset can be undone: %q", undo)
	}
	for range 3 {
		must(t, s.Redo())
	}
	if z := s.Asset().Zones[0]; z.WettedArea != 1002 || z.Depth != 3.5 {
		t.Errorf("all done again: area %v, depth %v", z.WettedArea, z.Depth)
	}
	must(t, s.SetText(session.Zones, 0, area, "1003"))
	if undo, redo := s.CanUndo(); undo == "" || redo != "" {
		t.Errorf("after a new edit: undo %q, redo %q", undo, redo)
	}
}

// Whatever is edited, undone and done again, a program that starts anew undoes
// and does again what the one before would have.
func TestReopeningKeepsEveryStep(t *testing.T) {
	dir, examples := t.TempDir(), 0
	rapid.Check(t, func(t *rapid.T) {
		if examples++; examples > 30 {
			return // each starts three programs, so fewer than usual will do
		}
		r, err := storage.Open(filepath.Join(dir, rand.Text()))
		if err != nil {
			t.Fatal(err)
		}
		defer r.Close()
		s, err := session.Open(r, today)
		if err != nil {
			t.Fatal(err)
		}
		defer s.Wait()
		must(t, s.Add(demo(t)[0], "test"))
		for range rapid.IntRange(1, 10).Draw(t, "deeds") {
			switch rapid.IntRange(0, 4).Draw(t, "deed") {
			case 0, 1:
				must(t, s.Undo())
			case 2:
				must(t, s.Redo())
			default:
				edit(t, s)
			}
		}
		again, err := session.Open(r, today)
		if err != nil {
			t.Fatal(err)
		}
		defer again.Wait()
		same := func(when string) {
			t.Helper()
			undo, redo := s.CanUndo()
			if u, r := again.CanUndo(); u != undo || r != redo {
				t.Fatalf("%s: undo %q and redo %q, before %q and %q", when, u, r, undo, redo)
			}
		}
		same("opened")
		// Both cannot store at once, so the states are played one after the other.
		type state struct {
			undo, redo string
			asset      *hull.Asset
		}
		play := func(s *session.Session) (states []state) {
			for n := 0; ; n++ {
				undo, redo := s.CanUndo()
				states = append(states, state{undo, redo, s.Asset()})
				if undo == "" || n > 20 {
					return states
				}
				must(t, s.Undo())
			}
		}
		want := play(again)
		third, err := session.Open(r, today)
		if err != nil {
			t.Fatal(err)
		}
		defer third.Wait()
		for i := len(want) - 1; ; i-- { // forward again, in yet another program
			undo, redo := third.CanUndo()
			if undo != want[i].undo || redo != want[i].redo || !equal(third.Asset(), want[i].asset) {
				t.Fatalf("state %d: undo %q and redo %q, want %q and %q", i, undo, redo, want[i].undo, want[i].redo)
			}
			if i == 0 {
				break
			}
			must(t, third.Redo())
		}
	})
}

func TestHistoryIsShownAndBroughtBack(t *testing.T) {
	at := time.Date(2026, 12, 1, 9, 0, 0, 0, time.UTC)
	r := register(t, filepath.Join(t.TempDir(), "fleet.anodewright"), storage.Clock(func() time.Time { return at }))
	s := open(t, r)
	must(t, s.Add(demo(t)[0], "test"))
	area := zoneField(t, "wetted_area_m2")
	for _, text := range []string{"1001", "1002", "1003"} {
		at = at.Add(time.Minute)
		must(t, s.SetText(session.Zones, 0, area, text))
	}
	history, err := s.History()
	must(t, err)
	var lines string
	for _, v := range history {
		lines += fmt.Sprintln(v.Rev, v.At.Format("15:04"), v.Who, v.Deed, v.What)
	}
	what := s.Asset().Zones[0].Name + ": " + area.Title
	want := "4 09:03 tester changed " + what + "\n3 09:02 tester changed " + what + "\n2 09:01 tester changed " + what + "\n1 09:00 tester added test\n"
	if lines != want {
		t.Errorf("history\n%swant\n%s", lines, want)
	}
	if a, err := s.Revision(2); err != nil || a.Zones[0].WettedArea != 1001 {
		t.Errorf("revision 2: %+v, %v", a, err)
	}
	must(t, s.BringBack(2))
	if got := stored(t, s, r).Zones[0].WettedArea; got != 1001 {
		t.Errorf("brought back, the area is %v", got)
	}
	if undo, _ := s.CanUndo(); undo != "bring back revision 2" {
		t.Errorf("undo %q", undo)
	}
	must(t, s.Undo())
	if got := stored(t, s, r).Zones[0].WettedArea; got != 1003 {
		t.Errorf("taken back, the area is %v", got)
	}
	if err := s.BringBack(99); err == nil {
		t.Error("a revision that never was is brought back")
	}
}

func TestRestoredBackupIsShown(t *testing.T) {
	s, r := ship(t)
	must(t, s.BackupDaily())
	all, err := s.Backups()
	must(t, err)
	if len(all) != 1 {
		t.Fatalf("%d backups", len(all))
	}
	area := zoneField(t, "wetted_area_m2")
	before := s.Asset()
	must(t, s.SetText(session.Zones, 0, area, "1001"))
	must(t, s.Add(demo(t)[1], "test"))
	var told atomic.Int64
	s.Notify(func() { told.Add(1) })
	made, err := s.RestoreBackup(all[0].Path)
	must(t, err)
	if fleet := s.Fleet(); len(fleet) != 1 || !equal(s.Asset(), before) || told.Load() == 0 {
		t.Errorf("%d assets, told %d times, or another asset", len(fleet), told.Load())
	}
	if undo, _ := s.CanUndo(); undo != "" {
		t.Errorf("undo %q", undo)
	}
	s.Wait()
	if _, err := s.RestoreBackup(made.Path); err != nil {
		t.Fatal(err)
	}
	if fleet := s.Fleet(); len(fleet) != 2 || fleet[0].Asset.Zones[0].WettedArea != 1001 {
		t.Errorf("the state before is not back: %d assets", len(fleet))
	}
	if _, err := s.RestoreBackup(r.Path()); err == nil {
		t.Error("the register itself is taken for a backup")
	}
}

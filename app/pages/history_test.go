package pages

import (
	"os"
	"path/filepath"
	"runtime"
	"strings"
	"testing"
	"time"

	"fyne.io/fyne/v2"

	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/session"
	"anodewright/hull"
	"anodewright/storage"
)

// colleague is another program's session on the register that shown made last.
func colleague(t *testing.T) *session.Session {
	t.Helper()
	r, err := storage.Open(register, storage.User("colleague"))
	must(t, err)
	s, err := session.Open(r, today)
	must(t, err)
	t.Cleanup(func() {
		s.Wait()
		r.Close()
	})
	return s
}

// setArea sets the first zone's area in one edit.
func setArea(t *testing.T, s *session.Session, m2 float64) {
	t.Helper()
	must(t, s.Do("area", func(a *hull.Asset) error {
		a.Zones[0].WettedArea = m2
		return nil
	}))
}

func TestHistoryByKeyboard(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	f.open(t, "Steel")
	before := f.s.Asset().Zones[0].WettedArea
	setArea(t, f.s, 1900)
	setArea(t, f.s, 1950)
	f.history()
	wants(t, f, "History of Tern Passage", "tester", "area (as it is now)", "added: test")
	key(f, fyne.KeyReturn) // the present state
	wants(t, f, "Nothing to bring back")
	key(f, fyne.KeyReturn)
	f.win.Canvas().Focus(topGrid(t, f))
	key(f, fyne.KeyDown)
	key(f, fyne.KeyDown)
	key(f, fyne.KeyReturn)
	if got := f.s.Asset().Zones[0].WettedArea; got != before || f.win.Canvas().Overlays().Top() != nil {
		t.Errorf("brought back, the area is %v, want %v; or a dialog is open", got, before)
	}
	must(t, f.s.Undo())
	if got := f.s.Asset().Zones[0].WettedArea; got != 1950 {
		t.Errorf("undone, the area is %v", got)
	}
	f.history()
	if key(f, fyne.KeyEscape); f.win.Canvas().Overlays().Top() != nil {
		t.Error("Escape does not close the history")
	}
}

// topGrid is the table of the dialog on top.
func topGrid(t *testing.T, f *Frame) *grid.Grid {
	t.Helper()
	for _, o := range within(f.win.Canvas().Overlays().Top()) {
		if g, ok := o.(*grid.Grid); ok {
			return g
		}
	}
	t.Fatal("no table in the dialog")
	return nil
}

func TestHistoryExportsARevision(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	setArea(t, f.s, 1900)
	all, err := f.s.History()
	must(t, err)
	h := f.newHistory("Tern Passage", all)
	h.open()
	h.grid.Select(1, 0)
	h.export()
	path := filepath.Join(t.TempDir(), "old.json")
	typed(f, path)
	key(f, fyne.KeyReturn)
	text, err := readFile(path)
	if err != nil || !strings.Contains(text, `"wetted_area_m2": 2100`) {
		t.Errorf("error %v, file %.300s", err, text)
	}
}

func TestRestoringABackup(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	f.restoreBackup()
	wants(t, f, "No backup yet")
	key(f, fyne.KeyReturn)
	f.backupDaily()
	setArea(t, f.s, 1900)
	f.restoreBackup()
	wants(t, f, "Restore a backup", "kB", "fleet backups")
	key(f, fyne.KeyReturn)
	wants(t, f, "The register as it is now is backed up first.")
	key(f, fyne.KeyReturn)
	wants(t, f, "The register is that of", "What it was before is the backup of")
	if got := f.s.Asset().Zones[0].WettedArea; got != 2100 {
		t.Errorf("restored, the area is %v", got)
	}
	key(f, fyne.KeyReturn)
	if all, err := f.s.Backups(); err != nil || len(all) != 2 {
		t.Errorf("%d backups, error %v", len(all), err)
	}
}

func TestClashIsShownAndDecided(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := f.open(t, "Steel").(*steel)
	other := colleague(t)
	must(t, other.Do("depth", func(a *hull.Asset) error {
		a.Zones[0].Depth = 4.5
		return nil
	}))
	enter(t, f, p.zones, 0, colOf(t, p.zones, "wetted_area_m2"), "1 900")
	wants(t, f, "Two versions of Tern Passage", "colleague stored a change on", "Vertical sides", "Wetted, m²", "Theirs", "Mine", "2100", "1900", "4.5")
	key(f, fyne.KeyEscape) // later
	if z := f.s.Asset().Zones[0]; z.Depth != 4.5 || z.WettedArea != 2100 {
		t.Errorf("theirs is not shown: %v m2, %v m", z.WettedArea, z.Depth)
	}
	f.pendingClash()
	key(f, fyne.KeyReturn) // theirs with mine
	if z := f.s.Asset().Zones[0]; z.Depth != 4.5 || z.WettedArea != 1900 || f.s.Drafts() != 0 {
		t.Errorf("both: %v m2, %v m, %d drafts", z.WettedArea, z.Depth, f.s.Drafts())
	}
	f.pendingClash()
	wants(t, f, "Nothing to decide")
	key(f, fyne.KeyReturn)

	must(t, func() error { _, err := other.Notice(); return err }())
	must(t, other.Remove())
	enter(t, f, p.zones, 0, colOf(t, p.zones, "wetted_area_m2"), "1 800")
	wants(t, f, "took it out of the fleet")
	key(f, fyne.KeyReturn)
	if a := f.s.Asset(); a == nil || a.Zones[0].WettedArea != 1800 {
		t.Error("the asset is not brought back with my change")
	}
}

func TestOthersEditsAreNoticedButNotWhileTyping(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := f.open(t, "Steel").(*steel)
	other := colleague(t)
	setArea(t, other, 1900)
	p.zones.Edit(0, colOf(t, p.zones, "depth_m"))
	f.notice()
	if got := f.s.Asset().Zones[0].WettedArea; got != 2100 {
		t.Errorf("while typing, the area became %v", got)
	}
	p.zones.CancelEdit()
	f.focusPage()
	f.notice()
	if got := f.s.Asset().Zones[0].WettedArea; got != 1900 {
		t.Errorf("the area is %v", got)
	}
	must(t, os.Remove(register))
	f.notice() // whatever the database makes of it, there is no panic
}

func TestWatchingLeavesNoGoroutine(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	settle(f)
	before := runtime.NumGoroutine()
	for range 20 {
		f.watch()
		f.watch() // a second is none
		f.Close()
	}
	for wait := 0; runtime.NumGoroutine() > before && wait < 200; wait++ {
		time.Sleep(5 * time.Millisecond)
	}
	if n := runtime.NumGoroutine(); n > before {
		t.Errorf("%d goroutines, %d before", n, before)
	}
	f.Close() // twice does nothing
}

func TestFleetOutAndIn(t *testing.T) {
	f := shown(t, look.Light, 1, small, fleet()...)
	n := len(f.s.Fleet())
	f.exportFleet()
	path := filepath.Join(t.TempDir(), "all")
	typed(f, path)
	key(f, fyne.KeyReturn)
	wants(t, f, "Written: ", "all.zip")
	key(f, fyne.KeyReturn)
	f.importFile(path + ".zip") // dropped on the window
	got := f.s.Fleet()
	if len(got) != 2*n || !got[n].Open {
		t.Fatalf("%d assets of %d, or the first is not open", len(got), 2*n)
	}
	for i := range n {
		if got[i].Asset.Name != got[n+i].Asset.Name {
			t.Errorf("%s came back as %s", got[i].Asset.Name, got[n+i].Asset.Name)
		}
	}
	must(t, os.WriteFile(path+".zip", []byte("PK\x03\x04"), 0o644))
	f.importFile(path + ".zip")
	wants(t, f, "the fleet file is damaged or cut off")
}

func TestFontHasEveryRuneOfTheRegistersDialogs(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	f.backupDaily()
	other := colleague(t)
	setArea(t, other, 1900)
	f.report(f.s.Do("area", func(a *hull.Asset) error {
		a.Zones[0].WettedArea = 1800
		return nil
	}))
	clash := f.s.Clash()
	if clash == nil {
		t.Fatal("no clash")
	}
	removed := *clash
	removed.Removed = true
	key(f, fyne.KeyEscape)
	for name, show := range map[string]func(){
		"history": f.history, "backups": f.restoreBackup, "clash": f.pendingClash, "export": f.exportFleet,
		"removed": func() { f.showClash(&removed) },
	} {
		show()
		if missing := look.MissingRunes(strings.Join(texts(f), "")); len(missing) > 0 {
			t.Errorf("%s: the font lacks %q", name, string(missing))
		}
		if dialogs := f.win.Canvas().Overlays().List(); len(dialogs) != 1 {
			t.Fatalf("%s: %d dialogs are open", name, len(dialogs))
		}
		if key(f, fyne.KeyEscape); f.win.Canvas().Overlays().Top() != nil {
			t.Fatalf("%s: Escape does not close it", name)
		}
	}
}

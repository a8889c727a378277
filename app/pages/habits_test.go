package pages

import (
	"errors"
	"io/fs"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/test"

	"anodewright/app/look"
	"anodewright/app/session"
)

// menuItem finds a menu's item by its label, below sub-menus too.
func menuItem(t *testing.T, f *Frame, label string) *fyne.MenuItem {
	t.Helper()
	var find func(items []*fyne.MenuItem) *fyne.MenuItem
	find = func(items []*fyne.MenuItem) *fyne.MenuItem {
		for _, m := range items {
			if m.Label == label {
				return m
			}
			if m.ChildMenu != nil {
				if found := find(m.ChildMenu.Items); found != nil {
					return found
				}
			}
		}
		return nil
	}
	for _, m := range f.win.MainMenu().Items {
		if found := find(m.Items); found != nil {
			return found
		}
	}
	t.Fatalf("no menu item %q", label)
	return nil
}

func TestWelcomeBegins(t *testing.T) {
	f := shown(t, look.Light, 1, small)
	wants(t, f, "Welcome", "Open the demo fleet", "New asset…", "Import…")
	for _, o := range everything(f) {
		if b, ok := o.(*look.PushButton); ok && b.Text == "Open the demo fleet" {
			b.OnTapped()
		}
	}
	settle(f)
	if n := len(f.s.Fleet()); n != 5 {
		t.Errorf("%d assets after the demo fleet was opened", n)
	}
}

// No two commands may have one key.
func TestMenuKeysDiffer(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	seen := map[string]string{}
	for _, m := range f.win.MainMenu().Items {
		for _, item := range m.Items {
			if item.Shortcut == nil {
				continue
			}
			name := item.Shortcut.ShortcutName()
			if other, taken := seen[name]; taken {
				t.Errorf("%s is the key of %q and of %q", name, other, item.Label)
			}
			seen[name] = item.Label
		}
	}
	if len(seen) < 18 {
		t.Errorf("only %d commands have a key", len(seen))
	}
}

func TestEveryPageHasItsHelp(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	for _, p := range f.pages {
		f.open(t, p.title())
		f.windowKey(fyne.KeyF1)
		dialogs := f.win.Canvas().Overlays().List()
		if len(dialogs) != 1 {
			t.Fatalf("%s: %d dialogs", p.title(), len(dialogs))
		}
		if name := helpName(p); name != "general" {
			title, lines := helpLines(helpText(name))
			if title == "" || len(lines) < 5 {
				t.Errorf("%s: help of %d lines", p.title(), len(lines))
			}
			wants(t, f, title, "What it does:", "Where the figures come from")
		}
		key(f, fyne.KeyEscape)
	}
	err := fs.WalkDir(helpFiles, "help", func(path string, d fs.DirEntry, err error) error {
		if err != nil || d.IsDir() {
			return err
		}
		text, err := helpFiles.ReadFile(path)
		if missing := look.MissingRunes(string(text)); len(missing) > 0 {
			t.Errorf("%s: the font lacks %q", path, string(missing))
		}
		return err
	})
	must(t, err)
}

func TestPastedBlockIsOneUndo(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := f.open(t, "Steel").(*steel)
	p.zones.Select(0, 0)
	before := f.s.Asset()
	f.app.Clipboard().SetContent("Sides\tvertical-side\nScrew\tpropeller\nNew one\tflat-bottom\n")
	p.zones.TypedShortcut(&fyne.ShortcutPaste{Clipboard: f.app.Clipboard()})
	settle(f)
	if a := f.s.Asset(); len(a.Zones) != 3 || a.Zones[0].Name != "Sides" || a.Zones[2].Name != "New one" {
		t.Fatalf("%d zones, the first %q", len(a.Zones), a.Zones[0].Name)
	}
	f.undo.Action()
	settle(f)
	if a := f.s.Asset(); len(a.Zones) != len(before.Zones) || a.Zones[0].Name != before.Zones[0].Name {
		t.Errorf("one undo leaves %d zones, the first %q", len(a.Zones), a.Zones[0].Name)
	}
}

func TestZoneCommandsOfTheMenu(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	f.open(t, "Order")
	first := f.s.Asset().Zones[0].Name
	menuItem(t, f, "Move the zone down").Action()
	settle(f)
	if f.s.Asset().Zones[1].Name != first {
		t.Errorf("the second zone is %q", f.s.Asset().Zones[1].Name)
	}
	p, ok := f.pages[f.current].(*steel)
	if !ok {
		t.Fatal("the zones are not shown")
	}
	if row, _ := p.zones.Selected(); row != 1 {
		t.Errorf("row %d is selected", row)
	}
	menuItem(t, f, "Duplicate the zone").Action()
	settle(f)
	if n := len(f.s.Asset().Zones); n != 3 {
		t.Errorf("%d zones", n)
	}
}

func TestTableIsCopiedWhole(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	f.open(t, "Steel")
	menuItem(t, f, "Copy the whole table").Action()
	text := f.app.Clipboard().Content()
	if lines := strings.Split(strings.TrimSpace(text), "\n"); len(lines) != 3 || !strings.Contains(lines[0], "Wetted [m²]") || !strings.Contains(lines[1], "\t2100\t") {
		t.Errorf("copied %q", text)
	}
}

func TestColumnsAreRemembered(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := f.open(t, "Steel").(*steel)
	p.zones.Select(0, 1)
	p.zones.TypedShortcut(&desktop.CustomShortcut{KeyName: fyne.KeyRight, Modifier: fyne.KeyModifierAlt})
	kept := p.zones.Widths()
	if kept == "" {
		t.Fatal("Alt+Right widens no column")
	}
	f.rebuild()
	p = f.pages[0].(*steel)
	if got := p.zones.Widths(); got != kept {
		t.Errorf("a new window has %q, want %q", got, kept)
	}
	menuItem(t, f, "Columns as wide as they were made").Action()
	if p.zones.Widths() != "" || f.s.Setting("columns of zones") != "" {
		t.Error("the columns are not as they were made")
	}
}

func TestFleetIsSorted(t *testing.T) {
	f := shown(t, look.Light, 1, small, fleet()...)
	order := func() string {
		var names []string
		for _, item := range f.fleet.sort.in(f.s.Fleet()) {
			names = append(names, item.Asset.Name)
		}
		return strings.Join(names, ", ")
	}
	by := func(s fleetSort, value func(item session.Summary) int) {
		f.fleet.sortBy(s)
		last := -1 << 30
		for _, item := range f.fleet.sort.in(f.s.Fleet()) {
			if v := value(item); v < last {
				t.Errorf("%s: %s comes too late in %s", s, item.Asset.Name, order())
			} else {
				last = v
			}
		}
	}
	by(byDocking, func(item session.Summary) int { return int(item.Outlook.Docking) })
	by(byOrder, func(item session.Summary) int { return int(item.Outlook.OrderBy) })
	by(byState, func(item session.Summary) int { return -item.Outlook.State.Rank() })
	if f.s.Setting("fleet sort") != string(byState) {
		t.Errorf("kept is %q", f.s.Setting("fleet sort"))
	}
	f.fleet.sorted.MouseDown(nil)
	if f.fleet.sort != byOrder {
		t.Errorf("pressed, it is sorted %s", f.fleet.sort)
	}
}

func TestSelectionFollowsOnAnodesAndReadings(t *testing.T) {
	f := shown(t, look.Light, 1, roomy, fleet()[1])
	a := f.s.Asset()
	read := map[string]bool{}
	for _, r := range a.Readings {
		read[r.Zone] = true
	}
	zone := -1
	for i, z := range a.Zones {
		if read[z.ID] && len(z.Fitted) > 0 {
			zone = i // the last
		}
	}
	if zone < 1 {
		t.Skip("no zone with readings but the first")
	}
	anodes := f.open(t, "Anodes").(*anodesPage)
	press(t, f, zone)
	if set, ok := anodes.fitted.selected(); !ok || set.zone != zone {
		t.Errorf("Anodes is at zone %d, want %d", set.zone, zone)
	}
	readings := f.open(t, "Readings").(*readingsPage)
	if row, _ := readings.list.Selected(); row < 0 || a.Readings[row].Zone != a.Zones[zone].ID {
		t.Errorf("Readings is at row %d", row)
	}
	readings.list.Select(0, 0)
	readings.list.OnSelect(0, 0)
	if want := a.Readings[0].Zone; a.Zones[f.zone].ID != want {
		t.Errorf("selecting a reading selects %q, want %q", a.Zones[f.zone].ID, want)
	}
}

func TestDayFiguresFollowTheCursor(t *testing.T) {
	f := shown(t, look.Light, 1, roomy, fleet()[1])
	p := f.open(t, "Steel").(*steel)
	p.tabs.buttons[1].OnTapped()
	wants(t, f, "1 Dec 2026: ")
	was := p.day.cells
	f.band.strip.TypedKey(&fyne.KeyEvent{Name: fyne.KeyEnd})
	wants(t, f, session.Day(f.s.Asset().Horizon)+": ")
	same := len(was) == len(p.day.cells)
	for i := range min(len(was), len(p.day.cells)) {
		same = same && was[i][1] == p.day.cells[i][1]
	}
	if same {
		t.Error("the figures stay as they were")
	}
	anodes := f.open(t, "Anodes").(*anodesPage)
	wants(t, f, "as it is on "+session.Day(f.cursor))
	end := anodes.fitted.Cell(0, fittedDay).Text
	f.band.strip.TypedKey(&fyne.KeyEvent{Name: fyne.KeyHome})
	if start := anodes.fitted.Cell(0, fittedDay).Text; start == end {
		t.Errorf("wasted %s %% at both ends of the time", start)
	}
}

func TestRecentRegisters(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	other := filepath.Join(t.TempDir(), "other.anodewright")
	must(t, os.WriteFile(other, []byte("x"), 0o600))
	f.Opened(other)
	f.Opened(register)
	var asked string
	f.OpenRegister = func(path string) error { asked = path; return nil }
	menuItem(t, f, other).Action()
	if asked != other {
		t.Errorf("opened %q", asked)
	}
	must(t, os.Remove(other))
	f.Opened(register)
	menuItem(t, f, "none yet")
	f.OpenRegister = func(string) error { return errors.New("no second window here") }
	f.report(f.openRegister("x"))
	wants(t, f, "no second window here")
}

func TestSlowWorkShowsThatItGoesOn(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	test.TempWidgetRenderer(t, f.fleet.search) // the window is drawn
	stopped := false
	d := f.showProgress("Importing fleet.zip", func() { stopped = true })
	wants(t, f, "Importing fleet.zip", "Cancel")
	key(f, fyne.KeyEscape)
	if !stopped || f.win.Canvas().Overlays().Top() != nil {
		t.Errorf("Escape: stopped %v", stopped)
	}
	_ = d
	testOnlyInline = false
	defer func() { testOnlyInline = true }()
	result := make(chan error, 1)
	f.work("short", func(func() bool) error { return errors.New("so it ended") }, func(err error) { result <- err })
	select {
	case err := <-result:
		if err == nil || err.Error() != "so it ended" {
			t.Errorf("ended with %v", err)
		}
	case <-time.After(10 * time.Second):
		t.Error("work never ended")
	}
}

func TestCrashIsTold(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	f.TellOfCrashes(nil)
	if f.win.Canvas().Overlays().Top() != nil {
		t.Error("told of no crash")
	}
	f.TellOfCrashes([]string{"reports/crash 1.txt"})
	wants(t, f, "reports/crash 1.txt", "sent to nobody")
}

// The keys of the window work wherever the keyboard is.
func TestFunctionKeysReachTheWindow(t *testing.T) {
	f := shown(t, look.Light, 1, small, fleet()...)
	p := f.open(t, "Forecast").(*forecastPage)
	steel := f.pages[0].(*steel)
	for name, give := range map[string]func() fyne.Focusable{
		"check":  func() fyne.Focusable { return p.circuit },
		"zones":  func() fyne.Focusable { return p.zone.list },
		"search": func() fyne.Focusable { return f.fleet.search },
		"strip":  func() fyne.Focusable { return f.band.strip },
		"chart":  func() fyne.Focusable { return p.charts[1] },
		"editor": func() fyne.Focusable {
			f.open(t, "Steel")
			steel.zones.Edit(0, 0)
			return nil
		},
	} {
		if o := give(); o != nil {
			f.open(t, "Forecast")
			f.win.Canvas().Focus(o)
		}
		was := f.rail.open
		key(f, fyne.KeyF9)
		if f.rail.open == was {
			t.Errorf("%s: F9 does nothing", name)
		}
	}
}

package pages

import (
	"path/filepath"
	"strings"
	"testing"

	"fyne.io/fyne/v2"

	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/session"
)

// The plan of the test asset: 2100 m² of sides with a propeller of 19 m² hung
// on them, 24 pieces of 45 kg; 14 are added at the first docking because of
// the final current, and the order is out ten weeks before it.

func TestSteelShowsDemandAndState(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	f.open(t, "Steel")
	wants(t, f, "Tern Passage", "next docking 15 Mar 2027 · order by 4 Jan 2027 · in 34 days",
		"Vertical sides", "2\u00a0100", "Propeller and shaft", "copper alloy",
		"Current demand: Vertical sides", "12.3 / 9.90 / 17.7", "15.6 / 10.3 / 16.7", "25.6 / 19.1 / 32.9", "densities: offshore code")
	p := f.pages[0].(*steel)
	p.zones.Select(1, 0)
	f.Update()
	wants(t, f, "Current demand: Propeller and shaft", "3.80 / 1.90 / 2.47")
}

func TestDockingsShowActionAndReasons(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := f.open(t, "Dockings").(*dockings)
	wants(t, f, "24 × 45 kg", "add 14 × 45 kg", "final current", "10\u00a0080 EUR · proven cheapest", "held by", "2027-03-15", "side touch-up 50 %")
	if row, col := p.plan.Selected(); row != 0 || col != 2 {
		t.Errorf("opening the page selects %d, %d and not the first action", row, col)
	}
	wants(t, f, "Why 14?", "in steps of 2", "renew all at every docking: 32\u00a0920 EUR", "as late as possible: 19\u00a0440 EUR")
	p.plan.Select(0, 0)
	f.Update()
	wants(t, f, "Why this count?", "Select an action in the table")
}

func TestOrderShowsWhatToBuyAndByWhen(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	f.open(t, "Order")
	wants(t, f, "4 Jan 2027", "in 34 days", "15 Mar 2027", "Flush slab 45 kg", "aluminium", "14", "15", "675", "735", "4\u00a0650", "to buy 4\u00a0650 EUR", "Cautions")
	tap(t, f, "Cautions")
	wants(t, f, "Fit no anode where it disturbs the propeller's inflow.")
}

func TestTypingChangesDemandAndSchedule(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := f.open(t, "Steel").(*steel)
	before := f.s.Outcome()
	enter(t, f, p.zones, 0, colOf(t, p.zones, "wetted_area_m2"), "2 500")
	if got := f.s.Asset().Zones[0].WettedArea; got != 2500 {
		t.Fatalf("the area is %v", got)
	}
	if row, col := p.zones.Selected(); row != 1 || col != colOf(t, p.zones, "wetted_area_m2") {
		t.Errorf("after Enter %d, %d is selected", row, col)
	}
	after := f.s.Outcome()
	p.zones.Select(0, 0)
	f.Update()
	wants(t, f, "2\u00a0500", triple(after.Zones[0].Intervals[0].Demand))
	if b, a := before.Zones[0].Intervals[0].Demand.Mean, after.Zones[0].Intervals[0].Demand.Mean; a < 1.1*b {
		t.Errorf("2500 m² take %v A after %v A for 2100", a, b)
	}
	f.open(t, "Dockings")
	l, ok := after.Action(0, 0)
	if !ok || l.Count <= 14 {
		t.Fatalf("the plan adds %d", l.Count)
	}
	wants(t, f, string(l.Action)+" "+pieces(l.Count, l.Pattern))
}

func TestFaultShowsItsSentence(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := f.open(t, "Steel").(*steel)
	col, asset, outcome := colOf(t, p.zones, "wetted_area_m2"), f.s.Asset(), f.s.Outcome()
	enter(t, f, p.zones, 0, col, "-3")
	p.zones.Select(0, col)
	f.Update()
	wants(t, f, "-3", "⚠ Wetted: want a number from 0.001", "⚠ 1 field at fault, not in the plan")
	if f.s.Asset() != asset || f.s.Outcome() != outcome {
		t.Error("the faulty text entered the asset or the plan")
	}
	enter(t, f, p.zones, 0, col, "2100")
	wants(t, f, "✓ saved")
}

func TestDraftThatBecameRightIsTakenByEnter(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := f.open(t, "Steel").(*steel)
	wetted, bare := colOf(t, p.zones, "wetted_area_m2"), colOf(t, p.zones, "bare_area_m2")
	enter(t, f, p.zones, 0, bare, "2500")
	enter(t, f, p.zones, 0, wetted, "3000")
	p.zones.Select(0, bare)
	f.Update()
	wants(t, f, "press Enter here to use it")
	p.zones.Edit(0, bare)
	key(f, fyne.KeyReturn)
	settle(f)
	if got := f.s.Asset().Zones[0].BareArea; got != 2500 {
		t.Errorf("the bare area is %v", got)
	}
}

// TestEditStaysWithItsAsset opens another asset while a cell is being edited.
func TestEditStaysWithItsAsset(t *testing.T) {
	f := shown(t, look.Light, 1, small, fleet()...)
	first := f.s.Fleet()[0]
	f.s.Select(first.ID)
	p := f.open(t, "Steel").(*steel)
	second := f.s.Fleet()[1]
	p.zones.Edit(0, colOf(t, p.zones, "wetted_area_m2"))
	f.win.Canvas().Focused().(fyne.Shortcutable).TypedShortcut(&fyne.ShortcutSelectAll{})
	typed(f, "4321")
	f.fleet.shown[second.ID].MouseDown(nil)
	settle(f)
	list := f.s.Fleet()
	if a, b := list[0].Asset.Zones[0].WettedArea, list[1].Asset; a != 4321 || b != second.Asset || !list[1].Open {
		t.Errorf("the area went to %v in the first asset, the second one changed: %v", a, b != second.Asset)
	}
}

func TestKeyboardFollowsThePage(t *testing.T) {
	f := shown(t, look.Light, 1, small, fleet()...)
	for _, p := range f.pages {
		f.open(t, p.title())
		want, ok := p.(interface{ first() *grid.Grid })
		if focused := f.win.Canvas().Focused(); ok && focused != fyne.Focusable(want.first()) {
			t.Errorf("%s: the keyboard is with %T", p.title(), focused)
		}
	}
	steel := f.open(t, "Steel").(*steel)
	f.open(t, "Dockings")
	before := f.s.Asset()
	for _, r := range "77" {
		if o := f.win.Canvas().Focused(); o != nil {
			o.TypedRune(r)
		}
	}
	if steel.zones.Editing() || f.s.Asset() != before {
		t.Error("typing on Dockings edits Steel")
	}
}

func TestSelectionSurvivesRecalculation(t *testing.T) {
	f := shown(t, look.Light, 1, small, fleet()...)
	p := f.open(t, "Steel").(*steel)
	last := len(f.s.Asset().Zones) - 1
	col := colOf(t, p.zones, "depth_m")
	p.zones.Select(last, col)
	enter(t, f, p.zones, last, col, "4,25")
	if row, c := p.zones.Selected(); row != last || c != col {
		t.Errorf("selected %d, %d", row, c)
	}
	wants(t, f, "Current demand: "+f.s.Asset().Zones[last].Name)
	if f.win.Canvas().Focused() != fyne.Focusable(p.zones) {
		t.Error("the table lost the keyboard")
	}
}

func TestScrollStaysWhereItIs(t *testing.T) {
	f := shown(t, look.Light, 1, small, fleet()...)
	p := f.open(t, "Order").(*orderPage)
	s := p.list.scroll
	if s.Content.MinSize().Height < s.Size().Height+40 {
		t.Skip("the cautions fit without scrolling")
	}
	s.Offset.Y = 30
	s.Refresh()
	must(t, f.s.SetText(session.Zones, 0, session.ZoneColumns()[0], "Another name"))
	settle(f)
	if s.Offset.Y != 30 {
		t.Errorf("scrolled to %v", s.Offset.Y)
	}
}

func TestUndoGoesFirstToTheEntry(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := f.open(t, "Steel").(*steel)
	col := colOf(t, p.zones, "wetted_area_m2")
	enter(t, f, p.zones, 0, col, "3000")
	p.zones.Edit(0, col)
	typed(f, "9")
	f.undo.Action()
	if !p.zones.Editing() || f.s.Asset().Zones[0].WettedArea != 3000 {
		t.Errorf("undo was taken from the editor: editing %v, area %v", p.zones.Editing(), f.s.Asset().Zones[0].WettedArea)
	}
	key(f, fyne.KeyEscape)
	f.undo.Action()
	if got := f.s.Asset().Zones[0].WettedArea; got != 2100 {
		t.Errorf("after undo the area is %v", got)
	}
	f.redo.Action()
	if got := f.s.Asset().Zones[0].WettedArea; got != 3000 {
		t.Errorf("after redo the area is %v", got)
	}
}

func TestEmptyFleetSaysWhatToDo(t *testing.T) {
	f := shown(t, look.Light, 1, small)
	wants(t, f, "No asset yet.", "Open the demo fleet", "New asset…", "Import…")
	if !f.button.Disabled() {
		t.Error("there is a schedule to export")
	}
	f.exportWorkbook()
	f.exportAsset()
	f.removeAsset()
	if f.win.Canvas().Overlays().Top() != nil {
		t.Error("a dialog asks about an asset that is not there")
	}
}

func TestDialogsByKeyboard(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	c := f.win.Canvas()
	f.open(t, "Steel")
	top := func() bool { return c.Overlays().Top() != nil }

	f.exportAsset()
	entry, ok := c.Focused().(*formEntry)
	if !ok || entry.SelectedText() != entry.Text || !strings.HasSuffix(entry.Text, "Tern Passage.json") {
		t.Fatalf("the keyboard is with %T", c.Focused())
	}
	if key(f, fyne.KeyEscape); top() {
		t.Error("Escape does not close the dialog")
	}

	path := filepath.Join(t.TempDir(), "out") // the ending is added
	f.exportAsset()
	typed(f, path)
	key(f, fyne.KeyReturn)
	wants(t, f, "Written: ")
	if key(f, fyne.KeyReturn); top() {
		t.Error("Enter does not close what was said")
	}
	if got, err := readFile(path + ".json"); err != nil || !strings.Contains(got, `"name": "Tern Passage"`) {
		t.Errorf("the file: %v", err)
	}

	f.importAsset()
	typed(f, path+".json")
	if key(f, fyne.KeyReturn); top() || len(f.s.Fleet()) != 2 {
		t.Errorf("after the import: %d assets", len(f.s.Fleet()))
	}
	f.removeAsset()
	if key(f, fyne.KeyEscape); top() || len(f.s.Fleet()) != 2 {
		t.Error("Escape removed the asset")
	}
	f.removeAsset()
	if key(f, fyne.KeyReturn); top() || len(f.s.Fleet()) != 1 {
		t.Error("Enter did not remove the asset")
	}
}

func TestImportSaysWhatIsWrongAndWhere(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	f.importAsset()
	path, err := filepath.Abs(filepath.Join("..", "..", "testdata", "hostile", "area-negative.json"))
	must(t, err)
	typed(f, path)
	key(f, fyne.KeyReturn)
	wants(t, f, "zones[0].wetted_area_m2: want a number from 0.001")
	if len(f.s.Fleet()) != 1 {
		t.Error("the broken file got in")
	}
}

func TestMenuTicksWhatIsInForce(t *testing.T) {
	f := shown(t, look.Dark, 1.25, small, tern(t))
	var ticked []string
	for _, m := range f.win.MainMenu().Items {
		for _, item := range m.Items {
			if item.Checked {
				ticked = append(ticked, item.Label)
			}
		}
	}
	if got := strings.Join(ticked, ", "); !strings.HasPrefix(got, "Dark, Text size 1.25") {
		t.Errorf("ticked: %s", got)
	}
}

package pages

import (
	"strconv"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"

	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
)

func (f *Frame) menu() *fyne.MainMenu {
	item := func(label string, key fyne.KeyName, mod fyne.KeyModifier, do func()) *fyne.MenuItem {
		m := fyne.NewMenuItem(label, func() {
			if f.win.Canvas().Overlays().Top() != nil && label != say.T("Quit") {
				return // a dialog asks something first
			}
			grid.CommitOpen()
			do()
		})
		if key != "" {
			m.Shortcut = &desktop.CustomShortcut{KeyName: key, Modifier: mod}
		}
		return m
	}
	ctrl := fyne.KeyModifierControl
	quit := item(say.T("Quit"), fyne.KeyQ, ctrl, func() { f.Quit() })
	quit.IsQuit = true
	f.undo = f.undoItem(say.T("Undo"), &fyne.ShortcutUndo{}, func() { f.report(f.s.Undo()) })
	f.redo = f.undoItem(say.T("Redo"), &fyne.ShortcutRedo{}, func() { f.report(f.s.Redo()) })
	view := []*fyne.MenuItem{}
	for i, p := range f.pages {
		view = append(view, item(p.title(), fyne.KeyName(strconv.Itoa(i+1)), ctrl, func() { f.show(i) }))
	}
	view = append(view, fyne.NewMenuItemSeparator())
	for _, m := range lookModes() {
		view = append(view, f.lookItem(item(say.T(m.label), "", 0, func() { f.setLook(m.mode, f.scale) }), func() bool { return f.mode == m.mode }))
	}
	view = append(view, fyne.NewMenuItemSeparator())
	for _, x := range textScales {
		view = append(view, f.lookItem(item(say.T("Text size %s", scaleText(x)), "", 0, func() { f.setLook(f.mode, x) }), func() bool { return f.scale == x }))
	}
	fold := f.lookItem(fyne.NewMenuItem(say.T("Picture and dates"), f.toggleBand), f.band.isOpen)
	// Fyne shows a key without a modifier but leaves it to the window.
	fold.Shortcut = &desktop.CustomShortcut{KeyName: fyne.KeyF8}
	lower := f.lookItem(fyne.NewMenuItem(say.T("Lower part of the page"), f.toggleLower), f.lowerIsOpen)
	lower.Shortcut = &desktop.CustomShortcut{KeyName: fyne.KeyF7}
	side := f.lookItem(fyne.NewMenuItem(say.T("Fleet list"), f.rail.toggle), f.rail.isOpen)
	side.Shortcut = &desktop.CustomShortcut{KeyName: fyne.KeyF9}
	view = append(view, fyne.NewMenuItemSeparator(), fold, lower, side, f.sortItem(),
		item(say.T("Columns as wide as they were made"), "", 0, f.resetColumns))
	help := fyne.NewMenuItem(say.T("About this page"), f.helpAbout)
	help.Shortcut = &desktop.CustomShortcut{KeyName: fyne.KeyF1}
	zones := f.zoneItems(item)
	closes := fyne.NewMenuItem(say.T("Close the docking…"), f.closeDocking)
	closes.Shortcut = &desktop.CustomShortcut{KeyName: fyne.KeyF4}
	return fyne.NewMainMenu(
		fyne.NewMenu(say.T("Register"),
			item(say.T("New asset…"), fyne.KeyN, ctrl, f.newAsset),
			item(say.T("Import asset file or fleet…"), fyne.KeyO, ctrl, f.importAsset),
			item(say.T("Take in a survey…"), fyne.KeyT, ctrl, f.importSurvey),
			item(say.T("Open the demo fleet"), "", 0, f.addDemo),
			fyne.NewMenuItemSeparator(),
			item(say.T("Open a register…"), fyne.KeyO, ctrl|fyne.KeyModifierShift, f.chooseRegister),
			f.recentItem(),
			fyne.NewMenuItemSeparator(),
			item(say.T("History of this asset…"), fyne.KeyH, ctrl, f.history),
			item(say.T("Remove this asset…"), "", 0, f.removeAsset),
			fyne.NewMenuItemSeparator(),
			item(say.T("Two versions of an asset…"), "", 0, f.pendingClash),
			item(say.T("Restore a backup…"), "", 0, f.restoreBackup),
			fyne.NewMenuItemSeparator(),
			item(say.T("Settings…"), fyne.KeyComma, ctrl, f.settings),
			fyne.NewMenuItemSeparator(), quit),
		fyne.NewMenu(say.T("Edit"), append([]*fyne.MenuItem{f.undo, f.redo, fyne.NewMenuItemSeparator(),
			item(say.T("Copy the whole table"), fyne.KeyC, ctrl|fyne.KeyModifierShift, f.copyTable), closes,
			item(say.T("Limits at each docking…"), "", 0, f.askLimits),
			fyne.NewMenuItemSeparator()}, zones...)...),
		fyne.NewMenu(say.T("View"), view...),
		fyne.NewMenu(say.T("Export"),
			item(say.T("Schedule as Excel workbook…"), fyne.KeyE, ctrl, f.exportWorkbook),
			item(say.T("Survey sheet…"), fyne.KeyE, ctrl|fyne.KeyModifierShift, f.exportSurvey),
			item(say.T("Asset file…"), fyne.KeyS, ctrl|fyne.KeyModifierShift, f.exportAsset),
			item(say.T("Fleet as zip of asset files…"), "", 0, f.exportFleet)),
		fyne.NewMenu(say.T("Help"), help,
			item(say.T("The window and its keys"), fyne.KeyF1, fyne.KeyModifierShift, func() { f.showHelp("general") }), item(say.T("About and cautions"), fyne.KeyF1, ctrl, f.about)),
	)
}

// textScales are the sizes of text that can be chosen.
var textScales = []float32{1, 1.25, 1.5}

type lookMode struct {
	label string // to be said
	mode  look.Mode
}

func lookModes() []lookMode {
	return []lookMode{{say.Mark("Light"), look.Light}, {say.Mark("Dark"), look.Dark}, {say.Mark("As the system"), look.System}}
}

// undoItem is the menu's undo or redo. A menu's shortcut comes before the
// object with the keyboard, so an entry in which something is being typed is
// offered it first.
func (f *Frame) undoItem(label string, keys fyne.Shortcut, do func()) *fyne.MenuItem {
	m := fyne.NewMenuItem(label, func() {
		focused := f.win.Canvas().Focused()
		if _, isGrid := focused.(*grid.Grid); !isGrid {
			if typed, ok := focused.(fyne.Shortcutable); ok {
				typed.TypedShortcut(keys)
				return
			}
		}
		if f.win.Canvas().Overlays().Top() == nil {
			do()
		}
	})
	m.Shortcut = keys // by its own name: Fyne does not tell of Ctrl+Z otherwise
	return m
}

// lookItem is an item of the menu View that is ticked while its choice is on.
func (f *Frame) lookItem(m *fyne.MenuItem, on func() bool) *fyne.MenuItem {
	f.ticks = append(f.ticks, func() bool {
		was := m.Checked
		m.Checked = on()
		return m.Checked != was
	})
	return m
}

// updateMenu names in the menu what undo and redo would do, and ticks the
// theme and the text size in force.
func (f *Frame) updateMenu() {
	undo, redo := f.s.CanUndo()
	name := func(m *fyne.MenuItem, word, what string) bool {
		label := word
		if what != "" {
			label += " " + say.Sentence(what)
		}
		changed := m.Label != label
		m.Label, m.Disabled = label, what == ""
		return changed
	}
	a, b := name(f.undo, say.T("Undo"), undo), name(f.redo, say.T("Redo"), redo)
	changed := a || b
	for _, tick := range f.ticks {
		changed = tick() || changed
	}
	if changed && f.win.MainMenu() != nil {
		f.win.MainMenu().Refresh()
	}
}

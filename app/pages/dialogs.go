package pages

import (
	"errors"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"sync/atomic"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/dialog"
	"fyne.io/fyne/v2/storage"
	"fyne.io/fyne/v2/widget"

	"anodewright/anodes/plan"
	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
	"anodewright/storage/workbook"
)

// report shows an error in a dialog; nil is nothing to report.
func (f *Frame) report(err error) {
	if err == nil {
		return
	}
	var clash *session.Clash
	if errors.As(err, &clash) {
		if pending := f.s.Clash(); pending != nil {
			f.showClash(pending)
			return
		}
	}
	f.tell(say.T("This could not be done"), inWords(err))
}

// tell shows a text in a dialog.
func (f *Frame) tell(title, text string) {
	height := float32(190)
	if len(text) > 400 {
		height = 520
	}
	f.showLines(title, []fyne.CanvasObject{look.Body(text)}, height)
}

// read shows a longer text in a dialog.
func (f *Frame) read(title string, lines []fyne.CanvasObject) { f.showLines(title, lines, 600) }

// showLines shows texts in a dialog. Enter, Space and Escape close it.
func (f *Frame) showLines(title string, lines []fyne.CanvasObject, height float32) {
	body := newScrolled()
	body.set(lines...)
	d := dialog.NewCustomWithoutButtons(title, body.scroll, f.win)
	closes := look.AccentButton(say.T("Close"), func() { f.hide(d) })
	closes.OnEscape = closes.OnTapped
	d.SetButtons([]fyne.CanvasObject{closes})
	d.Resize(dialogSize(f.win, 620, height))
	d.Show()
	body.set(lines...) // now that it knows its width
	f.win.Canvas().Focus(closes)
}

// hide closes a dialog and gives the keyboard back to the page, if no other
// dialog is open.
func (f *Frame) hide(d *dialog.CustomDialog) {
	d.Hide()
	if c := f.win.Canvas(); c.Overlays().Top() == nil && c.Focused() == nil {
		f.focusPage()
	}
}

// confirm asks before something is done; Enter does it, Escape does not.
func (f *Frame) confirm(title, text, button string, do func()) {
	d := dialog.NewCustomWithoutButtons(title, look.Body(text), f.win)
	cancel := look.Button(say.T("Cancel"), func() { f.hide(d) })
	act := look.AccentButton(button, func() {
		f.hide(d)
		do()
	})
	cancel.OnEscape, act.OnEscape = cancel.OnTapped, cancel.OnTapped
	d.SetButtons([]fyne.CanvasObject{cancel, act})
	d.Resize(dialogSize(f.win, 520, 170))
	d.Show()
	f.win.Canvas().Focus(act)
}

// ask shows a form of one line, with all its text selected, and does something
// with its text. Enter does it and then says what was done, if there is
// something to be said; Escape does not.
func (f *Frame) ask(title, label, text, button string, browse func(*widget.Entry), do func(string) (said string, err error)) {
	now := func(do func()) { do() }
	f.askFor(title, label, text, button, browse, now, now, func(text string, _ func() bool) (string, error) { return do(text) })
}

// askSlow is ask for what may take long: it is done beside the window, must
// touch nothing of it, and is told when a person has stopped it.
func (f *Frame) askSlow(title, label, text, button string, browse func(*widget.Entry), do func(text string, stopped func() bool) (said string, err error)) {
	f.askFor(title, label, text, button, browse, aside, fyne.Do, do)
}

// askFor asks; run does what was asked for, and back comes from there to the
// window's own goroutine.
func (f *Frame) askFor(title, label, text, button string, browse func(*widget.Entry), run, back func(func()), do func(string, func() bool) (string, error)) {
	var d *dialog.CustomDialog
	var stop atomic.Bool
	entry := &formEntry{escape: func() { stop.Store(true); f.hide(d) }}
	entry.ExtendBaseWidget(entry)
	entry.SetText(text)
	wrong := look.Wrong("")
	line := fyne.CanvasObject(entry)
	if browse != nil {
		line = container.NewBorder(nil, nil, nil, look.Button(say.T("Browse…"), func() { browse(&entry.Entry) }), entry)
	}
	below := newScrolled()
	var ok *look.PushButton
	busy := false
	done := func(said string, err error) {
		busy = false
		ok.Enable()
		switch {
		case stop.Load(): // the dialog is gone
		case err != nil:
			wrong.SetText(inWords(err))
			below.set(wrong)
		default:
			f.hide(d) // and with it whatever lies above
			if said != "" {
				f.tell(say.T("Done"), said)
			}
		}
	}
	act := func() {
		if busy {
			return
		}
		busy = true
		ok.Disable()
		typed := strings.TrimSpace(entry.Text)
		run(func() {
			said, err := do(typed, stop.Load)
			back(func() { done(said, err) })
		})
		if busy {
			below.set(look.Note(say.T("Working; Cancel stops it.")), widget.NewProgressBarInfinite())
		}
	}
	entry.OnSubmitted = func(string) { act() }
	d = dialog.NewCustomWithoutButtons(title, container.NewBorder(container.NewVBox(look.Plain(label), line), nil, nil, nil, below.scroll), f.win)
	cancel := look.Button(say.T("Cancel"), func() { stop.Store(true); f.hide(d) })
	ok = look.AccentButton(button, act)
	cancel.OnEscape, ok.OnEscape = cancel.OnTapped, cancel.OnTapped
	d.SetButtons([]fyne.CanvasObject{cancel, ok})
	d.Resize(dialogSize(f.win, 700, 250))
	d.Show()
	below.set(wrong)
	f.win.Canvas().Focus(entry)
	entry.CursorColumn = len([]rune(text))
	entry.TypedShortcut(&fyne.ShortcutSelectAll{})
}

// inWords says an error to the user.
func inWords(err error) string { return say.Sentence(short(err).Error()) }

// short is an error whose list of faults is cut to a dozen.
func short(err error) error {
	var faults hull.Faults
	if errors.As(err, &faults) && len(faults) > 12 {
		return append(faults[:12:12], hull.Fault{Want: "the other faults put right too"})
	}
	return err
}

// addDemo adds the demo fleet.
func (f *Frame) addDemo() { f.report(session.AddDemo(f.s)) }

func (f *Frame) removeAsset() {
	a := f.s.Asset()
	if a == nil {
		return
	}
	f.confirm(say.T("Remove %s?", a.Name), say.T("It leaves the fleet. Its history stays in the register."), say.T("Remove"), func() { f.report(f.s.Remove()) })
}

// folder returns the folder of the last export or import.
func (f *Frame) folder() string {
	if dir := f.s.Setting("folder"); dir != "" {
		if info, err := os.Stat(dir); err == nil && info.IsDir() {
			return dir
		}
	}
	home, _ := os.UserHomeDir()
	return home
}

func (f *Frame) importAsset() {
	browse := func(e *widget.Entry) {
		d := dialog.NewFileOpen(func(r fyne.URIReadCloser, err error) {
			if r != nil {
				e.SetText(r.URI().Path())
				r.Close()
			}
		}, f.win)
		d.SetFilter(storage.NewExtensionFileFilter([]string{".json", ".zip"}))
		d.Resize(f.win.Canvas().Size())
		d.Show()
	}
	f.askSlow(say.T("Import an asset file or a fleet"), say.T("Asset file (JSON) or fleet (zip of them); a name alone is looked for in the folder shown"), f.folder()+string(filepath.Separator), say.T("Import"), browse, func(path string, stopped func() bool) (string, error) {
		return "", f.readAsset(path, stopped)
	})
}

// readAsset imports an asset file or a fleet. It touches nothing of the window.
func (f *Frame) readAsset(path string, stopped func() bool) error {
	if !filepath.IsAbs(path) {
		path = filepath.Join(f.folder(), path)
	}
	if isFleet(path) {
		return f.readFleet(path, stopped)
	}
	a, err := assetfile.Read(path)
	if err != nil {
		return err
	}
	f.s.SetSetting("folder", filepath.Dir(path))
	return f.s.Add(a, "imported from "+filepath.Base(path))
}

// importFile imports a file dropped on the window: a survey, a trading pattern
// or an asset.
func (f *Frame) importFile(path string) {
	grid.CommitOpen()
	if isSurvey(path) {
		f.report(f.readSurvey(path))
		return
	}
	if isTrade(path) {
		f.report(f.readTrade(path))
		return
	}
	f.work(say.T("Importing %s", filepath.Base(path)), func(stopped func() bool) error { return f.readAsset(path, stopped) }, f.report)
}

// export asks for a path and writes there.
func (f *Frame) export(title, name string, write func(path string) error) {
	ext := filepath.Ext(name)
	f.exportAs(title, strings.TrimSuffix(name, ext), []string{ext}, write)
}

// exportAs asks for a path with one of several endings and writes there; a path
// with none of them gets the first.
func (f *Frame) exportAs(title, name string, endings []string, write func(path string) error) {
	grid.CommitOpen()
	a := f.s.Asset()
	if a == nil {
		return
	}
	browse := func(e *widget.Entry) {
		d := dialog.NewFolderOpen(func(l fyne.ListableURI, err error) {
			if l != nil {
				e.SetText(filepath.Join(l.Path(), filepath.Base(e.Text)))
			}
		}, f.win)
		d.Resize(f.win.Canvas().Size())
		d.Show()
	}
	label := say.T("File to write; one that is there is replaced")
	if n := f.s.Drafts(); n > 0 {
		label += say.T(". ⚠ %d fields at fault are not in it", n)
	}
	f.askSlow(title, label, filepath.Join(f.folder(), name+endings[0]), say.T("Write"), browse, func(path string, _ func() bool) (string, error) {
		if !filepath.IsAbs(path) {
			path = filepath.Join(f.folder(), path)
		}
		if !slices.Contains(endings, strings.ToLower(filepath.Ext(path))) {
			path += endings[0]
		}
		if err := write(path); err != nil {
			return "", err
		}
		f.s.SetSetting("folder", filepath.Dir(path))
		return say.T("Written: %s", path), nil
	})
}

func (f *Frame) exportWorkbook() {
	a := f.s.Asset()
	if a == nil {
		return
	}
	f.export(say.T("Export the schedule as an Excel workbook"), fileName(say.T("%s anode schedule", a.Name))+".xlsx", func(path string) error {
		f.s.Wait() // the figures of the last edit
		var options []workbook.Option
		if history, err := f.s.History(); err == nil && len(history) > 0 {
			options = append(options, workbook.Revision(history[0].Rev))
		}
		return workbook.Write(path, f.s.Outcome(), options...)
	})
}

func (f *Frame) exportAsset() {
	a := f.s.Asset()
	if a == nil {
		return
	}
	f.export(say.T("Export the asset file"), fileName(a.Name)+".json", func(path string) error { return assetfile.Write(path, f.s.Asset()) })
}

// fileName makes a file's name, without its ending, of an asset's.
func fileName(name string) string { return assetfile.FileName(name) }

// keys are the keys that the menus and tables hear.
func keys() string {
	return say.T(`Keys:
• Ctrl+1, Ctrl+2 and so on open a page; Ctrl+N makes an asset, Ctrl+O imports one, Ctrl+E exports the schedule.
• Ctrl+Z takes the last edit back, Ctrl+Y does it again; both survive a change of page.
• In a table: arrows and Tab move, typing replaces, F2 or Enter edits, Escape leaves the old text, Ctrl+C and Ctrl+V copy and paste cells, Ctrl+Tab leaves the table.
`)
}

func (f *Frame) about() {
	text := say.T("Anodewright plans anode retrofits: what to fit in which zone at which docking, and what to order by when.") + "\n\n"
	for _, c := range plan.Usual() {
		text += "• " + say.Sentence(c.Text) + "\n"
	}
	text += "\n" + say.T(plan.Closing) + "\n\n" + keys() + "\n" + say.T("Reference tables:") + "\n"
	for _, t := range assets.Tables() {
		text += "• " + say.T(t.Title) + ": " + say.Sentence(t.Source()) + " (" + say.Sentence(t.Confidence) + ")\n"
	}
	f.tell(say.T("About and cautions"), text)
}

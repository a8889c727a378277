package pages

import (
	"errors"
	"os"
	"path/filepath"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/dialog"
	"fyne.io/fyne/v2/storage"
	"fyne.io/fyne/v2/widget"

	"anodewright/anodes/plan"
	"anodewright/app/grid"
	"anodewright/app/look"
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
	var faults hull.Faults
	title := "This could not be done"
	if errors.As(err, &faults) && len(faults) > 12 {
		err = append(faults[:12:12], hull.Fault{Want: "the other faults put right too"})
	}
	f.tell(title, err.Error())
}

// tell shows a text in a dialog.
func (f *Frame) tell(title, text string) {
	body := container.NewVScroll(look.Body(text))
	body.SetMinSize(fyne.NewSize(look.Px(520), look.Px(180)))
	dialog.ShowCustom(title, "Close", body, f.win)
}

// ask shows a form of one line and does something with its text.
func (f *Frame) ask(title, label, text, button string, browse func(*widget.Entry), do func(string) error) {
	entry := widget.NewEntry()
	entry.SetText(text)
	wrong := look.Wrong("")
	line := fyne.CanvasObject(entry)
	if browse != nil {
		line = container.NewBorder(nil, nil, nil, look.Button("Browse…", func() { browse(entry) }), entry)
	}
	var d *dialog.CustomDialog
	act := func() {
		if err := do(strings.TrimSpace(entry.Text)); err != nil {
			wrong.SetText(err.Error())
			return
		}
		d.Hide()
	}
	entry.OnSubmitted = func(string) { act() }
	d = dialog.NewCustomWithoutButtons(title, container.NewVBox(look.Plain(label), line, wrong), f.win)
	d.SetButtons([]fyne.CanvasObject{look.Button("Cancel", func() { d.Hide() }), look.AccentButton(button, act)})
	d.Resize(fyne.NewSize(look.Px(640), look.Px(200)))
	d.Show()
	f.win.Canvas().Focus(entry)
}

func (f *Frame) newAsset() {
	f.ask("New asset", "Name of the ship, unit or structure", "", "Make it", nil, func(name string) error {
		if name == "" {
			return errors.New("want a name")
		}
		return f.s.Add(session.NewAsset(name, f.s.Today()), "new asset")
	})
}

// addDemo adds the demo fleet.
func (f *Frame) addDemo() { f.report(session.AddDemo(f.s)) }

func (f *Frame) removeAsset() {
	a := f.s.Asset()
	if a == nil {
		return
	}
	dialog.ShowConfirm("Remove "+a.Name+"?", "It leaves the fleet. Its history stays in the register.", func(yes bool) {
		if yes {
			f.report(f.s.Remove())
		}
	}, f.win)
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
		d.SetFilter(storage.NewExtensionFileFilter([]string{".json"}))
		d.Resize(f.win.Canvas().Size())
		d.Show()
	}
	f.ask("Import an asset file", "Asset file (JSON)", f.folder()+string(filepath.Separator), "Import", browse, f.readAsset)
}

func (f *Frame) readAsset(path string) error {
	a, err := assetfile.Read(path)
	if err != nil {
		return err
	}
	f.s.SetSetting("folder", filepath.Dir(path))
	return f.s.Add(a, "imported from "+filepath.Base(path))
}

// importFile imports a file dropped on the window.
func (f *Frame) importFile(path string) { f.report(f.readAsset(path)) }

// export asks for a path and writes there.
func (f *Frame) export(title, name string, write func(path string) error) {
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
	f.ask(title, "File to write; one that is there is replaced", filepath.Join(f.folder(), name), "Write", browse, func(path string) error {
		if !filepath.IsAbs(path) {
			path = filepath.Join(f.folder(), path)
		}
		if err := write(path); err != nil {
			return err
		}
		f.s.SetSetting("folder", filepath.Dir(path))
		f.tell("Written", path)
		return nil
	})
}

func (f *Frame) exportWorkbook() {
	a := f.s.Asset()
	if a == nil {
		return
	}
	f.export("Export the schedule as an Excel workbook", fileName(a.Name)+" anode schedule.xlsx", func(path string) error {
		f.s.Wait() // the figures of the last edit
		if strings.ToLower(filepath.Ext(path)) != ".xlsx" {
			path += ".xlsx"
		}
		return workbook.Write(path, f.s.Outcome())
	})
}

func (f *Frame) exportAsset() {
	a := f.s.Asset()
	if a == nil {
		return
	}
	f.export("Export the asset file", fileName(a.Name)+".json", func(path string) error { return assetfile.Write(path, f.s.Asset()) })
}

// fileName makes a file's name of an asset's.
func fileName(name string) string {
	s := strings.Map(func(r rune) rune {
		if strings.ContainsRune(`/\:*?"<>|`, r) || r < ' ' {
			return '-'
		}
		return r
	}, name)
	if s = strings.Trim(s, " ."); s == "" {
		return "asset"
	}
	return s
}

func (f *Frame) about() {
	text := "Anodewright plans anode retrofits: what to fit in which zone at which docking, and what to order by when.\n\n"
	for _, c := range plan.Usual() {
		text += "• " + c.Text + "\n"
	}
	text += "\n" + plan.Closing + "\n\nReference tables:\n"
	for _, t := range assets.Tables() {
		text += "• " + t.Title + ": " + t.Source() + " (" + t.Confidence + ")\n"
	}
	f.tell("About and cautions", text)
}

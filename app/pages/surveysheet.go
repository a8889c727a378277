package pages

import (
	"bytes"
	"errors"
	"io"
	"os"
	"path/filepath"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/dialog"
	files "fyne.io/fyne/v2/storage"
	"fyne.io/fyne/v2/widget"

	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
	"anodewright/storage/sheet"
)

// exportSurvey asks for which docking a survey sheet is wanted, and in which
// form; then for its file.
func (f *Frame) exportSurvey() {
	a := f.s.Asset()
	if a == nil {
		return
	}
	days := f.s.SurveyDockings()
	if len(days) == 0 {
		f.report(errors.New(say.T("no docking is ahead that could be surveyed")))
		return
	}
	var rows listed
	for _, d := range days {
		kind := ""
		for _, docking := range a.Dockings {
			if docking.Date == d {
				kind = session.Words(docking.Kind)
			}
		}
		rows = append(rows, []grid.Cell{{Text: session.Day(d), Bold: true}, {Text: kind}})
	}
	note := say.T("A workbook for the surveyor, on paper or laptop: a cover, and boxes for each zone and fitted set. Filled in, it is read back by Take in a survey. What the forecast expects can be shown with each set; a surveyor who knows it tends to find it, so it is left out unless you ask.")
	l := newListDialog(f, say.T("Survey sheet"), note, []grid.Column{{Title: say.T("Docking"), Width: 160}, {Title: say.T("Kind"), Width: 200, Fill: true}}, rows)
	write := func(ending string, expected bool) func() {
		return func() {
			day := days[l.row()]
			l.close()
			f.export(say.T("Export a survey sheet"), say.T("%s survey %s", fileName(a.Name), day)+ending, func(path string) error {
				return f.s.WriteSurveySheet(path, day, expected)
			})
		}
	}
	l.show(look.Button(say.T("Cancel"), l.close), look.Button(say.T("As CSV…"), write(".csv", false)),
		look.Button(say.T("With the forecast…"), write(".xlsx", true)), look.AccentButton(say.T("Workbook…"), write(".xlsx", false)))
}

// importSurvey asks for the file of a filled survey sheet.
func (f *Frame) importSurvey() {
	grid.CommitOpen()
	if f.s.Asset() == nil {
		return
	}
	browse := func(e *widget.Entry) {
		d := dialog.NewFileOpen(func(r fyne.URIReadCloser, err error) {
			if r != nil {
				e.SetText(r.URI().Path())
				r.Close()
			}
		}, f.win)
		d.SetFilter(files.NewExtensionFileFilter([]string{".xlsx", ".csv", ".tsv", ".txt"}))
		d.Resize(f.win.Canvas().Size())
		d.Show()
	}
	f.ask(say.T("Take in a survey"), say.T("Filled survey sheet (.xlsx), or CSV file of readings; or drop it on the window. Nothing is stored before you have seen it"),
		f.folder()+string(filepath.Separator), say.T("Read"), browse, func(path string) (string, error) { return "", f.readSurvey(path) })
}

// isSurvey reports whether a file dropped on the window is a survey sheet, or a
// CSV file of readings: its header says so.
func isSurvey(path string) bool {
	switch strings.ToLower(filepath.Ext(path)) {
	case ".xlsx", ".xlsm", ".xls":
		return true
	case ".csv", ".tsv":
	default:
		return false
	}
	file, err := os.Open(path)
	if err != nil {
		return false
	}
	defer file.Close()
	text, err := io.ReadAll(io.LimitReader(file, 1<<16))
	first, _, _ := bytes.Cut(text, []byte("\n"))
	return err == nil && sheet.IsCSV(first)
}

// readSurvey reads a survey sheet and shows what was understood.
func (f *Frame) readSurvey(path string) error {
	if f.s.Asset() == nil {
		return errors.New(say.T("open the asset first that was surveyed"))
	}
	if !filepath.IsAbs(path) {
		path = filepath.Join(f.folder(), path)
	}
	v, err := f.s.ReadSurveySheet(path)
	if err != nil {
		return err
	}
	f.s.SetSetting("folder", filepath.Dir(path))
	// When the dialog that asked for the file is gone.
	fyne.Do(func() { newSurveyForm(f, v, filepath.Base(path)).show() })
	return nil
}

// zoneName is what a zone is called, its id where it is gone.
func zoneName(a *hull.Asset, id string) string {
	if z, ok := a.Zone(id); ok {
		return z.Name
	}
	return id
}

package pages

import (
	"fmt"
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/dialog"

	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/storage"
	"anodewright/storage/assetfile"
)

// listed is a table that is only read: its cells by row and column.
type listed [][]grid.Cell

func (l listed) Rows() int                { return len(l) }
func (l listed) Cell(r, c int) grid.Cell  { return l[r][c] }
func (l listed) Commit(int, int, string)  {}
func (l listed) EditText(r, c int) string { return l[r][c].Text }

// listDialog is a dialog with a table of which one row is chosen. Enter does
// what its accented button does; Escape closes it.
type listDialog struct {
	f    *Frame
	d    *dialog.CustomDialog
	grid *grid.Grid
}

// newListDialog makes the dialog; note stands above the table.
func newListDialog(f *Frame, title, note string, columns []grid.Column, rows listed) *listDialog {
	l := &listDialog{f: f, grid: grid.New(columns, rows, grid.Dense())}
	l.d = dialog.NewCustomWithoutButtons(title, container.NewBorder(look.Body(note), nil, nil, nil, l.grid), f.win)
	l.grid.OnKey = func(_, _ int, key *fyne.KeyEvent) bool {
		if key.Name == fyne.KeyEscape {
			l.close()
		}
		return key.Name == fyne.KeyEscape
	}
	return l
}

// show shows the dialog with its buttons, the last of which Enter presses.
func (l *listDialog) show(buttons ...*look.PushButton) {
	var all []fyne.CanvasObject
	for _, b := range buttons {
		b.OnEscape = l.close
		all = append(all, b)
	}
	l.grid.OnOpen = func(int, int) { buttons[len(buttons)-1].OnTapped() }
	l.d.SetButtons(all)
	l.d.Resize(dialogSize(l.f.win, 900, 560))
	l.d.Show()
	l.grid.Select(0, 0)
	l.f.win.Canvas().Focus(l.grid)
}

func (l *listDialog) close() { l.f.hide(l.d) }

// row is the chosen row.
func (l *listDialog) row() int {
	row, _ := l.grid.Selected()
	return max(row, 0)
}

// moment writes a time as the clock on the wall shows it.
func moment(t time.Time) string { return say.Moment(t.Local()) }

// history shows every edit of the open asset, to bring one back or to export
// the asset as it was then.
func (f *Frame) history() {
	a := f.s.Asset()
	if a == nil {
		return
	}
	all, err := f.s.History()
	if err != nil {
		f.report(err)
		return
	}
	f.newHistory(a.Name, all).open()
}

// historyDialog is the dialog of history.
type historyDialog struct {
	*listDialog
	name      string
	revisions []storage.Revision
}

func (f *Frame) newHistory(name string, all []storage.Revision) *historyDialog {
	var rows listed
	for i, v := range all {
		what := say.Sentence(v.What)
		if v.Deed != storage.Changed {
			what = say.T(string(v.Deed))
			if v.What != "" {
				what += ": " + say.Sentence(v.What)
			}
		}
		if i == 0 {
			what += " " + say.T("(as it is now)")
		}
		rows = append(rows, []grid.Cell{{Text: fmt.Sprint(v.Rev)}, {Text: moment(v.At)}, {Text: v.Who}, {Text: what, Bold: i == 0}})
	}
	note := say.T("Every edit that was stored, the newest first. To bring one back makes the asset as it was after that edit, as one new edit that can be undone. %d in all.", len(all))
	return &historyDialog{newListDialog(f, say.T("History of %s", name), note, []grid.Column{
		{Title: say.T("Revision"), Width: 76, Right: true},
		{Title: say.T("When"), Width: 165},
		{Title: say.T("Who"), Width: 130},
		{Title: say.T("What"), Width: 300, Fill: true},
	}, rows), name, all}
}

func (h *historyDialog) open() {
	h.show(look.Button(say.T("Close"), h.close), look.Button(say.T("Export it as an asset file…"), h.export), look.AccentButton(say.T("Bring this revision back"), h.bringBack))
}

func (h *historyDialog) bringBack() {
	v := h.revisions[h.row()]
	if h.row() == 0 {
		h.f.tell(say.T("Nothing to bring back"), say.T("The asset is as it was after this edit. Choose an earlier one."))
		return
	}
	h.close()
	h.f.report(h.f.s.BringBack(v.Rev))
}

func (h *historyDialog) export() {
	v := h.revisions[h.row()]
	a, err := h.f.s.Revision(v.Rev)
	if err != nil {
		h.f.report(err)
		return
	}
	h.close()
	h.f.export(say.T("Export revision %d as an asset file", v.Rev), say.T("%s revision %d.json", fileName(h.name), v.Rev),
		func(path string) error { return assetfile.Write(path, a) })
}

package grid

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/widget"

	"anodewright/app/look"
)

// edit is what the open editor works on.
type edit struct {
	on       bool
	row, col int
	from     string // the text it began with
	losing   bool   // the editor is losing the keyboard to something else
}

// open is the grid whose editor is open. Only one can be, as only one object
// has the keyboard.
var open *Grid

// CommitOpen commits the editor that is open in any grid, if one is. Menu
// actions and buttons that read the data call it first.
func CommitOpen() {
	if open != nil {
		open.CommitEdit()
	}
}

// Editing says whether the editor is open.
func (g *Grid) Editing() bool { return g.edit.on }

// Edit selects a cell and opens the editor on it with all its text selected. It
// reports whether the cell can be edited.
func (g *Grid) Edit(row, col int) bool {
	g.Select(row, col)
	if !g.openEditor(g.editText(g.row, g.col)) {
		return false
	}
	g.editor.TypedShortcut(&fyne.ShortcutSelectAll{})
	return true
}

// openEditor opens the editor on the selected cell with a text in it.
func (g *Grid) openEditor(text string) bool {
	if g.row < 0 || !g.cols[g.col].Edit {
		return false
	}
	CommitOpen()
	if g.row < 0 {
		return false // the commit took the rows away
	}
	g.editor.SetText(text) // before edit.on, so that it does not count as typed
	g.edit = edit{on: true, row: g.row, col: g.col, from: g.editText(g.row, g.col)}
	open = g
	g.all = false
	g.reveal(g.row, g.col)
	g.list.open(g.choices())
	g.list.choose(g.edit.from)
	g.editor.Entry.TypedKey(&fyne.KeyEvent{Name: fyne.KeyEnd}) // which also ends a selection of last time
	g.editor.Show()
	g.Refresh()
	if c := g.canvas(); c != nil {
		c.Focus(g.editor)
	}
	return true
}

func (g *Grid) choices() []string {
	if f := g.cols[g.edit.col].Choices; f != nil {
		return f(g.edit.row)
	}
	return nil
}

// editText is the text a cell is edited and copied as.
func (g *Grid) editText(row, col int) string {
	if row < 0 || col < 0 {
		return ""
	}
	if e, ok := g.src.(EditTexter); ok {
		return e.EditText(row, col)
	}
	return g.src.Cell(row, col).Text
}

// CommitEdit closes the editor, if it is open, and gives its text to the source
// if it has changed, or if the cell has a fault that may be gone by now.
func (g *Grid) CommitEdit() {
	if !g.edit.on {
		return
	}
	e, text := g.edit, g.list.resolve(g.editor.Text)
	g.closeEditor()
	if text != e.from || e.row < g.src.Rows() && g.src.Cell(e.row, e.col).Fault != "" {
		g.src.Commit(e.row, e.col, text)
	}
	g.Refresh()
}

// CancelEdit closes the editor and forgets its text.
func (g *Grid) CancelEdit() {
	if g.edit.on {
		g.closeEditor()
		g.Refresh()
	}
}

func (g *Grid) closeEditor() {
	g.edit.on = false
	if open == g {
		open = nil
	}
	g.list.open(nil)
	if c := g.canvas(); c != nil && !g.edit.losing && c.Focused() == fyne.Focusable(g.editor) {
		c.Focus(g)
	}
	g.editor.Hide()
}

// placeEditor lays the editor over its cell and the list of choices below or
// above it.
func (g *Grid) placeEditor(l layout) {
	if !g.edit.on {
		g.editClip.place(0, 0, 0, 0)
		g.editClip.add(g.editor)
		g.list.Hidden = true
		return
	}
	into, _ := g.pane(l, g.edit.col)
	wide := into.Size().Width
	if l.isSticky(g.edit.col) {
		wide = l.view.Width // the editor may reach over the other columns
	}
	g.editClip.place(into.Position().X, into.Position().Y, wide, into.Size().Height)
	pos, size := g.cell(l, g.edit.row, g.edit.col)
	h := g.editor.MinSize().Height
	at := fyne.NewPos(pos.X, pos.Y+(size.Height-h)/2)
	g.editor.Move(at.Subtract(into.Position()))
	g.editor.Resize(fyne.NewSize(g.editorWidth(l, pos.X, size.Width), h))
	g.wheel.Move(g.editor.Position())
	g.wheel.Resize(g.editor.Size())
	g.editClip.add(g.editor, g.wheel)
	seen := at.Y+h > l.body.Y && at.Y < l.body.Y+l.view.Height
	g.list.place(seen, at.X, at.Y, at.Y+h, max(size.Width, look.Px(140)), g.Size())
}

// editorWidth is the width of an editor that begins at x: its cell's, or more
// if the text needs it and there is room to the right.
func (g *Grid) editorWidth(l layout, x, cell float32) float32 {
	size, _ := g.textSizes()
	text := fyne.MeasureText(g.editor.Text, size, fyne.TextStyle{}).Width + look.Px(32)
	return max(cell, min(text, l.view.Width-x), look.Px(60))
}

// editor is the one entry of a grid.
type editor struct {
	widget.Entry
	g *Grid
}

func newEditor(g *Grid) *editor {
	e := &editor{g: g}
	e.ExtendBaseWidget(e)
	e.Hide()
	e.OnChanged = func(s string) {
		if g.edit.on {
			g.list.filter(s)
			g.Refresh()
		}
	}
	return e
}

// AcceptsTab keeps Tab for moving to the next cell.
func (e *editor) AcceptsTab() bool { return true }

// FocusLost commits what was typed.
func (e *editor) FocusLost() {
	e.Entry.FocusLost()
	if e.g.edit.on {
		e.g.edit.losing = true
		e.g.CommitEdit()
		e.g.edit.losing = false
	}
}

// FocusGained hands the keyboard on to the grid when the editor is closed, as
// after the window has come back to the front.
func (e *editor) FocusGained() {
	if !e.g.edit.on {
		e.g.Focus()
		return
	}
	e.Entry.FocusGained()
}

// TypedRune brings the edited cell back into view and types.
func (e *editor) TypedRune(r rune) {
	e.g.reveal(e.g.edit.row, e.g.edit.col)
	e.Entry.TypedRune(r)
}

// TypedKey commits, cancels or moves; all other keys are the entry's.
func (e *editor) TypedKey(key *fyne.KeyEvent) {
	g := e.g
	switch key.Name {
	case fyne.KeyEscape:
		g.CancelEdit()
	case fyne.KeyReturn, fyne.KeyEnter:
		step := 1
		if modifiers()&fyne.KeyModifierShift != 0 {
			step = -1
		}
		g.CommitEdit()
		g.move(step, 0)
	case fyne.KeyTab:
		g.CommitEdit()
		g.tab()
	case fyne.KeyUp, fyne.KeyDown, fyne.KeyPageUp, fyne.KeyPageDown:
		if g.list.key(key.Name) {
			g.Refresh()
			return
		}
		g.CommitEdit()
		g.TypedKey(key)
	default:
		if look.IsFunctionKey(key.Name) {
			look.Forward(g, key)
			return
		}
		g.reveal(g.edit.row, g.edit.col)
		e.Entry.TypedKey(key)
	}
}

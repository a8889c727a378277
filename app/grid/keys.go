package grid

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"
)

// hasKeys says whether the grid or its editor has the keyboard.
func (g *Grid) hasKeys() bool { return g.focused || g.edit.on }

// FocusGained implements fyne.Focusable. With nothing selected yet the first
// cell is.
func (g *Grid) FocusGained() {
	g.focused = true
	if g.row < 0 {
		g.pick(0, 0)
	}
	g.Refresh()
}

// FocusLost implements fyne.Focusable.
func (g *Grid) FocusLost() {
	g.focused = false
	g.Refresh()
}

// AcceptsTab keeps Tab for moving from cell to cell where cells can be edited;
// in a table to be read it moves on.
func (g *Grid) AcceptsTab() bool {
	for _, c := range g.cols {
		if c.Edit {
			return true
		}
	}
	return false
}

// TypedRune opens the editor with what is typed in place of the old text.
func (g *Grid) TypedRune(r rune) {
	if g.kept {
		g.kept = false
		return
	}
	if g.openEditor("") {
		g.editor.TypedRune(r)
	}
}

// TypedKey implements fyne.Focusable.
func (g *Grid) TypedKey(key *fyne.KeyEvent) {
	g.kept = false
	if g.OnKey != nil && g.OnKey(g.row, g.col, key) {
		// a printing key is followed by its rune, which is kept too
		g.kept = key.Name == fyne.KeySpace || len(key.Name) == 1
		return
	}
	switch key.Name {
	case fyne.KeyUp:
		g.move(-1, 0)
	case fyne.KeyDown:
		g.move(1, 0)
	case fyne.KeyLeft:
		g.move(0, -1)
	case fyne.KeyRight:
		g.move(0, 1)
	case fyne.KeyHome:
		g.pickNear(g.row, 0)
	case fyne.KeyEnd:
		g.pickNear(g.row, len(g.cols)-1)
	case fyne.KeyPageUp:
		g.move(-g.pageRows(), 0)
	case fyne.KeyPageDown:
		g.move(g.pageRows(), 0)
	case fyne.KeyTab:
		g.tab()
	case fyne.KeyReturn, fyne.KeyEnter, fyne.KeyF2:
		g.openOrCall()
	case fyne.KeyDelete:
		g.clear()
	case fyne.KeyBackspace:
		g.openEditor("")
	case desktop.KeyMenu:
		g.menuAtCell()
	case fyne.KeyEscape:
		if g.all {
			g.all = false
			g.Refresh()
		}
	default: // the window may know the key
		if c := g.canvas(); c != nil && c.OnTypedKey() != nil {
			c.OnTypedKey()(key)
		}
	}
}

func (g *Grid) pageRows() int {
	return max(int(g.layout().view.Height/g.rowH())-1, 1)
}

// move selects a cell some rows and columns away, as far as there are any.
func (g *Grid) move(rows, cols int) {
	if g.row < 0 {
		g.pickNear(0, 0)
		return
	}
	g.pickNear(g.row+rows, g.col+cols)
}

// pickNear selects the cell, or the nearest one there is.
func (g *Grid) pickNear(row, col int) { g.pick(max(row, 0), max(col, 0)) }

// tab goes to the next cell, from the end of a row to the beginning of the next
// one, and from the last cell out of the grid; with Shift the other way.
func (g *Grid) tab() {
	c := g.canvas()
	last, end := g.src.Rows()-1, len(g.cols)-1
	back := modifiers()&fyne.KeyModifierShift != 0
	switch {
	case g.row < 0 || back && g.row == 0 && g.col == 0:
		if c != nil && back {
			c.FocusPrevious()
		} else if c != nil {
			c.FocusNext()
		}
	case !back && g.row == last && g.col == end:
		if c != nil {
			c.FocusNext()
		}
	case back && g.col == 0:
		g.pick(g.row-1, end)
	case back:
		g.pick(g.row, g.col-1)
	case g.col == end:
		g.pick(g.row+1, 0)
	default:
		g.pick(g.row, g.col+1)
	}
}

// openOrCall opens the editor on the selected cell, or tells the page that a
// cell that cannot be edited was opened.
func (g *Grid) openOrCall() {
	if g.row < 0 || g.Edit(g.row, g.col) {
		return
	}
	if g.OnOpen != nil {
		g.OnOpen(g.row, g.col)
	}
}

// clear empties the selected cell.
func (g *Grid) clear() {
	if g.row < 0 || !g.cols[g.col].Edit || g.editText(g.row, g.col) == "" {
		return
	}
	g.src.Commit(g.row, g.col, "")
	g.Refresh()
}

func (g *Grid) menuAtCell() {
	if g.OnMenu == nil || g.row < 0 {
		return
	}
	pos, size, _ := g.CellPlace(g.row, g.col)
	g.OnMenu(g.row, g.col, pos.AddXY(size.Width/3, size.Height))
}

// TypedShortcut implements fyne.Shortcutable. What the grid has no use for goes
// on to the canvas, so that the window's own shortcuts work.
func (g *Grid) TypedShortcut(s fyne.Shortcut) {
	switch s := s.(type) {
	case *fyne.ShortcutCopy:
		s.Clipboard.SetContent(g.Copy())
		return
	case *fyne.ShortcutCut:
		s.Clipboard.SetContent(g.Copy())
		if !g.all {
			g.clear()
		}
		return
	case *fyne.ShortcutPaste:
		g.Paste(s.Clipboard.Content())
		return
	case *fyne.ShortcutSelectAll:
		g.all = g.src.Rows() > 0
		g.Refresh()
		return
	case *desktop.CustomShortcut:
		if g.jump(s) {
			return
		}
	}
	if c, ok := g.canvas().(fyne.Shortcutable); ok {
		c.TypedShortcut(s)
	}
}

// jump acts on the keys held with Ctrl (Cmd on a Mac): Home, End and arrows go
// to the edges, Tab leaves the grid. With Alt, right and left widen and narrow
// the column.
func (g *Grid) jump(s *desktop.CustomShortcut) bool {
	if s.Modifier == fyne.KeyModifierAlt {
		switch s.KeyName {
		case fyne.KeyRight:
			g.widen(10)
			return true
		case fyne.KeyLeft:
			g.widen(-10)
			return true
		}
	}
	if s.Modifier&^fyne.KeyModifierShift != fyne.KeyModifierShortcutDefault {
		return false
	}
	last, end := g.src.Rows()-1, len(g.cols)-1
	switch s.KeyName {
	case fyne.KeyHome:
		g.pickNear(0, 0)
	case fyne.KeyEnd:
		g.pickNear(last, end)
	case fyne.KeyUp:
		g.pickNear(0, g.col)
	case fyne.KeyDown:
		g.pickNear(last, g.col)
	case fyne.KeyLeft:
		g.pickNear(g.row, 0)
	case fyne.KeyRight:
		g.pickNear(g.row, end)
	case fyne.KeyTab:
		if c := g.canvas(); c != nil && s.Modifier&fyne.KeyModifierShift != 0 {
			c.FocusPrevious()
		} else if c != nil {
			c.FocusNext()
		}
	default:
		return false
	}
	return true
}

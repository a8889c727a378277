package grid

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"
)

// MouseDown selects the cell under the mouse and takes the keyboard. It acts
// here and not on a tap, because a tap is lost when the mouse moves a little.
func (g *Grid) MouseDown(ev *desktop.MouseEvent) {
	if ev.Button == desktop.MouseButtonPrimary && g.beginSizing(ev.Position) {
		g.CommitEdit()
		g.again = false
		return
	}
	row, col, ok := g.at(g.layout(), ev.Position)
	g.again = ok && g.focused && row == g.row && col == g.col && ev.Button == desktop.MouseButtonPrimary
	g.CommitEdit()
	if !ok {
		g.Focus()
		return
	}
	if row < 0 {
		if g.OnHead != nil && ev.Button == desktop.MouseButtonPrimary {
			g.OnHead(col)
		}
		return
	}
	g.pick(row, col)
	g.Focus()
}

// MouseUp opens the editor after a click on the cell that was selected already,
// and the menu after the right button.
func (g *Grid) MouseUp(ev *desktop.MouseEvent) {
	g.endSizing()
	row, col, ok := g.at(g.layout(), ev.Position)
	again := g.again
	g.again = false
	if !ok || row < 0 || row != g.row || col != g.col {
		return
	}
	switch {
	case ev.Button == desktop.MouseButtonSecondary && g.OnMenu != nil:
		g.OnMenu(row, col, ev.AbsolutePosition)
	case ev.Button == desktop.MouseButtonPrimary && again:
		g.openOrCall()
	}
}

// Scrolled moves the content with the mouse wheel; with Shift sideways.
func (g *Grid) Scrolled(ev *fyne.ScrollEvent) {
	dx, dy := ev.Scrolled.DX, ev.Scrolled.DY
	if modifiers()&fyne.KeyModifierShift != 0 && dx == 0 {
		dx, dy = dy, 0
	}
	g.scrollBy(-dx, -dy)
}

func (g *Grid) scrollBy(dx, dy float32) {
	off := g.layout().bound(g.offset.AddXY(dx, dy))
	if off != g.offset {
		g.offset = off
		g.Refresh()
	}
}

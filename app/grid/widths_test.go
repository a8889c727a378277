package grid

import (
	"strings"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"
)

func TestColumnsAreWidenedByMouseAndKeys(t *testing.T) {
	g, _, _ := show(t, 1, 5)
	told := ""
	g.OnWidths = func(s string) { told = s }
	l := g.layout()
	edge, before := l.x[2], l.x[2]-l.x[1]
	at := func(x float32) fyne.PointEvent { return fyne.PointEvent{Position: fyne.NewPos(x, 6)} }
	g.MouseMoved(&desktop.MouseEvent{PointEvent: at(edge)})
	if g.Cursor() != desktop.HResizeCursor {
		t.Error("the mouse on an edge does not show it")
	}
	g.MouseDown(&desktop.MouseEvent{PointEvent: at(edge), Button: desktop.MouseButtonPrimary})
	g.Dragged(&fyne.DragEvent{PointEvent: at(edge + 30)})
	if told != "" {
		t.Error("the page is told before the drag ends")
	}
	g.DragEnd()
	l = g.layout()
	if got := l.x[2] - l.x[1]; got < before+29 || got > before+31 {
		t.Errorf("the column is %v wide, it was %v", got, before)
	}
	if told == "" || told != g.Widths() {
		t.Errorf("the page was told %q of %q", told, g.Widths())
	}
	g.Select(0, 1)
	g.TypedShortcut(&desktop.CustomShortcut{KeyName: fyne.KeyLeft, Modifier: fyne.KeyModifierAlt})
	l = g.layout()
	if got := l.x[2] - l.x[1]; got < before+19 || got > before+21 {
		t.Errorf("after Alt+Left the column is %v wide", got)
	}
	kept := g.Widths()
	g.SetWidths("")
	if l = g.layout(); l.x[2]-l.x[1] != before {
		t.Errorf("without widths the column is %v wide", l.x[2]-l.x[1])
	}
	g.SetWidths(kept)
	if g.Widths() != kept {
		t.Errorf("%q came back as %q", kept, g.Widths())
	}
	g.SetWidths("nonsense;#1=abc;#0=5;=")
	if g.Widths() != "" {
		t.Errorf("nonsense is kept: %q", g.Widths())
	}
}

func TestEmptyTableSaysWhatToDo(t *testing.T) {
	g, z, _ := show(t, 1, 0, Sticky())
	g.Empty = "Nothing is here yet: press Insert to add the first row, or paste a block from a spreadsheet."
	g.Refresh()
	said := func() string {
		all := ""
		for text := range shownTexts(g) {
			all += text + " "
		}
		return all
	}
	if !strings.Contains(said(), "Nothing is here yet") {
		t.Errorf("shown: %s", said())
	}
	z.rows = newZones(1).rows
	g.Refresh()
	if strings.Contains(said(), "Nothing is here yet") {
		t.Error("it is still said with a row")
	}
}

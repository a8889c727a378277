package grid

import (
	"strings"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/test"
	"fyne.io/fyne/v2/widget"

	"anodewright/app/look"
)

func TestTypingReplacesAndEnterGoesDown(t *testing.T) {
	g, z, w := show(t, 1, 5)
	click(g, 1, 1)
	typeText(w, "250")
	if !g.Editing() || w.Canvas().Focused() != fyne.Focusable(g.editor) {
		t.Fatal("typing opened no editor")
	}
	key(w, fyne.KeyReturn)
	wantCommits(t, z, "1,1=250")
	wantSelected(t, g, 2, 1)
	if w.Canvas().Focused() != fyne.Focusable(g) || g.Editing() || g.editor.Visible() {
		t.Error("the editor has not closed")
	}
}

// A text that was selected and left as it was must not take the first letters
// of the next one along.
func TestTypingAfterAnUnchangedEditKeepsItsFirstLetter(t *testing.T) {
	g, z, w := show(t, 1, 5)
	click(g, 1, 1)
	key(w, fyne.KeyF2)
	key(w, fyne.KeyReturn)
	key(w, fyne.KeyUp)
	typeText(w, "250")
	if g.editor.Text != "250" {
		t.Errorf("the editor holds %q", g.editor.Text)
	}
	key(w, fyne.KeyReturn)
	wantCommits(t, z, "1,1=250")
}

func TestTabCommitsAndGoesRight(t *testing.T) {
	g, z, w := show(t, 1, 5)
	click(g, 0, 0)
	typeText(w, "bow")
	key(w, fyne.KeyTab)
	typeText(w, "7")
	key(w, fyne.KeyTab)
	wantCommits(t, z, "0,0=bow 0,1=7")
	wantSelected(t, g, 0, 2)
	withShift(t)
	key(w, fyne.KeyTab)
	wantSelected(t, g, 0, 1)
}

func TestF2SelectsAllAndEscapeCancels(t *testing.T) {
	g, z, w := show(t, 1, 5)
	click(g, 2, 0)
	key(w, fyne.KeyF2)
	if g.editor.SelectedText() != "zone 2" {
		t.Errorf("F2 selected %q", g.editor.SelectedText())
	}
	typeText(w, "stern")
	if g.editor.Text != "stern" {
		t.Errorf("editor holds %q", g.editor.Text)
	}
	key(w, fyne.KeyEscape)
	wantCommits(t, z, "")
	wantSelected(t, g, 2, 0)
	if w.Canvas().Focused() != fyne.Focusable(g) {
		t.Error("the grid has no focus after Escape")
	}
}

func TestSecondClickOpens(t *testing.T) {
	g, _, _ := show(t, 1, 5)
	click(g, 2, 0)
	if g.Editing() {
		t.Fatal("the first click opened the editor")
	}
	click(g, 2, 0)
	if !g.Editing() || g.editor.SelectedText() != "zone 2" {
		t.Errorf("editing %v, selected %q", g.Editing(), g.editor.SelectedText())
	}
}

func TestMouseDownElsewhereCommits(t *testing.T) {
	g, z, w := show(t, 1, 5)
	click(g, 0, 0)
	typeText(w, "bow")
	click(g, 3, 1)
	wantCommits(t, z, "0,0=bow")
	wantSelected(t, g, 3, 1)
}

func TestFocusElsewhereCommits(t *testing.T) {
	look.Apply(test.NewTempApp(t), look.Light, 1)
	z := newZones(3)
	g := New(zoneCols, z)
	field := widget.NewEntry()
	w := test.NewTempWindow(t, container.NewVBox(field, g))
	w.Canvas().Focus(g)
	typeText(w, "bow")
	w.Canvas().Focus(field)
	wantCommits(t, z, "0,0=bow")
	if w.Canvas().Focused() != fyne.Focusable(field) {
		t.Errorf("the focus went to %T", w.Canvas().Focused())
	}
}

func TestWindowLosesAndRegainsFocus(t *testing.T) {
	g, z, w := show(t, 1, 3)
	click(g, 0, 0)
	typeText(w, "bow")
	// as a driver does when the window goes to the back and comes to the front
	w.Canvas().Focused().FocusLost()
	wantCommits(t, z, "0,0=bow")
	w.Canvas().Focused().FocusGained()
	key(w, fyne.KeyDown)
	wantSelected(t, g, 1, 0)
}

func TestCommitOpenFromOutside(t *testing.T) {
	g, z, w := show(t, 1, 3)
	CommitOpen() // nothing open: nothing happens
	click(g, 0, 1)
	typeText(w, "9")
	CommitOpen()
	wantCommits(t, z, "0,1=9")
	if g.Editing() || w.Canvas().Focused() != fyne.Focusable(g) {
		t.Error("the editor is still open or has the focus")
	}
}

func TestUnchangedTextIsNotCommitted(t *testing.T) {
	g, z, w := show(t, 1, 3)
	click(g, 0, 1)
	key(w, fyne.KeyF2, fyne.KeyReturn)
	wantCommits(t, z, "")
	wantSelected(t, g, 1, 1)
}

func TestDeleteAndBackspace(t *testing.T) {
	g, z, w := show(t, 1, 3)
	click(g, 0, 0)
	key(w, fyne.KeyDelete)
	wantCommits(t, z, "0,0=")
	key(w, fyne.KeyDelete) // empty already
	wantCommits(t, z, "0,0=")
	click(g, 1, 0)
	key(w, fyne.KeyBackspace)
	if !g.Editing() || g.editor.Text != "" {
		t.Errorf("backspace: editing %v, text %q", g.Editing(), g.editor.Text)
	}
	key(w, fyne.KeyEscape)
	click(g, 1, 3)
	key(w, fyne.KeyDelete)
	wantCommits(t, z, "0,0=") // the code column cannot be edited
}

func TestFaultKeepsTextAndIsShown(t *testing.T) {
	g, z, w := show(t, 1, 5)
	click(g, 1, 1)
	typeText(w, "-3")
	key(w, fyne.KeyReturn, fyne.KeyUp)
	if z.rows[1][1] != "-3" || shownTexts(g)["-3"] == nil {
		t.Error("the typed text is not kept")
	}
	if want := "⚠ wetted area: want a number above 0, got -3"; g.Note() != want {
		t.Errorf("note %q, want %q", g.Note(), want)
	}
	if !g.foot[0].Visible() || g.foot[0].Text != g.Note() {
		t.Errorf("under the grid: %q, visible %v", g.foot[0].Text, g.foot[0].Visible())
	}
	if shownTexts(g)["!"] == nil {
		t.Error("the cell has no sign")
	}
	if m := look.MissingRunes(g.Note()); len(m) > 0 {
		t.Errorf("the font lacks %q", string(m))
	}
	click(g, 2, 1)
	if g.Note() != "" || g.foot[0].Visible() {
		t.Errorf("note %q on a cell without a fault", g.Note())
	}
}

func TestScrollKeepsEditorWithItsRow(t *testing.T) {
	g, z, w := show(t, 1, 60)
	click(g, 2, 0)
	typeText(w, "keel")
	before := g.editor.Position().Y
	test.Scroll(w.Canvas(), fyne.NewPos(50, 200), 0, -40)
	if got := g.editor.Position().Y; got != before-40 {
		t.Errorf("the editor moved from %v to %v, want 40 up", before, got)
	}
	test.Scroll(w.Canvas(), fyne.NewPos(50, 200), 0, -900)
	if first, _ := g.visible(g.layout()); first < 20 {
		t.Fatalf("the wheel went to row %d only", first)
	}
	typeText(w, "s") // comes back to its row
	if first, end := g.visible(g.layout()); 2 < first || 2 >= end {
		t.Errorf("rows %d to %d in view while row 2 is edited", first, end)
	}
	key(w, fyne.KeyReturn)
	wantCommits(t, z, "2,0=keels")
}

func TestWheelOverEditorScrolls(t *testing.T) {
	g, _, w := show(t, 1, 60)
	click(g, 2, 0)
	typeText(w, "keel")
	pos, size, _ := g.CellPlace(2, 0)
	at := pos.AddXY(size.Width/2, size.Height/2)
	inset, _ := w.Canvas().InteractiveArea()
	test.Scroll(w.Canvas(), at.Add(inset), 0, -36)
	if g.offset.Y != 36 {
		t.Errorf("scrolled by %v, want 36", g.offset.Y)
	}
}

func TestEditorGrowsWithItsText(t *testing.T) {
	g, _, w := show(t, 1, 5)
	click(g, 1, 0)
	typeText(w, "x")
	if got := g.editor.Size().Width; got != 140 {
		t.Errorf("the editor of a short text is %v wide, its cell 140", got)
	}
	typeText(w, "vertical sides, port and starboard")
	pos := g.editClip.Position().X + g.editor.Position().X
	if got := g.editor.Size().Width; got < 220 || pos+got > g.Size().Width {
		t.Errorf("the editor of a long text is %v wide at %v in a grid of %v", got, pos, g.Size().Width)
	}
}

func TestRefreshKeepsTheOpenEditor(t *testing.T) {
	g, z, w := show(t, 1, 5)
	click(g, 3, 0)
	typeText(w, "ke")
	z.rows[3][1] = "77"
	g.Refresh()
	typeText(w, "el")
	if g.editor.Text != "keel" {
		t.Errorf("editor holds %q", g.editor.Text)
	}
	z.rows = z.rows[:2]
	g.Refresh()
	if g.Editing() {
		t.Error("the editor stays open on a row that is gone")
	}
	wantCommits(t, z, "")
}

func TestChoices(t *testing.T) {
	g, z, w := show(t, 1, 5)
	click(g, 0, 2)
	typeText(w, "no")
	if strings.Join(g.list.items, ",") != "none" || !g.list.Visible() {
		t.Errorf("list %v, visible %v", g.list.items, g.list.Visible())
	}
	key(w, fyne.KeyReturn)
	wantCommits(t, z, "0,2=none")
	wantSelected(t, g, 1, 2)

	key(w, fyne.KeyF2, fyne.KeyDown, fyne.KeyDown, fyne.KeyReturn)
	wantCommits(t, z, "0,2=none 1,2=none")

	typeText(w, "glass") // in no beginning, but within one
	key(w, fyne.KeyTab)
	wantCommits(t, z, "0,2=none 1,2=none 2,2=epoxy glass flake")

	click(g, 3, 2)
	typeText(w, "tar")
	key(w, fyne.KeyReturn) // fits nothing: the source judges
	if z.rows[3][2] != "tar" {
		t.Errorf("row 3 holds %q", z.rows[3][2])
	}

	click(g, 4, 2)
	key(w, fyne.KeyF2)
	ev := &desktop.MouseEvent{Button: desktop.MouseButtonPrimary}
	ev.Position = fyne.NewPos(20, itemHeight()*3.5)
	g.list.MouseDown(ev)
	if z.rows[4][2] != "vinyl" || g.Editing() || g.list.Visible() {
		t.Errorf("after a click row 4 holds %q, editing %v", z.rows[4][2], g.Editing())
	}
}

func TestChoicesStayInTheGrid(t *testing.T) {
	for _, scale := range []float32{1, 1.5} {
		g, _, w := show(t, scale, 7)
		click(g, 6, 2) // at the bottom: the list opens above
		key(w, fyne.KeyF2)
		p, s := g.list.Position(), g.list.Size()
		if p.Y < 0 || p.Y+s.Height > g.Size().Height || p.X+s.Width > g.Size().Width {
			t.Errorf("scale %v: list at %v of %v in a grid of %v", scale, p, s, g.Size())
		}
		if g.list.shown != 4 {
			t.Errorf("scale %v: %d of 4 choices in view", scale, g.list.shown)
		}
	}
}

func TestClearingAChoice(t *testing.T) {
	g, z, w := show(t, 1, 3)
	click(g, 0, 2)
	key(w, fyne.KeyBackspace, fyne.KeyReturn)
	wantCommits(t, z, "0,2=")
}

// plainZones are edited as a plain number though shown with a unit.
type plainZones struct{ *zones }

func (p plainZones) Cell(row, col int) Cell {
	c := p.zones.Cell(row, col)
	c.Text += " m²"
	return c
}

func (p plainZones) EditText(row, col int) string { return p.rows[row][col] }

func TestEditTextDiffersFromShownText(t *testing.T) {
	look.Apply(test.NewTempApp(t), look.Light, 1)
	g := New(zoneCols[:2], plainZones{newZones(2)})
	test.NewTempWindow(t, g).Resize(fyne.NewSize(300, 200))
	g.Edit(0, 1)
	if g.editor.Text != "100" || g.Copy() != "100" {
		t.Errorf("edited as %q, copied as %q", g.editor.Text, g.Copy())
	}
}

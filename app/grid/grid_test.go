package grid

import (
	"fmt"
	"strconv"
	"strings"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/test"
	"fyne.io/fyne/v2/widget"

	"anodewright/app/look"
)

// zones is a source of invented zones: a name, an area and a coating. Areas
// must be numbers above 0; what is not is kept with its fault.
type zones struct {
	rows    [][3]string
	commits []string
}

var zoneCols = []Column{
	{ID: "name", Title: "zone", Width: 140, Edit: true},
	{ID: "area", Title: "wetted area", Unit: "m²", Width: 90, Right: true, Edit: true},
	{ID: "coat", Title: "coating", Width: 120, Edit: true, Choices: func(int) []string {
		return []string{"epoxy", "epoxy glass flake", "none", "vinyl"}
	}},
	{ID: "code", Title: "code", Width: 80},
}

func newZones(n int) *zones {
	z := &zones{}
	for i := range n {
		z.rows = append(z.rows, [3]string{fmt.Sprintf("zone %d", i), strconv.Itoa(100 + i), "epoxy"})
	}
	return z
}

func (z *zones) Rows() int { return len(z.rows) }

func (z *zones) Cell(row, col int) Cell {
	if col == 3 {
		return Cell{Text: fmt.Sprintf("Z%02d", row), Muted: true}
	}
	c := Cell{Text: z.rows[row][col]}
	if col == 1 {
		if v, err := strconv.ParseFloat(c.Text, 64); err != nil || v <= 0 {
			c.Fault = "want a number above 0, got " + c.Text
		}
	}
	return c
}

func (z *zones) Commit(row, col int, text string) {
	z.rows[row][col] = text
	z.commits = append(z.commits, fmt.Sprintf("%d,%d=%s", row, col, text))
}

func (z *zones) log() string { return strings.Join(z.commits, " ") }

// show puts a grid into a window of its own.
func show(t *testing.T, scale float32, rows int, opts ...Option) (*Grid, *zones, fyne.Window) {
	t.Helper()
	look.Apply(test.NewTempApp(t), look.Light, scale)
	z := newZones(rows)
	g := New(zoneCols, z, opts...)
	w := test.NewTempWindow(t, g)
	w.SetPadded(false)
	w.Resize(fyne.NewSize(460*scale, 300*scale))
	return g, z, w
}

// press clicks the middle of a cell as the drivers do.
func press(g *Grid, row, col int, button desktop.MouseButton) {
	pos, size := g.cell(g.layout(), row, col)
	ev := &desktop.MouseEvent{Button: button}
	ev.Position = pos.AddXY(size.Width/2, size.Height/2)
	ev.AbsolutePosition = ev.Position
	g.MouseDown(ev)
	g.MouseUp(ev)
}

func click(g *Grid, row, col int) { press(g, row, col, desktop.MouseButtonPrimary) }

// key sends a key to whatever has the keyboard.
func key(w fyne.Window, names ...fyne.KeyName) {
	for _, n := range names {
		w.Canvas().Focused().TypedKey(&fyne.KeyEvent{Name: n})
	}
}

func typeText(w fyne.Window, s string) {
	for _, r := range s {
		w.Canvas().Focused().TypedRune(r)
	}
}

func withShift(t *testing.T) {
	old := modifiers
	modifiers = func() fyne.KeyModifier { return fyne.KeyModifierShift }
	t.Cleanup(func() { modifiers = old })
}

func wantSelected(t *testing.T, g *Grid, row, col int) {
	t.Helper()
	if r, c := g.Selected(); r != row || c != col {
		t.Errorf("selected %d,%d, want %d,%d", r, c, row, col)
	}
}

func wantCommits(t *testing.T, z *zones, want string) {
	t.Helper()
	if z.log() != want {
		t.Errorf("commits %q, want %q", z.log(), want)
	}
}

func TestMouseDownSelectsAndFocuses(t *testing.T) {
	g, _, w := show(t, 1, 5)
	var calls [][2]int
	g.OnSelect = func(r, c int) { calls = append(calls, [2]int{r, c}) }
	pos, _ := g.cell(g.layout(), 2, 1)
	ev := &desktop.MouseEvent{Button: desktop.MouseButtonPrimary}
	ev.Position = pos.AddXY(5, 5)
	g.MouseDown(ev)
	wantSelected(t, g, 2, 1)
	if w.Canvas().Focused() != fyne.Focusable(g) {
		t.Error("the grid has not taken the focus")
	}
	if len(calls) != 1 || calls[0] != [2]int{2, 1} {
		t.Errorf("OnSelect calls %v, want one of 2,1", calls)
	}
	g.Select(3, 0)
	if len(calls) != 1 {
		t.Error("Select called OnSelect")
	}
}

func TestKeysMove(t *testing.T) {
	g, _, w := show(t, 1, 40)
	w.Canvas().Focus(g)
	wantSelected(t, g, 0, 0)
	key(w, fyne.KeyDown, fyne.KeyRight)
	wantSelected(t, g, 1, 1)
	key(w, fyne.KeyUp, fyne.KeyUp, fyne.KeyLeft, fyne.KeyLeft)
	wantSelected(t, g, 0, 0)
	key(w, fyne.KeyEnd)
	wantSelected(t, g, 0, 3)
	key(w, fyne.KeyTab)
	wantSelected(t, g, 1, 0)
	key(w, fyne.KeyPageDown)
	if r, _ := g.Selected(); r < 5 || r > 8 {
		t.Errorf("page down went to row %d in a window of 7 rows", r)
	}
	key(w, fyne.KeyPageUp, fyne.KeyHome)
	wantSelected(t, g, 1, 0)
	ctrl := fyne.KeyModifierShortcutDefault
	g.TypedShortcut(&desktop.CustomShortcut{KeyName: fyne.KeyEnd, Modifier: ctrl})
	wantSelected(t, g, 39, 3)
	g.TypedShortcut(&desktop.CustomShortcut{KeyName: fyne.KeyUp, Modifier: ctrl})
	wantSelected(t, g, 0, 3)
	withShift(t)
	key(w, fyne.KeyTab)
	wantSelected(t, g, 0, 2)
}

func TestTabLeavesAtTheEnds(t *testing.T) {
	look.Apply(test.NewTempApp(t), look.Light, 1)
	g := New(zoneCols, newZones(2))
	before, after := widget.NewEntry(), widget.NewEntry()
	w := test.NewTempWindow(t, container.NewVBox(before, g, after))
	w.Canvas().Focus(g)
	g.Select(1, 3)
	key(w, fyne.KeyTab)
	if w.Canvas().Focused() != fyne.Focusable(after) {
		t.Errorf("after the last cell Tab went to %T", w.Canvas().Focused())
	}
	w.Canvas().Focus(g)
	g.Select(0, 0)
	withShift(t)
	key(w, fyne.KeyTab)
	if w.Canvas().Focused() != fyne.Focusable(before) {
		t.Errorf("before the first cell Shift+Tab went to %T", w.Canvas().Focused())
	}
}

func TestReadOnlyTableLetsTabPass(t *testing.T) {
	look.Apply(test.NewTempApp(t), look.Light, 1)
	g := New([]Column{{Title: "zone"}, {Title: "state"}}, newZones(2))
	if g.AcceptsTab() {
		t.Error("a table without a cell to edit keeps Tab")
	}
}

func TestOnKeyKeepsKeyAndRune(t *testing.T) {
	g, z, w := show(t, 1, 3)
	w.Canvas().Focus(g)
	n := 0
	g.OnKey = func(row, col int, k *fyne.KeyEvent) bool {
		if k.Name == fyne.KeySpace {
			n++
			return true
		}
		return false
	}
	key(w, fyne.KeySpace)
	typeText(w, " ")
	if n != 1 || g.Editing() {
		t.Errorf("space was offered %d times, editing %v", n, g.Editing())
	}
	key(w, fyne.KeyDown)
	wantSelected(t, g, 1, 0)
	typeText(w, "x")
	if !g.Editing() {
		t.Error("typing after a kept key opened no editor")
	}
	wantCommits(t, z, "")
}

func TestRightButtonAndMenuKey(t *testing.T) {
	g, _, w := show(t, 1, 5)
	var got []string
	g.OnMenu = func(r, c int, at fyne.Position) { got = append(got, fmt.Sprintf("%d,%d", r, c)) }
	press(g, 3, 1, desktop.MouseButtonSecondary)
	wantSelected(t, g, 3, 1)
	key(w, desktop.KeyMenu)
	if strings.Join(got, " ") != "3,1 3,1" {
		t.Errorf("menus at %v", got)
	}
}

func TestOpenOnReadOnlyCellAndHead(t *testing.T) {
	g, _, w := show(t, 1, 5)
	opened, head := "", -1
	g.OnOpen = func(r, c int) { opened += fmt.Sprintf("%d,%d ", r, c) }
	g.OnHead = func(c int) { head = c }
	click(g, 1, 3)
	click(g, 1, 3)
	key(w, fyne.KeyReturn)
	if opened != "1,3 1,3 " || g.Editing() {
		t.Errorf("opened %q, editing %v", opened, g.Editing())
	}
	ev := &desktop.MouseEvent{Button: desktop.MouseButtonPrimary}
	ev.Position = fyne.NewPos(150, 5)
	g.MouseDown(ev)
	if head != 1 {
		t.Errorf("head %d clicked, want 1", head)
	}
}

func TestRefreshClampsSelection(t *testing.T) {
	g, z, _ := show(t, 1, 5)
	g.Select(4, 2)
	z.rows = z.rows[:2]
	g.Refresh()
	wantSelected(t, g, 1, 2)
	z.rows = nil
	g.Refresh()
	wantSelected(t, g, -1, -1)
	g.Focus()
	key2 := &fyne.KeyEvent{Name: fyne.KeyDown}
	g.TypedKey(key2)
	g.TypedKey(&fyne.KeyEvent{Name: fyne.KeyF2})
	g.TypedRune('a')
	wantSelected(t, g, -1, -1)
}

// shownTexts returns the texts drawn in the body and the place each one takes.
func shownTexts(g *Grid) map[string]*canvas.Text {
	out := map[string]*canvas.Text{}
	for _, c := range []*clip{g.body, g.stickyBody, g.head, g.stickyHead} {
		for _, o := range c.objects {
			if s, ok := o.(*canvas.Text); ok && s.Visible() {
				out[s.Text] = s
			}
		}
	}
	return out
}

func TestRefreshShowsNewText(t *testing.T) {
	g, z, _ := show(t, 1, 5)
	z.rows[1][0] = "rudder"
	g.Refresh()
	if shownTexts(g)["rudder"] == nil {
		t.Error("the new text is not drawn")
	}
}

func TestTextStaysInItsCell(t *testing.T) {
	for _, scale := range []float32{1, 1.25, 1.5} {
		g, z, _ := show(t, scale, 3)
		z.rows[0][0] = "vertical sides, port and starboard, below the boot top"
		z.rows[1][1] = "1234567890123456789"
		g.Refresh()
		l := g.layout()
		for text, s := range shownTexts(g) {
			if strings.HasPrefix(text, "vertical") && !strings.HasSuffix(text, "…") {
				t.Errorf("scale %v: long text %q has no ellipsis", scale, text)
			}
			if w := s.MinSize().Width; w > s.Size().Width+0.5 {
				t.Errorf("scale %v: %q is %v wide in %v", scale, text, w, s.Size().Width)
			}
		}
		if got, want := l.x[1], 140*scale; got != want {
			t.Errorf("scale %v: first column is %v wide, want %v", scale, got, want)
		}
		if got, want := g.rowH(), 36*scale-4*(scale-1); got != want {
			t.Errorf("scale %v: rows are %v high, want %v", scale, got, want)
		}
	}
}

func TestWholeTextOfCutCellIsInTheNote(t *testing.T) {
	g, z, _ := show(t, 1, 3)
	z.rows[0][0] = "vertical sides, port and starboard, below the boot top"
	g.Select(0, 0)
	if g.Note() != z.rows[0][0] {
		t.Errorf("note %q", g.Note())
	}
	g.Select(1, 0)
	if g.Note() != "" {
		t.Errorf("note %q for a text that fits", g.Note())
	}
}

func TestTwoLinesFitTheRow(t *testing.T) {
	for _, opt := range []Option{RowHeight(36), Dense()} {
		look.Apply(test.NewTempApp(t), look.Light, 1)
		src := fixed{{Text: "add 14 x 45 kg", Sub: "final current", Accent: true, Bold: true, State: "thin"}}
		g := New([]Column{{Title: "docking", Width: 240}}, src, opt)
		test.NewTempWindow(t, g).Resize(fyne.NewSize(300, 120))
		for text, s := range shownTexts(g) {
			if text == "docking" {
				continue
			}
			if s.Position().Y < 0 || s.Position().Y+s.MinSize().Height > g.rowH() {
				t.Errorf("%q at %v, %v high, in a row of %v", text, s.Position().Y, s.MinSize().Height, g.rowH())
			}
		}
	}
}

// fixed is a source of one row.
type fixed []Cell

func (f fixed) Rows() int               { return 1 }
func (f fixed) Cell(_, col int) Cell    { return f[col] }
func (f fixed) Commit(int, int, string) {}

func TestFillTakesTheRest(t *testing.T) {
	look.Apply(test.NewTempApp(t), look.Light, 1)
	g := New([]Column{{Title: "a", Width: 100}, {Title: "note", Width: 100, Fill: true}}, newZones(2))
	w := test.NewTempWindow(t, g)
	w.SetPadded(false)
	w.Resize(fyne.NewSize(500, 300))
	l := g.layout()
	if l.x[2] != 500 || l.x[1] != 100 || l.barH || l.barV {
		t.Errorf("columns at %v, bars %v %v", l.x, l.barH, l.barV)
	}
	w.Resize(fyne.NewSize(180, 300))
	if l = g.layout(); l.x[2] != 200 || !l.barH {
		t.Errorf("too narrow: columns at %v, bar %v", l.x, l.barH)
	}
}

func TestFitRowsAsksForItsRows(t *testing.T) {
	look.Apply(test.NewTempApp(t), look.Light, 1)
	g := New(zoneCols, newZones(5), FitRows(8))
	if got, want := g.MinSize().Height, int(g.headHeight())+5*36+1; got != float32(want) {
		t.Errorf("height %v, want %v", got, want)
	}
	g = New(zoneCols, newZones(50), FitRows(8))
	if got, want := g.MinSize().Height, int(g.headHeight())+8*36+1; got != float32(want) {
		t.Errorf("height %v, want %v", got, want)
	}
}

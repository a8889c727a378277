package pages

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/test"
	"fyne.io/fyne/v2/widget"

	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/session"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage"
	"anodewright/storage/assetfile"
)

var today = hull.NewDate(2026, 12, 1)

// small is the content of the smallest window that has to show everything:
// 1280 by 800 less the menu bar.
var small = fyne.NewSize(1280, 775)

// register is the file of the register that shown made last.
var register string

// shown is a frame in a window of the given size, over a new register with
// the assets given.
func shown(t testing.TB, mode look.Mode, scale float32, size fyne.Size, assets ...[]byte) *Frame {
	t.Helper()
	t.Setenv("LANG", "en_GB.UTF-8")
	r, err := storage.Open(filepath.Join(t.TempDir(), "fleet.anodewright"), storage.User("tester"))
	must(t, err)
	t.Cleanup(func() { r.Close() })
	register = r.Path()
	s, err := session.Open(r, today)
	must(t, err)
	for _, text := range assets {
		a, err := assetfile.Decode(text)
		must(t, err)
		must(t, s.Add(a, "test"))
	}
	s.Wait()
	testOnlyInline = true
	a := test.NewTempApp(t)
	look.Apply(a, mode, scale)
	w := test.NewTempWindow(t, nil)
	f := New(a, w, s)
	s.Notify(func() {}) // the test driver would update on the session's goroutine
	w.Resize(size)
	f.setLook(mode, scale)
	return f
}

// tern is the asset file whose plan is known: see the comments of the tests.
func tern(t *testing.T) []byte {
	t.Helper()
	text, err := os.ReadFile(filepath.Join("..", "..", "testdata", "assets", "tern-passage.json"))
	must(t, err)
	return text
}

// fleet is the demo fleet.
func fleet() [][]byte { return assets.Demo() }

func must(t testing.TB, err error) {
	t.Helper()
	if err != nil {
		t.Fatal(err)
	}
}

// settle waits for the outcomes and shows them.
func settle(f *Frame) {
	f.s.Wait()
	f.Update()
}

// open shows a page by its title.
func (f *Frame) open(t *testing.T, title string) page {
	t.Helper()
	for i, p := range f.pages {
		if p.title() == title {
			f.show(i)
			return p
		}
	}
	t.Fatalf("no page %s", title)
	return nil
}

// everything returns all objects of the window that are to be seen, dialogs
// included.
func everything(f *Frame) []fyne.CanvasObject {
	objects := within(f.win.Content())
	for _, o := range f.win.Canvas().Overlays().List() {
		objects = append(objects, within(o)...)
	}
	return objects
}

// within returns an object and all that is to be seen in it, each where it is;
// test.LaidOutObjects would first give each the size that it asks for.
func within(o fyne.CanvasObject) []fyne.CanvasObject {
	if !o.Visible() {
		return nil
	}
	all := []fyne.CanvasObject{o}
	for _, part := range partsOf(o) {
		all = append(all, within(part)...)
	}
	return all
}

// partsOf returns what an object is made of.
func partsOf(o fyne.CanvasObject) []fyne.CanvasObject {
	switch o := o.(type) {
	case *fyne.Container:
		return o.Objects
	case fyne.Widget:
		return test.WidgetRenderer(o).Objects()
	}
	return nil
}

// scrolls says whether what lies in an object may reach over its edge.
func scrolls(o fyne.CanvasObject) bool {
	switch o.(type) {
	case *container.Scroll, *widget.Entry, *grid.Grid:
		return true
	}
	return false
}

// texts returns the texts that the window shows.
func texts(f *Frame) []string {
	var all []string
	for _, o := range everything(f) {
		if t, ok := o.(*canvas.Text); ok && t.Text != "" {
			all = append(all, t.Text)
		}
	}
	return all
}

// wants fails unless each of the parts is shown, whole or within another text
// or over its lines.
func wants(t *testing.T, f *Frame, parts ...string) {
	t.Helper()
	all := strings.Join(texts(f), "\n")
	for _, want := range parts {
		if !strings.Contains(all, want) && !strings.Contains(strings.ReplaceAll(all, "\n", " "), want) {
			t.Errorf("%q is not shown in:\n%s", want, all)
		}
	}
}

// enter types a text into a cell as a person does, and Enter.
func enter(t *testing.T, f *Frame, g *grid.Grid, row, col int, text string) {
	t.Helper()
	c := f.win.Canvas()
	g.Select(row, col)
	c.Focus(g)
	typed(f, text)
	if !g.Editing() {
		t.Fatalf("typing into row %d, column %d opened no editor", row, col)
	}
	key(f, fyne.KeyReturn)
	settle(f)
}

// typed types a text into whatever has the keyboard.
func typed(f *Frame, text string) {
	for _, r := range text {
		f.win.Canvas().Focused().TypedRune(r)
	}
}

// key presses a key.
func key(f *Frame, name fyne.KeyName) {
	f.win.Canvas().Focused().TypedKey(&fyne.KeyEvent{Name: name})
}

// colOf returns the place of a column by its id.
func colOf(t *testing.T, g *grid.Grid, id string) int {
	t.Helper()
	for i, c := range g.Columns() {
		if c.ID == id {
			return i
		}
	}
	t.Fatalf("no column %s", id)
	return 0
}

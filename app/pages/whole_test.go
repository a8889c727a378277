package pages

import (
	"fmt"
	"os"
	"regexp"
	"strings"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/theme"

	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/session"
)

func readFile(path string) (string, error) {
	text, err := os.ReadFile(path)
	return string(text), err
}

// eachView shows every page of every demo asset.
func eachView(t *testing.T, scale float32, do func(t *testing.T, f *Frame)) {
	f := shown(t, look.Light, scale, small, fleet()...)
	for _, item := range f.s.Fleet() {
		f.s.Select(item.ID)
		for _, p := range f.pages {
			f.open(t, p.title())
			f.Update()
			t.Run(item.Asset.Name+"/"+p.title(), func(t *testing.T) { do(t, f) })
		}
	}
}

// TestFontHasEveryRune looks at every text of every page, the cells and fields
// that are not in view included.
func TestFontHasEveryRune(t *testing.T) {
	check := func(t *testing.T, where, text string) {
		if missing := look.MissingRunes(text); len(missing) > 0 {
			t.Errorf("%s: the font lacks %q of %q", where, string(missing), text)
		}
	}
	eachView(t, 1, func(t *testing.T, f *Frame) {
		for _, text := range texts(f) {
			check(t, "shown", text)
		}
		for _, g := range grids(f) {
			for col, c := range g.Columns() {
				check(t, "head", c.Title+c.Unit)
				for row := range g.Source().Rows() {
					cell := g.Source().Cell(row, col)
					check(t, c.Title, cell.Text+cell.Sub+cell.Fault)
				}
			}
		}
	})
	for _, fields := range [][]session.Field{session.ZoneColumns(), session.ZoneDetails(), session.AssetFields(), session.WaterFields(), session.DockingFields(), session.ReadingFields()} {
		for _, f := range fields {
			check(t, f.Key, f.Title+f.Unit+f.Hint)
		}
	}
}

func TestFontHasEveryRuneOfDialogs(t *testing.T) {
	f := shown(t, look.Light, 1, small, fleet()...)
	for name, show := range map[string]func(){
		"about": f.about, "new asset": f.newAsset, "import": f.importAsset, "export": f.exportWorkbook, "remove": f.removeAsset,
		"areas": func() { f.estimateAreas(0) },
	} {
		show()
		all := texts(f)
		if missing := look.MissingRunes(strings.Join(all, "")); len(missing) > 0 {
			t.Errorf("%s: the font lacks %q", name, string(missing))
		}
		dialogs := f.win.Canvas().Overlays().List()
		if len(dialogs) != 1 {
			t.Fatalf("%s: %d dialogs are open", name, len(dialogs))
		}
		f.win.Canvas().Overlays().Remove(dialogs[0])
	}
}

func grids(f *Frame) []*grid.Grid {
	var all []*grid.Grid
	for _, o := range everything(f) {
		if g, ok := o.(*grid.Grid); ok {
			all = append(all, g)
		}
	}
	return all
}

// TestLabelsAndFiguresAreWhole holds that buttons, headings, the heads of
// columns and figures are not cut short in the smallest window. Names and
// sentences may be: the table shows them whole under itself.
func TestLabelsAndFiguresAreWhole(t *testing.T) {
	for _, scale := range []float32{1, 1.5} {
		t.Run(fmt.Sprint(scale), func(t *testing.T) {
			eachView(t, scale, labelsAreWhole)
		})
	}
}

func labelsAreWhole(t *testing.T, f *Frame) {
	names := f.s.Asset().Name
	for _, z := range f.s.Asset().Zones {
		names += "\n" + z.Name
	}
	window := f.win.Canvas().Size()
	for _, o := range everything(f) {
		switch o := o.(type) {
		case *look.PushButton:
			if m := o.MinSize(); o.Size().Width < m.Width-0.5 || o.Size().Height < m.Height-0.5 {
				t.Errorf("the button %q has %v of %v", o.Text, o.Size(), m)
			}
		case *look.CardBox:
			holdsItsButtons(t, o)
		case *look.Text:
			shown := o.String()
			for _, c := range within(o) {
				if line, ok := c.(*canvas.Text); ok {
					shown = line.Text
				}
			}
			if shown != o.String() && !strings.Contains(names, o.String()) && !inFleet(f, o) {
				t.Errorf("%q is cut to %q", o.String(), shown)
			}
		}
		at := fyne.CurrentApp().Driver().AbsolutePositionForObject(o)
		if b, ok := o.(*look.PushButton); ok && (at.X < 0 || at.X+o.Size().Width > window.Width+0.5 || at.Y+o.Size().Height > window.Height+0.5) {
			t.Errorf("the button %q lies outside the window: %v", b.Text, at)
		}
	}
	for _, g := range grids(f) {
		wholeFigures(t, g, names)
	}
}

// inFleet says whether a text belongs to the list at the left, whose lines may
// be cut.
func inFleet(f *Frame, o fyne.CanvasObject) bool {
	return fyne.CurrentApp().Driver().AbsolutePositionForObject(o).X < f.fleet.all.Size().Width
}

func holdsItsButtons(t *testing.T, card *look.CardBox) {
	t.Helper()
	driver := fyne.CurrentApp().Driver()
	left := driver.AbsolutePositionForObject(card)
	for _, o := range within(card) {
		if b, ok := o.(*look.PushButton); ok {
			if at := driver.AbsolutePositionForObject(b); at.X+b.Size().Width > left.X+card.Size().Width {
				t.Errorf("the button %q reaches over the edge of its card", b.Text)
			}
		}
	}
}

var date = regexp.MustCompile(`^(\d{1,2} [A-Z][a-z]{2} \d{4}|\d{4}-\d\d-\d\d)$`)

func wholeFigures(t *testing.T, g *grid.Grid, names string) {
	t.Helper()
	size, small := theme.Size(theme.SizeNameText), theme.Size(theme.SizeNameCaptionText)
	for col, c := range g.Columns() {
		room := g.ColumnWidth(col) - look.Px(16)
		fits := func(what, text string, size float32, bold bool) {
			if w := fyne.MeasureText(text, size, fyne.TextStyle{Bold: bold}).Width; w > room+0.5 {
				t.Errorf("%s %q of column %q takes %.0f of %.0f", what, text, c.Title, w, room)
			}
		}
		fits("the head", c.Title, small, false)
		fits("the unit", c.Unit, small, false)
		for row := range g.Source().Rows() {
			cell := g.Source().Cell(row, col)
			if c.Right || c.ID == "field" && !strings.Contains(names, cell.Text) || c.ID == "action" || date.MatchString(cell.Text) {
				fits("the figure", cell.Text, size, cell.Bold)
			}
		}
	}
}

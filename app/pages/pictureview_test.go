package pages

import (
	"image/color"
	"strings"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"

	"anodewright/app/look"
	"anodewright/hull"
)

var roomy = fyne.NewSize(1600, 1000)

// press presses the mouse in the middle of a zone of the picture.
func press(t *testing.T, f *Frame, zone int) {
	t.Helper()
	at, ok := f.band.view.drawing.Centre(zone)
	if !ok {
		t.Fatalf("zone %d is not in the picture", zone)
	}
	f.band.view.MouseDown(&desktop.MouseEvent{PointEvent: fyne.PointEvent{Position: fyne.NewPos(at.X, at.Y)}})
}

func TestPictureSelectsTheZoneEverywhere(t *testing.T) {
	f := shown(t, look.Light, 1, roomy, fleet()...)
	p := f.open(t, "Steel").(*steel)
	press(t, f, 3)
	if row, _ := p.zones.Selected(); row != 3 {
		t.Errorf("the table of zones is at row %d", row)
	}
	name := f.s.Asset().Zones[3].Name
	wants(t, f, "Current demand: "+name)
	f.open(t, "Forecast")
	wants(t, f, "How the anodes waste: "+name)
	press(t, f, 0)
	wants(t, f, "How the anodes waste: "+f.s.Asset().Zones[0].Name)
	if d := f.open(t, "Dockings").(*dockings); true {
		press(t, f, 2)
		if row, col := d.plan.Selected(); row != 2 || col < 2 {
			t.Errorf("the plan is at %d, %d", row, col)
		}
	}
	f.open(t, "Basis")
	if b := f.pages[f.current].(*basisPage); b.zone.list.Selected != f.s.Asset().Zones[2].Name {
		t.Errorf("Basis shows %q", b.zone.list.Selected)
	}
	// and the other way round
	f.open(t, "Steel")
	p.zones.Select(0, 0)
	p.zones.TypedKey(&fyne.KeyEvent{Name: fyne.KeyDown})
	if f.band.view.selected != 1 {
		t.Errorf("the picture outlines zone %d, the table is at row 1", f.band.view.selected)
	}
}

func TestHoverNamesZoneStateAndCause(t *testing.T) {
	f := shown(t, look.Light, 1, roomy, fleet()[1])
	var thin int
	for i, s := range f.band.view.states {
		if s.State == "thin" {
			thin = i
		}
	}
	at, _ := f.band.view.drawing.Centre(thin)
	f.band.view.MouseMoved(&desktop.MouseEvent{PointEvent: fyne.PointEvent{Position: fyne.NewPos(at.X, at.Y)}})
	wants(t, f, f.s.Asset().Zones[thin].Name+" · thin of mass")
	f.band.view.MouseOut()
	wants(t, f, "1 thin: Sea chests, port · 8 sound")
}

func TestDateStripMovesTheStates(t *testing.T) {
	f := shown(t, look.Light, 1, roomy, fleet()[1])
	f.open(t, "Forecast")
	strip, a := f.band.strip, f.s.Asset()
	if f.cursor != today {
		t.Fatalf("the cursor begins at %v", f.cursor)
	}
	before := strings.Join(texts(f), "\n")
	for _, c := range []struct {
		key  fyne.KeyName
		want hull.Date
	}{
		{fyne.KeyRight, today.AddMonths(1)}, {fyne.KeyLeft, today}, {fyne.KeyEnd, a.Horizon}, {fyne.KeyRight, a.Horizon},
		{fyne.KeyHome, a.Start()}, {fyne.KeyLeft, a.Start()}, {fyne.KeyPageDown, a.Start().AddMonths(12)},
	} {
		strip.TypedKey(&fyne.KeyEvent{Name: c.key})
		if f.cursor != c.want || strip.cursor != c.want {
			t.Errorf("%s takes the cursor to %v, want %v", c.key, f.cursor, c.want)
		}
	}
	strip.TypedKey(&fyne.KeyEvent{Name: fyne.KeyHome})
	strip.TypedKey(&fyne.KeyEvent{Name: fyne.KeyDown})
	if first := f.s.Asset().Readings[0].Date; f.cursor > first {
		t.Errorf("the next mark is at %v, a survey was on %v", f.cursor, first)
	}
	x := strip.x(a.Horizon) - 2
	strip.Dragged(&fyne.DragEvent{PointEvent: fyne.PointEvent{Position: fyne.NewPos(x, 10)}})
	if f.cursor < a.Horizon-60 {
		t.Errorf("dragged to the end, the cursor is at %v", f.cursor)
	}
	states := f.s.Outcome().States().At(f.cursor)
	for i, s := range f.band.view.states {
		if s != states[i] {
			t.Errorf("zone %d is shown as %v on %v, it is %v", i, s, f.cursor, states[i])
		}
	}
	if after := strings.Join(texts(f), "\n"); after == before {
		t.Error("dragging the cursor changed no text")
	}
	p := f.pages[f.current].(*forecastPage)
	if got := hull.Date(p.charts[0].cursor); got != f.cursor {
		t.Errorf("the forecast is read on %v, the cursor is at %v", got, f.cursor)
	}
}

func TestStripMarksTellWhatHappens(t *testing.T) {
	f := shown(t, look.Light, 1, roomy, fleet()[1])
	kinds := map[markKind]int{}
	for _, m := range f.band.strip.marks {
		kinds[m.kind]++
		if m.words == "" || m.label == "" {
			t.Errorf("the mark on %v says nothing", m.date)
		}
	}
	for kind, want := range map[markKind]int{markDocking: 3, markToday: 1, markSurvey: 2} {
		if kinds[kind] != want {
			t.Errorf("%d marks of kind %d, want %d", kinds[kind], kind, want)
		}
	}
	if kinds[markOrder] == 0 {
		t.Error("no order-by date is marked")
	}
}

func TestPictureFoldsByKeyAndStaysSo(t *testing.T) {
	f := shown(t, look.Light, 1, small, fleet()[1])
	if !f.band.isOpen() || !f.band.view.Visible() {
		t.Fatal("the picture is folded in the smallest window at scale 1")
	}
	if share := f.band.all.Size().Height / small.Height; share > 0.3 {
		t.Errorf("picture and dates take %.2f of the window", share)
	}
	p := f.open(t, "Steel").(*steel)
	for row := range 7 {
		if _, _, seen := p.zones.CellPlace(row, 0); !seen {
			t.Errorf("row %d of the zones is not in view", row)
		}
	}
	p.zones.Focus()
	key(f, fyne.KeyF8)
	if f.band.isOpen() || f.band.view.Visible() || f.s.Setting("picture") != "folded" {
		t.Error("F8 does not fold the picture")
	}
	if h := f.band.all.Size().Height; h > 40 {
		t.Errorf("folded it is %v high", h)
	}
	f.Restore()
	if f.band.isOpen() {
		t.Error("the fold is forgotten")
	}
	f.band.fold.MouseDown(nil)
	if !f.band.isOpen() || !f.band.view.Visible() {
		t.Error("the button does not open the picture")
	}
}

func TestPictureFoldsInLowWindows(t *testing.T) {
	f := shown(t, look.Light, 1.5, small, fleet()[0])
	if f.band.isOpen() {
		t.Error("the picture is open where it takes too much")
	}
	f.toggleBand()
	wants(t, f, "the window is too low for the picture")
	f.win.Resize(fyne.NewSize(1600, 1200))
	if !f.band.isOpen() {
		t.Error("the picture does not open in a high window")
	}
}

// The picture takes its colours from the theme, also when that changes.
func TestPictureFollowsTheTheme(t *testing.T) {
	f := shown(t, look.Light, 1, roomy, fleet()[0])
	sound := func() color.RGBA {
		at, _ := f.band.view.drawing.Centre(1)
		img := f.band.view.pixels(1400, 140)
		unit := 1400 / f.band.view.Size().Width
		return color.RGBAModel.Convert(img.At(int(at.X*unit), int(at.Y*unit))).(color.RGBA)
	}
	near := func(got color.RGBA, want color.NRGBA) bool {
		return got == color.RGBA(want)
	}
	if got, want := sound(), look.Color(look.ColorSound); !near(got, want) {
		t.Errorf("light: %v, want %v", got, want)
	}
	light := sound()
	f.setLook(look.Dark, 1)
	if got, want := sound(), look.Color(look.ColorSound); !near(got, want) || got == light {
		t.Errorf("dark: %v, want %v", got, want)
	}
}

func BenchmarkPicturePixels(b *testing.B) {
	f := shown(b, look.Light, 1, roomy, fleet()[0])
	for b.Loop() {
		f.band.view.paint.image = nil
		f.band.view.pixels(1400, 140)
	}
}

package pages

import (
	"fmt"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"

	"anodewright/app/look"
)

// The smallest window shows twelve zones in eight columns at text scale 1,
// with the picture above them, and eight zones at 1.5.
func TestSteelShowsEnoughRows(t *testing.T) {
	for scale, rows := range map[float32]int{1: 12, 1.25: 8, 1.5: 8} {
		size := fyne.NewSize(small.Width, small.Height-24*(scale-1)) // the menu is higher, too
		f := shown(t, look.Light, scale, size, fleet()...)
		for _, item := range f.s.Fleet() {
			f.s.Select(item.ID)
			p := f.open(t, "Steel").(*steel)
			f.Update()
			if got := p.zones.RowsShown(); got < min(rows, len(item.Asset.Zones)) {
				t.Errorf("%s at text scale %g: %d rows, want %d", item.Asset.Name, scale, got, rows)
			}
			if scale > 1 {
				continue
			}
			for col := range 8 {
				pos, size, seen := p.zones.CellPlace(0, col)
				left := fyne.CurrentApp().Driver().AbsolutePositionForObject(p.zones).X
				if !seen || pos.X+size.Width > left+p.zones.Size().Width+0.5 {
					t.Errorf("%s: column %d is not wholly in view", item.Asset.Name, col)
				}
			}
			if !f.band.isOpen() || f.band.all.Size().Height > 0.3*small.Height {
				t.Errorf("%s: the picture takes %v of %v", item.Asset.Name, f.band.all.Size().Height, small.Height)
			}
		}
	}
}

func TestLowerPartFoldsByKey(t *testing.T) {
	f := shown(t, look.Light, 1, small, fleet()...)
	f.s.Select(f.s.Fleet()[0].ID)
	p := f.open(t, "Steel").(*steel)
	if p.drawer.open || !p.drawer.strip.Visible() {
		t.Fatal("in the smallest window the demand is not folded to its line")
	}
	key(f, fyne.KeyF7)
	if !p.drawer.open || !p.card.Visible() || p.drawer.strip.Visible() {
		t.Error("F7 does not open the demand")
	}
	if p.demand.RowsShown() < 2 {
		t.Errorf("the open demand shows %d rows", p.demand.RowsShown())
	}
	wants(t, f, "By offshore code", "Hide ▾")
	f.Restore()
	if !p.drawer.open {
		t.Error("the choice is forgotten")
	}
	p.drawer.hide.MouseDown(nil)
	if p.drawer.open {
		t.Error("Hide does not fold it")
	}
	f.win.Resize(fyne.NewSize(1920, 1300))
	p.drawer.choice = ""
	f.Update()
	p.drawer.all.Refresh()
	if !p.drawer.open || p.zones.RowsShown() < 12 {
		t.Errorf("in a high window: open %v, %d rows", p.drawer.open, p.zones.RowsShown())
	}
}

func TestFleetListFoldsByKeyAndForLargeText(t *testing.T) {
	f := shown(t, look.Light, 1, small, fleet()...)
	if !f.fleet.all.Visible() || f.rail.show.Visible() {
		t.Fatal("the fleet is folded at text scale 1")
	}
	f.open(t, "Steel")
	wide := f.body.Size().Width
	key(f, fyne.KeyF9)
	if f.fleet.all.Visible() || !f.rail.show.Visible() || f.body.Size().Width < wide+200 {
		t.Errorf("F9 does not give its room to the page: %v, then %v", wide, f.body.Size().Width)
	}
	key(f, fyne.KeyF9)
	if !f.fleet.all.Visible() {
		t.Error("F9 does not bring the fleet back")
	}
	f = shown(t, look.Light, 1.5, small, fleet()...)
	if f.fleet.all.Visible() {
		t.Error("at text scale 1.5 the fleet takes room from the pages")
	}
	wants(t, f, "Fleet ▸")
	f.rail.show.MouseDown(nil)
	if !f.fleet.all.Visible() {
		t.Error("the word does not bring the fleet back")
	}
}

// clipped lists the texts and buttons that are given less room than they need,
// and those that reach over the window's edge. What may scroll or be cut with
// an ellipsis, as names and sentences in tables, is told by its own widget.
func clipped(f *Frame) []string {
	var faults []string
	window := f.win.Canvas().Size()
	driver := fyne.CurrentApp().Driver()
	var look1 func(o fyne.CanvasObject, scrolled bool)
	look1 = func(o fyne.CanvasObject, scrolled bool) {
		if !o.Visible() {
			return
		}
		name, need := "", fyne.Size{}
		switch o := o.(type) {
		case *look.Text:
			name, need = o.String(), o.MinSize()
			if o.Shrink {
				need.Width = 0
			}
		case *look.PushButton:
			name, need = o.Text, o.MinSize()
		case *linkText:
			name, need = o.text.String(), o.MinSize()
		case *look.Badge:
			name, need = o.Word(), fyne.NewSize(0, o.MinSize().Height)
		case *look.Paragraph:
			name, need = o.Text(), fyne.NewSize(0, o.MinSize().Height)
		case *canvas.Text:
			name, need = o.Text, fyne.NewSize(o.MinSize().Width, 0)
		}
		if size := o.Size(); name != "" && (size.Width < need.Width-1 || size.Height < need.Height-1) {
			faults = append(faults, fmt.Sprintf("%T %q has %v of %v", o, name, size, need))
		}
		if at := driver.AbsolutePositionForObject(o); name != "" && !scrolled &&
			(at.X < -1 || at.Y < -1 || at.X+o.Size().Width > window.Width+1 || at.Y+o.Size().Height > window.Height+1) {
			faults = append(faults, fmt.Sprintf("%T %q lies outside the window, at %v, %v", o, name, at, o.Size()))
		}
		scrolled = scrolled || scrolls(o)
		for _, part := range partsOf(o) {
			look1(part, scrolled)
		}
	}
	look1(f.win.Content(), false)
	for _, o := range f.win.Canvas().Overlays().List() {
		look1(o, false)
	}
	return faults
}

// TestNothingIsClipped walks every page of every demo asset in the smallest
// window, in both themes' one layout, at both ends of the text sizes.
func TestNothingIsClipped(t *testing.T) {
	for _, scale := range []float32{1, 1.5} {
		t.Run(fmt.Sprint(scale), func(t *testing.T) {
			eachView(t, scale, isClippedNowhere)
		})
	}
}

func isClippedNowhere(t *testing.T, f *Frame) {
	for _, fault := range clipped(f) {
		t.Error(fault)
	}
	if d, ok := f.pages[f.current].(drawn); ok {
		was := d.lower().choice
		d.lower().toggle()
		for _, fault := range clipped(f) {
			t.Error("with the lower part turned: " + fault)
		}
		d.lower().choice = was
	}
}

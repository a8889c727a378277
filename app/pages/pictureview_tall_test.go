package pages

import (
	"testing"

	"fyne.io/fyne/v2"

	"anodewright/app/look"
	"anodewright/hull"
)

// A jacket and a jetty of piles stand beside the pages where these keep the
// width they need, a ship and a sealine above them; the dates are always above.
func TestTallAssetsStandBesideThePages(t *testing.T) {
	f := shown(t, look.Light, 1, small, fleet()...)
	for _, item := range f.s.Fleet() {
		a := item.Asset
		tall := a.Kind == hull.Jacket || a.Kind == hull.Harbour
		f.s.Select(item.ID)
		p := f.open(t, "Steel").(*steel)
		if f.band.beside != 0 {
			t.Errorf("%s: beside the pages with the fleet open takes columns away", a.Name)
		}
		key(f, fyne.KeyF9)
		if got := f.band.beside > 0; got != tall {
			t.Errorf("%s: beside the pages is %v, want %v", a.Name, got, tall)
		}
		for col := range 8 {
			if _, _, seen := p.zones.CellPlace(0, col); !seen {
				t.Errorf("%s: column %d is not in view", a.Name, col)
			}
		}
		if tall {
			view, strip := f.band.side, f.band.all
			share := (view.Size().Width*view.Size().Height + strip.Size().Width*strip.Size().Height) / (small.Width * small.Height)
			if share > 0.3 {
				t.Errorf("%s: picture and dates take %.2f of the window", a.Name, share)
			}
			if view.Size().Height < 2*view.Size().Width || view.Position().Y < strip.Position().Y+strip.Size().Height || view.Position().X+view.Size().Width > f.body.Position().X {
				t.Errorf("%s: the picture lies at %v, %v, the dates at %v, %v, the page at %v", a.Name, view.Position(), view.Size(), strip.Position(), strip.Size(), f.body.Position())
			}
			if !f.band.strip.Visible() {
				t.Errorf("%s: no dates", a.Name)
			}
			for zone := range a.Zones {
				if _, ok := f.band.view.drawing.Centre(zone); !ok {
					t.Errorf("%s: %s cannot be pressed", a.Name, a.Zones[zone].Name)
				}
			}
			press(t, f, 1)
			if row, _ := p.zones.Selected(); row != 1 {
				t.Errorf("%s: a press selects row %d", a.Name, row)
			}
			key(f, fyne.KeyF8)
			if f.band.isOpen() || f.band.side.Visible() || f.body.Position().X != 0 {
				t.Errorf("%s: F8 leaves the picture beside the page", a.Name)
			}
			key(f, fyne.KeyF8)
			if f.band.beside == 0 {
				t.Errorf("%s: F8 does not bring it back", a.Name)
			}
			for _, fault := range clipped(f) {
				t.Errorf("%s: %s", a.Name, fault)
			}
		}
		key(f, fyne.KeyF9)
	}
}

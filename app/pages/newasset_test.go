package pages

import (
	"strings"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/test"

	"anodewright/app/look"
	"anodewright/hull"
	"anodewright/hull/propose"
)

// form opens the form of a new asset.
func form(t *testing.T) *assetForm {
	t.Helper()
	f := shown(t, look.Light, 1, small, fleet()...)
	n := &assetForm{f: f, form: propose.Form{Kind: hull.Ship, Ship: "general-cargo"}}
	n.build()
	n.d.Show()
	f.win.Canvas().Focus(n.name)
	return n
}

// By keyboard alone: a name, a kind, one particular, Enter.
func TestNewAssetByKeyboard(t *testing.T) {
	n := form(t)
	f, c := n.f, n.f.win.Canvas()
	before := len(f.s.Fleet())
	test.Type(n.name, "Dunlin Bank")
	for range 3 { // ship, floating unit, jacket
		c.FocusNext()
	}
	c.Focused().TypedKey(&fyne.KeyEvent{Name: fyne.KeySpace})
	if n.form.Kind != hull.Jacket || n.typed.Visible() {
		t.Fatalf("the third kind is %s, ship types shown: %v", n.form.Kind, n.typed.Visible())
	}
	for range 3 { // harbour, pipeline, the first particular
		c.FocusNext()
	}
	if c.Focused() != fyne.Focusable(n.texts["water_depth_m"]) {
		t.Fatalf("behind the kinds the keyboard goes to %T", c.Focused())
	}
	test.Type(n.texts["water_depth_m"], "62")
	if got := n.title.String(); !strings.HasSuffix(got, " zones") {
		t.Errorf("the proposal is headed %q", got)
	}
	c.Focused().TypedKey(&fyne.KeyEvent{Name: fyne.KeyReturn})
	settle(f)
	a := f.s.Asset()
	if len(f.s.Fleet()) != before+1 || a.Name != "Dunlin Bank" || a.Kind != hull.Jacket {
		t.Fatalf("%d assets, open is %s, %s", len(f.s.Fleet()), a.Name, a.Kind)
	}
	if _, ok := a.Zone("legs-30-62"); !ok {
		t.Error("the depth entered made no zone down to it")
	}
	if c.Overlays().Top() != nil {
		t.Error("the form is still open")
	}
	if got := f.proposedText(); !strings.Contains(got, "as proposed") {
		t.Errorf("nothing says that the areas are to be corrected: %q", got)
	}
}

// Start values follow what is entered; a fault is named by its title, keeps the
// form open and adds nothing.
func TestNewAssetSaysWhatIsWrong(t *testing.T) {
	n := form(t)
	before := len(n.f.s.Fleet())
	test.Type(n.texts["length_pp_m"], "130")
	if got := n.texts["beam_m"].PlaceHolder; got != "20" {
		t.Errorf("beam of 130 m starts at %q, want 20", got)
	}
	n.make()
	if got := n.wrong.Text(); got != "want a name" {
		t.Errorf("without a name it says %q", got)
	}
	n.name.SetText("Dunlin Bank")
	n.texts["draught_m"].SetText("99")
	if got := n.wrong.Text(); !strings.HasPrefix(got, "Draught: want") || n.title.String() != "No zones" {
		t.Errorf("a draught of 99 m: %q under %q", got, n.title.String())
	}
	n.make()
	n.texts["draught_m"].SetText("deep")
	n.make()
	if got := n.wrong.Text(); !strings.HasPrefix(got, "Draught: want a number") {
		t.Errorf("a draught that is no number: %q", got)
	}
	if len(n.f.s.Fleet()) != before || n.f.win.Canvas().Overlays().Top() == nil {
		t.Error("a faulty form added an asset or was closed")
	}
	n.texts["draught_m"].SetText("")
	if n.wrong.Text() != "" {
		t.Errorf("put right it still says %q", n.wrong.Text())
	}
	n.name.TypedKey(&fyne.KeyEvent{Name: fyne.KeyEscape})
	if n.f.win.Canvas().Overlays().Top() != nil || len(n.f.s.Fleet()) != before {
		t.Error("Escape does not close the form")
	}
}

package pages

import (
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/test"

	"anodewright/anodes/protection"
	"anodewright/app/look"
	"anodewright/hull"
)

// The words stand beside the table for a zone with a result, and leave it the
// whole room for one without.
func TestProtectionBesideTheTable(t *testing.T) {
	look.Apply(test.NewTempApp(t), look.Light, 1)
	table := canvas.NewRectangle(nil)
	p := newProtected(table)
	p.content().Resize(fyne.NewSize(1000, 200))
	if table.Size().Width != 1000 {
		t.Errorf("without a result the table is %g wide", table.Size().Width)
	}
	bare := hull.NewDate(2030, 1, 1)
	r := &protection.Result{Coat: &protection.ZincCoat{Thickness: 85, Class: "C5", Loss: 8.4, Years: 10, Bare: &bare}, Unbonded: "Cut off."}
	p.show(r)
	if w := table.Size().Width; w > 620 || !p.words.scroll.Visible() {
		t.Errorf("with a result the table is %g wide, words visible: %v", w, p.words.scroll.Visible())
	}
	if got, want := len(p.words.box.Objects), 1+len(r.Words()); got != want {
		t.Errorf("%d lines, want %d", got, want)
	}
	for i, sentence := range r.Words() {
		line, ok := p.words.box.Objects[i+1].(*look.Paragraph)
		if !ok || line.Text() != sentence {
			t.Errorf("line %d is not %q", i, sentence)
		}
	}
	p.show(nil)
	if table.Size().Width != 1000 || p.words.scroll.Visible() {
		t.Errorf("back without a result the table is %g wide", table.Size().Width)
	}
}

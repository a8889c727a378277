package pages

import (
	"strings"
	"testing"

	"anodewright/anodes/renewal"
	"anodewright/app/look"
)

// Limits typed in the dialog are those of the plan; a text that is none stays
// with what is wrong, and limits that no plan keeps are told.
func TestLimitsDialog(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := f.open(t, "Dockings").(*dockings)
	l := f.newLimits(f.s.Limits(), "EUR")
	l.d.Show()
	l.entries[0].SetText("13,5")
	l.use()
	if !strings.Contains(l.wrong.Text(), "whole number") || f.s.Limits() != (renewal.Limits{}) {
		t.Errorf("half a piece: %q, limits %+v", l.wrong.Text(), f.s.Limits())
	}
	l.entries[0].SetText("14")
	l.entries[1].SetText("20 000")
	l.use()
	settle(f)
	if got := f.s.Limits(); got != (renewal.Limits{Pieces: 14, Budget: 20000}) || f.win.Canvas().Overlays().Top() != nil {
		t.Errorf("limits %+v", got)
	}
	if got := limitsText(f.s.Outcome()); !strings.HasPrefix(got, "Within limits: at most 14 pieces") {
		t.Errorf("says %q", got)
	}
	l = f.newLimits(f.s.Limits(), "EUR")
	if l.entries[0].Text != "14" || l.entries[1].Text != "20000" || l.entries[2].Text != "" {
		t.Errorf("opened again: %q, %q, %q", l.entries[0].Text, l.entries[1].Text, l.entries[2].Text)
	}
	l.d.Show()
	l.entries[0].SetText("13")
	l.entries[1].SetText("")
	l.use()
	settle(f)
	p.update()
	if got := limitsText(f.s.Outcome()); !strings.Contains(got, "1 more piece") && !strings.Contains(got, "pieces") {
		t.Errorf("13 pieces, where 14 are needed: %q", got)
	}
	if got := costText(f.s.Outcome()); !strings.HasSuffix(got, "beyond the limits") {
		t.Errorf("the card says %q", got)
	}
}

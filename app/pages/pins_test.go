package pages

import (
	"strings"
	"testing"

	"fyne.io/fyne/v2"

	"anodewright/anodes/renewal"
	"anodewright/app/look"
)

// The test asset's plan adds 14 pieces at its only docking; pinned to a
// renewal it costs more, which the cell and the card's head say.
func TestPinsOnTheDockingsPage(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := f.open(t, "Dockings").(*dockings)
	free := f.s.Outcome().Money.Total
	p.plan.Select(0, 2)
	f.win.Canvas().Focus(p.plan)
	key(f, fyne.KeyP)
	settle(f)
	wants(t, f, "pinned ±0", "Pinned: add with al-45.")
	key(f, fyne.KeyP)
	settle(f)
	if len(f.s.Pins()) != 0 {
		t.Fatalf("after P twice there are pins %v", f.s.Pins())
	}
	var labels []string
	var renew *fyne.MenuItem
	for _, m := range p.pinChoices(0, 0).Items {
		labels = append(labels, m.Label)
		if strings.Contains(m.Label, "renew") {
			renew = m.ChildMenu.Items[0]
		}
	}
	if renew == nil {
		t.Fatalf("the menu offers %q", labels)
	}
	renew.Action()
	settle(f)
	o := f.s.Outcome()
	l, _ := o.Action(0, 0)
	if l.Action != renewal.Renew || o.Money.Total <= free || o.Money.Free != free {
		t.Fatalf("pinned to a renewal the plan does %v for %+v", l.Action, o.Money)
	}
	wants(t, f, "pinned "+signed(o.Money.Total-free), "1 pinned: "+signed(o.Money.Total-free)+" to the cheapest")
	if held := p.pinChoices(1, 0); held != nil {
		t.Errorf("the propeller, held by the sides, can be pinned: %v", held.Items)
	}
}

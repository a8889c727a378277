//go:build e2e && !ci && linux

package main_test

import (
	"slices"
	"testing"

	"anodewright/hull"
)

// The day in dock by the keyboard alone: the wastage found is typed set by
// set, it is kept when the power fails, the docking is closed, and after a
// restart the closing can be taken back.
func TestDockFloorByKeyboardAlone(t *testing.T) {
	w := start(t)
	before := w.fleet()[0]
	w.key("ctrl+6")
	w.still()
	was, err := w.picture()
	if err != nil {
		t.Fatal(err)
	}
	w.enter("93")
	w.enter("30 34")
	w.wait("what was typed to be kept", func() bool { return len(w.drafts()) == 1 })
	w.still()
	now, err := w.picture()
	if err != nil {
		t.Fatal(err)
	}
	if len(changed(was, now)) == 0 {
		t.Error("nothing on the screen has changed")
	}
	w.kill() // the power fails

	w = again(t, w)
	w.key("F4")
	w.still()
	w.key("Return")
	w.waitFor("the docking closed", func(fleet []*hull.Asset) bool { return len(fleet[0].Closed) == 1 })
	after := w.fleet()[0]
	if after.LastDocking != before.Ahead()[0].Date {
		t.Errorf("the last docking is %s", after.LastDocking)
	}
	found := func(wastage float64) hull.Fact {
		i := slices.IndexFunc(after.Ledger, func(f hull.Fact) bool {
			return f.Deed == hull.WasFound && f.How == hull.Surveyed && f.Wastage == wastage
		})
		if i < 0 {
			t.Fatalf("the ledger has nothing found %v wasted", wastage)
		}
		return after.Ledger[i]
	}
	worn := found(0.93)
	found(0.32)
	if !slices.ContainsFunc(after.Ledger, func(f hull.Fact) bool {
		return f.Deed == hull.WasRemoved && f.Key() == worn.Key() && f.Count == worn.Count
	}) {
		t.Error("the set found 93 % wasted was not renewed")
	}
	w.still()
	w.key("Escape") // planned against found
	w.still()
	w.close()

	w = again(t, w)
	w.key("ctrl+z")
	w.waitFor("the closing taken back", func(fleet []*hull.Asset) bool {
		return len(fleet[0].Closed) == 0 && fleet[0].Start() == before.Start()
	})
	w.close()
}

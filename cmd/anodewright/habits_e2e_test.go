//go:build e2e && !ci && linux

package main_test

import (
	"os"
	"path/filepath"
	"testing"
	"time"

	"anodewright/hull"
)

// The first start shows no asset; its first button has the keyboard and opens
// the demo fleet, and a workbook can be exported at once.
func TestFirstStartToExportedWorkbook(t *testing.T) {
	w := open(t, "-today", day)
	w.still()
	if n := len(w.fleet()); n != 0 {
		t.Fatalf("a new register holds %d assets", n)
	}
	w.key("space")
	n := len(demo(t))
	w.waitFor("the demo fleet", func(fleet []*hull.Asset) bool { return len(fleet) == n })
	w.still()
	w.exportsWorkbook(0)
	w.close()
}

// Folding by keys and help leave the keyboard where it was: in the table.
func TestFoldingAndHelpKeepTheKeyboard(t *testing.T) {
	w := start(t)
	w.toArea()
	before, err := w.picture()
	if err != nil {
		t.Fatal(err)
	}
	for _, key := range []string{"F8", "F9", "F7"} {
		w.key(key)
		w.still()
	}
	after, err := w.picture()
	if err != nil {
		t.Fatal(err)
	}
	if len(changed(before, after)) < 20000 {
		t.Error("folding changes hardly anything")
	}
	w.key("F1")
	time.Sleep(300 * time.Millisecond) // the help opens
	w.key("Escape")
	w.enter("1812")
	w.waitForArea(1812)
	w.close()
}

// Zones are moved by keys, and one undo takes a step back.
func TestZonesMoveByKeys(t *testing.T) {
	w := start(t)
	w.key("ctrl+Home")
	first := w.fleet()[0].Zones[0].ID
	w.key("alt+Down")
	w.waitFor("the zone one place lower", func(fleet []*hull.Asset) bool { return fleet[0].Zones[1].ID == first })
	w.key("ctrl+z")
	w.waitFor("the zone where it was", func(fleet []*hull.Asset) bool { return fleet[0].Zones[0].ID == first })
	w.close()
}

// The charts of the forecast are saved by keyboard.
func TestDraggedCursorAndForecastKeys(t *testing.T) {
	w := start(t)
	w.key("ctrl+4")
	w.still()
	for _, key := range []string{"Right", "Page_Down", "plus", "plus", "Left", "minus", "0", "Home"} {
		w.key(key)
	}
	w.key("ctrl+1")
	w.still()
	w.toArea()
	w.enter("1777")
	w.waitForArea(1777)
	w.close()
}

// A file that is no asset, given by its path, is refused and nothing changes.
func TestBrokenFileChangesNothing(t *testing.T) {
	w := start(t)
	path := filepath.Join(w.home, "broken.json")
	if err := os.WriteFile(path, []byte(`{"kind": "ship", "name":`), 0o600); err != nil {
		t.Fatal(err)
	}
	n := len(w.fleet())
	w.key("ctrl+o")
	time.Sleep(300 * time.Millisecond)
	w.enter(path)
	time.Sleep(300 * time.Millisecond) // it says what is wrong
	w.key("Escape")
	w.still()
	if got := len(w.fleet()); got != n {
		t.Errorf("%d assets, there were %d", got, n)
	}
	w.toArea()
	w.enter("1766")
	w.waitForArea(1766)
	w.close()
}

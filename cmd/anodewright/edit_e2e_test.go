//go:build e2e && !ci && linux

package main_test

import (
	"testing"
	"time"

	"anodewright/hull"
	"anodewright/storage"
	"anodewright/storage/assetfile"
)

func TestEditByMouseAndKeyboardIsStored(t *testing.T) {
	w := start(t)
	w.toArea()
	at := w.ring()
	w.click(at.X, at.Y)
	w.enter("1 750,5")
	w.waitForArea(1750.5)
	w.close()

	want := demo(t)
	want[0] = assetfile.Clone(want[0])
	want[0].Zones[0].WettedArea = 1750.5
	got := w.fleet()
	if len(got) != len(want) {
		t.Fatalf("the register holds %d assets", len(got))
	}
	for i := range want {
		same(t, want[i].Name, got[i], want[i])
	}
}

func TestFaultyTextIsFoundAgain(t *testing.T) {
	w := start(t)
	w.toArea()
	w.enter("1700 dolphins")
	w.wait("the draft", func() bool { return len(w.drafts()) == 1 })
	w.close()
	same(t, "the asset", w.fleet()[0], demo(t)[0])
	for path, text := range w.drafts() {
		if text != "1700 dolphins" {
			t.Errorf("%s keeps %q", path, text)
		}
	}

	w = again(t, w)
	w.toArea()
	w.key("F2")
	w.key("End")
	for range " dolphins" {
		w.key("BackSpace")
	}
	w.key("Return")
	w.waitForArea(1700)
	w.wait("the draft to go", func() bool { return len(w.drafts()) == 0 })
	w.close()
}

func TestUndoAndRedoByKeys(t *testing.T) {
	w := start(t)
	first := demo(t)[0].Zones[0].WettedArea
	w.toArea()
	w.enter("1750")
	w.waitForArea(1750)
	w.key("ctrl+z")
	w.waitForArea(first)
	w.key("ctrl+y")
	w.waitForArea(1750)

	// While a cell is being edited they belong to its entry. After Enter and
	// redo the next row is selected.
	w.key("Up")
	w.write("99")
	w.key("ctrl+z")
	w.enter("1800")
	w.waitForArea(1800)
	w.key("ctrl+z")
	w.waitForArea(1750)
	w.key("Up")
	w.write("12")
	w.key("ctrl+z")
	w.key("ctrl+y")
	w.key("Escape")
	w.close()
	if got := w.fleet()[0].Zones[0].WettedArea; got != 1750 {
		t.Errorf("the area ends as %v", got)
	}
}

func TestEditSurvivesAKill(t *testing.T) {
	w := start(t)
	w.toArea()
	w.enter("1750")
	w.waitForArea(1750)
	w.kill()

	r, err := storage.Open(w.register) // checks that it is whole
	if err != nil {
		t.Fatal(err)
	}
	r.Close()
	w = again(t, w)
	w.toArea()
	w.enter("1760")
	w.waitForArea(1760)
	w.close()
}

func TestClosingKeepsWhatIsBeingTyped(t *testing.T) {
	w := start(t)
	w.toArea()
	w.write("1777")
	time.Sleep(100 * time.Millisecond)
	w.close()
	if got := w.fleet()[0].Zones[0].WettedArea; got != 1777 {
		t.Errorf("the area is %v", got)
	}

	w = again(t, w)
	w.toArea()
	w.write("1778")
	w.key("ctrl+q")
	w.ends()
	if got := w.fleet()[0].Zones[0].WettedArea; got != 1778 {
		t.Errorf("after Ctrl+Q the area is %v", got)
	}
}

func TestTypingReachesOnlyThePageShown(t *testing.T) {
	w := start(t)
	w.toArea()
	for _, page := range []string{"ctrl+2", "ctrl+3", "ctrl+4"} {
		w.key(page)
		w.still()
		w.key("Down")
		w.write("9")
		w.key("Escape")
		w.key("Escape")
	}
	w.key("ctrl+1")
	w.still()
	w.toArea() // what was selected elsewhere is selected here, too
	w.enter("1750")
	w.waitForArea(1750)
	w.close()
}

func TestNewAssetAndItsZones(t *testing.T) {
	w := start(t)
	w.key("ctrl+n")
	time.Sleep(300 * time.Millisecond) // the form opens
	w.enter("Sand Martin")
	n := len(demo(t)) + 1
	w.waitFor("a new asset", func(fleet []*hull.Asset) bool { return len(fleet) == n && fleet[n-1].Name == "Sand Martin" })
	w.still()

	w.key("ctrl+Home")
	w.enter("Side shell")
	w.toArea()
	w.enter("1234")
	w.enter("567") // the next zone's
	w.waitFor("the new zones", func(fleet []*hull.Asset) bool {
		z := fleet[n-1].Zones
		return z[0].Name == "Side shell" && z[0].WettedArea == 1234 && z[1].WettedArea == 567
	})
	w.exportsWorkbook(n - 1)
	w.close()
}

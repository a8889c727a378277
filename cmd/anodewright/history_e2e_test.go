//go:build e2e && !ci && linux

package main_test

import (
	"path/filepath"
	"testing"
	"time"

	"anodewright/hull"
	"anodewright/storage"
)

// elsewhere changes the first asset as another program would.
func (w *window) elsewhere(change func(a *hull.Asset)) {
	w.t.Helper()
	r, err := storage.Open(w.register, storage.User("colleague"))
	if err != nil {
		w.t.Fatal(err)
	}
	defer r.Close()
	list, err := r.List()
	if err != nil || len(list) == 0 {
		w.t.Fatal("no asset: ", err)
	}
	a, rev, err := r.Load(list[0].ID)
	if err != nil {
		w.t.Fatal(err)
	}
	change(a)
	if _, err := r.Save(list[0].ID, rev, a, "elsewhere"); err != nil {
		w.t.Fatal(err)
	}
}

func TestUndoAfterARestart(t *testing.T) {
	w := start(t)
	first := demo(t)[0].Zones[0].WettedArea
	w.toArea()
	w.enter("1750")
	w.waitForArea(1750)
	w.close()
	w = again(t, w)
	w.key("ctrl+z")
	w.waitForArea(first)
	w.key("ctrl+y")
	w.waitForArea(1750)
	w.close()
	if found, err := filepath.Glob(filepath.Join(filepath.Dir(w.register), "* backups", "*")); err != nil || len(found) != 1 {
		t.Errorf("backups after two starts on one day: %v, %v", found, err)
	}
}

// What another program stores is shown within the time between two looks, so
// that the next edit here starts from it and clashes with nothing.
func TestOtherProgramsEditIsTakenOver(t *testing.T) {
	w := start(t)
	w.toArea()
	w.elsewhere(func(a *hull.Asset) { a.Zones[0].Depth = 4.25 })
	time.Sleep(3 * time.Second)
	w.enter("1750")
	w.waitForArea(1750)
	if got := w.fleet()[0].Zones[0].Depth; got != 4.25 {
		t.Errorf("the depth is %v", got)
	}
	w.close()
}

// An edit that meets another one, made while this was being typed, shows both.
// Enter takes theirs with the change here.
func TestClashIsDecidedByEnter(t *testing.T) {
	w := start(t)
	w.toArea()
	w.write("1234")
	w.elsewhere(func(a *hull.Asset) { a.Zones[0].Depth, a.Zones[0].WettedArea = 4.25, 1500 })
	w.key("Return")
	w.wait("the typed text to be kept", func() bool { return len(w.drafts()) == 1 })
	if z := w.fleet()[0].Zones[0]; z.WettedArea != 1500 {
		t.Errorf("before the choice the area is %v", z.WettedArea)
	}
	time.Sleep(500 * time.Millisecond)
	w.key("Return")
	w.waitForArea(1234)
	if z := w.fleet()[0].Zones[0]; z.Depth != 4.25 || len(w.drafts()) != 0 {
		t.Errorf("depth %v, drafts %v", z.Depth, w.drafts())
	}
	w.key("ctrl+z")
	w.waitForArea(1500)
	w.close()
}

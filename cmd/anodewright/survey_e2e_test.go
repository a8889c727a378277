//go:build e2e && !ci && linux

package main_test

import (
	"image"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"github.com/xuri/excelize/v2"

	"anodewright/hull"
)

// A survey sheet goes out, is filled in, and comes back, by keyboard alone:
// nothing is stored before its preview is agreed to, a second time nothing is,
// and undo takes it back whole.
func TestSurveySheetThereAndBack(t *testing.T) {
	w := start(t)
	before := len(w.fleet()[0].Readings)
	path := filepath.Join(w.home, "survey.xlsx")
	w.still()
	page := w.turns(func() { w.key("ctrl+shift+e") }) // the dockings
	w.turns(func() { w.key("Return") }, page)         // of the next one: the file
	w.key("ctrl+a")
	w.turns(func() { w.enter(path) }, page)
	w.wait("the survey sheet", func() bool { _, err := os.Stat(path); return err == nil })
	w.turns(func() { w.key("Return") }) // closes what is said about it
	fillSurvey(t, path)

	take := func() {
		page := w.turns(func() { w.key("ctrl+t") })
		w.key("ctrl+a")
		w.turns(func() { w.enter(path) }, page) // what was understood is shown
	}
	take()
	if n := len(w.fleet()[0].Readings); n != before {
		t.Fatalf("%d readings were stored unasked", n-before)
	}
	w.turns(func() { w.key("Escape") })
	take()
	w.key("Return")
	w.waitFor("the reading", func(fleet []*hull.Asset) bool {
		r := fleet[0].Readings
		return len(r) == before+1 && slices.Equal(r[before].Percent, []float64{30, 35}) && r[before].Gone == 2
	})
	w.still()
	take()
	w.turns(func() { w.key("Return") }) // there is nothing to store: it closes
	if n := len(w.fleet()[0].Readings); n != before+1 {
		t.Errorf("taken in twice there are %d readings more", n-before)
	}
	w.key("ctrl+z")
	w.waitFor("the survey undone", func(fleet []*hull.Asset) bool { return len(fleet[0].Readings) == before })
	w.close()
}

// turns does something that shows or closes a dialog, and waits until the
// window is neither as before nor, where one dialog follows another, as other
// pictures of it. It returns the picture before.
func (w *window) turns(do func(), than ...image.Image) image.Image {
	w.t.Helper()
	before, err := w.picture()
	if err != nil {
		w.t.Fatal(err)
	}
	do()
	w.wait("a dialog to show or to close", func() bool {
		now, err := w.picture()
		if err != nil {
			return false
		}
		for _, old := range append(than, before) {
			const much = 20000 // points
			if len(changed(old, now)) < much {
				return false
			}
		}
		return true
	})
	w.still()
	return before
}

// fillSurvey fills in a date, what was seen of the first set and a count, and a
// cell that cannot be understood.
func fillSurvey(t *testing.T, path string) {
	t.Helper()
	f, err := excelize.OpenFile(path)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	for _, c := range []struct {
		sheet, label, column string
		value                any
	}{
		{"Cover", "Date of the survey", "C", "20 Nov 2026"}, {"Survey", "Seen: wasted, %", "C", 30}, {"Survey", "Seen: wasted, %", "D", "35 %"},
		{"Survey", "Seen: wasted, %", "E", "half"}, {"Survey", "Pieces counted", "H", 2},
	} {
		cells, err := f.SearchSheet(c.sheet, c.label)
		if err != nil || len(cells) == 0 {
			t.Fatalf("no row %q: %v", c.label, err)
		}
		if err := f.SetCellValue(c.sheet, c.column+strings.TrimPrefix(cells[0], "B"), c.value); err != nil {
			t.Fatal(err)
		}
	}
	if err := f.Save(); err != nil {
		t.Fatal(err)
	}
}

//go:build e2e && !ci && linux

package main_test

import (
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"
	"time"

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
	w.key("ctrl+shift+e")
	time.Sleep(300 * time.Millisecond) // the dockings are shown
	w.key("Return")                    // the next one
	time.Sleep(300 * time.Millisecond)
	w.key("ctrl+a")
	w.enter(path)
	w.wait("the survey sheet", func() bool { _, err := os.Stat(path); return err == nil })
	w.key("Return") // closes what is said about it
	w.still()
	fillSurvey(t, path)

	take := func() {
		w.key("ctrl+t")
		time.Sleep(300 * time.Millisecond)
		w.key("ctrl+a")
		w.enter(path)
		time.Sleep(700 * time.Millisecond) // what was understood is shown
	}
	take()
	if n := len(w.fleet()[0].Readings); n != before {
		t.Fatalf("%d readings were stored unasked", n-before)
	}
	w.key("Escape")
	w.still()
	take()
	w.key("Return")
	w.waitFor("the reading", func(fleet []*hull.Asset) bool {
		r := fleet[0].Readings
		return len(r) == before+1 && slices.Equal(r[before].Percent, []float64{30, 35}) && r[before].Gone == 2
	})
	w.still()
	take()
	w.key("Return") // there is nothing to store: it closes
	w.still()
	if n := len(w.fleet()[0].Readings); n != before+1 {
		t.Errorf("taken in twice there are %d readings more", n-before)
	}
	w.key("ctrl+z")
	w.waitFor("the survey undone", func(fleet []*hull.Asset) bool { return len(fleet[0].Readings) == before })
	w.close()
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

//go:build e2e && !ci && linux

package main_test

import (
	"archive/zip"
	"bytes"
	"fmt"
	"io"
	"maps"
	"os"
	"path/filepath"
	"slices"
	"strconv"
	"testing"
	"time"

	"github.com/xuri/excelize/v2"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/hull"
	"anodewright/storage/workbook"
)

// exportsWorkbook exports the workbook of the open asset, the one at a place
// of the fleet, by keyboard and compares it with that asset's plan.
func (w *window) exportsWorkbook(place int) {
	w.t.Helper()
	path := filepath.Join(w.home, "schedule.xlsx")
	w.key("ctrl+e")
	time.Sleep(200 * time.Millisecond) // the dialog opens
	w.enter(path)
	w.wait("the workbook", func() bool { _, err := os.Stat(path); return err == nil })
	w.key("Return") // closes what is said about it
	w.still()

	today, err := hull.ParseDate(day)
	if err != nil {
		w.t.Fatal(err)
	}
	outcome := plan.Compute(w.fleet()[place], today)
	var want bytes.Buffer
	if err := workbook.WriteTo(&want, outcome, workbook.Revision(w.revision(place))); err != nil {
		w.t.Fatal(err)
	}
	if got, err := os.ReadFile(path); err != nil || !bytes.Equal(got, want.Bytes()) {
		w.t.Errorf("the workbook is not that of the stored asset (%v): %s", err, apart(got, want.Bytes()))
	}
	hasSchedule(w.t, path, outcome)
}

// apart says where two zips differ first.
func apart(got, want []byte) string {
	parts := func(b []byte) map[string]string {
		all := map[string]string{}
		z, err := zip.NewReader(bytes.NewReader(b), int64(len(b)))
		if err != nil {
			return all
		}
		for _, f := range z.File {
			if r, err := f.Open(); err == nil {
				text, _ := io.ReadAll(r)
				all[f.Name] = string(text)
				r.Close()
			}
		}
		return all
	}
	g, w := parts(got), parts(want)
	for _, name := range slices.Sorted(maps.Keys(w)) {
		a, b := g[name], w[name]
		if a == b {
			continue
		}
		at := 0
		for at < min(len(a), len(b)) && a[at] == b[at] {
			at++
		}
		cut := func(s string) string { return s[max(0, at-80):min(len(s), at+80)] }
		return fmt.Sprintf("%s has …%s…, want …%s…", name, cut(a), cut(b))
	}
	return "no part differs"
}

// hasSchedule fails unless the sheet Schedule has a row for each action, with
// its zone, pattern and count.
func hasSchedule(t *testing.T, path string, o *plan.Outcome) {
	t.Helper()
	f, err := excelize.OpenFile(path)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	rows, err := f.GetRows("Schedule", excelize.Options{RawCellValue: true})
	if err != nil {
		t.Fatal(err)
	}
	at := map[string]int{}
	found := map[string]int{}
	for _, row := range rows {
		for i, text := range row {
			if text == "Zone" || text == "Action" || text == "Pieces to fit" {
				at[text] = i
			}
		}
		if i := at["Pieces to fit"]; i > 0 && i < len(row) {
			found[row[at["Zone"]]+" "+row[at["Action"]]+" "+row[i]]++
		}
	}
	actions := 0
	for _, l := range o.Schedule {
		if l.Action == renewal.Keep {
			continue
		}
		actions++
		key := o.Asset.Zones[l.Zone].Name + " " + string(l.Action) + " " + strconv.Itoa(l.Count)
		if found[key] == 0 {
			t.Errorf("no row says %q; there are %v", key, found)
		}
	}
	if actions == 0 {
		t.Error("the plan does nothing, so the test shows nothing")
	}
}

func TestWorkbookHasTheEditedFigures(t *testing.T) {
	w := start(t)
	w.toArea()
	w.enter("1900")
	w.waitForArea(1900)
	w.exportsWorkbook(0)
	w.close()
}

func TestImportByTypedPath(t *testing.T) {
	w := start(t)
	n := len(demo(t))
	broken, good := testFile(t, "hostile", "area-negative.json"), testFile(t, "assets", "tern-passage.json")
	w.key("ctrl+o")
	time.Sleep(200 * time.Millisecond)
	w.enter(broken)
	time.Sleep(300 * time.Millisecond)
	if got := len(w.fleet()); got != n {
		t.Errorf("after the broken file there are %d assets", got)
	}
	w.key("ctrl+a") // the dialog is still there
	w.enter(good)
	w.waitFor("the imported asset", func(fleet []*hull.Asset) bool { return len(fleet) == n+1 })
	w.still()

	w.toArea() // in the imported asset, which is open now
	w.enter("2200")
	w.waitFor("the imported asset's new area", func(fleet []*hull.Asset) bool { return fleet[n].Zones[0].WettedArea == 2200 })
	w.close()
	for i, a := range demo(t) {
		same(t, a.Name, w.fleet()[i], a)
	}
}

// testFile returns the absolute path of a file of the repository's testdata.
func testFile(t *testing.T, parts ...string) string {
	t.Helper()
	path, err := filepath.Abs(filepath.Join(append([]string{"..", "..", "testdata"}, parts...)...))
	if err != nil {
		t.Fatal(err)
	}
	return path
}

package workbook_test

import (
	"fmt"
	"slices"
	"strings"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// The sheet As built is there where a docking was closed or a ledger is kept,
// and says what was planned, what was found, and every fact.
func TestAsBuilt(t *testing.T) {
	a, err := assetfile.Decode(assets.Demo()[1])
	if err != nil {
		t.Fatal(err)
	}
	a.Readings = append(a.Readings, a.Readings[0])
	a.Readings[0].Withdrawn, a.Readings[0].How = hull.NewDate(2026, 11, 1), "by eye"
	w := write(t, plan.Compute(a, today))
	if list := w.f.GetSheetList(); slices.Index(list, "As built") != slices.Index(list, "Readings")+1 {
		t.Errorf("sheets %q", list)
	}
	sets, _ := w.table("As built", "Zone", "Pattern", "Fitted", "Pieces expected")
	found := plan.CompareClosed(a, 0)
	if len(sets) < len(found.Sets) {
		t.Fatalf("%d rows, want %d", len(sets), len(found.Sets))
	}
	for i, s := range found.Sets {
		w.same(sets[i][4], s.Found)
		w.same(sets[i][6], s.Expected.Median)
		w.same(sets[i][9], s.Wastage)
		if sets[i][1] != s.Pattern || sets[i][11] != string(s.Verdict) {
			t.Errorf("row %d is %q, want %+v", i, sets[i], s)
		}
	}
	facts, _ := w.table("As built", "Zone", "Pattern", "Fitted", "Date", "Deed")
	for i, f := range a.Ledger {
		if facts[i][4] != string(f.Deed) || facts[i][8] != f.By {
			t.Errorf("fact %d is %q, want %+v", i, facts[i], f)
		}
		w.same(facts[i][5], f.Count)
		w.same(facts[i][3], f.Date)
	}
	all := fmt.Sprint(w.rows("As built"))
	for _, want := range []string{"Dry dock, 2024-06-10, Superintendent", "57 % was still there", "16 % was not put on", "28450, planned 30316", "painted anodes cleaned"} {
		if !strings.Contains(all, want) {
			t.Errorf("the sheet does not say %q", want)
		}
	}
	if all := fmt.Sprint(w.rows("Readings")); !strings.Contains(all, "withdrawn on 2026-11-01; by eye") {
		t.Error("the withdrawn reading does not say so")
	}
}

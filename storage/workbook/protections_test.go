package workbook_test

import (
	"math"
	"slices"
	"strconv"
	"strings"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/hull"
)

// The sheet has each result in words, by interval as figures, and with its
// sources.
func TestProtectionsSheet(t *testing.T) {
	a := tern(t)
	z := &a.Zones[0]
	z.Fitted = nil
	z.Protection = &hull.Protection{Kind: hull.ImpressedCurrent, Anode: "scrap-steel", OffShare: 0.25, AnodeMass: 400, AnodeRating: 8, BackEMF: 2}
	o := plan.Compute(a, today)
	p := o.Zones[0].Protection
	w := write(t, o)
	text := ""
	for _, row := range w.rows("Protections") {
		text += strings.Join(row, "\t") + "\n"
	}
	for _, want := range append(p.Words(), p.Steps[0].Figure, p.Steps[0].Source) {
		if !strings.Contains(text, want) {
			t.Errorf("the sheet does not say %q", want)
		}
	}
	rows := w.rows("Protections")
	at := slices.IndexFunc(rows, func(r []string) bool { return len(r) > 11 && r[3] == "demand held; missing while it is off" })
	if at < 0 {
		t.Fatal("no interval of the impressed current")
	}
	iv := p.Impressed.Intervals[0]
	for col, want := range map[int]float64{4: iv.Demand.Initial, 5: iv.Demand.Mean, 6: iv.Demand.Final, 11: iv.Charge} {
		if got, err := strconv.ParseFloat(rows[at][col], 64); err != nil || math.Abs(got-want) > 1e-9*want {
			t.Errorf("column %d: got %q, want %g", col, rows[at][col], want)
		}
	}
}

func TestProtectionsSheetWithoutAny(t *testing.T) {
	a := tern(t)
	a.Zones = a.Zones[:1]
	w := write(t, plan.Compute(a, today))
	for _, row := range w.rows("Protections") {
		if len(row) > 0 && row[0] == "No zone has any." {
			return
		}
	}
	t.Error("the sheet does not say that no zone has any")
}

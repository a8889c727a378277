package workbook_test

import (
	"fmt"
	"strconv"
	"strings"
	"testing"

	"github.com/xuri/excelize/v2"

	"anodewright/anodes/order"
	"anodewright/anodes/plan"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// Spares by share and by count, freight by mass and by order: the formulas
// give what the order says, line by line and by docking.
func TestOrderFormulasFollowSparesAndFreight(t *testing.T) {
	a, err := assetfile.Decode(assets.Demo()[0])
	if err != nil {
		t.Fatal(err)
	}
	share, own, count := 0.1, 0.3, 4
	a.Costs.SpareShare, a.Costs.FreightPerKg, a.Costs.FreightPerOrder = &share, 0.35, 180
	a.Patterns[0].SpareShare = &own
	a.Patterns[len(a.Patterns)-1].SpareCount = &count
	w := write(t, plan.Compute(a, today))
	calc := func(row, col int) float64 {
		cell, _ := excelize.CoordinatesToCellName(col, row)
		text, err := w.f.CalcCellValue("Order", cell, excelize.Options{RawCellValue: true})
		if err != nil {
			t.Fatalf("Order!%s: %v", cell, err)
		}
		return w.number(text)
	}
	rows, first := w.table("Order", "Order by", "Late")
	if len(rows) != len(w.o.Order) {
		t.Fatalf("%d rows for %d lines", len(rows), len(w.o.Order))
	}
	for i, l := range w.o.Order {
		for col, want := range map[int]float64{11: float64(l.Spares), 13: float64(l.Ordered), 18: l.Freight} {
			if got := calc(first+i, col); !near(got, want) {
				t.Errorf("line %d, column %d: the formula gives %v, the order says %v", i, col, got, want)
			}
		}
	}
	totals := order.Totals(a, w.o.Order)
	by, at := w.table("Order", "First order by")
	if len(by) != len(totals) {
		t.Fatalf("%d dockings, want %d", len(by), len(totals))
	}
	for i, d := range totals {
		for col, want := range map[int]float64{9: float64(d.Pieces), 11: float64(d.Spares), 13: float64(d.Bought), 15: d.Gross, 17: d.Price, 18: d.Freight} {
			if got := calc(at+i, col); !near(got, want) {
				t.Errorf("%s, column %d: the formula gives %v, the order says %v", d.Docking, col, got, want)
			}
		}
		w.same(by[i][2], d.Docking)
	}
	if sum := calc(at+len(by), 18); !near(sum, order.Sum(totals).Freight) {
		t.Errorf("freight in all %v, want %v", sum, order.Sum(totals).Freight)
	}
}

func TestOrderSaysWhatIsLateAndStaged(t *testing.T) {
	a, err := assetfile.Decode(assets.Demo()[0])
	if err != nil {
		t.Fatal(err)
	}
	a.Today = 0
	w := write(t, plan.Compute(a, hull.NewDate(2027, 2, 1)))
	all := fmt.Sprint(w.rows("Order"))
	for _, want := range []string{"is late by 35 days. Next best: ", "Staged purchase", "3 times its price"} {
		if !strings.Contains(all, want) {
			t.Errorf("the order does not say %q", want)
		}
	}
	staged := plan.Stage(w.o)
	found, below := 0, false
	for _, r := range w.rows("Order") {
		below = below || len(r) > 0 && r[0] == "Staged purchase"
		if below && len(r) > 15 && found < len(staged) && r[4] == staged[found].Pattern.ID && r[8] == strconv.Itoa(staged[found].Planned) && r[15] == strconv.FormatFloat(staged[found].Wrong.TooMany, 'f', -1, 64) {
			x := staged[found]
			w.same(r[9], x.Enough())
			w.same(r[10], x.Surely)
			w.same(r[11], x.Now)
			w.same(r[12], x.Ordered)
			w.same(r[13], x.Wait())
			found++
		}
	}
	if found != len(staged) || found == 0 {
		t.Errorf("%d rows of the staged purchase, want %d", found, len(staged))
	}
}

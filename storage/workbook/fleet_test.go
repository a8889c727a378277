package workbook_test

import (
	"bytes"
	"testing"

	"github.com/xuri/excelize/v2"

	"anodewright/anodes/order"
	"anodewright/anodes/plan"
	"anodewright/assets"
	"anodewright/storage/assetfile"
	"anodewright/storage/workbook"
)

// demoFleet are the orders of all demo assets.
func demoFleet(t *testing.T) []order.Member {
	t.Helper()
	var fleet []order.Member
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			t.Fatal(err)
		}
		o := plan.Compute(a, today)
		fleet = append(fleet, order.Member{Name: a.Name, Currency: a.Currency, Today: o.Today, Costs: a.Costs, Lines: o.Order})
	}
	return fleet
}

func TestFleetWorkbook(t *testing.T) {
	fleet := demoFleet(t)
	c := order.CalendarOf(fleet, 52)
	var b, again bytes.Buffer
	for _, w := range []*bytes.Buffer{&b, &again} {
		if err := workbook.WriteFleetTo(w, today, fleet, c); err != nil {
			t.Fatal(err)
		}
	}
	if !bytes.Equal(b.Bytes(), again.Bytes()) {
		t.Error("the same calendar gives other bytes")
	}
	f, err := excelize.OpenReader(&b)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	months, _ := f.GetRows("By month", excelize.Options{RawCellValue: true})
	shares := 0
	for _, m := range c.Months {
		shares += len(m.Shares)
	}
	named := 0
	for _, r := range months {
		if len(r) > 2 {
			for _, m := range fleet {
				if r[2] == m.Name {
					named++
				}
			}
		}
	}
	if named != shares || shares == 0 {
		t.Errorf("%d rows of assets by month, want %d", named, shares)
	}
	lines, _ := f.GetRows("Lines")
	if want := len(order.Sorted(fleet)); len(lines) < want+2 {
		t.Errorf("%d rows of lines for %d lines", len(lines), want)
	}
	// The sum of the pieces is a live formula with the value beside it.
	for r := range months {
		if len(months[r]) > 2 && months[r][2] == "In EUR" {
			cell, _ := excelize.CoordinatesToCellName(7, r+1)
			formula, _ := f.GetCellFormula("By month", cell)
			got, err := f.CalcCellValue("By month", cell, excelize.Options{RawCellValue: true})
			if formula == "" || err != nil || got != months[r][6] {
				t.Errorf("sum in euros: formula %q gives %q, stored %q (%v)", formula, got, months[r][6], err)
			}
			return
		}
	}
	t.Error("no sum in euros")
}

func TestEmptyFleetWorkbook(t *testing.T) {
	var b bytes.Buffer
	if err := workbook.WriteFleetTo(&b, today, nil, order.CalendarOf(nil, 4)); err != nil {
		t.Fatal(err)
	}
	if err := workbook.WriteFleet("", today, nil, order.Calendar{}); err == nil {
		t.Error("a workbook without a name is written")
	}
}

package pages

import (
	"strings"
	"testing"

	"fyne.io/fyne/v2"

	"anodewright/app/look"
)

func TestReadingsShowWhatTheyTeach(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := f.open(t, "Readings").(*readingsPage)
	wants(t, f, "2026-06-01", "Vertical sides", "al-45", "surveyor", "11 14", "24 of 24",
		"0.42–2.39", "1.24 (0.95–1.64)", "< 1 %", "Nothing in the readings contradicts itself.", "What would help to decide most",
		"4 pieces of al-45 fitted on 15 Mar 2024, weighed today: range 0.95–1.64 becomes about")
	if cell := p.rows.Cell(0, colOf(t, p.list, "predicted")); cell.Text != "9.7" {
		t.Errorf("predicted %q", cell.Text)
	}
	p.tabs.buttons[1].OnTapped()
	wants(t, f, "thick by the readings")
}

// Everything is entered with the keyboard: Insert, the figures, Enter.
func TestReadingsAreEnteredByKeyboard(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := f.open(t, "Readings").(*readingsPage)
	if f.win.Canvas().Focused() != fyne.Focusable(p.list) {
		t.Fatal("the page opens without the keyboard in its table")
	}
	key(f, fyne.KeyInsert)
	settle(f)
	row, col := p.list.Selected()
	if row != 1 || p.list.Columns()[col].ID != "weighed_wastage" {
		t.Fatalf("after Insert row %d, column %d is selected", row, col)
	}
	typed(f, "30 33 28 31")
	key(f, fyne.KeyReturn)
	settle(f)
	if got := f.s.Asset().Readings[1]; len(got.WeighedWastage) != 4 || got.WeighedWastage[1] != 0.33 || got.By != "surveyor" || got.Zone != "side" {
		t.Errorf("the reading is %+v", got)
	}
	if l := f.s.Outcome().Zones[0].Learned; l.Anodes != 6 || l.Median < 1.5 {
		t.Errorf("learned %+v", l)
	}
	enter(t, f, p.list, 1, colOf(t, p.list, "potentials"), "-0.85 cse")
	p.list.Select(1, colOf(t, p.list, "potentials"))
	p.update()
	wants(t, f, "-0.850 V Cu/CuSO4 (-0.800 V Ag/AgCl)")
	enter(t, f, p.list, 1, colOf(t, p.list, "gone"), "30")
	wants(t, f, "but 24 were fitted")
	enter(t, f, p.list, 1, colOf(t, p.list, "percent"), "30")
	if cell := p.rows.Cell(1, colOf(t, p.list, "percent")); !strings.Contains(cell.Fault, "weighed_wastage, measured, percent and grades") {
		t.Errorf("two kinds of figures: fault %q", cell.Fault)
	}
	p.list.Select(1, 0)
	p.remove()
	settle(f)
	if n := len(f.s.Asset().Readings); n != 1 {
		t.Errorf("%d readings are left", n)
	}
}

func TestPlanWithReadingsFromThePage(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := f.open(t, "Readings").(*readingsPage)
	before, _ := f.s.Outcome().Action(0, 0)
	p.learn.SetChecked(true)
	settle(f)
	o := f.s.Outcome()
	after, _ := o.Action(0, 0)
	if !o.Learns || before.Count != 14 || after.Count <= 14 {
		t.Errorf("learns %v: %d pieces after %d", o.Learns, after.Count, before.Count)
	}
	f.open(t, "Forecast")
	wants(t, f, "How the anodes waste, by the factor learned from readings: Vertical sides")
	f.open(t, "Readings")
	if !p.learn.Checked {
		t.Error("the check forgot")
	}
	p.learn.SetChecked(false)
	settle(f)
	if f.s.Outcome().Learns {
		t.Error("it still learns")
	}
}

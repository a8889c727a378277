package pages

import (
	"strings"
	"testing"

	"anodewright/app/look"
	"anodewright/app/session"
)

// tap presses the button with a label that is to be seen.
func tap(t *testing.T, f *Frame, label string) {
	t.Helper()
	for _, o := range everything(f) {
		if b, ok := o.(*look.PushButton); ok && b.Text == label {
			b.OnTapped()
			settle(f)
			return
		}
	}
	t.Fatalf("no button %q", label)
}

// Spares and stock are typed over in the order itself.
func TestSparesAndStockAreEditedInTheOrder(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := f.open(t, "Order").(*orderPage)
	enter(t, f, p.lines, 0, orderSpares, "3")
	wants(t, f, "17", "765", "5\u00a0270", "to buy 5\u00a0270 EUR")
	enter(t, f, p.lines, 0, orderSpares, "20 %")
	if l := f.s.Outcome().Order[0]; l.Spares != 3 || l.Pattern.SpareCount != nil {
		t.Errorf("20 %% of 14 are %d spares, by count: %v", l.Spares, l.Pattern.SpareCount)
	}
	enter(t, f, p.lines, 0, orderStock, "5")
	if l := f.s.Outcome().Order[0]; l.FromStock != 5 || l.Ordered != 12 {
		t.Errorf("%d from stock, %d to buy", l.FromStock, l.Ordered)
	}
	wants(t, f, "of 5", "540")
	enter(t, f, p.lines, 0, orderSpares, "many")
	if c := p.rows.Cell(0, orderSpares); c.Text != "many" || c.Fault == "" {
		t.Errorf("a wrong text is shown as %q, %q", c.Text, c.Fault)
	}
	for range 3 {
		must(t, f.s.Undo())
	}
	if l := f.s.Outcome(); l == nil || f.s.StockOf("al-45") != 0 || f.s.Asset().Patterns[0].SpareShare != nil {
		t.Error("undo does not take spares and stock back")
	}
}

// Freight stands in a column of its own and beside the total.
func TestFreightIsShownApart(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := f.open(t, "Order").(*orderPage)
	tap(t, f, "Terms")
	wants(t, f, "Freight, per docking", "Rush price", "our own choice")
	for row, field := range session.OrderFields() {
		if field.Key == "costs.freight_per_kg" {
			enter(t, f, p.terms, row, 1, "0.2")
		}
		if field.Key == "costs.freight_per_order" {
			enter(t, f, p.terms, row, 1, "100")
		}
	}
	wants(t, f, "to buy 4\u00a0650 EUR and freight 247", "Freight", "147", "in all")
}

// The staged purchase says how many to have, and what can wait.
func TestStagedPurchaseIsShown(t *testing.T) {
	f := shown(t, look.Light, 1, small, fleet()...)
	p := f.open(t, "Order").(*orderPage)
	settle(f)
	wants(t, f, "Staged purchase", "Can wait", "Order now", "can wait for the dock floor")
	bought, known := f.s.Purchase()
	if !known || len(p.staged.cells.cells) != len(bought.Staged) || len(bought.Staged) == 0 {
		t.Fatalf("%d rows, purchase %+v", len(p.staged.cells.cells), bought)
	}
	if p.staged.chart.chart == nil || len(p.staged.chart.chart.Series) == 0 {
		t.Error("no need is drawn")
	}
	tap(t, f, "Selected line")
	wants(t, f, "A piece", "Lead time", "for the docking of")
}

func TestWholeFleetByMonth(t *testing.T) {
	f := shown(t, look.Light, 1, small, fleet()...)
	p := f.open(t, "Order").(*orderPage)
	tap(t, f, "Whole fleet")
	wants(t, f, "Orders of the fleet by month", "Late and joined orders", "No order of the fleet is late.", "Turnstone Fairway", "Oxbird A", "Dec 2026")
	lines := strings.Split(strings.TrimSpace(p.fleet.months.CopyAll()), "\n")
	if len(lines) != 1+p.fleet.cells.Rows() || p.fleet.cells.Rows() < 6 {
		t.Errorf("%d lines of text for %d rows", len(lines), p.fleet.cells.Rows())
	}
	for row, member := range p.fleet.members {
		if member == 1 {
			p.fleet.open(row)
			break
		}
	}
	settle(f)
	if f.s.Asset().Name != p.fleet.orders.Fleet[1].Name || p.whole {
		t.Errorf("opening a row shows %s, the fleet still: %v", f.s.Asset().Name, p.whole)
	}
}

package pages

import (
	"fmt"
	"strings"
	"testing"

	"fyne.io/fyne/v2"

	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/session"
	"anodewright/hull"
)

// onFloor is the dock floor of an asset, computed.
func onFloor(t *testing.T, f *Frame) *dockFloor {
	t.Helper()
	p := f.open(t, "Dock floor").(*dockFloor)
	for range 50 {
		settle(f)
		if _, known := f.s.Floor(); known && p.floor != nil {
			f.Update()
			return p
		}
	}
	t.Fatal("the dock floor is never known")
	return nil
}

func TestDockFloorShowsThePlan(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	onFloor(t, f)
	wants(t, f, "In dock on 15 Mar 2027", "Vertical sides", "24 × 45 kg, Mar 2024", "forecast", "add 14 × 45 kg", "final current",
		"15", "14 used, 1 left", "hot-work permit", "Close the docking…")
}

func TestTypedWastageChangesTheAction(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := onFloor(t, f)
	if f.win.Canvas().Focused() != fyne.Focusable(p.sets) {
		t.Fatalf("the keyboard is with %T", f.win.Canvas().Focused())
	}
	before := f.s.Asset()
	typed(f, "91")
	key(f, fyne.KeyReturn)
	p = onFloor(t, f)
	if p.floor.Rows[0].Zoned.Line.Action != "renew" || f.s.Asset() != before {
		t.Fatalf("91 %% wasted: %+v", p.floor.Rows[0].Zoned)
	}
	on := sumOn(p.floor.Closing.On)
	wants(t, f, "91", fmt.Sprintf("renew %d × 45 kg", on), "lacking", "the pieces on the quay are not enough: Vertical sides lacks")
	enter(t, f, p.quay, 0, 1, "99")
	p = onFloor(t, f)
	on = sumOn(p.floor.Closing.On)
	wants(t, f, fmt.Sprintf("%d used, %d left", on, 99-on))
	if strings.Contains(strings.Join(texts(f), " "), "lacks") {
		t.Error("with 99 on the quay something is lacking")
	}
	// Emptied, the forecast counts again.
	p.sets.Select(0, 2)
	p.sets.Focus()
	key(f, fyne.KeyDelete)
	onFloor(t, f)
	wants(t, f, "add 14 × 45 kg")
}

func TestFigureOfTheForecastCanBeFound(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := onFloor(t, f)
	same := p.rows.Cell(0, 2).Text
	enter(t, f, p.sets, 0, 2, same)
	p = onFloor(t, f)
	if s := p.floor.Rows[0].Set; s.How != hull.Surveyed {
		t.Errorf("the forecast's own figure was typed: %+v", s)
	}
	enter(t, f, p.sets, 0, 2, "30 40")
	onFloor(t, f)
	wants(t, f, "mean 35")
}

func TestWrongTextIsNamedAndKept(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := onFloor(t, f)
	enter(t, f, p.sets, 0, 2, "140")
	p = onFloor(t, f)
	p.sets.Select(0, 2)
	wants(t, f, "140", "want the per cent gone, from 0 to 100")
	f.windowKey(fyne.KeyF4)
	wants(t, f, "Close the docking of 15 Mar 2027?", "Vertical sides: Found %: want the per cent gone")
	key(f, fyne.KeyEscape)
	if len(f.s.Asset().Closed) != 0 {
		t.Error("closed with a wrong text")
	}
}

func TestDockingIsClosedByKeyboard(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	onFloor(t, f)
	typed(f, "31")
	key(f, fyne.KeyReturn)
	onFloor(t, f)
	f.open(t, "Steel")
	key(f, fyne.KeyF4) // first shows what will be closed
	p := onFloor(t, f)
	if len(f.win.Canvas().Overlays().List()) != 0 {
		t.Fatal("a docking is closed unseen")
	}
	key(f, fyne.KeyF4)
	wants(t, f, "Close the docking of 15 Mar 2027?", "Pieces: 24. Every set was looked at.", "The date in dock lies 104 days ahead of today.", "Vertical sides: 0 off, 14 × 45 kg on", "Left on the quay, to stock: 1 × 45 kg.",
		"Vertical sides: touch up, 50 %", "planned were", "Next docking 15 Mar 2029, planned to 15 Mar 2034.")
	key(f, fyne.KeyReturn)
	settle(f)
	a := f.s.Asset()
	if a.LastDocking != p.floor.Docking.Date && a.LastDocking != hull.NewDate(2027, 3, 15) || len(a.Closed) != 1 {
		t.Fatalf("last docking %s, closed %v", a.LastDocking, a.Closed)
	}
	wants(t, f, "The docking of 15 Mar 2027 is closed", "31 % wasted", "were put on, as planned")
	key(f, fyne.KeyEscape)
	must(t, f.s.Undo())
	p = onFloor(t, f)
	if text, _ := f.s.FloorText(session.FloorWastage(p.floor.Rows[0].Key)); text != "31" {
		t.Errorf("after the undoing %q is typed", text)
	}
	p.discard()
	wants(t, f, "What was typed in 1 field here is forgotten")
	key(f, fyne.KeyReturn)
	if f.s.FloorTyped() != 0 {
		t.Error("it is still typed")
	}
}

func TestDockFloorWithoutADocking(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	must(t, f.s.Do("docked", func(a *hull.Asset) error {
		a.Zones[0].Fitted, a.LastDocking = nil, hull.NewDate(2030, 1, 1)
		return nil
	}))
	settle(f)
	f.open(t, "Dock floor")
	wants(t, f, "No docking lies ahead. Add one on Dockings")
	f.windowKey(fyne.KeyF4)
	wants(t, f, "no docking lies ahead that could be closed")
}

// What the large table shows is whole: the tests of all tables measure with
// ordinary text.
func TestDockFloorFiguresAreWhole(t *testing.T) {
	for _, scale := range []float32{1, 1.5} {
		f := shown(t, look.Light, scale, small, fleet()...)
		for _, item := range f.s.Fleet() {
			f.s.Select(item.ID)
			p := onFloor(t, f)
			for row := range p.rows.Rows() {
				for col, c := range p.sets.Columns() {
					cell := p.rows.Cell(row, col)
					w := fyne.MeasureText(cell.Text, grid.LargeText(), fyne.TextStyle{Bold: cell.Bold}).Width
					if room := p.sets.ColumnWidth(col) - look.Px(16); col > 0 && w > room+1 {
						t.Errorf("%s at %v: %q of %s takes %.0f of %.0f", item.Asset.Name, scale, cell.Text, c.Title, w, room)
					}
				}
			}
		}
	}
}

func TestLastTimeStandsBesideTheOrder(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := f.open(t, "Order").(*orderPage)
	tap(t, f, "Last time")
	for range 5 {
		settle(f)
	}
	wants(t, f, "Last time, on 15 Mar 2024", "Put on: 24 × al-45. What was ordered is not known", "of their metal will be left", "The same order again for 15 Mar 2027",
		"this plan buys", "on this order", "If the docking slips", "next docking six months later")
	must(t, f.s.CloseFloor())
	for range 5 {
		settle(f)
	}
	if !p.last.list.scroll.Visible() {
		t.Fatal("last time is hidden")
	}
	wants(t, f, "Last time, on 15 Mar 2027", "Ordered: 15 × al-45. Put on: 14 pieces.", "Planned and found")
}

// On a narrow, high page the quay lies below the sets, else at their right.
func TestQuayLiesWhereThereIsRoom(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := onFloor(t, f)
	place := func(w, h float32) (sets, quay, lines fyne.CanvasObject) {
		p.all.Resize(fyne.NewSize(w, h))
		o := p.all.(*fyne.Container).Objects
		return o[0], o[1], o[2]
	}
	sets, quay, lines := place(1040, 500)
	if quay.Position().X <= sets.Size().Width || lines.Position().Y < quay.Size().Height {
		t.Errorf("wide: quay at %v, the docking at %v", quay.Position(), lines.Position())
	}
	sets, quay, lines = place(820, 600)
	if quay.Position().Y <= sets.Size().Height || lines.Position().X < quay.Size().Width || sets.Size().Width != 820 {
		t.Errorf("narrow: quay at %v, the docking at %v", quay.Position(), lines.Position())
	}
}

// Tables of two columns are left for one another by keyboard, and what is
// typed then lands in the column for it.
func TestQuayIsTypedByKeyboard(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := onFloor(t, f)
	f.win.Canvas().Focus(p.quay)
	typed(f, "77")
	key(f, fyne.KeyReturn)
	if text, _ := f.s.FloorText(session.FloorStock(p.floor.Quay[0].Pattern.ID)); text != "77" {
		t.Errorf("%q is on the quay", text)
	}
}

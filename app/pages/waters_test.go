package pages

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"fyne.io/fyne/v2/test"

	"anodewright/app/look"
	"anodewright/hull"
	"anodewright/hull/water"
	"anodewright/storage/trade"
)

func TestPickAWaterFromTheTable(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	added := -1
	p := newWaterPicker(f, func(i int) { added = i })
	p.d.Show()
	if len(p.cells.cells) != len(water.Entries()) {
		t.Errorf("%d rows before a search, want %d", len(p.cells.cells), len(water.Entries()))
	}
	p.search.SetText("baltic")
	wants(t, f, "Baltic proper", "World Ocean Atlas 2013 and COADS", "7.1 (6.2–8.7)", "8.3 (1.8–16.6)", "1.19 (0.80–1.62)")
	if p.atSea.Visible() {
		t.Error("seawater is offered as seawater")
	}
	p.add()
	a := f.s.Asset()
	if added != 1 || a.Waters[1].Name != "Baltic proper" || *a.Waters[1].Salinity != 7.08 || *a.Waters[1].Temperature != 8.35 {
		t.Errorf("place %d, waters %+v", added, a.Waters)
	}
	if f.win.Canvas().Overlays().Top() != nil {
		t.Error("the dialog stays open")
	}
}

func TestPickAWaterWithoutATemperature(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := newWaterPicker(f, func(int) {})
	p.d.Show()
	before := f.s.Asset()
	p.search.SetText("amazon main")
	wants(t, f, "to be entered", "at 15 °C")
	p.add()
	if f.s.Asset() != before || !strings.Contains(p.wrong.Text(), "no temperature for Amazon main stem") {
		t.Errorf("wrong: %q", p.wrong.Text())
	}
	p.temperature.SetText("warm")
	p.add()
	if f.s.Asset() != before || !strings.Contains(p.wrong.Text(), "want a number") {
		t.Errorf("wrong: %q", p.wrong.Text())
	}
	p.temperature.SetText("28,5")
	if !p.atSea.Visible() || !p.atSea.Checked {
		t.Error("a river is not offered to a hull that lies in the sea")
	}
	p.add()
	if w := f.s.Asset().Waters[1]; w.Medium != hull.Seawater || *w.Temperature != 28.5 || *w.Conductivity25 != 60 {
		t.Errorf("stored %+v", w)
	}
	p = newWaterPicker(f, func(int) {})
	p.search.SetText("no such water")
	p.add()
	if len(f.s.Asset().Waters) != 2 || !strings.Contains(p.wrong.Text(), "Want a water") {
		t.Errorf("%d waters, wrong %q", len(f.s.Asset().Waters), p.wrong.Text())
	}
}

func csvFile(t *testing.T, text string) string {
	t.Helper()
	path := filepath.Join(t.TempDir(), "trade.CSV")
	must(t, os.WriteFile(path, []byte(text), 0o600))
	return path
}

// A file dropped on the window becomes the zones' waters only after the user
// has said what its unknown places are, and undo takes it back in one step.
func TestDroppedTradingPattern(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	before := f.s.Asset()
	f.importFile(csvFile(t, "port;days;voyage\nNorth Sea;200,5;1\nBaltic proper;99,5;2\nAtlantis;65;3\n"))
	wants(t, f, "Trading pattern", "365.0 days at 3 places", "Columns not used: voyage", "table: Baltic proper", "Not known: Atlantis")
	if f.s.Asset() != before {
		t.Fatal("the pattern was stored before anyone said what Atlantis is")
	}
	f.win.Canvas().Overlays().Top().Hide()

	// The same form, filled in.
	p := formOf(t, f, "port;days\nNorth Sea;200.5\nBaltic proper;99.5\nAtlantis;65\n")
	p.apply()
	if f.s.Asset() != before {
		t.Fatal("an unknown place was taken")
	}
	tradePlaces{p}.Commit(2, 3, "Atlantic")
	if c := (tradePlaces{p}).Cell(2, 3); c.Text != "Atlantic" || !strings.Contains(c.Fault, "want one of the waters listed") {
		t.Errorf("a water that is none: %+v", c)
	}
	tradePlaces{p}.Commit(2, 3, leaveOut)
	if want := "2 zones, always: north-sea 66.83 % + baltic-proper 33.17 %"; p.result.Text() != want || p.wrong.Text() != "" {
		t.Errorf("result %q, wrong %q, want %q", p.result.Text(), p.wrong.Text(), want)
	}
	tradeZones{p}.Commit(1, 1, "no")
	p.apply()
	a := f.s.Asset()
	if len(a.Zones[0].Waters) != 2 || a.Zones[0].Waters[1].Water != "baltic-proper" || len(a.Zones[1].Waters) != 1 || len(a.Waters) != 2 {
		t.Errorf("zones lie in %v and %v", a.Zones[0].Waters, a.Zones[1].Waters)
	}
	must(t, f.s.Undo())
	if got := f.s.Asset(); len(got.Waters) != 1 || len(got.Zones[0].Waters) != 1 {
		t.Error("one undo does not take it back")
	}
}

func TestTradingPatternFromADay(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := formOf(t, f, "port;days\nNorth Sea;1\nKattegat;1\n")
	test.Type(p.from, "soon")
	if !strings.Contains(p.wrong.Text(), "a date such as") {
		t.Errorf("wrong: %q", p.wrong.Text())
	}
	p.from.SetText("2028-06-01")
	if !strings.Contains(p.result.Text(), "from 1 Jun 2028 on: north-sea 50 % + kattegat 50 %") {
		t.Errorf("result: %q", p.result.Text())
	}
	p.apply()
	z := f.s.Asset().Zones[0]
	if len(z.Waters) != 1 || len(z.Service) != 1 || z.Service[0].From != hull.NewDate(2028, 6, 1) || len(z.Service[0].Waters) != 2 {
		t.Errorf("waters %v, service %+v", z.Waters, z.Service)
	}
}

func TestFaultyTradingPatternSaysItsLines(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	before := f.s.Asset()
	f.importFile(csvFile(t, "port;days\nNorth Sea;ten\n;3\n"))
	wants(t, f, "line 2, days: want a number of days", "line 3, port: want the name")
	if f.s.Asset() != before {
		t.Error("a faulty file changed the asset")
	}
}

// formOf is the form of a pattern, not shown.
func formOf(t *testing.T, f *Frame, text string) *tradeForm {
	t.Helper()
	p, err := trade.Read(strings.NewReader(text))
	must(t, err)
	return newTradeForm(f, f.s.Asset(), p, "trade.csv")
}

// The demand of a zone names the waters in which its anodes are short.
func TestShortWaterBelowTheDemand(t *testing.T) {
	f := shown(t, look.Light, 1, small, fleet()[:1]...)
	settle(f)
	f.open(t, "Steel")
	wants(t, f, "Short of output: in Kattegat, 30 % of the year")
}

package pages

import (
	"strings"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/lang"

	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
)

// plainWords says everything as at first again after a test.
func plainWords(t *testing.T) {
	t.Cleanup(func() {
		say.Use("en")
		say.UseUS(false)
		say.UseComma(false)
		say.UseDates(say.InWords)
	})
}

func (s *settings) choose(t *testing.T, name string, at int) {
	t.Helper()
	if s.options[name] == nil || at >= len(s.options[name].Options) {
		t.Fatalf("no option %d of %s", at, name)
	}
	s.options[name].SetSelectedIndex(at)
}

func TestSettingsBuildTheWindowAnew(t *testing.T) {
	plainWords(t)
	f := shown(t, look.Light, 1, small, tern(t))
	f.open(t, "Dockings")
	f.setCursor(f.s.Outcome().Today.AddMonths(3))
	f.selectZone(1)
	before := f.cursor
	s := f.newSettings()
	s.choose(t, settingLanguage, 1)
	s.choose(t, settingUnits, 1)
	s.choose(t, settingDates, 2)
	s.choose(t, settingDecimal, 1)
	s.use()
	if f.pages[f.current].title() != "Varadas" || f.cursor != before || f.zone != 1 {
		t.Errorf("the page is %s, the cursor %v, the zone %d", f.pages[f.current].title(), f.cursor, f.zone)
	}
	wants(t, f, "próxima varada 15.03.2027", "añadir 14 × 99,2 lb")
	if got := lang.L("Create Folder"); got != "Crear carpeta" {
		t.Errorf("the toolkit says %q", got)
	}
	if f.win.MainMenu().Items[0].Label != "Registro" {
		t.Errorf("the menu begins with %s", f.win.MainMenu().Items[0].Label)
	}
	f.show(0)
	settle(f)
	wants(t, f, "22\u00a0604", "ft²")

	// Another window over the register says it in the same way, and the dialog
	// shows what is in force.
	for name, value := range map[string]string{settingLanguage: "es", settingUnits: "us", settingDates: "dmy", settingDecimal: "comma"} {
		if got := f.s.Setting(name); got != value {
			t.Errorf("%s is kept as %q", name, got)
		}
	}
	say.Use("en")
	say.UseUS(false)
	f.readWords()
	if say.Language() != "es" || !say.US() || !say.Comma() || say.DatesUsed() != say.DayMonthYear {
		t.Error("what is kept is not taken over")
	}
	again := f.newSettings()
	for name, want := range map[string]string{settingLanguage: "Español", settingUnits: "EE. UU.: ft², lb, mA/ft², °F, Ω cm", settingDates: "15.03.2027", settingDecimal: "coma: 0,5", "theme": "Claro", "text scale": "1"} {
		if got := again.options[name].Selected; got != want {
			t.Errorf("%s shows %q, want %q", name, got, want)
		}
	}
}

func TestToolkitSpeaksEnglishAgain(t *testing.T) {
	plainWords(t)
	f := shown(t, look.Light, 1, small, tern(t))
	for _, c := range []struct {
		language int
		want     string
	}{{1, "Carpeta"}, {0, "Folder"}} {
		s := f.newSettings()
		s.choose(t, settingLanguage, c.language)
		s.use()
		if got := lang.L("Folder"); got != c.want {
			t.Errorf("the toolkit says %q, want %q", got, c.want)
		}
	}
}

// A unit or a language alone is no edit.
func TestSettingsChangeNoAsset(t *testing.T) {
	plainWords(t)
	f := shown(t, look.Light, 1, small, tern(t))
	history := func() int {
		all, err := f.s.History()
		must(t, err)
		return len(all)
	}
	was := history()
	s := f.newSettings()
	s.choose(t, settingUnits, 1)
	s.use()
	g := f.pages[0].(*steel).zones
	for row := range g.Source().Rows() {
		for col, c := range g.Columns() {
			if c.Edit {
				text := g.Source().Cell(row, col).Text
				if e, ok := g.Source().(grid.EditTexter); ok {
					text = e.EditText(row, col)
				}
				g.Source().Commit(row, col, text)
			}
		}
	}
	if now := history(); now != was {
		t.Errorf("entering what is shown made %d edits", now-was)
	}
}

func TestMoneyHasTheAssetsCurrency(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	currency := f.s.Asset().Currency
	unit := func(g *grid.Grid, id string) string {
		for _, c := range g.Columns() {
			if c.ID == id {
				return c.Unit
			}
		}
		return "no column"
	}
	p := f.open(t, "Anodes").(*anodesPage)
	d := f.open(t, "Dockings").(*dockings)
	if unit(p.patterns, "price") != currency || unit(d.list, "fixed_cost") != currency || unit(p.patterns, "net_mass_kg") != "kg" {
		t.Errorf("units: %q, %q, %q", unit(p.patterns, "price"), unit(d.list, "fixed_cost"), unit(p.patterns, "net_mass_kg"))
	}
	if !strings.HasPrefix(currency, "E") {
		t.Fatalf("the test asset's currency is %q", currency)
	}
}

func TestEscapeLeavesTheSettings(t *testing.T) {
	plainWords(t)
	f := shown(t, look.Light, 1, small, tern(t))
	f.settings()
	chosen, ok := f.win.Canvas().Focused().(*chosenOf)
	if !ok {
		t.Fatalf("%T has the keyboard", f.win.Canvas().Focused())
	}
	chosen.TypedKey(&fyne.KeyEvent{Name: fyne.KeyRight})
	chosen.TypedKey(&fyne.KeyEvent{Name: fyne.KeyEscape})
	if f.win.Canvas().Overlays().Top() != nil || say.Language() != "en" {
		t.Errorf("Escape leaves the dialog open, or takes over %q", say.Language())
	}
}

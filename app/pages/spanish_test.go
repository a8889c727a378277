package pages

import (
	"fmt"
	"regexp"
	"strings"
	"testing"
	"unicode"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"

	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/assets"
	"anodewright/hull"
)

// spanish says everything in Spanish for the length of a test.
func spanish(t *testing.T) {
	t.Helper()
	say.Use("es")
	t.Cleanup(func() { say.Use("en") })
}

// vocabulary is what a Spanish window may say: the words of the table, and
// whole texts that are the same in both languages, as citations.
type vocabulary struct {
	words map[string]bool
	same  []string
}

var cutWord = regexp.MustCompile(`\p{L}+…`) // where a text has too little room

// fieldName is a name of the asset file, as messages give it.
var fieldName = regexp.MustCompile(`[a-z]+[._][a-z_.0-9]+`)

var plainWord = regexp.MustCompile(`\p{L}{3,}`)

func (v *vocabulary) add(text string) {
	for _, w := range plainWord.FindAllString(text, -1) {
		v.words[strings.ToLower(w)] = true
	}
}

// knownNames are words that no table says: of the keyboard, of formats and of
// sources that keep their names.
// sharedWords are the same in both languages where they are said, or belong to
// names that stay; touch-up is typed as the asset file writes it.
const sharedWords = "plan zip local decimal UNESCO Sec natural molar Lpp lognormal Linkspans IACS gas perp exp Escape Tab util touch"

const knownNames = "Español root xlsx Anodewright Excel JSON CSV Ag AgCl Cond PSS Ctrl Insert F1 F2 ene feb mar abr may jun jul ago sep oct nov dic EUR rho"

func spanishWords() *vocabulary {
	v := &vocabulary{words: map[string]bool{}}
	for english, text := range say.Table("es") {
		if english == text {
			v.same = append(v.same, text)
			continue
		}
		// A word that the English text has too may be one that was left in it.
		left := vocabulary{words: map[string]bool{}}
		left.add(english)
		for _, w := range plainWord.FindAllString(text, -1) {
			if w = strings.ToLower(w); !left.words[w] {
				v.words[w] = true
			}
		}
	}
	v.add(sharedWords)
	v.add(knownNames)
	for _, t := range assets.Tables() { // documents and what they call their rows
		v.add(t.Document + " " + t.Edition + " " + t.Clause + " " + t.Note)
		for _, r := range t.Rows {
			v.add(r.Name + " " + r.Note)
		}
	}
	return v
}

// foreign returns the words of a text that are neither Spanish nor the asset's
// own.
func (v *vocabulary) foreign(text string, own map[string]bool) []string {
	text = fieldName.ReplaceAllString(text, " ")
	text = cutWord.ReplaceAllString(text, " ")
	for _, s := range v.same {
		if strings.ContainsFunc(s, unicode.IsLetter) && len(s) > 3 {
			text = strings.ReplaceAll(text, s, " ")
		}
	}
	var found []string
	for _, w := range plainWord.FindAllString(text, -1) {
		if l := strings.ToLower(w); !v.words[l] && !own[l] {
			found = append(found, w)
		}
	}
	return found
}

// namesOf are the words that the asset itself brings along.
func namesOf(a *hull.Asset) map[string]bool {
	v := vocabulary{words: map[string]bool{}}
	v.add(a.Name + " " + a.Currency)
	for _, z := range a.Zones {
		v.add(z.Name + " " + z.ID + " " + z.Circuit)
	}
	for _, w := range a.Waters {
		v.add(w.Name + " " + w.ID)
	}
	for _, p := range a.Patterns {
		v.add(p.Name + " " + p.ID + " " + p.Fixing + " " + p.ItemNo + " " + p.Specification + " " + p.Certificate)
	}
	for _, r := range a.Readings {
		v.add(r.By + " " + r.How + " " + r.Note)
	}
	return v.words
}

// typed are fields whose texts are typed as the asset file writes them.
var typedAsFile = map[string]bool{"works": true, "service": true, "waters": true, "fitted": true, "potentials": true}

// allGrids returns the grids within an object, also those that are not to be
// seen at present, as on another tab.
func allGrids(o fyne.CanvasObject) []*grid.Grid {
	if g, ok := o.(*grid.Grid); ok {
		return []*grid.Grid{g}
	}
	var all []*grid.Grid
	for _, part := range partsOf(o) {
		all = append(all, allGrids(part)...)
	}
	return all
}

// TestEveryTextIsSpanish builds every page of every demo asset in Spanish and
// looks for words that are not.
func TestEveryTextIsSpanish(t *testing.T) {
	spanish(t)
	words := spanishWords()
	names := map[string]bool{}
	f := shown(t, look.Light, 1, small, fleet()...)
	for _, item := range f.s.Fleet() {
		for w := range namesOf(item.Asset) {
			names[w] = true
		}
	}
	seen := map[string]bool{}
	check := func(where, text string) {
		if found := words.foreign(text, names); len(found) > 0 && !seen[text] {
			seen[text] = true
			t.Errorf("%s: %q of %q", where, found, text)
		}
	}
	for _, item := range f.s.Fleet() {
		f.s.Select(item.ID)
		for i, p := range f.pages {
			f.show(i)
			if d, ok := p.(*dockings); ok {
				d.whatIf.card.Show() // beside the other, which it stands over
				f.Update()
			}
			settle(f)
			where := item.Asset.Name + ", " + p.title()
			for _, text := range texts(f) {
				check(where, text)
			}
			for _, g := range allGrids(p.content()) {
				for col, c := range g.Columns() {
					check(where, c.Title+" "+c.Unit)
					for row := range g.Source().Rows() {
						if key := c.ID; typedAsFile[key] || key == "value" {
							continue
						}
						cell := g.Source().Cell(row, col)
						for _, text := range []string{cell.Text, cell.Sub, cell.Fault} {
							check(where+", "+c.Title, text)
						}
					}
				}
			}
		}
	}
	for _, table := range assets.Tables() {
		check("tables", say.T(table.Title)+" "+say.T(table.Unit)+" "+sureText(table.Confidence))
	}
	for _, m := range f.win.MainMenu().Items {
		check("menu", m.Label)
		for _, i := range m.Items {
			check("menu "+m.Label, i.Label)
		}
	}
	for name, show := range map[string]func(){
		"about": f.about, "new asset": f.newAsset, "import": f.importAsset, "export": f.exportWorkbook, "remove": f.removeAsset,
		"areas": func() { f.estimateAreas(0) }, "settings": f.settings,
	} {
		show()
		for _, o := range f.win.Canvas().Overlays().List() {
			for _, part := range within(o) {
				if s, ok := part.(*canvas.Text); ok {
					check(name, s.Text)
				}
			}
			f.win.Canvas().Overlays().Remove(o)
		}
	}
}

// TestSpanishIsWhole holds what TestLabelsAndFiguresAreWhole and
// TestNothingIsClipped do, in Spanish.
func TestSpanishIsWhole(t *testing.T) {
	spanish(t)
	for _, scale := range []float32{1, 1.5} {
		t.Run(fmt.Sprint(scale), func(t *testing.T) {
			eachView(t, scale, func(t *testing.T, f *Frame) {
				labelsAreWhole(t, f)
				isClippedNowhere(t, f)
			})
		})
	}
}

// TestOtherUnitsAreWhole holds it of figures in US units, which are longer.
func TestOtherUnitsAreWhole(t *testing.T) {
	plainWords(t)
	for _, scale := range []float32{1, 1.5} {
		t.Run(fmt.Sprint(scale), func(t *testing.T) {
			f := shown(t, look.Light, scale, small, fleet()...)
			f.s.SetSetting(settingUnits, "us")
			f.s.SetSetting(settingDates, string(say.DayMonthYear))
			f.readWords()
			f.rebuild()
			for _, item := range f.s.Fleet() {
				f.s.Select(item.ID)
				for i, p := range f.pages {
					f.show(i)
					settle(f)
					t.Run(item.Asset.Name+"/"+p.title(), func(t *testing.T) { labelsAreWhole(t, f) })
				}
			}
		})
	}
}

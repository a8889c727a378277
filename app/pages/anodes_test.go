package pages

import (
	"fmt"
	"image/png"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"fyne.io/fyne/v2"

	"anodewright/anodes"
	"anodewright/app/look"
)

// The slab of the whole-chain check: R 0.217391 Ω at 0.25 Ω m, here in the
// North Sea of the test asset.
func TestAnodesShowsTheCasting(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	f.open(t, "Anodes")
	a := f.s.Asset()
	rho := a.Resistivity(&a.Zones[0], a.Start())
	p := &a.Patterns[0]
	wants(t, f, "Flush slab 45 kg", "al-45", "In Vertical sides, seawater of",
		fmt.Sprintf("%.4f / %.4f Ω", anodes.ResistanceNew(p, rho), anodes.ResistanceWorn(p, rho)),
		"Output new / worn", "2\u00a0000 Ah/kg; −1.05 V", "47.0; 45.0 kg", "49.0 kg", "DNV-RP-B401, Table 10-5", "1\u00a0000", "150",
		"Fitted at the last docking", "24", "2024-03-15")
}

// The zone of the selected set by its slope: E = E anode + S i.
func TestSlopeViewOfTheZone(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := f.open(t, "Anodes").(*anodesPage)
	p.tabs.buttons[1].OnTapped()
	s := f.s.Outcome().Slope(0)[0]
	wants(t, f, "15 Mar 2027", slopeFigure(s.End.S), "from "+slopeFigure(s.Start.S), slopeFigure(s.Needs), "of "+slopeFigure(s.Has), "E anode + S i")
	if got := s.End.Anode + s.End.S*s.End.Density; math.Abs(got-s.End.Potential) > 1e-12 {
		t.Errorf("E %v by the line, %v", got, s.End.Potential)
	}
}

func TestCastingIsQuestioned(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := f.open(t, "Anodes").(*anodesPage)
	enter(t, f, p.patterns, 0, colOf(t, p.patterns, "net_mass_kg"), "40")
	wants(t, f, "Its dimensions make 47 kg, its net mass is given as 40 kg: check the casting.")
	enter(t, f, p.patterns, 0, colOf(t, p.patterns, "net_mass_kg"), "forty")
	p.patterns.Select(0, colOf(t, p.patterns, "net_mass_kg"))
	f.Update()
	wants(t, f, "⚠ Net: want a number", "⚠ 1 field at fault")
	if got := f.s.Asset().Patterns[0].NetMass; got != 40 {
		t.Errorf("the mass is %v", got)
	}
}

// Life at a current: (u - w) m C/(8760 I) = 0.85 × 45 × 2000/8760 = 8.7 years
// at 1 A.
func TestLifeAtACurrent(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := f.open(t, "Anodes").(*anodesPage)
	p.casting.current.SetText("1")
	wants(t, f, "8.7 years")
	p.casting.current.SetText("0,5")
	wants(t, f, "17.5 years")
	p.casting.current.SetText("none")
	wants(t, f, "want a current above 0")
}

func TestFittedSetsAreEditedInPlace(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := f.open(t, "Anodes").(*anodesPage)
	before := f.s.Outcome().Zones[0].Intervals[0].Output
	enter(t, f, p.fitted.grid, 0, fittedCount, "20")
	enter(t, f, p.fitted.grid, 0, fittedWastage, "20 %")
	enter(t, f, p.fitted.grid, 0, fittedDate, "1 Mar 2024")
	got := f.s.Asset().Zones[0].Fitted[0]
	if got.Count != 20 || got.Wastage != 0.2 || got.Fitted.String() != "2024-03-01" {
		t.Errorf("%+v", got)
	}
	if after := f.s.Outcome().Zones[0].Intervals[0].Output; after == before {
		t.Error("the outcome is as before")
	}
	// 20 pieces of 45 kg with 0.85 - 0.20 left.
	wants(t, f, "585")
	enter(t, f, p.fitted.grid, 0, fittedCount, "many")
	p.fitted.grid.Select(0, fittedCount)
	f.Update()
	wants(t, f, "many", "⚠ Pieces:", "⚠ 1 field at fault")
}

func TestLibraryIsSearchedAndCopied(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := f.open(t, "Anodes").(*anodesPage)
	n := len(f.s.Asset().Patterns)
	f.pickPattern(p.added)
	wants(t, f, "Add a pattern from the library", "Flush slab 6 kg, aluminium")
	typed(f, "zinc rod 27")
	wants(t, f, "Soil rod 27 kg, zinc", "Invented for this program")
	if all := strings.Join(texts(f), "\n"); strings.Contains(all, "Flush slab 6 kg, aluminium") {
		t.Error("the search finds what was not looked for")
	}
	key(f, fyne.KeyReturn)
	settle(f)
	a := f.s.Asset()
	if len(a.Patterns) != n+1 || a.Patterns[n].ID != "zn-rod-27" || p.pattern() != n {
		t.Fatalf("%d patterns, pattern %d is selected", len(a.Patterns), p.pattern())
	}
	if f.win.Canvas().Overlays().Top() != nil {
		t.Error("the dialog stays open")
	}
	wants(t, f, "Soil rod 27 kg, zinc", "ASTM B418, type II")
}

func TestUsedPatternIsNotRemoved(t *testing.T) {
	f := shown(t, look.Light, 1, small, tern(t))
	p := f.open(t, "Anodes").(*anodesPage)
	f.report(f.s.RemovePattern(p.pattern()))
	wants(t, f, "is still in use", "are fitted in Vertical sides")
}

// The page says of every zone with anodes of its own what it carries, and
// draws every casting of the demo fleet, at every size and theme.
func TestAnodesOfTheFleet(t *testing.T) {
	dir := os.Getenv("ANODES_SHOTS") // to look at them
	for _, c := range []struct {
		name  string
		mode  look.Mode
		scale float32
	}{{"light", look.Light, 1}, {"dark", look.Dark, 1}, {"large", look.Light, 1.5}} {
		f := shown(t, c.mode, c.scale, small, fleet()...)
		for k, item := range f.s.Fleet() {
			f.s.Select(item.ID)
			settle(f)
			p := f.open(t, "Anodes").(*anodesPage)
			if len(p.fitted.sets) == 0 {
				t.Errorf("%s: no zone is listed", item.Asset.Name)
			}
			for i := range f.s.Asset().Patterns {
				p.patterns.Select(i, 0)
				f.Update()
				if len(p.casting.sketch.objects) == 0 || len(p.casting.list.box.Objects) < 5 {
					t.Errorf("%s, %s: no sketch or no figures", item.Asset.Name, f.s.Asset().Patterns[i].ID)
				}
			}
			if dir != "" {
				p.patterns.Select(min(1, len(f.s.Asset().Patterns)-1), 0)
				f.Update()
				out, err := os.Create(filepath.Join(dir, fmt.Sprintf("%s-%d.png", c.name, k+1)))
				must(t, err)
				must(t, png.Encode(out, f.win.Canvas().Capture()))
				must(t, out.Close())
				p.tabs.buttons[1].OnTapped()
				out, err = os.Create(filepath.Join(dir, fmt.Sprintf("%s-%d-slope.png", c.name, k+1)))
				must(t, err)
				must(t, png.Encode(out, f.win.Canvas().Capture()))
				must(t, out.Close())
				p.tabs.buttons[0].OnTapped()
			}
		}
	}
}

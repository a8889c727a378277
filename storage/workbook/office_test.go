package workbook_test

import (
	"math"
	"os"
	"os/exec"
	"path/filepath"
	"slices"
	"strconv"
	"testing"

	"github.com/xuri/excelize/v2"

	"anodewright/anodes"
	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/anodes/survey"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
	"anodewright/storage/workbook"
)

// recalculated lets an office suite open workbooks, calculate them anew and
// save them, and returns them by name.
func recalculated(t *testing.T, dir string, names ...string) map[string]*excelize.File {
	t.Helper()
	soffice, err := exec.LookPath("soffice")
	if err != nil {
		t.Skip("LibreOffice (soffice) is not on the PATH")
	}
	if testing.Short() {
		t.Skip("an office suite takes its time")
	}
	// Always calculate anew, whatever is stored beside the formulas.
	profile := filepath.Join(dir, "profile")
	if err := os.MkdirAll(filepath.Join(profile, "user"), 0o700); err != nil {
		t.Fatal(err)
	}
	const settings = `<?xml version="1.0" encoding="UTF-8"?>
<oor:items xmlns:oor="http://openoffice.org/2001/registry" xmlns:xs="http://www.w3.org/2001/XMLSchema" xmlns:xsi="http://www.w3.org/2001/XMLSchema-instance">
<item oor:path="/org.openoffice.Office.Calc/Formula/Load"><prop oor:name="OOXMLRecalcMode" oor:op="fuse"><value>0</value></prop></item>
</oor:items>`
	if err := os.WriteFile(filepath.Join(profile, "user", "registrymodifications.xcu"), []byte(settings), 0o600); err != nil {
		t.Fatal(err)
	}
	out := filepath.Join(dir, "calculated")
	args := []string{"-env:UserInstallation=file://" + filepath.ToSlash(profile), "--headless", "--convert-to", "xlsx", "--outdir", out}
	for _, name := range names {
		args = append(args, filepath.Join(dir, name))
	}
	if text, err := exec.Command(soffice, args...).CombinedOutput(); err != nil {
		t.Fatalf("soffice: %v\n%s", err, text)
	}
	files := map[string]*excelize.File{}
	for _, name := range names {
		f, err := excelize.OpenFile(filepath.Join(out, name))
		if err != nil {
			t.Fatal(err)
		}
		t.Cleanup(func() { f.Close() })
		files[name] = f
	}
	return files
}

var raw = excelize.Options{RawCellValue: true}

// figure returns the number in a cell.
func figure(t *testing.T, f *excelize.File, sheet, cell string) float64 {
	t.Helper()
	text, err := f.GetCellValue(sheet, cell, raw)
	if err != nil {
		t.Fatal(err)
	}
	x, err := strconv.ParseFloat(text, 64)
	if err != nil {
		t.Errorf("%s %s: want a figure, got %q", sheet, cell, text)
	}
	return x
}

func near(got, want float64) bool { return math.Abs(got-want) <= 1e-9*max(1, math.Abs(want)) }

// An office suite calculates the same figure in every formula of every demo's
// workbook as is stored with it.
func TestAnOfficeSuiteAgrees(t *testing.T) {
	dir := t.TempDir()
	var names []string
	for i, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			t.Fatal(err)
		}
		names = append(names, "plan"+strconv.Itoa(i)+".xlsx")
		if err := workbook.Write(filepath.Join(dir, names[i]), plan.Compute(a, today)); err != nil {
			t.Fatal(err)
		}
	}
	formulas := 0
	for name, calculated := range recalculated(t, dir, names...) {
		stored, err := excelize.OpenFile(filepath.Join(dir, name))
		if err != nil {
			t.Fatal(err)
		}
		defer stored.Close()
		for _, sheet := range sheets {
			rows, err := stored.GetRows(sheet, raw)
			if err != nil {
				t.Fatal(err)
			}
			for r, row := range rows {
				for c := range row {
					cell, _ := excelize.CoordinatesToCellName(c+1, r+1)
					formula, _ := stored.GetCellFormula(sheet, cell)
					if formula == "" {
						continue
					}
					formulas++
					if got, want := figure(t, calculated, sheet, cell), figure(t, stored, sheet, cell); !near(got, want) {
						t.Errorf("%s: %s %s: %s gives %v, stored is %v", name, sheet, cell, formula, got, want)
					}
				}
			}
		}
	}
	if formulas < 5000 {
		t.Errorf("%d formulas, want the whole chain of five workbooks", formulas)
	}
}

// place finds a row of a sheet by its first cells, from a row on that begins
// with a heading, and returns its number.
func place(t *testing.T, f *excelize.File, sheet, heading string, first ...string) int {
	t.Helper()
	rows, err := f.GetRows(sheet, raw)
	if err != nil {
		t.Fatal(err)
	}
	below := heading == ""
	for r, row := range rows {
		below = below || len(row) > 0 && row[0] == heading
		if below && len(row) >= len(first) {
			same := true
			for c := range first {
				same = same && row[c] == first[c]
			}
			if same {
				return r + 1
			}
		}
	}
	t.Fatalf("%s has no row of %q below %q", sheet, first, heading)
	return 0
}

// An input changed in the file and calculated anew by an office suite gives
// what the program gives for the changed asset, with the plan's actions
// pinned: demand, pieces and order.
func TestAChangedInputGivesWhatTheProgramGives(t *testing.T) {
	changes := []struct {
		name, sheet string
		factors     map[string]float64 // by column
		zone        func(z *hull.Zone)
		pattern     func(p *hull.Pattern)
		water       func(w *hull.Water)
	}{
		{"steel", "Zones", map[string]float64{"E": 1.37, "J": 2.5, "K": 9}, func(z *hull.Zone) {
			a, b := z.BreakdownConstants()
			a, b = a*2.5, b*9
			z.WettedArea, z.Coating.A, z.Coating.B = z.WettedArea*1.37, &a, &b
		}, nil, nil},
		{"metal", "Patterns", map[string]float64{"M": 0.4, "P": 0.7, "V": 3}, nil, func(p *hull.Pattern) {
			c := anodes.MetalOf(p, hull.Seawater).Capacity * 0.7
			p.GrossMass, p.Capacity = p.Gross(), &c
			p.NetMass, p.Price = p.NetMass*0.4, p.Price*3
		}, nil},
		{"water", "Calculation", map[string]float64{"E": 1.6, "F": 1.6}, nil, nil, func(w *hull.Water) {
			rho := w.Resist() * 1.6
			w.Resistivity = &rho
		}},
	}
	dir := t.TempDir()
	var names []string
	outcomes := map[string]*plan.Outcome{}
	changed := map[string]*hull.Asset{}
	moved, over := map[string]int{}, 0
	for k := range assets.Demo() {
		for _, c := range changes {
			a, err := assetfile.Decode(assets.Demo()[k])
			if err != nil {
				t.Fatal(err)
			}
			o := plan.Compute(a, today)
			name := c.name + strconv.Itoa(k) + ".xlsx"
			path := filepath.Join(dir, name)
			if err := workbook.Write(path, o); err != nil {
				t.Fatal(err)
			}
			b := assetfile.Clone(a)
			f, err := excelize.OpenFile(path)
			if err != nil {
				t.Fatal(err)
			}
			set := func(row int) {
				for column, factor := range c.factors {
					cell := column + strconv.Itoa(row)
					if err := f.SetCellFloat(c.sheet, cell, figure(t, f, c.sheet, cell)*factor, -1, 64); err != nil {
						t.Fatal(err)
					}
				}
			}
			below := map[string]string{"Calculation": "Output of one piece"}[c.sheet]
			first := place(t, f, c.sheet, below, map[string]string{"Zones": "Zone", "Calculation": "Zone", "Patterns": "Pattern"}[c.sheet]) + 1
			for i := range b.Waters {
				if c.water != nil {
					c.water(&b.Waters[i])
				}
			}
			for row := first; c.water != nil; row++ {
				if zone, _ := f.GetCellValue(c.sheet, "A"+strconv.Itoa(row)); zone == "" {
					break
				}
				set(row)
			}
			for i := range b.Zones {
				if c.zone != nil && b.Zones[i].Coated() {
					c.zone(&b.Zones[i])
					set(first + i)
				}
			}
			for i := range b.Patterns {
				if c.pattern != nil {
					c.pattern(&b.Patterns[i])
					set(first + i)
				}
			}
			if err := f.Save(); err != nil {
				t.Fatal(err)
			}
			f.Close()
			names = append(names, name)
			outcomes[name], changed[name] = o, b
		}
	}
	for name, f := range recalculated(t, dir, names...) {
		o, b := outcomes[name], changed[name]
		var totals [][]hull.Current
		var factors []float64
		demand := hull.Demand(b)
		row := place(t, f, "Demand", "Zone") + 1
		for i := range b.Zones {
			totals, factors = append(totals, demand[i].Total), append(factors, o.Zones[i].Factor.Used)
			for k := range o.Intervals {
				for c, want := range []float64{
					demand[i].Breakdown[k].Initial, demand[i].Breakdown[k].Mean, demand[i].Breakdown[k].Final,
					demand[i].Own[k].Initial, demand[i].Own[k].Mean, demand[i].Own[k].Final,
					demand[i].Total[k].Initial, demand[i].Total[k].Mean, demand[i].Total[k].Final,
				} {
					cell, _ := excelize.CoordinatesToCellName(4+c, row)
					if got := figure(t, f, "Demand", cell); !near(got, want) {
						t.Errorf("%s: %s, Demand %s: the office suite gives %v, the program %v", name, b.Zones[i].ID, cell, got, want)
					}
				}
				row++
			}
		}
		sized := renewal.Size(b, totals, factors, o.Schedule)
		row = place(t, f, "Calculation", "Actions", "Docking") + 1
		pieces, inRows := map[string]float64{}, map[string]bool{}
		for k, l := range sized {
			carried := l.Count
			if l.Action == renewal.Add {
				carried += standing(b, sized[:k], l)
			}
			if l.Action == renewal.Keep {
				continue
			}
			if l.Pattern.Shape == hull.SoilRod && l.Pattern.Spacing > 0 {
				// How much the rods of a row hinder each other is a value, at
				// the count planned: the sheet says so.
				inRows[l.Date.String()+l.Pattern.ID] = true
				row++
				continue
			}
			for cell, want := range map[string]float64{
				"I": l.Need.ByMass, "J": l.Need.ByRenewAbove, "K": l.Need.ByInitial, "L": l.Need.ByFinal,
				"O": float64(l.Count), "P": float64(l.Removed), "R": l.Cost,
			} {
				if l.Action == renewal.Add && cell == "J" || want == 0 && cell == "J" {
					continue
				}
				if got := figure(t, f, "Calculation", cell+strconv.Itoa(row)); !near(got, want) {
					t.Errorf("%s: %s %s on %s, Calculation %s%d: the office suite gives %v, the program %v", name, l.Action, b.Zones[l.Zone].ID, l.Date, cell, row, got, want)
				}
			}
			if most := b.Zones[l.Zone].MaxCount; most != nil {
				want := max(0, carried-*most)
				if got := figure(t, f, "Calculation", "Y"+strconv.Itoa(row)); got != float64(want) {
					t.Errorf("%s: %s carries %d pieces from %s, may %d, Calculation Y%d says over by %v", name, b.Zones[l.Zone].ID, carried, l.Date, *most, row, got)
				}
				if want > 0 {
					over++
				}
			}
			if l.Count != o.Schedule[k].Count || l.Cost != o.Schedule[k].Cost {
				moved[name[:5]]++
			}
			pieces[l.Date.String()+l.Pattern.ID] += float64(l.Count)
			row++
		}
		for k, l := range o.Order {
			if inRows[l.Docking.String()+l.Pattern.ID] {
				continue
			}
			row := place(t, f, "Order", "", "Order by") + 1 + k
			if got, want := figure(t, f, "Order", "I"+strconv.Itoa(row)), pieces[l.Docking.String()+l.Pattern.ID]; got != want {
				t.Errorf("%s: the order has %v pieces of %s, the program %v", name, got, l.Pattern.ID, want)
			}
		}
	}
	if over == 0 {
		t.Error("no change leads to more pieces than a zone may carry")
	}
	for _, c := range changes {
		if moved[c.name[:5]] == 0 {
			t.Errorf("the change of %s moves no action of any demo", c.name)
		}
	}
}

// standing is how many pieces are there when others are added to them.
func standing(a *hull.Asset, before []renewal.Line, l renewal.Line) (n int) {
	for _, m := range slices.Backward(before) {
		if m.Zone == l.Zone && m.Action == renewal.Renew {
			return m.Count
		}
	}
	z := &a.Zones[l.Zone]
	for set := range z.Fitted {
		for _, lot := range survey.Lots(a, z, set) {
			if lot.LiveOn(l.Date) {
				n += lot.Count
			}
		}
	}
	return n
}

package workbook_test

import (
	"bytes"
	"errors"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"
	"time"

	"github.com/xuri/excelize/v2"

	"anodewright/anodes/order"
	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
	"anodewright/storage/workbook"
)

var (
	today  = hull.NewDate(2026, 12, 1)
	sheets = []string{
		"Schedule", "Order", "Work list", "Demand", "Forecast", "Charts", "Zones", "Patterns", "Readings", "Protections", "Money",
		"Basis and cautions", "Where from", "Calculation",
	}
)

func tern(t *testing.T) *hull.Asset {
	t.Helper()
	a, err := assetfile.Read(filepath.Join("..", "..", "testdata", "assets", "tern-passage.json"))
	if err != nil {
		t.Fatal(err)
	}
	return a
}

// written is a workbook that was written and opened again.
type written struct {
	*testing.T
	f *excelize.File
	o *plan.Outcome
}

func write(t *testing.T, o *plan.Outcome, options ...workbook.Option) written {
	t.Helper()
	var b bytes.Buffer
	if err := workbook.WriteTo(&b, o, options...); err != nil {
		t.Fatal(err)
	}
	f, err := excelize.OpenReader(&b)
	if err != nil {
		t.Fatalf("the workbook does not open: %v", err)
	}
	t.Cleanup(func() { f.Close() })
	return written{t, f, o}
}

// rows returns the cells of a sheet as stored, not as shown.
func (w written) rows(sheet string) [][]string {
	w.Helper()
	rows, err := w.f.GetRows(sheet, excelize.Options{RawCellValue: true})
	if err != nil {
		w.Fatal(err)
	}
	return rows
}

// table returns the rows under the headings that begin with these, to the
// first blank or total row.
func (w written) table(sheet string, heads ...string) (rows [][]string, first int) {
	w.Helper()
	all := w.rows(sheet)
	for i, r := range all {
		if len(r) < len(heads) || !slices.Equal(r[:len(heads)], heads) {
			continue
		}
		for _, r := range all[i+1:] {
			if len(r) == 0 || strings.HasPrefix(r[0], "Total") {
				break
			}
			rows = append(rows, append(r, make([]string, 30)...))
		}
		return rows, i + 2
	}
	w.Fatalf("%s has no table headed %q", sheet, heads)
	return nil, 0
}

func (w written) number(s string) float64 {
	w.Helper()
	x, err := strconv.ParseFloat(s, 64)
	if err != nil {
		w.Fatalf("want a number: %v", err)
	}
	return x
}

// same compares a stored cell with what it should hold: a string, an int, a
// float64 or a date.
func (w written) same(cell string, want any) {
	w.Helper()
	switch want := want.(type) {
	case string:
		if cell != want {
			w.Errorf("got %q, want %q", cell, want)
		}
	case int:
		w.same(cell, float64(want))
	case float64:
		if got := w.number(cell); math.Abs(got-want) > 1e-9*max(1, math.Abs(want)) {
			w.Errorf("got %v, want %v", got, want)
		}
	case hull.Date:
		got, err := excelize.ExcelDateToTime(w.number(cell), false)
		if err != nil || hull.DateOf(got) != want {
			w.Errorf("got %s as a date, want %s", got.Format(time.DateOnly), want)
		}
	default:
		w.Fatalf("no comparison with a %T", want)
	}
}

func TestScheduleMatchesTheOutcome(t *testing.T) {
	a := tern(t)
	w := write(t, plan.Compute(a, today))
	if got := w.f.GetSheetList(); !slices.Equal(got, sheets) {
		t.Fatalf("sheets %q, want %q", got, sheets)
	}
	facts := map[string]string{}
	for _, r := range w.rows("Schedule")[:12] {
		if len(r) > 1 {
			facts[r[0]] = r[1]
		}
	}
	w.same(facts["Asset"], a.Name)
	w.same(facts["As of"], w.o.Today)
	w.same(facts["Last docking"], a.LastDocking)
	w.same(facts["Horizon"], a.Horizon)
	w.same(facts["Cost of this plan, EUR"], w.o.Money.Total)
	w.same(facts["Renew all at every docking, EUR"], w.o.Money.RenewAll)
	w.same(facts["Renew as late as possible, EUR"], w.o.Money.AsLate)

	matrix, _ := w.table("Schedule", "Zone", "Fitted now")
	if len(matrix) != 2 {
		t.Fatalf("%d zones in the matrix, want 2", len(matrix))
	}
	w.same(matrix[0][1], "24 × Flush slab 45 kg")
	w.same(matrix[1][2], "held by Vertical sides")
	for k := range a.Ahead() {
		want := "-"
		if l, ok := w.o.Action(0, k); ok {
			want = map[renewal.Action]string{
				renewal.Keep:  "keep",
				renewal.Add:   fmt.Sprintf("add %d × Flush slab 45 kg", l.Count),
				renewal.Renew: fmt.Sprintf("renew: %d × Flush slab 45 kg", l.Count),
			}[l.Action]
		}
		w.same(matrix[0][2+k], want)
	}

	list, first := w.table("Schedule", "Docking", "Zone")
	i, cost := 0, 0.0
	for _, r := range list {
		cost += w.number("0" + r[11])
		if r[1] == "all zones worked on" {
			continue
		}
		l := w.o.Schedule[i]
		i++
		w.same(r[0], l.Date)
		w.same(r[1], a.Zones[l.Zone].Name)
		w.same(r[2], string(l.Action))
		w.same(r[10], l.Until)
		if l.Action != renewal.Keep {
			w.same(r[4], l.Count)
			w.same(r[6], l.Removed)
			w.same(r[7], float64(l.Count)*l.Pattern.NetMass)
			w.same(r[8], float64(l.Count)*l.Pattern.Gross())
			w.same(r[11], l.Cost)
		}
	}
	if i != len(w.o.Schedule) {
		t.Errorf("%d actions in the list, want %d", i, len(w.o.Schedule))
	}
	if math.Abs(cost-w.o.Money.Total) > 1e-6 {
		t.Errorf("the list adds up to %v, the plan costs %v", cost, w.o.Money.Total)
	}
	sum, _ := excelize.CoordinatesToCellName(12, first+len(list))
	if got, err := w.f.CalcCellValue("Schedule", sum, excelize.Options{RawCellValue: true}); err != nil {
		t.Error(err)
	} else {
		w.same(got, w.o.Money.Total)
	}
}

func TestOrderMatchesTheOutcome(t *testing.T) {
	a := tern(t)
	a.Patterns[0].ItemNo, a.Patterns[0].Specification, a.Patterns[0].Certificate = "0045", "as drawn", "3.1"
	a.Today = 0 // so that the date given counts
	w := write(t, plan.Compute(a, hull.NewDate(2027, 1, 10)))
	rows, first := w.table("Order", "Order by", "Late", "Docking")
	if len(rows) == 0 || len(rows) != len(w.o.Order) {
		t.Fatalf("%d order lines, want %d", len(rows), len(w.o.Order))
	}
	late := 0
	for i, l := range w.o.Order {
		r := rows[i]
		for c, want := range []any{
			l.OrderBy, l.LateDays, l.Docking, "0045", l.Pattern.ID, l.Pattern.Name, "aluminium (Al-Zn-In)", "welded",
			l.Pieces, order.SpareShare, l.Spares, l.FromStock, l.Ordered, l.Net, l.Gross, l.Pattern.Price, l.Price, l.Freight, "as drawn", "3.1",
		} {
			w.same(r[c], want)
		}
		if l.LateDays > 0 {
			late++
			cell, _ := w.f.GetCellStyle("Order", "B"+strconv.Itoa(first+i))
			style, err := w.f.GetStyle(cell)
			if err != nil || style.CustomNumFmt == nil || !strings.Contains(*style.CustomNumFmt, "late by") {
				t.Errorf("the days late have no word beside them: %+v", style)
			}
		}
	}
	if late == 0 {
		t.Error("want an order that is late in this case")
	}
}

func TestZonesAndDemandMatchTheOutcome(t *testing.T) {
	a := tern(t)
	w := write(t, plan.Compute(a, today))
	zones, _ := w.table("Zones", "Zone", "Id")
	side, propeller := zones[0], zones[1]
	for c, want := range map[int]any{
		1: "side", 4: 2100, 5: 20, 6: 2080, 7: 6, 8: "III", 9: 0.02, 10: 0.012, 11: a.LastDocking, 12: "North Sea 100 %",
		13: a.Resistivity(&a.Zones[0], a.Start()), 14: "its own anodes", 15: "hull", 17: 12, 18: 2, 19: 60,
	} {
		w.same(side[c], want)
	}
	w.same(side[16], "24 × Flush slab 45 kg, 2024-03-15, 0 %")
	w.same(propeller[14], "Vertical sides")
	w.same(propeller[5], 19)
	w.same(propeller[11], "") // no coating, so no date

	rows, _ := w.table("Demand", "Zone", "From", "To")
	i := 0
	for _, z := range w.o.Zones {
		for _, iv := range z.Intervals {
			r := rows[i]
			i++
			for c, want := range []any{
				z.Zone.Name, iv.From, iv.To, iv.Breakdown.Initial, iv.Breakdown.Mean, iv.Breakdown.Final,
				iv.Demand.Initial, iv.Demand.Mean, iv.Demand.Final, iv.Total.Initial, iv.Total.Mean, iv.Total.Final,
				iv.ByCode.Initial, iv.ByCode.Mean, iv.ByCode.Final,
			} {
				w.same(r[c], want)
			}
			if iv.ByPractice == nil {
				w.same(r[15], "no figure")
			} else {
				w.same(r[17], iv.ByPractice.Final)
			}
			if z.Zone.HeldBy != "" {
				w.same(r[24], "-")
				w.same(r[25], "held by Vertical sides")
			} else {
				w.same(r[22], iv.Output)
				w.same(r[24], string(iv.State))
			}
		}
	}
	if i != len(rows) {
		t.Errorf("%d rows of demand, want %d", len(rows), i)
	}
}

func TestBasisNamesEveryTableAndCaution(t *testing.T) {
	w := write(t, plan.Compute(tern(t), today))
	const sheet = "Basis and cautions"
	tables, _ := w.table(sheet, "Table", "Document")
	for i, table := range assets.Tables() {
		w.same(tables[i][0], table.Title)
		w.same(tables[i][1], table.Document)
		w.same(tables[i][4], table.Edition)
		w.same(tables[i][5], table.Unit)
		if table.Confidence == "from memory" && !strings.HasPrefix(tables[i][3], "from memory: check") {
			t.Errorf("%s: confidence %q does not ask to be checked", table.ID, tables[i][3])
		}
	}
	var texts []string
	for _, r := range w.rows(sheet) {
		if len(r) > 1 {
			texts = append(texts, r[1])
		}
	}
	cautions := slices.Concat(w.o.Cautions, plan.Usual())
	for _, c := range cautions {
		if !slices.Contains(texts, c.Text) {
			t.Errorf("the caution %q is missing", c.Text)
		}
	}
	if len(cautions) < 8 {
		t.Errorf("%d cautions: this case has to raise some of its own", len(cautions))
	}
}

// every sheet prints as a document and ends with the closing sentence.
func TestEverySheetIsReadyForPrint(t *testing.T) {
	w := write(t, plan.Compute(tern(t), today), workbook.Revision(12))
	titles := map[string]string{}
	for _, n := range w.f.GetDefinedName() {
		if n.Name == "_xlnm.Print_Titles" {
			titles[n.Scope] = n.RefersTo
		}
	}
	for _, sheet := range sheets {
		rows := w.rows(sheet)
		if last := rows[len(rows)-1]; last[0] != plan.Closing {
			t.Errorf("%s ends with %q", sheet, last)
		}
		if !strings.HasPrefix(rows[0][0], "Tern Passage: ") {
			t.Errorf("%s begins with %q", sheet, rows[0])
		}
		if panes, err := w.f.GetPanes(sheet); err != nil || !panes.Freeze || panes.YSplit < 1 {
			t.Errorf("%s has no frozen rows: %+v, %v", sheet, panes, err)
		}
		if !strings.HasPrefix(titles[sheet], "'"+sheet+"'!$") {
			t.Errorf("%s repeats no rows in print: %q", sheet, titles[sheet])
		}
		if p, err := w.f.GetPageLayout(sheet); err != nil || *p.Size != 9 || *p.Orientation != "landscape" || *p.FitToWidth != 1 || *p.FitToHeight != 0 {
			t.Errorf("%s is not A4 landscape, one page wide: %+v, %v", sheet, p, err)
		}
		h, err := w.f.GetHeaderFooter(sheet)
		if err != nil || !strings.Contains(h.OddHeader, "Tern Passage") || !strings.Contains(h.OddHeader, sheet) ||
			!strings.Contains(h.OddFooter, "Page &P of &N") || !strings.Contains(h.OddHeader, "Revision 12, as of 2026-12-01") {
			t.Errorf("%s: header and footer %+v, %v", sheet, h, err)
		}
	}
	head, _ := w.f.GetRows("Order")
	if row := titles["Order"][len("'Order'!$"):]; head[w.whole(row[:1])-1][0] != "Order by" {
		t.Errorf("the rows repeated in print, %s, are not the headings", titles["Order"])
	}
}

func (w written) whole(s string) int { return int(w.number(s)) }

// Every formula of every demo's workbook gives the value stored with it, and
// no cell shows a figure that does not exist; so too with other choices.
func TestFormulasAndFiguresOfTheDemoFleet(t *testing.T) {
	share, found, own := 0.3, 0.2, 0.015
	governs := map[string]bool{}
	for name, change := range map[string]func(a *hull.Asset) []plan.Option{
		"as it is":      func(*hull.Asset) []plan.Option { return nil },
		"ship practice": func(a *hull.Asset) []plan.Option { a.Basis.Densities = hull.HullPractice; return nil },
		"by forecast":   func(a *hull.Asset) []plan.Option { a.Basis.Sizing = hull.ForecastSizing; return nil },
		"readings":      func(*hull.Asset) []plan.Option { return []plan.Option{plan.WithReadings()} },
		"all works": func(a *hull.Asset) []plan.Option {
			for i := range a.Dockings {
				id := a.Zones[i%len(a.Zones)].ID
				a.Dockings[i].Works = []hull.Work{
					{Zone: id, Coating: hull.Found, Breakdown: &found}, {Zone: id, Coating: hull.PartRecoat, Share: &share, A: &own},
					{Zone: id, Coating: hull.TouchUp, Share: &share}, {Zone: a.Zones[0].ID, Coating: hull.Recoat, Category: hull.CategoryII, B: &own},
				}
			}
			return nil
		},
		"change of service": func(a *hull.Asset) []plan.Option {
			slower := 1.2
			a.Service = append(a.Service, hull.Service{From: a.Start() + 400, UnderWayFactor: &slower})
			steep := 0.3
			a.Zones[0].Coating.B = &steep // broken down altogether within an interval
			return nil
		},
		"pinned": func(a *hull.Asset) []plan.Option {
			var pins []renewal.Pin
			for _, l := range plan.Compute(a, today).Schedule {
				if l.Action != renewal.Keep && len(pins) < 2 {
					pins = append(pins, renewal.Pin{Zone: a.Zones[l.Zone].ID, Docking: l.Date, Action: l.Action, Pattern: l.Pattern.ID, Count: l.Count + 2*a.Zones[l.Zone].CountMultiple})
				}
			}
			return []plan.Option{plan.WithPins(pins)}
		},
	} {
		formulas := 0
		for _, text := range assets.Demo() {
			a, err := assetfile.Decode(text)
			if err != nil {
				t.Fatal(err)
			}
			opts := change(a)
			o := plan.Compute(a, today, opts...)
			for _, l := range o.Schedule {
				governs[l.Governs] = true
			}
			formulas += write(t, o).formulas(a.Name + ", " + name)
		}
		if formulas < 5000 {
			t.Errorf("%s: %d formulas, want the chain of five workbooks", name, formulas)
		}
	}
	for _, word := range []string{"mass", "initial", "final", "forecast", "pinned"} {
		if !governs[word] {
			t.Errorf("no count is governed by %q: got %v", word, governs)
		}
	}
}

// formulas checks and counts the formulas of a workbook.
func (w written) formulas(name string) (n int) {
	w.Helper()
	for _, sheet := range sheets {
		for r, row := range w.rows(sheet) {
			for c, v := range row {
				if v == "NaN" || strings.HasSuffix(v, "Inf") || strings.HasPrefix(v, "#") {
					w.Errorf("%s: %s: %q", name, sheet, v)
				}
				cell, _ := excelize.CoordinatesToCellName(c+1, r+1)
				f, _ := w.f.GetCellFormula(sheet, cell)
				if f == "" {
					continue
				}
				n++
				text, err := w.f.CalcCellValue(sheet, cell, excelize.Options{RawCellValue: true})
				if err != nil {
					w.Fatalf("%s: %s %s: %v", name, sheet, cell, err)
				}
				got, err := strconv.ParseFloat(text, 64)
				if err != nil || !near(got, w.number(v)) {
					w.Errorf("%s: %s %s: %s gives %s, stored is %s", name, sheet, cell, f, text, v)
				}
				if kind, _ := w.f.GetCellType(sheet, cell); kind == excelize.CellTypeFormula || kind == excelize.CellTypeSharedString {
					w.Errorf("%s: %s %s: the stored value is a text", name, sheet, cell)
				}
			}
		}
	}
	return n
}

func TestAZoneThatCannotBeHeldIsSaid(t *testing.T) {
	a := tern(t)
	one := 12
	a.Zones[0].MaxCount = &one
	w := write(t, plan.Compute(a, today))
	if len(w.o.Unmet) == 0 {
		t.Fatal("the case has to leave a zone unmet")
	}
	all := fmt.Sprint(w.rows("Schedule"))
	for _, want := range []string{
		"Zones that cannot be held", "Vertical sides cannot be held from " + w.o.Unmet[0].Date.String() + " on.", "at most 12 may be fitted",
		"not possible", "without the zones that cannot be held",
	} {
		if !strings.Contains(all, want) {
			t.Errorf("the schedule does not say %q", want)
		}
	}
	if strings.Contains(all, "renew_above") {
		t.Error("the schedule uses a word of the file")
	}
	if !strings.Contains(fmt.Sprint(w.rows("Order")), "not in this order") {
		t.Error("the order does not say that zones are missing")
	}
}

func TestNothingAheadAndNoCurrency(t *testing.T) {
	a := tern(t)
	a.Dockings, a.Currency = nil, ""
	w := write(t, plan.Compute(a, today))
	if all := fmt.Sprint(w.rows("Schedule")); !strings.Contains(all, "Nothing is planned: there is no docking ahead.") || !strings.Contains(all, "no currency named") {
		t.Errorf("an empty plan is not said: %s", all)
	}
	if all := fmt.Sprint(w.rows("Order")); !strings.Contains(all, "Nothing has to be ordered.") {
		t.Errorf("an empty order is not said: %s", all)
	}
}

func TestEqualOutcomesGiveEqualBytes(t *testing.T) {
	var first []byte
	for range 4 {
		var b bytes.Buffer
		if err := workbook.WriteTo(&b, plan.Compute(tern(t), today)); err != nil {
			t.Fatal(err)
		}
		if first == nil {
			first = b.Bytes()
		} else if !bytes.Equal(first, b.Bytes()) {
			t.Fatal("two workbooks of one outcome differ")
		}
	}
}

func TestWrite(t *testing.T) {
	o := plan.Compute(tern(t), today)
	path := filepath.Join(t.TempDir(), "schedule.xlsx")
	if err := os.WriteFile(path, []byte("old"), 0o600); err != nil {
		t.Fatal(err)
	}
	if err := workbook.Write(path, o); err != nil {
		t.Fatal(err)
	}
	f, err := excelize.OpenFile(path)
	if err != nil {
		t.Fatal(err)
	}
	f.Close()
	if files, _ := os.ReadDir(filepath.Dir(path)); len(files) != 1 {
		t.Errorf("%d files are left, want 1", len(files))
	}
}

func TestAFailedWriteKeepsTheFileAndSaysSo(t *testing.T) {
	o := plan.Compute(tern(t), today)
	// The name is as long as a name may be, so nothing can be written beside.
	path := filepath.Join(t.TempDir(), strings.Repeat("x", 250)+".xlsx")
	if err := os.WriteFile(path, []byte("old"), 0o600); err != nil {
		t.Skipf("this file system does not take names of 255 letters: %v", err)
	}
	err := workbook.Write(path, o)
	if err == nil || !strings.HasPrefix(err.Error(), "the workbook was not written: "+path+" cannot be written: ") {
		t.Errorf("got the error %v", err)
	}
	if text, _ := os.ReadFile(path); string(text) != "old" {
		t.Errorf("the old file became %q", text)
	}
	for _, path := range []string{"", filepath.Join(t.TempDir(), "no folder", "a.xlsx"), t.TempDir()} {
		if err := workbook.Write(path, o); err == nil {
			t.Errorf("writing to %q gave no error", path)
		}
	}
	if err := workbook.WriteTo(full{}, o); !errors.Is(err, errFull) {
		t.Errorf("got the error %v", err)
	}
}

var errFull = errors.New("no room")

type full struct{}

func (full) Write([]byte) (int, error) { return 0, errFull }

package workbook_test

import (
	"archive/zip"
	"bytes"
	"fmt"
	"io"
	"strings"
	"testing"

	"github.com/xuri/excelize/v2"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/assets"
	"anodewright/storage/assetfile"
	"anodewright/storage/workbook"
)

// demo is the workbook of the demo ship.
func demo(t *testing.T) written {
	t.Helper()
	a, err := assetfile.Decode(assets.Demo()[0])
	if err != nil {
		t.Fatal(err)
	}
	return write(t, plan.Compute(a, today))
}

// withText returns the rows of a sheet in which a column holds a text.
func (w written) withText(sheet string, col int, text string) (found [][]string) {
	for _, r := range w.rows(sheet) {
		if len(r) > col && r[col] == text {
			found = append(found, append(r, make([]string, 20)...))
		}
	}
	return found
}

func TestTheWorkListHasEveryPieceAndCoatingWork(t *testing.T) {
	w := demo(t)
	lines := w.withText("Work list", 0, "☐")
	want := len(w.o.Schedule)
	for _, d := range w.o.Asset.Ahead() {
		want += len(d.Works)
	}
	if len(lines) != want {
		t.Fatalf("%d lines to tick, want %d", len(lines), want)
	}
	i, hot := 0, false
	for _, r := range lines {
		if r[2] == "coating" {
			if r[9] == "" {
				t.Errorf("the coating work %q says nothing", r)
			}
			continue
		}
		l := w.o.Schedule[i]
		i++
		w.same(r[1], w.o.Zones[l.Zone].Zone.Name)
		if l.Action == renewal.Keep {
			continue
		}
		w.same(r[3], l.Removed)
		w.same(r[4], l.Count)
		w.same(r[6], l.Pattern.Fixing)
		w.same(r[8], float64(l.Count)*l.Pattern.Gross())
		hot = hot || strings.Contains(r[9], "Hot work")
	}
	if !hot {
		t.Error("no line asks for a hot-work permit")
	}
	// Every page begins with the headings.
	for _, n := range w.f.GetDefinedName() {
		if n.Name == "_xlnm.Print_Titles" && n.Scope == "Work list" {
			last := n.RefersTo[strings.LastIndex(n.RefersTo, "$")+1:]
			if heads := w.rows("Work list")[w.whole(last)-1]; heads[0] != "Done" || heads[3] != "Off" {
				t.Errorf("the rows repeated in print end with %q", heads)
			}
		}
	}
	if all := strings.Join(w.withText("Work list", 0, "Always")[0], ""); all != "Always" {
		t.Errorf("the cautions of the trade are headed %q", all)
	}
}

func TestForecastMatchesTheOutcome(t *testing.T) {
	w := demo(t)
	rows, _ := w.table("Forecast", "Zone", "At")
	i := 0
	for k := range w.o.Zones {
		for _, iv := range w.o.Zones[k].Intervals {
			r := rows[i]
			i++
			w.same(r[1], iv.To)
			if iv.State == "" {
				continue
			}
			w.same(r[5], iv.Potential)
			w.same(r[6], string(iv.State))
			w.same(r[8], iv.SteelLoss)
			if iv.SpentProbability != nil {
				w.same(r[10], *iv.SpentProbability)
				g := iv.Fitted[0]
				if !strings.HasPrefix(r[11], fmt.Sprintf("%.0f to %.0f %%", 100*g.Low, 100*g.High)) || !strings.HasPrefix(r[12], fmt.Sprintf("%.2f", g.Current)) {
					t.Errorf("%s at %s: a survey finds %q, a piece gives %q; %+v", r[0], r[1], r[11], r[12], g)
				}
			}
		}
	}
	if i != len(rows) {
		t.Errorf("%d rows, want %d", len(rows), i)
	}
}

func TestMoneyMatchesTheOutcome(t *testing.T) {
	w := demo(t)
	rows, _ := w.table("Money", "Docking", "Kind")
	total := 0.0
	for k, r := range rows {
		w.same(r[6], w.o.Money.Docking[k])
		total += w.number(r[7])
	}
	if !near(total, w.o.Money.Total) {
		t.Errorf("the dockings cost %v, the plan %v", total, w.o.Money.Total)
	}
	r := w.withText("Money", 0, "Renew all at every docking")[0]
	w.same(r[1], w.o.Money.RenewAll)
	w.same(r[2], w.o.Money.RenewAll-w.o.Money.Total)
}

// The trace of every zone stands in the workbook, step by step.
func TestWhereFromIsTheTrace(t *testing.T) {
	w := demo(t)
	rows, _ := w.table("Where from", "Zone", "Figure")
	i := 0
	for k := range w.o.Zones {
		for _, s := range w.o.Explain(k) {
			if i == len(rows) {
				t.Fatalf("only %d rows", i)
			}
			r := rows[i]
			i++
			w.same(r[0], w.o.Zones[k].Zone.Name)
			if !strings.EqualFold(r[1], s.Figure) {
				t.Errorf("row %d is %q, want %q", i, r[1], s.Figure)
			}
			w.same(r[2], s.Value)
			w.same(r[3], s.Unit)
			w.same(r[4], s.Formula)
			w.same(r[6], s.Source)
		}
	}
	if i != len(rows) || i < 100 {
		t.Errorf("%d rows, the trace has %d", len(rows), i)
	}
}

// Formulas are locked without a password, inputs are not, and say so.
func TestFormulasAreLockedAndInputsOpen(t *testing.T) {
	w := demo(t)
	for _, sheet := range []string{"Calculation", "Schedule", "Order", "Zones", "Patterns", "Demand", "Money"} {
		formulas, open := 0, 0
		for r, row := range w.rows(sheet) {
			for c := range row {
				cell, _ := excelize.CoordinatesToCellName(c+1, r+1)
				id, _ := w.f.GetCellStyle(sheet, cell)
				style, err := w.f.GetStyle(id)
				if err != nil {
					t.Fatal(err)
				}
				locked := style.Protection == nil || style.Protection.Locked
				if f, _ := w.f.GetCellFormula(sheet, cell); f != "" {
					formulas++
					if !locked {
						t.Errorf("%s %s: a formula is not locked", sheet, cell)
					}
				} else if row[c] != "" && !locked {
					open++
				}
			}
		}
		if formulas == 0 || open == 0 {
			t.Errorf("%s: %d formulas, %d cells open", sheet, formulas, open)
		}
	}
	if head := w.rows("Zones")[2]; head[4] != "Wetted, m², input" {
		t.Errorf("the wetted area is headed %q", head[4])
	}
	named := map[string]string{}
	for _, n := range w.f.GetDefinedName() {
		named[n.Name] = n.RefersTo
	}
	for _, name := range []string{"Renew_above", "Protective_potential", "Discount_rate", "Spare_share", "Per_zone"} {
		if !strings.HasPrefix(named[name], "'Basis and cautions'!$C$") {
			t.Errorf("%s refers to %q", name, named[name])
		}
	}
}

// One chart of wastage and one of currents for every zone with anodes, in one
// colour a series.
func TestCharts(t *testing.T) {
	w := demo(t)
	var b bytes.Buffer
	if err := w.f.Write(&b); err != nil {
		t.Fatal(err)
	}
	z, err := zip.NewReader(bytes.NewReader(b.Bytes()), int64(b.Len()))
	if err != nil {
		t.Fatal(err)
	}
	charts := 0
	for _, f := range z.File {
		if !strings.HasPrefix(f.Name, "xl/charts/chart") {
			continue
		}
		charts++
		r, err := f.Open()
		if err != nil {
			t.Fatal(err)
		}
		text, err := io.ReadAll(r)
		if err != nil {
			t.Fatal(err)
		}
		if !strings.Contains(string(text), `varyColors val="0"`) || !strings.Contains(string(text), "Forecast!$B$") {
			t.Errorf("%s varies its colours or has no dates", f.Name)
		}
	}
	own := 0
	for _, zone := range w.o.Zones {
		if len(zone.Zone.Fitted) > 0 {
			own++
		}
	}
	if charts != own+1 {
		t.Errorf("%d charts, want %d", charts, own+1)
	}
}

func BenchmarkExport(b *testing.B) {
	a, err := assetfile.Decode(assets.Demo()[0])
	if err != nil {
		b.Fatal(err)
	}
	o := plan.Compute(a, today)
	for b.Loop() {
		if err := workbook.WriteTo(io.Discard, o); err != nil {
			b.Fatal(err)
		}
	}
}

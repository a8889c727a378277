package workbook

import (
	"bytes"
	"fmt"
	"io"
	"slices"
	"strconv"
	"testing"
	"time"

	"github.com/xuri/excelize/v2"

	"anodewright/anodes/plan"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// large is the outcome of an asset with 40 zones and 8 dockings.
func large(t testing.TB) *plan.Outcome {
	t.Helper()
	a, err := assetfile.Decode(assets.Demo()[0])
	if err != nil {
		t.Fatal(err)
	}
	own := slices.IndexFunc(a.Zones, func(z hull.Zone) bool { return len(z.Fitted) > 0 })
	for n := len(a.Zones); n < 40; n++ {
		z := a.Zones[own]
		z.ID, z.Name, z.Circuit = fmt.Sprint("tank-", n), fmt.Sprint("Tank ", n), fmt.Sprint("tank-", n)
		z.WettedArea += 20 * float64(n)
		a.Zones = append(a.Zones, z)
	}
	last := a.Dockings[len(a.Dockings)-1]
	for len(a.Ahead()) < 8 {
		last.Date, last.Works = last.Date+400, nil
		a.Dockings = append(a.Dockings, last)
		a.Horizon = max(a.Horizon, last.Date+400)
	}
	if faults := hull.Check(a); len(faults) > 0 {
		t.Fatal(faults)
	}
	return plan.Compute(assetfile.Clone(a), hull.NewDate(2026, 12, 1))
}

// plainCell is one cell as a plain loop writes it.
type plainCell struct {
	name, formula string
	value         any // a string, a float64 or nil
	style         int
}

type plainChart struct {
	sheet, cell string
	chart       *excelize.Chart
}

// plainSheet is one sheet as read back.
type plainSheet struct {
	name    string
	cells   []plainCell
	widths  []float64
	heights map[int]float64
	merged  [][2]string
	formats map[string][]excelize.ConditionalFormatOptions
}

// plainBook is all that a plain loop has to write.
type plainBook struct {
	sheets       []plainSheet
	styles       []*excelize.Style // the ids are the places
	conditionals []*excelize.Style
	names        []excelize.DefinedName
	charts       []plainChart
}

// readBack reads what our workbook holds.
func readBack(t testing.TB, o *plan.Outcome) *plainBook {
	t.Helper()
	p := &plainBook{}
	testOnlyDrawn = func(sheet, cell string, c *excelize.Chart) {
		p.charts = append(p.charts, plainChart{sheet, cell, c})
	}
	defer func() { testOnlyDrawn = nil }()
	var b bytes.Buffer
	must := func(err error) {
		t.Helper()
		if err != nil {
			t.Fatal(err)
		}
	}
	must(WriteTo(&b, o))
	f, err := excelize.OpenReader(&b)
	must(err)
	defer f.Close()
	places := map[int]int{}
	for _, name := range f.GetSheetList() {
		s := plainSheet{name: name, heights: map[int]float64{}}
		rows, err := f.GetRows(name, excelize.Options{RawCellValue: true})
		must(err)
		most := 0
		for _, row := range rows {
			most = max(most, len(row))
		}
		for r := range rows {
			for c := range most {
				cell := at(c, r+1)
				id, err := f.GetCellStyle(name, cell)
				must(err)
				formula, err := f.GetCellFormula(name, cell)
				must(err)
				text, err := f.GetCellValue(name, cell, excelize.Options{RawCellValue: true})
				must(err)
				if id == 0 && text == "" && formula == "" {
					continue
				}
				place, ok := places[id]
				if !ok {
					st, err := f.GetStyle(id)
					must(err)
					place = len(p.styles)
					places[id] = place
					p.styles = append(p.styles, st)
				}
				v := any(nil)
				if kind, err := f.GetCellType(name, cell); err == nil && kind == excelize.CellTypeSharedString {
					v = text
				} else if x, err := strconv.ParseFloat(text, 64); err == nil {
					v = x
				}
				s.cells = append(s.cells, plainCell{cell, formula, v, place})
			}
			h, err := f.GetRowHeight(name, r+1)
			must(err)
			if h != rowHeight {
				s.heights[r+1] = h
			}
		}
		for c := range most {
			col, _ := excelize.ColumnNumberToName(c + 1)
			w, err := f.GetColWidth(name, col)
			must(err)
			s.widths = append(s.widths, w)
		}
		merged, err := f.GetMergeCells(name)
		must(err)
		for _, m := range merged {
			s.merged = append(s.merged, [2]string{m.GetStartAxis(), m.GetEndAxis()})
		}
		s.formats, err = f.GetConditionalFormats(name)
		must(err)
		for _, all := range s.formats {
			for i := range all {
				st, err := f.GetConditionalStyle(*all[i].Format)
				must(err)
				n := len(p.conditionals)
				p.conditionals = append(p.conditionals, st)
				all[i].Format = &n
			}
		}
		p.sheets = append(p.sheets, s)
	}
	p.names = f.GetDefinedName()
	return p
}

// write is the plain loop.
func (p *plainBook) write(w io.Writer) error {
	f := excelize.NewFile()
	defer f.Close()
	var first error
	check := func(err error) {
		if first == nil {
			first = err
		}
	}
	check(f.SetSheetName("Sheet1", p.sheets[0].name))
	for _, s := range p.sheets[1:] {
		_, err := f.NewSheet(s.name)
		check(err)
	}
	ids := make([]int, len(p.styles))
	for i, st := range p.styles {
		id, err := f.NewStyle(st)
		check(err)
		ids[i] = id
	}
	conditionals := make([]int, len(p.conditionals))
	for i, st := range p.conditionals {
		id, err := f.NewConditionalStyle(st)
		check(err)
		conditionals[i] = id
	}
	for i := range p.sheets {
		s := &p.sheets[i]
		for _, c := range s.cells {
			check(f.SetCellStyle(s.name, c.name, c.name, ids[c.style]))
			switch v := c.value.(type) {
			case string:
				check(f.SetCellStr(s.name, c.name, v))
			case float64:
				check(f.SetCellFloat(s.name, c.name, v, -1, 64))
			}
			if c.formula != "" {
				check(f.SetCellFormula(s.name, c.name, c.formula))
			}
		}
		for c, w := range s.widths {
			col, err := excelize.ColumnNumberToName(c + 1)
			check(err)
			check(f.SetColWidth(s.name, col, col, w))
		}
		for row, h := range s.heights {
			check(f.SetRowHeight(s.name, row, h))
		}
		for _, m := range s.merged {
			check(f.MergeCell(s.name, m[0], m[1]))
		}
		for where, all := range s.formats {
			own := slices.Clone(all)
			for i := range own {
				own[i].Format = &conditionals[*own[i].Format]
			}
			check(f.SetConditionalFormat(s.name, where, own))
		}
	}
	for _, n := range p.names {
		check(f.SetDefinedName(&n))
	}
	for _, c := range p.charts {
		own := *c.chart
		check(f.AddChart(c.sheet, c.cell, &own))
	}
	if first != nil {
		return first
	}
	return f.Write(w)
}

// The plain loop that the export is measured against writes the same cells.
func TestThePlainLoopWritesTheSame(t *testing.T) {
	p := readBack(t, large(t))
	if len(p.charts) < 10 {
		t.Errorf("%d charts", len(p.charts))
	}
	var b bytes.Buffer
	if err := p.write(&b); err != nil {
		t.Fatal(err)
	}
	f, err := excelize.OpenReader(&b)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	cells := 0
	for _, s := range p.sheets {
		for _, c := range s.cells {
			cells++
			text, err := f.GetCellValue(s.name, c.name, excelize.Options{RawCellValue: true})
			if err != nil {
				t.Fatal(err)
			}
			want := ""
			switch v := c.value.(type) {
			case string:
				want = v
			case float64:
				want = strconv.FormatFloat(v, 'f', -1, 64)
			}
			if x, err := strconv.ParseFloat(text, 64); err == nil && c.value != nil && text != want {
				if v, ok := c.value.(float64); !ok || x != v {
					t.Errorf("%s %s is %q, want %q", s.name, c.name, text, want)
				}
			} else if err != nil && text != want {
				t.Errorf("%s %s is %q, want %q", s.name, c.name, text, want)
			}
			if formula, _ := f.GetCellFormula(s.name, c.name); formula != c.formula {
				t.Errorf("%s %s has the formula %q, want %q", s.name, c.name, formula, c.formula)
			}
		}
	}
	if cells < 20_000 {
		t.Errorf("%d cells of 40 zones and 8 dockings", cells)
	}
}

// The export of 40 zones and 8 dockings against excelize writing the same
// cells, styles and charts from a plain loop, in turns.
func BenchmarkAgainstPlainLoop(b *testing.B) {
	o := large(b)
	p := readBack(b, o)
	var ours, theirs []time.Duration
	timed := func(write func() error) time.Duration {
		start := time.Now()
		if err := write(); err != nil {
			b.Fatal(err)
		}
		return time.Since(start)
	}
	for b.Loop() {
		for range 5 {
			ours = append(ours, timed(func() error { return WriteTo(io.Discard, o) }))
			theirs = append(theirs, timed(func() error { return p.write(io.Discard) }))
		}
	}
	slices.Sort(ours)
	slices.Sort(theirs)
	x, y := ours[len(ours)/2], theirs[len(theirs)/2]
	b.ReportMetric(x.Seconds()*1e3, "ours-ms")
	b.ReportMetric(y.Seconds()*1e3, "theirs-ms")
	b.ReportMetric(x.Seconds()/y.Seconds(), "times-as-long")
}

func BenchmarkExportLarge(b *testing.B) {
	o := large(b)
	for b.Loop() {
		if err := WriteTo(io.Discard, o); err != nil {
			b.Fatal(err)
		}
	}
}

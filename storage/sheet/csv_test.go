package sheet_test

import (
	"encoding/csv"
	"path/filepath"
	"strings"
	"testing"

	"github.com/xuri/excelize/v2"

	"anodewright/hull"
	"anodewright/storage/sheet"
)

// The same in CSV, whatever parts the cells, with the mark of UTF-8 or not.
func TestCSVSaysTheSame(t *testing.T) {
	a := tern(t)
	lines := [][]string{
		{"Zone", "pattern", "Date", "by", "how", "note", "weighed kg", "percent", "girth_mm", "length_mm", "grades", "gone", "not wasted", "painted", "potentials", "coating_percent", "coating_word", "water_resistivity_ohm_m"},
		{"side", "", "2026-06-15", "'=Nora \"Q\" @Dock", "in dock, dry", "'+weld cracked", "", "", "", "", "", "", "", "", "-0,92; -930 mV Ag/AgCl; -0.955", "3,5", "fair", "0,25"},
		{"Vertical Sides", "AL-45", "15 Jun 2026", "'=Nora \"Q\" @Dock", "in dock, dry", "", "44,5 40.0", "12 14 % 11,5", "520 500", "1000 990", "0 2 0 0", "1", "2", "3", "", "", "", ""},
	}
	want := wanted()
	want[0].Potentials[1], want[0].Potentials[2] = want[0].Potentials[2], want[0].Potentials[1]
	for _, delimiter := range ";\t," {
		for _, mark := range []string{"", "\xef\xbb\xbf"} {
			var b strings.Builder
			w := csv.NewWriter(&b)
			w.Comma = delimiter
			if err := w.WriteAll(lines); err != nil {
				t.Fatal(err)
			}
			if !sheet.IsCSV([]byte(mark + b.String())) {
				t.Errorf("parted by %q: not known as readings", delimiter)
			}
			p, err := sheet.ReadCSV([]byte(mark+b.String()), a, today)
			if err != nil {
				t.Fatal(err)
			}
			for _, f := range p.Faults {
				t.Error(f)
			}
			sameReadings(t, readingsOf(p), want)
		}
	}
}

// What the sheet and the CSV file say alike is one reading.
func TestCSVAfterTheSheetDoesNotDouble(t *testing.T) {
	a := tern(t)
	a.Readings = survey(t, a).read(a).ToStore()
	p, err := sheet.ReadCSV([]byte("zone;date;percent\nside;2026-06-15;12 14 11,5\n"), a, today)
	if err != nil || len(p.Readings) != 1 || p.Readings[0].Status != sheet.There {
		t.Errorf("read %+v, %v", p, err)
	}
}

func TestCSVCellsThatAreNotUnderstood(t *testing.T) {
	a := tern(t)
	text := "asset,zone,date,percent,weighed_wastage,grades,colour\n" +
		"Tern Passage,side,2026-06-15,0.5,11,1-2,red\n" +
		"Tern Passage,keel,2026-06-15,10,,,\n" +
		"Other,side,2026-06-15,10,,,\n" +
		"Tern Passage,side,,10,,,\n" +
		"Tern Passage,side,2026-06-15\n" +
		"Tern Passage,side,2026-06-15,,,,\n"
	p, err := sheet.ReadCSV([]byte(text), a, today)
	if err != nil {
		t.Fatal(err)
	}
	want := []string{
		"line 2, weighed_wastage: want a share", "line 2, percent: want per cent with its sign", "line 2, grades: want bounds", "line 3, zone: want the id or the name",
		"line 4, asset: the line is of another asset", "line 5, date: want the date", "line 6: want 7 cells",
	}
	if len(p.Faults) != len(want) {
		t.Errorf("%d faults: %v", len(p.Faults), p.Faults)
	}
	for i, f := range p.Faults {
		if i < len(want) && !strings.HasPrefix(f.Error(), want[i]) {
			t.Errorf("fault %d is %q, want %q", i, f.Error(), want[i])
		}
	}
	if len(p.Warnings) != 1 || !strings.Contains(p.Warnings[0], "colour") {
		t.Errorf("warnings %v", p.Warnings)
	}
	for _, text := range []string{"", "a;b\n1;2\n", "zone;date;zone\n", "\xff\xfez\x00", "zone;date\x00\n"} {
		if p, err := sheet.ReadCSV([]byte(text), a, today); err == nil {
			t.Errorf("%q was read as %+v", text, p)
		}
	}
}

// The template can be read, says nothing as it is, and holds no formula.
func TestTemplate(t *testing.T) {
	a := tern(t)
	a.Name, a.Zones[0].ID = "=1+1", "@side"
	a.Zones[1].HeldBy = "@side"
	a.Dockings[0].Works = nil
	text := sheet.EncodeCSV(a)
	path := filepath.Join(t.TempDir(), "survey.csv")
	if err := sheet.WriteCSV(path, a); err != nil {
		t.Fatal(err)
	}
	p, err := sheet.ReadFile(path, a, sheet.Tie{}, today)
	if err != nil || len(p.Faults)+len(p.Readings)+len(p.Warnings) != 0 {
		t.Errorf("read %+v, %v", p, err)
	}
	for _, line := range strings.Split(strings.TrimPrefix(string(text), "\xef\xbb\xbf"), "\r\n") {
		for _, cell := range strings.Split(line, ";") {
			if cell != "" && strings.ContainsRune("=+-@\t\r", rune(cell[0])) {
				t.Errorf("%q would be taken for a formula", cell)
			}
		}
	}
	filled := strings.Replace(string(text), "'@side;al-45;2024-03-15;24;;", "'@side;al-45;2024-03-15;24;2026-06-15;", 1)
	filled = strings.Replace(filled, ";2026-06-15;;;;;", ";2026-06-15;;;;;30", 1)
	p, err = sheet.ReadCSV([]byte(filled), a, today)
	if err != nil || len(p.Faults) != 0 || len(p.Readings) != 1 || p.Readings[0].Reading.Percent[0] != 30 || p.Readings[0].Reading.Fitted != hull.NewDate(2024, 3, 15) {
		t.Errorf("filled in it is read as %+v, %v", p, err)
	}
}

// A CSV file that was saved as a workbook is read by its columns too; there a
// date is a date and a per-cent figure knows that it is one.
func TestATableInAWorkbook(t *testing.T) {
	a := tern(t)
	f := excelize.NewFile()
	defer f.Close()
	percent, err := f.NewStyle(&excelize.Style{NumFmt: 10})
	if err != nil {
		t.Fatal(err)
	}
	for _, err := range []error{
		f.SetSheetRow("Sheet1", "A1", &[]any{"Zone", "Date", "percent", "gone", "weighed kg", "potentials"}),
		f.SetSheetRow("Sheet1", "A2", &[]any{"side", hull.NewDate(2026, 6, 15).Time(), 0.125, 2, "44,5 40", -0.92}),
		f.SetCellStyle("Sheet1", "C2", "C2", percent),
		f.SetSheetRow("Sheet1", "A3", &[]any{"side", "2026-06-15", 0.125}),
		f.SetSheetRow("Sheet1", "A4", &[]any{"side", "2026-06-15"}),
	} {
		if err != nil {
			t.Fatal(err)
		}
	}
	b, err := f.WriteToBuffer()
	if err != nil {
		t.Fatal(err)
	}
	p, err := sheet.Read(b.Bytes(), a, tie, today)
	if err != nil {
		t.Fatal(err)
	}
	if len(p.Faults) != 1 || p.Faults[0].Box.String() != "Sheet1!C3" || len(p.Readings) != 2 {
		t.Fatalf("read %+v", p)
	}
	weighed, seen := p.Readings[0].Reading, p.Readings[1].Reading
	if weighed.Date != hull.NewDate(2026, 6, 15) || weighed.WeighedWastage[1] != 0.2 || weighed.Gone != 2 || weighed.Potentials[0].Potential != -0.92 || seen.Percent[0] != 12.5 {
		t.Errorf("read %+v and %+v", weighed, seen)
	}
}

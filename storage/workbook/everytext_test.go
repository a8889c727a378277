package workbook_test

import (
	"archive/zip"
	"bytes"
	"encoding/csv"
	"encoding/xml"
	"io"
	"os"
	"path/filepath"
	"reflect"
	"slices"
	"strings"
	"testing"

	"github.com/xuri/excelize/v2"

	"anodewright/anodes/order"
	"anodewright/anodes/plan"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
	"anodewright/storage/sheet"
	"anodewright/storage/workbook"
)

// mark is in every text that everyText writes.
const mark = "1+cmd|mark"

// everyText puts a text that begins like a formula into every field of an
// asset that takes free text, also into those that are empty. Ids stay in
// accord, as the same text becomes the same. It returns how many fields have
// one.
func everyText(t *testing.T, a *hull.Asset, begin string) (fields int) {
	t.Helper()
	if a.Basis.Densities == hull.SeaArea {
		a.Basis.Densities = "offshore-code" // or waters would have to have the names of seas
	}
	var walk func(v reflect.Value, empty bool)
	walk = func(v reflect.Value, empty bool) {
		switch v.Kind() {
		case reflect.Pointer:
			if !v.IsNil() {
				walk(v.Elem(), empty)
			}
		case reflect.Struct:
			for i := range v.NumField() {
				walk(v.Field(i), empty)
			}
		case reflect.Slice:
			for i := range v.Len() {
				walk(v.Index(i), empty)
			}
		case reflect.String:
			if v.Type() != reflect.TypeFor[string]() || empty != (v.String() == "") {
				return // a word of the vocabulary, or not of this turn
			}
			old := v.String()
			v.SetString(begin + mark + old)
			if empty && hull.Check(a).Err() != nil {
				v.SetString(old) // the id of something: empty is none
				return
			}
			fields++
		}
	}
	walk(reflect.ValueOf(a).Elem(), false)
	walk(reflect.ValueOf(a).Elem(), true)
	if err := hull.Check(a).Err(); err != nil {
		t.Fatal(err)
	}
	return fields
}

// formulas are the elements of a workbook's parts that are calculated.
var formulas = []string{"f", "formula", "formula1", "formula2", "definedName"}

// marked counts the texts of a workbook that have the mark, and fails for one
// that is calculated, or stands in a cell that is no text.
func marked(t *testing.T, what string, content []byte) (texts int) {
	t.Helper()
	z, err := zip.NewReader(bytes.NewReader(content), int64(len(content)))
	if err != nil {
		t.Fatal(err)
	}
	for _, part := range z.File {
		r, err := part.Open()
		if err != nil {
			t.Fatal(err)
		}
		d, element := xml.NewDecoder(r), ""
		for {
			token, err := d.Token()
			if err == io.EOF {
				break
			}
			if err != nil {
				t.Fatalf("%s: %s: %v", what, part.Name, err)
			}
			switch token := token.(type) {
			case xml.StartElement:
				element = token.Name.Local
				for _, at := range token.Attr {
					if strings.Contains(at.Value, mark) && part.Name != "xl/workbook.xml" && element != "cNvPr" {
						t.Errorf("%s: %s: %q is the attribute %s of %s", what, part.Name, at.Value, at.Name.Local, element)
					}
				}
			case xml.CharData:
				if strings.Contains(string(token), mark) {
					texts++
					if slices.Contains(formulas, element) {
						t.Errorf("%s: %s: %q is calculated, as a %s", what, part.Name, token, element)
					}
				}
			}
		}
	}
	f, err := excelize.OpenReader(bytes.NewReader(content))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	cells, _ := markedCells(t, what, f)
	if cells == 0 {
		t.Errorf("%s: no cell has any of the texts", what)
	}
	return texts
}

// markedCells counts the cells that have the mark, and returns one of them. Each
// has to be a text.
func markedCells(t *testing.T, what string, f *excelize.File) (n int, first string) {
	t.Helper()
	for _, name := range f.GetSheetList() {
		rows, err := f.GetRows(name)
		if err != nil {
			t.Fatal(err)
		}
		for r, cells := range rows {
			for c, text := range cells {
				if !strings.Contains(text, mark) {
					continue
				}
				n++
				first = text
				cell, _ := excelize.CoordinatesToCellName(c+1, r+1)
				kind, err := f.GetCellType(name, cell)
				formula, ferr := f.GetCellFormula(name, cell)
				// A formula may name a cell that has a text, and then shows it.
				if err != nil || ferr != nil || strings.Contains(formula, mark) || formula == "" && kind != excelize.CellTypeSharedString && kind != excelize.CellTypeInlineString {
					t.Errorf("%s: %s %s: %q is of type %v with the formula %q", what, name, cell, text, kind, formula)
				}
			}
		}
	}
	return n, first
}

// Whatever text field of an asset begins like a formula, it is text in the
// workbook, the survey sheet and the CSV, and an office suite takes it so.
func TestFormulaTextInEveryField(t *testing.T) {
	begins := []string{"=", "+", "-", "@", "\t=", "\r=", "'=", "{="}
	demos := assets.Demo()
	dir := t.TempDir()
	var files []string
	for i, begin := range begins {
		a := tern(t)
		if i < len(demos) {
			var err error
			if a, err = assetfile.Decode(demos[i]); err != nil {
				t.Fatal(err)
			}
		}
		what := a.Name + " with " + begin
		fields := everyText(t, a, begin)
		if fields < 20 {
			t.Errorf("%s: only %d fields", what, fields)
		}
		again, err := assetfile.Decode(assetfile.Encode(a))
		if err != nil || !reflect.DeepEqual(again, a) {
			t.Errorf("%s: the asset file holds another asset, %v", what, err)
		}
		o := plan.Compute(a, today)
		var book, survey bytes.Buffer
		if err := workbook.WriteTo(&book, o); err != nil {
			t.Fatal(err)
		}
		if err := sheet.WriteTo(&survey, a, sheet.Tie{}, a.Dockings[0].Date, sheet.WithForecast(o)); err != nil {
			t.Fatal(err)
		}
		inBook, inSurvey := marked(t, what+", workbook", book.Bytes()), marked(t, what+", survey sheet", survey.Bytes())
		if inBook < 10 || inSurvey < 3 {
			t.Errorf("%s: %d texts in the workbook, %d in the survey sheet", what, inBook, inSurvey)
		}
		cells := csv.NewReader(bytes.NewReader(sheet.EncodeCSV(a)))
		cells.Comma = ';'
		lines, err := cells.ReadAll()
		if err != nil {
			t.Fatal(err)
		}
		for _, line := range lines {
			for _, cell := range line {
				if cell != "" && strings.ContainsRune("=+-@\t\r\n", rune(cell[0])) {
					t.Errorf("%s, CSV: %q", what, cell)
				}
			}
		}
		if i < 2 {
			for name, content := range map[string][]byte{"book": book.Bytes(), "survey": survey.Bytes()} {
				files = append(files, name+string(rune('0'+i))+".xlsx")
				if err := os.WriteFile(filepath.Join(dir, files[len(files)-1]), content, 0o600); err != nil {
					t.Fatal(err)
				}
			}
		}
	}
	fleet := demoFleet(t)
	for i := range fleet {
		fleet[i].Name = begins[i] + mark
		fleet[i].Currency = begins[i] + mark
	}
	var months bytes.Buffer
	if err := workbook.WriteFleetTo(&months, today, fleet, order.CalendarOf(fleet, 52)); err != nil {
		t.Fatal(err)
	}
	if n := marked(t, "fleet's orders", months.Bytes()); n < len(fleet) {
		t.Errorf("%d texts in the fleet's workbook", n)
	}
	for name, f := range recalculated(t, dir, files...) {
		if n, _ := markedCells(t, "by an office suite, "+name, f); n == 0 {
			t.Errorf("%s has lost its texts", name)
		}
	}
}

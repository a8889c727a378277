package workbook_test

import (
	"archive/zip"
	"bytes"
	"encoding/xml"
	"io"
	"strconv"
	"strings"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/assets"
	"anodewright/storage/assetfile"
	"anodewright/storage/workbook"
)

// A preview that does not calculate shows values: in the file itself every
// formula has a number beside it, and is no text.
func TestEveryFormulaHasItsValueInTheFile(t *testing.T) {
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			t.Fatal(err)
		}
		var b bytes.Buffer
		if err := workbook.WriteTo(&b, plan.Compute(a, today)); err != nil {
			t.Fatal(err)
		}
		z, err := zip.NewReader(bytes.NewReader(b.Bytes()), int64(b.Len()))
		if err != nil {
			t.Fatal(err)
		}
		formulas := 0
		for _, part := range z.File {
			if !strings.HasPrefix(part.Name, "xl/worksheets/sheet") {
				continue
			}
			r, err := part.Open()
			if err != nil {
				t.Fatal(err)
			}
			formulas += valued(t, a.Name+" "+part.Name, r)
		}
		if formulas < 500 {
			t.Errorf("%s: %d formulas", a.Name, formulas)
		}
	}
}

// valued reads the XML of a sheet and returns how many formulas it has.
func valued(t *testing.T, name string, r io.Reader) (n int) {
	t.Helper()
	var sheet struct {
		Cells []struct {
			At      string `xml:"r,attr"`
			Kind    string `xml:"t,attr"`
			Formula string `xml:"f"`
			Value   string `xml:"v"`
		} `xml:"sheetData>row>c"`
	}
	if err := xml.NewDecoder(r).Decode(&sheet); err != nil {
		t.Fatal(err)
	}
	for _, c := range sheet.Cells {
		if c.Formula == "" {
			continue
		}
		n++
		if _, err := strconv.ParseFloat(c.Value, 64); err != nil || c.Kind != "" && c.Kind != "n" {
			t.Errorf("%s %s: the formula %s has the value %q of type %q", name, c.At, c.Formula, c.Value, c.Kind)
		}
	}
	return n
}

package sheet_test

import (
	"archive/zip"
	"bytes"
	"encoding/xml"
	"strings"
	"testing"

	"anodewright/hull"
	"anodewright/storage/sheet"
)

// Whatever a file holds, reading it ends with a preview or an error, and the
// readings that would be stored leave the asset a valid one.

func FuzzReadWorkbook(f *testing.F) {
	a := tern(f)
	good := survey(f, a).bytes()
	f.Add(good)
	f.Add(good[:len(good)/2])
	f.Add([]byte("PK\x03\x04"))
	f.Add([]byte("\xd0\xcf\x11\xe0\xa1\xb1\x1a\xe1"))
	f.Fuzz(func(t *testing.T, content []byte) {
		p, err := sheet.Read(content, a, tie, today)
		judge(t, a, p, err)
	})
}

// FuzzReadParts changes what stands in the parts of a workbook that holds
// together.
func FuzzReadParts(f *testing.F) {
	a := tern(f)
	p := unpack(f, survey(f, a).bytes())
	f.Add([]byte(p[surveyPart]), []byte(p["xl/sharedStrings.xml"]), []byte(p["xl/styles.xml"]), []byte(p["xl/workbook.xml"]))
	f.Fuzz(func(t *testing.T, rows, texts, styles, book []byte) {
		q := p.with(surveyPart, string(rows)).with("xl/sharedStrings.xml", string(texts)).with("xl/styles.xml", string(styles)).with("xl/workbook.xml", string(book))
		got, err := sheet.Read(q.packed(zip.Store), a, tie, today)
		judge(t, a, got, err)
	})
}

// FuzzReadCells changes what a surveyor writes into cells.
func FuzzReadCells(f *testing.F) {
	a := tern(f)
	for _, text := range []string{"12 %", "0,12", "1.234,5", "-0.92 V Cu/CuSO4", "15.03.2026", "0-25-50-75: 1 2 3 4", "=1+1", "9999999999999999", "1e308", "\u2212950 mV"} {
		f.Add(text, text, text)
	}
	const one, two, three = "text one", "text two", "text three"
	s := blank(f, a)
	s.set("Cover", "Date of the survey", 0, "2026-06-15")
	s.set("Survey", "Potential of the steel, V", 0, one, two, three)
	s.set("Survey", "Coating and water", 0, nil, nil, one, nil, nil, two, nil, nil, nil, nil, three)
	s.set("Survey", "Pieces counted", 0, one, two, three, one, nil, two, three)
	s.set("Survey", "Seen: wasted, %", 0, one, two, three)
	s.set("Survey", "Weighed with insert, kg", 0, one, two, three)
	s.set("Survey", "Girth left, mm", 0, one, two)
	s.set("Survey", "Length left, mm", 0, two, three)
	p := unpack(f, s.bytes())
	texts := p["xl/sharedStrings.xml"]
	f.Fuzz(func(t *testing.T, x, y, z string) {
		escaped := func(s string) string {
			var b bytes.Buffer
			if err := xml.EscapeText(&b, []byte(s)); err != nil {
				t.Fatal(err)
			}
			return b.String()
		}
		all := strings.NewReplacer(one, escaped(x), two, escaped(y), three, escaped(z)).Replace(texts)
		got, err := sheet.Read(p.with("xl/sharedStrings.xml", all).packed(zip.Store), a, tie, today)
		judge(t, a, got, err)
	})
}

func FuzzReadCSV(f *testing.F) {
	a := tern(f)
	f.Add(sheet.EncodeCSV(a))
	f.Add([]byte("zone;date;percent;grades;potentials;girth_mm;length_mm\nside;2026-06-15;12 %;0-25: 1 2;-0,9 zinc;500;1000\n"))
	f.Add([]byte("zone,date,weighed_kg,coating_word\nside,\"1 Jan 2026\",44.5,GOOD\n"))
	f.Fuzz(func(t *testing.T, text []byte) {
		p, err := sheet.ReadCSV(text, a, today)
		judge(t, a, p, err)
	})
}

func judge(t *testing.T, a *hull.Asset, p *sheet.Preview, err error) {
	t.Helper()
	if (p == nil) == (err == nil) {
		t.Fatalf("preview %v, error %v", p, err)
	}
	if p == nil {
		return
	}
	with := *a
	with.Readings = p.ToStore()
	if faults := hull.Check(&with); len(faults) > 0 {
		t.Fatalf("stored, it would be at fault: %v", faults)
	}
	for _, fault := range p.Faults {
		if fault.Why == "" || bytes.ContainsRune([]byte(fault.Error()), '\n') {
			t.Fatalf("a fault that says nothing, or on several lines: %q", fault.Error())
		}
	}
}

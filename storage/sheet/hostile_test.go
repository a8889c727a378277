package sheet_test

import (
	"archive/zip"
	"bytes"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"anodewright/storage/sheet"
)

// parts are a workbook's parts by name, in the order of a good file.
type parts map[string]string

func unpack(t testing.TB, content []byte) parts {
	t.Helper()
	z, err := zip.NewReader(bytes.NewReader(content), int64(len(content)))
	if err != nil {
		t.Fatal(err)
	}
	p := parts{}
	for _, f := range z.File {
		r, err := f.Open()
		if err != nil {
			t.Fatal(err)
		}
		text, err := io.ReadAll(r)
		if err != nil {
			t.Fatal(err)
		}
		p[f.Name] = string(text)
	}
	return p
}

func (p parts) pack() []byte { return p.packed(zip.Deflate) }

func (p parts) packed(method uint16) []byte {
	var b bytes.Buffer
	z := zip.NewWriter(&b)
	for name, text := range p {
		w, err := z.CreateHeader(&zip.FileHeader{Name: name, Method: method})
		if err == nil {
			_, err = io.WriteString(w, text)
		}
		if err != nil {
			panic(err) // a buffer takes all
		}
	}
	z.Close()
	return b.Bytes()
}

func (p parts) with(name, text string) parts {
	q := parts{name: text}
	for n, t := range p {
		if n != name {
			q[n] = t
		}
	}
	return q
}

const surveyPart = "xl/worksheets/sheet2.xml"

// Files that would take too much room or time, or run something, are refused
// before they are opened, each in its own words.
func TestHostileWorkbooksAreRefused(t *testing.T) {
	a := tern(t)
	good := survey(t, a).bytes()
	p := unpack(t, good)
	rows := func(row string) parts {
		return p.with(surveyPart, strings.Replace(p[surveyPart], "<sheetData>", "<sheetData>"+row, 1))
	}
	many := parts{}
	for i := range 500 {
		many[fmt.Sprintf("xl/x%d.xml", i)] = "<a/>"
	}
	for name, c := range map[string]struct {
		content []byte
		want    string
	}{
		"too large":        {make([]byte, sheet.MaxSize+1), "at most 4 MB"},
		"bomb":             {p.with("xl/media/a.bin", strings.Repeat("\x00", 30<<20)).pack(), "unpacks to more than 24 MB"},
		"encrypted":        {[]byte("\xd0\xcf\x11\xe0\xa1\xb1\x1a\xe1 more"), "encrypted, or in the old format .xls"},
		"macros":           {p.with("xl/vbaProject.bin", "x").pack(), "holds macros"},
		"macro type":       {p.with("[Content_Types].xml", strings.Replace(p["[Content_Types].xml"], "spreadsheetml.sheet.main", "ms-excel.sheet.macroEnabled.main", 1)).pack(), "holds macros"},
		"no zip":           {[]byte("hello"), "no Excel workbook"},
		"empty":            {nil, "no Excel workbook"},
		"other zip":        {parts{"a.json": "{}"}.pack(), "zip but no Excel workbook"},
		"cut short":        {good[:len(good)/2], "damaged"},
		"many parts":       {many.pack(), "500 parts"},
		"last row":         {rows(`<row r="1048576"><c r="A1048576"><v>1</v></c></row>`).pack(), "more than 20000 rows"},
		"last column":      {rows(`<row r="1"><c r="XFD1" s="1"/></row>`).pack(), "more than 256 columns"},
		"cell far down":    {rows(`<row r="1"><c r="A1048576" s="1"/></row>`).pack(), "more than 256 columns"},
		"row of no number": {rows(`<row r="x"><c r="A1"/></row>`).pack(), "rows"},
		"many cells":       {rows(`<row r="1">` + strings.Repeat(`<c r="A1"/>`, 300001) + `</row>`).pack(), "more than 300000 cells"},
		"long text":        {rows(`<row r="1"><c r="A1" t="inlineStr"><is><t>` + strings.Repeat("x", 200000) + `</t></is></c></row>`).pack(), "more than 100000 letters"},
		"many merged":      {p.with(surveyPart, strings.Replace(p[surveyPart], "</mergeCells>", strings.Repeat(`<mergeCell ref="A1:B2"/>`, 5001)+"</mergeCells>", 1)).pack(), "more than 5000 merged"},
		"many sheets":      {p.with("xl/workbook.xml", strings.Replace(p["xl/workbook.xml"], "<sheets>", "<sheets>"+strings.Repeat(`<sheet name="x" sheetId="9" r:id="rId9"/>`, 60), 1)).pack(), "more than 40 sheets"},
		"entities":         {p.with(surveyPart, `<!DOCTYPE a [<!ENTITY b "cccc">]>`+p[surveyPart]).pack(), "damaged"},
		"UTF-16":           {p.with(surveyPart, "\xff\xfe<\x00").pack(), "damaged"},
		"broken XML":       {p.with(surveyPart, p[surveyPart][:len(p[surveyPart])/2]).pack(), "damaged"},
		"no hidden sheet":  {p.with("xl/sharedStrings.xml", strings.ReplaceAll(p["xl/sharedStrings.xml"], "anodewright-survey-sheet", "other")).pack(), "no survey sheet"},
		"newer":            {p.with("xl/sharedStrings.xml", strings.ReplaceAll(p["xl/sharedStrings.xml"], `version&#34;:1`, `version&#34;:2`)).pack(), "newer version"},
	} {
		got, err := sheet.Read(c.content, a, tie, today)
		if err == nil || !strings.Contains(err.Error(), c.want) {
			t.Errorf("%s: error %v, want one with %q; read %+v", name, err, c.want, got)
		}
	}
}

// A part that says it is smaller than it is does not get past the limit.
func TestAPartThatLiesAboutItsSize(t *testing.T) {
	a := tern(t)
	p := unpack(t, survey(t, a).bytes())
	var b bytes.Buffer
	z := zip.NewWriter(&b)
	for name, text := range p.with("xl/media/a.bin", strings.Repeat("\x00", 30<<20)) {
		w, err := z.Create(name)
		if err != nil {
			t.Fatal(err)
		}
		io.WriteString(w, text)
	}
	z.Close()
	// 30 MB as the directory writes it, and 1 kB in its place.
	lying := bytes.ReplaceAll(b.Bytes(), []byte{0, 0, 0xe0, 1}, []byte{0, 4, 0, 0})
	if bytes.Equal(lying, b.Bytes()) {
		t.Fatal("the size is not found in the file")
	}
	if _, err := sheet.Read(lying, a, tie, today); err == nil {
		t.Error("it was read")
	}
}

func TestWhatIsNoFileIsNotRead(t *testing.T) {
	a := tern(t)
	dir := t.TempDir()
	big := filepath.Join(dir, "big.xlsx")
	if err := os.WriteFile(big, make([]byte, sheet.MaxSize+10), 0o600); err != nil {
		t.Fatal(err)
	}
	for path, want := range map[string]string{dir: "is not a file", filepath.Join(dir, "none.xlsx"): "cannot be opened: no such file", big: "at most 4 MB"} {
		if _, err := sheet.ReadFile(path, a, tie, today); err == nil || !strings.Contains(err.Error(), want) {
			t.Errorf("%s: %v", path, err)
		}
	}
}

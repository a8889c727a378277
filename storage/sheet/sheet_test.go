package sheet_test

import (
	"bytes"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"reflect"
	"slices"
	"strings"
	"testing"

	"github.com/xuri/excelize/v2"

	"anodewright/anodes/plan"
	"anodewright/hull"
	"anodewright/storage/assetfile"
	"anodewright/storage/sheet"
)

var (
	today   = hull.NewDate(2026, 12, 1)
	docking = hull.NewDate(2027, 3, 15)
	tie     = sheet.Tie{ID: "a1", Revision: 7}
)

// tern is a small ship with one fitted set, at a side of 24 pieces of 45 kg,
// new 49 kg with insert.
func tern(t testing.TB) *hull.Asset {
	t.Helper()
	a, err := assetfile.Read(filepath.Join("..", "..", "testdata", "assets", "tern-passage.json"))
	if err != nil {
		t.Fatal(err)
	}
	a.Readings = nil
	return a
}

// filled is a survey sheet being filled in.
type filled struct {
	t testing.TB
	f *excelize.File
}

func blank(t testing.TB, a *hull.Asset, options ...sheet.Option) *filled {
	t.Helper()
	var b bytes.Buffer
	if err := sheet.WriteTo(&b, a, tie, docking, options...); err != nil {
		t.Fatal(err)
	}
	f, err := excelize.OpenReader(&b)
	if err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() { f.Close() })
	return &filled{t, f}
}

// row finds the n-th row of the survey whose label is this.
func (s *filled) row(sheet, label string, n int) int {
	s.t.Helper()
	rows, err := s.f.GetRows(sheet)
	if err != nil {
		s.t.Fatal(err)
	}
	for i, cells := range rows {
		if len(cells) > 1 && cells[1] == label {
			if n == 0 {
				return i + 1
			}
			n--
		}
	}
	s.t.Fatalf("no row %q on sheet %s", label, sheet)
	return 0
}

// set writes values into the boxes of the n-th row of a label; nil leaves one
// out. It returns the cell of the first box.
func (s *filled) set(sheet, label string, n int, values ...any) string {
	s.t.Helper()
	row := s.row(sheet, label, n)
	for i, v := range values {
		if v == nil {
			continue
		}
		cell, _ := excelize.CoordinatesToCellName(3+i, row)
		if err := s.f.SetCellValue(sheet, cell, v); err != nil {
			s.t.Fatal(err)
		}
	}
	cell, _ := excelize.CoordinatesToCellName(3, row)
	return cell
}

func (s *filled) bytes() []byte {
	s.t.Helper()
	b, err := s.f.WriteToBuffer()
	if err != nil {
		s.t.Fatal(err)
	}
	return b.Bytes()
}

func (s *filled) read(a *hull.Asset) *sheet.Preview {
	s.t.Helper()
	p, err := sheet.Read(s.bytes(), a, tie, today)
	if err != nil {
		s.t.Fatal(err)
	}
	return p
}

// survey fills in a bit of everything.
func survey(t testing.TB, a *hull.Asset) *filled {
	s := blank(t, a)
	s.set("Cover", "Surveyor", 0, "=Nora \"Q\" @Dock")
	s.set("Cover", "Date of the survey", 0, "15.06.2026")
	s.set("Cover", "Looked at", 0, "in dock, dry")
	s.set("Survey", "Potential of the steel, V", 0, -0.92, "-0,955", "-930 mV")
	s.set("Survey", "Remarks", 0, "+weld cracked")
	s.set("Survey", "Coating and water", 0, nil, nil, "3,5 %", nil, nil, "FAIR", nil, nil, nil, nil, 0.25)
	s.set("Survey", "Pieces counted", 0, nil, 2, nil, nil, nil, 1, 2, nil, "3")
	s.set("Survey", "Seen: wasted, %", 0, 12, "14 %", "11,5")
	s.set("Survey", "Weighed with insert, kg", 0, 44.5, "40,0 kg")
	s.set("Survey", "Girth left, mm", 0, 520, "0.50 m")
	s.set("Survey", "Length left, mm", 0, 1000, 990)
	return s
}

// wanted is what survey says.
func wanted() []hull.Reading {
	coating, water := 3.5, 0.25
	date, fitted := hull.NewDate(2026, 6, 15), hull.NewDate(2024, 3, 15)
	by := `=Nora "Q" @Dock`
	set := hull.Reading{Date: date, Zone: "side", Pattern: "al-45", Fitted: fitted, By: by, How: "in dock, dry"}
	weighed, measured, seen, graded := set, set, set, set
	weighed.WeighedWastage = []float64{0.1, 0.2}
	weighed.Gone, weighed.NotWasted, weighed.Painted = 1, 2, 3
	measured.Measured = []hull.Measured{{Girth: 0.52, Length: 1}, {Girth: 0.5, Length: 0.99}}
	seen.Percent = []float64{12, 14, 11.5}
	graded.Grades = &hull.Grades{Bounds: []float64{0, 0.25, 0.5, 0.75}, Counts: []int{0, 2, 0, 0}}
	e := hull.SilverChloride
	zone := hull.Reading{
		Date: date, Zone: "side", By: by, How: "in dock, dry", Note: "+weld cracked", CoatingPercent: &coating, CoatingWord: "FAIR", Resistivity: &water,
		Potentials: []hull.Measure{{Potential: -0.92, Electrode: e}, {Potential: -0.955, Electrode: e}, {Potential: -0.93, Electrode: e}},
	}
	return []hull.Reading{zone, weighed, measured, seen, graded}
}

func readingsOf(p *sheet.Preview) (list []hull.Reading) {
	for _, u := range p.Readings {
		list = append(list, u.Reading)
	}
	return list
}

func sameReadings(t *testing.T, got, want []hull.Reading) {
	t.Helper()
	if len(got) != len(want) {
		t.Fatalf("%d readings, want %d: %+v", len(got), len(want), got)
	}
	for i := range want {
		if !reflect.DeepEqual(got[i], want[i]) {
			t.Errorf("reading %d is\n%+v, want\n%+v", i, got[i], want[i])
		}
	}
}

func TestWhatIsFilledInComesBack(t *testing.T) {
	a := tern(t)
	p := survey(t, a).read(a)
	for _, f := range p.Faults {
		t.Error(f)
	}
	sameReadings(t, readingsOf(p), wanted())
	if p.Asset != a.Name || p.Docking != docking || p.Count(sheet.New) != 5 {
		t.Errorf("asset %q, docking %s, %d new", p.Asset, p.Docking, p.Count(sheet.New))
	}
	if at := p.Readings[1].Boxes[0].String(); !strings.HasPrefix(at, "Survey!C") {
		t.Errorf("the masses come from %s", at)
	}
}

// What an office suite opens and saves again still says the same.
func TestAnOfficeSuiteSavesTheSame(t *testing.T) {
	soffice, err := exec.LookPath("soffice")
	if err != nil {
		t.Skip("LibreOffice (soffice) is not on the PATH")
	}
	if testing.Short() {
		t.Skip("an office suite takes its time")
	}
	a := tern(t)
	dir := t.TempDir()
	path := filepath.Join(dir, "survey.xlsx")
	if err := os.WriteFile(path, survey(t, a).bytes(), 0o600); err != nil {
		t.Fatal(err)
	}
	out := filepath.Join(dir, "saved")
	text, err := exec.Command(soffice, "-env:UserInstallation=file://"+filepath.ToSlash(filepath.Join(dir, "profile")),
		"--headless", "--convert-to", "xlsx", "--outdir", out, path).CombinedOutput()
	if err != nil {
		t.Fatalf("soffice: %v\n%s", err, text)
	}
	p, err := sheet.ReadFile(filepath.Join(out, "survey.xlsx"), a, tie, today)
	if err != nil {
		t.Fatal(err)
	}
	for _, f := range p.Faults {
		t.Error(f)
	}
	sameReadings(t, readingsOf(p), wanted())
}

func TestEveryCellThatIsNotUnderstoodIsNamed(t *testing.T) {
	a := tern(t)
	s := blank(t, a)
	s.set("Cover", "Date of the survey", 0, "03/04/2026")
	coating := s.row("Survey", "Coating and water", 0)
	at := map[string]string{
		"Survey!" + s.set("Survey", "Seen: wasted, %", 0, 0.12):           "0.12 % or 12 %",
		"Survey!" + s.set("Survey", "Weighed with insert, kg", 0, 60):     "at most the 49 kg",
		"Survey!" + s.set("Survey", "Girth left, mm", 0, 500):             "want the length of this piece too",
		"Survey!" + s.set("Survey", "Potential of the steel, V", 0, 0.92): "want the minus",
		"Survey!" + s.set("Survey", "Pieces counted", 0, "some"):          "want a whole number of pieces",
		"Cover!" + s.set("Cover", "Date of the survey", 0):                "want a date such as",
		"Survey!" + s.set("Survey", "Potential of the steel, V", 1, -920): "write the unit if mV",
		fmt.Sprintf("Survey!E%d", coating):                                "want per cent from 0 to 100",
		fmt.Sprintf("Survey!H%d", coating):                                "want one of GOOD, FAIR, POOR",
		fmt.Sprintf("Survey!C%d", coating):                                "nothing is asked for here",
	}
	s.set("Survey", "Coating and water", 0, "x", nil, 120, nil, nil, "NICE")
	p := s.read(a)
	for cell, why := range at {
		found := false
		for _, f := range p.Faults {
			found = found || f.Box.String() == cell && strings.Contains(f.Why, why)
		}
		if !found {
			t.Errorf("no fault at %s says %q", cell, why)
		}
	}
	if len(p.Faults) != len(at) {
		for _, f := range p.Faults {
			t.Log(f)
		}
		t.Errorf("%d faults, want %d", len(p.Faults), len(at))
	}
	if len(p.ToStore()) != 0 {
		t.Errorf("%d readings without a date would be stored", len(p.ToStore()))
	}
}

// An empty sheet says nothing; one without its date lacks that alone.
func TestWithoutADate(t *testing.T) {
	a := tern(t)
	s := blank(t, a)
	if p := s.read(a); len(p.Faults)+len(p.Readings) != 0 {
		t.Errorf("an empty sheet is read as %+v", p)
	}
	s.set("Survey", "Seen: wasted, %", 0, 20)
	p := s.read(a)
	if len(p.Faults) != 1 || p.Faults[0].Error() != "Cover!C5: want the date of the survey" || p.Count(sheet.Faulty) != 1 || len(p.ToStore()) != 0 {
		t.Errorf("read %+v", p)
	}
}

// 0.12 in a cell that is shown in per cent is 12 %.
func TestPerCentByTheCellsFormat(t *testing.T) {
	a := tern(t)
	s := blank(t, a)
	s.set("Cover", "Date of the survey", 0, hull.NewDate(2026, 6, 15).Time())
	cell := s.set("Survey", "Seen: wasted, %", 0, 0.12, 25)
	style, err := s.f.NewStyle(&excelize.Style{NumFmt: 9})
	if err != nil {
		t.Fatal(err)
	}
	if err := s.f.SetCellStyle("Survey", cell, cell, style); err != nil {
		t.Fatal(err)
	}
	p := s.read(a)
	if len(p.Faults) != 0 || len(p.Readings) != 1 || !slices.Equal(p.Readings[0].Reading.Percent, []float64{12, 25}) {
		t.Errorf("read %+v, faults %v", p.Readings, p.Faults)
	}
	if p.Readings[0].Reading.Date != hull.NewDate(2026, 6, 15) {
		t.Errorf("the spreadsheet's date was read as %s", p.Readings[0].Reading.Date)
	}
}

// Rows may stand anywhere, on any sheet, and twice: each knows what it is for.
func TestRowsAreKnownWhereverTheyStand(t *testing.T) {
	a := tern(t)
	s := blank(t, a)
	s.set("Cover", "Date of the survey", 0, "2026-06-15")
	s.set("Survey", "Seen: wasted, %", 0, 10)
	row := s.row("Survey", "Seen: wasted, %", 0)
	for _, err := range []error{
		s.f.InsertRows("Survey", 3, 4), s.f.DuplicateRow("Survey", row+4), s.f.SetSheetName("Survey", "Anoden"),
	} {
		if err != nil {
			t.Fatal(err)
		}
	}
	if _, err := s.f.NewSheet("own notes"); err != nil {
		t.Fatal(err)
	}
	s.f.SetCellValue("own notes", "A1", `["eye"]`)
	p := s.read(a)
	if len(p.Faults) != 0 || len(p.Readings) != 1 || !slices.Equal(p.Readings[0].Reading.Percent, []float64{10, 10}) {
		t.Errorf("read %+v, faults %v", p.Readings, p.Faults)
	}
}

func TestTakingASheetTwiceDoesNotDouble(t *testing.T) {
	a := tern(t)
	s := survey(t, a)
	a.Readings = s.read(a).ToStore()
	for i := range a.Readings {
		a.Readings[i].By = "" // who stored it does not matter
	}
	again := s.read(assetfile.Clone(a))
	if again.Count(sheet.There) != 5 || len(again.ToStore()) != 0 {
		t.Errorf("%d are there and %d would be stored again", again.Count(sheet.There), len(again.ToStore()))
	}
	s.set("Survey", "Seen: wasted, %", 0, 13)
	changed := s.read(a)
	if changed.Count(sheet.There) != 4 || changed.Count(sheet.Differs) != 1 {
		t.Fatalf("%d are there and %d differ", changed.Count(sheet.There), changed.Count(sheet.Differs))
	}
	corrected := assetfile.Clone(a)
	changed.Store(corrected, today, true)
	if n := len(corrected.Readings); n != 6 || corrected.Readings[3].Withdrawn != today || corrected.Readings[5].Percent[0] != 13 {
		t.Errorf("corrected, the readings are %+v", corrected.Readings)
	}
	beside := assetfile.Clone(a)
	if changed.Store(beside, today, false); len(beside.Readings) != 6 || !beside.Readings[3].Withdrawn.IsZero() {
		t.Errorf("beside each other, the readings are %+v", beside.Readings)
	}
	if last := s.read(corrected); last.Count(sheet.There) != 5 {
		t.Errorf("the corrected ones are not known again: %+v", last.Readings)
	}
	// The first sheet again: what it says was withdrawn, and stays so.
	s.set("Survey", "Seen: wasted, %", 0, 12)
	first := s.read(corrected)
	if first.Count(sheet.There) != 5 || len(first.Readings[3].Doubts) != 1 || !strings.Contains(first.Readings[3].Doubts[0], "was withdrawn") {
		t.Errorf("the withdrawn one is read as %+v", first.Readings[3])
	}
}

func TestASheetOfAnotherAssetOrRevision(t *testing.T) {
	a := tern(t)
	text := survey(t, a).bytes()
	other := assetfile.Clone(a)
	other.Name = "Sister Ship"
	if _, err := sheet.Read(text, other, sheet.Tie{ID: "a2"}, today); err == nil || !strings.Contains(err.Error(), "of another asset") {
		t.Errorf("another asset: %v", err)
	}
	if p, err := sheet.Read(text, other, tie, today); err != nil || len(p.Warnings) != 1 || !strings.Contains(p.Warnings[0], "was called Tern Passage") {
		t.Errorf("renamed: %v, %v", p, err)
	}
	newer := assetfile.Clone(a)
	newer.Zones[0].Fitted[0].Count = 20
	p, err := sheet.Read(text, newer, sheet.Tie{ID: "a1", Revision: 9}, today)
	if err != nil || len(p.Warnings) != 2 || !strings.Contains(p.Warnings[0], "revision 7") || !strings.Contains(p.Warnings[1], "24 pieces of al-45 fitted on 2024-03-15, now there are 20") {
		t.Errorf("older: %v, %v", p, err)
	}
	newer.Zones[0].Fitted = nil
	p, err = sheet.Read(text, newer, tie, today)
	if err != nil || len(p.Warnings) != 1 || !strings.Contains(p.Warnings[0], "no longer fitted") {
		t.Errorf("set gone: %v, %v", p, err)
	}
	if doubts := p.Readings[1].Doubts; len(doubts) == 0 || !strings.Contains(doubts[0], "fitted") {
		t.Errorf("doubts %v", doubts)
	}
}

func TestMorePiecesThanFittedAreDoubted(t *testing.T) {
	a := tern(t)
	s := survey(t, a)
	s.set("Survey", "Pieces counted", 0, nil, nil, nil, nil, nil, nil, nil, 20)
	p := s.read(a)
	found := false
	for _, u := range p.Readings {
		for _, d := range u.Doubts {
			found = found || strings.Contains(d, "accounts for")
		}
	}
	if !found {
		t.Errorf("nothing is said of too many pieces: %+v", p.Readings)
	}
}

// Boxes have drop-downs and ranges; what the forecast expects is shown only
// when asked for; pages have titles and numbers; equal sheets are equal files.
func TestSheetAsWritten(t *testing.T) {
	a := tern(t)
	s := blank(t, a)
	vs, err := s.f.GetDataValidations("Survey")
	if err != nil {
		t.Fatal(err)
	}
	kinds := map[string]int{}
	for _, v := range vs {
		kinds[v.Type]++
	}
	if kinds["list"] != 2*len(a.Zones) || kinds["decimal"] < 2*len(a.Zones)+4 || kinds["whole"] != 2 {
		t.Errorf("validations %v", kinds)
	}
	names := map[string]string{}
	for _, n := range s.f.GetDefinedName() {
		names[n.Name] = n.RefersTo
	}
	if names["survey_electrodes"] != "Lists!$C$3:$C$6" || names["_xlnm.Print_Titles"] != "'Survey'!$1:$2" {
		t.Errorf("names %v", names)
	}
	if visible, err := s.f.GetSheetVisible("Lists"); err != nil || visible {
		t.Errorf("the hidden sheet is to be seen, %v", err)
	}
	// The drop-down lists do not show on paper.
	cover, _ := s.f.GetRows("Cover")
	told := fmt.Sprint(cover)
	for _, word := range []string{"in dock, dry", "Cu/CuSO4", "zinc", "GOOD, FAIR, POOR"} {
		if !strings.Contains(told, word) {
			t.Errorf("the cover does not offer %q", word)
		}
	}
	h, err := s.f.GetHeaderFooter("Survey")
	if err != nil || !strings.Contains(h.OddFooter, "Page &P of &N") {
		t.Errorf("footer %q, %v", h.OddFooter, err)
	}
	expects := func(s *filled) bool {
		rows, _ := s.f.GetRows("Survey")
		for _, cells := range rows {
			if strings.Contains(strings.Join(cells, " "), "forecast expects") {
				return true
			}
		}
		return false
	}
	if expects(s) || !expects(blank(t, a, sheet.WithForecast(plan.Compute(a, today)))) {
		t.Error("what the forecast expects is shown unasked, or not when asked")
	}
	var one, two bytes.Buffer
	if err := sheet.WriteTo(&one, a, tie, docking); err != nil {
		t.Fatal(err)
	}
	if err := sheet.WriteTo(&two, a, tie, docking); err != nil || !bytes.Equal(one.Bytes(), two.Bytes()) {
		t.Errorf("two sheets of one asset differ, %v", err)
	}
}

// Names that begin like formulas stay texts, and their keys are found again.
func TestFormulaTextStaysText(t *testing.T) {
	for _, name := range []string{"=cmd|' /C calc'!A0", "+1", "-1+1", "@SUM(A1)", "\t=1", "\r=1", "_x0041_ ⚓ خزان"} {
		a := tern(t)
		a.Name, a.Zones[0].Name, a.Patterns[0].Name = name, name, name
		a.Zones[0].ID = name
		for i := range a.Zones {
			if a.Zones[i].HeldBy == "side" {
				a.Zones[i].HeldBy = name
			}
		}
		for i := range a.Dockings {
			a.Dockings[i].Works = nil
		}
		s := blank(t, a)
		for _, sh := range s.f.GetSheetList() {
			rows, err := s.f.GetRows(sh)
			if err != nil {
				t.Fatal(err)
			}
			for r, cells := range rows {
				for c := range cells {
					cell, _ := excelize.CoordinatesToCellName(c+1, r+1)
					if f, _ := s.f.GetCellFormula(sh, cell); f != "" && !strings.HasPrefix(f, "SUM(C") {
						t.Errorf("%q became the formula %q at %s", name, f, cell)
					}
				}
			}
		}
		s.set("Cover", "Date of the survey", 0, "2026-06-15")
		s.set("Survey", "Seen: wasted, %", 0, 30)
		p := s.read(a)
		if len(p.Faults) != 0 || len(p.Readings) != 1 || p.Readings[0].Reading.Zone != name {
			t.Errorf("%q: read %+v, faults %v", name, p.Readings, p.Faults)
		}
	}
}

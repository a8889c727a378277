package workbook_test

import (
	"strconv"
	"strings"
	"testing"

	"github.com/xuri/excelize/v2"

	"anodewright/anodes/plan"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// Names that a workbook could take for something else, with what stands in
// the cell where that differs.
var hostile = []struct{ name, want string }{
	{`=cmd|' /C calc'!A0`, ""},
	{"+1", ""},
	{"@x", ""},
	{"-3", ""},
	{"007", ""},
	{"TRUE", ""},
	{"1e5", ""},
	{"2027-01-01", ""},
	{"<b>&amp;\"'", ""},
	{"_x0041_ _x000D_ _x005F_x0041_x0042_", ""},
	{"{=1+1}", ""},
	{"⚓ 🚢 👩🏽‍🔧", ""},
	{"خزان الصابورة رقم ٣", ""},
	{"舷側外板・水線下", ""},
	{"ถังอับเฉา", ""},
	{"तल प्लेट", ""},
	{"Скула", ""},
	{"a\x00b\x01\x1fc\td\re", "a b  c d e"},
	{"\x1b[31mred", " [31mred"},
	{"bad \xff\xfe utf8", "bad \uFFFD utf8"},
	{"no\uFFFFcharacter", "no\uFFFDcharacter"},
	{"two\nlines", ""},
	{strings.Repeat("long ", 800), ""},
	{"Ελληνικά, ქართული, Հայերեն, עברית, አማርኛ", ""},
	{"ᠮᠣᠩᠭᠣᠯ བོད་ཡིག မြန်မာ ខ្មែរ ລາວ සිංහල தமிழ் తెలుగు ಕನ್ನಡ മലയാളം বাংলা ਪੰਜਾਬੀ ગુજરાતી ଓଡ଼ିଆ", ""},
	{"한국어 日本語ひらがな 简体中文 繁體中文 ᏣᎳᎩ ⵜⴰⵎⴰⵣⵉⵖⵜ ߒߞߏ 𐐔𐐯𐑅𐐨𐑉𐐯𐐻 𞤀𞤁𞤂", ""},
}

// hostileAsset has 200 zones, the first with hostile names.
func hostileAsset(t *testing.T) *hull.Asset {
	a := tern(t)
	a.Name = "&P 12 " + hostile[0].name
	a.Currency = "=1+1"
	side := a.Zones[0]
	a.Zones = a.Zones[:0]
	for i := range 200 {
		z := side
		z.ID, z.Name = "z"+strconv.Itoa(i), "Zone "+strconv.Itoa(i)
		if i < len(hostile) {
			z.Name = hostile[i].name
		}
		a.Zones = append(a.Zones, z)
	}
	for i := range a.Dockings {
		a.Dockings[i].Works = nil
	}
	a.Readings = nil
	p := &a.Patterns[0]
	p.Name, p.ItemNo, p.Specification, p.Certificate, p.Fixing = `=HYPERLINK("x")`, "+45", "@spec", "-cert", "\x07=bell"
	a.Waters[0].Name = "=sea"
	return assetfile.Clone(a)
}

func TestTextStaysText(t *testing.T) {
	w := write(t, plan.Compute(hostileAsset(t), today))
	zones, first := w.table("Zones", "Zone", "Id")
	if len(zones) != 200 {
		t.Fatalf("%d zones, want 200", len(zones))
	}
	for i, h := range hostile {
		want := h.want
		if want == "" {
			want = h.name
		}
		w.same(zones[i][0], want)
		cell := "A" + strconv.Itoa(first+i)
		if kind, err := w.f.GetCellType("Zones", cell); err != nil || kind != excelize.CellTypeSharedString {
			t.Errorf("%q is of type %v, want a text; %v", h.name, kind, err)
		}
		if f, _ := w.f.GetCellFormula("Zones", cell); f != "" {
			t.Errorf("%q became the formula %q", h.name, f)
		}
	}
	order, first := w.table("Order", "Order by")
	for c, want := range map[int]string{3: "+45", 5: `=HYPERLINK("x")`, 7: " =bell", 18: "@spec", 19: "-cert"} {
		w.same(order[0][c], want)
		cell, _ := excelize.CoordinatesToCellName(c+1, first)
		if f, _ := w.f.GetCellFormula("Order", cell); f != "" {
			t.Errorf("%q became the formula %q", want, f)
		}
	}
	h, err := w.f.GetHeaderFooter("Zones")
	if err != nil || !strings.Contains(h.OddHeader, `"-,Bold"&&P 12 =cmd`) {
		t.Errorf("the header is %q, %v", h.OddHeader, err)
	}
	list, _ := w.table("Schedule", "Docking", "Zone")
	if len(list) < len(w.o.Schedule) {
		t.Errorf("%d lines in the list, want %d", len(list), len(w.o.Schedule))
	}
}

// A cell holds 32 767 units of text: what a surveyor wrote up to that length
// is whole, what is longer ends with an ellipsis.
func TestLongNotes(t *testing.T) {
	long := strings.Repeat("=note ", 5461) + "x" // 32 767
	for text, want := range map[string]string{long: long, long + "yz": long[:32766] + "…"} {
		a := tern(t)
		a.Patterns[0].Specification = text
		w := write(t, plan.Compute(a, today))
		order, first := w.table("Order", "Order by")
		w.same(order[0][18], want)
		if f, _ := w.f.GetCellFormula("Order", "S"+strconv.Itoa(first)); f != "" {
			t.Errorf("the note became the formula %.20q", f)
		}
	}
}

func TestZonesOfOneNameAreToldApart(t *testing.T) {
	a := tern(t)
	a.Zones[1].Name = a.Zones[0].Name
	w := write(t, plan.Compute(a, today))
	zones, _ := w.table("Zones", "Zone", "Id")
	w.same(zones[0][0], "Vertical sides (side)")
	w.same(zones[1][0], "Vertical sides (propeller)")
}

func TestDatesBeforeTheCalendarAreText(t *testing.T) {
	a := tern(t)
	a.Zones[0].Coating.Applied = hull.NewDate(1899, 5, 1)
	w := write(t, plan.Compute(a, today))
	zones, _ := w.table("Zones", "Zone", "Id")
	w.same(zones[0][11], "1899-05-01")
}

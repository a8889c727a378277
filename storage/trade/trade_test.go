package trade

import (
	"math"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"anodewright/hull"
)

func read(t *testing.T, text string) Pattern {
	t.Helper()
	p, err := Read(strings.NewReader(text))
	if err != nil {
		t.Fatalf("%q: %v", text, err)
	}
	return p
}

func TestReadForms(t *testing.T) {
	for what, text := range map[string]string{
		"commas":               "port,days\nTallinn,12.5\nOpen sea,100\n",
		"semicolons":           "Area;Days\r\nTallinn;12,5\r\nOpen sea;100\r\n",
		"tabs":                 "name\tdays\nTallinn\t12,5\nOpen sea\t100",
		"a mark at the start":  "\xef\xbb\xbfport;days\nTallinn;12.5\nOpen sea;100\n",
		"quotes":               "port,days\n\"Tallinn\",\"12,5\"\n\"Open sea\",100\n",
		"blank lines":          "\nport;days\n\nTallinn;12,50\n;\nOpen sea;100,0\n\n",
		"blanks about":         " Port ; Days \n  Tallinn ; 12.5 \nOpen   sea;+100\n",
		"dates":                "port;from;to\nTallinn;2026-01-01;2026-01-13 12:00\nOpen sea;2026-02-01;2026-05-12\n",
		"days beside dates":    "from;to;days;port\n2026-01-01;2026-01-13;12.5;Tallinn\n;;100;Open sea\n",
		"days or else dates":   "port;days;from;to\nTallinn;12.5;;\nOpen sea;;2026-02-01T00:00;2026-05-12T00:00:30\n",
		"a sea area beside it": "port;sea_area;days\nA;Tallinn;12.5\nB;Open sea;100\n",
	} {
		p := read(t, text)
		if len(p.Stays) != 2 || p.Stays[0].Name != "Tallinn" || p.Stays[1].Name != "Open sea" ||
			math.Abs(p.Stays[0].Days-12.5) > 1e-9 || math.Abs(p.Stays[1].Days-100) > 1e-9 {
			t.Errorf("%s: got %+v", what, p.Stays)
		}
	}
}

func TestReadKeepsLinesAndOtherTitles(t *testing.T) {
	p := read(t, "Voyage;Port;Days;Cargo\n1;Tallinn;3;grain\n\n2;Kiel;4;none\n")
	if p.Stays[0].Line != 2 || p.Stays[1].Line != 4 {
		t.Errorf("lines %d and %d, want 2 and 4", p.Stays[0].Line, p.Stays[1].Line)
	}
	if !slices.Equal(p.Ignored, []string{"Voyage", "Cargo"}) {
		t.Errorf("ignored %q", p.Ignored)
	}
}

// Every fault is found, with its line and column and what was wanted.
func TestFaults(t *testing.T) {
	for _, c := range []struct{ what, text, want string }{
		{"empty", "", "an empty file"},
		{"blank", " \n\n", "an empty file"},
		{"no header", "Tallinn;12\nKiel;3\n", "line 1: want a header with port, area or name"},
		{"no days", "port;cargo\nTallinn;grain\n", "line 1: want a header"},
		{"from without to", "port;from\nTallinn;2026-01-01\n", "line 1: want a header"},
		{"header alone", "port;days\n", "at least one line"},
		{"title twice", "port;days;Days\nA;1;2\n", `"Days" twice`},
		{"no name", "port;days\n;3\nKiel;4\n", "line 2, port: want the name of a port or area, got nothing"},
		{"no days given", "port;days\nKiel;\n", "line 2, days: want a number of days above 0, got nothing"},
		{"not a number", "port;days\nKiel;ten\n", `line 2, days: want a number of days above 0 and at most 36525, got "ten"`},
		{"zero", "port;days\nKiel;0\n", "above 0"},
		{"negative", "port;days\nKiel;-3\n", "above 0"},
		{"not finite", "port;days\nKiel;NaN\nKiel;Inf\nKiel;1e3\nKiel;0x10\n", "line 5, days"},
		{"a century", "port;days\nKiel;36526\n", "at most 36525"},
		{"comma for both", "port;days\nKiel;1,234\n", "line 2, days: want 1.234 or 1234"},
		{"comma unquoted", "port,days\nKiel,12,5\n", "line 2: want 2 cells as in the header (a number with a decimal comma"},
		{"too few cells", "port;days\nKiel\n", "line 2: want 2 cells as in the header, got 1"},
		{"date of another form", "port;from;to\nKiel;01.02.2026;2026-02-03\n", "line 2, from: want a date as YYYY-MM-DD"},
		{"impossible date", "port;from;to\nKiel;2026-02-30;2026-03-03\n", "line 2, from"},
		{"impossible time", "port;from;to\nKiel;2026-02-20 24:00;2026-03-03\n", "line 2, from"},
		{"one date", "port;from;to\nKiel;2026-02-20;\n", "line 2, to"},
		{"no date", "port;from;to\nKiel;;\n", "line 2, from"},
		{"backwards", "port;from;to\nKiel;2026-03-03;2026-02-20\n", "line 2, to: want a time after 2026-03-03, got 2026-02-20"},
		{"no time at all", "port;from;to\nKiel;2026-03-03;2026-03-03\n", "line 2, to"},
		{"two places at once", "port;from;to\nKiel;2026-03-01;2026-03-10\nTallinn;2026-03-20;2026-03-22\nOslo;2026-03-09;2026-03-12\n", "line 4, from: want a time not before 2026-03-10, when the stay of line 2 ends"},
		{"within another", "port;from;to\nA;2026-03-01;2026-03-30\nB;2026-03-05;2026-03-06\nC;2026-03-10;2026-03-12\n", "line 4, from"},
		{"days against dates", "port;days;from;to\nKiel;20;2026-03-01;2026-03-10\n", "line 2, days: want the 9 days between its dates, got 20"},
		{"quote left open", "port;days\n\"Kiel;3\n", "line 2: want quotes in pairs"},
		{"quote within", "port;days\nKi\"el;3\n", "line 2: want quotes in pairs"},
		{"a name of two lines", "port;days\n\"Ki\nel\";3\n", "line 2, port: want a name on one line"},
		{"a long name", "port;days\n" + strings.Repeat("ø", 201) + ";3\n", "at most 200 letters, got 201"},
		{"UTF-16", "\xff\xfep\x00", "got UTF-16"},
		{"Latin 1", "port;days\nKiel;2\nG\xf6teborg;3\n", "line 3: want text in UTF-8"},
		{"a zero byte", "port;days\nKiel\x00;2\n", "line 2: want text in UTF-8"},
		{"too large", "port;days\n" + strings.Repeat("Kiel;3\n", MaxSize/7+1), "at most 4 MB"},
		{"too many lines", "port;days\n" + strings.Repeat("Kiel;3\n", maxLines+1), "at most 20000 lines"},
	} {
		p, err := Read(strings.NewReader(c.text))
		if err == nil || !strings.Contains(err.Error(), c.want) {
			t.Errorf("%s: got %v, want %q", c.what, err, c.want)
		}
		if p.Stays != nil {
			t.Errorf("%s: a faulty file gives stays", c.what)
		}
	}
}

func TestAllFaultsAtOnceButNoFlood(t *testing.T) {
	_, err := Read(strings.NewReader("port;days\n" + strings.Repeat(";x\n", 50)))
	lines := strings.Split(err.Error(), "\n")
	if len(lines) != maxShown+1 || lines[maxShown] != "and 80 more" {
		t.Errorf("%d lines, the last %q", len(lines), lines[len(lines)-1])
	}
}

func TestReadFile(t *testing.T) {
	path := filepath.Join(t.TempDir(), "trade.csv")
	if err := os.WriteFile(path, []byte("port;days\nKiel;3\n"), 0o600); err != nil {
		t.Fatal(err)
	}
	if p, err := ReadFile(path); err != nil || len(p.Stays) != 1 {
		t.Errorf("%+v, %v", p, err)
	}
	for _, bad := range []string{path + "x", filepath.Dir(path)} {
		if _, err := ReadFile(bad); err == nil {
			t.Errorf("%s: no error", bad)
		}
	}
}

func TestMatch(t *testing.T) {
	a := &hull.Asset{Waters: []hull.Water{
		{ID: "north-sea", Name: "North Sea"}, {ID: "w2", Name: "Harbour"}, {ID: "w3", Name: "harbour"}, {ID: "baltic proper", Name: "My Baltic"},
	}}
	p := read(t, "port;days\nNORTH SEA;50\nnorth-sea;30\nRhine at lobith;10\nKattegat;20\nKiel;5\nHarbour;15\nNorth Sea;10\nGulf of Finland;40\nBaltic Proper;20\nNorth;1\nClay, shale, gumbo, loam;1\n")
	ms := p.Match(a)
	want := []Match{
		{Name: "NORTH SEA", Days: 60, Water: "north-sea"},
		{Name: "north-sea", Days: 30, Water: "north-sea"},
		{Name: "Rhine at lobith", Days: 10, Entry: "rhine-at-lobith"},
		{Name: "Kattegat", Days: 20, Entry: "kattegat"},
		{Name: "Kiel", Days: 5, Why: "neither"},
		{Name: "Harbour", Days: 15, Why: "several"},
		{Name: "Gulf of Finland", Days: 40, Why: "no temperature"},
		{Name: "Baltic Proper", Days: 20, Water: "baltic proper"},
		{Name: "North", Days: 1, Why: "neither"},
		{Name: "Clay, shale, gumbo, loam", Days: 1, Why: "neither"},
	}
	if len(ms) != len(want) {
		t.Fatalf("%d places, want %d: %+v", len(ms), len(want), ms)
	}
	total := 0.0
	for i, w := range want {
		m := ms[i]
		total += m.Share
		if m.Name != w.Name || m.Days != w.Days || m.Water != w.Water || m.Entry != w.Entry || !strings.Contains(m.Why, w.Why) || (m.Water == "" && m.Entry == "") != (w.Why != "") {
			t.Errorf("got %+v, want %+v", m, w)
		}
	}
	if math.Abs(total-1) > 1e-12 {
		t.Errorf("shares add up to %g", total)
	}
	if !slices.Equal(ms[0].Lines, []int{2, 8}) {
		t.Errorf("lines %v, want 2 and 8", ms[0].Lines)
	}
}

func TestShares(t *testing.T) {
	got := Shares([]Weight{{"a", 1}, {"b", 1}, {"a", 0.5}, {"c", 0.5}, {"d", 0}, {"e", math.NaN()}})
	want := []hull.WaterShare{{Water: "a", Share: 0.5}, {Water: "b", Share: 0.3333}, {Water: "c", Share: 0.1667}}
	if !slices.Equal(got, want) {
		t.Errorf("got %v, want %v", got, want)
	}
	if Shares(nil) != nil {
		t.Error("no days give shares")
	}
}

// Whatever the days, the shares add up to 1, none is 0, and none is further
// from its exact value than the hundredths that very small ones are given.
func TestSharesAddUp(t *testing.T) {
	x := uint64(1)
	next := func() float64 {
		x = x*6364136223846793005 + 1442695040888963407
		return float64(x>>40) / (1 << 24)
	}
	for n := 1; n <= 60; n++ {
		var ws []Weight
		total := 0.0
		for i := range n {
			w := Weight{string(rune('a' + i)), 0.001 + 400*math.Pow(next(), 6)}
			ws = append(ws, w)
			total += w.Days
		}
		sum := 0.0
		for i, s := range Shares(ws) {
			sum += s.Share
			if s.Share < 0.0001-1e-12 {
				t.Fatalf("%d waters: share %g", n, s.Share)
			}
			if exact := ws[i].Days / total; math.Abs(s.Share-exact) > 0.0001+float64(n)*0.0001*0.5 {
				t.Errorf("%d waters: share %g for %g", n, s.Share, exact)
			}
		}
		if math.Abs(sum-1) > 1e-12 {
			t.Errorf("%d waters: shares add up to %.15g", n, sum)
		}
	}
}

// No file, however odd, makes the reader panic or give a stay that cannot be
// used.
func FuzzRead(f *testing.F) {
	for _, s := range []string{
		"port;days\nKiel;3,5\n", "name,from,to\nA,2026-01-01,2026-01-02\n", "\xef\xbb\xbfarea\tdays\nX\t1\n", "port;days\n\"a\"\"b\";2\n", "\xff\xfe", "port;days;from;to\nA;;;\n",
	} {
		f.Add([]byte(s))
	}
	f.Fuzz(func(t *testing.T, text []byte) {
		p, err := Read(strings.NewReader(string(text)))
		if err != nil {
			if err.Error() == "" {
				t.Error("an error without a text")
			}
			return
		}
		if len(p.Stays) == 0 {
			t.Error("no stays and no error")
		}
		for _, s := range p.Stays {
			if s.Name == "" || !(s.Days > 0 && s.Days <= maxDays) || s.Line < 2 {
				t.Errorf("stay %+v", s)
			}
		}
		for _, m := range p.Match(&hull.Asset{}) {
			if !(m.Share > 0 && m.Share <= 1+1e-9) {
				t.Errorf("match %+v", m)
			}
		}
	})
}

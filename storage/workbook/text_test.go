package workbook

import (
	"strings"
	"testing"
	"unicode/utf16"
)

func TestCut(t *testing.T) {
	for _, c := range []struct {
		s    string
		n    int
		want string
	}{
		{"anode", 5, "anode"},
		{"anodes", 5, "anod…"},
		{"⚓🚢🚢", 5, "⚓🚢🚢"},
		{"⚓🚢🚢🚢", 5, "⚓🚢…"},
		{"", 5, ""},
	} {
		if got := cut(c.s, c.n); got != c.want {
			t.Errorf("cut(%q, %d) = %q, want %q", c.s, c.n, got, c.want)
		}
	}
	long := clean(strings.Repeat("🚢", 40000))
	if n := len(utf16.Encode([]rune(long))); n > mostText {
		t.Errorf("a cell of %d units, want at most %d", n, mostText)
	}
}

func TestLines(t *testing.T) {
	for _, c := range []struct {
		s    string
		room float64
		want int
	}{
		{"", 10, 1},
		{"one", 10, 1},
		{"one\ntwo", 10, 2},
		{"nnnn nnnn", 5, 2},
		{"nnnn nnnn", 9, 1},
		{"nnnnnnnnnnnn", 5, 3},
		{"漢字漢字", 5, 2},
	} {
		if got := lines(c.s, c.room); got != c.want {
			t.Errorf("lines(%q, %g) = %d, want %d", c.s, c.room, got, c.want)
		}
	}
}

func TestSure(t *testing.T) {
	for in, want := range map[string]string{
		"from memory":                "from memory: check",
		"from memory, to be checked": "from memory: check",
		"read":                       "read",
		"a read; b from memory":      "a read; b from memory: check",
	} {
		if got := sure(in); got != want {
			t.Errorf("sure(%q) = %q, want %q", in, got, want)
		}
	}
}

func TestPercentWords(t *testing.T) {
	for in, want := range map[float64]string{0: "0 %", 0.8: "80 %", 0.075: "7.5 %", 0.125: "12.5 %", 0.07: "7 %", 1: "100 %", 0.05: "5 %"} {
		if got := percentWords(in); got != want {
			t.Errorf("percentWords(%g) = %q, want %q", in, got, want)
		}
	}
}

package session

import (
	"math"
	"testing"
)

// Whatever is typed, a number that is read is finite, and written in full it
// reads the same.
func FuzzParseNumber(f *testing.F) {
	for _, s := range []string{"1", "-1.5", "1,5", "1 234 567,8", "1,234.5", "1.234.567", "1’234", "−3", "1e9", "1e999", ".5", "5.", "NaN", "Inf", "0x10", "1_000", "1 23", "--1", "", " ", "1,234", "=1+1"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		x, err := ParseNumber(s)
		if err != nil {
			return
		}
		if math.IsNaN(x) || math.IsInf(x, 0) {
			t.Fatalf("%q is read as %v", s, x)
		}
		if again, err := ParseNumber(Number(x)); err != nil || again != x {
			t.Errorf("%q is read as %v, which is written as %q and read as %v, %v", s, x, Number(x), again, err)
		}
	})
}

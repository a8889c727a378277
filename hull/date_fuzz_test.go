package hull

import "testing"

// Whatever is typed, a date that is read is written as one that reads the
// same, and is a day of the centuries allowed.
func FuzzParseDate(f *testing.F) {
	for _, s := range []string{"2027-03-15", "2024-02-29", "2023-02-29", "1799-12-31", "2400-12-31", "0001-01-01", "2027-3-5", "", "2027-03-15T00:00:00Z", "-2027-01-01", "２０２７-03-15"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		d, err := ParseDate(s)
		if err != nil {
			return
		}
		if again, err := ParseDate(d.String()); err != nil || again != d || d.String() != s {
			t.Errorf("%q is read as %s, and that as %s, %v", s, d, again, err)
		}
		if d.IsZero() || d < NewDate(1800, 1, 1) || d > NewDate(2400, 12, 31) {
			t.Errorf("%q is read as %s", s, d)
		}
	})
}

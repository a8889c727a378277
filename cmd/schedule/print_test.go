package main

import "testing"

// Small currents keep their figures.
func TestAmperes(t *testing.T) {
	for x, want := range map[float64]string{0: "0.00", 0.00247573: "0.0025", 0.0996: "0.1", 0.5: "0.50", 17.7424: "17.74", 364: "364.00"} {
		if got := amperes(x); got != want {
			t.Errorf("%g A is written %q, want %q", x, got, want)
		}
	}
}

package pages

import "testing"

// No figure of a trace is written as nothing: the growth of a line's breakdown
// and the loss of platinum are small.
func TestFigureText(t *testing.T) {
	for x, want := range map[float64]string{
		0: "0", 3e-5: "0.00003", 2e-5: "0.00002", 0.00123786: "0.00124", 0.0481: "0.0481", 0.2646324: "0.2646",
		16.527: "16.527", 200: "200", 1600: "1\u00a0600", -0.8: "−0.8",
	} {
		if got := figureText(x); got != want {
			t.Errorf("%g is written %q, want %q", x, got, want)
		}
	}
}

package chart

import (
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// TestShapesAreAsTheyWere compares a chart's shapes with the list in testdata;
// GOLDEN=update in the environment takes the new ones over.
func TestShapesAreAsTheyWere(t *testing.T) {
	c := sample()
	c.Dots = []Dot{{X: 25, Y: 4, Low: 3, High: 6}}
	c.Series = append(c.Series, Steps("demand", Third, []float64{0, 50, 100}, []float64{7, 2}))
	d := c.Lay(400, 160, 12)
	var b strings.Builder
	for _, l := range d.Lines {
		fmt.Fprintf(&b, "line role %d from %.1f,%.1f to %.1f,%.1f\n", l.Role, l.X1, l.Y1, l.X2, l.Y2)
	}
	for _, x := range d.Texts {
		fmt.Fprintf(&b, "text role %d %q at %.1f,%.1f anchor %.1f\n", x.Role, x.Text, x.X, x.Y, x.Anchor)
	}
	path := filepath.Join("testdata", "sample.txt")
	if os.Getenv("GOLDEN") == "update" {
		if err := os.WriteFile(path, []byte(b.String()), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	want, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	if b.String() != string(want) {
		t.Errorf("got:\n%s\nwant:\n%s", b.String(), want)
	}
}

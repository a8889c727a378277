package picture_test

import (
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"anodewright/app/picture"
	"anodewright/assets"
	"anodewright/storage/assetfile"
)

// list writes a picture's shapes as text, a line a shape, places to a tenth of
// a pixel.
func list(p *picture.Picture) string {
	var b strings.Builder
	points := func(path []picture.Point) {
		for _, q := range path {
			fmt.Fprintf(&b, " %.1f,%.1f", q.X, q.Y)
		}
		b.WriteByte('\n')
	}
	for _, a := range p.Areas {
		fmt.Fprintf(&b, "area role %v zone %d:", a.Role, a.Zone)
		points(a.Path)
	}
	for _, l := range p.Lines {
		fmt.Fprintf(&b, "line role %v:", l.Role)
		points(l.Path)
	}
	for _, n := range p.Notes {
		fmt.Fprintf(&b, "note %q at %.1f,%.1f anchor %.1f\n", n.Text, n.X, n.Y, n.Anchor)
	}
	for _, l := range p.Labels {
		fmt.Fprintf(&b, "label of zone %d in %.1f,%.1f %.1f by %.1f outside %v free %v\n", l.Zone, l.Box.X, l.Box.Y, l.Box.W, l.Box.H, l.Outside, l.Free)
	}
	return b.String()
}

// TestShapesAreAsTheyWere compares the shapes of every demo asset with the
// lists in testdata; GOLDEN=update in the environment takes the new ones over.
func TestShapesAreAsTheyWere(t *testing.T) {
	for i, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			t.Fatal(err)
		}
		got := list(picture.Of(a, 800, 120, 13))
		path := filepath.Join("testdata", fmt.Sprintf("demo-%d.txt", i))
		if os.Getenv("GOLDEN") == "update" {
			if err := os.WriteFile(path, []byte(got), 0o644); err != nil {
				t.Fatal(err)
			}
			continue
		}
		want, err := os.ReadFile(path)
		if err != nil {
			t.Fatal(err)
		}
		if got != string(want) {
			g, w := strings.Split(got, "\n"), strings.Split(string(want), "\n")
			for n := range min(len(g), len(w)) {
				if g[n] != w[n] {
					t.Errorf("%s, shape %d:\n got %s\nwant %s", a.Name, n, g[n], w[n])
					break
				}
			}
			t.Errorf("%s: %d shapes, want %d", a.Name, len(g), len(w))
		}
	}
}

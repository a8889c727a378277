package picture

import (
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

func demo(t *testing.T) []*hull.Asset {
	t.Helper()
	var all []*hull.Asset
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			t.Fatal(err)
		}
		all = append(all, a)
	}
	return all
}

// everyRegion is an asset of each kind with n zones of every region there is.
func everyRegion(t *testing.T, n int) []*hull.Asset {
	t.Helper()
	var all []*hull.Asset
	for _, kind := range hull.Ship.Words() {
		for _, likeShip := range []bool{false, true} {
			a := *demo(t)[0]
			a.Kind = hull.Kind(kind)
			if !likeShip {
				a.Particulars = nil
			}
			a.Name = fmt.Sprintf("%s, ship-shaped %v, %d of each", kind, likeShip, n)
			first := a.Zones[0]
			a.Zones = nil
			for _, r := range hull.Region("").Words() {
				if likeShip && (r == "jacket-leg" || r == "brace" || r == "node" || r == "caisson") {
					continue
				}
				for range n {
					z := first
					z.Region = hull.Region(r)
					a.Zones = append(a.Zones, z)
				}
			}
			all = append(all, &a)
		}
	}
	return all
}

var sizes = [][2]float32{{1020, 92}, {1300, 130}, {720, 80}, {400, 300}}

// sizesOf are the sizes that an asset is drawn in: tall ones beside the pages,
// too.
func sizesOf(a *hull.Asset) [][2]float32 {
	if Tall(a) {
		return append(sizes[:len(sizes):len(sizes)], [2]float32{160, 560}, [2]float32{240, 400})
	}
	return sizes
}

func TestEveryZoneCanBeHit(t *testing.T) {
	assets := append(append(demo(t), everyRegion(t, 1)...), everyRegion(t, 4)...)
	for _, a := range assets {
		for _, size := range sizesOf(a) {
			p := Of(a, size[0], size[1], 14)
			for i, z := range a.Zones {
				at, ok := p.Centre(i)
				if !ok {
					t.Errorf("%s in %v: %s (%s) has no area to be hit", a.Name, size, z.Name, z.Region)
					continue
				}
				if got, _ := p.Hit(at); got != i {
					t.Errorf("%s in %v: the middle of zone %d hits zone %d", a.Name, size, i, got)
				}
				filled := false
				for _, area := range p.Areas {
					filled = filled || area.Zone == i && area.Role == Zone
				}
				if !filled {
					t.Errorf("%s: zone %s is nowhere filled", a.Name, z.Name)
				}
			}
		}
	}
}

func TestNothingLiesOutside(t *testing.T) {
	for _, a := range append(demo(t), everyRegion(t, 3)...) {
		for _, size := range sizesOf(a) {
			p := Of(a, size[0], size[1], 14)
			in := func(what string, q Point) {
				if q.X < -0.01 || q.Y < -0.01 || q.X > size[0]+0.01 || q.Y > size[1]+0.01 {
					t.Errorf("%s in %v: %s at %v", a.Name, size, what, q)
				}
			}
			for _, area := range p.Areas {
				for _, q := range area.Path {
					in(fmt.Sprint(area.Role, " of zone ", area.Zone), q)
				}
			}
			for _, l := range p.Lines {
				for _, q := range l.Path {
					in(l.Role.String(), q)
				}
			}
			for _, l := range p.Labels {
				in("a label", Point{l.Box.X, l.Box.Y})
				in("a label", Point{l.Box.right(), l.Box.bottom()})
			}
			for _, n := range p.Notes {
				in(n.Text, Point{n.X, n.Y})
			}
		}
	}
}

func TestGroundIsNoZone(t *testing.T) {
	for _, a := range demo(t) {
		p := Of(a, 1020, 92, 14)
		if z, ok := p.Hit(Point{1, 1}); ok {
			t.Errorf("%s: the upper left corner is zone %d", a.Name, z)
		}
		if z, ok := p.Hit(Point{-5, 40}); ok {
			t.Errorf("%s: a point outside is zone %d", a.Name, z)
		}
	}
}

func TestWithinCutsAPath(t *testing.T) {
	got := bounds(within(path(Box{0, 0, 10, 10}), Box{4, 6, 100, 2}))
	if got != (Box{4, 6, 6, 2}) {
		t.Errorf("got %v", got)
	}
	if rest := within(path(Box{0, 0, 10, 10}), Box{20, 20, 5, 5}); len(rest) != 0 {
		t.Errorf("nothing in common, but %v is left", rest)
	}
}

// TestShapeList compares the shapes of one asset with those recorded. Set
// UPDATE_GOLDEN=1 to record them anew.
func TestShapeList(t *testing.T) {
	p := Of(demo(t)[4], 1000, 100, 14)
	var b strings.Builder
	points := func(path []Point) {
		for _, q := range path {
			fmt.Fprintf(&b, " %.0f,%.0f", q.X, q.Y)
		}
		b.WriteByte('\n')
	}
	for _, a := range p.Areas {
		fmt.Fprintf(&b, "area %v %d:", a.Role, a.Zone)
		points(a.Path)
	}
	for _, l := range p.Lines {
		fmt.Fprintf(&b, "line %v:", l.Role)
		points(l.Path)
	}
	for _, l := range p.Labels {
		fmt.Fprintf(&b, "label %d: %.0f,%.0f %.0f by %.0f\n", l.Zone, l.Box.X, l.Box.Y, l.Box.W, l.Box.H)
	}
	for _, n := range p.Notes {
		fmt.Fprintf(&b, "note %q: %.0f,%.0f\n", n.Text, n.X, n.Y)
	}
	file := filepath.Join("testdata", "sealine.txt")
	if os.Getenv("UPDATE_GOLDEN") != "" {
		if err := os.MkdirAll("testdata", 0o755); err != nil {
			t.Fatal(err)
		}
		if err := os.WriteFile(file, []byte(b.String()), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	want, err := os.ReadFile(file)
	if err != nil {
		t.Fatal(err)
	}
	if b.String() != string(want) {
		t.Errorf("the shapes differ from %s:\n%s", file, b.String())
	}
}

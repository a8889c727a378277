package area

import (
	"math"
	"math/rand/v2"
	"testing"
)

// Exact figures, to the digits that are printed.
func TestExactFigures(t *testing.T) {
	ok := get(t)
	near(t, "tubular", ok(Tubular(1, 10)).Area, 31.41593, 5e-6)
	near(t, "tubular 48 in", ok(Tubular(1.2192, 30)).Area, 114.907, 5e-4)
	near(t, "cone", ok(Cone(2, 1, 3)).Area, 14.3322, 5e-5)
	near(t, "full cone", ok(Cone(2, 0, 3)).Area, math.Pi*math.Sqrt(10), 1e-12)
	near(t, "sphere", ok(Sphere(2)).Area, 12.566371, 5e-7)
	near(t, "flat end", ok(FlatEnd(2)).Area, 3.1415927, 5e-8)
	near(t, "KCS propeller", ok(Propeller(7.9, 0.8, 0, 0)).Area, 78.427, 5e-4)
	near(t, "propeller with hub", ok(Propeller(7.9, 0.8, 1.4, 1.6)).Area, 78.4267+math.Pi*1.4*1.6, 5e-4)
	near(t, "bilge keels", ok(BilgeKeels(2, 41, 0.34)).Area, 55.76, 1e-9)
	near(t, "tunnel", ok(ThrusterTunnel(1.5, 3.5)).Area, 16.493361, 5e-7)
	near(t, "sea chest", ok(SeaChest(1.2, 0.8, 0.6, 0)).Area, 3.36, 1e-9)
	near(t, "sea chest with grating", ok(SeaChest(1.2, 0.8, 0.6, 0.5)).Area, 4.32, 1e-9)
	near(t, "pontoon afloat", ok(Pontoon(30, 10, 2)).Area, 460, 1e-9)
	near(t, "pontoon under water", ok(SunkPontoon(80, 16, 8)).Area, 2*(80*16+80*8+16*8), 1e-9)
	near(t, "tank", ok(Entered("Tank 3 port", 420)).Area, 420, 0)
}

// Both faces of a rudder are twice its lateral area: KVLCC1's 136.7 m2 make
// 273.3 m2, 2.00 as printed.
func TestRudderFaces(t *testing.T) {
	ok := get(t)
	for _, h := range Benchmarks() {
		if h.Name == "KVLCC1" {
			got := ok(Rudder(ok(Entered("lateral", h.RudderLateral)))).Area
			near(t, h.Name, got, h.RudderSurface, 0.15)
			near(t, "ratio as printed", math.Round(100*h.RudderSurface/h.RudderLateral)/100, 2.00, 0)
		}
	}
	near(t, "1.5 % rule", ok(RudderLateral(118, 7.1)).Area, 12.567, 1e-9)
	near(t, "class form", ok(RudderLateralByClass(200, 30, 10, 0.7)).Area, 20*(1+50*0.49*0.0225), 1e-9)
}

// MIL-HDBK-1004/10: 1000 ft of sheet piling with 2.96 ft2 per ft of wall and ft
// of depth: 36 ft in water 106 560 ft2, 15 ft in mud 44 400 ft2, 56 ft behind
// 165 760 ft2.
func TestSheetPilingOfTheHandbook(t *testing.T) {
	for depth, want := range map[float64]float64{36: 106560, 15: 44400, 56: 165760} {
		near(t, "ft2", get(t)(SheetPiling(1000, depth, 2.96)).Area, want, 0.5)
	}
}

// Only 30 m of a chain and five diameters of a pile's inside count.
func TestWhatCounts(t *testing.T) {
	ok := get(t)
	near(t, "long chain", ok(Chain(0.1, 800)).Area, ok(Chain(0.1, 30)).Area, 0)
	near(t, "short chain", ok(Chain(0.1, 15)).Area, ok(Chain(0.1, 30)).Area/2, 1e-9)
	// Geometry of the link against the trade's mass of a chain, 19.9 d^2 t/m:
	// a round bar's surface is 4 times its volume over its diameter.
	near(t, "chain per metre", ok(Chain(0.1, 1)).Area, 4*19900*0.1*0.1/7850/0.1, 0.02)
	near(t, "pile top", ok(OpenPileTop(2, 50)).Area, math.Pi*2*10, 1e-9)
	near(t, "plugged pile top", ok(OpenPileTop(2, 4)).Area, math.Pi*2*4, 1e-9)
}

// Growth changes what waves see, not the steel.
func TestMarineGrowth(t *testing.T) {
	g, err := MarineGrowth(1.2, 0.1)
	if err != nil || g.Steel != 1.2 || math.Abs(g.Hydrodynamic-1.4) > 1e-12 || g.Note == "" {
		t.Errorf("got %+v, %v", g, err)
	}
	if g, err = MarineGrowth(1.2, 0); err != nil || g.Hydrodynamic != 1.2 || g.Note != "" {
		t.Errorf("without growth: %+v, %v", g, err)
	}
	if _, err = MarineGrowth(1.2, -0.1); err == nil {
		t.Error("negative growth was taken")
	}
}

// A leg from 6 m above water to a toe 60 m in the sea bed at 120 m.
func TestSplitOfALeg(t *testing.T) {
	parts, err := Member{Diameter: 2, Top: 6, Bottom: -180}.Split(-120)
	if err != nil {
		t.Fatal(err)
	}
	want := []struct {
		e      Exposure
		length float64
		depth  float64
		band   int
	}{{Air, 6, -3, 0}, {Sea, 30, 15, 0}, {Sea, 70, 65, 1}, {Sea, 20, 110, 2}, {Mud, 60, 150, 2}}
	if len(parts) != len(want) {
		t.Fatalf("%d parts, want %d: %+v", len(parts), len(want), parts)
	}
	for i, p := range parts {
		w := want[i]
		if p.Exposure != w.e || math.Abs(p.Length-w.length) > 1e-9 || p.Depth() != w.depth || p.Band() != w.band {
			t.Errorf("part %d: %+v at %g m in band %d, want %+v", i, p, p.Depth(), p.Band(), w)
		}
		near(t, "area", p.Area, math.Pi*2*w.length, 1e-9)
	}
	level, err := Member{Diameter: 1, Top: -40, Bottom: -40, Length: 25}.Split(-120)
	if err != nil || len(level) != 1 || level[0].Exposure != Sea || level[0].Band() != 1 {
		t.Errorf("level brace: %+v, %v", level, err)
	}
	for _, m := range []Member{{Diameter: 1, Top: -5, Bottom: 2}, {Top: 1, Bottom: -5}, {Diameter: 1, Top: 0, Bottom: -10, Length: 8}, {Diameter: 1, Top: -3, Bottom: -3}} {
		if _, err := m.Split(-20); err == nil {
			t.Errorf("%+v was taken", m)
		}
	}
	if _, err := (Member{Diameter: 1, Top: 0, Bottom: -10}).Split(2); err == nil {
		t.Error("a sea bed above water was taken")
	}
}

// Whatever the member and the sea bed, the parts add up to pi D L, touch one
// another, and none lies on both sides of a cut.
func TestSplitAddsUpToTheWhole(t *testing.T) {
	r := rand.New(rand.NewPCG(1, 7))
	for range 20000 {
		m := Member{Diameter: 0.2 + 4*r.Float64(), Top: 20 - 500*r.Float64()}
		m.Bottom = m.Top - 400*r.Float64()
		m.Length = (m.Top - m.Bottom) * (1 + r.Float64())
		if r.IntN(4) == 0 {
			m.Length = 0
		}
		if m.Top == m.Bottom {
			continue
		}
		seaBed := -1 - 450*r.Float64()
		parts, err := m.Split(seaBed)
		if err != nil {
			t.Fatalf("%+v at %g: %v", m, seaBed, err)
		}
		length := m.Length
		if length == 0 {
			length = m.Top - m.Bottom
		}
		sum, at := 0.0, m.Top
		for _, p := range parts {
			if p.Top != at || p.Bottom >= p.Top {
				t.Fatalf("%+v: part %+v does not begin at %g", m, p, at)
			}
			for _, cut := range cutsAbove(seaBed) {
				if p.Top > cut && p.Bottom < cut {
					t.Fatalf("%+v: part %+v crosses %g", m, p, cut)
				}
			}
			sum, at = sum+p.Area, p.Bottom
		}
		if whole := math.Pi * m.Diameter * length; at != m.Bottom || math.Abs(sum-whole) > 1e-9*whole {
			t.Fatalf("%+v: parts make %g m2 down to %g, want %g", m, sum, at, whole)
		}
	}
}

// Several equal things keep what one is made of.
func TestTimes(t *testing.T) {
	one := get(t)(FlatEnd(1))
	two := one.Times(2)
	near(t, "two", two.Area, 2*one.Area, 1e-12)
	if two.Formula != "2 × (π D²/4)" || two.Source != one.Source || one.Times(1).Formula != one.Formula {
		t.Errorf("got %+v", two)
	}
}

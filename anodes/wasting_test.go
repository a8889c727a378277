package anodes

import (
	"fmt"
	"math"
	"testing"

	"pgregory.net/rapid"

	"anodewright/hull"
)

// drawPattern draws a pattern of any shape whose fields are in the range that
// the asset file allows, with dimensions and mass that need not agree.
func drawPattern(t *rapid.T) *hull.Pattern {
	f := func(name string, low, high float64) float64 { return rapid.Float64Range(low, high).Draw(t, name) }
	p := &hull.Pattern{
		Alloy:        rapid.SampledFrom([]hull.Alloy{hull.Aluminium, hull.Zinc, hull.Magnesium}).Draw(t, "alloy"),
		Shape:        hull.Shape(rapid.SampledFrom(hull.Shape("").Words()).Draw(t, "shape")),
		Standoff:     rapid.SampledFrom([]float64{0, 0.1, 0.2, 0.3, 1}).Draw(t, "standoff"),
		NetMass:      f("net mass", 0.1, 500),
		InsertVolume: rapid.SampledFrom([]float64{0, 1e-4, 0.01, 0.5}).Draw(t, "insert"),
		Utilisation:  f("u", 0.05, 1),
		SeriesResist: f("series", 0, 0.1),
	}
	switch p.Shape {
	case hull.LongSlender, hull.ShortSlender:
		p.Radius = f("radius", 0.01, 0.3)
		p.Length = p.Radius * f("proportion", 2, 60)
	case hull.LongFlush:
		p.Width = f("width", 0.02, 0.5)
		p.Length = p.Width * f("proportion", 1, 12)
	case hull.SoilRod:
		p.Diameter = f("diameter", 0.02, 0.3)
		p.Length = p.Diameter * f("proportion", 2, 60)
	case hull.Stated:
		p.ShapeFactor = f("R/rho new", 0.05, 5)
		p.ShapeFactorWorn = p.ShapeFactor * f("R/rho worn", 1, 4)
	default:
		if rapid.Bool().Draw(t, "area stated") {
			p.ExposedArea = f("area", 0.01, 3)
		}
		if p.ExposedArea == 0 || rapid.Bool().Draw(t, "block") {
			p.Length, p.Width, p.Height = f("length", 0.1, 2), f("width", 0.05, 1), f("height", 0.02, 0.3)
		}
	}
	return p
}

// Resistance never falls as a piece wastes, makes no jump, and starts at that
// of the new piece.
func TestResistanceAsItWastes(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p := drawPattern(t)
		rho := rapid.Float64Range(0.15, 200).Draw(t, "rho")
		if got, want := ResistanceAt(p, rho, 0), ResistanceNew(p, rho); math.Abs(got-want) > 1e-12*want {
			t.Fatalf("at 0: %v, new %v", got, want)
		}
		v, w := rapid.Float64Range(0, 1).Draw(t, "v"), rapid.Float64Range(0, 1).Draw(t, "w")
		v, w = min(v, w), max(v, w)
		at, later := ResistanceAt(p, rho, v), ResistanceAt(p, rho, w)
		if later < at*(1-1e-12) || math.IsNaN(later) || math.IsInf(later, 0) {
			t.Fatalf("at %v: %v, at %v: %v", v, at, w, later)
		}
		if next := ResistanceAt(p, rho, min(v+1e-9, 1)); next > at*1.001 && v < 0.999 {
			t.Fatalf("a jump from %v to %v at %v", at, next, v)
		}
		if out := OutputAt(p, hull.Seawater, rho, 1, 0); math.Abs(out-OutputNew(p, hull.Seawater, rho, 1)) > 1e-9*math.Abs(out) {
			t.Fatalf("output at 0 is %v, new %v", out, OutputNew(p, hull.Seawater, rho, 1))
		}
	})
}

// A wastage outside 0 to 1 counts as the end that it is beyond.
func TestWastageOutOfRange(t *testing.T) {
	p := &hull.Pattern{Alloy: hull.Zinc, Shape: hull.LongFlush, Length: 1, Width: 0.1, NetMass: 50, Utilisation: 0.85}
	near(t, "-1", ResistanceAt(p, 0.25, -1), ResistanceNew(p, 0.25), 1e-15)
	near(t, "2", ResistanceAt(p, 0.25, 2), ResistanceAt(p, 0.25, 1), 1e-15)
}

// At the utilisation factor: as the code's worn anode where dimensions and
// mass agree and the section is round; else as documented.
func TestResistanceAtUtilisation(t *testing.T) {
	rod := &hull.Pattern{Alloy: hull.Aluminium, Shape: hull.LongSlender, Length: 2, Radius: 0.1, Standoff: 0.3, InsertVolume: 0.004, Utilisation: 0.9}
	rod.NetMass = 2700 * (math.Pi*0.01*2 - 0.004)
	near(t, "stand-off", ResistanceAt(rod, 0.25, 0.9), ResistanceWorn(rod, 0.25), 1e-12)
	rod.Standoff = 0.2
	near(t, "0.2 m off", ResistanceAt(rod, 0.25, 0.9), ResistanceWorn(rod, 0.25), 1e-12)

	soil := &hull.Pattern{Alloy: hull.Magnesium, Shape: hull.SoilRod, Length: 1.5, Diameter: 0.1, Utilisation: 0.85}
	soil.NetMass = 1740 * math.Pi / 4 * 0.01 * 1.5
	near(t, "rod", ResistanceAt(soil, 50, 0.85), ResistanceWorn(soil, 50), 1e-12)

	stated := &hull.Pattern{Alloy: hull.Aluminium, Shape: hull.Stated, ShapeFactor: 0.3, ShapeFactorWorn: 0.5, NetMass: 100, Utilisation: 0.8}
	near(t, "stated", ResistanceAt(stated, 0.25, 0.8), ResistanceWorn(stated, 0.25), 1e-12)
	near(t, "stated, half way", 1/ResistanceAt(stated, 1, 0.4), (1/0.3+1/0.5)/2, 1e-12)

	// The slab of the whole-chain check: the section left is
	// (0.15*45/2700 + 0.0006)/0.9 over (45/2700 + 0.0006)/1 of the new one.
	slab := &hull.Pattern{Alloy: hull.Aluminium, Shape: hull.LongFlush, Length: 1, Width: 0.15, NetMass: 45, InsertVolume: 0.0006, Utilisation: 0.85}
	width := 0.15 * math.Sqrt((0.15*45/2700+0.0006)/0.9/(45.0/2700+0.0006))
	near(t, "slab", ResistanceAt(slab, 0.25, 0.85), 0.25/(0.9+width), 1e-12)
	if got, code := ResistanceAt(slab, 0.25, 0.85), ResistanceWorn(slab, 0.25); got < code || got > 1.04*code {
		t.Errorf("slab: %v, by the code %v", got, code)
	}

	// A short block keeps a fifth of its height at u = 0.8; the code none.
	block := &hull.Pattern{Alloy: hull.Aluminium, Shape: hull.ShortFlush, Length: 0.3, Width: 0.15, Height: 0.1, NetMass: 12, Utilisation: 0.8}
	near(t, "block", ResistanceAt(block, 0.25, 0.8), ShortFlush(0.25, 0.3*0.15+2*0.02*0.45), 1e-12)
	area := &hull.Pattern{Alloy: hull.Aluminium, Shape: hull.Bracelet, ExposedArea: 0.5, NetMass: 12, Utilisation: 0.8}
	near(t, "bracelet of known area", ResistanceAt(area, 0.25, 0.8), ShortFlush(0.25, 0.5), 1e-12)
}

// The length stops shrinking at the utilisation factor; a new rod that is
// short for its radius keeps its formula.
func TestWastingRod(t *testing.T) {
	rod := &hull.Pattern{Alloy: hull.Aluminium, Shape: hull.LongSlender, Length: 2, Radius: 0.09, Standoff: 0.3, NetMass: 137.41326, Utilisation: 0.9}
	near(t, "half gone", ResistanceAt(rod, 0.25, 0.5),
		LongSlender(0.25, 2*(1-0.1*0.5/0.9), 0.09*math.Sqrt(0.5/(1-0.1*0.5/0.9))), 1e-8)
	near(t, "95 % gone", ResistanceAt(rod, 0.25, 0.95), LongSlender(0.25, 1.8, 0.09*math.Sqrt(0.05/0.9)), 1e-8)
	stub := &hull.Pattern{Alloy: hull.Aluminium, Shape: hull.ShortSlender, Length: 0.38, Radius: 0.1, Standoff: 0.3, NetMass: 32, Utilisation: 0.85}
	near(t, "stub", ResistanceAt(stub, 0.25, 0.8),
		ShortSlender(0.25, 0.38*(1-0.08/0.85), 0.1*math.Sqrt(0.2/(1-0.08/0.85))), 1e-12)
}

// Cable and connection of a pod: in series, new and worn.
func TestSeriesResistance(t *testing.T) {
	p := &hull.Pattern{Alloy: hull.Aluminium, Shape: hull.LongSlender, Length: 2, Radius: 0.1, Standoff: 0.5, NetMass: 150, Utilisation: 0.9}
	isNew, worn := ResistanceNew(p, 0.25), ResistanceWorn(p, 0.25)
	p.SeriesResist = 0.02
	near(t, "R of the casting", ResistanceNew(p, 0.25), isNew, 1e-15)
	near(t, "new", OutputNew(p, hull.Seawater, 0.25, 1), 0.25/(isNew+0.02), 1e-12)
	near(t, "worn", OutputWorn(p, hull.Seawater, 0.25, 0.8), 0.8*0.25/(worn+0.02), 1e-12)
	found := false
	for _, s := range Explain(p, hull.Seawater, 0.25, 1) {
		found = found || s.Unit == "ohm" && s.Value == 0.02
	}
	if !found {
		t.Error("the trace does not name cable and connection")
	}
}

// Life of one anode: m C u/(8760 I).
func TestLife(t *testing.T) {
	p := &hull.Pattern{Alloy: hull.Aluminium, Shape: hull.Stated, NetMass: 45, Utilisation: 0.85}
	near(t, "new", LifeYears(p, hull.Seawater, 0.5, 0), 45*2000*0.85/8760/0.5, 1e-12)
	near(t, "half used", LifeYears(p, hull.Seawater, 0.5, 0.425), 45*2000*0.425/8760/0.5, 1e-12)
	near(t, "spent", LifeYears(p, hull.Seawater, 0.5, 0.9), 0, 0)
}

func BenchmarkShape(b *testing.B) {
	p := &hull.Pattern{Alloy: hull.Aluminium, Shape: hull.LongSlender, Length: 2, Radius: 0.1, Standoff: 0.3, NetMass: 150, Utilisation: 0.9}
	shape, sum := ShapeOf(p), 0.0
	for b.Loop() {
		sum += shape(0.3)
	}
	if sum <= 0 {
		b.Fatal(fmt.Sprint(sum))
	}
}

// What is left of the dimensions makes the volume that is left.
func TestLeft(t *testing.T) {
	rod := &hull.Pattern{Alloy: hull.Aluminium, Shape: hull.LongSlender, Length: 2, Radius: 0.09, NetMass: 100, Utilisation: 0.9}
	length, width, height := Left(rod, 0.6)
	near(t, "length", length, 1-0.1*0.6/0.9, 1e-12)
	near(t, "volume", length*width*height, 0.4, 1e-12)
	block := &hull.Pattern{Alloy: hull.Aluminium, Shape: hull.ShortFlush, Length: 0.3, Width: 0.15, Height: 0.1, NetMass: 12, Utilisation: 0.8}
	length, width, height = Left(block, 0.6)
	near(t, "height", height, 0.4, 1e-12)
	near(t, "face", length*width, 1, 1e-12)
	if l, w, h := Left(&hull.Pattern{Shape: hull.Stated}, 0.5); l*w*h != 1 {
		t.Error("a stated shape has dimensions")
	}
}

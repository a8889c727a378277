package anodes

import (
	"math"
	"testing"

	"anodewright/hull"
)

// Every casting of the library is valid in an asset, is what its dimensions
// make, has the proportions of its formula, and gives less worn than new.
func TestLibrary(t *testing.T) {
	ps := Library()
	if len(ps) < 20 {
		t.Fatalf("%d patterns", len(ps))
	}
	a := &hull.Asset{Patterns: ps}
	for _, f := range hull.Check(a) {
		if len(f.Path) > 9 && f.Path[:9] == "patterns[" {
			t.Error(f)
		}
	}
	for i := range ps {
		p := &ps[i]
		if why := CastingFault(p); why != "" {
			t.Errorf("%s: %s", p.ID, why)
		}
		if _, ok := GeometryMass(p); !ok && p.Shape != hull.Stated {
			t.Errorf("%s: its dimensions make no mass", p.ID)
		}
		if p.Shape == hull.LongFlush && p.Length < 4*max(p.Width, p.Height) {
			t.Errorf("%s is no long flush anode", p.ID)
		}
		if p.Shape == hull.LongSlender && p.Length < 4*p.Radius {
			t.Errorf("%s is no long slender anode", p.ID)
		}
		if isNew, worn := OutputNew(p, hull.Seawater, 0.25, 1), OutputWorn(p, hull.Seawater, 0.25, 1); !(worn < isNew && worn > 0.3*isNew) {
			t.Errorf("%s gives %g A new and %g A worn", p.ID, isNew, worn)
		}
		if p.Price <= 0 || p.Name == "" || p.Gross() <= p.NetMass {
			t.Errorf("%s: price %g, name %q, gross %g kg", p.ID, p.Price, p.Name, p.Gross())
		}
	}
}

// Nobody can change the library through what it returns.
func TestLibraryIsACopy(t *testing.T) {
	Library()[0].ID = "changed"
	if got := Library()[0].ID; got == "changed" {
		t.Error("the library is changed")
	}
}

func TestCopyTakesAFreeID(t *testing.T) {
	own := 1900.0
	a := &hull.Asset{Patterns: []hull.Pattern{{ID: "slab"}, {ID: "slab-2"}}}
	p := Copy(a, hull.Pattern{ID: "slab", Capacity: &own})
	if p.ID != "slab-3" || p.Capacity == &own || *p.Capacity != own {
		t.Errorf("%+v", p)
	}
	if p := Copy(a, hull.Pattern{ID: "rod"}); p.ID != "rod" {
		t.Errorf("%s", p.ID)
	}
}

// Masses by hand: volume less insert, times 2700 or 7140 kg/m3.
func TestGeometryMass(t *testing.T) {
	for _, c := range []struct {
		p    hull.Pattern
		want float64
	}{
		{hull.Pattern{Alloy: hull.Aluminium, Shape: hull.LongFlush, Length: 1, Width: 0.15, Height: 0.12, InsertVolume: 0.0006}, 0.0174 * 2700},
		{hull.Pattern{Alloy: hull.Aluminium, Shape: hull.LongSlender, Length: 2, Radius: 0.09}, 137.41326},
		{hull.Pattern{Alloy: hull.Aluminium, Shape: hull.LongSlender, Length: 2, Girth: 2 * math.Pi * 0.09}, 137.41326},
		{hull.Pattern{Alloy: hull.Zinc, Shape: hull.SoilRod, Length: 1, Diameter: 0.05}, math.Pi / 4 * 0.0025 * 7140},
		// A closed ring of 0.3 m inside and 0.4 m outside diameter.
		{hull.Pattern{Alloy: hull.Aluminium, Shape: hull.Bracelet, Length: 0.5, Width: 0.3 * math.Pi, Height: 0.05, ExposedArea: 0.4 * math.Pi * 0.5}, math.Pi / 4 * 0.07 * 0.5 * 2700},
	} {
		got, ok := GeometryMass(&c.p)
		if !ok {
			t.Errorf("%s: no mass", c.p.Shape)
		}
		near(t, string(c.p.Shape), got, c.want, 1e-7)
	}
	if _, ok := GeometryMass(&hull.Pattern{Shape: hull.Stated, Length: 1, Width: 1, Height: 1}); ok {
		t.Error("a stated shape has a mass")
	}
	slab := hull.Pattern{Alloy: hull.Aluminium, Shape: hull.LongFlush, Length: 1, Width: 0.1, Height: 0.1, NetMass: 29.6}
	if why := CastingFault(&slab); why != "" {
		t.Errorf("29.6 for 27 kg: %s", why)
	}
	if slab.NetMass = 30; CastingFault(&slab) == "" {
		t.Error("30 for 27 kg is not questioned")
	}
}

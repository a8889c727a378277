package anodes

import (
	"math"
	"testing"

	"anodewright/hull"
)

func near(t *testing.T, what string, got, want, rel float64) {
	t.Helper()
	if math.IsNaN(got) || math.Abs(got-want) > rel*math.Abs(want) {
		t.Errorf("%s: got %.9g, want %.9g", what, got, want)
	}
}

// A long flush slab wasted to its utilisation factor, recomputed from the
// rule of DNV-RP-B401 7.9: half cylinder of 0.9 L.
func TestWornSlab(t *testing.T) {
	p := &hull.Pattern{Alloy: hull.Aluminium, Shape: hull.LongFlush, Length: 1, Width: 0.15, NetMass: 45, InsertVolume: 0.0006, Utilisation: 0.85}
	near(t, "R new", ResistanceNew(p, 0.25), 0.217391, 5e-6)
	near(t, "R worn", ResistanceWorn(p, 0.25), 0.251596, 5e-6)
	near(t, "output new", OutputNew(p, hull.Seawater, 0.25, 1), 1.15, 1e-12)
	near(t, "output worn", OutputWorn(p, hull.Seawater, 0.25, 1), 0.993655, 1e-6)
}

func TestStandoffRule(t *testing.T) {
	p := &hull.Pattern{Alloy: hull.Aluminium, Shape: hull.LongSlender, Length: 2, Radius: 0.1, NetMass: 150, Utilisation: 0.9, Standoff: 0.3}
	far := ResistanceNew(p, 0.25)
	near(t, "0.30 m", far, 0.0672833, 1e-6)
	p.Standoff = 0.2
	near(t, "0.20 m", ResistanceNew(p, 0.25), 1.3*far, 1e-12)
	p.Standoff = 0.1
	near(t, "0.10 m", ResistanceNew(p, 0.25), LongFlush(0.25, 2, 0.2), 1e-12)
	// Worn as a long flush anode too: a half circle of 0.1*150/2700/1.8 m2.
	width := 2 * math.Sqrt(2*0.1*150/2700/1.8/math.Pi)
	near(t, "0.10 m, worn", ResistanceWorn(p, 0.25), LongFlush(0.25, 1.8, width), 1e-12)
}

func TestGirthIsRadius(t *testing.T) {
	p := &hull.Pattern{Alloy: hull.Aluminium, Shape: hull.LongSlender, Length: 2, Girth: 2 * math.Pi * 0.1, NetMass: 150, Utilisation: 0.9, Standoff: 0.3}
	near(t, "R", ResistanceNew(p, 0.25), 0.0672833, 1e-6)
}

func TestRefusals(t *testing.T) {
	flash, high, low := 40.0, 3.0, 1.0
	hot := 55.0
	a := &hull.Asset{Waters: []hull.Water{{ID: "w", Temperature: &hot}}}
	al := &hull.Pattern{Alloy: hull.Aluminium, NetMass: 18, GrossMass: 20}
	mg := &hull.Pattern{Alloy: hull.Magnesium, NetMass: 18}
	zn := &hull.Pattern{Alloy: hull.Zinc, NetMass: 18}
	for _, c := range []struct {
		what    string
		z       hull.Zone
		p       *hull.Pattern
		refused bool
	}{
		{"aluminium high beside cargo", hull.Zone{BesideFlashPoint: &flash, DropHeight: &high}, al, true},
		{"aluminium low beside cargo", hull.Zone{BesideFlashPoint: &flash, DropHeight: &low}, al, false},
		{"aluminium high, no cargo", hull.Zone{DropHeight: &high}, al, false},
		{"magnesium in cargo tank", hull.Zone{FlashPoint: &flash}, mg, true},
		{"magnesium on high-strength steel", hull.Zone{Surface: hull.HighStrength}, mg, true},
		{"zinc in hot water", hull.Zone{Waters: []hull.WaterShare{{Water: "w", Share: 1}}}, zn, true},
		{"zinc in water of no temperature", hull.Zone{}, zn, false},
	} {
		if got := Refused(a, &c.z, c.p); (got != "") != c.refused {
			t.Errorf("%s: refused %q", c.what, got)
		}
	}
	near(t, "drop height of 20 kg", MaxDropHeight(al), 1.40163, 1e-5)
}

package plan_test

import (
	"slices"
	"strings"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/hull"
)

// Brackish water is told where the zone's own anodes lie in it at any time, a
// change of trade included, and not at steel that carries none.
func TestBrackishWaterOfAServiceChange(t *testing.T) {
	a := bare(t)
	w, salinity := a.Waters[0], 7.0
	w.ID, w.Salinity = "estuary", &salinity
	a.Waters = append(a.Waters, w)
	a.Zones[0].Service = []hull.Service{{From: hull.NewDate(2028, 1, 1), Waters: []hull.WaterShare{{Water: "estuary", Share: 1}}}}
	if ids := at(a, 0); !slices.Contains(ids, "brackish") {
		t.Errorf("a later trade in brackish water raises only %v", ids)
	}
	if ids := at(a, 1); slices.Contains(ids, "brackish") {
		t.Errorf("raised at the zone that stays at sea too")
	}
	a.Zones[0].Fitted, a.Zones[0].HeldBy = nil, "other"
	if ids := at(a, 0); slices.Contains(ids, "brackish") {
		t.Errorf("raised at a zone without anodes: %v", ids)
	}
}

// Every refusal names the document that it rests on.
func TestRefusalsNameTheirSource(t *testing.T) {
	f := func(x float64) *float64 { return &x }
	for _, c := range []struct {
		alloy  hull.Alloy
		cause  func(z *hull.Zone)
		source string
	}{
		{hull.Aluminium, func(z *hull.Zone) { z.FlashPoint, z.DropHeight = f(40), f(9) }, "Structural"},
		{hull.Magnesium, func(z *hull.Zone) { z.BesideFlashPoint = f(40) }, "Structural"},
		{hull.Magnesium, func(z *hull.Zone) { z.Yield = f(690) }, "LR Rules for Offshore Units"},
		{hull.Zinc, func(z *hull.Zone) { z.InsideTemperature = f(50) }, "reversal"},
	} {
		a := bare(t)
		p := a.Patterns[0]
		p.ID, p.Alloy = "other", c.alloy
		a.Patterns = append(a.Patterns, p)
		a.Zones[0].Patterns, a.Zones[0].Fitted = []string{"other"}, nil
		c.cause(&a.Zones[0])
		found := false
		for _, caution := range plan.Compute(a, hull.NewDate(2026, 12, 1)).Cautions {
			if caution.ID == "refused" && caution.Zone == 0 {
				found = true
				if !strings.Contains(caution.Source, c.source) || caution.Confidence == "" {
					t.Errorf("%s: %s: source %q, %q", c.alloy, caution.Text, caution.Source, caution.Confidence)
				}
			}
		}
		if !found {
			t.Errorf("%s is not refused", c.alloy)
		}
	}
}

// A coat of zinc under water that is counted by the losses of an atmosphere.
func TestCoatClassOfTheWrongMedium(t *testing.T) {
	for _, c := range []struct {
		class  hull.ExposureClass
		share  float64
		raised bool
	}{{"C5", 1, true}, {"C5", 0.3, false}, {"immersed-temperate", 1, false}} {
		a := bare(t)
		p := &hull.Protection{}
		hull.SetDefaults(p)
		p.Kind, p.Thickness, p.Class = hull.ZincCoat, 85, c.class
		a.Zones[0].Fitted, a.Zones[0].Protection, a.Zones[0].ImmersedShare = nil, p, c.share
		if faults := hull.Check(a); len(faults) > 0 {
			t.Fatal(faults)
		}
		if got := slices.Contains(at(a, 0), "coat-class"); got != c.raised {
			t.Errorf("%s, immersed share %g: raised %v", c.class, c.share, got)
		}
		if slices.Contains(at(a, 1), "coat-class") {
			t.Errorf("%s: raised at the zone without a coat", c.class)
		}
	}
}

package hull_test

import (
	"fmt"
	"testing"

	"anodewright/hull"
)

// bareDensities is what a change of the vessel's zone, of bare steel, asks for
// in mA/m2 in the first interval.
func bareDensities(t *testing.T, change func(a *hull.Asset, z *hull.Zone)) hull.Densities {
	t.Helper()
	a := vessel()
	z := &a.Zones[0]
	z.Coating.Category = hull.CategoryNone
	change(a, z)
	d := demands(t, a)[0].Own[0].Times(1000 / z.WettedArea)
	return hull.Densities(d)
}

func expect(t *testing.T, what string, got hull.Densities, initial, mean, final float64) {
	t.Helper()
	near(t, what+", initial", got.Initial, initial)
	near(t, what+", mean", got.Mean, mean)
	near(t, what+", final", got.Final, final)
}

// The tables of DNV-RP-B401 by climate and depth, each band with its limit in
// it.
func TestCodeDensities(t *testing.T) {
	depths := [][]float64{{0, 30}, {30.01, 100}, {100.01, 300}, {300.01, 12000}}
	temperatures := [][]float64{{20.01, 30}, {12, 20}, {7, 11.99}, {-1.5, 6.99}}
	table := [4][4][3]float64{ // by climate, warmest first, and band
		{{150, 70, 100}, {120, 60, 80}, {140, 70, 90}, {180, 90, 130}},
		{{170, 80, 110}, {140, 70, 90}, {160, 80, 110}, {200, 100, 150}},
		{{200, 100, 130}, {170, 80, 110}, {190, 90, 140}, {220, 110, 170}},
		{{250, 120, 170}, {200, 100, 130}, {220, 110, 170}, {220, 110, 170}},
	}
	for c := range temperatures {
		for b := range depths {
			for _, temperature := range temperatures[c] {
				for _, depth := range depths[b] {
					got := bareDensities(t, func(a *hull.Asset, z *hull.Zone) { a.Waters[0], z.Depth = sea("sea", temperature), depth })
					x := table[c][b]
					expect(t, fmt.Sprintf("%g degC, %g m", temperature, depth), got, x[0], x[1], x[2])
				}
			}
		}
	}
}

// A class goes by the temperature of the surface, where it is given.
func TestClimateLimits(t *testing.T) {
	for temperature, want := range map[float64]string{
		20: "sub-tropical", 20.0001: "tropical", 12: "sub-tropical", 11.9999: "temperate", 7: "temperate", 6.9999: "arctic", -1: "arctic",
	} {
		w := sea("sea", 4)
		w.SurfaceTemperature = &temperature
		if got := w.Climate(); got != want {
			t.Errorf("%g degC: %s, want %s", temperature, got, want)
		}
		w = sea("sea", temperature)
		if got := w.Climate(); got != want {
			t.Errorf("%g degC in the water: %s, want %s", temperature, got, want)
		}
	}
	if got := (&hull.Water{Medium: hull.Sediment, Resistivity: ptr(1.0)}).Climate(); got != "" {
		t.Errorf("water of no temperature has the climate %q", got)
	}
}

// Surfaces and media of their own figures, in temperate water.
func TestOtherDensities(t *testing.T) {
	medium := func(m hull.Medium) func(a *hull.Asset, z *hull.Zone) {
		return func(a *hull.Asset, z *hull.Zone) { a.Waters[0].Medium = m }
	}
	for _, c := range []struct {
		what                 string
		change               func(a *hull.Asset, z *hull.Zone)
		initial, mean, final float64
	}{
		{"sediment", medium(hull.Sediment), 20, 20, 20},
		{"soil", medium(hull.Soil), 20, 20, 20},
		{"fresh water, as the sea", medium(hull.Fresh), 200, 100, 130},
		{"copper alloy, as bare steel", func(a *hull.Asset, z *hull.Zone) { z.Surface = hull.CopperAlloy }, 200, 100, 130},
		{"sprayed aluminium", func(a *hull.Asset, z *hull.Zone) { z.Surface = hull.SprayedAluminium }, 10, 10, 10},
		{"galvanised", func(a *hull.Asset, z *hull.Zone) { z.Surface = hull.Galvanised }, 10, 10, 10},
		{"own", func(a *hull.Asset, z *hull.Zone) { z.OwnDensities = &hull.Densities{Initial: 3, Mean: 1, Final: 2} }, 3, 1, 2},
		{"own, heated", func(a *hull.Asset, z *hull.Zone) {
			z.OwnDensities, z.InsideTemperature = &hull.Densities{Initial: 3, Mean: 1, Final: 2}, ptr(60.0)
		}, 3, 1, 2},
		{"heated to 25 degC", func(a *hull.Asset, z *hull.Zone) { z.InsideTemperature = ptr(25.0) }, 200, 100, 130},
		{"heated to 60 degC", func(a *hull.Asset, z *hull.Zone) { z.InsideTemperature = ptr(60.0) }, 235, 135, 165},
		{"cold inside", func(a *hull.Asset, z *hull.Zone) { z.InsideTemperature = ptr(-20.0) }, 200, 100, 130},
		{"heated in sediment", func(a *hull.Asset, z *hull.Zone) { a.Waters[0].Medium, z.InsideTemperature = hull.Sediment, ptr(60.0) }, 55, 55, 55},
		{"sprayed and heated", func(a *hull.Asset, z *hull.Zone) { z.Surface, z.InsideTemperature = hull.SprayedAluminium, ptr(60.0) }, 17, 17, 17},
		{"flooded compartment, as 30 to 100 m", func(a *hull.Asset, z *hull.Zone) { z.Compartment = hull.FreeFlooded }, 170, 80, 110},
		{"sealed compartment", func(a *hull.Asset, z *hull.Zone) { z.Compartment = hull.Sealed }, 0, 0, 0},
		{"under way", func(a *hull.Asset, z *hull.Zone) { z.UnderWayFactor = 1.5 }, 300, 150, 195},
		{"half of the time immersed", func(a *hull.Asset, z *hull.Zone) { z.ImmersedShare = 0.5 }, 200, 50, 130},
		{"a nobler metal of half the area", func(a *hull.Asset, z *hull.Zone) { z.Nobler = &hull.Nobler{Metal: "copper", Area: 50} }, 300, 150, 195},
		{"two waters", func(a *hull.Asset, z *hull.Zone) {
			a.Waters = append(a.Waters, sea("south", 25))
			z.Waters = []hull.WaterShare{{Water: "sea", Share: 0.6}, {Water: "south", Share: 0.4}}
		}, 180, 88, 118},
	} {
		expect(t, c.what, bareDensities(t, c.change), c.initial, c.mean, c.final)
	}
}

// Reinforcement draws less in the cold, and by two depths only.
func TestRebarDensities(t *testing.T) {
	for _, c := range []struct{ temperature, shallow, deep float64 }{{25, 2.5, 2}, {15, 1.5, 1}, {10, 1, 0.8}, {3, 0.8, 0.6}} {
		for depth, want := range map[float64]float64{0: c.shallow, 30: c.shallow, 30.01: c.deep, 1000: c.deep} {
			got := bareDensities(t, func(a *hull.Asset, z *hull.Zone) {
				a.Waters[0], z.Surface, z.Depth = sea("sea", c.temperature), hull.Reinforcement, depth
			})
			expect(t, fmt.Sprintf("%g degC, %g m", c.temperature, depth), got, want, want, want)
		}
	}
}

// The class rule by sea area; other water than the sea, and the bare steel of
// ship practice, stay with the code.
func TestSeaAreas(t *testing.T) {
	for name, x := range map[string][3]float64{
		"Cook Inlet": {400, 400, 400}, "North Sea above 62N": {220, 100, 130}, "North Sea 55N-62N": {180, 90, 120},
		"NORTH SEA BELOW 55N": {150, 80, 100}, "mud, most places": {25, 20, 20},
	} {
		for _, byID := range []bool{false, true} {
			got := bareDensities(t, func(a *hull.Asset, z *hull.Zone) {
				a.Basis.Densities = hull.SeaArea
				if a.Waters[0].Name = name; byID {
					a.Waters[0].Name, a.Waters[0].ID, z.Waters[0].Water = "", name, name
				}
			})
			expect(t, name, got, x[0], x[1], x[2])
		}
	}
	got := bareDensities(t, func(a *hull.Asset, z *hull.Zone) {
		a.Basis.Densities = hull.SeaArea
		a.Waters[0].Name, a.Waters[0].Medium = "Cook Inlet", hull.Fresh
	})
	expect(t, "fresh water", got, 200, 100, 130)
}

// Ship practice counts where there is paint in the sea and no own figure.
func TestWhereShipPracticeApplies(t *testing.T) {
	for what, c := range map[string]struct {
		change  func(a *hull.Asset, z *hull.Zone)
		applies bool
	}{
		"paint in the sea": {func(a *hull.Asset, z *hull.Zone) {}, true},
		"bare steel":       {func(a *hull.Asset, z *hull.Zone) { z.Coating.Category = hull.CategoryNone }, false},
		"own densities":    {func(a *hull.Asset, z *hull.Zone) { z.OwnDensities = &hull.Densities{Initial: 150, Mean: 70, Final: 90} }, false},
		"fresh water":      {func(a *hull.Asset, z *hull.Zone) { a.Waters[0].Medium = hull.Fresh }, false},
		"mud":              {func(a *hull.Asset, z *hull.Zone) { a.Waters[0].Medium = hull.Sediment }, false},
	} {
		a := vessel()
		c.change(a, &a.Zones[0])
		code := demands(t, a)[0].Own[1]
		practice := hull.DemandBy(a, hull.HullPractice)[0].Own[1]
		if got := hull.PracticeApplies(a, &a.Zones[0]); got != c.applies {
			t.Errorf("%s: applies %v", what, got)
		}
		if (practice == code) == c.applies {
			t.Errorf("%s: by the code %v, by practice %v", what, code, practice)
		}
	}
}

// Wells and drains come on top of all three currents, whatever the way or the
// share immersed.
func TestWellsAndDrains(t *testing.T) {
	a := vessel()
	plain := demands(t, a)[0].Own
	a.Zones[0].Wells, a.Zones[0].Drains = 3, 2.5
	for k, d := range demands(t, a)[0].Own {
		near(t, "initial", d.Initial-plain[k].Initial, 17.5)
		near(t, "mean", d.Mean-plain[k].Mean, 17.5)
		near(t, "final", d.Final-plain[k].Final, 17.5)
	}
	a.Zones[0].ImmersedShare, a.Zones[0].UnderWayFactor = 0.5, 2
	for k, d := range demands(t, a)[0].Own {
		near(t, "initial under way", d.Initial, 2*plain[k].Initial+17.5)
		near(t, "mean of half the time", d.Mean, plain[k].Mean+17.5)
	}
}

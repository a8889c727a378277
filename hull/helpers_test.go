package hull_test

import (
	"math"
	"testing"

	"anodewright/hull"
)

func on(s string) hull.Date {
	d, err := hull.ParseDate(s)
	if err != nil {
		panic(err)
	}
	return d
}

func ptr[T any](x T) *T { return &x }

// made returns a value with the meaning of absent fields.
func made[T any](fill func(*T)) T {
	var x T
	hull.SetDefaults(&x)
	fill(&x)
	return x
}

// sea is seawater of a surface temperature.
func sea(id string, temperature float64) hull.Water {
	return made(func(w *hull.Water) { w.ID, w.Temperature, w.Salinity = id, ptr(temperature), ptr(34.5) })
}

// steel is a zone of 100 m2 of carbon steel with a coating of category III in
// the water "sea".
func steel(id string) hull.Zone {
	return made(func(z *hull.Zone) {
		z.ID, z.Name, z.Region, z.Surface = id, "Zone "+id, "vertical-side", hull.CarbonSteel
		z.WettedArea, z.Depth = 100, 6
		z.Coating.Category = hull.CategoryIII
		z.Waters = []hull.WaterShare{{Water: "sea", Share: 1}}
	})
}

// vessel is a valid asset: one zone, "side", in temperate seawater, one
// pattern, dockings three and five years after the last one, on 2024-03-15,
// when the coating was new, and the horizon after ten.
func vessel() *hull.Asset {
	a := made(func(a *hull.Asset) {
		a.Name, a.Kind = "Vessel", hull.Ship
		a.InService, a.LastDocking, a.Horizon = on("2016-04-12"), on("2024-03-15"), on("2034-03-15")
		a.Waters = []hull.Water{sea("sea", 10)}
		z := steel("side")
		z.Coating.Applied = a.LastDocking
		a.Zones = []hull.Zone{z}
		a.Patterns = []hull.Pattern{made(func(p *hull.Pattern) {
			p.ID, p.Alloy, p.Shape = "slab", hull.Aluminium, hull.LongFlush
			p.Length, p.Width, p.NetMass, p.Utilisation, p.Price = 1, 0.15, 45, 0.85, 310
		})}
		for _, d := range []string{"2027-03-15", "2029-03-15"} {
			a.Dockings = append(a.Dockings, made(func(x *hull.Docking) { x.Date = on(d) }))
		}
	})
	return &a
}

// near fails where a figure is off by more than a relative 1e-9.
func near(t *testing.T, what string, got, want float64) {
	t.Helper()
	if math.IsNaN(got) || math.Abs(got-want) > 1e-9*math.Max(math.Abs(want), 1e-3) {
		t.Errorf("%s: got %.12g, want %.12g", what, got, want)
	}
}

// demands is the demand of a valid asset's zones.
func demands(t *testing.T, a *hull.Asset) []hull.ZoneDemand {
	t.Helper()
	if faults := hull.Check(a); len(faults) > 0 {
		t.Fatalf("the asset of the test is at fault:\n%v", faults)
	}
	return hull.Demand(a)
}

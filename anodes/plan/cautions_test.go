package plan_test

import (
	"slices"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// bare is an asset that raises no caution at its zones: two painted zones in
// seawater with anodes that last, no ship.
func bare(t *testing.T) *hull.Asset {
	t.Helper()
	a, err := assetfile.Read("../../testdata/assets/tern-passage.json")
	if err != nil {
		t.Fatal(err)
	}
	a.Kind = hull.Harbour
	a.Readings = nil
	z := assetfile.Clone(a).Zones[0]
	z.ID, z.Name, z.Region, z.Circuit = "other", "Other", "caisson", ""
	a.Zones[0].Region = "sheet-piling"
	a.Zones = []hull.Zone{a.Zones[0], z}
	return a
}

// at returns the ids of the cautions raised at a zone, -1 for the asset.
func at(a *hull.Asset, zone int) []string {
	var ids []string
	for _, c := range plan.Compute(a, hull.NewDate(2026, 12, 1)).Cautions {
		if c.Zone == zone {
			ids = append(ids, c.ID)
		}
	}
	return ids
}

func TestNoCautionWithoutCause(t *testing.T) {
	a := bare(t)
	for zone := -1; zone < len(a.Zones); zone++ {
		if ids := at(a, zone); len(ids) > 0 {
			t.Errorf("zone %d raises %v", zone, ids)
		}
	}
}

// Every rule fires on the zone with its cause and on no other.
func TestCautionsFireWhereTheyShould(t *testing.T) {
	f := func(x float64) *float64 { return &x }
	alloy := func(a *hull.Asset, id string, alloy hull.Alloy) {
		p := a.Patterns[0]
		p.ID, p.Alloy = id, alloy
		a.Patterns = append(a.Patterns, p)
		a.Zones[0].Patterns = []string{id}
		a.Zones[0].Fitted = nil
	}
	cases := map[string]func(a *hull.Asset){
		"refused":             func(a *hull.Asset) { a.Zones[0].FlashPoint, a.Zones[0].DropHeight = f(40), f(9) },
		"tank-approval":       func(a *hull.Asset) { a.Zones[0].BesideFlashPoint, a.Zones[0].DropHeight = f(40), f(0.5) },
		"drop-energy":         func(a *hull.Asset) { a.Zones[0].BesideFlashPoint, a.Zones[0].DropHeight = f(40), f(0.5) },
		"drop-height-missing": func(a *hull.Asset) { a.Zones[0].FlashPoint = f(59) },
		"tank-gas":            func(a *hull.Asset) { a.Zones[0].Region = "ballast-tank" },
		"tank-fixing":         func(a *hull.Asset) { a.Zones[0].Region = "cargo-tank" },
		"fuel-behind":         func(a *hull.Asset) { a.Zones[0].FuelBehind = true },
		"high-strength":       func(a *hull.Asset) { a.Zones[0].Yield = f(690) },
		"hot-zinc":            func(a *hull.Asset) { alloy(a, "zn", hull.Zinc); a.Zones[0].InsideTemperature = f(45) },
		"magnesium":           func(a *hull.Asset) { alloy(a, "mg", hull.Magnesium) },
		"disbonding":          func(a *hull.Asset) { alloy(a, "mg", hull.Magnesium) },
		"inflow":              func(a *hull.Asset) { a.Zones[0].Region = "stern" },
		"unbonded":            func(a *hull.Asset) { a.Zones[0].Bonded = false },
		"divers": func(a *hull.Asset) {
			p := &hull.Protection{}
			hull.SetDefaults(p)
			p.Kind, p.Anode = hull.ImpressedCurrent, "mixed-oxide"
			a.Zones[0].Fitted, a.Zones[0].Protection = nil, p
		},
		"brackish": func(a *hull.Asset) {
			w := a.Waters[0]
			w.ID, w.Salinity = "baltic", f(7)
			a.Waters = append(a.Waters, w)
			a.Zones[0].Waters = []hull.WaterShare{{Water: "baltic", Share: 1}}
		},
		"soil-density": func(a *hull.Asset) {
			w := a.Waters[0]
			w.ID, w.Medium, w.Resistivity = "clay", hull.Soil, f(20)
			a.Waters = append(a.Waters, w)
			a.Zones[0].Waters = []hull.WaterShare{{Water: "clay", Share: 1}}
		},
		"held-by-coat": func(a *hull.Asset) {
			p := &hull.Protection{}
			hull.SetDefaults(p)
			p.Kind, p.Thickness, p.Class = hull.ZincCoat, 85, "immersed-temperate"
			a.Zones[0].Fitted, a.Zones[0].HeldBy = nil, "coated"
			coated := assetfile.Clone(a).Zones[1]
			coated.ID, coated.Name, coated.Fitted, coated.Protection = "coated", "Coated", nil, p
			a.Zones = append(a.Zones, coated)
		},
		"before-docking": func(a *hull.Asset) { a.Zones[0].Fitted[0].Count = 1 },
	}
	for id, cause := range cases {
		a := bare(t)
		cause(a)
		if faults := hull.Check(a); len(faults) > 0 {
			t.Fatalf("%s: %v", id, faults)
		}
		if ids := at(a, 0); !slices.Contains(ids, id) {
			t.Errorf("%s: not raised, only %v", id, ids)
		}
		if ids := at(a, 1); slices.Contains(ids, id) {
			t.Errorf("%s: raised at the zone without the cause too", id)
		}
	}
}

// The limits are where they should be: at them nothing fires.
func TestCautionLimits(t *testing.T) {
	f := func(x float64) *float64 { return &x }
	a := bare(t)
	a.Zones[0].FlashPoint, a.Zones[0].Yield, a.Zones[0].InsideTemperature = f(60), f(550), f(40)
	for _, id := range at(a, 0) {
		if id == "tank-approval" || id == "drop-energy" || id == "high-strength" || id == "hot-zinc" {
			t.Errorf("%s fires at its limit", id)
		}
	}
}

func TestAssetCautions(t *testing.T) {
	f := func(x float64) *float64 { return &x }
	for id, cause := range map[string]func(a *hull.Asset){
		"berth":           func(a *hull.Asset) { a.Kind = hull.FloatingUnit },
		"practice":        func(a *hull.Asset) { a.Kind = hull.Ship },
		"alloy-potential": func(a *hull.Asset) { a.Patterns[0].Potential = f(-1.03) },
		"casting":         func(a *hull.Asset) { a.Patterns[0].NetMass, a.Patterns[0].GrossMass = 60, 64 },
		"late":            func(a *hull.Asset) { a.Today = hull.NewDate(2027, 2, 1) },
		"mixed-alloys": func(a *hull.Asset) {
			zn := a.Patterns[0]
			zn.ID, zn.Alloy = "zn", hull.Zinc
			a.Patterns = append(a.Patterns, zn)
			a.Zones[1].Fitted[0].Pattern, a.Zones[1].Patterns, a.Zones[1].Circuit = "zn", []string{"zn"}, a.Zones[0].Circuit
		},
	} {
		a := bare(t)
		cause(a)
		if ids := at(a, -1); !slices.Contains(ids, id) {
			t.Errorf("%s: not raised, only %v", id, ids)
		}
	}
}

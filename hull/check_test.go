package hull_test

import (
	"math"
	"testing"

	"anodewright/hull"
)

func TestValidAssetHasNoFault(t *testing.T) {
	if faults := hull.Check(vessel()); len(faults) > 0 {
		t.Errorf("faults:\n%v", faults)
	}
	if hull.Check(vessel()).Err() != nil {
		t.Error("no fault is an error")
	}
}

// Every rule raises its fault at its field, and no other.
func TestFaults(t *testing.T) {
	second := func(a *hull.Asset, change func(*hull.Zone)) {
		z := steel("other")
		change(&z)
		a.Zones = append(a.Zones, z)
	}
	pattern := func(p hull.Pattern) func(*hull.Asset) {
		return func(a *hull.Asset) {
			q := a.Patterns[0]
			q.Shape, q.Length, q.Width = p.Shape, p.Length, p.Width
			q.Height, q.Radius, q.Diameter, q.ShapeFactor, q.ExposedArea = p.Height, p.Radius, p.Diameter, p.ShapeFactor, p.ExposedArea
			a.Patterns[0] = q
		}
	}
	work := func(w hull.Work) func(*hull.Asset) {
		return func(a *hull.Asset) { a.Dockings[1].Works = []hull.Work{w} }
	}
	protect := func(p hull.Protection) func(*hull.Asset) {
		return func(a *hull.Asset) { a.Zones[0].Protection = &p }
	}
	reading := func(r hull.Reading) func(*hull.Asset) {
		return func(a *hull.Asset) { r.Date, r.Zone = on("2026-06-01"), "side"; a.Readings = []hull.Reading{r} }
	}
	for _, c := range []struct {
		what, path string
		change     func(a *hull.Asset)
	}{
		// Fields alone.
		{"no name", "name", func(a *hull.Asset) { a.Name = " " }},
		{"unknown kind", "kind", func(a *hull.Asset) { a.Kind = "spaceship" }},
		{"no horizon", "horizon", func(a *hull.Asset) { a.Horizon = 0 }},
		{"no docking", "dockings", func(a *hull.Asset) { a.Dockings = nil }},
		{"area not a number", "zones[0].wetted_area_m2", func(a *hull.Asset) { a.Zones[0].WettedArea = math.NaN() }},
		{"endless area", "zones[0].wetted_area_m2", func(a *hull.Asset) { a.Zones[0].WettedArea = math.Inf(1) }},
		{"no area", "zones[0].wetted_area_m2", func(a *hull.Asset) { a.Zones[0].WettedArea = 0 }},
		{"bare area below nothing", "zones[0].bare_area_m2", func(a *hull.Asset) { a.Zones[0].BareArea = -1 }},
		{"utilisation above 1", "patterns[0].utilisation", func(a *hull.Asset) { a.Patterns[0].Utilisation = 1.01 }},
		{"potential of gold", "patterns[0].potential_v", func(a *hull.Asset) { a.Patterns[0].Potential = ptr(0.2) }},
		{"breakdown above 1", "zones[0].coating.a", func(a *hull.Asset) { a.Zones[0].Coating.A = ptr(1.5) }},
		{"price without end", "patterns[0].price", func(a *hull.Asset) { a.Patterns[0].Price = math.Inf(1) }},
		{"negative discount", "costs.discount_rate", func(a *hull.Asset) { a.Costs.DiscountRate = -0.1 }},
		{"renewal limit of nothing", "basis.renew_above", func(a *hull.Asset) { a.Basis.RenewAbove = 0 }},
		{"confidence of all", "basis.confidence", func(a *hull.Asset) { a.Basis.Confidence = ptr(1.0) }},
		{"half a multiple", "zones[0].count_multiple", func(a *hull.Asset) { a.Zones[0].CountMultiple = 0 }},
		{"stock below nothing", "stock[0].count", func(a *hull.Asset) { a.Stock = []hull.Stock{{Pattern: "slab", Count: -1}} }},

		// Ids.
		{"water twice", "waters[1].id", func(a *hull.Asset) { a.Waters = append(a.Waters, a.Waters[0]) }},
		{"zone twice", "zones[1].id", func(a *hull.Asset) { second(a, func(z *hull.Zone) { z.ID = "side" }) }},
		{"pattern twice", "patterns[1].id", func(a *hull.Asset) { a.Patterns = append(a.Patterns, a.Patterns[0]) }},
		{"zone twice that the first holds", "zones[1].id", func(a *hull.Asset) {
			second(a, func(z *hull.Zone) { z.ID, z.HeldBy = "side", "side" })
		}},
		{"zone without id that holds another", "zones[0].id", func(a *hull.Asset) {
			second(a, func(z *hull.Zone) { z.HeldBy = "side" })
			a.Dockings[1].Works = []hull.Work{{Zone: "side", Coating: hull.Clean}}
			a.Zones[0].ID = ""
		}},
		{"no zones for works and readings", "zones", func(a *hull.Asset) {
			a.Dockings[1].Works = []hull.Work{{Zone: "side", Coating: hull.Clean}}
			a.Readings = []hull.Reading{{Date: on("2026-06-01"), Zone: "side"}}
			a.Zones = nil
		}},
		{"no waters for zones", "waters", func(a *hull.Asset) { a.Waters = nil }},
		{"no patterns for what is fitted", "patterns", func(a *hull.Asset) {
			a.Zones[0].Fitted = []hull.Fitted{{Pattern: "slab", Count: 2, Fitted: a.LastDocking}}
			a.Patterns = nil
		}},
		{"stock of nothing known", "stock[0].pattern", func(a *hull.Asset) { a.Stock = []hull.Stock{{Pattern: "none", Count: 1}} }},

		// Waters.
		{"water of no salinity", "waters[0]", func(a *hull.Asset) { a.Waters[0].Salinity = nil }},
		{"sea without temperature", "waters[0].temperature_c", func(a *hull.Asset) { a.Waters[0].Temperature, a.Waters[0].Resistivity = nil, ptr(0.25) }},
		{"salinity in hot water", "waters[0].temperature_c", func(a *hull.Asset) { a.Waters[0].Temperature = ptr(41.0) }},
		{"no sea area", "waters[0].name", func(a *hull.Asset) { a.Basis.Densities = hull.SeaArea }},

		// Dates.
		{"docked before service", "last_docking", func(a *hull.Asset) { a.LastDocking = on("2016-04-11") }},
		{"horizon at the last docking", "horizon", func(a *hull.Asset) { a.Horizon = a.LastDocking }},
		{"dockings out of order", "dockings[1].date", func(a *hull.Asset) { a.Dockings[1].Date = a.Dockings[0].Date }},
		{"docking at the horizon", "dockings[1].date", func(a *hull.Asset) { a.Dockings[1].Date = a.Horizon }},
		{"docking without a date", "dockings[1].date", func(a *hull.Asset) { a.Dockings[1].Date = 0 }},
		{"service out of order", "service[1].from", func(a *hull.Asset) {
			a.Service = []hull.Service{{From: on("2026-01-01"), UnderWayFactor: ptr(1.1)}, {From: on("2026-01-01"), UnderWayFactor: ptr(1.0)}}
		}},
		{"service that changes nothing", "service[0]", func(a *hull.Asset) { a.Service = []hull.Service{{From: on("2026-01-01")}} }},
		{"service in unknown water", "service[0].waters[0].water", func(a *hull.Asset) {
			a.Service = []hull.Service{{From: on("2026-01-01"), Waters: []hull.WaterShare{{Water: "styx", Share: 1}}}}
		}},
		{"zone's service in another medium", "zones[0].service[0].waters[0].water", func(a *hull.Asset) {
			river := sea("river", 10)
			river.Medium = hull.Fresh
			a.Waters = append(a.Waters, river)
			a.Zones[0].Service = []hull.Service{{From: on("2026-01-01"), Waters: []hull.WaterShare{{Water: "river", Share: 1}}}}
		}},

		// Zones.
		{"more bare than steel", "zones[0].bare_area_m2", func(a *hull.Asset) { a.Zones[0].BareArea = 101 }},
		{"unknown water", "zones[0].waters[0].water", func(a *hull.Asset) { a.Zones[0].Waters[0].Water = "styx" }},
		{"shares short of 1", "zones[0].waters", func(a *hull.Asset) { a.Zones[0].Waters[0].Share = 0.9 }},
		{"two media", "zones[0].waters[1].water", func(a *hull.Asset) {
			mud := sea("mud", 10)
			mud.Medium = hull.Sediment
			a.Waters = append(a.Waters, mud)
			a.Zones[0].Waters = []hull.WaterShare{{Water: "sea", Share: 0.5}, {Water: "mud", Share: 0.5}}
		}},
		{"own coating without a", "zones[0].coating.a", func(a *hull.Asset) { a.Zones[0].Coating = hull.Coating{Category: hull.CategoryOwn, B: ptr(0.1)} }},
		{"own coating without b", "zones[0].coating.b", func(a *hull.Asset) { a.Zones[0].Coating = hull.Coating{Category: hull.CategoryOwn, A: ptr(0.1)} }},
		{"coating of after the last docking", "zones[0].coating.applied", func(a *hull.Asset) { a.Zones[0].Coating.Applied = on("2024-03-16") }},
		{"unknown pattern", "zones[0].patterns[0]", func(a *hull.Asset) { a.Zones[0].Patterns = []string{"none"} }},
		{"most below least", "zones[0].max_count", func(a *hull.Asset) { a.Zones[0].MinCount, a.Zones[0].MaxCount = 5, ptr(4) }},
		{"fitted pattern unknown", "zones[0].fitted[0].pattern", func(a *hull.Asset) {
			a.Zones[0].Fitted = []hull.Fitted{{Pattern: "none", Count: 1, Fitted: on("2024-03-15")}}
		}},
		{"fitted after the last docking", "zones[0].fitted[0].fitted", func(a *hull.Asset) {
			a.Zones[0].Fitted = []hull.Fitted{{Pattern: "slab", Count: 1, Fitted: on("2024-03-16")}}
		}},
		{"fitted pieces of none", "zones[0].fitted[0].count", func(a *hull.Asset) {
			a.Zones[0].Fitted = []hull.Fitted{{Pattern: "slab", Fitted: on("2024-03-15")}}
		}},
		{"no own densities", "zones[0].densities_ma_m2", func(a *hull.Asset) { a.Basis.Densities = hull.OwnDensities }},

		// Zones held by others.
		{"held by no zone", "zones[0].held_by", func(a *hull.Asset) { a.Zones[0].HeldBy = "keel" }},
		{"held by itself", "zones[0].held_by", func(a *hull.Asset) { a.Zones[0].HeldBy = "side" }},
		{"held with anodes", "zones[1].fitted", func(a *hull.Asset) {
			second(a, func(z *hull.Zone) {
				z.HeldBy, z.Fitted = "side", []hull.Fitted{{Pattern: "slab", Count: 1, Fitted: on("2024-03-15")}}
			})
		}},
		{"held twice over", "zones[1].protection", func(a *hull.Asset) {
			second(a, func(z *hull.Zone) {
				z.HeldBy, z.Protection = "side", &hull.Protection{Kind: hull.ImpressedCurrent, Anode: "graphite"}
			})
		}},

		// Other protections.
		{"zinc coat of no thickness", "zones[0].protection.thickness_um", protect(hull.Protection{Kind: hull.ZincCoat, Class: "C5"})},
		{"zinc coat in no air", "zones[0].protection.class", protect(hull.Protection{Kind: hull.ZincCoat, Thickness: 85})},
		{"impressed current of no anode", "zones[0].protection.anode", protect(hull.Protection{Kind: hull.ImpressedCurrent})},

		// Patterns.
		{"stand-off without length", "patterns[0].length_m", pattern(hull.Pattern{Shape: hull.LongSlender, Radius: 0.1})},
		{"stand-off without radius", "patterns[0].radius_m", pattern(hull.Pattern{Shape: hull.ShortSlender, Length: 1})},
		{"slab without length", "patterns[0].length_m", pattern(hull.Pattern{Shape: hull.LongFlush, Width: 0.1})},
		{"slab without width", "patterns[0].width_m", pattern(hull.Pattern{Shape: hull.LongFlush, Length: 1})},
		{"flush without area", "patterns[0].exposed_area_m2", pattern(hull.Pattern{Shape: hull.ShortFlush})},
		{"bracelet without height", "patterns[0].height_m", pattern(hull.Pattern{Shape: hull.Bracelet, Length: 1, Width: 1})},
		{"rod without diameter", "patterns[0].diameter_m", pattern(hull.Pattern{Shape: hull.SoilRod, Length: 1})},
		{"rod like a plate", "patterns[0].length_m", pattern(hull.Pattern{Shape: hull.SoilRod, Length: 0.1, Diameter: 0.1})},
		{"stated without worn factor", "patterns[0].shape_factor_worn_per_m", pattern(hull.Pattern{Shape: hull.Stated, ShapeFactor: 1})},
		{"gross below net", "patterns[0].gross_mass_kg", func(a *hull.Asset) { a.Patterns[0].GrossMass = 44 }},

		// Dockings and their works.
		{"campaign of no pieces", "dockings[0].pieces_per_day", func(a *hull.Asset) { a.Dockings[0].Kind, a.Dockings[0].DayRate = hull.Campaign, 1000 }},
		{"work on no zone", "dockings[1].works[0].zone", work(hull.Work{Zone: "keel", Coating: hull.Clean})},
		{"touch-up of no share", "dockings[1].works[0].share", work(hull.Work{Zone: "side", Coating: hull.TouchUp})},
		{"part-recoat of no share", "dockings[1].works[0].share", work(hull.Work{Zone: "side", Coating: hull.PartRecoat})},
		{"found nothing", "dockings[1].works[0].breakdown", work(hull.Work{Zone: "side", Coating: hull.Found})},
		{"recoat with own, no b", "dockings[1].works[0].b", work(hull.Work{Zone: "side", Coating: hull.Recoat, Category: hull.CategoryOwn, A: ptr(0.1)})},

		// Readings.
		{"reading of no zone", "readings[0].zone", func(a *hull.Asset) { a.Readings = []hull.Reading{{Date: on("2026-06-01"), Zone: "keel"}} }},
		{"reading of no pattern", "readings[0].pattern", reading(hull.Reading{Pattern: "none"})},
		{"two kinds of reading", "readings[0]", reading(hull.Reading{Percent: []float64{10}, WeighedWastage: []float64{0.1}})},
		{"grades without counts", "readings[0].grades.counts", reading(hull.Reading{Grades: &hull.Grades{Bounds: []float64{0, 0.25}, Counts: []int{1}}})},
		{"grades that fall", "readings[0].grades.bounds[1]", reading(hull.Reading{Grades: &hull.Grades{Bounds: []float64{0.5, 0.25}, Counts: []int{1, 2}}})},
		{"wasted beyond all", "readings[0].weighed_wastage[1]", reading(hull.Reading{WeighedWastage: []float64{0.1, 1.2}})},
	} {
		a := vessel()
		c.change(a)
		faults := hull.Check(a)
		if _, ok := faults.At(c.path); !ok || len(faults) != 1 {
			t.Errorf("%s: want one fault at %s, got\n%v", c.what, c.path, faults)
		}
	}
}

// Every zone of a circle of hosts is told.
func TestHostsInACircle(t *testing.T) {
	a := vessel()
	a.Zones = []hull.Zone{steel("a"), steel("b"), steel("c"), steel("free")}
	a.Zones[0].HeldBy, a.Zones[1].HeldBy, a.Zones[2].HeldBy = "b", "c", "a"
	faults := hull.Check(a)
	for _, path := range []string{"zones[0].held_by", "zones[1].held_by", "zones[2].held_by"} {
		if _, ok := faults.At(path); !ok {
			t.Errorf("no fault at %s:\n%v", path, faults)
		}
	}
	if len(faults) != 3 {
		t.Errorf("%d faults:\n%v", len(faults), faults)
	}
}

// What is absent, or at its limit, is no fault.
func TestLimitsAreAllowed(t *testing.T) {
	for what, change := range map[string]func(a *hull.Asset){
		"all bare":                    func(a *hull.Asset) { a.Zones[0].BareArea = 100 },
		"coating of the last docking": func(a *hull.Asset) { a.Zones[0].Coating.Applied = a.LastDocking },
		"no last docking":             func(a *hull.Asset) { a.LastDocking, a.Zones[0].Coating.Applied = 0, 0 },
		"docking before the last one": func(a *hull.Asset) { a.Dockings[0].Date = on("2020-01-01") },
		"sediment of no temperature": func(a *hull.Asset) {
			w := &a.Waters[0]
			w.Medium, w.Temperature, w.Resistivity = hull.Sediment, nil, ptr(1.0)
		},
		"sea area in small letters":   func(a *hull.Asset) { a.Basis.Densities, a.Waters[0].Name = hull.SeaArea, "north sea above 62n" },
		"most as few as least":        func(a *hull.Asset) { a.Zones[0].MinCount, a.Zones[0].MaxCount = 4, ptr(4) },
		"gross as light as net":       func(a *hull.Asset) { a.Patterns[0].GrossMass = 45 },
		"campaign at a fixed cost":    func(a *hull.Asset) { a.Dockings[0].Kind, a.Dockings[0].FixedCost = hull.Campaign, 1e6 },
		"own constants over category": func(a *hull.Asset) { a.Zones[0].Coating.A, a.Zones[0].Coating.B = ptr(0.0), ptr(1.0) },
		"shares within a millionth":   func(a *hull.Asset) { a.Zones[0].Waters[0].Share = 1 - 5e-7 },
		"chain of hosts": func(a *hull.Asset) {
			b, c := steel("b"), steel("c")
			b.HeldBy, c.HeldBy = "side", "b"
			a.Zones = append(a.Zones, c, b)
		},
		"docking the day before it ends": func(a *hull.Asset) { a.Dockings[1].Date = a.Horizon - 1 },
	} {
		a := vessel()
		change(a)
		if faults := hull.Check(a); len(faults) > 0 {
			t.Errorf("%s:\n%v", what, faults)
		}
	}
}

// An asset of nothing at all is told what it lacks, without a panic.
func TestEmptyAssetIsChecked(t *testing.T) {
	faults := hull.Check(new(hull.Asset))
	for _, path := range []string{"name", "kind", "in_service", "horizon", "waters", "zones", "patterns", "dockings"} {
		if _, ok := faults.At(path); !ok {
			t.Errorf("nothing is said of %s", path)
		}
	}
}

// A fault is one line with the path, what was wanted and what was got.
func TestFaultText(t *testing.T) {
	a := vessel()
	a.Zones[0].Coating.A = ptr(-0.2)
	const want = "zones[0].coating.a: want a number from 0 to 1, got -0.2"
	if got := hull.Check(a).Error(); got != want {
		t.Errorf("got %q, want %q", got, want)
	}
}

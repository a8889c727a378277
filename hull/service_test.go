package hull_test

import (
	"testing"

	"anodewright/hull"
)

// trader is a vessel of bare steel, sea and warm sea of different climates,
// for changes of service within its first interval of 1095 days.
func trader() *hull.Asset {
	a := vessel()
	a.Waters = append(a.Waters, sea("south", 25))
	a.Zones[0].Coating = hull.Coating{Category: hull.CategoryNone}
	return a
}

func goSouth(from hull.Date) hull.Service {
	return hull.Service{From: from, Waters: []hull.WaterShare{{Water: "south", Share: 1}}}
}

// 100 m2 ask for 20/10/13 A in temperate water, for 15/7/10 A in tropical.
func TestServiceChangesWithinAnInterval(t *testing.T) {
	start := vessel().LastDocking
	for _, c := range []struct {
		what    string
		service []hull.Service
		want    hull.Current
		next    hull.Current
	}{
		{"none", nil, hull.Current{Initial: 20, Mean: 10, Final: 13}, hull.Current{Initial: 20, Mean: 10, Final: 13}},
		{"before the start", []hull.Service{goSouth(start - 100)}, hull.Current{Initial: 15, Mean: 7, Final: 10}, hull.Current{Initial: 15, Mean: 7, Final: 10}},
		{"on the day of the start", []hull.Service{goSouth(start)}, hull.Current{Initial: 15, Mean: 7, Final: 10}, hull.Current{Initial: 15, Mean: 7, Final: 10}},
		{"a day after", []hull.Service{goSouth(start + 1)}, hull.Current{Initial: 20, Mean: 7 + 3.0/1095, Final: 10}, hull.Current{Initial: 15, Mean: 7, Final: 10}},
		{"within", []hull.Service{goSouth(start + 365)}, hull.Current{Initial: 20, Mean: (10 + 2*7) / 3.0, Final: 10}, hull.Current{Initial: 15, Mean: 7, Final: 10}},
		{"on the day of the docking", []hull.Service{goSouth(start + 1095)}, hull.Current{Initial: 20, Mean: 10, Final: 13}, hull.Current{Initial: 15, Mean: 7, Final: 10}},
		{"there and back", []hull.Service{goSouth(start + 100), {From: start + 465, Waters: []hull.WaterShare{{Water: "sea", Share: 1}}}},
			hull.Current{Initial: 20, Mean: 9, Final: 13}, hull.Current{Initial: 20, Mean: 10, Final: 13}},
		{"faster", []hull.Service{{From: start + 365, UnderWayFactor: ptr(1.3)}},
			hull.Current{Initial: 20, Mean: (10 + 2*13) / 3.0, Final: 16.9}, hull.Current{Initial: 26, Mean: 13, Final: 16.9}},
		{"two within", []hull.Service{{From: start + 365, UnderWayFactor: ptr(2.0)}, goSouth(start + 730)},
			hull.Current{Initial: 20, Mean: (10 + 20 + 14) / 3.0, Final: 20}, hull.Current{Initial: 30, Mean: 14, Final: 20}},
	} {
		for _, ofZone := range []bool{false, true} {
			a := trader()
			if a.Service = c.service; ofZone {
				a.Service, a.Zones[0].Service = nil, c.service
			}
			d := demands(t, a)[0].Own
			for _, m := range []struct {
				what      string
				got, want float64
			}{
				{"initial", d[0].Initial, c.want.Initial}, {"mean", d[0].Mean, c.want.Mean}, {"final", d[0].Final, c.want.Final},
				{"next initial", d[1].Initial, c.next.Initial}, {"next mean", d[1].Mean, c.next.Mean}, {"next final", d[1].Final, c.next.Final},
			} {
				near(t, c.what+", "+m.what, m.got, m.want)
			}
		}
	}
}

// A coating that grows worse is weighed with the water of each stretch.
func TestServiceWithAGrowingCoating(t *testing.T) {
	a := trader()
	a.Zones[0].Coating = hull.Coating{Category: hull.CategoryIII, Applied: a.LastDocking}
	a.Service = []hull.Service{goSouth(a.LastDocking + 365)}
	// Means of 0.02 + 0.012 t: 0.026 in the first year, 0.044 in the next two.
	near(t, "mean", demands(t, a)[0].Own[0].Mean, (10*0.026+2*7*0.044)/3)
	near(t, "breakdown", demands(t, a)[0].Breakdown[0].Mean, 0.038)
}

// A zone's own change wins over the asset's, and the asset's waters concern
// the zones of their medium only.
func TestWhoseServiceCounts(t *testing.T) {
	a := trader()
	from := a.LastDocking
	a.Service = []hull.Service{{From: from, Waters: []hull.WaterShare{{Water: "south", Share: 1}}, UnderWayFactor: ptr(1.5)}}
	mud := sea("mud", 10)
	mud.Medium = hull.Sediment
	a.Waters = append(a.Waters, mud)
	buried := steel("buried")
	buried.Waters, buried.Coating = []hull.WaterShare{{Water: "mud", Share: 1}}, hull.Coating{Category: hull.CategoryNone}
	stays := steel("stays")
	stays.Coating = hull.Coating{Category: hull.CategoryNone}
	stays.Service = []hull.Service{{From: from, Waters: []hull.WaterShare{{Water: "sea", Share: 1}}}}
	slow := steel("slow")
	slow.Coating = hull.Coating{Category: hull.CategoryNone}
	slow.Service = []hull.Service{{From: from, UnderWayFactor: ptr(1.0)}}
	a.Zones = append(a.Zones, buried, stays, slow)
	d := demands(t, a)
	near(t, "the asset's", d[0].Own[0].Mean, 7*1.5)
	near(t, "in the mud: the way, not the water", d[1].Own[0].Mean, 2*1.5)
	near(t, "own water, the asset's way", d[2].Own[0].Mean, 10*1.5)
	near(t, "own way, the asset's water", d[3].Own[0].Mean, 7)
}

// Output goes by the mean conductance of the waters, or by the worst of those
// with a share of a tenth and more.
func TestResistivityMeanAndWorst(t *testing.T) {
	water := func(id string, rho float64) hull.Water {
		w := sea(id, 10)
		w.Resistivity = ptr(rho)
		return w
	}
	a := vessel()
	a.Waters = []hull.Water{water("sea", 0.25), water("brackish", 1), water("river", 20)}
	z := &a.Zones[0]
	for _, c := range []struct {
		what        string
		shares      []hull.WaterShare
		mean, worst float64
	}{
		{"one water", []hull.WaterShare{{Water: "sea", Share: 1}}, 0.25, 0.25},
		{"a tenth counts", []hull.WaterShare{{Water: "sea", Share: 0.9}, {Water: "river", Share: 0.1}}, 1 / (0.9/0.25 + 0.1/20), 20},
		{"less does not", []hull.WaterShare{{Water: "sea", Share: 0.65}, {Water: "brackish", Share: 0.3}, {Water: "river", Share: 0.05}}, 1 / (0.65/0.25 + 0.3 + 0.05/20), 1},
	} {
		z.Waters = c.shares
		a.Basis.OutputWater = hull.MeanWater
		near(t, c.what+", mean", a.Resistivity(z, a.LastDocking), c.mean)
		a.Basis.OutputWater = hull.WorstWater
		near(t, c.what+", worst", a.Resistivity(z, a.LastDocking), c.worst)
	}
	// Eleven waters of less than a tenth each: the worst of all.
	z.Waters = nil
	for range 11 {
		z.Waters = append(z.Waters, hull.WaterShare{Water: "sea", Share: 1.0 / 11})
	}
	z.Waters[4].Water = "river"
	near(t, "no share of a tenth", a.Resistivity(z, a.LastDocking), 20)
	// By date.
	z.Waters = []hull.WaterShare{{Water: "sea", Share: 1}}
	z.Service = []hull.Service{{From: on("2026-01-01"), Waters: []hull.WaterShare{{Water: "brackish", Share: 1}}}}
	near(t, "the day before a change", a.Resistivity(z, on("2025-12-31")), 0.25)
	near(t, "on the day", a.Resistivity(z, on("2026-01-01")), 1)
}

// Measured resistivity wins, then conductivity, then salinity; sediment of a
// known porosity has its water's times the formation factor, and water of no
// salt at all still conducts.
func TestResist(t *testing.T) {
	w := sea("sea", 25)
	byS := w.Resist()
	if byS < 0.15 || byS > 0.3 {
		t.Errorf("salinity 34.5 at 25 degC: %g ohm m", byS)
	}
	w.Medium, w.Porosity = hull.Sediment, ptr(0.5)
	if got := w.Resist() / byS; got < 2.4 || got > 2.6 {
		t.Errorf("sediment of porosity 0.5 has %g times its water's resistivity", got)
	}
	w.Conductivity25, w.Porosity = ptr(500.0), nil
	near(t, "conductivity", w.Resist(), 20)
	w.Resistivity = ptr(0.7)
	near(t, "measured", w.Resist(), 0.7)
	fresh := hull.Water{Medium: hull.Fresh, Temperature: ptr(10.0), Salinity: ptr(0.0)}
	if got := fresh.Resist(); got < 100 || got > 1e6 {
		t.Errorf("water of no salt: %g ohm m", got)
	}
}

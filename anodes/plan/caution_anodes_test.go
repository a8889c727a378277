package plan_test

import (
	"slices"
	"testing"

	"anodewright/hull"
)

// What speaks against an alloy fires where it is fitted and nowhere else.
func TestConcernsOfPatterns(t *testing.T) {
	inside := 55.0
	water := func(a *hull.Asset, id string, medium hull.Medium, rho float64) {
		w := a.Waters[0]
		w.ID, w.Medium, w.Resistivity = id, medium, &rho
		a.Waters = append(a.Waters, w)
		a.Zones[0].Waters = []hull.WaterShare{{Water: id, Share: 1}}
	}
	for id, cause := range map[string]func(a *hull.Asset){
		"fresh-aluminium": func(a *hull.Asset) { water(a, "lake", hull.Fresh, 40) },
		"soil-aluminium":  func(a *hull.Asset) { water(a, "clay", hull.Soil, 20) },
		"hot-capacity":    func(a *hull.Asset) { a.Zones[0].InsideTemperature = &inside },
	} {
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

package hull_test

import (
	"fmt"
	"testing"

	"anodewright/hull"
)

// BenchmarkDemand is the demand of 200 zones over 12 intervals.
func BenchmarkDemand(b *testing.B) {
	t, salinity := 10.0, 34.5
	a := &hull.Asset{
		InService: hull.NewDate(2020, 1, 1), LastDocking: hull.NewDate(2020, 1, 1), Horizon: hull.NewDate(2050, 1, 1),
		Waters: []hull.Water{{ID: "sea", Medium: hull.Seawater, Temperature: &t, Salinity: &salinity}},
	}
	hull.SetDefaults(&a.Basis)
	for i := range 11 {
		a.Dockings = append(a.Dockings, hull.Docking{Date: hull.NewDate(2022, 1, 1).AddMonths(30 * i)})
	}
	for i := range 200 {
		z := hull.Zone{
			ID: fmt.Sprint("zone", i), Name: "Zone", Region: "vertical-side", Surface: hull.CarbonSteel, WettedArea: 100, Depth: float64(i),
			Coating: hull.Coating{Category: hull.CategoryIII}, Waters: []hull.WaterShare{{Water: "sea", Share: 1}},
		}
		hull.SetDefaults(&z)
		a.Zones = append(a.Zones, z)
	}
	b.ReportAllocs()
	for b.Loop() {
		hull.Demand(a)
	}
}

package workbook_test

import (
	"testing"

	"anodewright/anodes/plan"
	"anodewright/hull"
)

// The demand's formulas start from the constants that the plan counts with:
// those by the readings for the coat that is there, the design's for the next.
func TestCoatingByTheReadings(t *testing.T) {
	a := tern(t)
	percent := 8.0
	a.Zones[0].MaxCount = nil
	a.Readings = append(a.Readings, hull.Reading{Date: hull.NewDate(2026, 6, 1), Zone: "side", CoatingPercent: &percent})
	share := 0.3
	a.Dockings[0].Works = []hull.Work{{Zone: "side", Coating: hull.PartRecoat, Share: &share}}
	a.Dockings[1].Works = []hull.Work{{Zone: "side", Coating: hull.Recoat}}
	o := plan.Compute(a, today, plan.WithReadings())
	if o.Zones[0].Coating == nil {
		t.Fatal("nothing is learned of the coating")
	}
	if n := write(t, o).formulas("coating by the readings"); n < 300 {
		t.Errorf("only %d formulas", n)
	}
}

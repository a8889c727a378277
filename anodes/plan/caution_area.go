package plan

import (
	"fmt"
	"slices"

	"anodewright/hull"
	"anodewright/hull/area"
)

// hullRegions are the regions that make up a ship's own wetted surface, without
// appendages and without what lies inside.
var hullRegions = []hull.Region{"flat-bottom", "vertical-side", "boot-top", "bow", "stern"}

// areaShortfall is how far entered areas may lie below Denny-Mumford, which
// itself reads low, before they are questioned.
const areaShortfall = 0.10

// wettedArea: a hull whose zones' areas add up to much less than its
// particulars make likely. It questions and bars nothing: the particulars may
// be those of another draught, or the plan of a part of the hull only.
func (c *raiser) wettedArea() {
	a := c.o.Asset
	p := a.Particulars
	if p == nil || a.Kind != hull.Ship && a.Kind != hull.FloatingUnit {
		return
	}
	least, err := area.DennyMumford(p.LengthPP, p.Draught, p.Volume)
	if err != nil {
		return // too few particulars to judge by
	}
	sum := 0.0
	for i := range a.Zones {
		z := &a.Zones[i]
		if m := a.Medium(z); slices.Contains(hullRegions, z.Region) && (m == hull.Seawater || m == hull.Fresh) {
			sum += z.WettedArea
		}
	}
	if sum == 0 || sum >= (1-areaShortfall)*least.Area {
		return
	}
	c.add("wetted-area", -1, fmt.Sprintf(
		"The hull's zones (flat bottom, sides, boot-top, bow, stern) add up to %.0f m² in contact with water; the particulars make %.0f m² by Denny-Mumford (%s), which on benchmark hulls reads 3 to 5 %% low. Check the areas, or the particulars.",
		sum, least.Area, least.Formula), least.Source, least.Confidence)
}

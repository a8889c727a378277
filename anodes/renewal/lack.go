package renewal

import (
	"slices"

	"anodewright/hull"
)

// Lack is what a plan asks for beyond the pieces on the quay: at the first
// docking ahead a zone needs more pieces of a pattern than are left for it.
type Lack struct {
	Zone    int // among the asset's zones
	Docking int // among the dockings ahead, from 0
	Pattern string
	Pieces  int
}

// lacks lists what a plan's lines take beyond the quay. Zones are served in
// their order.
func lacks(a *hull.Asset, lines []Line, quay map[string]int) []Lack {
	left := map[string]int{}
	for id, n := range quay {
		left[id] = n
	}
	var all []Lack
	for _, l := range lines {
		if l.Docking != 0 || l.Action == Keep {
			continue
		}
		left[l.Pattern.ID] -= l.Count
		if missing := min(l.Count, -left[l.Pattern.ID]); missing > 0 {
			all = append(all, Lack{l.Zone, l.Docking, l.Pattern.ID, missing})
		}
	}
	slices.SortStableFunc(all, func(x, y Lack) int { return x.Zone - y.Zone })
	return all
}

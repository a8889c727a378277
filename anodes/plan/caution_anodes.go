package plan

import (
	"fmt"

	"anodewright/anodes"
	"anodewright/hull"
)

// concerns raises what speaks against the patterns that a zone carries, at any
// time, in its medium and at its temperature.
func (c *raiser) concerns(i int) {
	z := &c.o.Zones[i]
	for k := range c.o.Asset.Patterns {
		p := &c.o.Asset.Patterns[k]
		if !z.carries(p) {
			continue
		}
		for _, x := range anodes.Concerns(c.o.Asset, z.Zone, p) {
			c.add(x.ID, i, x.Text, x.Source, x.Confidence)
		}
	}
}

// carries reports whether the zone carries the pattern at any time.
func (z *Zone) carries(p *hull.Pattern) bool {
	for _, iv := range z.Intervals {
		for _, g := range iv.Fitted {
			if g.Pattern == p {
				return true
			}
		}
	}
	return false
}

// castings raises patterns whose dimensions and mass do not agree.
func (c *raiser) castings() {
	for i := range c.o.Asset.Patterns {
		p := &c.o.Asset.Patterns[i]
		if why := anodes.CastingFault(p); why != "" {
			c.add("casting", -1, fmt.Sprintf("Pattern %s: %s.", p.ID, why), "geometry", "computed")
		}
	}
}

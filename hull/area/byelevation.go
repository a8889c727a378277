package area

import (
	"fmt"
	"math"
)

// ByElevation estimates what water and sea bed touch of a tubular between two
// elevations in m, up positive and 0 at the waterline: one area for each depth
// band of the code in the water, and one down to the toe in the sea bed. What
// stands above water is left out. The length along the axis may be 0: it stands
// upright. Marine growth (m) adds nothing to the area, see [MarineGrowth].
func ByElevation(diameter, top, toe, seaBed, length, growth float64) ([]Estimate, error) {
	g, err := MarineGrowth(diameter, growth)
	if err != nil {
		return nil, err
	}
	parts, err := Member{Diameter: diameter, Top: top, Bottom: toe, Length: length}.Split(seaBed)
	if err != nil {
		return nil, err
	}
	var es []Estimate
	for _, p := range parts {
		if p.Exposure == Air {
			continue
		}
		e, err := Tubular(diameter, p.Length)
		if err != nil {
			return nil, err
		}
		e.Name = fmt.Sprintf("Tubular %s, %.4g to %.4g m deep", p.Exposure, math.Abs(p.Top), math.Abs(p.Bottom))
		e.Inputs = append(e.Inputs, metres("middle's depth", p.Depth()))
		if growth > 0 {
			e.Inputs = append(e.Inputs, metres("diameter with growth, for waves alone", g.Hydrodynamic))
			e.Benchmark += ". " + g.Note[:len(g.Note)-1]
		}
		es = append(es, e)
	}
	return es, nil
}

package picture

import (
	"slices"

	"anodewright/hull"
)

// pipeline draws a sealine from its landfall to its end on the sea bed: the
// stretches in the order of their depths, longer ones by their area, what is
// not pipe as boxes at the end.
func (s *sheet) pipeline(room Box) {
	line, ends := s.of("pipeline"), []int(nil)
	for i := range s.a.Zones {
		if s.a.Zones[i].Region != "pipeline" {
			ends = append(ends, i)
		}
	}
	slices.SortStableFunc(line, s.byDepth)

	b := Box{room.X, room.Y, room.W, room.H}
	sea := b.at(0, 0.22).Y
	// the bed falls from the shore to the flat
	land, flat := float32(0.12), float32(0.6)
	shape := []Point{b.at(0, 0.14), b.at(0.035, 0.15), b.at(0.06, 0.21), b.at(land, 0.52), b.at(0.2, flat-0.03), b.at(0.28, flat), b.at(1, flat)}
	bed := append(slices.Clone(shape), b.at(1, 1), b.at(0, 1))
	s.area(Sea, -1, path(Box{b.at(0.05, 0).X, sea, b.W - 0.05*b.W, b.at(0, flat).Y + 1 - sea}))
	s.area(Bed, -1, bed)
	s.line(Waterline, Point{b.at(0.063, 0).X, sea}, Point{b.right(), sea})
	s.line(Mudline, shape...)

	thick := 0.13 * b.H
	last := float32(0.97)
	if len(ends) > 0 {
		last = 0.86
	}
	// stretches by area, none shorter than a fair part
	total, weights := 0.0, make([]float64, len(line))
	for _, z := range line {
		total += s.a.Zones[z].WettedArea
	}
	sum := 0.0
	for n, z := range line {
		weights[n] = max(s.a.Zones[z].WettedArea/total, 0.6/float64(len(line)))
		sum += weights[n]
	}
	u := float32(0.02)
	for n, z := range line {
		to := u + (last-0.02)*float32(weights[n]/sum)
		drop := -thick / 2 // lies on the bed
		if m := s.a.Medium(&s.a.Zones[z]); m == hull.Sediment || m == hull.Soil {
			drop = thick * 0.8
		}
		s.area(Zone, z, ribbon(shape, b.at(u, 0).X, b.at(to, 0).X, drop, thick))
		// names stand in one line at the bottom
		s.Labels = append(s.Labels, Label{Zone: z, Outside: true, Box: Box{b.at(u, 0).X + 0.3*s.em, b.bottom() - 1.5*s.em, b.W*(to-u) - 0.6*s.em, 1.5 * s.em}})
		u = to
	}
	if len(ends) > 0 {
		s.endBoxes(ends, b.part(last+0.005, flat-0.3, 0.99, flat+0.02))
	}
}

// endBoxes draws what stands at the end of the line, with room for the names
// in the line of the stretches' names.
func (s *sheet) endBoxes(ends []int, b Box) {
	before := len(s.Areas)
	s.grid(ends, b)
	for _, a := range s.Areas[before:] {
		c := bounds(a.Path)
		s.Labels = append(s.Labels, Label{Zone: a.Zone, Outside: true, Free: true, Box: Box{c.X + c.W/2, s.H - 1.5*s.em, 0, 1.5 * s.em}})
	}
}

// ribbon is a band of a thickness along a path from one x to another, its
// middle below the path by drop.
func ribbon(along []Point, from, to, drop, thick float32) []Point {
	y := func(x float32) float32 {
		for i := 1; i < len(along); i++ {
			if a, b := along[i-1], along[i]; x <= b.X {
				return a.Y + (b.Y-a.Y)*max(x-a.X, 0)/(b.X-a.X)
			}
		}
		return along[len(along)-1].Y
	}
	var upper, lower []Point
	const n = 40
	for i := range n + 1 {
		x := from + (to-from)*float32(i)/n
		upper = append(upper, Point{x, y(x) + drop - thick/2})
		lower = append(lower, Point{x, y(x) + drop + thick/2})
	}
	slices.Reverse(lower)
	return append(upper, lower...)
}

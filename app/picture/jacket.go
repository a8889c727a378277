package picture

import (
	"fmt"
	"slices"

	"anodewright/hull"
)

// jacket draws a steel jacket: its legs and braces in bays by depth, the
// conductors between them, piles and mudmats at the mud line, and a key.
func (s *sheet) jacket(room Box) {
	room = s.keyed(room, s.all(), 0.6)
	b := Box{room.X + 0.5*s.em, room.Y, room.W - s.em, room.H}
	const water, bed = 0.2, 0.84
	yWater, yBed := b.at(0, water).Y, b.at(0, bed).Y
	s.area(Sea, -1, path(Box{room.X, yWater, room.W, yBed - yWater}))
	s.area(Bed, -1, path(Box{room.X, yBed, room.W, room.bottom() - yBed}))
	s.line(Waterline, Point{room.X, yWater}, Point{room.right(), yWater})
	s.line(Mudline, Point{room.X, yBed}, Point{room.right(), yBed})

	// deck and legs above the water
	thick := min(b.H, 0.8*b.W) // what the members' widths go by
	leg, brace := 0.085*thick, 0.05*thick
	left := func(y float32) Point { return Point{b.X + b.W*(0.36-0.14*(y-b.Y)/b.H), y} }
	right := func(y float32) Point { return Point{b.X + b.W*(0.64+0.14*(y-b.Y)/b.H), y} }
	top := b.at(0, 0.1).Y
	s.area(Steel, -1, path(b.part(0.3, 0.02, 0.7, 0.1)))
	s.area(Steel, -1, bar(left(top), left(yWater), leg))
	s.area(Steel, -1, bar(right(top), right(yWater), leg))

	for i, z := range s.of("conductor", "riser", "caisson") {
		n := len(s.of("conductor", "riser", "caisson"))
		w := 0.1 * b.W / float32(n)
		x := b.X + b.W*0.45 + w*float32(i)
		for k := range 3 {
			s.area(Zone, z, path(Box{x + w*float32(k)/3, yWater, w * 0.2, yBed - yWater}))
		}
	}
	bays := s.bays()
	for k, bay := range bays {
		share := func(n int) float32 { return yWater + (yBed-yWater)*float32(n)/float32(len(bays)) }
		y0, y1 := share(k), share(k+1)
		cross := bay.braces
		if len(cross) == 0 {
			cross = bay.legs // its zone is the whole bay
		}
		for i, member := range [][]Point{bar(left(y0), right(y1), brace), bar(right(y0), left(y1), brace), bar(left(y1), right(y1), brace)} {
			s.member(cross, i, member)
		}
		s.member(bay.legs, 0, bar(left(y0), left(y1), leg))
		s.member(bay.legs, 1, bar(right(y0), right(y1), leg))
		middle := Point{(left(y0).X + right(y0).X) / 2, (y0 + y1) / 2}
		for i, p := range []Point{middle, left(y1), right(y1), left(y0), right(y0)} {
			if len(bay.nodes) > 0 {
				r := 0.06 * thick
				s.member(bay.nodes, i, oval(Box{p.X - r, p.Y - r, 2 * r, 2 * r}))
			}
		}
	}
	foot, deep := 0.14*b.W, b.bottom()-1
	for i, x := range []float32{left(yBed).X, right(yBed).X} {
		if mats := s.of("mudmat"); len(mats) > 0 {
			s.member(mats, i, path(Box{x - foot/2, yBed - 0.05*b.H, foot, 0.07 * b.H}))
		}
		for _, d := range []float32{-0.3, 0.3} {
			if piles := s.of("pile", "tubular-pile"); len(piles) > 0 {
				s.member(piles, i, path(Box{x + d*foot - leg/2, yBed + 0.02*b.H, leg, deep - yBed - 0.02*b.H}))
			}
		}
	}
	s.note("sea level", room.X+0.4*s.em, yWater-0.8*s.em, 0)
	mud := "mud line"
	if d := s.deepest(); d > 0 {
		mud = fmt.Sprintf("%.0f m", d)
	}
	s.note(mud, room.X+0.4*s.em, yBed-0.8*s.em, 0)
}

// member draws the n-th equal member of zones that share them out.
func (s *sheet) member(zones []int, n int, p []Point) {
	if len(zones) == 0 {
		s.area(Steel, -1, p)
		return
	}
	s.area(Zone, zones[n%len(zones)], p)
}

// bay is the zones of about one depth.
type bay struct {
	depth               float64
	legs, braces, nodes []int
}

// bays sorts legs, braces and nodes into bays by their depth.
func (s *sheet) bays() []bay {
	zones := s.of("jacket-leg", "brace", "node")
	slices.SortStableFunc(zones, func(i, j int) int {
		return int(1000 * (s.a.Zones[i].Depth - s.a.Zones[j].Depth))
	})
	var all []bay
	for _, i := range zones {
		z := &s.a.Zones[i]
		if n := len(all); n == 0 || z.Depth > all[n-1].depth*1.1+1 {
			all = append(all, bay{depth: z.Depth})
		}
		last := &all[len(all)-1]
		switch z.Region {
		case "jacket-leg":
			last.legs = append(last.legs, i)
		case "brace":
			last.braces = append(last.braces, i)
		default:
			last.nodes = append(last.nodes, i)
		}
	}
	if len(all) == 0 {
		all = []bay{{}}
	}
	return all
}

// deepest is the depth of the mudmats, else of the deepest zone in the water.
func (s *sheet) deepest() (d float64) {
	for i := range s.a.Zones {
		z := &s.a.Zones[i]
		if z.Region == "mudmat" {
			return z.Depth
		}
		if m := s.a.Medium(z); m == hull.Seawater || m == hull.Fresh {
			d = max(d, z.Depth)
		}
	}
	return d
}

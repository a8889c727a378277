package picture

import (
	"slices"

	"anodewright/hull"
)

// Heights of a harbour's picture as shares of its height.
const (
	deckAt, deckTo   = 0.06, 0.17
	tideFrom, tideTo = 0.26, 0.44
	seaAt            = 0.34
	mudAt            = 0.74
)

// harbour draws a jetty: a row of piles by circuit, in bands by depth, the
// wall at the shore, fenders at the face, and a key.
func (s *sheet) harbour(room Box) {
	room = s.keyed(room, s.all(), 0.46)
	sea, mud := room.at(0, seaAt).Y, room.at(0, mudAt).Y
	walls := s.of("sheet-piling")
	shore := room.right()
	if len(walls) > 0 {
		shore = room.at(0.86, 0).X
	}
	s.area(Sea, -1, path(Box{room.X, sea, shore - room.X, mud - sea}))
	s.area(Bed, -1, path(Box{room.X, mud, shore - room.X, room.bottom() - mud}))
	if len(walls) > 0 {
		s.area(Bed, -1, path(Box{shore, room.at(0, 0.2).Y, room.right() - shore, room.bottom() - room.at(0, 0.2).Y}))
		slices.SortStableFunc(walls, s.byDepth)
		s.stacked(walls, Box{shore - 0.03*room.W, room.at(0, 0.16).Y, 0.05 * room.W, room.H * 0.8}, path)
	}
	s.line(Waterline, Point{room.X, sea}, Point{shore, sea})
	s.line(Mudline, Point{room.X, mud}, Point{shore, mud})

	groups := s.piles()
	if len(groups) == 0 {
		groups = [][]int{nil}
	}
	// the first circuit is the jetty itself and takes twice the room of others
	unit := (shore - room.X - 0.08*room.W) / float32(len(groups)+1)
	x := room.X + 0.02*room.W
	for g := len(groups) - 1; g >= 0; g-- {
		w, n := unit, 3
		if g == 0 {
			w, n = 2*unit, 6
		}
		s.pileRow(groups[g], Box{x, room.Y, w * 0.92, room.H}, n)
		if g == 0 {
			s.grid(s.of("other"), Box{x + 0.06*w, room.at(0, deckTo).Y, w * 0.76, 0.14 * room.H})
		}
		x += w
	}
}

// pileRow draws n piles under a deck, cut into bands by the zones' depths.
func (s *sheet) pileRow(zones []int, b Box, n int) {
	var wet, buried []int
	for _, z := range zones {
		if m := s.a.Medium(&s.a.Zones[z]); m == hull.Sediment || m == hull.Soil {
			buried = append(buried, z)
		} else {
			wet = append(wet, z)
		}
	}
	s.area(Steel, -1, path(b.part(0, deckAt, 1, deckTo)))
	for i := range n {
		u := (float32(i) + 0.5) / float32(n)
		w := min(0.11*b.H, 0.5*b.W/float32(n)) / b.W
		band := func(v0, v1 float32) Box { return b.part(u-w/2, v0, u+w/2, v1) }
		top := float32(seaAt)
		rest := wet
		if len(wet) > 1 {
			top = tideFrom
			s.area(Zone, wet[0], path(band(top, tideTo)))
			rest = wet[1:]
		}
		s.area(Steel, -1, path(band(deckTo, top)))
		if len(wet) > 1 {
			top = tideTo
		}
		s.stacked(rest, band(top, mudAt), path)
		s.stacked(buried, band(mudAt, 0.98), path)
	}
}

// piles groups the zones of piles by their circuits, each by rising depth.
func (s *sheet) piles() [][]int {
	var groups [][]int
	at := map[string]int{}
	for _, i := range s.of("tubular-pile", "pile", "caisson", "jacket-leg", "brace", "node", "conductor", "riser") {
		name := s.a.CircuitName(&s.a.Zones[i])
		g, ok := at[name]
		if !ok {
			g = len(groups)
			at[name] = g
			groups = append(groups, nil)
		}
		groups[g] = append(groups[g], i)
	}
	for _, g := range groups {
		slices.SortStableFunc(g, s.byDepth)
	}
	return groups
}

func (s *sheet) byDepth(i, j int) int {
	switch a, b := s.a.Zones[i].Depth, s.a.Zones[j].Depth; {
	case a < b:
		return -1
	case a > b:
		return 1
	}
	return 0
}

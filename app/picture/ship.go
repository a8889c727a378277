package picture

import "anodewright/hull"

// profile is a ship's side from the stern to the bow, in shares of the length
// and of the depth, the keel at 0.
var profile = []Point{
	{0.004, 1}, {0, 0.8}, {0, 0.66}, {0.03, 0.6}, {0.075, 0.5}, {0.125, 0.34}, {0.155, 0.18}, {0.175, 0.07}, {0.2, 0},
	{0.93, 0}, {0.958, 0.02}, {0.976, 0.08}, {0.985, 0.17}, {0.982, 0.26}, {0.972, 0.34}, {0.964, 0.42}, {0.963, 0.52}, {0.968, 0.66}, {0.982, 0.86}, {1, 1.1},
	{0.9, 1.06}, {0.86, 1},
}

// Heights of the side's bands as shares of the depth. The depth of a ship is
// not among its particulars: it is taken as 1.45 draughts.
const (
	depthOverDraught = 1.45
	waterAt          = 1 / depthOverDraught
	bootFrom         = 0.57
	bilgeAt          = 0.1
)

// shipShaped says whether a floating unit has the form of a ship.
func (s *sheet) shipShaped() bool {
	if len(s.of("jacket-leg", "brace", "node", "caisson")) > 0 {
		return false
	}
	return s.a.Particulars != nil || len(s.of("bow", "stern", "rudder", "propeller")) > 0
}

// ship draws the side of a ship, its flat bottom from below, and the zones of
// other regions in a key.
func (s *sheet) ship(room Box) {
	known := s.of("vertical-side", "boot-top", "flat-bottom", "bow", "stern", "rudder", "propeller",
		"sea-chest", "thruster-tunnel", "bilge-keel", "ballast-tank", "cargo-tank", "moon-pool")
	var others []int
	for i := range s.a.Zones {
		if !has(known, i) {
			others = append(others, i)
		}
	}
	room = s.keyed(room, others, 0.24)
	side := room
	if bottoms := s.of("flat-bottom"); len(bottoms) > 0 {
		side.W = room.W * 0.74
		s.bottom(Box{room.X + room.W*0.775, room.Y, room.W * 0.21, room.H}, bottoms)
	}
	ratio := float32(11)
	if p := s.a.Particulars; p != nil && p.LengthPP > 0 && p.Draught > 0 {
		ratio = min(max(float32(p.LengthPP/(p.Draught*depthOverDraught)), 4), 20)
	}
	// a line of texts below, the house and the bow above the deck
	high := (side.H - 1.7*s.em) / 1.3
	long := min(side.W*0.95, high*ratio*1.2)
	s.side(Box{side.X + (side.W-long)/2, side.Y + 0.28*high, long, high}, side)
}

// side draws the elevation in a box from the deck to the keel.
func (s *sheet) side(b, sea Box) {
	at := func(u, v float32) Point { return b.at(u, 1-v) }
	band := func(u0, v0, u1, v1 float32) Box { return b.part(u0, 1-v1, u1, 1-v0) }
	water := b.Y + b.H*(1-waterAt)
	s.area(Sea, -1, path(Box{sea.X, water, sea.W, b.bottom() + 0.12*b.H - water}))
	s.line(Waterline, Point{sea.X, water}, Point{sea.right(), water})

	var outline []Point
	for _, p := range profile {
		outline = append(outline, at(p.X, p.Y))
	}
	cut := func(part Box) []Point { return within(outline, part) }

	s.area(Steel, -1, path(band(0.035, 1, 0.13, 1.22)))
	s.area(Steel, -1, path(band(0.05, 1.22, 0.075, 1.27)))
	s.area(Steel, -1, cut(band(-0.1, waterAt, 1.1, 1.2)))
	sides, boots := s.of("vertical-side"), s.of("boot-top")
	top := float32(waterAt)
	if len(boots) > 0 {
		top = bootFrom
		s.each(boots, band(0, bootFrom, 1, waterAt), cut)
	}
	from, to := float32(0), float32(1)
	if sterns := s.of("stern"); len(sterns) > 0 {
		from = 0.22
		s.stacked(sterns, band(0, 0, from, top), cut)
	}
	if bows := s.of("bow"); len(bows) > 0 {
		to = 0.86
		s.stacked(bows, band(to, 0, 1, top), cut)
	}
	low := float32(0)
	if bottoms := s.of("flat-bottom"); len(bottoms) > 0 {
		low = bilgeAt
		s.each(bottoms, band(max(from, 0.15), 0, min(to, 0.96), low), cut)
		s.area(Steel, -1, cut(band(from, 0, max(from, 0.15), low)))
		if len(sides) > 0 { // the rest of the lowest band belongs to the bow's round
			s.area(Zone, sides[len(sides)-1], cut(band(min(to, 0.96), 0, to, low)))
		}
	}
	s.each(sides, band(from, low, to, top), cut)
	for n, z := range sides {
		w := (to - from) / float32(len(sides))
		l := max(from+w*float32(n), 0.4)
		if r := min(from+w*float32(n+1), 0.84); r > l {
			s.Labels = append(s.Labels, Label{Zone: z, Box: band(l, low, r, top)})
		}
	}

	s.each(s.of("bilge-keel"), band(0.4, bilgeAt+0.02, 0.68, bilgeAt+0.1), s.maybe("bilge-keel", path))
	s.grid(s.of("sea-chest"), band(0.235, 0.2, 0.36, 0.44))
	s.each(s.of("thruster-tunnel"), Box{at(0.885, 0).X, at(0, 0.42).Y, 0.24 * b.H * float32(max(len(s.of("thruster-tunnel")), 1)), 0.24 * b.H}, s.maybe("thruster-tunnel", oval))
	s.each(s.of("moon-pool"), band(0.44, 0, 0.5, 1), s.maybe("moon-pool", path))
	s.stacked(s.of("propeller"), band(0.085, 0.05, 0.108, 0.38), s.maybe("propeller", oval))
	s.stacked(s.of("rudder"), band(0.02, 0.03, 0.066, 0.5), s.maybe("rudder", func(p Box) []Point {
		return []Point{p.at(0.12, 0), p.at(0.9, 0), p.at(1, 1), p.at(0, 1)}
	}))
	s.tanks(band(0.2, waterAt+0.02, 0.88, 0.98))
	s.line(Edge, append(outline, outline[0])...)

	row := Box{0, b.bottom() + 0.1*b.H, 0, 1.5 * s.em}
	row.Y = min(row.Y, sea.bottom()-row.H)
	for _, r := range []hull.Region{"rudder", "propeller", "sea-chest", "bilge-keel", "thruster-tunnel", "moon-pool", "boot-top", "stern", "bow"} {
		for _, z := range s.of(r) {
			for _, a := range s.Areas {
				if a.Zone == z {
					c := bounds(a.Path)
					s.Labels = append(s.Labels, Label{Zone: z, Outside: true, Free: true, Box: Box{c.X + c.W/2, row.Y, 0, row.H}})
					break
				}
			}
		}
	}
}

// maybe is piece where there are zones of the region, else nothing.
func (s *sheet) maybe(r hull.Region, piece func(Box) []Point) func(Box) []Point {
	if len(s.of(r)) == 0 {
		return func(Box) []Point { return nil }
	}
	return piece
}

// tanks draws tanks in a row in the hull above the water, where there is room.
func (s *sheet) tanks(b Box) {
	tanks := s.of("ballast-tank", "cargo-tank")
	before := len(s.Areas)
	s.grid(tanks, b)
	for _, a := range s.Areas[before:] {
		s.Labels = append(s.Labels, Label{Zone: a.Zone, Box: bounds(a.Path)})
	}
}

// grid draws zones as boxes in as few rows as their number allows.
func (s *sheet) grid(zones []int, b Box) {
	n := len(zones)
	if n == 0 {
		return
	}
	rows := 1
	for b.W/float32((n+rows-1)/rows) < 0.5*b.H/float32(rows) {
		rows++
	}
	cols := (n + rows - 1) / rows
	w, h := b.W/float32(cols), b.H/float32(rows)
	gap := min(w, h) * 0.06
	for i, z := range zones {
		s.area(Zone, z, path(Box{b.X + w*float32(i%cols), b.Y + h*float32(i/cols), w, h}.inset(gap)))
	}
}

// bottom draws the flat bottom as seen from below.
func (s *sheet) bottom(room Box, zones []int) {
	b := Box{room.X, room.Y + 0.14*room.H, room.W, room.H*0.86 - 2*s.em}
	beam := float32(6)
	if p := s.a.Particulars; p != nil && p.LengthPP > 0 && p.Beam > 0 {
		beam = min(max(float32(p.LengthPP/p.Beam), 2), 12)
	}
	// beam to scale, but never too thin for its name
	if h := max(b.W/beam, 2*s.em); h < b.H {
		b.Y += (b.H - h) / 2
		b.H = h
	}
	outline := []Point{
		b.at(0.03, 0), b.at(0.72, 0), b.at(0.82, 0.05), b.at(0.91, 0.18), b.at(0.97, 0.35), b.at(1, 0.5),
		b.at(0.97, 0.65), b.at(0.91, 0.82), b.at(0.82, 0.95), b.at(0.72, 1), b.at(0.03, 1), b.at(0.005, 0.8), b.at(0, 0.5), b.at(0.005, 0.2),
	}
	s.each(zones, b, func(p Box) []Point { return within(outline, p) })
	for n, z := range zones {
		w := b.W * 0.94 / float32(len(zones))
		s.Labels = append(s.Labels, Label{Zone: z, Box: Box{b.X + w*float32(n), b.Y, w, b.H}})
	}
	s.line(Edge, append(outline, outline[0])...)
	s.note("seen from below", b.X+b.W/2, min(b.bottom()+0.9*s.em, room.bottom()-0.75*s.em), 0.5)
}

func has(all []int, x int) bool {
	for _, i := range all {
		if i == x {
			return true
		}
	}
	return false
}

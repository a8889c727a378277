package picture

// pontoons draws a floating unit on pontoons and columns: vertical sides and
// boot-top are the columns', the flat bottom the pontoon's underside.
func (s *sheet) pontoons(room Box) {
	room = s.keyed(room, s.all(), 0.5)
	b := Box{room.X + 0.04*room.W, room.Y + 0.02*room.H, 0.92 * room.W, 0.9 * room.H}
	water := b.at(0, 0.42).Y
	s.area(Sea, -1, path(Box{room.X, water, room.W, room.bottom() - water}))
	s.line(Waterline, Point{room.X, water}, Point{room.right(), water})
	s.area(Steel, -1, path(b.part(0.06, 0.04, 0.94, 0.18)))

	legs := append(s.of("vertical-side", "jacket-leg", "caisson"), s.of("bow", "stern")...)
	boots, braces := s.of("boot-top"), s.of("brace", "node")
	const columns = 4
	for i := range columns {
		u := 0.12 + 0.7*float32(i)/(columns-1)
		s.area(Steel, -1, path(b.part(u, 0.18, u+0.06, 0.42)))
		top := float32(0.42)
		if len(boots) > 0 {
			top = 0.52
			s.stacked(boots, b.part(u, 0.36, u+0.06, top), path)
		}
		s.stacked(legs, b.part(u, top, u+0.06, 0.72), path)
		if i > 0 && len(braces) > 0 {
			before := u - 0.7/(columns-1)
			a, c := b.at(before+0.06, 0.69), b.at(u, 0.45)
			s.area(Zone, braces[i%len(braces)], bar(a, c, 0.05*b.H))
		}
	}
	for n, z := range braces { // those without a brace of their own
		if !s.shape(z) {
			s.area(Zone, z, path(b.part(0.2+0.02*float32(n), 0.6, 0.215+0.02*float32(n), 0.66)))
		}
	}
	s.stacked(s.of("flat-bottom", "bilge-keel"), b.part(0.04, 0.9, 0.96, 1), path)
	s.area(Steel, -1, path(b.part(0.04, 0.72, 0.96, 0.9)))
	s.grid(s.of("ballast-tank", "cargo-tank"), b.part(0.22, 0.73, 0.78, 0.89))
	s.grid(s.of("sea-chest"), b.part(0.06, 0.75, 0.2, 0.88))
	s.grid(s.of("thruster-tunnel", "propeller", "rudder"), b.part(0.8, 0.75, 0.94, 0.88))
	s.grid(s.of("riser", "conductor", "moon-pool"), b.part(0.48, 0.2, 0.52, 0.72))
}

// shape says whether a zone has a filled area besides its swatch in the key.
func (s *sheet) shape(zone int) bool {
	n := 0
	for _, a := range s.Areas {
		if a.Zone == zone && a.Role == Zone {
			n++
		}
	}
	return n > 1
}

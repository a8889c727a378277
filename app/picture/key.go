package picture

// key lists zones in a box: for each a swatch to be filled by its state, and
// room for its name. All of a zone's line can be hit.
func (s *sheet) key(b Box, zones []int) {
	n := len(zones)
	if n == 0 || b.W <= 0 || b.H <= 0 {
		return
	}
	rows := max(int(b.H/(1.5*s.em)), 1)
	cols := min((n+rows-1)/rows, max(int(b.W/(5*s.em)), 1))
	rows = (n + cols - 1) / cols
	w, h := b.W/float32(cols), min(b.H/float32(rows), 2*s.em)
	top := b.Y + (b.H-h*float32(rows))/2
	for i, z := range zones {
		line := Box{b.X + w*float32(i/rows), top + h*float32(i%rows), w, h}
		gap := min(h, s.em) * 0.14
		swatch := Box{line.X, line.Y + gap, min(1.6*s.em, w), h - 2*gap}
		s.area(Key, z, path(line))
		s.area(Zone, z, path(swatch))
		if h >= 1.2*s.em {
			s.Labels = append(s.Labels, Label{Zone: z, Outside: true,
				Box: Box{swatch.right() + 0.4*s.em, line.Y, w - swatch.W - 0.8*s.em, h}})
		}
	}
}

// keyed takes room for the key of zones off the right of a box, or off the
// foot of a tall one, and returns the rest.
func (s *sheet) keyed(b Box, zones []int, share float32) Box {
	if len(zones) == 0 {
		return b
	}
	if b.tall() {
		h := min(b.H/2, 1.7*s.em*float32(len(zones)))
		s.key(Box{b.X, b.bottom() - h, b.W, h}, zones)
		return Box{b.X, b.Y, b.W, b.H - h - 0.6*s.em}
	}
	w := b.W * share
	s.key(Box{b.right() - w, b.Y + 0.2*s.em, w, b.H - 0.4*s.em}, zones)
	return Box{b.X, b.Y, b.W - w - s.em, b.H}
}

// all is every zone.
func (s *sheet) all() []int {
	zones := make([]int, len(s.a.Zones))
	for i := range zones {
		zones[i] = i
	}
	return zones
}

// Package picture turns an asset into a drawing of itself: the ship's side and
// its bottom from below, a jacket in its depth bands, a jetty's piles, a
// sealine on its bed. It yields plain shapes with a meaning and no colour, so
// that any painter can fill them, and tells which zone lies under a point.
//
// The drawings are sketches: lengths follow the asset's particulars where they
// are known, heights are stretched so that every zone can be seen and hit.
// Units are the lengths of the size asked for, from the upper left corner.
package picture

import (
	"anodewright/hull"
)

// Point is a place on the picture.
type Point struct{ X, Y float32 }

// Box is an upright rectangle.
type Box struct{ X, Y, W, H float32 }

// Role is what an area or a line stands for.
type Role int

// The roles of areas, in the order in which they usually lie on each other,
// and of lines.
const (
	Sea   Role = iota
	Bed        // sea bed, mud, shore
	Steel      // steel that is no zone: above water, or not in the plan
	Zone       // a zone, to be filled by its state
	Key        // the line of a zone in the key: not filled, only hit
	Waterline
	Mudline
	Edge // an outline of steel
)

func (r Role) String() string {
	return [...]string{"sea", "bed", "steel", "zone", "key", "waterline", "mudline", "edge"}[r]
}

// Area is a closed shape.
type Area struct {
	Role Role
	Zone int // index of the zone, -1 for none
	Path []Point
}

// Line is an open path.
type Line struct {
	Role Role
	Path []Point
}

// Label is room for a zone's name and state.
type Label struct {
	Zone int
	Box  Box
	// Outside says that the room lies on the ground instead of in the zone.
	Outside bool
	// Free says that only the middle of the box is given: the text is to be
	// centred there and may be moved sideways for its neighbours.
	Free bool
}

// Note is a fixed text: X is its left, middle or right as Anchor is 0, 0.5 or
// 1; Y is its middle.
type Note struct {
	Text         string
	X, Y, Anchor float32
}

// Picture is an asset drawn in a size.
type Picture struct {
	W, H   float32
	Areas  []Area // from the lowest to the uppermost
	Lines  []Line
	Labels []Label
	Notes  []Note
}

// Of draws an asset in w by h; em is the height of its texts. Every zone has
// an area of its own, whatever its region.
func Of(a *hull.Asset, w, h, em float32) *Picture {
	s := &sheet{Picture: &Picture{W: w, H: h}, a: a, em: em, drawn: make([]bool, len(a.Zones))}
	room := Box{0, 0, w, h}
	switch a.Kind {
	case hull.Ship:
		s.ship(room)
	case hull.FloatingUnit:
		if s.shipShaped() {
			s.ship(room)
		} else {
			s.pontoons(room)
		}
	case hull.Jacket:
		s.jacket(room)
	case hull.Harbour:
		s.harbour(room)
	case hull.Pipeline:
		s.pipeline(room)
	default:
		s.key(room, s.left())
	}
	return s.Picture
}

// Tall says that an asset is better drawn in a high room than in a wide one: a
// jacket, and a harbour's piles.
func Tall(a *hull.Asset) bool {
	switch a.Kind {
	case hull.Jacket:
		return true
	case hull.Harbour:
		s := &sheet{a: a}
		return len(s.piles()) > 0
	}
	return false
}

// Hit returns the zone at a point.
func (p *Picture) Hit(at Point) (zone int, ok bool) {
	for i := len(p.Areas) - 1; i >= 0; i-- {
		if a := &p.Areas[i]; a.Zone >= 0 && inside(a.Path, at) {
			return a.Zone, true
		}
	}
	return -1, false
}

// Centre returns a point of a zone that hits it, near the middle of its first
// area; ok is false if there is none.
func (p *Picture) Centre(zone int) (at Point, ok bool) {
	for _, a := range p.Areas {
		if a.Zone != zone {
			continue
		}
		b := bounds(a.Path)
		middle := Point{b.X + b.W/2, b.Y + b.H/2}
		best := float32(-1)
		const n = 24
		for i := range n {
			for j := range n {
				q := Point{b.X + b.W*(float32(i)+0.5)/n, b.Y + b.H*(float32(j)+0.5)/n}
				d := (q.X-middle.X)*(q.X-middle.X) + (q.Y-middle.Y)*(q.Y-middle.Y)
				if best >= 0 && d >= best {
					continue
				}
				if z, hit := p.Hit(q); hit && z == zone {
					at, best = q, d
				}
			}
		}
		if best >= 0 {
			return at, true
		}
	}
	return Point{}, false
}

// sheet is a picture in the making.
type sheet struct {
	*Picture
	a     *hull.Asset
	em    float32
	drawn []bool // by zone
}

// of returns the zones of some regions, in their order.
func (s *sheet) of(regions ...hull.Region) []int {
	var all []int
	for i := range s.a.Zones {
		for _, r := range regions {
			if s.a.Zones[i].Region == r {
				all = append(all, i)
			}
		}
	}
	return all
}

// left returns the zones not drawn yet.
func (s *sheet) left() []int {
	var all []int
	for i, done := range s.drawn {
		if !done {
			all = append(all, i)
		}
	}
	return all
}

// area adds a shape; zone is -1 for none. A shape with no surface is left out.
func (s *sheet) area(role Role, zone int, path []Point) {
	if len(path) < 3 {
		return
	}
	s.Areas = append(s.Areas, Area{role, zone, path})
	if zone >= 0 {
		s.drawn[zone] = true
	}
}

func (s *sheet) line(role Role, path ...Point) { s.Lines = append(s.Lines, Line{role, path}) }

func (s *sheet) note(text string, x, y, anchor float32) {
	s.Notes = append(s.Notes, Note{text, x, y, anchor})
}

// each shares a box out among zones side by side and adds what piece makes of
// the parts; without a zone the whole is plain steel.
func (s *sheet) each(zones []int, b Box, piece func(part Box) []Point) {
	if len(zones) == 0 {
		s.area(Steel, -1, piece(b))
		return
	}
	for n, z := range zones {
		s.area(Zone, z, piece(Box{b.X + b.W*float32(n)/float32(len(zones)), b.Y, b.W / float32(len(zones)), b.H}))
	}
}

// stacked is each with the parts one below the other.
func (s *sheet) stacked(zones []int, b Box, piece func(part Box) []Point) {
	if len(zones) == 0 {
		s.area(Steel, -1, piece(b))
		return
	}
	for n, z := range zones {
		s.area(Zone, z, piece(Box{b.X, b.Y + b.H*float32(n)/float32(len(zones)), b.W, b.H / float32(len(zones))}))
	}
}

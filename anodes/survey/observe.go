package survey

import (
	"fmt"
	"math"

	"anodewright/hull"
)

// NotWastedBelow is the wastage below which an anode looks unwasted.
const NotWastedBelow = 0.05

// visible is the least wastage that a scale, a tape or an eye can tell from
// none.
const visible = 0.01

// Observe turns a reading of a set of this pattern into what it tells of the
// wastage; the caller adds what is predicted. Pieces fallen, painted over or
// not seen tell nothing, nor do potentials. An error names a part of the
// reading that cannot be used; the rest can.
func Observe(p *hull.Pattern, r *hull.Reading) (o Observation, err error) {
	single := func(y float64) {
		switch {
		case y >= p.Utilisation:
			o.add(p.Utilisation, math.Inf(1), 1)
		case y < visible:
			o.add(0, NotWastedBelow, 1)
		default:
			o.Values = append(o.Values, y)
		}
	}
	for _, y := range r.WeighedWastage {
		single(y)
	}
	for _, y := range r.Percent {
		single(y / 100)
	}
	for i, m := range r.Measured {
		y, e := Wastage(p, m)
		if e != nil {
			err = fmt.Errorf("piece %d: %w", i+1, e)
			continue
		}
		single(y)
	}
	if g := r.Grades; g != nil {
		for i, n := range g.Counts {
			o.add(g.Bounds[i], above(g, i), n)
		}
	}
	o.add(p.Utilisation, math.Inf(1), r.Gone)
	o.add(0, NotWastedBelow, r.NotWasted)
	return o, err
}

func (o *Observation) add(above, upTo float64, count int) {
	if count > 0 {
		o.Classes = append(o.Classes, Class{above, upTo, count})
	}
}

// above is the upper bound of a grade; the last is open.
func above(g *hull.Grades, i int) float64 {
	if i+1 < len(g.Bounds) {
		return g.Bounds[i+1]
	}
	return math.Inf(1)
}

// Wastage returns the share of the net mass gone from the girth and length of
// what is left. The volume left, insert and all, is to the new one as
// girth^2 * length to those of the new piece; the insert does not waste. For
// round pieces this is girth^2/(4 pi) * length. A flat block has less section
// than a round one of its girth, about 70 % at 15 x 12 cm and 55 % at 3 to 1:
// girth^2/(4 pi) alone would leave it too much metal. The new girth of a block
// is 2 * (width + height), measured all round; where the height is not known
// it follows from the volume.
func Wastage(p *hull.Pattern, m hull.Measured) (float64, error) {
	net := p.NetMass / density(p)
	isNew := net + p.InsertVolume
	girth := newGirth(p, isNew)
	if girth == 0 || p.Length == 0 {
		return 0, fmt.Errorf("the wastage of a %s cannot be told from girth and length: pattern %s states no girth or length of its section", p.Shape, p.ID)
	}
	left := isNew * (m.Girth / girth) * (m.Girth / girth) * (m.Length / p.Length)
	y := 1 - (left-p.InsertVolume)/net
	if y < -0.1 {
		return 0, fmt.Errorf("girth %g m and length %g m are more than a new anode of pattern %s has (%.3g m, %g m)", m.Girth, m.Length, p.ID, girth, p.Length)
	}
	return min(max(y, 0), 1), nil
}

// newGirth returns the girth of a new piece of this volume, 0 where the
// pattern does not tell it. That of a bracelet goes round the pipe.
func newGirth(p *hull.Pattern, volume float64) float64 {
	switch {
	case p.Shape == hull.Bracelet:
		return 0
	case p.Girth > 0:
		return p.Girth
	case p.Radius > 0:
		return 2 * math.Pi * p.Radius
	case p.Diameter > 0:
		return math.Pi * p.Diameter
	case p.Width > 0 && p.Height > 0:
		return 2 * (p.Width + p.Height)
	case p.Width > 0 && p.Length > 0:
		return 2 * (p.Width + volume/(p.Length*p.Width))
	}
	return 0
}

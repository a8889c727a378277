package picture

import "math"

func (b Box) right() float32  { return b.X + b.W }
func (b Box) bottom() float32 { return b.Y + b.H }

// tall says that a box is clearly higher than wide.
func (b Box) tall() bool { return b.H > 1.2*b.W }

// at returns the point at shares of the box's width and height.
func (b Box) at(u, v float32) Point { return Point{b.X + u*b.W, b.Y + v*b.H} }

// part returns the box between shares of the width and of the height.
func (b Box) part(u0, v0, u1, v1 float32) Box {
	return Box{b.X + u0*b.W, b.Y + v0*b.H, (u1 - u0) * b.W, (v1 - v0) * b.H}
}

// inset takes a margin off all four sides.
func (b Box) inset(d float32) Box {
	return Box{b.X + d, b.Y + d, max(b.W-2*d, 0), max(b.H-2*d, 0)}
}

// path is the box as a path.
func path(b Box) []Point {
	return []Point{{b.X, b.Y}, {b.right(), b.Y}, {b.right(), b.bottom()}, {b.X, b.bottom()}}
}

// oval is the ellipse that fills a box.
func oval(b Box) []Point {
	const n = 28
	var all []Point
	for i := range n {
		sin, cos := math.Sincos(2 * math.Pi * float64(i) / n)
		all = append(all, b.at(0.5+0.5*float32(cos), 0.5+0.5*float32(sin)))
	}
	return all
}

// bar is a straight member between two points.
func bar(a, b Point, width float32) []Point {
	dx, dy := b.X-a.X, b.Y-a.Y
	length := float32(math.Hypot(float64(dx), float64(dy)))
	if length == 0 {
		return nil
	}
	nx, ny := -dy/length*width/2, dx/length*width/2
	return []Point{{a.X + nx, a.Y + ny}, {b.X + nx, b.Y + ny}, {b.X - nx, b.Y - ny}, {a.X - nx, a.Y - ny}}
}

// bounds is the least box around a path.
func bounds(path []Point) Box {
	lo, hi := path[0], path[0]
	for _, p := range path {
		lo = Point{min(lo.X, p.X), min(lo.Y, p.Y)}
		hi = Point{max(hi.X, p.X), max(hi.Y, p.Y)}
	}
	return Box{lo.X, lo.Y, hi.X - lo.X, hi.Y - lo.Y}
}

// inside says whether a point lies in a closed path.
func inside(path []Point, at Point) bool {
	in := false
	for i, a := range path {
		b := path[(i+1)%len(path)]
		if (a.Y > at.Y) != (b.Y > at.Y) && at.X < a.X+(at.Y-a.Y)*(b.X-a.X)/(b.Y-a.Y) {
			in = !in
		}
	}
	return in
}

// within cuts a closed path to a box, one side after the other.
func within(path []Point, b Box) []Point {
	cut := func(p []Point, keep func(Point) float32) []Point {
		var out []Point
		for i, a := range p {
			c := p[(i+1)%len(p)]
			da, dc := keep(a), keep(c)
			if da >= 0 {
				out = append(out, a)
			}
			if (da >= 0) != (dc >= 0) {
				t := da / (da - dc)
				out = append(out, Point{a.X + t*(c.X-a.X), a.Y + t*(c.Y-a.Y)})
			}
		}
		return out
	}
	path = cut(path, func(p Point) float32 { return p.X - b.X })
	path = cut(path, func(p Point) float32 { return b.right() - p.X })
	path = cut(path, func(p Point) float32 { return p.Y - b.Y })
	return cut(path, func(p Point) float32 { return b.bottom() - p.Y })
}

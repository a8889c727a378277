package sheet

import (
	"bytes"
	"image"
	"image/color"
	"image/draw"
	"image/png"
	"math"

	"golang.org/x/image/vector"
)

// Image paints the sheet with so many image pixels for each pixel of the
// drawing.
func (s *Sheet) Image(scale float32) *image.RGBA {
	box := image.Rect(0, 0, int(math.Ceil(float64(s.w*scale))), int(math.Ceil(float64(s.h*scale))))
	img := image.NewRGBA(box)
	draw.Draw(img, box, image.NewUniform(s.paper), image.Point{}, draw.Src)
	p := &painter{img: img, scale: scale, r: vector.NewRasterizer(box.Dx(), box.Dy())}
	for _, l := range s.lines {
		p.stroke(l)
	}
	for _, w := range s.texts {
		p.begin()
		w.outline(p)
		p.end(w.color)
	}
	return img
}

// PNG returns the sheet as a PNG picture: see Image.
func (s *Sheet) PNG(scale float32) ([]byte, error) {
	var b bytes.Buffer
	err := png.Encode(&b, s.Image(scale))
	return b.Bytes(), err
}

// painter fills outlines on an image. It rasterises within the box around an
// outline only, which is collected first.
type painter struct {
	img    *image.RGBA
	scale  float32
	r      *vector.Rasterizer
	path   []node
	lo, hi node
}

// node is one step of an outline: n is how many of its points count, 0 closes.
type node struct {
	x1, y1, x, y float32
	n            int
}

func (p *painter) begin() {
	p.path = p.path[:0]
	p.lo, p.hi = node{x: math.MaxFloat32, y: math.MaxFloat32}, node{x: -math.MaxFloat32, y: -math.MaxFloat32}
}

func (p *painter) add(x, y float32) (float32, float32) {
	x, y = x*p.scale, y*p.scale
	p.lo.x, p.lo.y, p.hi.x, p.hi.y = min(p.lo.x, x), min(p.lo.y, y), max(p.hi.x, x), max(p.hi.y, y)
	return x, y
}

const (
	closes = iota
	lines
	quads
	moves
)

func (p *painter) move(x, y float32) {
	x, y = p.add(x, y)
	p.path = append(p.path, node{x: x, y: y, n: moves})
}

func (p *painter) line(x, y float32) {
	x, y = p.add(x, y)
	p.path = append(p.path, node{x: x, y: y, n: lines})
}

func (p *painter) quad(x1, y1, x, y float32) {
	x1, y1 = p.add(x1, y1)
	x, y = p.add(x, y)
	p.path = append(p.path, node{x1, y1, x, y, quads})
}

func (p *painter) close() { p.path = append(p.path, node{n: closes}) }

// end fills what was outlined.
func (p *painter) end(c color.NRGBA) {
	if len(p.path) == 0 {
		return
	}
	left, top := float32(math.Floor(float64(p.lo.x))), float32(math.Floor(float64(p.lo.y)))
	w, h := int(math.Ceil(float64(p.hi.x-left)))+1, int(math.Ceil(float64(p.hi.y-top)))+1
	p.r.Reset(w, h)
	for _, n := range p.path {
		switch n.n {
		case moves:
			p.r.MoveTo(n.x-left, n.y-top)
		case lines:
			p.r.LineTo(n.x-left, n.y-top)
		case quads:
			p.r.QuadTo(n.x1-left, n.y1-top, n.x-left, n.y-top)
		case closes:
			p.r.ClosePath()
		}
	}
	at := image.Pt(int(left), int(top))
	p.r.Draw(p.img, image.Rectangle{Min: at, Max: at.Add(image.Pt(w, h))}, image.NewUniform(c), image.Point{})
}

// stroke paints a line, broken where its ink has a dash.
func (p *painter) stroke(l stroke) {
	dx, dy := l.x2-l.x1, l.y2-l.y1
	length := float32(math.Hypot(float64(dx), float64(dy)))
	if length == 0 {
		return
	}
	nx, ny := -dy/length*l.ink.Width/2, dx/length*l.ink.Width/2
	dash := l.ink.Dash
	if dash <= 0 {
		dash = length
	}
	p.begin()
	for at := float32(0); at < length; at += 2 * dash {
		a, b := at/length, min(1, (at+dash)/length)
		x1, y1, x2, y2 := l.x1+a*dx, l.y1+a*dy, l.x1+b*dx, l.y1+b*dy
		p.move(x1+nx, y1+ny)
		p.line(x2+nx, y2+ny)
		p.line(x2-nx, y2-ny)
		p.line(x1-nx, y1-ny)
		p.close()
	}
	p.end(l.ink.Color)
}

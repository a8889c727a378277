package pages

import (
	"image"
	"image/color"
	"math"

	"fyne.io/fyne/v2"
	"golang.org/x/image/vector"

	"anodewright/app/look"
	"anodewright/app/picture"
)

// paintCache keeps the pixels of a picture until something about it changes.
type paintCache struct {
	key    paintKey
	states []string
	image  *image.RGBA
}

type paintKey struct {
	drawing           *picture.Picture
	selected, hovered int
	dark              bool
	w, h              int
}

// pixels paints the filled shapes of the picture in w by h device pixels.
func (v *pictureView) pixels(w, h int) image.Image {
	if v.drawing == nil || w <= 0 || h <= 0 || v.asset == nil {
		return image.NewRGBA(image.Rect(0, 0, max(w, 1), max(h, 1)))
	}
	key := paintKey{v.drawing, v.selected, v.hovered, look.IsDark(), w, h}
	states := make([]string, len(v.asset.Zones))
	same := len(v.paint.states) == len(states)
	for i := range states {
		states[i] = string(v.state(i).State)
		same = same && v.paint.states[i] == states[i]
	}
	if v.paint.image == nil || v.paint.key != key || !same {
		v.paint = paintCache{key, states, v.painted(w, h, states)}
	}
	return v.paint.image
}

func (v *pictureView) painted(w, h int, states []string) *image.RGBA {
	b := &brush{img: image.NewRGBA(image.Rect(0, 0, w, h)), unit: float32(w) / v.drawing.W}
	if s := v.Size(); s != (fyne.Size{}) {
		b.unit = float32(w) / s.Width
	}
	fine := look.Px(1)
	for _, a := range v.drawing.Areas {
		switch a.Role {
		case picture.Sea:
			b.fill(a.Path, plainly(mixed(look.ColorAccentPale, look.ColorSurface, 0.45)))
		case picture.Bed:
			b.fill(a.Path, plainly(look.Color(look.ColorTrack)))
		}
	}
	for _, l := range v.drawing.Lines {
		switch l.Role {
		case picture.Waterline:
			b.dashed(l.Path, fine, look.Color(look.ColorAccent))
		case picture.Mudline:
			b.stroke(l.Path, false, fine*1.2, look.Color(look.ColorMuted))
		}
	}
	for _, a := range v.drawing.Areas {
		switch a.Role {
		case picture.Steel:
			b.fill(a.Path, plainly(look.Color(look.ColorHull)))
			b.stroke(a.Path, true, fine*0.8, look.Color(look.ColorEdge))
		case picture.Zone:
			b.fill(a.Path, b.hatched(states[a.Zone]))
			b.stroke(a.Path, true, fine*0.8, mixed(look.ColorInk, look.ColorSurface, 0.25))
		}
	}
	for _, l := range v.drawing.Lines {
		if l.Role == picture.Edge {
			b.stroke(l.Path, false, fine, look.Color(look.ColorInk))
		}
	}
	for _, zone := range []int{v.hovered, v.selected} {
		for _, a := range v.drawing.Areas {
			if a.Zone < 0 || a.Zone != zone || a.Role != picture.Zone {
				continue
			}
			if zone == v.selected {
				b.stroke(a.Path, true, 5*fine, look.Color(look.ColorSurface))
				b.stroke(a.Path, true, 2.5*fine, look.Color(look.ColorAccent))
			} else {
				b.stroke(a.Path, true, 1.6*fine, look.Color(look.ColorInk))
			}
		}
	}
	return b.img
}

// mixed is a colour with a share of another in it.
func mixed(a, b fyne.ThemeColorName, share float64) color.NRGBA {
	x, y := look.Color(a), look.Color(b)
	mix := func(p, q uint8) uint8 { return uint8(float64(p)*(1-share) + float64(q)*share + 0.5) }
	return color.NRGBA{R: mix(x.R, y.R), G: mix(x.G, y.G), B: mix(x.B, y.B), A: 0xff}
}

// brush fills and strokes paths, given in the picture's lengths, on an image;
// unit is how many pixels one length has.
type brush struct {
	img  *image.RGBA
	unit float32
}

// plainly is one colour everywhere.
func plainly(c color.NRGBA) func(x, y int) color.NRGBA {
	return func(int, int) color.NRGBA { return c }
}

// hatched is a state's colour with its hatch.
func (b *brush) hatched(state string) func(x, y int) color.NRGBA {
	fill, hatch, _ := look.StateColors(state)
	if fill == hatch {
		return plainly(fill)
	}
	unit := float64(b.unit * look.Scale())
	return func(x, y int) color.NRGBA {
		if look.Hatched(state, float64(x)+0.5, float64(y)+0.5, unit) {
			return hatch
		}
		return fill
	}
}

// fill fills a closed path.
func (b *brush) fill(path []picture.Point, at func(x, y int) color.NRGBA) {
	b.cover([][]picture.Point{path}, at)
}

// stroke draws along a path.
func (b *brush) stroke(path []picture.Point, closed bool, width float32, c color.NRGBA) {
	var pieces [][]picture.Point
	n := len(path)
	for i := range n {
		if i == n-1 && !closed {
			break
		}
		if p := stretch(path[i], path[(i+1)%n], width, 0.5*width); p != nil {
			pieces = append(pieces, p)
		}
	}
	b.cover(pieces, plainly(c))
}

// dashed draws a broken line along a path.
func (b *brush) dashed(path []picture.Point, width float32, c color.NRGBA) {
	dash := look.Px(5)
	var pieces [][]picture.Point
	for i := 1; i < len(path); i++ {
		p, q := path[i-1], path[i]
		length := float32(math.Hypot(float64(q.X-p.X), float64(q.Y-p.Y)))
		for d := float32(0); d < length; d += 2 * dash {
			s, e := d/length, min((d+dash)/length, 1)
			piece := stretch(picture.Point{X: p.X + s*(q.X-p.X), Y: p.Y + s*(q.Y-p.Y)}, picture.Point{X: p.X + e*(q.X-p.X), Y: p.Y + e*(q.Y-p.Y)}, width, 0)
			if piece != nil {
				pieces = append(pieces, piece)
			}
		}
	}
	b.cover(pieces, plainly(c))
}

// stretch is the rectangle around a straight line, longer by more at each end.
// All are wound the same way, so that overlaps do not cancel.
func stretch(a, b picture.Point, width, more float32) []picture.Point {
	dx, dy := b.X-a.X, b.Y-a.Y
	length := float32(math.Hypot(float64(dx), float64(dy)))
	if length < 1e-3 {
		return nil
	}
	dx, dy = dx/length, dy/length
	nx, ny := -dy*width/2, dx*width/2
	a.X, a.Y, b.X, b.Y = a.X-dx*more, a.Y-dy*more, b.X+dx*more, b.Y+dy*more
	return []picture.Point{{X: a.X + nx, Y: a.Y + ny}, {X: b.X + nx, Y: b.Y + ny}, {X: b.X - nx, Y: b.Y - ny}, {X: a.X - nx, Y: a.Y - ny}}
}

// cover paints closed paths together, within the box around them only.
func (b *brush) cover(paths [][]picture.Point, at func(x, y int) color.NRGBA) {
	lo, hi := picture.Point{X: math.MaxFloat32, Y: math.MaxFloat32}, picture.Point{X: -math.MaxFloat32, Y: -math.MaxFloat32}
	for _, path := range paths {
		for _, p := range path {
			lo.X, lo.Y, hi.X, hi.Y = min(lo.X, p.X), min(lo.Y, p.Y), max(hi.X, p.X), max(hi.Y, p.Y)
		}
	}
	box := image.Rect(int(math.Floor(float64(lo.X*b.unit))), int(math.Floor(float64(lo.Y*b.unit))),
		int(math.Ceil(float64(hi.X*b.unit))), int(math.Ceil(float64(hi.Y*b.unit))))
	if !box.Overlaps(b.img.Rect) {
		return
	}
	r := vector.NewRasterizer(box.Dx(), box.Dy())
	for _, path := range paths {
		for i, p := range path {
			x, y := p.X*b.unit-float32(box.Min.X), p.Y*b.unit-float32(box.Min.Y)
			if i == 0 {
				r.MoveTo(x, y)
			} else {
				r.LineTo(x, y)
			}
		}
		r.ClosePath()
	}
	mask := image.NewAlpha(image.Rect(0, 0, box.Dx(), box.Dy()))
	r.Draw(mask, mask.Rect, image.Opaque, image.Point{})
	seen := box.Intersect(b.img.Rect)
	for y := seen.Min.Y; y < seen.Max.Y; y++ {
		for x := seen.Min.X; x < seen.Max.X; x++ {
			if m := mask.Pix[(y-box.Min.Y)*mask.Stride+x-box.Min.X]; m > 0 {
				b.blend(x, y, at(x, y), m)
			}
		}
	}
}

// blend lays an opaque colour over a pixel with a coverage.
func (b *brush) blend(x, y int, c color.NRGBA, cover uint8) {
	p := b.img.Pix[b.img.PixOffset(x, y):]
	k := uint32(cover)
	for i, v := range [4]uint8{c.R, c.G, c.B, 0xff} {
		p[i] = uint8((uint32(v)*k + uint32(p[i])*(255-k) + 127) / 255)
	}
}

package pages

import (
	"math"

	"anodewright/anodes"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// part says what a mark of a sketch stands for; it chooses the colours.
type sketchPart int

const (
	partMetal sketchPart = iota // the casting
	partInsert
	partSteel
	partGap  // what is cut out of the metal
	partWorn // the outline of what is left at the utilisation factor
	partDimension
)

// form is the form of a mark.
type sketchForm int

const (
	formBox sketchForm = iota
	formRound
	formLine
	formLabel // its text in the middle of its place
)

// mark is one thing that a sketch draws, in the units of the drawing's size:
// its place is from X, Y to X+W, Y+H, and a line goes from the one corner to
// the other.
type sketchMark struct {
	Form       sketchForm
	Part       sketchPart
	X, Y, W, H float64
	Text       string
}

// sketchText is the height that a figure in a sketch takes, and its gap.
const (
	sketchText = 18.0
	sketchGap  = 6.0
)

// sketchOf draws a pattern to scale in a room of w by h: at the left seen from
// the side, at the right its section, which is enlarged where there is room.
// Dimensions are in mm, or in inches. It returns a word instead where no sizes are stated.
// unit is the length of one unit of text in the room's measure.
func sketchOf(p *hull.Pattern, w, h, unit float64) (marks []sketchMark, word string) {
	switch {
	case p.Shape == hull.Stated:
		return nil, say.T("A stated shape: resistance is given, no sizes are known.")
	case p.Length <= 0 || p.Shape == hull.ShortFlush && (p.Width <= 0 || p.Height <= 0) || p.Shape == hull.Bracelet && (p.Width <= 0 || p.Height <= 0):
		return nil, say.T("No sizes are stated but the exposed area.")
	}
	d := sketchDrawing{p: p, text: sketchText * unit, gap: sketchGap * unit}
	split := math.Round(0.62 * w)
	d.side(0, 0, split-d.gap, h)
	d.section(split+d.gap, 0, w-split-d.gap, h)
	return d.marks, ""
}

// drawing collects the marks of one sketch.
type sketchDrawing struct {
	p         *hull.Pattern
	text, gap float64
	marks     []sketchMark
}

func (d *sketchDrawing) add(f sketchForm, part sketchPart, x, y, w, h float64) {
	d.marks = append(d.marks, sketchMark{Form: f, Part: part, X: x, Y: y, W: w, H: h})
}

// across draws a dimension line below what it measures, from x to x+w.
func (d *sketchDrawing) across(x, y, w, metres float64) {
	tick := d.gap / 2
	d.add(formLine, partDimension, x, y, w, 0)
	d.add(formLine, partDimension, x, y-tick, 0, 2*tick)
	d.add(formLine, partDimension, x+w, y-tick, 0, 2*tick)
	d.marks = append(d.marks, sketchMark{formLabel, partDimension, x, y + tick/2, w, d.text, millimetres(metres)})
}

// up draws a dimension line at the right of what it measures, from y to y+h.
func (d *sketchDrawing) up(x, y, h, metres float64) {
	tick := d.gap / 2
	d.add(formLine, partDimension, x, y, 0, h)
	d.add(formLine, partDimension, x-tick, y, 2*tick, 0)
	d.add(formLine, partDimension, x-tick, y+h, 2*tick, 0)
	d.marks = append(d.marks, sketchMark{formLabel, partDimension, x + tick, y + h/2 - d.text/2, d.figure(), d.text, millimetres(metres)})
}

// figure is the room for a figure beside an upright dimension line.
func (d *sketchDrawing) figure() float64 { return 2 * d.text }

func millimetres(m float64) string { return session.Shown(say.Thin, 1000*m, 0) }

// thickness is how high the anode stands in the side view, m.
func thickness(p *hull.Pattern) float64 {
	switch {
	case slender(p):
		return 2 * radiusOf(p)
	case p.Shape == hull.SoilRod:
		return p.Diameter
	case p.Height > 0:
		return p.Height
	}
	return p.Width / 2
}

func slender(p *hull.Pattern) bool {
	return p.Shape == hull.LongSlender || p.Shape == hull.ShortSlender
}

func radiusOf(p *hull.Pattern) float64 {
	if p.Radius > 0 {
		return p.Radius
	}
	return p.Girth / (2 * math.Pi)
}

// side draws the anode seen from the side.
func (d *sketchDrawing) side(x, y, w, h float64) {
	p := d.p
	if p.Shape == hull.Bracelet {
		d.bracelet(x, y, w, h)
		return
	}
	length, thick, off := p.Length, thickness(p), 0.0
	if slender(p) {
		off = p.Standoff
	}
	over := 0.12 * length // of the insert or the cable beyond each end
	plate := 1.5 * d.gap
	roomW, roomH := w-d.figure()-2*d.gap, h-d.text-3*d.gap-plate
	scale := min(roomW/(length+2*over), roomH/(thick+off))
	left, top := x+(roomW-scale*(length+2*over))/2+scale*over, y+d.gap+(roomH-scale*(thick+off))/2
	bottom := top + scale*(thick+off)
	bar := max(2, d.gap/2)
	switch {
	case p.Shape == hull.SoilRod:
		d.add(formLine, partInsert, left+scale*length, top+scale*thick/2, scale*over, 0) // its cable
	case off > 0:
		mid := top + scale*thick/2 - bar/2
		d.add(formBox, partInsert, left-scale*over, mid, scale*(length+2*over), bar)
		d.add(formBox, partInsert, left-scale*over, mid, bar, bottom-mid)
		d.add(formBox, partInsert, left+scale*(length+over)-bar, mid, bar, bottom-mid)
	default:
		d.add(formBox, partInsert, left-scale*over, bottom-bar, scale*(length+2*over), bar)
	}
	if p.Shape != hull.SoilRod {
		d.add(formBox, partSteel, x, bottom, roomW, plate)
	}
	d.add(formBox, partMetal, left, top, scale*length, scale*thick)
	d.wornSide(left, top, scale*length, scale*thick)
	d.up(x+roomW+d.gap, top, scale*thick, thick)
	if off > 0 {
		d.up(x+roomW+d.gap, top+scale*thick, scale*off, off)
	}
	d.across(left, bottom+plate+d.gap, scale*length, length)
}

// wornSide outlines what is left at the utilisation factor: toward the steel
// for what lies on it, about the middle for what stands off.
func (d *sketchDrawing) wornSide(left, top, w, h float64) {
	length, _, height := anodes.Left(d.p, d.p.Utilisation)
	y := top + h*(1-height)
	if slender(d.p) || d.p.Shape == hull.SoilRod {
		y = top + h*(1-height)/2
	}
	d.add(formBox, partWorn, left+w*(1-length)/2, y, w*length, h*height)
}

// bracelet draws a bracelet on its pipe.
func (d *sketchDrawing) bracelet(x, y, w, h float64) {
	p := d.p
	inner := p.Width / math.Pi // but for the gaps between its halves
	outer := inner + 2*p.Height
	over := 0.25 * p.Length
	roomW, roomH := w-d.figure()-2*d.gap, h-d.text-3*d.gap
	scale := min(roomW/(p.Length+2*over), roomH/outer)
	left, top := x+(roomW-scale*p.Length)/2, y+d.gap+(roomH-scale*outer)/2
	d.add(formBox, partSteel, left-scale*over, top+scale*p.Height, scale*(p.Length+2*over), scale*inner)
	d.add(formBox, partMetal, left, top, scale*p.Length, scale*outer)
	d.add(formLine, partInsert, left, top+scale*outer/2, scale*p.Length, 0)
	d.up(x+roomW+d.gap, top, scale*outer, outer)
	d.across(left, top+scale*outer+d.gap, scale*p.Length, p.Length)
}

// section draws the anode's section.
func (d *sketchDrawing) section(x, y, w, h float64) {
	p := d.p
	plate := 1.5 * d.gap
	roomW, roomH := w-d.figure()-2*d.gap, h-d.text-3*d.gap-plate
	_, wide, high := anodes.Left(p, p.Utilisation)
	core := 0.0 // the side of a square insert as large as the one there is
	if p.InsertVolume > 0 {
		core = math.Sqrt(p.InsertVolume / p.Length)
	}
	switch {
	case p.Shape == hull.Bracelet:
		inner := p.Width / math.Pi
		outer := inner + 2*p.Height
		scale := min(roomW, roomH+plate) / outer
		left, top := x+(roomW-scale*outer)/2, y+d.gap+(roomH+plate-scale*outer)/2
		left2 := inner + 2*p.Height*high
		d.add(formRound, partMetal, left, top, scale*outer, scale*outer)
		d.add(formRound, partWorn, left+scale*(outer-left2)/2, top+scale*(outer-left2)/2, scale*left2, scale*left2)
		d.add(formBox, partGap, left, top+scale*outer/2-1, scale*outer, 2) // between its halves
		d.add(formRound, partSteel, left+scale*p.Height, top+scale*p.Height, scale*inner, scale*inner)
		d.up(left+scale*outer+d.gap, top, scale*p.Height, p.Height)
		d.across(left+scale*p.Height, top+scale*outer+d.gap, scale*inner, inner)
	case slender(p) || p.Shape == hull.SoilRod:
		across := thickness(p)
		roomW = w - 2*d.gap
		scale := min(roomW, roomH+plate) / across * 0.9
		size := scale * across
		left, top := x+(roomW-size)/2, y+d.gap+(roomH+plate-size)/2
		core *= 2 / math.Sqrt(math.Pi)
		d.add(formRound, partMetal, left, top, size, size)
		d.add(formRound, partWorn, left+size*(1-wide)/2, top+size*(1-high)/2, size*wide, size*high)
		d.add(formRound, partInsert, left+(size-scale*core)/2, top+(size-scale*core)/2, scale*core, scale*core)
		d.across(left, top+size+d.gap, size, across)
	default:
		height := thickness(p)
		scale := min(roomW/p.Width, roomH/height) * 0.9
		left, top := x+(roomW-scale*p.Width)/2, y+d.gap+(roomH-scale*height)/2
		bottom := top + scale*height
		d.add(formBox, partSteel, x, bottom, roomW, plate)
		d.add(formBox, partMetal, left, top, scale*p.Width, scale*height)
		d.add(formBox, partWorn, left+scale*p.Width*(1-wide)/2, bottom-scale*height*high, scale*p.Width*wide, scale*height*high)
		d.add(formBox, partInsert, left+scale*(p.Width-core)/2, bottom-scale*min(core, height), scale*core, scale*min(core, height))
		if p.Height > 0 {
			d.up(x+roomW+d.gap, top, scale*height, height)
		}
		d.across(left, bottom+plate+d.gap, scale*p.Width, p.Width)
	}
}

package sheet

import (
	"sync"

	"golang.org/x/image/font"
	"golang.org/x/image/font/sfnt"
	"golang.org/x/image/math/fixed"

	fonts "anodewright/assets/font"
)

var face = sync.OnceValue(func() *sfnt.Font {
	f, err := sfnt.Parse(fonts.Regular)
	if err != nil {
		panic("sheet: the shipped font cannot be read: " + err.Error())
	}
	return f
})

// unit is the size at which outlines are read: big, so that fixed-point
// figures lose nothing.
const unit = 1024

// width is how wide a text is at a size.
func width(text string, size float32) float32 {
	var buf sfnt.Buffer
	total := fixed.Int26_6(0)
	for _, r := range text {
		i, err := face().GlyphIndex(&buf, r)
		if err != nil {
			continue
		}
		if a, err := face().GlyphAdvance(&buf, i, fixed.I(unit), font.HintingNone); err == nil {
			total += a
		}
	}
	return float32(total) / 64 / unit * size
}

// pen is told the outlines of glyphs.
type pen interface {
	move(x, y float32)
	line(x, y float32)
	quad(x1, y1, x, y float32)
	close()
}

// outline tells a pen the outlines of a text.
func (w word) outline(p pen) {
	var buf sfnt.Buffer
	x := w.x
	scale := w.size / unit / 64
	for _, r := range w.text {
		i, err := face().GlyphIndex(&buf, r)
		if err != nil {
			continue
		}
		segments, err := face().LoadGlyph(&buf, i, fixed.I(unit), nil)
		if err != nil {
			continue
		}
		at := func(q fixed.Point26_6) (float32, float32) { return x + float32(q.X)*scale, w.y + float32(q.Y)*scale }
		open := false
		for _, s := range segments {
			ax, ay := at(s.Args[0])
			switch s.Op {
			case sfnt.SegmentOpMoveTo:
				if open {
					p.close()
				}
				open = true
				p.move(ax, ay)
			case sfnt.SegmentOpLineTo:
				p.line(ax, ay)
			case sfnt.SegmentOpQuadTo: // a TrueType font has no cubic ones
				bx, by := at(s.Args[1])
				p.quad(ax, ay, bx, by)
			}
		}
		if open {
			p.close()
		}
		if a, err := face().GlyphAdvance(&buf, i, fixed.I(unit), font.HintingNone); err == nil {
			x += float32(a) * scale
		}
	}
}

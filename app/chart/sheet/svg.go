package sheet

import (
	"bytes"
	"encoding/xml"
	"fmt"
	"image/color"
	"strconv"
)

// SVG returns the sheet as an SVG 1.1 picture. Texts are outlines with the
// text itself as their title, which readers and searches find.
func (s *Sheet) SVG() []byte {
	var b bytes.Buffer
	fmt.Fprintf(&b, `<svg xmlns="http://www.w3.org/2000/svg" width="%s" height="%s" viewBox="0 0 %s %s">`+"\n", num(s.w), num(s.h), num(s.w), num(s.h))
	fmt.Fprintf(&b, `<rect width="%s" height="%s" fill="%s"/>`+"\n", num(s.w), num(s.h), hexed(s.paper))
	for _, l := range s.lines {
		dash := ""
		if l.ink.Dash > 0 {
			dash = fmt.Sprintf(` stroke-dasharray="%s"`, num(l.ink.Dash))
		}
		fmt.Fprintf(&b, `<path d="M%s %sL%s %s" stroke="%s" stroke-width="%s"%s/>`+"\n", num(l.x1), num(l.y1), num(l.x2), num(l.y2), hexed(l.ink.Color), num(l.ink.Width), dash)
	}
	for _, w := range s.texts {
		fmt.Fprintf(&b, `<g fill="%s"><title>`, hexed(w.color))
		xml.EscapeText(&b, []byte(w.text))
		b.WriteString(`</title><path d="`)
		w.outline(&svgPen{b: &b})
		b.WriteString(`"/></g>` + "\n")
	}
	b.WriteString("</svg>\n")
	return b.Bytes()
}

type svgPen struct{ b *bytes.Buffer }

func (p *svgPen) move(x, y float32) { fmt.Fprintf(p.b, "M%s %s", num(x), num(y)) }
func (p *svgPen) line(x, y float32) { fmt.Fprintf(p.b, "L%s %s", num(x), num(y)) }
func (p *svgPen) quad(x1, y1, x, y float32) {
	fmt.Fprintf(p.b, "Q%s %s %s %s", num(x1), num(y1), num(x), num(y))
}
func (p *svgPen) close() { p.b.WriteByte('Z') }

// num writes a length with two decimals at most.
func num(x float32) string {
	return strconv.FormatFloat(float64(int(x*100+copysignHalf(x)))/100, 'f', -1, 64)
}

func copysignHalf(x float32) float32 {
	if x < 0 {
		return -0.5
	}
	return 0.5
}

func hexed(c color.NRGBA) string { return fmt.Sprintf("#%02x%02x%02x", c.R, c.G, c.B) }

package sheet

import (
	"bytes"
	"compress/zlib"
	"fmt"
	"image/color"
)

// PDF returns the sheet as a PDF 1.4 file of one page. Texts are outlines.
func (s *Sheet) PDF() []byte {
	content := &pdfPen{h: s.h}
	fmt.Fprintf(&content.b, "%s rg 0 0 %s %s re f\n1 J\n", rgb(s.paper), num(s.w), num(s.h))
	for _, l := range s.lines {
		dash := "[] 0 d"
		if l.ink.Dash > 0 {
			dash = fmt.Sprintf("[%s] 0 d", num(l.ink.Dash))
		}
		fmt.Fprintf(&content.b, "%s RG %s w %s %s %s m %s %s l S\n", rgb(l.ink.Color), num(l.ink.Width), dash,
			num(l.x1), num(s.h-l.y1), num(l.x2), num(s.h-l.y2))
	}
	for _, w := range s.texts {
		fmt.Fprintf(&content.b, "%s rg\n", rgb(w.color))
		w.outline(content)
		content.b.WriteString("f\n")
	}

	var packed bytes.Buffer
	z := zlib.NewWriter(&packed)
	z.Write(content.b.Bytes()) // to memory: it cannot fail
	z.Close()

	var b bytes.Buffer
	var at []int
	object := func(body string) {
		at = append(at, b.Len())
		fmt.Fprintf(&b, "%d 0 obj\n%s\nendobj\n", len(at), body)
	}
	b.WriteString("%PDF-1.4\n")
	object("<< /Type /Catalog /Pages 2 0 R >>")
	object("<< /Type /Pages /Kids [3 0 R] /Count 1 >>")
	object(fmt.Sprintf("<< /Type /Page /Parent 2 0 R /MediaBox [0 0 %s %s] /Resources << >> /Contents 4 0 R >>", num(s.w), num(s.h)))
	object(fmt.Sprintf("<< /Length %d /Filter /FlateDecode >>\nstream\n%s\nendstream", packed.Len(), packed.Bytes()))
	table := b.Len()
	fmt.Fprintf(&b, "xref\n0 %d\n0000000000 65535 f \n", len(at)+1)
	for _, n := range at {
		fmt.Fprintf(&b, "%010d 00000 n \n", n)
	}
	fmt.Fprintf(&b, "trailer\n<< /Size %d /Root 1 0 R >>\nstartxref\n%d\n%%%%EOF\n", len(at)+1, table)
	return b.Bytes()
}

// pdfPen writes outlines as PDF operators. PDF counts from the lower edge and
// knows cubic curves only.
type pdfPen struct {
	b    bytes.Buffer
	h    float32
	x, y float32
}

func (p *pdfPen) move(x, y float32) {
	fmt.Fprintf(&p.b, "%s %s m\n", num(x), num(p.h-y))
	p.x, p.y = x, y
}

func (p *pdfPen) line(x, y float32) {
	fmt.Fprintf(&p.b, "%s %s l\n", num(x), num(p.h-y))
	p.x, p.y = x, y
}

func (p *pdfPen) quad(x1, y1, x, y float32) {
	toward := func(from, by float32) float32 { return from + 2*(by-from)/3 }
	fmt.Fprintf(&p.b, "%s %s %s %s %s %s c\n", num(toward(p.x, x1)), num(p.h-toward(p.y, y1)), num(toward(x, x1)), num(p.h-toward(y, y1)), num(x), num(p.h-y))
	p.x, p.y = x, y
}

func (p *pdfPen) close() { p.b.WriteString("h\n") }

func rgb(c color.NRGBA) string {
	part := func(v uint8) string { return num(float32(v) / 255) }
	return part(c.R) + " " + part(c.G) + " " + part(c.B)
}

package pages

import (
	"image/color"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"

	"anodewright/app/look"
	"anodewright/hull"
)

// sketch shows the sketch of a pattern.
type sketch struct {
	widget.BaseWidget
	pattern *hull.Pattern
	height  float32
	word    *look.Paragraph
	objects []fyne.CanvasObject
}

func newSketch(height float32) *sketch {
	s := &sketch{height: height, word: look.Note("")}
	s.ExtendBaseWidget(s)
	return s
}

// show shows another pattern; nil shows nothing.
func (s *sketch) show(p *hull.Pattern) {
	s.pattern = p
	s.Refresh()
}

// CreateRenderer implements fyne.Widget.
func (s *sketch) CreateRenderer() fyne.WidgetRenderer { return &sketchRenderer{s} }

type sketchRenderer struct{ s *sketch }

func (r *sketchRenderer) Destroy()                     {}
func (r *sketchRenderer) Objects() []fyne.CanvasObject { return r.s.objects }
func (r *sketchRenderer) Layout(size fyne.Size)        { r.s.draw(size) }

func (r *sketchRenderer) MinSize() fyne.Size {
	height := r.s.height
	if r.s.pattern != nil {
		if _, word := sketchOf(r.s.pattern, 1, 1, 1); word != "" {
			height = 24
		}
	}
	return fyne.NewSize(look.Px(220), look.Px(height))
}

func (r *sketchRenderer) Refresh() {
	r.s.draw(r.s.Size())
	canvas.Refresh(r.s)
}

// draw makes the objects of the sketch in a room.
func (s *sketch) draw(size fyne.Size) {
	s.objects = nil
	if s.pattern == nil || size.Width < 1 || size.Height < 1 {
		return
	}
	marks, word := sketchOf(s.pattern, float64(size.Width), float64(size.Height), float64(look.Px(1)))
	if word != "" {
		s.word.SetText(word)
		s.word.Resize(fyne.NewSize(size.Width, size.Height))
		s.objects = []fyne.CanvasObject{s.word}
	}
	for _, m := range marks {
		s.objects = append(s.objects, m.object())
	}
}

// object makes the canvas object of a mark.
func (m sketchMark) object() fyne.CanvasObject {
	fill, stroke, width := m.Part.colours()
	x, y, w, h := float32(m.X), float32(m.Y), float32(m.W), float32(m.H)
	var o fyne.CanvasObject
	switch m.Form {
	case formBox:
		r := canvas.NewRectangle(fill)
		r.StrokeColor, r.StrokeWidth = stroke, width
		o = r
	case formRound:
		c := canvas.NewCircle(fill)
		c.StrokeColor, c.StrokeWidth = stroke, width
		o = c
	case formLine:
		l := canvas.NewLine(stroke)
		l.StrokeWidth = max(width, look.Px(1))
		l.Position1, l.Position2 = fyne.NewPos(x, y), fyne.NewPos(x+w, y+h)
		return l
	case formLabel:
		t := canvas.NewText(m.Text, stroke)
		t.TextSize = fyne.CurrentApp().Settings().Theme().Size(theme.SizeNameCaptionText)
		t.Alignment = fyne.TextAlignCenter
		o = t
	}
	o.Move(fyne.NewPos(x, y))
	o.Resize(fyne.NewSize(w, h))
	return o
}

// colours returns how a part is filled and outlined.
func (p sketchPart) colours() (fill, stroke color.Color, width float32) {
	fine := look.Px(1)
	switch p {
	case partMetal:
		return look.Color(look.ColorAccentPale), look.Color(look.ColorAccent), 1.5 * fine
	case partInsert:
		return look.Color(look.ColorMuted), look.Color(look.ColorMuted), fine
	case partSteel:
		return look.Color(look.ColorHull), look.Color(look.ColorEdge), fine
	case partGap:
		return look.Color(look.ColorSurface), look.Color(look.ColorSurface), 0
	case partWorn:
		return color.Transparent, look.Color(look.ColorAccent), fine
	}
	return color.Transparent, look.Color(look.ColorMuted), fine
}

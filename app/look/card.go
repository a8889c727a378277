package look

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/widget"
)

// CardBox is a rounded panel with a fine border that holds one content under
// an optional heading.
type CardBox struct {
	widget.BaseWidget
	title   *Text
	extra   fyne.CanvasObject
	content fyne.CanvasObject

	panel *canvas.Rectangle
}

// Card returns a panel with a heading, which may be empty, and a content.
func Card(title string, content fyne.CanvasObject) *CardBox {
	c := &CardBox{title: Heading(title), content: content, panel: canvas.NewRectangle(nil)}
	c.title.Shrink = true
	c.ExtendBaseWidget(c)
	return c
}

// SetTitle changes the heading.
func (c *CardBox) SetTitle(s string) {
	c.title.SetText(s)
	c.Refresh()
}

// SetExtra puts an object at the right end of the heading's line, as the total
// of a table; nil takes it away.
func (c *CardBox) SetExtra(o fyne.CanvasObject) {
	c.extra = o
	c.Refresh()
}

// SetContent changes the content.
func (c *CardBox) SetContent(o fyne.CanvasObject) {
	c.content = o
	c.Refresh()
}

// CreateRenderer implements fyne.Widget.
func (c *CardBox) CreateRenderer() fyne.WidgetRenderer {
	r := &cardRenderer{c}
	r.update()
	return r
}

type cardRenderer struct{ c *CardBox }

func (r *cardRenderer) Destroy() {}

func (r *cardRenderer) update() {
	p := r.c.panel
	p.FillColor = Color(ColorSurface)
	p.StrokeColor = Color(ColorLine)
	p.StrokeWidth = 1
	p.CornerRadius = 8
}

func (r *cardRenderer) Objects() []fyne.CanvasObject {
	out := []fyne.CanvasObject{r.c.panel}
	if r.head() > 0 {
		out = append(out, r.c.title)
	}
	if r.c.extra != nil {
		out = append(out, r.c.extra)
	}
	if r.c.content != nil {
		out = append(out, r.c.content)
	}
	return out
}

// head is the height of the heading's line, nought if there is none.
func (r *cardRenderer) head() float32 {
	h := float32(0)
	if r.c.title.String() != "" {
		h = r.c.title.MinSize().Height
	}
	if r.c.extra != nil {
		h = max(h, r.c.extra.MinSize().Height)
	}
	if h > 0 {
		h += Px(6)
	}
	return h
}

func cardPad() float32 { return Px(12) }

func (r *cardRenderer) MinSize() fyne.Size {
	s := fyne.NewSize(Px(40), 0)
	if r.c.content != nil {
		s = s.Max(r.c.content.MinSize())
	}
	s.Height += r.head()
	return s.AddWidthHeight(2*cardPad(), 2*cardPad())
}

func (r *cardRenderer) Layout(size fyne.Size) {
	pad, head := cardPad(), r.head()
	r.c.panel.Resize(size)
	inner := size.Width - 2*pad
	if r.c.extra != nil {
		e := r.c.extra.MinSize()
		r.c.extra.Resize(e)
		r.c.extra.Move(fyne.NewPos(size.Width-pad-e.Width, pad+(head-Px(6)-e.Height)/2))
		inner -= e.Width + pad
	}
	r.c.title.Resize(fyne.NewSize(max(inner, 0), max(head-Px(6), 0)))
	r.c.title.Move(fyne.NewPos(pad, pad))
	if r.c.content != nil {
		r.c.content.Resize(fyne.NewSize(size.Width-2*pad, size.Height-2*pad-head))
		r.c.content.Move(fyne.NewPos(pad, pad+head))
	}
}

func (r *cardRenderer) Refresh() {
	r.update()
	r.c.title.Refresh()
	if r.c.content != nil {
		r.c.content.Refresh()
	}
	if r.c.extra != nil {
		r.c.extra.Refresh()
	}
	r.Layout(r.c.Size())
	canvas.Refresh(r.c)
}

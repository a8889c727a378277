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
	corner  fyne.CanvasObject
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

// SetTitle changes the heading. The content is left alone where the heading
// keeps its height.
func (c *CardBox) SetTitle(s string) {
	if s == c.title.String() {
		return
	}
	r := &cardRenderer{c}
	before, _ := r.head(c.Size().Width)
	c.title.SetText(s)
	if after, _ := r.head(c.Size().Width); after != before {
		c.Refresh()
	}
}

// SetExtra puts an object at the right end of the heading's line, as the total
// of a table; nil takes it away.
func (c *CardBox) SetExtra(o fyne.CanvasObject) {
	c.extra = o
	c.Refresh()
}

// SetCorner puts a small object into the upper right corner, right of the
// extra, as what folds the card.
func (c *CardBox) SetCorner(o fyne.CanvasObject) {
	c.corner = o
	c.Refresh()
}

// Around is the height that the card takes beside its content: its margins and
// its heading, which may have two lines at the card's width.
func (c *CardBox) Around() float32 {
	head, _ := (&cardRenderer{c}).head(c.Size().Width)
	return head + 2*cardPad()
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
	if h, _ := r.head(0); h > 0 {
		out = append(out, r.c.title)
	}
	if r.c.extra != nil {
		out = append(out, r.c.extra)
	}
	if r.c.corner != nil {
		out = append(out, r.c.corner)
	}
	if r.c.content != nil {
		out = append(out, r.c.content)
	}
	return out
}

// head is the height of the heading's line or lines, nought if there is none.
// The extra gets a line of its own where the heading leaves it no room.
func (r *cardRenderer) head(width float32) (height float32, twoLines bool) {
	title, extra := fyne.Size{}, fyne.Size{}
	if r.c.title.String() != "" {
		title = r.c.title.MinSize()
	}
	if r.c.extra != nil {
		extra = r.c.extra.MinSize()
	}
	if r.c.corner != nil {
		corner := r.c.corner.MinSize()
		title.Height = max(title.Height, corner.Height)
		width -= corner.Width + cardPad()
	}
	whole := fyne.MeasureText(r.c.title.String(), r.c.title.text.TextSize, r.c.title.text.TextStyle).Width
	switch twoLines = r.c.extra != nil && title.Height > 0 && whole+cardPad()+extra.Width > width-2*cardPad() && width > 0; {
	case twoLines:
		height = title.Height + extra.Height
	default:
		height = max(title.Height, extra.Height)
	}
	if height > 0 {
		height += under()
	}
	return height, twoLines
}

func cardPad() float32 { return Air(11) }

// under is the room between the heading and the content.
func under() float32 { return Air(5) }

func (r *cardRenderer) MinSize() fyne.Size {
	s := fyne.NewSize(Px(40), 0)
	if r.c.content != nil {
		s = s.Max(r.c.content.MinSize())
	}
	head, _ := r.head(max(r.c.Size().Width, s.Width+2*cardPad()))
	s.Height += head
	return s.AddWidthHeight(2*cardPad(), 2*cardPad())
}

func (r *cardRenderer) Layout(size fyne.Size) {
	pad := cardPad()
	head, twoLines := r.head(size.Width)
	r.c.panel.Resize(size)
	inner, line := size.Width-2*pad, max(head-under(), 0)
	right := size.Width - pad
	if r.c.corner != nil {
		c := r.c.corner.MinSize()
		first := line
		if twoLines {
			first -= r.c.extra.MinSize().Height
		}
		r.c.corner.Resize(c)
		r.c.corner.Move(fyne.NewPos(right-c.Width, pad+(first-c.Height)/2))
		inner -= c.Width + pad
		right -= c.Width + pad
	}
	if r.c.extra != nil {
		e := r.c.extra.MinSize()
		at := fyne.NewPos(right-e.Width, pad+(line-e.Height)/2)
		if twoLines {
			line -= e.Height
			at = fyne.NewPos(pad, pad+line)
		} else {
			inner -= e.Width + pad
		}
		r.c.extra.Resize(e)
		r.c.extra.Move(at)
	}
	r.c.title.Resize(fyne.NewSize(max(inner, 0), line))
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
	if r.c.corner != nil {
		r.c.corner.Refresh()
	}
	r.Layout(r.c.Size())
	canvas.Refresh(r.c)
}

package grid

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"

	"anodewright/app/look"
)

// bar is a scroll bar that is always to be seen while there is more than fits.
type bar struct {
	widget.BaseWidget
	upright          bool
	total, view, pos float32
	moved            func(pos float32)

	track, thumb *canvas.Rectangle
}

func newBar(upright bool, moved func(float32)) *bar {
	b := &bar{upright: upright, moved: moved, track: canvas.NewRectangle(nil), thumb: canvas.NewRectangle(nil)}
	b.ExtendBaseWidget(b)
	return b
}

// set places the bar and its thumb.
func (b *bar) set(x, y, w, h, total, view, pos float32) {
	b.Hidden = false
	b.total, b.view, b.pos = total, view, pos
	b.Move(fyne.NewPos(x, y))
	b.Resize(fyne.NewSize(w, h))
	b.draw()
}

func (b *bar) length() float32 {
	if b.upright {
		return b.Size().Height
	}
	return b.Size().Width
}

// thumbAt returns where the thumb begins and how long it is.
func (b *bar) thumbAt() (from, long float32) {
	if b.total <= b.view {
		return 0, b.length()
	}
	long = min(max(b.length()*b.view/b.total, look.Px(24)), b.length())
	return (b.length() - long) * b.pos / (b.total - b.view), long
}

func (b *bar) draw() {
	b.track.FillColor = look.Color(theme.ColorNameScrollBarBackground)
	b.thumb.FillColor = look.Color(theme.ColorNameScrollBar)
	b.track.Resize(b.Size())
	from, long := b.thumbAt()
	if b.upright {
		b.thumb.Move(fyne.NewPos(2, from+1))
		b.thumb.Resize(fyne.NewSize(max(b.Size().Width-4, 0), max(long-2, 0)))
	} else {
		b.thumb.Move(fyne.NewPos(from+1, 2))
		b.thumb.Resize(fyne.NewSize(max(long-2, 0), max(b.Size().Height-4, 0)))
	}
	b.thumb.CornerRadius = 3
}

// Dragged moves the content with the thumb.
func (b *bar) Dragged(ev *fyne.DragEvent) {
	_, long := b.thumbAt()
	free := b.length() - long
	if free <= 0 {
		return
	}
	d := ev.Dragged.DX
	if b.upright {
		d = ev.Dragged.DY
	}
	b.moved(b.pos + d*(b.total-b.view)/free)
}

// DragEnd implements fyne.Draggable.
func (b *bar) DragEnd() {}

// MouseDown beside the thumb turns a page.
func (b *bar) MouseDown(ev *desktop.MouseEvent) {
	at := ev.Position.X
	if b.upright {
		at = ev.Position.Y
	}
	switch from, long := b.thumbAt(); {
	case at < from:
		b.moved(b.pos - b.view)
	case at > from+long:
		b.moved(b.pos + b.view)
	}
}

// MouseUp implements desktop.Mouseable.
func (b *bar) MouseUp(*desktop.MouseEvent) {}

func (b *bar) CreateRenderer() fyne.WidgetRenderer { return &barRenderer{b} }

type barRenderer struct{ b *bar }

func (r *barRenderer) Destroy()           {}
func (r *barRenderer) Layout(fyne.Size)   { r.b.draw() }
func (r *barRenderer) MinSize() fyne.Size { return fyne.NewSize(1, 1) }
func (r *barRenderer) Refresh()           { r.b.draw() }
func (r *barRenderer) Objects() []fyne.CanvasObject {
	return []fyne.CanvasObject{r.b.track, r.b.thumb}
}

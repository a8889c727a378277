package grid

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/widget"
)

// clip shows its objects, which it neither moves nor sizes, within its bounds.
type clip struct {
	widget.BaseWidget
	objects []fyne.CanvasObject
}

func newClip() *clip {
	c := &clip{}
	c.ExtendBaseWidget(c)
	return c
}

// place moves and sizes the clip and empties it.
func (c *clip) place(x, y, w, h float32) {
	c.Move(fyne.NewPos(x, y))
	c.Resize(fyne.NewSize(max(w, 0), max(h, 0)))
	c.objects = c.objects[:0]
}

func (c *clip) add(o ...fyne.CanvasObject) { c.objects = append(c.objects, o...) }

func (c *clip) CreateRenderer() fyne.WidgetRenderer { return &clipRenderer{c} }

type clipRenderer struct{ c *clip }

func (r *clipRenderer) Destroy()                     {}
func (r *clipRenderer) Layout(fyne.Size)             {}
func (r *clipRenderer) MinSize() fyne.Size           { return fyne.Size{} }
func (r *clipRenderer) Objects() []fyne.CanvasObject { return r.c.objects }
func (r *clipRenderer) Refresh()                     {}

// IsClip makes Fyne's painters cut off what lies outside.
func (r *clipRenderer) IsClip() {}

// wheel passes the mouse wheel on to the grid. It lies over the editor, whose
// own scroller would swallow it.
type wheel struct {
	widget.BaseWidget
	g *Grid
}

func newWheel(g *Grid) *wheel {
	w := &wheel{g: g}
	w.ExtendBaseWidget(w)
	return w
}

func (w *wheel) Scrolled(ev *fyne.ScrollEvent) { w.g.Scrolled(ev) }

func (w *wheel) CreateRenderer() fyne.WidgetRenderer { return widget.NewSimpleRenderer(newClip()) }

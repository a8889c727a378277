package pages

import (
	"image/color"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/container"

	"anodewright/app/look"
)

// beside lays out two objects side by side: the second as wide as given at
// text scale 1, the first with the rest.
type beside struct{ width float32 }

func (b beside) MinSize(objects []fyne.CanvasObject) fyne.Size {
	first, second := objects[0].MinSize(), objects[1].MinSize()
	return fyne.NewSize(first.Width+gap()+look.Px(b.width), max(first.Height, second.Height))
}

func (b beside) Layout(objects []fyne.CanvasObject, size fyne.Size) {
	w := min(look.Px(b.width), size.Width*0.45)
	objects[0].Move(fyne.NewPos(0, 0))
	objects[0].Resize(fyne.NewSize(size.Width-w-gap(), size.Height))
	objects[1].Move(fyne.NewPos(size.Width-w, 0))
	objects[1].Resize(fyne.NewSize(w, size.Height))
}

// above lays out two objects one above the other: the second as high as given
// at text scale 1, but no more than a share of the whole; the first with the
// rest.
type above struct {
	height float32
	most   float32
}

func (a above) MinSize(objects []fyne.CanvasObject) fyne.Size {
	first, second := objects[0].MinSize(), objects[1].MinSize()
	return fyne.NewSize(max(first.Width, second.Width), first.Height+gap()+second.Height)
}

func (a above) Layout(objects []fyne.CanvasObject, size fyne.Size) {
	h := min(look.Px(a.height), size.Height*a.most)
	objects[0].Move(fyne.NewPos(0, 0))
	objects[0].Resize(fyne.NewSize(size.Width, size.Height-h-gap()))
	objects[1].Move(fyne.NewPos(0, size.Height-h))
	objects[1].Resize(fyne.NewSize(size.Width, h))
}

// padded keeps a margin around one object.
type padded struct{}

func (padded) MinSize(objects []fyne.CanvasObject) fyne.Size {
	return objects[0].MinSize().Add(fyne.NewSize(2*gap(), 2*gap()))
}

func (padded) Layout(objects []fyne.CanvasObject, size fyne.Size) {
	objects[0].Move(fyne.NewPos(gap(), gap()))
	objects[0].Resize(size.Subtract(fyne.NewSize(2*gap(), 2*gap())))
}

func gap() float32 { return look.Px(10) }

// column lays out objects one below the other, each as high as it needs to be
// at the width there is: texts that wrap know that only once they have it.
type column struct{}

func (column) MinSize(objects []fyne.CanvasObject) fyne.Size {
	var size fyne.Size
	for _, o := range objects {
		m := o.MinSize()
		size.Width = max(size.Width, m.Width)
		size.Height += m.Height + columnGap()
	}
	return size
}

func (column) Layout(objects []fyne.CanvasObject, size fyne.Size) {
	y := float32(0)
	for _, o := range objects {
		o.Resize(fyne.NewSize(size.Width, o.MinSize().Height))
		h := o.MinSize().Height
		o.Resize(fyne.NewSize(size.Width, h))
		o.Move(fyne.NewPos(0, y))
		y += h + columnGap()
	}
}

func columnGap() float32 { return look.Px(4) }

// scrolled is a column that scrolls.
type scrolled struct {
	box    *fyne.Container
	scroll *container.Scroll
}

func newScrolled() *scrolled {
	s := &scrolled{box: container.New(column{})}
	s.scroll = container.NewVScroll(s.box)
	return s
}

// set shows other objects from the top.
func (s *scrolled) set(objects ...fyne.CanvasObject) {
	s.box.Objects = objects
	s.box.Refresh()
	s.scroll.Refresh() // wraps the texts
	s.scroll.Refresh() // and learns how high they are
}

// spacer is empty room of a width given at text scale 1.
func spacer(width float32) fyne.CanvasObject {
	r := canvas.NewRectangle(color.Transparent)
	r.SetMinSize(fyne.NewSize(look.Px(width), 0))
	return r
}

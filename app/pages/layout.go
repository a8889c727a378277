package pages

import (
	"image/color"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/container"

	"anodewright/app/look"
)

// beside lays out two objects side by side: the second as wide as given at
// text scale 1, or a little wider in a wide window, the first with the rest.
type beside struct{ width float32 }

func (b beside) MinSize(objects []fyne.CanvasObject) fyne.Size {
	first, second := objects[0].MinSize(), objects[1].MinSize()
	return fyne.NewSize(first.Width+gap()+min(look.Px(b.width), second.Width), max(first.Height, second.Height))
}

func (b beside) Layout(objects []fyne.CanvasObject, size fyne.Size) {
	w := min(max(look.Px(b.width), size.Width*0.24), size.Width*0.45)
	objects[0].Move(fyne.NewPos(0, 0))
	objects[0].Resize(fyne.NewSize(size.Width-w-gap(), size.Height))
	objects[1].Move(fyne.NewPos(size.Width-w, 0))
	objects[1].Resize(fyne.NewSize(w, size.Height))
}

// above lays out two objects one above the other: the second as high as given
// at text scale 1, or a little higher in a high window, but no more than a
// share of the whole; the first with the rest.
type above struct {
	height float32
	most   float32
}

func (a above) MinSize(objects []fyne.CanvasObject) fyne.Size {
	first, second := objects[0].MinSize(), objects[1].MinSize()
	// Both scroll, so that they manage with less than they ask for; a window
	// must not grow over the screen's edge.
	return fyne.NewSize(max(first.Width, second.Width), min(first.Height+gap()+second.Height, look.Px(300)))
}

func (a above) Layout(objects []fyne.CanvasObject, size fyne.Size) {
	// Large text needs more of a small window below, too.
	most := min(a.most+0.16*max(look.Scale()-1, 0), max(0.5, a.most))
	h := min(max(look.Px(a.height), size.Height*0.3), size.Height*most)
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

func gap() float32 { return look.Air(10) }

// column lays out objects one below the other, each as high as it needs to be
// at the width there is: texts that wrap know that only once they have it. At
// the right it leaves room for a scroll bar.
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
	y, width := float32(0), max(size.Width-look.Px(10), 0)
	for _, o := range objects {
		o.Resize(fyne.NewSize(width, o.MinSize().Height))
		h := o.MinSize().Height
		o.Resize(fyne.NewSize(width, h))
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

// set shows other objects, where it is scrolled to.
func (s *scrolled) set(objects ...fyne.CanvasObject) {
	s.box.Objects = objects
	s.box.Refresh()
	s.scroll.Refresh() // wraps the texts
	s.scroll.Refresh() // and learns how high they are
}

// headed lays out the asset's name, what comes next, what belongs to the right
// of them, the picture with the dates, the tabs, and the page below, or beside
// a tall picture. What comes
// next takes a line of its own where it does not fit between the name and the
// right.
type headed struct{ band *band }

func (headed) MinSize(objects []fyne.CanvasObject) fyne.Size {
	var size fyne.Size
	for _, o := range objects {
		if !o.Visible() {
			continue
		}
		m := o.MinSize()
		size.Width = max(size.Width, m.Width)
		size.Height += m.Height
	}
	size.Width = max(objects[2].MinSize().Width+look.Px(120), objects[3].MinSize().Width, objects[4].MinSize().Width)
	return size
}

func (l headed) Layout(objects []fyne.CanvasObject, size fyne.Size) {
	place := func(i int, x, y, width, height float32) {
		objects[i].Move(fyne.NewPos(x, y))
		objects[i].Resize(fyne.NewSize(width, height))
	}
	name, next, right, tabs := objects[0].MinSize(), objects[1].MinSize(), objects[2].MinSize(), objects[3].MinSize()
	y := max(name.Height, right.Height)
	place(2, size.Width-right.Width, 0, right.Width, y)
	left := float32(0)
	if show := objects[6]; show.Visible() {
		m := show.MinSize()
		place(6, 0, (y-m.Height)/2, m.Width, m.Height)
		left = m.Width + gap()
	}
	free := size.Width - right.Width - gap() - left
	if name.Width+2*gap()+next.Width <= free {
		place(0, left, 0, name.Width, y)
		place(1, left+name.Width+2*gap(), 0, next.Width, y)
	} else {
		place(0, left, 0, free, y)
		place(1, 0, y, size.Width, next.Height)
		y += next.Height
	}
	y += gap() / 2
	x := float32(0)
	if b := l.band; objects[5].Visible() {
		h := b.heightIn(size)
		place(5, 0, y, size.Width, h)
		b.write()
		at, high := b.pictureRoom()
		above := y + at
		y += h + gap()/2
		switch {
		case b.beside > 0:
			place(7, 0, y, b.beside, max(size.Height-y, 0))
			x = b.beside + gap()
		case b.open:
			place(7, look.Px(10), above, size.Width-2*look.Px(10), high)
		}
		if b.open {
			b.side.Show()
			b.view.Show()
		} else {
			b.side.Hide()
			b.view.Hide()
		}
	}
	place(3, x, y, size.Width-x, tabs.Height)
	y += tabs.Height + gap()/2
	place(4, x, y, size.Width-x, max(size.Height-y, 0))
}

// spacer is empty room of a width given at text scale 1.
func spacer(width float32) fyne.CanvasObject { return empty(width, 0) }

// lift is empty room of a height given at text scale 1.
func lift(height float32) fyne.CanvasObject { return empty(0, height) }

func empty(width, height float32) fyne.CanvasObject {
	r := canvas.NewRectangle(color.Transparent)
	r.SetMinSize(fyne.NewSize(look.Px(width), look.Px(height)))
	return r
}

// atMost gives one object the width it asks for, or what there is.
type atMost struct{}

func (atMost) MinSize(objects []fyne.CanvasObject) fyne.Size {
	return fyne.NewSize(0, objects[0].MinSize().Height)
}

func (atMost) Layout(objects []fyne.CanvasObject, size fyne.Size) {
	least := objects[0].MinSize()
	objects[0].Resize(fyne.NewSize(min(least.Width, size.Width), least.Height))
}

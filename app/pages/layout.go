package pages

import (
	"fyne.io/fyne/v2"

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

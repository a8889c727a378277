package pages

import (
	"fyne.io/fyne/v2"

	"anodewright/app/look"
)

// floorPlaces lays out the sets, the quay and the fields of the docking: the
// last two one above the other at the right, or, on a narrow page that is high
// enough, side by side below.
type floorPlaces struct{}

func (floorPlaces) MinSize(o []fyne.CanvasObject) fyne.Size {
	// All of them scroll.
	first, second := o[0].MinSize(), o[1].MinSize()
	return fyne.NewSize(first.Width+gap()+second.Width, min(first.Height, look.Px(300)))
}

func (floorPlaces) Layout(o []fyne.CanvasObject, size fyne.Size) {
	put := func(i int, x, y, w, h float32) {
		o[i].Move(fyne.NewPos(x, y))
		o[i].Resize(fyne.NewSize(w, h))
	}
	if size.Width < look.Px(880) && size.Height > look.Px(520) {
		below := max(look.Px(190), size.Height*0.32)
		y, half := size.Height-below, (size.Width-gap())/2
		put(0, 0, 0, size.Width, y-gap())
		put(1, 0, y, half, below)
		put(2, half+gap(), y, half, below)
		return
	}
	w := max(look.Px(246), size.Width*0.24)
	x, lower := size.Width-w, min(max(look.Px(230), size.Height*0.4), size.Height*0.58)
	put(0, 0, 0, x-gap(), size.Height)
	put(1, x, 0, w, size.Height-lower-gap())
	put(2, x, size.Height-lower, w, lower)
}

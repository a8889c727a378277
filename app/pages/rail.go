package pages

import (
	"fyne.io/fyne/v2"

	"anodewright/app/look"
	"anodewright/app/say"
)

// rail lays out the fleet at the left and the rest beside it. The fleet folds
// away by a key, and by itself where large text leaves the pages too little
// room; then a word beside the asset's name brings it back.
type rail struct {
	f      *Frame
	show   *linkText // beside the asset's name
	hide   *linkText // above the list
	choice string    // "open", "folded", or "" for as there is room
	open   bool
}

const (
	railWidth = 222
	roomyFrom = 980 // the width of a window, at text scale 1, from which the list is open by itself
)

func newRail(f *Frame) *rail {
	r := &rail{f: f, open: true}
	r.show, r.hide = newLinkText(r.toggle), newLinkText(r.toggle)
	r.show.Hide()
	return r
}

func (r *rail) isOpen() bool { return r.open }

// toggle folds the list or opens it, and keeps the choice.
func (r *rail) toggle() {
	r.choice = "open"
	if r.open {
		r.choice = "folded"
	}
	r.f.s.SetSetting("fleet list", r.choice)
	r.f.win.Content().Refresh()
	r.f.Update()
}

// MinSize implements fyne.Layout.
func (r *rail) MinSize(objects []fyne.CanvasObject) fyne.Size {
	m := objects[1].MinSize()
	if r.open {
		m.Width += look.Px(railWidth)
	}
	return m
}

// Layout implements fyne.Layout.
func (r *rail) Layout(objects []fyne.CanvasObject, size fyne.Size) {
	r.open = r.choice == "open" || r.choice == "" && size.Width >= look.Px(roomyFrom)
	r.show.set(say.T("Fleet ▸"))
	r.hide.set(say.T("Hide ◂"))
	w := float32(0)
	if r.open {
		w = min(look.Px(railWidth), size.Width*0.235)
		objects[0].Show()
		r.show.Hide()
	} else {
		objects[0].Hide()
		r.show.Show()
	}
	objects[0].Move(fyne.NewPos(0, 0))
	objects[0].Resize(fyne.NewSize(w, size.Height))
	objects[1].Move(fyne.NewPos(w, 0))
	objects[1].Resize(fyne.NewSize(size.Width-w, size.Height))
}

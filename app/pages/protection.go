package pages

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"anodewright/anodes/protection"
	"anodewright/app/look"
	"anodewright/app/say"
)

// protected shows, to the right of another part of the page, what holds or
// burdens a zone beside anodes in water, in words: nothing where nothing does.
type protected struct {
	words *scrolled
	all   *fyne.Container
	shown *protection.Result
}

func newProtected(beside fyne.CanvasObject) *protected {
	p := &protected{words: newScrolled()}
	p.words.scroll.Hide()
	p.all = container.New(withWords{400}, beside, p.words.scroll)
	return p
}

func (p *protected) content() fyne.CanvasObject { return p.all }

// show shows a result, or nothing.
func (p *protected) show(r *protection.Result) {
	if r == p.shown {
		return
	}
	p.shown = r
	if r == nil {
		p.words.scroll.Hide()
		p.all.Refresh()
		return
	}
	lines := []fyne.CanvasObject{look.Strong(capitalised(say.Sentence(r.Heading())))}
	for _, sentence := range r.Words() {
		lines = append(lines, look.Note(say.Sentence(sentence)))
	}
	p.words.scroll.Show()
	p.all.Refresh()
	p.words.set(lines...)
	p.words.scroll.ScrollToTop()
}

// withWords lays out two objects side by side, the second as wide as given at
// text scale 1 and at most two fifths; a hidden one leaves its room.
type withWords struct{ width float32 }

func (l withWords) MinSize(objects []fyne.CanvasObject) fyne.Size {
	first := objects[0].MinSize()
	if objects[1].Visible() {
		first.Height = max(first.Height, objects[1].MinSize().Height)
	}
	return first
}

func (l withWords) Layout(objects []fyne.CanvasObject, size fyne.Size) {
	objects[0].Move(fyne.NewPos(0, 0))
	if !objects[1].Visible() {
		objects[0].Resize(size)
		return
	}
	w := min(look.Px(l.width), size.Width*0.4)
	objects[0].Resize(fyne.NewSize(size.Width-w-gap(), size.Height))
	objects[1].Move(fyne.NewPos(size.Width-w, 0))
	objects[1].Resize(fyne.NewSize(w, size.Height))
}

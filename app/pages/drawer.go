package pages

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/theme"

	"anodewright/app/look"
	"anodewright/app/say"
)

// drawer is the lower part of a page: a card below the page's table that folds
// to one line, so that the table keeps the rows it needs. It is open by itself
// where the window has room for both.
type drawer struct {
	f    *Frame
	name string // of the setting that keeps the choice

	upper  fyne.CanvasObject
	card   *look.CardBox  // the lower part
	height float32        // of the card at text scale 1
	needed func() float32 // the height that the upper part needs

	texts []string // for the line
	line  *look.Text
	show  *linkText // in the line
	hide  *linkText // in the card
	panel *canvas.Rectangle
	strip *fyne.Container
	all   *fyne.Container

	choice string // "open", "folded", or "" for as there is room
	open   bool
}

// newDrawer puts a card below the upper part of a page.
func newDrawer(f *Frame, name string, upper fyne.CanvasObject, card *look.CardBox, height float32, needed func() float32) *drawer {
	d := &drawer{f: f, name: "lower part of " + name, upper: upper, card: card, height: height, needed: needed}
	d.line = look.Plain("")
	d.line.Shrink = true
	d.show, d.hide = newLinkText(d.toggle), newLinkText(d.toggle)
	card.SetCorner(d.hide)
	d.panel = canvas.NewRectangle(nil)
	panel := &themed{object: d.panel, do: d.paint}
	panel.ExtendBaseWidget(panel)
	d.strip = container.New(foldedLine{d}, panel, d.line, d.show)
	d.choice = f.s.Setting(d.name)
	d.all = container.New(d, upper, card, d.strip)
	d.paint()
	return d
}

func (d *drawer) paint() {
	d.panel.FillColor, d.panel.StrokeColor = look.Color(look.ColorSurface), look.Color(look.ColorLine)
	d.panel.StrokeWidth, d.panel.CornerRadius = 1, 8
}

// say sets what is read while the card is folded, from the most to the least:
// the line takes the first that fits. The card folds or opens as the upper
// part now needs it.
func (d *drawer) say(texts ...string) {
	d.texts = texts
	if size := d.all.Size(); !size.IsZero() {
		d.Layout(nil, size)
	}
}

// write fills the line.
func (d *drawer) write(width float32) {
	text := ""
	for _, text = range d.texts {
		if fyne.MeasureText(text, theme.Size(theme.SizeNameText), fyne.TextStyle{}).Width <= width {
			break
		}
	}
	d.line.SetText(text)
}

// toggle folds the lower part or opens it, and keeps the choice.
func (d *drawer) toggle() {
	d.choice = "open"
	if d.open {
		d.choice = "folded"
	}
	d.f.s.SetSetting(d.name, d.choice)
	d.f.Update()
	d.all.Refresh()
}

// leastRows is how many zones are to be seen before what is below them opens by
// itself.
func leastRows() int {
	if look.Scale() > 1.2 {
		return 8
	}
	return 12
}

// MinSize implements fyne.Layout. Both parts scroll, so that they manage with
// less than they ask for; a window must not grow over the screen's edge.
func (d *drawer) MinSize([]fyne.CanvasObject) fyne.Size {
	first, second := d.upper.MinSize(), d.card.MinSize()
	return fyne.NewSize(max(first.Width, second.Width), min(first.Height+gap()+d.lineHeight(), look.Px(300)))
}

func (d *drawer) lineHeight() float32 { return d.line.MinSize().Height + look.Px(8) }

// Layout implements fyne.Layout.
func (d *drawer) Layout(_ []fyne.CanvasObject, size fyne.Size) {
	want := max(look.Px(d.height), size.Height*0.3)
	spare := size.Height - gap() - d.needed()
	d.open = d.choice == "open" || d.choice == "" && spare >= look.Px(d.height)
	below := d.lineHeight()
	switch {
	case d.open && d.choice == "open":
		below = max(min(want, size.Height*0.5), min(spare, want))
	case d.open:
		below = min(want, spare)
	}
	put := func(o fyne.CanvasObject, y, h float32) {
		o.Move(fyne.NewPos(0, y))
		o.Resize(fyne.NewSize(size.Width, max(h, 0)))
	}
	if d.open {
		d.card.Show()
		d.strip.Hide()
	} else {
		d.card.Hide()
		d.strip.Show()
	}
	d.show.set(say.T("Show ▴"))
	d.hide.set(say.T("Hide ▾"))
	put(d.upper, 0, size.Height-below-gap())
	put(d.card, size.Height-below, below)
	put(d.strip, size.Height-below, below)
	d.strip.Layout.Layout(d.strip.Objects, d.strip.Size()) // the texts may be new
}

// foldedLine lays out the line of a folded drawer.
type foldedLine struct{ d *drawer }

func (l foldedLine) MinSize([]fyne.CanvasObject) fyne.Size {
	return fyne.NewSize(look.Px(200), l.d.lineHeight())
}

func (l foldedLine) Layout(objects []fyne.CanvasObject, size fyne.Size) {
	objects[0].Resize(size)
	pad, fold := look.Px(12), l.d.show.MinSize()
	room := max(size.Width-2*pad-fold.Width-gap(), 0)
	l.d.write(room)
	l.d.line.Move(fyne.NewPos(pad, 0))
	l.d.line.Resize(fyne.NewSize(room, size.Height))
	l.d.show.Move(fyne.NewPos(size.Width-pad-fold.Width, (size.Height-fold.Height)/2))
	l.d.show.Resize(fold)
}

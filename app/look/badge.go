package look

import (
	"image"
	"math"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"

	"anodewright/app/say"
)

// Badge is a state's chip: its colour, its hatch, its word and, if known, its
// cause, so that nobody needs the colour to read it.
type Badge struct {
	widget.BaseWidget
	word, cause string
	says        string // whole; the text shows as much as there is room for

	pill *canvas.Raster
	text *canvas.Text
}

// StateBadge returns the chip of a state: word is "sound", "thin", "short" or
// "spent", cause says why, as "mass" or "final current", and may be empty.
func StateBadge(word, cause string) *Badge {
	b := &Badge{word: word, cause: cause}
	b.pill = canvas.NewRaster(func(w, h int) image.Image {
		unit := 1.0
		if s := b.Size(); s.Width > 0 {
			unit = float64(w) / float64(s.Width)
		}
		return statePill(b.word, w, h, unit*float64(Scale()))
	})
	b.text = canvas.NewText("", Color(ColorInk))
	b.text.TextStyle.Bold = true
	b.text.Alignment = fyne.TextAlignCenter
	b.ExtendBaseWidget(b)
	b.update()
	return b
}

// Set changes what the chip says.
func (b *Badge) Set(word, cause string) {
	if b.word == word && b.cause == cause {
		return
	}
	b.word, b.cause = word, cause
	b.Refresh()
}

// Word returns the state's word.
func (b *Badge) Word() string { return b.word }

func (b *Badge) update() {
	b.says = say.T(b.word)
	if b.cause != "" {
		b.says += " · " + b.cause
	}
	_, _, b.text.Color = StateColors(b.word)
	b.text.TextSize = current().Size(theme.SizeNameCaptionText)
}

// CreateRenderer implements fyne.Widget.
func (b *Badge) CreateRenderer() fyne.WidgetRenderer { return &badgeRenderer{b} }

type badgeRenderer struct{ b *Badge }

func (r *badgeRenderer) Destroy() {}

func (r *badgeRenderer) Objects() []fyne.CanvasObject {
	return []fyne.CanvasObject{r.b.pill, r.b.text}
}

func (r *badgeRenderer) MinSize() fyne.Size {
	t := r.b.text
	s := fyne.MeasureText(r.b.says, t.TextSize, t.TextStyle)
	return fyne.NewSize(s.Width+Px(16), s.Height+Px(3))
}

func (r *badgeRenderer) Layout(size fyne.Size) {
	// the pill keeps its height in a taller row
	pill := min(size.Height, r.MinSize().Height)
	r.b.pill.Resize(fyne.NewSize(size.Width, pill))
	r.b.pill.Move(fyne.NewPos(0, (size.Height-pill)/2))
	t := r.b.text
	t.Text = r.b.says
	if size.Width < r.MinSize().Width {
		t.Text = Ellipsis(r.b.says, size.Width-Px(16), t.TextSize, t.TextStyle)
	}
	h := t.MinSize().Height
	r.b.text.Resize(fyne.NewSize(size.Width, h))
	r.b.text.Move(fyne.NewPos(0, float32(math.Round(float64(size.Height-h)/2))))
}

func (r *badgeRenderer) Refresh() {
	r.b.update()
	r.Layout(r.b.Size())
	canvas.Refresh(r.b)
}

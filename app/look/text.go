package look

import (
	"math"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"
)

// Text is one line of text in a named colour and size. It follows the theme
// and ends in an ellipsis where it is given too little room.
type Text struct {
	widget.BaseWidget
	full  string
	color fyne.ThemeColorName
	size  fyne.ThemeSizeName
	bold  bool
	align fyne.TextAlign
	// Shrink lets a layout make the text narrower than it is.
	Shrink bool

	text *canvas.Text
}

// NewText returns a line of text.
func NewText(s string, c fyne.ThemeColorName, size fyne.ThemeSizeName, bold bool) *Text {
	t := &Text{full: s, color: c, size: size, bold: bold, text: canvas.NewText("", nil)}
	t.ExtendBaseWidget(t)
	return t
}

// Title is the one big heading of a page.
func Title(s string) *Text { return NewText(s, ColorInk, theme.SizeNameHeadingText, true) }

// Heading heads a card or a part of a page.
func Heading(s string) *Text { return NewText(s, ColorInk, theme.SizeNameSubHeadingText, true) }

// Plain is ordinary text on one line.
func Plain(s string) *Text { return NewText(s, ColorInk, theme.SizeNameText, false) }

// Strong is bold text on one line.
func Strong(s string) *Text { return NewText(s, ColorInk, theme.SizeNameText, true) }

// Muted is second text, smaller and muted, on one line.
func Muted(s string) *Text { return NewText(s, ColorMuted, theme.SizeNameCaptionText, false) }

// Accented is bold text in the accent colour, for the one figure that matters.
func Accented(s string) *Text { return NewText(s, ColorAccent, theme.SizeNameText, true) }

// Right aligns the text to the right and returns it.
func (t *Text) Right() *Text {
	t.align = fyne.TextAlignTrailing
	return t
}

// SetText changes the text.
func (t *Text) SetText(s string) {
	if s != t.full {
		t.full = s
		t.Refresh()
	}
}

// SetColor changes the colour's name.
func (t *Text) SetColor(c fyne.ThemeColorName) {
	if c != t.color {
		t.color = c
		t.Refresh()
	}
}

// String returns the whole text.
func (t *Text) String() string { return t.full }

// CreateRenderer implements fyne.Widget.
func (t *Text) CreateRenderer() fyne.WidgetRenderer {
	r := &textRenderer{t}
	r.update()
	return r
}

type textRenderer struct{ t *Text }

func (r *textRenderer) Destroy() {}

func (r *textRenderer) Objects() []fyne.CanvasObject { return []fyne.CanvasObject{r.t.text} }

func (r *textRenderer) update() {
	c := r.t.text
	c.Color = Color(r.t.color)
	c.TextSize = current().Size(r.t.size)
	c.TextStyle = fyne.TextStyle{Bold: r.t.bold}
	c.Alignment = r.t.align
}

func (r *textRenderer) MinSize() fyne.Size {
	c := r.t.text
	s := fyne.MeasureText(r.t.full, c.TextSize, c.TextStyle)
	if r.t.Shrink {
		s.Width = Px(24)
	}
	return s
}

func (r *textRenderer) Layout(size fyne.Size) {
	c := r.t.text
	// half a pixel of grace: layouts round
	c.Text = Ellipsis(r.t.full, size.Width+0.5, c.TextSize, c.TextStyle)
	h := c.MinSize().Height
	c.Resize(fyne.NewSize(size.Width, h))
	c.Move(fyne.NewPos(0, float32(math.Round(float64(size.Height-h)/2))))
}

func (r *textRenderer) Refresh() {
	r.update()
	r.Layout(r.t.Size())
	canvas.Refresh(r.t)
}

// Ellipsis returns s, or as much of its beginning as fits into width with an
// ellipsis behind it.
func Ellipsis(s string, width, size float32, style fyne.TextStyle) string {
	if s == "" || fyne.MeasureText(s, size, style).Width <= width {
		return s
	}
	runes := []rune(s)
	lo, hi := 0, len(runes)-1 // the most runes that fit lie in lo..hi
	for lo < hi {
		mid := (lo + hi + 1) / 2
		if fyne.MeasureText(string(runes[:mid])+"…", size, style).Width <= width {
			lo = mid
		} else {
			hi = mid - 1
		}
	}
	for lo > 0 && runes[lo-1] == ' ' {
		lo--
	}
	return string(runes[:lo]) + "…"
}

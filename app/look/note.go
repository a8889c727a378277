package look

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"
)

// Paragraph is text that wraps to the width it is given. It has no margin of
// its own, so that it begins where headings and bars begin.
type Paragraph struct {
	widget.BaseWidget
	segment *widget.TextSegment
	rich    *widget.RichText
}

// Note returns a paragraph of second text, small and muted.
func Note(s string) *Paragraph { return newParagraph(s, ColorMuted, theme.SizeNameCaptionText, false) }

// Body returns a paragraph of ordinary text.
func Body(s string) *Paragraph { return newParagraph(s, ColorInk, theme.SizeNameText, false) }

// Lead returns a paragraph of bold text.
func Lead(s string) *Paragraph { return newParagraph(s, ColorInk, theme.SizeNameText, true) }

// Wrong returns a paragraph that says what is wrong.
func Wrong(s string) *Paragraph { return newParagraph(s, ColorFault, theme.SizeNameText, false) }

func newParagraph(s string, c fyne.ThemeColorName, size fyne.ThemeSizeName, bold bool) *Paragraph {
	p := &Paragraph{segment: &widget.TextSegment{Text: s}}
	p.segment.Style = widget.RichTextStyle{ColorName: c, SizeName: size, TextStyle: fyne.TextStyle{Bold: bold}}
	p.rich = widget.NewRichText(p.segment)
	p.rich.Wrapping = fyne.TextWrapWord
	p.rich.Scroll = fyne.ScrollNone // else it asks for no height and scrolls inside itself
	p.ExtendBaseWidget(p)
	return p
}

// SetText changes the text.
func (p *Paragraph) SetText(s string) {
	if s != p.segment.Text {
		p.segment.Text = s
		p.Refresh()
	}
}

// Text returns the text.
func (p *Paragraph) Text() string { return p.segment.Text }

// CreateRenderer implements fyne.Widget.
func (p *Paragraph) CreateRenderer() fyne.WidgetRenderer { return &paragraphRenderer{p} }

// paragraphRenderer lets the rich text's own margin lie outside.
type paragraphRenderer struct{ p *Paragraph }

func (r *paragraphRenderer) Destroy() {}

func (r *paragraphRenderer) Objects() []fyne.CanvasObject { return []fyne.CanvasObject{r.p.rich} }

func margin() float32 { return theme.Size(theme.SizeNameInnerPadding) }

func (r *paragraphRenderer) MinSize() fyne.Size {
	if r.p.segment.Text == "" {
		return fyne.Size{}
	}
	return r.p.rich.MinSize().SubtractWidthHeight(2*margin(), 2*margin()).Max(fyne.Size{})
}

func (r *paragraphRenderer) Layout(size fyne.Size) {
	r.p.rich.Move(fyne.NewPos(-margin(), -margin()))
	r.p.rich.Resize(size.AddWidthHeight(2*margin(), 2*margin()))
}

func (r *paragraphRenderer) Refresh() {
	r.p.rich.Refresh()
	r.Layout(r.p.Size())
}

package look

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"
)

// Paragraph is text that wraps to the width it is given.
type Paragraph struct {
	widget.RichText
	segment *widget.TextSegment
}

// Note returns a paragraph of second text, small and muted.
func Note(s string) *Paragraph { return newParagraph(s, ColorMuted, theme.SizeNameCaptionText) }

// Body returns a paragraph of ordinary text.
func Body(s string) *Paragraph { return newParagraph(s, ColorInk, theme.SizeNameText) }

// Wrong returns a paragraph that says what is wrong.
func Wrong(s string) *Paragraph { return newParagraph(s, ColorFault, theme.SizeNameText) }

func newParagraph(s string, c fyne.ThemeColorName, size fyne.ThemeSizeName) *Paragraph {
	p := &Paragraph{segment: &widget.TextSegment{Text: s}}
	p.segment.Style = widget.RichTextStyle{ColorName: c, SizeName: size}
	p.Segments = []widget.RichTextSegment{p.segment}
	p.Wrapping = fyne.TextWrapWord
	p.Scroll = fyne.ScrollNone // else it asks for no height and scrolls inside itself
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

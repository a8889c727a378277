// Package look is how the program looks: its theme (warm paper, dark ink, one
// accent, colours for states only), the typeface it ships, the text scale, and
// the few pieces all pages share: cards, headings, state badges, buttons.
//
// Sizes are Fyne's device-independent pixels. It knows nothing of the domain.
package look

import (
	"image/color"
	"math"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/theme"
)

// Mode says which of the two palettes is used.
type Mode int

// The modes: System follows the desktop's own light or dark setting.
const (
	System Mode = iota
	Light
	Dark
)

// Theme is the program's Fyne theme. It is immutable: to change mode or scale,
// set a new one with [Apply].
type Theme struct {
	mode  Mode
	scale float32
}

// New returns a theme of the given mode whose sizes are multiplied by scale
// (1, 1.25 and 1.5 are offered to users). A scale outside 0.5 to 3 becomes 1.
func New(mode Mode, scale float32) *Theme {
	if scale < 0.5 || scale > 3 {
		scale = 1
	}
	return &Theme{mode: mode, scale: scale}
}

// Apply sets the theme on the running program. Call it first from the
// lifecycle's started callback: Fyne 2.7.1 does not follow later changes of
// the desktop's setting when a theme is set before Run.
func Apply(a fyne.App, mode Mode, scale float32) {
	a.Settings().SetTheme(New(mode, scale))
}

// current returns the program's theme, or a plain light one when another
// theme is set, as in some tests.
func current() *Theme {
	if app := fyne.CurrentApp(); app != nil {
		if t, ok := app.Settings().Theme().(*Theme); ok {
			return t
		}
	}
	return plain
}

var plain = New(Light, 1)

// Scale returns the text scale in force.
func Scale() float32 { return current().scale }

// Air returns a margin given for scale 1. It grows by half of what text does:
// large text needs the room for itself.
func Air(v float32) float32 { return v * current().eased() }

func (t *Theme) eased() float32 { return (1 + t.scale) / 2 }

// Px returns a length given for scale 1 at the scale in force.
func Px(v float32) float32 { return v * Scale() }

// Color returns one of the program's colours, or any Fyne theme colour, in the
// variant in force.
func Color(name fyne.ThemeColorName) color.NRGBA {
	var v fyne.ThemeVariant = theme.VariantLight
	if app := fyne.CurrentApp(); app != nil {
		v = app.Settings().ThemeVariant()
	}
	return color.NRGBAModel.Convert(current().Color(name, v)).(color.NRGBA)
}

// IsDark says whether the dark palette is in force.
func IsDark() bool {
	app := fyne.CurrentApp()
	return app != nil && current().dark(app.Settings().ThemeVariant())
}

func (t *Theme) dark(v fyne.ThemeVariant) bool {
	switch t.mode {
	case Light:
		return false
	case Dark:
		return true
	}
	return v == theme.VariantDark
}

// Color implements fyne.Theme.
func (t *Theme) Color(name fyne.ThemeColorName, v fyne.ThemeVariant) color.Color {
	p := lightPalette
	if t.dark(v) {
		p = darkPalette
	}
	if c, ok := p[name]; ok {
		return c
	}
	if c, ok := fyneColor(p, name); ok {
		return c
	}
	if t.dark(v) {
		return theme.DefaultTheme().Color(name, theme.VariantDark)
	}
	return theme.DefaultTheme().Color(name, theme.VariantLight)
}

// fyneColor maps Fyne's own colour names to the palette.
func fyneColor(p palette, name fyne.ThemeColorName) (color.NRGBA, bool) {
	veil := func(n fyne.ThemeColorName, alpha uint8) color.NRGBA {
		c := p[n]
		c.A = alpha
		return c
	}
	switch name {
	case theme.ColorNameBackground:
		return p[ColorPaper], true
	case theme.ColorNameForeground:
		return p[ColorInk], true
	case theme.ColorNamePlaceHolder:
		return p[ColorMuted], true
	case theme.ColorNameDisabled:
		return veil(ColorInk, 0x78), true
	case theme.ColorNamePrimary, theme.ColorNameHyperlink:
		return p[ColorAccent], true
	case theme.ColorNameForegroundOnPrimary:
		return p[ColorOnAccent], true
	case theme.ColorNameButton, theme.ColorNameDisabledButton:
		return p[ColorTrack], true
	case theme.ColorNameInputBackground, theme.ColorNameMenuBackground,
		theme.ColorNameOverlayBackground, theme.ColorNameHeaderBackground:
		return p[ColorSurface], true
	case theme.ColorNameInputBorder:
		return p[ColorEdge], true
	case theme.ColorNameSeparator:
		return p[ColorLine], true
	case theme.ColorNameHover:
		return veil(ColorInk, 0x0f), true
	case theme.ColorNamePressed:
		return veil(ColorInk, 0x24), true
	case theme.ColorNameFocus:
		return veil(ColorAccent, 0x3c), true
	case theme.ColorNameSelection:
		return veil(ColorAccent, 0x38), true
	case theme.ColorNameScrollBar:
		return veil(ColorInk, 0x70), true
	case theme.ColorNameScrollBarBackground:
		return p[ColorTrack], true
	case theme.ColorNameShadow:
		// Behind dialogs; Fyne also writes the menus' shortcuts in it.
		if p[ColorPaper] == darkPalette[ColorPaper] {
			return color.NRGBA{A: 0x80}, true
		}
		return veil(ColorInk, 0x66), true
	case theme.ColorNameError:
		return p[ColorFault], true
	case theme.ColorNameForegroundOnError:
		return p[ColorOnFault], true
	case theme.ColorNameSuccess:
		return p[ColorSound], true
	case theme.ColorNameForegroundOnSuccess:
		return p[ColorOnSound], true
	case theme.ColorNameWarning:
		return p[ColorThin], true
	case theme.ColorNameForegroundOnWarning:
		return p[ColorOnThin], true
	}
	return color.NRGBA{}, false
}

// Sizes of text at scale 1, in pixels; none is below 11.
const (
	textSize       = 13
	captionSize    = 11
	headingSize    = 20
	subHeadingSize = 15
)

// TextSize returns the size in force for text of the given size at scale 1. It
// is a whole number of pixels: Fyne spaces letters as for whole sizes only.
func TextSize(v float32) float32 { return current().textSize(v) }

func (t *Theme) textSize(v float32) float32 {
	return float32(math.Round(float64(v * t.scale)))
}

// Size implements fyne.Theme.
func (t *Theme) Size(name fyne.ThemeSizeName) float32 {
	switch name {
	case theme.SizeNameText:
		return t.textSize(textSize)
	case theme.SizeNameCaptionText:
		return t.textSize(captionSize)
	case theme.SizeNameHeadingText:
		return t.textSize(headingSize)
	case theme.SizeNameSubHeadingText:
		return t.textSize(subHeadingSize)
	case theme.SizeNameInnerPadding:
		return 7 * t.eased()
	case theme.SizeNameInlineIcon:
		return 18 * t.scale
	case theme.SizeNameInputRadius:
		return 6
	case theme.SizeNameSelectionRadius:
		return 4
	case theme.SizeNameSeparatorThickness:
		return 1
	case theme.SizeNameInputBorder:
		return 1
	}
	return theme.DefaultTheme().Size(name) * t.scale
}

// Icon implements fyne.Theme.
func (t *Theme) Icon(name fyne.ThemeIconName) fyne.Resource {
	return theme.DefaultTheme().Icon(name)
}

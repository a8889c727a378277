package look_test

import (
	"fmt"
	"image/color"
	"math"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/test"
	"fyne.io/fyne/v2/theme"

	"anodewright/app/look"
)

// luminance is the relative luminance of WCAG 2.1.
func luminance(c color.NRGBA) float64 {
	part := func(v uint8) float64 {
		s := float64(v) / 255
		if s <= 0.04045 {
			return s / 12.92
		}
		return math.Pow((s+0.055)/1.055, 2.4)
	}
	return 0.2126*part(c.R) + 0.7152*part(c.G) + 0.0722*part(c.B)
}

// contrast is the contrast ratio of WCAG 2.1, from 1 to 21.
func contrast(a, b color.NRGBA) float64 {
	x, y := luminance(a), luminance(b)
	if x < y {
		x, y = y, x
	}
	return (x + 0.05) / (y + 0.05)
}

// over lays a colour that may be see-through over an opaque one.
func over(top, below color.NRGBA) color.NRGBA {
	a := float64(top.A) / 255
	mix := func(t, b uint8) uint8 { return uint8(math.Round(float64(t)*a + float64(b)*(1-a))) }
	return color.NRGBA{R: mix(top.R, below.R), G: mix(top.G, below.G), B: mix(top.B, below.B), A: 0xff}
}

func get(t *look.Theme, n fyne.ThemeColorName) color.NRGBA {
	return color.NRGBAModel.Convert(t.Color(n, theme.VariantLight)).(color.NRGBA)
}

var modes = map[string]look.Mode{"light": look.Light, "dark": look.Dark}

func TestTextHasContrast(t *testing.T) {
	const want = 4.5 // WCAG 2.1, success criterion 1.4.3, ordinary text
	papers := []fyne.ThemeColorName{look.ColorPaper, look.ColorRail, look.ColorSurface, look.ColorRowTint, look.ColorAccentPale}
	pairs := map[fyne.ThemeColorName][]fyne.ThemeColorName{
		look.ColorInk:                      append([]fyne.ThemeColorName{look.ColorHull, look.ColorTrack, theme.ColorNameButton}, papers...),
		look.ColorMuted:                    papers,
		look.ColorAccent:                   papers,
		look.ColorFault:                    papers,
		look.ColorOnAccent:                 {look.ColorAccent},
		look.ColorOnFault:                  {look.ColorFault},
		look.ColorOnSound:                  {look.ColorSound},
		look.ColorOnThin:                   {look.ColorThin, look.ColorThinHatch},
		look.ColorOnShort:                  {look.ColorShort, look.ColorShortHatch},
		look.ColorOnSpent:                  {look.ColorSpent},
		theme.ColorNameForeground:          {theme.ColorNameBackground, theme.ColorNameInputBackground, theme.ColorNameMenuBackground, theme.ColorNameOverlayBackground, theme.ColorNameHeaderBackground},
		theme.ColorNamePlaceHolder:         {theme.ColorNameBackground, theme.ColorNameInputBackground},
		theme.ColorNamePrimary:             {theme.ColorNameBackground, theme.ColorNameOverlayBackground},
		theme.ColorNameForegroundOnPrimary: {theme.ColorNamePrimary},
		theme.ColorNameForegroundOnError:   {theme.ColorNameError},
	}
	for name, mode := range modes {
		th := look.New(mode, 1)
		for text, grounds := range pairs {
			for _, ground := range grounds {
				if c := contrast(get(th, text), get(th, ground)); c < want {
					t.Errorf("%s: %s on %s has a contrast of %.2f, want %.1f", name, text, ground, c, want)
				}
			}
		}
		// Fyne lays these veils over buttons, menus and selected text
		for _, veil := range []fyne.ThemeColorName{theme.ColorNameHover, theme.ColorNameSelection, theme.ColorNameFocus} {
			for _, ground := range []fyne.ThemeColorName{theme.ColorNameButton, theme.ColorNameInputBackground} {
				g := over(get(th, veil), get(th, ground))
				if c := contrast(get(th, theme.ColorNameForeground), g); c < want {
					t.Errorf("%s: text on %s over %s has a contrast of %.2f, want %.1f", name, veil, ground, c, want)
				}
			}
		}
	}
}

func TestMarksCanBeTold(t *testing.T) {
	const want = 3 // WCAG 2.1, success criterion 1.4.11, parts of the interface
	for name, mode := range modes {
		th := look.New(mode, 1)
		for _, mark := range []fyne.ThemeColorName{look.ColorAccent, look.ColorFault, look.ColorMuted, look.ColorEdge} {
			if c := contrast(get(th, mark), get(th, look.ColorSurface)); c < want {
				t.Errorf("%s: %s on a card has a contrast of %.2f, want %d", name, mark, c, want)
			}
		}
	}
}

func TestModeChoosesPalette(t *testing.T) {
	light := look.New(look.Light, 1).Color(look.ColorPaper, theme.VariantDark)
	dark := look.New(look.Dark, 1).Color(look.ColorPaper, theme.VariantLight)
	if light == dark {
		t.Fatal("light and dark have the same paper")
	}
	system := look.New(look.System, 1)
	if got := system.Color(look.ColorPaper, theme.VariantLight); got != light {
		t.Errorf("system mode on a light desktop: paper %v, want %v", got, light)
	}
	if got := system.Color(look.ColorPaper, theme.VariantDark); got != dark {
		t.Errorf("system mode on a dark desktop: paper %v, want %v", got, dark)
	}
}

func TestEveryFyneNameIsKnown(t *testing.T) {
	for name, mode := range modes {
		th := look.New(mode, 1)
		for _, n := range []fyne.ThemeColorName{
			theme.ColorNameBackground, theme.ColorNameButton, theme.ColorNameDisabled, theme.ColorNameError,
			theme.ColorNameFocus, theme.ColorNameForeground, theme.ColorNameHover, theme.ColorNameInputBackground,
			theme.ColorNameInputBorder, theme.ColorNameMenuBackground, theme.ColorNameOverlayBackground,
			theme.ColorNamePlaceHolder, theme.ColorNamePressed, theme.ColorNamePrimary, theme.ColorNameScrollBar,
			theme.ColorNameSelection, theme.ColorNameSeparator, theme.ColorNameShadow, theme.ColorNameSuccess,
			theme.ColorNameWarning, theme.ColorNameHyperlink, theme.ColorNameHeaderBackground,
		} {
			if get(th, n).A == 0 {
				t.Errorf("%s: %s is wholly see-through", name, n)
			}
		}
	}
}

func TestScaleMultipliesSizes(t *testing.T) {
	one := look.New(look.Light, 1)
	for _, n := range []fyne.ThemeSizeName{theme.SizeNameText, theme.SizeNameCaptionText, theme.SizeNameSubHeadingText, theme.SizeNameHeadingText} {
		if one.Size(n) < 11 {
			t.Errorf("%s is %v at scale 1, want 11 or more", n, one.Size(n))
		}
		for _, s := range []float32{1.25, 1.5} {
			if got, want := float64(look.New(look.Light, s).Size(n)), math.Round(float64(one.Size(n)*s)); got != want {
				t.Errorf("%s at scale %v is %v, want %v", n, s, got, want)
			}
		}
	}
	test.NewTempApp(t).Settings().SetTheme(look.New(look.Light, 1.5))
	if got := look.Px(36); got != 54 {
		t.Errorf("36 pixels at scale 1.5 are %v, want 54", got)
	}
	if got := look.New(look.Light, 0).Size(theme.SizeNameText); got != one.Size(theme.SizeNameText) {
		t.Errorf("a scale of 0 gives text of %v", got)
	}
}

// Fyne draws a line on a baseline rounded up, into a picture whose height is
// rounded; what reaches below that is lost.
func TestDescendersAreWhole(t *testing.T) {
	const deep = 426.0 / 2048 // how far the font's g reaches below the baseline
	a := test.NewTempApp(t)
	for _, style := range []fyne.TextStyle{{}, {Bold: true}} {
		for i, v := range []float32{11, 11, 11, 13, 13, 13, 15, 15, 15, 20, 20, 20} {
			look.Apply(a, look.Light, []float32{1, 1.25, 1.5}[i%3])
			size := look.TextSize(v)
			box, baseline := a.Driver().RenderedTextSize("g", size, style, nil)
			room := math.Round(float64(box.Height)) - math.Ceil(float64(baseline))
			// a quarter of a pixel is not missed
			if room < float64(size)*deep-0.25 {
				t.Errorf("text of %v pixels (bold %v) has %v below the baseline, g needs %.1f", size, style.Bold, room, float64(size)*deep)
			}
		}
	}
}

func TestFontHasTheSigns(t *testing.T) {
	const signs = "≤≥≈≠→←↑↓✓✗▲▼▾●○√∑∫∞⚠⌀☐☑²³₂·×÷±°µΩ№αβγδερσ…–€£"
	if m := look.MissingRunes(signs); len(m) > 0 {
		t.Errorf("the font lacks %q", string(m))
	}
	if m := look.MissingRunes("a\n\tb水b水"); string(m) != "水" {
		t.Errorf("missing runes %q, want 水 once", string(m))
	}
}

func ExampleMissingRunes() {
	fmt.Println(len(look.MissingRunes("area ≥ 12 m² ⚠")))
	// Output: 0
}

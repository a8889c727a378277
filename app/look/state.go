package look

import (
	"image"
	"image/color"
	"math"

	"fyne.io/fyne/v2"
)

// States by their words, from best to worst.
const (
	StateSound = "sound"
	StateThin  = "thin"
	StateShort = "short"
	StateSpent = "spent"
)

// StateColors returns the fill, the hatch and the text colour of a state. A
// state without a hatch has its fill as hatch. An unknown word gives neutral
// colours.
func StateColors(word string) (fill, hatch, text color.NRGBA) {
	pick := func(f, h, t fyne.ThemeColorName) (color.NRGBA, color.NRGBA, color.NRGBA) {
		return Color(f), Color(h), Color(t)
	}
	switch word {
	case StateSound:
		return pick(ColorSound, ColorSound, ColorOnSound)
	case StateThin:
		return pick(ColorThin, ColorThinHatch, ColorOnThin)
	case StateShort:
		return pick(ColorShort, ColorShortHatch, ColorOnShort)
	case StateSpent:
		return pick(ColorSpent, ColorSpent, ColorOnSpent)
	}
	return pick(ColorTrack, ColorTrack, ColorInk)
}

// Hatched says whether the point x, y lies on a line of the state's hatch:
// none for sound and spent, single for thin, crossed for short. The point is in
// pixels, unit is how many of them one length unit has, so that hatches of
// badges, tables and drawings look alike at every scale.
func Hatched(word string, x, y, unit float64) bool {
	on := func(d, period, width float64) bool {
		d = math.Mod(d, period*unit)
		if d < 0 {
			d += period * unit
		}
		return d < width*unit
	}
	switch word {
	case StateThin:
		return on((x+y)/math.Sqrt2, 7, 1.8)
	case StateShort:
		return on((x+y)/math.Sqrt2, 7, 1.3) || on((x-y)/math.Sqrt2, 7, 1.3)
	}
	return false
}

// statePill draws a pill of w by h pixels with the state's fill and hatch.
func statePill(word string, w, h int, unit float64) image.Image {
	img := image.NewNRGBA(image.Rect(0, 0, w, h))
	fill, hatch, _ := StateColors(word)
	for y := range h {
		for x := range w {
			c := blend(fill, hatch, coverage(word, x, y, unit))
			c.A = uint8(255 * pillCover(x, y, w, h))
			img.SetNRGBA(x, y, c)
		}
	}
	return img
}

// coverage is how much of the pixel x, y the hatch covers, from 2 by 2 samples.
func coverage(word string, x, y int, unit float64) float64 {
	n := 0
	for _, d := range [...][2]float64{{0.25, 0.25}, {0.75, 0.25}, {0.25, 0.75}, {0.75, 0.75}} {
		if Hatched(word, float64(x)+d[0], float64(y)+d[1], unit) {
			n++
		}
	}
	return float64(n) / 4
}

// pillCover is how much of the pixel x, y lies within a shape of w by h pixels
// whose ends are half circles.
func pillCover(x, y, w, h int) float64 {
	r := float64(min(w, h)) / 2
	cx := math.Min(math.Max(float64(x)+0.5, r), float64(w)-r)
	cy := math.Min(math.Max(float64(y)+0.5, r), float64(h)-r)
	d := math.Hypot(float64(x)+0.5-cx, float64(y)+0.5-cy)
	return math.Min(math.Max(r-d+0.5, 0), 1)
}

func blend(a, b color.NRGBA, part float64) color.NRGBA {
	mix := func(x, y uint8) uint8 { return uint8(float64(x)*(1-part) + float64(y)*part + 0.5) }
	return color.NRGBA{R: mix(a.R, b.R), G: mix(a.G, b.G), B: mix(a.B, b.B), A: 0xff}
}

package look

import (
	"image/color"

	"fyne.io/fyne/v2"
)

// Names of the program's own colours. They are theme colours, so drawings and
// tables that use them agree and follow light and dark together.
const (
	ColorPaper      fyne.ThemeColorName = "look.paper"      // the window
	ColorRail       fyne.ThemeColorName = "look.rail"       // the side list
	ColorSurface    fyne.ThemeColorName = "look.surface"    // cards and tables
	ColorLine       fyne.ThemeColorName = "look.line"       // fine rules and borders
	ColorEdge       fyne.ThemeColorName = "look.edge"       // borders of fields
	ColorInk        fyne.ThemeColorName = "look.ink"        // text
	ColorMuted      fyne.ThemeColorName = "look.muted"      // second text
	ColorAccent     fyne.ThemeColorName = "look.accent"     // the one accent; also text
	ColorOnAccent   fyne.ThemeColorName = "look.onAccent"   // text on ColorAccent
	ColorAccentPale fyne.ThemeColorName = "look.accentPale" // an action's pale fill
	ColorRowTint    fyne.ThemeColorName = "look.rowTint"    // the chosen row
	ColorFault      fyne.ThemeColorName = "look.fault"      // what is wrong with an input; also text
	ColorOnFault    fyne.ThemeColorName = "look.onFault"    // text on ColorFault
	ColorTrack      fyne.ThemeColorName = "look.track"      // the empty part of a bar
	ColorHull       fyne.ThemeColorName = "look.hull"       // steel above water in drawings

	ColorSound      fyne.ThemeColorName = "look.sound"
	ColorOnSound    fyne.ThemeColorName = "look.onSound"
	ColorThin       fyne.ThemeColorName = "look.thin"
	ColorOnThin     fyne.ThemeColorName = "look.onThin"
	ColorThinHatch  fyne.ThemeColorName = "look.thinHatch"
	ColorShort      fyne.ThemeColorName = "look.short"
	ColorOnShort    fyne.ThemeColorName = "look.onShort"
	ColorShortHatch fyne.ThemeColorName = "look.shortHatch"
	ColorSpent      fyne.ThemeColorName = "look.spent"
	ColorOnSpent    fyne.ThemeColorName = "look.onSpent"
)

type palette map[fyne.ThemeColorName]color.NRGBA

// hex gives the opaque colour of a figure such as 0xf7f6f2.
func hex(v uint32) color.NRGBA {
	return color.NRGBA{R: uint8(v >> 16), G: uint8(v >> 8), B: uint8(v), A: 0xff}
}

// lightPalette is warm paper with dark ink. Text on the state colours is dark
// or light as the contrast asks; a hatch is always lighter under dark text and
// darker under light text, so that it never lowers the contrast.
var lightPalette = palette{
	ColorPaper: hex(0xf7f6f2), ColorRail: hex(0xf0eee7), ColorSurface: hex(0xffffff), ColorLine: hex(0xd9d6cc), ColorEdge: hex(0x8f9499),
	ColorInk: hex(0x1d2b3a), ColorMuted: hex(0x5a646f),
	ColorAccent: hex(0x0f5c73), ColorOnAccent: hex(0xffffff), ColorAccentPale: hex(0xe3eff1), ColorRowTint: hex(0xf3f7f7),
	ColorFault: hex(0xa4262c), ColorOnFault: hex(0xffffff), ColorTrack: hex(0xeeece5), ColorHull: hex(0xe9e6dd),
	ColorSound: hex(0x3d8f99), ColorOnSound: hex(0x03090c),
	ColorThin: hex(0xd9a02b), ColorOnThin: hex(0x1d2b3a), ColorThinHatch: hex(0xecd095),
	ColorShort: hex(0xb23a6b), ColorOnShort: hex(0xffffff), ColorShortHatch: hex(0x7a2448),
	ColorSpent: hex(0x55514c), ColorOnSpent: hex(0xffffff),
}

var darkPalette = palette{
	ColorPaper: hex(0x1a1b1c), ColorRail: hex(0x151617), ColorSurface: hex(0x232527), ColorLine: hex(0x43474b), ColorEdge: hex(0x7d8389),
	ColorInk: hex(0xece8df), ColorMuted: hex(0xadb1b5),
	ColorAccent: hex(0x6fc2d4), ColorOnAccent: hex(0x06222a), ColorAccentPale: hex(0x1f3c44), ColorRowTint: hex(0x292e31),
	ColorFault: hex(0xf28b82), ColorOnFault: hex(0x2a0606), ColorTrack: hex(0x34373a), ColorHull: hex(0x4a4b4a),
	ColorSound: hex(0x4fa9b4), ColorOnSound: hex(0x04181c),
	ColorThin: hex(0xe0ac40), ColorOnThin: hex(0x241800), ColorThinHatch: hex(0xf3d79a),
	ColorShort: hex(0xdd6a97), ColorOnShort: hex(0x240410), ColorShortHatch: hex(0xf2a9c4),
	ColorSpent: hex(0x9a948b), ColorOnSpent: hex(0x12110f),
}

// Palette returns the colours of a mode by their names, for drawings that go
// into files and so do not follow the theme. System counts as light.
func Palette(mode Mode) func(fyne.ThemeColorName) color.NRGBA {
	p := lightPalette
	if mode == Dark {
		p = darkPalette
	}
	return func(name fyne.ThemeColorName) color.NRGBA { return p[name] }
}

package look

import (
	"bytes"
	"encoding/binary"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/theme"

	"anodewright/assets/font"
)

var (
	regular = fyne.NewStaticResource("DejaVuSans.ttf", raiseBaseline(font.Regular))
	bold    = fyne.NewStaticResource("DejaVuSans-Bold.ttf", raiseBaseline(font.Bold))
)

// Font implements fyne.Theme: DejaVu Sans for all text, also for monospace,
// since its figures all have one width.
func (t *Theme) Font(style fyne.TextStyle) fyne.Resource {
	switch {
	case style.Symbol:
		return theme.DefaultTheme().Font(style)
	case style.Bold:
		return bold
	}
	return regular
}

// raised is by how much raiseBaseline raises the baseline, in the font's units
// of 1/2048 of the text size.
const raised = 40

// raiseBaseline returns the font with the baseline a little higher in the line,
// whose height stays the same. Fyne draws a line on a baseline rounded up, into
// a picture whose height is rounded, and so would cut off the lowest pixels of
// g, p and y at most small sizes. Ascender and descender are the second and
// third field of the table hhea after its version (OpenType specification 1.9).
func raiseBaseline(ttf []byte) []byte {
	out := bytes.Clone(ttf)
	tables := int(binary.BigEndian.Uint16(out[4:]))
	for i := range tables {
		entry := out[12+16*i:]
		if string(entry[:4]) != "hhea" {
			continue
		}
		hhea := out[binary.BigEndian.Uint32(entry[8:]):]
		for _, at := range []int{4, 6} {
			v := int16(binary.BigEndian.Uint16(hhea[at:])) - raised
			binary.BigEndian.PutUint16(hhea[at:], uint16(v))
		}
		return out
	}
	panic("look: the shipped font has no table hhea")
}

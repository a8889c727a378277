package look

import (
	"sync"
	"unicode"

	"golang.org/x/image/font/sfnt"

	"anodewright/assets/font"
)

var faces = sync.OnceValue(func() []*sfnt.Font {
	var out []*sfnt.Font
	for _, data := range [][]byte{font.Regular, font.Bold} {
		f, err := sfnt.Parse(data)
		if err != nil {
			panic("look: the shipped font cannot be read: " + err.Error())
		}
		out = append(out, f)
	}
	return out
})

// MissingRunes returns the runes of s that the shipped font lacks in regular
// or bold, each once and in order. Control characters are left out. Tests of
// screens hold that it returns nothing for every text they show.
func MissingRunes(s string) []rune {
	var missing []rune
	var buf sfnt.Buffer
	seen := map[rune]bool{}
	for _, r := range s {
		if seen[r] || unicode.IsControl(r) {
			continue
		}
		seen[r] = true
		for _, f := range faces() {
			if i, err := f.GlyphIndex(&buf, r); err != nil || i == 0 {
				missing = append(missing, r)
				break
			}
		}
	}
	return missing
}

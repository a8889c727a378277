package assetfile

import (
	"regexp"
	"strings"
	"unicode"
	"unicode/utf8"
)

// maxFileName is how many bytes of an asset's name its file's name has.
const maxFileName = 120

// reserved are names that Windows keeps for devices, whatever their ending.
var reserved = regexp.MustCompile(`(?i)^(con|prn|aux|nul|com[0-9]|lpt[0-9])( *\.|$)`)

// FileName makes of an asset's name the name of a file, without its ending,
// that every system takes: no path, no control characters, and none of the
// marks that would show it in another order than it is.
func FileName(name string) string {
	plain := strings.Map(func(r rune) rune {
		switch {
		case strings.ContainsRune(`/\:*?"<>|`, r), unicode.IsControl(r), r == utf8.RuneError, r == '\u2028', r == '\u2029':
			return '-'
		case unicode.Is(unicode.Bidi_Control, r):
			return -1
		}
		return r
	}, name)
	for len(plain) > maxFileName {
		_, size := utf8.DecodeLastRuneInString(plain)
		plain = plain[:len(plain)-size]
	}
	if plain = strings.Trim(plain, " ."); plain == "" {
		return "asset"
	}
	if reserved.MatchString(plain) {
		return "_" + plain
	}
	return plain
}

// Package font holds the typeface the program ships: DejaVu Sans, regular and
// bold. It is embedded so that every sign the screens use (≤ ≥ → ✓ ⚠ and the
// like) looks the same on every machine. See LICENCE.txt for its terms.
package font

import _ "embed"

// Regular is the TrueType file of DejaVu Sans.
//
//go:embed DejaVuSans.ttf
var Regular []byte

// Bold is the TrueType file of DejaVu Sans Bold.
//
//go:embed DejaVuSans-Bold.ttf
var Bold []byte

// Licence is the text of the typeface's licence.
//
//go:embed LICENCE.txt
var Licence string

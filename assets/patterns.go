package assets

import _ "embed"

// Patterns is the library of anode patterns as a list in the form of the asset
// file. They are the program's own invention: no maker's castings.
//
//go:embed patterns/library.json
var Patterns []byte

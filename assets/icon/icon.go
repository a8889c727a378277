// Package icon holds the program's icon, drawn for it: a slab anode on a plate,
// its outline as it was fitted and, filled, what is left of it. icon.svg is the
// source; the PNG files are made from it, see the test. Sizes are in pixels.
package icon

import (
	"embed"
	"fmt"
)

//go:embed *.png icon.svg
var files embed.FS

// Sizes are the widths of the PNG files, which are as high as wide.
var Sizes = []int{16, 24, 32, 48, 64, 128, 256, 512}

// SVG returns the source of the icon.
func SVG() []byte { return read("icon.svg") }

// PNG returns the icon in one of the Sizes; it panics on any other.
func PNG(size int) []byte { return read(fmt.Sprintf("icon-%d.png", size)) }

func read(name string) []byte {
	b, err := files.ReadFile(name)
	if err != nil {
		panic("icon: " + err.Error())
	}
	return b
}

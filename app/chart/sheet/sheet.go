// Package sheet writes drawings of package chart into files: SVG, PDF and PNG.
// All three are made of the same few strokes and glyphs, in the shipped font,
// so that they look alike and need no font where they are opened.
//
// Lengths are pixels of the drawing, from the upper left corner; in a PDF one
// pixel is one point.
package sheet

import (
	"image/color"

	"anodewright/app/chart"
)

// Ink is how lines of a role are drawn. A dash of 0 is a full line.
type Ink struct {
	Color       color.NRGBA
	Width, Dash float32
}

// Sheet is a page of drawings.
type Sheet struct {
	w, h, em float32
	paper    color.NRGBA
	lines    []stroke
	texts    []word
}

type stroke struct {
	x1, y1, x2, y2 float32
	ink            Ink
}

// word is a line of text whose left end and baseline are at a place.
type word struct {
	x, y, size float32
	text       string
	color      color.NRGBA
}

// New returns an empty sheet of a width and a height whose texts are em high.
func New(w, h, em float32, paper color.NRGBA) *Sheet {
	return &Sheet{w: w, h: h, em: em, paper: paper}
}

// Add puts a drawing on the sheet, its upper left corner at a place. Texts take
// the colour of their role's ink.
func (s *Sheet) Add(d *chart.Drawing, x, y float32, ink func(chart.Role) Ink) {
	for _, l := range d.Lines {
		s.lines = append(s.lines, stroke{l.X1 + x, l.Y1 + y, l.X2 + x, l.Y2 + y, ink(l.Role)})
	}
	for _, t := range d.Texts {
		left := x + t.X - t.Anchor*width(t.Text, s.em)
		left = min(max(left, 0), max(0, s.w-width(t.Text, s.em)))
		s.texts = append(s.texts, word{left, y + t.Y + 0.36*s.em, s.em, t.Text, ink(t.Role).Color})
	}
}

// Write puts a text on the sheet whose left end and baseline are at a place.
func (s *Sheet) Write(x, y, size float32, text string, c color.NRGBA) {
	s.texts = append(s.texts, word{x, y, size, text, c})
}

package grid

import (
	"strings"

	"fyne.io/fyne/v2"

	"anodewright/app/look"
)

// footLines is how many lines the text under the grid may have.
const footLines = 2

// note is the line under the grid: what is wrong with the selected cell, or its
// whole text if the cell is too narrow for it.
func (g *Grid) note() (text string, fault bool) {
	if g.row < 0 || g.row >= g.src.Rows() || g.col >= len(g.cols) {
		return "", false
	}
	if f := g.src.Cell(g.row, g.col).Fault; f != "" {
		return "⚠ " + g.cols[g.col].Title + ": " + f, true
	}
	return g.cut, false
}

// Note returns the line shown under the grid, empty if there is none: the fault
// of the selected cell as "⚠ wetted area: want a number above 0, got -3", or the
// whole of a text that its cell cuts short.
func (g *Grid) Note() string {
	text, _ := g.note()
	return text
}

func (g *Grid) footText(width float32) []string {
	text, _ := g.note()
	_, size := g.textSizes()
	return wrap(text, width-look.Px(16), size, footLines)
}

func (g *Grid) footHeight(width float32) float32 {
	n := len(g.footText(width))
	if n == 0 {
		return 0
	}
	_, size := g.textSizes()
	return float32(n)*fyne.MeasureText("X", size, fyne.TextStyle{}).Height + look.Px(8)
}

func (g *Grid) drawFoot(l layout) {
	_, fault := g.note()
	name := look.ColorMuted
	if fault {
		name = look.ColorFault
	}
	lines := g.footText(g.Size().Width)
	_, size := g.textSizes()
	y := g.Size().Height - l.foot + look.Px(4)
	for i, t := range g.foot {
		t.Hidden = i >= len(lines)
		if t.Hidden {
			continue
		}
		t.Text, t.TextSize, t.Color = lines[i], size, look.Color(name)
		h := t.MinSize().Height
		t.Move(whole(look.Px(8), y))
		t.Resize(fyne.NewSize(g.Size().Width-look.Px(16), h))
		y += h
	}
}

// wrap breaks text between words into at most so many lines of a width; the
// last one ends in an ellipsis if there is more.
func wrap(text string, width, size float32, most int) []string {
	words := strings.Fields(text)
	var lines []string
	for len(words) > 0 {
		if len(lines) == most-1 {
			return append(lines, look.Ellipsis(strings.Join(words, " "), width, size, fyne.TextStyle{}))
		}
		n := 1
		for n < len(words) && fyne.MeasureText(strings.Join(words[:n+1], " "), size, fyne.TextStyle{}).Width <= width {
			n++
		}
		lines = append(lines, look.Ellipsis(strings.Join(words[:n], " "), width, size, fyne.TextStyle{}))
		words = words[n:]
	}
	return lines
}

package grid

import (
	"image/color"
	"math"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/theme"

	"anodewright/app/look"
)

// layout is where everything lies for the present size, text scale and columns.
type layout struct {
	x       []float32 // left edge of each column in the content, and the right edge of the last
	sticky  float32   // width of the sticky column, 0 if none
	body    fyne.Position
	view    fyne.Size // the body's size, sticky column included
	content fyne.Size
	bar     float32 // thickness of a scroll bar
	barV    bool
	barH    bool
	foot    float32 // height of the line under the grid
}

// rowH is the height of a row. At large text it grows a little less than the
// text: the lines' own air is enough.
func (g *Grid) rowH() float32 {
	return float32(math.Round(float64(look.Px(g.rowHeight) - 4*max(look.Scale()-1, 0))))
}

func (g *Grid) headHeight() float32 {
	_, size := g.textSizes()
	lines := float32(1)
	for _, c := range g.cols {
		if c.Unit != "" {
			lines = 2
		}
	}
	line := fyne.MeasureText("X", size, fyne.TextStyle{}).Height
	return float32(math.Round(float64(lines*line + look.Air(11))))
}

// HeightOf is the height in which the grid shows so many rows whole, with its
// head and, where the columns need one, the bar below.
func (g *Grid) HeightOf(rows int) float32 {
	l := g.layout()
	h := g.headHeight() + float32(rows)*g.rowH() + 1 + l.foot
	if l.barH {
		h += l.bar
	}
	return h
}

// RowsShown is how many rows the grid shows whole.
func (g *Grid) RowsShown() int { return int((g.layout().view.Height - 1) / g.rowH()) }

// baseWidth is a column's width before any width left over is shared out: its
// own, or more where its head, in the language in force, needs more.
func (g *Grid) baseWidth(col int) float32 {
	return max(g.statedWidth(col), g.headWidth(col))
}

func (g *Grid) headWidth(col int) float32 {
	_, size := g.textSizes()
	w := float32(0)
	for _, text := range []string{g.cols[col].Title, g.cols[col].Unit} {
		if text != "" {
			w = max(w, fyne.MeasureText(text, size, fyne.TextStyle{}).Width)
		}
	}
	return w + look.Px(16)
}

// ColumnWidth is the least width of a column.
func (g *Grid) ColumnWidth(col int) float32 { return g.baseWidth(col) }

func (g *Grid) statedWidth(col int) float32 {
	w := g.cols[col].Width
	if w <= 0 {
		w = 100
	}
	if own, ok := g.widths[g.key(col)]; ok {
		w = own
	}
	return look.Px(w)
}

// layout computes the places for the grid's present size.
func (g *Grid) layout() layout {
	size := g.Size()
	l := layout{bar: look.Air(10), foot: g.footHeight(size.Width)}
	l.body = fyne.NewPos(0, g.headHeight())
	l.content.Height = float32(g.src.Rows())*g.rowH() + 1
	height := max(size.Height-l.body.Y-l.foot, 0)

	total, fills := float32(0), 0
	for i := range g.cols {
		total += g.baseWidth(i)
		if g.fills(i) {
			fills++
		}
	}
	// each bar takes room that may make the other one needed
	l.barV = l.content.Height > height
	width := size.Width
	if l.barV {
		width -= l.bar
	}
	if l.barH = total > width+0.5; l.barH {
		height -= l.bar
		if !l.barV && l.content.Height > height {
			l.barV = true
			width -= l.bar
		}
	}
	l.view = fyne.NewSize(max(width, 0), max(height, 0))

	share := float32(0)
	if fills > 0 && width > total {
		share = (width - total) / float32(fills)
	}
	x := float32(0)
	for i := range g.cols {
		l.x = append(l.x, x)
		x += g.baseWidth(i)
		if g.fills(i) {
			x += share
		}
	}
	l.x = append(l.x, x)
	l.content.Width = x
	if g.sticky && g.src.Rows() > 0 && len(g.cols) > 1 && l.x[1] < 0.7*l.view.Width {
		l.sticky = l.x[1]
	}
	return l
}

// bound returns the offset moved to where there is content.
func (l layout) bound(off fyne.Position) fyne.Position {
	off.X = max(min(off.X, l.content.Width-l.view.Width), 0)
	off.Y = max(min(off.Y, l.content.Height-l.view.Height), 0)
	return off
}

// isSticky says whether the column stays in place.
func (l layout) isSticky(col int) bool { return col == 0 && l.sticky > 0 }

// cell returns where a cell lies on the grid, given the offset.
func (g *Grid) cell(l layout, row, col int) (fyne.Position, fyne.Size) {
	pos := fyne.NewPos(l.x[col], l.body.Y+float32(row)*g.rowH()-g.offset.Y)
	if !l.isSticky(col) {
		pos.X -= g.offset.X
	}
	return pos, fyne.NewSize(l.x[col+1]-l.x[col], g.rowH())
}

// at returns the cell at a place of the grid; row is -1 for the head, and ok is
// false where there is no cell.
func (g *Grid) at(l layout, p fyne.Position) (row, col int, ok bool) {
	if p.X < 0 || p.X >= l.view.Width || p.Y < 0 || p.Y >= l.body.Y+l.view.Height {
		return 0, 0, false
	}
	x := p.X
	if x >= l.sticky {
		x += g.offset.X
	}
	col = -1
	for i := range g.cols {
		if x >= l.x[i] && x < l.x[i+1] {
			col = i
		}
	}
	if col < 0 {
		return 0, 0, false
	}
	if p.Y < l.body.Y {
		return -1, col, true
	}
	row = int((p.Y - l.body.Y + g.offset.Y) / g.rowH())
	return row, col, row < g.src.Rows()
}

// reveal scrolls so far that the cell is wholly in view.
func (g *Grid) reveal(row, col int) {
	if row < 0 || col < 0 || col >= len(g.cols) {
		return
	}
	l := g.layout()
	if l.view.IsZero() {
		return // not laid out yet
	}
	top := float32(row) * g.rowH()
	if top < g.offset.Y {
		g.offset.Y = top
	} else if end := top + g.rowH() + 1 - l.view.Height; end > g.offset.Y {
		g.offset.Y = end
	}
	if !l.isSticky(col) {
		if left := l.x[col] - l.sticky; left < g.offset.X {
			g.offset.X = left
		} else if end := l.x[col+1] - l.view.Width; end > g.offset.X {
			g.offset.X = min(end, left)
		}
	}
	g.offset = l.bound(g.offset)
}

// visible returns the first row in view and the one after the last.
func (g *Grid) visible(l layout) (first, end int) {
	first = max(int(g.offset.Y/g.rowH()), 0)
	end = int(math.Ceil(float64((g.offset.Y + l.view.Height) / g.rowH())))
	return first, max(min(end, g.src.Rows()), first)
}

// CellPlace returns where a cell lies on the canvas, for menus and tests, and
// whether any of it is in view.
func (g *Grid) CellPlace(row, col int) (fyne.Position, fyne.Size, bool) {
	if row < 0 || row >= g.src.Rows() || col < 0 || col >= len(g.cols) {
		return fyne.Position{}, fyne.Size{}, false
	}
	l := g.layout()
	pos, size := g.cell(l, row, col)
	seen := pos.Y+size.Height > l.body.Y && pos.Y < l.body.Y+l.view.Height &&
		pos.X+size.Width > l.sticky && pos.X < l.view.Width || l.isSticky(col)
	return fyne.CurrentApp().Driver().AbsolutePositionForObject(g).Add(pos), size, seen
}

// textSizes returns the sizes of a cell's first and second line.
func textSizes() (text, sub float32) {
	return theme.Size(theme.SizeNameText), theme.Size(theme.SizeNameCaptionText)
}

// textSizes returns the sizes of the first and second line of this grid's
// cells.
func (g *Grid) textSizes() (text, sub float32) {
	text, sub = textSizes()
	if g.large {
		text, sub = larger(text), larger(sub)
	}
	return text, sub
}

// larger is the size of large text: 1.4 times that of other text, or a little
// less where that is large already. It is whole, as all sizes are.
func larger(size float32) float32 {
	return float32(math.Round(float64(size * (1.4 - 0.4*max(look.Scale()-1, 0)))))
}

// LargeText is the size of the text in large grids.
func LargeText() float32 { return larger(theme.Size(theme.SizeNameText)) }

// largeTheme is the program's theme with large text, for a large grid's editor.
type largeTheme struct{ fyne.Theme }

func (largeTheme) Size(name fyne.ThemeSizeName) float32 {
	if name == theme.SizeNameText {
		return larger(theme.Size(name))
	}
	return theme.Size(name)
}

func (largeTheme) Color(name fyne.ThemeColorName, _ fyne.ThemeVariant) color.Color {
	return theme.Color(name)
}

package grid

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/theme"

	"anodewright/app/look"
)

// parts are the objects a grid is drawn with. They belong to the grid, not to
// its renderer, which Fyne may throw away while the grid is out of sight.
type parts struct {
	objects []fyne.CanvasObject

	head, stickyHead, body, stickyBody *clip
	headRule, edge, ring               *canvas.Rectangle
	tints, marks                       [2]*canvas.Rectangle // scrolling, sticky
	titles                             []headView
	cells                              []*cellView
	rules                              []*canvas.Rectangle
	barV, barH                         *bar
	foot                               []*canvas.Text
	empty                              []*canvas.Text // the lines of Empty
	cut                                string         // the selected cell's text, if it was cut short

	edit     edit
	editClip *clip
	editor   *editor
	wheel    *wheel
	list     *pickList
}

// headView is what one column's head is drawn with.
type headView struct{ title, unit *canvas.Text }

func (g *Grid) makeParts() {
	g.body, g.stickyBody, g.head, g.stickyHead, g.editClip = newClip(), newClip(), newClip(), newClip(), newClip()
	g.headRule, g.edge, g.ring = canvas.NewRectangle(nil), canvas.NewRectangle(nil), canvas.NewRectangle(nil)
	for i := range g.marks {
		g.tints[i], g.marks[i] = canvas.NewRectangle(nil), canvas.NewRectangle(nil)
	}
	g.barV = newBar(true, func(y float32) { g.scrollBy(0, y-g.offset.Y) })
	g.barH = newBar(false, func(x float32) { g.scrollBy(x-g.offset.X, 0) })
	for range footLines {
		g.foot = append(g.foot, canvas.NewText("", nil))
	}
	g.editor = newEditor(g)
	if g.large {
		container.NewThemeOverride(g.editor, largeTheme{look.New(look.Light, 1)}) // which it keeps
	}
	g.wheel = newWheel(g)
	g.list = newPickList(g)

	g.objects = []fyne.CanvasObject{g.body, g.stickyBody, g.head, g.stickyHead, g.headRule, g.edge}
	for _, t := range g.foot {
		g.objects = append(g.objects, t)
	}
	g.objects = append(g.objects, g.barV, g.barH, g.editClip, g.ring, g.list)
}

// draw places and fills everything for the present size, offset, selection and
// contents.
func (g *Grid) draw() {
	if g.Size().IsZero() {
		return
	}
	// Whether the selected text is cut short is known only once it is drawn, and
	// then the line under the grid takes room.
	if cut := g.drawOnce(); cut != g.cut {
		g.cut = cut
		g.drawOnce()
	}
}

func (g *Grid) drawOnce() (cut string) {
	l := g.layout()
	g.offset = l.bound(g.offset)
	g.body.place(l.sticky, l.body.Y, l.view.Width-l.sticky, l.view.Height)
	g.stickyBody.place(0, l.body.Y, l.sticky, l.view.Height)
	g.head.place(l.sticky, 0, l.view.Width-l.sticky, l.body.Y)
	g.stickyHead.place(0, 0, l.sticky, l.body.Y)

	first, end := g.visible(l)
	g.drawHead(l)
	g.drawTints(l, first, end)
	g.drawRules(l, first, end)
	cut = g.drawCells(l, first, end)
	g.drawMarks(l, first, end)
	g.drawEmpty(l)
	g.drawFrame(l)
	g.drawFoot(l)
	g.placeEditor(l)
	return cut
}

// pane returns the body's clip a column is drawn in, and its index.
func (g *Grid) pane(l layout, col int) (*clip, int) {
	if l.isSticky(col) {
		return g.stickyBody, 1
	}
	return g.body, 0
}

func (g *Grid) drawHead(l layout) {
	_, size := g.textSizes()
	pad := look.Px(8)
	for len(g.titles) < len(g.cols) {
		g.titles = append(g.titles, headView{canvas.NewText("", nil), canvas.NewText("", nil)})
	}
	lineH := fyne.MeasureText("X", size, fyne.TextStyle{}).Height
	for i, c := range g.cols {
		into, x := g.head, l.x[i]-g.offset.X-l.sticky
		if l.isSticky(i) {
			into, x = g.stickyHead, l.x[i]
		}
		left, end := x+pad, x+l.x[i+1]-l.x[i]-pad
		v := g.titles[i]
		bottom := l.body.Y - look.Px(5)
		top := bottom - lineH
		if c.Unit != "" {
			setText(v.unit, c.Unit, size, false, true, c.Right, left, top, end, lineH)
			into.add(v.unit)
			top -= lineH
		}
		setText(v.title, c.Title, size, false, c.Unit == "", c.Right, left, top, end, lineH)
		v.title.Color = look.Color(look.ColorInk)
		into.add(v.title)
	}
}

// drawTints shades the row of the selected cell, or all rows after select all.
func (g *Grid) drawTints(l layout, first, end int) {
	if g.row < 0 {
		return
	}
	from, to := g.row, g.row+1
	name := look.ColorRowTint
	if g.all {
		from, to, name = first, end, look.ColorAccentPale
	}
	if to <= first || from >= end {
		return
	}
	for i, into := range []*clip{g.body, g.stickyBody} {
		t := g.tints[i]
		t.FillColor = look.Color(name)
		t.Move(fyne.NewPos(0, float32(from)*g.rowH()-g.offset.Y))
		t.Resize(fyne.NewSize(min(into.Size().Width, l.content.Width), float32(to-from)*g.rowH()))
		into.add(t)
	}
}

// drawRules draws the fine line under each row.
func (g *Grid) drawRules(l layout, first, end int) {
	n := 0
	for row := first; row < end; row++ {
		for _, into := range []*clip{g.body, g.stickyBody} {
			if n == len(g.rules) {
				g.rules = append(g.rules, canvas.NewRectangle(nil))
			}
			r := g.rules[n]
			n++
			r.FillColor = look.Color(look.ColorLine)
			r.Move(fyne.NewPos(0, float32(row+1)*g.rowH()-g.offset.Y))
			r.Resize(fyne.NewSize(min(into.Size().Width, l.content.Width), 1))
			into.add(r)
		}
	}
}

// drawCells draws the cells in view and returns the selected one's text if it
// had to be cut short.
func (g *Grid) drawCells(l layout, first, end int) (cut string) {
	n := 0
	text, sub := g.textSizes()
	for row := first; row < end; row++ {
		for col, c := range g.cols {
			pos, size := g.cell(l, row, col)
			into, _ := g.pane(l, col)
			pos = pos.Subtract(into.Position())
			if pos.X+size.Width <= 0 || pos.X >= into.Size().Width {
				continue
			}
			if n == len(g.cells) {
				g.cells = append(g.cells, newCellView())
			}
			selected := row == g.row && col == g.col
			content := g.src.Cell(row, col)
			pick := selected && c.Edit && c.Choices != nil
			if g.cells[n].show(into, content, c.Right, pick, text, sub, pos, size) && selected {
				cut = content.Text
				if content.Sub != "" {
					cut += " · " + content.Sub
				}
			}
			n++
		}
	}
	return cut
}

// emptyLines is how many lines Empty may have.
const emptyLines = 4

// drawEmpty says what to do in a table without rows.
func (g *Grid) drawEmpty(l layout) {
	if g.Empty == "" || g.src.Rows() > 0 {
		return
	}
	for len(g.empty) < emptyLines {
		g.empty = append(g.empty, canvas.NewText("", nil))
	}
	size, _ := g.textSizes()
	y := look.Px(8)
	for i, line := range wrap(g.Empty, l.view.Width-look.Px(16), size, emptyLines) {
		t := g.empty[i]
		t.Text, t.TextSize, t.Color = line, size, look.Color(look.ColorMuted)
		m := t.MinSize()
		t.Move(whole(look.Px(8), y))
		t.Resize(m)
		g.body.add(t)
		y += m.Height
	}
}

// drawMarks draws the border around the selected cell: strong while the grid
// has the keyboard, fine otherwise.
func (g *Grid) drawMarks(l layout, first, end int) {
	if g.row < first || g.row >= end || g.col < 0 {
		return
	}
	into, i := g.pane(l, g.col)
	pos, size := g.cell(l, g.row, g.col)
	if g.edit.on && g.editorWidth(l, pos.X, size.Width) > size.Width {
		return // the editor reaches over the cell's edge
	}
	m := g.marks[i]
	m.StrokeColor, m.StrokeWidth = look.Color(look.ColorMuted), 1
	if g.hasKeys() {
		m.StrokeColor, m.StrokeWidth = look.Color(look.ColorAccent), 2
	}
	m.CornerRadius = 5
	m.Move(pos.Subtract(into.Position()).AddXY(1, 2))
	m.Resize(size.SubtractWidthHeight(2, 3))
	into.add(m)
}

// drawFrame draws the lines of the head and the sticky column, the bars, and
// the ring around a grid that has the keyboard but no cell to show it.
func (g *Grid) drawFrame(l layout) {
	wide := min(l.view.Width, l.content.Width)
	g.headRule.FillColor = look.Color(look.ColorEdge)
	g.headRule.Move(fyne.NewPos(0, l.body.Y-1))
	g.headRule.Resize(fyne.NewSize(wide, 1))

	g.edge.Hidden = l.sticky == 0 || g.offset.X == 0
	g.edge.FillColor = look.Color(look.ColorEdge)
	g.edge.Move(fyne.NewPos(l.sticky-1, 0))
	g.edge.Resize(fyne.NewSize(1, l.body.Y+min(l.view.Height, l.content.Height)))

	if g.barV.Hidden = !l.barV; l.barV {
		g.barV.set(l.view.Width, l.body.Y, l.bar, l.view.Height, l.content.Height, l.view.Height, g.offset.Y)
	}
	if g.barH.Hidden = !l.barH; l.barH {
		g.barH.set(l.sticky, l.body.Y+l.view.Height, l.view.Width-l.sticky, l.bar, l.content.Width-l.sticky, l.view.Width-l.sticky, g.offset.X)
	}

	g.ring.Hidden = !g.focused || g.row >= 0
	g.ring.StrokeColor, g.ring.StrokeWidth, g.ring.CornerRadius = look.Color(theme.ColorNamePrimary), 2, 4
	g.ring.Resize(g.Size())
}

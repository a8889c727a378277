package grid

import (
	"fmt"
	"maps"
	"math"
	"slices"
	"strconv"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"

	"anodewright/app/look"
)

// widths are the widths that the user gave to columns, at text scale 1, by
// their keys: see key.
type widths map[string]float32

// Widths as dragged lie between these, at text scale 1.
const (
	leastWidth = 40
	mostWidth  = 900
	edgeReach  = 5 // so far from an edge the mouse takes hold of it
)

// sizing is the drag of a column's right edge.
type sizing struct {
	on   bool
	col  int
	from float32 // where the drag began
	wide float32 // the column then
}

// key names a column among the grid's, also after others were added.
func (g *Grid) key(col int) string {
	if id := g.cols[col].ID; id != "" {
		return id
	}
	return "#" + strconv.Itoa(col)
}

// fills says whether a column takes a share of the width left over: one that
// the user made as wide as wanted does not.
func (g *Grid) fills(col int) bool {
	_, set := g.widths[g.key(col)]
	return g.cols[col].Fill && !set
}

// Widths returns the widths that the user gave to columns as one line of text,
// empty if there are none, for SetWidths.
func (g *Grid) Widths() string {
	var parts []string
	for _, k := range slices.Sorted(maps.Keys(g.widths)) {
		parts = append(parts, fmt.Sprintf("%s=%.0f", k, g.widths[k]))
	}
	return strings.Join(parts, ";")
}

// SetWidths gives the columns the widths of a text from Widths; what it does
// not name, or cannot be read, is as wide as made.
func (g *Grid) SetWidths(text string) {
	g.widths = widths{}
	for part := range strings.SplitSeq(text, ";") {
		k, figure, _ := strings.Cut(part, "=")
		if w, err := strconv.ParseFloat(figure, 32); err == nil && w >= leastWidth && w <= mostWidth {
			g.widths[k] = float32(w)
		}
	}
	g.Refresh()
}

// setWidth makes a column so many pixels wide.
func (g *Grid) setWidth(col int, pixels float32) {
	w := min(max(pixels/look.Scale(), leastWidth), mostWidth)
	if g.widths == nil {
		g.widths = widths{}
	}
	g.widths[g.key(col)] = float32(math.Round(float64(w)))
	g.Refresh()
}

// edgeAt returns the column whose right edge in the head is at a place.
func (g *Grid) edgeAt(p fyne.Position) (col int, ok bool) {
	l := g.layout()
	if p.Y < 0 || p.Y >= l.body.Y || p.X > l.view.Width {
		return 0, false
	}
	for i := len(g.cols) - 1; i >= 0; i-- {
		x := l.x[i+1]
		if !l.isSticky(i) {
			x -= g.offset.X
			if x < l.sticky {
				continue
			}
		}
		if d := p.X - x; d > -look.Px(edgeReach) && d < look.Px(edgeReach) {
			return i, true
		}
	}
	return 0, false
}

// beginSizing takes hold of a column's edge.
func (g *Grid) beginSizing(p fyne.Position) bool {
	col, ok := g.edgeAt(p)
	if ok {
		l := g.layout()
		g.sizing = sizing{on: true, col: col, from: p.X, wide: l.x[col+1] - l.x[col]}
	}
	return ok
}

// Dragged widens or narrows the column whose edge is held.
func (g *Grid) Dragged(ev *fyne.DragEvent) {
	if g.sizing.on {
		g.setWidth(g.sizing.col, g.sizing.wide+ev.Position.X-g.sizing.from)
	}
}

// DragEnd tells the page of the new widths.
func (g *Grid) DragEnd() { g.endSizing() }

func (g *Grid) endSizing() {
	if g.sizing.on {
		g.sizing.on = false
		g.tellWidths()
	}
}

func (g *Grid) tellWidths() {
	if g.OnWidths != nil {
		g.OnWidths(g.Widths())
	}
}

// widen changes the selected column's width by the keyboard.
func (g *Grid) widen(by float32) {
	if g.col < 0 || g.col >= len(g.cols) {
		return
	}
	l := g.layout()
	g.setWidth(g.col, l.x[g.col+1]-l.x[g.col]+look.Px(by))
	g.tellWidths()
}

// MouseIn implements desktop.Hoverable.
func (g *Grid) MouseIn(ev *desktop.MouseEvent) { g.MouseMoved(ev) }

// MouseMoved learns whether the mouse is on an edge in the head.
func (g *Grid) MouseMoved(ev *desktop.MouseEvent) { _, g.onEdge = g.edgeAt(ev.Position) }

// MouseOut implements desktop.Hoverable.
func (g *Grid) MouseOut() { g.onEdge = false }

// Cursor shows that an edge can be dragged.
func (g *Grid) Cursor() desktop.Cursor {
	if g.onEdge || g.sizing.on {
		return desktop.HResizeCursor
	}
	return desktop.DefaultCursor
}

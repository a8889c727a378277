// Package grid is the editable table used on every page: typed columns over
// rows, moved through by mouse and by the whole keyboard, with one editor that
// lies over the selected cell.
//
// The grid knows nothing of the domain. It asks a [Source] for its cells and
// hands typed text back to it; whether the text is right is the source's
// business, and what is wrong is shown in the cell and under the grid. Lengths
// are Fyne's device-independent pixels at text scale 1.
package grid

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/widget"

	"anodewright/app/look"
)

// Column says what a column is called and how its cells behave.
type Column struct {
	ID    string  // for the page's own use
	Title string  // shown in the head
	Unit  string  // shown under the title
	Width float32 // at text scale 1; 0 means 100
	Right bool    // figures: aligned to the right
	Edit  bool    // the user may change the cells
	Fill  bool    // takes a share of the width left over

	// Choices, if not nil, gives the texts a cell may be set to; they are offered
	// in a list below the editor, and typing the beginning of one chooses it.
	Choices func(row int) []string
}

// Cell is what one cell shows.
type Cell struct {
	Text   string
	Sub    string // a small second line
	Fault  string // what is wrong with Text: "want a number above 0, got -3"
	Muted  bool
	Bold   bool
	Accent bool   // pale accent fill, for an action in the schedule
	State  string // "sound", "thin", "short" or "spent": a badge before Text
}

// Source gives the grid its cells and takes what the user typed.
type Source interface {
	Rows() int
	Cell(row, col int) Cell
	// Commit takes the text typed into a cell. If it is wrong the source keeps it
	// and gives it back in Cell together with the fault. The grid refreshes
	// itself afterwards.
	Commit(row, col int, text string)
}

// EditTexter may be implemented by a [Source] whose cells are edited as another
// text than they show, as 1234.5 for "1 234.5 m²".
type EditTexter interface {
	EditText(row, col int) string
}

// Option changes how a grid is made.
type Option func(*Grid)

// Dense makes rows 30 pixels high instead of 36.
func Dense() Option { return RowHeight(30) }

// RowHeight sets the height of rows; two lines need at least 30.
func RowHeight(h float32) Option { return func(g *Grid) { g.rowHeight = h } }

// Sticky keeps the first column in view when the others scroll sideways.
func Sticky() Option { return func(g *Grid) { g.sticky = true } }

// FitRows makes the grid ask for the height of all its rows, but of no more
// than most. Without it a grid asks for three rows and takes what it gets.
func FitRows(most int) Option { return func(g *Grid) { g.fitRows = most } }

// Large shows the cells in large text, to be read from a step away.
func Large() Option { return func(g *Grid) { g.large = true } }

// Grid is the table. Make it with [New]. All its methods are to be called on
// Fyne's own goroutine.
type Grid struct {
	widget.BaseWidget

	// OnSelect is called when the user selects a cell; not by Select.
	OnSelect func(row, col int)
	// OnOpen is called when the user presses Enter on, or clicks again, a
	// selected cell that cannot be edited.
	OnOpen func(row, col int)
	// OnMenu is called at the right mouse button or the menu key; at is the place
	// on the canvas. The cell has been selected before.
	OnMenu func(row, col int, at fyne.Position)
	// OnHead is called when the head of a column is clicked.
	OnHead func(col int)
	// OnKey is offered every key before the grid acts on it, unless the editor is
	// open; it returns true to keep the key to itself.
	OnKey func(row, col int, key *fyne.KeyEvent) bool
	// OnPasteRows is called when a pasted block reaches below the last row; more
	// is how many rows are missing. The source may add them.
	OnPasteRows func(more int)
	// OnPaste is offered a pasted block before it is committed cell by cell, so
	// that a page may make one step of it; it returns true if it took the block.
	OnPaste func(row, col int, block [][]string) bool
	// Empty is shown in place of rows where there are none: what to do.
	Empty string
	// OnWidths is told the columns' widths when the user has changed one: see
	// Widths.
	OnWidths func(text string)

	cols      []Column
	src       Source
	rowHeight float32
	sticky    bool
	fitRows   int
	large     bool

	row, col int // the selected cell, -1 if none
	all      bool
	focused  bool
	again    bool // the mouse went down on the cell that was selected already
	kept     bool // OnKey kept the last key, so its rune is kept too
	offset   fyne.Position
	widths   widths
	sizing   sizing
	onEdge   bool

	parts
}

// New returns a grid of the columns over the source.
func New(cols []Column, src Source, opts ...Option) *Grid {
	g := &Grid{cols: cols, src: src, rowHeight: 36, row: -1, col: -1}
	for _, o := range opts {
		o(g)
	}
	g.ExtendBaseWidget(g)
	g.makeParts()
	return g
}

// Source returns where the cells come from.
func (g *Grid) Source() Source { return g.src }

// Columns returns the columns.
func (g *Grid) Columns() []Column { return g.cols }

// SetColumns changes the columns. An open editor is closed without a commit and
// the selection keeps its place as far as it exists.
func (g *Grid) SetColumns(cols []Column) {
	g.CancelEdit()
	g.cols = cols
	g.Refresh()
}

// SetUnit changes what stands under the title of a column.
func (g *Grid) SetUnit(col int, unit string) {
	if g.cols[col].Unit != unit {
		g.cols[col].Unit = unit
		g.Refresh()
	}
}

// Selected returns the selected cell, or -1, -1 if there is none.
func (g *Grid) Selected() (row, col int) { return g.row, g.col }

// Select selects a cell and brings it into view, without calling OnSelect. A
// place outside the grid is moved to its edge. An open editor on another cell
// is committed first.
func (g *Grid) Select(row, col int) {
	if g.Editing() && (row != g.edit.row || col != g.edit.col) {
		g.CommitEdit()
	}
	g.row, g.col, g.all = row, col, false
	g.clampSelection()
	g.reveal(g.row, g.col)
	g.Refresh()
}

// Unselect leaves no cell selected. An open editor is committed first.
func (g *Grid) Unselect() {
	g.CommitEdit()
	g.row, g.col, g.all = -1, -1, false
	g.Refresh()
}

// pick is a selection by the user.
func (g *Grid) pick(row, col int) {
	oldRow, oldCol := g.row, g.col
	g.Select(row, col)
	if g.OnSelect != nil && g.row >= 0 && (g.row != oldRow || g.col != oldCol) {
		g.OnSelect(g.row, g.col)
	}
}

func (g *Grid) clampSelection() {
	rows := g.src.Rows()
	if rows == 0 || len(g.cols) == 0 || g.row < 0 && g.col < 0 {
		g.row, g.col = -1, -1
		return
	}
	g.row = min(max(g.row, 0), rows-1)
	g.col = min(max(g.col, 0), len(g.cols)-1)
}

// Refresh reads all visible cells from the source again. An open editor keeps
// its text and its place unless its row is gone.
func (g *Grid) Refresh() {
	g.clampSelection()
	if g.Editing() && (g.edit.row >= g.src.Rows() || g.edit.col >= len(g.cols)) {
		g.CancelEdit()
	}
	g.BaseWidget.Refresh()
}

// ScrollTo brings a cell into view.
func (g *Grid) ScrollTo(row, col int) {
	g.reveal(row, col)
	g.Refresh()
}

// Focus gives the grid the keyboard.
func (g *Grid) Focus() {
	if c := g.canvas(); c != nil && c.Focused() != fyne.Focusable(g) {
		c.Focus(g)
	}
}

func (g *Grid) canvas() fyne.Canvas { return fyne.CurrentApp().Driver().CanvasForObject(g) }

// modifiers returns the modifier keys held down; tests replace it.
var modifiers = func() fyne.KeyModifier {
	if d, ok := fyne.CurrentApp().Driver().(desktop.Driver); ok {
		return d.CurrentKeyModifiers()
	}
	return 0
}

// CreateRenderer implements fyne.Widget.
func (g *Grid) CreateRenderer() fyne.WidgetRenderer { return &renderer{g} }

type renderer struct{ g *Grid }

func (r *renderer) Destroy()                     {}
func (r *renderer) Objects() []fyne.CanvasObject { return r.g.objects }
func (r *renderer) MinSize() fyne.Size           { return r.g.minSize() }
func (r *renderer) Layout(fyne.Size)             { r.g.draw() }

func (r *renderer) Refresh() {
	r.g.draw()
	canvas.Refresh(r.g)
}

func (g *Grid) minSize() fyne.Size {
	rows := 3
	if g.fitRows > 0 {
		rows = min(max(g.src.Rows(), 1), g.fitRows)
	}
	w := look.Px(160)
	if len(g.cols) > 0 {
		w = max(w, g.baseWidth(0)+look.Px(80))
	}
	return fyne.NewSize(w, g.headHeight()+float32(rows)*g.rowH()+1)
}

package pages

import (
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/dialog"

	"anodewright/anodes"
	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// pickPattern shows the library of castings, of which one is copied to the
// asset's patterns.
func (f *Frame) pickPattern(added func(i int, err error)) {
	grid.CommitOpen()
	if f.s.Asset() == nil {
		return
	}
	l := newLibraryPicker(f, added)
	l.d.Show()
	f.win.Canvas().Focus(l.search)
}

// libraryPicker is the dialog of the library.
type libraryPicker struct {
	f      *Frame
	added  func(i int, err error)
	d      *dialog.CustomDialog
	search *formEntry
	list   *grid.Grid
	cells  *fixed
	found  []hull.Pattern
	sketch *sketch
	detail *look.Paragraph
}

func newLibraryPicker(f *Frame, added func(i int, err error)) *libraryPicker {
	l := &libraryPicker{f: f, added: added, cells: &fixed{}, sketch: newSketch(150), detail: look.Note("")}
	l.search = &formEntry{escape: func() { f.hide(l.d) }}
	l.search.ExtendBaseWidget(l.search)
	l.search.SetPlaceHolder(say.T("search by name, alloy or shape: zinc slab, stand-off, bracelet"))
	l.search.OnChanged = func(string) { l.update() }
	l.search.OnSubmitted = func(string) { l.add() }
	l.list = grid.New([]grid.Column{
		{Title: say.T("Pattern"), Width: 270, Fill: true},
		{Title: say.T("Alloy"), Width: 84}, {Title: say.T("Shape"), Width: 104},
		{Title: say.T("Net"), Unit: say.Mass.Unit(), Width: 62, Right: true}, {Title: say.T("Gross"), Unit: say.Mass.Unit(), Width: 66, Right: true},
		{Title: say.T("Length"), Unit: say.Thin.Unit(), Width: 66, Right: true}, {Title: say.T("Afloat"), Width: 60},
	}, l.cells, grid.Dense(), grid.Sticky())
	l.list.OnSelect = func(int, int) { l.show() }
	l.list.OnOpen = func(int, int) { l.add() }
	below := container.NewVBox(l.sketch, l.detail)
	body := topDown(l.search, l.list, below)
	l.d = dialog.NewCustomWithoutButtons(say.T("Add a pattern from the library"), body, f.win)
	cancel, add := look.Button(say.T("Cancel"), func() { f.hide(l.d) }), look.AccentButton(say.T("Add a copy"), l.add)
	cancel.OnEscape, add.OnEscape = cancel.OnTapped, cancel.OnTapped
	l.d.SetButtons([]fyne.CanvasObject{cancel, add})
	l.d.Resize(dialogSize(f.win, 880, 660))
	l.update()
	return l
}

// searchLibrary returns the castings that have all words of a text in their
// name, alloy or shape.
func searchLibrary(text string) []hull.Pattern {
	var found []hull.Pattern
	for _, p := range anodes.Library() {
		about := strings.ToLower(p.Name + " " + string(p.Alloy) + " " + session.Words(p.Shape) + " " + p.ID + " " + p.Fixing)
		fits := true
		for _, word := range strings.Fields(strings.ToLower(text)) {
			fits = fits && strings.Contains(about, word)
		}
		if fits {
			found = append(found, p)
		}
	}
	return found
}

// update shows what the search finds, the first one chosen.
func (l *libraryPicker) update() {
	l.found = searchLibrary(l.search.Text)
	l.cells.cells = nil
	for i := range l.found {
		p := &l.found[i]
		length, afloat := "", ""
		if p.Length > 0 {
			length = millimetres(p.Length)
		}
		if p.Afloat {
			afloat = say.T("yes")
		}
		l.cells.cells = append(l.cells.cells, []grid.Cell{
			{Text: p.Name, Bold: true}, {Text: session.AlloyName(p.Alloy)}, {Text: session.Words(p.Shape)},
			{Text: kilograms(p.NetMass)}, {Text: kilograms(p.Gross())}, {Text: length}, {Text: afloat},
		})
	}
	l.list.Refresh()
	if len(l.found) > 0 {
		l.list.Select(0, 0)
		l.list.ScrollTo(0, 0)
	}
	l.show()
}

// chosen returns the casting chosen, and whether there is one.
func (l *libraryPicker) chosen() (*hull.Pattern, bool) {
	row, _ := l.list.Selected()
	if row < 0 || row >= len(l.found) {
		return nil, false
	}
	return &l.found[row], true
}

func (l *libraryPicker) show() {
	p, ok := l.chosen()
	if !ok {
		l.sketch.show(nil)
		l.detail.SetText(say.T("The library has nothing of that name. Duplicate a pattern of the asset and change it."))
		return
	}
	l.sketch.show(p)
	l.detail.SetText(say.T("Invented for this program, no maker's casting: %s; utilisation factor %s. The copy costs %s in the asset's currency, a round figure: correct sizes, mass and price from your maker's drawing.",
		say.Sentence(p.Fixing), session.Figure(p.Utilisation, 2), session.Figure(p.Price, 0)))
}

func (l *libraryPicker) add() {
	p, ok := l.chosen()
	if !ok {
		return
	}
	l.f.hide(l.d)
	l.added(l.f.s.AddPattern(*p))
}

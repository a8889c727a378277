package pages

import (
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/dialog"
	"fyne.io/fyne/v2/widget"

	"anodewright/anodes/plan"
	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
	"anodewright/hull/water"
)

// waterButtons are what can be done below the table of waters.
func (p *steel) waterButtons() fyne.CanvasObject {
	return container.NewVBox(
		container.NewHBox(look.Button(say.T("Add water"), p.addWater), look.Button(say.T("From the table…"), func() { p.f.pickWater(p.waterAdded) })),
		container.NewHBox(look.Button(say.T("Trading pattern…"), p.f.importTrade)))
}

// showWater says what follows from the water of a row, before the hint of its
// field.
func (p *steel) showWater(row int, hint string) {
	p.setHint(strings.TrimSpace(session.WaterNote(p.f.s.Asset(), row) + " " + hint))
}

// waterAdded selects a water that came from the table.
func (p *steel) waterAdded(i int) {
	p.update()
	g := p.grids["Waters"]
	g.Select(i, 0)
	g.ScrollTo(i, 0)
	g.Focus()
	p.showWater(i, "")
}

// showLack names below the demand of a zone the waters in which its anodes are
// short of output.
func (p *steel) showLack(o *plan.Outcome, zone int) {
	text := ""
	if o != nil {
		for _, c := range o.Cautions {
			if c.ID == "short-water" && c.Zone == zone {
				text = say.Sentence(c.Text)
			}
		}
	}
	if text != p.lack.Text() {
		p.lack.SetText(text)
		p.card.Refresh() // it may need more lines
	}
}

// pickWater shows the reference tables of sea areas, rivers and lakes,
// sediments and soils, of which one is copied to the asset's waters.
func (f *Frame) pickWater(added func(i int)) {
	grid.CommitOpen()
	if f.s.Asset() == nil {
		return
	}
	p := newWaterPicker(f, added)
	p.d.Show()
	f.win.Canvas().Focus(p.search)
}

// waterPicker is the dialog of the reference tables.
type waterPicker struct {
	f           *Frame
	added       func(i int)
	d           *dialog.CustomDialog
	search      *formEntry
	list        *grid.Grid
	cells       *fixed
	found       []water.Entry
	detail      *look.Paragraph
	temperature *formEntry
	atSea       *widget.Check
	wrong       *look.Paragraph
}

func newWaterPicker(f *Frame, added func(i int)) *waterPicker {
	p := &waterPicker{f: f, added: added, cells: &fixed{}, detail: look.Note(""), wrong: look.Wrong("")}
	p.search = p.entry(say.T("search by name, medium or source: baltic, river, sediment"))
	p.search.OnChanged = func(string) { p.update() }
	p.list = grid.New([]grid.Column{
		{Title: say.T("Water"), Width: 230, Fill: true},
		{Title: say.T("Medium"), Width: 80},
		{Title: say.T("Salinity"), Unit: say.T("mean (range)"), Width: 130, Right: true},
		{Title: say.T("Temperature"), Unit: say.T("%s, mean (months)", say.Temperature.Unit()), Width: 140, Right: true},
		{Title: say.T("Resistivity"), Unit: say.T("%s, mean (best–worst)", say.Resistivity.Unit()), Width: 186, Right: true},
	}, p.cells, grid.RowHeight(40), grid.Sticky())
	p.list.OnSelect = func(int, int) { p.show() }
	p.list.OnOpen = func(int, int) { p.add() }
	p.temperature = p.entry(say.T("annual mean"))
	p.atSea = widget.NewCheck(say.T("for steel that also lies in the sea"), nil)
	box := container.New(fixedWidth{120}, p.temperature)
	below := container.NewVBox(p.detail,
		container.NewHBox(look.Strong(say.T("Temperature of the copy")), box, look.Plain(say.Temperature.Unit()), spacer(16), p.atSea), p.wrong)
	body := container.NewBorder(p.search, below, nil, nil, p.list)
	p.d = dialog.NewCustomWithoutButtons(say.T("Add a water from the table"), body, f.win)
	cancel, add := look.Button(say.T("Cancel"), func() { f.hide(p.d) }), look.AccentButton(say.T("Add a copy"), p.add)
	cancel.OnEscape, add.OnEscape = cancel.OnTapped, cancel.OnTapped
	p.d.SetButtons([]fyne.CanvasObject{cancel, add})
	p.d.Resize(dialogSize(f.win, 940, 640))
	p.update()
	return p
}

func (p *waterPicker) entry(placeholder string) *formEntry {
	e := &formEntry{escape: func() { p.f.hide(p.d) }}
	e.ExtendBaseWidget(e)
	e.SetPlaceHolder(placeholder)
	e.OnSubmitted = func(string) { p.add() }
	return e
}

// update shows the entries that the search finds, the first one chosen.
func (p *waterPicker) update() {
	p.found = water.Search(p.search.Text)
	p.cells.cells = nil
	for _, e := range p.found {
		temperature := session.RangeText(say.Temperature, e.Temperature, 1)
		if session.NeedsTemperature(e) {
			temperature = say.T("to be entered")
		}
		resistivity := grid.Cell{Text: session.ResistivityText(e.Resistivity), Bold: true}
		if e.Temperature == nil && !e.Stated {
			resistivity.Sub = say.T("at %s", session.ShownWith(say.Temperature, 15, 0))
		}
		salinity := grid.Cell{Text: session.RangeText(say.Plain, e.Salinity, 1)}
		if e.Conductivity25 != nil {
			salinity = grid.Cell{Text: session.RangeText(say.Plain, e.Conductivity25, 0), Sub: say.T("µS/cm at 25 °C")}
		}
		p.cells.cells = append(p.cells.cells, []grid.Cell{
			{Text: e.Name, Sub: say.Sentence(e.Source), Bold: true}, {Text: session.Words(hull.Medium(e.Medium))}, salinity,
			{Text: temperature, Muted: e.Temperature == nil}, resistivity,
		})
	}
	p.list.Refresh()
	if len(p.found) > 0 {
		p.list.Select(0, 0)
		p.list.ScrollTo(0, 0)
	}
	p.show()
}

// chosen returns the entry chosen, and whether there is one.
func (p *waterPicker) chosen() (water.Entry, bool) {
	row, _ := p.list.Selected()
	if row < 0 || row >= len(p.found) {
		return water.Entry{}, false
	}
	return p.found[row], true
}

// show says all about the entry chosen and proposes its temperature.
func (p *waterPicker) show() {
	p.wrong.SetText("")
	e, ok := p.chosen()
	if !ok {
		p.detail.SetText(say.T("The tables have nothing of that name. Add a water by hand, with its salinity, conductivity or resistivity."))
		p.temperature.SetText("")
		p.atSea.Hide()
		return
	}
	text := e.Name + ": " + say.Sentence(e.Source) + "; " + say.Sentence(e.Confidence) + "."
	if e.Note != "" {
		text += " " + capitalised(say.Sentence(e.Note)) + "."
	}
	if e.Medium == string(hull.Soil) {
		text += " " + say.T("At its mean %s (common practice, no source).", say.T(water.Severity(e.Resistivity.Mean)))
	}
	p.detail.SetText(say.T("%s The copy takes the means; change it as you know better.", text))
	p.temperature.SetText("")
	if e.Temperature != nil {
		p.temperature.SetText(session.ShownNumber(say.Temperature, e.Temperature.Mean))
	}
	p.atSea.SetChecked(hasMedium(p.f.s.Asset(), hull.Seawater))
	if e.Medium == string(hull.Fresh) {
		p.atSea.Show()
	} else {
		p.atSea.Hide()
	}
}

// hasMedium reports whether a zone of the asset lies in the medium.
func hasMedium(a *hull.Asset, m hull.Medium) bool {
	for i := range a.Zones {
		if a.Medium(&a.Zones[i]) == m {
			return true
		}
	}
	return false
}

// add copies the entry chosen, or says what is wrong.
func (p *waterPicker) add() {
	e, ok := p.chosen()
	if !ok {
		p.wrong.SetText(say.T("Want a water from the table."))
		return
	}
	var temperature *float64
	if text := strings.TrimSpace(p.temperature.Text); text != "" {
		x, err := session.ParseShown(say.Temperature, text)
		if err != nil {
			p.wrong.SetText(say.T("Temperature: %s", inWords(err)))
			return
		}
		temperature = &x
	}
	var medium hull.Medium
	if e.Medium == string(hull.Fresh) && p.atSea.Checked {
		medium = hull.Seawater
	}
	at, err := p.f.s.AddWaterFrom(e, temperature, medium)
	if err != nil {
		p.wrong.SetText(capitalised(inWords(err)))
		return
	}
	p.f.hide(p.d)
	p.added(at)
}

// capitalised writes a text with a large first letter.
func capitalised(s string) string {
	if s == "" {
		return s
	}
	r := []rune(s)
	return strings.ToUpper(string(r[:1])) + string(r[1:])
}

// fixedWidth lays out one object as wide as given at text scale 1.
type fixedWidth struct{ width float32 }

func (w fixedWidth) MinSize(objects []fyne.CanvasObject) fyne.Size {
	return fyne.NewSize(look.Px(w.width), objects[0].MinSize().Height)
}

func (w fixedWidth) Layout(objects []fyne.CanvasObject, size fyne.Size) {
	objects[0].Move(fyne.NewPos(0, 0))
	objects[0].Resize(size)
}

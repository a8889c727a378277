package pages

import (
	"math"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"anodewright/anodes/plan"
	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/assets"
	"anodewright/hull"
)

// basisPage says where every figure comes from, which cautions the plan
// raises, and how sure the reference tables are.
type basisPage struct {
	f        *Frame
	zone     *zonePick
	steps    *grid.Grid
	figures  *fixed
	cautions *grid.Grid
	raised   *fixed
	note     *look.Paragraph
	all      fyne.CanvasObject
	drawer   *drawer
}

func newBasis(f *Frame) *basisPage {
	p := &basisPage{f: f, figures: &fixed{}, raised: &fixed{}, note: look.Note("")}
	p.zone = newZonePick(f, p.updateSteps)
	p.steps = grid.New([]grid.Column{
		{Title: say.T("Figure"), Width: 380}, {Title: say.T("Value"), Width: 100, Right: true}, {Title: say.T("Unit"), Width: 70},
		{Title: say.T("Formula"), Width: 280}, {Title: say.T("With"), Width: 320}, {Title: say.T("Source"), Width: 260}, {Title: say.T("How sure"), Width: 190, Fill: true},
	}, p.figures, grid.Dense(), grid.Sticky())
	p.cautions = grid.New([]grid.Column{
		{Title: say.T("Where"), Width: 150}, {Title: say.T("Caution"), Width: 470, Fill: true}, {Title: say.T("Source"), Width: 190}, {Title: say.T("How sure"), Width: 180},
	}, p.raised, grid.Dense())
	tables := &fixed{}
	for _, t := range assets.Tables() {
		tables.cells = append(tables.cells, []grid.Cell{{Text: say.T(t.Title)}, {Text: say.Sentence(t.Source())}, {Text: say.T(t.Unit)}, {Text: sureText(t.Confidence)}})
	}
	tableGrid := grid.New([]grid.Column{
		{Title: say.T("Reference table"), Width: 420}, {Title: say.T("Document"), Width: 280}, {Title: say.T("Unit"), Width: 130}, {Title: say.T("How sure"), Width: 190, Fill: true},
	}, tables, grid.Dense())
	figures := look.Card(say.T("Where the figures come from"), container.NewBorder(p.zone.content(), nil, nil, nil, p.steps))
	below := container.NewAppTabs(
		container.NewTabItem(say.T("Cautions"), container.NewBorder(nil, p.note, nil, nil, p.cautions)),
		container.NewTabItem(say.T("Reference tables"), tableGrid))
	note := say.T(plan.Closing)
	if say.US() {
		note += " " + say.T("Formulas and their figures here are in SI units.")
	}
	p.note.SetText(note)
	p.drawer = newDrawer(f, "Basis", figures, look.Card("", below), 260, func() float32 {
		return figures.Around() + p.zone.list.MinSize().Height + p.steps.HeightOf(5)
	})
	p.drawer.say(say.T("Cautions that this plan raises, and the reference tables"))
	p.all = p.drawer.all
	return p
}

func (p *basisPage) title() string              { return say.T("Basis") }
func (p *basisPage) content() fyne.CanvasObject { return p.all }
func (p *basisPage) lower() *drawer             { return p.drawer }
func (p *basisPage) selectZone(zone int)        { p.zone.chosen = zone }

func (p *basisPage) update() {
	o := p.f.s.Outcome()
	if o == nil {
		return
	}
	if !p.zone.update(o) {
		p.updateSteps()
	}
	var cells [][]grid.Cell
	for _, c := range o.AllCautions() {
		where := grid.Cell{Text: say.T("always"), Muted: true}
		if c.Zone >= 0 {
			where = grid.Cell{Text: o.Asset.Zones[c.Zone].Name, Bold: true}
		} else if len(cells) < len(o.Cautions) {
			where = grid.Cell{Text: say.T("whole asset"), Bold: true}
		}
		cells = append(cells, []grid.Cell{where, {Text: say.Sentence(c.Text)}, {Text: say.Sentence(c.Source), Muted: true}, {Text: sureText(c.Confidence), Muted: true}})
	}
	p.raised.cells = cells
	p.cautions.Refresh()
}

func (p *basisPage) updateSteps() {
	o := p.f.s.Outcome()
	if o == nil || p.zone.chosen >= len(o.Zones) {
		return
	}
	var cells [][]grid.Cell
	for _, s := range o.Explain(p.zone.chosen) {
		cells = append(cells, []grid.Cell{
			{Text: say.Sentence(s.Figure)}, {Text: figureText(s.Value)}, {Text: say.T(s.Unit)}, {Text: say.Sentence(s.Formula)}, {Text: inputsText(s.Inputs), Muted: true},
			{Text: say.Sentence(s.Source)}, {Text: sureText(s.Confidence)},
		})
	}
	p.figures.cells = cells
	p.steps.Refresh()
}

// sureText marks what is only remembered.
func sureText(confidence string) string {
	if strings.Contains(confidence, "memory") {
		return say.T("%s: check", say.Sentence(confidence))
	}
	return say.Sentence(confidence)
}

// figureText writes a figure with about four digits, and a small one, as a well
// coated line's breakdown, with three.
func figureText(x float64) string {
	decimals := 1
	switch size := math.Abs(x); {
	case size > 0 && size < 0.01:
		decimals = min(12, 2-int(math.Floor(math.Log10(size))))
	case size < 1:
		decimals = 4
	case size < 100:
		decimals = 3
	}
	s := session.Figure(x, decimals)
	return strings.TrimSuffix(strings.TrimRight(s, "0"), say.Decimal("."))
}

func inputsText(ins []hull.Input) string {
	var parts []string
	for _, in := range ins {
		parts = append(parts, strings.TrimSpace(say.Sentence(in.Name)+" "+figureText(in.Value)+" "+say.T(in.Unit)))
	}
	return strings.Join(parts, ", ")
}

package pages

import (
	"fmt"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/session"
	"anodewright/hull"
)

// steel is the page of the zones: the table edited in place, the rest of a
// zone, the asset and its waters beside it, and the current demand below.
type steel struct {
	f       *Frame
	rows    fieldRows
	zones   *grid.Grid
	side    *look.CardBox
	parts   *fyne.Container
	grids   map[string]*grid.Grid
	shown   string // of grids
	hint    *look.Paragraph
	demand  *grid.Grid
	figures *fixed
	card    *look.CardBox
	all     fyne.CanvasObject
}

func newSteel(f *Frame) *steel {
	p := &steel{f: f, figures: &fixed{}, hint: look.Note(""), shown: "Zone"}
	p.rows = fieldRows{f, session.Zones, session.ZoneColumns()}
	p.zones = grid.New(p.rows.columns(152, 98, 98, 70, 52, 52, 60, 104), p.rows, grid.Dense(), grid.Sticky())
	p.zones.OnSelect = func(row, col int) {
		p.hint.SetText(p.rows.fields[col].Hint)
		p.update()
	}
	zone := fieldLines{f, session.Zones, p.selected, session.ZoneDetails()}
	asset := fieldLines{f, session.Whole, func() int { return 0 }, session.AssetFields()}
	waters := fieldRows{f, session.Waters, session.WaterFields()}
	p.grids = map[string]*grid.Grid{
		"Zone":   grid.New(zone.columns(), zone, grid.Dense()),
		"Asset":  grid.New(asset.columns(), asset, grid.Dense()),
		"Waters": grid.New(waters.columns(90, 110, 80, 60, 66, 80, 80, 66, 66), waters, grid.Dense()),
	}
	hints := func(fields []session.Field) func(int, int) {
		return func(row, _ int) { p.hint.SetText(fields[row].Hint) }
	}
	p.grids["Zone"].OnSelect = hints(zone.fields)
	p.grids["Asset"].OnSelect = hints(asset.fields)
	p.grids["Waters"].OnSelect = func(_, col int) { p.hint.SetText(waters.fields[col].Hint) }
	p.parts = container.NewStack()
	p.side = look.Card("", container.NewBorder(nil, p.hint, nil, nil, p.parts))

	p.demand = grid.New([]grid.Column{
		{ID: "interval", Title: "Up to", Width: 106},
		{ID: "breakdown", Title: "Breakdown", Unit: "start/mean/end %", Width: 128, Right: true},
		{ID: "own", Title: "Own demand", Unit: "init./mean/final A", Width: 134, Right: true},
		{ID: "total", Title: "With held zones", Unit: "init./mean/final A", Width: 134, Right: true},
		{ID: "code", Title: "By offshore code", Unit: "init./mean/final A", Width: 134, Right: true},
		{ID: "practice", Title: "By ship practice", Unit: "init./mean/final A", Width: 134, Right: true},
		{ID: "output", Title: "Anodes give", Unit: "at end, A", Width: 86, Right: true},
		{ID: "state", Title: "At the end", Width: 130, Fill: true},
	}, p.figures, grid.Dense(), grid.Sticky())
	p.card = look.Card("Current demand", p.demand)

	buttons := container.NewHBox(
		look.Button("Add a zone like this", func() { p.addZone() }),
		look.Button("Remove this zone", func() {
			if i := p.selected(); i >= 0 {
				f.report(f.s.RemoveZone(i))
			}
		}))
	zones := look.Card("Zones", container.NewBorder(nil, buttons, nil, nil, p.zones))
	p.all = container.New(above{210, 0.34}, container.New(beside{290}, zones, p.side), p.card)
	return p
}

func (p *steel) title() string              { return "Steel" }
func (p *steel) content() fyne.CanvasObject { return p.all }

// selected returns the zone that the page is about, -1 when there is none.
func (p *steel) selected() int {
	a := p.f.s.Asset()
	if a == nil {
		return -1
	}
	row, _ := p.zones.Selected()
	return min(max(row, 0), len(a.Zones)-1)
}

func (p *steel) addZone() {
	at, err := p.f.s.AddZone(p.selected())
	p.f.report(err)
	if err == nil {
		p.zones.Select(at, 0)
		p.update()
	}
}

func (p *steel) update() {
	i := p.selected()
	a := p.f.s.Asset()
	p.zones.Refresh()
	p.showSide(a, i)
	var cells [][]grid.Cell
	o := p.f.s.Outcome()
	if o == nil || i < 0 || i >= len(o.Zones) {
		p.figures.cells = nil
		p.card.SetTitle("Current demand: computing…")
		p.demand.Refresh()
		return
	}
	z := o.Zones[i]
	p.card.SetTitle("Current demand: " + z.Zone.Name)
	p.card.SetExtra(look.Muted("densities: " + session.Words(o.Asset.Basis.Densities)))
	for _, iv := range z.Intervals {
		practice := "–"
		if iv.ByPractice != nil {
			practice = triple(*iv.ByPractice)
		}
		output, state := "–", grid.Cell{Text: heldText(o.Asset, z.Zone), Muted: true}
		if iv.State != "" {
			output = session.Figure(iv.Output, 2)
			state = grid.Cell{State: string(iv.State), Text: iv.Cause}
		}
		b := iv.Breakdown
		cells = append(cells, []grid.Cell{
			{Text: session.Day(iv.To)},
			{Text: fmt.Sprintf("%.1f / %.1f / %.1f", 100*b.Initial, 100*b.Mean, 100*b.Final)},
			{Text: triple(iv.Demand), Bold: true},
			{Text: triple(iv.Total)},
			{Text: triple(iv.ByCode), Muted: true},
			{Text: practice, Muted: true},
			{Text: output},
			state,
		})
	}
	p.figures.cells = cells
	p.demand.Refresh()
}

// showSide shows the chosen part beside the table.
func (p *steel) showSide(a *hull.Asset, zone int) {
	titles := map[string]string{"Asset": "Asset, basis and costs", "Waters": "Waters"}
	if a != nil && zone >= 0 {
		titles["Zone"] = a.Zones[zone].Name
	}
	p.side.SetTitle(titles[p.shown])
	choice := container.NewHBox()
	for _, part := range []string{"Zone", "Asset", "Waters"} {
		show := func() { p.shown = part; p.hint.SetText(""); p.update() }
		if part == p.shown {
			choice.Add(look.Button(part, show))
		} else {
			choice.Add(look.QuietButton(part, show))
		}
	}
	var below fyne.CanvasObject
	if p.shown == "Waters" {
		below = look.Button("Add a water", func() { p.f.report(p.f.s.AddWater()) })
	}
	g := p.grids[p.shown]
	p.parts.Objects = []fyne.CanvasObject{container.NewBorder(choice, below, nil, nil, g)}
	p.parts.Refresh()
	g.Refresh()
}

// heldText says what holds a zone without anodes of its own.
func heldText(a *hull.Asset, z *hull.Zone) string {
	switch h := z.Hold().(type) {
	case hull.ByZone:
		host, _ := a.Zone(h.Host)
		if !z.Bonded {
			return "not bonded to " + host.Name
		}
		return "held by " + host.Name
	case hull.ByImpressedCurrent:
		return "impressed current"
	case hull.ByCoat:
		return "zinc coat"
	case hull.ByAnodes:
		return "own anodes"
	}
	panic("pages: unknown way of holding a zone")
}

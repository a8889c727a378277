package pages

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"anodewright/anodes/plan"
	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// steel is the page of the zones: the table edited in place, the rest of a
// zone, the asset and its waters beside it, and the current demand below.
type steel struct {
	f         *Frame
	rows      fieldRows
	zones     *grid.Grid
	side      *look.CardBox
	tabs      *tabs
	parts     *fyne.Container
	grids     map[string]*grid.Grid
	shown     string // of grids
	hint      *look.Paragraph
	listCard  *look.CardBox
	proposed  *look.Text
	other     string // the rule that the demand is compared with
	demand    *grid.Grid
	figures   *fixed
	card      *look.CardBox
	day       *fixed // the zone's figures on the cursor's day
	drawer    *drawer
	all       fyne.CanvasObject
	protected *protected
	lack      *look.Paragraph // of output in some water
}

// partNames are the parts beside the table.
var partNames = []string{say.Mark("Zone"), say.Mark("Day"), say.Mark("Asset"), say.Mark("Waters")}

func newSteel(f *Frame) *steel {
	p := &steel{f: f, figures: &fixed{}, day: &fixed{}, hint: look.Note(""), shown: "Zone"}
	p.rows = fieldRows{f, session.Zones, session.ZoneColumns()}
	p.zones = grid.New(p.rows.columns(150, 118, 98, 68, 50, 54, 60, 112), p.rows, grid.Dense(), grid.Sticky())
	p.rows.pasteBlocks(p.zones)
	p.zones.OnSelect = func(row, col int) {
		p.hint.SetText(say.T(p.rows.fields[col].Hint))
		f.selectZone(row)
		p.update()
	}
	zone := fieldLines{f, session.Zones, p.selected, session.ZoneDetails()}
	asset := fieldLines{f, session.Whole, func() int { return 0 }, session.AssetFields()}
	waters := fieldRows{f, session.Waters, session.WaterFields()}
	p.grids = map[string]*grid.Grid{
		"Zone":   grid.New(zone.columns(), zone, grid.Dense()),
		"Day":    grid.New([]grid.Column{{ID: "field", Title: say.T("Figure"), Width: 122}, {Title: say.T("On the day"), Width: 110, Fill: true}}, p.day, grid.Dense()),
		"Asset":  grid.New(asset.columns(), asset, grid.Dense()),
		"Waters": grid.New(waters.columns(90, 110, 80, 60, 66, 80, 86, 66, 66), waters, grid.Dense()),
	}
	waters.pasteBlocks(p.grids["Waters"])
	hints := func(fields []session.Field) func(int, int) {
		return func(row, _ int) { p.setHint(say.T(fields[row].Hint)) }
	}
	p.grids["Zone"].OnSelect = hints(zone.fields)
	p.grids["Asset"].OnSelect = hints(asset.fields)
	p.grids["Waters"].OnSelect = func(row, col int) { p.showWater(row, say.T(waters.fields[col].Hint)) }
	p.tabs = newTabs(saidAll(partNames), func(i int) {
		grid.CommitOpen()
		p.shown = partNames[i]
		p.hint.SetText("")
		p.update()
		p.grids[p.shown].Focus()
	})
	p.parts = container.NewStack()
	p.side = look.Card("", container.NewBorder(p.tabs.row, p.hint, nil, nil, p.parts))
	for _, name := range partNames {
		part := fyne.CanvasObject(p.grids[name])
		if name == "Waters" {
			part = container.NewBorder(nil, p.waterButtons(), nil, nil, part)
		}
		p.parts.Add(part)
	}

	p.other = byPractice
	p.demand = grid.New(demandColumns(p.other), p.figures, grid.Dense(), grid.Sticky())
	p.protected = newProtected(p.demand)
	p.lack = look.Note("")
	p.card = look.Card(say.T("Current demand"), container.NewBorder(nil, p.lack, nil, nil, p.protected.content()))

	buttons := container.NewHBox(
		look.Button(say.T("Add zone"), func() { p.addZone() }),
		look.Button(say.T("Remove zone"), func() {
			if i := p.selected(); i >= 0 {
				f.report(f.s.RemoveZone(i))
			}
		}),
		look.Button(say.T("Areas…"), func() { f.estimateAreas(p.selected()) }))
	p.proposed = look.Muted("")
	p.listCard = look.Card(say.T("Zones"), p.zones)
	p.listCard.SetExtra(container.NewHBox(p.proposed, buttons))
	p.drawer = newDrawer(f, "Steel", container.New(beside{284}, p.listCard, p.side), p.card, 196, func() float32 {
		return p.listCard.Around() + p.zones.HeightOf(min(leastRows(), max(p.rows.Rows(), 4)))
	})
	p.all = p.drawer.all
	return p
}

func (p *steel) title() string              { return say.T("Steel") }
func (p *steel) content() fyne.CanvasObject { return p.all }
func (p *steel) first() *grid.Grid          { return p.zones }
func (p *steel) lower() *drawer             { return p.drawer }

func (p *steel) selectZone(zone int) {
	_, col := p.zones.Selected()
	p.zones.Select(zone, max(col, 0))
}

// selected returns the zone that the page is about, -1 when there is none.
func (p *steel) selected() int {
	a := p.f.s.Asset()
	if a == nil {
		return -1
	}
	row, _ := p.zones.Selected()
	return min(max(row, 0), len(a.Zones)-1)
}

// changeZones does something with the selected zone and selects the one that
// it leads to.
func (p *steel) changeZones(do func(zone int) (int, error)) {
	at, err := do(p.selected())
	p.f.report(err)
	if err == nil {
		_, col := p.zones.Selected()
		p.zones.Select(at, max(col, 0))
		p.f.Update()
		p.zones.Focus()
	}
}

func (p *steel) addZone() {
	at, err := p.f.s.AddZone(p.selected())
	p.f.report(err)
	if err == nil {
		p.zones.Select(at, 0)
		p.update()
		p.zones.Focus()
	}
}

func (p *steel) update() {
	i := p.selected()
	a := p.f.s.Asset()
	p.f.selectZone(i) // rows may have been added or taken away
	p.showProposed()
	p.zones.Refresh()
	p.showSide(a, i)
	var cells [][]grid.Cell
	o := p.f.s.Outcome()
	if o == nil || i < 0 || i >= len(o.Zones) {
		p.figures.cells, p.day.cells = nil, nil
		p.drawer.say("Current demand: computing…")
		p.showLack(nil, i)
		p.protected.show(nil)
		p.card.SetTitle(say.T("Current demand: computing…"))
		p.demand.Refresh()
		return
	}
	z := o.Zones[i]
	p.protected.show(z.Protection)
	p.card.SetTitle(say.T("Current demand: %s", z.Zone.Name))
	p.card.SetExtra(look.Muted(say.T("densities: %s", session.Words(o.Asset.Basis.Densities))))
	// Beside the offshore code, what the other rule for this kind gives.
	rule := byPractice
	if z.Intervals[0].BySeaArea != nil && o.Asset.Kind != hull.Ship && o.Asset.Kind != hull.FloatingUnit {
		rule = bySeaArea
	}
	if rule != p.other {
		p.other = rule
		p.demand.SetColumns(demandColumns(rule))
	}
	now := intervalAt(o, p.f.cursor)
	for k, iv := range z.Intervals {
		other := iv.ByPractice
		if rule == bySeaArea {
			other = iv.BySeaArea
		}
		comparison := "–"
		if other != nil {
			comparison = triple(*other)
		}
		output, state := "–", grid.Cell{Text: heldText(o.Asset, z.Zone), Muted: true}
		if iv.State != "" {
			state.State, state.Muted = string(iv.State), false
			if _, own := z.Zone.Hold().(hull.ByAnodes); own {
				output, state.Text = session.Figure(iv.Output, 2), say.Sentence(iv.Cause)
			}
		}
		b := iv.Breakdown
		cells = append(cells, []grid.Cell{
			{Text: session.Day(iv.To), Accent: k == now},
			{Text: percents(b.Initial) + " / " + percents(b.Mean) + " / " + percents(b.Final)},
			{Text: triple(iv.Demand), Bold: true},
			{Text: triple(iv.Total)},
			{Text: triple(iv.ByCode), Muted: true},
			{Text: comparison, Muted: true},
			{Text: output},
			state,
		})
	}
	p.figures.cells = cells
	p.demand.Refresh()
	p.showLack(o, i)
	p.showDay(o, i)
}

// showDay shows the zone's figures on the cursor's day, and in the folded line
// below the demand of the interval that the day lies in.
func (p *steel) showDay(o *plan.Outcome, zone int) {
	iv := o.Zones[zone].Intervals[intervalAt(o, p.f.cursor)]
	z := o.Zones[zone].Zone
	demand := say.T("Up to %s: %s A", session.Day(iv.To), triple(iv.Total))
	whole := say.T("%s, up to %s: demand %s A at the start, on average and at the end", z.Name, session.Day(iv.To), triple(iv.Total))
	if _, own := z.Hold().(hull.ByAnodes); own && iv.State != "" {
		gives := " · " + say.T("anodes give %s A", amperes(iv.Output))
		demand, whole = demand+gives, whole+gives
	}
	if lack := p.lack.Text(); lack != "" {
		p.drawer.say("⚠ "+lack, demand)
	} else {
		p.drawer.say(whole, demand)
	}
	p.day.cells = p.f.dayCells(o, zone)
	if p.shown == "Day" {
		p.side.SetTitle(p.dayTitle(o.Zones[zone].Zone.Name))
		p.grids["Day"].Refresh()
	}
}

func (p *steel) dayTitle(zone string) string {
	return session.Day(p.f.cursor) + ": " + zone
}

// cursorMoved shows the figures of the cursor's new day.
func (p *steel) cursorMoved() {
	o, i := p.f.s.Outcome(), p.selected()
	if o == nil || i < 0 || i >= len(o.Zones) {
		return
	}
	now := intervalAt(o, p.f.cursor)
	moved := false
	for k := range p.figures.cells {
		c := &p.figures.cells[k][0]
		moved = moved || c.Accent != (k == now)
		c.Accent = k == now
	}
	if moved && p.drawer.open {
		p.demand.Refresh()
	}
	p.showDay(o, i)
}

// The rules that the demand is compared with, as heads of their column.
var (
	byPractice = say.Mark("By ship practice")
	bySeaArea  = say.Mark("By sea area")
)

func demandColumns(other string) []grid.Column {
	return []grid.Column{
		{ID: "interval", Title: say.T("Up to"), Width: 112},
		{ID: "breakdown", Title: say.T("Breakdown"), Unit: say.T("start/mean/end %"), Width: 140, Right: true},
		{ID: "own", Title: say.T("Own demand"), Unit: say.T("init./mean/final A"), Width: 148, Right: true},
		{ID: "total", Title: say.T("With held zones"), Unit: say.T("init./mean/final A"), Width: 134, Right: true},
		{ID: "code", Title: say.T("By offshore code"), Unit: say.T("init./mean/final A"), Width: 134, Right: true},
		{ID: "other", Title: say.T(other), Unit: say.T("init./mean/final A"), Width: 134, Right: true},
		{ID: "output", Title: say.T("Anodes give"), Unit: say.T("at end, A"), Width: 86, Right: true},
		{ID: "state", Title: say.T("At the end"), Width: 110, Fill: true},
	}
}

// showProposed says how much of the zones is only proposed.
func (p *steel) showProposed() {
	if text := p.f.proposedText(); text != p.proposed.String() {
		p.proposed.SetText(text)
		p.listCard.Refresh()
	}
}

// showSide shows the chosen part beside the table.
func (p *steel) showSide(a *hull.Asset, zone int) {
	titles := map[string]string{"Asset": say.T("Asset, basis and costs"), "Waters": say.T("Waters")}
	if a != nil && zone >= 0 {
		titles["Zone"] = a.Zones[zone].Name
		titles["Day"] = p.dayTitle(a.Zones[zone].Name)
	}
	p.side.SetTitle(titles[p.shown])
	for i, name := range partNames {
		if name == p.shown {
			p.tabs.mark(i)
			p.parts.Objects[i].Show()
		} else {
			p.parts.Objects[i].Hide()
		}
	}
	p.grids[p.shown].Refresh()
}

// setHint says what a field means.
func (p *steel) setHint(text string) {
	p.hint.SetText(text)
	p.side.Refresh() // the hint may need more lines
}

func (p *steel) addWater() {
	err := p.f.s.AddWater()
	p.f.report(err)
	if err == nil {
		p.update()
		g := p.grids["Waters"]
		g.Select(len(p.f.s.Asset().Waters)-1, 0)
		g.Focus()
	}
}

// heldText says what holds a zone without anodes of its own.
func heldText(a *hull.Asset, z *hull.Zone) string {
	switch h := z.Hold().(type) {
	case hull.ByZone:
		host, _ := a.Zone(h.Host)
		if !z.Bonded {
			return say.T("not bonded to %s", host.Name)
		}
		return say.T("held by %s", host.Name)
	case hull.ByImpressedCurrent:
		return say.T("impressed current")
	case hull.ByCoat:
		return say.T("zinc coat")
	case hull.ByAnodes:
		return say.T("own anodes")
	}
	panic("pages: unknown way of holding a zone")
}

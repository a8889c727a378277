package pages

import (
	"cmp"
	"fmt"
	"math"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/theme"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// dockings is the page of the plan: what is done with each zone at each
// docking, why, and the dockings themselves.
type dockings struct {
	f       *Frame
	plan    *grid.Grid
	actions *fixed
	card    *look.CardBox
	why     *why
	whatIf  *whatIf
	list    *grid.Grid
	rows    fieldRows // of the list
	all     fyne.CanvasObject
	columns string // of the plan, to see when they change
	drawer  *drawer
}

func newDockings(f *Frame) *dockings {
	p := &dockings{f: f, actions: &fixed{}, why: newWhy(), whatIf: newWhatIf(f)}
	p.plan = grid.New([]grid.Column{{Title: say.T("Zone")}}, p.actions, grid.RowHeight(40), grid.Sticky())
	p.plan.OnSelect = func(row, _ int) {
		f.selectZone(row)
		p.update()
	}
	p.plan.OnKey, p.plan.OnMenu = p.pinKey, p.pinMenu
	p.card = look.Card(say.T("Zones by dockings"), p.plan)
	rows := fieldRows{f, session.Dockings, session.DockingFields()}
	cols := rows.columns(112, 90, 84, 320, 96, 80, 90)
	cols[0].Fill, cols[3].Fill = false, true
	p.rows = rows
	p.list = grid.New(cols, rows, grid.Dense())
	rows.pasteBlocks(p.list)
	hint := look.Note("")
	p.list.OnSelect = func(_, col int) { hint.SetText(say.T(rows.fields[col].Hint)) }
	buttons := container.NewHBox(
		look.Button(say.T("Add docking"), func() { f.report(f.s.AddDocking()) }),
		look.Button(say.T("Remove docking"), func() {
			if i, _ := p.list.Selected(); i >= 0 {
				f.report(f.s.RemoveDocking(i))
			}
		}),
		look.Button(say.T("Limits…"), f.askLimits))
	list := look.Card(say.T("Dockings"), container.NewBorder(nil, container.NewBorder(nil, nil, buttons, nil, hint), nil, nil, p.list))
	p.drawer = newDrawer(f, "Dockings", container.New(beside{272}, p.card, p.side()), list, 206, func() float32 {
		return p.card.Around() + p.plan.HeightOf(min(6, max(p.actions.Rows(), 3)))
	})
	p.drawer.say(say.T("Dockings, their coating works and costs"))
	p.all = p.drawer.all
	return p
}

func (p *dockings) title() string              { return say.T("Dockings") }
func (p *dockings) content() fyne.CanvasObject { return p.all }
func (p *dockings) lower() *drawer             { return p.drawer }

func (p *dockings) selectZone(zone int) {
	_, col := p.plan.Selected()
	if col < 0 {
		col = 2 // the first docking
	}
	p.plan.Select(zone, col)
}

// first selects the first action, so that its reasons are shown.
func (p *dockings) first() *grid.Grid {
	if row, _ := p.plan.Selected(); row < 0 {
		for i, row := range p.actions.cells {
			for k, c := range row {
				if c.Accent {
					p.plan.Select(i, k)
					p.update()
					return p.plan
				}
			}
		}
	}
	return p.plan
}

func (p *dockings) update() {
	p.rows.showUnits(p.list)
	p.list.Refresh()
	o := p.f.s.Outcome()
	if o == nil {
		p.actions.cells = nil
		p.card.SetTitle(say.T("Zones by dockings: computing…"))
		p.plan.Refresh()
		p.whatIf.update()
		return
	}
	var cells [][]grid.Cell
	for i := range o.Zones {
		z := o.Zones[i].Zone
		row := []grid.Cell{{Text: z.Name, Bold: true}, fittedCell(o, z)}
		for k := range o.Asset.Ahead() {
			row = append(row, pinnedCell(actionCell(o, i, k), o, i, k))
		}
		cells = append(cells, row)
	}
	p.actions.cells = cells
	p.setColumns(o)
	p.card.SetTitle(say.T("Zones by dockings"))
	p.card.SetExtra(look.Accented(costText(o)))
	p.plan.Refresh()
	p.drawer.say(cmp.Or(limitsText(o), say.T("Dockings, their coating works and costs"))) // it may have room now
	row, col := p.plan.Selected()
	p.why.show(o, row, col-2)
	p.whatIf.update()
}

func (p *dockings) setColumns(o *plan.Outcome) {
	cols := []grid.Column{{Title: say.T("Zone"), Width: 120, Fill: true}, {Title: say.T("Fitted now"), Width: 108}}
	width := p.actionWidth()
	key := fmt.Sprint(width)
	for _, d := range o.Asset.Ahead() {
		unit := ""
		if d.Kind != hull.DryDock {
			unit = session.Words(d.Kind)
		}
		cols = append(cols, grid.Column{ID: "action", Title: session.Day(d.Date), Unit: unit, Width: width, Fill: true})
		key += d.Date.String() + unit
	}
	if key != p.columns {
		p.columns = key
		p.plan.SetColumns(cols)
	}
}

func costText(o *plan.Outcome) string {
	s := session.Figure(o.Money.Total, 0) + " " + o.Asset.Currency
	switch {
	case len(o.Pins) > 0 && len(o.Unmet) == 0:
		return s + " · " + pinsText(o)
	case len(o.Unmet) > 0:
		return say.T("%s · a zone cannot be held", s)
	case o.OverLimits != "":
		return say.T("%s · beyond the limits", s)
	case o.Money.Proven:
		return say.T("%s · proven cheapest", s)
	case !math.IsNaN(o.Money.LowerBound):
		return say.T("%s · no plan below %s", s, session.Figure(o.Money.LowerBound, 0))
	}
	return s
}

func fittedCell(o *plan.Outcome, z *hull.Zone) grid.Cell {
	if _, own := z.Hold().(hull.ByAnodes); !own {
		text, sub := heldText(o.Asset, z), ""
		switch h := z.Hold().(type) {
		case hull.ByZone:
			host, _ := o.Asset.Zone(h.Host)
			text, sub = say.T("held by"), host.Name
			if !z.Bonded {
				text = say.T("not bonded to")
			}
		case hull.ByImpressedCurrent:
			text, sub, _ = strings.Cut(text, " ")
		}
		return grid.Cell{Text: text, Sub: sub, Muted: true}
	}
	if len(z.Fitted) == 0 {
		return grid.Cell{Text: say.T("none"), Muted: true}
	}
	set := func(f hull.Fitted) string {
		p, _ := o.Asset.Pattern(f.Pattern)
		return pieces(f.Count, p)
	}
	sub := say.T("%s wasted", session.Percent(z.Fitted[0].Wastage))
	if len(z.Fitted) > 1 {
		var others []string
		for _, f := range z.Fitted[1:] {
			others = append(others, set(f))
		}
		sub = say.T("and %s", strings.Join(others, ", "))
	}
	return grid.Cell{Text: set(z.Fitted[0]), Sub: sub, Muted: true}
}

// pieces writes a count of a pattern by its mass: 14 × 45 kg.
func pieces(n int, p *hull.Pattern) string {
	return fmt.Sprintf("%d × %s", n, session.ShownWith(say.Mass, p.NetMass, decimals(say.Mass.Show(p.NetMass))))
}

func decimals(mass float64) int {
	if mass == math.Trunc(mass) {
		return 0
	}
	return 1
}

func actionCell(o *plan.Outcome, zone, docking int) grid.Cell {
	for _, u := range o.Unmet {
		if u.Zone == zone && u.Date == o.Asset.Ahead()[docking].Date {
			return grid.Cell{Text: say.T("cannot be held"), Sub: say.Sentence(u.Criterion), Fault: say.Sentence(u.Criterion)}
		}
	}
	l, ok := o.Action(zone, docking)
	switch {
	case !ok:
		return grid.Cell{Text: "–", Muted: true}
	case l.Action == renewal.Keep:
		return grid.Cell{Text: say.T("keep"), Sub: say.T("to %s", month(l.Until)), Muted: true}
	}
	return grid.Cell{Text: say.T(string(l.Action)) + " " + pieces(l.Count, l.Pattern), Sub: governsText(l.Governs), Bold: true, Accent: true}
}

// actionWidth is the width of a docking's column: room for the actions in the
// words that the language has for them.
func (p *dockings) actionWidth() float32 {
	w := float32(142)
	for _, row := range p.actions.cells {
		for _, c := range row[2:] {
			w = max(w, fyne.MeasureText(c.Text, theme.Size(theme.SizeNameText), fyne.TextStyle{Bold: c.Bold}).Width/look.Px(1))
		}
	}
	return float32(math.Ceil(float64(w))) + 16
}

// month writes a date's month and year.
func month(d hull.Date) string { return say.Month(d.Time()) }

// governsText is a criterion in words.
func governsText(word string) string {
	switch word {
	case "renew_above":
		return say.T("renewal limit")
	case "initial":
		return say.T("initial current")
	case "final":
		return say.T("final current")
	case "min_count":
		return say.T("least count")
	}
	return say.T(word)
}

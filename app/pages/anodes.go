package pages

import (
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// anodesPage is the page of the castings and of what is fitted: the asset's
// patterns, the selected one with its figures, the fitted sets of all zones
// and the slope view of the selected zone.
type anodesPage struct {
	f        *Frame
	patterns *grid.Grid
	rows     fieldRows
	hint     *look.Paragraph
	card     *look.CardBox // of the patterns
	side     *look.CardBox
	tabs     *tabs
	parts    *fyne.Container
	shown    int // of the parts of the side
	casting  *casting
	fitted   *fittedSets
	slope    *slopeView
	all      fyne.CanvasObject
	drawer   *drawer
}

func newAnodes(f *Frame) *anodesPage {
	p := &anodesPage{f: f, hint: look.Note("")}
	p.rows = fieldRows{f, session.Patterns, session.PatternFields()}
	cols := p.rows.columns(patternWidths(p.rows.fields)...)
	cols[0].Fill = false
	p.patterns = grid.New(cols, p.rows, grid.Dense(), grid.Sticky())
	p.rows.pasteBlocks(p.patterns)
	p.patterns.OnSelect = func(_, col int) {
		p.hint.SetText(say.T(p.rows.fields[col].Hint))
		p.card.Refresh() // the hint may need more lines
		p.showSide()
	}
	p.casting = newCasting(p)
	p.slope = newSlopeView()
	p.parts = container.NewStack(p.casting.list.scroll, p.slope.content)
	p.tabs = newTabs([]string{say.T("Casting"), say.T("Slope view")}, func(i int) {
		p.shown = i
		p.showSide()
	})
	p.side = look.Card("", container.NewBorder(p.tabs.row, nil, nil, nil, p.parts))
	buttons := container.NewHBox(
		look.Button(say.T("From the library…"), func() { f.pickPattern(p.added) }),
		look.Button(say.T("Duplicate"), func() { p.added(f.s.DuplicatePattern(p.pattern())) }),
		look.Button(say.T("Remove"), func() { f.report(f.s.RemovePattern(p.pattern())) }))
	p.card = look.Card(say.T("Patterns"), container.NewBorder(nil, p.hint, nil, nil, p.patterns))
	p.card.SetExtra(buttons)
	p.fitted = newFittedSets(p)
	p.drawer = newDrawer(f, "Anodes", container.New(beside{360}, p.card, p.side), p.fitted.card, 226, func() float32 {
		return p.card.Around() + p.patterns.HeightOf(5)
	})
	p.all = p.drawer.all
	return p
}

// patternWidths are the widths of the columns of the patterns.
func patternWidths(fields []session.Field) []float32 {
	widths := map[string]float32{
		"id": 126, "name": 196, "alloy": 90, "shape": 102, "fixing": 170, "item_no": 76, "specification": 170, "certificate": 150,
		"insert_volume_m3": 74, "series_resistance_ohm": 66, "lead_weeks": 74, "utilisation": 82, "capacity_ah_kg": 80, "potential_v": 88,
	}
	var out []float32
	for _, f := range fields {
		w := widths[f.Key]
		if w == 0 {
			w = 72
		}
		out = append(out, w)
	}
	return out
}

func (p *anodesPage) title() string              { return say.T("Anodes") }
func (p *anodesPage) content() fyne.CanvasObject { return p.all }
func (p *anodesPage) first() *grid.Grid          { return p.patterns }
func (p *anodesPage) lower() *drawer             { return p.drawer }

// pattern returns the place of the selected pattern, -1 when there is none.
func (p *anodesPage) pattern() int {
	a := p.f.s.Asset()
	if a == nil {
		return -1
	}
	row, _ := p.patterns.Selected()
	return min(max(row, 0), len(a.Patterns)-1)
}

// zone returns the place of the zone that figures are for, -1 when there is
// none: that of the selected fitted set.
func (p *anodesPage) zone() int {
	set, ok := p.fitted.selected()
	if !ok {
		return -1
	}
	return set.zone
}

// added selects a pattern that was added.
func (p *anodesPage) added(i int, err error) {
	p.f.report(err)
	if err == nil {
		p.patterns.Select(i, 0)
		p.update()
		p.patterns.Focus()
	}
}

// choose selects a pattern by its id.
func (p *anodesPage) choose(id string) {
	for i, q := range p.f.s.Asset().Patterns {
		if _, col := p.patterns.Selected(); q.ID == id {
			p.patterns.Select(i, max(col, 0))
		}
	}
}

// follow shows the zone and the pattern of the fitted set that was selected.
func (p *anodesPage) follow() {
	a := p.f.s.Asset()
	set, ok := p.fitted.selected()
	if ok && a != nil && set.n >= 0 && set.zone < len(a.Zones) && set.n < len(a.Zones[set.zone].Fitted) {
		p.choose(a.Zones[set.zone].Fitted[set.n].Pattern)
	}
	if ok {
		p.f.selectZone(set.zone)
	}
	p.showSide()
}

func (p *anodesPage) update() {
	p.rows.showUnits(p.patterns)
	p.patterns.Refresh()
	p.fitted.update()
	p.showSide()
}

// showSide shows the selected pattern, or the selected zone by its slope.
func (p *anodesPage) showSide() {
	a, i, zone := p.f.s.Asset(), p.pattern(), p.zone()
	p.tabs.mark(p.shown)
	for k, part := range p.parts.Objects {
		if part.Visible() != (k == p.shown) {
			if k == p.shown {
				part.Show()
			} else {
				part.Hide()
			}
		}
	}
	switch {
	case a == nil || i < 0:
		p.casting.show(nil, nil, -1)
	case p.shown == 0:
		p.side.SetTitle(patternName(&a.Patterns[i]))
		p.casting.show(a, &a.Patterns[i], zone)
	case zone >= 0:
		p.side.SetTitle(a.Zones[zone].Name)
		p.slope.show(p.f.s.Outcome(), zone)
	default:
		p.side.SetTitle(say.T("No zone has anodes of its own"))
		p.slope.show(nil, -1)
	}
}

// patternName is a pattern's name, else its id.
func patternName(p *hull.Pattern) string {
	if s := strings.TrimSpace(p.Name); s != "" {
		return s
	}
	return p.ID
}

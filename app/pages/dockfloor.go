package pages

import (
	"math"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// dockFloor is the page for the day in dock, in large text and by keyboard
// alone: what was found, what is done, the pieces on the quay, and the closing
// of the docking.
type dockFloor struct {
	f     *Frame
	floor *session.Floor // the newest known
	rows  *floorRows
	sets  *grid.Grid
	card  *look.CardBox
	wrong *look.Paragraph
	hint  *look.Paragraph
	safe  *look.Paragraph
	notes *fyne.Container
	close *look.PushButton
	quay  *grid.Grid
	whole *floorWhole
	lines *grid.Grid
	all   fyne.CanvasObject
}

func newDockFloor(f *Frame) *dockFloor {
	p := &dockFloor{f: f, wrong: look.Wrong(""), hint: look.Note(""), safe: look.Note("")}
	p.rows = &floorRows{p}
	p.sets = grid.New(floorColumns(), p.rows, grid.Large(), grid.RowHeight(46), grid.Sticky())
	p.sets.OnSelect = func(row, _ int) {
		if p.floor != nil && row >= 0 && row < len(p.floor.Rows) {
			f.selectZone(p.floor.Rows[row].Zone)
		}
		p.say()
	}
	p.notes = container.New(column{}, p.wrong, p.hint, p.safe)
	p.card = look.Card(say.T("Dock floor"), container.NewBorder(nil, p.notes, nil, nil, p.sets))
	p.close = look.AccentButton(say.T("Close the docking…"), f.closeDocking)
	p.card.SetExtra(container.NewHBox(look.QuietButton(say.T("Start over…"), p.discard), p.close))
	p.quay = grid.New([]grid.Column{
		{Title: say.T("Pattern"), Width: 120, Fill: true}, {ID: "quay", Title: say.T("Pieces"), Width: 72, Right: true, Edit: true},
	}, &floorQuay{p}, grid.Large(), grid.RowHeight(46))
	p.whole = &floorWhole{p: p}
	p.lines = grid.New([]grid.Column{
		{ID: "what", Title: say.T("Field"), Width: 106}, {ID: "value", Title: say.T("Value"), Width: 104, Edit: true, Fill: true, Choices: p.whole.choices},
	}, p.whole, grid.Dense())
	p.quay.OnSelect, p.lines.OnSelect = typable(p.quay), typable(p.lines)
	p.all = container.New(floorPlaces{}, p.card, look.Card(say.T("Quay"), p.quay), look.Card(say.T("The docking"), p.lines))
	return p
}

// typable keeps the selection of a table of two columns in that which is typed
// into.
func typable(g *grid.Grid) func(row, col int) {
	return func(row, col int) {
		if col == 0 {
			g.Select(row, 1)
		}
	}
}

func floorColumns() []grid.Column {
	// The widths are for the letters of a large grid at text scale 1.
	return []grid.Column{
		{ID: "zone", Title: say.T("Zone and set"), Width: 160, Fill: true},
		{ID: "forecast", Title: say.T("Forecast"), Unit: "%", Width: 80, Right: true},
		{ID: "found", Title: say.In("wastage", "Found"), Unit: "%", Width: 80, Right: true, Edit: true},
		{ID: "action", Title: say.T("What is done"), Width: floorActionWidth()},
		{ID: "pieces", Title: say.T("Pieces"), Unit: say.In("pieces", "found"), Width: 70, Right: true, Edit: true},
		{ID: "off", Title: say.In("pieces", "Off"), Unit: say.T("pieces"), Width: 66, Right: true, Edit: true},
		{ID: "on", Title: say.In("pieces", "On"), Unit: say.T("pieces"), Width: 66, Right: true, Edit: true},
	}
}

// floorActionWidth is the width of the column of actions: room for one of two
// figures in the longest word that the language has for it.
func floorActionWidth() float32 {
	w := float32(0)
	for _, text := range []string{say.T(string(renewal.Renew)) + " 88 × 888 kg", say.T(string(renewal.Add)) + " 88 × 8\u00a0888 kg"} {
		w = max(w, fyne.MeasureText(text, grid.LargeText(), fyne.TextStyle{Bold: true}).Width/look.Px(1))
	}
	return float32(math.Ceil(float64(w))) + 18
}

func (p *dockFloor) title() string              { return say.T("Dock floor") }
func (p *dockFloor) content() fyne.CanvasObject { return p.all }

// first goes to where the first wastage is typed.
func (p *dockFloor) first() *grid.Grid {
	if row, _ := p.sets.Selected(); row < 0 {
		p.sets.Select(0, 2)
	}
	return p.sets
}

// selectZone goes to the zone's first set.
func (p *dockFloor) selectZone(zone int) {
	if p.floor == nil {
		return
	}
	row, col := p.sets.Selected()
	if row >= 0 && row < len(p.floor.Rows) && p.floor.Rows[row].Zone == zone {
		return
	}
	for i, r := range p.floor.Rows {
		if r.Zone == zone {
			p.sets.Select(i, max(col, 2))
			return
		}
	}
}

func (p *dockFloor) update() {
	f, known := p.f.s.Floor()
	p.floor = f
	p.sets.Empty, p.quay.Empty = say.T("The day in dock is being computed…"), ""
	switch {
	case f == nil && known:
		p.card.SetTitle(say.T("Dock floor"))
		p.sets.Empty = say.T("No docking lies ahead. Add one on Dockings: on the day in dock the wastage found is typed here, and what to keep, add or renew changes at once.")
	case f == nil:
		p.card.SetTitle(say.T("Dock floor"))
	default:
		p.card.SetTitle(say.T("In dock on %s", session.Day(f.Closing.Date)))
		if len(f.Rows) == 0 {
			p.sets.Empty = say.T("No zone carries anodes of its own: see Held by on Steel.")
		}
		if row, _ := p.sets.Selected(); row < 0 && len(f.Rows) > 0 {
			p.sets.Select(0, 2)
		}
	}
	if f == nil {
		p.close.Disable()
	} else {
		p.close.Enable()
	}
	p.whole.fill(f)
	p.sets.Refresh()
	p.quay.Refresh()
	p.lines.Refresh()
	p.say()
}

// say writes below the sets what does not hold or is lacking, what the
// selected column takes, and the caution for hot work.
func (p *dockFloor) say() {
	wrong, hint, safe := "", "", ""
	if f := p.floor; f != nil {
		wrong = strings.Join(firstFew(floorWarnings(p.f.s.Asset(), f), 2), " ")
		_, col := p.sets.Selected()
		hint = p.hintOf(col)
		safe = hotWork(p.f.s.Outcome())
	}
	if wrong != p.wrong.Text() || hint != p.hint.Text() || safe != p.safe.Text() {
		p.wrong.SetText(wrong)
		p.hint.SetText(hint)
		p.safe.SetText(safe)
		for _, o := range []*look.Paragraph{p.wrong, p.hint, p.safe} {
			o.Hidden = o.Text() == ""
		}
		p.notes.Refresh()
		p.card.Refresh() // they may need more lines
	}
}

func (p *dockFloor) hintOf(col int) string {
	switch col {
	case 4:
		return say.T("Pieces found of the set, those taken off among them. Empty: as many as the readings leave.")
	case 5:
		return say.T("Pieces really taken off, where it was another number than the plan's.")
	case 6:
		return say.T("Pieces really put on, where it was another number than the plan's: 14, or 14 × %s for another pattern.", p.aPattern())
	}
	return say.T("Type the wastage found and press Enter for the next set; several figures are averaged. Empty: the forecast counts. F4 closes the docking.")
}

// aPattern is a pattern's id for an example.
func (p *dockFloor) aPattern() string {
	if len(p.floor.Quay) > 0 {
		return p.floor.Quay[0].Pattern.ID
	}
	return "al-45"
}

// hotWork is the caution for the day in dock, and that for divers where there
// is impressed current.
func hotWork(o *plan.Outcome) string {
	var all []string
	if o == nil {
		return ""
	}
	for _, c := range o.AllCautions() {
		if c.ID == "hot-work" || c.ID == "divers" {
			if text := say.Sentence(c.Text); !strings.Contains(strings.Join(all, " "), text) {
				all = append(all, text)
			}
		}
	}
	return strings.Join(all, " ")
}

// floorWarnings says what the plan in dock lacks and what does not hold.
func floorWarnings(a *hull.Asset, f *session.Floor) (all []string) {
	for _, fault := range f.Faults {
		all = append(all, "⚠ "+say.Sentence(f.Named(hull.Faults{fault}).Error())+".")
	}
	if f.Plan == nil || a == nil {
		return all
	}
	if f.Short != "" {
		all = append(all, "⚠ "+say.Sentence(f.Short)+".")
	}
	for _, r := range f.Rows {
		if !r.First || r.Zone >= len(a.Zones) {
			continue
		}
		name := a.Zones[r.Zone].Name
		if r.Zoned.Refused != "" {
			all = append(all, "⚠ "+say.T("%s, as done, will not hold: %s.", name, say.Sentence(r.Zoned.Refused)))
		}
		if r.Zoned.Line.Unmet != "" {
			all = append(all, "⚠ "+say.T("%s cannot be held: %s.", name, say.Sentence(r.Zoned.Line.Unmet)))
		}
	}
	return all
}

// firstFew are the first of some sentences, with how many more there are.
func firstFew(all []string, n int) []string {
	if len(all) <= n {
		return all
	}
	return append(all[:n:n], say.T("and %d more", len(all)-n))
}

// discard forgets what was typed, once asked.
func (p *dockFloor) discard() {
	grid.CommitOpen()
	n := p.f.s.FloorTyped()
	if n == 0 {
		return
	}
	p.f.confirm(say.T("Start over?"), say.N("What was typed in %d field here is forgotten. The asset stays as it is.", "What was typed in %d fields here is forgotten. The asset stays as it is.", n), say.T("Start over"), func() {
		p.f.report(p.f.s.DiscardFloor())
	})
}

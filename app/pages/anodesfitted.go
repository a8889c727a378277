package pages

import (
	"fyne.io/fyne/v2/container"

	"anodewright/anodes"
	"anodewright/anodes/plan"
	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// fittedSets is the table of what all zones carry at the last docking.
type fittedSets struct {
	page *anodesPage
	card *look.CardBox
	grid *grid.Grid
	sets []fittedSet
}

// fittedSet is one row: the n-th set of a zone, or none of a zone that carries
// nothing.
type fittedSet struct {
	zone, n int // n -1: nothing is fitted
}

// The columns of the table.
const (
	fittedZone = iota
	fittedPattern
	fittedCount
	fittedDate
	fittedWastage
	fittedLeft
	fittedGives
	fittedThen
	fittedDay
	fittedState
)

func newFittedSets(page *anodesPage) *fittedSets {
	s := &fittedSets{page: page}
	s.grid = grid.New([]grid.Column{
		{Title: say.T("Zone"), Width: 138, Fill: true},
		{Title: say.T("Pattern"), Width: 116, Edit: true, Choices: s.patterns},
		{Title: say.T("Pieces"), Width: 62, Right: true, Edit: true},
		{Title: say.T("Fitted"), Width: 104, Edit: true},
		{Title: say.T("Wasted"), Width: 70, Right: true, Edit: true},
		{Title: say.T("Usable left"), Unit: say.Mass.Unit(), Width: 86, Right: true},
		{Title: say.T("Output"), Unit: "A", Width: 70, Right: true},
		{Title: say.T("Wasted then"), Unit: say.T("%, next docking"), Width: 112, Right: true},
		{Title: say.T("On the day"), Unit: say.T("zone, % wasted"), Width: 108, Right: true},
		{Title: say.T("State on the day"), Width: 128, Fill: true},
	}, s, grid.Dense(), grid.Sticky())
	s.grid.OnSelect = func(int, int) { s.page.follow() }
	buttons := container.NewHBox(
		look.Button(say.T("Add a set"), s.addSet),
		look.Button(say.T("Remove this set"), func() {
			if set, ok := s.selected(); ok {
				s.page.f.report(s.page.f.s.RemoveFitted(set.zone, set.n))
			}
		}))
	s.card = look.Card(say.T("Fitted at the last docking"), container.NewBorder(nil, nil, nil, nil, s.grid))
	s.card.SetExtra(buttons)
	return s
}

// patterns are the ids that a set may have.
func (s *fittedSets) patterns(int) []string {
	var ids []string
	for _, p := range s.page.f.s.Asset().Patterns {
		ids = append(ids, p.ID)
	}
	return ids
}

// selected returns the selected row, else the first, and whether there is one.
func (s *fittedSets) selected() (fittedSet, bool) {
	row, _ := s.grid.Selected()
	if len(s.sets) == 0 {
		return fittedSet{}, false
	}
	return s.sets[min(max(row, 0), len(s.sets)-1)], true
}

// addSet adds a set of the selected pattern to the selected zone.
func (s *fittedSets) addSet() {
	set, ok := s.selected()
	i := s.page.pattern()
	if !ok || i < 0 {
		return
	}
	s.page.f.report(s.page.f.s.AddFitted(set.zone, s.page.f.s.Asset().Patterns[i].ID))
}

// update finds the rows anew.
func (s *fittedSets) update() {
	s.sets = nil
	a := s.page.f.s.Asset()
	for i := range a.Zones {
		if _, own := a.Zones[i].Hold().(hull.ByAnodes); !own {
			continue
		}
		if len(a.Zones[i].Fitted) == 0 {
			s.sets = append(s.sets, fittedSet{i, -1})
		}
		for n := range a.Zones[i].Fitted {
			s.sets = append(s.sets, fittedSet{i, n})
		}
	}
	s.page.selectZone(s.page.f.zone)
	s.showDay()
}

// Rows implements grid.Source.
func (s *fittedSets) Rows() int { return len(s.sets) }

// fieldOf is the part of a set that a column edits.
func fieldOf(col int) (session.FittedColumn, bool) {
	c, ok := map[int]session.FittedColumn{
		fittedPattern: session.FittedPattern, fittedCount: session.FittedCount, fittedDate: session.FittedDate, fittedWastage: session.FittedWastage,
	}[col]
	return c, ok
}

// Cell implements grid.Source.
func (s *fittedSets) Cell(row, col int) grid.Cell {
	a := s.page.f.s.Asset()
	if row >= len(s.sets) || a == nil || s.sets[row].zone >= len(a.Zones) {
		return grid.Cell{}
	}
	set := s.sets[row]
	z := &a.Zones[set.zone]
	if col == fittedZone {
		return grid.Cell{Text: z.Name, Bold: true}
	}
	if set.n >= len(z.Fitted) {
		return grid.Cell{}
	}
	if set.n < 0 {
		if col == fittedPattern {
			return grid.Cell{Text: say.T("none"), Muted: true}
		}
		return grid.Cell{}
	}
	if c, edited := fieldOf(col); edited {
		text, fault := s.page.f.s.FittedText(set.zone, set.n, c)
		return grid.Cell{Text: text, Fault: say.Sentence(fault)}
	}
	return s.figure(a, z, set, col)
}

// figure is what follows from a set.
func (s *fittedSets) figure(a *hull.Asset, z *hull.Zone, set fittedSet, col int) grid.Cell {
	f := z.Fitted[set.n]
	p, _ := a.Pattern(f.Pattern)
	n, left := float64(f.Count), max(0, p.Utilisation-f.Wastage)
	switch col {
	case fittedLeft:
		return grid.Cell{Text: session.Shown(say.Mass, n*p.NetMass*left, 0)}
	case fittedGives:
		if left == 0 {
			return grid.Cell{Text: say.T("spent"), Muted: true}
		}
		return grid.Cell{Text: amperes(n * anodes.OutputAt(p, a.Medium(z), a.Resistivity(z, a.Start()), z.Shielding, f.Wastage))}
	}
	switch col {
	case fittedDay:
		if x, ok := sampleAt(s.page.f.course(set.zone), s.page.f.cursor); ok {
			return grid.Cell{Text: session.Figure(100*x.Wastage, 0)}
		}
		return grid.Cell{Text: "…", Muted: true}
	case fittedState:
		state := s.page.f.band.view.state(set.zone)
		return grid.Cell{State: string(state.State), Text: say.Sentence(state.Cause)}
	}
	iv, ok := s.interval(set.zone)
	switch {
	case !ok:
		return grid.Cell{Text: "…", Muted: true}
	case col == fittedThen:
		for _, g := range iv.Fitted {
			if g.Set == set.n { // the first of a set is what stays as it was fitted
				return grid.Cell{Text: session.Figure(100*g.Wastage, 0)}
			}
		}
	}
	return grid.Cell{}
}

// interval is the outcome of a zone up to the next docking.
func (s *fittedSets) interval(zone int) (plan.ZoneInterval, bool) {
	o := s.page.f.s.Outcome()
	if o == nil || zone >= len(o.Zones) || len(o.Zones[zone].Intervals) == 0 {
		return plan.ZoneInterval{}, false
	}
	return o.Zones[zone].Intervals[0], true
}

// EditText implements grid.EditTexter.
func (s *fittedSets) EditText(row, col int) string {
	if row < len(s.sets) && s.sets[row].n < 0 {
		return ""
	}
	return s.Cell(row, col).Text
}

// Commit implements grid.Source. A pattern typed where nothing is fitted makes
// a set of it.
func (s *fittedSets) Commit(row, col int, text string) {
	c, ok := fieldOf(col)
	if !ok || row >= len(s.sets) {
		return
	}
	switch set := s.sets[row]; {
	case set.n >= 0:
		s.page.f.report(s.page.f.s.SetFitted(set.zone, set.n, c, text))
	case c == session.FittedPattern && text != "":
		s.page.f.report(s.page.f.s.AddFitted(set.zone, text))
	}
}

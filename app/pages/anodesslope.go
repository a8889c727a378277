package pages

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"anodewright/anodes/plan"
	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
)

// slopeView shows a zone by its slope parameter, interval by interval.
type slopeView struct {
	content fyne.CanvasObject
	cells   *fixed
	grid    *grid.Grid
	note    *look.Paragraph
}

func newSlopeView() *slopeView {
	v := &slopeView{cells: &fixed{}}
	v.grid = grid.New([]grid.Column{
		{Title: say.T("Up to"), Unit: say.T("bare steel"), Width: 97, Fill: true},
		{Title: "S", Unit: "Ω m²", Width: 80, Right: true},
		{Title: "E", Unit: "V", Width: 84, Right: true},
		{Title: "R·m", Unit: "Ω kg", Width: 60, Right: true},
	}, v.cells, grid.RowHeight(40))
	v.note = look.Note(say.T("E = E anode + S i, V Ag/AgCl; S = bare steel × R/n. At the mean current: at the end, from the start. R·m of a piece: what the time uses, of what there is."))
	v.content = container.NewBorder(nil, v.note, nil, nil, v.grid)
	return v
}

// show shows a zone of an outcome, -1 for none.
func (v *slopeView) show(o *plan.Outcome, zone int) {
	v.cells.cells = nil
	if o != nil && zone >= 0 && zone < len(o.Zones) {
		for _, s := range o.Slope(zone) {
			v.cells.cells = append(v.cells.cells, slopeCells(s))
		}
	}
	v.grid.Refresh()
}

// slopeCells writes one interval.
func slopeCells(s plan.ZoneSlope) []grid.Cell {
	return []grid.Cell{
		{Text: session.Day(s.To), Sub: session.ShownWith(say.Area, s.End.BareSteel, 0)},
		{Text: slopeFigure(s.End.S), Sub: say.T("from %s", slopeFigure(s.Start.S))},
		{Text: session.Figure(s.End.Potential, 2), Sub: say.T("from %s", session.Figure(s.Start.Potential, 2))},
		{Text: slopeFigure(s.Needs), Sub: say.T("of %s", slopeFigure(s.Has))},
	}
}

// slopeFigure keeps about three figures.
func slopeFigure(x float64) string {
	switch {
	case x < 1:
		return session.Figure(x, 3)
	case x < 10:
		return session.Figure(x, 2)
	}
	return session.Figure(x, 1)
}

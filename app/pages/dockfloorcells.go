package pages

import (
	"fmt"
	"strings"

	"anodewright/app/grid"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// floorCell is a cell of the dock floor that can be typed into: what was
// typed, or else, muted, what holds without.
func (p *dockFloor) floorCell(field session.FloorField, otherwise string) grid.Cell {
	text, typed := p.f.s.FloorText(field)
	if !typed {
		return grid.Cell{Text: otherwise, Muted: true}
	}
	c := grid.Cell{Text: text, Bold: true}
	if p.floor != nil {
		c.Fault = say.Sentence(p.floor.Wrong[field])
	}
	return c
}

// floorRows is the table of fitted sets.
type floorRows struct{ p *dockFloor }

func (r *floorRows) Rows() int {
	if r.p.floor == nil {
		return 0
	}
	return len(r.p.floor.Rows)
}

// field is what a column of a row takes; empty where nothing can be typed.
func (r *floorRows) field(row session.FloorRow, col int) session.FloorField {
	fitted := row.Key.Pattern != ""
	switch {
	case col == 2 && fitted:
		return session.FloorWastage(row.Key)
	case col == 4 && fitted:
		return session.FloorFound(row.Key)
	case col == 5 && fitted:
		return session.FloorOff(row.Key)
	case col == 6 && row.First:
		return session.FloorOn(row.Key.Zone)
	}
	return ""
}

func (r *floorRows) Cell(i, col int) grid.Cell {
	a := r.p.f.s.Asset()
	row := r.p.floor.Rows[i]
	if a == nil || row.Zone >= len(a.Zones) {
		return grid.Cell{}
	}
	field := r.field(row, col)
	switch col {
	case 0:
		return grid.Cell{Text: a.Zones[row.Zone].Name, Sub: setText(a, row), Bold: row.First, Muted: !row.First}
	case 1:
		return forecastCell(row)
	case 2:
		if field == "" {
			return grid.Cell{Text: "–", Muted: true}
		}
		c := r.p.floorCell(field, session.Figure(100*row.Set.Wastage, 0))
		if text, typed := r.p.f.s.FloorText(field); typed {
			if len(strings.Fields(text)) > 1 && c.Fault == "" {
				c.Sub = say.T("mean %s", session.Figure(100*row.Set.Wastage, 0))
			}
		} else {
			c.Sub = say.In("wastage", "forecast")
			if row.Set.How != hull.Forecasted {
				c.Sub = say.In("wastage", "read")
			}
		}
		return c
	case 3:
		return doneCell(a, row)
	case 4:
		if field == "" {
			return grid.Cell{}
		}
		return r.p.floorCell(field, fmt.Sprint(row.Set.Found))
	case 5:
		if field == "" {
			return grid.Cell{}
		}
		return r.p.floorCell(field, count(row.Set.Off))
	}
	if field == "" {
		return grid.Cell{}
	}
	return r.p.floorCell(field, count(sumOn(row.Zoned.On)))
}

// EditText is what was typed: where nothing was, the editor begins empty, so
// that the figure of the forecast can be typed as one found.
func (r *floorRows) EditText(i, col int) string {
	return r.p.typedText(r.field(r.p.floor.Rows[i], col))
}

func (p *dockFloor) typedText(field session.FloorField) string {
	text, _ := p.f.s.FloorText(field)
	return text
}

func (r *floorRows) Commit(i, col int, text string) {
	if field := r.field(r.p.floor.Rows[i], col); field != "" {
		r.p.f.report(r.p.f.s.SetFloor(field, strings.TrimSpace(text)))
	}
}

// count is a number of pieces, a dash for none.
func count(n int) string {
	if n == 0 {
		return "–"
	}
	return fmt.Sprint(n)
}

func sumOn(on []hull.PutOn) (n int) {
	for _, p := range on {
		n += p.Count
	}
	return n
}

// setText is what a row's set is: 24 × 45 kg, Mar 2024.
func setText(a *hull.Asset, row session.FloorRow) string {
	if row.Key.Pattern == "" {
		return say.T("none fitted")
	}
	pattern, ok := a.Pattern(row.Key.Pattern)
	if !ok {
		return row.Key.Pattern
	}
	return pieces(row.Set.Found, pattern) + ", " + month(row.Key.Fitted)
}

func forecastCell(row session.FloorRow) grid.Cell {
	if row.Expected == nil {
		return grid.Cell{Text: "–", Muted: true}
	}
	e := row.Expected
	return grid.Cell{Text: session.Figure(100*e.Median, 0), Sub: session.Figure(100*e.Low, 0) + "–" + session.Figure(100*e.High, 0), Muted: true}
}

// doneCell says what is done with a zone's anodes: keep, add or renew, and by
// which criterion; or what was done, where that was typed.
func doneCell(a *hull.Asset, row session.FloorRow) grid.Cell {
	z := row.Zoned
	if !row.First {
		return grid.Cell{Text: say.T("as above"), Muted: true}
	}
	var on []string
	for _, p := range z.On {
		if pattern, ok := a.Pattern(p.Pattern); ok {
			on = append(on, pieces(p.Count, pattern))
		}
	}
	word := say.T("keep")
	switch left := row.Set.Found > row.Set.Off; {
	case len(on) > 0 && left && row.Key.Pattern != "":
		word = say.T("add")
	case len(on) > 0 && row.Key.Pattern == "":
		word = say.T("fit")
	case len(on) > 0:
		word = say.T("renew")
	case z.Off > 0:
		word = say.T("take off %d", z.Off)
	}
	c := grid.Cell{Text: strings.TrimSpace(word + " " + strings.Join(on, " + ")), Muted: len(on) == 0, Bold: len(on) > 0, Accent: len(on) > 0}
	switch {
	case z.Done && z.Refused != "":
		c.Sub = say.T("as done; will not hold")
	case z.Done:
		c.Sub = say.T("as done")
	case z.Line.Unmet != "":
		c.Text, c.Sub = say.T("cannot be held"), say.Sentence(z.Line.Unmet)
	case len(on) > 0:
		c.Sub = governsText(z.Line.Governs)
	case z.Line.Known:
		c.Sub = say.T("to %s", month(z.Line.Until))
	}
	return c
}

// floorQuay is the table of the pieces on the quay.
type floorQuay struct{ p *dockFloor }

func (q *floorQuay) Rows() int {
	if q.p.floor == nil {
		return 0
	}
	return len(q.p.floor.Quay)
}

func (q *floorQuay) Cell(row, col int) grid.Cell {
	f := q.p.floor
	line := f.Quay[row]
	if col == 0 {
		return grid.Cell{Text: line.Pattern.ID, Sub: quayText(line), Bold: line.Used > 0, Muted: line.Used == 0}
	}
	c := q.p.floorCell(session.FloorStock(line.Pattern.ID), fmt.Sprint(line.There))
	if n := line.Lacking(); n > 0 && c.Fault == "" && f.Only {
		c.Fault = say.N("%d piece is lacking", "%d pieces are lacking", n)
	}
	return c
}

// quayText says what becomes of the pieces of a pattern.
func quayText(line session.FloorQuay) string {
	switch {
	case line.Lacking() > 0:
		return say.T("%d lacking", line.Lacking())
	case line.Used > 0:
		return say.T("%d used, %d left", line.Used, line.Left())
	}
	return say.T("none used")
}

func (q *floorQuay) EditText(row, col int) string {
	return q.p.typedText(session.FloorStock(q.p.floor.Quay[row].Pattern.ID))
}

func (q *floorQuay) Commit(row, col int, text string) {
	q.p.f.report(q.p.f.s.SetFloor(session.FloorStock(q.p.floor.Quay[row].Pattern.ID), strings.TrimSpace(text)))
}

// floorLine is a field of the docking as a whole.
type floorLine struct {
	field       session.FloorField
	title, sub  string
	otherwise   string
	yesNo, work bool
}

// floorWhole is the table of the fields of the docking as a whole, and of its
// works.
type floorWhole struct {
	p     *dockFloor
	lines []floorLine
}

// fill lists the fields.
func (w *floorWhole) fill(f *session.Floor) {
	w.lines = nil
	a := w.p.f.s.Asset()
	if f == nil || a == nil {
		return
	}
	day := func(d hull.Date) string {
		if d.IsZero() {
			return "–"
		}
		return session.Day(d)
	}
	next, horizon := f.Closing.Next, f.Closing.Horizon
	if next.IsZero() {
		if ahead := a.Ahead(); len(ahead) > 1 {
			next = ahead[1].Date
		}
	}
	if horizon.IsZero() {
		horizon = a.Horizon
	}
	cost := "–"
	if f.Closing.Cost != nil {
		cost = session.Figure(*f.Closing.Cost, 0)
	}
	w.lines = []floorLine{
		{field: session.FloorDate, title: say.T("Date in dock"), otherwise: day(f.Closing.Date)},
		{field: session.FloorBy, title: say.T("By"), otherwise: "–"},
		{field: session.FloorCost, title: say.T("Cost"), sub: a.Currency, otherwise: cost},
		{field: session.FloorOnly, title: say.T("Only the quay"), otherwise: say.T("yes"), yesNo: true},
	}
	for _, work := range f.Works {
		line := floorLine{field: session.FloorWorkDone(work.Work), title: zoneName(a, work.Work.Zone), sub: workText(work.Work), otherwise: yesText(work.Done), work: true, yesNo: work.Work.Coating == ""}
		if work.Done && work.Work.Share != nil {
			line.otherwise = session.Percent(*work.Work.Share)
		}
		w.lines = append(w.lines, line)
	}
	w.lines = append(w.lines,
		floorLine{field: session.FloorNext, title: say.T("Next docking"), otherwise: day(next)},
		floorLine{field: session.FloorHorizon, title: say.T("Horizon"), otherwise: day(horizon)},
		floorLine{field: session.FloorNote, title: say.T("Note"), otherwise: "–"})
}

func yesText(yes bool) string {
	if yes {
		return say.T("yes")
	}
	return say.T("no")
}

// workText is a coating work in words.
func workText(w hull.Work) string {
	if w.Coating == "" {
		return say.T("anodes cleaned")
	}
	return session.Words(w.Coating)
}

func (w *floorWhole) Rows() int { return len(w.lines) }

func (w *floorWhole) Cell(row, col int) grid.Cell {
	line := w.lines[row]
	if col == 0 {
		return grid.Cell{Text: line.title, Sub: line.sub, Muted: true}
	}
	return w.p.floorCell(line.field, line.otherwise)
}

func (w *floorWhole) EditText(row, _ int) string { return w.p.typedText(w.lines[row].field) }

func (w *floorWhole) Commit(row, _ int, text string) {
	w.p.f.report(w.p.f.s.SetFloor(w.lines[row].field, strings.TrimSpace(text)))
}

// choices are yes and no where a field is one of them.
func (w *floorWhole) choices(row int) []string {
	if row < len(w.lines) && w.lines[row].yesNo {
		return []string{say.T("yes"), say.T("no")}
	}
	return nil
}

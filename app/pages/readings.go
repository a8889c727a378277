package pages

import (
	"fmt"
	"slices"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/widget"

	"anodewright/anodes"
	"anodewright/anodes/plan"
	"anodewright/anodes/survey"
	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
)

// readingsPage is the page of what surveyors found: the readings, entered by
// keyboard alone, what they teach of the demand, and what is in doubt.
type readingsPage struct {
	f       *Frame
	rows    *readingRows
	list    *grid.Grid
	hint    *look.Paragraph
	card    *look.CardBox
	factors *fixed
	table   *grid.Grid
	learn   *widget.Check
	side    *look.CardBox
	doubts  *scrolled
	bars    *factorBars
	parts   *fyne.Container
	tabs    *tabs
	shown   int // of the parts of the side
	outcome *plan.Outcome
	all     fyne.CanvasObject
}

func newReadings(f *Frame) *readingsPage {
	p := &readingsPage{f: f, hint: look.Note(""), factors: &fixed{}, doubts: newScrolled(), bars: newFactorBars()}
	p.rows = newReadingRows(f)
	p.list = grid.New(p.rows.columns(), p.rows, grid.Dense(), grid.Sticky())
	p.list.OnSelect = func(int, int) { p.showHint() }
	p.list.OnKey = func(_, _ int, key *fyne.KeyEvent) bool {
		if key.Name == fyne.KeyInsert {
			p.add()
			return true
		}
		return false
	}
	buttons := container.NewHBox(look.Button(say.T("Add reading"), p.add), look.Button(say.T("Correct reading"), p.correct), look.Button(say.T("Remove reading"), p.remove),
		look.Button(say.T("Survey sheet…"), f.exportSurvey), look.Button(say.T("Take in a survey…"), f.importSurvey))
	p.card = look.Card(say.T("Readings"), container.NewBorder(nil, p.hint, nil, nil, p.list))
	p.card.SetExtra(buttons)

	p.table = grid.New([]grid.Column{
		{Title: say.T("Zone"), Width: 114, Fill: true},
		{Title: say.T("Pieces left"), Unit: say.T("giving current"), Width: 100, Right: true},
		{Title: say.In("anodes", "Read"), Unit: say.T("anodes"), Width: 62, Right: true},
		{Title: say.T("Before"), Unit: say.T("90 % range"), Width: 88, Right: true},
		{Title: say.T("By the readings"), Unit: say.T("factor, 90 % range"), Width: 142, Right: true},
		{Title: say.T("Plan uses"), Width: 70, Right: true},
		{Title: say.T("Risk: spent"), Unit: say.T("next docking"), Width: 92, Right: true},
	}, p.factors, grid.Dense(), grid.Sticky())
	p.learn = widget.NewCheck(say.T("plan with the factor learned from readings"), func(on bool) {
		if on != f.s.Learns() {
			f.report(f.s.SetLearns(on))
		}
	})
	table := look.Card(say.T("Demand factor"), p.table)
	table.SetExtra(p.learn)

	legend := look.Note(say.T("90 % range of the demand factor: thin before, thick by the readings, the median marked."))
	p.parts = container.NewStack(p.doubts.scroll, container.NewBorder(nil, legend, nil, nil, p.bars))
	p.tabs = newTabs([]string{say.T("Doubts"), say.T("Chart")}, func(i int) {
		p.shown = i
		p.showSide()
	})
	p.side = look.Card("", container.NewBorder(p.tabs.row, nil, nil, nil, p.parts))
	p.all = container.New(above{262, 0.45}, p.card, container.New(beside{322}, table, p.side))
	p.showSide()
	return p
}

func (p *readingsPage) title() string              { return say.T("Readings") }
func (p *readingsPage) content() fyne.CanvasObject { return p.all }
func (p *readingsPage) first() *grid.Grid          { return p.list }

func (p *readingsPage) showSide() {
	for i, o := range p.parts.Objects {
		if i == p.shown {
			o.Show()
		} else {
			o.Hide()
		}
	}
	p.tabs.mark(p.shown)
	p.side.Refresh()
}

// add adds a reading like the selected one, of the next set, and goes to its
// first figure.
func (p *readingsPage) add() {
	grid.CommitOpen()
	row, _ := p.list.Selected()
	p.open(p.f.s.AddReading(row))
}

// correct withdraws the selected reading and goes to a copy of it.
func (p *readingsPage) correct() {
	grid.CommitOpen()
	row, _ := p.list.Selected()
	p.open(p.f.s.CorrectReading(row))
}

// open goes to the first figure of a new reading.
func (p *readingsPage) open(at int, err error) {
	if err != nil {
		p.f.report(err)
		return
	}
	p.update()
	col := p.rows.figure
	p.list.Select(at, col)
	p.list.ScrollTo(at, col)
	p.list.Focus()
}

func (p *readingsPage) remove() {
	if i, _ := p.list.Selected(); i >= 0 {
		p.f.report(p.f.s.RemoveReading(i))
	}
}

func (p *readingsPage) update() {
	p.list.Refresh()
	p.showHint()
	p.showSide()
	if p.learn.Checked != p.f.s.Learns() {
		p.learn.SetChecked(p.f.s.Learns())
	}
	o := p.f.s.Outcome()
	if o == p.outcome || o == nil {
		return
	}
	p.outcome = o
	p.factors.cells = nil
	p.bars.rows = nil
	for i := range o.Zones {
		if z := &o.Zones[i]; len(z.Zone.Fitted) > 0 {
			p.factors.cells = append(p.factors.cells, factorCells(o, i))
			p.bars.add(z, o.Before())
		}
	}
	p.table.Refresh()
	p.bars.Refresh()
	p.showDoubts(o)
}

// showHint says below the readings what the selected field means, and what
// follows from what stands in it.
func (p *readingsPage) showHint() {
	text := say.T("Insert adds a reading: of the same day and surveyor, of the next set of anodes.")
	a := p.f.s.Asset()
	row, col := p.list.Selected()
	if a != nil && row >= 0 && row < len(a.Readings) && col >= 0 && col < len(p.rows.cols) {
		c := p.rows.cols[col]
		if c.hint != "" {
			text = c.hint
		}
		if c.key == "potentials" {
			var parts []string
			for _, m := range a.Readings[row].Potentials {
				parts = append(parts, anodes.MeasureText(m))
			}
			if parts != nil {
				text = say.T("%s. They tell of current, not of mass left.", strings.Join(parts, "; "))
			}
		}
	}
	if text != p.hint.Text() {
		p.hint.SetText(text)
		p.card.Refresh() // it may need more lines
	}
}

// factorCells is a line of the table of demand factors.
func factorCells(o *plan.Outcome, zone int) []grid.Cell {
	z := &o.Zones[zone]
	giving, fitted := 0, 0
	for set := range z.Zone.Fitted {
		n, of := o.Pieces(zone, set)
		giving, fitted = giving+n, fitted+of
	}
	before := o.Before()
	read, after := grid.Cell{Text: "–", Muted: true}, grid.Cell{Text: "–", Muted: true}
	if l := z.Learned; l != nil {
		read = grid.Cell{Text: fmt.Sprint(l.Anodes), Muted: l.Anodes == 0}
		after = grid.Cell{Text: factorText(l.Factor), Bold: l.Anodes > 0, Accent: o.Learns}
	}
	spent := grid.Cell{Text: "–", Muted: true}
	if d, ok := o.NextDocking(); ok {
		for _, iv := range z.Intervals {
			if iv.To == d.Date && iv.SpentProbability != nil {
				spent = grid.Cell{Text: chance(*iv.SpentProbability)}
			}
		}
	}
	return []grid.Cell{
		{Text: z.Zone.Name, Bold: true}, {Text: say.T("%d of %d", giving, fitted)}, read,
		{Text: say.T("%.2f–%.2f", before.Low, before.High), Muted: true}, after, {Text: session.Figure(z.Factor.Used, 2)}, spent,
	}
}

// factorText writes a factor with its range: 1.24 (0.95–1.64).
func factorText(f plan.Factor) string {
	return say.T("%.2f (%.2f–%.2f)", f.Median, f.Low, f.High)
}

// chance writes a probability in per cent, without claiming certainty.
func chance(p float64) string {
	switch {
	case p < 0.005:
		return "< 1 %"
	case p > 0.995:
		return "> 99 %"
	}
	return session.Percent(p)
}

// showDoubts writes what the surveyor should settle, and which reading would
// tell most.
func (p *readingsPage) showDoubts(o *plan.Outcome) {
	var lines []fyne.CanvasObject
	questions := o.Questions()
	switch {
	case len(o.Asset.Readings) == 0:
		lines = append(lines, look.Body(say.T("No readings yet. With code figures alone a set is renewed for its doubt; every anode that is weighed narrows it.")))
	case len(questions) == 0:
		lines = append(lines, look.Body(say.T("Nothing in the readings contradicts itself.")))
	}
	for _, q := range questions {
		lines = append(lines, look.Wrong(say.Sentence(q.Text)))
	}
	for i := range o.Zones {
		if c := o.Zones[i].Coating; c != nil {
			lines = append(lines, look.Strong(say.T("Coating: %s", o.Zones[i].Zone.Name)), look.Note(say.Sentence(c.Text())))
		}
	}
	next := o.NextReadings()
	if len(next) > 0 {
		lines = append(lines, look.Strong(say.T("What would help to decide most")))
	}
	for i, s := range next {
		if i == 3 || s.Narrows < 0.01 {
			break
		}
		z := o.Zones[s.Zone].Zone
		set := z.Fitted[s.Set]
		lines = append(lines, look.Note(say.T("%d. %s: %s of %s fitted on %s, weighed today: range %.2f–%.2f becomes about %.2f–%.2f, %s narrower.",
			i+1, z.Name, countOf(s.Pieces, say.T("piece"), say.T("pieces")), set.Pattern, session.Day(set.Fitted),
			s.Demand.Low, s.Demand.High, s.After.Low, s.After.High, session.Percent(s.Narrows))))
		if s.Wrong >= 0.005 {
			lines = append(lines, look.Note(say.T("May it stay to %s? A decision now is wrong with %s, after that reading with about %s.",
				session.Day(s.Until), chance(s.Wrong), chance(s.WrongAfter))))
		}
	}
	p.doubts.set(lines...)
}

func countOf(n int, one, many string) string {
	if n == 1 {
		return "1 " + one
	}
	return fmt.Sprintf("%d %s", n, many)
}

// readingColumn is a column of the readings: a field, or what follows from
// the reading where field is -1.
type readingColumn struct {
	key, hint string
	field     int
}

// readingRows is the table of readings.
type readingRows struct {
	fieldRows
	cols   []readingColumn
	figure int // the first column of what was found
}

func newReadingRows(f *Frame) *readingRows {
	r := &readingRows{fieldRows: fieldRows{f, session.Readings, session.ReadingFields()}}
	for i, field := range r.fields {
		if field.Key == "weighed_wastage" {
			r.figure = len(r.cols)
		}
		r.cols = append(r.cols, readingColumn{field.Key, say.T(field.Hint), i})
		if field.Key == "grades" {
			r.cols = append(r.cols, readingColumn{say.T("predicted"), say.T("Wastage of the set that the design figures make of that day. Empty: the reading tells nothing of the sets fitted now."), -1})
		}
	}
	return r
}

// columns shadows that of fieldRows.
func (r *readingRows) columns() []grid.Column {
	widths := map[string]float32{
		"date": 102, "zone": 150, "pattern": 104, "fitted": 102, "by": 122, "weighed_wastage": 98, "measured": 170, "percent": 98,
		"grades": 152, "gone": 60, "not_wasted": 92, "fallen": 64, "painted": 70, "not_seen": 76, "potentials": 170, "coating_percent": 92,
		"water_resistivity_ohm_m": 70, "how": 110, "note": 180,
	}
	var cols []grid.Column
	for _, c := range r.cols {
		if c.field < 0 {
			cols = append(cols, grid.Column{ID: c.key, Title: say.T("Predicted"), Unit: say.T("% wasted"), Width: 78, Right: true})
			continue
		}
		f := r.fields[c.field]
		col := grid.Column{ID: f.Key, Title: say.T(f.Title), Unit: f.ShownUnit(), Width: widths[f.Key], Right: f.Number, Edit: true, Choices: r.choices(f)}
		if f.Key == "pattern" {
			col.Choices = r.fittedPatterns
		}
		cols = append(cols, col)
	}
	return cols
}

// fittedPatterns are the patterns that the zone of a reading carries.
func (r *readingRows) fittedPatterns(row int) []string {
	ids := []string{""}
	a := r.f.s.Asset()
	if row >= len(a.Readings) {
		return ids
	}
	if z, ok := a.Zone(a.Readings[row].Zone); ok {
		for _, f := range z.Fitted {
			if !slices.Contains(ids, f.Pattern) {
				ids = append(ids, f.Pattern)
			}
		}
	}
	return ids
}

// Cell implements grid.Source.
func (r *readingRows) Cell(row, col int) grid.Cell {
	c := r.cols[col]
	if c.field < 0 {
		o := r.f.s.Outcome()
		if o == nil || o.Asset != r.f.s.Asset() || row >= len(o.Asset.Readings) {
			return grid.Cell{}
		}
		if w, ok := o.Predicted(row); ok {
			return grid.Cell{Text: session.Figure(100*w, 1), Muted: true}
		}
		return grid.Cell{}
	}
	cell := r.fieldRows.Cell(row, c.field)
	cell.Bold = c.key == "zone"
	if a := r.f.s.Asset(); row < len(a.Readings) && !survey.Stands(&a.Readings[row]) {
		cell.Muted, cell.Bold = true, false
		if c.key == "zone" {
			cell.Text = say.T("withdrawn: %s", cell.Text)
		}
	}
	return cell
}

// EditText implements grid.EditTexter.
func (r *readingRows) EditText(row, col int) string {
	if r.cols[col].field < 0 {
		return ""
	}
	return r.fieldRows.EditText(row, r.cols[col].field)
}

// Commit implements grid.Source.
func (r *readingRows) Commit(row, col int, text string) {
	if i := r.cols[col].field; i >= 0 {
		r.fieldRows.Commit(row, i, text)
	}
}

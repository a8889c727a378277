package pages

import (
	"fmt"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"anodewright/anodes/order"
	"anodewright/app/chart"
	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
)

// stagedView is the staged purchase: what to order before anyone has seen the
// old anodes, and what can wait for the dock floor.
type stagedView struct {
	f       *Frame
	table   *grid.Grid
	cells   *fixed
	chart   *chartView
	words   *scrolled
	said    *look.Paragraph
	lines   []order.Staged
	content fyne.CanvasObject
}

func newStagedView(f *Frame) *stagedView {
	v := &stagedView{f: f, cells: &fixed{}, words: newScrolled(), said: look.Note("")}
	v.words.set(v.said)
	v.chart = newChartView(func(float64) {})
	v.table = grid.New([]grid.Column{
		{Title: say.T("For docking"), Width: 106}, {Title: say.T("Pattern"), Width: 130, Fill: true}, {Title: say.T("Planned"), Width: 64, Right: true},
		{Title: say.T("Surely"), Unit: "95 %", Width: 60, Right: true}, {Title: say.T("To have"), Width: 64, Right: true}, {Title: say.T("Enough"), Unit: "%", Width: 62, Right: true},
		{Title: say.T("Can wait"), Width: 68, Right: true}, {Title: say.T("In stock"), Width: 64, Right: true}, {Title: say.T("Order now"), Width: 78, Right: true},
	}, v.cells, grid.Dense())
	v.table.OnSelect = func(int, int) { v.show() }
	v.content = container.New(beside{300}, container.NewBorder(nil, container.New(tall{34}, v.words.scroll), nil, nil, v.table), v.chart)
	return v
}

func (v *stagedView) update() {
	bought, known := v.f.s.Purchase()
	if !known {
		if v.f.s.Outcome() != nil {
			v.tell(say.T("weighing the needs…"))
		}
		return
	}
	v.lines = bought.Staged
	v.cells.cells = nil
	for _, s := range v.lines {
		v.cells.cells = append(v.cells.cells, []grid.Cell{
			{Text: session.Day(s.Docking)}, {Text: s.Pattern.ID}, {Text: fmt.Sprint(s.Planned)}, {Text: fmt.Sprint(s.Surely)}, {Text: fmt.Sprint(s.Now)},
			{Text: session.Figure(100*s.Enough(), 0)}, {Text: fmt.Sprint(s.Wait())}, {Text: fmt.Sprint(s.FromStock)}, {Text: fmt.Sprint(s.Ordered), Bold: true},
		})
	}
	v.table.Refresh()
	v.show()
}

// show draws the selected line and says what it means.
func (v *stagedView) show() {
	row, _ := v.table.Selected()
	if len(v.lines) == 0 {
		v.tell(say.T("Nothing has to be bought: what is fitted lasts, or no docking lies ahead."))
		v.chart.set(nil)
		return
	}
	s := v.lines[min(max(row, 0), len(v.lines)-1)]
	text := say.T("%s for %s: have %d then, enough with %.0f %%; %d more can wait for the dock floor.", s.Pattern.ID, session.Day(s.Docking), s.Now, 100*s.Enough(), s.Wait())
	if s.Worn >= 0.01 {
		text += " " + say.T("With %.0f %% what is fitted proves too worn to be kept or added to, and all of it is renewed.", 100*s.Worn)
	}
	v.tell(text)
	v.chart.set(stagedChart(s))
}

// stagedChart is the probability that a number of pieces is enough, with the
// number to have and the probability at which one more no longer pays.
func stagedChart(s order.Staged) *chart.Chart {
	from, to := min(s.Need.Quantile(0.005), s.Planned, s.Now), max(s.Need.Quantile(0.995), s.Planned, s.Now)
	from = max(0, from-1)
	to = max(to+1, from+4)
	c := &chart.Chart{
		Title: say.T("Enough with, %%, by pieces of %s", s.Pattern.ID), From: float64(from), To: float64(to), Most: 100,
		Levels: []chart.Level{{Y: 100 * s.Wrong.Fractile(), Text: say.T("one more pays up to here")}},
		Marks:  []chart.Mark{{X: float64(s.Now), Text: fmt.Sprint(s.Now), Role: chart.Today}, {X: float64(s.Planned), Role: chart.Event}},
	}
	line := chart.Series{Name: say.T("enough with"), Role: chart.First}
	last := 0.0
	for n := from; n <= to; n++ {
		p := 100 * s.Need.UpTo(n)
		line.X = append(line.X, float64(n), float64(n))
		line.Y = append(line.Y, last, p)
		last = p
	}
	line.Y[0] = line.Y[1]
	c.Series = []chart.Series{line}
	c.XTicks = append(c.XTicks, chart.Ticks(float64(from), float64(to), 5)...)
	return c
}

// tell says something under the table.
func (v *stagedView) tell(text string) {
	if v.said.Text() != text {
		v.said.SetText(text)
		v.words.set(v.said)
	}
}

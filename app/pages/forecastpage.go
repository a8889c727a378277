package pages

import (
	"fmt"
	"math"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"anodewright/anodes/plan"
	"anodewright/app/chart"
	"anodewright/app/grid"
	"anodewright/app/look"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// forecastPage shows how the anodes of a zone waste under the plan: what the
// steel asks for and the anodes give, the wastage, the potential.
type forecastPage struct {
	f       *Frame
	zone    *zonePick
	current *chartView
	wastage *chartView
	volts   *chartView
	read    *look.Text
	card    *look.CardBox
	table   *grid.Grid
	cells   *fixed
	course  []plan.Sample
	outcome *plan.Outcome
	all     fyne.CanvasObject
}

func newForecast(f *Frame) *forecastPage {
	p := &forecastPage{f: f, cells: &fixed{}, read: look.Muted("")}
	p.read.Shrink = true
	p.zone = newZonePick(f, p.show)
	p.current, p.wastage, p.volts = newChartView(p.point), newChartView(p.point), newChartView(p.point)
	charts := container.New(stack{0.42, 0.33, 0.25}, p.current, p.wastage, p.volts)
	p.card = look.Card(say.T("How the anodes waste"), container.NewBorder(p.zone.content(), p.read, nil, nil, charts))
	p.table = grid.New([]grid.Column{
		{Title: say.T("Up to"), Width: 114}, {Title: say.T("Pieces"), Width: 250, Fill: true}, {Title: say.T("Wasted"), Unit: say.T("by group, %"), Width: 110},
		{Title: say.T("Potential"), Unit: "V Ag/AgCl", Width: 84, Right: true}, {Title: say.T("Circuit gives"), Unit: say.T("A at -0.80 V"), Width: 96, Right: true},
		{Title: say.T("To repolarise"), Unit: "A", Width: 96, Right: true}, {Title: say.T("Steel loss"), Unit: say.Thin.Unit(), Width: 76, Right: true}, {Title: say.T("State"), Width: 150},
	}, p.cells, grid.Dense())
	p.all = container.New(above{190, 0.3}, p.card, look.Card(say.T("At the end of each interval"), p.table))
	return p
}

func (p *forecastPage) title() string              { return say.T("Forecast") }
func (p *forecastPage) content() fyne.CanvasObject { return p.all }
func (p *forecastPage) selectZone(zone int)        { p.zone.chosen = zone }
func (p *forecastPage) cursorMoved()               { p.point(float64(p.f.cursor)) }

func (p *forecastPage) update() {
	o := p.f.s.Outcome()
	if o == nil {
		return
	}
	if p.zone.update(o) {
		return
	}
	if o != p.outcome {
		p.show()
	}
}

// show draws the chosen zone.
func (p *forecastPage) show() {
	o := p.f.s.Outcome()
	if o == nil || p.zone.chosen >= len(o.Zones) {
		return
	}
	p.outcome = o
	z := o.Zones[p.zone.chosen]
	p.course = o.Course(p.zone.chosen)
	p.card.SetTitle(say.T("How the anodes waste: %s", z.Zone.Name))
	by := say.T("By the design figures, with the demand factor at 1.")
	if o.Learns && z.Learned != nil {
		by = say.T("With the demand factor that the readings teach.")
	}
	p.read.SetText(say.T("Move the mouse over a chart to read it. %s", by))
	if p.course == nil {
		p.read.SetText(say.T("No circuit of anodes holds this zone: %s.", heldText(o.Asset, z.Zone)))
	}
	frame := func(title string) *chart.Chart {
		c := &chart.Chart{Title: title, Letters: 5, From: float64(o.Intervals[0].From), To: float64(o.Asset.Horizon)}
		year := o.Intervals[0].From.Time().Year()
		for y := year; y <= o.Asset.Horizon.Time().Year(); y++ {
			c.XTicks = append(c.XTicks, chart.Tick{At: float64(hull.NewDate(y, 1, 1)), Text: fmt.Sprint(y)})
		}
		if n := len(c.XTicks); n > 16 {
			var some []chart.Tick
			for i := 0; i < n; i += (n + 11) / 12 {
				some = append(some, c.XTicks[i])
			}
			c.XTicks = some
		}
		for _, d := range o.Asset.Ahead() {
			c.Marks = append(c.Marks, chart.Mark{X: float64(d.Date), Role: chart.Event})
		}
		if o.Today > o.Intervals[0].From && o.Today < o.Asset.Horizon {
			c.Marks = append(c.Marks, chart.Mark{X: float64(o.Today), Text: say.T("today"), Role: chart.Today})
		}
		return c
	}
	line := func(name string, role chart.Role, value func(plan.Sample) float64) chart.Series {
		s := chart.Series{Name: name, Role: role}
		for _, x := range p.course {
			s.X, s.Y = append(s.X, float64(x.Date)), append(s.Y, value(x))
		}
		return s
	}
	current := frame(say.T("Current of the whole circuit, A: anodes can give at -0.80 V (full line), steel asks on average (dashed)"))
	current.Series = []chart.Series{
		line(say.T("anodes can give, A:"), chart.First, func(s plan.Sample) float64 { return s.Gives }),
		line(say.T("steel asks, A:"), chart.Second, func(s plan.Sample) float64 { return s.Asks }),
	}
	wastage := frame(say.T("Wasted, % of the net mass: most wasted group (full line), all pieces (dashed) and their 90 % range (thin)"))
	wastage.Most = 100
	wastage.Levels = []chart.Level{{Y: 100 * o.Asset.Basis.RenewAbove, Text: say.T("renewal limit")}}
	wastage.Series = []chart.Series{
		line(say.T("most wasted group, %:"), chart.First, func(s plan.Sample) float64 { return 100 * s.Most }),
		line(say.T("all pieces, %:"), chart.Second, func(s plan.Sample) float64 { return 100 * s.Wastage }),
	}
	low, high := o.Band(p.zone.chosen)
	for _, edge := range [][]plan.Sample{low, high} {
		s := chart.Series{Name: say.T("90 % range, %:"), Role: chart.Third}
		for _, x := range edge {
			s.X, s.Y = append(s.X, float64(x.Date)), append(s.Y, 100*x.Wastage)
		}
		wastage.Series = append(wastage.Series, s)
	}
	volts := frame(say.T("Potential, V Ag/AgCl"))
	volts.Least, volts.Most = -1.05, -0.65
	volts.Levels = []chart.Level{{Y: -0.80, Text: say.T("protected below")}}
	volts.Series = []chart.Series{line(say.T("potential, V:"), chart.First, func(s plan.Sample) float64 { return s.Potential })}
	p.current.set(current)
	p.wastage.set(wastage)
	p.volts.set(volts)
	p.mark(float64(p.f.cursor), p.course != nil)
	p.fill(o, z)
}

func (p *forecastPage) fill(o *plan.Outcome, z plan.Zone) {
	var cells [][]grid.Cell
	for _, iv := range z.Intervals {
		what, wasted := "", ""
		for n, g := range iv.Fitted {
			if n > 0 {
				what, wasted = what+" + ", wasted+" / "
			}
			what += pieces(g.Count, g.Pattern)
			wasted += session.Figure(100*g.Wastage, 0)
		}
		if what == "" {
			what = heldText(o.Asset, z.Zone)
		}
		potential := "–"
		if !math.IsNaN(iv.Potential) {
			potential = say.Decimal(fmt.Sprintf("%.3f", iv.Potential))
		}
		cells = append(cells, []grid.Cell{
			{Text: session.Day(iv.To), Bold: true}, {Text: what}, {Text: wasted}, {Text: potential},
			{Text: amperes(iv.Repolarise.Gives)}, {Text: amperes(iv.Repolarise.Asks), Muted: true}, {Text: session.Shown(say.Thin, iv.SteelLoss, 3)},
			{State: string(iv.State), Text: say.Sentence(iv.Cause)},
		})
	}
	p.cells.cells = cells
	p.table.Refresh()
}

// point reads all charts at a time.
func (p *forecastPage) point(at float64) {
	if len(p.course) == 0 {
		return
	}
	best := p.course[0]
	for _, s := range p.course {
		if math.Abs(float64(s.Date)-at) < math.Abs(float64(best.Date)-at) {
			best = s
		}
	}
	p.read.SetText(say.T("%s: asks %s A, can give %s A, %s wasted (most %s), %.3f V",
		session.Day(best.Date), amperes(best.Asks), amperes(best.Gives), session.Percent(best.Wastage), session.Percent(best.Most), best.Potential))
	p.mark(float64(best.Date), true)
}

// mark draws the reading line on all charts.
func (p *forecastPage) mark(at float64, shown bool) {
	for _, v := range []*chartView{p.current, p.wastage, p.volts} {
		v.point(at, shown)
	}
}

// stack lays objects one below the other, each with a share of the height.
type stack []float32

func (s stack) MinSize(objects []fyne.CanvasObject) fyne.Size {
	var size fyne.Size
	for _, o := range objects {
		m := o.MinSize()
		size = fyne.NewSize(max(size.Width, m.Width), size.Height+m.Height)
	}
	return size
}

func (s stack) Layout(objects []fyne.CanvasObject, size fyne.Size) {
	y := float32(0)
	for i, o := range objects {
		h := size.Height * s[i]
		o.Move(fyne.NewPos(0, y))
		o.Resize(fyne.NewSize(size.Width, h))
		y += h
	}
}

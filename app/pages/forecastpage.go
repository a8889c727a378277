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
	circuit *look.Check  // the current of the whole circuit, not of the zone
	charts  []*chartView // current, wastage, potential
	which   *look.Select // all charts or one
	wanted  int          // the chart chosen, -1 for all
	one     int          // the chart shown alone, -1 where all are
	room    *fyne.Container
	read    *look.Text
	card    *look.CardBox
	table   *grid.Grid
	cells   *fixed
	times   *grid.Grid // the same figures in time
	samples *fixed
	tabs    *tabs
	parts   *fyne.Container
	shown   int // of the parts
	drawer  *drawer
	window  chart.Window
	course  []plan.Sample
	low     []plan.Sample // the edges of the 90 % range
	high    []plan.Sample
	outcome *plan.Outcome
	all     fyne.CanvasObject
}

func newForecast(f *Frame) *forecastPage {
	p := &forecastPage{f: f, cells: &fixed{}, samples: &fixed{}, read: look.Plain(""), wanted: -1, one: -1}
	p.read.Shrink = true
	p.zone = newZonePick(f, p.show)
	p.circuit = look.NewCheck(say.T("whole circuit"), func(bool) { p.show() })
	p.circuit.Checked = true
	for range chartShares {
		p.charts = append(p.charts, p.newChart())
	}
	p.room = container.New(chartRoom{p}, p.charts[0], p.charts[1], p.charts[2])
	p.which = p.newWhich()
	buttons := container.NewHBox(p.which, p.circuit,
		look.QuietButton("+", func() { p.zoom(float64(f.cursor), 0.5) }),
		look.QuietButton("–", func() { p.zoom(float64(f.cursor), 2) }),
		look.QuietButton(say.T("All"), p.whole),
		look.QuietButton(say.T("Save…"), p.save))
	p.card = look.Card(say.T("How the anodes waste"), container.NewBorder(container.NewBorder(nil, nil, nil, buttons, p.zone.content()), p.read, nil, nil, p.room))
	p.table = grid.New([]grid.Column{
		{Title: say.T("Up to"), Width: 112}, {Title: say.T("Pieces"), Width: 162, Fill: true}, {Title: say.T("Wasted"), Unit: say.T("by group, %"), Width: 82},
		{Title: say.T("Survey finds"), Unit: say.T("90 % range, %"), Width: 112}, {Title: say.T("Per piece"), Unit: "A", Width: 92},
		{Title: say.T("Potential"), Unit: "V Ag/AgCl", Width: 78, Right: true}, {Title: say.T("Circuit gives"), Unit: say.T("A at -0.80 V"), Width: 88, Right: true},
		{Title: say.T("To repolarise"), Unit: "A", Width: 92, Right: true}, {Title: say.T("Steel loss"), Unit: say.Thin.Unit(), Width: 68, Right: true}, {Title: say.T("State"), Width: 116},
	}, p.cells, grid.Dense())
	p.times = grid.New([]grid.Column{
		{Title: say.T("Day"), Width: 114, Fill: true}, {Title: say.T("Steel asks"), Unit: say.T("whole circuit, A"), Width: 104, Right: true},
		{Title: say.T("Anodes give"), Unit: say.T("whole circuit, A"), Width: 104, Right: true}, {Title: say.T("Wasted"), Unit: say.T("all pieces, %"), Width: 96, Right: true},
		{Title: say.T("90 % range"), Unit: "%", Width: 96, Right: true}, {Title: say.T("Most wasted"), Unit: say.T("group, %"), Width: 96, Right: true},
		{Title: say.T("Potential"), Unit: "V Ag/AgCl", Width: 90, Right: true},
	}, p.samples, grid.Dense())
	p.parts = container.NewStack(p.table, p.times)
	p.tabs = newTabs([]string{say.T("At the end of each interval"), say.T("In time")}, func(i int) {
		p.shown = i
		p.showPart()
	})
	p.showPart()
	lower := look.Card("", container.NewBorder(p.tabs.row, nil, nil, nil, p.parts))
	p.drawer = newDrawer(f, "Forecast", p.card, lower, 196, func() float32 { return look.Px(360) })
	p.drawer.say(say.T("The same figures as tables: at the end of each interval, and in time"))
	p.all = p.drawer.all
	return p
}

// newChart is a chart that moves the cursor of the whole window, by mouse and
// by the keys of the strip of dates.
func (p *forecastPage) newChart() *chartView {
	v := newChartView(p.point)
	v.left = func() { p.point(float64(p.f.cursor)) }
	v.pick = func(at float64) { p.f.band.strip.move(hull.Date(math.Round(at))) }
	v.keyed = func(key *fyne.KeyEvent) { p.f.band.strip.TypedKey(key) }
	v.zoom, v.whole = p.zoom, p.whole
	return v
}

func (p *forecastPage) title() string              { return say.T("Forecast") }
func (p *forecastPage) content() fyne.CanvasObject { return p.all }
func (p *forecastPage) lower() *drawer             { return p.drawer }
func (p *forecastPage) selectZone(zone int)        { p.zone.chosen = zone }
func (p *forecastPage) cursorMoved()               { p.point(float64(p.f.cursor)) }
func (p *forecastPage) focus() fyne.Focusable      { return p.charts[max(p.one, 0)] }

// shownTable is the table below the charts.
func (p *forecastPage) shownTable() *grid.Grid {
	if p.shown == 1 {
		return p.times
	}
	return p.table
}

func (p *forecastPage) showPart() {
	for i, o := range p.parts.Objects {
		if i == p.shown {
			o.Show()
		} else {
			o.Hide()
		}
	}
	p.tabs.mark(p.shown)
}

func (p *forecastPage) update() {
	o := p.f.s.Outcome()
	if o == nil {
		p.card.SetTitle(say.T("How the anodes waste: computing…"))
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
	first, last := float64(o.Intervals[0].From), float64(o.Asset.Horizon)
	if p.window.First != first || p.window.Last != last {
		p.window = chart.NewWindow(first, last, 60)
	}
	p.outcome = o
	z := o.Zones[p.zone.chosen]
	p.course = p.f.course(p.zone.chosen)
	p.low, p.high = nil, nil
	if p.course != nil {
		p.low, p.high = o.Band(p.zone.chosen)
	}
	p.card.SetTitle(say.T("How the anodes waste: %s", z.Zone.Name))
	if o.Learns {
		p.card.SetTitle(say.T("How the anodes waste, by the factor learned from readings: %s", z.Zone.Name))
	}
	p.draw()
	p.fill(o, z)
	p.fillTimes()
	p.point(float64(p.f.cursor))
}

func (p *forecastPage) fill(o *plan.Outcome, z plan.Zone) {
	var cells [][]grid.Cell
	for _, iv := range z.Intervals {
		what, wasted, found, each := "", "", "", ""
		for n, g := range iv.Fitted {
			if n > 0 {
				what, wasted, found, each = what+" + ", wasted+" / ", found+" / ", each+" / "
			}
			what += pieces(g.Count, g.Pattern)
			if g.Painted {
				what += ", " + say.T("painted over")
			}
			wasted += session.Figure(100*g.Wastage, 0)
			found += session.Figure(100*g.Low, 0) + "–" + session.Figure(100*g.High, 0)
			each += amperes(g.Current)
		}
		if what == "" {
			what = heldText(o.Asset, z.Zone)
		}
		potential := "–"
		if !math.IsNaN(iv.Potential) {
			potential = say.Decimal(fmt.Sprintf("%.3f", iv.Potential))
		}
		cells = append(cells, []grid.Cell{
			{Text: session.Day(iv.To), Bold: true}, {Text: what}, {Text: wasted}, {Text: found}, {Text: each}, {Text: potential},
			{Text: amperes(iv.Repolarise.Gives)}, {Text: amperes(iv.Repolarise.Asks), Muted: true}, {Text: session.Shown(say.Thin, iv.SteelLoss, 3)},
			{State: string(iv.State), Text: say.Sentence(iv.Cause)},
		})
	}
	p.cells.cells = cells
	p.table.Refresh()
}

// fillTimes lists the forecast in time.
func (p *forecastPage) fillTimes() {
	var cells [][]grid.Cell
	for i, s := range p.course {
		band := "–"
		if i < len(p.low) && i < len(p.high) {
			band = session.Figure(100*p.low[i].Wastage, 1) + "–" + session.Figure(100*p.high[i].Wastage, 1)
		}
		cells = append(cells, []grid.Cell{
			{Text: session.Day(s.Date), Bold: true}, {Text: amperes(s.Asks)}, {Text: amperes(s.Gives)}, {Text: session.Figure(100*s.Wastage, 1)},
			{Text: band}, {Text: session.Figure(100*s.Most, 1)}, {Text: session.Figure(s.Potential, 3)},
		})
	}
	p.samples.cells = cells
	p.times.Refresh()
}

// point reads all charts at a time, in words.
func (p *forecastPage) point(at float64) {
	o := p.outcome
	if o == nil || p.zone.chosen >= len(o.Zones) {
		return
	}
	day := hull.Date(at)
	s, ok := sampleAt(p.course, day)
	if !ok {
		p.read.SetText(say.T("No circuit of anodes holds this zone: %s.", heldText(o.Asset, o.Zones[p.zone.chosen].Zone)))
		p.mark(at, false)
		return
	}
	p.read.SetText(say.T("%s: asks %s A, can give %s A, %s wasted (most %s), %.3f V",
		session.Day(day), amperes(s.Asks), amperes(s.Gives), session.Percent(s.Wastage), session.Percent(s.Most), s.Potential))
	if w := p.window.Reveal(at); w != p.window {
		p.window = w
		p.draw()
	}
	p.mark(at, true)
}

// mark draws the reading line on all charts.
func (p *forecastPage) mark(at float64, shown bool) {
	for _, v := range p.charts {
		v.point(at, shown)
	}
}

// zoom shows less of the time around a day, or more of it.
func (p *forecastPage) zoom(around, factor float64) {
	if math.IsNaN(around) {
		around = float64(p.f.cursor)
	}
	if w := p.window.Zoom(around, factor); w != p.window {
		p.window = w
		p.draw()
	}
}

// whole shows all of the time.
func (p *forecastPage) whole() {
	p.window = chart.NewWindow(p.window.First, p.window.Last, 60)
	p.draw()
}

package pages

import (
	"fmt"
	"time"

	"anodewright/anodes/plan"
	"anodewright/anodes/survey"
	"anodewright/app/chart"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// draw makes the charts of the chosen zone for the time that is shown.
func (p *forecastPage) draw() {
	for i, c := range p.made() {
		p.charts[i].set(c)
	}
}

// made are the charts: current, wastage, potential.
func (p *forecastPage) made() []*chart.Chart {
	o := p.outcome
	if o == nil || p.zone.chosen >= len(o.Zones) {
		return nil
	}
	return []*chart.Chart{p.currentChart(o), p.wastageChart(o), p.voltsChart(o)}
}

// frame is an empty chart with the dockings and today.
func (p *forecastPage) frame(o *plan.Outcome, title string) *chart.Chart {
	c := &chart.Chart{Title: title, Letters: 5, From: p.window.From, To: p.window.To, XTicks: timeTicks(p.window.From, p.window.To)}
	for _, d := range o.Asset.Ahead() {
		c.Marks = append(c.Marks, chart.Mark{X: float64(d.Date), Role: chart.Event})
	}
	if o.Today > o.Intervals[0].From && o.Today < o.Asset.Horizon {
		c.Marks = append(c.Marks, chart.Mark{X: float64(o.Today), Text: say.T("today"), Role: chart.Today})
	}
	return c
}

// timeTicks are the beginnings of years between two days, or of months where
// less than two years are shown; sixteen at most.
func timeTicks(from, to float64) []chart.Tick {
	months := 12
	if to-from < 2*365 {
		months = 1
	}
	start := hull.Date(from).Time()
	var all []chart.Tick
	for d := hull.NewDate(start.Year(), time.January, 1); float64(d) <= to; d = d.AddMonths(months) {
		if float64(d) < from {
			continue
		}
		text := fmt.Sprint(d.Time().Year())
		if months == 1 && d.Time().Month() != time.January {
			text = say.T(d.Time().Format("Jan"))
		}
		all = append(all, chart.Tick{At: float64(d), Text: text})
	}
	step := (len(all) + 15) / 16
	var some []chart.Tick
	for i := 0; i < len(all); i += max(step, 1) {
		some = append(some, all[i])
	}
	return some
}

// line is one figure of the forecast in time.
func line(course []plan.Sample, name string, role chart.Role, value func(plan.Sample) float64) chart.Series {
	s := chart.Series{Name: name, Role: role}
	for _, x := range course {
		s.X, s.Y = append(s.X, float64(x.Date)), append(s.Y, value(x))
	}
	return s
}

// currentChart is the demand of each interval, initial, mean and final, as
// steps, against what the anodes can give: of the whole circuit, or of the
// zone with what hangs on it.
func (p *forecastPage) currentChart(o *plan.Outcome) *chart.Chart {
	zones := []int{p.zone.chosen}
	title := say.T("Current of the zone, A: anodes give at the interval's end (full), demand on average (dashed), initial and final (thin steps)")
	if p.circuit.Checked {
		zones = p.sameCircuit(o)
		title = say.T("Current of the whole circuit, A: anodes can give (full line), steel asks (dashed), demand initial, mean, final (thin steps)")
	}
	c := p.frame(o, title)
	var times []float64
	for _, iv := range o.Intervals {
		times = append(times, float64(iv.From))
	}
	times = append(times, float64(o.Asset.Horizon))
	step := func(name string, role chart.Role, value func(z *plan.Zone, k int) float64) chart.Series {
		var ys []float64
		for k := range o.Intervals {
			sum := 0.0
			for _, i := range zones {
				sum += value(&o.Zones[i], k)
			}
			ys = append(ys, sum)
		}
		return chart.Steps(name, role, times, ys)
	}
	demand := func(pick func(hull.Current) float64) func(z *plan.Zone, k int) float64 {
		return func(z *plan.Zone, k int) float64 {
			if p.circuit.Checked {
				return z.Factor.Used * pick(z.Intervals[k].Demand)
			}
			return z.Factor.Used * pick(z.Intervals[k].Total)
		}
	}
	initial := step(say.T("initial, A:"), chart.Third, demand(func(c hull.Current) float64 { return c.Initial }))
	mean := step(say.T("on average, A:"), chart.Third, demand(func(c hull.Current) float64 { return c.Mean }))
	final := step(say.T("final, A:"), chart.Third, demand(func(c hull.Current) float64 { return c.Final }))
	if p.circuit.Checked {
		c.Series = []chart.Series{
			initial, mean, final,
			line(p.course, say.T("anodes can give, A:"), chart.First, func(s plan.Sample) float64 { return s.Gives }),
			line(p.course, say.T("steel asks, A:"), chart.Second, func(s plan.Sample) float64 { return s.Asks }),
		}
		return c
	}
	mean.Role = chart.Second
	gives := step(say.T("anodes can give, A:"), chart.First, func(z *plan.Zone, k int) float64 { return z.Intervals[k].Output })
	c.Series = []chart.Series{initial, final, mean, gives}
	return c
}

// sameCircuit are the zones that the chosen one's circuit holds: those of one
// name whose steel asks for the same current together.
func (p *forecastPage) sameCircuit(o *plan.Outcome) []int {
	var zones []int
	for i := range o.Zones {
		course := p.f.course(i)
		if len(course) == 0 || len(p.course) == 0 {
			continue
		}
		if o.Asset.CircuitName(o.Zones[i].Zone) == o.Asset.CircuitName(o.Zones[p.zone.chosen].Zone) && course[0].Asks == p.course[0].Asks {
			zones = append(zones, i)
		}
	}
	return zones
}

func (p *forecastPage) wastageChart(o *plan.Outcome) *chart.Chart {
	c := p.frame(o, say.T("Wasted, % of the net mass: most wasted group (full line), all pieces (dashed), their 90 % range (thin), readings (crosses)"))
	c.Most = 100
	c.Levels = []chart.Level{{Y: 100 * o.Asset.Basis.RenewAbove, Text: say.T("renewal limit")}}
	wasted := func(s plan.Sample) float64 { return 100 * s.Wastage }
	c.Series = []chart.Series{
		line(p.course, say.T("most wasted group, %:"), chart.First, func(s plan.Sample) float64 { return 100 * s.Most }),
		line(p.course, say.T("all pieces, %:"), chart.Second, wasted),
		line(p.low, say.T("90 % range, %:"), chart.Third, wasted),
		line(p.high, say.T("90 % range, %:"), chart.Third, wasted),
	}
	c.Dots = readDots(o, p.zone.chosen)
	return c
}

// readDots are what readings found of a zone's anodes, a dot a day and set.
func readDots(o *plan.Outcome, zone int) []chart.Dot {
	z := o.Zones[zone].Zone
	var dots []chart.Dot
	for set := range z.Fitted {
		seen := map[hull.Date]bool{}
		for i := range o.Asset.Readings {
			r := &o.Asset.Readings[i]
			if r.Zone != z.ID || seen[r.Date] || survey.Set(z, r) != set {
				continue
			}
			seen[r.Date] = true
			w, ok := survey.Found(o.Asset, z, set, r.Date, r.Date)
			if !ok {
				continue
			}
			y := 100 * w
			dots = append(dots, chart.Dot{X: float64(r.Date), Y: y, Low: y, High: y,
				Text: say.T("survey %s: %s wasted", session.Day(r.Date), session.Percent(w))})
		}
	}
	return dots
}

func (p *forecastPage) voltsChart(o *plan.Outcome) *chart.Chart {
	c := p.frame(o, say.T("Potential, V Ag/AgCl"))
	c.Least, c.Most = -1.05, -0.65
	c.Levels = []chart.Level{{Y: -0.80, Text: say.T("protected below")}}
	c.Series = []chart.Series{line(p.course, say.T("potential, V:"), chart.First, func(s plan.Sample) float64 { return s.Potential })}
	return c
}

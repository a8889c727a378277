package pages

import (
	"math"
	"sort"

	"anodewright/anodes/plan"
	"anodewright/app/grid"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// course is the forecast of a zone, nil where no circuit holds it. It is
// computed once for an outcome, so that a dragged cursor only reads it.
func (f *Frame) course(zone int) []plan.Sample {
	o := f.s.Outcome()
	if o == nil || zone < 0 || zone >= len(o.Zones) {
		return nil
	}
	if f.coursesOf != o {
		f.coursesOf, f.courses = o, map[int][]plan.Sample{}
	}
	c, ok := f.courses[zone]
	if !ok {
		c = o.Course(zone)
		f.courses[zone] = c
	}
	return c
}

// sampleAt reads a course on a day, between two samples by straight lines. Of
// two samples on one day the later one counts: a docking is done.
func sampleAt(course []plan.Sample, day hull.Date) (plan.Sample, bool) {
	if len(course) == 0 {
		return plan.Sample{}, false
	}
	n := sort.Search(len(course), func(i int) bool { return course[i].Date > day })
	switch {
	case n == 0:
		return course[0], true
	case n == len(course) || course[n-1].Date == day:
		return course[n-1], true
	}
	a, b := course[n-1], course[n]
	share := float64(day-a.Date) / float64(b.Date-a.Date)
	mid := func(x, y float64) float64 { return x + share*(y-x) }
	return plan.Sample{
		Date: day, Potential: mid(a.Potential, b.Potential), Asks: mid(a.Asks, b.Asks), Gives: mid(a.Gives, b.Gives),
		Wastage: mid(a.Wastage, b.Wastage), Most: mid(a.Most, b.Most),
	}, true
}

// intervalAt is the place of the docking interval that a day lies in.
func intervalAt(o *plan.Outcome, day hull.Date) int {
	for k, iv := range o.Intervals {
		if day < iv.To {
			return k
		}
	}
	return len(o.Intervals) - 1
}

// dayCells are a zone's figures on the cursor's day, a line each.
func (f *Frame) dayCells(o *plan.Outcome, zone int) [][]grid.Cell {
	k := intervalAt(o, f.cursor)
	z := &o.Zones[zone]
	iv := z.Intervals[k]
	name := func(text, unit string) grid.Cell { return grid.Cell{Text: text, Sub: unit, Muted: true} }
	var cells [][]grid.Cell
	add := func(text, unit, figure string) {
		cells = append(cells, []grid.Cell{name(text, unit), {Text: figure}})
	}
	if words := f.band.view.words(zone); words != "" {
		state := f.band.view.state(zone)
		cell := grid.Cell{Text: words}
		if state.State != "" {
			cell = grid.Cell{State: string(state.State), Text: say.Sentence(state.Cause)}
		}
		cells = append(cells, []grid.Cell{name(say.T("State"), ""), cell})
	}
	share := float64(f.cursor-iv.From) / float64(iv.To-iv.From)
	b := iv.Breakdown
	add(say.T("Breakdown"), "%", percents(b.Initial+min(max(share, 0), 1)*(b.Final-b.Initial)))
	if s, ok := sampleAt(f.course(zone), f.cursor); ok {
		add(say.T("Steel asks"), say.T("whole circuit, A"), amperes(s.Asks))
		add(say.T("Anodes give"), say.T("whole circuit, A"), amperes(s.Gives))
		if s.Most > 0 || len(iv.Fitted) > 0 {
			add(say.T("Wasted"), say.T("all pieces, %"), session.Figure(100*s.Wastage, 0))
			add(say.T("Most wasted"), say.T("group, %"), session.Figure(100*s.Most, 0))
		}
		if !math.IsNaN(s.Potential) {
			add(say.T("Potential"), "V Ag/AgCl", session.Figure(s.Potential, 3))
		}
	}
	add(say.T("Interval up to"), "", session.Day(iv.To))
	add(say.T("Own demand"), say.T("initial, A"), amperes(iv.Demand.Initial))
	add("", say.T("mean, A"), amperes(iv.Demand.Mean))
	add("", say.T("final, A"), amperes(iv.Demand.Final))
	return cells
}

package workbook

import (
	"slices"

	"anodewright/anodes/renewal"
	"anodewright/anodes/survey"
	"anodewright/hull"
)

// stays writes whether the fitted sets that stay past a docking may still do
// so when inputs are changed, by the plan's own three rules. Sets of which
// pieces leave or are painted over, and sets judged by the forecast, are for
// the program alone.
func (s *sheet) stays() {
	s.cells.calc.stays = map[int]num{}
	var lines []int
	for i, l := range s.o.Schedule {
		if s.staying(l) && s.plainlyFitted(l.Zone) {
			lines = append(lines, i)
		}
	}
	if len(lines) == 0 || s.a.Basis.Sizing == hull.ForecastSizing {
		return
	}
	s.block("Fitted sets that stay", "A fitted set may stay while its usable charge lasts, its worn output covers every final current past the first docking, and it is not wasted above the renewal limit at a docking that it passes or is added to at. 1: it may not.",
		column{head: "Zone", most: 34}, column{head: "From", format: date}, column{head: "New, A", format: four}, column{head: "Worn at end, A", format: four},
		column{head: "Mean current, A", format: four}, column{head: "Final current, A", format: four}, column{head: "Charge given, Ah", format: whole}, column{head: "Given so far, Ah", format: whole},
		column{head: "Usable at the last docking, Ah", format: whole}, column{head: "Wasted by then", format: four},
		column{head: "Charge does not last", format: whole}, column{head: "Short of final current", format: whole}, column{head: "Above the renewal limit", format: whole}, column{head: "May not stay", format: whole})
	for _, i := range lines {
		s.stayRows(i)
	}
}

// staying reports whether an action leaves the fitted set where it is: a keep,
// or an add to a set that has no keep before.
func (b *book) staying(l renewal.Line) bool {
	if l.Action == renewal.Keep {
		return true
	}
	if l.Action != renewal.Add {
		return false
	}
	return !slices.ContainsFunc(b.o.Schedule, func(m renewal.Line) bool { return m.Zone == l.Zone && m.Docking < l.Docking })
}

// plainlyFitted reports whether all fitted pieces of a zone stay and give
// current for as long as their set does.
func (b *book) plainlyFitted(zone int) bool {
	groups := b.cells.calc.fitted[zone]
	return len(groups) > 0 && !slices.ContainsFunc(groups, func(g calcGroup) bool { return changes(g.lot) })
}

func changes(l survey.Lot) bool { return l.Leaves != 0 || l.Painted != nil }

// stayRows writes a row for each interval up to the action after, and sums up
// in the last one.
func (s *sheet) stayRows(line int) {
	l, c := s.o.Schedule[line], &s.cells.calc
	ivs := c.intervals[l.Zone]
	to, added := s.boundary(l.Until), l.Action == renewal.Add
	if added {
		to = l.Docking + 1
	}
	for _, m := range s.o.Schedule {
		if m.Zone == l.Zone && m.Docking > l.Docking && m.Docking+1 <= to && fits(m) {
			to, added = m.Docking+1, m.Action == renewal.Add
		}
	}
	set, _ := s.setAt(l)
	var left, full, gone []num
	for _, g := range c.fitted[l.Zone] {
		p := s.cells.patterns[s.patternIndex(s.a.Zones[l.Zone].Fitted[g.set].Pattern)]
		all := num{"(" + g.count.at + "*" + p.net.at + "*" + g.capacity.at + ")", g.count.v * p.net.v * g.capacity.v}
		left, full = append(left, g.left), append(full, all)
		gone = append(gone, num{all.at + "*" + g.wastage.at, all.v * g.wastage.v})
	}
	usable := plus(left)
	bad := 0.0
	flag := func(r *record, asked bool, need, have num) {
		if !asked {
			r.blank(1)
			return
		}
		v := 0.0
		if need.v*(1-1e-9) > have.v {
			v, bad = 1, 1
		}
		r.by(v, "IF(#1*(1-"+slack+")>#2,1,0)", need, have)
	}
	const flags = 10 // the first column of them
	top := s.next
	var given []num
	for k := range to {
		iv := s.o.Intervals[k]
		r := s.record(s.names[l.Zone])
		r.on(iv.From)
		out := set.output(iv.From, false, k, func(o calcOutput) num { return o.isNew })
		isNew := r.by(out.v, "#1", out)
		out = set.output(iv.To, true, k, func(o calcOutput) num { return o.wornEnd })
		worn := r.by(out.v, "#1", out)
		mean, final := r.by(ivs[k].need[1].v, "#1", ivs[k].need[1]), r.by(ivs[k].need[2].v, "#1", ivs[k].need[2])
		given = append(given, r.by(min(mean.v, isNew.v)*ivs[k].hours.v, "MIN(#1,#2)*#3", mean, isNew, ivs[k].hours))
		sum := 0.0
		for _, g := range given {
			sum += g.v
		}
		far := r.by(sum, "SUM(#1)", cellsFrom(given[0], given[k]))
		holds := r.by(usable.v, "#1", usable)
		wasted := r.by((plus(gone).v+far.v)/plus(full).v, "(#1+#2)/#3", plus(gone), far, plus(full))
		flag(r, to > 1, far, holds)
		flag(r, k > 0, final, worn)
		flag(r, k+1 < to || added, wasted, s.figure("Renew_above"))
		if k == to-1 {
			c.stays[line] = r.by(bad, "MIN(1,SUM(#1))", cellsFrom(s.ref(flags, top, 0), s.ref(flags+2, r.next, 0)))
		}
		r.done()
	}
}

package workbook

import (
	"fmt"
	"math"
	"slices"

	"anodewright/anodes/renewal"
	"anodewright/anodes/survey"
	"anodewright/hull"
)

// calcAction are the cells of an action that fits pieces.
// over is by how much the zone's most is passed; without an address there is
// no most.
type calcAction struct{ count, off, cost, over num }

// addCells are what an add needs beside a renewal's cells.
type addCells struct{ with, without, left, worn, old num }

// slack is the relative difference that no comparison of the plan heeds.
const slack = "0.000000001"

// roundUp is the plan's own: a count of pieces, but for slack.
func roundUp(q float64) float64 { return math.Ceil(q - 1e-9*max(1, q)) }

// upTo raises a count to full steps.
func upTo(n, steps float64) float64 { return math.Ceil(n/steps) * steps }

// boundary returns the interval that begins on a date; the horizon is past
// the last.
func (b *book) boundary(d hull.Date) int {
	for k, iv := range b.o.Intervals {
		if iv.From == d {
			return k
		}
	}
	return len(b.o.Intervals)
}

// sizedTo returns the interval up to which an action is sized: a renewed set
// that will be added to is sized to the docking of the add.
func (b *book) sizedTo(l renewal.Line) int {
	to := b.boundary(l.Until)
	for _, m := range b.o.Schedule {
		if m.Zone == l.Zone && m.Action == renewal.Add && m.Docking > l.Docking {
			to = min(to, m.Docking+1)
		}
	}
	return to
}

// actions writes every renewal and add with what its criteria ask for.
func (s *sheet) actions() {
	c := &s.cells.calc
	c.actions = make([]calcAction, len(s.o.Schedule))
	c.adds = map[int]addCells{}
	// Adds refer to the counts of renewals and renewals follow adds: the place
	// of the actions is kept free until what is below is written.
	const above = 5 // rows from the gap to the headings
	start, first := s.next, s.next+above
	for i, l := range s.o.Schedule {
		if fits(l) {
			c.actions[i].count = s.ref(countColumn, first+s.fitting(i), float64(l.Count))
		}
	}
	s.next = first + s.fitting(len(s.o.Schedule))
	s.adds()
	end := s.next
	s.next = start
	note := "Pieces: the largest of the four criteria, rounded up, at least the least count, in steps of the count. For an add also the least count at which the old set bears its share to the end."
	if s.a.Basis.Sizing == hull.ForecastSizing {
		note = "Pieces are sized by the forecast, which is no formula: they are inputs here, beside what the criteria of the code would ask for."
	}
	if slices.ContainsFunc(s.o.Schedule, func(l renewal.Line) bool { return l.Governs == "pinned" }) {
		note += " A count that the planner pinned is an input."
	}
	s.block("Actions", note,
		column{head: "Docking", format: date}, column{head: "Zone", most: 34}, column{head: "Action", most: 12}, column{head: "Pattern", most: 24}, column{head: "Sized to", format: date},
		column{head: "Docking no", format: whole}, column{head: "Pattern no", format: whole}, column{head: "Charge, Ah", format: whole},
		column{head: "By mass", format: four}, column{head: "By renewal limit", format: four}, column{head: "By initial current", format: four}, column{head: "By final current", format: four},
		column{head: "Without the old set", format: whole}, column{head: "With it", format: whole},
		column{head: "Pieces", format: whole}, column{head: "Taken off", format: whole}, column{head: "Worth of money", format: four}, column{head: "Cost", format: two},
		column{group: "Exact", head: "Largest; an add without the old", format: four}, column{group: "Exact", head: "Rounded up; an add for the old to bear its share", format: four}, column{group: "Exact", head: "An add with the old", format: four},
		column{group: "Share of the old set, Ah", head: "with it", format: whole}, column{group: "Share of the old set, Ah", head: "at the pieces", format: whole},
		column{group: "Of the zone", head: "Most pieces", format: whole}, column{group: "Of the zone", head: "Carried", format: limit})
	for i, l := range s.o.Schedule {
		if fits(l) {
			s.writeAction(i, l)
		}
	}
	last := max(first, s.next-1)
	s.flag(overColumn, first)
	s.next = end
	slices.Sort(s.parts)
	column := func(col int) num { return cellsFrom(s.ref(col, first, 0), s.ref(col, last, 0)) }
	c.dockingNumbers, c.patternNumbers, c.counts = column(5), column(6), column(countColumn)
}

// entered reports whether an action's count does not follow the code's criteria
// but a forecast or the planner: it is then an entry.
func entered(l renewal.Line) bool { return l.Governs == "forecast" || l.Governs == "pinned" }

// countColumn is that of the pieces, addColumns the first of those that lead
// to it.
const countColumn, addColumns = 14, 18

// overColumn is that of the pieces over the zone's most.
const overColumn = 24

// fitting is how many of the schedule's first lines fit pieces.
func (b *book) fitting(lines int) (n int) {
	for _, l := range b.o.Schedule[:lines] {
		if fits(l) {
			n++
		}
	}
	return n
}

func (s *sheet) writeAction(i int, l renewal.Line) {
	c, in := &s.cells.calc, s.cells.zones[l.Zone]
	pattern := s.patternIndex(l.Pattern.ID)
	p, z := s.cells.patterns[pattern], &s.a.Zones[l.Zone]
	from, to := l.Docking+1, s.sizedTo(l)
	if l.Action == renewal.Add {
		to = s.boundary(l.Until)
	}
	ivs, outs := c.intervals[l.Zone], c.outputs[s.key(l.Zone, l.Pattern, l.Count)]
	capacity := s.capacity(pattern, z)
	if capacity.at == "" {
		capacity.at = fmt.Sprintf("%g", capacity.v)
	}
	r := s.record(l.Date, s.names[l.Zone], string(l.Action), patternName(l.Pattern))
	r.on(s.o.Intervals[to-1].To)
	r.values = append(r.values, l.Docking+1, pattern+1)
	charge := r.by(s.charge(ivs[from:to]), "SUM(#1)", cellsFrom(ivs[from].charge, ivs[to-1].charge))
	a := c.actions[i]
	var count live
	var more []any
	switch {
	case entered(l) && l.Action == renewal.Add:
		r.blank(6)
	case l.Action == renewal.Renew:
		q1 := r.by(l.Need.ByMass, "#1/(#2*#3*#4)", charge, p.net, p.utilisation, capacity)
		q2 := num{at: "0"} // no docking is passed
		if to > from+1 {
			q2 = r.by(l.Need.ByRenewAbove, "SUM(#1)/(#2*#3*#4)", cellsFrom(ivs[from].charge, ivs[to-2].charge), p.net, s.figure("Renew_above"), capacity)
		} else {
			r.blank(1)
		}
		q3 := r.by(l.Need.ByInitial, "#1/#2", ivs[from].need[0], outs[from].isNew)
		q4 := r.by(l.Need.ByFinal, "MAX(#1)", cellsFrom(outs[from].forFinal, outs[to-1].forFinal))
		r.blank(2)
		exact := max(1, q1.v, q2.v, q3.v, q4.v)
		largest, whole := s.ref(addColumns, r.next, exact), s.ref(addColumns+1, r.next, roundUp(exact))
		count = s.formed(float64(l.Count), "ROUNDUP(MAX(#1,#2)/#3,0)*#3", in.least, whole, in.steps)
		more = []any{s.formed(exact, "MAX(1,#1,#2,#3,#4)", q1, q2, q3, q4), s.formed(whole.v, "ROUNDUP(#1-"+slack+"*#1,0)", largest)}
	default:
		add := c.adds[i]
		q1 := r.by(l.Need.ByMass, "MAX(0,(#1-#2)/(#3*#4*#5))", charge, add.left, p.net, p.utilisation, capacity)
		r.blank(1)
		q3 := r.by(l.Need.ByInitial, "MAX(0,(#1-IF(#2>0,#3,0))/#4)", ivs[from].need[0], add.left, add.worn, outs[from].isNew)
		steps, worn := in.steps, outs[from].worn
		cell := func(col int, v float64) num { return s.ref(col, r.next, v) }
		left := add.left.v
		if left <= 0 {
			left = 1
		}
		// Columns to the right hold the exact counts and the old set's share.
		exact := cell(addColumns, max(1, q1.v, q3.v, add.without.v))
		bearing := cell(addColumns+1, add.worn.v*(charge.v/left-1)/worn.v)
		exactWith := cell(addColumns+2, min(1e9, max(1, q1.v, q3.v, add.with.v, bearing.v)))
		without, with := cell(12, upTo(roundUp(exact.v), steps.v)), cell(13, upTo(roundUp(exactWith.v), steps.v))
		share := func(n float64) float64 { return add.worn.v / (add.worn.v + n*worn.v) * charge.v * (1 - 1e-9) }
		shareWith, shareAt := cell(addColumns+3, share(with.v)), cell(addColumns+4, share(a.count.v))
		r.by(l.Need.ByFinal, "IF(#1>0,IF(#1>=#2,MAX(0,#3),#4),#4)", add.left, shareAt, add.with, add.without)
		const up = "ROUNDUP(ROUNDUP(#1-" + slack + "*#1,0)/#2,0)*#2"
		r.by(without.v, up, exact, steps)
		r.by(with.v, up, exactWith, steps)
		count = s.formed(a.count.v, "IF(#1>0,IF(#2<#3,IF(#1>=#4,#2,#3),#3),#3)", add.left, with, without, shareWith)
		more = []any{
			s.formed(exact.v, "MAX(1,#1,#2,#3)", q1, q3, add.without),
			s.formed(bearing.v, "#1*(#2/IF(#3>0,#3,1)-1)/#4", add.worn, charge, add.left, worn),
			s.formed(exactWith.v, "MIN(1000000000,MAX(1,#1,#2,#3,#4))", q1, q3, add.with, bearing),
			s.formed(shareWith.v, "#1/(#1+#2*#3)*#4*(1-"+slack+")", add.worn, with, worn, charge),
			s.formed(shareAt.v, "#1/(#1+#2*#3)*#4*(1-"+slack+")", add.worn, a.count, worn, charge),
		}
	}
	if entered(l) {
		r.in(float64(l.Count))
	} else {
		r.values = append(r.values, count)
	}
	gone := s.removedBy(l)
	a.off = r.by(float64(l.Removed), "#1", gone)
	days := serial(l.Date) - serial(s.a.Start())
	worth := r.by(math.Pow(1+s.a.Costs.DiscountRate, -days/hull.DaysPerYear), "(1+#1)^(-(#2-#3)/365)", s.figure("Discount_rate"), ivs[from].from, ivs[0].from)
	a.cost = r.by(l.Cost, "#1*(#2*#3+#4*#5+#6)", worth, a.count, c.patterns[pattern].cost, a.off, s.figure("Remove_per_piece"), s.figure("Per_zone"))
	r.values = append(r.values, more...)
	if in.most.at != "" {
		r.blank(overColumn - 1 - len(r.values))
		most := r.by(in.most.v, "#1", in.most)
		old := num{at: "0"} // of the set that stays
		if l.Action == renewal.Add {
			old = c.adds[i].old
		}
		a.over = r.by(max(0, a.count.v+old.v-most.v), "MAX(0,#1+#2-#3)", a.count, old, most)
	}
	r.done()
	c.actions[i] = a
}

// removedBy returns the cells that make the pieces that a renewal takes off:
// those of the set that is there and of what was added to it.
func (s *sheet) removedBy(l renewal.Line) num {
	if l.Action != renewal.Renew {
		return plus(nil)
	}
	var parts []num
	old, renewed := s.setBefore(l)
	if !renewed {
		for _, g := range s.cells.calc.fitted[l.Zone] {
			if g.lot.LiveOn(l.Date) {
				parts = append(parts, g.count)
			}
		}
	}
	for i, m := range s.o.Schedule {
		if m.Zone == l.Zone && fits(m) && m.Docking < l.Docking && (!renewed || m.Docking >= old.Docking) {
			parts = append(parts, s.cells.calc.actions[i].count)
		}
	}
	return plus(parts)
}

// adds writes, for every add, what the old set still gives, by interval.
func (s *sheet) adds() {
	var lines []int
	for i, l := range s.o.Schedule {
		if l.Action == renewal.Add {
			lines = append(lines, i)
		}
	}
	if len(lines) == 0 {
		return
	}
	s.block("Sets that are added to", "Before the add: the charge that the old set gave, of a fitted one no more than its output new. From the add on: the pieces to add for the final current, with and without the old set.",
		column{head: "Zone", most: 34}, column{head: "From", format: date}, column{head: "Old pieces", format: whole}, column{head: "New, A", format: four}, column{head: "Worn at start, A", format: four}, column{head: "Worn at end, A", format: four},
		column{head: "Charge given, Ah", format: whole}, column{head: "Final with old", format: four}, column{head: "Final without", format: four}, column{head: "Charge to come, Ah", format: whole}, column{head: "Left at the add, Ah", format: whole}, column{head: "That counts, Ah", format: whole}, column{head: "Left before, Ah", format: whole}, column{head: "Kept of it", format: four})
	for _, i := range lines {
		s.addRows(i)
	}
}

// oldGroup is part of a set that is added to. A renewed set has no lot: all
// its pieces are there and give current.
type oldGroup struct {
	count, works, usable num
	outs                 []calcOutput
	lot                  *survey.Lot
	kept                 []num // of its usable charge, from one stretch of time to the next
}

func (g *oldGroup) there(day hull.Date) bool { return g.lot == nil || g.lot.LiveOn(day) }

func (g *oldGroup) gives(day hull.Date, before bool) bool {
	return g.lot == nil || g.lot.Gives(day, before)
}

// oldSet is a set that is added to.
type oldSet []oldGroup

// setAt returns the set that is there at an action, and the interval that it
// was fitted for.
func (s *sheet) setAt(l renewal.Line) (set oldSet, from int) {
	c, z := &s.cells.calc, &s.a.Zones[l.Zone]
	if old, renewed := s.setBefore(l); renewed {
		k := s.patternIndex(old.Pattern.ID)
		p, capacity := s.cells.patterns[k], s.capacity(k, z)
		if capacity.at == "" {
			capacity.at = fmt.Sprintf("%g", capacity.v)
		}
		n := s.countCell(old)
		usable := num{fmt.Sprintf("%s*%s*%s*%s", n.at, p.net.at, p.utilisation.at, capacity.at), n.v * p.net.v * p.utilisation.v * capacity.v}
		return oldSet{{count: n, works: n, usable: usable, outs: c.outputs[s.key(l.Zone, old.Pattern, old.Count)]}}, old.Docking + 1
	}
	for i := range c.fitted[l.Zone] {
		g := &c.fitted[l.Zone][i]
		f := z.Fitted[g.set]
		outs := c.outputs[s.key(l.Zone, &s.a.Patterns[s.patternIndex(f.Pattern)], f.Count)]
		set = append(set, oldGroup{count: g.count, works: g.works, usable: g.left, outs: outs, lot: &g.lot})
	}
	return set, 0
}

// pieces are those that are there on a day.
func (set oldSet) pieces(day hull.Date) num {
	var all []num
	for i := range set {
		if set[i].there(day) {
			all = append(all, set[i].count)
		}
	}
	return plus(all)
}

// output is what the pieces give on a day in interval k.
func (set oldSet) output(day hull.Date, before bool, k int, of func(calcOutput) num) num {
	var all []num
	for i := range set {
		if g := &set[i]; g.gives(day, before) {
			out := of(g.outs[k])
			all = append(all, num{g.works.at + "*" + out.at, g.works.v * out.v})
		}
	}
	return plus(all)
}

// left is the usable charge of the pieces that give current on a day.
func (set oldSet) left(day hull.Date) num {
	var all []num
	for i := range set {
		if g := &set[i]; g.gives(day, false) {
			n := g.usable
			for _, k := range g.kept {
				n = num{n.at + "*" + k.at, n.v * k.v}
			}
			all = append(all, n)
		}
	}
	return plus(all)
}

// turns returns the days from one to another between which the same pieces
// give current.
func (set oldSet) turns(from, to hull.Date) []hull.Date {
	days := []hull.Date{from, to}
	for i := range set {
		if set[i].lot != nil {
			days = append(days, set[i].lot.Turns(from, to-1)...)
		}
	}
	slices.Sort(days)
	return slices.Compact(days)
}

// oldRow starts a row of a set that is added to with what it gives in interval
// k from one day to another.
func (s *sheet) oldRow(zone int, set oldSet, k int, from, to hull.Date) (r *record, isNew, worn, wornEnd num) {
	r = s.record(s.names[zone])
	r.on(from)
	for _, cell := range []struct {
		to    *num
		value num
	}{
		{new(num), set.pieces(from)},
		{&isNew, set.output(from, false, k, func(o calcOutput) num { return o.isNew })},
		{&worn, set.output(from, false, k, func(o calcOutput) num { return o.worn })},
		{&wornEnd, set.output(to, true, k, func(o calcOutput) num { return o.wornEnd })},
	} {
		*cell.to = r.by(cell.value.v, "#1", cell.value)
	}
	return r, isNew, worn, wornEnd
}

// spend writes the charge that a fitted set gives in interval k: the mean
// demand, but no more than its output new.
func (s *sheet) spend(zone int, set oldSet, k int) {
	iv := s.cells.calc.intervals[zone][k]
	days := set.turns(s.o.Intervals[k].From, s.o.Intervals[k].To)
	for n := range len(days) - 1 {
		left := set.left(days[n])
		r, isNew, _, _ := s.oldRow(zone, set, k, days[n], days[n+1])
		hours := float64(24 * (days[n+1] - days[n]))
		given := r.by(min(iv.need[1].v, isNew.v)*hours, fmt.Sprintf("MIN(#1,#2)*%g", hours), iv.need[1], isNew)
		r.blank(5)
		all := r.by(left.v, "#1", left)
		kept := 1.0
		if all.v > 0 {
			kept = 1 - min(given.v, all.v)/all.v
		}
		part := r.by(kept, "IF(#1>0,1-MIN(#2,#1)/#1,1)", all, given)
		r.done()
		for i := range set {
			if set[i].gives(days[n], false) {
				set[i].kept = append(set[i].kept, part)
			}
		}
	}
}

func (s *sheet) addRows(line int) {
	l := s.o.Schedule[line]
	c := &s.cells.calc
	ivs := c.intervals[l.Zone]
	at, until := l.Docking+1, s.boundary(l.Until)
	set, from := s.setAt(l)
	outs := c.outputs[s.key(l.Zone, l.Pattern, l.Count)]
	var given, with, without []num
	var add addCells
	for k := from; k < until; k++ {
		if k < at && set[0].lot != nil {
			s.spend(l.Zone, set, k)
			continue
		}
		iv := s.o.Intervals[k]
		left := set.left(iv.From)
		r, _, worn, end := s.oldRow(l.Zone, set, k, iv.From, iv.To)
		if k < at {
			given = append(given, r.by(ivs[k].charge.v, "#1", ivs[k].charge))
			r.done()
			continue
		}
		r.blank(1)
		final := ivs[k].need[2]
		with = append(with, r.by((final.v-end.v)/outs[k].wornEnd.v, "(#1-#2)/#3", final, end, outs[k].wornEnd))
		without = append(without, r.by(final.v/outs[k].wornEnd.v, "#1/#2", final, outs[k].wornEnd))
		if k == at {
			add.worn, add.old = worn, s.ref(2, r.next, set.pieces(iv.From).v)
			q := r.by(s.charge(ivs[at:until]), "SUM(#1)", cellsFrom(ivs[at].charge, ivs[until-1].charge))
			rest := left
			if len(given) > 0 {
				for _, g := range given {
					rest.v -= g.v
				}
				rest = r.by(rest.v, "#1-SUM(#2)", left, cellsFrom(given[0], given[len(given)-1]))
			} else {
				rest = r.by(rest.v, "#1", left)
			}
			counts := max(0, rest.v)
			if counts <= 1e-9*q.v {
				counts = 0
			}
			add.left = r.by(counts, "IF(#1<="+slack+"*#2,0,#1)", rest, q)
		}
		r.done()
	}
	r := s.record(s.names[l.Zone]+", largest", nil, nil, nil, nil, nil, nil)
	largest := func(all []num) num {
		m := all[0].v
		for _, n := range all {
			m = max(m, n.v)
		}
		return r.by(m, "MAX(#1)", cellsFrom(all[0], all[len(all)-1]))
	}
	add.with, add.without = largest(with), largest(without)
	r.done()
	c.adds[line] = add
}

// calcDocking are a docking's shared cost and the worth of money at it.
type calcDocking struct{ pieces, shared num }

// dockings writes what each docking costs once.
func (s *sheet) dockings() {
	ahead := s.a.Ahead()
	if len(ahead) == 0 || s.cells.calc.counts.at == "" {
		return
	}
	s.block("Dockings", "What a docking costs once as soon as a piece is fitted, and a campaign's day rate for the days that its pieces take, rounded up.",
		column{head: "Docking", format: date}, column{head: "No", format: whole}, column{head: "Fixed, mobilisation", format: two, entry: true}, column{head: "Day rate", format: two, entry: true}, column{head: "Pieces a day", format: two, entry: true},
		column{head: "Pieces", format: whole}, column{head: "Days", format: two}, column{head: "Days begun", format: whole}, column{head: "Worth of money", format: four}, column{head: "Shared cost", format: two})
	for k, d := range ahead {
		r := s.record()
		on := r.on(d.Date)
		r.values = append(r.values, k+1)
		no := r.ref(1, r.next, float64(k+1))
		fixed, rate, perDay := d.FixedCost, 0.0, 0.0
		if d.Kind == hull.Campaign {
			fixed += d.Mobilisation
			if d.PiecesPerDay > 0 {
				rate, perDay = d.DayRate, d.PiecesPerDay
			}
		}
		cf, cr, cp := r.in(fixed), r.in(rate), r.in(perDay)
		n := 0.0
		for _, l := range s.o.Schedule {
			if fits(l) && l.Docking == k {
				n += float64(l.Count)
			}
		}
		pieces := r.by(n, "SUMIFS(#1,#2,#3)", s.cells.calc.counts, s.cells.calc.dockingNumbers, no)
		time := 0.0
		if perDay > 0 {
			time = n / perDay
		}
		days := r.by(time, "IF(#2>0,#1/#2,0)", pieces, cp)
		begun := r.by(math.Ceil(max(0, time-1e-9*(1+time))), "ROUNDUP(MAX(0,#1-"+slack+"*(1+#1)),0)", days)
		start := s.cells.calc.intervals[0][0].from
		worth := r.by(math.Pow(1+s.a.Costs.DiscountRate, -(on.v-start.v)/hull.DaysPerYear), "(1+#1)^(-(#2-#3)/365)", s.figure("Discount_rate"), on, start)
		shared := 0.0
		if n > 0 && k < len(s.o.Money.Docking) {
			shared = s.o.Money.Docking[k]
		}
		cost := r.by(shared, "IF(#1>0,#2*(#3+#4*#5),0)", pieces, worth, cf, cr, begun)
		r.done()
		s.cells.calc.dockings = append(s.cells.calc.dockings, calcDocking{pieces, cost})
	}
}

func (b *book) charge(ivs []calcInterval) (q float64) {
	for _, iv := range ivs {
		q += iv.charge.v
	}
	return q
}

// countCell is where the count of a renewal will stand.
func (b *book) countCell(l renewal.Line) num {
	i := slices.IndexFunc(b.o.Schedule, func(m renewal.Line) bool { return m.Zone == l.Zone && m.Docking == l.Docking && fits(m) })
	return b.cells.calc.actions[i].count
}

package workbook

import (
	"slices"

	"anodewright/hull"
)

// calcCoat is a coating from a date on.
type calcCoat struct{ from, base, slope, age num }

// coats writes the coating of every zone as applied and after each work. A
// work's own figures are entries; those it leaves out are the zone's.
func (s *sheet) coats() {
	s.block("Coatings", "Breakdown is base + slope × years from the date on, at most 1. After a touch-up of a share s the base is (1 - s) × before; after a recoat in part (1 - s) × before + s × new a.",
		column{head: "Zone", most: 34}, column{head: "Date", format: date}, column{head: "Work", most: 22}, column{head: "Share", format: three, entry: true}, column{head: "New a", format: four, entry: true},
		column{head: "New b, per year", format: four, entry: true}, column{head: "Breakdown found", format: four, entry: true}, column{head: "Before", format: four},
		column{head: "Base", format: four}, column{head: "Slope, per year", format: four}, column{head: "Age, years", format: three})
	dockings := s.a.Ahead()
	for i := range s.a.Zones {
		z, c := &s.a.Zones[i], s.cells.calc.zones[i]
		var now calcCoat
		r := s.record(s.names[i])
		now.from = r.by(c.applied.v, "#1", c.applied)
		r.values = append(r.values, "as applied")
		r.blank(5)
		now.base, now.slope, now.age = r.by(c.a.v, "#1", c.a), r.by(c.b.v, "#1", c.b), r.fixed(0)
		r.done()
		none := !z.Coated()
		after := func(works []hull.Work, on hull.Date) {
			for _, w := range works {
				if w.Zone == z.ID && changesCoating(w.Coating) && (w.Coating != hull.TouchUp || !none) {
					now, none = s.coatAfter(i, w, on, now), false
				}
			}
		}
		for _, d := range s.a.Closed {
			if serial(d.Date) > c.applied.v && d.Date <= s.a.Start() {
				after(d.Works, d.Date)
			}
		}
		all := []calcCoat{now}
		for _, d := range dockings {
			after(d.Works, d.Date)
			all = append(all, now)
		}
		s.cells.calc.coats = append(s.cells.calc.coats, all)
	}
}

// changesCoating reports whether a work changes the breakdown.
func changesCoating(w hull.CoatingWork) bool {
	switch w {
	case hull.TouchUp, hull.Recoat, hull.PartRecoat, hull.Found:
		return true
	}
	return false
}

// coatAfter writes the coating after one work.
func (s *sheet) coatAfter(zone int, w hull.Work, d hull.Date, old calcCoat) calcCoat {
	z, c := &s.a.Zones[zone], s.cells.calc.zones[zone]
	r := s.record(s.names[zone])
	var now calcCoat
	now.from = r.on(d)
	r.values = append(r.values, plain(w.Coating))
	var share, newA, newB, found num
	entry := func(to *num, v *float64) {
		if v == nil {
			r.blank(1)
			return
		}
		*to = r.in(*v)
	}
	entry(&share, w.Share)
	if w.Coating == hull.Recoat || w.Coating == hull.PartRecoat {
		newA, newB = c.a, c.b
		if a, b := z.BreakdownConstants(); a != c.a.v || b != c.b.v {
			newA, newB = num{v: a}, num{v: b} // readings tell of the coat that is there, not of the next
		}
		if w.Category != "" {
			other := *z
			other.Coating = hull.Coating{Category: w.Category}
			newA.at, newB.at = "", ""
			newA.v, newB.v = other.BreakdownConstants()
		}
		if w.A != nil {
			newA = num{v: *w.A}
		}
		if w.B != nil {
			newB = num{v: *w.B}
		}
		newA, newB = r.of(newA), r.of(newB)
	} else {
		r.blank(2)
	}
	entry(&found, w.Breakdown)
	years := (now.from.v - old.from.v) / hull.DaysPerYear
	before := r.by(min(1, old.base.v+old.slope.v*years), "MIN(1,#1+#2*(#3-#4)/365)", old.base, old.slope, now.from, old.from)
	age := old.age.v + years
	same := func(n num) num { return r.by(n.v, "#1", n) }
	switch w.Coating {
	case hull.Recoat:
		now.base, now.slope, now.age = same(newA), same(newB), r.fixed(0)
	case hull.Found:
		now.base, now.slope = same(found), same(old.slope)
		now.age = r.by(age, "#1+(#2-#3)/365", old.age, now.from, old.from)
	case hull.PartRecoat:
		now.base = r.by((1-share.v)*before.v+share.v*newA.v, "(1-#1)*#2+#1*#3", share, before, newA)
		now.slope = same(old.slope)
		now.age = r.by((1-share.v)*age, "(1-#1)*(#2+(#3-#4)/365)", share, old.age, now.from, old.from)
	default: // touch-up
		now.base = r.by((1-share.v)*before.v, "(1-#1)*#2", share, before)
		now.slope = same(old.slope)
		now.age = r.by((1-share.v)*age, "(1-#1)*(#2+(#3-#4)/365)", share, old.age, now.from, old.from)
	}
	r.done()
	return now
}

// calcInterval are a zone's figures in one interval. need is what the sizing
// follows: with the zones held and times the demand factor.
type calcInterval struct {
	from, to              num
	breakdown, own, total [3]num
	need                  [3]num
	charge, hours         num
}

// demands writes the demand in every time of unchanged service, and gathers
// it by interval.
func (s *sheet) demands() {
	practice := s.a.Basis.Densities == hull.HullPractice
	columns := []column{{head: "Zone", most: 34}, {head: "From", format: date}, {head: "To", format: date}, {head: "Days", format: whole}, {head: "Years at start", format: four}, {head: "Years at end", format: four}, {head: "Breakdown 1 after, years", format: three}}
	triple := func(group string, f format, entry bool) {
		for _, h := range []string{"initial", "mean", "final"} {
			columns = append(columns, column{group: group, head: h, format: f, entry: entry})
		}
	}
	triple("Breakdown", four, false)
	triple("Bare steel, mA/m²", three, true)
	columns = append(columns, column{head: "Under way", format: three, entry: true})
	triple("Demand, A", four, false)
	s.block("Demand in times of unchanged service", "Years are those since the coating's date, of 365 days. The mean of the breakdown is exact, also where it reaches 1 within the time. Drains are added below.", columns...)
	n := len(s.o.Intervals)
	s.cells.calc.intervals = make([][]calcInterval, len(s.a.Zones))
	type served struct {
		days num
		fc   [3]num
		i    [3]num
	}
	stretches := make([][][]served, len(s.a.Zones))
	for i := range s.a.Zones {
		z, c := &s.a.Zones[i], s.cells.calc.zones[i]
		stretches[i] = make([][]served, n)
		byPractice := practice && hull.PracticeApplies(s.a, z)
		for k, iv := range s.o.Intervals {
			coat := s.cells.calc.coats[i][k]
			for from := iv.From; from < iv.To; {
				to := s.changeAfter(z, from, iv.To)
				shares, underWay := s.a.ServiceAt(z, from)
				r := s.record(s.names[i])
				first, last := r.on(from), r.on(to)
				var v served
				v.days = r.by(float64(to-from), "#2-#1", first, last)
				years := func(at num) num {
					return r.by((at.v-coat.from.v)/hull.DaysPerYear, "(#1-#2)/365", at, coat.from)
				}
				t1, t2 := years(first), years(last)
				a, b := coat.base, coat.slope
				x1, x2 := min(1, a.v+b.v*t1.v), min(1, a.v+b.v*t2.v)
				whole := 0.0
				if b.v > 0 {
					whole = (1 - a.v) / b.v
				}
				tc := r.by(whole, "IF(#2>0,(1-#1)/#2,0)", a, b)
				mean := (x1 + x2) / 2
				if x2 >= 1 && whole > t1.v {
					mean = ((x1+1)/2*(whole-t1.v) + (t2.v - whole)) / (t2.v - t1.v)
				}
				v.fc[0] = r.by(x1, "MIN(1,#1+#2*#3)", a, b, t1)
				fm := len(r.values)
				r.blank(1)
				v.fc[2] = r.by(x2, "MIN(1,#1+#2*#3)", a, b, t2)
				f := s.formed(mean, "IF(#5<1,(#4+#5)/2,IF(#3<=#1,(#4+#5)/2,((#4+1)/2*(#3-#1)+#2-#3)/(#2-#1)))", t1, t2, tc, v.fc[0], v.fc[2])
				r.values[fm] = f
				v.fc[1] = r.ref(fm, r.next, mean)
				bare := steel(s.a, z, shares)
				i0, im, i1 := r.in(bare.Initial), r.in(bare.Mean), r.in(bare.Final)
				way := r.in(underWay)
				if byPractice {
					p0, p1 := s.figure("Practice_new"), s.figure("Practice_per_year")
					grown := func(t float64) float64 { return p0.v + p1.v*max(0, coat.age.v+t) }
					v.i[0] = r.by((c.coated.v*grown(t1.v)+i0.v*c.metal.v)*way.v/1000, "(#1*(#2+#3*MAX(0,#4+#5))+#6*#7)*#8/1000", c.coated, p0, p1, coat.age, t1, i0, c.metal, way)
					v.i[1] = r.by((c.coated.v*grown((t1.v+t2.v)/2)+im.v*c.metal.v)*way.v*c.immersed.v/1000, "(#1*(#2+#3*MAX(0,#4+(#5+#9)/2))+#6*#7)*#8*#10/1000", c.coated, p0, p1, coat.age, t1, im, c.metal, way, t2, c.immersed)
					v.i[2] = r.by((c.coated.v*grown(t2.v)+i1.v*c.metal.v)*way.v/1000, "(#1*(#2+#3*MAX(0,#4+#5))+#6*#7)*#8/1000", c.coated, p0, p1, coat.age, t2, i1, c.metal, way)
				} else {
					current := func(density, fc, share num) num {
						return r.by(density.v*(c.coated.v*fc.v+c.metal.v)*way.v*share.v/1000, "#1*(#2*#3+#4)*#5*#6/1000", density, c.coated, fc, c.metal, way, share)
					}
					one := num{"1", 1}
					v.i[0], v.i[1], v.i[2] = current(i0, v.fc[0], one), current(im, v.fc[1], c.immersed), current(i1, v.fc[2], one)
				}
				r.done()
				stretches[i][k] = append(stretches[i][k], v)
				from = to
			}
		}
	}
	columns = []column{{head: "Zone", most: 34}, {head: "From", format: date}, {head: "To", format: date}}
	triple("Breakdown", four, false)
	triple("Own demand, A", four, false)
	triple("With the zones it holds, A", four, false)
	triple("Times the demand factor, A", four, false)
	columns = append(columns, column{head: "Hours", format: whole}, column{head: "Charge, Ah", format: whole})
	s.block("Demand by interval", "Charge is the mean demand times the factor times the hours.", columns...)
	first := s.next
	for i := range s.a.Zones {
		c := s.cells.calc.zones[i]
		for k, iv := range s.o.Zones[i].Intervals {
			all := stretches[i][k]
			head, tail := all[0], all[len(all)-1]
			var out calcInterval
			r := s.record(s.names[i])
			out.from, out.to = r.on(iv.From), r.on(iv.To)
			weighed := func(of func(served) num, v float64, more string, also num) num {
				return r.by(v, "SUMPRODUCT(#1,#2)/(#4-#3)"+more, cellsFrom(of(head), of(tail)), cellsFrom(head.days, tail.days), out.from, out.to, also)
			}
			fc := iv.Breakdown
			out.breakdown[0] = r.by(fc.Initial, "#1", head.fc[0])
			out.breakdown[1] = weighed(func(v served) num { return v.fc[1] }, fc.Mean, "", num{})
			out.breakdown[2] = r.by(fc.Final, "#1", tail.fc[2])
			out.own[0] = r.by(iv.Demand.Initial, "#1+#2", head.i[0], c.drains)
			out.own[1] = weighed(func(v served) num { return v.i[1] }, iv.Demand.Mean, "+#5", c.drains)
			out.own[2] = r.by(iv.Demand.Final, "#1+#2", tail.i[2], c.drains)
			// The rows of one zone follow those of the zone before it.
			held := s.a.Held(i)
			slices.Sort(held)
			total := [3]float64{iv.Total.Initial, iv.Total.Mean, iv.Total.Final}
			for m := range out.total {
				sum := []num{out.own[m]}
				for _, h := range held {
					sum = append(sum, s.ref(6+m, first+h*n+k, 0))
				}
				out.total[m] = r.by(total[m], "#1", plus(sum))
			}
			for m := range out.need {
				out.need[m] = r.by(out.total[m].v*c.factor.v, "#1*#2", out.total[m], c.factor)
			}
			out.hours = r.by(iv.Hours(), "24*(#2-#1)", out.from, out.to)
			out.charge = r.by(out.need[1].v*out.hours.v, "#1*#2", out.need[1], out.hours)
			r.done()
			s.cells.calc.intervals[i] = append(s.cells.calc.intervals[i], out)
		}
	}
}

// changeAfter returns the first change of a zone's service after d, at most
// end.
func (b *book) changeAfter(z *hull.Zone, d, end hull.Date) hull.Date {
	for _, all := range [][]hull.Service{b.a.Service, z.Service} {
		for _, v := range all {
			if v.From > d {
				end = min(end, v.From)
			}
		}
	}
	return end
}

package survey

import "anodewright/hull"

// Found returns what the readings of one of a zone's sets, of the latest day
// between two dates, found its pieces to have wasted on average, and whether
// any tells. Pieces gone are left out: they are no longer there. A grade counts
// by its middle.
func Found(a *hull.Asset, z *hull.Zone, set int, from, to hull.Date) (wastage float64, ok bool) {
	p, known := a.Pattern(z.Fitted[set].Pattern)
	if !known {
		return 0, false
	}
	for _, day := range days(a, z, set) {
		if d := a.Readings[day[0]].Date; d < from || d > to || d <= a.Start() {
			continue
		}
		sum, n := 0.0, 0
		for _, i := range day {
			s, m := average(p, &a.Readings[i])
			sum, n = sum+s, n+m
		}
		if n > 0 {
			wastage, ok = min(1, sum/float64(n)), true
		}
	}
	return wastage, ok
}

// average sums the wastage of a reading's pieces that are still there.
func average(p *hull.Pattern, r *hull.Reading) (sum float64, n int) {
	add := func(y float64, count int) { sum, n = sum+y*float64(count), n+count }
	for _, y := range r.WeighedWastage {
		add(y, 1)
	}
	for _, y := range r.Percent {
		add(y/100, 1)
	}
	for _, m := range r.Measured {
		if y, err := Wastage(p, m); err == nil {
			add(y, 1)
		}
	}
	if g := r.Grades; g != nil {
		for i, count := range g.Counts {
			add((g.Bounds[i]+min(1, above(g, i)))/2, count)
		}
	}
	add(NotWastedBelow/2, r.NotWasted)
	return sum, n
}

package survey

import (
	"fmt"
	"slices"

	"anodewright/hull"
)

// Question is a doubt about a reading, for the surveyor to settle. The reading
// stands until it is corrected.
type Question struct {
	Reading int // index among the asset's readings
	Text    string
}

// Questions looks for what contradicts itself in an asset's readings: a date
// before fitting or after today, a set that is not fitted, more pieces than
// there are, wastage smaller than last time, sizes that no anode of the
// pattern can have, potentials that no metal of the zone can have, a coating
// that mends itself. A zero today is not looked at.
func Questions(a *hull.Asset, today hull.Date) []Question {
	q := &questioner{a: a, today: today}
	for i := range a.Readings {
		if Stands(&a.Readings[i]) {
			q.dates(i)
			q.set(i)
			q.potentials(i)
			q.coating(i)
		}
	}
	for _, z := range a.Zones {
		for set := range z.Fitted {
			q.visits(&z, set)
		}
	}
	slices.SortStableFunc(q.all, func(x, y Question) int { return x.Reading - y.Reading })
	return q.all
}

type questioner struct {
	a     *hull.Asset
	today hull.Date
	all   []Question
}

func (q *questioner) ask(i int, format string, args ...any) {
	q.all = append(q.all, Question{i, fmt.Sprintf("Reading of %s, zone %s: ", q.a.Readings[i].Date, q.a.Readings[i].Zone) + fmt.Sprintf(format, args...) + "."})
}

// dates: after the fitting and the asset's start, not after today.
func (q *questioner) dates(i int) {
	r := &q.a.Readings[i]
	fitted := r.Fitted
	if z, ok := q.a.Zone(r.Zone); ok && fitted.IsZero() && pieces(r) > 0 {
		if set := Set(z, r); set >= 0 {
			fitted = z.Fitted[set].Fitted
		}
	}
	switch {
	case !q.today.IsZero() && r.Date > q.today:
		q.ask(i, "the date is after today, %s", q.today)
	case !fitted.IsZero() && r.Date < fitted:
		q.ask(i, "the date is before its anodes were fitted, %s", fitted)
	case r.Date < q.a.InService:
		q.ask(i, "the date is before the asset came into service, %s", q.a.InService)
	}
}

// set: the anodes are fitted in the zone, and it is plain which they are.
func (q *questioner) set(i int) {
	r := &q.a.Readings[i]
	z, ok := q.a.Zone(r.Zone)
	if !ok || pieces(r) == 0 || r.Date <= q.a.Start() {
		return
	}
	set := Set(z, r)
	if set < 0 {
		what := "anodes"
		if r.Pattern != "" {
			what += " of pattern " + r.Pattern
		}
		if !r.Fitted.IsZero() {
			what += " fitted on " + r.Fitted.String()
		}
		q.ask(i, "no %s are fitted there; it teaches nothing", what)
		return
	}
	rest := *z
	rest.Fitted = z.Fitted[set+1:]
	if Set(&rest, r) >= 0 {
		f := z.Fitted[set]
		q.ask(i, "the zone has several sets that it may be of; it is taken for the %d pieces of %s fitted on %s", f.Count, f.Pattern, f.Fitted)
	}
}

// visits: the readings of one set, those of one day together, follow each
// other without contradiction.
func (q *questioner) visits(z *hull.Zone, set int) {
	f := z.Fitted[set]
	p, ok := q.a.Pattern(f.Pattern)
	if !ok {
		return
	}
	left, start := f.Count, q.a.Start()
	stated := seen{when: "at the last docking", low: f.Wastage, high: f.Wastage, n: 1}
	var last seen
	for _, day := range days(q.a, z, set) {
		now := seen{when: "on " + q.a.Readings[day[0]].Date.String()}
		counted, leave, i := 0, 0, 0
		for _, i = range day {
			r := &q.a.Readings[i]
			if err := now.add(p, r); err != nil {
				q.ask(i, "%v", err)
			}
			counted += pieces(r)
			leave += r.Gone + r.Fallen
		}
		if q.a.Readings[i].Date > start { // the set is stated as it was then
			if stated.n > 0 {
				last, stated.n = stated, 0
			}
			if counted > left {
				q.ask(i, "it accounts for %d pieces of %s, but %d were fitted%s", counted, p.ID, f.Count, before(f.Count-left))
			}
			left = max(0, left-leave)
		}
		if now.n == 0 {
			continue
		}
		if last.n > 0 && now.high/float64(now.n) < last.low/float64(last.n)-0.005 {
			q.ask(i, "the anodes have wasted less (%s) than %s (%s)", now, last.when, last)
		}
		last = now
	}
}

func before(lost int) string {
	if lost == 0 {
		return ""
	}
	return fmt.Sprintf(" and %d had gone or fallen before", lost)
}

// days returns the readings of a set by their indexes, in the order of time,
// those of one day together.
func days(a *hull.Asset, z *hull.Zone, set int) (all [][]int) {
	var order []int
	for i := range a.Readings {
		if r := &a.Readings[i]; r.Zone == z.ID && Stands(r) && pieces(r) > 0 && Set(z, r) == set {
			order = append(order, i)
		}
	}
	slices.SortStableFunc(order, func(x, y int) int { return int(a.Readings[x].Date) - int(a.Readings[y].Date) })
	for k, i := range order {
		if k > 0 && a.Readings[order[k-1]].Date == a.Readings[i].Date {
			all[len(all)-1] = append(all[len(all)-1], i)
		} else {
			all = append(all, []int{i})
		}
	}
	return all
}

// seen is between what bounds the wastage of the pieces of a set was found,
// summed over the pieces.
type seen struct {
	when      string
	n         int
	low, high float64
}

// add takes in a reading's pieces, those gone left out: they are not there to
// be found again.
func (s *seen) add(p *hull.Pattern, r *hull.Reading) error {
	there := *r
	there.Gone = 0
	o, err := Observe(p, &there)
	for _, y := range o.Values {
		o.add(y, y, 1)
	}
	for _, c := range o.Classes {
		s.n += c.Count
		s.low += c.Above * float64(c.Count)
		s.high += min(c.UpTo, 1) * float64(c.Count)
	}
	return err
}

func (s seen) String() string {
	low, high := 100*s.low/float64(s.n), 100*s.high/float64(s.n)
	if high-low < 0.05 {
		return fmt.Sprintf("%.0f %%", low)
	}
	return fmt.Sprintf("%.0f to %.0f %%", low, high)
}

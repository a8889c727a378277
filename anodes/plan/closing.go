package plan

import (
	"math"
	"slices"

	"anodewright/anodes/renewal"
	"anodewright/anodes/survey"
	"anodewright/hull"
)

// inDock is how many days before the date in dock a reading may be taken and
// still be the docking's own survey, and how many days later than listed that
// survey may be.
const inDock = 30

// DraftClosing returns the closing of a docking ahead as it would be if all
// went as planned, for a person to change what differs. date is the day in
// dock; zero stands for the day listed. Sets that were read in dock have the
// wastage read, the others that of the forecast, marked so.
func (o *Outcome) DraftClosing(docking, date hull.Date) hull.Closing {
	a := o.Asset
	ahead := a.Ahead()
	at := slices.IndexFunc(ahead, func(d hull.Docking) bool { return d.Date == docking })
	if date.IsZero() {
		date = o.surveyed(docking)
	}
	c := hull.Closing{Date: date, Docking: docking}
	if at >= 0 {
		c.Works = slices.Clone(ahead[at].Works)
	}
	c.Expected = o.expected(docking, date, o.beforeSurvey(date))
	likely := o.expected(docking, date, o.learned)
	renewed := o.draftPlan(&c, at)
	known := 0
	for i := range a.Zones {
		z := &a.Zones[i]
		for set, f := range z.Fitted {
			s := hull.ClosingSet{
				Zone: z.ID, Pattern: f.Pattern, Fitted: f.Fitted, Found: survey.Count(a, z, set, date).Live,
				Wastage: likely[known].Median, How: hull.Forecasted,
			}
			if w, ok := survey.Found(a, z, set, date-inDock, date); ok {
				s.Wastage, s.How = w, hull.Surveyed
			}
			if renewed[i] {
				s.Off = s.Found
			}
			known++
			c.Sets = append(c.Sets, s)
		}
	}
	c.Sets, c.Expected = joinSets(c.Sets), joinExpected(c.Expected)
	if len(ahead) == 0 || ahead[len(ahead)-1].Date <= max(date, docking) {
		c.Next = date.AddMonths(30)
		if a.Horizon <= c.Next {
			c.Horizon = c.Next.AddMonths(30)
		}
	}
	return c
}

// surveyed returns the last day on which fitted sets were read in dock, where
// that is later than the docking's day as listed, else the day listed.
func (o *Outcome) surveyed(docking hull.Date) hull.Date {
	end := docking + inDock
	for _, d := range o.Asset.Ahead() {
		if d.Date > docking {
			end = min(end, d.Date-1)
		}
	}
	day := docking
	for i := range o.Asset.Readings {
		r := &o.Asset.Readings[i]
		if r.Date > day && r.Date <= end && survey.Usable(o.Asset, r, o.Today) {
			day = r.Date
		}
	}
	return day
}

// draftPlan writes the plan's lines for the docking into a closing, with what
// is ordered for it and what it costs; it returns which zones are renewed.
func (o *Outcome) draftPlan(c *hull.Closing, docking int) (renewed map[int]bool) {
	renewed = map[int]bool{}
	if docking < 0 {
		return renewed
	}
	a, cost := o.Asset, 0.0
	for _, l := range o.Schedule {
		if l.Docking != docking {
			continue
		}
		p := hull.Planned{Zone: a.Zones[l.Zone].ID, Action: hull.PlannedAction(l.Action), Count: l.Count, Until: l.Until}
		if l.Pattern != nil {
			p.Pattern = l.Pattern.ID
		}
		c.Planned = append(c.Planned, p)
		cost += l.Cost
		if l.Action == renewal.Keep {
			continue
		}
		renewed[l.Zone] = l.Action == renewal.Renew
		c.On = append(c.On, hull.PutOn{Zone: p.Zone, Pattern: p.Pattern, Count: p.Count})
	}
	for _, l := range o.Order {
		if l.Docking == c.Docking && l.Ordered > 0 {
			c.Ordered = append(c.Ordered, hull.Stock{Pattern: l.Pattern.ID, Count: l.Ordered})
		}
	}
	if docking < len(o.Money.Docking) {
		cost += o.Money.Docking[docking]
	}
	cost *= math.Pow(1+a.Costs.DiscountRate, c.Docking.Years(a.Start()))
	cost = math.Round(100*cost) / 100
	spent := cost
	c.PlannedCost, c.Cost = &cost, &spent
	return renewed
}

// beforeSurvey is what the readings taught before the docking's own survey:
// what it found was not known when it was expected.
func (o *Outcome) beforeSurvey(date hull.Date) *learning {
	a := *o.Asset
	a.Readings = slices.DeleteFunc(slices.Clone(a.Readings), func(r hull.Reading) bool { return r.Date >= date-inDock })
	if len(a.Readings) == len(o.Asset.Readings) {
		return o.learned
	}
	before := &Outcome{Asset: &a, Today: o.Today, Intervals: o.Intervals, taught: o.taught, Zones: o.Zones}
	return before.learn()
}

// expected is what the forecast says of every fitted set on a day on which
// the docking is done, in the order of zones and sets, by the demand factor
// that was learned where it is taught, with the pieces that readings before
// the docking's own survey leave.
func (o *Outcome) expected(docking, date hull.Date, learned *learning) []hull.Expectation {
	a := o.Asset
	moved := *a
	moved.Dockings = nil
	for _, d := range a.Ahead() {
		switch {
		case d.Date == docking:
			d.Date = date
			moved.Dockings = append(moved.Dockings, d)
		case d.Date > date:
			moved.Dockings = append(moved.Dockings, d)
		}
	}
	moved.Horizon = max(a.Horizon, date+1)
	until := &Outcome{Asset: &moved, Today: o.Today, Intervals: moved.Intervals(), Zones: o.Zones, taught: o.coated(&moved)}
	dates := map[int][]hull.Date{}
	for i := range a.Zones {
		if len(a.Zones[i].Fitted) > 0 {
			dates[i] = []hull.Date{date}
		}
	}
	h := until.history(dates)
	var all []hull.Expectation
	for i := range a.Zones {
		z, f := &a.Zones[i], o.Before()
		if l := learned.factor(a, i); l != nil {
			f = l.Factor
		}
		for set, s := range z.Fitted {
			e := hull.Expectation{Zone: z.ID, Pattern: s.Pattern, Fitted: s.Fitted, Count: survey.Count(a, z, set, date-inDock-1).Live, Low: s.Wastage, Median: s.Wastage, High: s.Wastage}
			if w := h.predicted(i, set, date); w != nil {
				at := func(theta float64) float64 { return min(1, max(s.Wastage, w(math.Log(theta)))) }
				e.Low, e.Median, e.High = at(f.Low), at(f.Median), at(f.High)
			}
			all = append(all, e)
		}
	}
	return all
}

// joinSets makes one of the lines of sets that a ledger does not tell apart.
func joinSets(sets []hull.ClosingSet) []hull.ClosingSet {
	key := func(s hull.ClosingSet) hull.SetKey {
		return hull.SetKey{Zone: s.Zone, Pattern: s.Pattern, Fitted: s.Fitted}
	}
	return joined(sets, key, func(t *hull.ClosingSet, s hull.ClosingSet) {
		t.Wastage = mixed(t.Found, t.Wastage, s.Found, s.Wastage)
		t.Found, t.Off = t.Found+s.Found, t.Off+s.Off
	})
}

// joinExpected is joinSets for what is expected of them.
func joinExpected(sets []hull.Expectation) []hull.Expectation {
	key := func(s hull.Expectation) hull.SetKey {
		return hull.SetKey{Zone: s.Zone, Pattern: s.Pattern, Fitted: s.Fitted}
	}
	return joined(sets, key, func(t *hull.Expectation, s hull.Expectation) {
		t.Low, t.Median, t.High = mixed(t.Count, t.Low, s.Count, s.Low), mixed(t.Count, t.Median, s.Count, s.Median), mixed(t.Count, t.High, s.Count, s.High)
		t.Count += s.Count
	})
}

// joined puts the lines of one key into the first of them, in their order.
func joined[T any](lines []T, key func(T) hull.SetKey, join func(into *T, line T)) []T {
	var all []T
	for _, line := range lines {
		at := slices.IndexFunc(all, func(t T) bool { return key(t) == key(line) })
		if at < 0 {
			all = append(all, line)
			continue
		}
		join(&all[at], line)
	}
	return all
}

// mixed is the mean wastage of two lots of pieces.
func mixed(n int, x float64, m int, y float64) float64 {
	if n+m == 0 {
		return 0
	}
	return (float64(n)*x + float64(m)*y) / float64(n+m)
}

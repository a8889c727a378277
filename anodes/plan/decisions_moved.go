package plan

import (
	"fmt"
	"math"
	"slices"
	"sort"
	"strings"

	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// confidences are those that the total is told for.
var confidences = []float64{0.5, 0.6, 0.7, 0.8, 0.9, 0.95, 0.99}

// of returns the outcome's choice of sets for a variant of its asset with the
// same zones: the same readings teach the same.
func (d *decider) of(a *hull.Asset) renewal.Problem {
	m := &Outcome{Asset: a, Today: d.o.Today, Intervals: a.Intervals(), Learns: d.o.Learns, learned: d.o.learned, coatings: d.o.coatings, taught: d.o.coated(a)}
	m.factors()
	p := renewal.Problem{Asset: a, Keeps: m.keeps(), Pins: d.problem.Pins, Limits: d.problem.Limits, Quay: d.problem.Quay}
	for i, z := range hull.Demand(m.steel()) {
		p.Demand, p.Factors = append(p.Demand, z.Total), append(p.Factors, m.Zones[i].Factor.Used)
	}
	return p
}

// slip tells what comes of the next docking six months later.
func (d *decider) slip() {
	a := *d.o.Asset
	a.Dockings = slices.Clone(a.Dockings)
	next, ok := d.o.NextDocking()
	k := slices.IndexFunc(a.Dockings, func(e hull.Docking) bool { return e.Date == next.Date })
	if !ok || k < 0 {
		return
	}
	later := next.Date.AddMonths(6)
	a.Dockings[k].Date = later
	what := fmt.Sprintf("next docking six months later (%s)", later)
	if err := hull.Check(&a).Err(); err != nil {
		d.add(Regret, math.NaN(), "%s: it would not lie before the docking after it", what)
		return
	}
	p := d.of(&a)
	p.Pins = slices.Clone(p.Pins)
	for i := range p.Pins {
		if p.Pins[i].Docking == next.Date {
			p.Pins[i].Docking = later
		}
	}
	d.regret(p, what)
}

// horizon tells what comes of the horizon some months later.
func (d *decider) horizon(months int) {
	a := *d.o.Asset
	a.Horizon = a.Horizon.AddMonths(months)
	if hull.Check(&a).Err() != nil {
		return // a docking would lie behind it
	}
	word := "later"
	if months < 0 {
		word = "earlier"
	}
	d.regret(d.of(&a), fmt.Sprintf("horizon %d months %s (%s)", max(months, -months), word, a.Horizon))
}

// regret tells, for an asset whose dates moved, whether the first order would
// be another, and what holding on to the plan's own costs then.
func (d *decider) regret(p renewal.Problem, what string) {
	at := worked(d.o.Schedule)
	if len(at) == 0 {
		return
	}
	first := at[0]
	best := p.Solve()
	if len(best.Best.Unmet) > 0 {
		u := best.Best.Unmet[0]
		d.add(Regret, math.NaN(), "%s: %s could not be held from %s on (%s)", what, d.o.Zones[u.Zone].Zone.Name, u.Date, u.Criterion)
		return
	}
	if math.IsInf(best.Best.Total, 1) {
		d.add(Regret, math.NaN(), "%s: no plan is within the limits", what)
		return
	}
	ordered, wanted := pieces(d.o.Schedule, first), pieces(best.Best.Lines, first)
	if d.same(best.Best.Lines, first) {
		d.add(Regret, 0, "%s: the first order stays %s", what, ordered)
		return
	}
	held := p
	held.Pins = slices.Clone(p.Pins)
	own := len(held.Pins)
	date := p.Asset.Ahead()[first].Date
	for _, l := range d.o.Schedule {
		if l.Docking != first || l.Action == renewal.Keep {
			continue
		}
		pin := renewal.Pin{Zone: d.o.Asset.Zones[l.Zone].ID, Docking: date, Action: l.Action, Pattern: l.Pattern.ID, Count: l.Count}
		i := slices.IndexFunc(held.Pins, func(q renewal.Pin) bool { return q.Zone == pin.Zone && q.Docking == pin.Docking })
		if i >= 0 {
			held.Pins[i] = pin
		} else {
			held.Pins = append(held.Pins, pin)
		}
	}
	r := held.Solve()
	for i, pin := range r.Pins {
		if pin.Refused != "" && (i >= own || pin.Docking == date) {
			zone := slices.IndexFunc(d.o.Asset.Zones, func(z hull.Zone) bool { return z.ID == pin.Zone })
			if zone < 0 {
				continue // a pin of a zone that is gone: the plan itself is made without it
			}
			d.add(Regret, math.NaN(), "%s: the first order would be %s instead of %s, which would no longer do for %s: %s",
				what, wanted, ordered, d.o.Zones[zone].Zone.Name, pin.Refused)
			return
		}
	}
	d.add(Regret, r.Best.Total-best.Best.Total, "%s: the first order would be %s instead of %s", what, wanted, ordered)
}

// same reports whether lines do at a docking ahead what the plan does there.
func (d *decider) same(lines []renewal.Line, docking int) bool {
	acts := func(lines []renewal.Line) (all []string) {
		for _, l := range lines {
			if l.Docking == docking && l.Action != renewal.Keep {
				all = append(all, fmt.Sprint(l.Zone, l.Action, l.Pattern.ID, l.Count))
			}
		}
		return all
	}
	return slices.Equal(acts(lines), acts(d.o.Schedule))
}

// pieces writes what is fitted at a docking ahead, by pattern.
func pieces(lines []renewal.Line, docking int) string {
	count := map[string]int{}
	for _, l := range lines {
		if l.Docking == docking && l.Action != renewal.Keep {
			count[l.Pattern.ID] += l.Count
		}
	}
	var all []string
	for id, n := range count {
		all = append(all, fmt.Sprintf("%d × %s", n, id))
	}
	if len(all) == 0 {
		return "nothing"
	}
	sort.Strings(all)
	return strings.Join(all, " + ")
}

// confidence tells the total at other confidences of the demand factor, for
// all zones and for each alone.
func (d *decider) confidence() {
	at := func(c float64) renewal.Problem {
		a := *d.o.Asset
		a.Basis.Confidence = &c
		return d.of(&a)
	}
	now := d.o.Asset.Basis.ConfidenceLevel()
	var unmet []string // confidences at which one zone cannot be held
	last := -1
	flush := func() {
		if len(unmet) > 0 {
			d.add(Confidence, math.NaN(), "every zone at %s %% confidence: %s could not be held", strings.Join(unmet, ", "), d.o.Zones[last].Zone.Name)
		}
		unmet = nil
	}
	for _, c := range confidences {
		if math.Abs(c-now) < 1e-9 {
			continue
		}
		r := at(c).Solve()
		if len(r.Best.Unmet) == 0 {
			flush()
			d.add(Confidence, d.over(r), "every zone at %.0f %% confidence in place of %.0f %%", 100*c, 100*now)
			continue
		}
		if zone := r.Best.Unmet[0].Zone; zone != last {
			flush()
			last = zone
		}
		unmet = append(unmet, fmt.Sprintf("%.0f", 100*c))
	}
	flush()
	for _, c := range []float64{confidences[0], confidences[len(confidences)-1]} {
		other := at(c)
		for i, z := range d.o.Zones {
			if math.Abs(c-now) < 1e-9 || !own(z.Zone) {
				continue
			}
			// The zone alone, judged and sized by its own factor.
			p := other
			p.Factors = slices.Clone(d.problem.Factors)
			p.Factors[i] = other.Factors[i]
			if p.Keeps != nil {
				p.Keeps = func(t renewal.Trial) bool {
					if t.Zone == i {
						return other.Keeps(t)
					}
					return d.problem.Keeps(t)
				}
			}
			if r := p.Solve(); len(r.Best.Unmet) > 0 {
				d.add(Confidence, math.NaN(), "%s alone at %.0f %% confidence: it could not be held", z.Zone.Name, 100*c)
			} else {
				d.add(Confidence, d.over(r), "%s alone at %.0f %% confidence", z.Zone.Name, 100*c)
			}
		}
	}
}

package plan

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// Decision is what would be different if one thing was decided otherwise, or
// came otherwise, than the plan takes it.
type Decision struct {
	Topic Topic
	Text  string
	// Difference is in money, discounted, over the plan's total; for what may
	// come otherwise, what holding on to the first order then costs over the
	// best plan. It is NaN where there is no figure: Text says why.
	Difference float64
}

// Topic is what a decision is about.
type Topic string

// The topics.
const (
	NextBest   Topic = "next best"
	FewerTimes Topic = "dockings"
	Patterns   Topic = "patterns"
	Regret     Topic = "if it comes otherwise"
	Confidence Topic = "confidence"
	Before     Topic = "before"
)

// nextBest is how much dearer, as a share, a next-best plan may be.
const nextBest = 0.03

// Decisions computes what each decision of a plan is worth, by planning the
// asset again with that decision taken otherwise. It takes many times as long
// as the plan. It is empty where some zone cannot be held or no docking lies
// ahead.
func Decisions(o *Outcome) []Decision {
	if len(o.Unmet) > 0 || len(o.Asset.Ahead()) == 0 {
		return nil
	}
	d := &decider{o: o, problem: o.problem()}
	d.alternatives()
	d.dockings()
	d.patterns()
	d.slip()
	d.horizon(30)
	d.horizon(-30)
	d.confidence()
	d.before()
	return d.all
}

type decider struct {
	o       *Outcome
	problem renewal.Problem
	all     []Decision
}

func (d *decider) add(topic Topic, difference float64, format string, args ...any) {
	if math.IsInf(difference, 0) {
		difference = math.NaN()
	}
	if math.Abs(difference) < 1e-6 {
		difference = 0
	}
	d.all = append(d.all, Decision{topic, fmt.Sprintf(format, args...), difference})
}

// over returns by how much a plan is dearer, +Inf where a zone is unmet.
func (d *decider) over(r renewal.Result) float64 {
	if len(r.Best.Unmet) > 0 {
		return math.Inf(1)
	}
	return r.Best.Total - d.o.Money.Total
}

// alternatives tells the next-best plans within 3 %, docking by docking.
func (d *decider) alternatives() {
	best := renewal.Plan{Lines: d.o.Schedule, Total: d.o.Money.Total}
	for _, a := range d.problem.Alternatives(best, nextBest) {
		does := "do nothing"
		if a.Does.Action != renewal.Keep {
			does = fmt.Sprintf("%s with %s", a.Does.Action, d.name(a.Does.Pattern))
		}
		d.add(NextBest, a.Total-d.o.Money.Total, "%s, %s: %s instead of %s", a.Instead.Date, d.o.Zones[a.Instead.Zone].Zone.Name, does, actionText(a.Instead))
	}
}

func (d *decider) name(pattern string) string {
	if p, ok := d.o.Asset.Pattern(pattern); ok && p.Name != "" {
		return p.Name
	}
	return pattern
}

// actionText writes an action in words: add 14 × Flush slab 45 kg.
func actionText(l renewal.Line) string {
	name := l.Pattern.Name
	if name == "" {
		name = l.Pattern.ID
	}
	return fmt.Sprintf("%s %d × %s", l.Action, l.Count, name)
}

// worked returns the dockings ahead at which lines fit anything.
func worked(lines []renewal.Line) []int {
	var at []int
	for _, l := range lines {
		if l.Action != renewal.Keep {
			at = append(at, l.Docking)
		}
	}
	slices.Sort(at)
	return slices.Compact(at)
}

// dates writes the dates of dockings ahead.
func dates(a *hull.Asset, dockings []int) string {
	var s []string
	for _, k := range dockings {
		s = append(s, a.Ahead()[k].Date.String())
	}
	return strings.Join(s, ", ")
}

// dockings tells what it costs to leave out each docking that is worked at,
// and to work at one docking less, whichever.
func (d *decider) dockings() {
	at := worked(d.o.Schedule)
	for _, k := range at {
		p := d.problem
		p.Closed = []int{k}
		date := d.o.Asset.Ahead()[k].Date
		if over := d.over(p.Solve()); math.IsInf(over, 1) {
			d.add(FewerTimes, over, "%s cannot be left out: no set holds every zone past it", date)
		} else {
			d.add(FewerTimes, over, "no anodes fitted on %s", date)
		}
	}
	if len(at) < 2 {
		return
	}
	p := d.problem
	p.Fewer = len(d.o.Asset.Ahead()) - len(at) + 1
	r := p.Solve()
	if over := d.over(r); math.IsInf(over, 1) {
		d.add(FewerTimes, over, "fewer than %d dockings with work are not possible", len(at))
	} else {
		d.add(FewerTimes, over, "one docking less: work on %s only", dates(d.o.Asset, worked(r.Best.Lines)))
	}
}

// patterns tells what it costs to buy one pattern only, by the cheapest first.
func (d *decider) patterns() {
	used := map[string]bool{}
	for _, l := range d.o.Schedule {
		if l.Action != renewal.Keep {
			used[l.Pattern.ID] = true
		}
	}
	if len(used) < 2 {
		return
	}
	least, pattern := math.Inf(1), ""
	for i := range d.o.Asset.Patterns {
		p := d.problem
		p.Only = d.o.Asset.Patterns[i].ID
		r := p.Solve()
		if over := d.over(r); over < least && standing(r) == standing(renewal.Result{Pins: d.o.Pins}) {
			least, pattern = over, p.Only
		}
	}
	if pattern == "" {
		d.add(Patterns, least, "one pattern only is not possible: none holds every zone")
		return
	}
	d.add(Patterns, least, "one pattern only, %s, in place of %d", d.name(pattern), len(used))
}

// standing counts the pins that stand.
func standing(r renewal.Result) int {
	n := 0
	for _, p := range r.Pins {
		if p.Refused == "" {
			n++
		}
	}
	return n
}

// before tells what was bought last time and how much of it is left.
func (d *decider) before() {
	pieces, mass, gone := 0, 0.0, 0.0
	for _, z := range d.o.Zones {
		for i, g := range z.Intervals[0].Fitted {
			if i >= len(z.Zone.Fitted) {
				break
			}
			m := float64(g.Count) * g.Pattern.NetMass
			pieces, mass, gone = pieces+g.Count, mass+m, gone+m*g.Wastage
		}
	}
	if mass == 0 || math.IsNaN(d.o.Money.RenewAll) {
		return
	}
	d.add(Before, d.o.Money.RenewAll-d.o.Money.Total, "last time %d pieces were fitted, and by the forecast %.0f %% of their mass is left on %s; to renew all at every docking costs so much more than this plan",
		pieces, 100*(1-gone/mass), d.o.Intervals[0].To)
}

package renewal

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"anodewright/anodes"
	"anodewright/hull"
)

// Action is what is done with a zone's anodes.
type Action string

// The actions.
const (
	Keep  Action = "keep"  // the fitted set stays past the first docking
	Renew Action = "renew" // the whole set is replaced
	Add   Action = "add"   // pieces are added to the set that is there
)

// Line is one action of a plan.
type Line struct {
	Docking int // among the dockings ahead, from 0
	Date    hull.Date
	Zone    int // among the asset's zones
	Action  Action
	Pattern *hull.Pattern
	Count   int
	Removed int // pieces taken off
	Governs string
	Need    Need
	Until   hull.Date
	Cost    float64 // discounted: pieces, removal, per_zone
}

// Unmet is a zone that no set can hold from a docking on.
type Unmet struct {
	Zone      int
	Date      hull.Date
	Criterion string
}

// Plan is a set of actions with its cost.
type Plan struct {
	Lines   []Line
	Sets    [][]Set // by zone
	Total   float64 // zones and dockings, discounted
	Docking []float64
	Unmet   []Unmet
}

// Set is one set of anodes over its life, for showing how it wastes.
type Set struct {
	From, To hull.Date // From of a kept set is the last docking
	Kept     bool
	Pattern  *hull.Pattern
	Count    int
	Added    *hull.Pattern
	AddedOn  hull.Date
	AddCount int
}

// Result is the cheapest plan with what stands beside it.
type Result struct {
	Best Plan
	// LowerBound is a proven bound of the total; it equals the total where the
	// plan is proven cheapest. It is NaN where a zone is unmet.
	LowerBound float64
	// Free is the total without pins: the best plan's own where there are none.
	Free float64
	Pins []Pinned
	// Lacks is what the plan that goes over the limits least is over them, where
	// no plan keeps to them.
	Lacks []Lack
	// The two simple rules, NaN where they cannot be followed.
	RenewAll, AsLate float64
}

// Proven reports whether the plan is proven cheapest.
func (r Result) Proven() bool {
	return !math.IsInf(r.Best.Total, 1) && math.Abs(r.Best.Total-r.LowerBound) <= 1e-6*max(1, math.Abs(r.Best.Total))
}

// Solve plans every zone that is held by its own anodes. demand is per zone
// and interval with what the zone holds for others, factors the demand factor
// per zone.
func Solve(a *hull.Asset, demand [][]hull.Current, factors []float64) Result {
	return Problem{Asset: a, Demand: demand, Factors: factors}.Solve()
}

// makePlan writes the sets of every zone as lines with their costs, by
// docking and zone.
func makePlan(a *hull.Asset, zones []*zone, paths [][]stock, p Plan) Plan {
	pieces := make([]int, len(a.Ahead()))
	at := make([][]Line, len(pieces)) // by docking; zones come in their order
	for i, z := range zones {
		for _, l := range z.lines(paths[i]) {
			at[l.Docking] = append(at[l.Docking], l)
			if l.Action != Keep {
				pieces[l.Docking] += l.Count
			}
			p.Total += l.Cost
		}
		if p.Sets != nil {
			for _, s := range paths[i] {
				p.Sets[z.index] = append(p.Sets[z.index], z.show(s))
			}
		}
	}
	p.Lines = slices.Concat(at...)
	p.Docking = make([]float64, len(pieces))
	for k, n := range pieces {
		if n > 0 {
			d := a.Ahead()[k]
			p.Docking[k] = zones[0].worth[k+1] * (sharedCost(d) + DayCost(d, n))
			p.Total += p.Docking[k]
		}
	}
	return p
}

// sharedCost is what a docking costs once as soon as a zone is worked on.
func sharedCost(d hull.Docking) float64 {
	if d.Kind == hull.Campaign {
		return d.FixedCost + d.Mobilisation
	}
	return d.FixedCost
}

// DayCost is a campaign's day rate for the days that fitting n pieces takes,
// rounded up.
func DayCost(d hull.Docking, n int) float64 {
	if d.Kind != hull.Campaign || d.PiecesPerDay <= 0 {
		return 0
	}
	return d.DayRate * roundUp(float64(n)/d.PiecesPerDay)
}

// lines writes a zone's sets as actions.
func (z *zone) lines(sets []stock) []Line {
	var ls []Line
	removed := 0
	at := func(k int, l Line) {
		if k > z.end()-1 {
			return // nothing happens at the horizon
		}
		l.Docking, l.Date, l.Zone = k-1, z.date(k), z.index
		ls = append(ls, l)
	}
	for _, s := range sets {
		first := s.to
		if s.add > 0 {
			first = s.add
		}
		switch {
		case s.kept && first > 1:
			at(1, Line{Action: Keep, Pattern: z.own(z.largestGroup()), Count: z.fittedAt(1).pieces, Until: z.date(s.to)})
		case !s.kept:
			at(s.from, Line{
				Action: Renew, Pattern: z.own(s.piece.p), Count: s.count, Removed: removed, Governs: s.governs, Need: s.need,
				Until: z.date(s.to), Cost: z.worth[s.from] * z.actionCost(s.piece, s.count, removed),
			})
		}
		if s.add > 0 {
			at(s.add, Line{
				Action: Add, Pattern: z.own(s.addPiece.p), Count: s.addCount, Governs: s.addWord, Need: s.addNeed,
				Until: z.date(s.to), Cost: z.worth[s.add] * z.actionCost(s.addPiece, s.addCount, 0),
			})
		}
		removed = s.pieces()
	}
	return ls
}

func (z *zone) actionCost(m *piece, n, removed int) float64 {
	return float64(n)*m.cost + float64(removed)*z.a.Costs.RemovePerPiece + z.a.Costs.PerZone
}

// largestGroup names the fitted set by the pattern of most of its pieces.
func (z *zone) largestGroup() *hull.Pattern {
	var best *group
	for i := range z.fitted {
		if best == nil || z.fitted[i].count > best.count {
			best = &z.fitted[i]
		}
	}
	if best == nil {
		return nil
	}
	return best.p
}

func (z *zone) show(s stock) Set {
	v := Set{From: z.date(s.from), To: z.date(s.to), Kept: s.kept, Count: s.count, Pattern: z.own(s.piece.pattern())}
	if s.kept {
		v.Pattern = z.own(z.largestGroup())
	}
	if s.add > 0 {
		v.Added, v.AddedOn, v.AddCount = z.own(s.addPiece.p), z.date(s.add), s.addCount
	}
	return v
}

// unmet says that no set can hold the zone from boundary i on, the last that
// can be reached, and by which criterion the least demanding pattern fails.
func (z *zone) unmet(i int) Unmet {
	u := Unmet{Zone: z.index, Date: z.date(i), Criterion: z.nothingOffered()}
	if len(z.offered) > 0 {
		u.Criterion = "no pattern may be fitted afloat"
	}
	least := math.MaxInt
	for _, m := range z.offered {
		s, _ := z.newSet(m, i, i+1)
		if !z.mayFit(m, i) || s.count >= least {
			continue
		}
		least = s.count
		u.Criterion = fmt.Sprintf("%s: %d pieces of %s are needed up to %s", s.governs, s.count, m.p.ID, z.date(i+1))
		if z.z.MaxCount != nil {
			u.Criterion += fmt.Sprintf(", at most %d may be fitted", *z.z.MaxCount)
		}
	}
	return u
}

// nothingOffered says why no pattern is offered to the zone.
func (z *zone) nothingOffered() string {
	_, refused := anodes.Offered(z.a, z.z)
	var why []string
	for _, p := range z.a.Patterns {
		if r := refused[p.ID]; r != "" {
			why = append(why, p.ID+": "+r)
		}
	}
	switch {
	case len(why) > 0:
		return "no pattern may be fitted here: " + strings.Join(why, "; ")
	case len(z.z.Patterns) == 0:
		return "no pattern may be fitted here: all are soil rods, which a zone has to list"
	}
	return "no pattern may be fitted here"
}

package renewal

import (
	"fmt"
	"maps"
	"math"
	"slices"

	"anodewright/hull"
)

// Problem is what a plan is made for.
type Problem struct {
	Asset *hull.Asset
	// Demand is per zone and interval, with what the zone holds for others.
	Demand  [][]hull.Current
	Factors []float64 // demand factor per zone
	Keeps   Keeps     // sizes sets by a forecast; nil sizes by the code
	Pins    []Pin

	// Closed are dockings ahead, from 0, at which nothing may be done.
	Closed []int
	// Fewer is how many of the dockings ahead have to be left alone.
	Fewer int
	// Limits hold at every docking. Of plans that cost the same any may be
	// chosen under limits.
	Limits Limits
	// Quay, if not nil, is how many pieces of each pattern lie on the quay at
	// the first docking ahead: nothing else can be fitted there.
	Quay map[string]int
	// Only is the one pattern that may be bought; empty where all may.
	Only string
	// Memo, if not nil, keeps what does not change from plan to plan.
	Memo *Memo
}

// Solve plans every zone that is held by its own anodes. Where the limits
// leave no plan, the total is +Inf; so is the bound, unless the search took
// too long to tell.
func (p Problem) Solve() Result {
	nan := math.NaN()
	r := Result{LowerBound: nan, RenewAll: nan, AsLate: nan, Best: Plan{Sets: make([][]Set, len(p.Asset.Zones))}}
	for _, pin := range p.Pins {
		r.Pins = append(r.Pins, Pinned{Pin: pin, Cost: nan})
	}
	if len(p.Asset.Ahead()) == 0 {
		for i := range r.Pins {
			_, _, r.Pins[i].Refused = r.Pins[i].place(p.Asset)
		}
		return r
	}
	s := newSolver(p)
	ways, unmet := s.prepare(s.place(r.Pins))
	r.Best.Unmet = unmet
	for i := range r.Pins {
		r.Pins[i].Refused = s.refused[i]
	}
	paths, bound := s.cheapest(ways, math.Inf(1))
	if paths == nil {
		r.Best.Total, r.LowerBound, r.Free = math.Inf(1), bound, math.Inf(1)
		if math.IsInf(bound, 1) {
			r.Lacks = s.lacks(ways)
		}
		return r
	}
	var zones []*zone
	for _, o := range ways {
		zones = append(zones, o.z)
	}
	r.Best = makePlan(p.Asset, zones, paths, r.Best)
	r.Free = r.Best.Total
	s.price(&r)
	if len(r.Best.Unmet) > 0 {
		return r
	}
	r.LowerBound = bound
	if all, ok := renewAll(zones); ok {
		r.RenewAll = makePlan(p.Asset, zones, all, Plan{}).Total
	}
	if late, ok := asLate(zones); ok {
		r.AsLate = makePlan(p.Asset, zones, late, Plan{}).Total
	}
	return r
}

// solver makes plans of one problem with and without its pins. It lists the
// ways of a zone once for the same pins.
type solver struct {
	Problem
	zones   []*zone // nil where other means hold the zone
	refused []string
	known   map[string]options
}

func newSolver(p Problem) *solver {
	s := &solver{Problem: p, refused: make([]string, len(p.Pins)), known: map[string]options{}}
	pieces := map[pieceKey]*piece{}
	memo, common := p.Memo != nil && p.Keeps == nil, ""
	if memo {
		p.Memo.begin()
		common = p.common()
	}
	for i := range p.Asset.Zones {
		if _, own := p.Asset.Zones[i].Hold().(hull.ByAnodes); !own {
			s.zones = append(s.zones, nil)
			continue
		}
		key := ""
		if memo {
			key = p.key(common, i)
			if r := p.Memo.get(key); r != nil {
				s.zones = append(s.zones, r.again(p.Asset, i).z)
				continue
			}
		}
		z := newZoneOf(p.Asset, i, p.Demand[i], p.Factors[i], pieces)
		z.key = key
		z.keeps, z.limits, z.quay = p.Keeps, p.Limits, p.Quay != nil
		if p.Only != "" {
			z.offered = slices.DeleteFunc(z.offered, func(m *piece) bool { return m.p.ID != p.Only })
		}
		z.known = z.fittedSets()
		s.zones = append(s.zones, z)
	}
	return s
}

// place finds the pins and refuses those that have no place or one that is
// taken: by zone and boundary, the index of the pin.
func (s *solver) place(pins []Pinned) []map[int]int {
	at := make([]map[int]int, len(s.zones))
	for n, p := range pins {
		zone, b, why := p.place(s.Asset)
		if why != "" {
			s.refused[n] = why
			continue
		}
		if at[zone] == nil {
			at[zone] = map[int]int{}
		}
		if _, taken := at[zone][b]; taken {
			s.refused[n] = "another pin says what is done there"
			continue
		}
		at[zone][b] = n
	}
	return at
}

// prepare lists the ways of every zone that its own anodes can hold up to the
// horizon under the pins, and the zones that none can hold even without.
func (s *solver) prepare(at []map[int]int) (ways []options, unmet []Unmet) {
	for i, z := range s.zones {
		if z == nil {
			continue
		}
		o, refused := s.ways(z, at[i])
		for b, why := range refused {
			s.refused[at[i][b]] = why
		}
		if last := o.reach(); last < z.end() {
			for _, n := range at[i] {
				s.refused[n] = "no set can hold the zone, whatever is pinned"
			}
			unmet = append(unmet, z.unmet(last))
			continue
		}
		ways = append(ways, o)
	}
	return ways, unmet
}

// ways lists the ways of a zone under some of the pins.
func (s *solver) ways(z *zone, at map[int]int) (options, map[int]string) {
	if len(at) == 0 && z.remembered != nil {
		return z.remembered.options, nil
	}
	key := fmt.Sprint(z.index, at) // maps print in the order of their keys
	if o, ok := s.known[key]; ok {
		return o, nil
	}
	pins := map[int]Pin{}
	for b, n := range at {
		pins[b] = s.Pins[n]
	}
	o, refused := z.pinnedSpans(pins)
	if len(refused) == 0 {
		s.known[key] = o
	}
	if len(at) == 0 && z.key != "" {
		r := z.remember(o)
		s.Memo.put(z.key, r)
		z.remembered = r
	}
	return o, refused
}

func (s *solver) cheapest(ways []options, limit float64) ([][]stock, float64) {
	var closed []int
	for _, k := range s.Closed {
		closed = append(closed, k+1)
	}
	return cheapest(s.Asset, ways, len(s.Asset.Ahead())-s.Fewer, closed, limit, s.Limits, s.Quay)
}

// price finds what the pins that stand cost: each alone, and all together.
func (s *solver) price(r *Result) {
	stand := make([]map[int]int, len(s.zones))
	for n, p := range r.Pins {
		if p.Refused != "" {
			continue
		}
		zone, b, _ := p.place(s.Asset)
		if stand[zone] == nil {
			stand[zone] = map[int]int{}
		}
		stand[zone][b] = n
	}
	for _, pins := range stand {
		for b, n := range maps.Clone(pins) {
			delete(pins, b)
			r.Pins[n].Cost = r.Best.Total - s.total(stand, math.Inf(1))
			pins[b] = n
		}
	}
	for zone := range stand {
		if stand[zone] != nil {
			r.Free = s.total(make([]map[int]int, len(s.zones)), math.Inf(1))
			return
		}
	}
}

// total returns the cost of the cheapest plan under some of the pins that
// stand, +Inf where there is none up to the limit.
func (s *solver) total(at []map[int]int, limit float64) float64 {
	ways, _ := s.prepare(at)
	paths, _ := s.cheapest(ways, limit)
	if paths == nil {
		return math.Inf(1)
	}
	var zones []*zone
	for _, o := range ways {
		zones = append(zones, o.z)
	}
	return makePlan(s.Asset, zones, paths, Plan{}).Total
}

package renewal

import "math"

// Lack is what a plan asks for beyond a limit at a docking.
type Lack struct {
	// Zone is that which asks for more, among the asset's zones; for a limit
	// that several share, that which takes most of it.
	Zone      int
	Docking   int // among the dockings ahead, from 0
	Criterion Criterion
	Pattern   string  // on the quay
	Pieces    int     // above what lies on the quay, or may be fitted
	Patterns  int     // above what may be ordered
	Money     float64 // above the budget
}

// Criterion is what is limited.
type Criterion string

// The limits.
const (
	OnQuay     Criterion = "quay"
	OfPieces   Criterion = "pieces"
	OfBudget   Criterion = "budget"
	OfPatterns Criterion = "patterns"
)

// dearLack is what a lack costs, in dearest plans, while the least is sought.
const dearLack = 10

// lacks finds the plan that goes over the limits least, by pieces that are not
// on the quay, patterns, and shares of the limits on pieces and money, and
// lists what it lacks.
func (s *solver) lacks(ways []options) []Lack {
	if len(ways) == 0 {
		return nil
	}
	m := newLimiter(s.Asset, ways[0].z, s.Limits, s.Quay)
	open := make([]bool, len(m.ahead)+1)
	for k := range open {
		open[k] = true
	}
	for _, k := range s.Closed {
		open[k+1] = false
	}
	m.over = dearLack * (1 + newRelaxed(m, ways, open, len(m.ahead)-s.Fewer).highest)
	paths, _ := newRelaxed(m, ways, open, len(m.ahead)-s.Fewer).search(math.Inf(1))
	if paths == nil {
		return nil
	}
	return m.exceeded(ways, paths)
}

// exceeded lists where a plan is over the limits.
func (m *limiter) exceeded(zones []options, paths [][]stock) (all []Lack) {
	u := m.nothing()
	per := make([]*uses, len(zones))
	for i := range zones {
		per[i] = m.nothing()
		for _, s := range paths[i] {
			u.add(m.acts(zones[i].z, s))
			per[i].add(m.acts(zones[i].z, s))
		}
	}
	most := func(of func(*uses) float64) int {
		best, zone := -1.0, 0
		for i := range zones {
			if x := of(per[i]); x > best {
				best, zone = x, zones[i].z.index
			}
		}
		return zone
	}
	for k, n := range u.pieces {
		if n == 0 {
			continue
		}
		if k == 0 && m.quay != nil {
			all = append(all, m.offQuay(zones, per)...)
		}
		if m.Pieces > 0 && n > m.Pieces {
			zone := most(func(z *uses) float64 { return float64(z.pieces[k]) })
			all = append(all, Lack{Zone: zone, Docking: k, Criterion: OfPieces, Pieces: n - m.Pieces})
		}
		if spent := u.spent[k] + sharedCost(m.ahead[k]) + DayCost(m.ahead[k], n); m.Budget > 0 && !covers(m.Budget, spent) {
			zone := most(func(z *uses) float64 { return z.spent[k] })
			all = append(all, Lack{Zone: zone, Docking: k, Criterion: OfBudget, Money: spent - m.Budget})
		}
		if p := u.patterns(k); m.Patterns > 0 && p > m.Patterns {
			zone := most(func(z *uses) float64 { return float64(z.patterns(k)) })
			all = append(all, Lack{Zone: zone, Docking: k, Criterion: OfPatterns, Patterns: p - m.Patterns})
		}
	}
	return all
}

// offQuay lists what is not on the quay; zones are served in their order.
func (m *limiter) offQuay(zones []options, per []*uses) (all []Lack) {
	names := make([]string, len(m.index))
	for id, p := range m.index {
		names[p] = id
	}
	left := append([]int(nil), m.quay...)
	for i := range zones {
		for p, n := range per[i].of[0] {
			if n == 0 {
				continue
			}
			left[p] -= n
			if missing := min(n, -left[p]); missing > 0 {
				all = append(all, Lack{Zone: zones[i].z.index, Criterion: OnQuay, Pattern: names[p], Pieces: missing})
			}
		}
	}
	return all
}

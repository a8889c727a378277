package renewal

import (
	"math"
	"slices"

	"anodewright/hull"
)

// mostSteps bounds the work of the search for whole days.
const mostSteps = 5_000_000

// days finds the cheapest plan where campaigns are paid by whole days. The
// spans carry a piece's share of a day, so a plan's true cost is the cost of
// its spans and, for every campaign, the part of its last day that is left
// over. That part depends on the pieces fitted modulo those of a row of whole
// days only: the campaign's period. The search goes through the zones and,
// within a zone, from boundary to boundary, and keeps the cheapest way to
// every combination of remainders.
type days struct {
	campaigns []campaign
	steps     int
}

// campaign is a docking paid by days.
type campaign struct {
	boundary int
	perDay   float64
	rate     float64 // of a day, discounted
	period   int     // pieces
	weight   int     // of the remainder in a key
}

// newDays returns the campaigns among the dockings ahead. It is nil where no
// days are paid, or where there are more combinations of remainders than can
// be numbered.
func newDays(a *hull.Asset, zones []options) *days {
	d := new(days)
	weight := 1
	for k, docking := range a.Ahead() {
		if len(zones) == 0 || zones[0].z.dayRate(k+1) == 0 {
			continue
		}
		c := campaign{
			boundary: k + 1,
			perDay:   docking.PiecesPerDay,
			rate:     zones[0].z.worth[k+1] * docking.DayRate,
			period:   period(docking.PiecesPerDay),
			weight:   weight,
		}
		if weight > math.MaxInt/c.period {
			return nil
		}
		weight *= c.period
		d.campaigns = append(d.campaigns, c)
	}
	if len(d.campaigns) == 0 {
		return nil
	}
	return d
}

// period returns the least number of pieces that takes whole days, or more
// than are ever fitted where there is none.
func period(perDay float64) int {
	for n := 1.0; n <= 1000; n++ {
		if p := math.Round(n * perDay); p > 0 && math.Abs(n*perDay-p) < slack*p {
			return int(p)
		}
	}
	return 1 << 20
}

// leftOver returns the cost of the unused parts of the last days.
func (d *days) leftOver(key int) float64 {
	cost := 0.0
	for _, c := range d.campaigns {
		used := float64(key/c.weight%c.period) / c.perDay
		cost += c.rate * (roundUp(used) - used)
	}
	return cost
}

// after returns the key after a span.
func (d *days) after(key int, s *span) int {
	for _, c := range d.campaigns {
		n := 0
		if !s.kept && s.from == c.boundary {
			n += s.count
		}
		if s.add == c.boundary {
			n += s.addCount
		}
		if n > 0 {
			old := key / c.weight % c.period
			key += ((old+n)%c.period - old) * c.weight
		}
	}
	return key
}

// way is the cheapest way found to a boundary of a zone with one key.
type way struct {
	key  int
	cost float64
	zone int
	span *span
	prev *way
}

// betters reports whether w is the better way to the same place.
func (w *way) betters(v *way, end int) bool {
	if math.Abs(w.cost-v.cost) > tie {
		return w.cost < v.cost
	}
	return before(w.sets(), v.sets(), end)
}

// sets returns the way's sets in its last zone.
func (w *way) sets() []stock {
	var sets []stock
	for k := w.zone; w.prev != nil && w.zone == k; w = w.prev {
		sets = append(sets, w.span.stock)
	}
	slices.Reverse(sets)
	return sets
}

// front holds the ways to one boundary in the order in which they were found.
type front struct {
	ways  []*way
	index map[int]int // key -> place in ways
}

func (f *front) add(w *way, end int) {
	i, ok := f.index[w.key]
	switch {
	case !ok:
		if f.index == nil {
			f.index = map[int]int{}
		}
		f.index[w.key] = len(f.ways)
		f.ways = append(f.ways, w)
	case w.betters(f.ways[i], end):
		f.ways[i] = w
	}
}

// least returns the least cost of the zones on the open dockings with whole
// days, without shared costs, and the zones' sets. It is +Inf where nothing
// costs at most limit or the search takes too long.
func (d *days) least(zones []options, open []bool, limit float64) (float64, [][]stock) {
	values := make([][]float64, len(zones))
	rest := 0.0 // of the zones still to come
	for k := range zones {
		values[k], _ = zones[k].values(open)
		rest += values[k][0]
	}
	from := front{ways: []*way{{}}}
	for k := range zones {
		rest -= values[k][0]
		end := zones[k].z.end()
		fronts := make([]front, end+1)
		fronts[0] = from
		for i := range end {
			for _, w := range fronts[i].ways {
				spans := zones[k].at(i)
				for n := range spans {
					s := &spans[n]
					cost := w.cost + s.cost
					if !s.uses(open, end) || cost+values[k][s.to]+rest > limit+tie {
						continue
					}
					if d.steps++; d.steps > mostSteps {
						return math.Inf(1), nil
					}
					fronts[s.to].add(&way{key: d.after(w.key, s), cost: cost, zone: k, span: s, prev: w}, end)
				}
			}
		}
		from = front{ways: fronts[end].ways}
	}
	least := math.Inf(1)
	var best *way
	for _, w := range from.ways {
		if c := w.cost + d.leftOver(w.key); c < least-tie {
			least, best = c, w
		}
	}
	paths := make([][]stock, len(zones))
	for best != nil && best.prev != nil {
		k := best.zone
		paths[k] = best.sets()
		for best.prev != nil && best.zone == k {
			best = best.prev
		}
	}
	return least, paths
}

// wholeDays searches again with days paid whole, starting from the plan found
// with parts of days and from the best one at the same dockings. Where that takes too long, the best plan so far has only
// the first search's bound. whole is a search like the first, not yet begun.
func (s *search) wholeDays(d *days, paths [][]stock, whole *search) ([][]stock, float64) {
	whole.days, whole.paths = d, paths
	whole.best = s.best + d.leftOver(d.keyOf(paths))
	shared := s.shared(s.chosen)
	if c, better := d.least(s.options, s.chosen, whole.best-shared); c+shared < whole.best {
		whole.best, whole.paths = c+shared, better
	}
	whole.run()
	if d.steps > mostSteps {
		return whole.paths, s.best
	}
	return whole.paths, whole.best
}

// keyOf returns the remainders of a plan.
func (d *days) keyOf(paths [][]stock) int {
	key := 0
	for _, p := range paths {
		for _, s := range p {
			key = d.after(key, &span{stock: s})
		}
	}
	return key
}

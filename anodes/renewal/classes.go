package renewal

import (
	"encoding/binary"
	"math"
)

// class is zones whose ways are equal, so that only how many of them take a
// way matters. Its arcs are the ways of going from boundary to boundary.
type class struct {
	zones   []int // among the options
	end     int
	arcs    []arc
	first   []int // of the arcs that leave a boundary, and their number
	gone    []bool
	removal float64   // that the dearest removal costs
	price   []float64 // of the arcs, by the rows' prices
	value   []float64 // least price from a boundary on
	best    []int     // the arc with which it begins
}

// arc is one span of a class.
type arc struct {
	from, to, n int     // n among the spans of its boundary
	cost        float64 // without shares of days
	acts        [3]act
	at          []entry // in the fixed rows
}

// acting returns the pieces that the arc fits at a boundary.
func (a *arc) acting(boundary int) int {
	n := 0
	for _, t := range a.acts[:2] {
		if t.boundary == boundary {
			n += t.pieces
		}
	}
	return n
}

// classes gathers equal zones. Ways that work on a closed docking are left
// out.
func (m *limiter) classes(zones []options, open []bool) []*class {
	var all []*class
	known := map[string]*class{}
	for i := range zones {
		c := &class{end: zones[i].end}
		var key []byte
		for b := range c.end {
			c.first = append(c.first, len(c.arcs))
			spans := zones[i].at(b)
			for n := range spans {
				s := &spans[n]
				if b > 0 && !open[b] || !s.uses(open, c.end) {
					continue
				}
				t := arc{from: b, to: s.to, n: n, cost: s.cost - s.days, acts: m.acts(zones[i].z, s.stock)}
				c.arcs = append(c.arcs, t)
				c.removal = max(c.removal, t.acts[2].spent)
				key = binary.AppendVarint(binary.AppendVarint(key, int64(b)), int64(s.to))
				key = binary.BigEndian.AppendUint64(key, math.Float64bits(t.cost))
				for _, a := range t.acts {
					key = binary.AppendVarint(binary.AppendVarint(binary.AppendVarint(key, int64(a.boundary)), int64(a.pieces)), int64(a.pattern))
					key = binary.BigEndian.AppendUint64(key, math.Float64bits(a.spent))
				}
			}
		}
		c.first = append(c.first, len(c.arcs))
		if same, ok := known[string(key)]; ok {
			same.zones = append(same.zones, i)
			continue
		}
		c.zones = []int{i}
		c.gone, c.price = make([]bool, len(c.arcs)), make([]float64, len(c.arcs))
		c.value, c.best = make([]float64, c.end+1), make([]int, c.end)
		known[string(key)] = c
		all = append(all, c)
	}
	return all
}

// cheapest finds the least price from every boundary to the horizon. use says
// which arcs may be taken; nil: all.
func (c *class) cheapest(use func(*arc) bool) float64 {
	c.value[c.end] = 0
	for b := c.end - 1; b >= 0; b-- {
		c.value[b], c.best[b] = math.Inf(1), -1
		for n := c.first[b]; n < c.first[b+1]; n++ {
			if c.gone[n] {
				continue
			}
			if v := c.price[n] + c.value[c.arcs[n].to]; v < c.value[b] && (use == nil || use(&c.arcs[n])) {
				c.value[b], c.best[b] = v, n
			}
		}
	}
	return c.value[0]
}

// path returns the arcs of the least price.
func (c *class) path() []int {
	var path []int
	for b := 0; b < c.end; b = c.arcs[c.best[b]].to {
		path = append(path, c.best[b])
	}
	return path
}

// dropDear drops arcs without which no plan can be within slack of the bound:
// each lies on no way that costs at most slack more than the cheapest.
func (c *class) dropDear(slack float64) {
	least := c.cheapest(nil)
	to := make([]float64, c.end+1) // least price up to a boundary
	for b := range to {
		to[b] = math.Inf(1)
	}
	to[0] = 0
	for b := range c.end {
		for n := c.first[b]; n < c.first[b+1]; n++ {
			if t := &c.arcs[n]; !c.gone[n] {
				to[t.to] = min(to[t.to], to[b]+c.price[n])
			}
		}
	}
	for n := range c.arcs {
		t := &c.arcs[n]
		if to[t.from]+c.price[n]+c.value[t.to] > least+slack {
			c.gone[n] = true
		}
	}
}

// dearest returns what the dearest way costs.
func (c *class) dearest() float64 {
	most := make([]float64, c.end+1)
	for b := c.end - 1; b >= 0; b-- {
		for n := c.first[b]; n < c.first[b+1]; n++ {
			most[b] = max(most[b], c.arcs[n].cost+most[c.arcs[n].to])
		}
	}
	return most[0]
}

// spends returns the most that can be spent on a zone at a boundary.
func (c *class) spends(boundary int) float64 {
	acting, removing := 0.0, 0.0
	for n := range c.arcs {
		for i, a := range c.arcs[n].acts {
			switch {
			case a.boundary != boundary:
			case i == 2:
				removing = max(removing, a.spent)
			default:
				acting = max(acting, a.spent)
			}
		}
	}
	return acting + removing
}

// compact forgets the arcs that are dropped. No way may yet be made of them.
func (c *class) compact() {
	var kept []arc
	first := make([]int, 0, len(c.first))
	for b := range c.end {
		first = append(first, len(kept))
		for n := c.first[b]; n < c.first[b+1]; n++ {
			if !c.gone[n] {
				kept = append(kept, c.arcs[n])
			}
		}
	}
	c.arcs, c.first = kept, append(first, len(kept))
	c.gone, c.price = make([]bool, len(kept)), make([]float64, len(kept))
}

package renewal

import (
	"container/heap"
	"math"
	"math/rand/v2"
	"slices"
)

// mostWork bounds the search within limits, in multiplications: some seconds.
const mostWork = 2_000_000_000

// node is a part of the choice that is still open.
type node struct {
	extras []extra
	basis  []int
	bound  float64
	gone   [][]bool // arcs, by class, that no plan worth having takes here
}

type nodes []*node

func (n nodes) Len() int           { return len(n) }
func (n nodes) Less(i, j int) bool { return n[i].bound < n[j].bound }
func (n nodes) Swap(i, j int)      { n[i], n[j] = n[j], n[i] }
func (n *nodes) Push(x any)        { *n = append(*n, x.(*node)) }
func (n *nodes) Pop() any {
	last := (*n)[len(*n)-1]
	*n = (*n)[:len(*n)-1]
	return last
}

// bounded searches for the cheapest plan within limits, by parting the choice
// wherever the relaxed one is not whole, and following first the part that
// the relaxed choice is nearer to.
type bounded struct {
	*relaxed
	best  float64 // no dearer plan is wanted
	paths [][]stock
	open  nodes
	lost  float64 // least bound of what had to be given up
	rand  *rand.Rand
	tried int
}

// search returns the zones' sets and a bound that no plan is below; no sets
// where no plan costs at most limit, or none was found: the bound then says
// which, +Inf the former.
func (r *relaxed) search(limit float64) ([][]stock, float64) {
	s := &bounded{relaxed: r, best: min(limit, r.highest+1), lost: math.Inf(1), rand: rand.New(rand.NewPCG(1, 2))}
	s.best += 2*tie + 2e-9*math.Abs(s.best)
	for _, c := range r.classes {
		clear(c.price)
		if math.IsInf(c.cheapest(nil), 1) {
			return nil, math.Inf(1)
		}
	}
	s.begin()
	s.open = nodes{{bound: math.Inf(-1)}}
	for len(s.open) > 0 && s.work < mostWork {
		n := heap.Pop(&s.open).(*node)
		if n.bound < s.enough() {
			s.dive(n)
		}
	}
	bound := s.lost
	for _, n := range s.open {
		bound = min(bound, n.bound)
	}
	switch {
	case bound < s.enough():
		return s.paths, bound
	case s.paths == nil:
		return nil, math.Inf(1)
	}
	return s.paths, s.best
}

// begin looks for a first plan and drops what no plan as cheap can have, were
// dockings free.
func (s *bounded) begin() {
	free := s.price(make([]float64, len(s.rows)), nil)
	for range 20 {
		s.greedy(nil)
	}
	for _, c := range s.classes {
		c.dropDear(s.best - free + tie)
		c.compact()
	}
}

// enough is the bound from which on a part holds no plan worth having.
func (s *bounded) enough() float64 { return s.best - tie - 1e-9*math.Abs(s.best) }

// dive solves a node and goes on with the nearer of its parts, down to one
// that is whole or too dear.
func (s *bounded) dive(n *node) {
	root := len(n.extras) == 0 && n.basis == nil
	for i, gone := range n.gone {
		s.classes[i].gone = gone
	}
	p := s.program(n.extras, n.basis)
	bound := n.bound
	for {
		bound = max(bound, s.solve(p, n))
		s.work += p.work
		p.work = 0
		if bound >= s.enough() {
			return
		}
		v := p.values()
		flows := s.flows(v)
		if links := s.links(v, flows, n.extras); len(links) > 0 && s.work < mostWork {
			for _, x := range links {
				s.addRow(p, n, x)
			}
			continue
		}
		if allWhole(flows) {
			s.take(s.assign(flows))
		}
		tries := 1
		if root {
			tries = 30
		} else if s.tried++; s.tried%8 != 0 {
			tries = 0
		}
		for range tries {
			s.greedy(v)
		}
		s.drop(p, n)
		root = false
		if bound >= s.enough() {
			return
		}
		down, up, nearer := s.part(v, flows)
		if down == nil || s.work >= mostWork {
			s.lost = min(s.lost, bound)
			return
		}
		if nearer {
			down, up = up, down
		}
		heap.Push(&s.open, &node{
			extras: append(slices.Clip(n.extras), *up),
			basis:  append(slices.Clone(p.basis), missOf(len(p.rhs))),
			bound:  bound,
			gone:   n.gone,
		})
		n = &node{extras: n.extras, gone: n.gone}
		s.addRow(p, n, *down)
	}
}

// drop drops the arcs that no plan in a node can take and be worth having.
func (s *bounded) drop(p *program, n *node) {
	slack := s.best - s.price(p.dual, n.extras)
	gone := make([][]bool, len(s.classes))
	for i, c := range s.classes {
		gone[i] = slices.Clone(c.gone)
		c.gone = gone[i]
		c.dropDear(slack + tie)
		s.work += 2 * len(c.arcs)
	}
	n.gone = gone
}

// addRow adds a row to a program and its node.
func (s *bounded) addRow(p *program, n *node, x extra) {
	p.addRow(x.rhs, false, func(col int) float64 { return s.coef(&x, col) })
	n.extras = append(slices.Clip(n.extras), x)
}

// solve solves a program, finding ways as long as there are any that lower
// its cost, and returns the best bound met.
func (s *bounded) solve(p *program, n *node) float64 {
	eps := 1e-12*s.highest + 1e-10
	bound := math.Inf(-1)
	for s.work+p.work < mostWork {
		p.solve(eps)
		bound = max(bound, s.price(p.dual, n.extras))
		cost, _ := p.cost()
		if bound >= s.enough() || bound >= cost-1e-10*math.Abs(cost) {
			return bound
		}
		before := len(s.ways)
		for k, c := range s.classes {
			if c.value[0] < p.dual[k]-eps {
				s.way(k)
			}
		}
		if len(s.ways) == before {
			return bound
		}
		for j := before; j < len(s.ways); j++ {
			p.addColumn(s.entries(len(s.fixed)+j, n.extras))
		}
	}
	return bound
}

// flows returns how many zones of every class take each arc.
func (s *bounded) flows(v []float64) [][]float64 {
	flows := make([][]float64, len(s.classes))
	for i, c := range s.classes {
		flows[i] = make([]float64, len(c.arcs))
	}
	for j, w := range s.ways {
		if j += len(s.fixed); j < len(v) && v[j] > 0 {
			for _, n := range w.arcs {
				flows[w.class][n] += v[j]
			}
		}
	}
	return flows
}

// active lists the arcs of every class that are taken at all.
func active(flows [][]float64) [][]int {
	all := make([][]int, len(flows))
	for n, f := range flows {
		for i, x := range f {
			if x > 1e-9 {
				all[n] = append(all[n], i)
			}
		}
	}
	return all
}

// frac is how far a number is from the nearest whole one.
func frac(x float64) float64 { return math.Abs(x - math.Round(x)) }

// near is how far from whole a number may be and count as whole.
const near = 1e-6

func allWhole(flows [][]float64) bool {
	for _, f := range flows {
		for _, x := range f {
			if frac(x) > near {
				return false
			}
		}
	}
	return true
}

// links returns rows that the relaxed choice violates: no zone works at a
// docking that is not opened, or fits a pattern that is not ordered there.
func (s *bounded) links(v []float64, flows [][]float64, extras []extra) (links []extra) {
	active := active(flows)
	link := func(n, col, most int, uses func(*arc) bool) {
		c, sum := s.classes[n], 0.0
		for _, i := range active[n] {
			if uses(&c.arcs[i]) {
				sum += flows[n][i]
			}
		}
		if sum <= float64(most)*v[col]+1e-4 {
			return
		}
		x := extra{class: n, coef: make([]float64, len(c.arcs)), fixed: []entry{{col, -float64(most)}}}
		for i := range c.arcs {
			if uses(&c.arcs[i]) {
				x.coef[i] = 1
			}
		}
		links = append(links, x)
	}
	for k := range s.ahead {
		for n, c := range s.classes {
			if y := s.docking[k]; y >= 0 && v[y] < 1-near {
				link(n, y, len(c.zones), func(t *arc) bool { return t.acting(k+1) > 0 })
			}
			for p, w := range s.pattern[k] {
				if w >= 0 && v[w] < 1-near {
					link(n, w, len(c.zones), func(t *arc) bool {
						return t.acts[0].boundary == k+1 && t.acts[0].pattern == p || t.acts[1].boundary == k+1 && t.acts[1].pattern == p
					})
				}
			}
		}
	}
	return links
}

// part parts what is open in two where the choice is not whole: at most so
// many, or at least one more; nearer says that the choice is nearer to the
// latter. It is nil where all is whole.
func (s *bounded) part(v []float64, flows [][]float64) (down, up *extra, nearer bool) {
	pick, most := -1, near
	try := func(cols ...int) {
		for _, j := range cols {
			if j >= 0 && frac(v[j]) > most {
				pick, most = j, frac(v[j])
			}
		}
	}
	try(s.docking...)
	if pick < 0 {
		for _, of := range s.pattern {
			try(of...)
		}
	}
	if pick < 0 {
		try(s.days...)
	}
	if pick >= 0 {
		floor := math.Floor(v[pick])
		return &extra{class: -1, fixed: []entry{{pick, 1}}, rhs: floor}, &extra{class: -1, fixed: []entry{{pick, -1}}, rhs: -floor - 1}, v[pick]-floor > 0.3
	}
	// How many zones of a class act at a docking, with a pattern, by an arc.
	class, uses, sum := -1, func(int) bool { return false }, 0.0
	score := 0.0
	active := active(flows)
	count := func(n int, use func(int) bool) {
		c, x, weight := s.classes[n], 0.0, 1.0
		for _, i := range active[n] {
			if use(i) {
				x += flows[n][i]
				weight = max(weight, float64(c.arcs[i].acts[0].pieces+c.arcs[i].acts[1].pieces))
			}
		}
		if f := frac(x); f > near && f*weight > score {
			class, uses, sum, score = n, use, x, f*weight
		}
	}
	for n := range s.classes {
		for k := range s.ahead {
			count(n, func(i int) bool { return s.classes[n].arcs[i].acting(k+1) > 0 })
		}
	}
	if class < 0 {
		for n := range s.classes {
			for _, i := range active[n] {
				count(n, func(k int) bool { return k == i })
			}
		}
	}
	if class < 0 {
		return nil, nil, false
	}
	floor := math.Floor(sum)
	down = &extra{class: class, coef: make([]float64, len(flows[class])), rhs: floor}
	up = &extra{class: class, coef: make([]float64, len(flows[class])), rhs: -floor - 1}
	for i := range down.coef {
		if uses(i) {
			down.coef[i], up.coef[i] = 1, -1
		}
	}
	return down, up, sum-floor > 0.5
}

// assign gives every zone the arcs of a whole choice.
func (s *bounded) assign(flows [][]float64) [][]int {
	paths := make([][]int, len(s.options))
	for k, c := range s.classes {
		left := slices.Clone(flows[k])
		for _, zone := range c.zones {
			for b := 0; b < c.end; {
				n := c.first[b]
				for n < c.first[b+1] && left[n] < 0.5 {
					n++
				}
				if n == c.first[b+1] {
					return nil
				}
				left[n]--
				paths[zone] = append(paths[zone], n)
				b = c.arcs[n].to
			}
		}
	}
	return paths
}

// take takes a plan if it is within the limits and the cheapest so far.
func (s *bounded) take(arcs [][]int) {
	if arcs == nil {
		return
	}
	paths := make([][]stock, len(arcs))
	for _, c := range s.classes {
		for _, zone := range c.zones {
			for _, n := range arcs[zone] {
				paths[zone] = append(paths[zone], s.options[zone].at(c.arcs[n].from)[c.arcs[n].n].stock)
			}
		}
	}
	if cost := s.cost(s.options, paths); cost < s.best-tie || s.paths == nil && cost <= s.best {
		s.best, s.paths = cost, paths
	}
}

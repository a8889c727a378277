package renewal

import "math"

// plain reports whether money is all that counts for the zone: no pins, no
// limits, no days to pay and sizes by the code. Then the cheapest of each kind
// of span is enough, and most need not be sized to tell that they are dearer.
func (z *zone) plain() bool {
	if len(z.pins) > 0 || z.limits != (Limits{}) || z.quay || z.keeps != nil {
		return false
	}
	for i := 1; i < z.end(); i++ {
		if z.dayRate(i) > 0 {
			return false
		}
	}
	return true
}

// plainSpans lists the spans of a plain zone: of every start, docking of the
// add and end the cheapest. An add is left out where to renew the set at the
// docking of the add is cheaper, for that works at the same dockings.
func (z *zone) plainSpans() options {
	end := z.end()
	fitted := z.fittedSets()
	o := options{z: z, end: end, from: make([][]span, end)}
	d := &dear{z: z, fitted: fitted, rates: z.rates(), bases: z.bases(), best: make([]cheap, (end+1)*(end+1)), tries: make([]try, end+1)}
	d.cost = make([][]float64, end)
	for i := 1; i < end; i++ {
		d.cost[i] = make([]float64, end+1)
		for j := i + 1; j <= end; j++ {
			d.cost[i][j] = math.Inf(1)
			for _, b := range d.bases[i][j] {
				d.cost[i][j] = min(d.cost[i][j], b.cost)
			}
		}
	}
	for j := 1; j <= end; j++ {
		if s, ok := z.stays(fitted, j); ok {
			cost := z.cost(&s)
			d.put(&s, nil, 0, j, cost)
			if j < end {
				d.adds(&s, &fitted[j], cost)
			}
		}
	}
	o.start = d.take()
	for i := 1; i < end; i++ {
		for j := i + 1; j <= end; j++ {
			// By cost: what the first can be added to bounds the others.
			of := d.bases[i][j]
			for n := range of {
				for k := n; k > 0 && of[k].cost < of[k-1].cost; k-- {
					of[k], of[k-1] = of[k-1], of[k]
				}
			}
			for _, b := range of {
				s := stock{from: i, to: j, piece: b.piece, count: b.count}
				d.put(&s, nil, 0, j, b.cost)
				if j < end {
					at := s.oldAt(z, j)
					d.adds(&s, &at, b.cost)
				}
			}
		}
		o.from[i] = d.take()
	}
	return o
}

// base is a new set in brief.
type base struct {
	piece *piece
	count int
	cost  float64
}

// bases sizes new sets of every pattern from every boundary to every later
// one, as newSet does.
func (z *zone) bases() [][][]base {
	end := z.end()
	all := make([][][]base, end)
	flat := make([]base, 0, end*(end+1)/2*len(z.offered))
	for i := 1; i < end; i++ {
		all[i] = make([][]base, end+1)
		for j := i + 1; j <= end; j++ {
			n := len(flat)
			flat = flat[:n+len(z.offered)]
			all[i][j] = flat[n:n:len(flat)]
		}
		for _, m := range z.offered {
			if !z.mayFit(m, i) {
				continue
			}
			if m.mutual != nil {
				for j := i + 1; j <= end; j++ {
					if s, ok := z.newSet(m, i, j); ok {
						all[i][j] = append(all[i][j], base{s.piece, s.count, z.cost(&s)})
					}
				}
				continue
			}
			initial, used, renewed, final := z.demand[i].Initial/m.outNew[i], 0.0, 0.0, 0.0
			for j := i + 1; j <= end; j++ {
				used += z.demand[j-1].Mean * z.hours[j-1]
				final = max(final, z.demand[j-1].Final/m.outWornEnd[j-1])
				q := max(initial, used/m.usable, renewed, final)
				renewed = used / (m.full * z.a.Basis.RenewAbove)
				if q > mostPieces {
					break
				}
				count := z.upToMultiple(max(1, z.z.MinCount, int(roundUp(q))))
				if !z.belowMax(count) {
					break
				}
				s := stock{from: i, to: j, piece: m, count: count}
				all[i][j] = append(all[i][j], base{m, count, z.cost(&s)})
			}
		}
	}
	return all
}

// rates are the least costs of pieces fitted at each boundary.
type rates struct {
	one, perCharge, perInitial []float64   // a piece, an Ah, an A just then
	perFinal                   [][]float64 // an A at the end of an interval
}

func (z *zone) rates() rates {
	end := z.end()
	row := func() []float64 {
		r := make([]float64, end+1)
		for i := range r {
			r[i] = math.Inf(1)
		}
		return r
	}
	r := rates{one: row(), perCharge: row(), perInitial: row(), perFinal: make([][]float64, end)}
	for i := 1; i < end; i++ {
		r.perFinal[i] = row()
		for _, m := range z.offered {
			if !z.mayFit(m, i) {
				continue
			}
			r.one[i] = min(r.one[i], m.cost)
			r.perCharge[i] = min(r.perCharge[i], m.cost/m.usable)
			r.perInitial[i] = min(r.perInitial[i], m.cost/m.outNew[i])
			for k := i; k < end; k++ {
				r.perFinal[i][k] = min(r.perFinal[i][k], m.cost/m.outWornEnd[k])
			}
		}
	}
	return r
}

// dear finds the cheapest spans from one boundary.
type dear struct {
	z      *zone
	fitted []old // by boundary
	rates  rates
	bases  [][][]base
	cost   [][]float64 // least of a new set, by start and end
	best   []cheap     // by docking of the add, 0 without, and end
	tries  []try       // by end, of an add
}

// cheap is the cheapest span of a kind, in brief.
type cheap struct {
	known, kept bool
	from, count int
	piece, more *piece // more: added
	cost        float64
}

func (d *dear) at(add, to int) *cheap { return &d.best[add*(d.z.end()+1)+to] }

// put takes a set, with or without pieces added at a boundary, if it is the
// cheapest of its kind; of those that tie, the one with the earlier patterns.
func (d *dear) put(s *stock, more *piece, add, to int, cost float64) {
	b := d.at(add, to)
	c := cheap{true, s.kept, s.from, s.count, s.piece, more, cost}
	if b.known && (cost > b.cost+tie || cost > b.cost-tie && !c.earlier(b)) {
		return
	}
	*b = c
}

// earlier reports whether the patterns of a set come before those of another
// of its kind.
func (c *cheap) earlier(b *cheap) bool {
	order := func(m *piece) int {
		if m == nil {
			return -1
		}
		return m.order
	}
	if x, y := order(c.piece), order(b.piece); x != y {
		return x < y
	}
	return order(c.more) < order(b.more)
}

// take returns the cheapest spans of every kind, sized in full.
func (d *dear) take() []span {
	z, n := d.z, 0
	for i := range d.best {
		if d.best[i].known {
			n++
		}
	}
	spans := make([]span, 0, n)
	for i := range d.best {
		b := &d.best[i]
		if !b.known {
			continue
		}
		b.known = false
		add, to := i/(z.end()+1), i%(z.end()+1)
		s := stock{from: b.from, to: to, kept: b.kept, count: b.count, piece: b.piece}
		if add > 0 {
			s.to = add
		}
		if !s.kept {
			s.need = z.need(s.piece, s.from, s.to)
			s.governs = z.word(s.need)
		}
		if add > 0 {
			o := s.oldAt(z, add)
			s, _ = z.onto(s, &o, b.more, add, to) // it was found open
		}
		spans = append(spans, span{s, z.cost(&s), 0})
	}
	return spans
}

// adds tries what can be added to a set at its end, where it is as o says.
func (d *dear) adds(s *stock, o *old, cost float64) {
	z, i := d.z, s.to
	if o.pieces == 0 || math.IsInf(d.rates.one[i], 1) || !covers(z.a.Basis.RenewAbove, o.wastage) {
		return
	}
	end := z.end()
	costs := &z.a.Costs
	// Of the set itself, which is taken off later.
	own := cost - z.worth[i]*float64(o.pieces)*costs.RemovePerPiece
	before := cost
	if !s.kept {
		before = d.cost[s.from][i]
	}
	left := max(0, o.left)
	r, charge, last := &d.rates, 0.0, 0
	initial := z.demand[i].Initial - o.worn(i)
	money := max(r.one[i], initial*r.perInitial[i])
	for j := i + 1; j <= end; j++ {
		k := j - 1
		charge += z.demand[k].Mean * z.hours[k]
		lacks := z.demand[k].Final - o.wornEnd(k)
		money = max(money, lacks*r.perFinal[i][k])
		t := &d.tries[j]
		*t = try{charge: charge, lacks: lacks, most: before + d.cost[i][j] + 2*tie, fixed: own + z.worth[i]*costs.PerZone}
		if left > slack*charge {
			t.beyond = o.worn(i) * (charge/left - 1)
		} else {
			t.beyond = math.Inf(1)
		}
		if j < end {
			old := o.pieces
			if s.kept {
				old = d.fitted[j].pieces
			}
			t.removal = z.worth[j] * costs.RemovePerPiece
			t.fixed += float64(old) * t.removal
		}
		if b := d.at(i, j); b.known {
			t.most = min(t.most, b.cost+tie)
		}
		t.most += slack * math.Abs(t.fixed) // the bounds below are rounded
		t.open = t.fixed+t.removal+z.worth[i]*max(money, (charge-left)*r.perCharge[i]) <= t.most
		if t.open {
			last = j
		}
	}
	for _, m := range z.offered {
		if last == 0 || !z.mayAdd(o, m, i) {
			continue
		}
		// The least count of onto, but for whether the old set bears its share.
		price := z.worth[i] * m.cost
		first := max(1, initial/m.outNew[i])
		perUsable, perWorn := 1/m.usable, 1/m.outWorn[i]
		with, without := 0.0, 0.0
		for j := i + 1; j <= last; j++ {
			t := &d.tries[j]
			with = max(with, t.lacks*m.perWornEnd[j-1])
			without = max(without, z.demand[j-1].Final*m.perWornEnd[j-1])
			if !t.open {
				continue
			}
			least := max(first, (t.charge-left)*perUsable)
			n := min(max(least, without), max(least, with, t.beyond*perWorn))
			if t.fixed+n*(price+t.removal) > t.most {
				continue
			}
			cost, ok := d.sized(s, o, m, i, j, max(least, without), max(least, with, t.beyond*perWorn))
			if ok && cost <= t.most {
				d.put(s, m, i, j, cost)
				t.most = min(t.most, d.at(i, j).cost+tie+slack*math.Abs(t.fixed))
			}
		}
	}
}

// sized returns what a set costs with the pieces of a pattern that onto would
// add: without is the least count without the old set, with that with it.
func (d *dear) sized(s *stock, o *old, m *piece, i, j int, without, with float64) (float64, bool) {
	z := d.z
	if m.mutual != nil || o.leftTo != nil {
		a, ok := z.onto(*s, o, m, i, j)
		return z.cost(&a), ok
	}
	t := &d.tries[j]
	if math.IsInf(t.beyond, 1) { // nothing is left in the old set
		without = max(without, z.demand[i].Initial/m.outNew[i])
	}
	if without > mostPieces {
		return 0, false
	}
	n := z.upToMultiple(int(roundUp(without)))
	if with < without {
		worn := o.worn(i)
		if b := z.upToMultiple(int(roundUp(with))); b < n && covers(o.left, worn/(worn+float64(b)*m.outWorn[i])*t.charge) {
			n = b
		}
	}
	return t.fixed + float64(n)*(z.worth[i]*m.cost+t.removal), z.belowMax(o.pieces + n)
}

// try is what adding to a set, to last to some end, comes to.
type try struct {
	open    bool    // it is not too dear from the outset
	charge  float64 // to be given up to the end
	lacks   float64 // A at the end of the last interval that the set does not give
	beyond  float64 // A that the new pieces give at least, for the set to bear its share
	fixed   float64 // cost without the new pieces
	removal float64 // of one of them
	most    float64 // that is of any use
}

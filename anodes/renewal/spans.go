package renewal

import "slices"

// spans lists every way of going on that a cheapest plan may take. With day
// rates the cost of a piece carries its share of a day, so that the sum never
// exceeds the true cost.
func (z *zone) spans() options {
	if z.plain() {
		return z.plainSpans()
	}
	end := z.end()
	o := options{z: z, end: end, from: make([][]span, end)}
	fitted := z.fittedSets()
	sets := make([]stock, 0, end*end/2*len(z.offered)) // by pattern, end and start
	ends := make([][]int, end)                         // of the sets of a start up to an end
	for i := 1; i < end; i++ {
		for j := i + 1; j <= end; j++ {
			for _, m := range z.offered {
				if s, ok := z.newPinned(m, i, j); ok {
					sets = append(sets, s)
				}
			}
			ends[i] = append(ends[i], len(sets))
		}
	}
	c := &collector{zone: z}
	for j := 1; j <= end; j++ {
		s, ok := z.stays(fitted, j)
		if !ok {
			continue
		}
		c.put(&s)
		if j < end {
			c.adds(s, fitted[j])
		}
	}
	o.start = c.take()
	at := 0
	for i := 1; i < end; i++ {
		for n, last := range ends[i] {
			for ; at < last; at++ {
				s := sets[at]
				c.put(&s)
				if j := i + 1 + n; j < end {
					c.adds(s, s.oldAt(z, j))
				}
			}
		}
		o.from[i] = c.take()
	}
	return o
}

// collector keeps, of the spans from one boundary, those that no other makes
// needless, the first of those that tie.
type collector struct {
	zone  *zone
	kept  []*span
	same  [][]int // among them by docking of the add and end
	trial span
}

// put takes a span unless a pin forbids it or another makes it needless.
func (c *collector) put(set *stock) {
	z, s := c.zone, &c.trial
	if !z.allows(set) {
		return
	}
	*s = span{*set, z.cost(set), z.days(set)}
	s.cost += s.days
	if c.same == nil {
		c.same = make([][]int, (z.end()+1)*(z.end()+1))
	}
	group := &c.same[s.add*(z.end()+1)+s.to]
	for _, n := range *group {
		if z.needless(s, c.kept[n], tie) {
			return
		}
	}
	*group = slices.DeleteFunc(*group, func(n int) bool {
		needless := z.needless(c.kept[n], s, -tie)
		if needless {
			c.kept[n] = nil
		}
		return needless
	})
	*group = append(*group, len(c.kept))
	keep := *s
	c.kept = append(c.kept, &keep)
}

// take returns what is kept, in the order in which it came.
func (c *collector) take() []span {
	spans := make([]span, 0, len(c.kept))
	for _, s := range c.kept {
		if s != nil {
			spans = append(spans, *s)
		}
	}
	c.kept = c.kept[:0]
	for i := range c.same {
		c.same[i] = c.same[i][:0]
	}
	return spans
}

// adds takes the ways of adding to a set at its end, o being the set there.
func (c *collector) adds(s stock, o old) {
	z, i := c.zone, s.to
	if o.pieces == 0 {
		return
	}
	for j := i + 1; j <= z.end(); j++ {
		for _, m := range z.offered {
			if !z.mayAdd(&o, m, i) {
				continue
			}
			if t, ok := z.addPinned(s, &o, m, i, j); ok {
				c.put(&t)
			}
		}
	}
}

// needless reports whether span b does what a does for no more money beside
// the days, up to within, and with no more pieces where days are paid.
func (z *zone) needless(a, b *span, within float64) bool {
	return a.add == b.add && a.to == b.to &&
		b.cost-b.days <= a.cost-a.days+within &&
		(a.kept || z.dayRate(a.from) == 0 || b.count <= a.count) &&
		(a.add == 0 || z.dayRate(a.add) == 0 || b.addCount <= a.addCount) &&
		(z.limits == (Limits{}) && !z.quay || z.usesLess(b, a))
}

package renewal

import "slices"

// greedy completes a relaxed choice to a plan: the ways that it takes whole
// stay, and the other zones get, in a random order, the cheapest way by the
// present prices that what is left of the limits allows.
func (s *bounded) greedy(v []float64) {
	paths := make([][]int, len(s.options))
	u := s.nothing()
	left := make([]int, len(s.classes)) // zones of a class that have a way
	give := func(n int, arcs []int) {
		paths[s.classes[n].zones[left[n]]] = arcs
		left[n]++
		for _, i := range arcs {
			u.add(s.classes[n].arcs[i].acts)
		}
	}
	for j, w := range s.ways {
		if j += len(s.fixed); j < len(v) {
			for x := v[j] + near; x >= 1 && left[w.class] < len(s.classes[w.class].zones); x-- {
				give(w.class, w.arcs)
			}
		}
	}
	var open []int
	for n, c := range s.classes {
		for range len(c.zones) - left[n] {
			open = append(open, n)
		}
	}
	s.rand.Shuffle(len(open), func(i, j int) { open[i], open[j] = open[j], open[i] })
	if s.rand.IntN(2) == 0 {
		most := func(n int) (pieces int) {
			for i := range s.classes[n].arcs {
				pieces = max(pieces, s.classes[n].arcs[i].acts[0].pieces)
			}
			return pieces
		}
		slices.SortStableFunc(open, func(a, b int) int { return most(b) - most(a) })
	}
	for _, n := range open {
		c := s.classes[n]
		s.work += 8 * len(c.arcs)
		c.cheapest(func(t *arc) bool { return s.fits(u, t, 0) })
		if c.best[0] >= 0 && !s.pays(u, c) {
			// To take off and to fit at one docking is too much together.
			c.cheapest(func(t *arc) bool { return s.fits(u, t, c.removal) })
		}
		if c.best[0] < 0 {
			return
		}
		give(n, c.path())
	}
	s.take(paths)
}

// pays reports whether the budgets pay for the cheapest way of a class, too.
func (s *bounded) pays(u *uses, c *class) bool {
	if s.Budget == 0 || s.over > 0 {
		return true
	}
	spent, pieces := slices.Clone(u.spent), slices.Clone(u.pieces)
	for _, n := range c.path() {
		for _, a := range c.arcs[n].acts {
			if a.boundary > 0 {
				spent[a.boundary-1] += a.spent
				pieces[a.boundary-1] += a.pieces
			}
		}
	}
	for k, n := range pieces {
		if n > 0 && !covers(s.Budget, spent[k]+sharedCost(s.ahead[k])+DayCost(s.ahead[k], n)) {
			return false
		}
	}
	return true
}

// fits reports whether what is left of the limits allows an arc, with so much
// money spent beside it where it fits pieces.
func (s *bounded) fits(u *uses, t *arc, beside float64) bool {
	if s.over > 0 {
		return true
	}
	for _, a := range t.acts {
		if a.boundary == 0 {
			continue
		}
		k := a.boundary - 1
		n := u.pieces[k] + a.pieces
		if s.Pieces > 0 && n > s.Pieces ||
			s.Budget > 0 && !covers(s.Budget, u.spent[k]+a.spent+beside+sharedCost(s.ahead[k])+DayCost(s.ahead[k], n)) ||
			s.Patterns > 0 && a.pieces > 0 && u.of[k][a.pattern] == 0 && u.patterns(k) >= s.Patterns ||
			k == 0 && s.quay != nil && u.of[0][a.pattern]+a.pieces > s.quay[a.pattern] {
			return false
		}
	}
	return true
}

package renewal

// reach reports from which boundaries a row of renewals can hold the zone up
// to the horizon.
func (z *zone) reach() []bool {
	ok := make([]bool, z.end()+1)
	ok[z.end()] = true
	for i := z.end() - 1; i >= 1; i-- {
		for j := i + 1; j <= z.end() && !ok[i]; j++ {
			if !ok[j] {
				continue
			}
			for _, m := range z.offered {
				if _, fits := z.newSet(m, i, j); fits {
					ok[i] = true
					break
				}
			}
		}
	}
	return ok
}

// usual returns the patterns that the simple rules use: the one fitted
// before, else all that are offered.
func (z *zone) usual() []*piece {
	if before := z.largestGroup(); before != nil {
		for i := range z.offered {
			if z.offered[i].p.ID == before.ID {
				return z.offered[i : i+1]
			}
		}
	}
	return z.offered
}

// cheapestSet returns the cheapest set of the patterns that lasts from i to j.
func (z *zone) cheapestSet(ms []*piece, i, j int) (best stock, ok bool) {
	for _, m := range ms {
		s, fits := z.newSet(m, i, j)
		if fits && (!ok || float64(s.count)*m.cost < float64(best.count)*best.piece.cost-1e-9) {
			best, ok = s, true
		}
	}
	return best, ok
}

// renewAll renews every zone at every docking, sized to the next.
func renewAll(zones []*zone) ([][]stock, bool) {
	var paths [][]stock
	for _, z := range zones {
		path, ok := z.renewAll()
		if !ok {
			return nil, false
		}
		paths = append(paths, path)
	}
	return paths, true
}

func (z *zone) renewAll() ([]stock, bool) {
	if z.remembered != nil {
		return z.remembered.all, z.remembered.all != nil
	}
	s, _ := z.keep(1)
	path := []stock{s}
	for i := 1; i < z.end(); i++ {
		s, ok := z.cheapestSet(z.usual(), i, i+1)
		if !ok {
			s, ok = z.cheapestSet(z.offered, i, i+1)
		}
		if !ok {
			return nil, false
		}
		path = append(path, s)
	}
	return path, true
}

// asLate keeps what is fitted as long as it may stay and sizes every set to
// the last docking that it can reach.
func asLate(zones []*zone) ([][]stock, bool) {
	var paths [][]stock
	for _, z := range zones {
		path, ok := z.asLate()
		if !ok {
			return nil, false
		}
		paths = append(paths, path)
	}
	return paths, true
}

func (z *zone) asLate() ([]stock, bool) {
	if z.remembered != nil {
		return z.remembered.late, z.remembered.late != nil
	}
	reach := z.reach()
	var path []stock
	at := 0
	for j := z.end(); j >= 1; j-- {
		if s, ok := z.keep(j); ok && reach[j] {
			path, at = append(path, s), j
			break
		}
	}
	for at > 0 && at < z.end() {
		s, ok := z.farthest(z.usual(), at, reach)
		if !ok {
			s, ok = z.farthest(z.offered, at, reach)
		}
		if !ok {
			return nil, false
		}
		path, at = append(path, s), s.to
	}
	if at != z.end() {
		return nil, false
	}
	return path, true
}

func (z *zone) farthest(ms []*piece, i int, reach []bool) (stock, bool) {
	for j := z.end(); j > i; j-- {
		if !reach[j] {
			continue
		}
		if s, ok := z.cheapestSet(ms, i, j); ok {
			return s, true
		}
	}
	return stock{}, false
}

package renewal

import "slices"

// relaxed is the choice of sets within limits without the demand that zones,
// dockings and days are whole: a linear program whose columns are the ways of
// classes of zones from the last docking to the horizon, found as they are
// wanted. Whatever prices its rows have, the cheapest ways by these prices give
// a bound that no plan is below, so that no error of the program can harm it.
type relaxed struct {
	*limiter
	options []options
	classes []*class
	fixed   []column // columns beside the ways: dockings, patterns, days, excess
	most    []float64
	rows    []fixedRow
	ways    []choice
	highest float64 // no plan costs more

	docking []int   // column of docking k being worked at; -1: at no cost
	days    []int   // column of a campaign's days
	pattern [][]int // column of a pattern being ordered for docking k

	work int
}

type fixedRow struct {
	rhs   float64
	equal bool
}

// choice is a way of one class.
type choice struct {
	column
	class int
	arcs  []int
}

// extra is a row added in the course of the search: some arcs of a class and
// some fixed columns, at most the right side.
type extra struct {
	class int // -1: none
	coef  []float64
	fixed []entry // by column
	rhs   float64
}

// newRelaxed builds the rows. most is how many dockings may be worked at.
func newRelaxed(m *limiter, zones []options, open []bool, most int) *relaxed {
	r := &relaxed{limiter: m, options: zones, classes: m.classes(zones, open)}
	for _, c := range r.classes {
		r.row(float64(len(c.zones)), true)
		r.highest += float64(len(c.zones)) * c.dearest()
	}
	counted := most < len(m.ahead)
	all := -1
	if counted {
		all = r.row(float64(most), false)
	}
	for k, d := range m.ahead {
		r.docking, r.days, r.pattern = append(r.docking, -1), append(r.days, -1), append(r.pattern, nil)
		if !open[k+1] {
			continue
		}
		pieces, kinds := r.counts(k + 1)
		fitted, spent := 0, 0.0 // at most
		for _, n := range pieces {
			fitted += n[len(n)-1]
		}
		for _, c := range r.classes {
			spent += float64(len(c.zones)) * c.spends(k+1)
		}
		once := sharedCost(d)
		y := -1
		if once > 0 || counted {
			y = r.column(m.worth[k+1]*once, 1)
			r.docking[k] = y
			r.put(r.row(1, false), y, 1)
			if counted {
				r.put(all, y, 1)
			}
			if m.Pieces == 0 {
				r.arcs(r.row(0, false, entry{y, -float64(len(zones))}), func(t *arc) float64 { return min(1, float64(t.acting(k+1))) })
			}
		}
		// A limit holds only where the docking is worked at.
		limit := func(most, whole, all float64) int {
			row := 0
			if y < 0 {
				row = r.row(most, false)
			} else {
				row = r.row(0, false, entry{y, -most})
			}
			if m.over > 0 {
				r.put(row, r.column(m.over/whole, all), -1)
			}
			return row
		}
		if m.Pieces > 0 {
			reach := m.Pieces
			if m.over == 0 {
				reach = reachable(pieces, m.Pieces)
			}
			r.arcs(limit(float64(reach), float64(m.Pieces), float64(fitted)), func(t *arc) float64 { return float64(t.acting(k + 1)) })
		}
		days := -1
		if rate := DayCost(d, 1); rate > 0 {
			days = r.column(m.worth[k+1]*d.DayRate, roundUp(float64(fitted)/d.PiecesPerDay))
			r.days[k] = days
			r.arcs(r.row(0, false, entry{days, -d.PiecesPerDay}), func(t *arc) float64 { return float64(t.acting(k + 1)) })
		}
		if m.Budget > 0 {
			// In shares of the budget, as money is of another size than pieces.
			row := limit(100, 100, 100*(spent+once+DayCost(d, fitted))/m.Budget)
			if y >= 0 {
				r.put(row, y, 100*once/m.Budget)
			}
			if days >= 0 {
				r.put(row, days, 100*d.DayRate/m.Budget)
			}
			r.arcs(row, func(t *arc) float64 {
				spent := 0.0
				for _, a := range t.acts {
					if a.boundary == k+1 {
						spent += a.spent
					}
				}
				return 100 * spent / m.Budget
			})
		}
		if m.Patterns > 0 {
			row := limit(float64(m.Patterns), 1, float64(len(kinds)))
			for _, ordered := range kinds {
				w := -1
				if ordered {
					w = r.column(0, 1)
					r.put(row, w, 1)
				}
				r.pattern[k] = append(r.pattern[k], w)
			}
		}
		for p, left := range m.quay {
			if k > 0 || !kinds[p] {
				continue
			}
			row := r.row(float64(left), false)
			if m.over > 0 {
				r.put(row, r.column(m.over, float64(fitted)), -1)
			}
			r.arcs(row, func(t *arc) float64 {
				n := 0
				for _, a := range t.acts {
					if a.boundary == 1 && a.pattern == p {
						n += a.pieces
					}
				}
				return float64(n)
			})
		}
	}
	for j := range r.fixed {
		r.highest += r.fixed[j].cost * r.most[j]
	}
	return r
}

func (r *relaxed) row(rhs float64, equal bool, at ...entry) int {
	r.rows = append(r.rows, fixedRow{rhs, equal})
	for _, e := range at {
		r.put(len(r.rows)-1, e.row, e.v)
	}
	return len(r.rows) - 1
}

// column adds a fixed column that is taken at most so often.
func (r *relaxed) column(cost, most float64) int {
	r.fixed, r.most = append(r.fixed, column{cost: cost}), append(r.most, most)
	return len(r.fixed) - 1
}

// put adds to a fixed column's entry in a row.
func (r *relaxed) put(row, col int, v float64) {
	at := &r.fixed[col].at
	for i := range *at {
		if (*at)[i].row == row {
			(*at)[i].v += v
			return
		}
	}
	*at = append(*at, entry{row, v})
}

// arcs sets the entries of all arcs in a row.
func (r *relaxed) arcs(row int, coef func(*arc) float64) {
	for _, c := range r.classes {
		for n := range c.arcs {
			if v := coef(&c.arcs[n]); v != 0 {
				c.arcs[n].at = append(c.arcs[n].at, entry{row, v})
			}
		}
	}
}

// counts returns the pieces that each zone may fit at a boundary, and the
// patterns that any may.
func (r *relaxed) counts(boundary int) (pieces [][]int, kinds []bool) {
	kinds = make([]bool, len(r.index))
	for _, c := range r.classes {
		var counts []int
		for n := range c.arcs {
			for _, a := range c.arcs[n].acts[:2] {
				if a.boundary == boundary && a.pieces > 0 {
					counts = append(counts, a.pieces)
					kinds[a.pattern] = true
				}
			}
		}
		slices.Sort(counts)
		counts = slices.Compact(counts)
		for range c.zones {
			if len(counts) > 0 {
				pieces = append(pieces, counts)
			}
		}
	}
	return pieces, kinds
}

// reachable returns the largest sum, of one count or none of each, that is at
// most a limit.
func reachable(counts [][]int, most int) int {
	total := 0
	for _, n := range counts {
		total += n[len(n)-1]
	}
	if total <= most || most > 1<<16 {
		return most
	}
	sums := make([]bool, most+1)
	sums[0] = true
	for _, of := range counts {
		for s := most; s >= 0; s-- {
			for _, n := range of {
				if !sums[s] && n <= s && sums[s-n] {
					sums[s] = true
				}
			}
		}
	}
	for s := most; ; s-- {
		if sums[s] {
			return s
		}
	}
}

// coef returns an extra row's entry in a column.
func (r *relaxed) coef(x *extra, col int) float64 {
	v := 0.0
	if col < len(r.fixed) {
		for _, e := range x.fixed {
			if e.row == col {
				v += e.v
			}
		}
		return v
	}
	if w := &r.ways[col-len(r.fixed)]; w.class == x.class {
		for _, n := range w.arcs {
			v += x.coef[n]
		}
	}
	return v
}

// price sets the arcs' prices by the rows' and returns the bound that they
// give.
func (r *relaxed) price(dual []float64, extras []extra) float64 {
	bound := 0.0
	y := slices.Clone(dual)
	for i := range y {
		rhs := 0.0
		switch {
		case i >= len(r.rows):
			rhs = extras[i-len(r.rows)].rhs
		case r.rows[i].equal:
			y[i] = 0 // the zones of a class; its ways are priced without
			continue
		default:
			rhs = r.rows[i].rhs
		}
		y[i] = min(0, y[i])
		bound += y[i] * rhs
	}
	for j, c := range r.fixed {
		d := c.cost
		for _, e := range c.at {
			d -= y[e.row] * e.v
		}
		for i := range extras {
			if y[len(r.rows)+i] == 0 {
				continue
			}
			for _, e := range extras[i].fixed {
				if e.row == j {
					d -= y[len(r.rows)+i] * e.v
				}
			}
		}
		if d < 0 {
			bound += d * r.most[j]
		}
	}
	for n, c := range r.classes {
		for i := range c.arcs {
			if c.gone[i] {
				continue
			}
			t := &c.arcs[i]
			d := t.cost
			for _, e := range t.at {
				d -= y[e.row] * e.v
			}
			c.price[i] = d
		}
		for i := range extras {
			if f := y[len(r.rows)+i]; f != 0 && extras[i].class == n {
				for k, v := range extras[i].coef {
					c.price[k] -= f * v
				}
			}
		}
		r.work += 4 * len(c.arcs)
		bound += float64(len(c.zones)) * c.cheapest(nil)
	}
	return bound
}

// way makes the cheapest way of a class a column.
func (r *relaxed) way(n int) {
	c := r.classes[n]
	w := choice{class: n, arcs: c.path()}
	w.at = append(w.at, entry{n, 1})
	for _, i := range w.arcs {
		w.cost += c.arcs[i].cost
		for _, e := range c.arcs[i].at {
			k := slices.IndexFunc(w.at, func(f entry) bool { return f.row == e.row })
			if k < 0 {
				w.at = append(w.at, e)
			} else {
				w.at[k].v += e.v
			}
		}
	}
	r.ways = append(r.ways, w)
}

// program builds the linear program of a node.
func (r *relaxed) program(extras []extra, basis []int) *program {
	p := &program{miss: 10 * (1 + r.highest)}
	for _, c := range r.rows {
		p.rhs, p.equal = append(p.rhs, c.rhs), append(p.equal, c.equal)
	}
	for _, x := range extras {
		p.rhs, p.equal = append(p.rhs, x.rhs), append(p.equal, false)
	}
	for j := range len(r.fixed) + len(r.ways) {
		p.addColumn(r.entries(j, extras))
	}
	if basis != nil && p.from(basis) {
		return p
	}
	p.begin()
	return p
}

// entries returns a column with its entries in extra rows.
func (r *relaxed) entries(j int, extras []extra) column {
	var c column
	if j < len(r.fixed) {
		c = r.fixed[j]
	} else {
		w := &r.ways[j-len(r.fixed)]
		c = w.column
		if slices.ContainsFunc(w.arcs, func(n int) bool { return r.classes[w.class].gone[n] }) {
			c.cost += 10 * (1 + r.highest) // not here
		}
	}
	c.at = slices.Clip(c.at)
	for i := range extras {
		if v := r.coef(&extras[i], j); v != 0 {
			c.at = append(c.at, entry{len(r.rows) + i, v})
		}
	}
	return c
}

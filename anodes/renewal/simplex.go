package renewal

import (
	"math"
	"slices"
)

// program is a linear program: the least cost of columns, each taken 0 times
// or more, under rows that are at most, or exactly, their right side. Every
// row may be missed at a high cost a unit, so that there is always a solution.
// It is solved by the revised simplex method with the inverse of the basis
// written out; rows and columns may be added to a solved program.
type program struct {
	rhs    []float64
	equal  []bool
	cols   []column
	miss   float64     // cost of missing a row by one
	basis  []int       // by row: a column, or slackOf or missOf a row
	inside []bool      // by column: in the basis
	inv    [][]float64 // inverse of the basis
	x      []float64   // of the basic columns
	dual   []float64
	work   int // multiplications so far, about
	pivots int // since the inverse was made anew
}

// column is a column's cost and its entries by row.
type column struct {
	cost float64
	at   []entry
}

type entry struct {
	row int
	v   float64
}

func slackOf(row int) int { return ^(2 * row) }
func missOf(row int) int  { return ^(2*row + 1) }

// column returns any column of the basis.
func (p *program) column(id int) (cost float64, at []entry) {
	if id >= 0 {
		return p.cols[id].cost, p.cols[id].at
	}
	row := ^id / 2
	switch {
	case ^id%2 == 0:
		return 0, []entry{{row, 1}}
	case p.equal[row]:
		return p.miss, []entry{{row, 1}}
	}
	return p.miss, []entry{{row, -1}}
}

// addRow adds a row; coef gives its entry in every column. An exact row must
// not be exceeded by what the basis holds.
func (p *program) addRow(rhs float64, equal bool, coef func(col int) float64) {
	m := len(p.rhs)
	p.rhs, p.equal = append(p.rhs, rhs), append(p.equal, equal)
	row := make([]float64, m+1)
	for j := range p.cols {
		if v := coef(j); v != 0 {
			p.cols[j].at = append(slices.Clip(p.cols[j].at), entry{m, v})
		}
	}
	over := -rhs
	for i, id := range p.basis {
		if id < 0 {
			continue
		}
		v := coef(id)
		if v == 0 {
			continue
		}
		over += v * p.x[i]
		for k := range m {
			row[k] += v * p.inv[i][k]
		}
	}
	id, sign := slackOf(m), 1.0
	if equal {
		id = missOf(m)
	} else if over > 0 {
		id, sign = missOf(m), -1
	}
	for k := range m {
		row[k] *= -sign
		p.inv[k] = append(p.inv[k], 0)
	}
	row[m] = sign
	p.inv = append(p.inv, row)
	p.basis, p.x = append(p.basis, id), append(p.x, math.Abs(over))
	p.duals()
}

// addColumn adds a column.
func (p *program) addColumn(c column) {
	p.cols, p.inside = append(p.cols, c), append(p.inside, false)
}

// duals computes the rows' prices from the inverse.
func (p *program) duals() {
	p.dual = make([]float64, len(p.rhs))
	for i, id := range p.basis {
		if c, _ := p.column(id); c != 0 {
			for k, v := range p.inv[i] {
				p.dual[k] += c * v
			}
		}
	}
	p.work += len(p.rhs) * len(p.rhs)
}

// from sets the basis and makes its inverse; it reports whether it has one
// and the basic columns are not below 0.
func (p *program) from(basis []int) bool {
	m := len(p.rhs)
	p.basis = slices.Clone(basis)
	p.inside = make([]bool, len(p.cols))
	for _, id := range basis {
		if id >= 0 {
			p.inside[id] = true
		}
	}
	return p.invert() && m == len(basis)
}

// invert makes the inverse of the basis and the values of its columns anew.
func (p *program) invert() bool {
	m := len(p.rhs)
	p.work += m * m
	p.pivots = 0
	var filled []int // places of a row that are not 0
	a := make([][]float64, m)
	flat := make([]float64, 2*m*m)
	for i := range a {
		a[i] = flat[2*m*i : 2*m*(i+1)]
		a[i][m+i] = 1
	}
	for j, id := range p.basis {
		_, at := p.column(id)
		for _, e := range at {
			a[e.row][j] += e.v
		}
	}
	for j := range m {
		best := j
		for i := j + 1; i < m; i++ {
			if math.Abs(a[i][j]) > math.Abs(a[best][j]) {
				best = i
			}
		}
		if math.Abs(a[best][j]) < 1e-11 {
			return false
		}
		a[j], a[best] = a[best], a[j]
		by, f := a[j], 1/a[j][j]
		filled = filled[:0]
		for k := j; k < 2*m; k++ {
			if by[k] != 0 {
				by[k] *= f
				filled = append(filled, k)
			}
		}
		for i, row := range a {
			if f := row[j]; i != j && f != 0 {
				for _, k := range filled {
					row[k] -= f * by[k]
				}
				p.work += len(filled)
			}
		}
	}
	inv, x, largest := make([][]float64, m), make([]float64, m), 1.0
	for _, b := range p.rhs {
		largest = max(largest, math.Abs(b))
	}
	for i := range a {
		inv[i] = slices.Clone(a[i][m:])
		for k, v := range inv[i] {
			x[i] += v * p.rhs[k]
		}
		if x[i] < -1e-7*largest {
			return false
		}
		x[i] = max(0, x[i])
	}
	p.inv, p.x = inv, x
	p.duals()
	return true
}

// begin sets the basis without any column.
func (p *program) begin() {
	var basis []int
	for i, b := range p.rhs {
		if p.equal[i] || b < 0 {
			basis = append(basis, missOf(i))
		} else {
			basis = append(basis, slackOf(i))
		}
	}
	p.from(basis)
}

// solve goes from basis to basis until no column lowers the cost by more than
// eps a unit. It gives up, with the basis it has, after very many steps.
func (p *program) solve(eps float64) {
	still := 0 // steps in a row that changed nothing
	for range 50 * (len(p.rhs) + 100) {
		enter, d := p.entering(eps, still > 30)
		if d >= 0 {
			return
		}
		alpha := p.times(enter)
		leave, step := p.leaving(alpha, still > 30)
		if leave < 0 {
			return // cannot be: no cost is below 0
		}
		if step > 1e-12 {
			still = 0
		} else {
			still++
		}
		p.pivot(enter, d, alpha, leave, step)
		if p.pivots > 150 && !p.invert() {
			p.begin()
		}
	}
}

// entering returns the column that lowers the cost most a unit, or, with
// first, the first that does, and by how much; 0 where none does.
func (p *program) entering(eps float64, first bool) (int, float64) {
	enter, least := 0, -eps
	try := func(id int, d float64) bool {
		if d < least {
			enter, least = id, d
			return first
		}
		return false
	}
	for j := range p.cols {
		if p.inside[j] {
			continue
		}
		d := p.cols[j].cost
		for _, e := range p.cols[j].at {
			d -= p.dual[e.row] * e.v
		}
		if try(j, d) {
			return enter, least
		}
	}
	p.work += 10 * len(p.cols)
	for i, y := range p.dual {
		if p.equal[i] {
			continue
		}
		if try(slackOf(i), -y) || try(missOf(i), p.miss+y) {
			return enter, least
		}
	}
	if least == -eps {
		return 0, 0
	}
	return enter, least
}

// times returns the inverse times a column.
func (p *program) times(id int) []float64 {
	_, at := p.column(id)
	alpha := make([]float64, len(p.rhs))
	for i := range alpha {
		row := p.inv[i]
		for _, e := range at {
			alpha[i] += row[e.row] * e.v
		}
	}
	return alpha
}

// leaving returns the row whose column leaves and how much of the entering
// column then comes in.
func (p *program) leaving(alpha []float64, first bool) (int, float64) {
	leave, step := -1, math.Inf(1)
	for i, a := range alpha {
		if a < 1e-9 {
			continue
		}
		t := p.x[i] / a
		switch {
		case t < step-1e-12, t <= step+1e-12 && leave >= 0 && (!first && a > alpha[leave] || first && p.basis[i] < p.basis[leave]):
			leave, step = i, min(t, step)
		}
	}
	return leave, step
}

func (p *program) pivot(enter int, d float64, alpha []float64, leave int, step float64) {
	p.pivots++
	for i := range p.x {
		p.x[i] = max(0, p.x[i]-step*alpha[i])
	}
	p.x[leave] = step
	if out := p.basis[leave]; out >= 0 {
		p.inside[out] = false
	}
	if enter >= 0 {
		p.inside[enter] = true
	}
	p.basis[leave] = enter
	by := p.inv[leave]
	f := 1 / alpha[leave]
	filled := make([]int, 0, len(by))
	for k := range by {
		if by[k] != 0 {
			by[k] *= f
			filled = append(filled, k)
		}
	}
	for i, a := range alpha {
		if i == leave || a == 0 {
			continue
		}
		row := p.inv[i]
		for _, k := range filled {
			row[k] -= a * by[k]
		}
		p.work += len(filled)
	}
	p.work += len(by)
	for k, v := range by {
		p.dual[k] += d * v
	}
}

// cost is that of the solution, and missed by how much rows are missed.
func (p *program) cost() (cost, missed float64) {
	for i, id := range p.basis {
		c, _ := p.column(id)
		cost += c * p.x[i]
		if id < 0 && ^id%2 == 1 {
			missed += p.x[i]
		}
	}
	return cost, missed
}

// values returns how often every column is taken.
func (p *program) values() []float64 {
	v := make([]float64, len(p.cols))
	for i, id := range p.basis {
		if id >= 0 {
			v[id] = p.x[i]
		}
	}
	return v
}

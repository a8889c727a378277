package renewal

import (
	"bytes"
	"fmt"
	"strconv"

	"anodewright/hull"
)

// LP writes the whole choice, with the pins that can stand and the limits on
// dockings, as a mixed-integer problem in CPLEX LP text, so that any solver can
// check the plan's total: a column for every useful set and span, one for
// working at a docking, one for the whole days of a campaign, one for ordering
// a pattern where their number is limited, and the constant as a variable fixed
// at 1. Zones that no set can hold are left out.
//
// A zone's sets form a path from the last docking to the horizon: exactly one
// span leaves the last docking, and as many leave a docking as arrive there.
func (p Problem) LP() []byte {
	l := &lp{}
	if a := p.Asset; len(a.Ahead()) > 0 {
		s := newSolver(p)
		pins := make([]Pinned, len(p.Pins))
		for i, pin := range p.Pins {
			pins[i].Pin = pin
		}
		ways, _ := s.prepare(s.place(pins))
		if len(ways) > 0 {
			l.m = newLimiter(a, ways[0].z, p.Limits, p.Quay)
			l.spent, l.onQuay, l.kinds = make([]bytes.Buffer, len(a.Ahead())), make([]bytes.Buffer, len(a.Patterns)), make([][]bool, len(a.Ahead()))
		}
		for n, o := range ways {
			l.zone(n, o)
		}
		for k, d := range a.Ahead() {
			l.docking(k+1, d, ways)
		}
	}
	return l.text()
}

// lp gathers the parts of the text.
type lp struct {
	objective, rows, general, binary bytes.Buffer
	acts                             map[int]*bytes.Buffer // boundary -> pieces fitted there

	// For the limits.
	m      *limiter
	spent  []bytes.Buffer // by docking
	onQuay []bytes.Buffer // pieces of each pattern at the first docking
	kinds  [][]bool       // the patterns that may be ordered for a docking
}

func (l *lp) zone(n int, o options) {
	z := o.z
	leave, arrive := make([]bytes.Buffer, z.end()), make([]bytes.Buffer, z.end()+1)
	work := make([]bytes.Buffer, z.end())
	with := map[[2]int]*bytes.Buffer{} // by docking and pattern
	column := func(i, m int, s span) {
		x := fmt.Sprintf("x%d_%d_%d", n, i, m)
		term(&l.objective, s.cost-s.days, x)
		term(&leave[i], 1, x)
		term(&arrive[s.to], 1, x)
		for _, act := range []struct{ boundary, pieces int }{{s.from, s.count}, {s.add, s.addCount}} {
			if act.boundary > 0 {
				term(&work[act.boundary], 1, x)
				l.pieces(act.boundary, act.pieces, x)
			}
		}
		for _, act := range l.m.acts(z, s.stock) {
			if act.boundary > 0 {
				l.limited(act, x, with)
			}
		}
		fmt.Fprintf(&l.binary, " %s\n", x)
	}
	for m, s := range o.start {
		column(0, m, s)
	}
	for i := 1; i < z.end(); i++ {
		for m, s := range o.from[i] {
			column(i, m, s)
		}
	}
	l.orders(n, with)
	fmt.Fprintf(&l.rows, " start%d:%s = 1\n", n, leave[0].String())
	for i := 1; i < z.end(); i++ {
		if leave[i].Len() == 0 && arrive[i].Len() == 0 {
			continue
		}
		fmt.Fprintf(&l.rows, " pass%d_%d:%s%s = 0\n", n, i, leave[i].String(), bytes.ReplaceAll(arrive[i].Bytes(), []byte("+ "), []byte("- ")))
		if work[i].Len() > 0 {
			fmt.Fprintf(&l.rows, " work%d_%d:%s - 1 y%d <= 0\n", n, i, work[i].String(), i)
		}
	}
}

// limited adds what a column uses of what is limited; with are the zone's
// columns by docking and pattern.
func (l *lp) limited(a act, x string, with map[[2]int]*bytes.Buffer) {
	k := a.boundary - 1
	if l.m.Budget > 0 {
		term(&l.spent[k], a.spent, x)
	}
	if a.pieces == 0 {
		return
	}
	if k == 0 && l.m.quay != nil {
		term(&l.onQuay[a.pattern], float64(a.pieces), x)
	}
	if l.m.Patterns > 0 {
		key := [2]int{k, a.pattern}
		if with[key] == nil {
			with[key] = new(bytes.Buffer)
		}
		term(with[key], 1, x)
	}
}

// orders ties a zone's columns to the patterns ordered.
func (l *lp) orders(n int, with map[[2]int]*bytes.Buffer) {
	for k := range l.kinds {
		for p := range l.onQuay {
			b := with[[2]int{k, p}]
			if b == nil {
				continue
			}
			if l.kinds[k] == nil {
				l.kinds[k] = make([]bool, len(l.onQuay))
			}
			l.kinds[k][p] = true
			fmt.Fprintf(&l.rows, " order%d_%d_%d:%s - 1 w%d_%d <= 0\n", n, k+1, p, b.String(), k+1, p)
		}
	}
}

// limits writes the limits of a docking.
func (l *lp) limits(k int, d hull.Docking, days bool) {
	row := func(name string, b *bytes.Buffer, most float64) {
		fmt.Fprintf(&l.rows, " %s%d:%s <= %s\n", name, k, b.String(), strconv.FormatFloat(most, 'g', 17, 64))
	}
	if l.m.Pieces > 0 {
		row("pieces", l.acts[k], float64(l.m.Pieces))
	}
	if b := &l.spent[k-1]; l.m.Budget > 0 {
		term(b, sharedCost(d), fmt.Sprintf("y%d", k))
		if days {
			term(b, d.DayRate, fmt.Sprintf("days%d", k))
		}
		row("budget", b, l.m.Budget)
	}
	if l.m.Patterns > 0 {
		var b bytes.Buffer
		for p, used := range l.kinds[k-1] {
			if used {
				w := fmt.Sprintf("w%d_%d", k, p)
				term(&b, 1, w)
				fmt.Fprintf(&l.binary, " %s\n", w)
			}
		}
		row("patterns", &b, float64(l.m.Patterns))
	}
	for p := range l.m.quay {
		if b := &l.onQuay[p]; k == 1 && b.Len() > 0 {
			row(fmt.Sprintf("quay%d_", p), b, float64(l.m.quay[p]))
		}
	}
}

func (l *lp) pieces(boundary, n int, x string) {
	if l.acts == nil {
		l.acts = map[int]*bytes.Buffer{}
	}
	if l.acts[boundary] == nil {
		l.acts[boundary] = new(bytes.Buffer)
	}
	term(l.acts[boundary], float64(n), x)
}

// docking adds what working at a docking costs.
func (l *lp) docking(k int, d hull.Docking, ways []options) {
	if l.acts[k] == nil {
		return
	}
	worth := ways[0].z.worth[k]
	term(&l.objective, worth*sharedCost(d), fmt.Sprintf("y%d", k))
	fmt.Fprintf(&l.binary, " y%d\n", k)
	if ways[0].z.dayRate(k) > 0 {
		term(&l.objective, worth*d.DayRate, fmt.Sprintf("days%d", k))
		fmt.Fprintf(&l.rows, " days%d_pieces:%s - %s days%d <= 0\n", k, l.acts[k].String(), strconv.FormatFloat(d.PiecesPerDay, 'g', 17, 64), k)
		fmt.Fprintf(&l.general, " days%d\n", k)
	}
	l.limits(k, d, ways[0].z.dayRate(k) > 0)
}

// term writes one term of a sum.
func term(b *bytes.Buffer, factor float64, x string) {
	fmt.Fprintf(b, "\n  + %s %s", strconv.FormatFloat(factor, 'g', 17, 64), x)
}

func (l *lp) text() []byte {
	var b bytes.Buffer
	b.WriteString("\\ Anode plan: the least total is the plan's total.\nMinimize\n total:")
	b.Write(l.objective.Bytes())
	term(&b, 0, "one")
	fmt.Fprintf(&b, "\nSubject To\n%s constant: one = 1\n", l.rows.String())
	if l.general.Len() > 0 {
		fmt.Fprintf(&b, "General\n%s", l.general.String())
	}
	if l.binary.Len() > 0 {
		fmt.Fprintf(&b, "Binary\n%s", l.binary.String())
	}
	b.WriteString("End\n")
	return b.Bytes()
}

package renewal

import (
	"bytes"
	"fmt"
	"strconv"

	"anodewright/hull"
)

// LP writes the whole choice, with the pins that can stand but without limits
// on dockings, as a mixed-integer problem in CPLEX LP text, so that any solver
// can check the plan's total: a column for every useful set and span, one for
// working at a docking, one for the whole days of a campaign, and the constant
// as a variable fixed at 1. Zones that no set can hold are left out.
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
}

func (l *lp) zone(n int, o options) {
	z := o.z
	leave, arrive := make([]bytes.Buffer, z.end()), make([]bytes.Buffer, z.end()+1)
	work := make([]bytes.Buffer, z.end())
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

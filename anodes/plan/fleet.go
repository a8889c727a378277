package plan

import (
	"context"
	"math"
	"runtime"
	"sync"
	"sync/atomic"

	"anodewright/anodes/order"
	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// Member is one asset of a fleet that is planned as a whole.
type Member struct {
	Asset *hull.Asset
	// Factors are the demand factors by zone that were learned before; nil
	// takes those of the design figures.
	Factors []float64
}

// MemberPlan is what the view of a fleet shows of a member's plan.
type MemberPlan struct {
	Index      int // of the member
	Total      float64
	LowerBound float64
	Unmet      int // zones that cannot be held
	Order      []order.Line
	Schedule   []renewal.Line
}

// OrderBy returns the earliest order-by date for a docking not before today,
// and whether there is one.
func (m *MemberPlan) OrderBy(today hull.Date) (first hull.Date, ok bool) {
	for _, l := range m.Order {
		if l.Ordered > 0 && l.Docking >= today && (!ok || l.OrderBy < first) {
			first, ok = l.OrderBy, true
		}
	}
	return first, ok
}

// Fleet plans many assets, as many at once as there are processors: member
// returns the asset of an index from 0 to n-1 and may be called from several
// goroutines at once; done takes each plan as it is made, one at a time and in
// any order, so that no more than a few are held, and their number tells how
// far it is. Fleet returns when all are done, or as soon as the context is
// cancelled or a member cannot be had, with that error.
//
// The plans are those of [Compute], without forecast and cautions.
func Fleet(ctx context.Context, n int, today hull.Date, member func(int) (Member, error), done func(MemberPlan)) error {
	ctx, stop := context.WithCancelCause(ctx)
	defer stop(nil)
	var next atomic.Int64
	var all sync.WaitGroup
	var one sync.Mutex
	for range min(n, runtime.GOMAXPROCS(0)) {
		all.Go(func() {
			for ctx.Err() == nil {
				i := int(next.Add(1)) - 1
				if i >= n {
					return
				}
				m, err := member(i)
				if err != nil {
					stop(err)
					return
				}
				p := m.plan(i, today)
				one.Lock()
				if ctx.Err() == nil {
					done(p)
				}
				one.Unlock()
			}
		})
	}
	all.Wait()
	return context.Cause(ctx)
}

func (m Member) plan(i int, today hull.Date) MemberPlan {
	a := m.Asset
	if !a.Today.IsZero() {
		today = a.Today
	}
	o := &Outcome{Asset: a, Today: today, Intervals: a.Intervals()}
	o.factors()
	p := renewal.Problem{Asset: a}
	for k, d := range hull.Demand(a) {
		if m.Factors != nil {
			o.Zones[k].Factor.Used = m.Factors[k]
		}
		p.Demand, p.Factors = append(p.Demand, d.Total), append(p.Factors, o.Zones[k].Factor.Used)
	}
	p.Keeps = o.keeps()
	r := p.Solve()
	s := MemberPlan{Index: i, Total: r.Best.Total, LowerBound: r.LowerBound, Unmet: len(r.Best.Unmet), Schedule: r.Best.Lines}
	if s.Unmet > 0 {
		s.Total = math.NaN()
	}
	s.Order = order.Lines(a, s.Schedule, today)
	return s
}

package session

import (
	"slices"

	"anodewright/anodes/order"
	"anodewright/anodes/plan"
)

// Purchase is what is weighed before an order goes out: how much to buy before
// anyone has seen the old anodes, and what is next best where it is late.
type Purchase struct {
	Staged []order.Staged
	Late   []plan.Late
}

// bought is the newest purchase, and the outcome that it is of.
type bought struct {
	of   *plan.Outcome
	got  *Purchase
	busy bool
}

// Purchase returns the purchase of the open asset, and whether it is known. If
// not it is computed in the background, and Notify's function is called when
// it is.
func (s *Session) Purchase() (*Purchase, bool) {
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.open == nil || s.open.outcome == nil {
		return nil, false
	}
	o := s.open.outcome
	if s.bought.of == o {
		return s.bought.got, true
	}
	if !s.bought.busy {
		s.bought.busy = true
		s.busy.Add(1)
		go s.weighPurchase(o)
	}
	return nil, false
}

func (s *Session) weighPurchase(o *plan.Outcome) {
	defer s.busy.Done()
	p := &Purchase{plan.Stage(o), plan.LateOrders(o)}
	s.mu.Lock()
	s.bought = bought{of: o, got: p}
	s.mu.Unlock()
	s.changed()
}

// FleetOrders is what the whole fleet has to order. It is not to be changed.
type FleetOrders struct {
	order.Calendar
	Fleet []order.Member // whose places the calendar names
	IDs   []string       // of the members in the register
}

// gathered is the newest calendar of the fleet, and what it is of.
type gathered struct {
	of    []*Outlook
	weeks float64
	got   *FleetOrders
	busy  bool
}

// FleetOrders returns the orders of all assets whose outcomes are computed,
// nil until they are known. Lines whose order-by dates lie within so many
// weeks are joined. Where the fleet has changed the newest calendar known is
// returned, the next is made in the background, and Notify's function is
// called when it is there.
func (s *Session) FleetOrders(weeks float64) *FleetOrders {
	s.mu.Lock()
	defer s.mu.Unlock()
	var of []*Outlook
	for _, e := range s.fleet {
		if e.outlook != nil {
			of = append(of, e.outlook)
		}
	}
	g := &s.calendar
	if !g.busy && (g.got == nil || g.weeks != weeks || !slices.Equal(g.of, of)) {
		next := &FleetOrders{}
		for _, e := range s.fleet {
			if l := e.outlook; l != nil {
				a := l.of.Asset
				next.IDs = append(next.IDs, e.id)
				next.Fleet = append(next.Fleet, order.Member{Name: a.Name, Currency: a.Currency, Today: l.Today, Costs: a.Costs, Lines: l.Order})
			}
		}
		g.busy = true
		s.busy.Add(1)
		go func() {
			defer s.busy.Done()
			next.Calendar = order.CalendarOf(next.Fleet, weeks)
			s.mu.Lock()
			s.calendar = gathered{of: of, weeks: weeks, got: next}
			s.mu.Unlock()
			s.changed()
		}()
	}
	return g.got
}

// FleetProgress returns how many assets of the fleet are computed as they are
// now, of how many, and whether the others rest: see [Session.RestFleet].
func (s *Session) FleetProgress() (computed, of int, rests bool) {
	s.mu.Lock()
	defer s.mu.Unlock()
	for _, e := range s.fleet {
		if !s.old(e) {
			computed++
		}
	}
	return computed, len(s.fleet), s.rests
}

// RestFleet stops computing the outcomes of assets that are not open, or goes
// on with it.
func (s *Session) RestFleet(rest bool) {
	s.mu.Lock()
	s.rests = rest
	s.mu.Unlock()
	if !rest {
		s.compute()
	}
	s.changed()
}

package session

import (
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

// FleetOrders is what the whole fleet has to order.
type FleetOrders struct {
	order.Calendar
	Fleet    []order.Member // whose places the calendar names
	IDs      []string       // of the members in the register
	Computed int            // assets whose newest state is in it
	Of       int            // all assets
	Rests    bool           // the others are not computed: see [Session.RestFleet]
}

// FleetOrders returns the orders of all assets whose outcomes are computed.
// Lines whose order-by dates lie within so many weeks are joined.
func (s *Session) FleetOrders(weeks float64) FleetOrders {
	s.mu.Lock()
	defer s.mu.Unlock()
	f := FleetOrders{Of: len(s.fleet), Rests: s.rests}
	for _, e := range s.fleet {
		o := e.outcome
		if o == nil {
			continue
		}
		if !s.old(e) {
			f.Computed++
		}
		f.IDs = append(f.IDs, e.id)
		f.Fleet = append(f.Fleet, order.Member{Name: e.asset.Name, Currency: o.Asset.Currency, Today: o.Today, Costs: o.Asset.Costs, Lines: o.Order})
	}
	f.Calendar = order.CalendarOf(f.Fleet, weeks)
	return f
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

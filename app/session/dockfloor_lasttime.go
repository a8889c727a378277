package session

import (
	"cmp"
	"math"
	"slices"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// LastTime is what is known of the last docking's anodes, and what the same
// order would mean again at the next docking. Money is in the asset's currency;
// what is not known is NaN.
type LastTime struct {
	Closed  *plan.AsBuilt // nil where no docking was closed here yet
	Date    hull.Date     // on which the pieces were put on
	PutOn   []hull.PutOn
	Ordered []hull.Stock // by pattern; what was put on where the order is not known
	Known   bool         // the order is known
	Left    float64      // share of their metal that is left at the next docking, by the forecast
	Next    hull.Docking

	Again, Planned         float64 // price of the same order, and of this plan's for the next docking
	AgainMass, PlannedMass float64 // kg net
	// Over is by how much the cheapest plan with the same pieces again costs
	// more than this plan, over all dockings, discounted.
	Over    float64
	Refused []Refused // where the same pieces would not do
}

// Refused is a zone in which the same pieces would not do.
type Refused struct {
	Zone, Why string
}

// lastTimed is the newest look back, and the outcome that it is of.
type lastTimed struct {
	of   *plan.Outcome
	got  *LastTime
	busy bool
}

// LastTime returns what was fitted last time and what the same order would
// mean again, nil where nothing is known or no docking lies ahead, and whether
// that is computed. If not it is computed in the background, and Notify's
// function is called when it is.
func (s *Session) LastTime() (*LastTime, bool) {
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.open == nil || s.open.outcome == nil {
		return nil, false
	}
	o := s.open.outcome
	if s.lastTime.of == o {
		return s.lastTime.got, true
	}
	if !s.lastTime.busy {
		s.lastTime.busy = true
		s.busy.Add(1)
		go func() {
			defer s.busy.Done()
			l := lookBack(o)
			s.mu.Lock()
			s.lastTime = lastTimed{of: o, got: l}
			s.mu.Unlock()
			s.changed()
		}()
	}
	return nil, false
}

// lookBack looks at the pieces put on last and plans with the same again.
func lookBack(o *plan.Outcome) *LastTime {
	a := o.Asset
	ahead := a.Ahead()
	l := &LastTime{Left: math.NaN(), Over: math.NaN()}
	if n := len(a.Closed); n > 0 {
		l.Closed = plan.CompareClosed(a, n-1)
		l.Date = a.Closed[n-1].Date
	} else {
		for _, z := range a.Zones {
			for _, f := range z.Fitted {
				l.Date = max(l.Date, f.Fitted)
			}
		}
	}
	for _, z := range a.Zones {
		for _, f := range z.Fitted {
			if f.Fitted == l.Date && f.Count > 0 {
				l.PutOn = append(l.PutOn, hull.PutOn{Zone: z.ID, Pattern: f.Pattern, Count: f.Count})
			}
		}
	}
	if len(ahead) == 0 || l.Date.IsZero() {
		return nil
	}
	l.Next = ahead[0]
	l.order(a)
	l.left(o)
	for _, line := range o.Order {
		if line.Docking == l.Next.Date {
			l.Planned, l.PlannedMass = l.Planned+line.Price, l.PlannedMass+line.Net
		}
	}
	for _, s := range l.Ordered {
		if p, ok := a.Pattern(s.Pattern); ok {
			l.Again += float64(s.Count) * p.Price
			l.AgainMass += float64(s.Count) * p.NetMass
		}
	}
	l.again(o)
	return l
}

// order is what was bought last time, or else what was put on.
func (l *LastTime) order(a *hull.Asset) {
	if l.Closed != nil && len(l.Closed.Closed.Ordered) > 0 {
		l.Ordered, l.Known = l.Closed.Closed.Ordered, true
		return
	}
	for _, p := range l.PutOn {
		i := slices.IndexFunc(l.Ordered, func(s hull.Stock) bool { return s.Pattern == p.Pattern })
		if i < 0 {
			l.Ordered = append(l.Ordered, hull.Stock{Pattern: p.Pattern, Count: p.Count})
		} else {
			l.Ordered[i].Count += p.Count
		}
	}
}

// left is how much of the pieces' metal will be there at the next docking.
func (l *LastTime) left(o *plan.Outcome) {
	mass, left := 0.0, 0.0
	for _, e := range o.DraftClosing(l.Next.Date, 0).Expected {
		if p, ok := o.Asset.Pattern(e.Pattern); ok && e.Fitted == l.Date {
			mass += float64(e.Count) * p.NetMass
			left += float64(e.Count) * p.NetMass * (1 - e.Median)
		}
	}
	if mass > 0 {
		l.Left = left / mass
	}
}

// again plans with the same pieces put on at the next docking, the rest chosen
// as it is cheapest then.
func (l *LastTime) again(o *plan.Outcome) {
	var pins []renewal.Pin
	for _, p := range l.PutOn {
		z, ok := o.Asset.Zone(p.Zone)
		if _, own := z.Hold().(hull.ByAnodes); !ok || !own || slices.ContainsFunc(pins, func(q renewal.Pin) bool { return q.Zone == p.Zone }) {
			continue
		}
		pin := renewal.Pin{Zone: p.Zone, Docking: l.Next.Date, Action: renewal.Renew, Pattern: p.Pattern, Count: p.Count}
		if slices.ContainsFunc(z.Fitted, func(f hull.Fitted) bool { return f.Fitted != l.Date }) {
			pin.Action = renewal.Add // as it was added then
		}
		pins = append(pins, pin)
	}
	if len(pins) == 0 || len(o.Unmet) > 0 {
		return
	}
	opts := []plan.Option{plan.WithPins(pins), plan.WithLimits(o.Limits)}
	if o.Learns {
		opts = append(opts, plan.WithReadings())
	}
	same := plan.Compute(o.Asset, o.Today, opts...)
	stands := 0
	for _, p := range same.Pins {
		if p.Refused == "" {
			stands++
			continue
		}
		z, _ := o.Asset.Zone(p.Zone)
		l.Refused = append(l.Refused, Refused{cmp.Or(z.Name, p.Zone), p.Refused})
	}
	if stands > 0 && len(same.Unmet) == 0 {
		l.Over = same.Money.Total - o.Money.Total
	}
}

package session

import (
	"errors"
	"fmt"
	"slices"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// DraftClosing returns the closing of a docking ahead of the open asset as it
// would be if all went as planned, for a person to change what differs: see
// plan.Outcome.DraftClosing. A zero docking stands for the next one ahead, a
// zero date for the day listed.
func (s *Session) DraftClosing(docking, date hull.Date) (hull.Closing, error) {
	o, err := s.newest()
	if err != nil {
		return hull.Closing{}, err
	}
	if docking.IsZero() {
		if ahead := o.Asset.Ahead(); len(ahead) > 0 {
			docking = ahead[0].Date
		}
	}
	if docking.IsZero() && date.IsZero() {
		return hull.Closing{}, errors.New("the asset has no docking ahead: say on which day it was docked")
	}
	return o.DraftClosing(docking, date), nil
}

// newest returns the outcome of the open asset as it is now, computed here
// where the background has not come to it yet.
func (s *Session) newest() (*plan.Outcome, error) {
	s.mu.Lock()
	if s.open == nil {
		s.mu.Unlock()
		return nil, errors.New("no asset is open")
	}
	a, o, how := s.open.asset, s.open.outcome, s.open.how()
	stale := s.old(s.open)
	s.mu.Unlock()
	if stale {
		o = plan.Compute(a, s.today, how...)
	}
	return o, nil
}

// CloseDocking closes a docking of the open asset, in one step that can be
// undone. Faults come back as hull.Faults with the closing's fields, or those
// of the asset that would come of it, and then nothing is changed. What was
// pinned for a docking that is no longer ahead goes.
func (s *Session) CloseDocking(c hull.Closing) error {
	var ahead []hull.Docking
	err := s.Do(closingText(c), func(a *hull.Asset) error {
		next, faults := hull.Close(a, c)
		if len(faults) > 0 {
			return faults
		}
		*a = *next
		ahead = a.Ahead()
		return nil
	})
	if err != nil {
		return err
	}
	return s.setPins(func(pins []renewal.Pin) []renewal.Pin {
		return slices.DeleteFunc(pins, func(p renewal.Pin) bool {
			return !slices.ContainsFunc(ahead, func(d hull.Docking) bool { return d.Date == p.Docking })
		})
	})
}

// closingText is what the history says of a closing: close the docking of
// 2027-04-19: pieces put on 12, taken off 8; zones with coating works 3.
func closingText(c hull.Closing) string {
	on, off, zones := 0, 0, map[string]bool{}
	for _, p := range c.On {
		on += p.Count
	}
	for _, s := range c.Sets {
		off += s.Off
	}
	for _, w := range c.Works {
		zones[w.Zone] = true
	}
	text := fmt.Sprintf("close the docking of %s: pieces put on %d, taken off %d", c.Date, on, off)
	if len(zones) > 0 {
		text += fmt.Sprintf("; zones with coating works %d", len(zones))
	}
	if c.By != "" {
		text += "; by " + c.By
	}
	return text
}

// Closed returns what was planned and what was found at every closed docking
// of the open asset, the latest first.
func (s *Session) Closed() []*plan.AsBuilt {
	a := s.Asset()
	if a == nil {
		return nil
	}
	var all []*plan.AsBuilt
	for i := len(a.Closed) - 1; i >= 0; i-- {
		all = append(all, plan.CompareClosed(a, i))
	}
	return all
}

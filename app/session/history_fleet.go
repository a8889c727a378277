package session

import (
	"errors"
	"fmt"

	"anodewright/hull"
)

// AddFleet stores new assets in their order and opens the first. It goes on
// until stopped says so, and then keeps none of them.
func (s *Session) AddFleet(fleet []*hull.Asset, what string, stopped func() bool) error {
	var added []*entry
	var err error
	for i, a := range fleet {
		if stopped() {
			return s.withdraw(added)
		}
		var id string
		var e *entry
		if id, err = s.store.Add(a, what); err == nil {
			e, err = s.load(id)
		}
		if err != nil {
			err = fmt.Errorf("%d of %d assets were added: %w", i, len(fleet), err)
			break
		}
		added = append(added, e)
	}
	if len(added) == 0 {
		return err
	}
	s.mu.Lock()
	s.fleet = append(s.fleet, added...)
	s.mu.Unlock()
	s.Select(added[0].id)
	s.compute()
	return err
}

// withdraw removes assets that were stored a moment ago.
func (s *Session) withdraw(added []*entry) error {
	var err error
	for _, e := range added {
		err = errors.Join(err, s.store.Remove(e.id, e.rev))
	}
	if err != nil {
		return fmt.Errorf("the import was stopped, but not all of it could be taken back: %w", err)
	}
	return errors.New("the import was stopped; no asset was added")
}

package session

import (
	"fmt"

	"anodewright/hull"
)

// AddFleet stores new assets in their order and opens the first.
func (s *Session) AddFleet(fleet []*hull.Asset, what string) error {
	var added []*entry
	var err error
	for i, a := range fleet {
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

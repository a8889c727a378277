package session

import (
	"encoding/json"
	"errors"

	"anodewright/anodes/renewal"
)

// limitsOf is the register's setting that holds the limits of an asset.
func limitsOf(id string) string { return "limits: " + id }

// loadLimits reads an asset's limits. A text that cannot be read is none.
func (s *Session) loadLimits(e *entry) {
	text, err := s.store.Setting(limitsOf(e.id))
	if err != nil || text == "" {
		return
	}
	var l renewal.Limits
	if json.Unmarshal([]byte(text), &l) == nil && faultOf(l) == nil {
		e.limits = l
	}
}

// Limits returns what the plan of the open asset may do at one docking at
// most.
func (s *Session) Limits() renewal.Limits {
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.open == nil {
		return renewal.Limits{}
	}
	return s.open.limits
}

// SetLimits plans the open asset within limits at every docking; a 0 is no
// limit. Like pins they are kept in the register beside the asset and are no
// edit to undo.
func (s *Session) SetLimits(l renewal.Limits) error {
	if err := faultOf(l); err != nil {
		return err
	}
	return s.locked(func(e *entry) (bool, error) {
		if l == e.limits {
			return false, nil
		}
		e.limits = l
		if s.store.ReadOnly() != "" {
			return true, nil // for as long as the window is open
		}
		text := ""
		if l != (renewal.Limits{}) {
			b, err := json.Marshal(l)
			if err != nil {
				return true, err
			}
			text = string(b)
		}
		return true, s.store.SetSetting(limitsOf(e.id), text)
	})
}

func faultOf(l renewal.Limits) error {
	if l.Pieces < 0 || l.Patterns < 0 || !(l.Budget >= 0) {
		return errors.New("want a limit of 0 or more; 0 is no limit")
	}
	return nil
}

package session

import "anodewright/anodes/plan"

// Decisions returns what each decision of the open asset's plan is worth, and
// whether that is known. If not it is computed in the background, and Notify's
// function is called when it is.
func (s *Session) Decisions() ([]plan.Decision, bool) {
	s.mu.Lock()
	defer s.mu.Unlock()
	e := s.open
	if e == nil || e.outcome == nil {
		return nil, false
	}
	if e.decided == e.outcome {
		return e.decisions, true
	}
	if !s.decides {
		s.decides = true
		s.busy.Add(1)
		go s.decide(e, e.outcome)
	}
	return nil, false
}

func (s *Session) decide(e *entry, o *plan.Outcome) {
	defer s.busy.Done()
	all := plan.Decisions(o)
	s.mu.Lock()
	e.decisions, e.decided = all, o
	s.decides = false
	s.mu.Unlock()
	s.changed()
}

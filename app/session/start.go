package session

import (
	"anodewright/assets"
	"anodewright/storage/assetfile"
)

// AddDemo adds the demo fleet to the session's.
func AddDemo(s *Session) error {
	first := ""
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			return err
		}
		if err := s.Add(a, "demo fleet"); err != nil {
			return err
		}
		if first == "" {
			first = s.openID()
		}
	}
	s.Select(first)
	return nil
}

func (s *Session) openID() string {
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.open == nil {
		return ""
	}
	return s.open.id
}

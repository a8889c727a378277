package session

import (
	"encoding/json"
	"slices"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// pinsOf is the register's setting that holds the pinned actions of an asset.
func pinsOf(id string) string { return "pins: " + id }

// loadPins reads an asset's pins. A text that cannot be read is no pin.
func (s *Session) loadPins(e *entry) {
	text, err := s.store.Setting(pinsOf(e.id))
	if err != nil || text == "" {
		return
	}
	var pins []renewal.Pin
	if json.Unmarshal([]byte(text), &pins) == nil {
		e.pins = pins
	}
}

// pinned reports whether an outcome was planned with the entry's pins.
func (e *entry) pinned(o *plan.Outcome) bool {
	return slices.EqualFunc(o.Pins, e.pins, func(a renewal.Pinned, b renewal.Pin) bool { return a.Pin == b })
}

// Pins returns the pinned actions of the open asset.
func (s *Session) Pins() []renewal.Pin {
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.open == nil {
		return nil
	}
	return slices.Clone(s.open.pins)
}

// Pin plans the open asset with an action as it is, in place of what was
// pinned for the same zone and docking. Pins are kept in the register beside
// the asset, not in the asset file, and are no edit to undo.
func (s *Session) Pin(p renewal.Pin) error {
	return s.setPins(func(pins []renewal.Pin) []renewal.Pin {
		return append(without(pins, p.Zone, p.Docking), p)
	})
}

// Unpin takes back what is pinned for a zone at a docking.
func (s *Session) Unpin(zone string, docking hull.Date) error {
	return s.setPins(func(pins []renewal.Pin) []renewal.Pin { return without(pins, zone, docking) })
}

// UnpinAll takes back all pins of the open asset.
func (s *Session) UnpinAll() error {
	return s.setPins(func([]renewal.Pin) []renewal.Pin { return nil })
}

func without(pins []renewal.Pin, zone string, docking hull.Date) []renewal.Pin {
	return slices.DeleteFunc(pins, func(p renewal.Pin) bool { return p.Zone == zone && p.Docking == docking })
}

func (s *Session) setPins(change func([]renewal.Pin) []renewal.Pin) error {
	return s.locked(func(e *entry) (bool, error) {
		next := change(slices.Clone(e.pins))
		if slices.Equal(next, e.pins) {
			return false, nil
		}
		return true, s.keepPins(e, next)
	})
}

// keepPins sets an asset's pins and stores them. The caller holds the lock.
func (s *Session) keepPins(e *entry, pins []renewal.Pin) error {
	e.pins = pins
	if s.store.ReadOnly() != "" {
		return nil // for as long as the window is open
	}
	text := ""
	if len(pins) > 0 {
		b, err := json.Marshal(pins)
		if err != nil {
			return err
		}
		text = string(b)
	}
	return s.store.SetSetting(pinsOf(e.id), text)
}

// movePins lets pins follow the dockings that an edit moves to another day: a
// docking is moved where the list keeps its length and no other has the old
// day now. Should the register not take them, the edit is stored all the same
// and the moved pins hold as long as the window is open.
func (s *Session) movePins(e *entry, next *hull.Asset) {
	before := e.asset.Dockings
	if len(e.pins) == 0 || len(before) != len(next.Dockings) {
		return
	}
	pins := slices.Clone(e.pins)
	for i, d := range before {
		to := next.Dockings[i].Date
		if to == d.Date || slices.ContainsFunc(next.Dockings, func(other hull.Docking) bool { return other.Date == d.Date }) {
			continue
		}
		for n := range pins {
			if e.pins[n].Docking == d.Date {
				pins[n].Docking = to
			}
		}
	}
	if !slices.Equal(pins, e.pins) {
		_ = s.keepPins(e, pins)
	}
}

package session

import (
	"errors"
	"fmt"

	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// A Cell is a text for a field of the i-th item of a list.
type Cell struct {
	Item  int
	Field Field
	Text  string
}

// SetBlock sets many fields of one list of the open asset in one step that can
// be undone, as a block pasted from a spreadsheet. Zones that lie beyond the
// last one are added, like the last one but without anodes. A text with a
// fault is kept as a draft, as with SetText; the others get in. It returns how
// many have a fault.
func (s *Session) SetBlock(list List, cells []Cell) (faults int, err error) {
	err = s.locked(func(e *entry) (bool, error) {
		next := assetfile.Clone(e.asset)
		if list == Zones {
			addZones(next, cells)
		}
		var left []Cell // with a fault
		if all := setCells(next, list, cells); all != nil {
			next = all
		} else {
			next, left = setEach(next, list, cells)
		}
		changed, err := s.do(e, pasteText(len(cells)), func(a *hull.Asset) error {
			*a = *next
			return nil
		})
		if err != nil {
			return changed, err
		}
		for _, c := range left {
			kept, err := s.keepDraft(e, draftPath(e.asset, list, c.Item, c.Field), c.Text)
			if err != nil {
				return changed || kept, err
			}
			changed = changed || kept
		}
		faults = len(left)
		return changed, nil
	})
	return faults, err
}

// addZones adds zones until there are as many as the cells need.
func addZones(a *hull.Asset, cells []Cell) {
	need := 0
	for _, c := range cells {
		need = max(need, c.Item+1)
	}
	for len(a.Zones) > 0 && len(a.Zones) < need {
		z := assetfile.Clone(a).Zones[len(a.Zones)-1]
		z.Name = freeName(a, z.Name)
		z.ID = freeID(a, z.Name)
		z.Fitted = nil
		a.Zones = append(a.Zones, z)
	}
}

// setCells returns the asset with all cells set, nil if any has a fault.
func setCells(a *hull.Asset, list List, cells []Cell) *hull.Asset {
	next := assetfile.Clone(a)
	for _, c := range cells {
		if c.Item >= lengthOf(next, list) {
			return nil
		}
		if c.Text != c.Field.Get(next, c.Item) && c.Field.Set(next, c.Item, c.Text) != nil {
			return nil
		}
	}
	if hull.Check(next).Err() != nil {
		return nil
	}
	return next
}

// setEach sets what can be set, one cell after the other, and returns the
// cells with a fault. Cells beyond the list are left out.
func setEach(a *hull.Asset, list List, cells []Cell) (next *hull.Asset, left []Cell) {
	for _, c := range cells {
		if c.Item >= lengthOf(a, list) {
			continue
		}
		if set := setCells(a, list, []Cell{c}); set != nil {
			a = set
		} else {
			left = append(left, c)
		}
	}
	return a, left
}

// MoveZone moves the i-th zone up or down by so many places and returns where
// it is then.
func (s *Session) MoveZone(i, by int) (int, error) {
	to := i + by
	return to, s.Do("move a zone", func(a *hull.Asset) error {
		if i < 0 || i >= len(a.Zones) || to < 0 || to >= len(a.Zones) {
			return errors.New("the zone is at the end of the list")
		}
		z := a.Zones[i]
		a.Zones = insert(remove(a.Zones, i), to, z)
		return nil
	})
}

// DuplicateZone adds a copy of the i-th zone behind it, with its anodes, and
// returns its place.
func (s *Session) DuplicateZone(i int) (int, error) {
	return i + 1, s.Do("duplicate a zone", func(a *hull.Asset) error {
		if i < 0 || i >= len(a.Zones) {
			return errors.New("no zone is selected")
		}
		z := assetfile.Clone(a).Zones[i]
		z.Name = freeName(a, z.Name)
		z.ID = freeID(a, z.Name)
		a.Zones = insert(a.Zones, i+1, z)
		return nil
	})
}

// pasteText is what a pasted block is called in the history, whose texts are
// kept in English.
func pasteText(cells int) string {
	if cells == 1 {
		return "paste 1 cell"
	}
	return fmt.Sprintf("paste %d cells", cells)
}

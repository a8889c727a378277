package session

import (
	"errors"
	"fmt"
	"strconv"
	"strings"

	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// fieldsOf returns all fields of the items of a list.
func fieldsOf(list List) []Field {
	switch list {
	case Zones:
		return append(ZoneColumns(), ZoneDetails()...)
	case Waters:
		return WaterFields()
	case Dockings:
		return DockingFields()
	}
	return AssetFields()
}

// idOf names the i-th item of a list so that its drafts stay with it when
// others come and go.
func idOf(a *hull.Asset, list List, i int) string {
	switch list {
	case Zones:
		return a.Zones[i].ID
	case Waters:
		return strconv.Itoa(i)
	case Dockings:
		return strconv.Itoa(i)
	}
	return ""
}

func lengthOf(a *hull.Asset, list List) int {
	switch list {
	case Zones:
		return len(a.Zones)
	case Waters:
		return len(a.Waters)
	case Dockings:
		return len(a.Dockings)
	}
	return 1
}

// draftPath is where the draft of a field is kept: zones[side].depth_m.
func draftPath(a *hull.Asset, list List, i int, f Field) string {
	if list == Whole {
		return f.Key
	}
	return fmt.Sprintf("%s[%s].%s", list, idOf(a, list, i), f.Key)
}

// locate finds the field of a draft's path.
func locate(a *hull.Asset, path string) (list List, i int, f Field, ok bool) {
	for _, list := range []List{Whole, Zones, Waters, Dockings} {
		for i := range lengthOf(a, list) {
			for _, f := range fieldsOf(list) {
				if draftPath(a, list, i, f) == path {
					return list, i, f, true
				}
			}
		}
	}
	return "", 0, Field{}, false
}

// try returns the asset with a field set, or what is wrong with the text.
func try(a *hull.Asset, list List, f Field, i int, text string) (next *hull.Asset, fault string) {
	next = assetfile.Clone(a)
	if err := f.Set(next, i, text); err != nil {
		return nil, err.Error()
	}
	faults := hull.Check(next)
	if len(faults) == 0 {
		return next, ""
	}
	path := f.Key
	if list != Whole {
		path = fmt.Sprintf("%s[%d].%s", list, i, f.Key)
	}
	for _, x := range faults {
		if rest, own := strings.CutPrefix(x.Path, path); own {
			// The cell says which field it is; what is left says where in it.
			return nil, hull.Fault{Path: strings.TrimPrefix(rest, "."), Want: x.Want, Got: x.Got}.Error()
		}
	}
	return nil, faults[0].Error()
}

// Text returns what a field of the open asset shows: its value, or the text
// that a person typed and that has a fault, with the fault in words.
func (s *Session) Text(list List, i int, f Field) (text, fault string) {
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.open == nil || i >= lengthOf(s.open.asset, list) {
		return "", ""
	}
	if d, ok := s.open.drafts[draftPath(s.open.asset, list, i, f)]; ok {
		return d.text, d.fault
	}
	return f.Get(s.open.asset, i), ""
}

// SetText sets a field of the open asset. A text with a fault is kept as a
// draft, in the register too, and never enters the asset; the fault can be
// read with Text. The error says that nothing could be stored.
func (s *Session) SetText(list List, i int, f Field, text string) error {
	s.mu.Lock()
	e := s.open
	if e == nil || i >= lengthOf(e.asset, list) {
		s.mu.Unlock()
		return nil
	}
	a, path := e.asset, draftPath(e.asset, list, i, f)
	_, drafted := e.drafts[path]
	name := f.Title
	if list == Zones {
		name = a.Zones[i].Name + ": " + name
	}
	s.mu.Unlock()
	if text == f.Get(a, i) && !drafted {
		return nil
	}
	if text != f.Get(a, i) {
		if _, fault := try(a, list, f, i, text); fault != "" {
			err := s.store.SetDraft(e.id, path, text)
			s.mu.Lock()
			e.drafts[path] = draft{text, fault}
			s.mu.Unlock()
			s.Changed()
			return err
		}
		err := s.Do(name, func(a *hull.Asset) error { return f.Set(a, i, text) })
		var faults hull.Faults
		if err != nil && !errors.As(err, &faults) {
			return err
		}
	}
	if !drafted {
		return nil
	}
	s.mu.Lock()
	delete(e.drafts, path)
	s.mu.Unlock()
	s.Changed()
	return s.store.ClearDraft(e.id, path)
}

// Drafts returns how many fields of the open asset hold a text with a fault.
func (s *Session) Drafts() int {
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.open == nil {
		return 0
	}
	return len(s.open.drafts)
}

// AddZone adds a zone behind the i-th, like it but without anodes and with an
// id of its own, and returns its place.
func (s *Session) AddZone(i int) (int, error) {
	at := i + 1
	return at, s.Do("add a zone", func(a *hull.Asset) error {
		z := assetfile.Clone(a).Zones[i]
		z.Name = freeName(a, z.Name)
		z.ID = freeID(a, z.Name)
		z.Fitted = nil
		a.Zones = insert(a.Zones, at, z)
		return nil
	})
}

// RemoveZone removes the i-th zone, with the works and readings that name it.
func (s *Session) RemoveZone(i int) error {
	return s.Do("remove a zone", func(a *hull.Asset) error {
		id := a.Zones[i].ID
		if len(a.Zones) == 1 {
			return errors.New("an asset has at least one zone")
		}
		for _, z := range a.Zones {
			if z.HeldBy == id {
				return fmt.Errorf("%s is held by this zone: change that first", z.Name)
			}
		}
		a.Zones = remove(a.Zones, i)
		for d := range a.Dockings {
			a.Dockings[d].Works = keep(a.Dockings[d].Works, func(w hull.Work) bool { return w.Zone != id })
		}
		a.Readings = keep(a.Readings, func(r hull.Reading) bool { return r.Zone != id })
		return nil
	})
}

// AddDocking adds a docking 30 months after the last one listed, moving the
// horizon if it must.
func (s *Session) AddDocking() error {
	return s.Do("add a docking", func(a *hull.Asset) error {
		last := a.Start()
		if n := len(a.Dockings); n > 0 {
			last = max(last, a.Dockings[n-1].Date)
		}
		d := hull.Docking{Date: last.AddMonths(30)}
		hull.SetDefaults(&d)
		a.Dockings = append(a.Dockings, d)
		if a.Horizon <= d.Date {
			a.Horizon = d.Date.AddMonths(30)
		}
		return nil
	})
}

// RemoveDocking removes the i-th docking.
func (s *Session) RemoveDocking(i int) error {
	return s.Do("remove a docking", func(a *hull.Asset) error {
		if len(a.Dockings) == 1 {
			return errors.New("an asset has at least one docking")
		}
		a.Dockings = remove(a.Dockings, i)
		return nil
	})
}

// AddWater adds a water.
func (s *Session) AddWater() error {
	return s.Do("add a water", func(a *hull.Asset) error {
		t, salinity := 15.0, 35.0
		w := hull.Water{Name: "New water", Temperature: &t, Salinity: &salinity}
		hull.SetDefaults(&w)
		for n := len(a.Waters) + 1; w.ID == ""; n++ {
			if _, taken := a.Water(fmt.Sprintf("water-%d", n)); !taken {
				w.ID = fmt.Sprintf("water-%d", n)
			}
		}
		a.Waters = append(a.Waters, w)
		return nil
	})
}

func insert[T any](list []T, i int, v T) []T {
	return append(list[:i:i], append([]T{v}, list[i:]...)...)
}

func remove[T any](list []T, i int) []T { return append(list[:i:i], list[i+1:]...) }

func keep[T any](list []T, wanted func(T) bool) []T {
	var kept []T
	for _, v := range list {
		if wanted(v) {
			kept = append(kept, v)
		}
	}
	return kept
}

func freeName(a *hull.Asset, name string) string {
	for n := 2; ; n++ {
		free := fmt.Sprintf("%s %d", strings.TrimRight(name, " 0123456789"), n)
		taken := false
		for _, z := range a.Zones {
			taken = taken || z.Name == free
		}
		if !taken {
			return free
		}
	}
}

// freeID makes an id of a name: small letters, figures and hyphens.
func freeID(a *hull.Asset, name string) string {
	base := strings.Trim(strings.Map(func(r rune) rune {
		switch {
		case r >= 'a' && r <= 'z', r >= '0' && r <= '9':
			return r
		case r >= 'A' && r <= 'Z':
			return r + 'a' - 'A'
		}
		return '-'
	}, name), "-")
	for strings.Contains(base, "--") {
		base = strings.ReplaceAll(base, "--", "-")
	}
	if base == "" {
		base = "zone"
	}
	id := base
	for n := 2; ; n++ {
		if _, taken := a.Zone(id); !taken {
			return id
		}
		id = fmt.Sprintf("%s-%d", base, n)
	}
}

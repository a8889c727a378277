package session

import (
	"errors"
	"fmt"
	"strings"

	"anodewright/app/say"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// AddZone adds a zone behind the i-th, like it but without anodes and with an
// id of its own, and returns its place.
func (s *Session) AddZone(i int) (int, error) {
	at := i + 1
	return at, s.Do("add a zone", func(a *hull.Asset) error {
		if i < 0 || i >= len(a.Zones) {
			return errors.New("no zone is selected")
		}
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
		if i < 0 || i >= len(a.Zones) {
			return errors.New("no zone is selected")
		}
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
		if i < 0 || i >= len(a.Dockings) {
			return errors.New("no docking is selected")
		}
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
		w := hull.Water{Name: say.T("New water"), Temperature: &t, Salinity: &salinity}
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

package session

import (
	"errors"
	"fmt"
	"time"

	"anodewright/hull"
	"anodewright/storage"
	"anodewright/storage/assetfile"
)

// Clash is an edit that could not be stored because another program had stored
// one of the same asset. Both versions are kept until one is chosen. It is an
// error, and a storage.ErrClash.
type Clash struct {
	Name        string    // of the asset
	Who         string    // stored the other version
	When        time.Time // when, UTC
	What        string    // the edit here
	Removed     bool      // the other program took the asset out of the fleet
	CanBoth     bool      // the edit can be made again on the other version
	Differences []Difference

	id     string
	mine   *hull.Asset
	again  func(*hull.Asset) error
	draft  string // where the text of the edit is kept
	reason error
}

// Error says who stored what, and that nothing is lost.
func (c *Clash) Error() string { return c.reason.Error() }

// Unwrap returns the register's clash.
func (c *Clash) Unwrap() error { return c.reason }

// Choice is what becomes of a clash.
type Choice string

// The choices.
const (
	Theirs Choice = "theirs" // the other version stays; the edit here is dropped
	Mine   Choice = "mine"   // the version here is stored; the other stays in the history
	Both   Choice = "both"   // the edit here is made again on the other version
)

// clash keeps both versions of an asset and shows the stored one. The caller
// holds the lock.
func (s *Session) clash(e *entry, mine *hull.Asset, what string, stored *storage.Clash) error {
	c := &Clash{Name: stored.Name, Who: stored.Who, When: stored.When, What: what, Removed: stored.Removed, id: e.id, mine: mine}
	before := e.asset
	c.reason = s.reload(e, stored)
	if !c.Removed && s.find(e.id) == e {
		c.Differences = differences(before, e.asset, mine)
		if len(c.Differences) == 0 { // both did the same
			return c.reason
		}
	}
	s.clashes[e.id] = c
	return c
}

// Clash returns the clash that is not decided on, that of the open asset
// first; nil when there is none.
func (s *Session) Clash() *Clash {
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.open != nil {
		if c := s.clashes[s.open.id]; c != nil {
			return c.told()
		}
	}
	for _, e := range s.fleet {
		if c := s.clashes[e.id]; c != nil {
			return c.told()
		}
	}
	for _, c := range s.clashes { // of assets that are no longer there
		return c.told()
	}
	return nil
}

func (c *Clash) told() *Clash {
	c.CanBoth = c.again != nil && !c.Removed
	return c
}

// Resolve decides on a clash. An error leaves it open, unless it is a newer
// clash, which then takes its place.
func (s *Session) Resolve(c *Clash, choice Choice) error {
	s.mu.Lock()
	if s.clashes[c.id] != c {
		s.mu.Unlock()
		return errors.New("this was decided on already")
	}
	err := s.resolve(c, choice)
	if err == nil {
		if e := s.find(c.id); e != nil && c.draft != "" {
			_, err = s.clearDraft(e, c.draft)
		}
		delete(s.clashes, c.id)
	}
	s.mu.Unlock()
	s.compute()
	s.changed()
	return err
}

func (s *Session) resolve(c *Clash, choice Choice) error {
	if choice == Theirs {
		return nil
	}
	e := s.find(c.id)
	if e == nil {
		if choice != Mine {
			return errors.New("the asset is no longer in the fleet: keep your version, or theirs, which is none")
		}
		if _, err := s.store.Restore(c.id); err != nil && !errors.Is(err, storage.ErrNotRemoved) {
			return err
		}
		now, err := s.load(c.id)
		if err != nil {
			return err
		}
		e, now.recalled = now, true
		s.fleet = append(s.fleet, e)
		s.open = e
	}
	change := func(a *hull.Asset) error {
		*a = *assetfile.Clone(c.mine)
		return nil
	}
	what := c.What + ", kept over the change by " + c.Who
	if choice == Both {
		if c.again == nil {
			return errors.New("this change cannot be made again by itself: keep theirs and make it anew, or keep mine")
		}
		change, what = c.again, c.What
	}
	_, err := s.do(e, what, change)
	return err
}

// Notice looks whether other programs changed the register and shows what is
// stored now. An asset that changed loses its steps to undo: they are in the
// history. It reports whether anything was changed. Do not call it while a
// field is being typed in.
func (s *Session) Notice() (bool, error) {
	s.mu.Lock()
	changed, err := s.notice()
	s.mu.Unlock()
	if changed {
		s.compute()
		s.changed()
	}
	return changed, err
}

func (s *Session) notice() (changed bool, err error) {
	version, err := s.store.DataVersion()
	if err != nil || version == s.version {
		return false, err
	}
	list, err := s.store.List()
	if err != nil {
		return false, err
	}
	var fleet []*entry
	var faults []error
	unread := map[string]bool{}
	for _, u := range s.unread {
		unread[u.Name] = true
	}
	for _, item := range list {
		e := s.find(item.ID)
		if e == nil || e.rev != item.Rev {
			now, err := s.load(item.ID)
			switch {
			case err != nil && e == nil:
				if !unread[item.Name] {
					faults = append(faults, fmt.Errorf("%s was changed by another program and cannot be shown: %w", item.Name, err))
				}
				continue
			case err != nil:
				faults = append(faults, err)
			case e == nil:
				e, changed = now, true
			default:
				now.outcome, now.outlook, now.recalled = e.outcome, e.outlook, true
				*e = *now
				changed = true
			}
		}
		fleet = append(fleet, e)
	}
	at, open := 0, s.open
	for i, e := range s.fleet {
		if e == open {
			at = i
		}
	}
	changed = changed || len(fleet) != len(s.fleet)
	for i := range fleet {
		changed = changed || fleet[i] != s.fleet[i]
	}
	s.fleet, s.version = fleet, version
	if open == nil || s.find(open.id) == nil {
		s.open = nil
		if len(fleet) > 0 {
			s.open = fleet[min(at, len(fleet)-1)]
		}
	}
	return changed, errors.Join(faults...)
}

package session

import (
	"errors"
	"fmt"
	"slices"
	"strings"

	"anodewright/hull"
	"anodewright/storage"
	"anodewright/storage/assetfile"
)

// History returns the edits of the open asset, the newest first.
func (s *Session) History() ([]storage.Revision, error) {
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.open == nil {
		return nil, errors.New("no asset is open")
	}
	all, err := s.store.History(s.open.id)
	slices.Reverse(all)
	return all, err
}

// Revision returns the open asset as it was after an edit.
func (s *Session) Revision(rev int64) (*hull.Asset, error) {
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.open == nil {
		return nil, errors.New("no asset is open")
	}
	return s.store.At(s.open.id, rev)
}

// BringBack makes the open asset what it was after an edit, as one new edit.
func (s *Session) BringBack(rev int64) error {
	old, err := s.Revision(rev)
	if err != nil {
		return err
	}
	return s.Do(fmt.Sprintf("bring back revision %d", rev), func(a *hull.Asset) error {
		*a = *assetfile.Clone(old)
		return nil
	})
}

const (
	undoWord = "undo: "
	redoWord = "redo: "
)

// recall fills the steps of an asset that was just opened with those that the
// register's history tells, so that undo goes on where the program was left.
// The caller holds the lock. A history that cannot be read gives no steps.
func (s *Session) recall(e *entry) {
	if e.recalled || s.store.ReadOnly() != "" {
		return
	}
	e.recalled = true
	history, err := s.store.History(e.id)
	if err != nil || len(history) == 0 || history[len(history)-1].Rev != e.rev {
		return
	}
	e.past, e.future = steps(history)
}

// steps plays a history, the first edit first, as the steps that led through
// it: an undo takes the last step back, a redo does it again, and any other
// edit is a new step.
func steps(history []storage.Revision) (past, future []step) {
	var at int64 // the revision that has the asset as it is
	back := func(from, to *[]step, what, word string) bool {
		n := len(*from)
		if n == 0 || word+(*from)[n-1].what != what {
			return false
		}
		last := (*from)[n-1]
		*from = (*from)[:n-1]
		*to = append(*to, step{what: last.what, rev: at})
		return true
	}
	for _, v := range history {
		switch {
		case v.Deed == storage.Added:
			past, future = nil, nil
		case v.Deed != storage.Changed:
			continue // taken out of the fleet or put back, as it was
		case strings.HasPrefix(v.What, undoWord) && back(&past, &future, v.What, undoWord):
		case strings.HasPrefix(v.What, redoWord) && back(&future, &past, v.What, redoWord):
		default:
			past, future = append(past, step{what: v.What, rev: at}), nil
		}
		at = v.Rev
	}
	return past, future
}

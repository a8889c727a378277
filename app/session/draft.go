package session

import (
	"errors"
	"fmt"
	"strings"

	"anodewright/anodes/survey"
	"anodewright/hull"
	"anodewright/storage"
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
	case Patterns:
		return PatternFields()
	case Readings:
		return ReadingFields()
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
		return a.Waters[i].ID
	case Dockings:
		return a.Dockings[i].Date.String()
	case Patterns:
		return a.Patterns[i].ID
	case Readings:
		return readingID(a, i)
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
	case Patterns:
		return len(a.Patterns)
	case Readings:
		return len(a.Readings)
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

// locate finds the field of a draft's path. It is asked for every draft after
// every edit, also for those whose item is gone.
func locate(a *hull.Asset, path string) (list List, i int, f Field, ok bool) {
	for _, list := range []List{Zones, Waters, Dockings, Patterns, Readings} {
		if !strings.HasPrefix(path, string(list)+"[") {
			continue
		}
		for i := range lengthOf(a, list) {
			if key, here := strings.CutPrefix(path, string(list)+"["+idOf(a, list, i)+"]."); here {
				if f, ok := withKey(list, key); ok {
					return list, i, f, true
				}
			}
		}
		return "", 0, Field{}, false
	}
	f, ok = withKey(Whole, path)
	return Whole, 0, f, ok
}

func withKey(list List, key string) (Field, bool) {
	for _, f := range fieldsOf(list) {
		if f.Key == key {
			return f, true
		}
	}
	return Field{}, false
}

// try returns the asset with a field set, or what is wrong with the text.
func try(a *hull.Asset, list List, f Field, i int, text string) (next *hull.Asset, fault string) {
	next = assetfile.Clone(a)
	if err := f.Set(next, i, text); err != nil {
		return nil, err.Error()
	}
	hull.Correct(next, "", "corrected")
	faults := hull.Check(next)
	if len(faults) == 0 {
		return next, ""
	}
	path := f.Key
	if list != Whole {
		path = fmt.Sprintf("%s[%d].%s", list, i, f.Key)
	}
	for _, x := range faults {
		if rest, own := strings.CutPrefix(x.Path, path); own && (rest == "" || rest[0] == '.' || rest[0] == '[') {
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
	if s.open == nil || i < 0 || i >= lengthOf(s.open.asset, list) {
		return "", ""
	}
	if len(s.open.drafts) > 0 {
		if d, ok := s.open.drafts[draftPath(s.open.asset, list, i, f)]; ok {
			return d.text, d.fault
		}
	}
	return f.Get(s.open.asset, i), ""
}

// SetText sets a field of the open asset. A text with a fault is kept as a
// draft, in the register too, and never enters the asset; the fault can be
// read with Text. The error says that nothing could be stored.
func (s *Session) SetText(list List, i int, f Field, text string) error {
	return s.locked(func(e *entry) (bool, error) {
		if i < 0 || i >= lengthOf(e.asset, list) {
			return false, nil
		}
		a, path := e.asset, draftPath(e.asset, list, i, f)
		if text == f.Get(a, i) {
			return s.clearDraft(e, path)
		}
		if list == Readings && !survey.Stands(&a.Readings[i]) {
			return false, errors.New("this reading was withdrawn: it is kept as it was")
		}
		next, fault := try(a, list, f, i, text)
		if fault != "" {
			return s.keepDraft(e, path, text)
		}
		name := f.Title
		switch list {
		case Zones:
			name = a.Zones[i].Name + ": " + name
		case Patterns:
			name = a.Patterns[i].ID + ": " + name
		case Readings:
			name = "reading of " + readingID(a, i) + ": " + name
		}
		// The draft moves with its item, so its path is found anew below.
		changed, err := s.do(e, name, func(a *hull.Asset) error { return f.Set(a, i, text) })
		if errors.Is(err, storage.ErrClash) && s.open == e {
			if c := s.clashes[e.id]; c != nil {
				c.draft = path
			}
			_, derr := s.keepDraft(e, path, text)
			return true, errors.Join(err, derr)
		}
		if failed := new(storage.Error); errors.As(err, &failed) {
			// The disk is full, or the register gone: the text waits in its
			// field, to be stored by Enter once that is mended.
			s.keepDraft(e, path, text)
			return true, err
		}
		if err != nil {
			return changed, err
		}
		if c := s.clashes[e.id]; c != nil && c.draft == path {
			delete(s.clashes, e.id) // typed again on the newer state
		}
		cleared, err := s.clearDraft(e, draftPath(next, list, i, f))
		return changed || cleared, err
	})
}

// Drafts returns how many fields of the open asset hold a text with a fault.
func (s *Session) Drafts() int {
	s.mu.Lock()
	defer s.mu.Unlock()
	n := 0
	if s.open != nil {
		for _, d := range s.open.drafts {
			if d.shown {
				n++
			}
		}
	}
	return n
}

// keepDraft keeps a text with a fault, here even when it cannot be stored.
func (s *Session) keepDraft(e *entry, path, text string) (changed bool, err error) {
	if why := s.store.ReadOnly(); why != "" {
		return false, fmt.Errorf("nothing was changed: this register can only be read (%s)", why)
	}
	e.drafts[path] = draft{text: text}
	s.judge(e)
	return true, s.store.SetDraft(e.id, path, text)
}

func (s *Session) clearDraft(e *entry, path string) (changed bool, err error) {
	if _, drafted := e.drafts[path]; !drafted {
		return false, nil
	}
	delete(e.drafts, path)
	return true, s.store.ClearDraft(e.id, path)
}

// right is the fault of a draft that no longer has one, as when the field that
// it did not fit to was changed.
const right = "this is right now but not in the plan yet; press Enter here to use it"

// judge says of every draft what is wrong with it in the asset as it is now.
func (s *Session) judge(e *entry) {
	for path, d := range e.drafts {
		list, i, f, ok := locate(e.asset, path)
		if d.shown = ok; ok {
			if d.text == f.Get(e.asset, i) { // it got in by another way
				s.clearDraft(e, path) // and if this fails, it is tried again next time
				continue
			}
			if _, d.fault = try(e.asset, list, f, i, d.text); d.fault == "" {
				d.fault = right
			}
		}
		e.drafts[path] = d
	}
}

// moveDrafts lets drafts follow items that get another id: a water that is
// renamed, a docking that is moved.
func (s *Session) moveDrafts(e *entry, next *hull.Asset) {
	if len(e.drafts) == 0 {
		return
	}
	moved := map[string]draft{}
	for _, list := range []List{Zones, Waters, Dockings, Patterns, Readings} {
		if lengthOf(e.asset, list) != lengthOf(next, list) {
			continue
		}
		for i := range lengthOf(next, list) {
			if idOf(e.asset, list, i) == idOf(next, list, i) {
				continue
			}
			for _, f := range fieldsOf(list) {
				from, to := draftPath(e.asset, list, i, f), draftPath(next, list, i, f)
				if d, ok := e.drafts[from]; ok {
					s.clearDraft(e, from)
					s.store.SetDraft(e.id, to, d.text) // if this fails the text is still here
					moved[to] = d
				}
			}
		}
	}
	for path, d := range moved {
		e.drafts[path] = d
	}
}

package session

import (
	"encoding/json"
	"fmt"
	"maps"
	"slices"

	"anodewright/anodes/plan"
	"anodewright/hull"
)

// Floor is the next docking of the open asset on the day in dock: what was
// found and typed so far, and what follows from it. It is not to be changed.
type Floor struct {
	Docking hull.Docking // as listed
	Drafted hull.Closing // as it would be closed if nothing had been typed
	Closing hull.Closing // as it would be closed now
	Plan    *plan.Outcome
	Rows    []FloorRow
	Quay    []FloorQuay
	Works   []FloorWork
	Short   string // what the quay lacks; the plan is then that which lacks least
	Only    bool   // what lies on the quay is all there is
	// Wrong says of typed texts what is wrong with them; they are not in the
	// closing. Faults are of the closing as a whole, and then there is no plan.
	Wrong  map[FloorField]string
	Faults hull.Faults

	id    string // of the asset in the register
	of    *plan.Outcome
	typed string
}

// FloorRow is one fitted set, or a zone that carries none and may be given
// some.
type FloorRow struct {
	Zone     int // among the asset's zones
	First    bool
	Key      hull.SetKey // whose pattern is empty where nothing is fitted
	Expected *hull.Expectation
	Set      hull.ClosingSet
	Zoned    *FloorZone // what becomes of the whole zone
}

// FloorZone is what is done with one zone's anodes.
type FloorZone struct {
	On      []hull.PutOn
	Off     int
	Done    bool   // by what was typed, not by the plan
	Refused string // why what was typed does not hold
	Line    Planned
}

// Planned is the plan's line of a zone in dock.
type Planned struct {
	Known   bool
	Action  hull.PlannedAction
	Governs string
	Until   hull.Date
	Unmet   string // why no set holds the zone
}

// FloorQuay is one pattern on the quay.
type FloorQuay struct {
	Pattern     *hull.Pattern
	There, Used int
	Ordered     int // for this docking, of what is there
}

// Left is what stays on the quay.
func (q FloorQuay) Left() int { return max(0, q.There-q.Used) }

// Lacking is what is put on and is not there.
func (q FloorQuay) Lacking() int { return max(0, q.Used-q.There) }

// FloorWork is one coating work, or the cleaning of a zone's painted anodes,
// whose Coating is then empty.
type FloorWork struct {
	Work hull.Work
	Done bool
}

// FloorField names a text that can be typed on the dock floor.
type FloorField string

// The fields of the docking as a whole.
const (
	FloorDate    FloorField = "date"
	FloorBy      FloorField = "by"
	FloorNote    FloorField = "note"
	FloorCost    FloorField = "cost"
	FloorNext    FloorField = "next"
	FloorHorizon FloorField = "horizon"
	FloorOnly    FloorField = "only"
)

func floorOfSet(what string, k hull.SetKey) FloorField {
	return FloorField(fmt.Sprintf("%s[%s/%s/%s]", what, k.Zone, k.Pattern, k.Fitted))
}

// FloorWastage is the wastage found of a set, in per cent; several figures are
// averaged.
func FloorWastage(k hull.SetKey) FloorField { return floorOfSet("wastage", k) }

// FloorFound is how many pieces of a set were found.
func FloorFound(k hull.SetKey) FloorField { return floorOfSet("found", k) }

// FloorOff is how many pieces of a set were taken off.
func FloorOff(k hull.SetKey) FloorField { return floorOfSet("off", k) }

// FloorOn is what was put on in a zone: 14, or 14 × al-45 + 2 × zn-7.
func FloorOn(zone string) FloorField { return FloorField("on[" + zone + "]") }

// FloorStock is how many pieces of a pattern lie on the quay.
func FloorStock(pattern string) FloorField { return FloorField("quay[" + pattern + "]") }

// FloorWorkDone is whether a coating work was done: yes, no, or the share.
func FloorWorkDone(w hull.Work) FloorField {
	return FloorField(fmt.Sprintf("work[%s/%s]", w.Zone, w.Coating))
}

// floorDraft is where the texts of the dock floor are kept among the asset's
// drafts; sinceDocking is the last docking when they were typed, which tells
// texts of a docking that was closed since from those of the one ahead.
const (
	floorDraft              = "dock-floor"
	sinceDocking FloorField = "since"
)

// floored is the newest floor computed.
type floored struct {
	got  *Floor
	busy bool
}

// floorTexts are the texts typed for the docking ahead, and how they are
// stored. The caller holds the lock.
func (e *entry) floorTexts() (texts map[FloorField]string, stored string) {
	stored = e.drafts[floorDraft].text
	if e.floor.stored != stored {
		e.floor = floorRead{stored: stored}
		if json.Unmarshal([]byte(stored), &e.floor.texts) == nil {
			e.floor.since = e.floor.texts[sinceDocking]
			delete(e.floor.texts, sinceDocking)
		}
	}
	if stored == "" || e.floor.since != e.asset.Start().String() {
		return nil, ""
	}
	return e.floor.texts, stored
}

// floorRead is a stored text, read. Its map is not to be changed.
type floorRead struct {
	stored, since string
	texts         map[FloorField]string
}

// Floor returns the day in dock of the open asset's next docking, and whether
// it is of all that was typed. If not it is computed in the background, and
// Notify's function is called when it is. It is nil before the first one is
// known and where no docking lies ahead.
func (s *Session) Floor() (*Floor, bool) {
	s.mu.Lock()
	defer s.mu.Unlock()
	e := s.open
	if e == nil || e.outcome == nil || len(e.asset.Ahead()) == 0 {
		return nil, e != nil && e.outcome != nil
	}
	_, typed := e.floorTexts()
	f := s.floor.got
	if f != nil && f.id != e.id {
		f = nil
	}
	if f != nil && f.of == e.outcome && f.typed == typed {
		return f, !s.old(e)
	}
	if !s.floor.busy && !s.old(e) {
		s.floor.busy = true
		s.busy.Add(1)
		go s.computeFloor()
	}
	return f, false
}

// computeFloor computes the floor of the asset that is open until it is of the
// newest texts.
func (s *Session) computeFloor() {
	defer s.busy.Done()
	for {
		s.mu.Lock()
		e := s.open
		if e == nil || e.outcome == nil || len(e.asset.Ahead()) == 0 {
			s.floor.busy = false
			s.mu.Unlock()
			return
		}
		m := e.floorMaker()
		if f := s.floor.got; f != nil && f.id == m.id && f.of == m.of && f.typed == m.typed {
			s.floor.busy = false
			s.mu.Unlock()
			s.changed()
			return
		}
		s.mu.Unlock()
		f := m.make()
		s.mu.Lock()
		s.floor.got = f
		s.mu.Unlock()
	}
}

// floorMaker is what a floor is made from. The caller holds the lock.
func (e *entry) floorMaker() *floorMaker {
	texts, typed := e.floorTexts()
	return &floorMaker{Floor: Floor{id: e.id, of: e.outcome, typed: typed}, texts: texts, pins: e.pins}
}

// FloorText returns the text typed into a field of the dock floor, and whether
// there is one.
func (s *Session) FloorText(field FloorField) (string, bool) {
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.open == nil {
		return "", false
	}
	texts, _ := s.open.floorTexts()
	text, typed := texts[field]
	return text, typed
}

// FloorTyped returns how many fields of the dock floor hold something typed.
func (s *Session) FloorTyped() int {
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.open == nil {
		return 0
	}
	texts, _ := s.open.floorTexts()
	return len(texts)
}

// SetFloor keeps what was typed into a field of the dock floor, across a
// restart too; an empty text is as if nothing was ever typed.
func (s *Session) SetFloor(field FloorField, text string) error {
	return s.setFloor(func(texts map[FloorField]string) {
		if texts[field] = text; text == "" {
			delete(texts, field)
		}
	})
}

// DiscardFloor forgets all that was typed on the dock floor.
func (s *Session) DiscardFloor() error {
	return s.setFloor(func(texts map[FloorField]string) { clear(texts) })
}

func (s *Session) setFloor(change func(texts map[FloorField]string)) error {
	return s.locked(func(e *entry) (bool, error) {
		old, _ := e.floorTexts()
		texts := maps.Clone(old)
		if texts == nil {
			texts = map[FloorField]string{}
		}
		change(texts)
		if maps.Equal(texts, old) {
			return false, nil
		}
		if len(texts) == 0 {
			return s.clearDraft(e, floorDraft)
		}
		texts[sinceDocking] = e.asset.Start().String()
		stored, err := json.Marshal(texts)
		if err != nil {
			return false, err
		}
		return s.keepDraft(e, floorDraft, string(stored))
	})
}

// FloorNow is the dock floor of all that was typed, computed here. It is an
// error where no docking lies ahead.
func (s *Session) FloorNow() (*Floor, error) {
	o, err := s.newest()
	if err != nil {
		return nil, err
	}
	if len(o.Asset.Ahead()) == 0 {
		return nil, errNoDocking
	}
	s.mu.Lock()
	if s.open == nil {
		s.mu.Unlock()
		return nil, errNoDocking
	}
	m := s.open.floorMaker()
	s.mu.Unlock()
	m.of = o
	return m.make(), nil
}

// CloseFloor closes the docking as the dock floor has it, in one step that can
// be undone; what was typed comes back with the undoing. Where a text is wrong
// nothing is closed, and the error names its field.
func (s *Session) CloseFloor() error {
	f, err := s.FloorNow()
	if err != nil {
		return err
	}
	for _, field := range f.WrongFields() {
		return fmt.Errorf("nothing was closed: %s: %s", f.Name(field), f.Wrong[field])
	}
	if len(f.Faults) > 0 {
		return f.Named(f.Faults)
	}
	return f.Named(s.CloseDocking(f.Closing))
}

// WrongFields are the fields whose texts are wrong, in a steady order.
func (f *Floor) WrongFields() []FloorField { return slices.Sorted(maps.Keys(f.Wrong)) }

// Package session is what the app does, without its windows: the fleet of a
// register, the open asset with its edits, undo and redo, what was typed that
// is not yet right, and the outcome recomputed in the background.
//
// A Session may be used from several goroutines. Units are those of the asset
// file.
package session

import (
	"bytes"
	"errors"
	"fmt"
	"runtime/debug"
	"slices"
	"sync"
	"time"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/hull"
	"anodewright/storage"
	"anodewright/storage/assetfile"
)

// Store is where the fleet is kept. A *storage.Register is one.
type Store interface {
	List() ([]storage.Entry, error)
	Load(id string) (*hull.Asset, int64, error)
	Add(a *hull.Asset, what string) (string, error)
	Save(id string, rev int64, a *hull.Asset, what string) (int64, error)
	Remove(id string, rev int64) error
	Drafts(id string) (map[string]string, error)
	SetDraft(id, path, text string) error
	ClearDraft(id, path string) error
	Setting(name string) (string, error)
	SetSetting(name, value string) error
	ReadOnly() string
	History(id string) ([]storage.Revision, error)
	At(id string, rev int64) (*hull.Asset, error)
	Restore(id string) (int64, error)
	DataVersion() (int64, error)
	Backups() ([]storage.Backup, error)
	BackupDaily() error
	RestoreBackup(path string) (storage.Backup, error)
}

// Session is the fleet with one asset open.
type Session struct {
	store Store
	today hull.Date

	mu       sync.Mutex
	notify   func()
	fleet    []*entry
	kept     []*entry // whose outcomes are kept, the last used last
	unread   []Unread
	open     *entry
	busy     sync.WaitGroup
	computes bool // a goroutine is computing outcomes
	decides  bool // a goroutine is computing decisions
	rests    bool // only the open asset is computed
	bought   bought
	calendar gathered
	floor    floored
	lastTime lastTimed

	clashes map[string]*Clash // edits not stored and not yet decided on, by asset
	version int64             // of the register when it was last looked at
}

// entry is one asset of the fleet.
type entry struct {
	id      string
	rev     int64
	asset   *hull.Asset
	outcome *plan.Outcome // of asset, or of an earlier state of it; nil where it is not kept
	outlook *Outlook      // of the newest outcome
	past    []step
	future  []step
	drafts  map[string]draft
	learns  bool // it is planned with what its readings teach
	pins    []renewal.Pin
	limits  renewal.Limits // at every docking
	memo    *renewal.Memo  // of its plans

	floor floorRead // the dock floor's texts as they were read last

	decisions []plan.Decision
	decided   *plan.Outcome // whose decisions these are

	recalled bool // past and future hold what the register's history tells
}

// step is an edit: what it was, and the asset on its other side, or none and
// the stored revision that has it.
type step struct {
	what  string
	asset *hull.Asset
	rev   int64
}

// draft is a text that has a fault. One whose item is gone waits, hidden, for
// the item to come back.
type draft struct {
	text, fault string
	shown       bool
}

// Summary is what the fleet's list shows of an asset.
type Summary struct {
	ID      string
	Asset   *hull.Asset
	Outlook *Outlook // nil until it is computed
	Open    bool
}

// Unread is an asset of the register that could not be opened. It stays in
// the register as it is.
type Unread struct{ Name, Why string }

// Unread returns the assets that could not be opened.
func (s *Session) Unread() []Unread { return s.unread }

// Open loads the fleet of a register and opens the asset that was open last.
func Open(store Store, today hull.Date) (*Session, error) {
	s := &Session{store: store, today: today, notify: func() {}, clashes: map[string]*Clash{}}
	if err := s.loadFleet(); err != nil {
		return nil, err
	}
	s.compute()
	return s, nil
}

// loadFleet reads the whole fleet anew and opens the asset that was open last.
func (s *Session) loadFleet() error {
	version, err := s.store.DataVersion()
	if err != nil {
		return err
	}
	list, err := s.store.List()
	if err != nil {
		return err
	}
	s.version, s.fleet, s.unread, s.open = version, nil, nil, nil
	for _, item := range list {
		e, err := s.load(item.ID)
		if err != nil {
			// One asset that cannot be read does not lock up the others.
			s.unread = append(s.unread, Unread{item.Name, err.Error()})
			continue
		}
		s.fleet = append(s.fleet, e)
	}
	if id, err := s.store.Setting("open asset"); err == nil {
		s.open = s.find(id)
	}
	if s.open == nil && len(s.fleet) > 0 {
		s.open = s.fleet[0]
	}
	return nil
}

func (s *Session) load(id string) (*entry, error) {
	a, rev, err := s.store.Load(id)
	if err != nil {
		return nil, err
	}
	texts, err := s.store.Drafts(id)
	if err != nil {
		return nil, err
	}
	e := &entry{id: id, rev: rev, asset: a, drafts: map[string]draft{}, memo: new(renewal.Memo)}
	if v, err := s.store.Setting(learns(id)); err == nil {
		e.learns = v == "yes"
	}
	s.loadPins(e)
	s.loadLimits(e)
	for path, text := range texts {
		e.drafts[path] = draft{text: text}
	}
	s.judge(e)
	return e, nil
}

func (s *Session) find(id string) *entry {
	for _, e := range s.fleet {
		if e.id == id {
			return e
		}
	}
	return nil
}

// Notify has a function called after anything changed: an edit, a draft, a new
// outcome, another asset. It may be called on any goroutine.
func (s *Session) Notify(f func()) {
	s.mu.Lock()
	defer s.mu.Unlock()
	s.notify = f
}

// changed tells that something changed. The caller does not hold the lock.
func (s *Session) changed() {
	s.mu.Lock()
	f := s.notify
	s.mu.Unlock()
	f()
}

// Today is the date that the session plans as of.
func (s *Session) Today() hull.Date { return s.today }

// ReadOnly says why nothing can be changed, or nothing when it can.
func (s *Session) ReadOnly() string { return s.store.ReadOnly() }

// Fleet returns the assets in their order.
func (s *Session) Fleet() []Summary {
	s.mu.Lock()
	defer s.mu.Unlock()
	var list []Summary
	for _, e := range s.fleet {
		list = append(list, Summary{e.id, e.asset, e.outlook, e == s.open})
	}
	return list
}

// Asset returns the open asset, nil when none is open. It is not to be
// changed.
func (s *Session) Asset() *hull.Asset {
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.open == nil {
		return nil
	}
	return s.open.asset
}

// Outcome returns the newest outcome of the open asset, nil until there is
// one. Right after an edit it is still that of the asset before.
func (s *Session) Outcome() *plan.Outcome {
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.open == nil {
		return nil
	}
	return s.open.outcome
}

// Select opens another asset.
func (s *Session) Select(id string) {
	s.mu.Lock()
	e := s.find(id)
	if e != nil {
		s.open = e
		s.keep(e)
	}
	s.mu.Unlock()
	if e != nil {
		s.store.SetSetting("open asset", id) // a convenience: not worth a dialog
		s.compute()                          // it may have been resting
		s.changed()
	}
}

// Add stores a new asset and opens it.
func (s *Session) Add(a *hull.Asset, what string) error {
	id, err := s.store.Add(a, what)
	if err != nil {
		return err
	}
	e, err := s.load(id)
	if err != nil {
		return err
	}
	s.mu.Lock()
	s.fleet = append(s.fleet, e)
	s.mu.Unlock()
	s.Select(id)
	s.compute()
	return nil
}

// Remove takes the open asset out of the fleet. Its history stays in the
// register.
func (s *Session) Remove() error {
	return s.locked(func(e *entry) (bool, error) {
		if why := s.store.ReadOnly(); why != "" {
			return false, fmt.Errorf("nothing was changed: this register can only be read (%s)", why)
		}
		err := s.store.Remove(e.id, e.rev)
		if errors.Is(err, storage.ErrClash) {
			return true, s.reload(e, err)
		}
		if err != nil {
			return false, err
		}
		s.drop(e)
		return true, nil
	})
}

// drop takes an entry out of the fleet. The caller holds the lock.
func (s *Session) drop(e *entry) {
	i := slices.Index(s.fleet, e)
	s.fleet = slices.Delete(s.fleet, i, i+1)
	if s.open == e {
		s.open = nil
		if len(s.fleet) > 0 {
			s.open = s.fleet[min(i, len(s.fleet)-1)]
		}
	}
}

// reload brings an entry to what is stored now, after another program stored
// it. The steps before no longer lead anywhere, so they go; they are in the
// register's history. It returns the clash with what was done about it.
func (s *Session) reload(e *entry, clash error) error {
	now, err := s.load(e.id)
	switch {
	case errors.Is(err, storage.ErrNoAsset):
		s.drop(e)
		return fmt.Errorf("%w. It is no longer in the fleet", clash)
	case err != nil:
		return errors.Join(clash, err)
	}
	now.outcome, now.outlook, now.recalled = e.outcome, e.outlook, true // others' edits are not here to undo
	*e = *now
	return fmt.Errorf("%w. The newer state is shown now; make your change again if it is still wanted", clash)
}

// Do changes the open asset in one step that can be undone, and stores it.
// The change gets a copy. Faults come back as hull.Faults, and then nothing
// is changed. A change that leaves the asset as it is is no step.
func (s *Session) Do(what string, change func(a *hull.Asset) error) error {
	return s.locked(func(e *entry) (bool, error) { return s.do(e, what, change) })
}

// do is Do under the lock. It reports whether anything changed.
func (s *Session) do(e *entry, what string, change func(a *hull.Asset) error) (bool, error) {
	next := assetfile.Clone(e.asset)
	if err := change(next); err != nil {
		return false, err
	}
	hull.Correct(next, "", "corrected") // the ledger is only added to
	if err := hull.Check(next).Err(); err != nil {
		return false, err
	}
	if bytes.Equal(assetfile.Encode(next), assetfile.Encode(e.asset)) {
		return false, nil
	}
	before, rev := e.asset, e.rev
	s.recall(e)
	if err := s.put(e, next, what); err != nil {
		var clash *Clash
		if errors.As(err, &clash) {
			clash.again = change
		}
		return false, err
	}
	e.past = keepStep(e.past, step{what: what, asset: before, rev: rev})
	e.future = nil
	return true, nil
}

// Undo takes back the last edit of the open asset. It does nothing when there
// is none.
func (s *Session) Undo() error {
	return s.locked(func(e *entry) (bool, error) { return s.swap(e, &e.past, &e.future, undoWord) })
}

// Redo does again what was undone last.
func (s *Session) Redo() error {
	return s.locked(func(e *entry) (bool, error) { return s.swap(e, &e.future, &e.past, redoWord) })
}

// CanUndo returns what Undo and Redo would take back and do again, empty
// where there is nothing.
func (s *Session) CanUndo() (undo, redo string) {
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.open != nil {
		s.recall(s.open)
		if n := len(s.open.past); n > 0 {
			undo = s.open.past[n-1].what
		}
		if n := len(s.open.future); n > 0 {
			redo = s.open.future[n-1].what
		}
	}
	return undo, redo
}

func (s *Session) swap(e *entry, from, to *[]step, word string) (bool, error) {
	s.recall(e)
	n := len(*from)
	if n == 0 {
		return false, nil
	}
	last := (*from)[n-1]
	if last.asset == nil {
		stored, err := s.store.At(e.id, last.rev)
		if err != nil {
			return false, err
		}
		last.asset = stored
	}
	before, rev := e.asset, e.rev
	if err := s.put(e, last.asset, word+last.what); err != nil {
		return false, err
	}
	*from = (*from)[:n-1]
	*to = keepStep(*to, step{what: last.what, asset: before, rev: rev})
	return true, nil
}

// locked changes the open entry under the lock; if anything changed it
// recomputes and tells.
func (s *Session) locked(change func(e *entry) (bool, error)) error {
	s.mu.Lock()
	if s.open == nil {
		s.mu.Unlock()
		return errors.New("no asset is open")
	}
	changed, err := change(s.open)
	s.mu.Unlock()
	if changed || errors.Is(err, storage.ErrClash) {
		s.compute()
		s.changed()
	}
	return err
}

// put stores the entry's next asset. The caller holds the lock.
func (s *Session) put(e *entry, next *hull.Asset, what string) error {
	if why := s.store.ReadOnly(); why != "" {
		return fmt.Errorf("nothing was changed: this register can only be read (%s)", why)
	}
	rev, err := s.store.Save(e.id, e.rev, next, what)
	var clash *storage.Clash
	if errors.As(err, &clash) {
		return s.clash(e, next, what, clash)
	}
	if err != nil {
		return err
	}
	s.moveDrafts(e, next)
	s.movePins(e, next)
	e.rev, e.asset = rev, next
	s.judge(e)
	return nil
}

// compute lets one goroutine bring every outcome up to its newest asset, the
// open asset first.
func (s *Session) compute() {
	// What many outcomes in a row took is given back to the system.
	const wholeFleet = 50
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.computes {
		return
	}
	s.computes = true
	s.busy.Add(1)
	go func() {
		defer s.busy.Done()
		var told time.Time
		untold, done := false, 0
		for {
			s.mu.Lock()
			e := s.stale()
			if e == nil && !untold {
				s.computes = false
				s.mu.Unlock()
				if done > wholeFleet {
					debug.FreeOSMemory()
				}
				return
			}
			if e == nil {
				s.mu.Unlock()
				untold = false
				s.changed()
				continue
			}
			a, how := e.asset, e.how()
			s.mu.Unlock()
			o := plan.Compute(a, s.today, how...)
			s.mu.Lock()
			s.computed(e, o)
			done++
			untold = e != s.open
			s.mu.Unlock()
			// A large fleet's list is shown anew now and then, not for each asset.
			if !untold || time.Since(told) > 300*time.Millisecond {
				told, untold = time.Now(), false
				s.changed()
			}
		}
	}()
}

// stale returns an entry whose outcome is not that of its asset.
func (s *Session) stale() *entry {
	if s.open != nil && s.old(s.open) {
		return s.open
	}
	if s.rests {
		return nil
	}
	for _, e := range s.fleet {
		if s.old(e) {
			return e
		}
	}
	return nil
}

// old reports whether what is known of an entry is not of its asset as it is:
// the whole outcome of the open one, the outlook of any.
func (s *Session) old(e *entry) bool {
	return e == s.open && (e.outcome == nil || e.before(e.outcome)) || e.outlook == nil || e.before(e.outlook.of)
}

// before reports whether an outcome is of an earlier state of the entry.
func (e *entry) before(o *plan.Outcome) bool {
	return o.Asset != e.asset || o.Learns != e.learns || o.Asked != e.limits || !e.pinned(o)
}

// Wait returns when every outcome is that of its newest asset.
func (s *Session) Wait() { s.busy.Wait() }

// Setting returns a value kept in the register, empty when there is none.
func (s *Session) Setting(name string) string {
	v, _ := s.store.Setting(name)
	return v
}

// SetSetting keeps a value in the register.
func (s *Session) SetSetting(name, value string) { s.store.SetSetting(name, value) }

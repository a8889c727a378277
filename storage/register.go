// Package storage keeps the register: one SQLite file with many assets, the
// history of every edit, what a person typed that is not yet right, and a few
// settings.
//
// An edit is one durable transaction that stores the asset's new revision and
// adds it to the history. Only an asset without faults is stored. An edit
// names the revision that it started from; when another program stored one
// since, the edit fails with a Clash and nothing is overwritten.
//
// Assets are stored as the text of the asset file, in its units; times are
// RFC 3339 in UTC. Errors are sentences of type *Error or *Clash.
package storage

import (
	"database/sql"
	"sync/atomic"
	"time"
)

// Register is an open register. Its methods may be called from several
// goroutines.
type Register struct {
	path     string
	db       *sql.DB
	readOnly string
	closed   atomic.Bool
	settings
}

// settings are what Options set.
type settings struct {
	user    string
	now     func() time.Time
	reading bool
	scripts []string
}

// An Option changes how Open opens.
type Option func(*settings)

// User names who makes the edits. Without it, it is the system's user.
func User(name string) Option { return func(s *settings) { s.user = name } }

// Clock gives the time that edits are stamped with. Without it, it is now.
func Clock(now func() time.Time) Option { return func(s *settings) { s.now = now } }

// ForReading opens a register that is never changed, nor made when absent.
func ForReading() Option { return func(s *settings) { s.reading = true } }

// Path returns the register's file as an absolute path.
func (r *Register) Path() string { return r.path }

// ReadOnly returns why the register can be read but not changed, or nothing
// when it can be changed.
func (r *Register) ReadOnly() string { return r.readOnly }

// Close closes the register; a second time does nothing.
func (r *Register) Close() error {
	if r.closed.Swap(true) {
		return nil
	}
	return failure("close", r.path, r.db.Close())
}

// edit runs f in one transaction, which is durable when edit returns nil and
// leaves no trace when it does not.
func (r *Register) edit(doing string, f func(*sql.Tx) error) error {
	if r.readOnly != "" {
		return r.fail(doing, because(ErrReadOnly, r.readOnly, nil))
	}
	tx, err := r.db.Begin()
	if err != nil {
		return r.fail(doing, err)
	}
	defer tx.Rollback()
	if err := f(tx); err != nil {
		return r.fail(doing, err)
	}
	return r.fail(doing, tx.Commit())
}

// collect reads all rows of a query with scan.
func collect[T any](db querier, scan func(*sql.Rows, *T) error, query string, args ...any) ([]T, error) {
	rows, err := db.Query(query, args...)
	if err != nil {
		return nil, err
	}
	defer rows.Close()
	var all []T
	for rows.Next() {
		var t T
		if err := scan(rows, &t); err != nil {
			return nil, err
		}
		all = append(all, t)
	}
	return all, rows.Err()
}

// stamp is the time now as it is stored.
func (r *Register) stamp() string { return r.now().UTC().Format(time.RFC3339) }

// readStamp reads a stored time.
func readStamp(s string) (time.Time, error) {
	t, err := time.Parse(time.RFC3339, s)
	if err != nil {
		return t, because(ErrDamaged, "a stored time is not one", err)
	}
	return t.UTC(), nil
}

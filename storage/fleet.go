package storage

import (
	"crypto/rand"
	"database/sql"
	"errors"
	"fmt"
	"time"

	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// Entry is what a list shows of one asset.
type Entry struct {
	ID      string
	Rev     int64 // 1 when added, one more with every edit
	Name    string
	Kind    hull.Kind
	Changed time.Time // UTC
}

// List returns the assets in the order of the fleet.
func (r *Register) List() ([]Entry, error) {
	all, err := collect(r.db, scanEntry, `SELECT id, rev, name, kind, changed FROM asset ORDER BY place, id`)
	return all, r.fail("list the assets of", err)
}

// Removed returns the assets that were removed, the last one first. Their
// revision is the removal's.
func (r *Register) Removed() ([]Entry, error) {
	all, err := collect(r.db, scanEntry, `SELECT h.asset_id, h.rev, h.name, h.kind, h.changed FROM history h
		WHERE h.rev = (SELECT MAX(rev) FROM history WHERE asset_id = h.asset_id)
		  AND NOT EXISTS (SELECT 1 FROM asset WHERE id = h.asset_id)
		ORDER BY h.changed DESC, h.asset_id`)
	return all, r.fail("list the removed assets of", err)
}

func scanEntry(rows *sql.Rows, e *Entry) error {
	var changed string
	err := rows.Scan(&e.ID, &e.Rev, &e.Name, &e.Kind, &changed)
	if err == nil {
		e.Changed, err = readStamp(changed)
	}
	return err
}

// Empty reports whether the register never held an asset.
func (r *Register) Empty() (bool, error) {
	var n int
	err := r.db.QueryRow(`SELECT COUNT(*) FROM (SELECT 1 FROM history LIMIT 1) AS one`).Scan(&n)
	return n == 0, r.fail("look into", err)
}

// Load returns the asset and its revision, to be named when it is saved. The
// error is an ErrNoAsset when it is not there or removed.
func (r *Register) Load(id string) (a *hull.Asset, rev int64, err error) {
	const doing = "load an asset from"
	stored, err := load(r.db, id)
	if err != nil {
		return nil, 0, r.fail(doing, err)
	}
	if a, err = decode(stored.body); err != nil {
		return nil, 0, r.fail("load "+stored.name+" from", err)
	}
	return a, stored.rev, nil
}

// stored is a row of the table asset.
type stored struct {
	rev        int64
	name, body string
}

func load(db querier, id string) (s stored, err error) {
	err = db.QueryRow(`SELECT rev, name, body FROM asset WHERE id = $1`, id).Scan(&s.rev, &s.name, &s.body)
	if errors.Is(err, sql.ErrNoRows) {
		err = because(ErrNoAsset, "", nil)
	}
	return s, err
}

// decode reads a stored asset.
func decode(body string) (*hull.Asset, error) {
	a, err := assetfile.Decode([]byte(body))
	if err != nil {
		return nil, because(ErrDamaged, "the stored asset cannot be read: "+err.Error(), err)
	}
	return a, nil
}

// encode writes an asset for storing. The error is an ErrInvalid and carries
// the hull.Faults when it has any.
func encode(a *hull.Asset) (string, error) {
	if err := hull.Check(a).Err(); err != nil {
		return "", because(ErrInvalid, err.Error(), err)
	}
	body := assetfile.Encode(a)
	if len(body) > assetfile.MaxSize {
		return "", because(ErrInvalid, fmt.Sprintf("it has more than %d MB", assetfile.MaxSize>>20), nil)
	}
	return string(body), nil
}

// Add stores a new asset at the end of the fleet, with a few words on where
// it came from, and returns its id.
func (r *Register) Add(a *hull.Asset, what string) (id string, err error) {
	id = rand.Text()
	err = r.edit("add "+label(a)+" to", func(tx *sql.Tx) error {
		body, err := encode(a)
		if err != nil {
			return err
		}
		e := edited{id: id, rev: 1, at: r.stamp(), name: a.Name, kind: a.Kind, body: body}
		return r.put(tx, e, Added, what)
	})
	if err != nil {
		return "", err
	}
	return id, nil
}

// label names an asset in a sentence.
func label(a *hull.Asset) string {
	if a.Name == "" {
		return "an asset without a name"
	}
	return a.Name
}

// edited is an asset as an edit leaves it.
type edited struct {
	id   string
	rev  int64
	at   string
	name string
	kind hull.Kind
	body string
}

// put stores an asset that is not in the fleet at its end.
func (r *Register) put(tx *sql.Tx, e edited, deed Deed, what string) error {
	_, err := tx.Exec(`INSERT INTO asset (id, rev, name, kind, body, place, changed)
		VALUES ($1, $2, $3, $4, $5, (SELECT COALESCE(MAX(place), 0) + 1 FROM asset), $6)`,
		e.id, e.rev, e.name, e.kind, e.body, e.at)
	if sqlite.unique(err) {
		return because(ErrNotRemoved, "", err)
	}
	if err != nil {
		return err
	}
	return r.record(tx, e, deed, what, splice{middle: e.body})
}

// Save stores an asset's next revision, with a few words on what changed, and
// returns its number. rev is the revision that the edit started from: when
// another one is stored the error is a *Clash. An asset equal to the stored
// one is no edit and keeps its revision.
func (r *Register) Save(id string, rev int64, a *hull.Asset, what string) (newRev int64, err error) {
	newRev = rev
	err = r.edit("save "+label(a)+" in", func(tx *sql.Tx) error {
		body, err := encode(a)
		if err != nil {
			return err
		}
		old, err := claim(tx, id, rev)
		if err != nil || old.body == body {
			return err
		}
		e := edited{id: id, rev: rev + 1, at: r.stamp(), name: a.Name, kind: a.Kind, body: body}
		if err := one(tx, id, rev, `UPDATE asset SET rev = $1, name = $2, kind = $3, body = $4, changed = $5
			WHERE id = $6 AND rev = $7`, e.rev, e.name, e.kind, e.body, e.at, id, rev); err != nil {
			return err
		}
		newRev = e.rev
		return r.record(tx, e, Changed, what, follow(e.rev, old.body, body))
	})
	if err != nil {
		return rev, err
	}
	return newRev, nil
}

// Remove takes an asset out of the fleet, with its drafts; its history stays.
// rev is as with Save.
func (r *Register) Remove(id string, rev int64) error {
	return r.edit("remove an asset from", func(tx *sql.Tx) error {
		old, err := claim(tx, id, rev)
		if err != nil {
			return err
		}
		e := edited{id: id, rev: rev + 1, at: r.stamp(), name: old.name, body: old.body}
		if err := tx.QueryRow(`SELECT kind FROM asset WHERE id = $1`, id).Scan(&e.kind); err != nil {
			return err
		}
		if err := one(tx, id, rev, `DELETE FROM asset WHERE id = $1 AND rev = $2`, id, rev); err != nil {
			return err
		}
		return r.record(tx, e, Removed, "", splice{middle: e.body})
	})
}

// Restore puts a removed asset back at the end of the fleet, as it was when
// it was removed, and returns its revision.
func (r *Register) Restore(id string) (rev int64, err error) {
	err = r.edit("restore an asset in", func(tx *sql.Tx) error {
		last, err := lastRevision(tx, id)
		if err != nil {
			return err
		}
		body, err := rebuild(tx, id, last.Rev)
		if err != nil {
			return err
		}
		if _, err := decode(body); err != nil {
			return err
		}
		rev = last.Rev + 1
		e := edited{id: id, rev: rev, at: r.stamp(), name: last.Name, kind: last.Kind, body: body}
		return r.put(tx, e, Restored, "")
	})
	return rev, err
}

// claim returns the stored asset when it is the revision rev, else a Clash.
func claim(tx *sql.Tx, id string, rev int64) (stored, error) {
	s, err := load(tx, id)
	switch {
	case err == nil && s.rev == rev:
		return s, nil
	case err == nil || errors.Is(err, ErrNoAsset):
		return s, clash(tx, id, rev)
	}
	return s, err
}

// one runs a statement on the asset's revision rev. When that is no longer
// stored, as a database without SQLite's lock allows, the error is a Clash.
func one(tx *sql.Tx, id string, rev int64, statement string, args ...any) error {
	result, err := tx.Exec(statement, args...)
	if err != nil {
		return err
	}
	if n, err := result.RowsAffected(); err != nil || n == 1 {
		return err
	}
	return clash(tx, id, rev)
}

// clash tells what became of an asset since its revision rev; it is an
// ErrNoAsset when it never was.
func clash(tx *sql.Tx, id string, rev int64) error {
	last, err := lastRevision(tx, id)
	if err != nil {
		return err
	}
	return &Clash{ID: id, Name: last.Name, Mine: rev, Stored: last.Rev,
		Who: last.Who, When: last.At, Removed: last.Deed == Removed}
}

// Arrange puts the fleet in the order of ids; assets that are not named keep
// their order after them. It is no edit of an asset.
func (r *Register) Arrange(ids []string) error {
	return r.edit("arrange the assets of", func(tx *sql.Tx) error {
		if _, err := tx.Exec(`UPDATE asset SET place = place + $1`, len(ids)); err != nil {
			return err
		}
		for i, id := range ids {
			if _, err := tx.Exec(`UPDATE asset SET place = $1 WHERE id = $2`, i+1, id); err != nil {
				return err
			}
		}
		return nil
	})
}

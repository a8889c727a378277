package storage

import (
	"database/sql"
	"fmt"
	"time"

	"anodewright/hull"
)

// Deed is what an edit did with its asset.
type Deed string

// The deeds.
const (
	Added    Deed = "added"
	Changed  Deed = "changed"
	Removed  Deed = "removed"
	Restored Deed = "restored"
)

// Revision is one edit of an asset's history.
type Revision struct {
	Rev  int64
	At   time.Time // UTC
	Who  string
	Deed Deed
	What string // the editor's few words
	Name string // the asset's, after the edit
	Kind hull.Kind
}

const revisionColumns = `rev, changed, who, deed, what, name, kind`

func scanRevision(rows *sql.Rows, v *Revision) error {
	var at string
	err := rows.Scan(&v.Rev, &at, &v.Who, &v.Deed, &v.What, &v.Name, &v.Kind)
	if err == nil {
		v.At, err = readStamp(at)
	}
	return err
}

// History returns every edit of an asset, the first one first, also of a
// removed asset. The error is an ErrNoAsset when it never was.
func (r *Register) History(id string) ([]Revision, error) {
	all, err := collect(r.db, scanRevision, `SELECT `+revisionColumns+` FROM history WHERE asset_id = $1 ORDER BY rev`, id)
	if err == nil && len(all) == 0 {
		err = because(ErrNoAsset, "", nil)
	}
	return all, r.fail("read the history in", err)
}

// lastRevision returns the newest edit, or an ErrNoAsset.
func lastRevision(db querier, id string) (Revision, error) {
	all, err := collect(db, scanRevision, `SELECT `+revisionColumns+` FROM history WHERE asset_id = $1 ORDER BY rev DESC LIMIT 1`, id)
	if err != nil {
		return Revision{}, err
	}
	if len(all) == 0 {
		return Revision{}, because(ErrNoAsset, "", nil)
	}
	return all[0], nil
}

// At returns the asset as it was after its revision rev. The error is an
// ErrNoRevision when there is none.
func (r *Register) At(id string, rev int64) (*hull.Asset, error) {
	doing := fmt.Sprintf("read revision %d from", rev)
	body, err := rebuild(r.db, id, rev)
	if err != nil {
		return nil, r.fail(doing, err)
	}
	a, err := decode(body)
	return a, r.fail(doing, err)
}

// record adds an edit to the history. It is the only statement of the program
// that writes there.
func (r *Register) record(tx *sql.Tx, e edited, deed Deed, what string, s splice) error {
	_, err := tx.Exec(`INSERT INTO history (asset_id, `+revisionColumns+`, keep_head, keep_tail, body)
		VALUES ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10, $11)`,
		e.id, e.rev, e.at, r.user, deed, what, e.name, e.kind, s.head, s.tail, s.middle)
	return err
}

// rebuild returns the stored text of a revision: the last whole one up to it
// and what follows.
func rebuild(db querier, id string, rev int64) (string, error) {
	type step struct {
		rev int64
		splice
	}
	steps, err := collect(db, func(rows *sql.Rows, s *step) error {
		return rows.Scan(&s.rev, &s.head, &s.tail, &s.middle)
	}, `SELECT rev, keep_head, keep_tail, body FROM history WHERE asset_id = $1 AND rev <= $2 AND rev >=
		(SELECT MAX(rev) FROM history WHERE asset_id = $1 AND rev <= $2 AND keep_head = 0 AND keep_tail = 0)
		ORDER BY rev`, id, rev)
	if err != nil {
		return "", err
	}
	if len(steps) == 0 || steps[len(steps)-1].rev != rev {
		return "", because(ErrNoRevision, "", nil)
	}
	body := ""
	for i, s := range steps {
		next, ok := s.apply(body)
		if !ok || s.rev != steps[0].rev+int64(i) {
			return "", because(ErrDamaged, fmt.Sprintf("revision %d does not follow from the one before it", s.rev), nil)
		}
		body = next
	}
	return body, nil
}

package storage

import "database/sql"

// SetDraft keeps what a person typed into the field at path (as in
// zones[3].coating.a) of an asset and that has a fault. It never enters the
// asset, and goes when the asset is removed.
func (r *Register) SetDraft(id, path, text string) error {
	return r.edit("keep a draft in", func(tx *sql.Tx) error {
		if _, err := load(tx, id); err != nil {
			return err
		}
		return putDraft(tx, id, path, text)
	})
}

func putDraft(tx *sql.Tx, id, path, text string) error {
	_, err := tx.Exec(`INSERT INTO draft (asset_id, path, entered) VALUES ($1, $2, $3)
		ON CONFLICT (asset_id, path) DO UPDATE SET entered = $3`, id, path, text)
	return err
}

// ClearDraft drops the draft of a field, if there is one.
func (r *Register) ClearDraft(id, path string) error {
	return r.edit("drop a draft in", func(tx *sql.Tx) error {
		_, err := tx.Exec(`DELETE FROM draft WHERE asset_id = $1 AND path = $2`, id, path)
		return err
	})
}

// SetDrafts replaces all drafts of an asset, as when its zones moved and with
// them the paths.
func (r *Register) SetDrafts(id string, drafts map[string]string) error {
	return r.edit("keep the drafts in", func(tx *sql.Tx) error {
		if _, err := load(tx, id); err != nil {
			return err
		}
		if _, err := tx.Exec(`DELETE FROM draft WHERE asset_id = $1`, id); err != nil {
			return err
		}
		for path, text := range drafts {
			if err := putDraft(tx, id, path, text); err != nil {
				return err
			}
		}
		return nil
	})
}

// Drafts returns the drafts of an asset by path.
func (r *Register) Drafts(id string) (map[string]string, error) {
	type draft struct{ path, text string }
	all, err := collect(r.db, func(rows *sql.Rows, d *draft) error { return rows.Scan(&d.path, &d.text) },
		`SELECT path, entered FROM draft WHERE asset_id = $1`, id)
	if err != nil {
		return nil, r.fail("read the drafts in", err)
	}
	drafts := make(map[string]string, len(all))
	for _, d := range all {
		drafts[d.path] = d.text
	}
	return drafts, nil
}

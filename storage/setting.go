package storage

import (
	"database/sql"
	"errors"
)

// Setting returns the value kept under a name, or nothing when there is none.
func (r *Register) Setting(name string) (value string, err error) {
	err = r.db.QueryRow(`SELECT value FROM setting WHERE name = $1`, name).Scan(&value)
	if errors.Is(err, sql.ErrNoRows) {
		return "", nil
	}
	return value, r.fail("read a setting in", err)
}

// SetSetting keeps a value, such as the window's size, under a name.
func (r *Register) SetSetting(name, value string) error {
	return r.edit("keep a setting in", func(tx *sql.Tx) error {
		_, err := tx.Exec(`INSERT INTO setting (name, value) VALUES ($1, $2)
			ON CONFLICT (name) DO UPDATE SET value = $2`, name, value)
		return err
	})
}

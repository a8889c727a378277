package storage

import (
	"database/sql"
	"embed"
	"fmt"
	"io/fs"
	"slices"
)

//go:embed migrations/*.sql
var migrations embed.FS

// scripts are the steps from each version of the register to the next: the
// first makes version 1. A script that was ever released never changes.
var scripts = readScripts(migrations)

// readScripts returns migrations/0001.sql and so on, without a gap.
func readScripts(files fs.FS) (scripts []string) {
	for {
		text, err := fs.ReadFile(files, fmt.Sprintf("migrations/%04d.sql", len(scripts)+1))
		if err != nil {
			break
		}
		scripts = append(scripts, string(text))
	}
	if all, err := fs.Glob(files, "migrations/*.sql"); err != nil || len(all) != len(scripts) || len(scripts) == 0 {
		panic("storage: the migrations are not numbered from 0001 on")
	}
	return scripts
}

// migrate brings the database to version len(scripts) in one transaction.
// Another program may have done it first.
func migrate(db *sql.DB, scripts []string) error {
	tx, err := db.Begin()
	if err != nil {
		return err
	}
	defer tx.Rollback()
	version, err := sqlite.version(tx)
	if err != nil {
		return err
	}
	for version < len(scripts) {
		if _, err := tx.Exec(scripts[version]); err != nil {
			return fmt.Errorf("step to version %d: %w", version+1, err)
		}
		version++
		if err := sqlite.setVersion(tx, version); err != nil {
			return err
		}
	}
	return tx.Commit()
}

// checkSchema compares the database with what the scripts make. It refuses a
// file with a table missing as well as one with triggers or views of its own.
func checkSchema(db *sql.DB, scripts []string) error {
	model, err := sql.Open(sqlite.driver, ":memory:")
	if err != nil {
		return err
	}
	defer model.Close()
	model.SetMaxOpenConns(1) // every connection would have a memory of its own
	if err := migrate(model, scripts); err != nil {
		return err
	}
	want, err := sqlite.schema(model)
	if err != nil {
		return err
	}
	got, err := sqlite.schema(db)
	if err != nil {
		return err
	}
	for _, part := range want {
		if !slices.Contains(got, part) {
			return because(ErrDamaged, "a table of version "+fmt.Sprint(len(scripts))+" is missing or altered", nil)
		}
	}
	if len(got) > len(want) {
		return because(ErrDamaged, "it holds tables, triggers or views that are not the program's", nil)
	}
	return nil
}

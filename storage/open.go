package storage

import (
	"crypto/rand"
	"database/sql"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"strings"
	"time"
)

// Open opens the register at path and makes it, with its folder, when there
// is none.
//
// A register of an older version is copied beside itself and brought up to
// date. One of a newer version, or one that may not be written, is opened for
// reading: see ReadOnly. Anything else than a sound register is refused with
// an *Error that says what it is, and left untouched.
func Open(path string, options ...Option) (*Register, error) {
	r := &Register{settings: settings{now: time.Now, scripts: scripts}}
	for _, set := range options {
		set(&r.settings)
	}
	if r.user == "" {
		r.user = userName()
	}
	full, err := filepath.Abs(path)
	if err != nil {
		return nil, failure("open", path, fileFailure(err))
	}
	r.path = full
	if err := r.open(); err != nil {
		if r.db != nil {
			r.db.Close()
		}
		return nil, failure("open", r.path, err)
	}
	return r, nil
}

func (r *Register) open() error {
	version, err := inspect(r.path)
	if errors.Is(err, ErrMissing) && !r.reading {
		if err := r.create(); err != nil {
			return err
		}
		version, err = inspect(r.path)
	}
	if err != nil {
		return err
	}
	open, known := writing, len(r.scripts)
	if r.reading || version > known {
		open = reading
	}
	if version, err = r.connect(open); err != nil {
		return err
	}
	if version > known {
		r.readOnly = fmt.Sprintf("a newer program wrote it (version %d; this one writes %d)", version, known)
		return nil
	}
	if err := checkSchema(r.db, r.scripts[:version]); err != nil {
		return err
	}
	if r.reading {
		r.readOnly = "it was opened for reading"
	} else if err := r.checkWritable(); err != nil {
		return err
	}
	switch {
	case version == known:
		return nil
	case r.readOnly != "":
		return because(ErrReadOnly, fmt.Sprintf("%s, and must first be brought from version %d to %d", r.readOnly, version, known), nil)
	}
	return r.upgrade(version)
}

// connect opens the database, checks that it is sound and returns its
// version.
func (r *Register) connect(open access) (version int, err error) {
	if r.db, err = sql.Open(sqlite.driver, sqlite.source(r.path, open)); err != nil {
		return 0, err
	}
	r.db.SetMaxOpenConns(1)
	damage, err := sqlite.check(r.db)
	if err == nil && damage != "" {
		err = because(ErrDamaged, "the first damage is: "+damage, nil)
	}
	if err != nil {
		return 0, err
	}
	return sqlite.version(r.db)
}

// checkWritable finds out whether the register can be changed, by trying.
func (r *Register) checkWritable() error {
	err := sqlite.probe(r.db)
	if err == nil {
		return nil
	}
	_, kind := sqlite.explain(err)
	if kind == ErrReadOnly || kind == ErrDisk {
		r.readOnly = "the file or its folder is write-protected"
		return nil
	}
	return err
}

// create makes an empty register under another name and then gives it its
// own, so that a register is there whole or not at all.
func (r *Register) create() error {
	folder := filepath.Dir(r.path)
	if err := os.MkdirAll(folder, 0o755); err != nil {
		return fileFailure(err)
	}
	temp := besides(r.path)
	defer os.Remove(temp)
	db, err := sql.Open(sqlite.driver, sqlite.source(temp, creating))
	if err != nil {
		return err
	}
	err = migrate(db, r.scripts)
	if cerr := db.Close(); err == nil {
		err = cerr
	}
	if err != nil {
		if _, kind := sqlite.explain(err); kind == ErrDisk || kind == ErrReadOnly {
			return because(ErrForbidden, "its folder is write-protected", err)
		}
		return err
	}
	if err := giveName(temp, r.path); err != nil && !errors.Is(err, fs.ErrExist) {
		return fileFailure(err)
	}
	return nil // or another program made it at the same time
}

// besides returns a new name for a hidden file in the folder of path.
func besides(path string) string {
	return filepath.Join(filepath.Dir(path), "."+filepath.Base(path)+"."+rand.Text()[:8])
}

// giveName moves a file to a name that must be free.
func giveName(from, to string) error {
	err := os.Link(from, to)
	if err == nil || errors.Is(err, fs.ErrExist) {
		return err
	}
	// A file system without links.
	if _, err := os.Lstat(to); err == nil {
		return fs.ErrExist
	}
	return os.Rename(from, to)
}

// upgrade keeps a copy of the register as it is and brings it up to date.
func (r *Register) upgrade(version int) error {
	kept, err := r.keepCopy(version)
	if err != nil {
		return failure("copy, before bringing it up to date,", r.path, err)
	}
	if err := migrate(r.db, r.scripts); err != nil {
		_, kind := sqlite.explain(err)
		return &Error{Doing: "bring up to date", Path: r.path, Kind: kind, Cause: err,
			Detail: fmt.Sprintf("%v; the file is as it was, and a copy of it lies at %s", err, kept)}
	}
	return checkSchema(r.db, r.scripts)
}

// keepCopy writes the database to a file beside it that is named after the
// version and the day, and returns its path.
func (r *Register) keepCopy(version int) (string, error) {
	ext := filepath.Ext(r.path)
	return r.copyAs(fmt.Sprintf("%s.version-%d.%s", strings.TrimSuffix(r.path, ext), version, r.now().UTC().Format(time.DateOnly)), ext)
}

func syncFile(path string) error {
	f, err := os.OpenFile(path, os.O_RDWR, 0)
	if err != nil {
		return err
	}
	err = f.Sync()
	if cerr := f.Close(); err == nil {
		err = cerr
	}
	return err
}

package storage

import (
	"context"
	"database/sql"
	"errors"
	"fmt"
	"net/url"
	"path/filepath"
	"strings"

	driver "modernc.org/sqlite"
	codes "modernc.org/sqlite/lib"
)

// A dialect is all that differs between one database and another. The SQL of
// the package is written for both SQLite and PostgreSQL: parameters by
// number, ids and times as TEXT.
type dialect struct {
	driver     string
	source     func(path string, open access) string
	version    func(querier) (int, error)
	setVersion func(*sql.Tx, int) error
	check      func(querier) (string, error)       // the first damage found, or nothing
	schema     func(querier) ([]string, error)     // what the database consists of, to compare
	copyTo     func(db *sql.DB, path string) error // a whole copy in a new file
	copyFrom   func(db *sql.DB, path string) error // the whole content from another file, in one transaction
	changes    func(querier) (int64, error)        // a number that changes with others' commits
	probe      func(*sql.DB) error                 // whether the database can be written
	unique     func(error) bool                    // err is a key that exists already
	explain    func(error) (detail string, kind error)
}

// access is how a database file is opened.
type access string

const (
	reading  access = "ro"  // never changes it
	writing  access = "rw"  // changes it, never makes it
	creating access = "rwc" // makes it when absent
)

// A querier is a database or a transaction of it.
type querier interface {
	Query(query string, args ...any) (*sql.Rows, error)
	QueryRow(query string, args ...any) *sql.Row
}

// applicationID marks an SQLite file as a register: "Anwr".
const applicationID = 0x416e7772

// busyTimeout is how long to wait for another program's write, in ms.
const busyTimeout = 5000

var sqlite = dialect{
	driver: "sqlite",

	source: sqliteSource,

	version: func(db querier) (v int, err error) {
		err = db.QueryRow(`PRAGMA user_version`).Scan(&v)
		return v, err
	},

	setVersion: func(tx *sql.Tx, v int) error {
		_, err := tx.Exec(fmt.Sprintf(`PRAGMA application_id = %d; PRAGMA user_version = %d`, applicationID, v))
		return err
	},

	check: func(db querier) (first string, err error) {
		err = db.QueryRow(`PRAGMA quick_check(1)`).Scan(&first)
		if first == "ok" {
			first = ""
		}
		return strings.Join(strings.Fields(first), " "), err
	},

	schema: func(db querier) (parts []string, err error) {
		rows, err := db.Query(`SELECT type || ' ' || name || ': ' || COALESCE(sql, '') FROM sqlite_schema
			WHERE name NOT LIKE 'sqlite%' ORDER BY type, name`)
		if err != nil {
			return nil, err
		}
		defer rows.Close()
		for rows.Next() {
			var part string
			if err := rows.Scan(&part); err != nil {
				return nil, err
			}
			parts = append(parts, strings.Join(strings.Fields(part), " "))
		}
		return parts, rows.Err()
	},

	copyTo: func(db *sql.DB, path string) error {
		_, err := db.Exec(`VACUUM INTO $1`, path)
		return err
	},

	copyFrom: func(db *sql.DB, path string) error {
		conn, err := db.Conn(context.Background())
		if err != nil {
			return err
		}
		defer conn.Close()
		return conn.Raw(func(c any) error {
			into, ok := c.(interface {
				NewRestore(source string) (*driver.Backup, error)
			})
			if !ok {
				return errors.New("the driver cannot restore")
			}
			b, err := into.NewRestore(sqliteSource(path, reading))
			if err != nil {
				return err
			}
			_, err = b.Step(-1) // all pages
			return errors.Join(err, b.Finish())
		})
	},

	changes: func(db querier) (v int64, err error) {
		err = db.QueryRow(`PRAGMA data_version`).Scan(&v)
		return v, err
	},

	// A write that changes nothing, taken back: it needs the file, its folder
	// and the journal that every edit needs.
	probe: func(db *sql.DB) error {
		tx, err := db.Begin()
		if err != nil {
			return err
		}
		defer tx.Rollback()
		_, err = tx.Exec(fmt.Sprintf(`PRAGMA application_id = %d`, applicationID))
		return err
	},

	unique: func(err error) bool {
		code, ok := sqliteCode(err)
		return ok && (code == codes.SQLITE_CONSTRAINT_UNIQUE || code == codes.SQLITE_CONSTRAINT_PRIMARYKEY)
	},

	explain: func(err error) (string, error) {
		code, ok := sqliteCode(err)
		switch {
		case !ok:
			return err.Error(), nil
		case code == codes.SQLITE_READONLY_DBMOVED:
			return "", ErrMoved
		case code == codes.SQLITE_READONLY_ROLLBACK, code == codes.SQLITE_READONLY_RECOVERY:
			return "an edit was cut short, and taking it back needs the right to write", ErrForbidden
		}
		switch code & 0xff { // the family of the code
		case codes.SQLITE_BUSY, codes.SQLITE_LOCKED:
			return "", ErrBusy
		case codes.SQLITE_CORRUPT, codes.SQLITE_NOTADB:
			return "", ErrDamaged
		case codes.SQLITE_READONLY:
			return "the file or its folder is write-protected", ErrReadOnly
		case codes.SQLITE_CANTOPEN:
			return "a file could not be opened or made in the folder", ErrDisk
		case codes.SQLITE_FULL:
			return "", ErrDiskFull
		case codes.SQLITE_IOERR:
			return driver.ErrorCodeString[code], ErrDisk
		}
		return "the database says " + err.Error(), nil
	},
}

// sqliteSource is the address of a database file, with how it is opened.
func sqliteSource(path string, open access) string {
	p := filepath.ToSlash(path)
	if !strings.HasPrefix(p, "/") {
		p = "/" + p // a Windows drive
	}
	q := []string{
		"mode=" + string(open),
		fmt.Sprintf("_busy_timeout=%d", busyTimeout),
		"_txlock=immediate", "_dqs=0", "_defensive=1", "_error_rc=1",
		"_pragma=trusted_schema(0)", "_pragma=cell_size_check(1)", "_pragma=foreign_keys(1)",
	}
	if open != reading {
		// A rollback journal keeps the register one file. EXTRA is FULL
		// and syncs the folder too, so that a stored edit outlives a power
		// cut right after it.
		q = append(q, "_journal_mode=DELETE", "_synchronous=EXTRA")
	}
	return (&url.URL{Scheme: "file", Path: p, RawQuery: strings.Join(q, "&")}).String()
}

// sqliteCode returns SQLite's extended result code of an error from it.
func sqliteCode(err error) (code int, ok bool) {
	var e *driver.Error
	if !errors.As(err, &e) {
		return 0, false
	}
	return e.Code(), true
}

// The head of an SQLite file, from the published file format: the magic text
// and the places of the two numbers that are its owner's to set.
const (
	sqliteMagic         = "SQLite format 3\x00"
	sqliteHead          = 100
	sqliteUserVersion   = 60
	sqliteApplicationID = 68
)

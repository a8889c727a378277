package storage

import (
	"errors"
	"os"
	"testing"
)

// Whatever a file holds, opening it gives a register whose assets can be
// listed, or an *Error; it is not changed by that, and nothing falls over.
func FuzzOpen(f *testing.F) {
	path := newPath(f)
	r, _ := added(f, path)
	r.Close()
	f.Add([]byte(content(f, path)))
	raw(f, path, `CREATE VIEW spy AS SELECT * FROM asset; PRAGMA user_version = 7`)
	f.Add([]byte(content(f, path)))
	f.Add([]byte("SQLite format 3\x00"))
	f.Add([]byte("PK\x03\x04"))
	f.Fuzz(func(t *testing.T, text []byte) {
		path := newPath(t)
		if err := os.WriteFile(path, text, 0o644); err != nil {
			t.Fatal(err)
		}
		r, err := Open(path, ForReading())
		if err != nil {
			if e := new(Error); !errors.As(err, &e) {
				t.Errorf("an error of another kind: %T %v", err, err)
			}
		} else {
			if list, err := r.List(); err == nil {
				for _, e := range list {
					r.Load(e.ID)
					r.History(e.ID)
				}
			}
			r.Close()
		}
		if content(t, path) != string(text) {
			t.Error("the file is another one now")
		}
	})
}

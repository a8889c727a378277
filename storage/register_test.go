package storage

import (
	"database/sql"
	"os"
	"path/filepath"
	"testing"
	"time"

	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// sampleFile is the asset that the tests store.
const sampleFile = "../testdata/assets/tern-passage.json"

func sample(t testing.TB) *hull.Asset {
	t.Helper()
	a, err := assetfile.Read(sampleFile)
	if err != nil {
		t.Fatal(err)
	}
	return a
}

// day is the time on the tests' clock.
var day = time.Date(2026, time.December, 1, 9, 30, 0, 0, time.UTC)

// opened opens the register at path for the user Ines and closes it with the
// test.
func opened(t testing.TB, path string, options ...Option) *Register {
	t.Helper()
	r, err := Open(path, append([]Option{User("Ines"), Clock(fixed)}, options...)...)
	if err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() { r.Close() })
	return r
}

func newPath(t testing.TB) string { return filepath.Join(t.TempDir(), "fleet.anodewright") }

// added opens a new register with the sample in it.
func added(t testing.TB, path string) (*Register, string) {
	t.Helper()
	r := opened(t, path)
	id, err := r.Add(sample(t), "imported from tern-passage.json")
	if err != nil {
		t.Fatal(err)
	}
	return r, id
}

// raw runs SQL on the file behind the package's back.
func raw(t testing.TB, path, statements string) {
	t.Helper()
	db, err := sql.Open(sqlite.driver, "file:"+path)
	if err != nil {
		t.Fatal(err)
	}
	defer db.Close()
	if _, err := db.Exec(statements); err != nil {
		t.Fatal(err)
	}
}

func content(t testing.TB, path string) string {
	t.Helper()
	b, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	return string(b)
}

// renamed is the sample under another name: the smallest edit.
func renamed(t testing.TB, name string) *hull.Asset {
	a := sample(t)
	a.Name = name
	return a
}

func save(t testing.TB, r *Register, id string, rev int64, a *hull.Asset, what string) int64 {
	t.Helper()
	rev, err := r.Save(id, rev, a, what)
	if err != nil {
		t.Fatal(err)
	}
	return rev
}

func fixed() time.Time { return day }

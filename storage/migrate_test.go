package storage

import (
	"errors"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"
	"testing/fstest"
)

// next is a made-up version 2, to move to from the real version 1.
var next = append(slices.Clone(scripts), `
CREATE TABLE remark (asset_id TEXT NOT NULL, words TEXT NOT NULL);
INSERT INTO remark SELECT id, name FROM asset;
ALTER TABLE asset ADD COLUMN remarks BIGINT NOT NULL DEFAULT 1;`)

// withScripts opens as a program that knows other versions.
func withScripts(scripts []string) Option { return func(s *settings) { s.scripts = scripts } }

func TestOlderRegisterIsCopiedAndBroughtUpToDate(t *testing.T) {
	path := newPath(t)
	r, id := added(t, path)
	r.Close()

	r = opened(t, path, withScripts(next))
	var words string
	if err := r.db.QueryRow(`SELECT words FROM remark WHERE asset_id = $1`, id).Scan(&words); err != nil || words != "Tern Passage" {
		t.Errorf("the new table holds %q, error %v", words, err)
	}
	if _, err := r.Save(id, 1, renamed(t, "Tern"), ""); err != nil {
		t.Error(err)
	}
	r.Close()
	opened(t, path, withScripts(next)).Close()

	const kept = "fleet.version-1.2026-12-01.anodewright"
	wantFiles(t, path, "fleet.anodewright", kept)
	old := opened(t, filepath.Join(filepath.Dir(path), kept))
	if a, rev, err := old.Load(id); err != nil || rev != 1 || a.Name != "Tern Passage" || old.ReadOnly() != "" {
		t.Errorf("the copy holds %+v, revision %d, error %v", a, rev, err)
	}
}

func TestFailedStepLeavesTheRegisterAsItWas(t *testing.T) {
	path := newPath(t)
	r, id := added(t, path)
	r.Close()
	bad := append(slices.Clone(next[:1]), `CREATE TABLE remark (words TEXT); INSERT INTO nothing VALUES (1)`)
	for n, kept := range []string{"fleet.version-1.2026-12-01.anodewright", "fleet.version-1.2026-12-01-2.anodewright"} {
		_, err := Open(path, withScripts(bad), Clock(fixed))
		if err == nil || !strings.HasPrefix(err.Error(), "cannot bring up to date "+path+": step to version 2: ") ||
			!strings.HasSuffix(err.Error(), "the file is as it was, and a copy of it lies at "+filepath.Join(filepath.Dir(path), kept)) {
			t.Errorf("try %d: %v", n+1, err)
		}
	}
	if _, rev, err := opened(t, path).Load(id); err != nil || rev != 1 {
		t.Errorf("revision %d, error %v", rev, err)
	}
}

func TestNewerRegisterIsOnlyRead(t *testing.T) {
	path := newPath(t)
	r, id := added(t, path)
	r.Close()
	opened(t, path, withScripts(next)).Close()
	before := content(t, path)
	wantReadOnly(t, opened(t, path), id, "a newer program wrote it (version 2; this one writes 1)")
	if content(t, path) != before {
		t.Error("the file was changed")
	}
}

func TestOlderRegisterCannotBeBroughtUpToDateForReading(t *testing.T) {
	path := newPath(t)
	r, _ := added(t, path)
	r.Close()
	_, err := Open(path, withScripts(next), ForReading())
	want := "cannot open " + path + ": it can be read but not changed: it was opened for reading, and must first be brought from version 1 to 2"
	if !errors.Is(err, ErrReadOnly) || err.Error() != want {
		t.Errorf("got  %v\nwant %s", err, want)
	}
}

func TestScriptsAreNumberedWithoutGap(t *testing.T) {
	if n := len(readScripts(os.DirFS("."))); n != len(scripts) || n < 1 {
		t.Errorf("%d scripts, want %d", n, len(scripts))
	}
	defer func() {
		if recover() == nil {
			t.Error("a gap passed")
		}
	}()
	readScripts(fstest.MapFS{"migrations/0001.sql": {}, "migrations/0003.sql": {}})
}

package storage

import (
	"database/sql"
	"errors"
	"fmt"
	"os"
	"path/filepath"
	"runtime"
	"strings"
	"testing"
)

// Every file that is not a sound register is refused with its own sentence
// and left as it is.
func TestFilesThatAreRefused(t *testing.T) {
	sound := newPath(t)
	r, _ := added(t, sound)
	r.Close()
	whole := content(t, sound)
	foreign := newPath(t)
	raw(t, foreign, `CREATE TABLE asset (id TEXT)`)
	altered := func(statement string) string {
		path := newPath(t)
		if err := os.WriteFile(path, []byte(whole), 0o644); err != nil {
			t.Fatal(err)
		}
		raw(t, path, statement)
		return content(t, path)
	}
	broken := []byte(whole)
	for i := 4096; i < len(broken) && i < 12288; i++ {
		broken[i] = 0xff
	}

	for name, c := range map[string]struct {
		content string
		kind    error
		want    string // of the sentence, after the path
	}{
		"empty":         {"", ErrEmptyFile, "it is empty; a register never is, so take a copy of it or choose another name"},
		"other kind":    {"PK\x03\x04 a workbook", ErrNotRegister, "it is not a register: it is a file of another kind"},
		"one byte":      {"x", ErrNotRegister, "it is not a register: it is a file of another kind"},
		"asset file":    {content(t, sampleFile), ErrNotRegister, "it is not a register: it looks like an asset file, which is imported into a register"},
		"foreign":       {content(t, foreign), ErrNotRegister, "it is not a register: it is a database of another program"},
		"cut in head":   {whole[:60], ErrDamaged, "it is damaged and was left as it is; take a copy of an earlier day: it ends after 60 bytes"},
		"cut":           {whole[:len(whole)/2], ErrDamaged, "it is damaged and was left as it is; take a copy of an earlier day"},
		"page of noise": {string(broken), ErrDamaged, "it is damaged and was left as it is; take a copy of an earlier day"},
		"no version":    {altered(`PRAGMA user_version = 0`), ErrDamaged, "it says that it is version 0, which never was"},
		"table missing": {altered(`DROP TABLE draft`), ErrDamaged, "a table of version 1 is missing or altered"},
		"trigger": {altered(`CREATE TRIGGER spy AFTER INSERT ON setting BEGIN DELETE FROM asset; END`),
			ErrDamaged, "it holds tables, triggers or views that are not the program's"},
	} {
		t.Run(name, func(t *testing.T) {
			path := newPath(t)
			if err := os.WriteFile(path, []byte(c.content), 0o644); err != nil {
				t.Fatal(err)
			}
			r, err := Open(path)
			if err == nil {
				r.Close()
				t.Fatal("it was opened")
			}
			if !errors.Is(err, c.kind) {
				t.Errorf("%v is not a %v", err, c.kind)
			}
			if got := err.Error(); !strings.HasPrefix(got, "cannot open "+path+": ") || !strings.Contains(got, c.want) || strings.Contains(got, "SQLITE") {
				t.Errorf("got  %s\nwant %s", got, c.want)
			}
			if content(t, path) != c.content {
				t.Error("the file was changed")
			}
			wantFiles(t, path, filepath.Base(path))
		})
	}
}

func TestFoldersAreRefused(t *testing.T) {
	folder := t.TempDir()
	_, err := Open(folder)
	if want := "cannot open " + folder + ": it is a folder; a register is one file"; err == nil || err.Error() != want || !errors.Is(err, ErrFolder) {
		t.Errorf("got  %v\nwant %s", err, want)
	}
	file := filepath.Join(folder, "file")
	if err := os.WriteFile(file, []byte("x"), 0o644); err != nil {
		t.Fatal(err)
	}
	path := filepath.Join(file, "fleet.anodewright")
	if _, err := Open(path); err == nil || !strings.HasPrefix(err.Error(), "cannot open "+path+": ") {
		t.Errorf("under a file: %v", err)
	}
}

func TestOpenMakesTheFileAndItsFolder(t *testing.T) {
	path := filepath.Join(t.TempDir(), "new", "a b?c#d%41&é.anodewright")
	if runtime.GOOS == "windows" {
		path = strings.ReplaceAll(path, "?", "_") // no file there may be named so
	}
	r, id := added(t, path)
	if r.Path() != path || r.ReadOnly() != "" {
		t.Errorf("path %s, read-only %q", r.Path(), r.ReadOnly())
	}
	r.Close()
	wantFiles(t, path, filepath.Base(path))
	if _, _, err := opened(t, path).Load(id); err != nil {
		t.Error(err)
	}
	head := content(t, path)[:100]
	if got := fmt.Sprintf("%x %x", head[sqliteApplicationID:][:4], head[sqliteUserVersion:][:4]); got != "416e7772 00000001" {
		t.Errorf("head says %s", got)
	}
}

// wantFiles asserts what lies in the folder of path.
func wantFiles(t *testing.T, path string, want ...string) {
	t.Helper()
	files, err := os.ReadDir(filepath.Dir(path))
	if err != nil {
		t.Fatal(err)
	}
	var got []string
	for _, f := range files {
		got = append(got, f.Name())
	}
	if strings.Join(got, " ") != strings.Join(want, " ") {
		t.Errorf("the folder holds %q, want %q", got, want)
	}
}

func TestForReading(t *testing.T) {
	path := newPath(t)
	if _, err := Open(path, ForReading()); !errors.Is(err, ErrMissing) {
		t.Errorf("absent file: %v", err)
	}
	r, id := added(t, path)
	r.Close()
	before := content(t, path)
	r = opened(t, path, ForReading())
	wantReadOnly(t, r, id, "it was opened for reading")
	if content(t, path) != before {
		t.Error("the file was changed")
	}
}

// wantReadOnly asserts that the register reads and that every edit fails with
// the reason.
func wantReadOnly(t *testing.T, r *Register, id, reason string) {
	t.Helper()
	if r.ReadOnly() != reason {
		t.Errorf("reason %q, want %q", r.ReadOnly(), reason)
	}
	if a, rev, err := r.Load(id); err != nil || rev != 1 || a.Name != "Tern Passage" {
		t.Errorf("load: %v", err)
	}
	_, add := r.Add(sample(t), "")
	_, save := r.Save(id, 1, renamed(t, "Tern"), "")
	_, restore := r.Restore(id)
	for deed, err := range map[string]error{
		"add Tern Passage to":   add,
		"save Tern in":          save,
		"restore an asset in":   restore,
		"remove an asset from":  r.Remove(id, 1),
		"arrange the assets of": r.Arrange([]string{id}),
		"keep a draft in":       r.SetDraft(id, "name", ""),
		"keep the drafts in":    r.SetDrafts(id, nil),
		"drop a draft in":       r.ClearDraft(id, "name"),
		"keep a setting in":     r.SetSetting("a", "b"),
	} {
		want := "cannot " + deed + " " + r.Path() + ": it can be read but not changed: " + reason
		if err == nil || err.Error() != want || !errors.Is(err, ErrReadOnly) {
			t.Errorf("got  %v\nwant %s", err, want)
		}
	}
}

func TestClosedRegister(t *testing.T) {
	r, id := added(t, newPath(t))
	for range 2 {
		if err := r.Close(); err != nil {
			t.Fatal(err)
		}
	}
	want := "cannot load an asset from " + r.Path() + ": it is closed"
	if _, _, err := r.Load(id); !errors.Is(err, ErrClosed) || err.Error() != want {
		t.Errorf("got  %v\nwant %s", err, want)
	}
	if err := r.SetSetting("a", "b"); !errors.Is(err, ErrClosed) {
		t.Errorf("edit: %v", err)
	}
}

func TestFileMovedWhileOpen(t *testing.T) {
	if runtime.GOOS == "windows" {
		t.Skip("Windows does not let an open file be moved")
	}
	r, id := added(t, newPath(t))
	if err := os.Rename(r.Path(), r.Path()+".old"); err != nil {
		t.Fatal(err)
	}
	_, err := r.Save(id, 1, renamed(t, "Tern"), "")
	want := "cannot save Tern in " + r.Path() + ": the file was moved, renamed or deleted since it was opened; nothing was stored"
	if !errors.Is(err, ErrMoved) || err.Error() != want {
		t.Errorf("got  %v\nwant %s", err, want)
	}
}

// A program that ends in the middle of an edit leaves a journal; the next one
// that opens the register finds it as it was before that edit.
func TestEditCutShortIsTakenBack(t *testing.T) {
	r, id := added(t, newPath(t))
	if _, err := r.db.Exec(`PRAGMA cache_size = 1`); err != nil { // so that pages go to the file early
		t.Fatal(err)
	}
	cut := newPath(t)
	stop := errors.New("stop")
	err := r.edit("test", func(tx *sql.Tx) error {
		for n := range 200 {
			if _, err := tx.Exec(`INSERT INTO setting (name, value) VALUES ($1, $2)`, fmt.Sprint(n), strings.Repeat("x", 2000)); err != nil {
				return err
			}
		}
		if _, err := tx.Exec(`DELETE FROM asset`); err != nil {
			return err
		}
		for _, ext := range []string{"", "-journal"} {
			if err := os.WriteFile(cut+ext, []byte(content(t, r.Path()+ext)), 0o644); err != nil {
				return err
			}
		}
		return stop
	})
	if !errors.Is(err, stop) {
		t.Fatal(err)
	}
	if len(content(t, cut)) <= len(content(t, r.Path())) {
		t.Fatal("the edit had not reached the file; the test shows nothing")
	}
	again := opened(t, cut)
	if _, rev, err := again.Load(id); err != nil || rev != 1 {
		t.Errorf("revision %d, error %v", rev, err)
	}
	if v, err := again.Setting("7"); err != nil || v != "" {
		t.Errorf("half of the edit is there: %d bytes, error %v", len(v), err)
	}
}

// An edit that the file or the disk does not take fails in words and leaves
// the register as it was.
func TestEditThatCannotBeStored(t *testing.T) {
	path := newPath(t)
	r, id := added(t, path)
	other := opened(t, path)
	for _, c := range []struct {
		name, hinder string
		during       func(edit func())
		kind         error
		want         string
	}{
		{"busy", `PRAGMA busy_timeout = 1`, func(edit func()) {
			if err := other.edit("test", func(*sql.Tx) error { edit(); return nil }); err != nil {
				t.Error(err)
			}
		}, ErrBusy, "another program is writing it; try again in a moment"},
		{"disk full", `PRAGMA max_page_count = 1`, func(edit func()) { edit() }, ErrDiskFull, "the disk is full; nothing was stored"},
	} {
		t.Run(c.name, func(t *testing.T) {
			if _, err := r.db.Exec(c.hinder); err != nil {
				t.Fatal(err)
			}
			c.during(func() {
				_, err := r.Add(withZones(t, 100), "")
				want := "cannot add Tern Passage to " + path + ": " + c.want
				if !errors.Is(err, c.kind) || err.Error() != want {
					t.Errorf("got  %v\nwant %s", err, want)
				}
			})
			if list, err := r.List(); err != nil || len(list) != 1 || list[0].ID != id {
				t.Errorf("list %+v, error %v", list, err)
			}
		})
	}
}

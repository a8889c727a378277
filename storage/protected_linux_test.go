package storage

import (
	"errors"
	"os"
	"path/filepath"
	"runtime"
	"syscall"
	"testing"
)

// asNobody makes file access of this test that of a user without rights. The
// right to pass every permission bit, which root has, would hide the case.
// The thread is given up with the test, so that no other runs so.
func asNobody(t *testing.T, folder string) {
	t.Helper()
	t.Cleanup(func() { os.Chmod(folder, 0o755) }) // or it could not be cleared away
	if os.Getuid() != 0 {
		return // permission bits hold already
	}
	for up := folder; len(up) > 1; up = filepath.Dir(up) {
		info, err := os.Stat(up)
		if err == nil && info.Mode()&0o001 == 0 && info.Sys().(*syscall.Stat_t).Uid == 0 && up != os.TempDir() {
			err = os.Chmod(up, info.Mode()|0o055)
		}
		if err != nil || up == os.TempDir() {
			break
		}
	}
	runtime.LockOSThread()
	const nobody = 65534
	if _, _, errno := syscall.RawSyscall(syscall.SYS_SETFSUID, nobody, 0, 0); errno != 0 {
		t.Skip("the system does not let root act as another user:", errno)
	}
	t.Cleanup(func() { syscall.RawSyscall(syscall.SYS_SETFSUID, 0, 0, 0) })
	if _, err := os.Stat(folder); err != nil {
		t.Skip("another user cannot reach the test's folder:", err)
	}
}

func TestWriteProtectedFileIsOnlyRead(t *testing.T) {
	path := newPath(t)
	r, id := added(t, path)
	r.Close()
	if err := os.Chmod(path, 0o444); err != nil {
		t.Fatal(err)
	}
	asNobody(t, filepath.Dir(path))
	wantReadOnly(t, opened(t, path), id, "the file or its folder is write-protected")
}

func TestFileInWriteProtectedFolderIsOnlyRead(t *testing.T) {
	path := newPath(t)
	r, id := added(t, path)
	r.Close()
	if err := os.Chmod(path, 0o666); err != nil {
		t.Fatal(err)
	}
	if err := os.Chmod(filepath.Dir(path), 0o555); err != nil {
		t.Fatal(err)
	}
	asNobody(t, filepath.Dir(path))
	wantReadOnly(t, opened(t, path), id, "the file or its folder is write-protected")
}

func TestForbiddenFile(t *testing.T) {
	path := newPath(t)
	r, _ := added(t, path)
	r.Close()
	if err := os.Chmod(path, 0o000); err != nil {
		t.Fatal(err)
	}
	if err := os.Chmod(filepath.Dir(path), 0o555); err != nil {
		t.Fatal(err)
	}
	asNobody(t, filepath.Dir(path))
	for _, path := range []string{path, path + ".new", filepath.Join(filepath.Dir(path), "folder", "new")} {
		_, err := Open(path)
		if !errors.Is(err, ErrForbidden) {
			t.Errorf("got %v", err)
		}
	}
}

// A folder that loses the right to be written while its register is open: the
// edit is refused in words, and the register reads on.
func TestFolderThatBecomesWriteProtected(t *testing.T) {
	path := newPath(t)
	r, id := added(t, path)
	if err := os.Chmod(filepath.Dir(path), 0o555); err != nil {
		t.Fatal(err)
	}
	asNobody(t, filepath.Dir(path))
	_, err := r.Save(id, 1, renamed(t, "Tern"), "")
	want := "cannot save Tern in " + path + ": it can be read but not changed: the file or its folder is write-protected"
	if !errors.Is(err, ErrReadOnly) || err.Error() != want {
		t.Errorf("got  %v\nwant %s", err, want)
	}
	if a, rev, err := r.Load(id); err != nil || rev != 1 || a.Name != "Tern Passage" {
		t.Errorf("after it: revision %d, error %v", rev, err)
	}
}

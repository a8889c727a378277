package storage

import (
	"errors"
	"os"
	"path/filepath"
	"strings"
	"syscall"
	"testing"

	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// smallDisk mounts a disk of the given number of kB, which takes root.
func smallDisk(t *testing.T, kB string) string {
	t.Helper()
	dir := t.TempDir()
	if err := syscall.Mount("tmpfs", dir, "tmpfs", 0, "size="+kB+"k"); err != nil {
		t.Skip("a small disk cannot be mounted here:", err)
	}
	t.Cleanup(func() {
		if err := syscall.Unmount(dir, syscall.MNT_DETACH); err != nil {
			t.Error(err)
		}
	})
	return dir
}

// A file that does not fit on the disk leaves the old one, and nothing beside.
func TestFullDiskKeepsTheOldAssetFile(t *testing.T) {
	dir := smallDisk(t, "128")
	path, zip := filepath.Join(dir, "ship.json"), filepath.Join(dir, "fleet.zip")
	old := sample(t)
	if err := assetfile.Write(path, old); err != nil {
		t.Fatal(err)
	}
	if err := assetfile.WriteFleetFile(zip, []*hull.Asset{old}); err != nil {
		t.Fatal(err)
	}
	before, zipped := content(t, path), content(t, zip)
	big := withZones(t, 2000)
	err := assetfile.Write(path, big)
	if err == nil || !strings.HasPrefix(err.Error(), path+" cannot be written: ") || !errors.Is(err, syscall.ENOSPC) {
		t.Errorf("error %v", err)
	}
	var many []*hull.Asset
	for range 200 {
		many = append(many, old)
	}
	if err := assetfile.WriteFleetFile(zip, many); !errors.Is(err, syscall.ENOSPC) {
		t.Errorf("fleet: error %v", err)
	}
	if content(t, path) != before || content(t, zip) != zipped {
		t.Error("an old file is another one now")
	}
	wantFiles(t, path, "fleet.zip", "ship.json")
}

// A backup or an edit that does not fit on the disk leaves the register as it
// was, and no half a backup.
func TestFullDiskKeepsTheRegister(t *testing.T) {
	path := filepath.Join(smallDisk(t, "160"), "fleet.anodewright")
	r, id := added(t, path)
	for n := 0; ; n++ {
		_, err := r.Backup()
		if err == nil && n < backupsKept {
			continue
		}
		if !errors.Is(err, ErrDiskFull) && !errors.Is(err, ErrDisk) || !strings.HasPrefix(err.Error(), "cannot back up "+path+": ") {
			t.Errorf("backup %d: %v", n+1, err)
		}
		break
	}
	for _, b := range backups(t, r) {
		opened(t, b.Path, ForReading())
	}
	if _, err := r.Save(id, 1, withZones(t, 2000), ""); !errors.Is(err, ErrDiskFull) {
		t.Errorf("edit: %v", err)
	}
	if a, rev, err := r.Load(id); err != nil || rev != 1 || a.Name != "Tern Passage" {
		t.Errorf("after it: revision %d, error %v", rev, err)
	}
	files, err := os.ReadDir(r.BackupFolder())
	if err != nil || len(files) != len(backups(t, r)) {
		t.Errorf("%d files beside %d backups, error %v", len(files), len(backups(t, r)), err)
	}
}

func TestWriteProtectedFolderKeepsTheOldAssetFile(t *testing.T) {
	dir := t.TempDir()
	path := filepath.Join(dir, "ship.json")
	if err := assetfile.Write(path, sample(t)); err != nil {
		t.Fatal(err)
	}
	before := content(t, path)
	if err := os.Chmod(dir, 0o555); err != nil {
		t.Fatal(err)
	}
	asNobody(t, dir)
	if err := assetfile.Write(path, renamed(t, "Other")); err == nil || err.Error() != path+" cannot be written: permission denied" {
		t.Errorf("error %v", err)
	}
	if content(t, path) != before {
		t.Error("the old file is another one now")
	}
}

func TestNoBackupIntoAWriteProtectedFolder(t *testing.T) {
	path := newPath(t)
	r, id := added(t, path)
	if err := os.MkdirAll(r.BackupFolder(), 0o555); err != nil {
		t.Fatal(err)
	}
	asNobody(t, r.BackupFolder())
	if _, err := r.Backup(); err == nil || !strings.HasPrefix(err.Error(), "cannot back up "+path+": ") {
		t.Errorf("error %v", err)
	}
	if _, rev, err := r.Load(id); err != nil || rev != 1 {
		t.Errorf("revision %d, error %v", rev, err)
	}
}

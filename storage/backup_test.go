package storage

import (
	"errors"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"time"
)

// ticking is a clock that the test moves on.
type ticking struct{ at time.Time }

func (c *ticking) now() time.Time { return c.at }

func backups(t *testing.T, r *Register) []Backup {
	t.Helper()
	all, err := r.Backups()
	if err != nil {
		t.Fatal(err)
	}
	return all
}

func TestBackupsAreDailyAndTheLastTenStay(t *testing.T) {
	clock := &ticking{day}
	r := opened(t, newPath(t), Clock(clock.now))
	daily := func() {
		t.Helper()
		if err := r.BackupDaily(); err != nil {
			t.Fatal(err)
		}
	}
	daily()
	clock.at = day.Add(23 * time.Hour)
	daily() // not a day old
	if all := backups(t, r); len(all) != 1 || !all[0].At.Equal(day) || filepath.Base(all[0].Path) != "2026-12-01 09.30.00Z.anodewright" {
		t.Fatalf("backups %+v", all)
	}
	for n := range 14 {
		clock.at = day.AddDate(0, 0, n+1)
		daily()
	}
	all := backups(t, r)
	if len(all) != backupsKept || !all[0].At.Equal(day.AddDate(0, 0, 14)) || !all[9].At.Equal(day.AddDate(0, 0, 5)) {
		t.Errorf("%d backups, from %v to %v", len(all), all[0].At, all[len(all)-1].At)
	}
	clock.at = day // a clock put right: the newest backup lies in the future
	daily()
	if again := backups(t, r); again[len(again)-1].At != day {
		t.Errorf("no backup was made: %+v", again)
	}
	files, err := os.ReadDir(r.BackupFolder())
	if err != nil || len(files) != backupsKept {
		t.Errorf("%d files in the folder of backups, error %v", len(files), err)
	}
}

func TestTwoBackupsOfOneSecond(t *testing.T) {
	r := opened(t, newPath(t))
	for range 2 {
		if _, err := r.Backup(); err != nil {
			t.Fatal(err)
		}
	}
	if all := backups(t, r); len(all) != 2 || filepath.Base(all[0].Path) != "2026-12-01 09.30.00Z-2.anodewright" {
		t.Errorf("%d backups, the newest %s", len(all), all[0].Path)
	}
}

func TestRestoreBackup(t *testing.T) {
	path := newPath(t)
	r, id := added(t, path)
	old, err := r.Backup()
	if err != nil {
		t.Fatal(err)
	}
	save(t, r, id, 1, renamed(t, "Changed since"), "name")
	other := opened(t, path)
	before, err := other.DataVersion()
	if err != nil {
		t.Fatal(err)
	}

	made, err := r.RestoreBackup(old.Path)
	if err != nil {
		t.Fatal(err)
	}
	for _, r := range []*Register{r, other} { // the one who did it, and another program
		if a, rev, err := r.Load(id); err != nil || rev != 1 || a.Name != "Tern Passage" {
			t.Errorf("after restoring: %+v, revision %d, error %v", a, rev, err)
		}
	}
	if after, err := other.DataVersion(); err != nil || after == before {
		t.Errorf("the other program is not told: %d, %v", after, err)
	}
	save(t, r, id, 1, renamed(t, "Edited again"), "name")

	if _, err := r.RestoreBackup(made.Path); err != nil { // and back
		t.Fatal(err)
	}
	if a, rev, err := r.Load(id); err != nil || rev != 2 || a.Name != "Changed since" {
		t.Errorf("after restoring the copy made before: %+v, revision %d, error %v", a, rev, err)
	}
	if all := backups(t, r); len(all) != 3 {
		t.Errorf("%d backups, want the first and one before each restoring", len(all))
	}
}

// However many backups there are, restoring the oldest does not drop it.
func TestRestoreKeepsTheBackupThatItRestores(t *testing.T) {
	clock := &ticking{day}
	r := opened(t, newPath(t), Clock(clock.now))
	for range backupsKept {
		if _, err := r.Backup(); err != nil {
			t.Fatal(err)
		}
		clock.at = clock.at.Add(time.Hour)
	}
	oldest := backups(t, r)[backupsKept-1]
	if _, err := r.RestoreBackup(oldest.Path); err != nil {
		t.Fatal(err)
	}
	if _, err := os.Stat(oldest.Path); err != nil {
		t.Error(err)
	}
}

func TestOlderBackupIsBroughtUpToDate(t *testing.T) {
	path := newPath(t)
	r, id := added(t, path)
	old, err := r.Backup()
	if err != nil {
		t.Fatal(err)
	}
	r.Close()
	r = opened(t, path, withScripts(next))
	if _, err := r.RestoreBackup(old.Path); err != nil {
		t.Fatal(err)
	}
	if v, err := sqlite.version(r.db); err != nil || v != 2 {
		t.Errorf("version %d, error %v", v, err)
	}
	if _, _, err := r.Load(id); err != nil {
		t.Error(err)
	}
}

func TestWhatIsNoBackupIsNotRestored(t *testing.T) {
	path := newPath(t)
	r, id := added(t, path)
	dir := filepath.Dir(path)
	put := func(name, text string) string {
		p := filepath.Join(dir, name)
		if err := os.WriteFile(p, []byte(text), 0o644); err != nil {
			t.Fatal(err)
		}
		return p
	}
	newer := filepath.Join(dir, "newer.anodewright")
	opened(t, newer, withScripts(next)).Close()
	torn, err := r.Backup()
	if err != nil {
		t.Fatal(err)
	}
	put(filepath.Join(filepath.Base(r.BackupFolder()), filepath.Base(torn.Path)), content(t, path)[:5000])
	for _, c := range []struct {
		path string
		kind error
	}{
		{filepath.Join(dir, "absent"), ErrMissing},
		{put("text", "no database"), ErrNotRegister},
		{dir, ErrFolder},
		{path, ErrNotRegister},
		{newer, ErrNotRegister},
		{torn.Path, ErrDamaged},
	} {
		if _, err := r.RestoreBackup(c.path); !errors.Is(err, c.kind) || !strings.HasPrefix(err.Error(), "cannot use as a backup "+c.path+": ") {
			t.Errorf("%s: %v", c.path, err)
		}
	}
	if _, rev, err := r.Load(id); err != nil || rev != 1 {
		t.Errorf("revision %d, error %v", rev, err)
	}
	if n := len(backups(t, r)); n != 1 {
		t.Errorf("%d backups, though nothing was restored", n)
	}
}

func TestReadOnlyRegisterIsNotBackedUp(t *testing.T) {
	path := newPath(t)
	r, _ := added(t, path)
	r.Close()
	r = opened(t, path, ForReading())
	if err := r.BackupDaily(); err != nil || len(backups(t, r)) != 0 {
		t.Errorf("error %v, backups %v", err, backups(t, r))
	}
	if _, err := r.RestoreBackup(path); !errors.Is(err, ErrReadOnly) {
		t.Errorf("restoring into it: %v", err)
	}
}

func TestDataVersionTellsOfOthersOnly(t *testing.T) {
	path := newPath(t)
	r, id := added(t, path)
	other := opened(t, path)
	version := func() int64 {
		v, err := r.DataVersion()
		if err != nil {
			t.Fatal(err)
		}
		return v
	}
	first := version()
	rev := save(t, r, id, 1, renamed(t, "Mine"), "")
	if version() != first {
		t.Error("an own edit changes it")
	}
	save(t, other, id, rev, renamed(t, "Theirs"), "")
	if version() == first {
		t.Error("another program's edit does not change it")
	}
}

// What a killed program left behind goes a day later; nothing else does.
func TestUnfinishedBackupsAreDropped(t *testing.T) {
	r, _ := added(t, newPath(t))
	first, err := r.Backup()
	if err != nil {
		t.Fatal(err)
	}
	for name, age := range map[string]time.Duration{
		".2026-11-29 08.00.00Z.AAAABBBB": 25 * time.Hour, ".2026-12-01 09.00.00Z.AAAACCCC": 23 * time.Hour,
		".mine": 100 * time.Hour, "2026-11-29 remark.txt": 100 * time.Hour,
	} {
		path := filepath.Join(r.BackupFolder(), name)
		if err := os.WriteFile(path, []byte("half"), 0o644); err != nil {
			t.Fatal(err)
		}
		if err := os.Chtimes(path, day.Add(-age), day.Add(-age)); err != nil {
			t.Fatal(err)
		}
	}
	second, err := r.Backup()
	if err != nil {
		t.Fatal(err)
	}
	wantFiles(t, first.Path, ".2026-12-01 09.00.00Z.AAAACCCC", ".mine", "2026-11-29 remark.txt", filepath.Base(second.Path), filepath.Base(first.Path))
}

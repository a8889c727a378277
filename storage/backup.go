package storage

import (
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"regexp"
	"slices"
	"strings"
	"time"
)

// backupsKept is how many dated backups of a register are kept.
const backupsKept = 10

// backupForm is a backup's name without its ending: the moment that it was
// made, in UTC, so that names sort by time; a number where one second made
// several.
var backupForm = regexp.MustCompile(`^(\d{4}-\d{2}-\d{2} \d{2}\.\d{2}\.\d{2})Z(?:-\d+)?$`)

const backupTime = "2006-01-02 15.04.05"

// Backup is a dated copy of a register.
type Backup struct {
	Path string
	At   time.Time // UTC, to the second
	Size int64     // bytes
}

// BackupFolder returns the folder of the register's backups, which lies beside
// it and is made with the first.
func (r *Register) BackupFolder() string {
	return strings.TrimSuffix(r.path, filepath.Ext(r.path)) + " backups"
}

// Backups returns the register's dated backups, the newest first.
func (r *Register) Backups() ([]Backup, error) {
	files, err := os.ReadDir(r.BackupFolder())
	if errors.Is(err, fs.ErrNotExist) {
		return nil, nil
	}
	if err != nil {
		return nil, failure("list the backups of", r.path, fileFailure(err))
	}
	var all []Backup
	for _, f := range files {
		stem, found := strings.CutSuffix(f.Name(), filepath.Ext(r.path))
		m := backupForm.FindStringSubmatch(stem)
		if !found || m == nil {
			continue
		}
		at, err := time.Parse(backupTime, m[1])
		info, ierr := f.Info()
		if err != nil || ierr != nil || !info.Mode().IsRegular() {
			continue
		}
		all = append(all, Backup{filepath.Join(r.BackupFolder(), f.Name()), at, info.Size()})
	}
	slices.SortFunc(all, func(a, b Backup) int {
		if c := b.At.Compare(a.At); c != 0 {
			return c
		}
		// Of one second the one with the longer or higher number is newer.
		if c := len(b.Path) - len(a.Path); c != 0 {
			return c
		}
		return strings.Compare(b.Path, a.Path)
	})
	return all, nil
}

// Backup writes a dated backup of the register as it is and drops all but the
// newest ten.
func (r *Register) Backup() (Backup, error) {
	b, err := r.backup("")
	return b, r.fail("back up", err)
}

// BackupDaily makes a backup when the last one is at least a day old, or
// stamped in the future as by a clock since put right, or there is none. A
// register that is only read gets none.
func (r *Register) BackupDaily() error {
	if r.readOnly != "" {
		return nil
	}
	all, err := r.Backups()
	if err != nil {
		return err
	}
	if len(all) > 0 {
		if age := r.now().Sub(all[0].At); age >= 0 && age < 24*time.Hour {
			return nil
		}
	}
	_, err = r.Backup()
	return err
}

// backup is Backup that never drops the backup at path kept.
func (r *Register) backup(kept string) (Backup, error) {
	if err := os.MkdirAll(r.BackupFolder(), 0o755); err != nil {
		return Backup{}, fileFailure(err)
	}
	r.dropUnfinished()
	ext := filepath.Ext(r.path)
	stem := filepath.Join(r.BackupFolder(), r.now().UTC().Format(backupTime)+"Z")
	path, err := r.copyAs(stem, ext)
	if err != nil {
		return Backup{}, err
	}
	info, err := os.Stat(path)
	if err != nil {
		return Backup{}, fileFailure(err)
	}
	made := Backup{Path: path, At: r.now().UTC().Truncate(time.Second), Size: info.Size()}
	all, err := r.Backups()
	if err != nil {
		return made, nil // it is made, and the old ones can wait
	}
	n := 0
	for _, b := range all {
		if b.Path == kept || b.Path == path {
			continue
		}
		if n++; n >= backupsKept {
			os.Remove(b.Path) // one that stays does no harm
		}
	}
	return made, nil
}

// dropUnfinished removes what backups that were cut short a day ago or more
// left behind.
func (r *Register) dropUnfinished() {
	left, _ := filepath.Glob(filepath.Join(r.BackupFolder(), ".????-??-??*"))
	for _, path := range left {
		if info, err := os.Lstat(path); err == nil && info.Mode().IsRegular() && r.now().Sub(info.ModTime()) >= 24*time.Hour {
			os.Remove(path) // one that stays does no harm
		}
	}
}

// copyAs writes the database whole under stem and ext, or with the first free
// number between them, and returns the path.
func (r *Register) copyAs(stem, ext string) (string, error) {
	temp := besides(stem)
	defer os.Remove(temp)
	if err := sqlite.copyTo(r.db, temp); err != nil {
		return "", err
	}
	if err := syncFile(temp); err != nil {
		return "", fileFailure(err)
	}
	for n := 1; ; n++ {
		name := stem + ext
		if n > 1 {
			name = fmt.Sprintf("%s-%d%s", stem, n, ext)
		}
		err := giveName(temp, name)
		if err == nil {
			syncFolder(filepath.Dir(name))
			return name, nil
		}
		if !errors.Is(err, fs.ErrExist) {
			return "", fileFailure(err)
		}
	}
}

// syncFolder makes a new name durable where the system can do that.
func syncFolder(path string) {
	if f, err := os.Open(path); err == nil {
		f.Sync()
		f.Close()
	}
}

// RestoreBackup brings the register back to a backup, or to any other sound
// register at path. The present state is backed up first; made names that
// backup. The change is one transaction: other programs that have the register
// open find it changed, and a failure leaves it as it was.
func (r *Register) RestoreBackup(path string) (made Backup, err error) {
	const doing = "restore a backup into"
	if r.readOnly != "" {
		return made, r.fail(doing, because(ErrReadOnly, r.readOnly, nil))
	}
	if err := r.checkBackup(path); err != nil {
		return made, failure("use as a backup", path, err)
	}
	if made, err = r.backup(path); err != nil {
		return made, r.fail("back up, before restoring,", err)
	}
	if err := sqlite.copyFrom(r.db, path); err != nil {
		return made, r.fail(doing, err)
	}
	// The backup may be of an older version.
	if err := migrate(r.db, r.scripts); err != nil {
		return made, r.fail(doing, err)
	}
	return made, r.fail(doing, checkSchema(r.db, r.scripts))
}

// checkBackup makes sure that path is a sound register of a version that this
// program knows, and not the open one.
func (r *Register) checkBackup(path string) error {
	version, err := inspect(path)
	if err != nil {
		return err
	}
	if version > len(r.scripts) {
		return because(ErrNotRegister, fmt.Sprintf("a newer program wrote it (version %d; this one knows %d)", version, len(r.scripts)), nil)
	}
	if here, err := os.Stat(r.path); err == nil {
		if there, err := os.Stat(path); err == nil && os.SameFile(here, there) {
			return because(ErrNotRegister, "it is the open register itself", nil)
		}
	}
	b := &Register{path: path, settings: settings{scripts: r.scripts}}
	defer func() {
		if b.db != nil {
			b.db.Close()
		}
	}()
	if version, err = b.connect(reading); err != nil {
		return err
	}
	return checkSchema(b.db, r.scripts[:version])
}

// DataVersion returns a number that changes whenever another program has
// changed the register, and only then.
func (r *Register) DataVersion() (int64, error) {
	v, err := sqlite.changes(r.db)
	return v, r.fail("look into", err)
}

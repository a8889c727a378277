package storage

import (
	"errors"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"runtime"
	"strings"
	"testing"
	"time"
)

// However the clock goes, the history is in the order of the edits, each
// whole, and a backup is made and can be restored.
func TestClockGoingBackwards(t *testing.T) {
	clock := &ticking{day}
	r := opened(t, newPath(t), Clock(clock.now))
	id, err := r.Add(sample(t), "")
	if err != nil {
		t.Fatal(err)
	}
	for n, years := range []int{0, -1, 30, -57, -2, 1} {
		clock.at = day.AddDate(years, 0, 0)
		save(t, r, id, int64(n+1), renamed(t, fmt.Sprint("edit ", n)), "")
		if err := r.BackupDaily(); err != nil {
			t.Fatal(err)
		}
	}
	history, err := r.History(id)
	if err != nil || len(history) != 7 {
		t.Fatalf("%d revisions, error %v", len(history), err)
	}
	for i, v := range history {
		if v.Rev != int64(i+1) {
			t.Errorf("place %d has revision %d", i, v.Rev)
		}
		if a, err := r.At(id, v.Rev); err != nil || i > 0 && a.Name != fmt.Sprint("edit ", i-1) {
			t.Errorf("revision %d: %v", v.Rev, err)
		}
	}
	all := backups(t, r)
	// One at each time that the newest was not made in the day before.
	if len(all) != 6 {
		t.Errorf("%d backups, want one for each leap", len(all))
	}
	oldest := all[len(all)-1] // made when the clock was back furthest
	if _, err := r.RestoreBackup(oldest.Path); err != nil {
		t.Fatal(err)
	}
	if a, rev, err := r.Load(id); err != nil || rev != 5 || a.Name != "edit 3" {
		t.Errorf("restored revision %d, error %v", rev, err)
	}
}

// shared is how many edits each process makes of a shared register.
const shared = 20

// share edits an asset so many times against another process that does so
// too.
func share(t *testing.T, r *Register) {
	defer r.Close()
	list, err := r.List()
	if err != nil || len(list) != 1 {
		t.Fatal(list, err)
	}
	id := list[0].ID
	for n := 0; n < shared; {
		a, rev, err := r.Load(id)
		if err != nil {
			t.Fatal(err)
		}
		a.Name = fmt.Sprintf("by %d: %d", os.Getpid(), n)
		a.Costs.PerZone++                                 // an edit that overwrote another's would be missing in the sum
		time.Sleep(time.Duration(n%3) * time.Millisecond) // a person takes longer
		rev, err = r.Save(id, rev, a, "")
		switch {
		case err == nil:
			fmt.Println(rev, a.Name)
			n++
		case errors.Is(err, ErrClash):
			fmt.Println("clash:", err)
		default:
			t.Fatal(err)
		}
	}
}

// Two programs, each a process of its own, edit one asset until each has its
// share in: clashes are told, and every edit that was acknowledged is there.
func TestTwoProcessesOnOneRegister(t *testing.T) {
	path := newPath(t)
	r, id := added(t, path)
	before, _, err := r.Load(id)
	if err != nil {
		t.Fatal(err)
	}
	seen, err := r.DataVersion()
	if err != nil {
		t.Fatal(err)
	}
	type result struct {
		out []byte
		err error
	}
	results := make(chan result, 2)
	for range 2 {
		cmd := exec.Command(os.Args[0], "-test.run=^TestChild$")
		cmd.Env = append(os.Environ(), childVariable+"=share="+path)
		go func() {
			out, err := cmd.CombinedOutput()
			results <- result{out, err}
		}()
	}
	acknowledged, clashes := map[string]string{}, 0
	for range 2 {
		got := <-results
		if got.err != nil {
			t.Fatalf("%v: %s", got.err, got.out)
		}
		for _, line := range strings.Split(string(got.out), "\n") {
			rev, name, _ := strings.Cut(line, " ")
			switch {
			case rev == "clash:": // and then the asset's name
				clashes++
				if !strings.Contains(line, " was changed by Ines at ") || !strings.Contains(line, "nothing was overwritten") {
					t.Errorf("told of a clash: %q", line)
				}
			case strings.HasPrefix(name, "by "):
				acknowledged[rev] = name
			}
		}
	}
	history, err := r.History(id)
	if err != nil || len(history) != 1+2*shared || len(acknowledged) != 2*shared {
		t.Fatalf("%d revisions, %d acknowledged, error %v; want %d", len(history), len(acknowledged), err, 1+2*shared)
	}
	for _, v := range history[1:] {
		a, err := r.At(id, v.Rev)
		if err != nil || a.Name != acknowledged[fmt.Sprint(v.Rev)] || a.Costs.PerZone != before.Costs.PerZone+float64(v.Rev-1) {
			t.Errorf("revision %d is not the one acknowledged, or does not follow: %v", v.Rev, err)
		}
	}
	if now, err := r.DataVersion(); err != nil || now == seen {
		t.Errorf("a third program does not notice: %d, %v", now, err)
	}
	t.Logf("%d edits of two processes, %d clashes told", 2*shared, clashes)
}

// A register whose folder vanishes while it is open fails in words, and no
// other register appears in its place.
func TestFolderThatVanishes(t *testing.T) {
	if runtime.GOOS == "windows" {
		t.Skip("Windows does not let the folder of an open file be removed")
	}
	for name, vanish := range map[string]func(folder string) error{
		"renamed": func(folder string) error { return os.Rename(folder, folder+".old") },
		"removed": os.RemoveAll,
	} {
		t.Run(name, func(t *testing.T) {
			folder := filepath.Join(t.TempDir(), "fleet")
			path := filepath.Join(folder, "fleet.anodewright")
			r, id := added(t, path)
			if err := vanish(folder); err != nil {
				t.Fatal(err)
			}
			_, saved := r.Save(id, 1, renamed(t, "Tern"), "")
			_, added := r.Add(sample(t), "")
			for deed, err := range map[string]error{"save Tern in": saved, "add Tern Passage to": added, "remove an asset from": r.Remove(id, 1), "keep a setting in": r.SetSetting("a", "b")} {
				if err == nil || !strings.HasPrefix(err.Error(), "cannot "+deed+" "+path+": ") || strings.Contains(err.Error(), "SQLITE") {
					t.Errorf("%s: told %v", deed, err)
				}
			}
			if !errors.Is(saved, ErrMoved) {
				t.Errorf("save: told %v", saved)
			}
			if _, err := os.Stat(path); !errors.Is(err, os.ErrNotExist) {
				t.Errorf("something lies at the old place: %v", err)
			}
			// What is open can still be copied, which saves a register that was
			// removed.
			if b, err := r.Backup(); err != nil {
				t.Errorf("back up: %v", err)
			} else if a, rev, err := opened(t, b.Path, ForReading()).Load(id); err != nil || rev != 1 || a.Name != "Tern Passage" {
				t.Errorf("the backup: revision %d, error %v", rev, err)
			}
			if name == "renamed" {
				if a, rev, err := opened(t, filepath.Join(folder+".old", "fleet.anodewright")).Load(id); err != nil || rev != 1 || a.Name != "Tern Passage" {
					t.Errorf("where it lies now: revision %d, error %v", rev, err)
				}
			}
		})
	}
}

package storage

import (
	"bytes"
	"cmp"
	"flag"
	"fmt"
	"math/rand/v2"
	"os"
	"os/exec"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"
	"time"

	"anodewright/anodes/plan"
	"anodewright/hull"
	"anodewright/storage/assetfile"
	"anodewright/storage/sheet"
	"anodewright/storage/workbook"
)

// kills is how often each kind of child is killed. Before a release:
// go test ./storage -run Killed -kills 1000.
var kills = flag.Int("kills", 8, "how often each child process is killed")

// childVariable names the deed of a child process and its file.
const childVariable = "ANODEWRIGHT_TEST_CHILD"

// TestChild is no test: it is what the killed processes do, again and again
// until they are killed. They print a line for each deed that the package
// acknowledged.
func TestChild(t *testing.T) {
	deed, path, ok := strings.Cut(os.Getenv(childVariable), "=")
	if !ok {
		t.Skip("runs in child processes of the kill tests only")
	}
	open := func(options ...Option) *Register {
		r, err := Open(path, append([]Option{User("Ines"), Clock(fixed)}, options...)...)
		if err != nil {
			t.Fatal(err)
		}
		return r
	}
	check := func(err error) {
		if err != nil {
			t.Fatal(err)
		}
	}
	tell := func(what any) { fmt.Fprintln(os.Stdout, what) }
	switch deed {
	case "edit":
		r := open()
		list, err := r.List()
		check(err)
		rev := list[0].Rev
		for {
			rev, err = r.Save(list[0].ID, rev, renamed(t, fmt.Sprint("edit ", rev+1)), "")
			check(err)
			tell(rev)
		}
	case "migrate":
		tell("start")
		open(withScripts(next)).Close()
		tell("done")
	case "backup":
		for r := open(); ; {
			b, err := r.Backup()
			check(err)
			tell(b.Path)
		}
	case "restore":
		r := open()
		both := twins(path)
		for n := 0; ; n++ {
			_, err := r.RestoreBackup(both[n%2])
			check(err)
			tell(n)
		}
	case "export":
		both := []*hull.Asset{withZones(t, 3), withZones(t, 300)}
		for n := 0; ; n++ {
			check(assetfile.Write(path, both[n%2]))
			check(assetfile.WriteFleetFile(path+".zip", both[n%2:n%2+1]))
			tell(n)
		}
	case "share":
		share(t, open())
	case "add":
		for r, n := open(), 1; ; n++ {
			id, err := r.Add(renamed(t, fmt.Sprint("asset ", n)), "")
			check(err)
			tell(id)
		}
	case "workbook":
		for n := 0; ; n++ {
			check(workbook.Write(path, outcomes(t)[n%2]))
			tell(n)
		}
	case "survey":
		both := outcomes(t)
		for n := 0; ; n++ {
			o := both[n%2]
			check(sheet.Write(path, o.Asset, sheet.Tie{}, o.Asset.Dockings[0].Date))
			check(sheet.WriteCSV(path+".csv", o.Asset))
			tell(n)
		}
	}
}

// twins are the two registers that a child restores in turn.
func twins(path string) []string { return []string{path + ".one", path + ".two"} }

// longest is for how many microseconds a child may go on after its first word
// whose deed takes longer than most.
var longest = map[string]int{"workbook": 200_000, "survey": 100_000}

// killed starts a child, kills it some moments after its first word, or
// before, and returns the whole lines that it had printed.
func killed(t *testing.T, deed, path string, random *rand.Rand) []string {
	t.Helper()
	cmd := exec.Command(os.Args[0], "-test.run=^TestChild$")
	cmd.Env = append(os.Environ(), childVariable+"="+deed+"="+path)
	var out, faults bytes.Buffer
	said := make(chan bool, 1)
	cmd.Stdout = writer(func(p []byte) {
		out.Write(p)
		select {
		case said <- true:
		default:
		}
	})
	cmd.Stderr = &faults
	if err := cmd.Start(); err != nil {
		t.Fatal(err)
	}
	if random.IntN(8) > 0 {
		select {
		case <-said:
		case <-time.After(time.Minute):
		}
	}
	time.Sleep(time.Duration(random.IntN(cmp.Or(longest[deed], 30_000))) * time.Microsecond)
	cmd.Process.Kill()
	cmd.Wait()
	if strings.Contains(out.String()+faults.String(), "FAIL") {
		t.Fatalf("the child failed: %s %s", out.String(), faults.String())
	}
	lines := strings.Split(out.String(), "\n")
	return lines[:len(lines)-1]
}

type writer func([]byte)

func (w writer) Write(p []byte) (int, error) { w(p); return len(p), nil }

// chance is the same run of moments each time.
func chance() *rand.Rand { return rand.New(rand.NewPCG(864, 2027)) }

// Every edit that was acknowledged is there after a kill, with all before it,
// and the register is sound.
func TestKilledWhileEditing(t *testing.T) {
	path := newPath(t)
	r, id := added(t, path)
	r.Close()
	random, edits := chance(), 0
	for n := range *kills {
		lines := killed(t, "edit", path, random)
		edits += len(lines)
		r, err := Open(path, User("Ines"), Clock(fixed)) // checks the whole file
		if err != nil {
			t.Fatalf("kill %d: %v", n, err)
		}
		a, rev, err := r.Load(id)
		if err != nil {
			t.Fatal(err)
		}
		if rev > 1 && a.Name != fmt.Sprint("edit ", rev) {
			t.Fatalf("kill %d: revision %d holds %q", n, rev, a.Name)
		}
		if len(lines) > 0 {
			acknowledged, err := strconv.ParseInt(lines[len(lines)-1], 10, 64)
			if err != nil || rev < acknowledged || rev > acknowledged+1 {
				t.Fatalf("kill %d: revision %d, acknowledged %v, %v", n, rev, lines, err)
			}
			for _, line := range lines {
				past, _ := strconv.ParseInt(line, 10, 64)
				if old, err := r.At(id, past); err != nil || old.Name != fmt.Sprint("edit ", past) {
					t.Fatalf("kill %d: acknowledged revision %d holds %v, error %v", n, past, old, err)
				}
			}
		}
		r.Close()
	}
	t.Logf("%d kills, %d acknowledged edits, none lost", *kills, edits)
	if edits == 0 {
		t.Error("no edit was ever acknowledged: nothing was tested")
	}
}

// A register killed while it is brought up to date is of the old version or
// the new one, and whole.
func TestKilledWhileBroughtUpToDate(t *testing.T) {
	sound := newPath(t)
	r, id := added(t, sound)
	r.Close()
	whole := content(t, sound)
	random := chance()
	for n := range *kills {
		path := newPath(t)
		if err := os.WriteFile(path, []byte(whole), 0o644); err != nil {
			t.Fatal(err)
		}
		killed(t, "migrate", path, random)
		r, err := Open(path, User("Ines"), Clock(fixed), withScripts(next))
		if err != nil {
			t.Fatalf("kill %d: %v", n, err)
		}
		var words string
		if err := r.db.QueryRow(`SELECT words FROM remark WHERE asset_id = $1`, id).Scan(&words); err != nil || words != "Tern Passage" {
			t.Fatalf("kill %d: the new table holds %q, error %v", n, words, err)
		}
		r.Close()
	}
}

// Backups of a killed program are whole, each of them.
func TestKilledWhileBackingUp(t *testing.T) {
	path := newPath(t)
	r, _ := added(t, path)
	folder := r.BackupFolder()
	r.Close()
	random, made := chance(), 0
	for n := range *kills {
		lines := killed(t, "backup", path, random)
		made += len(lines)
		r, err := Open(path, Clock(fixed))
		if err != nil {
			t.Fatalf("kill %d: %v", n, err)
		}
		for _, b := range backups(t, r) {
			opened(t, b.Path, ForReading()).Close()
		}
		r.Close()
		if len(lines) > 0 && !slices.ContainsFunc(lines[max(0, len(lines)-2):], isThere) {
			t.Fatalf("kill %d: none of the last backups of %v is there", n, lines)
		}
	}
	hidden, _ := filepath.Glob(filepath.Join(folder, ".*"))
	t.Logf("%d kills, %d backups acknowledged, %d unfinished files left behind", *kills, made, len(hidden))
	if made == 0 {
		t.Error("no backup was ever acknowledged: nothing was tested")
	}
}

func isThere(path string) bool { _, err := os.Stat(path); return err == nil }

// A register killed while a backup is restored is one or the other, whole.
func TestKilledWhileRestoring(t *testing.T) {
	path := newPath(t)
	r, _ := added(t, path)
	r.Close()
	for n, twin := range twins(path) {
		r := opened(t, twin)
		for range 20 * (n + 1) {
			if _, err := r.Add(renamed(t, filepath.Ext(twin)), ""); err != nil {
				t.Fatal(err)
			}
		}
		r.Close()
	}
	random := chance()
	for n := range *kills {
		killed(t, "restore", path, random)
		r, err := Open(path, Clock(fixed))
		if err != nil {
			t.Fatalf("kill %d: %v", n, err)
		}
		list, err := r.List()
		if err != nil {
			t.Fatal(err)
		}
		names := map[string]int{}
		for _, e := range list {
			names[e.Name]++
		}
		if len(names) != 1 || names[".one"] != 20 && names[".two"] != 40 && names["Tern Passage"] != 1 {
			t.Fatalf("kill %d: the register holds %v", n, names)
		}
		r.Close()
	}
}

// An asset file and a fleet killed while written are the old ones or the new
// ones, whole.
func TestKilledWhileExporting(t *testing.T) {
	path := filepath.Join(t.TempDir(), "ship.json")
	random, made := chance(), 0
	for n := range *kills {
		lines := killed(t, "export", path, random)
		made += len(lines)
		if made == 0 {
			continue // killed before its first file
		}
		a, err := assetfile.Read(path)
		if err != nil {
			t.Fatalf("kill %d: %v", n, err)
		}
		if zones := len(a.Zones); zones != len(withZones(t, 3).Zones) && zones != len(withZones(t, 300).Zones) {
			t.Fatalf("kill %d: %d zones", n, zones)
		}
		if fleet, err := assetfile.ReadFleetFile(path + ".zip"); err != nil || len(fleet) != 1 {
			t.Fatalf("kill %d: fleet of %d, error %v", n, len(fleet), err)
		}
	}
	if made == 0 {
		t.Error("no file was ever written: nothing was tested")
	}
}

// Assets that were acknowledged as added are there after a kill, in their
// order, and whole.
func TestKilledWhileAdding(t *testing.T) {
	random, assets := chance(), 0
	for n := range *kills {
		path := newPath(t)
		opened(t, path).Close()
		lines := killed(t, "add", path, random)
		assets += len(lines)
		r, err := Open(path, Clock(fixed))
		if err != nil {
			t.Fatalf("kill %d: %v", n, err)
		}
		list, err := r.List()
		if err != nil || len(list) < len(lines) || len(list) > len(lines)+1 {
			t.Fatalf("kill %d: %d assets, %d acknowledged, error %v", n, len(list), len(lines), err)
		}
		for i, item := range list {
			a, rev, err := r.Load(item.ID)
			if err != nil || rev != 1 || a.Name != fmt.Sprint("asset ", i+1) || i < len(lines) && item.ID != lines[i] {
				t.Fatalf("kill %d: asset %d: revision %d, error %v", n, i+1, rev, err)
			}
		}
		r.Close()
	}
	t.Logf("%d kills, %d assets acknowledged, none lost", *kills, assets)
	if assets == 0 {
		t.Error("no asset was ever added: nothing was tested")
	}
}

// outcomes are two plans, whose workbooks differ in size.
func outcomes(t testing.TB) []*plan.Outcome {
	today := hull.NewDate(2026, 12, 1)
	return []*plan.Outcome{plan.Compute(withZones(t, 3), today), plan.Compute(withZones(t, 12), today)}
}

// A workbook, a survey sheet and its CSV killed while written are the old ones
// or the new ones, to the byte.
func TestKilledWhileWritingSheets(t *testing.T) {
	var workbooks, surveys, lists []string
	for _, o := range outcomes(t) {
		var w, s bytes.Buffer
		if err := workbook.WriteTo(&w, o); err != nil {
			t.Fatal(err)
		}
		if err := sheet.WriteTo(&s, o.Asset, sheet.Tie{}, o.Asset.Dockings[0].Date); err != nil {
			t.Fatal(err)
		}
		workbooks, surveys = append(workbooks, w.String()), append(surveys, s.String())
		lists = append(lists, string(sheet.EncodeCSV(o.Asset)))
	}
	for deed, want := range map[string]map[string][]string{"workbook": {"": workbooks}, "survey": {"": surveys, ".csv": lists}} {
		path := filepath.Join(t.TempDir(), "out.xlsx")
		random, made := chance(), 0
		for n := range *kills {
			made += len(killed(t, deed, path, random))
			for ext, either := range want {
				got, err := os.ReadFile(path + ext)
				if made == 0 && os.IsNotExist(err) {
					continue // killed before its first file
				}
				if err != nil || !slices.Contains(either, string(got)) {
					t.Fatalf("%s, kill %d: the file%s of %d bytes is neither of the two, error %v", deed, n, ext, len(got), err)
				}
			}
		}
		left, _ := filepath.Glob(filepath.Join(filepath.Dir(path), ".*"))
		t.Logf("%s: %d kills, %d acknowledged, %d unfinished files left behind", deed, *kills, made, len(left))
		if made == 0 {
			t.Errorf("%s: no file was ever written: nothing was tested", deed)
		}
	}
}

package assetfile

import (
	"os"
	"path/filepath"
	"runtime"
	"strings"
	"testing"
)

const hostileDir = "../../testdata/hostile"

// hostileIndex reads the index of bad files: a name, a tab and words that the
// first line of the error must contain.
func hostileIndex(t *testing.T) map[string]string {
	t.Helper()
	text, err := os.ReadFile(filepath.Join(hostileDir, "index.txt"))
	if err != nil {
		t.Fatal(err)
	}
	index := map[string]string{}
	for _, line := range strings.Split(strings.TrimSpace(string(text)), "\n") {
		name, want, ok := strings.Cut(line, "\t")
		if !ok || want == "" {
			t.Fatalf("index line %q has no words", line)
		}
		index[name] = want
	}
	return index
}

func TestHostileFiles(t *testing.T) {
	index := hostileIndex(t)
	for name, want := range index {
		t.Run(name, func(t *testing.T) {
			_, err := Read(filepath.Join(hostileDir, name))
			if err == nil {
				t.Fatal("accepted")
			}
			first, _, _ := strings.Cut(err.Error(), "\n")
			if !strings.Contains(first, want) {
				t.Errorf("first line %q does not contain %q", first, want)
			}
			if len(first) > 1000 {
				t.Errorf("first line is %d bytes long", len(first))
			}
		})
	}
	files, err := os.ReadDir(hostileDir)
	if err != nil {
		t.Fatal(err)
	}
	for _, f := range files {
		if _, ok := index[f.Name()]; !ok && f.Name() != "index.txt" {
			t.Errorf("%s is not in the index", f.Name())
		}
	}
	if len(index) < 20 {
		t.Errorf("only %d bad files", len(index))
	}
}

// One mistake is told once: no fault follows from another.
func TestHostileFilesTellOneFault(t *testing.T) {
	for name := range hostileIndex(t) {
		switch name {
		case "minor-7-new-field.json", "held-in-a-circle.json":
			continue // two fields, or both zones of the circle, are at fault
		}
		_, err := Read(filepath.Join(hostileDir, name))
		if err == nil {
			t.Errorf("%s: accepted", name)
		} else if n := strings.Count(err.Error(), "\n") + 1; n > 1 {
			t.Errorf("%s: %d faults for one mistake:\n%v", name, n, err)
		}
	}
}

func TestHugeFileIsRefusedUnread(t *testing.T) {
	path := filepath.Join(t.TempDir(), "huge.json")
	start := []byte(`{"format": "anodewright-asset", "version": 1, "name": "`)
	if err := os.WriteFile(path, start, 0o644); err != nil {
		t.Fatal(err)
	}
	if err := os.Truncate(path, 100<<20); err != nil {
		t.Fatal(err)
	}
	var before, after runtime.MemStats
	runtime.ReadMemStats(&before)
	_, err := Read(path)
	runtime.ReadMemStats(&after)
	if err == nil || !strings.Contains(err.Error(), "100 MB") {
		t.Errorf("error %v does not tell the size", err)
	}
	if used := after.TotalAlloc - before.TotalAlloc; used > 1<<20 {
		t.Errorf("%d bytes were allocated to refuse the file", used)
	}
}

func TestFolderAndAbsentFileAreRefused(t *testing.T) {
	dir := t.TempDir()
	if _, err := Read(dir); err == nil || !strings.Contains(err.Error(), "folder") {
		t.Errorf("a folder gives %v", err)
	}
	if _, err := Read(filepath.Join(dir, "absent.json")); err == nil || !strings.Contains(err.Error(), "absent.json") {
		t.Errorf("an absent file gives %v", err)
	}
}

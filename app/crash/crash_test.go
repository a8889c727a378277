package crash_test

import (
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"anodewright/app/crash"
)

var started = time.Date(2026, 12, 1, 9, 30, 0, 0, time.UTC)

// TestMain lets the test run itself as a program that falls over.
func TestMain(m *testing.M) {
	folder, how := os.Getenv("CRASH_FOLDER"), os.Getenv("CRASH_HOW")
	if folder == "" {
		os.Exit(m.Run())
	}
	done, err := crash.Guard(folder, "9.9.9", started)
	if err != nil {
		os.Exit(3)
	}
	switch how {
	case "panic":
		panic("the anchor slipped")
	case "beside":
		go func() { panic("the anchor slipped") }()
		time.Sleep(10 * time.Second)
	}
	done()
}

// run runs the program and returns the folder of its crash files.
func run(t *testing.T, how string) string {
	t.Helper()
	folder := filepath.Join(t.TempDir(), "crashes")
	cmd := exec.Command(os.Args[0])
	cmd.Env = append(os.Environ(), "CRASH_FOLDER="+folder, "CRASH_HOW="+how)
	err := cmd.Run()
	if crashed := err != nil; crashed != (how != "") {
		t.Fatalf("%q ended with %v", how, err)
	}
	return folder
}

func TestCrashOfAnyGoroutineIsKept(t *testing.T) {
	for _, how := range []string{"panic", "beside"} {
		folder := run(t, how)
		paths := crash.Collect(folder, started)
		if len(paths) != 1 || !strings.HasPrefix(filepath.Base(paths[0]), "crash 20") {
			t.Fatalf("%s: collected %q", how, paths)
		}
		text, err := os.ReadFile(paths[0])
		if err != nil {
			t.Fatal(err)
		}
		for _, want := range []string{"Anodewright 9.9.9 on ", "started 2026-12-01T09:30:00Z", "the anchor slipped", "goroutine ", "crash_test.go"} {
			if !strings.Contains(string(text), want) {
				t.Errorf("%s: %q is not in the report", how, want)
			}
		}
		if again := crash.Collect(folder, started); len(again) != 0 {
			t.Errorf("%s: told twice: %q", how, again)
		}
	}
}

func TestGoodEndLeavesNothing(t *testing.T) {
	folder := run(t, "")
	if paths := crash.Collect(folder, started); len(paths) != 0 {
		t.Errorf("collected %q", paths)
	}
	if files, _ := os.ReadDir(folder); len(files) != 0 {
		t.Errorf("%d files are left", len(files))
	}
	if paths := crash.Collect(filepath.Join(folder, "none"), started); paths != nil {
		t.Errorf("from nowhere: %q", paths)
	}
}

func TestOldFilesOfKilledProgramsGo(t *testing.T) {
	folder := t.TempDir()
	path := filepath.Join(folder, "running 1.txt")
	if err := os.WriteFile(path, []byte("Anodewright 9.9.9\n\n--- what the crash said ---\n"), 0o600); err != nil {
		t.Fatal(err)
	}
	if err := os.Chtimes(path, started, started); err != nil {
		t.Fatal(err)
	}
	crash.Collect(folder, started.Add(time.Hour))
	if _, err := os.Stat(path); err != nil {
		t.Error("the file of a program that may still run is gone")
	}
	crash.Collect(folder, started.Add(30*24*time.Hour))
	if _, err := os.Stat(path); err == nil {
		t.Error("the file of a program killed long ago is still there")
	}
}

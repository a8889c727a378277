package main

import (
	"bytes"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"
)

// TestMain makes this test program act as a command for steps: it prints its
// arguments and fails when the first one is "fail".
func TestMain(m *testing.M) {
	if os.Getenv("DEV_TEST_HELPER") == "" {
		os.Exit(m.Run())
	}
	os.Stdout.WriteString(strings.Join(os.Args[1:], " ") + "\n")
	if os.Args[1] == "fail" {
		os.Exit(3)
	}
}

// helper returns a step that runs this test program with the arguments.
func helper(kind stepKind, name string, args ...string) step {
	return step{kind: kind, name: name, argv: append([]string{os.Args[0]}, args...), env: []string{"DEV_TEST_HELPER=1"}}
}

// outcome describes the results as a list of "name ok", "name failed" and
// "name not run", sorted, since two lists of steps run side by side.
func outcome(w *worker) []string {
	var out []string
	for _, r := range w.results {
		switch {
		case r.notRun:
			out = append(out, r.name+" not run")
		case r.failed != nil:
			out = append(out, r.name+" failed")
		default:
			out = append(out, r.name+" ok")
		}
	}
	slices.Sort(out)
	return out
}

func TestWorkerGoesOnAfterAFailedCheckAndFailsInTheEnd(t *testing.T) {
	var out bytes.Buffer
	w := &worker{root: t.TempDir(), out: &out, err: &bytes.Buffer{}}
	ok := w.do(plan{
		checks: []step{helper(stepRun, "a", "fail"), helper(stepRun, "b", "fine", "indeed")},
		last:   []step{helper(stepRun, "c", "last")},
	})
	if want := []string{"a failed", "b ok", "c ok"}; ok || !slices.Equal(outcome(w), want) {
		t.Errorf("went well: %v, outcome %q, want %q", ok, outcome(w), want)
	}
	if !strings.Contains(out.String(), "fine indeed\n") {
		t.Errorf("output %q lacks that of b", out.String())
	}
	if got := w.exitStatus(); got != 3 {
		t.Errorf("exit status %d, want that of the failed program, 3", got)
	}
	w.printSummary()
	if !strings.Contains(out.String(), "FAILED") || !strings.Contains(out.String(), "ok") {
		t.Errorf("summary %q", out.String())
	}
}

func TestWorkerStopsWithoutABuild(t *testing.T) {
	var out, errs bytes.Buffer
	w := &worker{root: t.TempDir(), out: &out, err: &errs}
	ok := w.do(plan{
		beside: []step{helper(stepBuild, "build", "fail", "loudly")},
		last:   []step{helper(stepRun, "window", "never")},
	})
	if want := []string{"build failed", "window not run"}; ok || !slices.Equal(outcome(w), want) {
		t.Errorf("went well: %v, outcome %q, want %q", ok, outcome(w), want)
	}
	if !strings.Contains(errs.String(), "fail loudly") {
		t.Errorf("a failed background build must show its output, got %q", errs.String())
	}
}

func TestFailedInstallationIsTriedAgainWithNewLists(t *testing.T) {
	var out bytes.Buffer
	w := &worker{root: t.TempDir(), out: &out, err: &bytes.Buffer{}}
	w.do(plan{
		first:  []step{helper(stepInstall, "packages", "fail", "install", "x")},
		checks: []step{helper(stepRun, "test", "never")},
	})
	if want := []string{"packages failed", "test not run"}; !slices.Equal(outcome(w), want) {
		t.Errorf("outcome %q, want %q", outcome(w), want)
	}
	if !strings.Contains(out.String(), "fail install x\n") || !strings.Contains(out.String(), "fail update\n") {
		t.Errorf("ran %q, want the installation, then an update", out.String())
	}
}

func TestCheckFormatNamesUntidyFiles(t *testing.T) {
	root := t.TempDir()
	write := func(name, text string) {
		t.Helper()
		path := filepath.Join(root, name)
		if err := os.MkdirAll(filepath.Dir(path), 0o755); err != nil {
			t.Fatal(err)
		}
		if err := os.WriteFile(path, []byte(text), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	write("good.go", "package a\n")
	write(".hidden/bad.go", "package  a\n")
	if err := checkFormat(root); err != nil {
		t.Errorf("tidy files: %v", err)
	}
	write("sub/bad.go", "package  a\n")
	if err := checkFormat(root); err == nil || err.Error() != "run gofmt -w "+filepath.ToSlash("sub/bad.go") {
		t.Errorf("got %v, want sub/bad.go named", err)
	}
}

func TestProgressCountsPackagesOnly(t *testing.T) {
	var c compiled
	if got := c.describe(9); got != "getting ready" {
		t.Errorf("before anything: %q", got)
	}
	for _, line := range []string{"fyne.io/fyne/v2", "# example.com/x", "x.go:3:1: no", "go: downloading a", "math"} {
		c.note(line)
	}
	if got, want := c.describe(9), "2 of 9 packages, now math"; got != want {
		t.Errorf("got %q, want %q", got, want)
	}
}

func TestListStaleKeepsTagsAndPackage(t *testing.T) {
	got := listStale(goBuild("bin/x", "-tags", "some"))
	want := []string{"go", "list", "-deps", "-f", "{{if .Stale}}{{.ImportPath}}{{end}}", "-tags", "some", appPackage}
	if !slices.Equal(got, want) {
		t.Errorf("got %q, want %q", got, want)
	}
}

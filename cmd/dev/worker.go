package main

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"os"
	"os/exec"
	"slices"
	"sync"
	"time"
)

// worker carries out plans and keeps what came of each step.
type worker struct {
	root     string
	out, err io.Writer

	mu      sync.Mutex
	results []result
	rows    []string // of the table of what was measured
}

// result is what came of one step.
type result struct {
	name   string
	took   time.Duration
	failed error
	notRun bool
}

// do carries out a plan and reports whether every step went well.
func (w *worker) do(p plan) bool {
	ready := w.doAll(p.first, true)
	checked, built := ready, ready
	if ready {
		var beside sync.WaitGroup
		beside.Go(func() { built = w.doAll(p.beside, false) })
		checked = w.doEach(p.checks)
		beside.Wait()
	} else {
		w.skip(p.checks)
		w.skip(p.beside)
	}
	if !built {
		w.skip(p.last)
		return false
	}
	return w.doEach(p.last) && checked
}

// doAll carries out steps until one fails; the rest is noted as not run.
// In the foreground builds show their progress; in the background output is
// held back until it is needed.
func (w *worker) doAll(steps []step, foreground bool) bool {
	for i, s := range steps {
		if !w.doOne(s, foreground) {
			w.skip(steps[i+1:])
			return false
		}
	}
	return true
}

// doEach carries out all steps, whether or not an earlier one failed.
func (w *worker) doEach(steps []step) bool {
	ok := true
	for _, s := range steps {
		ok = w.doOne(s, true) && ok
	}
	return ok
}

// doOne carries out one step and keeps its result.
func (w *worker) doOne(s step, foreground bool) bool {
	if s.kind == stepLeftOut {
		w.skip([]step{s})
		return true
	}
	start := time.Now()
	err := w.carryOut(s, foreground)
	took := time.Since(start)
	w.mu.Lock()
	defer w.mu.Unlock()
	w.results = append(w.results, result{name: s.name, took: took, failed: err})
	if err != nil {
		fmt.Fprintf(w.err, "dev: %s failed: %v\n", s.name, err)
	}
	return err == nil
}

// carryOut does what the step's kind asks for.
func (w *worker) carryOut(s step, foreground bool) error {
	switch s.kind {
	case stepBench:
		return w.compare(s)
	case stepDo:
		return s.do()
	case stepFormat:
		return checkFormat(w.root)
	case stepBuild:
		if foreground {
			return w.buildWithProgress(s)
		}
		return w.quietly(s)
	case stepInstall:
		err := w.loudly(s)
		if err == nil {
			return nil
		}
		// Old lists name files that are gone from the server.
		again := s
		at := slices.Index(s.argv, "install")
		again.argv = append(slices.Clone(s.argv[:at]), "update")
		fmt.Fprintln(w.out, "Refreshing the package lists, then trying once more.")
		if w.loudly(again) != nil {
			return err
		}
		return w.loudly(s)
	default:
		return w.loudly(s)
	}
}

// command prepares the step's program to run in the module's folder.
func (w *worker) command(s step) *exec.Cmd {
	cmd := exec.Command(s.argv[0], s.argv[1:]...)
	cmd.Dir = w.root
	cmd.Env = append(os.Environ(), s.env...)
	return cmd
}

// loudly runs the step's program with its output passed through.
func (w *worker) loudly(s step) error {
	cmd := w.command(s)
	cmd.Stdin, cmd.Stdout, cmd.Stderr = os.Stdin, w.out, w.err
	return cmd.Run()
}

// quietly runs the step's program and shows its output only if it fails.
func (w *worker) quietly(s step) error {
	cmd := w.command(s)
	var held bytes.Buffer
	cmd.Stdout, cmd.Stderr = &held, &held
	err := cmd.Run()
	if err != nil {
		w.mu.Lock()
		defer w.mu.Unlock()
		_, _ = w.err.Write(held.Bytes())
	}
	return err
}

// skip notes steps that were not run.
func (w *worker) skip(steps []step) {
	w.mu.Lock()
	defer w.mu.Unlock()
	for _, s := range steps {
		w.results = append(w.results, result{name: s.name, notRun: true})
	}
}

// printSummary lists every step with what came of it.
func (w *worker) printSummary() {
	fmt.Fprintln(w.out, "\nSummary")
	for _, r := range w.results {
		switch {
		case r.notRun:
			fmt.Fprintf(w.out, "  not run         %s\n", r.name)
		case r.failed != nil:
			fmt.Fprintf(w.out, "  FAILED  %5.0f s  %s\n", r.took.Seconds(), r.name)
		default:
			fmt.Fprintf(w.out, "  ok      %5.0f s  %s\n", r.took.Seconds(), r.name)
		}
	}
}

// exitStatus returns the status of the last program that failed, or 1.
func (w *worker) exitStatus() int {
	for _, r := range slices.Backward(w.results) {
		var exit *exec.ExitError
		if errors.As(r.failed, &exit) && exit.ExitCode() > 0 {
			return exit.ExitCode()
		}
	}
	return 1
}

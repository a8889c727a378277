package main

import (
	"bufio"
	"bytes"
	"fmt"
	"io"
	"os"
	"slices"
	"strings"
	"time"
)

// buildWithProgress runs a go build and shows the seconds that have passed
// and how many of the packages still to be compiled have been begun. On a
// terminal one line is renewed every second; elsewhere a line comes every
// ten.
func (w *worker) buildWithProgress(s step) error {
	fmt.Fprintln(w.out, "Looking at what there is to compile; the first time, libraries are downloaded.")
	total := w.countStale(s)
	if total == 0 {
		return w.loudly(s) // nothing to do, or an error for go build to report
	}
	fmt.Fprintf(w.out, "Compiling %d packages; the first time this takes about a minute.\n", total)

	cmd := w.command(s)
	pipe, err := cmd.StderrPipe()
	if err != nil {
		return err
	}
	if err := cmd.Start(); err != nil {
		return err
	}
	lines := make(chan string)
	go readLines(pipe, lines)

	every, ending, clear := 10*time.Second, "\n", ""
	if onTerminal() {
		every, ending, clear = time.Second, "\r", "\x1b[K"
	}
	start, tick := time.Now(), time.NewTicker(every)
	defer tick.Stop()
	var done compiled
	for open := true; open; {
		select {
		case line, more := <-lines:
			open = more
			if more && !done.note(line) {
				fmt.Fprintln(w.err, line)
			}
		case <-tick.C:
			fmt.Fprintf(w.out, "  %3.0f s  %s%s%s", time.Since(start).Seconds(), done.describe(total), clear, ending)
		}
	}
	if err := cmd.Wait(); err != nil {
		return err
	}
	fmt.Fprintf(w.out, "  %3.0f s  built%s\n", time.Since(start).Seconds(), clear)
	return nil
}

// countStale returns how many packages the build has to compile. It is for
// display only, so that any error counts as none.
func (w *worker) countStale(s step) int {
	list := s
	list.argv = listStale(s.argv)
	out, err := w.command(list).Output()
	if err != nil {
		return 0
	}
	return len(bytes.Fields(out))
}

// listStale turns a go build command into the go list command that names the
// packages it would compile.
func listStale(goBuild []string) []string {
	argv := []string{"go", "list", "-deps", "-f", "{{if .Stale}}{{.ImportPath}}{{end}}"}
	if at := slices.Index(goBuild, "-tags"); at >= 0 {
		argv = append(argv, goBuild[at:at+2]...)
	}
	if slices.Contains(goBuild, "-trimpath") {
		argv = append(argv, "-trimpath")
	}
	return append(argv, goBuild[len(goBuild)-1])
}

// compiled counts the packages go build -v has named.
type compiled struct {
	count int
	last  string
}

// note takes a line of go build's error output; it returns false when the
// line is not the name of a package, but something to be read.
func (c *compiled) note(line string) bool {
	if line == "" || strings.HasPrefix(line, "#") || strings.ContainsAny(line, " \t:") {
		return false
	}
	c.count++
	c.last = line
	return true
}

// describe says how far a build of total packages has come.
func (c *compiled) describe(total int) string {
	if c.count == 0 {
		return "getting ready"
	}
	return fmt.Sprintf("%d of %d packages, now %s", min(c.count, total), total, c.last)
}

// readLines sends the lines of r and closes the channel at the end.
func readLines(r io.Reader, lines chan<- string) {
	defer close(lines)
	scan := bufio.NewScanner(r)
	scan.Buffer(nil, 1<<20)
	for scan.Scan() {
		lines <- scan.Text()
	}
}

// onTerminal reports whether standard output is a terminal.
func onTerminal() bool {
	info, err := os.Stdout.Stat()
	return err == nil && info.Mode()&os.ModeCharDevice != 0
}

// Command dev sets up a machine for Anodewright and goes on: it finds which
// system packages are missing, installs them where it can, builds and starts
// the app, runs every test there is, makes the packages that are handed out, or
// measures the program against others.
//
//	go run ./cmd/dev run [arguments for the app]
//	go run ./cmd/dev test [flags for go test]
//	go run ./cmd/dev package
//	go run ./cmd/dev bench [names of comparisons]
//
// It uses the standard library and the program's own assets only and needs no
// C compiler itself, so that it runs on a machine with nothing but Go. Durations are in seconds.
package main

import (
	"errors"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
)

const usage = `Usage:
  go run ./cmd/dev run  [arguments]   install what is missing, build the app, start it
  go run ./cmd/dev test [flags]       install what is missing, run every test;
                                      flags such as -short or -run go to go test
  go run ./cmd/dev package            install what is missing, make the Linux tarball
                                      and the Windows exe in dist
  go run ./cmd/dev bench [names]      install what is missing, measure the program
                                      against others, print a table
`

func main() {
	if len(os.Args) < 2 {
		fmt.Fprint(os.Stderr, usage)
		os.Exit(2)
	}
	command, args := os.Args[1], os.Args[2:]
	var planner func(machine, []string) (plan, error)
	switch command {
	case "run":
		planner = planRun
	case "test":
		planner = planTest
	case "package":
		planner = planPackage
	case "bench":
		planner = planBench
	default:
		fmt.Fprintf(os.Stderr, "dev: unknown command %q\n\n%s", command, usage)
		os.Exit(2)
	}
	os.Exit(execute(planner, args))
}

// execute plans the work for this machine, does it and returns the exit
// status.
func execute(planner func(machine, []string) (plan, error), args []string) int {
	root, err := moduleRoot()
	if err != nil {
		fmt.Fprintln(os.Stderr, "dev:", err)
		return 1
	}
	p, err := planner(thisMachine(root), args)
	for _, note := range p.notes {
		fmt.Println(note)
	}
	if err != nil {
		fmt.Fprintln(os.Stderr, "dev:", err)
		return 1
	}
	w := &worker{root: root, out: os.Stdout, err: os.Stderr}
	ok := w.do(p)
	if p.summary {
		w.printSummary()
	}
	if p.table {
		w.printTable()
	}
	if ok {
		return 0
	}
	return w.exitStatus()
}

// moduleRoot returns the folder of the module the go command works in.
func moduleRoot() (string, error) {
	out, err := exec.Command("go", "env", "GOMOD").Output()
	if err != nil {
		return "", fmt.Errorf("asking go for the module's folder: %w", err)
	}
	file := strings.TrimSpace(string(out))
	if file == "" || file == os.DevNull {
		return "", errors.New("start this inside the project's folder: no go.mod found")
	}
	return filepath.Dir(file), nil
}

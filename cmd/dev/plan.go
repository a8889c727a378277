package main

import (
	"errors"
	"fmt"
	"strings"
)

// appPackage is the desktop app's package, as the go command takes it.
const appPackage = "./cmd/anodewright"

// stepKind says how a step is carried out.
type stepKind int

const (
	stepRun     stepKind = iota // run argv, its output passed through
	stepInstall                 // the same; when it fails, renew the package lists and try again
	stepBuild                   // run argv, a go build, and show how far it is
	stepFormat                  // check that tracked Go files are formatted
	stepDo                      // call do
	stepBench                   // run argv, benchmarks, and keep what they say for the table
	stepLeftOut                 // do nothing; only the summary mentions it
)

// step is one thing to do.
type step struct {
	kind stepKind
	name string   // for messages and the summary
	argv []string // program and arguments
	env  []string // added to the environment, as "KEY=value"
	do   func() error

	compared *comparison
}

// plan is everything one command does: the steps of first one after another,
// stopping at a failure; then checks and beside at the same time, each list
// in its order; then last, if first and beside went well.
type plan struct {
	notes   []string // to be said before anything is done
	first   []step
	checks  []step
	beside  []step
	last    []step
	summary bool // close with a list of what was done
	table   bool // and with a table of what was measured
}

// planRun plans to build the app and start it with the arguments given. The
// build carries the tag that turns off the toolkit's thread checks, which
// slow down tables.
func planRun(m machine, args []string) (plan, error) {
	p, err := planSetUp(m, buildNeeds)
	if err != nil {
		return p, err
	}
	app := m.binary("anodewright")
	p.first = append(p.first,
		step{kind: stepBuild, name: "build", argv: goBuild(app, "-tags", "migrated_fynedo"), env: windowEnv(m)})
	p.last = []step{{kind: stepRun, name: "Anodewright", argv: append([]string{app, "-demo"}, args...)}}
	return p, nil
}

// planTest plans to run every test, handing flags to go test. The tests of
// single packages need no C compiler; meanwhile the app is built with
// OpenGL and the toolkit's thread checks for the tests of the real window.
func planTest(m machine, flags []string) (plan, error) {
	needs := append(append([]need{}, buildNeeds...), testNeeds...)
	if m.goos != "linux" {
		needs = nil
	}
	p, err := planSetUp(m, needs)
	if err != nil {
		return p, err
	}
	p.summary = true
	plain := append([]string{"CGO_ENABLED=0"}, testEnv...)
	p.checks = []step{
		{kind: stepFormat, name: "gofmt"},
		{kind: stepRun, name: "go vet", argv: []string{"go", "vet", "-tags", "ci", "./..."}, env: plain},
		{kind: stepRun, name: "staticcheck", argv: []string{"go", "run", staticcheck, "-tags", "ci", "./..."}, env: plain},
		{kind: stepRun, name: "package tests", argv: goTest("ci", flags, "./..."), env: plain},
	}
	if m.goos != "linux" {
		p.last = []step{{kind: stepLeftOut, name: "window tests (need Linux)"}}
		return p, nil
	}
	app := m.binary("anodewright-checked")
	window := append([]string{"ANODEWRIGHT_BIN=" + app}, windowEnv(m)...)
	p.beside = []step{{kind: stepBuild, name: "window build", argv: goBuild(app), env: windowEnv(m)}}
	p.last = []step{{
		kind: stepRun, name: "window tests",
		argv: goTest("e2e", append([]string{"-count=1"}, flags...), appPackage),
		env:  append(window, testEnv...),
	}}
	return p, nil
}

// planSetUp plans to install those needs that are missing. Where it cannot
// install, it names them; that is an error only when building is hopeless.
func planSetUp(m machine, needs []need) (plan, error) {
	switch m.goos {
	case "linux":
	case "darwin":
		if !m.hasTool("clang") {
			return plan{}, errors.New("the app needs a C compiler: install Apple's with xcode-select --install, then start this again")
		}
		return plan{}, nil
	case "windows":
		if !m.hasTool("gcc") {
			return plan{}, errors.New("the app needs a C compiler: install the mingw-w64 gcc, put it in PATH, then start this again")
		}
		return plan{}, nil
	default:
		return plan{notes: []string{"This system is not known to dev; a C compiler, OpenGL and X11 headers are needed."}}, nil
	}

	absent := missing(m, needs)
	if len(absent) == 0 {
		return plan{}, nil
	}
	if m.hasTool("apt-get") {
		return planInstall(m, absent)
	}
	note := "Not found here, and there is no apt-get to install it; the names are Debian's, yours may differ: " + reasons(absent) + "."
	if !m.hasTool("clang") && !m.hasTool("gcc") {
		return plan{notes: []string{note}}, errors.New("there is no C compiler: install clang or gcc, then start this again")
	}
	return plan{notes: []string{note, "Going on all the same."}}, nil
}

// planInstall plans to install Debian packages, first refreshing apt-get's
// package lists when it has none.
func planInstall(m machine, absent []need) (plan, error) {
	names := packages(absent)
	var prefix []string
	switch {
	case m.admin:
	case m.hasTool("sudo"):
		prefix = []string{"sudo"}
	default:
		return plan{}, fmt.Errorf("missing here: %s. Without sudo this program may not install them; as root, run: apt-get install %s",
			reasons(absent), strings.Join(names, " "))
	}
	prefix = append(prefix, "env", "DEBIAN_FRONTEND=noninteractive", "apt-get", "-q", "-o", "DPkg::Lock::Timeout=300")
	apt := func(args ...string) []string { return append(append([]string{}, prefix...), args...) }

	p := plan{notes: []string{fmt.Sprintf("Installing with apt-get, because missing here: %s.", reasons(absent))}}
	if !m.aptLists {
		p.first = append(p.first, step{kind: stepRun, name: "package lists", argv: apt("update")})
	}
	// Nothing a user has may be removed to make room for these.
	args := append([]string{"install", "-y", "--no-install-recommends", "--no-remove"}, names...)
	p.first = append(p.first, step{kind: stepInstall, name: "packages", argv: apt(args...)})
	return p, nil
}

// staticcheck is the linter that every Go file has to pass. It is run from its
// own module, so that go.mod holds only what the program is made of.
const staticcheck = "honnef.co/go/tools/cmd/staticcheck@v0.8.2"

// goBuild returns the command that builds the app into the file out.
func goBuild(out string, flags ...string) []string {
	argv := append([]string{"go", "build", "-v", "-buildvcs=false"}, flags...)
	return append(argv, "-o", out, appPackage)
}

// goTest returns the command that tests packages under a build tag.
func goTest(tag string, flags []string, packages string) []string {
	argv := append([]string{"go", "test", "-tags", tag}, flags...)
	return append(argv, packages)
}

// windowEnv is the environment of everything built with OpenGL. It is the
// same everywhere, so that Go compiles the C parts once.
func windowEnv(m machine) []string {
	env := []string{"CGO_ENABLED=1"}
	if m.goos == "linux" && (m.hasTool("clang") || m.hasTool("apt-get")) {
		env = append(env, "CC=clang")
	}
	return env
}

// testEnv settles the language that tests see, whatever the user's is.
var testEnv = []string{"LANG=en_GB.UTF-8", "LANGUAGE=en_GB", "LC_ALL=", "LC_MESSAGES=", "LC_CTYPE=C.UTF-8"}

package main

import (
	"bufio"
	"bytes"
	"fmt"
	"io"
	"slices"
	"strconv"
	"strings"
)

// comparison is one benchmark of the set: which, where it is, against what,
// and what the project wants.
type comparison struct {
	name, bench, pkg, what, goal string
}

const against = "./cmd/dev/against"

var comparisons = []comparison{
	{"forecast", "BenchmarkForecast", against, "forecast of 20 groups over 25 years, against scipy's solve_ivp", "100 times faster"},
	{"plan", "BenchmarkPlan", against, "cheapest plan, against COIN-OR's cbc on its LP file", "50 times faster"},
	{"workbook", "BenchmarkAgainstPlainLoop", "./storage/workbook", "workbook of 40 zones and 8 dockings, against a plain loop", "1.3 times as long"},
	{"recalculation", "BenchmarkRecalculation", against, "all figures anew, against LibreOffice calculating the workbook", ""},
	{"start", "BenchmarkStart", against, "start to the first window, against a blank window", "1.3 times as long"},
	{"zones", "BenchmarkZones", against, "the whole outcome by zones", ""},
	{"dockings", "BenchmarkDockings", against, "the whole outcome by dockings", ""},
	{"assets", "BenchmarkAssets", against, "the list of a register by assets", ""},
	{"register", "BenchmarkSave|BenchmarkListOfThousand", "./storage", "one edit saved; a register of 1000 assets opened and listed", "20 ms; 300 ms"},
}

// benchNeeds are what the comparisons call for beyond buildNeeds and
// testNeeds.
var benchNeeds = []need{
	{
		pkg: "python3-scipy", why: "compare the forecast with another integrator",
		files: []string{"/usr/lib/python3/dist-packages/scipy/integrate/__init__.py"},
	},
}

// planBench plans to run the comparisons that are named, or all, and to print
// a table of what they say.
func planBench(m machine, names []string) (plan, error) {
	chosen, err := chosenComparisons(names)
	if err != nil {
		return plan{}, err
	}
	var needs []need
	if m.goos == "linux" {
		needs = slices.Concat(buildNeeds, testNeeds, benchNeeds)
	}
	p, err := planSetUp(m, needs)
	if err != nil {
		return p, err
	}
	env := append([]string{"CGO_ENABLED=0"}, testEnv...)
	if slices.ContainsFunc(chosen, func(c comparison) bool { return c.name == "start" }) {
		app, blank := m.binary("anodewright"), m.binary("blank")
		build := goBuild(blank, "-tags", "migrated_fynedo")
		build[len(build)-1] = against + "/blank"
		p.first = append(p.first,
			step{kind: stepBuild, name: "build", argv: goBuild(app, "-tags", "migrated_fynedo"), env: windowEnv(m)},
			step{kind: stepBuild, name: "build of a blank window", argv: build, env: windowEnv(m)})
		env = append(env, "ANODEWRIGHT_BIN="+app, "BLANK_BIN="+blank)
	}
	for i, c := range chosen {
		times := "1x"
		if c.name == "register" {
			times = "1s"
		}
		p.last = append(p.last, step{kind: stepBench, name: c.name, env: env, compared: &chosen[i],
			argv: []string{"go", "test", "-tags", "ci", "-run", "^$", "-bench", "^(" + c.bench + ")$", "-benchtime", times, "-timeout", "30m", c.pkg}})
	}
	p.table = true
	return p, nil
}

func chosenComparisons(names []string) ([]comparison, error) {
	if len(names) == 0 {
		return slices.Clone(comparisons), nil
	}
	var chosen []comparison
	for _, name := range names {
		i := slices.IndexFunc(comparisons, func(c comparison) bool { return c.name == name })
		if i < 0 {
			var known []string
			for _, c := range comparisons {
				known = append(known, c.name)
			}
			return nil, fmt.Errorf("no comparison is named %q; there are %s", name, strings.Join(known, ", "))
		}
		chosen = append(chosen, comparisons[i])
	}
	return chosen, nil
}

// measured is one line of a benchmark's report.
type measured struct {
	name    string
	figures map[string]float64 // by unit
}

// readBench reads the report of go test -bench.
func readBench(report io.Reader) (all []measured) {
	for scan := bufio.NewScanner(report); scan.Scan(); {
		words := strings.Fields(scan.Text())
		if len(words) < 4 || !strings.HasPrefix(words[0], "Benchmark") {
			continue
		}
		m := measured{name: strings.TrimPrefix(words[0], "Benchmark"), figures: map[string]float64{}}
		if i := strings.LastIndexByte(m.name, '-'); i > 0 { // the number of processors
			if _, err := strconv.Atoi(m.name[i+1:]); err == nil {
				m.name = m.name[:i]
			}
		}
		for i := 2; i+1 < len(words); i += 2 {
			if x, err := strconv.ParseFloat(words[i], 64); err == nil {
				m.figures[words[i+1]] = x
			}
		}
		all = append(all, m)
	}
	return all
}

// number is a figure with three digits that matter.
func number(x float64) string {
	if x >= 100 {
		return strconv.FormatFloat(x, 'f', 0, 64)
	}
	return strconv.FormatFloat(x, 'g', 3, 64)
}

// shown are a line's figures in words, the ratio first.
func (m measured) shown() string {
	f := m.figures
	var parts []string
	if x, ok := f["times-faster"]; ok {
		parts = append(parts, number(x)+" times faster")
	}
	if x, ok := f["times-as-long"]; ok {
		parts = append(parts, number(x)+" times as long")
	}
	if x, ok := f["exponent"]; ok {
		parts = append(parts, "grows by the power "+number(x))
	}
	if x, ok := f["ours-ms"]; ok {
		parts = append(parts, fmt.Sprintf("%s ms against %s ms", number(x), number(f["theirs-ms"])))
	}
	type at struct {
		size int
		unit string
		ms   float64
	}
	var sizes []at
	for unit, x := range f {
		if rest, ok := strings.CutPrefix(unit, "ms-at-"); ok {
			size, what, _ := strings.Cut(rest, "-")
			n, _ := strconv.Atoi(size)
			sizes = append(sizes, at{n, what, x})
		}
	}
	slices.SortFunc(sizes, func(a, b at) int { return a.size - b.size })
	for _, s := range sizes {
		parts = append(parts, fmt.Sprintf("%d %s %s ms", s.size, s.unit, number(s.ms)))
	}
	if len(parts) == 0 {
		parts = append(parts, number(f["ns/op"]/1e6)+" ms")
	}
	return strings.Join(parts, ", ")
}

// compare runs a comparison and keeps its lines for the table.
func (w *worker) compare(s step) error {
	cmd := w.command(s)
	var report bytes.Buffer
	cmd.Stdout, cmd.Stderr = io.MultiWriter(&report, w.out), w.err
	err := cmd.Run()
	w.rows = append(w.rows, tableRows(*s.compared, readBench(&report))...)
	return err
}

// tableRows are the rows of one comparison in Markdown; without a figure it
// was left out.
func tableRows(c comparison, lines []measured) (rows []string) {
	goal := c.goal
	if goal == "" {
		goal = "none set"
	}
	for _, m := range lines {
		what := c.what
		if _, part, ok := strings.Cut(m.name, "/"); ok {
			what += ": " + strings.ReplaceAll(part, "_", " ")
		}
		rows = append(rows, fmt.Sprintf("| %s | %s | %s |", what, m.shown(), goal))
	}
	if len(rows) == 0 {
		rows = append(rows, fmt.Sprintf("| %s | not measured | %s |", c.what, goal))
	}
	return rows
}

// printTable prints what was measured, as DEVELOPERS.md has it.
func (w *worker) printTable() {
	fmt.Fprintln(w.out, "\n| what | measured | goal |\n| --- | --- | --- |")
	for _, row := range w.rows {
		fmt.Fprintln(w.out, row)
	}
}

package main

import (
	"slices"
	"strings"
	"testing"
)

func TestBenchPlan(t *testing.T) {
	p, err := planBench(fake(), []string{"start", "workbook"})
	if err != nil {
		t.Fatal(err)
	}
	want := []string{
		"go build -v -buildvcs=false -tags migrated_fynedo -o /src/bin/anodewright ./cmd/anodewright",
		"go build -v -buildvcs=false -tags migrated_fynedo -o /src/bin/blank ./cmd/dev/against/blank",
	}
	if got := argvs(p.first); !slices.Equal(got, want) {
		t.Errorf("first %q, want %q", got, want)
	}
	want = []string{
		"go test -tags ci -run ^$ -bench ^(BenchmarkStart)$ -benchtime 1x -timeout 30m ./cmd/dev/against",
		"go test -tags ci -run ^$ -bench ^(BenchmarkAgainstPlainLoop)$ -benchtime 1x -timeout 30m ./storage/workbook",
	}
	if got := argvs(p.last); !slices.Equal(got, want) {
		t.Errorf("then %q, want %q", got, want)
	}
	if !slices.Contains(p.last[0].env, "BLANK_BIN=/src/bin/blank") || !p.table {
		t.Errorf("the start is measured with %q", p.last[0].env)
	}
	if p, err := planBench(fake(), nil); err != nil || len(p.last) != len(comparisons) {
		t.Errorf("%d comparisons of %d; %v", len(p.last), len(comparisons), err)
	}
	if _, err := planBench(fake(), []string{"speed"}); err == nil || !strings.Contains(err.Error(), "forecast, plan, workbook") {
		t.Errorf("an unknown name: %v", err)
	}
	p, err = planBench(fake("/usr/lib/python3/dist-packages/scipy/integrate/__init__.py"), []string{"forecast"})
	if err != nil || !strings.HasSuffix(argvs(p.first)[0], " python3-scipy") {
		t.Errorf("without scipy first %q, %v", argvs(p.first), err)
	}
}

func TestTableOfMeasurements(t *testing.T) {
	const report = `goos: linux
BenchmarkPlan/Tern_Passage-2   	       1	  123456 ns/op	         0.5000 ours-ms	        60.00 theirs-ms	       120.0 times-faster
BenchmarkZones-2   	       1	  9 ns/op	         1.021 exponent	         2000 ms-at-1000-zones	  20.0 ms-at-10-zones
BenchmarkSave/zones=42-2  	     700	   1700000 ns/op
PASS
`
	lines := readBench(strings.NewReader(report))
	if len(lines) != 3 {
		t.Fatalf("%d lines: %+v", len(lines), lines)
	}
	var got []string
	for _, m := range lines {
		got = append(got, tableRows(comparison{what: "it", goal: "fast"}, []measured{m})...)
	}
	want := []string{
		"| it: Tern Passage | 120 times faster, 0.5 ms against 60 ms | fast |",
		"| it | grows by the power 1.02, 10 zones 20 ms, 1000 zones 2000 ms | fast |",
		"| it: zones=42 | 1.7 ms | fast |",
	}
	if !slices.Equal(got, want) {
		t.Errorf("rows\n%s\nwant\n%s", strings.Join(got, "\n"), strings.Join(want, "\n"))
	}
	if rows := tableRows(comparison{what: "it"}, nil); len(rows) != 1 || rows[0] != "| it | not measured | none set |" {
		t.Errorf("without figures: %q", rows)
	}
}

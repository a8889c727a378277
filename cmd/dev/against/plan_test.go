package against

import (
	"math"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"strconv"
	"testing"
	"time"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/hull"
)

var optimum = regexp.MustCompile(`(?m)^Optimal - objective value\s+(\S+)`)

// trivial is a problem that takes no time: what is left is cbc's start.
const trivial = "Minimize\n obj: x\nSubject To\n c: x >= 1\nEnd\n"

// BenchmarkPlan is the whole choice of zones, dockings and patterns of every
// demo asset against COIN-OR's cbc on the LP file of the same choice. What cbc
// takes for a trivial problem, its start, is taken off, and the writing of the
// file is not counted.
func BenchmarkPlan(b *testing.B) {
	cbc, err := exec.LookPath("cbc")
	if err != nil {
		b.Skip("no cbc on this machine: Debian's package coinor-cbc has it")
	}
	for n := range 5 {
		a := demo(b, n)
		b.Run(a.Name, func(b *testing.B) {
			o := plan.Compute(a, today)
			dir := b.TempDir()
			lp, solution := filepath.Join(dir, "plan.lp"), filepath.Join(dir, "plan.sol")
			if err := os.WriteFile(lp, o.LP(), 0o600); err != nil {
				b.Fatal(err)
			}
			var totals [][]hull.Current
			var factors []float64
			for _, d := range hull.Demand(a) {
				totals = append(totals, d.Total)
			}
			for _, z := range o.Zones {
				factors = append(factors, z.Factor.Used)
			}
			small := filepath.Join(dir, "trivial.lp")
			if err := os.WriteFile(small, []byte(trivial), 0o600); err != nil {
				b.Fatal(err)
			}
			solve := func(lp string) []byte {
				out, err := exec.Command(cbc, lp, "-ratio", "0", "-allow", "0", "solve", "solu", solution).CombinedOutput()
				if err != nil {
					b.Fatalf("cbc: %v\n%s", err, out)
				}
				text, _ := os.ReadFile(solution)
				found := optimum.FindSubmatch(text)
				if found == nil {
					b.Fatalf("cbc says no optimum:\n%s", out)
				}
				return found[1]
			}
			start := time.Duration(math.MaxInt64)
			theirs := func() time.Duration {
				start = min(start, timed(func() { solve(small) }))
				var value []byte
				took := timed(func() { value = solve(lp) })
				total, _ := strconv.ParseFloat(string(value), 64)
				if math.Abs(total-o.Money.Total) > 1e-6*max(1, o.Money.Total) {
					b.Fatalf("cbc finds %v, the plan costs %v", total, o.Money.Total)
				}
				return took
			}
			ours := func() time.Duration { return once(5, func() { renewal.Solve(a, totals, factors) }) }
			for b.Loop() {
				x, y := best(10, ours, theirs)
				faster(b, x, max(y-start, time.Millisecond/10))
			}
		})
	}
}

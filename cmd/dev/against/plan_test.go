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

var (
	optimum  = regexp.MustCompile(`(?m)^Optimal - objective value\s+(\S+)`)
	cbcTimed = regexp.MustCompile(`(?m)Time \(Wallclock seconds\):\s+(\S+)`)
)

// BenchmarkPlan is the whole choice of zones, dockings and patterns of every
// demo asset against COIN-OR's cbc on the LP file of the same choice. What cbc
// says that it took is counted, not its start, nor the writing of the file.
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
			theirs := func() time.Duration {
				out, err := exec.Command(cbc, lp, "-ratio", "0", "-allow", "0", "solve", "solu", solution).CombinedOutput()
				if err != nil {
					b.Fatalf("cbc: %v\n%s", err, out)
				}
				text, _ := os.ReadFile(solution)
				found, took := optimum.FindSubmatch(text), cbcTimed.FindSubmatch(out)
				if found == nil || took == nil {
					b.Fatalf("cbc says no optimum or time:\n%s", out)
				}
				best, _ := strconv.ParseFloat(string(found[1]), 64)
				if math.Abs(best-o.Money.Total) > 1e-6*max(1, o.Money.Total) {
					b.Fatalf("cbc finds %v, the plan costs %v", best, o.Money.Total)
				}
				seconds, _ := strconv.ParseFloat(string(took[1]), 64)
				return time.Duration(seconds * float64(time.Second))
			}
			ours := func() time.Duration { return once(5, func() { renewal.Solve(a, totals, factors) }) }
			for b.Loop() {
				x, y := best(5, ours, theirs)
				faster(b, x, max(y, time.Millisecond)) // cbc tells hundredths of a second
			}
		})
	}
}

package plan_test

import (
	"math"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// An independent solver, COIN-OR's cbc, comes to the plan's total on the LP
// text of every demo asset and of every other asset file of the tests.
func TestSolverAgrees(t *testing.T) {
	cbc, err := exec.LookPath("cbc")
	if err != nil {
		t.Skip("no cbc on this machine: Debian's package coinor-cbc has it")
	}
	demo, _ := filepath.Glob("../../assets/demo/*.json")
	others, _ := filepath.Glob("../../testdata/assets/*.json")
	if len(demo) < 5 || len(others) < 3 {
		t.Fatalf("only %d demo and %d other asset files found", len(demo), len(others))
	}
	value := regexp.MustCompile(`(?m)^Optimal - objective value (\S+)`)
	for _, file := range append(demo, others...) {
		t.Run(filepath.Base(file), func(t *testing.T) {
			a, err := assetfile.Read(file)
			if err != nil {
				t.Fatal(err)
			}
			o := plan.Compute(a, hull.NewDate(2026, 12, 1))
			if len(o.Unmet) > 0 || !o.Money.Proven {
				t.Fatalf("no proven plan: unmet %v", o.Unmet)
			}
			dir := t.TempDir()
			lp, solution := filepath.Join(dir, "plan.lp"), filepath.Join(dir, "plan.sol")
			if err := os.WriteFile(lp, o.LP(), 0o600); err != nil {
				t.Fatal(err)
			}
			out, err := exec.Command(cbc, lp, "-ratio", "0", "-allow", "0", "solve", "solu", solution).CombinedOutput()
			if err != nil {
				t.Fatalf("cbc: %v\n%s", err, out)
			}
			text, err := os.ReadFile(solution)
			if err != nil {
				t.Fatalf("%v\n%s", err, out)
			}
			m := value.FindStringSubmatch(strings.TrimSpace(string(text)))
			if m == nil {
				t.Fatalf("no optimum in the solution:\n%s", text)
			}
			got, err := strconv.ParseFloat(m[1], 64)
			if err != nil {
				t.Fatal(err)
			}
			if math.Abs(got-o.Money.Total) > 1e-6*math.Max(1, o.Money.Total) {
				t.Errorf("cbc finds %.8g, the plan costs %.10g", got, o.Money.Total)
			}
		})
	}
}

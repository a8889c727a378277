package renewal

import (
	"fmt"
	"math"
	"math/rand/v2"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"testing"
)

// cbcTotal solves an LP text with COIN-OR's cbc: the optimum, +Inf where there
// is none.
func cbcTotal(t testing.TB, cbc string, text []byte) float64 {
	t.Helper()
	dir := t.TempDir()
	lp, solution := filepath.Join(dir, "plan.lp"), filepath.Join(dir, "plan.sol")
	if err := os.WriteFile(lp, text, 0o600); err != nil {
		t.Fatal(err)
	}
	out, err := exec.Command(cbc, lp, "-ratio", "0", "-allow", "0", "solve", "solu", solution).CombinedOutput()
	if err != nil {
		t.Fatalf("cbc: %v\n%s", err, out)
	}
	found, err := os.ReadFile(solution)
	if err != nil {
		t.Fatalf("%v\n%s", err, out)
	}
	first, _, _ := strings.Cut(string(found), "\n")
	if strings.HasPrefix(first, "Infeasible") || strings.HasPrefix(first, "Integer infeasible") {
		return math.Inf(1)
	}
	m := regexp.MustCompile(`^Optimal - objective value (\S+)`).FindStringSubmatch(first)
	if m == nil {
		t.Fatalf("no optimum: %s", first)
	}
	x, err := strconv.ParseFloat(m[1], 64)
	if err != nil {
		t.Fatal(err)
	}
	return x
}

// Under limits, a quay and pins, an independent solver comes to the same total
// on the LP text.
func TestSolverAgreesUnderLimits(t *testing.T) {
	cbc, err := exec.LookPath("cbc")
	if err != nil {
		t.Skip("no cbc on this machine: Debian's package coinor-cbc has it")
	}
	dearer, none := 0, 0
	for seed := range uint64(60) {
		a := randomAsset(t, seed, 2+int(seed%3), false)
		free, _ := solve(a)
		if len(free.Best.Unmet) > 0 {
			continue
		}
		r := rand.New(rand.NewPCG(seed, 5))
		most, spent := 0, 0.0
		quay := map[string]int{}
		for k, u := range usedBy(a, free.Best.Lines) {
			most, spent = max(most, u.pieces), max(spent, u.spent)
			for id, n := range u.patterns {
				if k == 0 {
					quay[id] = int(float64(n) * (0.7 + 0.6*r.Float64()))
				}
			}
		}
		share := 0.7 + 0.5*r.Float64()
		p := problem(a)
		switch seed % 5 {
		case 0:
			p.Limits.Pieces = 1 + int(float64(most)*share)
		case 1:
			p.Limits.Budget = spent*share + 1
		case 2:
			p.Limits.Patterns = 1
		case 3:
			p.Quay = quay
		case 4:
			p.Limits = Limits{Pieces: 1 + int(float64(most)*(share+0.3)), Budget: spent*(share+0.3) + 1, Patterns: 2}
			if len(free.Best.Lines) > 0 {
				l := free.Best.Lines[len(free.Best.Lines)-1]
				p.Pins = []Pin{{Zone: a.Zones[l.Zone].ID, Docking: l.Date, Action: Renew}}
			}
		}
		got := p.Solve()
		want := cbcTotal(t, cbc, p.LP())
		if math.IsInf(want, 1) != math.IsInf(got.Best.Total, 1) || !math.IsInf(want, 1) && math.Abs(got.Best.Total-want) > 1e-6*max(1, want) {
			t.Errorf("seed %d: %s: cbc finds %.9g, the plan costs %.9g", seed, fmt.Sprintf("%+v quay %v pins %v", p.Limits, p.Quay, p.Pins), want, got.Best.Total)
		}
		switch {
		case math.IsInf(want, 1):
			none++
		case want > free.Best.Total+1:
			dearer++
		}
	}
	t.Logf("%d dearer than without limits, %d without a plan", dearer, none)
	if dearer < 5 || none < 5 {
		t.Errorf("%d dearer, %d without a plan: too few to say anything", dearer, none)
	}
}

// A larger asset of equal or of different zones under limits is closed, to the
// total that cbc finds.
func TestLargeLimitsAgree(t *testing.T) {
	cbc, err := exec.LookPath("cbc")
	if err != nil {
		t.Skip("no cbc on this machine: Debian's package coinor-cbc has it")
	}
	for _, equal := range []bool{true, false} {
		a := largeAsset(t, 8, 4, 3, equal, 3)
		free := problem(a).Solve()
		most := 0
		for _, u := range usedBy(a, free.Best.Lines) {
			most = max(most, u.pieces)
		}
		p := problem(a)
		p.Limits.Pieces = most * 7 / 10
		got, want := p.Solve(), cbcTotal(t, cbc, p.LP())
		if !got.Proven() || math.Abs(got.Best.Total-want) > 1e-6*want || want <= free.Best.Total {
			t.Errorf("equal %t: total %.9g, bound %.9g, cbc finds %.9g, without limits %.9g", equal, got.Best.Total, got.LowerBound, want, free.Best.Total)
		}
	}
}

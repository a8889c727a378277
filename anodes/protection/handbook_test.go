package protection

import (
	"math"
	"testing"

	"anodewright/anodes"
)

func near(t *testing.T, what string, got, want, tolerance float64) {
	t.Helper()
	if math.IsNaN(got) || math.Abs(got-want) > tolerance {
		t.Errorf("%s: got %.9g, want %.9g within %g", what, got, want, tolerance)
	}
}

const (
	foot  = 0.3048
	inch  = 0.0254
	pound = 0.45359237
	ohmCm = 0.01 // ohm m
)

// The row of MIL-HDBK-1004/10, 9.4, that is to have at most 2 ohm: three rods,
// as the handbook finds. The worked examples of the handbooks are the case
// files of testdata/published.
func TestCountOfARow(t *testing.T) {
	const rho, spacing = 2000 * ohmCm, 20 * foot
	one := anodes.Rod(rho, 7*foot, 10*inch)
	if n, ok := countForOutput(one, rho, spacing, 2, 1); !ok || n != 3 {
		t.Errorf("rods for 2 ohm: got %d, want 3", n)
	}
	if _, ok := countForOutput(one, rho, spacing, 1e-6, 1); ok {
		t.Error("no row gives 1 A at 1 uV")
	}
	if !math.IsInf(CountForResistance(one, rho, 0.3, GroupFactor(4), 1), 1) {
		t.Error("no count is enough where the neighbours alone make more than the limit")
	}
}

func TestGroupFactor(t *testing.T) {
	for n, want := range map[int]float64{1: 0, 2: 0.07958, 3: 0.08842, 4: 0.08621} {
		near(t, "p", GroupFactor(n), want, 5e-6)
	}
	// The closed form against the sum as it is defined.
	for _, n := range []int{5, 17, 120} {
		sum := 0.0
		for k := 1; k < n; k++ {
			sum += float64(n-k) / float64(k)
		}
		near(t, "p by the sum", GroupFactor(n), 1/(2*math.Pi)*2/float64(n*n)*sum, 1e-12)
	}
	near(t, "far apart", GroupResistance(4, 20, 0, 8), 0.5, 1e-12)
}

// A longer row never gives less current, and a wider one never less.
func TestLongerRowGivesMore(t *testing.T) {
	for _, s := range []float64{2, 6, 20} {
		last := math.Inf(1)
		for n := 1; n < 200; n++ {
			r := GroupResistance(10, 22, s, n)
			if r >= last {
				t.Fatalf("spacing %g: %d rods have %g ohm, one fewer %g", s, n, r, last)
			}
			if wider := GroupResistance(10, 22, s*1.5, n); wider > r {
				t.Fatalf("spacing %g, %d rods: wider apart %g ohm, not %g", s, n, wider, r)
			}
			last = r
		}
	}
}

func TestFaraday(t *testing.T) {
	near(t, "iron, kg/A-year", DissolvedPerAmpereYear("iron"), 9.126, 5e-4)
	near(t, "zinc, kg/A-year", DissolvedPerAmpereYear("zinc"), 10.685, 5e-4)
	near(t, "aluminium, kg/A-year", DissolvedPerAmpereYear("aluminium"), 2.940, 5e-4)
	near(t, "magnesium, kg/A-year", DissolvedPerAmpereYear("magnesium"), 3.972, 5e-4)
	near(t, "iron, um/year of 1 mA/m2", LossPerDensity("iron"), 1.1626, 5e-5)
}

// Between the table's potentials in proportion, beyond them the end figures;
// no casting is taken for one of another size.
func TestHandbookFactors(t *testing.T) {
	for _, c := range []struct{ e, mg, zn float64 }{{-0.95, 0.86, 0.60}, {-0.5, 1.14, 1.60}, {-1.5, 0.50, 0}} {
		near(t, "y magnesium", PotentialFactor("magnesium", c.e), c.mg, 1e-9)
		near(t, "y zinc", PotentialFactor("zinc", c.e), c.zn, 1e-9)
	}
	if _, casting, ok := SizeFactor(200*pound, 60*inch); ok {
		t.Errorf("200 lb is no casting of the table, got %q", casting)
	}
}

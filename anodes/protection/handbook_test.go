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

// MIL-HDBK-1004/10 (1990), 9.4: steel gas main, vertical anodes in backfill.
// The printed figures are rounded on the way: K to 0.0167, R_v to 4.77.
func TestGasMainOfHandbook(t *testing.T) {
	const rho, length, diameter, spacing, most = 2000 * ohmCm, 7 * foot, 10 * inch, 20 * foot, 2.0
	perFoot := 1 / (foot / ohmCm) // of a factor in 1/m with rho in ohm cm and lengths in ft
	near(t, "K of L/d 8.4, printed 0.0167", anodes.Rod(1, length, diameter)*length*perFoot, 0.01674925, 1e-7)
	near(t, "p of 3, printed 0.00289", GroupFactor(3)*perFoot, 0.002900899, 1e-8)
	near(t, "p of 4, printed 0.00283", GroupFactor(4)*perFoot, 0.002828377, 1e-8)
	one := anodes.Rod(rho, length, diameter)
	near(t, "R_v, printed 4.77", one, 4.77, 0.02)
	near(t, "R_v recomputed", one, 4.785499, 1e-5)
	// With the handbook's rounded R_v, the trial counts and the resistance of three.
	const printed = 4.77
	near(t, "n for the p of 4, printed 2.78", CountForResistance(printed, rho, spacing, GroupFactor(4), most), 2.778101, 0.005)
	near(t, "n for the p of 3, printed 2.79", CountForResistance(printed, rho, spacing, GroupFactor(3), most), 2.787843, 0.005)
	near(t, "R of 3, printed 1.87 (truncated)", GroupResistance(printed, rho, spacing, 3), 1.879, 0.002)
	near(t, "R of 3 by the rounded figures", 4.77/3+2000*0.00289/20, 1.879, 1e-9)
	if n, ok := countForOutput(one, rho, spacing, most, 1); !ok || n != 3 {
		t.Errorf("rods for 2 ohm: got %d, want 3", n)
	}
	if !math.IsInf(CountForResistance(one, rho, 0.3, GroupFactor(4), 1), 1) {
		t.Error("no count is enough where the neighbours alone make more than the limit")
	}
}

// MIL-HDBK-1004/10 (1990), 9.9: buried coated pipe, packaged 9 lb anodes.
func TestHydrantPipeOfHandbook(t *testing.T) {
	near(t, "W in lb, printed 193", MassByRate(8.8, 0.73, 15, 0.5), 192.72, 1e-9)
	f, casting, ok := SizeFactor(9*pound, 14*inch)
	if !ok || casting != "9 lb packaged" {
		t.Fatalf("casting %q, %v", casting, ok)
	}
	i := HandbookOutput(f, PotentialFactor("magnesium", -0.85), 5000*ohmCm) * 1000
	near(t, "i in mA, printed 17.0", i, 17.04, 1e-9)
	near(t, "n by the rounded i, printed 42.7", 726/17.0, 42.7, 0.05)
	near(t, "n", 726/i, 42.6056, 1e-4)
}

// TM 5-811-7 (1985), App. C, p. C-3: the same pipe by resistance and by life.
func TestMagnesiumBedOfManual(t *testing.T) {
	near(t, "R_c, printed 0.345, a slip in the last digit", CoatingResistance(2500, 7264), 0.344163, 1e-6)
	rest := 1.23 - 0.345
	near(t, "R_a, printed 0.89", rest, 0.885, 1e-9)
	// The page prints rho 500, which gives 4.4: a zero is missing.
	one := anodes.Rod(5000*ohmCm, 1.42*foot, 0.5*foot)
	near(t, "N by resistance, printed 44", one/0.89, 44, 0.5)
	near(t, "N by resistance with the manual's 0.0052", 0.0052*5000/(1.42*0.89)*(math.Log(8*1.42/0.5)-1), 43.68, 0.01)
	near(t, "N with rho as printed", anodes.Rod(500*ohmCm, 1.42*foot, 0.5*foot)/0.89, 4.4, 0.05)
	// Life in years = 49.3 W/I: a usable charge of 49.3 mA-years per lb.
	near(t, "N by life, printed 41", CountByMass(0.726*25*8760, 9*pound, 49.3e-3*8760/pound, 1), 40.90602, 1e-5)
	for _, c := range []struct {
		length, printed float64
		n               int
	}{{2880, 96, 30}, {1172, 98, 12}, {180, 90, 2}} {
		near(t, "spacing in ft", LineSpacing(c.length, c.n), c.printed, 0.5)
	}
}

// TM 5-811-7 (1985), App. C, p. C-5: underground tank, 17 lb anodes.
func TestTankOfManual(t *testing.T) {
	w := MassByRate(8.8, 0.7, 15, 0.5)
	near(t, "W in lb", w, 184.8, 1e-9)
	near(t, "N, printed 10.9", w/17, 10.87059, 1e-5)
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

// TM 5-811-7, Tables C-4 and C-5.
func TestHandbookFactors(t *testing.T) {
	for _, c := range []struct{ mass, length, f float64 }{
		{17, 17, 1.00}, {32, 20.5, 1.06}, {50, 31, 1.29}, {42, 72, 1.90}, {20, 240, 4.28}, {9, 26, 1.01},
	} {
		f, _, ok := SizeFactor(c.mass*pound, c.length*inch)
		if !ok {
			t.Errorf("no casting for %g lb, %g in", c.mass, c.length)
		}
		near(t, "f", f, c.f, 1e-12)
	}
	if _, casting, ok := SizeFactor(200*pound, 60*inch); ok {
		t.Errorf("200 lb is no casting of the table, got %q", casting)
	}
	for _, c := range []struct{ e, mg, zn float64 }{{-0.70, 1.14, 1.60}, {-0.85, 1, 1}, {-0.95, 0.86, 0.60}, {-1.20, 0.50, 0}, {-0.5, 1.14, 1.60}, {-1.5, 0.50, 0}} {
		near(t, "y magnesium", PotentialFactor("magnesium", c.e), c.mg, 1e-9)
		near(t, "y zinc", PotentialFactor("zinc", c.e), c.zn, 1e-9)
	}
}

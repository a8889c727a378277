package water

import (
	"math"
	"testing"
)

func near(t *testing.T, what string, got, want, tol float64) {
	t.Helper()
	if math.IsNaN(got) || math.Abs(got-want) > tol {
		t.Errorf("%s: got %.9g, want %.9g within %g", what, got, want, tol)
	}
}

// UNESCO technical papers in marine science 44, pages 9 and 11.
func TestSalinityAgainstUNESCO44(t *testing.T) {
	for _, c := range []struct{ r, t68, p, s float64 }{
		{1.888091, 40, 10000, 40.0},
		{1, 15, 0, 35.0},
		{0.65, 5, 1500, 27.995347},
		{1.2, 20, 2000, 37.245628}, // page 9, from memory
	} {
		near(t, "salinity", Salinity(c.r, c.t68, c.p), c.s, 5e-6)
	}
}

// Values recorded from the GSW-C library, gsw_sp_from_c.
func TestSalinityAgainstGSW(t *testing.T) {
	for _, c := range []struct{ c, t90, p, s float64 }{
		{34.5487, 28.7856, 10, 20.00986959908695},
		{34.7275, 28.4329, 50, 20.26551186487427},
		{34.8605, 22.8103, 125, 22.98151306252769},
	} {
		near(t, "salinity", Salinity(c.c/C3515, T68(c.t90), c.p), c.s, 1e-9)
	}
}

// Below a salinity of 2: computed outside this program by the published
// algorithm of GSW 3 (gsw_sp_from_c with its own polynomial and one Newton step
// for the ratio at 2), which gives the three values above to the last digit.
func TestLowSalinityAgainstGSW(t *testing.T) {
	for _, c := range []struct{ c, t90, s float64 }{
		{0.05, 10, 0.032177119757822274},
		{0.2, 0, 0.17966038497396467},
		{0.5, 25, 0.2403784330056478},
		{1, 15, 0.6201183027096122},
		{1.5, 5, 1.2458832386954093},
		{2, 20, 1.1364866042349444},
		{3, 25, 1.5586279217133558},
		{3.5, 30, 1.6537495761673868},
	} {
		near(t, "salinity", Salinity(c.c/C3515, T68(c.t90), 0), c.s, 1e-12)
		near(t, "conductivity", Conductivity(c.s, c.t90), c.c, 1e-9)
	}
}

// The extension starts from no salt at no conductivity and rises from there.
func TestLowSalinityLimits(t *testing.T) {
	for _, t90 := range []float64{-2, 0, 15, 25, 40} {
		if s := Salinity(0, T68(t90), 0); s != 0 {
			t.Errorf("salinity of water that does not conduct, %g degC: %g", t90, s)
		}
		last := 0.0
		for c := 1e-4; c < 6; c *= 1.02 {
			s := Salinity(c/C3515, T68(t90), 0)
			if s < last || s == last && s > 0 {
				t.Fatalf("at %g degC salinity does not rise at %g mS/cm: %g after %g", t90, c, s, last)
			}
			last = s
		}
	}
}

func TestResistivityOfStandardSeawater(t *testing.T) {
	near(t, "rho(35, 15 degC)", Resistivity(35, 15/1.00024), 0.2330, 5e-5)
}

func TestConductivityInvertsSalinity(t *testing.T) {
	for _, s := range []float64{0.01, 0.5, 1.999, 2, 2.001, 7, 35, 42} {
		for _, t90 := range []float64{-2, 0, 15, 30, 40} {
			c := Conductivity(s, t90)
			near(t, "salinity", Salinity(c/C3515, T68(t90), 0), s, 1e-9*math.Max(1, s))
		}
	}
}

func TestExtensionIsContinuousAtTwo(t *testing.T) {
	for _, t90 := range []float64{0, 10, 25} {
		below, above := Conductivity(2-1e-9, t90), Conductivity(2+1e-9, t90)
		near(t, "conductivity at 2", below, above, 1e-6)
	}
}

func TestSaltierConductsBetter(t *testing.T) {
	for _, t90 := range []float64{-2, 0, 12, 25, 40} {
		last := math.Inf(1)
		for s := 0.02; s <= 42; s += 0.02 {
			rho := Resistivity(s, t90)
			if rho >= last {
				t.Fatalf("at %g degC resistivity does not fall at salinity %g", t90, s)
			}
			last = rho
		}
	}
}

func TestFreshWaterAt25(t *testing.T) {
	near(t, "500 uS/cm", FreshResistivity(500, 25), 20, 1e-12)
	near(t, "500 uS/cm at 15 degC", FreshResistivity(500, 15), 20/(1-0.191), 1e-12)
}

// Erchul 1972: sediments of porosity 0.4 to 0.8 in water of 0.25 ohm m.
func TestFormationFactor(t *testing.T) {
	for porosity, rho := range map[float64]float64{0.4: 0.834, 0.5: 0.622, 0.6: 0.489, 0.7: 0.400, 0.8: 0.335} {
		near(t, "sediment", 0.25*FormationFactor(porosity), rho, 5e-4)
	}
}

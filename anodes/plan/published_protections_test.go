package plan_test

import (
	"maps"
	"testing"

	"anodewright/anodes"
	"anodewright/anodes/protection"
	"anodewright/hull"
)

// The runners of the other protections, with the units that only they need.
func init() {
	maps.Copy(runners, map[string]func(*testing.T, given) map[string]float64{
		"rod row":            runRodRow,
		"mass by rate":       runMassByRate,
		"handbook rod":       runHandbookRod,
		"count by mass":      runCountByMass,
		"coating resistance": runCoatingResistance,
		"line spacing":       runLineSpacing,
		"dissolved metal":    runDissolved,
		"zinc coat":          runZincCoat,
	})
	maps.Copy(units, map[string]float64{
		"um": 1e-6, "um/year": 1e-6, "ohm ft2": 0.3048 * 0.3048, "mA-years/lb": 8.76 / 0.45359237, // Ah/kg
		"ohm ft per ohm cm": 30.48, // of a factor K or p, R = K rho/L
		"um/year per mA/m2": 1,
	})
}

// runRodRow: one rod, a row of n, and the exact count for a resistance with
// the group factor held at that of n.
func runRodRow(t *testing.T, g given) map[string]float64 {
	rho := g.number("rho")
	got := map[string]float64{}
	one := g.or("R_1", 0)
	if one == 0 {
		length := g.number("length")
		one = anodes.Rod(rho, length, g.number("diameter"))
		got["K"] = one * length / rho
	}
	got["R_1"] = one
	n := int(g.or("n", 1))
	spacing := g.or("spacing", 0)
	got["p"] = protection.GroupFactor(n)
	got["R"] = protection.GroupResistance(one, rho, spacing, n)
	if g.has("R_most") {
		if spacing > 0 {
			got["count"] = protection.CountForResistance(one, rho, spacing, got["p"], g.number("R_most"))
		} else {
			got["count"] = one / g.number("R_most")
		}
	}
	return got
}

func runMassByRate(t *testing.T, g given) map[string]float64 {
	w := protection.MassByRate(g.number("rate"), g.number("current"), g.number("years"), g.or("efficiency", 1))
	got := map[string]float64{"mass": w}
	if g.has("piece") {
		got["count"] = w / g.number("piece")
	}
	return got
}

func runHandbookRod(t *testing.T, g given) map[string]float64 {
	f, _, ok := protection.SizeFactor(g.number("mass"), g.number("length"))
	if !ok {
		t.Fatal("no casting of this size")
	}
	y := protection.PotentialFactor(g.text("alloy"), g.or("potential", -0.85))
	got := map[string]float64{"f": f, "y": y}
	if g.has("rho") {
		got["output"] = protection.HandbookOutput(f, y, g.number("rho"))
		if g.has("current") {
			got["count"] = g.number("current") / got["output"]
		}
	}
	return got
}

// runCountByMass: usable is the charge that a mass gives, its utilisation
// counted.
func runCountByMass(t *testing.T, g given) map[string]float64 {
	charge := g.number("current") * g.number("years") * 8760
	return map[string]float64{"count": protection.CountByMass(charge, g.number("mass"), g.number("usable"), 1)}
}

func runCoatingResistance(t *testing.T, g given) map[string]float64 {
	return map[string]float64{"R": protection.CoatingResistance(g.number("of unit area"), g.number("area"))}
}

func runLineSpacing(t *testing.T, g given) map[string]float64 {
	return map[string]float64{"spacing": protection.LineSpacing(g.number("length"), int(g.number("n")))}
}

func runDissolved(t *testing.T, g given) map[string]float64 {
	metal := g.text("metal")
	return map[string]float64{"rate": protection.DissolvedPerAmpereYear(metal), "loss": protection.LossPerDensity(metal)}
}

// runZincCoat: the coat of the only zone of an asset.
func runZincCoat(t *testing.T, g given) map[string]float64 {
	a := small(t, 365)
	p := &hull.Protection{Kind: hull.ZincCoat, Class: hull.ExposureClass(g.text("class")), Thickness: g.number("thickness") * 1e6}
	a.Zones[0].Protection = p
	r := protection.Of(a, hull.Demand(a), 1, 0).Coat
	got := map[string]float64{"loss low": r.LossLow * 1e-6, "loss": r.Loss * 1e-6, "years": r.Years}
	if r.YearsMost != nil {
		got["years most"] = *r.YearsMost
	}
	return got
}

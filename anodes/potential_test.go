package anodes

import (
	"math"
	"testing"

	"anodewright/hull"
)

// Rounded working equivalents in the manner of EN 12473: the same potential
// on four scales.
func TestWorkingEquivalents(t *testing.T) {
	for _, row := range [][4]float64{
		{-0.80, -0.85, -0.80, 0.25},
		{-0.90, -0.95, -0.90, 0.15},
		{-0.95, -1.00, -0.95, 0.10},
		{-1.05, -1.10, -1.05, 0.00},
		{-1.10, -1.15, -1.10, -0.05},
	} {
		for i, e := range []hull.Electrode{hull.SilverChloride, hull.CopperSulphate, hull.Calomel, hull.ZincElectrode} {
			if got := row[0] + WorkingOffset(e); math.Abs(got-row[i]) > 1e-12 {
				t.Errorf("%g V against %s: got %g, want %g", row[0], e, got, row[i])
			}
		}
	}
}

// Potentials of the electrodes against hydrogen, Int. J. Corrosion 2010,
// 756950, Table 2; Ag/AgCl in seawater and zinc from memory.
func TestTabulatedElectrodes(t *testing.T) {
	const silver = 0.250
	for e, she := range map[hull.Electrode]float64{hull.SilverChloride: silver, hull.CopperSulphate: 0.316, hull.Calomel: 0.241, hull.ZincElectrode: -0.78} {
		if got := TabulatedOffset(e); math.Abs(got-(silver-she)) > 1e-12 {
			t.Errorf("%s: got %g, want %g", e, got, silver-she)
		}
	}
}

// Which of the two the program goes by.
func TestPotentialAgainstSilverChloride(t *testing.T) {
	for _, c := range []struct {
		m    hull.Measure
		want float64
	}{
		{hull.Measure{Potential: -0.80, Electrode: hull.SilverChloride}, -0.80},
		{hull.Measure{Potential: -0.80}, -0.80}, // the asset file's default
		{hull.Measure{Potential: -0.85, Electrode: hull.CopperSulphate}, -0.80},
		{hull.Measure{Potential: -0.791, Electrode: hull.Calomel}, -0.80},
		{hull.Measure{Potential: 0.25, Electrode: hull.ZincElectrode}, -0.80},
	} {
		if got := Potential(c.m); math.Abs(got-c.want) > 1e-12 {
			t.Errorf("%+v: got %g, want %g", c.m, got, c.want)
		}
	}
}

func TestElectrodesRoundTrip(t *testing.T) {
	for _, word := range hull.Electrode("").Words() {
		e := hull.Electrode(word)
		for v := -2.0; v <= 1; v += 0.0137 {
			if got := Potential(Against(e, v)); math.Abs(got-v) > 1e-12 {
				t.Fatalf("%s: %g V comes back as %g", e, v, got)
			}
		}
	}
}

func TestMeasureText(t *testing.T) {
	for want, m := range map[string]hull.Measure{
		"-0.850 V Cu/CuSO4 (-0.800 V Ag/AgCl)": {Potential: -0.85, Electrode: hull.CopperSulphate},
		"-0.920 V Ag/AgCl":                     {Potential: -0.92, Electrode: hull.SilverChloride},
		"0.000 V zinc (-1.050 V Ag/AgCl)":      {Potential: -1e-9, Electrode: hull.ZincElectrode},
	} {
		if got := MeasureText(m); got != want {
			t.Errorf("got %q, want %q", got, want)
		}
	}
}

// EN 12473, criteria table; from memory.
func TestVerdicts(t *testing.T) {
	strong, mild := 690.0, 550.0
	sea := []hull.WaterShare{{Water: "sea", Share: 1}}
	mud := []hull.WaterShare{{Water: "mud", Share: 1}}
	a := &hull.Asset{Waters: []hull.Water{{ID: "sea", Medium: hull.Seawater}, {ID: "mud", Medium: hull.Sediment}}}
	for _, c := range []struct {
		what string
		z    hull.Zone
		v    float64
		want Verdict
	}{
		{"steel, short", hull.Zone{Surface: hull.CarbonSteel, Waters: sea}, -0.79, UnderProtected},
		{"steel, at the criterion", hull.Zone{Surface: hull.CarbonSteel, Waters: sea}, -0.80, Protected},
		{"steel, at the limit", hull.Zone{Surface: hull.CarbonSteel, Waters: sea}, -1.10, Protected},
		{"steel, beyond", hull.Zone{Surface: hull.CarbonSteel, Waters: sea}, -1.12, OverProtected},
		{"steel of 550 MPa", hull.Zone{Surface: hull.CarbonSteel, Yield: &mild, Waters: sea}, -1.00, Protected},
		{"steel in mud", hull.Zone{Surface: hull.CarbonSteel, Waters: mud}, -0.85, UnderProtected},
		{"high strength, short", hull.Zone{Surface: hull.HighStrength, Waters: sea}, -0.82, UnderProtected},
		{"high strength", hull.Zone{Surface: hull.HighStrength, Waters: sea}, -0.83, Protected},
		{"high strength, beyond", hull.Zone{Surface: hull.CarbonSteel, Yield: &strong, Waters: sea}, -0.96, OverProtected},
		{"sprayed aluminium", hull.Zone{Surface: hull.SprayedAluminium, Waters: sea}, -0.79, UnderProtected},
		{"stainless", hull.Zone{Surface: hull.Stainless, Waters: sea}, -0.55, Protected},
		{"bronze", hull.Zone{Surface: hull.CopperAlloy, Waters: sea}, -0.40, UnderProtected},
		{"rebar", hull.Zone{Surface: hull.Reinforcement, Waters: sea}, -0.70, UnderProtected},
	} {
		k := CriterionOf(a, &c.z)
		if got := k.Judge(c.v); got != c.want {
			t.Errorf("%s at %g V: %s by %s %s, want %s", c.what, c.v, got, k.Metal, k.Text(), c.want)
		}
		if k.Source == "" || k.Confidence == "" {
			t.Errorf("%s: source %q, confidence %q", c.what, k.Source, k.Confidence)
		}
	}
	for _, c := range Criteria() {
		if c.Most != nil && *c.Most >= c.Least {
			t.Errorf("%s: %s", c.Metal, c.Text())
		}
	}
}

package anodes

import (
	"testing"

	"anodewright/hull"
)

func TestSpecificationText(t *testing.T) {
	for _, c := range []struct {
		p    hull.Pattern
		want string
	}{
		{hull.Pattern{Alloy: hull.Aluminium}, "DNV-RP-B401, Table 10-5: Zn 2.5 to 5.75, In 0.015 to 0.04, Cd max 0.002, Si max 0.12, Fe max 0.09, Cu max 0.003, rest Al (mass %); from memory, to be checked"},
		{hull.Pattern{Alloy: hull.Zinc}, "MIL-A-18001K: Al 0.1 to 0.5, Cd 0.025 to 0.07, Fe max 0.005, Pb max 0.006, Cu max 0.005, others in all max 0.1, rest Zn (mass %); from memory, to be checked"},
		{hull.Pattern{Alloy: hull.Zinc, Shape: hull.SoilRod}, "ASTM B418, type II: Al max 0.005, Cd max 0.003, Fe max 0.0014, Pb max 0.003, Cu max 0.002, rest Zn (mass %); from memory, to be checked"},
		{hull.Pattern{Alloy: hull.Magnesium}, "Composition to be stated by the buyer"},
		{hull.Pattern{Alloy: hull.Zinc, Specification: "as drawn"}, "as drawn"},
	} {
		if got := SpecificationText(&c.p); got != c.want {
			t.Errorf("%s %s:\ngot  %s\nwant %s", c.p.Alloy, c.p.Shape, got, c.want)
		}
	}
}

// Every standard has limits on what makes its alloy, and none turns round.
func TestCompositions(t *testing.T) {
	for _, alloy := range []hull.Alloy{hull.Aluminium, hull.Zinc} {
		for _, l := range Compositions(alloy) {
			if len(l.Elements) < 5 || l.Confidence == "" {
				t.Errorf("%s: %d elements, confidence %q", l.Standard, len(l.Elements), l.Confidence)
			}
			for _, e := range l.Elements {
				if e.Element == l.Rest || e.Min != nil && e.Max != nil && *e.Min >= *e.Max {
					t.Errorf("%s: %s %v", l.Standard, e.Element, e)
				}
			}
		}
	}
}

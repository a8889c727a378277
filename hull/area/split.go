package area

import (
	"fmt"

	"anodewright/hull"
)

// FlatShare is the share of the bottom's plan area V/T that is taken as flat;
// the rest is the turn of the bilge and goes with the sides. Common practice,
// no source: 0.85 to 0.90 on cargo ships of ordinary form. The shell expansion
// decides.
const FlatShare = 0.87

// Parts is a wetted surface in its parts, which add up to it.
type Parts struct{ FlatBottom, Sides, BootTop Estimate }

// Split divides a wetted surface S into flat bottom, vertical sides (with bow,
// stern and the turn of the bilge) and wetted boot-top. The formulas of wetted
// surface read as a bottom V/T and a belt around it; FlatShare of that bottom
// is flat. The boot-top is the belt from the waterline down to the given
// height, which must lie below the draught, and is inside S: it is taken off
// the sides and never added to S. A height of 0 leaves no boot-top.
//
// Common practice, no source.
func Split(surface Estimate, p hull.Particulars, bootTop float64) (Parts, error) {
	const how = "share of V/T: common practice, no source; the shell expansion decides"
	var parts Parts
	if bootTop != 0 && !(bootTop < p.Draught) {
		return Parts{}, hull.Fault{Path: "boot-top height", Want: fmt.Sprintf("a height below the draught %g m", p.Draught), Got: fmt.Sprint(bootTop)}
	}
	var err error
	parts.FlatBottom, err = made(Estimate{
		Name: "Flat bottom", Area: FlatShare * p.Volume / p.Draught, Formula: fmt.Sprintf("%g V/T", FlatShare),
		Source: "trade", Confidence: common, Benchmark: how,
		Inputs: []hull.Input{in("volume V", p.Volume, "m3"), metres("draught T", p.Draught)},
	})
	if err != nil {
		return Parts{}, err
	}
	if bootTop != 0 {
		if parts.BootTop, err = PaintBootTop(p.LengthPP, p.Beam, bootTop); err != nil {
			return Parts{}, err
		}
	}
	rest := surface.Area - parts.FlatBottom.Area - parts.BootTop.Area
	if !(rest > 0) {
		return Parts{}, hull.Fault{
			Path: "wetted surface", Want: fmt.Sprintf("more than flat bottom and boot-top, %.0f m2", parts.FlatBottom.Area+parts.BootTop.Area),
			Got: fmt.Sprintf("%.0f m2", surface.Area),
		}
	}
	parts.Sides = Estimate{
		Name: "Vertical sides with bow, stern and bilge", Area: rest, Formula: "S − flat bottom − boot-top",
		Source: surface.Source + "; trade", Confidence: common, Benchmark: "S " + surface.Benchmark,
		Inputs: []hull.Input{in("wetted surface S", surface.Area, "m2"), in("flat bottom", parts.FlatBottom.Area, "m2"), in("boot-top", parts.BootTop.Area, "m2")},
	}
	return parts, nil
}

package area

import (
	"fmt"

	"anodewright/hull"
)

const paintTrade = "paint-trade quantity practice"

// paintFactor is the fullness P of the paint trade's bottom formula: 0.90 for
// large tankers, 0.85 for bulk carriers, 0.70 to 0.75 for dry-cargo liners,
// taken in the middle.
func paintFactor(t hull.ShipType) float64 {
	switch t {
	case "tanker":
		return 0.90
	case "bulk-carrier":
		return 0.85
	}
	return 0.725
}

// PaintBottom estimates the wetted surface as the paint trade orders paint for
// it: A = (2T + B) Lpp P with P by ship type. A cross-check, no more: a ship
// that is no tanker, bulk carrier or cargo liner has no P of its own.
//
// Source: paint-trade quantity practice.
func PaintBottom(p hull.Particulars) (Estimate, error) {
	bottom := func(p hull.Particulars) float64 {
		return (2*p.Draught + p.Beam) * p.LengthPP * paintFactor(p.ShipType)
	}
	return made(Estimate{
		Name: "Wetted surface as paint is ordered", Area: bottom(p), Formula: fmt.Sprintf("(2T + B) Lpp × %g", paintFactor(p.ShipType)),
		Source: paintTrade, Confidence: "read; common practice", Benchmark: offText(Benchmarks(), func(h Hull) float64 { return bottom(h.Particulars) }),
		Inputs: []hull.Input{metres("draught T", p.Draught), metres("beam B", p.Beam), metres("length between perpendiculars Lpp", p.LengthPP)},
	})
}

// PaintBootTop estimates a belt of the given height around the hull at the
// waterline: A = 2 h (Lpp + 0.5 B). With the wetted height it is the wetted
// boot-top, a part of the wetted surface.
//
// Source: paint-trade quantity practice.
func PaintBootTop(lengthPP, beam, height float64) (Estimate, error) {
	return made(Estimate{
		Name: "Boot-top, wetted part", Area: 2 * height * (lengthPP + 0.5*beam), Formula: "2 h (Lpp + 0.5 B)",
		Source: paintTrade, Confidence: "read; common practice", Benchmark: unchecked,
		Inputs: []hull.Input{metres("height h", height), metres("length between perpendiculars Lpp", lengthPP), metres("beam B", beam)},
	})
}

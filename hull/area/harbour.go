package area

import (
	"fmt"
	"math"

	"anodewright/hull"
)

// DevelopedU is the developed area of rolled U sheet piles 600 mm wide, m2 of
// one face per m2 of wall in plan of the wall. Makers give the figure of each
// section.
const DevelopedU = 1.54

// SheetPiling estimates one face of a sheet-pile wall: length times depth times
// the developed area of the section, m2 of steel per m2 of wall, 1 at least.
func SheetPiling(length, depth, developed float64) (Estimate, error) {
	if developed < 1 {
		return Estimate{}, hull.Fault{Path: "developed area f", Want: "a number of 1 at least", Got: fmt.Sprint(developed)}
	}
	return made(Estimate{
		Name: "Sheet piling, one face", Area: length * depth * developed, Formula: "L d f", Source: "geometry; f by the maker of the section",
		Confidence: computed, Benchmark: "1.54 for U sections 600 mm wide: the maker's own figure decides",
		Inputs: []hull.Input{metres("length L", length), metres("depth d", depth), in("developed area f", developed, "m2 per m2 of wall")},
	})
}

// Pontoon estimates a box afloat: bottom and four sides to the draught,
// L B + 2 T (L + B).
func Pontoon(length, breadth, draught float64) (Estimate, error) {
	return made(Estimate{
		Name: "Pontoon afloat", Area: length*breadth + 2*draught*(length+breadth), Formula: "L B + 2 T (L + B)",
		Source: "geometry", Confidence: computed, Benchmark: exact,
		Inputs: []hull.Input{metres("length L", length), metres("breadth B", breadth), metres("draught T", draught)},
	})
}

// SunkPontoon estimates a box wholly under water: 2 (L B + L H + B H). What
// columns cover of its top is not taken off.
func SunkPontoon(length, breadth, height float64) (Estimate, error) {
	return made(Estimate{
		Name: "Pontoon under water", Area: 2 * (length*breadth + length*height + breadth*height), Formula: "2 (L B + L H + B H)",
		Source: "geometry", Confidence: computed, Benchmark: exact,
		Inputs: []hull.Input{metres("length L", length), metres("breadth B", breadth), metres("height H", height)},
	})
}

// ChainCounted is the length of a mooring chain in m that is counted as
// drawing current, from the point where it is fastened (DNV-RP-B401, from
// memory).
const ChainCounted = 30.0

// chainFactor is the surface of a link chain per metre and metre of bar
// diameter d. A common link is 6 d long and 3.6 d wide on a pitch of 4 d; the
// bar's centre line is two straights of 2.4 d and two half circles across
// 2.6 d.
const chainFactor = math.Pi * (2*2.4 + math.Pi*2.6) / 4

// Chain estimates the surface of a mooring chain of bar diameter d over the
// length that counts: 10.2 d min(L, 30 m). Studs are left out, contact between
// links is not taken off.
//
// Source: geometry of the common link; the length by DNV-RP-B401, from memory.
func Chain(barDiameter, length float64) (Estimate, error) {
	return made(Estimate{
		Name: "Mooring chain", Area: chainFactor * barDiameter * math.Min(length, ChainCounted), Formula: fmt.Sprintf("%.1f d min(L, %g m)", chainFactor, ChainCounted),
		Source: "geometry of the common link; length by DNV-RP-B401", Confidence: fromMemory, Benchmark: "studs left out: about 7 % more",
		Inputs: []hull.Input{metres("bar diameter d", barDiameter), metres("length L", length)},
	})
}

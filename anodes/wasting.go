package anodes

import (
	"math"

	"anodewright/hull"
)

// wire is the section in m2 that is left of an anode without an insert whose
// metal is all gone, so that no resistance is infinite.
const wire = 1e-8

// ShapeOf returns the resistance over resistivity in 1/m of one piece, cable
// and connection not counted, as it wastes: a function of the share w of its
// net mass gone, from 0 to 1. It is continuous, never falls with w, and is the
// new value at 0. The formula stays the one of the new piece; what it is given
// shrinks:
//
//   - stand-off anodes, long flush anodes and soil rods: the length is
//     L (1 - 0.1 w/u), 0.9 L from the utilisation factor u on; the section is
//     what remains of the metal and the insert over that length. Diameter and
//     width go with the root of the section, times a constant that makes them
//     the new ones at w = 0;
//   - short flush anodes and bracelets: the height, and with it the sides, goes
//     with the volume that remains, down to the face toward the steel. Where
//     only the exposed area is stated, it stays, as in the code;
//   - a stated shape: the conductance, and so the output, falls in proportion
//     to w from the stated new to the stated worn value at u.
//
// At w = u the code has its own rule, see [ResistanceWorn]. Both agree where
// dimensions and mass agree for stand-off anodes and rods, and always for
// stated shapes. A flush slab is a half circle by the code and here keeps its
// proportions: this is a few per cent above the code's. A short flush anode at
// u has a rest of its height here and none in the code: this is below it.
func ShapeOf(p *hull.Pattern) func(w float64) float64 {
	switch p.Shape {
	case hull.Stated:
		isNew, worn := 1/p.ShapeFactor, 1/p.ShapeFactorWorn
		return func(w float64) float64 {
			return 1 / (isNew + (worn-isNew)*min(within(w)/p.Utilisation, 1))
		}
	case hull.ShortFlush, hull.Bracelet:
		area, left := newArea(p), remaining(p)
		face := min(wornArea(p), area)
		return func(w float64) float64 { return ShortFlush(1, face+(area-face)*left(w)) }
	}
	section := section(p)
	resistance := formula(p)
	return func(w float64) float64 { return resistance(section(w)) }
}

// section returns, for a wastage, the length of a long piece and the side of its
// section as shares of the new ones. A thick insert would swell on the shorter
// length: it does not.
func section(p *hull.Pattern) func(w float64) (length, side float64) {
	left := remaining(p)
	return func(w float64) (length, side float64) {
		length = 1 - 0.1*min(within(w)/p.Utilisation, 1)
		return length, math.Sqrt(min(1, left(w)/length))
	}
}

// remaining returns the share of the new volume, metal and insert, that is
// left at a wastage.
func remaining(p *hull.Pattern) func(w float64) float64 {
	metal := p.NetMass / MetalOf(p, hull.Seawater).Density
	least := wire * p.Length / (metal + p.InsertVolume)
	return func(w float64) float64 {
		return max(1-within(w)*metal/(metal+p.InsertVolume), least)
	}
}

// formula returns the resistance over resistivity of a long piece whose length
// and whose radius, diameter or width are shares of the new ones.
func formula(p *hull.Pattern) func(length, side float64) float64 {
	switch {
	case p.Shape == hull.LongFlush:
		return func(length, side float64) float64 { return LongFlush(1, p.Length*length, p.Width*side) }
	case p.Shape == hull.SoilRod:
		return func(length, side float64) float64 { return Rod(1, p.Length*length, p.Diameter*side) }
	case closeToSteel(p):
		return func(length, side float64) float64 { return LongFlush(1, p.Length*length, 2*radius(p)*side) }
	}
	slender, more := ShortSlender, nearness(p)
	if p.Length >= 4*radius(p) {
		slender = LongSlender
	}
	return func(length, side float64) float64 { return more * slender(1, p.Length*length, radius(p)*side) }
}

func within(w float64) float64 { return min(max(w, 0), 1) }

// ResistanceAt returns the resistance in ohm of one piece of which the share w
// of the net mass is gone, in a medium of rho ohm m: see [ShapeOf].
func ResistanceAt(p *hull.Pattern, rho, w float64) float64 { return rho * ShapeOf(p)(w) }

// OutputAt returns the current in A that one piece gives to steel at the
// protective potential when the share w of its net mass is gone: see
// [OutputNew].
func OutputAt(p *hull.Pattern, medium hull.Medium, rho, shielding, w float64) float64 {
	return shielding * driving(p, medium) / (ResistanceAt(p, rho, w) + p.SeriesResist)
}

// LifeYears returns how long one piece gives a current in A, in years of 8760
// hours, until its utilisation factor, when the share w of its net mass is
// gone at the start: (u - w) m C / (8760 I), 0 once it is spent.
func LifeYears(p *hull.Pattern, medium hull.Medium, current, w float64) float64 {
	return max(0, p.Utilisation-within(w)) * p.NetMass * MetalOf(p, medium).Capacity / (8760 * current)
}

// Left returns what is left of a piece's length, width and height as shares of
// the new ones when the share w of its net mass is gone, as [ShapeOf] counts
// them; the width and height of a round section are its diameter. All stay 1
// for a stated shape.
func Left(p *hull.Pattern, w float64) (length, width, height float64) {
	switch p.Shape {
	case hull.Stated:
		return 1, 1, 1
	case hull.ShortFlush, hull.Bracelet:
		return 1, 1, remaining(p)(w)
	}
	length, side := section(p)(w)
	return length, side, side
}

package anodes

import (
	"math"

	"anodewright/hull"
)

// LongSlender returns the resistance in ohm of a stand-off anode of length l
// and radius r (m), l >= 4r, in a medium of rho ohm m:
// R = rho/(2 pi l) * (ln(4l/r) - 1). DNV-RP-B401, 7.8 (modified Dwight), from
// memory.
func LongSlender(rho, l, r float64) float64 {
	return rho / (2 * math.Pi * l) * (math.Log(4*l/r) - 1)
}

// ShortSlender returns the resistance in ohm of a stand-off anode with
// l < 4r: R = rho/(2 pi l) * (ln((2l/r)(1+q)) + r/(2l) - q),
// q = sqrt(1+(r/2l)^2). DNV-RP-B401, 7.8, from memory.
func ShortSlender(rho, l, r float64) float64 {
	h := r / (2 * l)
	q := math.Sqrt(1 + h*h)
	return rho / (2 * math.Pi * l) * (math.Log(2*l/r*(1+q)) + h - q)
}

// Slender returns LongSlender or ShortSlender by the proportions.
func Slender(rho, l, r float64) float64 {
	if l >= 4*r {
		return LongSlender(rho, l, r)
	}
	return ShortSlender(rho, l, r)
}

// LongFlush returns the resistance in ohm of a plate of length l and width w
// (m), l >= 4w: R = rho/(2S), S = (l+w)/2. DNV-RP-B401, 7.8 (Lloyd), from
// memory.
func LongFlush(rho, l, w float64) float64 { return rho / (l + w) }

// ShortFlush returns the resistance in ohm of a short flush anode, a bracelet
// or any other shape of exposed area a (m2): R = 0.315 rho/sqrt(a).
// DNV-RP-B401, 7.8 (McCoy).
func ShortFlush(rho, a float64) float64 { return 0.315 * rho / math.Sqrt(a) }

// Rod returns the resistance in ohm of a vertical rod of length l and
// diameter d (m) in soil: R = rho/(2 pi l) * (ln(8l/d) - 1). Dwight 1936.
func Rod(rho, l, d float64) float64 {
	return rho / (2 * math.Pi * l) * (math.Log(8*l/d) - 1)
}

// ResistanceNew returns the resistance in ohm of one new piece.
func ResistanceNew(p *hull.Pattern, rho float64) float64 {
	switch p.Shape {
	case hull.ShortFlush, hull.Bracelet:
		return ShortFlush(rho, newArea(p))
	case hull.Stated:
		return rho * p.ShapeFactor
	case hull.LongFlush:
		return LongFlush(rho, p.Length, p.Width)
	case hull.SoilRod:
		return Rod(rho, p.Length, p.Diameter)
	}
	if closeToSteel(p) {
		return LongFlush(rho, p.Length, 2*radius(p))
	}
	return standoff(p, rho, p.Length, radius(p))
}

// ResistanceWorn returns the resistance in ohm of one piece wasted to its
// utilisation factor: length 0.9 L; the section that the remaining metal and
// the insert fill, round for stand-off anodes and rods, a half circle for
// long flush ones and those as close to the steel; the face toward the steel
// for short flush ones and bracelets (DNV-RP-B401, 7.9, from memory).
func ResistanceWorn(p *hull.Pattern, rho float64) float64 {
	switch p.Shape {
	case hull.ShortFlush, hull.Bracelet:
		return ShortFlush(rho, wornArea(p))
	case hull.Stated:
		return rho * p.ShapeFactorWorn
	}
	l := 0.9 * p.Length
	density := MetalOf(p, hull.Seawater).Density
	section := ((1-p.Utilisation)*p.NetMass/density + p.InsertVolume) / l
	if section <= 0 {
		// Used up to the last and without an insert.
		section = wire
	}
	switch {
	case p.Shape == hull.LongFlush || closeToSteel(p):
		return LongFlush(rho, l, 2*math.Sqrt(2*section/math.Pi))
	case p.Shape == hull.SoilRod:
		return Rod(rho, l, 2*math.Sqrt(section/math.Pi))
	}
	return standoff(p, rho, l, math.Sqrt(section/math.Pi))
}

// closeToSteel reports whether a stand-off anode's clear distance to the
// steel is below 0.15 m: the code counts it as a long flush anode.
func closeToSteel(p *hull.Pattern) bool {
	return (p.Shape == hull.LongSlender || p.Shape == hull.ShortSlender) && p.Standoff < 0.15
}

// standoff is the resistance of a stand-off anode that the code does not count
// as flush.
func standoff(p *hull.Pattern, rho, l, r float64) float64 {
	return nearness(p) * Slender(rho, l, r)
}

// nearness is the code's rule on the clear distance to the steel: from 0.30 m
// the resistance as it is, from 0.15 m 1.3 times.
func nearness(p *hull.Pattern) float64 {
	if p.Standoff >= 0.30 {
		return 1
	}
	return 1.3
}

// radius returns the radius of a round section of the anode's girth.
func radius(p *hull.Pattern) float64 {
	if p.Radius > 0 {
		return p.Radius
	}
	return p.Girth / (2 * math.Pi)
}

func newArea(p *hull.Pattern) float64 {
	if p.ExposedArea > 0 {
		return p.ExposedArea
	}
	return p.Length*p.Width + 2*p.Height*(p.Length+p.Width)
}

func wornArea(p *hull.Pattern) float64 {
	if p.Length > 0 && p.Width > 0 {
		return p.Length * p.Width
	}
	return p.ExposedArea
}

// OutputNew returns the current in A that one new piece gives to steel at the
// protective potential: shielding * (E_protection - E_anode)/R, R with the
// cable and connection of a pod or sled.
func OutputNew(p *hull.Pattern, medium hull.Medium, rho, shielding float64) float64 {
	return shielding * driving(p, medium) / (ResistanceNew(p, rho) + p.SeriesResist)
}

// OutputWorn returns the same of a piece wasted to its utilisation factor.
func OutputWorn(p *hull.Pattern, medium hull.Medium, rho, shielding float64) float64 {
	return shielding * driving(p, medium) / (ResistanceWorn(p, rho) + p.SeriesResist)
}

func driving(p *hull.Pattern, medium hull.Medium) float64 {
	return Protective() - MetalOf(p, medium).Potential
}

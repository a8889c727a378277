// Package area estimates wetted areas in m2 from a ship's particulars, all
// lengths in m and volumes in m3. The wetted boot-top is part of the wetted
// surface; rudder, propeller and other appendages are not.
package area

import (
	"math"

	"anodewright/hull"
)

// DennyMumford returns the wetted surface 1.7 L T + V/T with L between
// perpendiculars (Nicholls's Seamanship and Nautical Knowledge, p. 482). On
// modern full hulls it reads 1.5 to 5 % low.
func DennyMumford(lengthPP, draught, volume float64) float64 {
	return 1.7*lengthPP*draught + volume/draught
}

// HoltropMennen returns the wetted surface of Holtrop and Mennen 1982
// (International Shipbuilding Progress 29, 166-170): length on the waterline,
// beam, draught, volume, midship and waterplane coefficients, and the
// transverse area of the bulb.
func HoltropMennen(lengthWL, beam, draught, volume, midship, waterplane, bulb float64) float64 {
	block := volume / (lengthWL * beam * draught)
	return lengthWL*(2*draught+beam)*math.Sqrt(midship)*
		(0.453+0.4425*block-0.2862*midship-0.003467*beam/draught+0.3696*waterplane) +
		2.38*bulb/block
}

// ByType returns the wetted surface at the given draught by ship type
// (Kristensen and Luetzen 2013, Technical University of Denmark): within 2 %
// on three published benchmark hulls for tankers, bulk carriers, general
// cargo and container ships; not checked on a hull for the others.
func ByType(p hull.Particulars) float64 {
	v, t, l := p.Volume, p.Draught, p.LengthWL
	block := v / (l * p.Beam * t)
	switch p.ShipType {
	case "container":
		return 0.995 * (v/t + 1.9*l*t)
	case "ro-ro-twin-screw":
		return 1.21 * (v/t + 1.3*l*t) * (1.2 - 0.34*block)
	case "other":
		return 0.87 * (v/t + 2.7*l*t) * (1.2 - 0.34*block)
	}
	return 0.99 * (v/t + 1.9*l*t)
}

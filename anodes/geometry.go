package anodes

import (
	"fmt"
	"math"

	"anodewright/hull"
)

// MassTolerance is the share by which the mass of a casting may differ from
// what its dimensions make before it is questioned.
const MassTolerance = 0.10

// GeometryMass returns the net mass in kg that a pattern's dimensions make in
// its alloy's density, without the insert, and whether they are enough to
// tell: a block, a round bar or rod, or a bracelet of which length, inner
// girth (the width), thickness (the height) and outer area are stated.
func GeometryMass(p *hull.Pattern) (mass float64, ok bool) {
	var volume float64
	switch ring := p.Shape == hull.Bracelet && p.ExposedArea > 0; {
	case p.Shape == hull.Stated || p.Length <= 0:
		return 0, false
	case ring && p.Width > 0 && p.Height > 0:
		// The girth in the middle of the thickness is pi h above the inner one.
		volume = p.Length * p.Height * (p.Width + math.Pi*p.Height)
	case p.Width > 0 && p.Height > 0:
		volume = p.Length * p.Width * p.Height
	case p.Radius > 0:
		volume = math.Pi * p.Radius * p.Radius * p.Length
	case p.Girth > 0:
		volume = p.Girth * p.Girth / (4 * math.Pi) * p.Length
	case p.Diameter > 0:
		volume = math.Pi / 4 * p.Diameter * p.Diameter * p.Length
	default:
		return 0, false
	}
	return (volume - p.InsertVolume) * MetalOf(p, hull.Seawater).Density, true
}

// CastingFault says in words that dimensions and mass of a pattern disagree by
// more than [MassTolerance], or nothing.
func CastingFault(p *hull.Pattern) string {
	mass, ok := GeometryMass(p)
	if !ok || math.Abs(p.NetMass-mass) <= MassTolerance*mass {
		return ""
	}
	return fmt.Sprintf("its dimensions make %.0f kg, its net mass is given as %.0f kg: check the casting", mass, p.NetMass)
}

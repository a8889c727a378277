package area

import (
	"math"

	"anodewright/hull"
)

// Tubular estimates the outside of a tubular: pi D L, L along its axis.
func Tubular(diameter, length float64) (Estimate, error) {
	return made(Estimate{
		Name: "Tubular", Area: math.Pi * diameter * length, Formula: "π D L", Source: "geometry", Confidence: computed, Benchmark: exact,
		Inputs: []hull.Input{metres("diameter D", diameter), metres("length L", length)},
	})
}

// Cone estimates the outside of a frustum: pi (D1 + D2)/2 times the slant
// sqrt(h^2 + ((D1-D2)/2)^2), h along the axis. D2 may be 0: a full cone.
func Cone(diameter1, diameter2, height float64) (Estimate, error) {
	slant := math.Hypot(height, (diameter1-diameter2)/2)
	return made(Estimate{
		Name: "Cone", Area: math.Pi * (diameter1 + diameter2) / 2 * slant, Formula: "π (D1 + D2)/2 √(h² + ((D1 − D2)/2)²)",
		Source: "geometry", Confidence: computed, Benchmark: exact,
		Inputs: []hull.Input{metres("diameter D1", diameter1), metres("height h", height)},
	}, metres("diameter D2", diameter2))
}

// Sphere estimates the outside of a sphere: pi D^2.
func Sphere(diameter float64) (Estimate, error) {
	return made(Estimate{
		Name: "Sphere", Area: math.Pi * diameter * diameter, Formula: "π D²", Source: "geometry", Confidence: computed, Benchmark: exact,
		Inputs: []hull.Input{metres("diameter D", diameter)},
	})
}

// FlatEnd estimates one side of a round flat end: pi D^2/4.
func FlatEnd(diameter float64) (Estimate, error) {
	return made(Estimate{
		Name: "Flat end", Area: math.Pi * diameter * diameter / 4, Formula: "π D²/4", Source: "geometry", Confidence: computed, Benchmark: exact,
		Inputs: []hull.Input{metres("diameter D", diameter)},
	})
}

// OpenPileTop estimates what sea water reaches inside a pile that is open at
// its top under water: the inner wall over five diameters, pi D 5 D, or over
// the free length down to the soil plug where that is shorter. D is the inner
// diameter. Steel further in, and steel behind a plug, asks for nothing.
//
// Source: DNV-RP-B401, read in a secondary text.
func OpenPileTop(diameter, freeLength float64) (Estimate, error) {
	length := math.Min(PileTopDiameters*diameter, freeLength)
	return made(Estimate{
		Name: "Open pile top, inside", Area: math.Pi * diameter * length, Formula: "π D min(5 D, free length)",
		Source: "DNV-RP-B401", Confidence: "read in a secondary text", Benchmark: exact,
		Inputs: []hull.Input{metres("inner diameter D", diameter), metres("free length", freeLength)},
	})
}

// PileTopDiameters is how many diameters of an open pile's inside count as
// exposed to sea water (DNV-RP-B401, read in a secondary text).
const PileTopDiameters = 5.0

// Growth is what marine growth does to a tubular.
type Growth struct {
	Hydrodynamic float64 // diameter that waves and current see, m: D + 2 t
	Steel        float64 // diameter of the steel that is protected, m: D
	Note         string
}

// MarineGrowth returns the two diameters of a tubular with growth of a
// thickness t on it. Growth makes the tubular thicker to waves and current,
// but the steel beneath stays what it was: the protected area is pi D L of
// the steel, with growth or without. Growth is no coating to count on either:
// it keeps oxygen from the steel in one place and harbours bacteria in
// another. Thickness may be 0.
func MarineGrowth(diameter, thickness float64) (Growth, error) {
	if _, err := made(Estimate{Inputs: []hull.Input{metres("diameter D", diameter)}}, metres("growth t", thickness)); err != nil {
		return Growth{}, err
	}
	g := Growth{Hydrodynamic: diameter + 2*thickness, Steel: diameter}
	if thickness > 0 {
		g.Note = "Marine growth adds to the diameter that waves see, not to the steel: the area to protect stays π D L. It is not counted as a coating, and it may cover anodes: look at them before cleaning."
	}
	return g, nil
}

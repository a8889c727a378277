// Package survey learns from what surveyors find on the anodes: how the true
// demand of each circuit compares with the design figure, with its range.
//
// The demand factor of a circuit is the true demand over the design figure.
// Its logarithm is normal about a mean that the circuits of one asset share
// and that is itself normal. In a circuit of several zones each zone has a
// current factor, lognormal, with a geometric mean of 1. What one anode has
// wasted is lognormal about what the forecast predicts at these factors, with
// a spread from anode to anode. Grades are intervals; anodes that are gone or
// spent are known only to have passed the utilisation factor, unwasted ones
// only not to have passed [NotWastedBelow]. Potentials tell of current and
// never enter here.
//
// All inference is by quadrature on fixed grids: the same readings give the
// same figures, always. How the wastage is predicted is the caller's matter:
// see [Predicted].
//
// Units: wastage is the share of the net mass gone, 0 to 1; factors have no
// unit; lengths are m, masses kg. "sd" is a standard deviation, of a natural
// logarithm where it belongs to a factor.
package survey

import (
	"math"

	"anodewright/assets"
)

// Model is what is believed before any reading.
type Model struct {
	// Mean and MeanSD describe the mean of ln(demand factor) over an asset's
	// circuits. After the readings of other ships of a fleet it is theirs: see
	// [Learned.Next].
	Mean, MeanSD float64
	// Scatter is the sd of a circuit's ln(demand factor) about that mean.
	Scatter float64
	// Zone is the sd of ln(current factor) of one zone of several.
	Zone float64
	// Spread is the sd of ln(wastage) from anode to anode of one set. It is
	// itself lognormal with SpreadSD where Enough anodes or more were looked
	// at, and taken as it is below that or where SpreadSD is 0.
	Spread, SpreadSD float64
	Enough           int
}

// Standard is the model without a fleet. The published scatter of sites,
// tau = 0.53, is all that parts a circuit from its design figure: it is made
// up of the asset's mean, sd 0.3, and the circuits' scatter about it, so that
// a circuit without any reading lies between 0.42 and 2.39 with 90 %.
func Standard() Model {
	tau := assets.Get("demand-factor").Value("tau", "tau")
	const mean = 0.3
	return Model{
		MeanSD: mean, Scatter: math.Sqrt(tau*tau - mean*mean), Zone: 0.25,
		Spread: 0.25, SpreadSD: 0.35, Enough: 12,
	}
}

// Circuit is zones with anodes that share water and metal.
type Circuit struct{ Zones []Zone }

// Zone is what was found in one zone that carries anodes.
type Zone struct {
	// Share is the share of the circuit's charge that the zone's anodes give
	// by the model. Shares are scaled to add up to 1; all 0: equal.
	Share float64
	Found []Observation
}

// Observation is what one reading tells of the wastage of one set of anodes.
type Observation struct {
	// Predicted is the wastage of the set on the day of the reading.
	Predicted Predicted
	Values    []float64 // wastage of single anodes, above 0
	Classes   []Class
}

// Class is a number of anodes whose wastage lies between two bounds.
type Class struct {
	Above float64 // 0: no lower bound
	UpTo  float64 // +Inf: no upper bound
	Count int
}

// pieces returns how many anodes an observation tells of.
func (o Observation) pieces() int {
	n := len(o.Values)
	for _, c := range o.Classes {
		n += c.Count
	}
	return n
}

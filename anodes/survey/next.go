package survey

import (
	"math"
	"slices"
)

// Candidate is a reading that could be taken: so many pieces of a zone's set
// weighed, with the wastage that the model predicts for that day.
type Candidate struct {
	Circuit, Zone int
	Predicted     Predicted
	Pieces        int
}

// Gain is what a candidate promises.
type Gain struct {
	Candidate int
	// Before and After are the sd of the logarithm of the circuit's demand
	// factor, LocalBefore and LocalAfter those of the zone's local factor.
	Before, After           float64
	LocalBefore, LocalAfter float64
}

// NextReading returns the candidates by what they would narrow the demand
// factor of their circuit, the best first. The expected sd follows from the
// covariance of the zone's factor and the circuit's and from how steeply the
// prediction rises at the zone's median; that is exact where the wastage is in
// proportion to the factor.
func (l *Learned) NextReading(candidates []Candidate) []Gain {
	gains := make([]Gain, len(candidates))
	for i, c := range candidates {
		f := &l.Circuits[c.Circuit]
		z := &f.Zones[c.Zone]
		local := z.Factor.SD * z.Factor.SD
		g := Gain{Candidate: i, Before: f.Demand.SD, LocalBefore: z.Factor.SD}
		g.After, g.LocalAfter = g.Before, g.LocalBefore
		const d = 0.05
		x := z.Factor.Mean
		rise := (math.Log(max(c.Predicted(x+d), leastWastage)) - math.Log(max(c.Predicted(x-d), leastWastage))) / (2 * d)
		if rise > 1e-6 && c.Pieces > 0 && local > 0 {
			noise := l.Spread * l.Spread / (float64(c.Pieces) * rise * rise)
			g.After = math.Sqrt(max(0, g.Before*g.Before-z.covariance*z.covariance/(local+noise)))
			g.LocalAfter = math.Sqrt(local * noise / (local + noise))
		}
		gains[i] = g
	}
	slices.SortStableFunc(gains, func(a, b Gain) int {
		switch reduced := (a.Before - a.After) - (b.Before - b.After); {
		case reduced > 1e-12:
			return -1
		case reduced < -1e-12:
			return 1
		}
		return 0
	})
	return gains
}

// Misjudged is the chance that a decision is wrong which turns on whether the
// logarithm of a factor lies below a threshold, when the likelier answer is
// taken: now, at this mean and sd of it, and as expected once a reading leaves
// only the sd after.
func Misjudged(mean, sd, after, threshold float64) (now, then float64) {
	wrong := func(mean, sd float64) float64 {
		if sd <= 0 {
			return 0
		}
		return normalBelow(-math.Abs(threshold-mean) / sd)
	}
	now = wrong(mean, sd)
	// What the reading will say moves the mean by as much as it narrows.
	moves := math.Sqrt(max(0, sd*sd-after*after))
	const points, reach = 201, 6.0
	sum, all := 0.0, 0.0
	for i := range points {
		z := reach * (2*float64(i)/(points-1) - 1)
		w := math.Exp(-z * z / 2)
		sum, all = sum+w*wrong(mean+moves*z, after), all+w
	}
	return now, min(now, sum/all)
}

// Package forecast lets the anodes of a circuit waste in time: at every moment
// one potential balances what the anodes give and what the steel takes, and
// each group of anodes loses mass by the current it gives.
//
// Units: V against Ag/AgCl/seawater, A, ohm, ohm m, m2, kg, Ah/kg; time in
// years of 8760 hours. The balance is Ohm's law from each anode's
// closed-circuit potential through its resistance, as in DNV-RP-B401 7.8, and
// the loss of mass is Faraday's law with the alloy's practical capacity.
package forecast

import "math"

// HoursPerYear is the year of the design codes.
const HoursPerYear = 8760

// Protective is the protective potential of steel, V, at which the steel
// curves have the design mean density.
const Protective = -0.80

// Corrosion is the potential of unprotected steel in seawater, V, at which no
// current flows to it.
const Corrosion = -0.65

// Group is equal anodes fitted at one time in one zone.
type Group struct {
	Count       float64
	Mass        float64 // net, kg a piece, new
	Capacity    float64 // Ah/kg
	Potential   float64 // closed circuit, V
	Utilisation float64
	Factor      float64 // the zone's current factor, 1 unless learned
	Wastage     float64 // share of the net mass gone, at the start
	// Shape is resistance over resistivity of one piece at a wastage, 1/m.
	Shape func(wastage float64) float64
	// Series is the resistance of cable and connection, ohm.
	Series float64
}

// Stretch is a time of unchanged service: the demand changes smoothly in it
// and the waters not at all.
type Stretch struct {
	From, To float64 // years
	// Demand is the current in A that all steel of the circuit takes at the
	// protective potential: theta * sum of A fc i.
	Demand func(t float64) float64
	// Resistivity is that of the water about each group, ohm m.
	Resistivity []float64
}

// Curve is the steel's current over that at the protective potential: a line
// through knots from the corrosion potential down, going on with its last
// slope.
type Curve struct{ knots []knot }

type knot struct{ e, s float64 }

// Level is the curve that is straight from (-0.65 V, 0) to (-0.80 V, 1) and
// level beyond.
func Level() Curve {
	return Curve{[]knot{{Corrosion, 0}, {Protective, 1}, {Protective - 1, 1}}}
}

// Straight is the curve through the same points that goes straight on.
func Straight() Curve {
	return Curve{[]knot{{Corrosion, 0}, {Protective, 1}}}
}

// Sigmoid is the curve of calcareous deposits: r at -0.80 V, falling to 1 at
// -1.00 V, and rising again by hydrogen evolution, by our own choice to 2 at
// -1.10 V. r lies between 2.5 and 3.
func Sigmoid(r float64) Curve {
	return Curve{[]knot{{Corrosion, 0}, {Protective, r}, {-1.00, 1}, {-1.10, 2}}}
}

// Share returns the current at a potential over that at the protective one, by
// the mean density.
func (c Curve) Share(e float64) float64 { return c.at(e) }

// at returns the curve's value at a potential; 0 above the corrosion
// potential.
func (c Curve) at(e float64) float64 {
	k := c.knots
	if e >= k[0].e {
		return 0
	}
	i := 1
	for i < len(k)-1 && e < k[i].e {
		i++
	}
	return k[i-1].s + (k[i].s-k[i-1].s)*(e-k[i-1].e)/(k[i].e-k[i-1].e)
}

// SteelLoss is the rate in mm/year at which steel corrodes at a potential
// above its criterion: 0.001*10^((E+0.770)/0.054) with E against SCE, at most
// 0.1 (a fit to published tests in natural seawater). Against SCE a potential
// reads 0.009 V more than against Ag/AgCl/seawater.
func SteelLoss(e float64) float64 {
	return min(0.1, 0.001*math.Pow(10, (e+0.009+0.770)/0.054))
}

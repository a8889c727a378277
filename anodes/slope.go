package anodes

import "math"

// Slope is the view of a cathodic protection system by its slope parameter S:
// on steel held by galvanic anodes the potential is a straight line of the
// current density, E = E_anode + S i, and S is what anodes and steel make of
// it: S = A fc / sum(n/R). A small S is many or large anodes for the bare
// steel. W. H. Hartt and co-workers.
type Slope struct {
	S         float64 // ohm m2
	BareSteel float64 // m2, A fc: the area times the share broken down
	Density   float64 // A/m2 of bare steel
	Anode     float64 // closed-circuit potential, V Ag/AgCl/seawater
	Potential float64 // of the steel, V Ag/AgCl/seawater
}

// SlopeParameter returns S in ohm m2 of bare steel of the area (m2) and anodes
// of a conductance sum(n/R) in A/V: infinite where there are none.
func SlopeParameter(bareSteel, conductance float64) float64 { return bareSteel / conductance }

// SlopeOf returns the slope view of bare steel (m2) that takes a current (A),
// held by anodes of a closed-circuit potential (V) and a conductance sum(n/R)
// in A/V. Without bare steel there is no density, and NaN in its place.
func SlopeOf(bareSteel, current, anode, conductance float64) Slope {
	v := Slope{S: SlopeParameter(bareSteel, conductance), BareSteel: bareSteel, Density: current / bareSteel, Anode: anode}
	v.Potential = anode + current/conductance
	return v
}

// SlopeMass returns the product Ra w in ohm kg of the resistance and the mass
// of an anode that lasts for some hours at a slope parameter S (ohm m2) and a
// mean current density (A/m2 of bare steel), with a capacity C (Ah/kg) and a
// utilisation factor u: Ra w = i T S / (C u). Hartt and co-workers' unified
// design equation. Any anode with this product will do: their number follows
// from S.
func SlopeMass(density, hours, s, capacity, utilisation float64) float64 {
	return density * hours * s / (capacity * utilisation)
}

// SlopeHours returns the time in hours after which anodes with a product Ra w
// (ohm kg) are used up: [SlopeMass] solved for T.
func SlopeHours(density, resistanceMass, s, capacity, utilisation float64) float64 {
	return resistanceMass * capacity * utilisation / (density * s)
}

// BraceletLine is a coated line of pipe held by equal bracelets at equal
// spacing: W. H. Hartt and E. Lysogorski, Design of galvanic anode cathodic
// protection systems for marine pipelines by the slope parameter, 2003.
// Potentials in V Ag/AgCl/seawater.
type BraceletLine struct {
	PipeRadius float64 // m, outside
	// AlphaGamma is the polarisation resistance of the bare steel times the
	// ratio of the pipe's to the bare area, ohm m2.
	AlphaGamma float64
	Resistance float64 // Ra, of one bracelet, ohm
	Metal      float64 // Rm, of the pipe's metal, ohm/m
	Corrosion  float64 // potential of unprotected steel
	Anode      float64 // closed-circuit potential
}

// H returns the ratio by which the anodes' side outweighs the steel's at a
// spacing of l m: alpha gamma / (2 pi r l (Ra + l Rm/8)).
func (b BraceletLine) H(l float64) float64 {
	return b.AlphaGamma / (2 * math.Pi * b.PipeRadius * l * (b.Resistance + l*b.Metal/8))
}

// Potential returns the potential of the pipe at a spacing of l m:
// (E_corr + H E_a) / (1 + H).
func (b BraceletLine) Potential(l float64) float64 {
	h := b.H(l)
	return (b.Corrosion + h*b.Anode) / (1 + h)
}

// Spacing returns the largest spacing in m at which the pipe is at a potential
// in V, which lies between that of the anodes and that of unprotected steel.
// It is NaN for a potential that does not.
func (b BraceletLine) Spacing(potential float64) float64 {
	if !(potential > b.Anode && potential < b.Corrosion) {
		return math.NaN()
	}
	h := (b.Corrosion - potential) / (potential - b.Anode)
	// Ra l + Rm/8 l^2 = k, in the form that is right for a small Rm too.
	k := b.AlphaGamma / (2 * math.Pi * b.PipeRadius * h)
	return 2 * k / (b.Resistance + math.Sqrt(b.Resistance*b.Resistance+b.Metal*k/2))
}

// Hours returns how long bracelets of a net mass (kg), a capacity (Ah/kg) and
// a utilisation factor hold the pipe at a potential and a spacing:
// T = w C u alpha gamma / ((E_corr - E_c) 2 pi r l).
func (b BraceletLine) Hours(mass, capacity, utilisation, potential, l float64) float64 {
	return mass * capacity * utilisation * b.AlphaGamma / ((b.Corrosion - potential) * 2 * math.Pi * b.PipeRadius * l)
}

package protection

import "anodewright/assets"

// faraday is the Faraday constant in C/mol (CODATA 2018).
const faraday = 96485.33212

// secondsPerYear is the codes' year of 8760 h.
const secondsPerYear = 8760 * 3600

// DissolvedPerAmpereYear returns the mass in kg that a current of 1 A
// dissolves in a year: M t/(n F), Faraday's law, for iron, zinc, aluminium or
// magnesium. Iron: 9.126 kg.
func DissolvedPerAmpereYear(metal string) float64 {
	t := assets.Get("faraday")
	return t.Value(metal, "molar mass") / 1000 * secondsPerYear / (t.Value(metal, "electrons") * faraday)
}

// LossPerDensity returns the thickness in um that 1 mA/m2 takes off a metal
// in a year: M t/(n F density). Iron: 1.16 um.
func LossPerDensity(metal string) float64 {
	return DissolvedPerAmpereYear(metal) / 1000 / assets.Get("faraday").Value(metal, "density") * 1e6
}

// MassByRate returns the mass in kg that a mean current in A takes from
// anodes in some years: rate (kg/A-year) times current times years, over the
// efficiency where the rate is that of theory (MIL-HDBK-1004/10, 9.9:
// W = Y S I/E).
func MassByRate(rate, current, years, efficiency float64) float64 {
	return rate * current * years / efficiency
}

// CountByMass returns the exact number of anodes whose usable charge covers a
// charge: Ah over net mass (kg) times capacity (Ah/kg) times utilisation.
func CountByMass(charge, net, capacity, utilisation float64) float64 {
	return charge / (net * capacity * utilisation)
}

// CoatingResistance returns the resistance in ohm of a coated structure to
// the soil around it: the coat's resistance of a unit area over the area
// (TM 5-811-7, App. C, eq. 2-6).
func CoatingResistance(ofUnitArea, area float64) float64 { return ofUnitArea / area }

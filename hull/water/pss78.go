// Package water gives the electrical resistivity of seawater and fresh water
// from salinity or conductivity and temperature.
//
// Seawater follows the Practical Salinity Scale 1978 (UNESCO technical papers
// in marine science 44), with the extension of Hill, Dauphinee and Woods 1986
// below a salinity of 2, scaled to be continuous there. Units: conductivity
// mS/cm at its own temperature unless a name says otherwise, resistivity
// ohm m, temperature degC (ITS-90 unless named T68), pressure dbar.
package water

import "math"

// C3515 is the conductivity of seawater of salinity 35 at 15 degC (T68) and
// atmospheric pressure, mS/cm (UNESCO 44).
const C3515 = 42.914

// Coefficients of the Practical Salinity Scale, UNESCO 44.
var (
	coefA = [6]float64{0.0080, -0.1692, 25.3851, 14.0941, -7.0261, 2.7081}
	coefB = [6]float64{0.0005, -0.0056, -0.0066, -0.0375, 0.0636, -0.0144}
	coefC = [5]float64{0.6766097, 2.00564e-2, 1.104259e-4, -6.9698e-7, 1.0031e-9}
	coefD = [4]float64{3.426e-2, 4.464e-4, 4.215e-1, -3.107e-3}
	coefE = [3]float64{2.070e-5, -6.370e-10, 3.989e-15}
)

const coefK = 0.0162

// T68 converts a temperature from ITS-90 to IPTS-68, the scale of PSS-78.
func T68(t90 float64) float64 { return 1.00024 * t90 }

// poly sums c[i]*x^i.
func poly(c []float64, x float64) float64 {
	y := 0.0
	for i := len(c) - 1; i >= 0; i-- {
		y = y*x + c[i]
	}
	return y
}

// temperatureRatio is rt: the conductivity of water of salinity 35 at t68
// over that at 15 degC.
func temperatureRatio(t68 float64) float64 { return poly(coefC[:], t68) }

// pressureRatio is Rp of the scale.
func pressureRatio(r, t68, p float64) float64 {
	return 1 + p*poly(coefE[:], p)/(1+coefD[0]*t68+coefD[1]*t68*t68+(coefD[2]+coefD[3]*t68)*r)
}

// Salinity returns the practical salinity of water of conductivity ratio
// r = C/C(35,15,0) at temperature t68 and pressure p.
func Salinity(r, t68, p float64) float64 {
	return fromRatio(r/(pressureRatio(r, t68, p)*temperatureRatio(t68)), t68)
}

// fromRatio is salinity from Rt, with the low-salinity extension.
func fromRatio(rt, t68 float64) float64 {
	if rt <= 0 {
		return 0
	}
	s := plain(rt, t68)
	if s >= 2 {
		return s
	}
	// The extension does not meet the scale at S = 2; scale it so that it does.
	at2 := solve(2, t68, plain)
	// Near nothing at all the extension falls a little below 0.
	return max(0, hill(rt, t68)*2/hill(at2, t68))
}

func plain(rt, t68 float64) float64 {
	x := math.Sqrt(rt)
	return poly(coefA[:], x) + (t68-15)/(1+coefK*(t68-15))*poly(coefB[:], x)
}

func hill(rt, t68 float64) float64 {
	f := (t68 - 15) / (1 + coefK*(t68-15))
	x, y := 400*rt, 100*rt
	return plain(rt, t68) - coefA[0]/(1+1.5*x+x*x) - coefB[0]*f/(1+math.Sqrt(y)+y+y*math.Sqrt(y))
}

// solve finds Rt with salinity(Rt, t68) = s by bisection, since both forms
// rise with Rt over the range of the scale.
func solve(s, t68 float64, salinity func(rt, t68 float64) float64) float64 {
	low, high := 0.0, 2.0
	for range 60 {
		mid := (low + high) / 2
		if salinity(mid, t68) < s {
			low = mid
		} else {
			high = mid
		}
	}
	return (low + high) / 2
}

// Conductivity returns the conductivity in mS/cm of water of practical
// salinity s (0 to 42) at temperature t90 (-2 to 40 degC) and atmospheric
// pressure.
func Conductivity(s, t90 float64) float64 {
	t := T68(t90)
	if s <= 0 {
		return 0
	}
	return C3515 * temperatureRatio(t) * solve(s, t, fromRatio)
}

// Resistivity returns the resistivity in ohm m of water of practical salinity
// s at t90 degC; +Inf for s = 0.
func Resistivity(s, t90 float64) float64 { return 10 / Conductivity(s, t90) }

// FreshResistivity returns the resistivity in ohm m of a river or lake from
// its conductivity referred to 25 degC, in uS/cm: 1.91 % per degC (Standard
// Methods 2510, from memory). Below about -27 degC the law has no meaning;
// the rise is held at a tenth of the conductivity at 25 degC.
func FreshResistivity(conductivity25, t90 float64) float64 {
	k := conductivity25 * math.Max(0.1, 1+0.0191*(t90-25)) // uS/cm
	return 1e4 / k
}

// FormationFactor returns the resistivity of a sediment over that of the
// water in it, by its porosity (0 to 1): F = porosity^-1.315, a fit to
// measurements of marine sediments with porosities of 0.26 to 0.93 (Erchul
// 1972, University of Rhode Island).
func FormationFactor(porosity float64) float64 { return math.Pow(porosity, -1.315) }

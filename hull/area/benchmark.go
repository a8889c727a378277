package area

import (
	"fmt"
	"strings"

	"anodewright/hull"
)

// Hull is a hull form whose wetted surface was published by a workshop on
// computed ship flow. The surface is that of the bare hull: rudder and other
// appendages are not in it.
type Hull struct {
	Name string
	hull.Particulars
	Surface           float64 // m2
	RudderLateral     float64 // m2, 0: not published
	RudderSurface     float64 // m2
	PropellerDiameter float64 // m, 0: not published
	BladeAreaRatio    float64
	Source            string
}

// Benchmarks returns the hulls that the formulas are held against.
func Benchmarks() []Hull {
	return []Hull{
		{
			Name:        "KCS",
			Particulars: hull.Particulars{ShipType: "container", LengthPP: 230, LengthWL: 232.5, Beam: 32.2, Draught: 10.8, Volume: 52030, Midship: 0.9849},
			Surface:     9424, RudderLateral: 54.45, RudderSurface: 115.0, PropellerDiameter: 7.9, BladeAreaRatio: 0.8,
			Source: "Tokyo 2015 workshop on CFD in ship hydrodynamics",
		},
		{
			Name:        "KVLCC1",
			Particulars: hull.Particulars{ShipType: "tanker", LengthPP: 320, LengthWL: 325.5, Beam: 58, Draught: 20.8, Volume: 312738, Midship: 0.998},
			Surface:     27320, RudderLateral: 136.7, RudderSurface: 273.3, PropellerDiameter: 9.86, BladeAreaRatio: 0.431,
			Source: "SIMMAN 2008 workshop",
		},
		{
			Name:        "JBC",
			Particulars: hull.Particulars{ShipType: "bulk-carrier", LengthPP: 280, LengthWL: 285, Beam: 45, Draught: 16.5, Volume: 178369.9, Midship: 0.9981},
			Surface:     19556.1, RudderSurface: 164.3,
			Source: "Tokyo 2015 workshop on CFD in ship hydrodynamics",
		},
	}
}

// typeBenchmark says how far the formula of a ship type was off on the hulls
// that share it.
func typeBenchmark(t hull.ShipType) string {
	f := formulaOf(t)
	var same []Hull
	for _, h := range Benchmarks() {
		if formulaOf(h.ShipType) == f {
			same = append(same, h)
		}
	}
	return offText(same, func(h Hull) float64 { return f.at(h.Particulars, h.Draught) })
}

// offText says how far a formula was off on the hulls given.
func offText(hulls []Hull, formula func(Hull) float64) string {
	return off(hulls, func(h Hull) (float64, float64) { return formula(h), h.Surface })
}

// off compares two figures of each hull: what a formula gives and what is
// true.
func off(hulls []Hull, figures func(Hull) (got, want float64)) string {
	if len(hulls) == 0 {
		return unchecked
	}
	var parts []string
	most := 0.0
	for _, h := range hulls {
		got, want := figures(h)
		percent := 100 * (got/want - 1)
		most = max(most, percent, -percent)
		word := "high"
		if percent < 0 {
			percent, word = -percent, "low"
		}
		parts = append(parts, fmt.Sprintf("%s %.1f %% %s", h.Name, percent, word))
	}
	return fmt.Sprintf("within %.1f %%: %s", most, strings.Join(parts, ", "))
}

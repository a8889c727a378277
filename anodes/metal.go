// Package anodes is what the metal gives: the capacity and potential of
// alloys, the resistance and current output of anode patterns new and worn,
// and the count of anodes that a design code asks for.
//
// Units: m, m2, kg, ohm m, ohm, A, Ah/kg; potentials in V against
// Ag/AgCl/seawater. It follows DNV-RP-B401 (2005-2021), clauses 7.7 to 7.9.
package anodes

import (
	"anodewright/assets"
	"anodewright/hull"
)

// Protective returns the design protective potential of steel, V
// (DNV-RP-B401, 5.4).
func Protective() float64 { return assets.Get("code-potential").Value("steel", "value") }

// Metal is what a pattern's alloy does in one medium.
type Metal struct {
	Capacity   float64 // Ah/kg
	Potential  float64 // closed circuit, V
	Density    float64 // kg/m3
	Source     string
	Confidence string
}

// MetalOf returns the pattern's metal in a medium: the pattern's own capacity
// and potential where it states them, else the alloy's (DNV-RP-B401, Table
// 10-6; fresh water as seawater and soil as sediment, for want of figures in
// the code, see [Concerns]; magnesium the same everywhere).
func MetalOf(p *hull.Pattern, medium hull.Medium) Metal {
	table, row := assets.Get("code-alloys"), string(p.Alloy)
	switch {
	case p.Alloy == hull.Magnesium:
		table = assets.Get("magnesium")
	case medium == hull.Sediment || medium == hull.Soil:
		row += " sediment"
	default:
		row += " seawater"
	}
	r, _ := table.Row(row)
	m := Metal{
		Capacity:   table.Value(row, "capacity"),
		Potential:  table.Value(row, "potential"),
		Density:    assets.Get("metal-densities").Value(string(p.Alloy), "value"),
		Source:     table.Source() + ", " + row,
		Confidence: r.Confidence,
	}
	if p.Capacity != nil {
		m.Capacity, m.Source, m.Confidence = *p.Capacity, "the pattern's own", "entered"
	}
	if p.Potential != nil {
		m.Potential, m.Source, m.Confidence = *p.Potential, "the pattern's own", "entered"
	}
	return m
}

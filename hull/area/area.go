// Package area estimates the areas of steel that water, mud or a tank's filling
// touches: a ship's wetted surface from its particulars and its parts, the
// appendages, tubulars by elevation, sheet piling, pontoons, chains.
//
// Lengths are in m, volumes in m3, areas in m2. Every estimate carries its
// formula, its source with how sure it is, what went into it, and how far the
// formula was off on benchmark hulls of known wetted surface. The wetted
// boot-top is part of a ship's wetted surface; rudder, propeller and the other
// appendages are not.
//
// A function whose comment names no precondition wants finite inputs above 0;
// anything else comes back as a hull.Fault that names the input.
package area

import (
	"fmt"
	"math"

	"anodewright/hull"
)

// Estimate is an area with where it comes from.
type Estimate struct {
	Name       string  // what was estimated and how, for people
	Area       float64 // m2
	Formula    string
	Source     string
	Confidence string
	Inputs     []hull.Input
	Benchmark  string // how far the formula was off, or why nobody can say
}

// Step returns the estimate as a step of a trace.
func (e Estimate) Step() hull.Step {
	return hull.Step{
		Figure: e.Name, Value: e.Area, Unit: "m2", Formula: e.Formula, Inputs: e.Inputs,
		Source: e.Source, Confidence: e.Confidence,
	}
}

// How sure a source is, in the words of the reference tables.
const (
	read       = "read"
	fromMemory = "from memory, to be checked"
	common     = "common practice, no source"
	computed   = "computed"
	entered    = "entered"
)

// What Benchmark says where there are no hulls to compare with.
const (
	exact     = "geometry: exact for the sizes entered"
	unchecked = "not checked on a hull"
)

func in(name string, value float64, unit string) hull.Input {
	return hull.Input{Name: name, Value: value, Unit: unit}
}

func metres(name string, value float64) hull.Input { return in(name, value, "m") }

// made finishes an estimate: its first inputs must be above 0, the loose ones
// may be 0. It returns every fault of the inputs at once.
func made(e Estimate, loose ...hull.Input) (Estimate, error) {
	var faults hull.Faults
	for _, i := range e.Inputs {
		if !(i.Value > 0) || math.IsInf(i.Value, 0) {
			faults = append(faults, hull.Fault{Path: i.Name, Want: "a number above 0", Got: fmt.Sprint(i.Value)})
		}
	}
	for _, i := range loose {
		if !(i.Value >= 0) || math.IsInf(i.Value, 0) {
			faults = append(faults, hull.Fault{Path: i.Name, Want: "a number not below 0", Got: fmt.Sprint(i.Value)})
		}
	}
	if err := faults.Err(); err != nil {
		return Estimate{}, err
	}
	e.Inputs = append(e.Inputs, loose...)
	if !(e.Area >= 0) || math.IsInf(e.Area, 0) {
		return Estimate{}, hull.Fault{Path: e.Name, Want: "dimensions that make an area", Got: fmt.Sprint(e.Area)}
	}
	return e, nil
}

// Entered is an area that nothing is estimated of, such as a tank's from its
// drawings.
func Entered(name string, m2 float64) (Estimate, error) {
	return made(Estimate{
		Name: name, Area: m2, Formula: "as entered", Source: "the user", Confidence: entered, Benchmark: "as good as its drawing",
		Inputs: []hull.Input{in("area", m2, "m2")},
	})
}

// Times returns the estimate for n equal things. n must be 1 at least.
func (e Estimate) Times(n int) Estimate {
	if n < 1 {
		panic("area: a number of things below 1")
	}
	if n > 1 {
		e.Area *= float64(n)
		e.Formula = fmt.Sprintf("%d × (%s)", n, e.Formula)
	}
	return e
}

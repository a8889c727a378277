package area

import (
	"fmt"
	"math"

	"anodewright/hull"
)

// RudderLateral estimates a rudder's lateral area, one face, as 1.5 % of
// length times draught: the usual width of cargo ships' rudders.
//
// Source: handbook rule, no document named.
func RudderLateral(length, draught float64) (Estimate, error) {
	return made(Estimate{
		Name: "Rudder, lateral area, 1.5 % rule", Area: 0.015 * length * draught, Formula: "0.015 L T", Source: "handbook rule", Confidence: read,
		Benchmark: lateralText(func(h Hull) float64 { return 0.015 * h.LengthPP * h.Draught }),
		Inputs:    []hull.Input{metres("length L", length), metres("draught T", draught)},
	})
}

// RudderLateralByClass estimates a rudder's lateral area, one face, as class
// rules of minimum rudder area do: (L T/100)(1 + 50 CB^2 (B/L)^2), CB the block
// coefficient, not above 1.
//
// Source: a class rule, from memory.
func RudderLateralByClass(length, beam, draught, block float64) (Estimate, error) {
	rule := func(l, b, t, cb float64) float64 { return l * t / 100 * (1 + 50*cb*cb*b*b/(l*l)) }
	if block > 1 {
		return Estimate{}, hull.Fault{Path: "block coefficient CB", Want: "a number above 0 and up to 1", Got: fmt.Sprint(block)}
	}
	return made(Estimate{
		Name: "Rudder, lateral area, class form", Area: rule(length, beam, draught, block), Formula: "(L T/100)(1 + 50 CB² (B/L)²)",
		Source: "class rule of least rudder area", Confidence: fromMemory,
		Benchmark: lateralText(func(h Hull) float64 {
			return rule(h.LengthPP, h.Beam, h.Draught, h.Volume/(h.LengthPP*h.Beam*h.Draught))
		}),
		Inputs: []hull.Input{metres("length L", length), metres("beam B", beam), metres("draught T", draught), in("block coefficient CB", block, "")},
	})
}

func lateralText(formula func(Hull) float64) string {
	var known []Hull
	for _, h := range Benchmarks() {
		if h.RudderLateral > 0 {
			known = append(known, h)
		}
	}
	return off(known, func(h Hull) (float64, float64) { return formula(h), h.RudderLateral }) + " (rudder with horn)"
}

// Rudder estimates the steel of a rudder that water touches: both faces, 2 A of
// the lateral area A. Published rudders of benchmark hulls measure 2.00 A.
func Rudder(lateral Estimate) (Estimate, error) {
	e := Estimate{
		Name: "Rudder, both faces", Area: 2 * lateral.Area, Formula: "2 A", Source: lateral.Source, Confidence: lateral.Confidence,
		Benchmark: "A " + lateral.Benchmark, Inputs: []hull.Input{in("lateral area A", lateral.Area, "m2")},
	}
	if lateral.Formula != "" {
		e.Formula = "2 A, A = " + lateral.Formula
	}
	return made(e)
}

// Propeller estimates what water touches of a propeller: both sides of the
// blades 2 (AE/A0)(pi D^2/4) by its expanded blade area ratio, not above 1.5,
// and the hub as a cylinder pi dh lh, whose sizes may be 0.
//
// Source: geometry of the expanded blades.
func Propeller(diameter, bladeAreaRatio, hubDiameter, hubLength float64) (Estimate, error) {
	if bladeAreaRatio > 1.5 {
		return Estimate{}, hull.Fault{Path: "blade area ratio AE/A0", Want: "a number above 0 and up to 1.5", Got: fmt.Sprint(bladeAreaRatio)}
	}
	return made(Estimate{
		Name: "Propeller and hub", Area: 2*bladeAreaRatio*math.Pi*diameter*diameter/4 + math.Pi*hubDiameter*hubLength,
		Formula: "2 (AE/A0) π D²/4 + π dh lh", Source: "geometry of the expanded blades", Confidence: computed, Benchmark: exact,
		Inputs: []hull.Input{metres("diameter D", diameter), in("blade area ratio AE/A0", bladeAreaRatio, "")},
	}, metres("hub diameter dh", hubDiameter), metres("hub length lh", hubLength))
}

// BilgeKeels estimates n flat bilge keels, both faces: 2 n l h.
func BilgeKeels(n int, length, height float64) (Estimate, error) {
	return made(Estimate{
		Name: "Bilge keels", Area: 2 * float64(n) * length * height, Formula: "2 n l h", Source: "geometry", Confidence: computed, Benchmark: exact,
		Inputs: []hull.Input{in("number n", float64(n), ""), metres("length l", length), metres("height h", height)},
	})
}

// ThrusterTunnel estimates the inside of a thruster's tunnel: pi D L. The
// thruster's own blades and pod are apart; see Propeller.
func ThrusterTunnel(diameter, length float64) (Estimate, error) {
	return made(Estimate{
		Name: "Thruster tunnel", Area: math.Pi * diameter * length, Formula: "π D L", Source: "geometry", Confidence: computed, Benchmark: exact,
		Inputs: []hull.Input{metres("diameter D", diameter), metres("length L", length)},
	})
}

// SeaChest estimates the inside of a box with one open face a b:
// 2 (a b + b d + a d) - a b, and both sides of a grating over the face whose
// bars cover the share s of it, 2 s a b. s is from 0, no grating, to 1.
func SeaChest(width, height, depth, gratingShare float64) (Estimate, error) {
	if gratingShare > 1 {
		return Estimate{}, hull.Fault{Path: "grating's share s", Want: "a number from 0 to 1", Got: fmt.Sprint(gratingShare)}
	}
	a, b, d := width, height, depth
	return made(Estimate{
		Name: "Sea chest", Area: 2*(a*b+b*d+a*d) - a*b + 2*gratingShare*a*b, Formula: "2 (a b + b d + a d) − a b + 2 s a b",
		Source: "geometry", Confidence: computed, Benchmark: exact,
		Inputs: []hull.Input{metres("width a", a), metres("height b", b), metres("depth d", d)},
	}, in("grating's share s", gratingShare, ""))
}

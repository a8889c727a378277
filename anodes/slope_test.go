package anodes

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

// hartt is the pipe of Hartt and Lysogorski 2003: bare share 1/20, 7.5 ohm m2.
var hartt = BraceletLine{PipeRadius: 0.136, AlphaGamma: 7.5 * 20, Resistance: 0.353, Corrosion: -0.65, Anode: -1.05}

// Spacing, life and end of life of the published example.
func TestBraceletLine(t *testing.T) {
	l := hartt.Spacing(-0.975)
	near(t, "spacing", l, 114.76, 5e-5)
	near(t, "potential at it", hartt.Potential(l), -0.975, 1e-12)
	near(t, "H at it", hartt.H(l), 0.325/0.075, 1e-12)
	near(t, "life", hartt.Hours(60.8, 1700, 0.8, -0.975, l)/8760, 44.43, 2e-4)
	worn := hartt
	worn.Resistance = ShortFlush(0.80, 2*math.Pi*0.160*0.209)
	if got := worn.Potential(l); math.Abs(got+0.944) > 5e-4 {
		t.Errorf("potential at the end of life: %v", got)
	}
}

func TestSpacingOutOfRange(t *testing.T) {
	for _, v := range []float64{-0.65, -0.5, -1.05, -1.2, math.NaN()} {
		if l := hartt.Spacing(v); !math.IsNaN(l) {
			t.Errorf("%v V: %v m", v, l)
		}
	}
}

// Spacing undoes Potential, also with a pipe of some resistance, which takes
// the bracelets closer together.
func TestSpacingIsInverse(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		b := hartt
		b.Metal = rapid.SampledFrom([]float64{0, 1e-12, 1e-6, 1e-4}).Draw(t, "Rm")
		v := rapid.Float64Range(-1.04, -0.70).Draw(t, "potential")
		l := b.Spacing(v)
		if got := b.Potential(l); math.Abs(got-v) > 1e-9 {
			t.Fatalf("%v V gives %v m, which gives %v V", v, l, got)
		}
		if plain := hartt.Spacing(v); l > plain*(1+1e-9) {
			t.Fatalf("%v m with a resistance of the pipe, %v without", l, plain)
		}
	})
}

// The line and the balance of charge are the same design.
func TestSlope(t *testing.T) {
	// 600 m2 of bare steel at 0.1 A/m2 with anodes of 240 A/V.
	v := SlopeOf(600, 60, -1.05, 240)
	near(t, "S", v.S, 2.5, 1e-12)
	near(t, "density", v.Density, 0.1, 1e-12)
	near(t, "E", v.Potential, -0.80, 1e-12)
	near(t, "E by the line", v.Anode+v.S*v.Density, v.Potential, 1e-12)

	// n pieces of m kg and R ohm: charge n m C u over the current i A.
	const n, mass, resistance, capacity, u, area, i = 20, 140.0, 0.08, 2000.0, 0.9, 600.0, 0.1
	s := SlopeParameter(area, n/resistance)
	hours := n * mass * capacity * u / (i * area)
	near(t, "Ra w", SlopeMass(i, hours, s, capacity, u), resistance*mass, 1e-12)
	near(t, "T", SlopeHours(i, resistance*mass, s, capacity, u), hours, 1e-12)
}

// Without anodes there is no protection, and no division that stops the view.
func TestSlopeWithoutAnodes(t *testing.T) {
	v := SlopeOf(100, 10, -1.05, 0)
	if !math.IsInf(v.S, 1) || !math.IsInf(v.Potential, 1) {
		t.Errorf("%+v", v)
	}
}

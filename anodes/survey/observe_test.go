package survey

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"anodewright/anodes"
	"anodewright/anodes/forecast"
	"anodewright/hull"
)

// slab is a flush block of 1.0 x 0.15 x 0.12 m whose mass is that of its
// sizes, without an insert.
func slab() *hull.Pattern {
	p := &hull.Pattern{ID: "slab", Alloy: hull.Aluminium, Shape: hull.LongFlush, Length: 1, Width: 0.15, Height: 0.12, Utilisation: 0.85}
	p.NetMass = 0.15 * 0.12 * density(p)
	return p
}

func rod() *hull.Pattern {
	p := &hull.Pattern{ID: "rod", Alloy: hull.Aluminium, Shape: hull.LongSlender, Length: 2, Radius: 0.09, Standoff: 0.3, Utilisation: 0.9, InsertVolume: 0.004}
	p.NetMass = (math.Pi*0.09*0.09*2 - p.InsertVolume) * density(p)
	return p
}

func TestWastageFromSizes(t *testing.T) {
	r := rod()
	girth := 2 * math.Pi * 0.07
	y, err := Wastage(r, hull.Measured{Girth: girth, Length: 1.9})
	left := girth*girth/(4*math.Pi)*1.9 - r.InsertVolume
	near(t, "rod", y, 1-left*density(r)/r.NetMass, 1e-12)
	if err != nil {
		t.Error(err)
	}
	s := slab()
	y, _ = Wastage(s, hull.Measured{Girth: 0.54, Length: 1})
	near(t, "new slab", y, 0, 1e-12)
	// 0.12 x 0.096 m, the same proportions: 64 % of the section left.
	y, _ = Wastage(s, hull.Measured{Girth: 2 * (0.12 + 0.096), Length: 1})
	near(t, "slab of the same proportions", y, 0.36, 1e-12)
	s.Height = 0
	y, _ = Wastage(s, hull.Measured{Girth: 0.54, Length: 0.9})
	near(t, "slab whose height follows from its mass", y, 0.1, 1e-12)
	if y, err = Wastage(s, hull.Measured{Girth: 0.7, Length: 1}); err == nil {
		t.Errorf("a slab larger than new has wastage %g", y)
	}
	ring := &hull.Pattern{ID: "ring", Alloy: hull.Aluminium, Shape: hull.Bracelet, ExposedArea: 1, NetMass: 100, Utilisation: 0.8}
	if y, err = Wastage(ring, hull.Measured{Girth: 1, Length: 1}); err == nil {
		t.Errorf("a bracelet has wastage %g by its girth", y)
	}
}

func TestObserve(t *testing.T) {
	r := hull.Reading{
		Percent: []float64{30, 0, 90},
		Gone:    2, NotWasted: 3, Fallen: 4, Painted: 5, NotSeen: 6,
		Potentials: []hull.Measure{{Potential: -0.7}},
	}
	o, err := Observe(slab(), &r)
	inf := math.Inf(1)
	want := "[0.3] [{0 0.05 1} {0.85 +Inf 1} {0.85 +Inf 2} {0 0.05 3}]"
	if got := fmt.Sprint(o.Values, o.Classes); got != want || err != nil {
		t.Errorf("got %s, %v, want %s", got, err, want)
	}
	o, _ = Observe(slab(), &hull.Reading{Grades: &hull.Grades{Bounds: []float64{0, 0.25, 0.5, 0.75}, Counts: []int{0, 5, 3, 1}}})
	if got, want := fmt.Sprint(o.Classes), fmt.Sprint([]Class{{0.25, 0.5, 5}, {0.5, 0.75, 3}, {0.75, inf, 1}}); got != want {
		t.Errorf("got %s, want %s", got, want)
	}
	o, err = Observe(slab(), &hull.Reading{Measured: []hull.Measured{{Girth: 0.432, Length: 1}, {Girth: 2, Length: 1}}})
	if len(o.Values) != 1 || err == nil || !strings.Contains(err.Error(), "piece 2") {
		t.Errorf("the good piece should be kept and the bad one named: %v, %v", o.Values, err)
	}
}

// Ten potentials tell nothing of the mass: what remains is as uncertain as
// before.
func TestPotentialsNeverTellMass(t *testing.T) {
	r := hull.Reading{}
	for range 10 {
		r.Potentials = append(r.Potentials, hull.Measure{Potential: -0.95})
	}
	o, err := Observe(slab(), &r)
	if err != nil || o.pieces() != 0 {
		t.Fatalf("potentials became an observation: %+v, %v", o, err)
	}
	o.Predicted = Linear(0.3)
	prior, after := Learn(Standard(), one()).Circuits[0].Demand, Learn(Standard(), one(o)).Circuits[0].Demand
	near(t, "sd", after.SD/prior.SD, 1, 1e-12)
	near(t, "median", after.Median()/prior.Median(), 1, 1e-12)
}

// A curve through a few forecasts is as good as a forecast at each factor, and
// goes on where a forecast stops.
func TestInterpolateForecast(t *testing.T) {
	p := rod()
	wastage := func(x float64) float64 {
		g := forecast.Group{Count: 10, Mass: p.NetMass, Capacity: 2000, Potential: -1.05, Utilisation: 0.9, Factor: 1, Wastage: 0.05, Shape: anodes.ShapeOf(p)}
		s := forecast.Stretch{From: 0, To: 4, Demand: func(t float64) float64 { return math.Exp(x) * (6 + t) }, Resistivity: []float64{0.25}}
		points := forecast.Run(forecast.Level(), []forecast.Group{g}, []forecast.Stretch{s}, forecast.State{Potential: math.NaN()})
		return points[1].Wastage[0]
	}
	var w []float64
	for _, x := range Nodes() {
		w = append(w, wastage(x))
	}
	f := Interpolate(Nodes(), w, 0.9)
	last := 0.0
	for x := -2.5; x < 3; x += 0.05 {
		y, want := f(x), wastage(x)
		if y < last {
			t.Errorf("the wastage falls at %.2f", x)
		}
		last = y
		switch {
		case math.Abs(x) <= 0.7:
			near(t, fmt.Sprintf("at %.2f", x), y/want, 1, 0.005)
		case math.Abs(x) <= 1.6: // the anodes come to give all they can
			near(t, fmt.Sprintf("at %.2f", x), y/want, 1, 0.03)
		}
	}
	// Where forecasts end at the utilisation factor, the curve goes on.
	for i, x := range Nodes() {
		w[i] = min(0.4*math.Exp(x), 0.9)
	}
	f = Interpolate(Nodes(), w, 0.9)
	for _, x := range []float64{-3, 0.5, 1, 2} {
		near(t, fmt.Sprintf("linear, at %.1f", x), f(x)/(0.4*math.Exp(x)), 1, 1e-9)
	}
	spent := Interpolate(Nodes(), []float64{0.9, 0.9, 0.9, 0.9, 0.9, 0.9, 0.9, 0.9, 0.9}, 0.9)
	near(t, "spent at the least factor", spent(-1.6), 0.9, 1e-12)
}

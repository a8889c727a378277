package forecast

import (
	"math"
	"testing"
)

func near(t *testing.T, what string, got, want, rel float64) {
	t.Helper()
	if math.IsNaN(got) || math.Abs(got-want) > rel*math.Abs(want) {
		t.Errorf("%s: got %.10g, want %.10g within %g", what, got, want, rel)
	}
}

// rod is the long slender test rod: L 2.0 m, r 0.09 m, 2700 kg/m3, no insert
// and no shortening.
func rod() Group {
	const l, r0, density = 2.0, 0.09, 2700.0
	return Group{
		Count: 1, Mass: math.Pi * r0 * r0 * l * density, Capacity: 2500, Potential: -1.05, Utilisation: 1, Factor: 1,
		Shape: func(w float64) float64 {
			r := r0 * math.Sqrt(max(1e-12, 1-w))
			return (math.Log(4*l/r) - 1) / (2 * math.Pi * l)
		},
	}
}

func constant(x float64) func(float64) float64 { return func(float64) float64 { return x } }

// A rod that gives its output at a constant driving voltage of 0.25 V: a curve
// so steep that the steel stays at -0.80 V whatever the anode gives.
func TestRodAtConstantVoltage(t *testing.T) {
	g := rod()
	near(t, "mass", g.Mass, 137.41326, 1e-7)
	pinned := Curve{[]knot{{-0.80 + 1e-9, 0}, {-0.80, 1}}}
	for gone, years := range map[float64]float64{0.25: 2.7742, 0.50: 5.6810, 0.75: 8.7919, 0.90: 10.8399} {
		end := lastTime(g, pinned, gone)
		near(t, "years to the wastage", end, years, 1e-5)
	}
}

// lastTime returns when a rod with this utilisation factor is spent.
func lastTime(g Group, c Curve, utilisation float64) float64 {
	g.Utilisation = utilisation
	low, high := 0.0, 40.0
	for range 60 {
		mid := (low + high) / 2
		points := Run(c, []Group{g}, []Stretch{{From: 0, To: mid, Demand: constant(1), Resistivity: []float64{0.25}}}, State{Potential: -0.8})
		if points[1].Wastage[0] >= utilisation-1e-12 {
			high = mid
		} else {
			low = mid
		}
	}
	return high
}

// A hemisphere on a plane, R = rho/(2 pi r): m/m0 = (1 - t/tau)^1.5 with
// tau = r0^2 rho rho_m/(2 k dE), k = 8760/C.
func TestHemisphere(t *testing.T) {
	const r0, rho, density, capacity, dE = 0.1, 0.25, 7130.0, 780.0, 0.2
	tau := r0 * r0 * rho * density / (2 * HoursPerYear / capacity * dE)
	near(t, "tau", tau, 3.967894, 1e-6)
	g := Group{
		Count: 1, Mass: 2. / 3 * math.Pi * r0 * r0 * r0 * density, Capacity: capacity, Potential: -1.00, Utilisation: 1, Factor: 1,
		Shape: func(w float64) float64 { return 1 / (2 * math.Pi * r0 * math.Cbrt(max(1e-15, 1-w))) },
	}
	pinned := Curve{[]knot{{-0.80 + 1e-9, 0}, {-0.80, 1}}}
	for _, share := range []float64{0.1, 0.5, 0.9} {
		p := Run(pinned, []Group{g}, []Stretch{{From: 0, To: share * tau, Demand: constant(1), Resistivity: []float64{rho}}}, State{Potential: -0.8})
		near(t, "mass left", 1-p[1].Wastage[0], math.Pow(1-share, 1.5), 1e-6)
	}
}

// The straight curve through (-0.65 V, 0) with 3.5 ohm m2 and 600 m2: the
// more anodes, the less each gives.
func TestSelfRegulation(t *testing.T) {
	demand := 600 * 0.15 / 3.5
	for n, total := range map[float64]float64{5: 20.2951, 10: 31.3203, 20: 43.0001, 40: 52.8554, 80: 59.6964} {
		g := rod()
		g.Count = n
		p := Run(Straight(), []Group{g}, []Stretch{{From: 0, To: 1e-6, Demand: constant(demand), Resistivity: []float64{0.25}}}, State{Potential: math.NaN()})
		near(t, "current", p[0].Current[0], total, 2e-6)
	}
}

func TestHalfRenewedSet(t *testing.T) {
	isNew, old := rod(), rod()
	isNew.Count, old.Count, old.Wastage = 10, 10, 0.7
	p := Run(Straight(), []Group{isNew, old}, []Stretch{{From: 0, To: 1e-9, Demand: constant(600 * 0.15 / 3.5), Resistivity: []float64{0.25, 0.25}}}, State{Potential: math.NaN()})
	near(t, "total", p[0].Current[0]+p[0].Current[1], 41.7627, 2e-6)
	near(t, "potential", p[0].Potential, -0.89362, 1e-5)
	near(t, "new piece", p[0].Current[0]/10, 2.2540, 3e-5)
	near(t, "old piece", p[0].Current[1]/10, 1.9222, 3e-5)
}

// The charge that the steel takes equals the mass lost times the capacity,
// over spent groups, changes of demand and loss of protection.
func TestChargeEqualsMassLost(t *testing.T) {
	for name, curve := range map[string]Curve{"level": Level(), "straight": Straight(), "sigmoid": Sigmoid(2.5)} {
		a, b := rod(), rod()
		a.Count, a.Utilisation = 3, 0.9
		b.Count, b.Utilisation, b.Wastage, b.Potential, b.Capacity = 2, 0.85, 0.3, -1.0, 780
		start := []float64{a.Wastage, b.Wastage}
		p := Run(curve, []Group{a, b}, []Stretch{
			{From: 0, To: 2, Demand: func(t float64) float64 { return 4 + t }, Resistivity: []float64{0.25, 0.3}},
			{From: 2, To: 9, Demand: func(t float64) float64 { return 3 + 0.5*t }, Resistivity: []float64{0.3, 0.3}},
			{From: 9, To: 30, Demand: func(t float64) float64 { return 8 }, Resistivity: []float64{0.25, 0.25}},
		}, State{Potential: math.NaN()})
		last := p[len(p)-1]
		lost := 0.0
		for j, g := range []Group{a, b} {
			lost += g.Count * g.Mass * g.Capacity * (last.Wastage[j] - start[j])
		}
		near(t, name+": charge", last.Charge, lost, 1e-7)
		if last.Wastage[0] != 0.9 || last.Wastage[1] != 0.85 || last.Potential != Corrosion || last.SteelLoss <= 0 {
			t.Errorf("%s: after thirty years the anodes should be spent and the steel bare: %+v", name, last)
		}
	}
}

// On the level part one group gives the demand whatever its resistance: its
// wastage is the demand's integral.
func TestLevelCurveIsLinear(t *testing.T) {
	g := rod()
	g.Count, g.Utilisation = 10, 0.9
	p := Run(Level(), []Group{g}, []Stretch{{From: 0, To: 5, Demand: func(t float64) float64 { return 2 + 0.4*t }, Resistivity: []float64{0.25}}}, State{Potential: math.NaN()})
	want := HoursPerYear * (2*5 + 0.2*25) / (10 * g.Mass * g.Capacity)
	near(t, "wastage", p[1].Wastage[0], want, 1e-9)
}

func TestSteelLoss(t *testing.T) {
	near(t, "1 um a year at -0.770 V SCE", SteelLoss(-0.779), 0.001, 1e-12)
	near(t, "at the corrosion potential", SteelLoss(Corrosion), 0.1, 1e-12)
}

func TestSigmoidKeepsItsBranch(t *testing.T) {
	g := rod() // with a drive wide enough for three roots
	g.Count, g.Potential = 2, -1.5
	s := []Stretch{{From: 0, To: 1e-9, Demand: constant(10), Resistivity: []float64{0.25}}}
	high := Run(Sigmoid(3), []Group{g}, s, State{Potential: -0.70})[0].Potential
	low := Run(Sigmoid(3), []Group{g}, s, State{Potential: -1.00})[0].Potential
	if !(high > low) {
		t.Errorf("from -0.70 V the steel comes to %.4f V, from -1.00 V to %.4f V: want two branches", high, low)
	}
}

// BenchmarkRun is a circuit of 20 groups over 25 years in 12 stretches.
func BenchmarkRun(b *testing.B) {
	for name, curve := range map[string]Curve{"level": Level(), "straight": Straight()} {
		b.Run(name, func(b *testing.B) {
			var groups []Group
			var rho []float64
			for i := range 20 {
				g := rod()
				g.Count, g.Utilisation, g.Wastage = float64(2+i%5), 0.9, 0.02*float64(i)
				groups, rho = append(groups, g), append(rho, 0.25)
			}
			var s []Stretch
			for i := range 12 {
				from := 25. / 12 * float64(i)
				s = append(s, Stretch{From: from, To: from + 25./12, Demand: func(t float64) float64 { return 20 + t }, Resistivity: rho})
			}
			b.ReportAllocs()
			for b.Loop() {
				Run(curve, groups, s, State{Potential: math.NaN()})
			}
		})
	}
}

// Steel that asks for nothing takes nothing: no anode wastes, and the steel is
// at the potential of its most negative anode that is not spent.
func TestNoDemand(t *testing.T) {
	zinc, spent := rod(), rod()
	zinc.Potential = -1.03
	spent.Potential, spent.Utilisation, spent.Wastage = -1.10, 0.8, 0.8
	for what, c := range map[string]Curve{"level": Level(), "straight": Straight(), "sigmoid": Sigmoid(3)} {
		p := Run(c, []Group{zinc, rod(), spent}, []Stretch{{From: 0, To: 5, Demand: constant(0), Resistivity: []float64{0.25, 0.25, 0.25}}}, State{Potential: math.NaN()})
		if end := p[1]; end.Wastage[0] != 0 || end.Wastage[1] != 0 || end.Potential != -1.05 || end.Charge != 0 || end.SteelLoss != 0 {
			t.Errorf("%s: %+v", what, end)
		}
		p = Run(c, []Group{spent}, []Stretch{{From: 0, To: 1, Demand: constant(0), Resistivity: []float64{0.25}}}, State{Potential: math.NaN()})
		if p[1].Potential != Corrosion {
			t.Errorf("%s: %g V without an anode", what, p[1].Potential)
		}
		// A demand that starts from nothing, as that of a coating without a fault.
		p = Run(c, []Group{rod()}, []Stretch{{From: 0, To: 2, Demand: func(t float64) float64 { return 0.1 * t }, Resistivity: []float64{0.25}}}, State{Potential: math.NaN()})
		near(t, what+" charge", p[1].Wastage[0]*rod().Mass*2500, p[1].Charge, 1e-7)
		if what == "level" {
			near(t, "charge of a demand from nothing", p[1].Charge, 0.1*2*HoursPerYear, 1e-9)
		}
	}
}

// A zone's current factor scales what its anodes give, so what they lose, and
// the balance with it.
func TestCurrentFactor(t *testing.T) {
	strong, weak := rod(), rod()
	strong.Factor, weak.Factor = 1.25, 0.8
	one := []float64{0.25, 0.25}
	p := Run(Level(), []Group{strong, weak}, []Stretch{{From: 0, To: 0.5, Demand: constant(3), Resistivity: one}}, State{Potential: math.NaN()})
	near(t, "currents", p[0].Current[0]/p[0].Current[1], 1.25/0.8, 1e-9)
	near(t, "balance", p[0].Current[0]+p[0].Current[1], 3, 1e-9)
	r := 0.25 * rod().Shape(0)
	near(t, "potential", p[0].Potential, -1.05+3*r/(1.25+0.8), 1e-9)
	near(t, "mass lost", (p[1].Wastage[0]+p[1].Wastage[1])*rod().Mass*2500, 3*0.5*HoursPerYear, 1e-9)
	if x := p[1].Wastage[0] / p[1].Wastage[1]; x < 1.5 || x > 1.25/0.8 {
		t.Errorf("wastage apart by %.4f", x)
	}
}

package survey

import (
	"fmt"
	"math"
	"math/rand/v2"
	"testing"
)

func near(t *testing.T, what string, got, want, tolerance float64) {
	t.Helper()
	if math.IsNaN(got) || math.Abs(got-want) > tolerance {
		t.Errorf("%s: got %.6g, want %.6g within %g", what, got, want, tolerance)
	}
}

// plain is the model of one circuit whose mean and spread are known.
func plain() Model {
	return Model{Scatter: 0.53, Zone: 0.25, Spread: 0.25}
}

// one is an asset of one circuit with one zone.
func one(found ...Observation) []Circuit { return []Circuit{{Zones: []Zone{{Found: found}}}} }

func TestWithoutReadings(t *testing.T) {
	for name, c := range map[string][]Circuit{
		"one zone":       one(),
		"three zones":    {{Zones: make([]Zone, 3)}},
		"unequal shares": {{Zones: []Zone{{Share: 0.7}, {Share: 0.2}, {Share: 0.1}}}},
	} {
		f := Learn(Standard(), c).Circuits[0]
		low, high := f.Demand.Range()
		near(t, name+": median", f.Demand.Median(), 1, 1e-6)
		near(t, name+": low", low, 0.42, 0.005)
		near(t, name+": high", high, 2.39, 0.005)
		near(t, name+": high exactly", high, math.Exp(0.53*1.6448536269514722), 1e-5)
		near(t, name+": sd", f.Demand.SD, 0.53, 1e-6)
	}
}

func TestWeighedAnodes(t *testing.T) {
	const ratio = 1.4
	for _, c := range []struct {
		n          int
		shrink, sd float64
	}{{1, 0.8180, 0.2261}, {4, 0.9473, 0.1217}} {
		var y []float64
		for range c.n {
			y = append(y, 0.3*ratio)
		}
		f := Learn(plain(), one(Observation{Predicted: Linear(0.3), Values: y})).Circuits[0]
		near(t, fmt.Sprint(c.n, " weighed: shrink"), f.Demand.Mean/math.Log(ratio), c.shrink, 5e-5)
		near(t, fmt.Sprint(c.n, " weighed: sd"), f.Demand.SD, c.sd, 5e-5)
		near(t, "median", f.Demand.Median(), math.Exp(f.Demand.Mean), 1e-6)
		low, high := f.Demand.Range()
		near(t, "range", math.Log(high/low), 2*1.6448536269514722*f.Demand.SD, 1e-5)
		// The standard model gives one circuit alone the same.
		s := Learn(Standard(), one(Observation{Predicted: Linear(0.3), Values: y})).Circuits[0]
		near(t, "standard model: mean", s.Demand.Mean, f.Demand.Mean, 1e-5)
		near(t, "standard model: sd", s.Demand.SD, f.Demand.SD, 1e-5)
	}
}

func TestGrades(t *testing.T) {
	bounds := []float64{0, 0.25, 0.5, 0.75, math.Inf(1)}
	for _, c := range []struct {
		counts   [4]int
		mean, sd float64
	}{{[4]int{0, 5, 3, 0}, 0.12814, 0.10434}, {[4]int{2, 4, 2, 0}, -0.12103, 0.10435}} {
		o := Observation{Predicted: Linear(0.4)}
		for i, n := range c.counts {
			o.Classes = append(o.Classes, Class{bounds[i], bounds[i+1], n})
		}
		f := Learn(plain(), one(o)).Circuits[0]
		near(t, fmt.Sprint(c.counts, " mean"), f.Demand.Mean, c.mean, 1e-5)
		near(t, fmt.Sprint(c.counts, " sd"), f.Demand.SD, c.sd, 1e-5)
	}
}

// At which predicted wastage one must renew for a risk of 10 % that the set is
// spent.
func TestRenewAt(t *testing.T) {
	const u = 0.85
	for n, want := range map[int]float64{0: 0.431, 1: 0.636, 4: 0.727} {
		o := Observation{Predicted: Linear(0.3)}
		for range n {
			o.Values = append(o.Values, 0.3)
		}
		f := Learn(plain(), one(o)).Circuits[0]
		low, high := 0.0, 1.0
		for range 40 {
			if mid := (low + high) / 2; f.Zones[0].Factor.Spent(Linear(mid), u, 0) < 0.1 {
				low = mid
			} else {
				high = mid
			}
		}
		near(t, fmt.Sprint(n, " weighed: renew at"), low, want, 5e-4)
		near(t, "by the quantile", low, u/f.Demand.Quantile(0.9), 1e-6)
	}
}

func TestSpentPiece(t *testing.T) {
	f := Learn(plain(), one()).Circuits[0]
	sd := math.Hypot(0.53, 0.25)
	near(t, "one piece", f.Demand.Spent(Linear(0.5), 0.85, 0.25), 1-normalBelow(math.Log(0.85/0.5)/sd), 1e-6)
	if p := f.Demand.Spent(func(float64) float64 { return 0.85 }, 0.85, 0); p != 1 {
		t.Errorf("a set that is spent whatever the demand has a probability of %g to be spent", p)
	}
}

// Two ships whose true factors differ threefold, four weighed anodes each, with
// the spread of the model: each median tells its own truth.
func TestTwoShips(t *testing.T) {
	median := func(truth float64, piece func(i int) float64) float64 {
		o := Observation{Predicted: Linear(0.25)}
		for i := range 4 {
			o.Values = append(o.Values, 0.25*truth*math.Exp(0.25*piece(i)))
		}
		return Learn(Standard(), one(o)).Circuits[0].Demand.Median() / truth
	}
	rng := rand.New(rand.NewPCG(7, 2026))
	within, ships := 0, 0
	for _, truth := range []float64{1 / math.Sqrt(3), math.Sqrt(3), 0.4, 1.2, 0.8, 2.4} {
		typical := [4]float64{-1.03, -0.30, 0.30, 1.03} // expected order statistics
		near(t, "median over truth", median(truth, func(i int) float64 { return typical[i] }), 1, 0.25)
		for range 70 {
			if ships++; math.Abs(median(truth, func(int) float64 { return rng.NormFloat64() })-1) <= 0.25 {
				within++
			}
		}
	}
	// The mean of four has an sd of 0.125: 0.25 is two of them.
	if share := float64(within) / float64(ships); share < 0.9 {
		t.Errorf("only %.0f %% of the medians are within 25 %% of their truth", 100*share)
	}
}

// Readings that contradict each other wildly still give figures.
func TestWildReadings(t *testing.T) {
	wild := func(y float64) Zone {
		o := Observation{Predicted: Linear(0.3)}
		for range 50 {
			o.Values = append(o.Values, y)
		}
		return Zone{Found: []Observation{o}}
	}
	for name, c := range map[string]Circuit{
		"two zones": {Zones: []Zone{wild(0.011), wild(0.84), {}}},
		"one zone":  {Zones: []Zone{{Found: append(wild(0.011).Found, wild(0.84).Found...)}}},
		"high":      {Zones: []Zone{{Found: []Observation{{Predicted: Linear(0.001), Classes: []Class{{0.85, math.Inf(1), 500}}}}}, {}}},
		"low":       {Zones: []Zone{{Found: []Observation{{Predicted: Linear(0.999), Classes: []Class{{0, 0.05, 500}}}}}}},
		"no zone":   {},
	} {
		f := Learn(Standard(), []Circuit{c}).Circuits[0]
		low, high := f.Demand.Range()
		if !(low > 0 && low < f.Demand.Median() && f.Demand.Median() < high && high < 100) {
			t.Errorf("%s: %g, %g, %g", name, low, f.Demand.Median(), high)
		}
		for _, z := range f.Zones {
			if low, high := z.Factor.Range(); !(low > 0 && low < high && high < 100 && z.Current > 0) {
				t.Errorf("%s: zone %g to %g, current %g", name, low, high, z.Current)
			}
		}
	}
}

// Two zones by quadrature in both local factors. The reading of one moves the
// other through the circuit's demand.
func TestTwoZones(t *testing.T) {
	m := plain()
	stern := Observation{Predicted: Linear(0.3), Values: []float64{0.5, 0.55, 0.6}}
	side := Observation{Predicted: Linear(0.2), Classes: []Class{{0, 0.25, 3}, {0.25, 0.5, 1}}}
	for _, shares := range [][2]float64{{0, 0}, {0.8, 0.2}} {
		w := [2]float64{0.5, 0.5}
		if shares[0] > 0 {
			w = shares
		}
		common := 0.53*0.53 - 0.25*0.25*(w[0]*w[0]+w[1]*w[1])
		v, det := common+0.0625, 0.0625*(2*common+0.0625)
		var sum, x, xx, e0, e1 float64
		const h = 0.01
		for a := -2.0; a < 2; a += h {
			l0 := 0.0
			for _, y := range stern.Values {
				l0 -= math.Pow(math.Log(y/0.3)-a, 2) / (2 * 0.0625)
			}
			for b := -2.0; b < 2; b += h {
				z := func(q float64) float64 { return normalBelow((math.Log(q/0.2) - b) / 0.25) }
				p := math.Exp(l0-(v*a*a-2*common*a*b+v*b*b)/(2*det)) * math.Pow(z(0.25), 3) * (z(0.5) - z(0.25))
				d := w[0]*a + w[1]*b
				sum, x, xx, e0, e1 = sum+p, x+p*d, xx+p*d*d, e0+p*a, e1+p*b
			}
		}
		f := Learn(m, []Circuit{{Zones: []Zone{{shares[0], []Observation{stern}}, {shares[1], []Observation{side}}}}}).Circuits[0]
		near(t, "demand: mean", f.Demand.Mean, x/sum, 1e-4)
		near(t, "demand: sd", f.Demand.SD, math.Sqrt(xx/sum-x*x/sum/sum), 1e-4)
		near(t, "stern", f.Zones[0].Factor.Mean, e0/sum, 1e-4)
		near(t, "side", f.Zones[1].Factor.Mean, e1/sum, 1e-4)
		near(t, "geometric mean of the current factors", f.Zones[0].Current*f.Zones[1].Current, 1, 1e-9)
		near(t, "current factor", math.Log(f.Zones[0].Current/f.Zones[1].Current), (e0-e1)/sum, 2e-4)
	}
}

// Circuits without a reading learn from the others, and the next ship from
// this one.
func TestPooling(t *testing.T) {
	read := func() Circuit {
		return one(Observation{Predicted: Linear(0.2), Values: []float64{0.3, 0.3, 0.3, 0.3}})[0]
	}
	l := Learn(Standard(), append([]Circuit{read(), read(), read()}, one()...))
	// In normal theory: each circuit tells of the mean with the variance of
	// scatter and noise.
	y, v := math.Log(1.5), 0.53*0.53-0.09+0.0625/4
	precision := 1/0.09 + 3/v
	if l.Anodes != 12 {
		t.Fatalf("%d anodes", l.Anodes)
	}
	m := Standard()
	m.SpreadSD = 0
	l = Learn(m, append([]Circuit{read(), read(), read()}, one()...))
	near(t, "mean", l.Mean, 3/v*y/precision, 1e-4)
	near(t, "sd of the mean", l.MeanSD, 1/math.Sqrt(precision), 1e-4)
	unread := l.Circuits[3].Demand
	near(t, "circuit without a reading: mean", unread.Mean, l.Mean, 1e-4)
	near(t, "circuit without a reading: sd", unread.SD, math.Sqrt(1/precision+0.53*0.53-0.09), 1e-4)
	next := Learn(l.Next(), one()).Circuits[0].Demand
	near(t, "next ship: mean", next.Mean, unread.Mean, 1e-4)
	near(t, "next ship: sd", next.SD, unread.SD, 1e-4)
}

// The spread is that of the pieces once there are many.
func TestSpreadIsLearned(t *testing.T) {
	rng := rand.New(rand.NewPCG(1, 2))
	for _, truth := range []float64{0.12, 0.25, 0.45} {
		o := Observation{Predicted: Linear(0.3)}
		for range 200 {
			o.Values = append(o.Values, 0.3*math.Exp(truth*rng.NormFloat64()))
		}
		l := Learn(Standard(), one(o))
		near(t, "spread over truth", l.Spread/truth, 1, 0.12)
		o.Values = o.Values[:4]
		near(t, "spread of four pieces", Learn(Standard(), one(o)).Spread, 0.25, 1e-12)
	}
}

func TestLearnIsRepeatable(t *testing.T) {
	a, b := Learn(Standard(), synthetic(rand.New(rand.NewPCG(3, 3)), Standard()).circuits), Learn(Standard(), synthetic(rand.New(rand.NewPCG(3, 3)), Standard()).circuits)
	for i := range a.Circuits {
		if a.Circuits[i].Demand.Median() != b.Circuits[i].Demand.Median() {
			t.Errorf("circuit %d: two medians from the same readings", i)
		}
	}
}

// A weighed anode of a zone narrows the demand as the expectation said.
func TestNextReading(t *testing.T) {
	m := plain()
	zones := []Zone{
		{0, []Observation{{Predicted: Linear(0.3), Values: []float64{0.3, 0.35, 0.4, 0.4}}}},
		{0, nil},
	}
	before := Learn(m, []Circuit{{Zones: zones}})
	gains := before.NextReading([]Candidate{{0, 0, Linear(0.5), 2}, {0, 1, Linear(0.5), 2}})
	if gains[0].Candidate != 1 {
		t.Errorf("the zone without a reading should narrow the demand more: %+v", gains)
	}
	zones[1].Found = []Observation{{Predicted: Linear(0.5), Values: []float64{0.5, 0.6}}}
	after := Learn(m, []Circuit{{Zones: zones}}).Circuits[0]
	near(t, "sd after", gains[0].After, after.Demand.SD, 1e-4)
	near(t, "sd before", gains[0].Before, before.Circuits[0].Demand.SD, 0)
	near(t, "local sd after", gains[0].LocalAfter, after.Zones[1].Factor.SD, 1e-4)
}

// A reading that leaves no doubt leaves no wrong decision; one that tells
// nothing, all of it; between them the expectation is that of many draws.
func TestMisjudged(t *testing.T) {
	now, then := Misjudged(0.1, 0.5, 0, 0.4)
	near(t, "now", now, normalBelow(-0.6), 1e-12)
	near(t, "after certainty", then, 0, 1e-12)
	if now, then = Misjudged(0.1, 0.5, 0.5, 0.4); now != then {
		t.Errorf("%g, then %g", now, then)
	}
	rng := rand.New(rand.NewPCG(3, 1))
	const after = 0.2
	moves, sum, n := math.Sqrt(0.25-after*after), 0.0, 200000
	for range n {
		truth := 0.1 + 0.5*rng.NormFloat64()
		// The mean after the reading, given the truth.
		mean := 0.1 + (truth-0.1)*(moves*moves)/0.25 + moves*after/0.5*rng.NormFloat64()
		if (mean < 0.4) != (truth < 0.4) {
			sum++
		}
	}
	_, then = Misjudged(0.1, 0.5, after, 0.4)
	near(t, "expected", then, sum/float64(n), 0.003)
}

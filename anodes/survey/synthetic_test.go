package survey

import (
	"math"
	"math/rand/v2"
	"testing"
)

// truth is a synthetic asset with its true factors, drawn from the model.
type truth struct {
	circuits []Circuit
	demand   []float64   // ln, by circuit
	local    [][]float64 // ln, by circuit and zone
}

// synthetic draws an asset: its mean, circuits and zones, and readings of all
// kinds.
func synthetic(rng *rand.Rand, m Model) truth {
	var t truth
	mean := m.Mean + m.MeanSD*rng.NormFloat64()
	kinds, zones := 1+rng.IntN(3), 0
	for range kinds {
		n := 1 + rng.IntN(3)
		zones += n
		var c Circuit
		demand := mean + m.Scatter*rng.NormFloat64()
		own, average := make([]float64, n), 0.0
		if n > 1 {
			for i := range own {
				own[i] = m.Zone * rng.NormFloat64()
				average += own[i] / float64(n)
			}
		}
		for i := range own {
			own[i] += demand - average
			c.Zones = append(c.Zones, Zone{})
		}
		t.circuits, t.demand, t.local = append(t.circuits, c), append(t.demand, demand), append(t.local, own)
	}
	// How many anodes are looked at decides whether the spread is learned.
	counts, anodes := make([]int, zones), 0
	for i := range counts {
		if counts[i] = rng.IntN(7); rng.IntN(3) == 0 {
			counts[i] = 0
		}
		anodes += counts[i]
	}
	spread := m.Spread
	if anodes >= m.Enough {
		spread *= math.Exp(m.SpreadSD * rng.NormFloat64())
	}
	for i := range t.circuits {
		for k := range t.circuits[i].Zones {
			n := counts[0]
			counts = counts[1:]
			if n == 0 {
				continue
			}
			p := LinearFrom(0.1*rng.Float64(), 0.05+0.5*rng.Float64())
			o := Observation{Predicted: p}
			kind := rng.IntN(3)
			for range n {
				y := p(t.local[i][k]) * math.Exp(spread*rng.NormFloat64())
				o.look(kind, y)
			}
			t.circuits[i].Zones[k].Found = []Observation{o}
		}
	}
	return t
}

// look records one piece as weighed, graded, or gone or not wasted if it is.
func (o *Observation) look(kind int, y float64) {
	const u = 0.85
	switch {
	case kind == 1:
		bounds := []float64{0, 0.25, 0.5, 0.75, math.Inf(1)}
		for i := 1; i < len(bounds); i++ {
			if y < bounds[i] {
				o.add(bounds[i-1], bounds[i], 1)
				return
			}
		}
	case kind == 2 && y < NotWastedBelow:
		o.add(0, NotWastedBelow, 1)
	case y >= u:
		o.add(u, math.Inf(1), 1)
	default:
		o.Values = append(o.Values, y)
	}
}

// Of 1000 assets drawn from the model, the 90 % range holds the truth in about
// 900, for the demand as for the zones.
func TestCalibration(t *testing.T) {
	rng := rand.New(rand.NewPCG(20, 26))
	m := Standard()
	var demands, demandsIn, locals, localsIn, narrowed float64
	for range 1000 {
		s := synthetic(rng, m)
		l := Learn(m, s.circuits)
		for i, c := range l.Circuits {
			demands++
			demandsIn += within(c.Demand, s.demand[i])
			narrowed += c.Demand.SD / 0.53
			for k, z := range c.Zones {
				locals++
				localsIn += within(z.Factor, s.local[i][k])
			}
		}
	}
	t.Logf("demand: %.1f %% of %.0f; zones: %.1f %% of %.0f; sd left %.0f %%", 100*demandsIn/demands, demands, 100*localsIn/locals, locals, 100*narrowed/demands)
	near(t, "share of true demand factors in their 90 % range", demandsIn/demands, 0.90, 0.03)
	near(t, "share of true zone factors in their 90 % range", localsIn/locals, 0.90, 0.03)
	if narrowed/demands > 0.8 {
		t.Error("the readings hardly narrow the factors")
	}
}

func within(p Posterior, x float64) float64 {
	low, high := p.Range()
	if low <= math.Exp(x) && math.Exp(x) <= high {
		return 1
	}
	return 0
}

// fortyZones is an asset of 40 zones, in circuits of so many, with 5 surveys
// of every zone: grades, weighed pieces and counts.
func fortyZones(perCircuit int) []Circuit {
	rng := rand.New(rand.NewPCG(40, 5))
	nodes := Nodes()
	var circuits []Circuit
	for range 40 / perCircuit {
		c := Circuit{Zones: make([]Zone, perCircuit)}
		demand := 0.4 * rng.NormFloat64()
		for k := range c.Zones {
			for survey := range 5 {
				w := make([]float64, len(nodes))
				for i, x := range nodes {
					w[i] = min(0.85, 0.1*float64(survey+1)*math.Exp(0.95*x))
				}
				o := Observation{Predicted: Interpolate(nodes, w, 0.85)}
				kind := rng.IntN(3)
				for range 6 {
					o.look(kind, o.Predicted(demand)*math.Exp(0.25*rng.NormFloat64()))
				}
				c.Zones[k].Found = append(c.Zones[k].Found, o)
			}
		}
		circuits = append(circuits, c)
	}
	return circuits
}

func BenchmarkLearn(b *testing.B) {
	for name, n := range map[string]int{"40 circuits of one zone": 1, "8 circuits of 5 zones": 5, "one circuit of 40 zones": 40} {
		c := fortyZones(n)
		b.Run(name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				Learn(Standard(), c)
			}
		})
	}
}

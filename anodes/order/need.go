package order

import (
	"math"
	"sort"
)

// Need is the distribution of a whole number of pieces: P[k] is the
// probability of From+k of them. The zero Need is none for certain.
type Need struct {
	From int
	P    []float64
}

// Certain is a need of n pieces for certain.
func Certain(n int) Need { return Need{n, []float64{1}} }

// Counted is the need that gives each of the counts with the weight beside it,
// up to a common scale; weights are not below 0.
func Counted(counts []int, weights []float64) Need {
	if len(counts) == 0 {
		return Certain(0)
	}
	low, high, all := counts[0], counts[0], 0.0
	for i, n := range counts {
		low, high = min(low, n), max(high, n)
		all += weights[i]
	}
	n := Need{low, make([]float64, high-low+1)}
	for i, c := range counts {
		n.P[c-low] += weights[i] / all
	}
	return n
}

// whole is the need with its certainty written out.
func (n Need) whole() Need {
	if len(n.P) == 0 {
		return Need{n.From, []float64{1}}
	}
	return n
}

// Plus is the need of two independent needs together, by exact convolution.
func (n Need) Plus(m Need) Need {
	n, m = n.whole(), m.whole()
	if len(m.P) > len(n.P) {
		n, m = m, n
	}
	sum := Need{n.From + m.From, make([]float64, len(n.P)+len(m.P)-1)}
	for k, q := range m.P {
		if q == 0 {
			continue
		}
		for i, p := range n.P {
			sum.P[i+k] += p * q
		}
	}
	return sum
}

// Mix is the need that is one of several with the weight beside each, up to a
// common scale.
func Mix(needs []Need, weights []float64) Need {
	low, high, all := math.MaxInt, math.MinInt, 0.0
	for i, n := range needs {
		low, high = min(low, n.From), max(high, n.From+len(n.whole().P)-1)
		all += weights[i]
	}
	if all <= 0 {
		return Certain(0)
	}
	mix := Need{low, make([]float64, high-low+1)}
	for i, n := range needs {
		for k, p := range n.whole().P {
			mix.P[n.From-low+k] += weights[i] / all * p
		}
	}
	return mix
}

// UpTo returns the probability that at most so many pieces are needed.
func (n Need) UpTo(pieces int) float64 {
	sum := 0.0
	for k, p := range n.whole().P {
		if n.From+k > pieces {
			break
		}
		sum += p
	}
	return min(sum, 1)
}

// Quantile returns the least number of pieces that is enough with this
// probability.
func (n Need) Quantile(probability float64) int {
	n = n.whole()
	sums := make([]float64, len(n.P))
	sum := 0.0
	for k, p := range n.P {
		sum += p
		sums[k] = sum
	}
	k := sort.Search(len(sums), func(k int) bool { return sums[k] >= probability-1e-12 })
	return n.From + min(k, len(n.P)-1)
}

// Mean returns the pieces needed on average.
func (n Need) Mean() float64 {
	sum := 0.0
	for k, p := range n.whole().P {
		sum += p * float64(n.From+k)
	}
	return sum
}

// Few is what it costs to have bought the wrong number of pieces: so much for
// each that is too many, so much for each that is missing.
type Few struct{ TooMany, TooFew float64 }

// Fractile is the probability of having enough up to which one more piece pays
// (the newsvendor's critical fractile); 0.5 where neither costs anything.
func (f Few) Fractile() float64 {
	if f.TooMany+f.TooFew <= 0 {
		return 0.5
	}
	return f.TooFew / (f.TooMany + f.TooFew)
}

// Expected returns what buying so many pieces is expected to cost beside the
// pieces that are needed: those left over, and those missing.
func (f Few) Expected(n Need, pieces int) float64 {
	sum := 0.0
	for k, p := range n.whole().P {
		if d := float64(pieces - n.From - k); d > 0 {
			sum += p * d * f.TooMany
		} else {
			sum -= p * d * f.TooFew
		}
	}
	return sum
}

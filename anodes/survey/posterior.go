package survey

import (
	"math"
	"sort"
)

// Posterior is what is known of a factor: the density of its logarithm on an
// even grid.
type Posterior struct {
	Mean, SD float64 // of the factor's logarithm

	from, step float64
	density    []float64
	below      []float64 // probability below each point
}

// newPosterior takes a density up to its scale.
func newPosterior(from, step float64, density []float64) Posterior {
	p := Posterior{from: from, step: step, density: density, below: make([]float64, len(density))}
	// The trapezoid rule with its first correction by the slopes at both ends.
	slope := func(i int) float64 {
		low, high := max(i-1, 0), min(i+1, len(density)-1)
		return (density[high] - density[low]) / (float64(high-low) * step)
	}
	for i := 1; i < len(density); i++ {
		part := step*(density[i-1]+density[i])/2 + step*step/12*(slope(i-1)-slope(i))
		p.below[i] = p.below[i-1] + max(0, part)
	}
	total := p.below[len(density)-1]
	var sum, first, second float64
	for i := range density {
		p.density[i] /= total
		p.below[i] /= total
		x := p.at(i)
		sum += p.density[i]
		first += p.density[i] * x
		second += p.density[i] * x * x
	}
	p.Mean = first / sum
	p.SD = math.Sqrt(max(0, second/sum-p.Mean*p.Mean))
	return p
}

func (p *Posterior) at(i int) float64 { return p.from + float64(i)*p.step }

// Median returns the factor's median.
func (p Posterior) Median() float64 { return p.Quantile(0.5) }

// Range returns the factor's 90 % range.
func (p Posterior) Range() (low, high float64) { return p.Quantile(0.05), p.Quantile(0.95) }

// Quantile returns the factor that the true one is below with this
// probability.
func (p Posterior) Quantile(probability float64) float64 {
	n := len(p.below)
	i := sort.SearchFloat64s(p.below, probability)
	if i == 0 {
		return math.Exp(p.at(0))
	}
	if i == n {
		return math.Exp(p.at(n - 1))
	}
	low, high := 0.0, 1.0
	for range 50 {
		if mid := (low + high) / 2; p.within(i-1, mid) < probability {
			low = mid
		} else {
			high = mid
		}
	}
	return math.Exp(p.from + (float64(i-1)+low)*p.step)
}

// within returns the probability below the point i+t: a cubic that has the
// density as its slope at both ends.
func (p *Posterior) within(i int, t float64) float64 {
	u := 1 - t
	return u*u*(1+2*t)*p.below[i] + t*t*(1+2*u)*p.below[i+1] + p.step*t*u*(u*p.density[i]-t*p.density[i+1])
}

// Below returns the probability that the factor is at most e^x.
func (p Posterior) Below(x float64) float64 {
	at := (x - p.from) / p.step
	i := int(math.Floor(at))
	switch {
	case at <= 0:
		return 0
	case i >= len(p.below)-1:
		return 1
	}
	return min(max(p.within(i, at-float64(i)), 0), 1)
}

// Spent returns the probability that wastage passes the utilisation factor,
// by the local factor of a zone and the wastage predicted for the date. A
// spread of 0 asks for the set as a whole, the model's spread for any one
// piece of it, and the spread over the root of n for the mean of n pieces.
func (p Posterior) Spent(predicted Predicted, utilisation, spread float64) float64 {
	if spread <= 0 {
		low, high := p.at(0), p.at(len(p.density)-1)
		spent := func(x float64) bool { return predicted(x) >= utilisation*(1-1e-9) }
		if spent(low) {
			return 1
		}
		if !spent(high) {
			return 0
		}
		for range 50 {
			if mid := (low + high) / 2; spent(mid) {
				high = mid
			} else {
				low = mid
			}
		}
		return 1 - p.Below(high)
	}
	var sum, all float64
	for i, d := range p.density {
		if d > 0 {
			all += d
			sum += d * normalBelow(math.Log(max(predicted(p.at(i)), leastWastage)/utilisation)/spread)
		}
	}
	return sum / all
}

// part is one normal distribution of a mixture.
type part struct{ weight, mean, variance float64 }

// mixture is the posterior of a weighted sum of normal distributions.
func mixture(parts []part) Posterior {
	var all, first, second float64
	for _, c := range parts {
		all += c.weight
		first += c.weight * c.mean
		second += c.weight * (c.variance + c.mean*c.mean)
	}
	mean := first / all
	sd := math.Sqrt(max(1e-12, second/all-mean*mean))
	const points, reach = 321, 8.0
	from, step := mean-reach*sd, 2*reach*sd/(points-1)
	density := make([]float64, points)
	for _, c := range parts {
		if c.weight < 1e-12*all {
			continue
		}
		addNormal(density, from, step, c)
	}
	p := newPosterior(from, step, density)
	p.Mean, p.SD = mean, sd
	return p
}

// addNormal adds a normal density to one on a grid.
func addNormal(density []float64, from, step float64, c part) {
	sd := math.Sqrt(c.variance)
	if sd < step/2 {
		sd = step / 2 // narrower than the grid can show
	}
	scale := c.weight / (sd * math.Sqrt(2*math.Pi))
	low := max(0, int((c.mean-7*sd-from)/step))
	high := min(len(density)-1, int((c.mean+7*sd-from)/step)+1)
	for i := low; i <= high; i++ {
		z := (from + float64(i)*step - c.mean) / sd
		density[i] += scale * math.Exp(-z*z/2)
	}
}

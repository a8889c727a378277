package survey

import "math"

// sums gathers one circuit's posterior over the spreads.
type sums struct {
	demand []part      // zones that differ: of the demand factor
	local  [][]float64 // density by zone; [0] alone where the zones are as one
	mixed  []float64   // by zone: E(ln local * ln demand)
	mean   []float64   // by zone: E(ln local)
	square []float64   // by zone: E(ln local squared)
}

func newSums(circuits []*circuit) []sums {
	all := make([]sums, len(circuits))
	for i, c := range circuits {
		n := len(c.zones)
		s := &all[i]
		s.mixed, s.mean, s.square = make([]float64, n), make([]float64, n), make([]float64, n)
		s.local = make([][]float64, max(1, n))
		for k := range s.local {
			s.local[k] = make([]float64, size)
		}
	}
	return all
}

// posterior returns the weights of the nodes of v, which add up to 1.
func (s *state) posterior(c *circuit, means []float64) []float64 {
	w := make([]float64, len(s.common))
	for j, p := range means {
		if p < 1e-12 {
			continue
		}
		scale := p / s.byMean[j]
		for i := range w {
			w[i] += scale * c.prior[j][s.first+i]
		}
	}
	sum := 0.0
	for i := range w {
		w[i] *= s.common[i]
		sum += w[i]
	}
	for i := range w {
		w[i] /= sum
	}
	return w
}

// add adds the circuit at one spread.
func (s *sums) add(c *circuit, at state, means []float64, weight float64) {
	w := at.posterior(c, means)
	if c.own == 0 {
		for i, p := range w {
			s.local[0][at.first+i] += weight * p
		}
		return
	}
	for i, p := range w {
		p *= weight
		if p < 1e-12 {
			continue
		}
		n := at.first + i
		var mean, variance float64
		for k, z := range c.zones {
			m, v := at.local(c, k, n)
			mean += z.share * m
			variance += z.share * z.share * v
		}
		s.demand = append(s.demand, part{p, mean, variance})
		for k, z := range c.zones {
			m, v := at.local(c, k, n)
			s.mixed[k] += p * (z.share*v + m*mean)
			s.mean[k] += p * m
			s.square[k] += p * (v + m*m)
			s.addLocal(c, &at, k, n, p)
		}
	}
}

// local returns mean and variance of a zone's local factor at a node of v.
func (s *state) local(c *circuit, zone, node int) (mean, variance float64) {
	if in := s.inner[zone]; in.sum != nil {
		return in.mean[node], in.variance[node]
	}
	return c.v(node), c.own * c.own
}

// addLocal adds a zone's density at a node of v.
func (s *sums) addLocal(c *circuit, at *state, zone, node int, p float64) {
	d, i := s.local[zone], node*c.every
	l := &at.zones[zone]
	if l.rel == nil { // the prior of e alone
		for k := range d {
			d[k] += p * c.kernel[max(k-i, i-k)]
		}
		return
	}
	p /= at.inner[zone].sum[node]
	for k, rel := range l.rel {
		n := l.first + k
		d[n] += p * rel * c.kernel[max(n-i, i-n)]
	}
}

// factor turns the sums into what is known of the circuit.
func (s *sums) factor(c *circuit, f *Factor) {
	from := c.center - half*step
	if c.own == 0 {
		f.Demand = newPosterior(from, step, s.local[0])
		for k := range f.Zones {
			f.Zones[k].Factor, f.Zones[k].Current = f.Demand, 1
			f.Zones[k].covariance = f.Demand.SD * f.Demand.SD
		}
		return
	}
	f.Demand = mixture(s.demand)
	average := 0.0
	for k := range f.Zones {
		average += s.mean[k] / float64(len(f.Zones))
	}
	for k := range f.Zones {
		z := &f.Zones[k]
		z.Factor = newPosterior(from, step, s.local[k])
		z.Factor.Mean, z.Factor.SD = s.mean[k], math.Sqrt(max(0, s.square[k]-s.mean[k]*s.mean[k]))
		z.Current = math.Exp(s.mean[k] - average)
		z.covariance = s.mixed[k] - s.mean[k]*f.Demand.Mean
	}
}

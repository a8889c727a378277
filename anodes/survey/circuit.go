package survey

import "math"

// circuit is one circuit in the form that is integrated. The local factor of
// a zone is eta = v + e: v is common to the zones, e is the zone's own with
// the model's sd. Both are normal and independent, so that given v every zone
// is a single integral. The demand factor is x = sum(share * eta), and the
// variance of v is such that x has the model's scatter.
type circuit struct {
	zones  []zone
	center float64
	own    float64 // sd of e; 0: the zones are as one
	common float64 // variance of v
	every  int     // grid steps between nodes of v
	kernel []float64
	prior  [][]float64 // density of the nodes of v, by node of the mean
	unread *state      // of a circuit without a reading, whatever the spread
}

type zone struct {
	share float64
	found *evidence
}

// every of the nodes of v where zones differ: then the integrand is smooth.
const everyCommon = 4

func prepare(m Model, from Circuit) *circuit {
	c := &circuit{center: m.Mean, every: 1, common: m.Scatter * m.Scatter}
	sum, squares := 0.0, 0.0
	for _, z := range from.Zones {
		sum += max(0, z.Share)
	}
	for _, z := range from.Zones {
		share := 1 / float64(len(from.Zones))
		if sum > 0 {
			share = max(0, z.Share) / sum
		}
		squares += share * share
		c.zones = append(c.zones, zone{share, gather(z.Found, c.center)})
	}
	if len(c.zones) > 1 && m.Zone > 0 {
		c.own, c.every = m.Zone, everyCommon
		c.common = max(c.common-m.Zone*m.Zone*squares, 0.1*c.common)
		c.kernel = make([]float64, size)
		for i := range c.kernel {
			z := step * float64(i) / c.own
			c.kernel[i] = step * math.Exp(-z*z/2) / (c.own * math.Sqrt(2*math.Pi))
		}
	}
	return c
}

// nodes is how many values of v are looked at.
func (c *circuit) nodes() int { return (size-1)/c.every + 1 }

// v returns a node.
func (c *circuit) v(i int) float64 { return c.center + step*float64(i*c.every-half) }

// priors gives every circuit its prior of the nodes of v for every mean of
// the asset. Equal circuits share theirs.
func priors(circuits []*circuit, means []node) {
	type kind struct {
		common float64
		every  int
	}
	known := map[kind][][]float64{}
	for _, c := range circuits {
		k := kind{c.common, c.every}
		if known[k] == nil {
			known[k] = c.byMean(means)
		}
		c.prior = known[k]
	}
}

func (c *circuit) byMean(means []node) [][]float64 {
	sd := math.Sqrt(c.common)
	scale := step * float64(c.every) / (sd * math.Sqrt(2*math.Pi))
	prior := make([][]float64, len(means))
	for j, m := range means {
		prior[j] = make([]float64, c.nodes())
		for i := range prior[j] {
			z := (c.v(i) - m.x) / sd
			prior[j][i] = scale * math.Exp(-z*z/2)
		}
	}
	return prior
}

// state is a circuit at one spread.
type state struct {
	read   bool
	top    float64      // ln of the scale of all below
	first  int          // first node of v that counts
	common []float64    // likelihood of the nodes of v from there
	byMean []float64    // evidence by node of the mean
	zones  []likelihood // empty for zones without a reading
	inner  []inner
}

// inner is what is left of a zone at each node of v: the evidence and, of the
// local factor's logarithm, mean and variance.
type inner struct{ sum, mean, variance []float64 }

// weigh works a circuit out at one spread.
func (c *circuit) weigh(spread float64) state {
	if c.unread != nil {
		return *c.unread
	}
	s := state{zones: make([]likelihood, len(c.zones)), inner: make([]inner, len(c.zones))}
	together := &evidence{}
	for _, z := range c.zones {
		s.read = s.read || len(z.found.sets) > 0
		together.sets = append(together.sets, z.found.sets...)
	}
	switch {
	case !s.read:
		s.common = make([]float64, c.nodes())
		for i := range s.common {
			s.common[i] = 1
		}
	case c.own == 0:
		l := together.over(spread)
		s.top, s.first, s.common = l.top, l.first, l.rel
	default:
		logs := make([]float64, c.nodes())
		for k, z := range c.zones {
			if len(z.found.sets) == 0 {
				continue
			}
			s.zones[k] = z.found.over(spread)
			s.top += s.zones[k].top
			s.inner[k] = c.within(&s.zones[k])
			for i, v := range s.inner[k].sum {
				logs[i] += math.Log(max(v, 1e-300))
			}
		}
		s.first, s.common = window(logs)
		best := math.Inf(-1)
		for _, l := range s.common {
			best = max(best, l)
		}
		s.top += best
		for i, l := range s.common {
			s.common[i] = math.Exp(l - best)
		}
	}
	s.byMean = make([]float64, len(c.prior))
	for j, p := range c.prior {
		sum := 0.0
		for i, l := range s.common {
			sum += l * p[s.first+i]
		}
		s.byMean[j] = sum
	}
	if !s.read {
		c.unread = &s
	}
	return s
}

// window cuts a list of logarithms to those near its largest.
func window(logs []float64) (int, []float64) {
	top := math.Inf(-1)
	for _, l := range logs {
		top = max(top, l)
	}
	first, last := 0, len(logs)-1
	for logs[first] < top-negligible {
		first++
	}
	for logs[last] < top-negligible {
		last--
	}
	return first, logs[first : last+1]
}

// within integrates a zone's likelihood over its own part e at every node of
// v.
func (c *circuit) within(l *likelihood) inner {
	n := c.nodes()
	in := inner{make([]float64, n), make([]float64, n), make([]float64, n)}
	for i := range n {
		at := i * c.every
		var sum, first, second float64
		for k, rel := range l.rel {
			d := l.first + k - at
			p := rel * c.kernel[max(d, -d)]
			x := float64(d)
			sum += p
			first += p * x
			second += p * x * x
		}
		in.sum[i] = sum
		if sum > 0 {
			m := first / sum
			in.mean[i] = c.v(i) + step*m
			in.variance[i] = step * step * max(0, second/sum-m*m)
		}
	}
	return in
}

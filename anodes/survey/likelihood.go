package survey

import "math"

// The grid of ln(local demand factor): fine about the model's mean, wide
// enough for factors from 0.04 to 25.
const (
	step   = 0.01
	half   = 320
	size   = 2*half + 1
	coarse = 16 // steps between the points that find where the readings lie
	sparse = 4  // steps between the points that are worked out there
)

// negligible is the fall of a logarithm below its largest value from which on
// it is left out.
const negligible = 36

// evidence is what one zone's readings say, ready for any spread.
type evidence struct {
	sets []setEvidence
}

type setEvidence struct {
	predicted  []float64 // ln of it on the grid
	n          float64   // single anodes
	sum, sumSq float64   // of their ln(wastage)
	classes    []logClass
}

type logClass struct{ above, upTo, count float64 }

func gather(found []Observation, center float64) *evidence {
	e := &evidence{}
	for _, o := range found {
		if o.pieces() == 0 || o.Predicted == nil {
			continue
		}
		s := setEvidence{predicted: make([]float64, size)}
		for i := range s.predicted {
			s.predicted[i] = math.Log(max(o.Predicted(center+step*float64(i-half)), leastWastage))
		}
		for _, y := range o.Values {
			l := math.Log(max(y, leastWastage))
			s.n, s.sum, s.sumSq = s.n+1, s.sum+l, s.sumSq+l*l
		}
		for _, c := range o.Classes {
			if c.Count > 0 {
				s.classes = append(s.classes, logClass{math.Log(c.Above), math.Log(c.UpTo), float64(c.Count)})
			}
		}
		e.sets = append(e.sets, s)
	}
	return e
}

// at is the log-likelihood at a point of the grid, up to a constant.
func (e *evidence) at(i int, spread float64) (l float64) {
	for k := range e.sets {
		s := &e.sets[k]
		m := s.predicted[i]
		if s.n > 0 {
			l -= (s.sumSq - 2*m*s.sum + s.n*m*m) / (2 * spread * spread)
		}
		for _, c := range s.classes {
			l += c.count * logBetween((c.above-m)/spread, (c.upTo-m)/spread)
		}
	}
	return l
}

// likelihood is that of one zone on the part of the grid where it counts,
// scaled so that its largest value is 1.
type likelihood struct {
	first int
	rel   []float64
	top   float64 // ln of the scale
}

// over evaluates the readings: first at few points, then about the best, by
// cubic interpolation of the logarithm between every fourth point, which is
// exact for single anodes where the wastage goes with a power of the factor.
func (e *evidence) over(spread float64) likelihood {
	const n = (size-1)/coarse + 1
	var rough [n]float64
	top := math.Inf(-1)
	for i := range rough {
		rough[i] = e.at(i*coarse, spread)
		top = max(top, rough[i])
	}
	first, last := n, -1
	for i, l := range rough {
		if l > top-negligible {
			first, last = min(first, i), max(last, i)
		}
	}
	first, last = max(first-1, 0)*coarse, min(last+1, n-1)*coarse
	l := likelihood{first: first, rel: make([]float64, last-first+1)}
	for i := 0; i < len(l.rel); i += sparse {
		if at := first + i; at%coarse == 0 {
			l.rel[i] = rough[at/coarse]
		} else {
			l.rel[i] = e.at(at, spread)
		}
	}
	fill(l.rel)
	l.top = math.Inf(-1)
	for _, v := range l.rel {
		l.top = max(l.top, v)
	}
	for i := range l.rel {
		l.rel[i] = math.Exp(l.rel[i] - l.top)
	}
	for i := range e.sets {
		l.top -= e.sets[i].n * math.Log(spread)
	}
	return l
}

// fill interpolates what lies between the sparse points.
func fill(y []float64) {
	for i := 0; i+sparse < len(y); i += sparse {
		b, c := y[i], y[i+sparse]
		a, d := 2*b-c, 2*c-b // straight on beyond the ends
		switch inner, outer := i >= sparse, i+2*sparse < len(y); {
		case inner && outer:
			a, d = y[i-sparse], y[i+2*sparse]
		case inner:
			a = y[i-sparse]
			d = a - 3*b + 3*c
		case outer:
			d = y[i+2*sparse]
			a = d - 3*c + 3*b
		}
		for k := 1; k < sparse; k++ {
			t := float64(k) / sparse
			y[i+k] = -t*(t-1)*(t-2)/6*a + (t+1)*(t-1)*(t-2)/2*b - (t+1)*t*(t-2)/2*c + (t+1)*t*(t-1)/6*d
		}
	}
}

// logBetween is ln of the standard normal probability between a and b.
func logBetween(a, b float64) float64 {
	if a > 0 { // in the upper tail nothing is lost in the mirror image
		a, b = -b, -a
	}
	var p float64
	switch {
	case math.IsInf(a, -1):
		p = normalBelow(b)
	case math.IsInf(b, 1):
		p = normalBelow(-a)
	default:
		p = normalBelow(b) - normalBelow(a)
	}
	if p > 1e-280 {
		return math.Log(p)
	}
	return -b*b/2 - math.Log(max(1, -b)*math.Sqrt(2*math.Pi)) // the tail's first term
}

func normalBelow(z float64) float64 { return 0.5 * math.Erfc(-z/math.Sqrt2) }

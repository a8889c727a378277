package forecast

import "math"

// Point is the state of a circuit at one time.
type Point struct {
	Time      float64
	Potential float64
	Wastage   []float64 // by group
	Current   []float64 // A, by group, all pieces together
	Charge    float64   // Ah that the steel has taken since the start
	SteelLoss float64   // mm of bare steel lost since the start
}

// State is where a run begins: see Point. An unknown potential is NaN; the
// steel then begins at its corrosion potential.
type State struct {
	Potential float64
	Charge    float64
	SteelLoss float64
}

// The errors allowed in one step: of a group's wastage, as a share of it from a
// thousandth on, and of the steel lost, in mm. Steps are not cut below shortest.
const (
	tolerance      = 1e-10
	steelTolerance = 1e-8
	shortest       = 1e-12
)

// Run lets the groups waste over the stretches, which follow each other, and
// returns the state at the start and at the end of each.
func Run(curve Curve, groups []Group, stretches []Stretch, from State) []Point {
	n := len(groups)
	r := &run{b: newBalance(curve, groups), groups: groups, n: n, rate: make([]float64, n), k: make([][stages + 1]float64, n+2)}
	memory := make([]float64, 3*(n+2))
	r.y, r.try, r.trial = memory[:n+2], memory[n+2:2*(n+2)], memory[2*(n+2):]
	for j, g := range groups {
		r.y[j] = g.Wastage
		r.b.spent[j] = g.Wastage >= g.Utilisation
		r.rate[j] = HoursPerYear / (g.Count * g.Mass * g.Capacity)
	}
	r.y[n], r.y[n+1] = from.Charge, from.SteelLoss
	r.e = from.Potential
	if math.IsNaN(r.e) {
		r.e = Corrosion
	}
	points := make([]Point, 0, len(stretches)+1)
	results := make([]float64, 2*n*(len(stretches)+1)) // of all points
	note := func(t float64) {
		p := Point{Time: t, Potential: r.e, Wastage: results[:n:n], Current: results[n : 2*n : 2*n], Charge: r.y[n], SteelLoss: r.y[n+1]}
		results = results[2*n:]
		copy(p.Wastage, r.y)
		for j := range groups {
			p.Current[j] = r.b.g[j] * max(0, r.e-groups[j].Potential)
		}
		points = append(points, p)
	}
	for i := range stretches {
		s := &stretches[i]
		r.e = r.slope(s, s.From, r.y, 0)
		if i == 0 {
			note(s.From)
		}
		r.stretch(s)
		note(s.To)
	}
	return points
}

// run integrates y: the wastage of each group, the charge that the steel has
// taken and the steel lost. Between steps the conductances, the potential and
// the first slope are those of y.
type run struct {
	b      *balance
	groups []Group
	rate   []float64 // share of the net mass a year and ampere
	n      int
	y      []float64
	e      float64 // the potential at the last accepted state
	k      [][stages + 1]float64
	try    []float64 // a stage's state
	trial  []float64 // the state after a step
}

// slope writes dy/dt at a state as that of a stage and returns the potential.
func (r *run) slope(s *Stretch, t float64, y []float64, stage int) float64 {
	r.b.conduct(y[:r.n], s.Resistivity)
	demand := s.Demand(t)
	e := r.b.potential(demand, r.e)
	for j := range r.groups {
		r.k[j][stage] = r.rate[j] * r.b.g[j] * max(0, e-r.groups[j].Potential)
	}
	r.k[r.n][stage] = HoursPerYear * demand * r.b.curve.at(e)
	r.k[r.n+1][stage] = 0
	if e > Protective {
		r.k[r.n+1][stage] = SteelLoss(e)
	}
	return e
}

// step tries a step of length h from time t and leaves the state in r.trial.
// It returns the error in units of the tolerance and the potential at the end.
func (r *run) step(s *Stretch, t, h float64) (err, e float64) {
	for i := 1; i < stages; i++ {
		mix := &stageMix[i]
		for m := range r.k {
			k, d := &r.k[m], 0.0
			for l := range i {
				d += mix[l] * k[l]
			}
			r.try[m] = r.y[m] + h*d
		}
		r.slope(s, t+stageTime[i]*h, r.try, i)
	}
	for m := range r.k {
		k, d := &r.k[m], 0.0
		for l, b := range resultMix {
			d += b * k[l]
		}
		r.trial[m] = r.y[m] + h*d
	}
	for m := range r.k {
		allowed := tolerance * max(1e-3, r.y[m])
		switch m {
		case r.n:
			continue // the anodes' charge by another sum
		case r.n + 1:
			allowed = steelTolerance
		}
		k, fifth, third := &r.k[m], 0.0, 0.0
		for l := range stages {
			fifth += errorFifth[l] * k[l]
			third += errorThird[l] * k[l]
		}
		if fifth != 0 {
			fifth *= fifth
			err = max(err, h*fifth/(allowed*math.Sqrt(fifth+0.01*third*third)))
		}
	}
	return err, r.slope(s, t+h, r.trial, stages)
}

// stretch integrates over one stretch, stopping exactly at every event: a
// group spent, and the potential passing a kink of the steel's curve or a
// group's own.
func (r *run) stretch(s *Stretch) {
	t, h := s.From, s.To-s.From
	for t < s.To {
		h = min(h, s.To-t)
		err, e := r.step(s, t, h)
		if math.IsNaN(err) || math.IsNaN(e) {
			panic("forecast: the state is not a number")
		}
		if err > 1 && h > shortest*max(1, math.Abs(t)) {
			h *= max(0.1, 0.9*math.Pow(err, -1./8))
			continue
		}
		if r.over(r.trial, e) > 0 {
			h, e = r.locate(s, t, h, e)
		}
		copy(r.y, r.trial)
		for m := range r.k {
			r.k[m][0] = r.k[m][stages]
		}
		t += h
		if s.To-t < 1e-12*max(1, math.Abs(s.To)) {
			t = s.To
		}
		r.e = e
		if r.spend() {
			r.e = r.slope(s, t, r.y, 0)
		}
		grow := 6.0
		if err > 0 {
			grow = min(grow, 0.9*math.Pow(err, -1./8))
		}
		h *= max(0.2, grow)
	}
}

// over is by how much the first event lies behind a state, positive once one
// is passed: a wastage above its utilisation factor, or a kink of the balance
// on the other side of the potential than before.
func (r *run) over(y []float64, e float64) float64 {
	most := math.Inf(-1)
	for j := range r.groups {
		if !r.b.spent[j] {
			most = max(most, y[j]-r.groups[j].Utilisation)
		}
	}
	const near = 1e-12
	for _, kink := range r.b.events {
		switch {
		case r.e > kink+near:
			most = max(most, kink-near-e)
		case r.e < kink-near:
			most = max(most, e-kink-near)
		}
	}
	return most
}

// locate finds the step from t, no longer than h, that ends at the first
// event, and leaves its state in r.trial. e is the potential after h.
func (r *run) locate(s *Stretch, t, h, e float64) (float64, float64) {
	const aim = 1e-13 // how far behind the event a state may lie
	low, high := 0.0, h
	fLow, fHigh := r.over(r.y, r.e)-aim/2, r.over(r.trial, e)-aim/2
	last, side := h, 0
	for n := 0; n < 200 && high-low > 1e-15*max(1, math.Abs(t)); n++ {
		mid := (low + high) / 2
		if x := high - fHigh*(high-low)/(fHigh-fLow); (n < 8 || n%2 == 0) && x > low && x < high {
			mid = x // the secant, and the middle too where that creeps
		}
		_, e = r.step(s, t, mid)
		last = mid
		f := r.over(r.trial, e) - aim/2
		if f <= -aim/2 {
			if low, fLow = mid, f; side < 0 {
				fHigh /= 2
			}
			side = -1
			continue
		}
		if high, fHigh = mid, f; f <= aim/2 {
			break
		}
		if side > 0 {
			fLow /= 2
		}
		side = 1
	}
	if last != high {
		_, e = r.step(s, t, high)
	}
	return high, e
}

// spend marks the groups that have reached their utilisation factor.
func (r *run) spend() (any bool) {
	for j, g := range r.groups {
		if !r.b.spent[j] && r.y[j] >= g.Utilisation-1e-12 {
			r.b.spent[j], any = true, true
			r.y[j] = min(r.y[j], g.Utilisation)
		}
	}
	return any
}

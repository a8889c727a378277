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

// tolerance is the error allowed in the wastage of a group in one step.
const tolerance = 1e-10

// Run lets the groups waste over the stretches, which follow each other, and
// returns the state at the start and at the end of each.
func Run(curve Curve, groups []Group, stretches []Stretch, from State) []Point {
	r := &run{b: newBalance(curve, groups), groups: groups, n: len(groups)}
	r.y = make([]float64, r.n+2)
	for j, g := range groups {
		r.y[j] = g.Wastage
		r.b.spent[j] = g.Wastage >= g.Utilisation
	}
	r.y[r.n], r.y[r.n+1] = from.Charge, from.SteelLoss
	r.e = from.Potential
	if math.IsNaN(r.e) {
		r.e = Corrosion
	}
	for k := range r.k {
		r.k[k] = make([]float64, r.n+2)
	}
	r.try, r.trial = make([]float64, r.n+2), make([]float64, r.n+2)
	var points []Point
	for i := range stretches {
		s := &stretches[i]
		if i == 0 {
			points = append(points, r.point(s, s.From))
		}
		r.stretch(s)
		points = append(points, r.point(s, s.To))
	}
	return points
}

// run integrates y: the wastage of each group, the charge that the steel has
// taken and the steel lost.
type run struct {
	b      *balance
	groups []Group
	n      int
	y      []float64
	e      float64 // the potential at the last accepted state
	k      [7][]float64
	try    []float64 // a stage's state
	trial  []float64 // the state after a step
}

func (r *run) point(s *Stretch, t float64) Point {
	r.b.conduct(r.y[:r.n], s.Resistivity)
	e := r.b.potential(s.Demand(t), r.e)
	p := Point{Time: t, Potential: e, Wastage: append([]float64(nil), r.y[:r.n]...), Charge: r.y[r.n], SteelLoss: r.y[r.n+1]}
	for j := range r.groups {
		p.Current = append(p.Current, r.b.g[j]*max(0, e-r.groups[j].Potential))
	}
	return p
}

// slope writes dy/dt at a state and returns the potential.
func (r *run) slope(s *Stretch, t float64, y, dy []float64) float64 {
	r.b.conduct(y[:r.n], s.Resistivity)
	demand := s.Demand(t)
	e := r.b.potential(demand, r.e)
	for j := range r.groups {
		g := &r.groups[j]
		current := r.b.g[j] * max(0, e-g.Potential)
		dy[j] = HoursPerYear * current / (g.Count * g.Mass * g.Capacity)
	}
	dy[r.n] = HoursPerYear * demand * r.b.curve.at(e)
	dy[r.n+1] = 0
	if e > Protective {
		dy[r.n+1] = SteelLoss(e)
	}
	return e
}

// Coefficients of the fifth-order Runge-Kutta pair of Dormand and Prince
// (Journal of Computational and Applied Mathematics 6, 1980, 19-26).
var (
	stageTime = [7]float64{0, 1. / 5, 3. / 10, 4. / 5, 8. / 9, 1, 1}
	stageMix  = [7][6]float64{
		{},
		{1. / 5},
		{3. / 40, 9. / 40},
		{44. / 45, -56. / 15, 32. / 9},
		{19372. / 6561, -25360. / 2187, 64448. / 6561, -212. / 729},
		{9017. / 3168, -355. / 33, 46732. / 5247, 49. / 176, -5103. / 18656},
		{35. / 384, 0, 500. / 1113, 125. / 192, -2187. / 6784, 11. / 84},
	}
	errorMix = [7]float64{71. / 57600, 0, -71. / 16695, 71. / 1920, -17253. / 339200, 22. / 525, -1. / 40}
)

// step tries a step of length h from time t and leaves the state in r.trial.
// It returns the error in units of the tolerance and the potential at the end.
func (r *run) step(s *Stretch, t, h float64) (err, e float64) {
	r.slope(s, t, r.y, r.k[0])
	for i := 1; i < 7; i++ {
		for m := range r.y {
			d := 0.0
			for l := range i {
				d += stageMix[i][l] * r.k[l][m]
			}
			r.try[m] = r.y[m] + h*d
		}
		e = r.slope(s, t+stageTime[i]*h, r.try, r.k[i])
	}
	copy(r.trial, r.try) // the last stage is the fifth-order result
	for j := range r.n {
		d := 0.0
		for i, c := range errorMix {
			d += c * r.k[i][j]
		}
		err = max(err, math.Abs(h*d)/(tolerance*max(1e-3, r.y[j])))
	}
	return err, e
}

// stretch integrates over one stretch, stopping exactly at every event: a
// group spent, and the steel's potential passing the kink of its curve.
func (r *run) stretch(s *Stretch) {
	t, h := s.From, s.To-s.From
	r.e = r.slope(s, t, r.y, r.k[0])
	for rejected := 0; t < s.To && rejected < 200; {
		h = min(h, s.To-t)
		before := r.e
		err, e := r.step(s, t, h)
		if err > 1 || math.IsNaN(err) {
			h *= max(0.1, 0.9*math.Pow(err, -0.2))
			if math.IsNaN(h) {
				panic("forecast: the state is not a number")
			}
			rejected++
			continue
		}
		if over := r.over(r.trial, before, e); over > 0 {
			h, e = r.locate(s, t, h, before)
		}
		rejected = 0
		copy(r.y, r.trial)
		t += h
		if s.To-t < 1e-12*max(1, math.Abs(s.To)) {
			t = s.To
		}
		r.e = e
		if r.spend() {
			r.e = r.slope(s, t, r.y, r.k[0])
		}
		grow := 5.0
		if err > 0 {
			grow = min(5, 0.9*math.Pow(err, -0.2))
		}
		h *= max(0.2, grow)
	}
}

// over is by how much the first event lies behind a state, positive once one
// is passed: a wastage above its utilisation factor, or the protective
// potential on the other side than before.
func (r *run) over(y []float64, before, e float64) float64 {
	most := math.Inf(-1)
	for j, g := range r.groups {
		if !r.b.spent[j] {
			most = max(most, y[j]-g.Utilisation)
		}
	}
	const near = 1e-12
	switch {
	case before > Protective+near:
		most = max(most, Protective-near-e)
	case before < Protective-near:
		most = max(most, e-Protective-near)
	}
	return most
}

// locate finds the step from t, shorter than h, that ends at the first event,
// and leaves its state in r.trial.
func (r *run) locate(s *Stretch, t, h, before float64) (float64, float64) {
	low, high := 0.0, h
	for range 100 {
		mid := (low + high) / 2
		_, e := r.step(s, t, mid)
		if r.over(r.trial, before, e) > 0 {
			high = mid
		} else {
			low = mid
		}
		if high-low <= 1e-14*max(1, math.Abs(t)) {
			break
		}
	}
	_, e := r.step(s, t, high)
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

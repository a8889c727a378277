package survey

import "math"

// Learned is what the readings of one asset teach.
type Learned struct {
	Model Model // what was believed before
	// Mean and MeanSD describe the mean of ln(demand factor) over the asset's
	// circuits.
	Mean, MeanSD float64
	Spread       float64 // anode to anode, median
	Anodes       int     // how many were looked at
	Circuits     []Factor
}

// Factor is what is known of one circuit.
type Factor struct {
	Demand Posterior // the demand factor
	Zones  []Local
	Anodes int // how many were looked at
}

// Local is what is known of one zone of a circuit.
type Local struct {
	// Factor is the demand factor times what the zone's anodes give more than
	// their share: the argument of the zone's predicted wastage.
	Factor Posterior
	// Current is the zone's current factor lambda, its median; the geometric
	// mean over a circuit's zones is 1.
	Current float64
	Anodes  int // how many were looked at

	covariance float64 // of the logarithms of Factor and the circuit's Demand
}

// Next returns the model for the next ship of a fleet, or for the next time:
// what is now known of the asset's mean is believed before any reading.
func (l *Learned) Next() Model {
	m := l.Model
	m.Mean, m.MeanSD = l.Mean, l.MeanSD
	return m
}

// Learn infers the factors of an asset's circuits together. Circuits without
// readings learn from the others by the asset's mean.
func Learn(m Model, circuits []Circuit) *Learned {
	all := make([]*circuit, len(circuits))
	out := &Learned{Model: m, Circuits: make([]Factor, len(circuits))}
	for i, c := range circuits {
		all[i] = prepare(m, c)
		f := &out.Circuits[i]
		f.Zones = make([]Local, len(c.Zones))
		for k, z := range c.Zones {
			for _, o := range z.Found {
				f.Zones[k].Anodes += o.pieces()
			}
			f.Anodes += f.Zones[k].Anodes
		}
		out.Anodes += f.Anodes
	}
	a := &asset{model: m, means: meanNodes(m), circuits: all}
	priors(all, a.means)
	var mean, meanSq, logSpread float64
	s := newSums(all)
	for _, n := range a.spreads(out.Anodes) {
		w := a.weigh(n.spread)
		for j, p := range w.means {
			mean += n.weight * p * a.means[j].x
			meanSq += n.weight * p * a.means[j].x * a.means[j].x
		}
		logSpread += n.weight * math.Log(n.spread)
		for i, c := range all {
			s[i].add(c, w.states[i], w.means, n.weight)
		}
	}
	out.Mean, out.MeanSD = mean, math.Sqrt(max(0, meanSq-mean*mean))
	out.Spread = math.Exp(logSpread)
	for i, c := range all {
		s[i].factor(c, &out.Circuits[i])
	}
	return out
}

// asset is all circuits, which share their mean and the spread.
type asset struct {
	model    Model
	means    []node
	circuits []*circuit
}

// node is a point of a quadrature with its prior weight.
type node struct{ x, weight float64 }

// meanNodes is the grid of the asset's mean.
func meanNodes(m Model) []node {
	if m.MeanSD <= 0 {
		return []node{{m.Mean, 1}}
	}
	const reach, n = 5.0, 61
	nodes := make([]node, n)
	sum := 0.0
	for i := range nodes {
		z := reach * (2*float64(i)/(n-1) - 1)
		nodes[i] = node{m.Mean + z*m.MeanSD, math.Exp(-z * z / 2)}
		sum += nodes[i].weight
	}
	for i := range nodes {
		nodes[i].weight /= sum
	}
	return nodes
}

// weighed is the asset at one spread.
type weighed struct {
	log    float64   // ln of the evidence
	means  []float64 // posterior weights of the nodes of the mean
	states []state   // of each circuit
}

// weigh brings the circuits together at one spread.
func (a *asset) weigh(spread float64) weighed {
	w := weighed{means: make([]float64, len(a.means)), states: make([]state, len(a.circuits))}
	logs := make([]float64, len(a.means))
	for i, c := range a.circuits {
		w.states[i] = c.weigh(spread)
		if s := &w.states[i]; s.read {
			w.log += s.top
			for j, v := range s.byMean {
				logs[j] += math.Log(max(v, 1e-300))
			}
		}
	}
	top, sum := math.Inf(-1), 0.0
	for _, l := range logs {
		top = max(top, l)
	}
	for j, l := range logs {
		w.means[j] = a.means[j].weight * math.Exp(l-top)
		sum += w.means[j]
	}
	for j := range w.means {
		w.means[j] /= sum
	}
	w.log += top + math.Log(sum)
	return w
}

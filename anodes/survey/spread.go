package survey

import "math"

// spreadNode is one spread from anode to anode with its posterior weight.
type spreadNode struct{ spread, weight float64 }

// hermite are the nodes and weights of Gauss-Hermite quadrature for a standard
// normal distribution, five points.
var hermite = [5]node{
	{-2.856970013872806, 0.01125741132772069},
	{-1.355626179974266, 0.2220759220056126},
	{0, 0.5333333333333333},
	{1.355626179974266, 0.2220759220056126},
	{2.856970013872806, 0.01125741132772069},
}

// spreads returns the spreads to average over: the model's own where too few
// anodes were looked at, else five about the most likely one.
func (a *asset) spreads(anodes int) []spreadNode {
	m := a.model
	if m.SpreadSD <= 0 || anodes < m.Enough {
		return []spreadNode{{m.Spread, 1}}
	}
	start := math.Log(m.Spread)
	known := map[float64]float64{}
	log := func(t float64) float64 {
		if v, ok := known[t]; ok {
			return v
		}
		z := (t - start) / m.SpreadSD
		known[t] = a.weigh(math.Exp(t)).log - z*z/2
		return known[t]
	}
	// The top of the parabola through three points, a few times over.
	mode, sd := start, m.SpreadSD
	for d := 0.15; ; {
		low, mid, high := log(mode-d), log(mode), log(mode+d)
		curve := (low - 2*mid + high) / (d * d)
		slope := (high - low) / (2 * d)
		move := math.Copysign(0.5, slope)
		if curve < 0 {
			move = min(max(-slope/curve, -0.5), 0.5)
			sd = math.Sqrt(-1 / curve)
		}
		if math.Abs(move) < 0.25*sd || math.Abs(mode+move-start) > 5*m.SpreadSD {
			mode += move
			break
		}
		mode += move
	}
	nodes := make([]spreadNode, len(hermite))
	top := math.Inf(-1)
	logs := make([]float64, len(hermite))
	for i, h := range hermite {
		t := mode + sd*h.x
		nodes[i].spread = math.Exp(t)
		logs[i] = log(t) + h.x*h.x/2
		top = max(top, logs[i])
	}
	sum := 0.0
	for i, h := range hermite {
		nodes[i].weight = h.weight * math.Exp(logs[i]-top)
		sum += nodes[i].weight
	}
	for i := range nodes {
		nodes[i].weight /= sum
	}
	return nodes
}

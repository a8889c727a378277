package plan

import (
	"math"

	"anodewright/anodes/order"
	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// WithStaging has the staged purchase computed with the outcome; it is then
// also in the JSON.
func WithStaging() Option { return func(o *options) { o.staging = true } }

// grain is how finely the demand factors are cut, in parts of equal
// probability: of a circuit's factor, and of each zone's within it.
type grain struct{ circuit, zone int }

// The grain for sets sized by the code, and for those that a forecast sizes,
// which takes long.
var (
	fine   = grain{101, 7}
	coarse = grain{41, 3}
)

// Stage returns, by docking and pattern, how many pieces the zones may ask for
// and how many of them to buy now: at each demand factor that the true one may
// be, what the zones' planned actions would ask for. Within a circuit the
// zones share their factor, and the needs of its zones are convolved at each
// value of it; circuits are independent. Dockings before today are left out.
func Stage(o *Outcome) []order.Staged {
	a := o.Asset
	all := asks{}
	for _, zones := range o.stagedCircuits() {
		all.plus(o.needs(zones))
	}
	planned := map[bought]int{}
	for _, l := range o.Schedule {
		if l.Action != renewal.Keep {
			planned[bought{l.Docking, l.Pattern}] += l.Count
		}
	}
	stock := order.InStock(a)
	var staged []order.Staged
	for k, d := range a.Ahead() {
		for i := range a.Patterns {
			key := bought{k, &a.Patterns[i]}
			n, may := all[key]
			if !may || d.Date < o.Today || planned[key] == 0 && n.need.Quantile(order.EnoughOf) == 0 {
				continue
			}
			s := order.Stage(a, d.Date, key.pattern, planned[key], n.need, stock)
			s.Worn = n.worn
			staged = append(staged, s)
		}
	}
	return staged
}

// bought is a pattern for a docking ahead.
type bought struct {
	docking int
	pattern *hull.Pattern
}

// stagedCircuits are the zones that the plan does something with, by circuit.
func (o *Outcome) stagedCircuits() [][]int {
	var circuits [][]int
	at := map[string]int{}
	for i := range o.Asset.Zones {
		z := &o.Asset.Zones[i]
		if !own(z) {
			continue
		}
		name, in := o.circuitOf(z)
		c, known := at[name]
		if !in || !known {
			c = len(circuits)
			circuits = append(circuits, nil)
			if in {
				at[name] = c
			}
		}
		circuits[c] = append(circuits[c], i)
	}
	return circuits
}

// ask is what may be needed of one pattern at one docking, and the probability
// that some set proves too worn to be kept or added to.
type ask struct {
	need order.Need
	worn float64
}

// asks are the asks of zones by pattern and docking.
type asks map[bought]ask

// plus adds asks that are independent of these.
func (a asks) plus(b asks) {
	for key, x := range b {
		y := a[key]
		a[key] = ask{y.need.Plus(x.need), 1 - (1-y.worn)*(1-x.worn)}
	}
}

// needs is what the zones of one circuit may ask for.
func (o *Outcome) needs(zones []int) asks {
	size := fine
	if o.Asset.Basis.Sizing == hull.ForecastSizing {
		size = coarse
	}
	p := o.problem()
	askers := make([]*renewal.Asker, len(zones))
	for k, zone := range zones {
		askers[k] = p.Asker(zone, o.Schedule)
	}
	nodes := make([]asks, size.circuit)
	for n := range nodes {
		nodes[n] = asks{}
		share := (float64(n) + 0.5) / float64(size.circuit)
		for k, zone := range zones {
			if askers[k] != nil {
				nodes[n].plus(o.zoneAsks(askers[k], zone, o.factorsAt(zone, share, size.zone)))
			}
		}
	}
	return mixNodes(nodes)
}

// mixNodes are the asks of nodes of equal probability. What a node does not
// name it does not need.
func mixNodes(nodes []asks) asks {
	all := asks{}
	for _, node := range nodes {
		for key := range node {
			all[key] = ask{}
		}
	}
	for key := range all {
		needs, weights, worn := make([]order.Need, len(nodes)), make([]float64, len(nodes)), 0.0
		for n, node := range nodes {
			needs[n], weights[n] = node[key].need, 1
			worn += node[key].worn / float64(len(nodes))
		}
		all[key] = ask{order.Mix(needs, weights), worn}
	}
	return all
}

// zoneAsks is what a zone asks for, where its demand factor is one of several
// that are equally likely.
func (o *Outcome) zoneAsks(a *renewal.Asker, zone int, factors []float64) asks {
	counts, worn := map[bought][]int{}, map[bought]float64{}
	weights := make([]float64, len(factors))
	for k, factor := range factors {
		weights[k] = 1
		for _, x := range a.At(factor, o.keepsAt(zone, factor)) {
			key := bought{x.Docking, x.Pattern}
			if counts[key] == nil {
				counts[key] = make([]int, len(factors))
			}
			counts[key][k] += x.Count
			if x.Whole {
				worn[key] += 1 / float64(len(factors))
			}
		}
	}
	all := asks{}
	for key, c := range counts {
		all[key] = ask{order.Counted(c, weights), worn[key]}
	}
	return all
}

// factorsAt are the demand factors of a zone, equally likely, where its
// circuit's is the one that the true one is below with a probability. Without
// readings, or where the plan does not use them, the zones of a circuit share
// one factor with the published scatter.
func (o *Outcome) factorsAt(zone int, below float64, parts int) []float64 {
	if !o.Learns || o.learned == nil {
		return []float64{priorFactor(below).Used}
	}
	p, circuit, place := o.learned.posterior(o.Asset, zone)
	if circuit < 0 || place < 0 {
		return []float64{p.Quantile(below)}
	}
	c := &o.learned.learned.Circuits[circuit]
	mean, sd := c.Zones[place].Given(c.Demand, math.Log(c.Demand.Quantile(below)))
	if sd == 0 {
		return []float64{math.Exp(mean)}
	}
	factors := make([]float64, parts)
	for k := range factors {
		factors[k] = math.Exp(mean + sd*normalQuantile((float64(k)+0.5)/float64(parts)))
	}
	return factors
}

// keepsAt judges sets by the forecast at another demand factor of a zone, nil
// where the basis sizes by the code.
func (o *Outcome) keepsAt(zone int, factor float64) renewal.Keeps {
	if o.Asset.Basis.Sizing != hull.ForecastSizing {
		return nil
	}
	at := o.bare(1)
	at.Zones[zone].Factor.Used = factor
	return at.keeps()
}

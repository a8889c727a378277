package plan

import (
	"math"
	"runtime"
	"slices"
	"sync"
	"sync/atomic"

	"anodewright/anodes/renewal"
	"anodewright/anodes/survey"
	"anodewright/hull"
)

// risk finds for every zone and interval the 90 % range of what its anodes have
// wasted at the interval's end, by the demand factor and the coatings that the
// forecast is made with; and the probability that all are spent then, under the
// plan and before anything is done there, by the factor that the readings
// teach, whether the plan uses it or not.
func (o *Outcome) risk() {
	nodes := survey.Nodes()
	wastage := o.endWastage(o.bySurveys(), nodes)
	used, by := wastage, o.learned
	if !o.Learns {
		by = nil
		if o.bySurveys() != o.Asset {
			used = o.endWastage(o.Asset, nodes)
		}
	}
	for i := range o.Zones {
		ranged, _, _ := by.posterior(o.Asset, i)
		low, high := ranged.Range()
		p, _, _ := o.learned.posterior(o.Asset, i)
		before := 0.0
		for k := range o.Intervals {
			iv := &o.Zones[i].Intervals[k]
			if k > 0 {
				if l, ok := o.Action(i, k-1); ok && l.Action != renewal.Keep {
					before = 0
				}
			}
			if len(iv.Fitted) == 0 {
				continue
			}
			all := 1.0
			painted := !slices.ContainsFunc(iv.Fitted, func(g Group) bool { return !g.Painted })
			for n := range iv.Fitted {
				g := &iv.Fitted[n]
				at := survey.Interpolate(nodes, used[i][k][n], g.Pattern.Utilisation)
				// Zones of a circuit and factors beyond the nodes are only nearly so:
				// the forecast itself is never out of the range, nor does the range
				// begin below what was there.
				g.Low = min(max(at(math.Log(low)), o.stated(i, g)), g.Wastage)
				g.High = max(min(at(math.Log(high)), g.Pattern.Utilisation), g.Wastage)
				if g.Painted && !painted || o.stated(i, g) >= g.Pattern.Utilisation {
					continue // it is not what holds the zone, or is spent whatever the factor
				}
				by := survey.Interpolate(nodes, wastage[i][k][n], g.Pattern.Utilisation)
				all = min(all, p.Spent(by, g.Pattern.Utilisation, 0))
			}
			before = max(before, all) // what is spent stays so
			spent := before
			iv.SpentProbability = &spent
		}
	}
}

// stated is the wastage of a group at the last docking, 0 for what the plan
// puts on.
func (o *Outcome) stated(zone int, g *Group) float64 {
	if g.Set < 0 {
		return 0
	}
	return o.Asset.Zones[zone].Fitted[g.Set].Wastage
}

// endWastage returns, by zone, interval, group and node of the demand factor's
// logarithm, what the anodes have wasted at the interval's end under the plan,
// with the coatings of a variant of the asset.
func (o *Outcome) endWastage(steel *hull.Asset, nodes []float64) [][][][]float64 {
	wastage := make([][][][]float64, len(o.Zones))
	for i := range wastage {
		wastage[i] = make([][][]float64, len(o.Intervals))
		for k := range wastage[i] {
			wastage[i][k] = make([][]float64, len(o.Zones[i].Intervals[k].Fitted))
			for n := range wastage[i][k] {
				wastage[i][k][n] = make([]float64, len(nodes))
			}
		}
	}
	// Each node is a forecast of its own; the processors share them.
	var next atomic.Int64
	var all sync.WaitGroup
	for range min(runtime.GOMAXPROCS(0), len(nodes)) {
		all.Go(func() {
			course := hull.NewCourse(steel)
			for node := int(next.Add(1) - 1); node < len(nodes); node = int(next.Add(1) - 1) {
				at := o.bare(math.Exp(nodes[node]))
				at.Schedule = o.Schedule
				for _, c := range at.circuits() {
					for k := range o.Intervals {
						at.run(c, course, k, nil)
						for _, i := range c.zones {
							for n, g := range c.there(i, o.Intervals[k].To) {
								wastage[i][k][n][node] = g.Wastage
							}
						}
					}
				}
			}
		})
	}
	all.Wait()
	return wastage
}

package plan

import (
	"math"
	"slices"

	"anodewright/anodes/renewal"
	"anodewright/anodes/survey"
	"anodewright/hull"
)

// risk finds for every zone and interval the 90 % range of what its anodes have
// wasted at the interval's end, and the probability that all are spent then, under the plan and before anything
// is done there: by the factor that the readings teach, or by that of the
// design figures where there are none, whichever of them the plan uses.
func (o *Outcome) risk() {
	nodes := survey.Nodes()
	wastage := make([][][][]float64, len(o.Zones)) // by zone, interval, group, node
	for i := range wastage {
		wastage[i] = make([][][]float64, len(o.Intervals))
		for k := range wastage[i] {
			wastage[i][k] = make([][]float64, len(o.Zones[i].Intervals[k].Fitted))
		}
	}
	course := hull.NewCourse(o.bySurveys())
	for _, x := range nodes {
		at := o.bare(math.Exp(x))
		at.Schedule = o.Schedule
		for _, c := range at.circuits() {
			for k := range o.Intervals {
				at.run(c, course, k, nil)
				for _, i := range c.zones {
					for n, g := range c.there(i, o.Intervals[k].To) {
						wastage[i][k][n] = append(wastage[i][k][n], g.Wastage)
					}
				}
			}
		}
	}
	for i := range o.Zones {
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
				by := survey.Interpolate(nodes, wastage[i][k][n], g.Pattern.Utilisation)
				low, high := p.Range()
				g.Low, g.High = min(by(math.Log(low)), g.Pattern.Utilisation), min(by(math.Log(high)), g.Pattern.Utilisation)
				if g.Painted && !painted {
					continue // it is not what holds the zone
				}
				all = min(all, p.Spent(by, g.Pattern.Utilisation, 0))
			}
			before = max(before, all) // what is spent stays so
			spent := before
			iv.SpentProbability = &spent
		}
	}
}

package plan

import (
	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// LP returns the outcome's choice of sets as a mixed-integer problem in CPLEX
// LP text: see renewal.LP.
func (o *Outcome) LP() []byte {
	demand := make([][]hull.Current, len(o.Zones))
	factors := make([]float64, len(o.Zones))
	for i, z := range o.Zones {
		for _, iv := range z.Intervals {
			demand[i] = append(demand[i], iv.Total)
		}
		factors[i] = z.Factor.Used
	}
	return renewal.LP(o.Asset, demand, factors, o.keeps())
}

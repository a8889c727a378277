package survey

import (
	"math"
	"testing"
)

// A zone alone in its circuit has the circuit's factor. Of several, the parts
// given the circuit's factor make up the zone's own mean and variance, and the
// zones' shares of them the circuit's factor.
func TestGivenTheCircuitsFactor(t *testing.T) {
	alone := Learn(Standard(), []Circuit{{Zones: []Zone{{Found: []Observation{{Predicted: Linear(0.3), Values: []float64{0.4, 0.5}}}}}}}).Circuits[0]
	for _, x := range []float64{-1, 0, 0.7} {
		mean, sd := alone.Zones[0].Given(alone.Demand, x)
		near(t, "a zone alone", mean, x, 1e-6)
		near(t, "its spread", sd, 0, 1e-6)
	}
	stern := Observation{Predicted: Linear(0.3), Values: []float64{0.5, 0.55, 0.6}}
	side := Observation{Predicted: Linear(0.2), Classes: []Class{{0, 0.25, 3}, {0.25, 0.5, 1}}}
	f := Learn(Standard(), []Circuit{{Zones: []Zone{{0.6, []Observation{stern}}, {0.3, []Observation{side}}, {0.1, nil}}}}).Circuits[0]
	for k, z := range f.Zones {
		at, sd := z.Given(f.Demand, f.Demand.Mean)
		above, _ := z.Given(f.Demand, f.Demand.Mean+1)
		near(t, "mean", at, z.Factor.Mean, 1e-9)
		slope := above - at
		near(t, "variance", slope*slope*f.Demand.SD*f.Demand.SD+sd*sd, z.Factor.SD*z.Factor.SD, 1e-9)
		if k == 2 && !(sd > f.Zones[0].Factor.SD) {
			t.Errorf("a zone without a reading has spread %g", sd)
		}
	}
	weighed := 0.0
	for k, share := range []float64{0.6, 0.3, 0.1} {
		at, _ := f.Zones[k].Given(f.Demand, f.Demand.Mean+1)
		weighed += share * (at - f.Zones[k].Factor.Mean)
	}
	near(t, "the zones together follow the circuit", weighed, 1, 1e-3)
	if math.IsNaN(weighed) {
		t.Error("no figure")
	}
}

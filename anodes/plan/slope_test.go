package plan_test

import (
	"math"
	"testing"

	"anodewright/anodes"
	"anodewright/anodes/plan"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// The slope view says the same as the sizing by the code: the potential is at
// -0.80 V where output meets demand, and the product of resistance and mass
// compares as the charges do.
func TestSlopeAgreesWithCharges(t *testing.T) {
	seen := 0
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			t.Fatal(err)
		}
		o := plan.Compute(a, hull.NewDate(2026, 12, 1))
		for i := range o.Zones {
			z := o.Zones[i].Zone
			views := o.Slope(i)
			if _, own := z.Hold().(hull.ByAnodes); !own {
				if views != nil {
					t.Errorf("%s, %s: a slope view without anodes", a.Name, z.ID)
				}
				continue
			}
			if len(views) != len(o.Intervals) {
				t.Fatalf("%s, %s: %d views", a.Name, z.ID, len(views))
			}
			if len(z.Fitted) != 1 || z.Fitted[0].Wastage > 0 {
				continue
			}
			seen++
			f, v := z.Fitted[0], views[0]
			p, _ := a.Pattern(f.Pattern)
			medium, rho := a.Medium(z), a.Resistivity(z, v.From)
			current := o.Zones[i].Intervals[0].Total.Mean * o.Zones[i].Factor.Median
			output := float64(f.Count) * anodes.OutputNew(p, medium, rho, z.Shielding)
			if driven := current / output * (anodes.Protective() - anodes.MetalOf(p, medium).Potential); math.Abs(v.Start.Potential-(v.Start.Anode+driven)) > 1e-9 {
				t.Errorf("%s, %s: %g V, by output %g V", a.Name, z.ID, v.Start.Potential, v.Start.Anode+driven)
			}
			used := current * v.Hours() / (float64(f.Count) * p.NetMass * p.Utilisation * anodes.MetalOf(p, medium).Capacity)
			if math.Abs(v.Needs/v.Has-used) > 1e-9 {
				t.Errorf("%s, %s: Ra w needs %g of what it has, charge %g", a.Name, z.ID, v.Needs/v.Has, used)
			}
			if !(v.End.S > v.Start.S) {
				t.Errorf("%s, %s: S falls from %g to %g while paint and anodes wear", a.Name, z.ID, v.Start.S, v.End.S)
			}
		}
	}
	if seen == 0 {
		t.Error("no zone of the demo fleet has one new set")
	}
}

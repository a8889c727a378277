package protection

import (
	"strings"
	"testing"

	"anodewright/hull"
)

// What wears on a platinised anode is its platinum: the mass of the whole anode
// makes no life of thousands of years.
func TestPlatinumAloneWears(t *testing.T) {
	a := impressed(t, hull.Protection{Anode: "platinised", AnodeMass: 0.004, AnodeRating: 20})
	r := of(t, a, 1, 0).Impressed
	near(t, "by mass", *r.ByMass, 20e-6*r.Mean*r.Years/0.004, 1e-9)
	for mass, want := range map[float64]string{50: "no anode carries 50 kg", 0: "platinum on one anode"} {
		a.Zones[0].Protection.AnodeMass = mass
		r := of(t, a, 1, 0).Impressed
		if r.ByMass != nil || r.LifeYears != nil || !strings.Contains(strings.Join(r.Missing, "\n"), want) {
			t.Errorf("%g kg: %v anodes by mass, missing %q", mass, r.ByMass, r.Missing)
		}
	}
}

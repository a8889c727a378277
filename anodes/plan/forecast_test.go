package plan_test

import (
	"math"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// While one set holds its zone below -0.80 V the steel takes its mean demand,
// so the set wastes by the code's charge.
func TestProtectedZoneWastesByItsMeanDemand(t *testing.T) {
	a, err := assetfile.Read("../../testdata/assets/tern-passage.json")
	if err != nil {
		t.Fatal(err)
	}
	o := plan.Compute(a, 0)
	iv := o.Zones[0].Intervals[0]
	want := iv.Total.Mean * iv.Hours() / (24 * 45 * 2000)
	if got := iv.Fitted[0].Wastage; math.Abs(got-want) > 1e-9 {
		t.Errorf("wastage %.12f, want %.12f", got, want)
	}
	if iv.State != plan.Sound || iv.Potential > -0.8 || iv.Potential < -1.05 {
		t.Errorf("state %s at %.3f V, want sound between -1.05 and -0.80 V", iv.State, iv.Potential)
	}
}

// The whole circuit conserves charge, whatever its zones do: what all anodes
// lose is what all steel takes, as long as it is protected. Readings are left
// out: pieces that leave take what they gave with them.
func TestCircuitsConserveCharge(t *testing.T) {
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			t.Fatal(err)
		}
		a.Readings = nil
		o := plan.Compute(a, hull.NewDate(2026, 12, 1))
		type sum struct {
			lost, asked float64
			protected   bool
		}
		circuits := map[string]*sum{}
		for i, z := range o.Zones {
			if z.Zone.Protection != nil || !z.Zone.Bonded {
				continue
			}
			name := a.CircuitName(z.Zone)
			if circuits[name] == nil {
				circuits[name] = &sum{protected: true}
			}
			c := circuits[name]
			iv := z.Intervals[0]
			c.asked += iv.Demand.Mean * iv.Hours()
			c.protected = c.protected && iv.Potential < -0.8-1e-6
			for g, fitted := range iv.Fitted {
				capacity := 2000.0
				switch {
				case fitted.Pattern.Capacity != nil:
					capacity = *fitted.Pattern.Capacity
				case fitted.Pattern.Alloy == hull.Magnesium:
					capacity = 1100
				case fitted.Pattern.Alloy == hull.Zinc && a.Medium(z.Zone) != hull.Sediment && a.Medium(z.Zone) != hull.Soil:
					capacity = 780
				case fitted.Pattern.Alloy == hull.Zinc:
					capacity = 700
				case a.Medium(z.Zone) == hull.Sediment || a.Medium(z.Zone) == hull.Soil:
					capacity = 1500
				}
				c.lost += float64(fitted.Count) * fitted.Pattern.NetMass * capacity * (fitted.Wastage - a.Zones[i].Fitted[g].Wastage)
			}
			for _, v := range z.Intervals {
				if v.Potential > -0.65+1e-9 || v.Potential < -1.6 {
					t.Errorf("%s, %s: %.3f V on %s", a.Name, z.Zone.ID, v.Potential, v.To)
				}
				for _, g := range v.Fitted {
					if g.Wastage > math.Max(g.Pattern.Utilisation, 0)+1e-9 {
						t.Errorf("%s, %s: wasted to %.4f, beyond %.2f", a.Name, z.Zone.ID, g.Wastage, g.Pattern.Utilisation)
					}
				}
			}
		}
		for name, c := range circuits {
			if c.protected && math.Abs(c.lost-c.asked) > 1e-7*c.asked {
				t.Errorf("%s, circuit %s: the anodes lost %.8g Ah, the steel took %.8g", a.Name, name, c.lost, c.asked)
			}
		}
	}
}

// With too few anodes the steel comes short and corrodes; with none it is at
// its corrosion potential.
func TestTooFewAnodesComeShort(t *testing.T) {
	few := bare(t)
	few.Zones = few.Zones[:1]
	few.Zones[0].Fitted[0].Count = 2
	iv := plan.Compute(few, 0).Zones[0].Intervals[0]
	if iv.State != plan.Short || iv.Potential <= -0.8 || iv.SteelLoss <= 0 {
		t.Errorf("two anodes: %s at %.3f V with %.4f mm lost, want short and a loss", iv.State, iv.Potential, iv.SteelLoss)
	}
	few.Zones[0].Fitted = nil
	iv = plan.Compute(few, 0).Zones[0].Intervals[0]
	if iv.State != plan.Short || iv.Potential != -0.65 {
		t.Errorf("no anodes: %s at %.3f V, want short at -0.650 V", iv.State, iv.Potential)
	}
	if want := 0.1 * iv.Years(); math.Abs(iv.SteelLoss-want) > 1e-6 {
		t.Errorf("no anodes: %.4f mm lost, want %.4f", iv.SteelLoss, want)
	}
}

// The course of a zone passes through what the outcome says at the ends of
// intervals, and its dates rise.
func TestCourseMeetsTheOutcome(t *testing.T) {
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			t.Fatal(err)
		}
		o := plan.Compute(a, hull.NewDate(2026, 12, 1))
		for i, z := range o.Zones {
			course := o.Course(i)
			if (course == nil) != math.IsNaN(z.Intervals[0].Potential) {
				t.Errorf("%s, %s: a course of %d samples at %v V", a.Name, z.Zone.ID, len(course), z.Intervals[0].Potential)
			}
			for n := 1; n < len(course); n++ {
				if course[n].Date < course[n-1].Date {
					t.Errorf("%s, %s: %s after %s", a.Name, z.Zone.ID, course[n].Date, course[n-1].Date)
				}
			}
			if course == nil {
				continue
			}
			last, end := course[len(course)-1], z.Intervals[len(z.Intervals)-1]
			if math.Abs(last.Potential-end.Potential) > 1e-6 {
				t.Errorf("%s, %s: the course ends at %.6f V, the outcome at %.6f V", a.Name, z.Zone.ID, last.Potential, end.Potential)
			}
			for _, g := range end.Fitted {
				if g.Wastage > last.Most+1e-6 {
					t.Errorf("%s, %s: the course ends at %.6f, a group at %.6f", a.Name, z.Zone.ID, last.Most, g.Wastage)
				}
			}
		}
	}
}

package plan_test

import (
	"encoding/json"
	"math/rand"
	"slices"
	"strings"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/anodes/protection"
	"anodewright/hull"
)

// protect gives the first zone a protection in place of its anodes.
func protect(a *hull.Asset, change func(p *hull.Protection)) {
	p := new(hull.Protection)
	hull.SetDefaults(p)
	change(p)
	a.Zones[0].Fitted, a.Zones[0].Protection = nil, p
}

// Each caution on other protections fires on the zone with its cause only.
func TestProtectionCautions(t *testing.T) {
	ours := []string{"coat-spent", "coat-unheld", "nobler-scratch", "off-share", "impressed-in-tank", "impressed-short"}
	impressed := func(p *hull.Protection) { p.Kind, p.Anode = hull.ImpressedCurrent, "silicon-iron" }
	coat := func(um float64) func(p *hull.Protection) {
		return func(p *hull.Protection) { p.Kind, p.Class, p.Thickness = hull.ZincCoat, "immersed-temperate", um }
	}
	flash := 40.0
	cases := []struct {
		what   string
		change func(a *hull.Asset)
		want   []string
	}{
		{"plain", func(*hull.Asset) {}, nil},
		{"thin zinc", func(a *hull.Asset) { protect(a, coat(20)) }, []string{"coat-spent", "coat-unheld"}},
		{"zinc up to between the dockings", func(a *hull.Asset) { protect(a, coat(20*4)) }, []string{"coat-unheld"}},
		{"thick zinc", func(a *hull.Asset) { protect(a, coat(20*30)) }, nil},
		{"copper", func(a *hull.Asset) { a.Zones[0].Nobler = &hull.Nobler{Metal: "copper", Area: 5, BareSteel: 0.1} }, []string{"nobler-scratch"}},
		{"always on", func(a *hull.Asset) { protect(a, impressed) }, nil},
		{"at times off", func(a *hull.Asset) { protect(a, func(p *hull.Protection) { impressed(p); p.OffShare = 0.1 }) }, []string{"off-share"}},
		{"tank", func(a *hull.Asset) { protect(a, impressed); a.Zones[0].Region = "ballast-tank" }, []string{"impressed-in-tank"}},
		{"flash point", func(a *hull.Asset) { protect(a, impressed); a.Zones[0].FlashPoint = &flash }, []string{"impressed-in-tank"}},
		{"too few", func(a *hull.Asset) {
			protect(a, func(p *hull.Protection) { impressed(p); p.AnodeCount, p.AnodeRating = 1, 0.5 })
		}, []string{"impressed-short"}},
	}
	for _, c := range cases {
		a := bare(t)
		c.change(a)
		if fs := hull.Check(a); len(fs) > 0 {
			t.Errorf("%s: %v", c.what, fs)
			continue
		}
		var got []string
		for _, id := range at(a, 0) {
			if slices.Contains(ours, id) {
				got = append(got, id)
			}
		}
		if !slices.Equal(got, c.want) {
			t.Errorf("%s: got %v, want %v", c.what, got, c.want)
		}
		for _, id := range at(a, 1) {
			if slices.Contains(ours, id) {
				t.Errorf("%s: %s raised at the other zone too", c.what, id)
			}
		}
	}
}

// Rods close together hinder each other, so that more are needed; what the
// plan fits gives the final current as a row.
func TestRodsInARowNeedMore(t *testing.T) {
	count := map[float64]int{}
	for _, spacing := range []float64{0, 2, 5000} {
		a := bare(t)
		rods(a, spacing)
		o := plan.Compute(a, 0)
		for _, l := range o.Schedule {
			if l.Zone != 0 {
				continue
			}
			count[spacing] = l.Count
			final := 0.0
			for _, iv := range o.Zones[0].Intervals[1:] {
				final = max(final, iv.Total.Final)
			}
			z := &a.Zones[0]
			rho := a.Resistivity(z, l.Date)
			if gives := protection.RowOutput(l.Pattern, a.Medium(z), rho, z.Shielding, l.Count, l.Pattern.Utilisation); gives < final*(1-1e-9) {
				t.Errorf("spacing %g m: %d worn rods give %.4f A of %.4f", spacing, l.Count, gives, final)
			}
		}
	}
	if !(count[2] > count[5000] && count[5000] >= count[0] && count[0] > 0) {
		t.Errorf("rods by spacing: %v, want more the closer they stand", count)
	}
}

// rods lays the first zone in soil with magnesium rods at a spacing in m.
func rods(a *hull.Asset, spacing float64) {
	rho := 20.0
	a.Waters = append(a.Waters, hull.Water{ID: "ground", Medium: hull.Soil, Resistivity: &rho})
	p := a.Patterns[0]
	p.ID, p.Alloy, p.Shape, p.Length, p.Diameter, p.Spacing, p.NetMass = "rod", hull.Magnesium, hull.SoilRod, 1.2, 0.1, spacing, 15
	p.Potential, p.Capacity, p.GrossMass, p.InsertVolume = nil, nil, 0, 0
	a.Patterns = append(a.Patterns, p)
	z := &a.Zones[0]
	z.Waters, z.Patterns, z.Fitted, z.MaxCount, z.MinCount = []hull.WaterShare{{Water: "ground", Share: 1}}, []string{"rod"}, nil, nil, 0
	z.WettedArea, z.BareArea, z.OwnDensities = 50, 50, &hull.Densities{Initial: 8, Mean: 5, Final: 8}
}

// The result reaches other programs and the explanation of a zone.
func TestProtectionInJSONAndExplanation(t *testing.T) {
	a := bare(t)
	protect(a, func(p *hull.Protection) { p.Kind, p.Anode, p.OffShare = hull.ImpressedCurrent, "scrap-steel", 0.1 })
	o := plan.Compute(a, hull.NewDate(2026, 12, 1))
	text, err := json.Marshal(o)
	if err != nil {
		t.Fatal(err)
	}
	var out struct {
		Zones []struct{ Protection *protection.Result }
	}
	if err := json.Unmarshal(text, &out); err != nil {
		t.Fatal(err)
	}
	p := out.Zones[0].Protection
	if p == nil || p.Impressed == nil || p.Coat != nil || out.Zones[1].Protection != nil {
		t.Fatalf("got %+v and %+v", p, out.Zones[1].Protection)
	}
	if got, want := *p.Impressed.Mass, *o.Zones[0].Protection.Impressed.Mass; got != want || want <= 0 {
		t.Errorf("mass %g in JSON, %g computed", got, want)
	}
	found := false
	for _, s := range o.Explain(0) {
		found = found || strings.HasPrefix(s.Figure, "anode mass that the current takes")
		if s.Source == "" || s.Confidence == "" {
			t.Errorf("%s: no source", s.Figure)
		}
	}
	if !found {
		t.Error("the explanation has no step on the anode mass")
	}
	if _, impressed := o.Action(0, 0); impressed {
		t.Error("the plan acts on a zone that impressed current holds")
	}
}

// Whatever legal figures are entered, a result is figures, nulls and words:
// nothing that JSON cannot hold.
func TestExtremeFiguresOfProtections(t *testing.T) {
	judged := 0
	r := rand.New(rand.NewSource(1))
	pick := func(xs ...float64) float64 { return xs[r.Intn(len(xs))] }
	for k := 0; k < 400; k++ {
		a := bare(t)
		p := new(hull.Protection)
		hull.SetDefaults(p)
		if r.Intn(2) == 0 {
			p.Kind = hull.ZincCoat
			p.Class = hull.ExposureClass(p.Class.Words()[r.Intn(8)])
			p.Thickness = pick(1e-320, 1e-3, 20, 85, 5000)
		} else {
			p.Kind = hull.ImpressedCurrent
			p.Anode = hull.ImpressedAnode(p.Anode.Words()[r.Intn(5)])
			p.OffShare = pick(0, 0.5, 1)
			p.AnodeCount = r.Intn(3) * 50000
			p.AnodeMass, p.AnodeRating = pick(0, 1e-320, 30, 1e5), pick(0, 1e-320, 10, 1e4)
			p.AnodeLength, p.AnodeDiameter, p.AnodeSpacing = pick(0, 1e-320, 1, 1000), pick(0, 1e-320, .1, 10), pick(0, 1e-320, 5, 10000)
			p.CableResistance, p.BackEMF = pick(0, 1000), pick(0, 10)
			if r.Intn(2) == 0 {
				x := pick(1e-320, 20, 200)
				p.LifeYears = &x
			}
		}
		a.Zones[0].Fitted, a.Zones[0].Protection = nil, p
		if r.Intn(2) == 0 {
			a.Zones[0].Nobler = &hull.Nobler{Metal: "copper", Area: pick(1e-320, 5, 1e7), BareSteel: pick(0, 1e-320, 1, 1e7)}
		}
		if r.Intn(4) == 0 {
			rods(a, pick(0, 1e-320, 5, 10000))
			a.Zones[0].Protection = nil
			q := &a.Patterns[len(a.Patterns)-1]
			e := pick(-0.5, -0.8, -0.8000001, -2)
			q.Potential = &e
		}
		if fs := hull.Check(a); len(fs) > 0 {
			continue
		}
		o := plan.Compute(a, hull.NewDate(2026, 12, 1))
		for _, z := range o.Zones {
			if z.Protection != nil {
				if _, err := json.Marshal(z.Protection); err != nil {
					t.Fatalf("%v: %+v %+v", err, p, a.Zones[0].Nobler)
				}
				if len(z.Protection.Words()) == 0 {
					t.Fatalf("no word on %+v", p)
				}
				judged++
			}
		}
	}
	if judged < 300 {
		t.Errorf("only %d results were judged", judged)
	}
}

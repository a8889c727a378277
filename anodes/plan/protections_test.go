package plan_test

import (
	"encoding/json"
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
	ours := []string{"coat-spent", "coat-unheld", "nobler-scratch", "off-share", "impressed-in-tank", "impressed-short", "rod-row"}
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
		{"crowded rods", func(a *hull.Asset) { rods(a, 0.5) }, []string{"rod-row"}},
		{"rods far apart", func(a *hull.Asset) { rods(a, 5000) }, nil},
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

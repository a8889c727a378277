package assetfile

import (
	"math"
	"reflect"
	"testing"

	"anodewright/assets"
	"anodewright/hull"
)

// demoFleet decodes every file of the demo fleet.
func demoFleet(t *testing.T) []*hull.Asset {
	t.Helper()
	var fleet []*hull.Asset
	for i, text := range assets.Demo() {
		a, err := Decode(text)
		if err != nil {
			t.Fatalf("demo file %d:\n%v", i, err)
		}
		fleet = append(fleet, a)
	}
	return fleet
}

func TestDemoFleetKeepsWhole(t *testing.T) {
	for _, a := range demoFleet(t) {
		b, err := Decode(Encode(a))
		if err != nil {
			t.Errorf("%s: what was written is refused:\n%v", a.Name, err)
		} else if !reflect.DeepEqual(a, b) {
			t.Errorf("%s: written and read again, it is another asset", a.Name)
		}
	}
}

func TestDemoFleetIsVaried(t *testing.T) {
	rules, kinds, held := map[hull.DensityRule]bool{}, map[hull.DockingKind]bool{}, 0
	for _, a := range demoFleet(t) {
		if a.Start() >= hull.NewDate(2026, 12, 1) || len(a.Ahead()) < 2 {
			t.Errorf("%s: starts %s with %d dockings ahead", a.Name, a.Start(), len(a.Ahead()))
		}
		if len(a.Readings) < 2 {
			t.Errorf("%s: %d readings", a.Name, len(a.Readings))
		}
		rules[a.Basis.Densities] = true
		for _, d := range a.Ahead() {
			kinds[d.Kind] = true
		}
		for _, z := range a.Zones {
			if z.HeldBy != "" {
				held++
			}
		}
	}
	if len(rules) != 4 || len(kinds) != 3 || held < 10 {
		t.Errorf("fleet shows densities %v, dockings %v and %d held zones", rules, kinds, held)
	}
}

// A casting's mass, and its size with the insert taken off, agree within a
// tenth; so does its gross mass with the insert's steel.
func TestDemoCastingsAgree(t *testing.T) {
	density := map[hull.Alloy]float64{hull.Aluminium: 2700, hull.Zinc: 7140, hull.Magnesium: 1740}
	checked := 0
	for _, a := range demoFleet(t) {
		for _, p := range a.Patterns {
			var section float64
			switch {
			case p.Radius > 0:
				section = math.Pi * p.Radius * p.Radius
			case p.Diameter > 0:
				section = math.Pi / 4 * p.Diameter * p.Diameter
			default:
				section = p.Width * p.Height
			}
			if section == 0 {
				continue // stated shapes and bracelets give no section
			}
			checked++
			net := (p.Length*section - p.InsertVolume) * density[p.Alloy]
			if math.Abs(net/p.NetMass-1) > 0.1 {
				t.Errorf("%s, %s: its size gives %.1f kg net, the file says %v", a.Name, p.Name, net, p.NetMass)
			}
			gross := p.NetMass + p.InsertVolume*hull.SteelDensity
			if math.Abs(gross/p.Gross()-1) > 0.05 {
				t.Errorf("%s, %s: net and insert make %.1f kg, the file says %v gross", a.Name, p.Name, gross, p.Gross())
			}
		}
	}
	if checked < 15 {
		t.Errorf("only %d castings have a size", checked)
	}
}

// The wetted surface of the two ships, split into sides, flat bottom and the
// wetted boot-top, adds up to the estimate k*(V/T + 1.9*Lwl*T), k 0.99.
func TestDemoShipsWettedSurface(t *testing.T) {
	for _, a := range demoFleet(t)[:2] {
		p := a.Particulars
		want := 0.99 * (p.Volume/p.Draught + 1.9*p.LengthWL*p.Draught)
		var got float64
		for _, z := range a.Zones {
			switch z.Region {
			case "vertical-side", "flat-bottom", "boot-top":
				got += z.WettedArea
			}
		}
		if math.Abs(got/want-1) > 0.005 {
			t.Errorf("%s: zones of %.0f m2, estimate %.0f m2", a.Name, got, want)
		}
	}
}

package propose

import (
	"math"
	"strings"
	"testing"

	"anodewright/hull"
	"anodewright/hull/area"
)

// every form of every kind with its start values alone, and some with what
// people enter.
func forms() map[string]Form {
	fs := map[string]Form{
		"tern": {Kind: hull.Ship, Ship: "general-cargo", Entered: map[string]float64{
			"length_pp_m": 118, "length_wl_m": 120.5, "beam_m": 18.2, "draught_m": 7.1, "volume_m3": 10950, "tanks_m2": 2400}},
		"barge":          {Kind: hull.Ship, Ship: "other", Entered: map[string]float64{"propellers": 0, "rudder_m2": 0, "thrusters": 0, "bilge_keel_m": 0, "sea_chests": 0, "boot_top_m": 0}},
		"rudder entered": {Kind: hull.Ship, Entered: map[string]float64{"rudder_m2": 20}},
		"no rudder":      {Kind: hull.Ship, Entered: map[string]float64{"rudder_m2": 0}},
		"semi":           {Kind: hull.FloatingUnit, Entered: map[string]float64{"length_m": 90, "pontoons": 2, "draught_m": 20, "beam_m": 60, "columns": 6}},
		"turret":         {Kind: hull.FloatingUnit, Entered: map[string]float64{"moon_pool_m": 18}},
		"deep":           {Kind: hull.Jacket, Entered: map[string]float64{"water_depth_m": 350, "legs": 8, "pile_tops": 8}},
		"shallow":        {Kind: hull.Jacket, Entered: map[string]float64{"water_depth_m": 12, "braces": 0, "piles": 0, "mudmats_m2": 0, "conductors": 1}},
		"wall":           {Kind: hull.Harbour, Entered: map[string]float64{"piles": 0, "wall_m": 250, "earth_m": 9}},
		"deep jetty":     {Kind: hull.Harbour, Entered: map[string]float64{"water_depth_m": 35}},
		"buried line":    {Kind: hull.Pipeline, Entered: map[string]float64{"buried": 1, "landfall_m": 400}},
	}
	for _, k := range hull.Kind("").Words() {
		fs[k] = Form{Kind: hull.Kind(k)}
	}
	for _, s := range hull.ShipType("").Words() {
		fs["ship "+s] = Form{Kind: hull.Ship, Ship: hull.ShipType(s)}
	}
	return fs
}

func propose(t *testing.T, f Form) Proposal {
	t.Helper()
	p, err := f.Propose()
	if err != nil {
		t.Fatal(err)
	}
	return p
}

func zoneOf(t *testing.T, p Proposal, id string) hull.Zone {
	t.Helper()
	for _, z := range p.Zones {
		if z.ID == id {
			return z
		}
	}
	t.Fatalf("no zone %s", id)
	return hull.Zone{}
}

// Every proposal stands: each zone has an area that its estimate tells, hosts
// that exist and carry anodes, and waters.
func TestProposalsStand(t *testing.T) {
	for name, f := range forms() {
		t.Run(name, func(t *testing.T) {
			p := propose(t, f)
			hosts := map[string]bool{}
			for _, z := range p.Zones {
				if z.HeldBy == "" {
					hosts[z.ID] = true
				}
			}
			waters := map[string]bool{}
			for _, w := range Waters(p.Zones) {
				waters[w.ID] = true
			}
			for _, z := range p.Zones {
				e, ok := p.Estimates[z.ID]
				if !ok || e.Formula == "" || e.Source == "" || e.Benchmark == "" {
					t.Errorf("%s: estimate %+v says too little", z.ID, e)
				}
				if math.Abs(z.WettedArea-e.Area) > 0.5 || z.WettedArea <= 0 {
					t.Errorf("%s: %g m2 of an estimate of %g", z.ID, z.WettedArea, e.Area)
				}
				if z.HeldBy != "" && !hosts[z.HeldBy] {
					t.Errorf("%s is held by %s, which carries no anodes", z.ID, z.HeldBy)
				}
				if !waters[z.Waters[0].Water] {
					t.Errorf("%s lies in %s, which is not among the waters", z.ID, z.Waters[0].Water)
				}
				if z.Depth < 0 || z.CountMultiple < 1 || z.MinCount%z.CountMultiple != 0 && z.CountMultiple > 1 {
					t.Errorf("%s: depth %g, count %d in steps of %d", z.ID, z.Depth, z.MinCount, z.CountMultiple)
				}
			}
		})
	}
}

// A ship of known particulars: the hull's own zones make up the wetted surface
// by ship type, and anodes come in pairs.
func TestShip(t *testing.T) {
	f := forms()["tern"]
	p := propose(t, f)
	want, err := area.ByType(*p.Particulars, 0)
	if err != nil {
		t.Fatal(err)
	}
	sum := 0.0
	for _, id := range []string{"sides", "flat-bottom", "boot-top"} {
		sum += zoneOf(t, p, id).WettedArea
	}
	if math.Abs(sum-want.Area) > 2 {
		t.Errorf("hull zones make %g m2, want %g", sum, want.Area)
	}
	if z := zoneOf(t, p, "sides"); z.CountMultiple != 2 || z.MinCount != 12 || z.HeldBy != "" {
		t.Errorf("sides: %+v, want pairs, six at least", z)
	}
	for id, host := range map[string]string{"flat-bottom": "sides", "boot-top": "sides", "bilge-keels": "sides", "propeller": "rudder"} {
		if z := zoneOf(t, p, id); z.HeldBy != host {
			t.Errorf("%s is held by %q, want %s", id, z.HeldBy, host)
		}
	}
	if z := zoneOf(t, p, "propeller"); z.Surface != hull.CopperAlloy || z.Coating.Category != hull.CategoryNone {
		t.Errorf("propeller: %+v", z)
	}
	if z := zoneOf(t, p, "rudder"); math.Abs(z.WettedArea-2*0.015*118*7.1) > 0.05 || z.CountMultiple != 2 {
		t.Errorf("rudder: %g m2, steps of %d", z.WettedArea, z.CountMultiple)
	}
	if z := zoneOf(t, propose(t, forms()["rudder entered"]), "rudder"); z.WettedArea != 40 {
		t.Errorf("rudder of 20 m2 a face: %g m2", z.WettedArea)
	}
	if z := zoneOf(t, propose(t, forms()["no rudder"]), "propeller"); z.HeldBy != "sides" {
		t.Errorf("without a rudder the propeller is held by %q", z.HeldBy)
	}
	if got := propose(t, forms()["barge"]); len(got.Zones) != 2 {
		t.Errorf("a bare barge has %d zones, want sides and bottom", len(got.Zones))
	}
}

// A jacket's legs by depth bands, their areas and depths, and the sea bed held
// by the deepest legs.
func TestJacket(t *testing.T) {
	p := propose(t, forms()["deep"])
	legs := 0.0
	for _, c := range []struct {
		id    string
		depth float64
	}{{"legs-0-30", 15}, {"legs-30-100", 65}, {"legs-100-300", 200}, {"legs-300-350", 325}} {
		z := zoneOf(t, p, c.id)
		legs += p.Estimates[c.id].Area
		if z.Depth != c.depth || z.MinCount != 8 || z.Region != "jacket-leg" {
			t.Errorf("%s: %+v", c.id, z)
		}
	}
	if want := 8 * math.Pi * 1.6 * 350 * 1.01; math.Abs(legs-want) > 1e-6*want {
		t.Errorf("legs make %g m2, want %g", legs, want)
	}
	wells := 0
	for _, z := range p.Zones {
		wells += z.Wells
		if strings.HasPrefix(z.ID, "piles") || z.ID == "mudmats" {
			if z.HeldBy != "legs-300-350" || z.Waters[0].Water != SeaBed {
				t.Errorf("%s: held by %s in %s", z.ID, z.HeldBy, z.Waters[0].Water)
			}
		}
	}
	if wells != 6 {
		t.Errorf("%d wells, want one each of 6 conductors", wells)
	}
	if z := zoneOf(t, p, "pile-tops"); z.Waters[0].Water != Sea || math.Abs(z.WettedArea-8*math.Pi*1.5*7.5) > 0.5 {
		t.Errorf("open pile tops: %+v", z)
	}
}

// Piles of a jetty and a wall: water, tide, mud and earth, each in its water.
func TestHarbour(t *testing.T) {
	p := propose(t, Form{Kind: hull.Harbour})
	for id, want := range map[string]float64{"piles": 10, "piles-mud": 12, "piles-tidal": 3} {
		if z, m2 := zoneOf(t, p, id), 40*math.Pi*0.9*want; math.Abs(z.WettedArea-m2) > 0.5 {
			t.Errorf("%s: %g m2, want %g", id, z.WettedArea, m2)
		}
	}
	if z := zoneOf(t, p, "piles-tidal"); z.ImmersedShare != 0.5 || z.HeldBy != "piles" {
		t.Errorf("tidal band: %+v", z)
	}
	deep := propose(t, forms()["deep jetty"])
	if z := zoneOf(t, deep, "piles-mud"); z.HeldBy != "piles-30-35" {
		t.Errorf("mud of a deep jetty is held by %q", z.HeldBy)
	}
	wall := propose(t, forms()["wall"])
	for id, want := range map[string]string{"wall": Sea, "wall-tidal": Sea, "wall-mud": SeaBed, "wall-earth": Shore} {
		if z := zoneOf(t, wall, id); z.Waters[0].Water != want {
			t.Errorf("%s lies in %s", id, z.Waters[0].Water)
		}
	}
	if z := zoneOf(t, wall, "wall"); math.Abs(z.WettedArea-250*10*1.54) > 0.5 {
		t.Errorf("wall: %g m2", z.WettedArea)
	}
}

// A line's parts add up, in their own waters.
func TestPipeline(t *testing.T) {
	p := propose(t, Form{Kind: hull.Pipeline})
	a, b := p.Estimates["line"].Area, p.Estimates["line-buried"].Area
	if want := math.Pi * 0.508 * 5000; math.Abs(a+b-want) > 1e-6*want || math.Abs(b-0.3*want) > 1e-6*want {
		t.Errorf("%g and %g m2, want 70 and 30 %% of %g", a, b, want)
	}
	if z := zoneOf(t, p, "line"); z.MinCount != 12 || z.OwnDensities.Mean != 50 {
		t.Errorf("line: %+v", z)
	}
	if len(propose(t, forms()["buried line"]).Zones) != 2 {
		t.Error("a line all buried has no zone on the sea bed")
	}
}

// Start values follow what was entered.
func TestStartValuesFollow(t *testing.T) {
	f := Form{Kind: hull.Ship, Ship: "general-cargo", Entered: map[string]float64{"length_pp_m": 130}}
	if got := f.Start("beam_m"); got != 20 {
		t.Errorf("beam of 130 m: %g, want 20", got)
	}
	f.Entered["beam_m"] = 25
	if got := f.Start("draught_m"); got != 10 {
		t.Errorf("draught of 25 m beam: %g, want 10", got)
	}
	if got := f.Value("beam_m"); got != 25 {
		t.Errorf("beam: %g, want what was entered", got)
	}
	for name, f := range forms() {
		f.Entered = nil
		for _, field := range f.Fields() {
			if x := f.Start(field.Key); x < field.Least || x > field.Most || field.Whole && x != math.Trunc(x) || field.Title == "" {
				t.Errorf("%s: %s starts with %g, allowed %g to %g", name, field.Key, x, field.Least, field.Most)
			}
		}
	}
}

// What cannot be is refused, by name.
func TestRefusals(t *testing.T) {
	for want, f := range map[string]Form{
		"draught_m":        {Kind: hull.Ship, Entered: map[string]float64{"draught_m": -1}},
		"propellers":       {Kind: hull.Ship, Entered: map[string]float64{"propellers": 1.5}},
		"volume_m3":        {Kind: hull.Ship, Entered: map[string]float64{"volume_m3": 900000}},
		"boot-top height":  {Kind: hull.Ship, Entered: map[string]float64{"draught_m": 5, "boot_top_m": 5}},
		"pontoon_height_m": {Kind: hull.FloatingUnit, Entered: map[string]float64{"pontoons": 2, "draught_m": 6}},
		"at least one":     {Kind: hull.Harbour, Entered: map[string]float64{"piles": 0}},
		"length_m":         {Kind: hull.Pipeline, Entered: map[string]float64{"length_m": math.NaN()}},
	} {
		if _, err := f.Propose(); err == nil || !strings.Contains(err.Error(), want) {
			t.Errorf("got %v, want a fault of %s", err, want)
		}
	}
}

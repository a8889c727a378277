package session_test

import (
	"math"
	"path/filepath"
	"strings"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
	"anodewright/hull/propose"
	"anodewright/storage/assetfile"
)

// forms is every kind of asset, and every type of ship, with start values
// alone, and what has everything.
func forms() map[string]propose.Form {
	fs := map[string]propose.Form{
		"ship with tanks": {Kind: hull.Ship, Entered: map[string]float64{"tanks_m2": 3000}},
		"semi":            {Kind: hull.FloatingUnit, Entered: map[string]float64{"length_m": 90, "pontoons": 2, "draught_m": 20, "moon_pool_m": 12, "tanks_m2": 9000}},
		"deep jacket":     {Kind: hull.Jacket, Entered: map[string]float64{"water_depth_m": 340, "pile_tops": 8}},
		"sheet piling":    {Kind: hull.Harbour, Entered: map[string]float64{"wall_m": 300, "earth_m": 8}},
		"line ashore":     {Kind: hull.Pipeline, Entered: map[string]float64{"landfall_m": 600}},
	}
	for _, k := range hull.Kind("").Words() {
		fs[k] = propose.Form{Kind: hull.Kind(k)}
	}
	for _, s := range hull.ShipType("").Words() {
		fs["ship "+s] = propose.Form{Kind: hull.Ship, Ship: hull.ShipType(s)}
	}
	return fs
}

// Every proposal makes an asset without faults, which survives its file and
// which the plan can meet: each zone that carries anodes has patterns that fit.
func TestProposedAssetsStandAndCanBePlanned(t *testing.T) {
	for name, form := range forms() {
		t.Run(name, func(t *testing.T) {
			a, p, err := session.ProposedAsset("  New "+name+" ", form, today)
			must(t, err)
			if a.Name != "New "+name || a.Kind != form.Kind || len(a.Zones) != len(p.Zones) {
				t.Errorf("got %q, %s, %d zones of %d proposed", a.Name, a.Kind, len(a.Zones), len(p.Zones))
			}
			back, err := assetfile.Decode(assetfile.Encode(a))
			must(t, err)
			if !equal(a, back) {
				t.Error("the asset does not survive its file")
			}
			o := plan.Compute(a, today)
			for _, u := range o.Unmet {
				t.Errorf("the plan cannot meet %+v", u)
			}
			for _, c := range o.Cautions {
				if c.ID == "wetted-area" {
					t.Errorf("the proposal's own areas are questioned: %s", c.Text)
				}
			}
			for i := range a.Zones {
				z := &a.Zones[i]
				if z.HeldBy == "" && len(z.Patterns) == 0 {
					t.Errorf("%s carries anodes but is offered none", z.ID)
				}
				for _, id := range z.Patterns {
					pattern, _ := a.Pattern(id)
					if (a.Medium(z) == hull.Soil) != (pattern.Shape == hull.SoilRod) {
						t.Errorf("%s in %s is offered %s", z.ID, a.Medium(z), id)
					}
				}
			}
		})
	}
}

// A faulty form makes no asset and leaves the fleet alone.
func TestFaultyProposalAddsNothing(t *testing.T) {
	s, _ := ship(t)
	for _, c := range []struct {
		name string
		form propose.Form
	}{
		{" ", propose.Form{Kind: hull.Ship}},
		{"New", propose.Form{Kind: hull.Ship, Entered: map[string]float64{"beam_m": 0}}},
		{"New", propose.Form{Kind: hull.Harbour, Entered: map[string]float64{"piles": 0}}},
	} {
		if err := s.AddProposed(c.name, c.form); err == nil {
			t.Errorf("%q with %v was added", c.name, c.form.Entered)
		}
	}
	if n := len(s.Fleet()); n != 1 {
		t.Errorf("the fleet has %d assets, want 1", n)
	}
}

// The session knows which areas nobody has corrected yet, also in its next
// life, and for this asset alone.
func TestProposedAreasUntilCorrected(t *testing.T) {
	path := filepath.Join(t.TempDir(), "fleet.anodewright")
	r := register(t, path)
	s := open(t, r)
	must(t, s.Add(demo(t)[0], "test"))
	other := s.Fleet()[0].ID
	if got := s.Proposed(); len(got) != 0 {
		t.Errorf("an asset that was not proposed has %d proposed areas", len(got))
	}
	must(t, s.AddProposed("Plover Sands", propose.Form{Kind: hull.Ship, Ship: "tanker"}))
	s.Wait()
	if s.Asset().Name != "Plover Sands" || len(s.Outcome().Schedule) == 0 {
		t.Error("the new asset is not open or has no plan")
	}
	n := len(s.Asset().Zones)
	if got := s.Proposed(); len(got) != n {
		t.Fatalf("%d of %d areas are as proposed", len(got), n)
	}
	must(t, s.Do("correct", func(a *hull.Asset) error { a.Zones[0].WettedArea += 10; return nil }))
	got := s.Proposed()
	if _, still := got[s.Asset().Zones[0].ID]; still || len(got) != n-1 {
		t.Errorf("after a correction %d areas are as proposed, want %d", len(got), n-1)
	}
	must(t, s.Undo())
	if len(s.Proposed()) != n {
		t.Error("undo does not bring the mark back")
	}
	again := open(t, r)
	if got := again.Proposed(); len(got) != n || got["sides"].Formula == "" {
		t.Errorf("the next session knows of %d areas", len(got))
	}
	s.Select(other)
	if len(s.Proposed()) != 0 {
		t.Error("another asset has the marks of the new one")
	}
}

// An estimate enters as the zone's area, and its bare part never exceeds it.
func TestUseArea(t *testing.T) {
	s, _ := ship(t)
	form := propose.Form{Kind: hull.Ship}
	p, err := form.Propose()
	must(t, err)
	e := p.Estimates["rudder"]
	must(t, s.Do("bare", func(a *hull.Asset) error { a.Zones[0].BareArea = 500; return nil }))
	must(t, s.UseArea(0, e))
	z := s.Asset().Zones[0]
	if math.Abs(z.WettedArea-e.Area) > 0.05 || z.BareArea != z.WettedArea {
		t.Errorf("wetted %g, bare %g, want %g for both", z.WettedArea, z.BareArea, e.Area)
	}
	if err := s.UseArea(-1, e); err == nil {
		t.Error("an area for no zone was taken")
	}
}

// Particulars are fields like others: set, emptied, refused, and gone when
// nothing is known.
func TestParticularFields(t *testing.T) {
	s, _ := ship(t)
	field := map[string]session.Field{}
	for _, f := range session.AssetFields() {
		field[f.Key] = f
	}
	set := func(key, text string) string {
		t.Helper()
		must(t, s.SetText(session.Whole, 0, field["particulars."+key], text))
		_, fault := s.Text(session.Whole, 0, field["particulars."+key])
		return fault
	}
	if fault := set("beam_m", "18.4"); fault != "" || s.Asset().Particulars.Beam != 18.4 {
		t.Errorf("beam: %q, %+v", fault, s.Asset().Particulars)
	}
	if fault := set("ship_type", "bulk carrier"); fault != "" || s.Asset().Particulars.ShipType != "bulk-carrier" {
		t.Errorf("ship type: %q, %+v", fault, s.Asset().Particulars)
	}
	if fault := set("midship_coefficient", "1.5"); fault == "" || s.Asset().Particulars.Midship != 0 {
		t.Errorf("a midship coefficient of 1.5 was taken")
	}
	set("midship_coefficient", "")
	for key := range field {
		if name, ok := strings.CutPrefix(key, "particulars."); ok {
			set(name, "")
			if text, _ := s.Text(session.Whole, 0, field[key]); text != "" {
				t.Errorf("%s emptied shows %q", name, text)
			}
		}
	}
	if s.Asset().Particulars != nil {
		t.Errorf("particulars of nothing known: %+v", s.Asset().Particulars)
	}
	must(t, s.Undo())
	if s.Asset().Particulars == nil {
		t.Error("undo does not bring the last particular back")
	}
}

func TestProposedNamesAreInTheUsersLanguage(t *testing.T) {
	t.Cleanup(func() { say.Use("en") })
	say.Use("es")
	form := propose.Form{Kind: hull.Ship, Ship: "general-cargo"}
	a, _, err := session.ProposedAsset("Aguja", form, hull.NewDate(2026, 12, 1))
	if err != nil {
		t.Fatal(err)
	}
	names := map[string]string{}
	for _, z := range a.Zones {
		names[z.ID] = z.Name
	}
	if names["flat-bottom"] != "Fondo plano" || a.Waters[0].Name != "Mar abierto" {
		t.Errorf("zones are named %v, the water %q", names, a.Waters[0].Name)
	}
}

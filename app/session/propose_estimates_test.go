package session_test

import (
	"strings"
	"testing"

	"anodewright/hull"
	"anodewright/hull/propose"
)

// A ship's estimates: the wetted surface side by side, then parts and
// appendages with the zones that they fit.
func TestAreaEstimatesOfAShip(t *testing.T) {
	s, _ := ship(t)
	list, missing := s.AreaEstimates(0)
	if missing != nil {
		t.Fatal(missing)
	}
	zones := s.Asset().Zones
	sum, suggested := 0.0, map[string]bool{}
	for i, e := range list {
		if e.Area <= 0 || e.Formula == "" || e.Source == "" || e.Benchmark == "" {
			t.Errorf("%+v says too little", e)
		}
		if i < 3 && e.Zone != -1 {
			t.Errorf("%s is offered to one zone", e.Name)
		}
		if e.Zone >= 0 {
			suggested[zones[e.Zone].ID] = true
			switch zones[e.Zone].Region {
			case "flat-bottom", "vertical-side", "boot-top":
				sum += e.Area
			}
		}
	}
	if d := sum - list[0].Area; d > 1e-6 || d < -1e-6 {
		t.Errorf("the parts make %g m2 of %g", sum, list[0].Area)
	}
	for _, id := range []string{"side", "flat-bottom", "boot-top", "rudder", "propeller", "bilge-keels", "sea-chest-ps", "thruster"} {
		if !suggested[id] {
			t.Errorf("nothing is estimated for %s", id)
		}
	}
	light, missing := s.AreaEstimates(6)
	if missing != nil || light[0].Area >= list[0].Area || len(light) >= len(list) {
		t.Errorf("at 6 m: %d estimates, first %g, %v", len(light), light[0].Area, missing)
	}
}

// What cannot be estimated says why.
func TestAreaEstimatesSayWhatIsMissing(t *testing.T) {
	s, _ := ship(t)
	must(t, s.Do("no beam", func(a *hull.Asset) error { a.Particulars.Beam = 0; return nil }))
	list, missing := s.AreaEstimates(0)
	if missing == nil || !strings.Contains(missing.Error(), "beam") || len(list) == 0 {
		t.Errorf("without a beam: %d estimates, %v", len(list), missing)
	}
	must(t, s.Do("none", func(a *hull.Asset) error { a.Particulars = nil; return nil }))
	if _, missing = s.AreaEstimates(0); missing == nil || !strings.Contains(missing.Error(), "particulars") {
		t.Errorf("without particulars: %v", missing)
	}
	must(t, s.AddProposed("Curlew B", propose.Form{Kind: hull.Jacket}))
	list, missing = s.AreaEstimates(0)
	if missing != nil || len(list) != len(s.Asset().Zones) {
		t.Errorf("a proposed jacket: %d estimates of %d zones, %v", len(list), len(s.Asset().Zones), missing)
	}
	must(t, s.Add(demo(t)[2], "test"))
	if list, missing = s.AreaEstimates(0); missing == nil || len(list) != 0 {
		t.Errorf("a jacket of entered areas: %d estimates, %v", len(list), missing)
	}
}

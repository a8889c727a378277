package session_test

import (
	"strings"
	"testing"

	"anodewright/app/session"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

func TestServiceTexts(t *testing.T) {
	a := demo(t)[0]
	w := a.Waters[0].ID
	f := field(t, session.ZoneDetails(), "service")
	for text, want := range map[string]string{
		"": "",
		"2027-06-01 " + w + " 40 % + other 60 % under-way 0.8; 2028-01-01 under-way 1": "2027-06-01 " + w + " 40 % + other 60 % under-way 0.8; 2028-01-01 under-way 1",
		" 1 Jun 2027  " + w + ";":                     "2027-06-01 " + w,
		"2027-06-01 " + w + " 100 % Under-Way 0,85 ;": "2027-06-01 " + w + " under-way 0.85",
		"2027-06-01 " + w + " 33,3 % + other 66,7 %":  "2027-06-01 " + w + " 33.3 % + other 66.7 %",
	} {
		next := assetfile.Clone(a)
		if err := f.Set(next, 0, text); err != nil {
			t.Errorf("%q: %v", text, err)
			continue
		}
		if got := f.Get(next, 0); got != want {
			t.Errorf("%q becomes %q, want %q", text, got, want)
		}
	}
}

func TestServiceFaults(t *testing.T) {
	s, _ := ship(t)
	a := s.Asset()
	w := a.Waters[0].ID
	zone, whole := field(t, session.ZoneDetails(), "service"), field(t, session.AssetFields(), "service")
	for text, want := range map[string]string{
		"next summer " + w:                         "want a date first",
		"2027-06-01":                               "2027-06-01: want waters with their shares, under-way and a factor, or both",
		"2027-06-01 " + w + " under-way":           "want a factor after under-way",
		"2027-06-01 " + w + " under-way fast":      `want a factor after under-way, such as under-way 0.8, got "fast"`,
		"2027-06-01 " + w + " half":                "2027-06-01: want a share such as 50 %",
		"2027-06-01 " + w + " 40 %":                "[0].waters: want shares that add up to 1, got 0.4",
		"2027-06-01 nowhere":                       "[0].waters[0].water: want the id of one of the asset's waters",
		"2028-06-01 " + w + "; 2027-06-01 " + w:    "[1].from: want changes in the order of their dates",
		"2027-06-01 " + w + " under-way 0":         "[0].under_way_factor",
		"2027-06-01 " + w + "; 2027-06-01 " + w:    "[1].from",
		"2027-06-01 " + w + " 60 % + " + w + " x%": "want a share such as 50 %",
	} {
		for _, c := range []struct {
			list session.List
			f    session.Field
		}{{session.Zones, zone}, {session.Whole, whole}} {
			must(t, s.SetText(c.list, 0, c.f, text))
			got, fault := s.Text(c.list, 0, c.f)
			if got != text || !strings.Contains(fault, want) {
				t.Errorf("%s %q: kept as %q with fault %q, want %q", c.list, text, got, fault, want)
			}
		}
	}
	if s.Asset() != a {
		t.Error("a faulty change of service entered the asset")
	}
}

// A lay-up typed into the asset's line changes the demand of the interval that
// it lies in, and undo takes it back.
func TestServiceChangesTheOutcome(t *testing.T) {
	s, r := ship(t)
	must(t, s.Do("river", func(a *hull.Asset) error {
		temperature, conductivity := 10.0, 500.0
		w := hull.Water{ID: "river", Name: "River", Medium: hull.Seawater, Temperature: &temperature, Conductivity25: &conductivity}
		a.Waters = append(a.Waters, w)
		return nil
	}))
	s.Wait()
	before := s.Outcome().Zones[0].Intervals[0]
	from := before.From + 100
	f := field(t, session.AssetFields(), "service")
	must(t, s.SetText(session.Whole, 0, f, from.String()+" river under-way 0.5; "+(from+200).String()+" "+s.Asset().Zones[0].Waters[0].Water+" under-way 1"))
	s.Wait()
	after := s.Outcome().Zones[0].Intervals[0]
	if after.Demand.Mean >= before.Demand.Mean {
		t.Errorf("mean demand %g A after a lay-up, %g A before", after.Demand.Mean, before.Demand.Mean)
	}
	if !strings.Contains(after.ShortText(), "River") {
		t.Errorf("the zone is short in %q, want the river named", after.ShortText())
	}
	if n := len(stored(t, s, r).Service); n != 2 {
		t.Errorf("%d changes stored, want 2", n)
	}
	must(t, s.Undo())
	s.Wait()
	if got := s.Outcome().Zones[0].Intervals[0].Demand; got != before.Demand {
		t.Errorf("after undo %v, want %v", got, before.Demand)
	}
}

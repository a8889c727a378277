package session_test

import (
	"testing"

	"anodewright/app/session"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// lists are the lists with their fields and lengths.
func lists(a *hull.Asset) map[session.List]struct {
	n      int
	fields []session.Field
} {
	type list = struct {
		n      int
		fields []session.Field
	}
	return map[session.List]list{
		session.Whole:    {1, session.AssetFields()},
		session.Zones:    {len(a.Zones), append(session.ZoneColumns(), session.ZoneDetails()...)},
		session.Waters:   {len(a.Waters), session.WaterFields()},
		session.Dockings: {len(a.Dockings), session.DockingFields()},
		session.Patterns: {len(a.Patterns), session.PatternFields()},
	}
}

func TestFieldSetToItsOwnTextChangesNothing(t *testing.T) {
	for _, a := range demo(t) {
		for list, l := range lists(a) {
			for i := range l.n {
				for _, f := range l.fields {
					next := assetfile.Clone(a)
					text := f.Get(a, i)
					if err := f.Set(next, i, text); err != nil {
						t.Errorf("%s, %s[%d].%s: its own text %q: %v", a.Name, list, i, f.Key, text, err)
					} else if !equal(a, next) {
						t.Errorf("%s, %s[%d].%s: its own text %q changes the asset to %q", a.Name, list, i, f.Key, text, f.Get(next, i))
					}
				}
			}
		}
	}
}

func TestFieldsOfferOnlyWhatTheyTake(t *testing.T) {
	for _, a := range demo(t) {
		for list, l := range lists(a) {
			for _, f := range l.fields {
				if f.Choices == nil {
					continue
				}
				for _, text := range f.Choices(a) {
					next := assetfile.Clone(a)
					if err := f.Set(next, 0, text); err != nil {
						t.Errorf("%s.%s: its choice %q: %v", list, f.Key, text, err)
					} else if f.Get(next, 0) != text {
						t.Errorf("%s.%s: its choice %q becomes %q", list, f.Key, text, f.Get(next, 0))
					}
				}
			}
		}
	}
}

func TestFieldsHaveATitleAndAKeyOfTheirOwn(t *testing.T) {
	for list, l := range lists(demo(t)[0]) {
		keys, titles := map[string]bool{}, map[string]bool{}
		for _, f := range l.fields {
			if f.Key == "" || f.Title == "" || keys[f.Key] || titles[f.Title] {
				t.Errorf("%s: key %q, title %q", list, f.Key, f.Title)
			}
			keys[f.Key], titles[f.Title] = true, true
		}
	}
}

// TestTextsOfComposedFields types into the fields that hold lists.
func TestTextsOfComposedFields(t *testing.T) {
	a := demo(t)[0]
	pattern, water, zone := a.Patterns[0].ID, a.Waters[0].ID, a.Zones[0].ID
	docking := func(key string) session.Field { return field(t, session.DockingFields(), key) }
	for _, c := range []struct {
		f          session.Field
		text, want string
	}{
		{zoneField(t, "fitted"), "24x" + pattern + " 2024-03-15", "24 × " + pattern + " 2024-03-15 0 %"},
		{zoneField(t, "fitted"), "24 * " + pattern + " 2024-03-15 10%; 2 × " + pattern + " 2023-01-31 7 %", "24 × " + pattern + " 2024-03-15 10 % + 2 × " + pattern + " 2023-01-31 7 %"},
		{zoneField(t, "fitted"), "", ""},
		{zoneField(t, "waters"), water, water},
		{zoneField(t, "waters"), water + " 60 % + other 40%", water + " 60 % + other 40 %"},
		{zoneField(t, "waters"), water + " 33,3 %; other 0.667", water + " 33.3 % + other 66.7 %"},
		{zoneField(t, "patterns"), pattern + ";b , c", pattern + ", b, c"},
		{zoneField(t, "densities_ma_m2"), "150/70/ 100,5", "150 / 70 / 100.5"},
		{docking("works"), zone + " touch-up 50%", zone + " touch-up 50 %"},
		{docking("works"), zone + " touch-up 0.5 %;" + zone + " found 8 %", zone + " touch-up 0.5 %; " + zone + " found 8 %"},
		{docking("works"), zone + " recoat own a=0,02 b=0.01", zone + " recoat own a=0.02 b=0.01"},
		{docking("works"), zone + " part-recoat 0.25 III", zone + " part-recoat 25 % III"},
		{docking("date"), "15 Mar 2027", "2027-03-15"},
		{docking("kind"), "Dry Dock", "dry dock"},
	} {
		next := assetfile.Clone(a)
		if err := c.f.Set(next, 0, c.text); err != nil {
			t.Errorf("%s, %q: %v", c.f.Key, c.text, err)
		} else if got := c.f.Get(next, 0); got != c.want {
			t.Errorf("%s, %q becomes %q, want %q", c.f.Key, c.text, got, c.want)
		}
	}
	for _, c := range []struct {
		f    session.Field
		text string
	}{
		{zoneField(t, "fitted"), "24 " + pattern}, {zoneField(t, "fitted"), "24 × " + pattern + " 15.3.2024"},
		{zoneField(t, "fitted"), "24 × " + pattern + " 2024-03-15 1"}, {zoneField(t, "fitted"), "2.5 × " + pattern + " 2024-03-15"},
		{zoneField(t, "waters"), ""}, {zoneField(t, "waters"), water + " half"},
		{zoneField(t, "densities_ma_m2"), "150 / 70"}, {zoneField(t, "densities_ma_m2"), "a / b / c"},
		{zoneField(t, "bonded"), "perhaps"}, {zoneField(t, "min_count"), "2,5"},
		{docking("works"), zone}, {docking("works"), zone + " touch-up 1"}, {docking("works"), zone + " recoat a=x"},
	} {
		if err := c.f.Set(assetfile.Clone(a), 0, c.text); err == nil {
			t.Errorf("%s takes %q", c.f.Key, c.text)
		}
	}
}

func TestRenamedWaterKeepsItsZones(t *testing.T) {
	s, r := ship(t)
	id := field(t, session.WaterFields(), "id")
	was := s.Asset().Waters[0].ID
	must(t, s.SetText(session.Waters, 0, id, "new-name"))
	for _, z := range stored(t, s, r).Zones {
		for _, w := range z.Waters {
			if w.Water == was {
				t.Errorf("%s still lies in %s", z.Name, was)
			}
		}
	}
	must(t, s.AddWater())
	must(t, s.SetText(session.Waters, len(s.Asset().Waters)-1, id, "new-name"))
	if text, fault := s.Text(session.Waters, len(s.Asset().Waters)-1, id); text != "new-name" || fault == "" {
		t.Errorf("an id that is taken: %q, fault %q", text, fault)
	}
}

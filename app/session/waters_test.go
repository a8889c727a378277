package session_test

import (
	"math"
	"slices"
	"strings"
	"testing"

	"anodewright/app/session"
	"anodewright/hull"
	"anodewright/hull/water"
	"anodewright/storage/trade"
)

func entry(t *testing.T, name string) water.Entry {
	t.Helper()
	e, ok := water.Find(name)
	if !ok {
		t.Fatalf("the table has no %s", name)
	}
	return e
}

func TestAddWaterFromEveryEntry(t *testing.T) {
	s, r := ship(t)
	temperature := 7.5
	for _, e := range water.Entries() {
		if session.NeedsTemperature(e) {
			before := s.Asset()
			if _, err := s.AddWaterFrom(e, nil, ""); err == nil || !strings.Contains(err.Error(), "no temperature") || s.Asset() != before {
				t.Errorf("%s without a temperature: %v", e.Name, err)
			}
		}
		i, err := s.AddWaterFrom(e, &temperature, "")
		if err != nil {
			t.Errorf("%s: %v", e.Name, err)
			continue
		}
		w := stored(t, s, r).Waters[i]
		if w.Name != e.Name || string(w.Medium) != e.Medium || w.Temperature == nil || *w.Temperature != temperature {
			t.Errorf("%s: stored as %+v", e.Name, w)
		}
		if rho := w.Resist(); e.Stated && rho != e.Resistivity.Mean || !(rho > 0) {
			t.Errorf("%s: resistivity %g", e.Name, rho)
		}
	}
}

func TestAddWaterFromIsACopyToEdit(t *testing.T) {
	s, r := ship(t)
	n := len(s.Asset().Waters)
	e := entry(t, "Black Sea")
	first, err := s.AddWaterFrom(e, nil, "")
	must(t, err)
	second, err := s.AddWaterFrom(e, nil, "")
	must(t, err)
	a := stored(t, s, r)
	if first != n || second != n+1 || a.Waters[first].ID != "black-sea" || a.Waters[second].ID != "black-sea-2" {
		t.Errorf("places %d and %d, ids %s and %s", first, second, a.Waters[first].ID, a.Waters[second].ID)
	}
	if got := a.Waters[first].Resist(); math.Abs(got-e.Resistivity.Mean) > 1e-12 {
		t.Errorf("resistivity %g, the table's mean %g", got, e.Resistivity.Mean)
	}
	must(t, s.SetText(session.Waters, first, field(t, session.WaterFields(), "salinity"), "15"))
	if again := entry(t, "Black Sea"); again.Salinity.Mean != 18.06 {
		t.Errorf("an edit of the copy changed the table: %g", again.Salinity.Mean)
	}
	must(t, s.Undo())
	must(t, s.Undo())
	must(t, s.Undo())
	if got := len(stored(t, s, r).Waters); got != n {
		t.Errorf("%d waters after undo, want %d", got, n)
	}
}

func TestRiverAsSeawaterForAHull(t *testing.T) {
	s, r := ship(t)
	i, err := s.AddWaterFrom(entry(t, "Rhine at Lobith"), nil, hull.Seawater)
	must(t, err)
	if w := stored(t, s, r).Waters[i]; w.Medium != hull.Seawater || w.Resist() < 10 {
		t.Errorf("stored as %s of %g ohm m", w.Medium, w.Resist())
	}
	if _, err := s.AddWaterFrom(entry(t, "Clay, shale, gumbo, loam"), nil, hull.Seawater); err == nil {
		t.Error("soil is copied as seawater")
	}
}

func TestWaterNote(t *testing.T) {
	s, _ := ship(t)
	i, err := s.AddWaterFrom(entry(t, "Yellow Sea"), nil, "")
	must(t, err)
	note := session.WaterNote(s.Asset(), i)
	for _, want := range []string{"yellow-sea: 0.256 Ω m at 14.7 °C", "climate sub-tropical", "World Ocean Atlas"} {
		if !strings.Contains(note, want) {
			t.Errorf("note %q lacks %q", note, want)
		}
	}
	if session.WaterNote(s.Asset(), -1) != "" || session.WaterNote(nil, 0) != "" {
		t.Error("a note on no water")
	}
}

func pattern(t *testing.T, text string) trade.Pattern {
	t.Helper()
	p, err := trade.Read(strings.NewReader(text))
	must(t, err)
	return p
}

// seaZones are the zones of the first zone's medium.
func seaZones(a *hull.Asset) []string {
	var ids []string
	for i := range a.Zones {
		if a.Medium(&a.Zones[i]) == a.Medium(&a.Zones[0]) {
			ids = append(ids, a.Zones[i].ID)
		}
	}
	return ids
}

func TestTradingPatternBecomesTheZonesWaters(t *testing.T) {
	s, r := ship(t)
	own := s.Asset().Waters[0]
	p := pattern(t, "area;days\n"+own.Name+";60\nBlack Sea;30\nRhine at Lobith;10\nAtlantis;99\n")
	places := session.Places(p, s.Asset())
	if len(places) != 4 || places[0].Water != own.ID || places[1].Entry != "black-sea" || places[3].Decided() {
		t.Fatalf("places %+v", places)
	}
	before := s.Asset()
	use := session.Trade{Places: places, Zones: seaZones(before)}
	if err := s.ApplyTrade(use); err == nil || !strings.Contains(err.Error(), "Atlantis") || s.Asset() != before {
		t.Errorf("an unknown place: %v", err)
	}
	use.Places[3].LeftOut = true
	text, err := use.Preview(s.Asset())
	if want := own.ID + " 60 % + black-sea 30 % + rhine-at-lobith 10 %"; err != nil || text != want {
		t.Errorf("preview %q (%v), want %q", text, err, want)
	}
	if s.Asset() != before {
		t.Error("a preview changed the asset")
	}
	must(t, s.ApplyTrade(use))
	a := stored(t, s, r)
	want := []hull.WaterShare{{Water: own.ID, Share: 0.6}, {Water: "black-sea", Share: 0.3}, {Water: "rhine-at-lobith", Share: 0.1}}
	for _, id := range use.Zones {
		if z, _ := a.Zone(id); !slices.Equal(z.Waters, want) {
			t.Errorf("%s: waters %v, want %v", id, z.Waters, want)
		}
	}
	if w, _ := a.Water("rhine-at-lobith"); w.Medium != hull.Seawater {
		t.Errorf("the river of a hull that also lies in the sea is %s", w.Medium)
	}
	must(t, s.Undo())
	if !equal(stored(t, s, r), before) {
		t.Error("one undo does not take the trading pattern back")
	}
}

func TestTradingPatternFromADate(t *testing.T) {
	s, r := ship(t)
	own := s.Asset().Waters[0].ID
	z := s.Asset().Zones[0]
	from := s.Asset().Start() + 400
	half := 0.5
	must(t, s.Do("lay-up", func(a *hull.Asset) error {
		a.Zones[0].Service = []hull.Service{{From: from, UnderWayFactor: &half}, {From: from + 300, UnderWayFactor: &half}}
		return nil
	}))
	places := []session.TradePlace{{Name: "A", Days: 3, Water: own}, {Name: "B", Days: 1, Entry: "kattegat"}}
	for _, day := range []hull.Date{from, from + 100} {
		use := session.Trade{Places: places, Zones: []string{z.ID}, From: day}
		if text, err := use.Preview(s.Asset()); err != nil || !strings.HasPrefix(text, own+" 75 % + kattegat") {
			t.Errorf("preview %q (%v)", text, err)
		}
		must(t, s.ApplyTrade(use))
	}
	got := stored(t, s, r).Zones[0]
	if !slices.Equal(got.Waters, z.Waters) {
		t.Error("a dated trade changed the waters of before")
	}
	if n := len(got.Service); n != 3 || got.Service[0].From != from || got.Service[1].From != from+100 || got.Service[2].From != from+300 {
		t.Fatalf("changes of service %+v", got.Service)
	}
	if f := got.Service[0].UnderWayFactor; f == nil || *f != half || len(got.Service[0].Waters) != 2 {
		t.Errorf("the change of that date became %+v", got.Service[0])
	}
}

func TestTradeRefusals(t *testing.T) {
	s, _ := ship(t)
	a := s.Asset()
	own, zone := a.Waters[0].ID, a.Zones[0].ID
	must(t, s.Do("a lake", func(a *hull.Asset) error {
		temperature, conductivity := 10.0, 300.0
		a.Waters = append(a.Waters, hull.Water{ID: "lake", Medium: hull.Fresh, Temperature: &temperature, Conductivity25: &conductivity})
		return nil
	}))
	good := session.TradePlace{Name: "A", Days: 1, Water: own}
	for want, use := range map[string]session.Trade{
		"at least one zone":    {Places: []session.TradePlace{good}},
		"no zone nowhere":      {Places: []session.TradePlace{good}, Zones: []string{"nowhere"}},
		"no water gone":        {Places: []session.TradePlace{{Name: "A", Days: 1, Water: "gone"}}, Zones: []string{zone}},
		"lake is fresh":        {Places: []session.TradePlace{{Name: "A", Days: 1, Water: "lake"}}, Zones: []string{zone}},
		"not left out":         {Places: []session.TradePlace{{Name: "A", Days: 1, LeftOut: true}}, Zones: []string{zone}},
		"the table has no x":   {Places: []session.TradePlace{{Name: "A", Days: 1, Entry: "x"}}, Zones: []string{zone}},
		"no temperature for":   {Places: []session.TradePlace{{Name: "A", Days: 1, Entry: "gulf-of-finland"}}, Zones: []string{zone}},
		"cannot be copied as":  {Places: []session.TradePlace{{Name: "A", Days: 1, Entry: "fill-ash-cinder-brine-waste"}}, Zones: []string{zone}},
		"not known: Atlantis.": {Places: []session.TradePlace{good, {Name: "Atlantis", Days: 1}}, Zones: []string{zone}},
	} {
		before := s.Asset()
		if err := s.ApplyTrade(use); err == nil || !strings.Contains(err.Error(), want) || s.Asset() != before {
			t.Errorf("want %q, got %v", want, err)
		}
	}
}

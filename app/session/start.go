package session

import (
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// AddDemo adds the demo fleet to the session's.
func AddDemo(s *Session) error {
	first := ""
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			return err
		}
		if err := s.Add(a, "demo fleet"); err != nil {
			return err
		}
		if first == "" {
			first = s.openID()
		}
	}
	s.Select(first)
	return nil
}

func (s *Session) openID() string {
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.open == nil {
		return ""
	}
	return s.open.id
}

// NewAsset returns an asset to start from: a ship with one painted zone, the
// patterns of the demo ship, docked today and every 30 months. Everything in
// it is to be corrected.
func NewAsset(name string, today hull.Date) *hull.Asset {
	demo, err := assetfile.Decode(assets.Demo()[0])
	if err != nil {
		panic("session: the demo ship: " + err.Error())
	}
	t, salinity := 12.0, 35.0
	w := hull.Water{ID: "sea", Name: "Open sea", Temperature: &t, Salinity: &salinity}
	hull.SetDefaults(&w)
	z := hull.Zone{
		ID: "sides", Name: "Vertical sides", Region: "vertical-side", Surface: hull.CarbonSteel, WettedArea: 1000, Depth: 5,
		Coating: hull.Coating{Category: hull.CategoryIII, Applied: today},
		Waters:  []hull.WaterShare{{Water: "sea", Share: 1}},
	}
	hull.SetDefaults(&z)
	a := &hull.Asset{
		Name: name, Kind: hull.Ship, Currency: "EUR", InService: today, LastDocking: today, Horizon: today.AddMonths(90),
		Waters: []hull.Water{w}, Zones: []hull.Zone{z}, Patterns: demo.Patterns,
	}
	for _, months := range []int{30, 60} {
		d := hull.Docking{Date: today.AddMonths(months)}
		hull.SetDefaults(&d)
		a.Dockings = append(a.Dockings, d)
	}
	hull.SetDefaults(a)
	return a
}

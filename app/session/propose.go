package session

import (
	"encoding/json"
	"errors"
	"slices"
	"strings"

	"anodewright/app/say"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/hull/area"
	"anodewright/hull/propose"
	"anodewright/storage/assetfile"
)

// Propose returns the zones of a form with their names in the user's language:
// they become data of the asset, and stay as they are in any language.
func Propose(form propose.Form) (propose.Proposal, error) {
	p, err := form.Propose()
	for i := range p.Zones {
		p.Zones[i].Name = say.Sentence(p.Zones[i].Name)
	}
	return p, err
}

// ProposedAsset returns an asset made of a proposal: its zones with their
// waters, the patterns of the demo asset of the same kind, docked today and to
// be docked twice more. Everything in it is to be corrected.
func ProposedAsset(name string, form propose.Form, today hull.Date) (*hull.Asset, propose.Proposal, error) {
	if name = strings.TrimSpace(name); name == "" {
		return nil, propose.Proposal{}, errors.New("want a name")
	}
	p, err := Propose(form)
	if err != nil {
		return nil, p, err
	}
	every, kind := rhythm(form.Kind)
	a := &hull.Asset{
		Name: name, Kind: form.Kind, Currency: "EUR", InService: today, LastDocking: today, Horizon: today.AddMonths(3 * every),
		Particulars: p.Particulars, Waters: propose.Waters(p.Zones), Zones: slices.Clone(p.Zones),
	}
	for i := range a.Waters {
		a.Waters[i].Name = say.Sentence(a.Waters[i].Name)
	}
	model := demoOf(form.Kind)
	a.Patterns = model.Patterns
	for i := range a.Zones {
		z := &a.Zones[i]
		z.Coating.Applied = today
		z.Patterns = offered(a, model, z)
	}
	for n := 1; n <= 2; n++ {
		d := hull.Docking{Date: today.AddMonths(n * every), Kind: kind}
		hull.SetDefaults(&d)
		a.Dockings = append(a.Dockings, d)
	}
	if form.Kind == hull.Ship {
		a.Basis.Densities = hull.HullPractice // what new ships are counted with; the code's stands beside it
	}
	hull.SetDefaults(a)
	return a, p, hull.Check(a).Err()
}

// rhythm returns the months between dockings of a kind of asset, and how its
// steel is reached.
func rhythm(kind hull.Kind) (months int, docking hull.DockingKind) {
	switch kind {
	case hull.Ship:
		return 30, hull.DryDock
	case hull.Harbour:
		return 60, hull.InWater
	}
	return 60, hull.Campaign
}

// demoOf returns the demo asset whose patterns suit a kind of asset: its own
// kind's, and a ship's for what floats.
func demoOf(kind hull.Kind) *hull.Asset {
	if kind == hull.FloatingUnit {
		kind = hull.Ship
	}
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			panic("session: the demo fleet: " + err.Error())
		}
		if a.Kind == kind {
			return a
		}
	}
	panic("session: no demo " + string(kind))
}

// offered returns the patterns that the demo asset offers to zones of the same
// region and medium, else of the same medium, else none by name.
func offered(a, model *hull.Asset, z *hull.Zone) []string {
	if z.HeldBy != "" {
		return nil
	}
	var second []string
	for i := range model.Zones {
		m := &model.Zones[i]
		if len(m.Patterns) == 0 || model.Medium(m) != a.Medium(z) {
			continue
		}
		if m.Region == z.Region {
			return m.Patterns
		}
		if second == nil && !m.Region.Tank() {
			second = m.Patterns
		}
	}
	return second
}

// AddProposed makes an asset of a proposal, stores it and opens it. The session
// remembers which areas were proposed; see Proposed.
func (s *Session) AddProposed(name string, form propose.Form) error {
	a, p, err := ProposedAsset(name, form, s.Today())
	if err != nil {
		return err
	}
	if err := s.Add(a, "new asset, as proposed from its kind"); err != nil {
		return err
	}
	text, err := json.Marshal(p.Estimates)
	if err != nil {
		panic("session: estimates: " + err.Error())
	}
	s.SetSetting(proposedSetting(s.openID()), string(text))
	return nil
}

func proposedSetting(id string) string { return "proposed areas of " + id }

// Proposed returns the zones of the open asset whose wetted area is still the
// proposed one, in order, each with where its area comes from. They are to be
// corrected.
func (s *Session) Proposed() map[string]area.Estimate {
	a, id := s.Asset(), s.openID()
	if a == nil {
		return nil
	}
	text := s.Setting(proposedSetting(id))
	if text == "" {
		return nil
	}
	all := map[string]area.Estimate{}
	if err := json.Unmarshal([]byte(text), &all); err != nil {
		return nil // a note that cannot be read is not worth a dialog
	}
	for zone, e := range all {
		if z, ok := a.Zone(zone); !ok || z.WettedArea != propose.Rounded(e.Area) {
			delete(all, zone)
		}
	}
	return all
}

// UseArea enters an estimate, rounded as estimates are, as the wetted area of
// the open asset's i-th zone.
func (s *Session) UseArea(i int, e area.Estimate) error {
	return s.Do("wetted area by estimate", func(a *hull.Asset) error {
		if i < 0 || i >= len(a.Zones) {
			return errors.New("no zone is selected")
		}
		z := &a.Zones[i]
		z.WettedArea = propose.Rounded(e.Area)
		z.BareArea = min(z.BareArea, z.WettedArea)
		return nil
	})
}

// ParticularFields are a ship's main dimensions as fields of the asset. Empty:
// not known.
func ParticularFields() []Field {
	particular := func(key, title, unit string, v func(p *hull.Particulars) *float64) Field {
		q := say.Of(unit)
		return Field{
			Key: "particulars." + key, Title: title, Unit: unit, Number: true, Quantity: q,
			Get: func(a *hull.Asset, _ int) string {
				if a.Particulars == nil || *v(a.Particulars) == 0 {
					return ""
				}
				return shownNumber(q, *v(a.Particulars))
			},
			Set: func(a *hull.Asset, _ int, text string) (err error) {
				p := hull.Particulars{}
				if a.Particulars != nil {
					p = *a.Particulars
				}
				was := *v(&p)
				*v(&p) = 0
				if strings.TrimSpace(text) != "" {
					if *v(&p), err = parseShown(q, text, was); err != nil {
						return err
					}
				}
				keepParticulars(a, p)
				return nil
			},
		}
	}
	var types []string
	for _, w := range hull.ShipType("").Words() {
		types = append(types, Words(w))
	}
	shipType := Field{
		Key: "particulars.ship_type", Title: "Ship type", Hint: "Chooses the formula of the wetted surface. Empty: general cargo.",
		Get: func(a *hull.Asset, _ int) string {
			if a.Particulars == nil {
				return ""
			}
			return Words(a.Particulars.ShipType)
		},
		Set: func(a *hull.Asset, _ int, text string) error {
			p := hull.Particulars{}
			if a.Particulars != nil {
				p = *a.Particulars
			}
			p.ShipType = hull.ShipType(wordOf(hull.ShipType("").Words(), text))
			keepParticulars(a, p)
			return nil
		},
		Choices: func(*hull.Asset) []string { return append([]string{""}, types...) },
	}
	return []Field{
		shipType,
		particular("length_pp_m", "Length betw. perp.", "m", func(p *hull.Particulars) *float64 { return &p.LengthPP }),
		particular("length_wl_m", "Length on waterline", "m", func(p *hull.Particulars) *float64 { return &p.LengthWL }),
		particular("beam_m", "Beam", "m", func(p *hull.Particulars) *float64 { return &p.Beam }),
		particular("draught_m", "Draught", "m", func(p *hull.Particulars) *float64 { return &p.Draught }).
			hint("Of the design, as the volume."),
		particular("volume_m3", "Volume", "m³", func(p *hull.Particulars) *float64 { return &p.Volume }).
			hint("Volume of displacement: displacement in t over 1.025 in sea water."),
		particular("midship_coefficient", "Midship coefficient", "", func(p *hull.Particulars) *float64 { return &p.Midship }).
			hint("For Holtrop and Mennen's wetted surface. Empty: not known."),
		particular("waterplane_coefficient", "Waterplane coeff.", "", func(p *hull.Particulars) *float64 { return &p.Waterplane }).
			hint("For Holtrop and Mennen's wetted surface. Empty: not known."),
		particular("bulb_area_m2", "Bulb, transverse area", "m²", func(p *hull.Particulars) *float64 { return &p.BulbArea }).
			hint("For Holtrop and Mennen's wetted surface. Empty: none."),
	}
}

// keepParticulars gives the asset its particulars, none when nothing is known.
func keepParticulars(a *hull.Asset, p hull.Particulars) {
	a.Particulars = &p
	if p == (hull.Particulars{}) {
		a.Particulars = nil
	}
}

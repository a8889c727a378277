package session

import (
	"errors"

	"anodewright/hull"
	"anodewright/hull/area"
	"anodewright/hull/propose"
)

// AreaEstimate is an estimate with the zone that it may be the area of.
type AreaEstimate struct {
	area.Estimate
	Zone int // of the asset, -1 where none suggests itself
}

// AreaEstimates returns the estimates of areas that can be made of the open
// asset: of what floats by its particulars, the wetted surface by every formula
// first, then its parts and appendages; of other assets, those that were
// proposed and not corrected yet. The draught is that at which the hull lies in
// the water, 0 for the particulars' own. The error says what is missing.
func (s *Session) AreaEstimates(draught float64) ([]AreaEstimate, error) {
	a := s.Asset()
	if a == nil {
		return nil, errors.New("no asset is open")
	}
	if a.Particulars == nil {
		proposed := s.Proposed()
		var list []AreaEstimate
		for i := range a.Zones {
			if e, ok := proposed[a.Zones[i].ID]; ok {
				list = append(list, AreaEstimate{e, i})
			}
		}
		if len(list) > 0 {
			return list, nil
		}
		if a.Kind != hull.Ship && a.Kind != hull.FloatingUnit {
			return nil, errors.New("every area of this asset was entered or corrected by hand: there is nothing to estimate it from")
		}
		return nil, errors.New("the asset has no particulars: enter length, beam, draught and volume on the Steel page, part Asset")
	}
	return estimatesOf(a, draught)
}

func estimatesOf(a *hull.Asset, draught float64) (list []AreaEstimate, missing error) {
	p := *a.Particulars
	wetted, missing := area.Wetted(p, draught)
	for _, e := range wetted {
		list = append(list, AreaEstimate{e, -1})
	}
	form := formOf(p)
	if surface, err := area.ByType(p, draught); err == nil {
		parts, err := area.Split(surface, p, form.Value("boot_top_m"))
		if err != nil {
			return list, errors.Join(missing, err)
		}
		list = append(list,
			AreaEstimate{parts.FlatBottom, zoneIn(a, "flat-bottom")},
			AreaEstimate{parts.Sides, zoneIn(a, "vertical-side")},
			AreaEstimate{parts.BootTop, zoneIn(a, "boot-top")})
	}
	if a.Kind != hull.Ship {
		return list, missing
	}
	proposal, err := form.Propose()
	if err != nil {
		return list, errors.Join(missing, err)
	}
	for _, z := range proposal.Zones {
		switch z.Region {
		case "flat-bottom", "vertical-side", "boot-top":
			continue
		}
		e := proposal.Estimates[z.ID]
		e.Name = z.Name
		list = append(list, AreaEstimate{e, zoneIn(a, z.Region)})
		if z.Region == "rudder" {
			lateral, err := area.RudderLateralByClass(p.LengthPP, p.Beam, p.Draught, p.Volume/(p.LengthPP*p.Beam*p.Draught))
			if err == nil {
				lateral, err = area.Rudder(lateral)
			}
			if err == nil {
				lateral.Name = z.Name + " by the class form"
				list = append(list, AreaEstimate{lateral, zoneIn(a, z.Region)})
			}
		}
	}
	return list, missing
}

// formOf returns a ship's form with the particulars that are known.
func formOf(p hull.Particulars) propose.Form {
	f := propose.Form{Kind: hull.Ship, Ship: p.ShipType, Entered: map[string]float64{}}
	for key, x := range map[string]float64{
		"length_pp_m": p.LengthPP, "length_wl_m": p.LengthWL, "beam_m": p.Beam, "draught_m": p.Draught, "volume_m3": p.Volume,
	} {
		if x > 0 {
			f.Entered[key] = x
		}
	}
	return f
}

// zoneIn returns the first zone of a region, -1 if there is none.
func zoneIn(a *hull.Asset, region hull.Region) int {
	for i := range a.Zones {
		if a.Zones[i].Region == region {
			return i
		}
	}
	return -1
}

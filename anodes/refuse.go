package anodes

import (
	"fmt"

	"anodewright/hull"
)

// Refused says why a pattern must not be fitted in a zone, or nothing when it
// may. A refused pattern is not offered to the plan. Rules:
//   - aluminium in or beside a tank for cargo with a flash point below 60
//     degC: the energy of a fall at most 275 J (IACS Common Structural Rules,
//     Pt 2 Ch 2 Sec 2);
//   - magnesium in or beside such a tank, or on steel above 550 MPa;
//   - zinc from 50 degC on (derived from published reversal temperatures).
func Refused(a *hull.Asset, z *hull.Zone, p *hull.Pattern) string {
	why, _, _ := refusal(a, z, p)
	return why
}

// RefusalSource says which document a refusal rests on, and how sure it is.
func RefusalSource(a *hull.Asset, z *hull.Zone, p *hull.Pattern) (source, confidence string) {
	_, source, confidence = refusal(a, z, p)
	return source, confidence
}

func refusal(a *hull.Asset, z *hull.Zone, p *hull.Pattern) (why, source, confidence string) {
	const structural = "IACS Common Structural Rules, Pt 2 Ch 2 Sec 2"
	flash := false
	for _, f := range []*float64{z.FlashPoint, z.BesideFlashPoint} {
		flash = flash || f != nil && *f < 60
	}
	switch {
	case p.Alloy == hull.Aluminium && flash && z.DropHeight != nil && *z.DropHeight > MaxDropHeight(p)*(1+1e-9):
		return fmt.Sprintf("aluminium may hang at most %.2f m high here (275 J for %.0f kg), not %.2f m", MaxDropHeight(p), p.Gross(), *z.DropHeight), structural, "read"
	case p.Alloy == hull.Magnesium && flash:
		return "magnesium is not accepted in or beside tanks for cargo with a flash point below 60 °C", structural, "read"
	case p.Alloy == hull.Magnesium && (z.Surface == hull.HighStrength || z.Yield != nil && *z.Yield > 550):
		return "magnesium must never protect high-strength steel: hydrogen embrittlement", "LR Rules for Offshore Units, Pt 8 Ch 2, 2.2.1; limit of 550 MPa: EN 12473", "rule read; limit from memory"
	case p.Alloy == hull.Zinc && Hottest(a, z) >= 50:
		return fmt.Sprintf("zinc may reverse its polarity at %.0f °C; it is refused from 50 °C on", Hottest(a, z)), "papers on intergranular attack and reversal of zinc", "levels derived"
	}
	return "", "", ""
}

// MaxDropHeight returns the height in m from which a piece may fall: 275 J
// over its weight.
func MaxDropHeight(p *hull.Pattern) float64 { return 275 / (9.81 * p.Gross()) }

// Hottest returns the highest temperature in degC that the zone's anodes see:
// of its waters or the inside. It is -273 where none is known.
func Hottest(a *hull.Asset, z *hull.Zone) float64 {
	t := -273.0
	if z.InsideTemperature != nil {
		t = *z.InsideTemperature
	}
	mixes := [][]hull.WaterShare{z.Waters}
	for _, changes := range [][]hull.Service{a.Service, z.Service} {
		for _, s := range changes {
			if len(s.Waters) > 0 {
				if w, ok := a.Water(s.Waters[0].Water); ok && w.Medium == a.Medium(z) {
					mixes = append(mixes, s.Waters)
				}
			}
		}
	}
	for _, mix := range mixes {
		for _, s := range mix {
			if w, ok := a.Water(s.Water); ok && w.Temperature != nil {
				t = max(t, *w.Temperature)
			}
		}
	}
	return t
}

// Offered returns the patterns that the plan may choose from for a zone, in
// the order of the asset's patterns, with the reasons for those refused: the
// zone's own list, else all but soil rods.
func Offered(a *hull.Asset, z *hull.Zone) (offered []*hull.Pattern, refused map[string]string) {
	refused = map[string]string{}
	for i := range a.Patterns {
		p := &a.Patterns[i]
		listed := len(z.Patterns) == 0 && p.Shape != hull.SoilRod
		for _, id := range z.Patterns {
			listed = listed || id == p.ID
		}
		if !listed {
			continue
		}
		if why := Refused(a, z, p); why != "" {
			refused[p.ID] = why
			continue
		}
		offered = append(offered, p)
	}
	return offered, refused
}

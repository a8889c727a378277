package propose

import (
	"fmt"
	"math"

	"anodewright/hull"
	"anodewright/hull/area"
)

// form of a ship by type: start values only, common practice.
type proportions struct {
	length, lengthToBeam, beamToDraught, block float64
	propellers, thrusters                      int
	propellerToDraught                         float64
}

func proportionsOf(t hull.ShipType) proportions {
	switch t {
	case "tanker":
		return proportions{180, 5.8, 2.7, 0.81, 1, 0, 0.5}
	case "bulk-carrier":
		return proportions{180, 6.0, 2.6, 0.82, 1, 0, 0.5}
	case "container":
		return proportions{200, 7.0, 2.9, 0.65, 1, 1, 0.7}
	case "ro-ro-twin-screw":
		return proportions{150, 6.5, 3.8, 0.60, 2, 2, 0.7}
	case "other":
		return proportions{80, 5.5, 3.0, 0.62, 1, 1, 0.6}
	}
	return proportions{120, 6.5, 2.5, 0.72, 1, 1, 0.65}
}

// Shares of common practice in what is proposed of a ship.
const (
	bilgeKeelHeight = 0.02 // of the beam
	gratingShare    = 0.5  // of a sea chest's face
	tunnelLength    = 2.5  // of its diameter
	hullPairEvery   = 20.0 // m of length between pairs of hull anodes, at least
)

// ship starts a field that follows from the ship's type.
func ship(value func(proportions, Form) float64) func(Form) float64 {
	return func(f Form) float64 { return tidy(value(proportionsOf(f.Ship), f)) }
}

func shipFields() []Field {
	return []Field{
		{Key: "length_pp_m", Title: "Length between perpendiculars", Unit: "m", Least: 5, Most: 500, start: ship(func(p proportions, _ Form) float64 { return p.length })},
		{Key: "length_wl_m", Title: "Length on the waterline", Unit: "m", Least: 5, Most: 500, start: times(1.02, "length_pp_m")},
		{Key: "beam_m", Title: "Beam", Unit: "m", Least: 1, Most: 100, start: ship(func(p proportions, f Form) float64 { return f.Value("length_pp_m") / p.lengthToBeam })},
		{Key: "draught_m", Title: "Draught", Unit: "m", Hint: "Of the design, as the volume.", Least: 0.3, Most: 40,
			start: ship(func(p proportions, f Form) float64 { return f.Value("beam_m") / p.beamToDraught })},
		{Key: "volume_m3", Title: "Volume of displacement", Unit: "m³", Hint: "Displacement in t over 1.025.", Least: 1, Most: 1000000,
			start: ship(func(p proportions, f Form) float64 {
				return p.block * f.Value("length_pp_m") * f.Value("beam_m") * f.Value("draught_m")
			})},
		{Key: "boot_top_m", Title: "Boot-top below water", Unit: "m", Hint: "Height of its wetted part. 0: none apart.", Least: 0, Most: 10, start: times(0.1, "draught_m")},
		{Key: "propellers", Title: "Propellers", Whole: true, Least: 0, Most: 8, start: ship(func(p proportions, _ Form) float64 { return float64(p.propellers) })},
		{Key: "propeller_m", Title: "Propeller diameter", Unit: "m", Least: 0.2, Most: 15,
			start: ship(func(p proportions, f Form) float64 { return p.propellerToDraught * f.Value("draught_m") })},
		{Key: "blade_area_ratio", Title: "Blade area ratio", Least: 0.2, Most: 1.5, start: fixed(0.55)},
		{Key: "rudder_m2", Title: "Rudder, one face", Unit: "m²", Hint: "Lateral area of all rudders; 1.5 % of length times draught where not known. 0: none.", Least: 0, Most: 1000,
			start: func(f Form) float64 { return tidy(0.015 * f.Value("length_pp_m") * f.Value("draught_m")) }},
		{Key: "bilge_keel_m", Title: "Bilge keel length", Unit: "m", Hint: "Each of two. 0: none.", Least: 0, Most: 300, start: times(0.35, "length_pp_m")},
		{Key: "thrusters", Title: "Thruster tunnels", Whole: true, Least: 0, Most: 8, start: ship(func(p proportions, _ Form) float64 { return float64(p.thrusters) })},
		{Key: "tunnel_m", Title: "Tunnel diameter", Unit: "m", Least: 0.2, Most: 6, start: func(f Form) float64 { return tidy(min(2.6, 0.0135*f.Value("length_pp_m"))) }},
		{Key: "sea_chests", Title: "Sea chests each side", Whole: true, Least: 0, Most: 20, start: fixed(1)},
		{Key: "tanks_m2", Title: "Ballast tanks, steel inside", Unit: "m²", Hint: "All tanks with anodes, from their drawings. 0: none.", Least: 0, Most: 1000000, start: fixed(0)},
	}
}

func (b *builder) ship() {
	p := hull.Particulars{
		ShipType: b.Ship, LengthPP: b.Value("length_pp_m"), LengthWL: b.Value("length_wl_m"), Beam: b.Value("beam_m"),
		Draught: b.Value("draught_m"), Volume: b.Value("volume_m3"),
	}
	if p.ShipType == "" {
		p.ShipType = "general-cargo"
	}
	b.hull(p, b.Value("boot_top_m"))
	draught := p.Draught
	if keel := b.Value("bilge_keel_m"); keel > 0 {
		b.zone("bilge-keels", "Bilge keels", "bilge-keel", b.take(area.BilgeKeels(2, keel, bilgeKeelHeight*p.Beam)), 0.9*draught, hull.CategoryIII, heldBy("sides"))
	}
	host := "sides"
	if lateral := b.Value("rudder_m2"); lateral > 0 {
		host = "rudder"
		b.zone("rudder", plural("Rudder", b.count("propellers")), "rudder", b.rudder(p, lateral), 0.6*draught, hull.CategoryIII, func(z *hull.Zone) {
			z.Circuit, z.CountMultiple, z.MinCount = "hull", 2, 2
		})
	}
	if n := b.count("propellers"); n > 0 {
		d := b.Value("propeller_m")
		e := b.take(area.Propeller(d, b.Value("blade_area_ratio"), 0.18*d, 0.2*d)).Times(n)
		b.zone("propeller", plural("Propeller", n)+" and shaft", "propeller", e, 0.65*draught, hull.CategoryNone, func(z *hull.Zone) {
			z.Surface, z.Circuit, z.HeldBy = hull.CopperAlloy, "hull", host
		})
	}
	b.seaChests(p)
	if n := b.count("thrusters"); n > 0 {
		d := b.Value("tunnel_m")
		b.zone("thrusters", plural("Thruster tunnel", n), "thruster-tunnel", b.take(area.ThrusterTunnel(d, tunnelLength*d)).Times(n), 0.7*draught, hull.CategoryIII, func(z *hull.Zone) {
			z.CountMultiple = 2 * n // one at each mouth
		})
	}
	b.tanks(draught)
}

// hull adds the parts of a ship-shaped hull's wetted surface: sides that carry
// the anodes of the hull, flat bottom and boot-top that they hold.
func (b *builder) hull(p hull.Particulars, bootTop float64) {
	if block := p.Volume / (p.LengthWL * p.Beam * p.Draught); block > 1 {
		b.take(area.Estimate{}, hull.Fault{Path: "volume_m3", Want: "a volume not above length on the waterline × beam × draught", Got: fmt.Sprintf("%g", p.Volume)})
		return
	}
	surface := b.take(area.ByType(p, 0))
	parts, err := area.Split(surface, p, bootTop)
	if err != nil {
		b.take(area.Estimate{}, err)
		return
	}
	b.p.Particulars = &p
	b.zone("sides", "Vertical sides with bow and stern", "vertical-side", parts.Sides, p.Draught/2, hull.CategoryIII, func(z *hull.Zone) {
		z.Circuit, z.CountMultiple, z.MinCount = "hull", 2, 2*int(math.Ceil(p.LengthPP/hullPairEvery))
	})
	b.zone("flat-bottom", "Flat bottom", "flat-bottom", parts.FlatBottom, p.Draught, hull.CategoryIII, heldBy("sides"))
	if bootTop > 0 {
		b.zone("boot-top", "Boot-top, wetted part", "boot-top", parts.BootTop, bootTop/2, hull.CategoryIII, heldBy("sides"))
	}
}

// rudder estimates both faces: by the rule, unless a lateral area was entered.
func (b *builder) rudder(p hull.Particulars, lateral float64) area.Estimate {
	if _, ok := b.Entered["rudder_m2"]; ok {
		return b.take(area.Rudder(b.take(area.Entered("Rudder, lateral area", lateral))))
	}
	return b.take(area.Rudder(b.take(area.RudderLateral(p.LengthPP, p.Draught))))
}

// seaChests adds the chests of either side, cubes of 1 % of the length.
func (b *builder) seaChests(p hull.Particulars) {
	n := b.count("sea_chests")
	if n == 0 {
		return
	}
	s := tidy(0.01 * p.LengthPP)
	e := b.take(area.SeaChest(s, s, s, gratingShare)).Times(n)
	for _, side := range []struct{ id, name string }{{"ps", "port"}, {"sb", "starboard"}} {
		b.zone("sea-chests-"+side.id, plural("Sea chest", n)+", "+side.name, "sea-chest", e, 0.8*p.Draught, hull.CategoryIII, func(z *hull.Zone) {
			z.CountMultiple = n
		})
	}
}

// tanks adds one zone for all ballast tanks.
func (b *builder) tanks(draught float64) {
	if tanks := b.Value("tanks_m2"); tanks > 0 {
		b.zone("ballast-tanks", "Ballast tanks", "ballast-tank", b.take(area.Entered("Ballast tanks", tanks)), draught/2, hull.CategoryIII, func(z *hull.Zone) {
			z.ImmersedShare = 0.5
		})
	}
}

// heldBy joins a zone to the hull's circuit, held by another's anodes.
func heldBy(host string) func(*hull.Zone) {
	return func(z *hull.Zone) { z.Circuit, z.HeldBy = "hull", host }
}

func plural(s string, n int) string {
	if n > 1 {
		return s + "s"
	}
	return s
}

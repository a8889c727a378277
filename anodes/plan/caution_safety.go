package plan

import (
	"fmt"

	"anodewright/anodes"
	"anodewright/hull"
)

// lowFlash is the flash point in degC of a cargo below which tanks and those
// beside them have rules of their own (IACS Common Structural Rules, Pt 2 Ch 2
// Sec 2).
const lowFlash = 60

// safety raises the rules that guard people, cargo and steel, for one zone.
func (c *raiser) safety(i int) {
	z := &c.o.Zones[i]
	a, zone := c.o.Asset, z.Zone
	const structural = "IACS Common Structural Rules, Pt 2 Ch 2 Sec 2"
	flash := below(zone.FlashPoint, lowFlash) || below(zone.BesideFlashPoint, lowFlash)
	aluminium, magnesium, zinc := usesAlloy(z, hull.Aluminium), usesAlloy(z, hull.Magnesium), usesAlloy(z, hull.Zinc)
	carries := aluminium || magnesium || zinc

	if flash && carries {
		c.add("tank-approval", i, "Cargo with a flash point below 60 °C here or beside: the plan of anode positions and fixings is to be approved by class.", structural, "read")
	}
	if flash && aluminium {
		c.add("drop-energy", i, "Aluminium anodes: a fall may release at most 275 J, so the height times 9.81 times the gross mass stays below; not under hatches or tank-washing openings unless shielded.", structural, "read")
		if zone.DropHeight == nil {
			c.add("drop-height-missing", i, "The drop height is not entered, so it cannot be checked: enter drop_height_m.", structural, "read")
		}
	}
	if zone.Region.Tank() && carries {
		c.add("tank-gas", i, "Anodes give off hydrogen: enough air holes that no gas gathers in pockets, and vent before entry.", structural, "read")
		c.add("tank-fixing", i, "In tanks fix anodes to stiffeners or brackets, not to the shell plating; both ends on members that do not move against each other.", "LR Rules for Linkspans, 3.3.4", "read")
	}
	if zone.FuelBehind && (carries || len(z.Refused) > 0 || own(zone)) {
		c.add("fuel-behind", i, "Fuel lies behind this plating: no welding of anodes here without a gas-free certificate and a hot-work permit; better keep anode rows off it.", "TB 43-0144", "read")
	}
	if p := zone.Protection; p != nil && p.Kind == hull.ImpressedCurrent {
		c.add("divers", i, "Impressed current: off and locked out before divers work near its anodes.", "IMCA D 045", "from memory, to be checked")
	}
	if magnesium && zone.Coated() {
		c.add("disbonding", i, "Magnesium drives coated steel more negative than -1.10 V Ag/AgCl: paint may lift off.", "EN 12473", "from memory")
	}
	if zone.Yield != nil && *zone.Yield > 550 || zone.Surface == hull.HighStrength && zone.Yield == nil {
		c.add("high-strength", i, "Steel above 550 MPa: keep the potential between -0.83 and -0.95 V Ag/AgCl; more negative risks hydrogen cracking. Ordinary aluminium and zinc anodes go further.", "EN 12473", "from memory, to be checked")
	}
	if t := anodes.Hottest(a, zone); t > 40 && zinc {
		c.add("hot-zinc", i, fmt.Sprintf("Zinc at %.0f °C may corrode between its grains and reverse its polarity.", t), "derived from published reversal temperatures", "derived")
	}
	if magnesium && a.Medium(zone) != hull.Fresh && a.Medium(zone) != hull.Soil {
		c.add("magnesium", i, "Magnesium in seawater or sediment only for a short time: it is spent quickly and over-protects.", "LR Rules for Offshore Units, Pt 8 Ch 2", "read")
	}
	if host := lastHost(a, zone); host != zone && host.Protection != nil && host.Protection.Kind == hull.ZincCoat {
		c.add("held-by-coat", i, fmt.Sprintf("Held by %s, which a coat of zinc protects: a coat gives no current to other steel. Nobody holds this zone.", host.Name), "trade", "common practice, no source")
	}
	for _, d := range a.Ahead() {
		for _, w := range d.Works {
			if w.Zone == zone.ID && w.Coating == hull.TouchUp && !zone.Coated() {
				c.add("nothing-to-touch-up", i, fmt.Sprintf("The touch-up on %s changes nothing: the zone has no coating. A first coat is a recoat.", d.Date), "program", "computed")
			}
		}
	}
	if zone.Region == "propeller" || zone.Region == "stern" {
		c.add("inflow", i, "Fit no anode where it disturbs the propeller's inflow.", "trade", "common practice, no source")
	}
}

// alloys raises patterns that state a potential less negative than class
// accepts up to 30 degC: zinc -1.00 V, aluminium -1.05 V.
func (c *raiser) alloys() {
	limit := map[hull.Alloy]float64{hull.Zinc: -1.00, hull.Aluminium: -1.05}
	for i := range c.o.Asset.Patterns {
		p := &c.o.Asset.Patterns[i]
		if most, ok := limit[p.Alloy]; ok && p.Potential != nil && *p.Potential > most+1e-9 {
			c.add("alloy-potential", -1, fmt.Sprintf("Pattern %s states %g V; class asks for %s to be more negative than %.2f V Ag/AgCl up to 30 °C.", p.ID, *p.Potential, p.Alloy, most), "LR Rules for Offshore Units, Pt 8 Ch 2, 2.2.1", "read")
		}
	}
}

// berth raises what ships have to mind alongside.
func (c *raiser) berth() {
	if k := c.o.Asset.Kind; k == hull.Ship || k == hull.FloatingUnit {
		c.add("berth", -1, "Unplanned bonding to piles or other hulls at a berth consumes anodes: isolate, and check after long stays.", "trade", "from memory, to be checked")
	}
}

// lastHost follows held_by to the zone that is held by no other.
func lastHost(a *hull.Asset, z *hull.Zone) *hull.Zone {
	for z.HeldBy != "" {
		z, _ = a.Zone(z.HeldBy)
	}
	return z
}

func below(x *float64, limit float64) bool { return x != nil && *x < limit }

func own(z *hull.Zone) bool {
	_, own := z.Hold().(hull.ByAnodes)
	return own
}

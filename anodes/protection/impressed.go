package protection

import (
	"fmt"
	"math"

	"anodewright/anodes"
	"anodewright/assets"
	"anodewright/hull"
)

// Impressed is the result of an impressed-current system: the current that
// the zone and what hangs on it ask for, the anodes, the voltage, and what
// the steel misses while it is off. A figure that needs something not entered
// is null; Missing says what to enter.
type Impressed struct {
	Refused   string              `json:"refused,omitempty"` // why it must not be used here
	Anode     hull.ImpressedAnode `json:"anode"`
	Years     float64             `json:"years"`
	OffShare  float64             `json:"off_share"`
	Holds     []string            `json:"holds"`       // zones that hang on it
	Local     []string            `json:"local_zones"` // of the asset, that keep anodes of their own
	Factor    float64             `json:"demand_factor"`
	Margin    float64             `json:"margin"`
	Largest   float64             `json:"largest_demand_a"` // with what hangs on it, times the factor
	Mean      float64             `json:"mean_demand_a"`
	Current   *float64            `json:"current_a"` // with the margin
	Rate      *float64            `json:"rate_kg_per_a_year"`
	Mass      *float64            `json:"mass_kg"`     // that the current takes
	ByOutput  *float64            `json:"by_output"`   // exact number of anodes
	ByMass    *float64            `json:"by_mass"`     // by charge for mixed oxide
	Count     *int                `json:"count"`       // the larger, rounded up
	Given     *int                `json:"anode_count"` // as entered
	LifeYears *float64            `json:"life_years"`  // of the anodes entered, else of the count
	One       *float64            `json:"one_ohm"`     // one anode
	Group     *float64            `json:"group_ohm"`   // all anodes
	Circuit   *float64            `json:"circuit_ohm"` // with cable and structure
	Voltage   *float64            `json:"voltage_v"`   //
	Power     *float64            `json:"power_w"`     // direct current
	Intervals []OffInterval       `json:"intervals"`   //
	Missing   []string            `json:"missing"`     // what is missing for the figures that are null
	medium    hull.Medium         // that the anodes stand in
	rho       float64             // ohm m, the highest of the plan
	material  material            //
	protect   *hull.Protection    //
	onYears   float64             // of Years, less the time off
}

// OffInterval is what an impressed-current zone misses in one docking
// interval while the system is off.
type OffInterval struct {
	From      hull.Date `json:"from"`
	To        hull.Date `json:"to"`
	Demand    Triple    `json:"demand_a"` // with what hangs on it, before the factor
	OffHours  float64   `json:"off_hours"`
	Charge    float64   `json:"charge_not_delivered_ah"`
	SteelLoss *float64  `json:"steel_loss_mm"` // of bare steel, at most
}

// material is how an impressed-current anode wears in a medium.
type material struct {
	rate        *float64 // kg/A-year; nil: none, or no figure
	utilisation float64
	perArea     *float64 // A-years that a m2 of mixed oxide lasts
	source      string
	confidence  string
}

// materialOf returns how anodes of a material wear in a medium: scrap steel
// by Faraday's law, mixed oxide by the charge that its coat lasts, the others
// by the handbooks' rates. Sediment counts as seawater.
func materialOf(anode hull.ImpressedAnode, medium hull.Medium) material {
	if medium == hull.Sediment {
		medium = hull.Seawater
	}
	if anode == "mixed-oxide" {
		t := assets.Get("mixed-oxide")
		x := t.Value(string(medium), "density") * t.Value(string(medium), "years")
		return material{utilisation: 1, perArea: &x, source: t.Source(), confidence: t.Confidence}
	}
	t := assets.Get("impressed-anodes")
	r, ok := t.Row(string(anode) + " " + string(medium))
	if !ok {
		return material{utilisation: 1, source: "no rate is known for " + string(anode) + " in this medium (" + string(medium) + ")"}
	}
	m := material{rate: r.Values[0], utilisation: t.Value(r.Name, "utilisation"), source: r.Note, confidence: r.Confidence}
	if anode == "scrap-steel" {
		x := DissolvedPerAmpereYear("iron")
		m.rate = &x
	}
	return m
}

// refusedInTank says why impressed current must not be used in a zone, or
// nothing: it gives off chlorine and hydrogen, and is used in no tank (LR
// Ships Pt 3 Ch 2, 3.3.1; IACS Common Structural Rules Pt 2 Ch 2 Sec 2,
// 1.2.2, for cargo tanks).
func refusedInTank(z *hull.Zone) string {
	if z.Region.Tank() || z.FlashPoint != nil {
		return "impressed current is not used inside tanks: it gives off chlorine and hydrogen"
	}
	return ""
}

// impressed computes the result of zone i, which impressed current holds.
func (c *calculation) impressed(i int) *Impressed {
	z := &c.a.Zones[i]
	p := z.Protection
	medium := c.a.Medium(z)
	r := &Impressed{
		Refused: refusedInTank(z), Anode: p.Anode, OffShare: p.OffShare, Factor: c.factor, Margin: c.a.Basis.Reserve,
		Years: c.a.Horizon.Years(c.a.Start()), Holds: []string{}, Local: c.localZones(i), Missing: []string{},
		medium: medium, rho: c.highestResistivity(z), material: materialOf(p.Anode, medium), protect: p,
	}
	if p.LifeYears != nil {
		r.Years = *p.LifeYears
	}
	r.onYears = r.Years * (1 - p.OffShare)
	for _, h := range c.a.Held(i) {
		r.Holds = append(r.Holds, c.a.Zones[h].ID)
	}
	c.currents(r, i)
	if r.Refused != "" {
		return r
	}
	current := r.Largest * (1 + r.Margin)
	r.Current = &current
	c.trace.Add(hull.Step{
		Figure: "impressed current, required", Value: current, Unit: "A", Formula: "largest demand with what hangs on it × demand factor × (1 + margin)",
		Inputs: []hull.Input{{Name: "largest demand × factor", Value: r.Largest, Unit: "A"}, {Name: "margin: the basis' reserve", Value: r.Margin}},
		Source: "DNV-RP-B401 figures; margin by the basis", Confidence: "computed",
	})
	c.anodeCount(r)
	c.voltage(r)
	return r
}

// currents finds the demands and what is missed while the system is off, all
// the time where it is refused.
func (c *calculation) currents(r *Impressed, i int) {
	off := r.OffShare
	if r.Refused != "" {
		off = 1
	}
	var charge, hours float64
	for k, iv := range c.ivs {
		d := c.demand[i].Total[k]
		r.Largest = max(r.Largest, d.Initial*c.factor, d.Mean*c.factor, d.Final*c.factor)
		charge += d.Mean * c.factor * iv.Hours()
		hours += iv.Hours()
		oi := OffInterval{From: iv.From, To: iv.To, Demand: Triple(d), OffHours: off * iv.Hours(), Charge: off * iv.Hours() * d.Mean * c.factor}
		if loss := freeCorrosion(r.medium); loss != nil {
			x := *loss / 1000 * off * iv.Years()
			oi.SteelLoss = &x
		}
		r.Intervals = append(r.Intervals, oi)
	}
	r.Mean = charge / hours
}

// mostPlatinum is more platinum in kg than one anode carries: that of 4 m2 at
// 5 um. A larger mass is that of the anode with the metal under its coat.
const mostPlatinum = 0.5

// anodeCount finds the mass that wears and the number of anodes, by output
// and by mass: I/rating, and rate I t/(mass of one × utilisation), or for
// mixed oxide the charge over that which the coat of one lasts.
func (c *calculation) anodeCount(r *Impressed) {
	p, m := r.protect, r.material
	if p.AnodeCount > 0 {
		r.Given = &p.AnodeCount
	}
	if p.AnodeRating > 0 {
		r.ByOutput = known(*r.Current / p.AnodeRating)
	} else {
		r.miss("enter the rating of one anode (anode_rating_a): the number of anodes by output")
	}
	var perAnode float64 // A-years that one anode lasts
	switch {
	case m.rate != nil:
		r.Rate = m.rate
		mass := MassByRate(*m.rate, r.Mean, r.onYears, 1)
		r.Mass = &mass
		c.trace.Add(hull.Step{
			Figure: "anode mass that the current takes", Value: mass, Unit: "kg", Formula: "rate × mean current × years on",
			Inputs: []hull.Input{{Name: "rate", Value: *m.rate, Unit: "kg/A-year"}, {Name: "mean current", Value: r.Mean, Unit: "A"}, {Name: "years on", Value: r.onYears, Unit: "years"}},
			Source: m.source, Confidence: m.confidence,
		})
		switch platinum := p.Anode == "platinised"; {
		case platinum && p.AnodeMass > mostPlatinum:
			r.miss(fmt.Sprintf("enter the mass of the platinum on one anode alone (anode_mass_kg): no anode carries %s kg of it", figure(p.AnodeMass)))
		case p.AnodeMass > 0:
			perAnode = p.AnodeMass * m.utilisation / *m.rate
		case platinum:
			r.miss("enter the mass of the platinum on one anode (anode_mass_kg): the number of anodes by mass and their life")
		default:
			r.miss("enter the mass of one anode (anode_mass_kg): the number of anodes by mass and their life")
		}
	case m.perArea != nil:
		if p.AnodeLength > 0 && p.AnodeDiameter > 0 {
			perAnode = *m.perArea * math.Pi * p.AnodeDiameter * p.AnodeLength
		}
	default:
		r.miss(m.source)
	}
	if perAnode > 0 {
		x := r.Mean * r.onYears / perAnode
		r.ByMass = known(x)
		c.trace.Add(hull.Step{
			Figure: "anodes by mass or charge", Value: x, Formula: "mean current × years on / A-years that one anode lasts",
			Inputs: []hull.Input{{Name: "one anode", Value: perAnode, Unit: "A-years"}, {Name: "utilisation", Value: m.utilisation}},
			Source: m.source, Confidence: m.confidence,
		})
	}
	if r.ByOutput != nil && r.ByMass != nil {
		if x := max(*r.ByOutput, *r.ByMass); x <= mostRods {
			n := max(1, int(math.Ceil(x-1e-9)))
			r.Count = &n
		} else {
			r.miss(fmt.Sprintf("more than %d anodes of this size would be needed: enter larger ones", mostRods))
		}
	}
	if n, ok := r.pieces(); ok && perAnode > 0 && r.Mean*(1-r.OffShare) > 0 {
		r.LifeYears = known(float64(n) * perAnode / (r.Mean * (1 - r.OffShare)))
	}
}

// voltage finds the resistance of the anodes as a row of vertical rods, and
// the rectifier's voltage and power: V = I (R_anodes + R_cable + R_structure)
// + back-EMF.
func (c *calculation) voltage(r *Impressed) {
	p := r.protect
	if p.AnodeLength <= 0 || p.AnodeDiameter <= 0 {
		coat := ""
		if r.material.perArea != nil {
			coat = "the life of the oxide coat, "
		}
		r.miss("enter the length and diameter of one anode (anode_length_m, anode_diameter_m): " + coat + "resistance, voltage and power")
		return
	}
	if p.AnodeLength < 2*p.AnodeDiameter {
		r.miss("enter an anode at least twice as long as its diameter: the resistance is that of a rod")
		return
	}
	one := anodes.Rod(r.rho, p.AnodeLength, p.AnodeDiameter)
	r.One = known(one)
	n, ok := r.pieces()
	if !ok {
		r.miss("enter the number of anodes (anode_count), or what it follows from: how many share the current")
		return
	}
	if n > 1 && p.AnodeSpacing <= 0 {
		r.miss("enter the spacing of the anodes (anode_spacing_m): they count as far apart until then")
	}
	group := GroupResistance(one, r.rho, p.AnodeSpacing, n)
	circuit := group + p.CableResistance + p.StructureResistance
	volts := *r.Current*circuit + p.BackEMF
	power := volts * *r.Current
	r.Group, r.Circuit, r.Voltage, r.Power = known(group), known(circuit), known(volts), known(power)
	c.trace.Add(hull.Step{
		Figure: "resistance of the anode group", Value: group, Unit: "ohm", Formula: "R_1/n + rho p(n)/s, R_1 = rho/(2 pi L) (ln(8L/d) - 1)",
		Inputs: []hull.Input{
			{Name: "rho", Value: r.rho, Unit: "ohm m"}, {Name: "length", Value: p.AnodeLength, Unit: "m"}, {Name: "diameter", Value: p.AnodeDiameter, Unit: "m"},
			{Name: "R_1", Value: one, Unit: "ohm"}, {Name: "n", Value: float64(n)}, {Name: "spacing", Value: p.AnodeSpacing, Unit: "m"}, {Name: "p(n)", Value: GroupFactor(n)},
		},
		Source: "Dwight 1936; MIL-HDBK-1004/10, 9.4", Confidence: "published",
	})
	c.trace.Add(hull.Step{
		Figure: "rectifier voltage", Value: volts, Unit: "V", Formula: "I (R anodes + R cable + R structure) + back-EMF",
		Inputs: []hull.Input{
			{Name: "I", Value: *r.Current, Unit: "A"}, {Name: "R anodes", Value: group, Unit: "ohm"}, {Name: "R cable", Value: p.CableResistance, Unit: "ohm"},
			{Name: "R structure", Value: p.StructureResistance, Unit: "ohm"}, {Name: "back-EMF", Value: p.BackEMF, Unit: "V"},
		},
		Source: "Ohm's law", Confidence: "computed",
	})
}

// pieces returns how many anodes share the current: those entered, else those
// needed.
func (r *Impressed) pieces() (int, bool) {
	switch {
	case r.Given != nil:
		return *r.Given, true
	case r.Count != nil:
		return *r.Count, true
	}
	return 0, false
}

// Short says what the anodes entered are too few for, or nothing.
func (r *Impressed) Short() string {
	switch {
	case r.Given == nil:
		return ""
	case r.ByOutput != nil && float64(*r.Given) < *r.ByOutput*(1-1e-9):
		return fmt.Sprintf("the %d anodes give less than the %s A required: %s are needed by output", *r.Given, figure(*r.Current), figure(*r.ByOutput))
	case r.ByMass != nil && float64(*r.Given) < *r.ByMass*(1-1e-9):
		return fmt.Sprintf("the %d anodes are used up after %s years: %s are needed for %s", *r.Given, figure(*r.LifeYears), figure(*r.ByMass), figure(r.Years))
	}
	return ""
}

func (r *Impressed) miss(text string) { r.Missing = append(r.Missing, text) }

// localZones lists the asset's zones that keep anodes of their own beside an
// impressed-current system: those that its current does not reach well.
func (c *calculation) localZones(i int) []string {
	ids := []string{}
	for k := range c.a.Zones {
		z := &c.a.Zones[k]
		if _, own := z.Hold().(hull.ByAnodes); own && k != i {
			switch z.Region {
			case "sea-chest", "rudder", "propeller", "thruster-tunnel", "moon-pool", "node":
				ids = append(ids, z.ID)
			}
		}
	}
	return ids
}

// highestResistivity returns the highest resistivity in ohm m that the plan's
// intervals see at a zone, at their starts and ends.
func (c *calculation) highestResistivity(z *hull.Zone) float64 {
	rho := 0.0
	for _, iv := range c.ivs {
		rho = max(rho, c.a.Resistivity(z, iv.From), c.a.Resistivity(z, iv.To-1))
	}
	return rho
}

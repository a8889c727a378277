package protection

import (
	"math"

	"anodewright/anodes"
	"anodewright/hull"
)

// Rods is the result of a zone in soil or sediment that rods may hold:
// pipe, piles, tanks.
type Rods struct {
	Resistivity float64 `json:"resistivity_ohm_m"` // the highest of the plan
	Factor      float64 `json:"demand_factor"`
	Initial     float64 `json:"largest_initial_a"` // with what the zone holds, times the factor
	Final       float64 `json:"largest_final_a"`
	Mean        float64 `json:"mean_a"`
	Years       float64 `json:"years"`
	Patterns    []Rod   `json:"patterns"`
}

// Rod is one pattern of rod in that soil: one set to last the whole plan.
type Rod struct {
	Pattern   string          `json:"pattern"`
	Alloy     hull.Alloy      `json:"alloy"`
	Driving   float64         `json:"driving_v"`
	One       float64         `json:"one_ohm"`      // new
	OneWorn   float64         `json:"one_worn_ohm"` //
	Output    float64         `json:"output_a"`     // of one new rod alone
	ByMass    float64         `json:"by_mass"`      // exact
	ByCurrent *float64        `json:"by_current"`   // exact, rods far apart; null: no driving voltage
	ByRow     *int            `json:"by_row"`       // at the pattern's spacing; null: no row gives the current
	Count     *int            `json:"count"`        // rounded up, the largest
	Group     *float64        `json:"group_ohm"`    // of the count, new
	RowOutput *float64        `json:"row_output_a"` // of the count, new
	RowLength *float64        `json:"row_length_m"` // of the count; null: no spacing entered
	Life      *float64        `json:"life_years"`   // of the count at the mean demand
	Handbook  *HandbookRod    `json:"handbook"`     // null: no casting of this size, or not magnesium
	Against   []AtResistivity `json:"against_resistivity"`
}

// HandbookRod is a magnesium rod by the handbook's method.
type HandbookRod struct {
	Casting string  `json:"casting"`
	F       float64 `json:"f"`
	Y       float64 `json:"y"`
	Output  float64 `json:"output_a"`
	Count   float64 `json:"count"` // exact, by the largest final demand
}

// AtResistivity is what one new rod gives alone in soil of a resistivity.
type AtResistivity struct {
	Resistivity float64  `json:"resistivity_ohm_m"`
	Output      float64  `json:"output_a"`
	Handbook    *float64 `json:"handbook_a"`
}

// resistivities are the soils of the table of output, in ohm m: from marine
// mud to dry sand.
var resistivities = []float64{1, 2, 5, 10, 20, 50, 100, 200}

// protectedCopper is the potential of protected steel in V against Cu/CuSO4
// at which the handbook's factor y is 1.
const protectedCopper = -0.85

// RowOutput returns the current in A of a row of n rods of a pattern at a
// wastage: the driving voltage over the row's resistance, between new and
// worn in proportion to the wastage, times the shielding.
func RowOutput(p *hull.Pattern, medium hull.Medium, rho, shielding float64, n int, wastage float64) float64 {
	fresh, worn := oneRod(p, rho, false), oneRod(p, rho, true)
	one := fresh + (worn-fresh)*min(1, wastage/p.Utilisation)
	driving := anodes.Protective() - anodes.MetalOf(p, medium).Potential
	return shielding * driving / GroupResistance(one, rho, p.Spacing, n)
}

// oneRod returns the resistance in ohm of one rod with its cable.
func oneRod(p *hull.Pattern, rho float64, worn bool) float64 {
	if worn {
		return anodes.ResistanceWorn(p, rho) + p.SeriesResist
	}
	return anodes.ResistanceNew(p, rho) + p.SeriesResist
}

// rods computes the result of zone i, in soil or sediment; nothing where it
// carries no soil rods and is offered none.
func (c *calculation) rods(i int) *Rods {
	z := &c.a.Zones[i]
	patterns := c.rodPatterns(z)
	if len(patterns) == 0 {
		return nil
	}
	r := &Rods{Resistivity: c.highestResistivity(z), Factor: c.factor, Years: c.a.Horizon.Years(c.a.Start())}
	var charge, hours float64
	for k, iv := range c.ivs {
		d := c.demand[i].Total[k].Times(c.factor)
		r.Initial, r.Final = max(r.Initial, d.Initial), max(r.Final, d.Final)
		charge += d.Mean * iv.Hours()
		hours += iv.Hours()
	}
	r.Mean = charge / hours
	for _, p := range patterns {
		r.Patterns = append(r.Patterns, c.rod(r, z, p, charge))
	}
	return r
}

// rodPatterns returns the soil rods that the zone is offered or carries.
func (c *calculation) rodPatterns(z *hull.Zone) []*hull.Pattern {
	var rods []*hull.Pattern
	seen := map[string]bool{}
	use := func(p *hull.Pattern) {
		if p.Shape == hull.SoilRod && !seen[p.ID] {
			seen[p.ID] = true
			rods = append(rods, p)
		}
	}
	offered, _ := anodes.Offered(c.a, z)
	for _, p := range offered {
		use(p)
	}
	for _, f := range z.Fitted {
		if p, ok := c.a.Pattern(f.Pattern); ok {
			use(p)
		}
	}
	return rods
}

func (c *calculation) rod(r *Rods, z *hull.Zone, p *hull.Pattern, charge float64) Rod {
	medium, rho := c.a.Medium(z), r.Resistivity
	metal := anodes.MetalOf(p, medium)
	one, worn := oneRod(p, rho, false), oneRod(p, rho, true)
	rod := Rod{
		Pattern: p.ID, Alloy: p.Alloy, Driving: anodes.Protective() - metal.Potential, One: one, OneWorn: worn,
		ByMass: CountByMass(charge, p.NetMass, metal.Capacity, p.Utilisation),
	}
	driving := rod.Driving * z.Shielding
	rod.Output = driving / one
	if driving > 0 {
		rod.ByCurrent = known(max(r.Initial*one, r.Final*worn) / driving)
	}
	fresh, ok1 := countForOutput(one, rho, p.Spacing, driving, r.Initial)
	last, ok2 := countForOutput(worn, rho, p.Spacing, driving, r.Final)
	if ok1 && ok2 {
		byRow := max(fresh, last)
		n := max(byRow, int(math.Ceil(rod.ByMass-1e-9)))
		group := GroupResistance(one, rho, p.Spacing, n)
		output := driving / group
		rod.ByRow, rod.Count, rod.Group, rod.RowOutput = &byRow, &n, &group, &output
		if p.Spacing > 0 {
			length := float64(n-1) * p.Spacing
			rod.RowLength = &length
		}
		if charge > 0 {
			life := r.Years * float64(n) / rod.ByMass
			rod.Life = &life
		}
		c.trace.Add(hull.Step{
			Figure: p.ID + ": row of rods, resistance new", Value: group, Unit: "ohm", Formula: "R_1/n + rho p(n)/s, R_1 = rho/(2 pi L) (ln(8L/d) - 1)",
			Inputs: []hull.Input{
				{Name: "rho", Value: rho, Unit: "ohm m"}, {Name: "length", Value: p.Length, Unit: "m"}, {Name: "diameter", Value: p.Diameter, Unit: "m"},
				{Name: "R_1", Value: one, Unit: "ohm"}, {Name: "n", Value: float64(n)}, {Name: "spacing", Value: p.Spacing, Unit: "m"}, {Name: "p(n)", Value: GroupFactor(n)},
			},
			Source: "Dwight 1936; MIL-HDBK-1004/10, 9.4", Confidence: "published",
		})
	}
	f, casting, ok := SizeFactor(p.NetMass, p.Length)
	handbook := ok && p.Alloy == hull.Magnesium
	y := PotentialFactor("magnesium", protectedCopper)
	if handbook {
		output := HandbookOutput(f, y, rho)
		rod.Handbook = &HandbookRod{Casting: casting, F: f, Y: y, Output: output, Count: r.Final / output}
		c.trace.Add(hull.Step{
			Figure: p.ID + ": output of one rod by the handbook", Value: output, Unit: "A", Formula: "C f y / rho, in mA and ohm cm",
			Inputs: []hull.Input{{Name: "f of " + casting, Value: f}, {Name: "y", Value: y}, {Name: "rho", Value: rho * 100, Unit: "ohm cm"}},
			Source: "TM 5-811-7, App. C, Tables C-4 and C-5", Confidence: "read",
		})
	}
	for _, soil := range resistivities {
		at := AtResistivity{Resistivity: soil, Output: driving / oneRod(p, soil, false)}
		if handbook {
			x := HandbookOutput(f, y, soil)
			at.Handbook = &x
		}
		rod.Against = append(rod.Against, at)
	}
	return rod
}

package plan_test

import (
	"math"
	"path/filepath"
	"testing"

	"anodewright/anodes"
	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/hull"
	"anodewright/hull/area"
	"anodewright/hull/water"
	"anodewright/storage/assetfile"
)

// runners gives for every "computes" word the function that has the program
// compute the results of one check, in the program's units.
var runners = map[string]func(*testing.T, given) map[string]float64{
	"breakdown":   runBreakdown,
	"demand":      runDemand,
	"sizing":      runSizing,
	"resistance":  runResistance,
	"worn piece":  runWornPiece,
	"output":      runOutput,
	"drop height": runDropHeight,
	"code chain":  runCodeChain,
	"asset file":  runAssetFile,
	"wall":        runWall,
	"tubulars":    runTubulars,
	"salinity":    runSalinity,
	"resistivity": runResistivity,
	"sediment":    runSediment,
	"fresh water": runFreshWater,
}

func day(n int) hull.Date { return hull.NewDate(2025, 1, 1) + hull.Date(n) }

// days is a number of years in whole days of the code's year.
func days(t *testing.T, years float64) int {
	n := math.Round(years * hull.DaysPerYear)
	if math.Abs(n-years*hull.DaysPerYear) > 1e-6 {
		t.Fatalf("%g years are no whole days", years)
	}
	return int(n)
}

// small is an asset of one zone of bare steel, 1 m2, in seawater of
// 0.25 ohm m, docked a day after its last docking, and without a pattern: days
// runs from that docking to the horizon.
func small(t *testing.T, life int) *hull.Asset {
	t.Helper()
	warm, rho := 15.0, 0.25
	a := &hull.Asset{
		Name: "Case", Kind: hull.Harbour, InService: day(-1), LastDocking: day(-1), Horizon: day(life),
		Waters:   []hull.Water{{ID: "sea", Medium: hull.Seawater, Temperature: &warm, Resistivity: &rho}},
		Dockings: []hull.Docking{{Date: day(0), Kind: hull.DryDock}},
	}
	z := hull.Zone{
		ID: "steel", Name: "Steel", Region: "other", Surface: hull.CarbonSteel, WettedArea: 1, Depth: 5,
		Coating: hull.Coating{Category: hull.CategoryNone}, Waters: []hull.WaterShare{{Water: "sea", Share: 1}},
	}
	hull.SetDefaults(&a.Basis)
	hull.SetDefaults(&z)
	a.Zones = []hull.Zone{z}
	return a
}

// addPattern gives the asset a pattern.
func addPattern(a *hull.Asset, p hull.Pattern) {
	q := hull.Pattern{}
	hull.SetDefaults(&q)
	if p.ID = "piece"; p.Standoff == 0 {
		p.Standoff = q.Standoff
	}
	p.OrderMultiple, p.LeadWeeks = q.OrderMultiple, q.LeadWeeks
	a.Patterns = []hull.Pattern{p}
}

// planned computes an asset that has to be valid, and returns its outcome with
// the only action of the plan.
func planned(t *testing.T, a *hull.Asset) (*plan.Outcome, renewal.Line) {
	t.Helper()
	if faults := hull.Check(a); len(faults) > 0 {
		t.Fatalf("the case is not a valid asset:\n%v", faults)
	}
	o := plan.Compute(a, a.InService)
	if len(o.Schedule) != 1 || len(o.Unmet) > 0 {
		t.Fatalf("%d actions, unmet %v", len(o.Schedule), o.Unmet)
	}
	return o, o.Schedule[0]
}

// runBreakdown: the law over one docking interval from age t1 to t2. Ages of
// half days are doubled and the growth halved, since only their product
// counts.
func runBreakdown(t *testing.T, g given) map[string]float64 {
	a, b, t1, t2 := g.number("a"), g.number("b"), g.or("t1", 0), g.number("t2")
	if whole := t1 * hull.DaysPerYear; whole != math.Trunc(whole) {
		b, t1, t2 = b/2, 2*t1, 2*t2
	}
	s := small(t, 0)
	s.LastDocking, s.Dockings, s.Horizon = day(days(t, t1)), nil, day(days(t, t2))
	s.Zones[0].Coating = hull.Coating{Category: hull.CategoryOwn, Applied: day(0), A: &a, B: &b}
	if t1 == t2 {
		fc, _ := s.BreakdownOn(&s.Zones[0], day(days(t, t1)))
		return map[string]float64{"initial": fc}
	}
	fc := hull.Demand(s)[0].Breakdown[0]
	return map[string]float64{"initial": fc.Initial, "mean": fc.Mean, "final": fc.Final}
}

// runDemand: area times density times breakdown.
func runDemand(t *testing.T, g given) map[string]float64 {
	fc, none, i := g.or("breakdown", 1), 0.0, g.number("density")
	a := small(t, 365)
	z := &a.Zones[0]
	z.WettedArea = g.number("area")
	z.Coating = hull.Coating{Category: hull.CategoryOwn, A: &fc, B: &none}
	z.OwnDensities = &hull.Densities{Initial: i, Mean: i, Final: i}
	d := hull.Demand(a)[0].Own[1]
	if math.Abs(d.Initial-d.Mean) > 1e-9*d.Mean || math.Abs(d.Final-d.Mean) > 1e-9*d.Mean {
		t.Errorf("a demand that does not change comes out as %v", d)
	}
	return map[string]float64{"current": d.Mean}
}

// runSizing: a set of one pattern for a life, by the code's criteria. A
// current that is not given is next to nothing; outputs that are not given
// are large.
func runSizing(t *testing.T, g given) map[string]float64 {
	const small0 = 1e-6 // A
	years := g.number("years")
	a := small(t, days(t, years))
	net, u := g.number("net"), g.or("utilisation", 1)
	capacity := 0.0
	if g.has("rate") {
		capacity = 8760 / g.number("rate")
	} else {
		capacity = g.number("capacity")
	}
	mean := small0
	if g.has("mass_needed") {
		mean = g.number("mass_needed") * u * capacity / (8760 * years)
	} else if g.has("mean") {
		mean = g.number("mean")
	}
	// 1000 m2 take as many A as each m2 takes mA.
	a.Zones[0].WettedArea = 1000
	a.Zones[0].OwnDensities = &hull.Densities{Initial: g.or("initial", small0), Mean: mean, Final: g.or("final", small0)}
	rho, driving := a.Resistivity(&a.Zones[0], day(0)), 0.25
	potential := anodes.Protective() - driving
	addPattern(a, hull.Pattern{
		Alloy: hull.Aluminium, Shape: hull.Stated, NetMass: net, Utilisation: u, Capacity: &capacity, Potential: &potential,
		ShapeFactor:     driving / g.or("output_new", 1e4) / rho,
		ShapeFactorWorn: driving / g.or("output_worn", 1e4) / rho,
	})
	_, l := planned(t, a)
	return map[string]float64{
		"mass": l.Need.Mass, "by_mass": l.Need.ByMass, "by_initial": l.Need.ByInitial, "by_final": l.Need.ByFinal,
		"count": float64(l.Count), "life": years / l.Need.ByMass,
	}
}

// runResistance: one formula; a pattern of those sizes has to come to the same
// where its proportions choose that formula.
func runResistance(t *testing.T, g given) map[string]float64 {
	rho := g.number("rho")
	p := &hull.Pattern{Standoff: 1, Shape: hull.Shape(g.text("formula"))}
	var r float64
	byPattern := true
	switch p.Shape {
	case hull.LongSlender:
		p.Length, p.Radius = g.number("length"), g.number("radius")
		r = anodes.LongSlender(rho, p.Length, p.Radius)
	case hull.ShortSlender:
		p.Length, p.Radius = g.number("length"), g.number("radius")
		r = anodes.ShortSlender(rho, p.Length, p.Radius)
		byPattern = p.Length < 4*p.Radius
	case hull.LongFlush:
		p.Length, p.Width = g.number("length"), g.number("width")
		r = anodes.LongFlush(rho, p.Length, p.Width)
	case hull.ShortFlush:
		p.ExposedArea = g.number("area")
		r = anodes.ShortFlush(rho, p.ExposedArea)
	case hull.SoilRod:
		p.Length, p.Diameter = g.number("length"), g.number("diameter")
		r = anodes.Rod(rho, p.Length, p.Diameter)
	case hull.Stated:
		p.Length = g.number("length")
		p.ShapeFactor = g.number("k") / (p.Length / units["ft"] * units["ohm cm"])
		r = rho * p.ShapeFactor
	default:
		t.Fatalf("no formula of %q", p.Shape)
	}
	if of := anodes.ResistanceNew(p, rho); byPattern && math.Abs(of-r) > 1e-12*r {
		t.Errorf("a pattern of these sizes has %g ohm, the formula gives %g", of, r)
	}
	// K of the handbooks, for a resistivity in ohm cm and a length in ft.
	k := r / rho * p.Length / units["ft"] * units["ohm cm"]
	return map[string]float64{"resistance": r, "k": k}
}

// runWornPiece: a pattern wasted to its utilisation factor. The exposed area
// of a flush one follows from its resistance.
func runWornPiece(t *testing.T, g given) map[string]float64 {
	rho := g.or("rho", 0.25)
	p := &hull.Pattern{
		Alloy: hull.Aluminium, Shape: hull.Shape(g.text("shape")), Standoff: 1, Length: g.number("length"),
		Radius: g.or("radius", 0.1), Width: g.or("width", 0), Height: g.or("height", 0),
		NetMass: g.or("net", 1), InsertVolume: g.or("insert", 0), Utilisation: g.or("utilisation", 0.85),
	}
	if g.has("alloy") {
		p.Alloy = hull.Alloy(g.text("alloy"))
	}
	r := anodes.ResistanceWorn(p, rho)
	return map[string]float64{"resistance": r, "area": math.Pow(0.315*rho/r, 2)}
}

// runOutput: the current of one piece by its potential and resistance.
func runOutput(t *testing.T, g given) map[string]float64 {
	e := g.number("potential")
	p := &hull.Pattern{Alloy: hull.Aluminium, Shape: hull.Stated, ShapeFactor: g.number("resistance"), Potential: &e}
	return map[string]float64{"current": anodes.OutputNew(p, hull.Seawater, 1, 1)}
}

func runDropHeight(t *testing.T, g given) map[string]float64 {
	return map[string]float64{"height": anodes.MaxDropHeight(&hull.Pattern{GrossMass: g.number("gross")})}
}

// runCodeChain: coated and bare steel of one zone, a slab, a life: the whole
// way from breakdown to the count.
func runCodeChain(t *testing.T, g given) map[string]float64 {
	a := small(t, days(t, g.number("years")))
	temperature, rho := g.number("temperature"), g.number("rho")
	a.Waters[0].Temperature, a.Waters[0].Resistivity = &temperature, &rho
	z := &a.Zones[0]
	z.BareArea = g.number("bare_area")
	z.WettedArea = g.number("coated_area") + z.BareArea
	z.Depth = g.number("depth")
	z.Coating.Category = hull.Category(g.text("category"))
	// New at the docking, so that the ages are those of the source.
	a.Dockings[0].Works = []hull.Work{{Zone: z.ID, Coating: hull.Recoat, Category: z.Coating.Category}}
	addPattern(a, hull.Pattern{
		Alloy: hull.Aluminium, Shape: hull.LongFlush, Length: g.number("length"), Width: g.number("width"), NetMass: g.number("net"),
		InsertVolume: g.number("insert"), Utilisation: g.number("utilisation"),
	})
	o, l := planned(t, a)
	iv, p := o.Zones[0].Intervals[1], &a.Patterns[0]
	return map[string]float64{
		"fc_mean": iv.Breakdown.Mean, "fc_final": iv.Breakdown.Final,
		"initial": iv.Demand.Initial, "mean": iv.Demand.Mean, "final": iv.Demand.Final,
		"mass": l.Need.Mass, "resistance_new": anodes.ResistanceNew(p, rho), "resistance_worn": anodes.ResistanceWorn(p, rho),
		"output_new": anodes.OutputNew(p, hull.Seawater, rho, 1), "output_worn": anodes.OutputWorn(p, hull.Seawater, rho, 1),
		"by_mass": l.Need.ByMass, "by_initial": l.Need.ByInitial, "by_final": l.Need.ByFinal, "count": float64(l.Count),
	}
}

// runAssetFile: an asset file of testdata/assets, read and planned as the
// command does. Demands are those of the last interval.
func runAssetFile(t *testing.T, g given) map[string]float64 {
	a, err := assetfile.Read(filepath.Join("../../testdata/assets", g.text("file")))
	if err != nil {
		t.Fatal(err)
	}
	o, l := planned(t, a)
	got := map[string]float64{
		"mass": l.Need.Mass, "by_mass": l.Need.ByMass, "by_initial": l.Need.ByInitial, "by_final": l.Need.ByFinal,
		"by_renew_above": l.Need.ByRenewAbove, "count": float64(l.Count), "net_fitted": float64(l.Count) * l.Pattern.NetMass,
		"years": a.Horizon.Years(l.Date),
	}
	z := &a.Zones[l.Zone]
	for i := range a.Patterns {
		p := &a.Patterns[i]
		rho := a.Resistivity(z, l.Date)
		got["resistance "+p.ID] = anodes.ResistanceNew(p, rho)
		got["output "+p.ID] = anodes.OutputNew(p, a.Medium(z), rho, z.Shielding)
	}
	for i, z := range o.Zones {
		iv := z.Intervals[len(z.Intervals)-1]
		got["area "+z.Zone.ID] = a.Zones[i].WettedArea
		got["own "+z.Zone.ID] = iv.Demand.Mean
		got["total "+z.Zone.ID] = iv.Total.Mean
	}
	return got
}

func estimated(t *testing.T) func(area.Estimate, error) area.Estimate {
	return func(e area.Estimate, err error) area.Estimate {
		t.Helper()
		if err != nil {
			t.Fatal(err)
		}
		return e
	}
}

// runWall: one face of a sheet-pile wall.
func runWall(t *testing.T, g given) map[string]float64 {
	e := estimated(t)(area.SheetPiling(g.number("length"), g.number("depth"), g.number("developed")))
	return map[string]float64{"area": e.Area}
}

// runTubulars: a number of equal members, by diameter or by girth.
func runTubulars(t *testing.T, g given) map[string]float64 {
	d := g.or("diameter", 0)
	if g.has("girth") {
		d = g.number("girth") / math.Pi
	}
	e := estimated(t)(area.Tubular(d, g.number("length"))).Times(int(g.number("count")))
	return map[string]float64{"area": e.Area}
}

// runSalinity: practical salinity from the conductivity ratio.
func runSalinity(t *testing.T, g given) map[string]float64 {
	return map[string]float64{"salinity": water.Salinity(g.number("ratio"), g.number("t68"), g.or("pressure", 0))}
}

// runResistivity: of a water of the asset by its salinity and temperature.
func runResistivity(t *testing.T, g given) map[string]float64 {
	s, t90 := g.number("salinity"), g.number("t68")/1.00024
	w := &hull.Water{ID: "sea", Medium: hull.Seawater, Salinity: &s, Temperature: &t90}
	rho := w.Resist()
	return map[string]float64{"conductivity": 10 / rho, "resistivity": rho}
}

// runSediment: of a sediment by its porosity and its water's resistivity.
func runSediment(t *testing.T, g given) map[string]float64 {
	return map[string]float64{"resistivity": g.number("rho") * water.FormationFactor(g.number("porosity"))}
}

// runFreshWater: of a river or lake by its conductivity at 25 degC, uS/cm.
func runFreshWater(t *testing.T, g given) map[string]float64 {
	k, t90 := g.number("conductivity_25"), g.number("temperature")
	w := &hull.Water{ID: "river", Medium: hull.Fresh, Conductivity25: &k, Temperature: &t90}
	return map[string]float64{"resistivity": w.Resist()}
}

package protection

import (
	"math"
	"strings"
	"testing"

	"anodewright/hull"
)

func date(t *testing.T, s string) hull.Date {
	t.Helper()
	d, err := hull.ParseDate(s)
	if err != nil {
		t.Fatal(err)
	}
	return d
}

func ptr[T any](x T) *T { return &x }

// asset returns a valid asset of one bare zone of 100 m2 in water of 0.25
// ohm m, from 2020 over a docking in 2025 to 2030.
func asset(t *testing.T) *hull.Asset {
	t.Helper()
	a := &hull.Asset{
		Name: "test", Kind: hull.Harbour, InService: date(t, "2010-01-01"), LastDocking: date(t, "2020-01-01"), Horizon: date(t, "2029-12-29"),
		Waters: []hull.Water{
			{ID: "sea", Medium: hull.Seawater, Temperature: ptr(10.0), Resistivity: ptr(0.25)},
			{ID: "ground", Medium: hull.Soil, Resistivity: ptr(20.0)},
		},
		Dockings: []hull.Docking{{Date: date(t, "2024-12-30"), Kind: hull.DryDock}},
		Zones:    []hull.Zone{zone("steel")},
	}
	hull.SetDefaults(&a.Basis)
	a.Basis.Reserve = 0.25
	return a
}

func zone(id string) hull.Zone {
	z := hull.Zone{ID: id, Name: "Zone " + id, Region: "other", Surface: hull.CarbonSteel, WettedArea: 100, Depth: 5,
		Coating: hull.Coating{Category: hull.CategoryNone}, Waters: []hull.WaterShare{{Water: "sea", Share: 1}},
		OwnDensities: &hull.Densities{Initial: 150, Mean: 80, Final: 100}}
	hull.SetDefaults(&z)
	return z
}

func of(t *testing.T, a *hull.Asset, factor float64, i int) *Result {
	t.Helper()
	if fs := hull.Check(a); len(fs) > 0 {
		for _, f := range fs {
			if !strings.HasPrefix(f.Path, "patterns") {
				t.Fatal(fs)
			}
		}
	}
	return Of(a, hull.Demand(a), factor, i)
}

func TestPlainZoneHasNoResult(t *testing.T) {
	if r := of(t, asset(t), 1, 0); r != nil {
		t.Errorf("got %v", r.Words())
	}
}

// ISO 9223, Table 2: 85 um in class C5 lose 4.2 to 8.4 um a year.
func TestZincCoatInAtmosphere(t *testing.T) {
	a := asset(t)
	z := &a.Zones[0]
	z.Surface = hull.Galvanised
	z.Coating.Applied = date(t, "2012-01-01")
	z.Protection = &hull.Protection{Kind: hull.ZincCoat, Thickness: 85, Class: "C5"}
	r := of(t, a, 1, 0).Coat
	near(t, "years", r.Years, 85/8.4, 1e-12)
	near(t, "years at most", *r.YearsMost, 85/4.2, 1e-12)
	// 85/8.4 years of 365 days after 2012-01-01.
	bare := date(t, "2012-01-01") + hull.Date(3693)
	if *r.Bare != bare {
		t.Errorf("bare from %s, want %s", r.Bare, bare)
	}
	near(t, "steel loss", *r.SteelLoss, 200, 0)
	first, second := r.Intervals[0], r.Intervals[1]
	if first.State != CoatWorn || first.BareFrom != bare || second.State != CoatBare {
		t.Errorf("states %q from %s, %q", first.State, first.BareFrom, second.State)
	}
	near(t, "demand once bare", first.Demand.Mean, 8, 1e-12)
	near(t, "steel lost", *first.SteelLoss, 0.2*first.To.Years(bare), 1e-12)
	near(t, "steel lost later", *second.SteelLoss, 0.2*second.To.Years(second.From), 1e-12)
}

func TestZincLossByClass(t *testing.T) {
	for _, c := range []struct {
		class     hull.ExposureClass
		low, high float64
	}{{"C1", 0, 0.1}, {"C2", 0.1, 0.7}, {"C3", 0.7, 2.1}, {"C4", 2.1, 4.2}, {"C5", 4.2, 8.4}, {"CX", 8.4, 25}, {"immersed-temperate", 10, 20}, {"immersed-tropical", 15, 25}} {
		low, high, source, confidence := ZincLoss(c.class)
		if low != c.low || high != c.high || source == "" || confidence == "" {
			t.Errorf("%s: %g to %g by %q (%s), want %g to %g", c.class, low, high, source, confidence, c.low, c.high)
		}
	}
}

// A coat over paint asks, once bare, for what the paint has broken down; a
// thick one in dry air outlasts the plan.
func TestZincCoatUnderPaint(t *testing.T) {
	a := asset(t)
	z := &a.Zones[0]
	z.Coating = hull.Coating{Category: hull.CategoryOwn, A: ptr(0.1), B: ptr(0.0), Applied: date(t, "2020-01-01")}
	z.Protection = &hull.Protection{Kind: hull.ZincCoat, Thickness: 150, Class: "immersed-temperate"}
	r := of(t, a, 1, 0).Coat
	if r.Intervals[0].State != CoatWhole || r.Intervals[0].Demand != nil {
		t.Errorf("first interval %+v", r.Intervals[0])
	}
	near(t, "zinc left", r.Intervals[0].Left, 150-20*5, 1e-9)
	near(t, "demand", r.Intervals[1].Demand.Mean, 0.8, 1e-12)
	z.Protection.Class = "C1"
	r = of(t, a, 1, 0).Coat
	if r.Bare != nil || r.YearsMost != nil || r.Intervals[1].State != CoatWhole {
		t.Errorf("in class C1: bare %v, %+v", r.Bare, r.Intervals[1])
	}
}

// 10 m2 of copper at 80 mA/m2 on 0.5 m2 of bare steel: 1600 mA/m2, 1.86 mm a
// year; its drain is 0.8 A of the zone's demand.
func TestNoblerFitting(t *testing.T) {
	a := asset(t)
	a.Zones[0].Nobler = &hull.Nobler{Metal: "copper", Area: 10, BareSteel: 0.5}
	r := of(t, a, 1, 0).Couple
	iv := r.Intervals[0]
	near(t, "drain", iv.Drain.Mean, 0.8, 1e-12)
	near(t, "drain, initial", iv.Drain.Initial, 1.5, 1e-12)
	near(t, "ratio", *iv.Ratio, 20, 1e-12)
	near(t, "loss", *iv.Loss, 1600*1.1626, 0.1)
	near(t, "least couple", r.DrivingLeast, 0.03, 1e-12)
	near(t, "largest couple", r.DrivingMost, 0.41, 1e-12)
	if r.HeldBy == nil || *r.HeldBy != "steel" || r.BareFrom != "entered" {
		t.Errorf("held by %v, bare %s", r.HeldBy, r.BareFrom)
	}
	// Twice the bare steel halves its loss.
	a.Zones[0].Nobler.BareSteel = 1
	near(t, "loss of twice the steel", *of(t, a, 1, 0).Couple.Intervals[0].Loss, *iv.Loss/2, 1e-9)
	// Without a figure the zone's own bare steel counts.
	a.Zones[0].Nobler.BareSteel = 0
	if r := of(t, a, 1, 0).Couple; *r.Intervals[0].BareSteel != 100 || r.BareFrom != "breakdown" {
		t.Errorf("bare steel %v %s", *r.Intervals[0].BareSteel, r.BareFrom)
	}
}

func TestPropellerDrainsItsHost(t *testing.T) {
	a := asset(t)
	p := zone("propeller")
	p.Region, p.Surface, p.WettedArea, p.HeldBy = "propeller", hull.CopperAlloy, 20, "steel"
	a.Zones = append(a.Zones, p)
	r := of(t, a, 1, 1)
	near(t, "drain", r.Couple.Intervals[0].Drain.Mean, 1.6, 1e-12)
	near(t, "ratio", *r.Couple.Intervals[0].Ratio, 0.2, 1e-12)
	if *r.Couple.HeldBy != "steel" || r.Unbonded != "" {
		t.Errorf("held by %v, %q", r.Couple.HeldBy, r.Unbonded)
	}
	a.Zones[1].Bonded = false
	r = of(t, a, 1, 1)
	if r.Couple.HeldBy != nil || !strings.Contains(r.Unbonded, "shaft is not earthed") {
		t.Errorf("held by %v, %q", r.Couple.HeldBy, r.Unbonded)
	}
}

func impressed(t *testing.T, p hull.Protection) *hull.Asset {
	a := asset(t)
	p.Kind = hull.ImpressedCurrent
	a.Zones[0].Protection = &p
	held := zone("held")
	held.HeldBy, held.WettedArea = "steel", 50
	a.Zones = append(a.Zones, held)
	return a
}

// 150 m2 in all: 22.5 / 12 / 15 A; 25 % on top; scrap steel by Faraday.
func TestImpressedCurrent(t *testing.T) {
	a := impressed(t, hull.Protection{
		Anode: "scrap-steel", OffShare: 0.1, AnodeMass: 500, AnodeRating: 10, AnodeLength: 2, AnodeDiameter: 0.2, AnodeSpacing: 4,
		CableResistance: 0.05, StructureResistance: 0.01, BackEMF: 0.5, LifeYears: ptr(10.0),
	})
	r := of(t, a, 2, 0).Impressed
	near(t, "largest", r.Largest, 45, 1e-9)
	near(t, "mean", r.Mean, 24, 1e-9)
	near(t, "current", *r.Current, 56.25, 1e-9)
	near(t, "mass", *r.Mass, 9.126*24*9, 0.2)
	near(t, "by output", *r.ByOutput, 5.625, 1e-9)
	near(t, "by mass", *r.ByMass, 9.126*24*9/(500*0.5), 1e-3)
	if *r.Count != 8 || r.Given != nil || r.Short() != "" {
		t.Errorf("count %d", *r.Count)
	}
	one := 0.25 / (2 * math.Pi * 2) * (math.Log(80) - 1)
	near(t, "R_1", *r.One, one, 1e-12)
	near(t, "R group", *r.Group, one/8+0.25*GroupFactor(8)/4, 1e-12)
	near(t, "voltage", *r.Voltage, 56.25*(*r.Group+0.06)+0.5, 1e-9)
	near(t, "power", *r.Power, 56.25**r.Voltage, 1e-9)
	near(t, "life", *r.LifeYears, 8/(*r.ByMass)*10, 1e-6)
	iv := r.Intervals[0]
	near(t, "not delivered", iv.Charge, 0.1*24*iv.To.Years(iv.From)*8760, 1e-6)
	near(t, "steel loss", *iv.SteelLoss, 0.1*0.1*5, 0.001)
	if len(r.Missing) > 0 || len(r.Holds) != 1 || r.Holds[0] != "held" {
		t.Errorf("missing %v, holds %v", r.Missing, r.Holds)
	}
	a.Zones[0].Protection.AnodeCount = 5
	if s := of(t, a, 2, 0).Impressed.Short(); !strings.Contains(s, "by output") {
		t.Errorf("five anodes: %q", s)
	}
}

func TestImpressedCurrentWithLittleEntered(t *testing.T) {
	a := impressed(t, hull.Protection{Anode: "mixed-oxide"})
	r := of(t, a, 1, 0)
	p := r.Impressed
	if p.Current == nil || p.Count != nil || p.Voltage != nil || p.Mass != nil || len(p.Missing) < 2 {
		t.Errorf("got %+v", p)
	}
	words := strings.Join(r.Words(), "\n")
	for _, want := range []string{"anode_rating_a", "anode_length_m"} {
		if !strings.Contains(words, want) {
			t.Errorf("no word on %s in:\n%s", want, words)
		}
	}
}

// The coat of mixed oxide lasts for a charge: 600 A/m2 for 20 years.
func TestMixedOxideLastsForACharge(t *testing.T) {
	a := impressed(t, hull.Protection{Anode: "mixed-oxide", AnodeCount: 3, AnodeLength: 1, AnodeDiameter: 0.025, AnodeRating: 50})
	r := of(t, a, 1, 0).Impressed
	per := 600 * 20 * math.Pi * 0.025
	near(t, "by charge", *r.ByMass, r.Mean*r.Years/per, 1e-9)
	near(t, "life", *r.LifeYears, 3*per/r.Mean, 1e-6)
	if *r.Count != 1 || *r.Given != 3 {
		t.Errorf("count %d, given %d", *r.Count, *r.Given)
	}
}

func TestImpressedCurrentRefusedInTanks(t *testing.T) {
	for what, change := range map[string]func(z *hull.Zone){
		"ballast tank": func(z *hull.Zone) { z.Region = "ballast-tank" },
		"cargo tank":   func(z *hull.Zone) { z.Region = "cargo-tank" },
		"flash point":  func(z *hull.Zone) { z.FlashPoint = ptr(40.0) },
	} {
		a := impressed(t, hull.Protection{Anode: "silicon-iron", AnodeMass: 30, AnodeRating: 5})
		change(&a.Zones[0])
		r := of(t, a, 1, 0).Impressed
		if r.Refused == "" || r.Current != nil || r.Count != nil {
			t.Errorf("%s: %+v", what, r)
		}
		iv := r.Intervals[0]
		near(t, what+": charge that nobody gives", iv.Charge, iv.Demand.Mean*float64(iv.To-iv.From)*24, 1e-6)
	}
	a := impressed(t, hull.Protection{Anode: "silicon-iron"})
	if r := of(t, a, 1, 0).Impressed; r.Refused != "" {
		t.Errorf("outside a tank: %s", r.Refused)
	}
}

// Every material in every medium has a rate, a charge or a word on it.
func TestMaterials(t *testing.T) {
	for _, anode := range hull.ImpressedAnode("").Words() {
		for _, medium := range hull.Medium("").Words() {
			m := materialOf(hull.ImpressedAnode(anode), hull.Medium(medium))
			if m.source == "" || m.utilisation <= 0 || m.rate != nil && (*m.rate <= 0 || m.confidence == "") {
				t.Errorf("%s in %s: %+v", anode, medium, m)
			}
		}
	}
	near(t, "silicon iron at sea, 1.0 lb/A-year", *materialOf("silicon-iron", hull.Seawater).rate, pound, 1e-4)
	near(t, "silicon iron in soil, 0.75 lb/A-year", *materialOf("silicon-iron", hull.Soil).rate, 0.75*pound, 1e-3)
	near(t, "platinum, 20 mg/A-year", *materialOf("platinised", hull.Sediment).rate, 20e-6, 1e-12)
}

func TestRodsInSoil(t *testing.T) {
	a := asset(t)
	z := &a.Zones[0]
	z.Waters, z.Patterns = []hull.WaterShare{{Water: "ground", Share: 1}}, []string{"mg", "zn"}
	z.OwnDensities = &hull.Densities{Initial: 10, Mean: 4, Final: 8}
	a.Patterns = []hull.Pattern{
		{ID: "mg", Alloy: hull.Magnesium, Shape: hull.SoilRod, Length: 0.5, Diameter: 0.15, Spacing: 5, NetMass: 32 * pound, Utilisation: 0.85},
		{ID: "zn", Alloy: hull.Zinc, Shape: hull.SoilRod, Length: 1.5, Diameter: 0.06, NetMass: 27, Utilisation: 0.85},
		{ID: "slab", Alloy: hull.Zinc, Shape: hull.LongFlush, Length: 1.5, Width: 0.1, NetMass: 27, Utilisation: 0.85},
	}
	r := of(t, a, 1, 0).Rods
	if len(r.Patterns) != 2 {
		t.Fatalf("patterns %+v", r.Patterns)
	}
	mg, zn := r.Patterns[0], r.Patterns[1]
	near(t, "driving of magnesium", mg.Driving, 0.7, 1e-12)
	near(t, "R_1", mg.One, 20/(2*math.Pi*0.5)*(math.Log(8*0.5/0.15)-1), 1e-9)
	near(t, "output alone", mg.Output, 0.7/mg.One, 1e-12)
	charge := 0.4 * 10 * 8760
	near(t, "by mass", mg.ByMass, charge/(32*pound*0.85*1100), 1e-9)
	if float64(*mg.ByRow) < *mg.ByCurrent {
		t.Errorf("a row of %d rods, %g far apart", *mg.ByRow, *mg.ByCurrent)
	}
	n := *mg.ByRow
	p := &a.Patterns[0]
	enough := func(n int) bool {
		return RowOutput(p, hull.Soil, 20, 1, n, 0) >= 1 && RowOutput(p, hull.Soil, 20, 1, n, 0.85) >= 0.8
	}
	if !enough(n) || enough(n-1) {
		t.Errorf("a row of %d is not the shortest that gives the current", n)
	}
	near(t, "row length", *mg.RowLength, float64(*mg.Count-1)*5, 1e-9)
	near(t, "life", *mg.Life, 10*float64(*mg.Count)/mg.ByMass, 1e-6)
	near(t, "handbook", mg.Handbook.Output, 0.12*1.06/2000*1000, 1e-9)
	if zn.Handbook != nil || zn.RowLength != nil {
		t.Errorf("zinc %+v", zn)
	}
	if *zn.ByRow != int(math.Ceil(*zn.ByCurrent-1e-9)) {
		t.Errorf("zinc far apart: %d of %g", *zn.ByRow, *zn.ByCurrent)
	}
	for k := 1; k < len(mg.Against); k++ {
		if mg.Against[k].Output >= mg.Against[k-1].Output {
			t.Errorf("more output in soil of %g ohm m", mg.Against[k].Resistivity)
		}
	}
}

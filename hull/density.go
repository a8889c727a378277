package hull

import (
	"strings"
	"sync"

	"anodewright/assets"
)

// The climate classes of the offshore code, warmest first.
var climates = [4]string{"tropical", "sub-tropical", "temperate", "arctic"}

// The depth bands of the offshore code in m.
var bands = [4]string{"0-30", ">30-100", ">100-300", ">300"}

func bandOf(depth float64) int {
	switch {
	case depth <= 30:
		return 0
	case depth <= 100:
		return 1
	case depth <= 300:
		return 2
	}
	return 3
}

// reference is the tables of current densities as they are used: read once.
type reference struct {
	warmest                [3]float64 // degC: above tropical, from sub-tropical, from temperate
	code                   [4][4]Densities
	rebar                  [4][2]float64
	areas                  map[string]Densities // by name in small letters
	coating                [3][3]float64        // of categories I to III: a, b to 30 m, b deeper
	sediment, sprayed      float64
	perDegree, sprayedPerC float64
	wellDrain              float64
}

var tables = sync.OnceValue(func() *reference {
	r := new(reference)
	climate := assets.Get("climate")
	for i := range r.warmest {
		r.warmest[i] = climate.Value(climates[i], "from")
	}
	for c, climate := range climates {
		for b, band := range bands {
			r.code[c][b] = densityRow("code-densities", climate+" "+band)
		}
		for b, band := range []string{"0-30", ">30"} {
			r.rebar[c][b] = assets.Get("code-rebar").Value(climate+" "+band, "value")
		}
	}
	r.areas = map[string]Densities{}
	for _, row := range assets.Get("class-densities").Rows {
		r.areas[strings.ToLower(row.Name)] = densityRow("class-densities", row.Name)
	}
	for k, cat := range []Category{CategoryI, CategoryII, CategoryIII} {
		for c, column := range []string{"a", "b to 30 m", "b deeper"} {
			r.coating[k][c] = assets.Get("code-coating").Value(string(cat), column)
		}
	}
	other := assets.Get("code-other")
	r.sediment = other.Value("sediment, mA/m2", "value")
	r.sprayed = other.Value("sprayed aluminium or zinc, mA/m2", "value")
	r.perDegree = other.Value("heated steel, mA/m2 per degC above 25", "value")
	r.sprayedPerC = other.Value("sprayed and heated, mA/m2 per degC above 25", "value")
	r.wellDrain = other.Value("well casing, A per well", "value")
	return r
})

func densityRow(table, row string) Densities {
	t := assets.Get(table)
	return Densities{t.Value(row, "initial"), t.Value(row, "mean"), t.Value(row, "final")}
}

// climateOf returns the climate class of a surface temperature.
func (r *reference) climateOf(t float64) int {
	switch {
	case t > r.warmest[0]:
		return 0
	case t >= r.warmest[1]:
		return 1
	case t >= r.warmest[2]:
		return 2
	}
	return 3
}

// surroundings is a water with what follows from it for the densities.
type surroundings struct {
	w       *Water
	climate int // -1: not known
	area    Densities
	inArea  bool
}

func (r *reference) surroundings(w *Water) surroundings {
	s := surroundings{w: w, climate: -1}
	switch {
	case w.SurfaceTemperature != nil:
		s.climate = r.climateOf(*w.SurfaceTemperature)
	case w.Temperature != nil:
		s.climate = r.climateOf(*w.Temperature)
	}
	if row, ok := seaAreaRow(*w); ok {
		s.area, s.inArea = r.areas[strings.ToLower(row)]
	}
	return s
}

// Climate returns the climate class of the offshore code, by the annual mean
// surface temperature; nothing when no temperature is known.
func (w *Water) Climate() string {
	r := tables()
	if s := r.surroundings(w); s.climate >= 0 {
		return climates[s.climate]
	}
	return ""
}

// heat is by how much the steel is warmer inside than 25 degC.
func (z *Zone) heat() float64 {
	if z.InsideTemperature == nil {
		return 0
	}
	return max(0, *z.InsideTemperature-25)
}

// basisOfDensity says which table a zone's bare densities come from.
type basisOfDensity int

const (
	fromOwn basisOfDensity = iota
	fromNothing
	fromSprayed
	fromRebar
	fromSediment
	fromArea
	fromCode
)

// basis chooses the table of a zone's densities in one water: the zone's own
// figures, else by its surface (DNV-RP-B401, 6.3.4 to 6.3.12), else sediment,
// else the class rule by sea area where the basis asks for it, else the
// offshore code by climate and depth.
func (z *Zone) basis(rule DensityRule, s surroundings) basisOfDensity {
	switch {
	case z.OwnDensities != nil:
		return fromOwn
	case z.Compartment == Sealed:
		return fromNothing
	case z.Surface == Galvanised || z.Surface == SprayedAluminium:
		return fromSprayed
	case z.Surface == Reinforcement && s.climate >= 0:
		return fromRebar
	case s.w.Medium == Sediment || s.w.Medium == Soil || s.climate < 0:
		return fromSediment
	case rule == SeaArea && s.w.Medium == Seawater && s.inArea:
		return fromArea
	}
	return fromCode
}

// band is the depth band of the zone's densities: its own, but that of
// 30 to 100 m inside a flooded compartment.
func (z *Zone) band() int {
	if z.Compartment == FreeFlooded {
		return 1
	}
	return bandOf(z.Depth)
}

// density returns the design current densities of the zone's bare surface in
// one water, in mA/m2.
func (z *Zone) density(r *reference, rule DensityRule, s surroundings) Densities {
	d := Densities{}
	heat := 0.0
	switch z.basis(rule, s) {
	case fromOwn:
		return *z.OwnDensities
	case fromNothing:
		return d
	case fromSprayed:
		x := r.sprayed + r.sprayedPerC*z.heat()
		return Densities{x, x, x}
	case fromRebar:
		x := r.rebar[s.climate][min(bandOf(z.Depth), 1)]
		return Densities{x, x, x}
	case fromSediment:
		d = Densities{r.sediment, r.sediment, r.sediment}
		heat = r.perDegree * z.heat()
	case fromArea:
		d = s.area
		heat = r.perDegree * z.heat()
	case fromCode:
		d = r.code[s.climate][z.band()]
		heat = r.perDegree * z.heat()
	}
	return Densities{d.Initial + heat, d.Mean + heat, d.Final + heat}
}

// DensitySource says which table and row a zone's densities come from in one
// of its waters, and how sure the figure is.
func (a *Asset) DensitySource(z *Zone, rule DensityRule, waterID string) (source, confidence string) {
	if rule == HullPractice && PracticeApplies(a, z) {
		t := assets.Get("practice-densities")
		return t.Title, t.Confidence
	}
	r := tables()
	w, _ := a.Water(waterID)
	s := r.surroundings(w)
	table, row := "code-densities", ""
	switch z.basis(rule, s) {
	case fromOwn:
		return "the zone's own densities", "entered"
	case fromNothing:
		return "DNV-RP-B401: closed and sealed compartment, normally none", "from memory"
	case fromSprayed:
		table, row = "code-other", "sprayed aluminium or zinc, mA/m2"
	case fromRebar:
		table, row = "code-rebar", climates[s.climate]+" "+[]string{"0-30", ">30"}[min(bandOf(z.Depth), 1)]
	case fromSediment:
		table, row = "code-other", "sediment, mA/m2"
	case fromArea:
		table = "class-densities"
		row, _ = seaAreaRow(*w)
	case fromCode:
		row = climates[s.climate] + " " + bands[z.band()]
	}
	t := assets.Get(table)
	found, ok := t.Row(row)
	if !ok {
		panic("hull: table " + table + " has no row " + row)
	}
	return t.Source() + ", " + row, found.Confidence
}

// SeaAreaApplies reports whether the class rule by sea area has figures for
// all of the zone's waters: seawater of named areas, for a surface that it
// tells.
func SeaAreaApplies(a *Asset, z *Zone) bool {
	r := tables()
	for _, s := range z.Waters {
		w, _ := a.Water(s.Water)
		if z.basis(SeaArea, r.surroundings(w)) != fromArea {
			return false
		}
	}
	return true
}

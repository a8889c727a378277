package hull

import (
	"fmt"

	"anodewright/assets"
)

// DepthBand returns the offshore code's depth band of a depth in m.
func DepthBand(depth float64) string {
	switch {
	case depth <= 30:
		return "0-30"
	case depth <= 100:
		return ">30-100"
	case depth <= 300:
		return ">100-300"
	}
	return ">300"
}

// density returns the design current densities of the zone's bare surface in
// one water, in mA/m2, by the given rule: DNV-RP-B401 6.3 by climate and
// depth, or the class rule by sea area. Ship practice has none: it is per
// painted area, see practiceDensity.
func (z *Zone) density(rule DensityRule, w *Water) Densities {
	other := assets.Get("code-other")
	all := func(x float64) Densities { return Densities{x, x, x} }
	heat := 0.0
	if z.InsideTemperature != nil {
		heat = max(0, *z.InsideTemperature-25)
	}
	switch z.Surface {
	case Galvanised, SprayedAluminium:
		return all(other.Value("sprayed aluminium or zinc, mA/m2", "value") +
			heat*other.Value("sprayed and heated, mA/m2 per degC above 25", "value"))
	case Reinforcement:
		band := "0-30"
		if z.Depth > 30 {
			band = ">30"
		}
		if c := w.Climate(); c != "" {
			return all(assets.Get("code-rebar").Value(c+" "+band, "value"))
		}
	}
	var d Densities
	row, inArea := seaAreaRow(*w)
	switch {
	case w.Medium == Sediment || w.Medium == Soil || w.Climate() == "":
		d = all(other.Value("sediment, mA/m2", "value"))
	case rule == SeaArea && w.Medium == Seawater && inArea:
		d = densityRow("class-densities", row)
	default:
		d = densityRow("code-densities", w.Climate()+" "+DepthBand(z.Depth))
	}
	heat *= other.Value("heated steel, mA/m2 per degC above 25", "value")
	return Densities{d.Initial + heat, d.Mean + heat, d.Final + heat}
}

func densityRow(table, row string) Densities {
	t := assets.Get(table)
	return Densities{t.Value(row, "initial"), t.Value(row, "mean"), t.Value(row, "final")}
}

// DensitySource says which table and row a zone's densities come from in one
// of its waters, and how sure the figure is.
func (a *Asset) DensitySource(z *Zone, rule DensityRule, waterID string) (source, confidence string) {
	if z.OwnDensities != nil {
		return "the zone's own densities", "entered"
	}
	w, _ := a.Water(waterID)
	if rule == HullPractice && PracticeApplies(a, z) {
		t := assets.Get("practice-densities")
		return t.Title, t.Confidence
	}
	table, row := "code-densities", w.Climate()+" "+DepthBand(z.Depth)
	areaRow, inArea := seaAreaRow(*w)
	switch {
	case z.Surface == Galvanised || z.Surface == SprayedAluminium:
		table, row = "code-other", "sprayed aluminium or zinc, mA/m2"
	case z.Surface == Reinforcement:
		return assets.Get("code-rebar").Source(), assets.Get("code-rebar").Confidence
	case w.Medium == Sediment || w.Medium == Soil || w.Climate() == "":
		table, row = "code-other", "sediment, mA/m2"
	case rule == SeaArea && inArea:
		table, row = "class-densities", areaRow
	}
	t := assets.Get(table)
	r, ok := t.Row(row)
	if !ok {
		panic(fmt.Sprintf("hull: table %s has no row %s", table, row))
	}
	return t.Source() + ", " + row, r.Confidence
}

func wellDrain() float64 { return assets.Get("code-other").Value("well casing, A per well", "value") }

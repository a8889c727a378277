package propose

import (
	"math"

	"anodewright/hull"
	"anodewright/hull/area"
)

func pipelineFields() []Field {
	return []Field{
		{Key: "length_m", Title: "Length under water", Unit: "m", Least: 1, Most: 1000000, start: fixed(5000)},
		{Key: "diameter_m", Title: "Steel diameter, outside", Unit: "m", Hint: "Of the steel, without coating or concrete.", Least: 0.03, Most: 3, start: fixed(0.508)},
		{Key: "water_depth_m", Title: "Water depth, mean", Unit: "m", Least: 0.5, Most: 4000, start: fixed(30)},
		{Key: "buried", Title: "Share buried in the sea bed", Least: 0, Most: 1, start: fixed(0.3)},
		{Key: "landfall_m", Title: "Buried length ashore", Unit: "m", Hint: "0: none.", Least: 0, Most: 100000, start: fixed(0)},
	}
}

// Constants of pipeline coating and current densities (DNV-RP-F103, 2010, Table
// 5-1, for 50 degC inside at most; from memory). The coating's are those of a
// factory-coated line with its field joints.
const (
	pipeCoatA, pipeCoatB   = 0.03, 0.0003
	pipeExposed, pipeCover = 50.0, 20.0 // mA/m2
	braceletEvery          = 300.0      // m of line between bracelets at most
)

func (b *builder) pipeline() {
	long, d, depth, buried := b.Value("length_m"), b.Value("diameter_m"), b.Value("water_depth_m"), b.Value("buried")
	line := func(id, name, water string, length, depth, density float64, circuit string, bracelets bool) {
		b.zone(id, name, "pipeline", b.take(area.Tubular(d, length)), depth, hull.CategoryOwn, func(z *hull.Zone) {
			z.Circuit = circuit
			in(z, water)
			coatA, coatB := pipeCoatA, pipeCoatB
			z.Coating.A, z.Coating.B = &coatA, &coatB
			z.OwnDensities = &hull.Densities{Initial: density, Mean: density, Final: density}
			if bracelets {
				z.MinCount = int(math.Ceil(length / braceletEvery))
			}
		})
	}
	if buried < 1 {
		line("line", "Line on the sea bed", Sea, long*(1-buried), depth, pipeExposed, "line", true)
	}
	if buried > 0 {
		line("line-buried", "Line buried in the sea bed", SeaBed, long*buried, depth, pipeCover, "line", true)
	}
	if shore := b.Value("landfall_m"); shore > 0 {
		line("landfall", "Landfall, buried ashore", Shore, shore, 1.5, pipeCover, "landfall", false)
	}
}

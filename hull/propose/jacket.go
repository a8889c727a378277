package propose

import (
	"fmt"
	"math"

	"anodewright/hull"
	"anodewright/hull/area"
)

func jacketFields() []Field {
	return []Field{
		{Key: "water_depth_m", Title: "Water depth", Unit: "m", Least: 3, Most: 500, start: fixed(80)},
		{Key: "legs", Title: "Legs", Whole: true, Least: 1, Most: 16, start: fixed(4)},
		{Key: "leg_m", Title: "Leg diameter", Unit: "m", Hint: "Of the steel: marine growth adds to what waves see, not to the area to protect.", Least: 0.2, Most: 10, start: fixed(1.6)},
		{Key: "batter", Title: "Leg length per m of height", Hint: "1 for upright legs; 1.01 for a batter of 1 in 7.", Least: 1, Most: 1.5, start: fixed(1.01)},
		{Key: "braces", Title: "Braces, share of the legs", Hint: "Area of braces and nodes over that of the legs.", Least: 0, Most: 10, start: fixed(1.4)},
		{Key: "conductors", Title: "Conductors", Hint: "Each also draws 5 A for its well.", Whole: true, Least: 0, Most: 60, start: fixed(6)},
		{Key: "conductor_m", Title: "Conductor diameter", Unit: "m", Least: 0.1, Most: 2, start: fixed(0.66)},
		{Key: "piles", Title: "Piles", Whole: true, Least: 0, Most: 60, start: func(f Form) float64 { return f.Value("legs") }},
		{Key: "pile_m", Title: "Pile diameter", Unit: "m", Least: 0.2, Most: 10, start: fixed(1.5)},
		{Key: "pile_depth_m", Title: "Pile length in the sea bed", Unit: "m", Least: 1, Most: 200, start: fixed(45)},
		{Key: "pile_tops", Title: "Open pile tops under water", Hint: "Their inside counts over five diameters.", Whole: true, Least: 0, Most: 60, start: fixed(0)},
		{Key: "mudmats_m2", Title: "Mudmats, both sides", Unit: "m²", Least: 0, Most: 10000, start: func(f Form) float64 { return 60 * f.Value("legs") }},
	}
}

// jacket adds legs, braces and conductors by the code's depth bands, and what
// lies in the sea bed, held by the deepest legs.
func (b *builder) jacket() {
	depth, legs := b.Value("water_depth_m"), b.count("legs")
	member := func(diameter, slope float64) []area.Part {
		parts, err := area.Member{Diameter: diameter, Top: 0, Bottom: -depth, Length: depth * slope}.Split(-depth)
		b.take(area.Estimate{}, err)
		return parts
	}
	host, braceHost := "", ""
	for i, part := range member(b.Value("leg_m"), b.Value("batter")) {
		leg := b.take(area.Tubular(b.Value("leg_m"), part.Length)).Times(legs)
		host = "legs-" + bandID(part)
		braceHost = host
		b.zone(host, "Legs, "+bandName(part), "jacket-leg", leg, part.Depth(), hull.CategoryNone, func(z *hull.Zone) {
			z.Circuit, z.CountMultiple, z.MinCount = "jacket", 1, legs
		})
		if share := b.Value("braces"); share > 0 {
			brace := leg
			brace.Name, brace.Area = "Braces by their share of the legs", share*leg.Area
			brace.Formula = fmt.Sprintf("%g × (%s)", share, leg.Formula)
			brace.Source, brace.Confidence, brace.Benchmark = "trade", "common practice, no source", "the weight list decides"
			braceHost = "braces-" + bandID(part)
			b.zone(braceHost, "Braces and nodes, "+bandName(part), "brace", brace, part.Depth(), hull.CategoryNone, func(z *hull.Zone) { z.Circuit = "jacket" })
		}
		if n := b.count("conductors"); n > 0 {
			pipes := member(b.Value("conductor_m"), 1)
			b.zone("conductors-"+bandID(part), "Conductors, "+bandName(part), "conductor",
				b.take(area.Tubular(b.Value("conductor_m"), pipes[i].Length)).Times(n), part.Depth(), hull.CategoryNone, func(z *hull.Zone) {
					z.Circuit, z.HeldBy = "jacket", braceHost
					if part.Bottom == -depth {
						z.Wells = n // the casings draw from below
					}
				})
		}
	}
	b.seaBed(depth, host)
}

// seaBed adds piles, their open tops and mudmats.
func (b *builder) seaBed(depth float64, host string) {
	held := func(water string) func(*hull.Zone) {
		return func(z *hull.Zone) {
			z.Circuit, z.HeldBy = "jacket", host
			in(z, water)
		}
	}
	if n := b.count("piles"); n > 0 {
		long := b.Value("pile_depth_m")
		b.zone("piles", "Piles in the sea bed", "pile", b.take(area.Tubular(b.Value("pile_m"), long)).Times(n), depth+long/2, hull.CategoryNone, held(SeaBed))
	}
	if n := b.count("pile_tops"); n > 0 {
		e := b.take(area.OpenPileTop(b.Value("pile_m"), b.Value("pile_depth_m"))).Times(n)
		b.zone("pile-tops", "Open pile tops, inside", "pile", e, depth, hull.CategoryNone, held(Sea))
	}
	if mats := b.Value("mudmats_m2"); mats > 0 {
		b.zone("mudmats", "Mudmats", "mudmat", b.take(area.Entered("Mudmats", mats)), depth, hull.CategoryNone, held(SeaBed))
	}
}

// bandID and bandName name a part in the water by its depths.
func bandID(p area.Part) string {
	return fmt.Sprintf("%.0f-%.0f", math.Abs(p.Top), math.Abs(p.Bottom))
}

func bandName(p area.Part) string {
	return fmt.Sprintf("%.4g to %.4g m", math.Abs(p.Top), math.Abs(p.Bottom))
}

package propose

import (
	"fmt"

	"anodewright/hull"
	"anodewright/hull/area"
)

func harbourFields() []Field {
	return []Field{
		{Key: "piles", Title: "Tubular piles", Hint: "0: none.", Whole: true, Least: 0, Most: 2000, start: fixed(40)},
		{Key: "pile_m", Title: "Pile diameter", Unit: "m", Least: 0.1, Most: 5, start: fixed(0.9)},
		{Key: "pile_slope", Title: "Pile length per m of height", Hint: "1 for upright piles; 1.03 for a rake of 1 in 4.", Least: 1, Most: 1.5, start: fixed(1)},
		{Key: "wall_m", Title: "Sheet-pile wall, length", Unit: "m", Hint: "0: none.", Least: 0, Most: 20000, start: fixed(0)},
		{Key: "developed", Title: "Developed area of the wall", Unit: "m²/m²", Hint: "Steel of one face per m² of wall, by the maker; 1.54 of U sections 600 mm wide.", Least: 1, Most: 3, start: fixed(area.DevelopedU)},
		{Key: "water_depth_m", Title: "Depth at low water", Unit: "m", Least: 0.5, Most: 60, start: fixed(10)},
		{Key: "tide_m", Title: "Tidal range", Unit: "m", Hint: "0: no tidal band.", Least: 0, Most: 16, start: fixed(3)},
		{Key: "mud_m", Title: "Length in the mud", Unit: "m", Hint: "0: not counted.", Least: 0, Most: 100, start: fixed(12)},
		{Key: "earth_m", Title: "Height of earth behind the wall", Unit: "m", Hint: "0: the earth side is not counted.", Least: 0, Most: 60, start: fixed(0)},
	}
}

func (b *builder) harbour() {
	b.harbourPiles()
	b.harbourWall()
}

func (b *builder) harbourPiles() {
	n, d, slope := b.count("piles"), b.Value("pile_m"), b.Value("pile_slope")
	if n == 0 {
		return
	}
	depth, tide, mud := b.Value("water_depth_m"), b.Value("tide_m"), b.Value("mud_m")
	const region = "tubular-pile"
	parts, err := area.Member{Diameter: d, Bottom: -depth - mud, Length: (depth + mud) * slope}.Split(-depth)
	b.take(area.Estimate{}, err)
	host := "piles"
	for i, part := range parts {
		e := b.take(area.Tubular(d, part.Length)).Times(n)
		switch {
		case part.Exposure == area.Mud:
			b.zone("piles-mud", "Piles in the mud", region, e, part.Depth(), hull.CategoryNone, func(z *hull.Zone) {
				z.Circuit, z.HeldBy = "piles", host
				in(z, SeaBed)
			})
		case i == 0:
			b.zone(host, "Piles, "+bandName(part), region, e, part.Depth(), hull.CategoryII, own("piles"))
		default: // deeper than the code's first band
			host = "piles-" + bandID(part)
			b.zone(host, "Piles, "+bandName(part), region, e, part.Depth(), hull.CategoryII, own("piles"))
		}
	}
	if tide > 0 {
		b.zone("piles-tidal", "Piles, tidal band", region, b.take(area.Tubular(d, tide*slope)).Times(n), tide/2, hull.CategoryII, tidal("piles"))
	}
}

func (b *builder) harbourWall() {
	long, f := b.Value("wall_m"), b.Value("developed")
	if long == 0 {
		return
	}
	depth, tide, mud, earth := b.Value("water_depth_m"), b.Value("tide_m"), b.Value("mud_m"), b.Value("earth_m")
	const region = "sheet-piling"
	face := func(height float64) area.Estimate { return b.take(area.SheetPiling(long, height, f)) }
	b.zone("wall", fmt.Sprintf("Sheet piling, water side, 0 to %g m", depth), region, face(depth), depth/2, hull.CategoryII, own("wall"))
	if tide > 0 {
		b.zone("wall-tidal", "Sheet piling, tidal band", region, face(tide), tide/2, hull.CategoryII, tidal("wall"))
	}
	held := func(water string) func(*hull.Zone) {
		return func(z *hull.Zone) {
			z.Circuit, z.HeldBy = "wall", "wall"
			in(z, water)
		}
	}
	if mud > 0 {
		b.zone("wall-mud", "Sheet piling in the mud, water side", region, face(mud), depth+mud/2, hull.CategoryNone, held(SeaBed))
	}
	if earth > 0 {
		b.zone("wall-earth", "Sheet piling, earth side", region, face(earth), earth/2, hull.CategoryNone, held(Shore))
	}
}

func own(circuit string) func(*hull.Zone) {
	return func(z *hull.Zone) { z.Circuit = circuit }
}

// tidal is a band that is wet half of the time and held from below.
func tidal(host string) func(*hull.Zone) {
	return func(z *hull.Zone) { z.Circuit, z.HeldBy, z.ImmersedShare = host, host, 0.5 }
}

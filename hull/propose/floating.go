package propose

import (
	"fmt"

	"anodewright/hull"
	"anodewright/hull/area"
)

func floatingFields() []Field {
	return []Field{
		{Key: "length_m", Title: "Length", Unit: "m", Hint: "On the waterline.", Least: 5, Most: 600, start: fixed(240)},
		{Key: "beam_m", Title: "Breadth", Unit: "m", Least: 2, Most: 150, start: times(1/5.6, "length_m")},
		{Key: "draught_m", Title: "Draught", Unit: "m", Least: 0.5, Most: 60, start: times(1/2.9, "beam_m")},
		{Key: "block", Title: "Block coefficient", Hint: "0.80 to 0.90 of a ship form, near 1 of a barge.", Least: 0.3, Most: 1, start: fixed(0.85)},
		{Key: "boot_top_m", Title: "Boot-top below water", Unit: "m", Hint: "Height of its wetted part. 0: none apart.", Least: 0, Most: 10, start: fixed(1.5)},
		{Key: "pontoons", Title: "Pontoons", Hint: "0: a ship-shaped hull. Else pontoons under water that carry columns, and the length is that of a pontoon.", Whole: true, Least: 0, Most: 8, start: fixed(0)},
		{Key: "pontoon_breadth_m", Title: "Pontoon breadth", Unit: "m", Least: 1, Most: 60, start: fixed(15)},
		{Key: "pontoon_height_m", Title: "Pontoon height", Unit: "m", Least: 1, Most: 30, start: fixed(8)},
		{Key: "columns", Title: "Columns", Whole: true, Least: 0, Most: 24, start: fixed(4)},
		{Key: "column_m", Title: "Column diameter", Unit: "m", Least: 0.5, Most: 40, start: fixed(12)},
		{Key: "chains", Title: "Mooring chains", Whole: true, Least: 0, Most: 40, start: fixed(8)},
		{Key: "chain_bar_m", Title: "Chain bar diameter", Unit: "m", Least: 0.01, Most: 0.3, start: fixed(0.1)},
		{Key: "moon_pool_m", Title: "Moon pool or turret well, diameter", Unit: "m", Hint: "0: none.", Least: 0, Most: 40, start: fixed(0)},
		{Key: "sea_chests", Title: "Sea chests each side", Whole: true, Least: 0, Most: 20, start: fixed(2)},
		{Key: "tanks_m2", Title: "Ballast tanks, steel inside", Unit: "m²", Hint: "All tanks with anodes, from their drawings. 0: none.", Least: 0, Most: 1000000, start: fixed(0)},
	}
}

func (b *builder) floatingUnit() {
	length, beam, draught := b.Value("length_m"), b.Value("beam_m"), b.Value("draught_m")
	p := hull.Particulars{
		ShipType: "tanker", LengthPP: length, LengthWL: length, Beam: beam, Draught: draught, Volume: b.Value("block") * length * beam * draught,
	}
	host := "sides"
	if b.count("pontoons") > 0 {
		host = "pontoons"
		b.pontoons(length, draught)
	} else {
		b.hull(p, b.Value("boot_top_m"))
	}
	if n := b.count("chains"); n > 0 {
		e := b.take(area.Chain(b.Value("chain_bar_m"), area.ChainCounted)).Times(n)
		b.zone("chains", fmt.Sprintf("Mooring chains, %g m of each", area.ChainCounted), "other", e, draught+area.ChainCounted/2, hull.CategoryNone, heldBy(host))
	}
	if d := b.Value("moon_pool_m"); d > 0 {
		b.zone("moon-pool", "Moon pool", "moon-pool", b.take(area.Tubular(d, draught)), draught/2, hull.CategoryIII, nil)
	}
	b.seaChests(p)
	b.tanks(draught)
}

// pontoons adds sunk pontoons and the columns on them up to the waterline.
func (b *builder) pontoons(length, draught float64) {
	height := b.Value("pontoon_height_m")
	if height >= draught {
		b.take(area.Estimate{}, hull.Fault{Path: "pontoon_height_m", Want: fmt.Sprintf("a height below the draught %g m: pontoons lie under water", draught), Got: fmt.Sprint(height)})
		return
	}
	n := b.count("pontoons")
	e := b.take(area.SunkPontoon(length, b.Value("pontoon_breadth_m"), height)).Times(n)
	b.zone("pontoons", plural("Pontoon", n), "other", e, draught-height/2, hull.CategoryIII, func(z *hull.Zone) {
		z.Circuit, z.CountMultiple, z.MinCount = "hull", n, 2*n
	})
	if columns := b.count("columns"); columns > 0 {
		e := b.take(area.Tubular(b.Value("column_m"), draught-height)).Times(columns)
		b.zone("columns", plural("Column", columns)+", below water", "other", e, (draught-height)/2, hull.CategoryIII, func(z *hull.Zone) {
			z.Circuit, z.CountMultiple, z.MinCount = "hull", columns, 2*columns
		})
	}
}

package protection

import (
	"math"

	"anodewright/assets"
)

// SizeFactor returns the handbook's size factor f of a magnesium anode of a
// mass (kg) and length (m), with the casting that it belongs to: the nearest
// of the table by the ratios of mass and length. There is none where either
// is off by more than a third (TM 5-811-7, Table C-4).
func SizeFactor(mass, length float64) (f float64, casting string, ok bool) {
	const pound, inch = 0.45359237, 0.0254
	t := assets.Get("soil-size-factors")
	nearest := math.Inf(1)
	for _, r := range t.Rows {
		m := math.Abs(math.Log(mass / (t.Value(r.Name, "mass") * pound)))
		l := math.Abs(math.Log(length / (t.Value(r.Name, "length") * inch)))
		if most := math.Log(4.0 / 3); m <= most && l <= most && m+l < nearest {
			nearest, f, casting, ok = m+l, t.Value(r.Name, "factor"), r.Name, true
		}
	}
	return f, casting, ok
}

// PotentialFactor returns the handbook's factor y for the potential of the
// steel in V against Cu/CuSO4, for magnesium or zinc: the table's figures,
// between them in proportion, beyond them the end ones (TM 5-811-7, Table
// C-5).
func PotentialFactor(metal string, potential float64) float64 {
	t := assets.Get("soil-potential-factors")
	at := func(i int) (x, y float64) {
		return t.Value(t.Rows[i].Name, "potential"), t.Value(t.Rows[i].Name, metal)
	}
	x0, y0 := at(0)
	if potential >= x0 {
		return y0
	}
	for i := 1; i < len(t.Rows); i++ {
		x1, y1 := at(i)
		if potential >= x1 {
			return y0 + (y1-y0)*(potential-x0)/(x1-x0)
		}
		x0, y0 = x1, y1
	}
	return y0
}

// HandbookOutput returns the current in A of one magnesium anode on a
// well-coated structure in soil: i = C f y/rho, i in mA, rho in ohm cm
// (TM 5-811-7, App. C; MIL-HDBK-1004/10, 9.9). rho is given in ohm m.
func HandbookOutput(f, y, rho float64) float64 {
	return assets.Get("soil-output-constant").Value("well coated", "value") * f * y / (rho * 100) / 1000
}

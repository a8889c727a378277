package anodes

import (
	"anodewright/assets"
	"anodewright/hull"
)

// Explain returns the steps by which the output of one piece of a pattern
// comes about, new and worn, in a medium of rho ohm m.
func Explain(p *hull.Pattern, medium hull.Medium, rho, shielding float64) []hull.Step {
	t := new(hull.Trace)
	metal := MetalOf(p, medium)
	t.Add(hull.Step{
		Figure: p.ID + ": capacity", Value: metal.Capacity, Unit: "Ah/kg", Formula: "by alloy and medium",
		Source: metal.Source, Confidence: metal.Confidence,
	})
	t.Add(hull.Step{
		Figure: p.ID + ": closed-circuit potential", Value: metal.Potential, Unit: "V Ag/AgCl", Formula: "by alloy and medium",
		Source: metal.Source, Confidence: metal.Confidence,
	})
	formula, source, confidence := formulaOf(p)
	sizes := []hull.Input{{Name: "rho", Value: rho, Unit: "ohm m"}}
	for _, in := range []hull.Input{
		{Name: "length", Value: p.Length, Unit: "m"}, {Name: "width", Value: p.Width, Unit: "m"}, {Name: "height", Value: p.Height, Unit: "m"},
		{Name: "radius", Value: radius(p), Unit: "m"}, {Name: "diameter", Value: p.Diameter, Unit: "m"}, {Name: "exposed area", Value: p.ExposedArea, Unit: "m2"},
		{Name: "R/rho new", Value: p.ShapeFactor, Unit: "1/m"}, {Name: "R/rho worn", Value: p.ShapeFactorWorn, Unit: "1/m"},
	} {
		if in.Value > 0 {
			sizes = append(sizes, in)
		}
	}
	t.Add(hull.Step{
		Figure: p.ID + ": resistance, new", Value: ResistanceNew(p, rho), Unit: "ohm", Formula: formula,
		Inputs: sizes, Source: source, Confidence: confidence,
	})
	worn := append(sizes[:len(sizes):len(sizes)], hull.Input{Name: "utilisation factor", Value: p.Utilisation}, hull.Input{Name: "net mass", Value: p.NetMass, Unit: "kg"},
		hull.Input{Name: "insert", Value: p.InsertVolume, Unit: "m3"}, hull.Input{Name: "density", Value: metal.Density, Unit: "kg/m3"})
	t.Add(hull.Step{
		Figure: p.ID + ": resistance, worn", Value: ResistanceWorn(p, rho), Unit: "ohm",
		Formula: "the same at the utilisation factor: 0.9 L and the section left; flat shapes: the face toward the steel",
		Inputs:  worn, Source: "DNV-RP-B401, 7.9", Confidence: "from memory",
	})
	if p.SeriesResist > 0 {
		t.Add(hull.Step{
			Figure: p.ID + ": cable and connection", Value: p.SeriesResist, Unit: "ohm", Formula: "as stated, added to the resistance new and worn",
			Source: "the pattern's own", Confidence: "entered",
		})
	}
	driving := []hull.Input{
		{Name: "protective potential", Value: Protective(), Unit: "V"}, {Name: "anode potential", Value: metal.Potential, Unit: "V"},
		{Name: "shielding", Value: shielding}, {Name: "cable and connection", Value: p.SeriesResist, Unit: "ohm"},
	}
	potential := assets.Get("code-potential")
	for _, o := range []struct {
		name string
		x    float64
	}{{"new", OutputNew(p, medium, rho, shielding)}, {"worn", OutputWorn(p, medium, rho, shielding)}} {
		t.Add(hull.Step{
			Figure: p.ID + ": output, " + o.name, Value: o.x, Unit: "A", Formula: "shielding (E protective - E anode) / (R + cable and connection)",
			Inputs: driving, Source: potential.Source(), Confidence: potential.Confidence,
		})
	}
	return t.Steps
}

// formulaOf names the resistance formula of a pattern's shape.
func formulaOf(p *hull.Pattern) (formula, source, confidence string) {
	const code = "DNV-RP-B401, 7.8"
	switch p.Shape {
	case hull.LongFlush:
		return "rho / (2 S), S = (L + w)/2", code, "from memory"
	case hull.ShortFlush, hull.Bracelet:
		return "0.315 rho / sqrt(A)", code, "read in a secondary text"
	case hull.Stated:
		return "rho × R/rho as stated", "the pattern's own", "entered"
	case hull.SoilRod:
		return "rho/(2 pi L) (ln(8L/d) - 1)", "Dwight 1936", "published"
	}
	if p.Length >= 4*radius(p) {
		return "rho/(2 pi L) (ln(4L/r) - 1); × 1.3 from 0.15 to 0.30 m off the steel, as flush below", code, "from memory"
	}
	return "rho/(2 pi L) (ln((2L/r)(1+q)) + r/(2L) - q), q = sqrt(1+(r/2L)^2)", code, "from memory"
}

package area

import (
	"errors"
	"fmt"
	"math"

	"anodewright/hull"
)

// typeFormula is the wetted surface of one ship type:
// k (V/T + m Lwl T) - d (Td - T)(Lwl + B), times (1.2 - 0.34 CB) where fine.
type typeFormula struct {
	k, m, d float64
	fine    bool // of the fine ships with a block coefficient on the waterline
}

func formulaOf(t hull.ShipType) typeFormula {
	switch t {
	case "container":
		return typeFormula{k: 0.995, m: 1.9, d: 2.4}
	case "ro-ro-twin-screw":
		return typeFormula{k: 1.21, m: 1.3, d: 2.5, fine: true}
	case "other":
		return typeFormula{k: 0.87, m: 2.7, d: 3.0, fine: true}
	}
	return typeFormula{k: 0.99, m: 1.9, d: 2.0}
}

func (f typeFormula) text() string {
	s := fmt.Sprintf("%g (V/Td + %g Lwl Td)", f.k, f.m)
	if f.fine {
		s += " (1.2 − 0.34 CB)"
	}
	return s + fmt.Sprintf(" − %g (Td − T)(Lwl + B)", f.d)
}

// at evaluates the formula at draught t.
func (f typeFormula) at(p hull.Particulars, t float64) float64 {
	design := f.k * (p.Volume/p.Draught + f.m*p.LengthWL*p.Draught)
	if f.fine {
		design *= 1.2 - 0.34*p.Volume/(p.LengthWL*p.Beam*p.Draught)
	}
	return design - f.d*(p.Draught-t)*(p.LengthWL+p.Beam)
}

// ByType estimates the wetted surface by ship type, the default for ships:
// tankers, bulk carriers and general cargo (and where no type is given)
// S = 0.99 (V/Td + 1.9 Lwl Td) - 2.0 (Td - T)(Lwl + B), container ships
// 0.995, 1.9 and 2.4 in place of 0.99, 1.9 and 2.0, twin-screw ro-ro
// 1.21 (V/Td + 1.3 Lwl Td)(1.2 - 0.34 CB) - 2.5 (Td - T)(Lwl + B), others
// 0.87 (V/Td + 2.7 Lwl Td)(1.2 - 0.34 CB) - 3.0 (Td - T)(Lwl + B); CB on the
// waterline's length.
//
// The particulars' draught and volume are those of the design, Td and V; the
// last term takes the surface to the draught T at which the steel lies in the
// water, 0 for the design's. T must not be above 1.3 Td: the term is a straight
// line through the design draught.
//
// Source: Kristensen and Luetzen, Technical University of Denmark, 2013.
func ByType(p hull.Particulars, draught float64) (Estimate, error) {
	f := formulaOf(p.ShipType)
	e := Estimate{
		Name: "Wetted surface by ship type", Formula: f.text(), Source: "Kristensen and Lützen, DTU, 2013", Confidence: read,
		Benchmark: typeBenchmark(p.ShipType),
		Inputs: []hull.Input{
			in("volume V", p.Volume, "m3"), metres("design draught Td", p.Draught), metres("waterline length Lwl", p.LengthWL), metres("beam B", p.Beam),
		},
	}
	if f.fine {
		e.Confidence = "read; unchecked on a hull"
	}
	t := draught
	if t == 0 {
		t = p.Draught
	}
	e.Inputs = append(e.Inputs, metres("draught T", t))
	if t > 1.3*p.Draught && p.Draught > 0 {
		return Estimate{}, hull.Fault{Path: "draught T", Want: fmt.Sprintf("a draught not above 1.3 × the design's %g m", p.Draught), Got: fmt.Sprint(t)}
	}
	e.Area = f.at(p, t)
	return made(e)
}

// DennyMumford estimates the wetted surface as S = 1.7 Lpp T + V/T, the volume
// being that at the draught T. On the benchmark hulls it reads 3.5 to 4.6 %
// low, which makes it the floor that entered areas are held against.
//
// Source: Nicholls's Seamanship and Nautical Knowledge, p. 482.
func DennyMumford(lengthPP, draught, volume float64) (Estimate, error) {
	return made(Estimate{
		Name: "Wetted surface, Denny-Mumford", Area: dennyMumford(lengthPP, draught, volume), Formula: "1.7 Lpp T + V/T",
		Source: "Nicholls's Seamanship and Nautical Knowledge, p. 482", Confidence: read, Benchmark: offText(Benchmarks(), func(h Hull) float64 {
			return dennyMumford(h.LengthPP, h.Draught, h.Volume)
		}),
		Inputs: []hull.Input{metres("length between perpendiculars Lpp", lengthPP), metres("draught T", draught), in("volume V", volume, "m3")},
	})
}

func dennyMumford(lengthPP, draught, volume float64) float64 {
	return 1.7*lengthPP*draught + volume/draught
}

// HoltropMennen estimates the wetted surface by the regression
// S = Lwl (2T + B) sqrt(CM) (0.453 + 0.4425 CB - 0.2862 CM - 0.003467 B/T +
// 0.3696 CWP) + 2.38 ABT/CB with CB = V/(Lwl B T), from the midship
// coefficient CM, the waterplane coefficient CWP and the transverse area of
// the bulb ABT, which may be 0. CM and CWP must not be above 1.
//
// Source: Holtrop and Mennen, International Shipbuilding Progress 29 (335),
// 1982, 166-170.
func HoltropMennen(lengthWL, beam, draught, volume, midship, waterplane, bulb float64) (Estimate, error) {
	for _, c := range []hull.Input{in("midship coefficient CM", midship, ""), in("waterplane coefficient CWP", waterplane, "")} {
		if c.Value > 1 {
			return Estimate{}, hull.Fault{Path: c.Name, Want: "a number above 0 and up to 1", Got: fmt.Sprint(c.Value)}
		}
	}
	block := volume / (lengthWL * beam * draught)
	return made(Estimate{
		Name: "Wetted surface, Holtrop-Mennen",
		Area: lengthWL*(2*draught+beam)*math.Sqrt(midship)*
			(0.453+0.4425*block-0.2862*midship-0.003467*beam/draught+0.3696*waterplane) + 2.38*bulb/block,
		Formula: "Lwl (2T + B) √CM (0.453 + 0.4425 CB − 0.2862 CM − 0.003467 B/T + 0.3696 CWP) + 2.38 ABT/CB",
		Source:  "Holtrop and Mennen, Int. Shipbuilding Progress 29 (335), 1982, 166-170", Confidence: read,
		Benchmark: "meets the paper's own example, 7381.45 m²; the benchmark hulls' waterplane coefficients are not published",
		Inputs: []hull.Input{
			metres("waterline length Lwl", lengthWL), metres("beam B", beam), metres("draught T", draught), in("volume V", volume, "m3"),
			in("midship coefficient CM", midship, ""), in("waterplane coefficient CWP", waterplane, ""),
		},
	}, in("bulb's transverse area ABT", bulb, "m2"))
}

// Wetted returns every estimate of the wetted surface that the particulars
// allow, the default first, and why the others are missing. The draught is
// that at which the steel lies in the water, 0 for the particulars' own; only
// the default can be taken to another draught, since the others need the
// volume there.
func Wetted(p hull.Particulars, draught float64) (list []Estimate, missing error) {
	var faults []error
	take := func(e Estimate, err error) {
		if err != nil {
			faults = append(faults, err)
			return
		}
		list = append(list, e)
	}
	take(ByType(p, draught))
	if draught == 0 || draught == p.Draught {
		take(DennyMumford(p.LengthPP, p.Draught, p.Volume))
		if p.Midship > 0 || p.Waterplane > 0 {
			take(HoltropMennen(p.LengthWL, p.Beam, p.Draught, p.Volume, p.Midship, p.Waterplane, p.BulbArea))
		}
		take(PaintBottom(p))
	}
	return list, errors.Join(faults...)
}

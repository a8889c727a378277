package anodes

import (
	"fmt"
	"strconv"
	"strings"

	"anodewright/assets"
	"anodewright/hull"
)

// ElectrodeOffset returns by how many volts a potential reads more against a
// reference electrode than against Ag/AgCl/seawater: for calomel by the
// tabulated potentials of the electrodes (0.250 - 0.241 V), for copper
// sulphate (-0.05) and zinc (+1.05) by the working equivalents in which the
// criteria are written, so that -0.85 V Cu/CuSO4 is the criterion of -0.80 V.
// By the tabulated potentials these two would be -0.066 and +1.03.
func ElectrodeOffset(e hull.Electrode) float64 { return electrodeValue(e, "used") }

// TabulatedOffset returns the same by the tabulated potentials of the
// electrodes alone.
func TabulatedOffset(e hull.Electrode) float64 { return electrodeValue(e, "tabulated") }

// WorkingOffset returns the same by the rounded working equivalents alone.
func WorkingOffset(e hull.Electrode) float64 { return electrodeValue(e, "working") }

func electrodeValue(e hull.Electrode, column string) float64 {
	if e == "" {
		e = hull.SilverChloride
	}
	return assets.Get("reference-electrodes").Value(string(e), column)
}

// Potential returns a measured potential in V against Ag/AgCl/seawater.
func Potential(m hull.Measure) float64 { return m.Potential - ElectrodeOffset(m.Electrode) }

// Against returns what a potential of v volts against Ag/AgCl/seawater reads
// against another electrode.
func Against(e hull.Electrode, v float64) hull.Measure {
	return hull.Measure{Potential: v + ElectrodeOffset(e), Electrode: e}
}

// ElectrodeName writes a reference electrode for people.
func ElectrodeName(e hull.Electrode) string {
	switch e {
	case hull.CopperSulphate:
		return "Cu/CuSO4"
	case hull.Calomel:
		return "SCE"
	case hull.ZincElectrode:
		return "zinc"
	}
	return "Ag/AgCl"
}

// MeasureText writes a potential as it was entered, with what it is against
// Ag/AgCl/seawater where that is another: "-0.850 V Cu/CuSO4 (-0.800 V
// Ag/AgCl)".
func MeasureText(m hull.Measure) string {
	s := fmt.Sprintf("%s V %s", volts(m.Potential), ElectrodeName(m.Electrode))
	if ElectrodeOffset(m.Electrode) != 0 {
		s += fmt.Sprintf(" (%s V Ag/AgCl)", volts(Potential(m)))
	}
	return s
}

// volts writes a potential to the millivolt, and no minus before nothing.
func volts(v float64) string {
	s := strconv.FormatFloat(v, 'f', 3, 64)
	if strings.Trim(s, "-0.") == "" {
		return "0.000"
	}
	return s
}

// Verdict is what a potential says of the steel.
type Verdict string

// The verdicts on a potential.
const (
	UnderProtected Verdict = "under-protected"
	Protected      Verdict = "protected"
	OverProtected  Verdict = "over-protected"
)

// Criterion is the range of potential in V against Ag/AgCl/seawater in which
// a metal is protected and comes to no harm.
type Criterion struct {
	Metal        string
	Least        float64  // the potential must not be less negative
	Most         *float64 // nor more negative; nil: no limit
	Source, Note string
	Confidence   string
}

// CriterionOf returns the criterion of a zone's metal (EN 12473): steel in
// water, the stricter one of steel in sediment and soil, where oxygen may be
// missing, and that of high-strength steel above 550 MPa. Coats of zinc and
// aluminium count as the steel under them. The asset file does not tell the
// kinds of stainless steel and of copper alloy apart: the stricter is taken.
func CriterionOf(a *hull.Asset, z *hull.Zone) Criterion {
	row := "carbon steel"
	if m := a.Medium(z); m == hull.Sediment || m == hull.Soil {
		row = "carbon steel, anaerobic"
	}
	switch {
	case z.Yield != nil && *z.Yield > 550 || z.Surface == hull.HighStrength && z.Yield == nil:
		row = "high-strength steel"
	case z.Surface == hull.Stainless:
		row = "austenitic stainless steel, PREN below 40"
	case z.Surface == hull.CopperAlloy:
		row = "copper alloy with aluminium"
	case z.Surface == hull.Reinforcement:
		row = "steel in concrete"
	}
	return criterion(row)
}

// Criteria returns the criteria of all metals.
func Criteria() []Criterion {
	var cs []Criterion
	for _, r := range assets.Get("protection-potentials").Rows {
		cs = append(cs, criterion(r.Name))
	}
	return cs
}

func criterion(row string) Criterion {
	t := assets.Get("protection-potentials")
	r, ok := t.Row(row)
	if !ok {
		panic("anodes: no criterion of " + row)
	}
	return Criterion{Metal: row, Least: *r.Values[0], Most: r.Values[1], Source: t.Source(), Note: r.Note, Confidence: r.Confidence}
}

// Judge returns the verdict on a potential of v volts against
// Ag/AgCl/seawater. The limits themselves are within, to a tenth of a
// millivolt.
func (c Criterion) Judge(v float64) Verdict {
	const margin = 1e-4
	switch {
	case v > c.Least+margin:
		return UnderProtected
	case c.Most != nil && v < *c.Most-margin:
		return OverProtected
	}
	return Protected
}

// Text writes the range: "-0.80 to -1.10 V".
func (c Criterion) Text() string {
	if c.Most == nil {
		return fmt.Sprintf("%.2f V or more negative", c.Least)
	}
	return fmt.Sprintf("%.2f to %.2f V", c.Least, *c.Most)
}

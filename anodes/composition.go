package anodes

import (
	"fmt"
	"strings"

	"anodewright/assets"
	"anodewright/hull"
)

// Limits are the composition limits of one standard for one alloy.
type Limits struct {
	Standard   string // document and, where it has several, the type
	Rest       string // the element that makes up the rest
	Elements   []Limit
	Confidence string
}

// Limit is what one element may make up, in % of the mass. A nil is no limit
// on that side.
type Limit struct {
	Element  string
	Min, Max *float64
}

// Compositions returns the limits that an alloy can be ordered to, the one
// that [SpecificationText] names first; none for magnesium, whose standards
// the program does not hold.
func Compositions(alloy hull.Alloy) []Limits {
	switch alloy {
	case hull.Aluminium:
		return []Limits{
			limits("composition-b401", "aluminium", "DNV-RP-B401, Table 10-5", "Al"),
			limits("composition-aluminium", "conventional", "MIL-DTL-24779D, conventional", "Al"),
			limits("composition-aluminium", "low voltage", "MIL-DTL-24779D, low voltage", "Al"),
		}
	case hull.Zinc:
		return []Limits{
			limits("composition-zinc", "MIL-A-18001K", "MIL-A-18001K", "Zn"),
			limits("composition-zinc", "ASTM B418 type I", "ASTM B418, type I", "Zn"),
			limits("composition-zinc", "ASTM B418 type II", "ASTM B418, type II", "Zn"),
			limits("composition-b401", "zinc", "DNV-RP-B401, Table 10-5", "Zn"),
		}
	}
	return nil
}

func limits(table, column, standard, rest string) Limits {
	t := assets.Get(table)
	l := Limits{Standard: standard, Rest: rest, Confidence: t.Confidence}
	for _, r := range t.Rows {
		e := Limit{Element: r.Name}
		for i, c := range t.Columns {
			switch c {
			case column + " min":
				e.Min = r.Values[i]
			case column + " max":
				e.Max = r.Values[i]
			}
		}
		if e.Min != nil || e.Max != nil {
			l.Elements = append(l.Elements, e)
		}
	}
	return l
}

// Text writes the limits for an order: "Zn 2.5 to 5.75, Cd max 0.002, rest Al
// (mass %)".
func (l Limits) Text() string {
	var parts []string
	for _, e := range l.Elements {
		switch {
		case e.Min == nil:
			parts = append(parts, fmt.Sprintf("%s max %g", e.Element, *e.Max))
		case e.Max == nil:
			parts = append(parts, fmt.Sprintf("%s min %g", e.Element, *e.Min))
		default:
			parts = append(parts, fmt.Sprintf("%s %g to %g", e.Element, *e.Min, *e.Max))
		}
	}
	return strings.Join(append(parts, "rest "+l.Rest), ", ") + " (mass %)"
}

// SpecificationText is what an order says of a pattern's metal: the pattern's
// own specification, else the composition limits of a standard with how sure
// they are. Aluminium goes by DNV-RP-B401; zinc by MIL-A-18001K, but rods in
// soil, and so in waters other than the sea, by ASTM B418 type II.
func SpecificationText(p *hull.Pattern) string {
	if p.Specification != "" {
		return p.Specification
	}
	all := Compositions(p.Alloy)
	if len(all) == 0 {
		return "Composition to be stated by the buyer"
	}
	l := all[0]
	if p.Alloy == hull.Zinc && p.Shape == hull.SoilRod {
		l = all[2]
	}
	return fmt.Sprintf("%s: %s; %s", l.Standard, l.Text(), l.Confidence)
}

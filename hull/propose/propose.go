// Package propose makes a list of zones for a new asset from its kind and a few
// particulars: areas by package area, regions, surfaces, depths, coatings, what
// holds what, pairs port and starboard. It is a place to start from: every
// figure in it is to be corrected from drawings and surveys.
//
// Lengths are in m, areas in m2. The start values of particulars that nobody
// entered are common practice and have no source.
package propose

import (
	"fmt"
	"math"

	"anodewright/hull"
	"anodewright/hull/area"
)

// Ids of the waters that the proposed zones lie in; see Waters.
const (
	Sea    = "sea"
	SeaBed = "sea-bed"
	Shore  = "shore"
)

// Form is what is known of a new asset: its kind, a ship's type and the
// particulars entered, by the keys of Fields.
type Form struct {
	Kind    hull.Kind
	Ship    hull.ShipType // of ships only; "": general cargo
	Entered map[string]float64
}

// Field is one particular of a form.
type Field struct {
	Key, Title, Unit, Hint string
	Whole                  bool // a number of things
	Least, Most            float64

	start func(Form) float64
}

// Proposal is a list of zones with where each zone's area comes from.
type Proposal struct {
	Zones       []hull.Zone
	Estimates   map[string]area.Estimate // by zone id
	Particulars *hull.Particulars        // of ship-shaped hulls
}

// Fields lists the particulars that the form's kind of asset can be proposed
// from.
func (f Form) Fields() []Field {
	switch f.Kind {
	case hull.Ship:
		return shipFields()
	case hull.FloatingUnit:
		return floatingFields()
	case hull.Jacket:
		return jacketFields()
	case hull.Harbour:
		return harbourFields()
	case hull.Pipeline:
		return pipelineFields()
	}
	panic("propose: unknown kind " + string(f.Kind))
}

// Start returns what stands for a particular that was not entered. It follows
// the others: a beam from the length, a draught from the beam.
func (f Form) Start(key string) float64 { return f.field(key).start(f) }

// Value returns a particular: as entered, else its start value.
func (f Form) Value(key string) float64 {
	if x, ok := f.Entered[key]; ok {
		return x
	}
	return f.Start(key)
}

func (f Form) count(key string) int { return int(f.Value(key)) }

func (f Form) field(key string) Field {
	for _, field := range f.Fields() {
		if field.Key == key {
			return field
		}
	}
	panic("propose: no particular " + key + " of a " + string(f.Kind))
}

// Check returns what is wrong with the particulars entered.
func (f Form) Check() hull.Faults {
	var faults hull.Faults
	for _, field := range f.Fields() {
		x, ok := f.Entered[field.Key]
		if !ok {
			continue
		}
		want := fmt.Sprintf("a number from %g to %g", field.Least, field.Most)
		if field.Whole {
			want = "a whole " + want[2:]
		}
		if !(x >= field.Least && x <= field.Most) || field.Whole && x != math.Trunc(x) {
			faults = append(faults, hull.Fault{Path: field.Key, Want: want, Got: fmt.Sprint(x)})
		}
	}
	return faults
}

// Propose returns the zones that follow from the form, or what in it keeps them
// from being proposed.
func (f Form) Propose() (Proposal, error) {
	if err := f.Check().Err(); err != nil {
		return Proposal{}, err
	}
	b := builder{Form: f, p: Proposal{Estimates: map[string]area.Estimate{}}}
	switch f.Kind {
	case hull.Ship:
		b.ship()
	case hull.FloatingUnit:
		b.floatingUnit()
	case hull.Jacket:
		b.jacket()
	case hull.Harbour:
		b.harbour()
	case hull.Pipeline:
		b.pipeline()
	}
	if b.err == nil && len(b.p.Zones) == 0 {
		b.err = hull.Fault{Want: "particulars that make at least one zone"}
	}
	if b.err != nil {
		return Proposal{}, b.err
	}
	return b.p, nil
}

// Waters returns the waters that the zones lie in, with figures of an open sea,
// a sea bed of sand and clay and a damp shore, all to be corrected.
func Waters(zones []hull.Zone) []hull.Water {
	value := func(x float64) *float64 { return &x }
	known := []hull.Water{
		{ID: Sea, Name: "Open sea", Medium: hull.Seawater, Temperature: value(12), Salinity: value(35)},
		{ID: SeaBed, Name: "Sea bed", Medium: hull.Sediment, Temperature: value(10), Resistivity: value(1.3)},
		{ID: Shore, Name: "Shore", Medium: hull.Soil, Temperature: value(11), Resistivity: value(25)},
	}
	var used []hull.Water
	for _, w := range known {
		for _, z := range zones {
			if z.Waters[0].Water == w.ID {
				used = append(used, w)
				break
			}
		}
	}
	return used
}

// builder collects zones and the first error of their areas.
type builder struct {
	Form
	p   Proposal
	err error
}

// take returns the estimate and keeps the error.
func (b *builder) take(e area.Estimate, err error) area.Estimate {
	if b.err == nil {
		b.err = err
	}
	return e
}

// zone adds a zone of painted or bare carbon steel in the sea with the
// estimate's area; change makes it what else it is.
func (b *builder) zone(id, name string, region hull.Region, e area.Estimate, depth float64, coat hull.Category, change func(z *hull.Zone)) {
	z := hull.Zone{
		ID: id, Name: name, Region: region, Surface: hull.CarbonSteel, WettedArea: Rounded(e.Area), Depth: math.Round(10*depth) / 10,
		Coating: hull.Coating{Category: coat}, Waters: []hull.WaterShare{{Water: Sea, Share: 1}},
	}
	hull.SetDefaults(&z)
	if change != nil {
		change(&z)
	}
	b.p.Zones = append(b.p.Zones, z)
	b.p.Estimates[id] = e
}

// in moves a zone to another water.
func in(z *hull.Zone, water string) { z.Waters = []hull.WaterShare{{Water: water, Share: 1}} }

// Rounded returns an area as an estimate deserves: whole m2 from 100 on, else
// tenths, and never nought.
func Rounded(m2 float64) float64 {
	if m2 >= 100 {
		return math.Round(m2)
	}
	return max(math.Round(10*m2)/10, 0.1)
}

func fixed(x float64) func(Form) float64 { return func(Form) float64 { return x } }

// times follows another particular.
func times(k float64, key string) func(Form) float64 {
	return func(f Form) float64 { return tidy(k * f.Value(key)) }
}

// tidy keeps three figures: more would look like knowledge.
func tidy(x float64) float64 {
	if x <= 0 {
		return 0
	}
	unit := math.Pow(10, math.Floor(math.Log10(x))-2)
	if unit < 1 {
		per := math.Round(1 / unit) // a whole number, so that no digits of binary fractions remain
		return math.Round(x*per) / per
	}
	return math.Round(x/unit) * unit
}

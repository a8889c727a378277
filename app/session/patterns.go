package session

import (
	"errors"
	"fmt"
	"slices"
	"strings"

	"anodewright/anodes"
	"anodewright/app/say"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// Patterns is the list of anode patterns.
const Patterns List = "patterns"

func pattern[T any](v func(p *hull.Pattern) *T) at[T] {
	return func(a *hull.Asset, i int) *T { return v(&a.Patterns[i]) }
}

// PatternFields are the fields of an anode pattern.
func PatternFields() []Field {
	size := func(key, title string, v func(p *hull.Pattern) *float64) Field {
		return statedQuantity(key, title, "m", say.Size, pattern(v)).hint("Empty: not stated. Which sizes a shape needs, its resistance formula says.")
	}
	return []Field{
		{
			Key: "id", Title: "Id", Get: func(a *hull.Asset, i int) string { return a.Patterns[i].ID },
			Set: func(a *hull.Asset, i int, text string) error {
				renamePattern(a, i, strings.TrimSpace(text))
				return nil
			},
			Hint: "The name by which zones, stock and readings call the pattern; they follow when it changes.",
		},
		textField("name", "Name", pattern(func(p *hull.Pattern) *string { return &p.Name })),
		alloyField(),
		wordField("shape", "Shape", hull.Shape("").Words(), pattern(func(p *hull.Pattern) *hull.Shape { return &p.Shape })).
			hint("It chooses the resistance formula: slender stand-offs, long flush slabs, short flush blocks, bracelets, rods in soil, or a stated ratio."),
		size("length_m", "Length", func(p *hull.Pattern) *float64 { return &p.Length }),
		size("width_m", "Width", func(p *hull.Pattern) *float64 { return &p.Width }),
		size("height_m", "Height", func(p *hull.Pattern) *float64 { return &p.Height }),
		size("radius_m", "Radius", func(p *hull.Pattern) *float64 { return &p.Radius }),
		size("girth_m", "Girth", func(p *hull.Pattern) *float64 { return &p.Girth }),
		size("diameter_m", "Diameter", func(p *hull.Pattern) *float64 { return &p.Diameter }),
		quantityField("standoff_m", "Stand-off", "m", say.Size, pattern(func(p *hull.Pattern) *float64 { return &p.Standoff })).
			hint("Clear distance to the steel: from 0.30 m in full, from 0.15 m with 1.3 times the resistance, nearer as a flush anode."),
		statedQuantity("spacing_m", "Spacing", "m", say.Length, pattern(func(p *hull.Pattern) *float64 { return &p.Spacing })).
			hint("Of rods in soil from one to the next."),
		statedField("exposed_area_m2", "Exposed", "m²", pattern(func(p *hull.Pattern) *float64 { return &p.ExposedArea })).
			hint("Area that faces the water when new, of short flush anodes and bracelets. Empty: that of the block."),
		statedField("shape_factor_per_m", "R/ρ new", "1/m", pattern(func(p *hull.Pattern) *float64 { return &p.ShapeFactor })).
			hint("Of a stated shape: resistance over resistivity, new."),
		statedField("shape_factor_worn_per_m", "R/ρ worn", "1/m", pattern(func(p *hull.Pattern) *float64 { return &p.ShapeFactorWorn })).
			hint("Of a stated shape: resistance over resistivity, at the utilisation factor."),
		numberField("net_mass_kg", "Net", "kg", pattern(func(p *hull.Pattern) *float64 { return &p.NetMass })).hint("Anode metal of one piece."),
		statedField("gross_mass_kg", "Gross", "kg", pattern(func(p *hull.Pattern) *float64 { return &p.GrossMass })).
			hint("With the insert and the fixings. Empty: the net mass and the insert's volume in steel."),
		statedQuantity("insert_volume_m3", "Insert", "m³", say.Bulk, pattern(func(p *hull.Pattern) *float64 { return &p.InsertVolume })).
			hint("Volume of the steel insert inside the casting."),
		numberField("utilisation", "Util. factor", "", pattern(func(p *hull.Pattern) *float64 { return &p.Utilisation })).
			hint("Share of the net mass that can be used: 0.90 long slender, 0.85 short slender and long flush, 0.80 the rest (DNV-RP-B401, Table 10-8)."),
		optionalField("capacity_ah_kg", "Capacity", "Ah/kg", pattern(func(p *hull.Pattern) **float64 { return &p.Capacity })).hint("Empty: the alloy's in the zone's medium."),
		optionalField("potential_v", "Potential", "V Ag/AgCl", pattern(func(p *hull.Pattern) **float64 { return &p.Potential })).hint("Closed circuit. Empty: the alloy's in the zone's medium."),
		statedField("series_resistance_ohm", "Cable", "Ω", pattern(func(p *hull.Pattern) *float64 { return &p.SeriesResist })).
			hint("Resistance of cable and connection of a pod, a sled or a buried rod; it is added to the anode's own."),
		numberField("price", "Price", "", pattern(func(p *hull.Pattern) *float64 { return &p.Price })).hint("Of one piece, in the asset's currency."),
		optionalField("fit_per_piece", "Fitting", "", pattern(func(p *hull.Pattern) **float64 { return &p.FitPerPiece })).hint("Of one piece. Empty: the asset's own."),
		numberField("lead_weeks", "Lead time", "weeks", pattern(func(p *hull.Pattern) *float64 { return &p.LeadWeeks })),
		countField("order_multiple", "Order by", pattern(func(p *hull.Pattern) *int { return &p.OrderMultiple })).hint("Orders go out in multiples of this."),
		sparesField(),
		yesNoField("afloat", "Afloat", pattern(func(p *hull.Pattern) *bool { return &p.Afloat })).hint("Yes: it can be fitted without a dry dock."),
		textField("fixing", "Fixing", pattern(func(p *hull.Pattern) *string { return &p.Fixing })),
		textField("item_no", "Item no", pattern(func(p *hull.Pattern) *string { return &p.ItemNo })),
		textField("specification", "Specification", pattern(func(p *hull.Pattern) *string { return &p.Specification })).
			hint("Empty: the order prints the composition limits of a standard."),
		textField("certificate", "Certificate", pattern(func(p *hull.Pattern) *string { return &p.Certificate })),
	}
}

// statedField is a number of which 0 means that it is not stated, and shows as
// nothing.
func statedField(key, title, unit string, v at[float64]) Field {
	return statedQuantity(key, title, unit, say.Of(unit), v)
}

func statedQuantity(key, title, unit string, q say.Quantity, v at[float64]) Field {
	f := quantityField(key, title, unit, q, v)
	get, set := f.Get, f.Set
	f.Get = func(a *hull.Asset, i int) string {
		if *v(a, i) == 0 {
			return ""
		}
		return get(a, i)
	}
	f.Set = func(a *hull.Asset, i int, text string) error {
		if strings.TrimSpace(text) == "" {
			text = "0"
		}
		return set(a, i, text)
	}
	return f
}

// AlloyName is the name of an alloy's metal.
func AlloyName(a hull.Alloy) string {
	if a == hull.Aluminium {
		return say.T("aluminium")
	}
	return say.T(string(a))
}

// alloyField is the alloy by its metal's name; the asset file's word is taken
// too.
func alloyField() Field {
	var shown []string
	for _, w := range hull.Alloy("").Words() {
		shown = append(shown, AlloyName(hull.Alloy(w)))
	}
	return Field{
		Key: "alloy", Title: "Alloy", Hint: "Aluminium is activated with zinc and indium (Al-Zn-In).",
		Get: func(a *hull.Asset, i int) string { return AlloyName(a.Patterns[i].Alloy) },
		Set: func(a *hull.Asset, i int, text string) error {
			text = strings.ToLower(strings.TrimSpace(text))
			for _, w := range hull.Alloy("").Words() {
				if text == strings.ToLower(AlloyName(hull.Alloy(w))) {
					text = w
				}
			}
			a.Patterns[i].Alloy = hull.Alloy(text)
			return nil
		},
		Choices: func(*hull.Asset) []string { return shown },
	}
}

// renamePattern gives a pattern another id, also where zones, stock and
// readings name it.
func renamePattern(a *hull.Asset, i int, id string) {
	old := a.Patterns[i].ID
	if _, taken := a.Pattern(id); !taken { // else the fault is the id's alone
		rename := func(s *string) {
			if *s == old {
				*s = id
			}
		}
		for z := range a.Zones {
			for n := range a.Zones[z].Patterns {
				rename(&a.Zones[z].Patterns[n])
			}
			for n := range a.Zones[z].Fitted {
				rename(&a.Zones[z].Fitted[n].Pattern)
			}
		}
		for n := range a.Stock {
			rename(&a.Stock[n].Pattern)
		}
		for n := range a.Readings {
			rename(&a.Readings[n].Pattern)
		}
		for n := range a.Ledger {
			rename(&a.Ledger[n].Pattern)
		}
		for c := range a.Closed {
			for n := range a.Closed[c].Planned {
				rename(&a.Closed[c].Planned[n].Pattern)
			}
			for n := range a.Closed[c].Ordered {
				rename(&a.Closed[c].Ordered[n].Pattern)
			}
			for n := range a.Closed[c].Expected {
				rename(&a.Closed[c].Expected[n].Pattern)
			}
		}
	}
	a.Patterns[i].ID = id
}

// AddPattern adds a copy of a pattern with an id of its own at the end of the
// asset's, and returns its place.
func (s *Session) AddPattern(p hull.Pattern) (int, error) {
	place := -1
	err := s.Do("add a pattern", func(a *hull.Asset) error {
		a.Patterns = append(a.Patterns, anodes.Copy(a, p))
		place = len(a.Patterns) - 1
		return nil
	})
	return place, err
}

// DuplicatePattern adds a copy of the i-th pattern behind it, and returns its
// place.
func (s *Session) DuplicatePattern(i int) (int, error) {
	return i + 1, s.Do("duplicate a pattern", func(a *hull.Asset) error {
		if i < 0 || i >= len(a.Patterns) {
			return errors.New("no pattern is selected")
		}
		a.Patterns = insert(a.Patterns, i+1, anodes.Copy(a, assetfile.Clone(a).Patterns[i]))
		return nil
	})
}

// RemovePattern removes the i-th pattern unless something names it.
func (s *Session) RemovePattern(i int) error {
	return s.Do("remove a pattern", func(a *hull.Asset) error {
		if i < 0 || i >= len(a.Patterns) {
			return errors.New("no pattern is selected")
		}
		id := a.Patterns[i].ID
		if uses := PatternUses(a, id); len(uses) > 0 {
			return fmt.Errorf("%s is still in use: %s", id, strings.Join(uses, "; "))
		}
		if len(a.Patterns) == 1 {
			return errors.New("an asset has at least one pattern")
		}
		a.Patterns = remove(a.Patterns, i)
		return nil
	})
}

// PatternUses says in words what names a pattern of the asset.
func PatternUses(a *hull.Asset, id string) []string {
	var uses []string
	for _, z := range a.Zones {
		for _, f := range z.Fitted {
			if f.Pattern == id {
				uses = append(uses, fmt.Sprintf("%d are fitted in %s", f.Count, z.Name))
			}
		}
		if slices.Contains(z.Patterns, id) {
			uses = append(uses, z.Name+" offers it")
		}
	}
	for _, k := range a.Stock {
		if k.Pattern == id {
			uses = append(uses, fmt.Sprintf("%d lie in stock", k.Count))
		}
	}
	for _, r := range a.Readings {
		if r.Pattern == id {
			uses = append(uses, "a reading of "+r.Date.String()+" names it")
		}
	}
	if slices.ContainsFunc(a.Ledger, func(f hull.Fact) bool { return f.Pattern == id }) {
		uses = append(uses, "the as-built ledger names it")
	}
	return uses
}

package session

import (
	"math"
	"strings"

	"anodewright/app/say"
	"anodewright/hull"
)

// protectionFields are the fields of a zone's other protections: how it is
// held if not by anodes, and a nobler metal on its steel. What a field needs
// beside itself begins at a common value, to be corrected.
func protectionFields() []Field {
	fs := []Field{
		optionalWord("protection.kind", "Other protection", hull.ProtectionKind("").Words(),
			func(z *hull.Zone) string {
				if z.Protection == nil {
					return ""
				}
				return string(z.Protection.Kind)
			},
			func(z *hull.Zone, word string) {
				if word == "" {
					z.Protection = nil
				} else {
					protect(z, hull.ProtectionKind(word))
				}
			}).hint("Empty: anodes, or another zone's. A zinc coat begins with 85 µm immersed in temperate water, impressed current with mixed oxide: correct them."),
		optionalWord("protection.class", "Zinc exposure", hull.ExposureClass("").Words(),
			func(z *hull.Zone) string {
				if z.Protection == nil {
					return ""
				}
				return string(z.Protection.Class)
			},
			func(z *hull.Zone, word string) {
				switch p := z.Protection; {
				case word != "" && (p == nil || word != string(p.Class)):
					protect(z, hull.ZincCoat).Class = hull.ExposureClass(word)
				case word == "" && p != nil:
					p.Class = ""
				}
			}).hint("Of a zinc coat: an atmosphere of ISO 9223, or the sea."),
		protectionNumber("thickness_um", "Zinc thickness", "µm", hull.ZincCoat, func(p *hull.Protection) *float64 { return &p.Thickness }),
		optionalWord("protection.anode", "Impressed: metal", hull.ImpressedAnode("").Words(),
			func(z *hull.Zone) string {
				if z.Protection == nil {
					return ""
				}
				return string(z.Protection.Anode)
			},
			func(z *hull.Zone, word string) {
				switch p := z.Protection; {
				case word != "" && (p == nil || word != string(p.Anode)):
					protect(z, hull.ImpressedCurrent).Anode = hull.ImpressedAnode(word)
				case word == "" && p != nil:
					p.Anode = ""
				}
			}).hint("The material of the impressed-current anodes."),
	}
	for _, n := range []struct {
		key, title, unit, hint string
		of                     func(p *hull.Protection) *float64
	}{
		{"off_share", "Off share", "", "Share of the time that the impressed current is off: the zone is a demand again, and nobody holds it.", func(p *hull.Protection) *float64 { return &p.OffShare }},
		{"anode_mass_kg", "Impressed: mass", "kg", "Of one anode; of its platinum, where it is platinised.", func(p *hull.Protection) *float64 { return &p.AnodeMass }},
		{"anode_rating_a", "Impressed: rating", "A", "The most current that one anode may give.", func(p *hull.Protection) *float64 { return &p.AnodeRating }},
		{"anode_length_m", "Impressed: length", "m", "For the resistance of the group.", func(p *hull.Protection) *float64 { return &p.AnodeLength }},
		{"anode_diameter_m", "Impressed: diam.", "m", "For the resistance of the group.", func(p *hull.Protection) *float64 { return &p.AnodeDiameter }},
		{"anode_spacing_m", "Impressed: spacing", "m", "Empty: far apart.", func(p *hull.Protection) *float64 { return &p.AnodeSpacing }},
		{"cable_resistance_ohm", "Cable resistance", "Ω", "Of all cables of the circuit together.", func(p *hull.Protection) *float64 { return &p.CableResistance }},
		{"structure_resistance_ohm", "Steel resistance", "Ω", "", func(p *hull.Protection) *float64 { return &p.StructureResistance }},
		{"back_emf_v", "Back-EMF", "V", "Between anodes and steel before any current flows: 2 V at first. Empty: none.", func(p *hull.Protection) *float64 { return &p.BackEMF }},
	} {
		fs = append(fs, protectionNumber(n.key, n.title, n.unit, hull.ImpressedCurrent, n.of).hint(n.hint))
	}
	return append(fs, impressedCount(), impressedLife(), nobleMetal(),
		nobleNumber("area_m2", "Nobler metal, area", func(n *hull.Nobler) *float64 { return &n.Area }).
			hint("Of copper, copper alloy or stainless steel on or beside this steel."),
		nobleNumber("bare_steel_m2", "Bare steel beside it", func(n *hull.Nobler) *float64 { return &n.BareSteel }).
			hint("At scratches and edges. Empty: what the paint has broken down."))
}

// protect returns the zone's protection, made one of this kind where it is
// none or another.
func protect(z *hull.Zone, kind hull.ProtectionKind) *hull.Protection {
	if z.Protection == nil {
		z.Protection = new(hull.Protection)
		hull.SetDefaults(z.Protection)
	}
	p := z.Protection
	if p.Kind == kind {
		return p
	}
	p.Kind = kind
	switch {
	case kind == hull.ZincCoat:
		if p.Thickness == 0 {
			p.Thickness = 85
		}
		if p.Class == "" {
			p.Class = "immersed-temperate"
		}
	case p.Anode == "":
		p.Anode = "mixed-oxide"
	}
	return p
}

// optionalWord is a word that may be left empty.
func optionalWord(key, title string, words []string, get func(z *hull.Zone) string, set func(z *hull.Zone, word string)) Field {
	shown := []string{""}
	for _, w := range words {
		shown = append(shown, Words(w))
	}
	return Field{
		Key: key, Title: title,
		Get: func(a *hull.Asset, i int) string { return Words(get(&a.Zones[i])) },
		Set: func(a *hull.Asset, i int, text string) error {
			set(&a.Zones[i], wordOf(words, text))
			return nil
		},
		Choices: func(*hull.Asset) []string { return shown },
	}
}

// optionalNumber is a figure of an optional part: nothing while the part is
// absent, and nothing for zero.
func optionalNumber(key, title, unit string, part func(z *hull.Zone) *float64, enter func(z *hull.Zone) *float64) Field {
	q := say.Of(unit)
	return Field{
		Key: key, Title: title, Unit: unit, Number: true, Quantity: q,
		Get: func(a *hull.Asset, i int) string {
			if v := part(&a.Zones[i]); v != nil && *v != 0 {
				return shownNumber(q, *v)
			}
			return ""
		},
		Set: func(a *hull.Asset, i int, text string) error {
			z := &a.Zones[i]
			if strings.TrimSpace(text) == "" {
				if v := part(z); v != nil {
					*v = 0
				}
				return nil
			}
			present := math.NaN()
			if v := part(z); v != nil {
				present = *v
			}
			x, err := parseShown(q, text, present)
			if v := part(z); err == nil && (v == nil || *v != x) {
				*enter(z) = x
			}
			return err
		},
	}
}

// protectionNumber is a figure of a protection of one kind.
func protectionNumber(key, title, unit string, kind hull.ProtectionKind, of func(p *hull.Protection) *float64) Field {
	return optionalNumber("protection."+key, title, unit,
		func(z *hull.Zone) *float64 {
			if z.Protection == nil {
				return nil
			}
			return of(z.Protection)
		},
		func(z *hull.Zone) *float64 { return of(protect(z, kind)) })
}

func impressedCount() Field {
	return Field{
		Key: "protection.anode_count", Title: "Impressed: anodes", Number: true, Hint: "Empty: as many as are needed.",
		Get: func(a *hull.Asset, i int) string {
			if p := a.Zones[i].Protection; p != nil && p.AnodeCount > 0 {
				return Number(float64(p.AnodeCount))
			}
			return ""
		},
		Set: func(a *hull.Asset, i int, text string) error {
			z, n := &a.Zones[i], 0
			if strings.TrimSpace(text) != "" {
				var err error
				if n, err = parseCount(text); err != nil {
					return err
				}
			}
			switch p := z.Protection; {
			case n != 0 && (p == nil || p.AnodeCount != n):
				protect(z, hull.ImpressedCurrent).AnodeCount = n
			case n == 0 && p != nil:
				p.AnodeCount = 0
			}
			return nil
		},
	}
}

func impressedLife() Field {
	return Field{
		Key: "protection.life_years", Title: "Impressed: life", Unit: "years", Number: true, Hint: "Empty: to the horizon.",
		Get: func(a *hull.Asset, i int) string {
			if p := a.Zones[i].Protection; p != nil && p.LifeYears != nil {
				return Number(*p.LifeYears)
			}
			return ""
		},
		Set: func(a *hull.Asset, i int, text string) error {
			z := &a.Zones[i]
			if strings.TrimSpace(text) == "" {
				if z.Protection != nil {
					z.Protection.LifeYears = nil
				}
				return nil
			}
			x, err := ParseNumber(text)
			if p := z.Protection; err == nil && (p == nil || p.LifeYears == nil || *p.LifeYears != x) {
				protect(z, hull.ImpressedCurrent).LifeYears = &x
			}
			return err
		},
	}
}

func nobleMetal() Field {
	return optionalWord("nobler.metal", "Nobler metal on it", hull.NobleMetal("").Words(),
		func(z *hull.Zone) string {
			if z.Nobler == nil {
				return ""
			}
			return string(z.Nobler.Metal)
		},
		func(z *hull.Zone, word string) {
			if word == "" {
				z.Nobler = nil
			} else {
				noble(z).Metal = hull.NobleMetal(word)
			}
		}).hint("A clad layer or fitting nobler than steel: it drains the anodes, and bare steel beside it corrodes fast. Empty: none. Begins with 1 m²: correct it.")
}

func nobleNumber(key, title string, of func(n *hull.Nobler) *float64) Field {
	return optionalNumber("nobler."+key, title, "m²",
		func(z *hull.Zone) *float64 {
			if z.Nobler == nil {
				return nil
			}
			return of(z.Nobler)
		},
		func(z *hull.Zone) *float64 { return of(noble(z)) })
}

// noble returns the zone's nobler metal, 1 m2 of copper alloy where it has
// none.
func noble(z *hull.Zone) *hull.Nobler {
	if z.Nobler == nil {
		z.Nobler = &hull.Nobler{Metal: "copper-alloy", Area: 1}
	}
	return z.Nobler
}

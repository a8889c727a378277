package session

import (
	"fmt"
	"strings"

	"anodewright/app/say"
	"anodewright/hull"
)

// A list is one of the asset's lists; Whole stands for the asset itself.
type List string

// The lists whose items are edited field by field.
const (
	Whole    List = ""
	Zones    List = "zones"
	Waters   List = "waters"
	Dockings List = "dockings"
)

func zone[T any](v func(z *hull.Zone) *T) at[T] {
	return func(a *hull.Asset, i int) *T { return v(&a.Zones[i]) }
}

func water[T any](v func(w *hull.Water) *T) at[T] {
	return func(a *hull.Asset, i int) *T { return v(&a.Waters[i]) }
}

func docking[T any](v func(d *hull.Docking) *T) at[T] {
	return func(a *hull.Asset, i int) *T { return v(&a.Dockings[i]) }
}

func whole[T any](v func(a *hull.Asset) *T) at[T] {
	return func(a *hull.Asset, _ int) *T { return v(a) }
}

// ZoneColumns are the fields of a zone that the Steel table shows.
func ZoneColumns() []Field {
	heldBy := Field{
		Key: "held_by", Title: "Held by",
		Hint: "Empty: the zone's own anodes. Else the zone whose anodes hold it.",
		Get: func(a *hull.Asset, i int) string {
			if host, ok := a.Zone(a.Zones[i].HeldBy); ok {
				return host.Name
			}
			return a.Zones[i].HeldBy
		},
		Set: func(a *hull.Asset, i int, text string) error {
			a.Zones[i].HeldBy = strings.TrimSpace(text)
			for _, z := range a.Zones {
				if z.Name == a.Zones[i].HeldBy {
					a.Zones[i].HeldBy = z.ID
					break
				}
			}
			return nil
		},
		Choices: func(a *hull.Asset) []string {
			names := []string{""}
			for _, z := range a.Zones {
				names = append(names, z.Name)
			}
			return names
		},
	}
	return []Field{
		textField("name", "Zone", zone(func(z *hull.Zone) *string { return &z.Name })),
		wordField("region", "Region", hull.Region("").Words(), zone(func(z *hull.Zone) *hull.Region { return &z.Region })),
		wordField("surface", "Surface", hull.Surface("").Words(), zone(func(z *hull.Zone) *hull.Surface { return &z.Surface })),
		numberField("wetted_area_m2", "Wetted", "m²", zone(func(z *hull.Zone) *float64 { return &z.WettedArea })).
			hint("Area under water, bare area included; a held zone's own area only."),
		numberField("bare_area_m2", "Bare", "m²", zone(func(z *hull.Zone) *float64 { return &z.BareArea })).
			hint("Part of the wetted area that has no coating at all."),
		numberField("depth_m", "Depth", "m", zone(func(z *hull.Zone) *float64 { return &z.Depth })).
			hint("Mid-depth of the zone: it chooses the code's depth band."),
		wordField("coating.category", "Coating", hull.Category("").Words(), zone(func(z *hull.Zone) *hull.Category { return &z.Coating.Category })).
			hint("I, II or III of the offshore code; own: constants a and b; none: bare."),
		heldBy,
	}
}

// ZoneDetails are the other fields of a zone.
func ZoneDetails() []Field {
	fs := []Field{
		dateField("coating.applied", "Coating applied", zone(func(z *hull.Zone) *hull.Date { return &z.Coating.Applied })).
			hint("Empty: when the asset came into service."),
		optionalField("coating.a", "Breakdown a", "", zone(func(z *hull.Zone) **float64 { return &z.Coating.A })).
			hint("Share broken down when new. Empty: the category's."),
		optionalField("coating.b", "Breakdown b", "1/year", zone(func(z *hull.Zone) **float64 { return &z.Coating.B })).
			hint("Growth per year. Empty: the category's."),
		{
			Key: "waters", Title: "Waters", Get: func(a *hull.Asset, i int) string { return sharesText(a.Zones[i].Waters) },
			Set: func(a *hull.Asset, i int, text string) (err error) {
				a.Zones[i].Waters, err = parseShares(text)
				return err
			},
			Hint: "Ids of the asset's waters with their shares of the time: north-sea 60 % + baltic 40 %.",
		},
		{
			Key: "fitted", Title: "Fitted now", Get: func(a *hull.Asset, i int) string { return fittedText(a.Zones[i].Fitted) },
			Set: func(a *hull.Asset, i int, text string) (err error) {
				a.Zones[i].Fitted, err = parseFitted(text)
				return err
			},
			Hint: "Pieces × pattern, date fitted, share wasted at the last docking: 24 × al-45 2024-03-15 10 %. Several sets with +.",
		},
		{
			Key: "patterns", Title: "Patterns offered", Get: func(a *hull.Asset, i int) string { return strings.Join(a.Zones[i].Patterns, ", ") },
			Set: func(a *hull.Asset, i int, text string) error {
				a.Zones[i].Patterns = splitList(text)
				return nil
			},
			Hint: "Ids of the patterns that the plan may choose from. Empty: all but soil rods.",
		},
		countField("min_count", "Least count", zone(func(z *hull.Zone) *int { return &z.MinCount })),
		countField("count_multiple", "Count in steps of", zone(func(z *hull.Zone) *int { return &z.CountMultiple })).
			hint("2 for pairs port and starboard."),
		{
			Key: "max_count", Title: "Most pieces", Number: true,
			Get: func(a *hull.Asset, i int) string {
				if m := a.Zones[i].MaxCount; m != nil {
					return fmt.Sprint(*m)
				}
				return ""
			},
			Set: func(a *hull.Asset, i int, text string) error {
				a.Zones[i].MaxCount = nil
				if strings.TrimSpace(text) == "" {
					return nil
				}
				n, err := parseCount(text)
				if err == nil {
					a.Zones[i].MaxCount = &n
				}
				return err
			},
			Hint: "Empty: no limit.",
		},
		{
			Key: "densities_ma_m2", Title: "Own densities", Unit: "mA/m²", Quantity: say.Density,
			Get: func(a *hull.Asset, i int) string {
				if d := a.Zones[i].OwnDensities; d != nil {
					return densitiesText(d)
				}
				return ""
			},
			Set: func(a *hull.Asset, i int, text string) error {
				d, err := parseDensities(text, a.Zones[i].OwnDensities)
				a.Zones[i].OwnDensities = d
				return err
			},
			Hint: "Initial / mean / final of bare steel. Empty: the basis' own.",
		},
		numberField("under_way_factor", "Under-way factor", "", zone(func(z *hull.Zone) *float64 { return &z.UnderWayFactor })).
			hint("Multiplies all three currents."),
		serviceField("Changes of this zone's trade, and lay-up; they go before the asset's.", zone(func(z *hull.Zone) *[]hull.Service { return &z.Service })),
		numberField("immersed_share", "Immersed share", "", zone(func(z *hull.Zone) *float64 { return &z.ImmersedShare })).
			hint("Share of the time under water, for tanks: it scales the mean current."),
		numberField("shielding", "Shielding", "", zone(func(z *hull.Zone) *float64 { return &z.Shielding })).
			hint("Share of an anode's output that reaches the steel."),
		yesNoField("bonded", "Bonded", zone(func(z *hull.Zone) *bool { return &z.Bonded })).
			hint("No: an unearthed shaft or an unbonded rudder; no anode elsewhere protects it."),
		yesNoField("mix_alloys", "May mix alloys", zone(func(z *hull.Zone) *bool { return &z.MixAlloys })),
		textField("circuit", "Circuit", zone(func(z *hull.Zone) *string { return &z.Circuit })).
			hint("Zones that share water and metal. Empty: the zone with what it holds."),
		optionalField("inside_temperature_c", "Temperature inside", "°C", zone(func(z *hull.Zone) **float64 { return &z.InsideTemperature })),
		optionalField("yield_mpa", "Yield strength", "MPa", zone(func(z *hull.Zone) **float64 { return &z.Yield })),
		optionalField("flash_point_c", "Cargo's flash point", "°C", zone(func(z *hull.Zone) **float64 { return &z.FlashPoint })),
		optionalField("beside_flash_point_c", "Flash point beside", "°C", zone(func(z *hull.Zone) **float64 { return &z.BesideFlashPoint })),
		optionalField("drop_height_m", "Drop height", "m", zone(func(z *hull.Zone) **float64 { return &z.DropHeight })),
		countField("wells", "Wells", zone(func(z *hull.Zone) *int { return &z.Wells })).hint("5 A each."),
		numberField("drains_a", "Other drains", "A", zone(func(z *hull.Zone) *float64 { return &z.Drains })),
	}
	return append(fs, protectionFields()...)
}

// AssetFields are the fields of the asset itself.
func AssetFields() []Field {
	basis := func(a *hull.Asset) *hull.Basis { return &a.Basis }
	costs := func(a *hull.Asset) *hull.Costs { return &a.Costs }
	return append([]Field{
		textField("name", "Name", whole(func(a *hull.Asset) *string { return &a.Name })),
		wordField("kind", "Kind", hull.Kind("").Words(), whole(func(a *hull.Asset) *hull.Kind { return &a.Kind })),
		dateField("in_service", "In service since", whole(func(a *hull.Asset) *hull.Date { return &a.InService })),
		dateField("last_docking", "Last docking", whole(func(a *hull.Asset) *hull.Date { return &a.LastDocking })).
			hint("Empty: the latest fitting date, else the date in service."),
		dateField("horizon", "Plan up to", whole(func(a *hull.Asset) *hull.Date { return &a.Horizon })),
		textField("currency", "Currency", whole(func(a *hull.Asset) *string { return &a.Currency })),
		wordField("basis.densities", "Densities", hull.DensityRule("").Words(), whole(func(a *hull.Asset) *hull.DensityRule { return &basis(a).Densities })).
			hint("offshore-code: DNV-RP-B401. hull-practice: ship practice per painted area, offered first for new ships."),
		numberField("basis.practice_i0_ma_m2", "Practice, new coat", "mA/m²", whole(func(a *hull.Asset) *float64 { return &basis(a).PracticeI0 })).
			hint("Common practice, no source: check against your own ships."),
		numberField("basis.practice_per_year_ma_m2", "Practice, per year", "mA/m²", whole(func(a *hull.Asset) *float64 { return &basis(a).PracticePerYear })),
		optionalField("basis.confidence", "Confidence", "", whole(func(a *hull.Asset) **float64 { return &basis(a).Confidence })).
			hint("Share of the spread of the true demand that the plan covers. Empty: 0.5, the design figures."),
		numberField("basis.reserve", "Reserve", "", whole(func(a *hull.Asset) *float64 { return &basis(a).Reserve })).
			hint("A zone with less reserve of mass or current than this is thin."),
		numberField("basis.renew_above", "Renew above", "", whole(func(a *hull.Asset) *float64 { return &basis(a).RenewAbove })).
			hint("No set may pass a docking with more of its mass gone than this."),
		wordField("basis.output_water", "Output in", hull.OutputWater("").Words(), whole(func(a *hull.Asset) *hull.OutputWater { return &basis(a).OutputWater })).
			hint("mean or worst of the waters: which one sets an anode's output."),
		wordField("basis.steel_curve", "Steel curve", hull.SteelCurve("").Words(), whole(func(a *hull.Asset) *hull.SteelCurve { return &basis(a).SteelCurve })).
			hint("How the forecast's steel takes current below -0.80 V: level, straight on, or a sigmoid that falls as deposits form."),
		numberField("basis.curve_peak", "Peak of the sigmoid", "", whole(func(a *hull.Asset) *float64 { return &basis(a).CurvePeak })).
			hint("Density at -0.80 V over that at -1.00 V, 2.5 to 3."),
		wordField("basis.decay", "Decay law", append([]string{""}, hull.DecayLaw("").Words()...), whole(func(a *hull.Asset) *hull.DecayLaw { return &basis(a).Decay })).
			hint("Empty: the forecast's mean density does not change. Else it falls as measured on bare steel: 10^c T^d mA/m², T hours under water."),
		optionalField("basis.decay_c", "Decay law, c", "", whole(func(a *hull.Asset) **float64 { return &basis(a).DecayC })).
			hint("Empty: that of the law."),
		optionalField("basis.decay_d", "Decay law, d", "", whole(func(a *hull.Asset) **float64 { return &basis(a).DecayD })).
			hint("Empty: that of the law."),
		serviceField("Changes of trade, and lay-up, for all zones of the waters' medium.", whole(func(a *hull.Asset) *[]hull.Service { return &a.Service })),
		numberField("costs.fit_per_piece", "Fitting, per piece", "", whole(func(a *hull.Asset) *float64 { return &costs(a).FitPerPiece })),
		numberField("costs.remove_per_piece", "Removal, per piece", "", whole(func(a *hull.Asset) *float64 { return &costs(a).RemovePerPiece })),
		numberField("costs.per_zone", "Per zone worked on", "", whole(func(a *hull.Asset) *float64 { return &costs(a).PerZone })),
		numberField("costs.discount_rate", "Discount rate", "per year", whole(func(a *hull.Asset) *float64 { return &costs(a).DiscountRate })),
	}, append(OrderFields(), ParticularFields()...)...)
}

// WaterFields are the fields of a water.
func WaterFields() []Field {
	return []Field{
		{
			Key: "id", Title: "Id", Get: func(a *hull.Asset, i int) string { return a.Waters[i].ID },
			Set: func(a *hull.Asset, i int, text string) error { renameWater(a, i, strings.TrimSpace(text)); return nil },
		},
		textField("name", "Name", water(func(w *hull.Water) *string { return &w.Name })),
		wordField("medium", "Medium", hull.Medium("").Words(), water(func(w *hull.Water) *hull.Medium { return &w.Medium })),
		optionalField("temperature_c", "Temp.", "°C", water(func(w *hull.Water) **float64 { return &w.Temperature })),
		optionalField("salinity", "Salinity", "PSS-78", water(func(w *hull.Water) **float64 { return &w.Salinity })),
		optionalField("resistivity_ohm_m", "Resistivity", "Ω m", water(func(w *hull.Water) **float64 { return &w.Resistivity })),
		optionalField("conductivity_25c_us_cm", "Cond. 25 °C", "µS/cm", water(func(w *hull.Water) **float64 { return &w.Conductivity25 })),
		optionalField("surface_temperature_c", "Surface", "°C", water(func(w *hull.Water) **float64 { return &w.SurfaceTemperature })).
			hint("Annual mean at the surface, which chooses the climate. Empty: the water's own temperature."),
		optionalField("porosity", "Porosity", "", water(func(w *hull.Water) **float64 { return &w.Porosity })).
			hint("Of a sediment whose resistivity is not measured: that of its water times porosity to the power of -1.315."),
	}
}

// DockingFields are the fields of a docking.
func DockingFields() []Field {
	return []Field{
		dateField("date", "Date", docking(func(d *hull.Docking) *hull.Date { return &d.Date })),
		wordField("kind", "Kind", hull.DockingKind("").Words(), docking(func(d *hull.Docking) *hull.DockingKind { return &d.Kind })),
		numberField("fixed_cost", "Fixed cost", "", docking(func(d *hull.Docking) *float64 { return &d.FixedCost })).
			hint("In the asset's currency, paid if anything at all is done with anodes at this docking."),
		{
			Key: "works", Title: "Coating works", Get: func(a *hull.Asset, i int) string { return worksText(a.Dockings[i].Works) },
			Set: func(a *hull.Asset, i int, text string) (err error) {
				a.Dockings[i].Works, err = parseWorks(text)
				return err
			},
			Hint: "Zone id, work, share or category: side touch-up 50 %; bottom recoat III; rudder found 8 %.",
		},
		numberField("mobilisation", "Mobilisation", "", docking(func(d *hull.Docking) *float64 { return &d.Mobilisation })).
			hint("Of a campaign, in the asset's currency, once if anything is done."),
		numberField("day_rate", "Day rate", "", docking(func(d *hull.Docking) *float64 { return &d.DayRate })).
			hint("Of a campaign, in the asset's currency, for every day that fitting takes."),
		numberField("pieces_per_day", "Pieces a day", "", docking(func(d *hull.Docking) *float64 { return &d.PiecesPerDay })).
			hint("Anodes that a campaign fits in a day."),
	}
}

// renameWater gives a water another id, also where zones and changes of trade
// name it.
func renameWater(a *hull.Asset, i int, id string) {
	rename := func(ws []hull.WaterShare) {
		for n := range ws {
			if ws[n].Water == a.Waters[i].ID {
				ws[n].Water = id
			}
		}
	}
	changes := func(ss []hull.Service) {
		for n := range ss {
			rename(ss[n].Waters)
		}
	}
	if _, taken := a.Water(id); !taken { // else the fault is the id's alone
		changes(a.Service)
		for z := range a.Zones {
			rename(a.Zones[z].Waters)
			changes(a.Zones[z].Service)
		}
	}
	a.Waters[i].ID = id
}

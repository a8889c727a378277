package workbook

import (
	"fmt"
	"strings"

	"anodewright/anodes"
	"anodewright/anodes/order"
	"anodewright/anodes/plan"
	"anodewright/assets"
	"anodewright/hull"
)

// basis writes what the plan rests on and what a person has to check.
func (b *book) basis() {
	s := b.sheet("Basis and cautions", "basis and cautions", 6)
	s.cautions("Cautions of this plan", b.o.Cautions)
	s.cautions("Cautions of the trade", plan.Usual())
	s.choices()
	s.changes()
	s.sources()
	head := s.tables()
	s.finish(page{frozenRows: 1, firstTitle: head, lastTitle: head})
}

// choices writes the basis as the asset states it.
func (s *sheet) choices() {
	b, c := s.a.Basis, s.a.Costs
	s.gap()
	s.part()
	s.line(section, "Choices")
	s.header(column{head: "Choice", most: 27}, column{head: "Chosen", most: 60}, column{head: "Figure; on yellow an input", format: two, most: 16}, column{head: "Unit", most: 26})
	named := func(name, what, chosen string, v float64, unit string) {
		row := s.row(what, chosen, input{v}, unit)
		s.define(name, s.ref(2, row, v))
	}
	s.row("Current densities", densityWords(b.Densities), nil, nil)
	if b.Densities == hull.HullPractice {
		s.row("Ship practice", "new, and more for each year of the coating's age", nil, nil)
		named("Practice_new", "", "new", b.PracticeI0, "mA/m² of painted steel")
		named("Practice_per_year", "", "each year", b.PracticePerYear, "mA/m² of painted steel")
	}
	sizing := "by the code"
	if b.Sizing == hull.ForecastSizing {
		sizing = "by the forecast: the least count that keeps the zone sound"
	}
	s.row("Sizing", sizing, nil, nil)
	s.row("Confidence", "share of the demand factor's distribution that the plan covers", b.ConfidenceLevel(), "share")
	s.row("Reserve", "below it a zone is called thin", b.Reserve, "share")
	named("Renew_above", "Renewal limit", "wastage above which a set does not stay past a docking", b.RenewAbove, "share of the net mass")
	s.row("Water for output", s.outputWater(), nil, nil)
	named("Protective_potential", "Protective potential of steel", "", anodes.Protective(), "V, Ag/AgCl/seawater")
	named("Discount_rate", "Discount rate", "", c.DiscountRate, "share a year")
	named("Spare_share", "Spares", "pieces ordered beside those to fit, rounded up, where the pattern does not say otherwise", order.ShareOfSpares(s.a, nil), "share of the pieces")
	named("Freight_per_kg", "Freight", "of the gross mass bought; no part of the plan's cost", c.FreightPerKg, s.money("a kg"))
	named("Freight_per_order", "Freight of an order", "once for each docking that something is bought for", c.FreightPerOrder, s.money("a docking"))
	s.row("Float before a docking", "between delivery and docking", c.FloatWeeks, "weeks")
	named("Fit_per_piece", "Fitting", "where the pattern does not say otherwise", c.FitPerPiece, s.money("a piece"))
	named("Remove_per_piece", "Taking off", "", c.RemovePerPiece, s.money("a piece"))
	named("Per_zone", "Access and staging", "", c.PerZone, s.money("a zone worked on"))
}

// changes writes the changes of service and the coating works that the demand
// follows.
func (s *sheet) changes() {
	type change struct {
		on        hull.Date
		zone, how string
	}
	var changes []change
	service := func(zone string, all []hull.Service) {
		for _, v := range all {
			how := ""
			if len(v.Waters) > 0 {
				how = "waters: " + s.waters(v.Waters)
			}
			if v.UnderWayFactor != nil {
				how = joined("; ", how, fmt.Sprintf("factor for being under way %g", *v.UnderWayFactor))
			}
			changes = append(changes, change{v.From, zone, how})
		}
	}
	service("whole asset", s.a.Service)
	for i := range s.a.Zones {
		service(s.names[i], s.a.Zones[i].Service)
	}
	for _, d := range s.a.Ahead() {
		for _, w := range d.Works {
			changes = append(changes, change{d.Date, s.zoneName(w.Zone), work(w)})
		}
	}
	if len(changes) == 0 {
		return
	}
	s.gap()
	s.part()
	s.line(section, "Changes of service and coating works")
	s.header(column{head: "Zone", most: 27}, column{head: "Change", most: 60}, column{head: "From", format: date})
	for _, c := range changes {
		s.row(c.zone, c.how, c.on)
	}
}

func work(w hull.Work) string {
	s := "coating: " + plain(w.Coating)
	if w.Share != nil {
		s += ", " + percentWords(*w.Share) + " of the area"
		if w.Coating == hull.TouchUp {
			s = "coating: touch-up of " + percentWords(*w.Share) + " of the breakdown"
		}
	}
	if w.Category != "" {
		s += ", category " + string(w.Category)
	}
	for _, c := range []struct {
		name  string
		value *float64
	}{{"a", w.A}, {"b", w.B}, {"breakdown", w.Breakdown}} {
		if c.value != nil {
			s += fmt.Sprintf(", %s %g", c.name, *c.value)
		}
	}
	return s
}

// sources writes where the densities of the zones and the figures of the
// alloys come from, each source once.
func (s *sheet) sources() {
	type source struct{ what, from, confidence string }
	var order []source
	users := map[source][]string{}
	use := func(what, from, confidence, user string) {
		k := source{what, from, confidence}
		if _, ok := users[k]; !ok {
			order = append(order, k)
		}
		for _, u := range users[k] {
			if u == user {
				return
			}
		}
		users[k] = append(users[k], user)
	}
	for i := range s.a.Zones {
		z := &s.a.Zones[i]
		for _, w := range z.Waters {
			from, confidence := s.a.DensitySource(z, s.a.Basis.Densities, w.Water)
			use("Current density", from, confidence, s.names[i])
		}
	}
	for i := range s.a.Patterns {
		p := &s.a.Patterns[i]
		m := anodes.MetalOf(p, s.a.Medium(&s.a.Zones[s.zoneOf(p)]))
		use("Capacity and potential", m.Source, m.Confidence, patternName(p))
	}
	s.gap()
	s.part()
	s.line(section, "Where the figures come from")
	s.header(column{head: "Figure", most: 27}, column{head: "Source", most: 60}, column{head: "For", most: 26}, column{head: "Confidence", most: 34})
	for _, k := range order {
		s.row(k.what, k.from, few(users[k]), sure(k.confidence))
	}
}

// few lists up to six names.
func few(names []string) string {
	const most = 6
	if len(names) <= most {
		return strings.Join(names, ", ")
	}
	return fmt.Sprintf("%s and %d more", strings.Join(names[:most], ", "), len(names)-most)
}

// tables writes the reference tables inside the program, and returns the row
// of their headings.
func (s *sheet) tables() int {
	s.gap()
	s.part()
	s.line(section, "Reference tables")
	s.line(lead, "What stands from memory has to be checked against the document before anyone relies on it.")
	head := s.header(column{head: "Table", most: 27}, column{head: "Document", most: 60}, column{head: "Clause", most: 26}, column{head: "Confidence", most: 34},
		column{head: "Edition", most: 16}, column{head: "Unit", most: 24})
	for _, t := range assets.Tables() {
		s.row(t.Title, t.Document, t.Clause, tableConfidence(t), t.Edition, t.Unit)
	}
	return head
}

// tableConfidence says how sure a table is, and which rows are not as sure as
// the rest.
func tableConfidence(t *assets.Table) string {
	parts := []string{sure(t.Confidence)}
	for _, r := range t.Rows {
		if sure(r.Confidence) != sure(t.Confidence) {
			parts = append(parts, r.Name+": "+sure(r.Confidence))
		}
	}
	return strings.Join(parts, "\n")
}

// cautions writes what a person has to know or check.
func (s *sheet) cautions(name string, cautions []plan.Caution) {
	s.gap()
	s.part()
	s.line(section, name)
	if len(cautions) == 0 {
		s.line(lead, "None.")
		return
	}
	s.header(column{head: "Zone", most: 27}, column{head: "Caution", most: 60}, column{head: "Source", most: 26}, column{head: "Confidence", most: 34})
	for _, c := range cautions {
		zone := "whole asset"
		if c.Zone >= 0 {
			zone = s.names[c.Zone]
		}
		s.row(zone, c.Text, c.Source, sure(c.Confidence))
	}
}

func densityWords(r hull.DensityRule) string {
	switch r {
	case hull.OffshoreCode:
		return "the offshore code, DNV-RP-B401, by climate and depth"
	case hull.SeaArea:
		return "class rule by sea area; the offshore code elsewhere"
	case hull.HullPractice:
		return "ship practice on painted steel in seawater; the offshore code elsewhere"
	}
	return "the zones' own; the offshore code where a zone has none"
}

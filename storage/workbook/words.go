package workbook

import (
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// zoneNames names the zones, those of one name with their ids.
func zoneNames(a *hull.Asset) []string {
	times := map[string]int{}
	for i := range a.Zones {
		times[a.Zones[i].Name]++
	}
	var names []string
	for i := range a.Zones {
		name := a.Zones[i].Name
		if times[name] > 1 || name == "" {
			name = joined(" ", name, "("+a.Zones[i].ID+")")
		}
		names = append(names, name)
	}
	return names
}

// zoneName names the zone of an id.
func (b *book) zoneName(id string) string {
	if i := slices.IndexFunc(b.a.Zones, func(z hull.Zone) bool { return z.ID == id }); i >= 0 {
		return b.names[i]
	}
	return id
}

// patternName names a pattern.
func patternName(p *hull.Pattern) string {
	switch {
	case p == nil:
		return ""
	case p.Name == "":
		return p.ID
	}
	return p.Name
}

// plain turns a word of the asset file into words of a text.
func plain[W ~string](w W) string { return strings.ReplaceAll(string(w), "-", " ") }

func alloyWords(a hull.Alloy) string {
	switch a {
	case hull.Aluminium:
		return "aluminium (Al-Zn-In)"
	}
	return string(a)
}

// governs says in words which criterion a count of pieces follows.
func (b *book) governs(criterion string) string {
	switch criterion {
	case "renew_above":
		return "renewal limit " + percentWords(b.a.Basis.RenewAbove)
	case "initial":
		return "initial current"
	case "final":
		return "final current"
	case "min_count":
		return "least count"
	}
	return plain(criterion)
}

// unmet says which zone cannot be held, from when on and why.
func (b *book) unmet(u renewal.Unmet) string {
	why := u.Criterion
	if criterion, rest, ok := strings.Cut(why, ": "); ok {
		why = b.governs(criterion) + ": " + rest
	}
	return fmt.Sprintf("%s cannot be held from %s on. %s.", b.names[u.Zone], u.Date, upperFirst(why))
}

// held says how a zone without anodes of its own is held; nothing where it
// has them.
func (b *book) held(z *hull.Zone) string {
	switch h := z.Hold().(type) {
	case hull.ByAnodes:
		return ""
	case hull.ByZone:
		return "held by " + b.zoneName(h.Host)
	case hull.ByImpressedCurrent:
		return "impressed current"
	case hull.ByCoat:
		return "zinc coat"
	}
	panic("workbook: unknown way of holding a zone")
}

// protection describes a zone's protection other than anodes.
func protection(z *hull.Zone) string {
	switch h := z.Hold().(type) {
	case hull.ByImpressedCurrent:
		s := "impressed current"
		if h.Anode != "" {
			s += ", anodes of " + plain(h.Anode)
		}
		if h.OffShare > 0 {
			s += ", off " + percentWords(h.OffShare) + " of the time"
		}
		return s
	case hull.ByCoat:
		s := fmt.Sprintf("zinc coat of %g µm", h.Thickness)
		if h.Class != "" {
			s += ", " + plain(h.Class)
		}
		return s
	}
	return ""
}

// fittedNow lists the anodes that a zone carries.
func (b *book) fittedNow(z *hull.Zone) string {
	var parts []string
	for _, f := range z.Fitted {
		p, _ := b.a.Pattern(f.Pattern)
		parts = append(parts, pieces(f.Count, p))
	}
	if len(parts) == 0 {
		return "none"
	}
	return strings.Join(parts, "\n")
}

func pieces(n int, p *hull.Pattern) string { return strconv.Itoa(n) + " × " + patternName(p) }

// wastages lists groups of anodes with what is gone of them.
func wastages(groups []plan.Group) string {
	var parts []string
	for _, g := range groups {
		painted := ""
		if g.Painted {
			painted = ", painted over"
		}
		parts = append(parts, fmt.Sprintf("%s: %.0f %%%s", pieces(g.Count, g.Pattern), 100*g.Wastage, painted))
	}
	return strings.Join(parts, "\n")
}

// ranges lists between what 90 % of the wastage of groups lies, one a line.
func ranges(groups []plan.Group) string {
	var parts []string
	for _, g := range groups {
		parts = append(parts, fmt.Sprintf("%.0f to %.0f %%", 100*g.Low, 100*g.High))
	}
	return strings.Join(parts, "\n")
}

// currents lists what one piece of each group gives, one a line.
func currents(groups []plan.Group) string {
	var parts []string
	for _, g := range groups {
		parts = append(parts, fmt.Sprintf("%.2f", g.Current))
	}
	return strings.Join(parts, "\n")
}

// waters lists the waters of shares.
func (b *book) waters(shares []hull.WaterShare) string {
	var parts []string
	for _, s := range shares {
		name := s.Water
		if w, ok := b.a.Water(s.Water); ok && w.Name != "" {
			name = w.Name
		}
		parts = append(parts, name+" "+percentWords(s.Share))
	}
	return strings.Join(parts, ", ")
}

// action says what the plan does with a zone at a docking.
func (b *book) action(zone, docking int) string {
	if held := b.held(&b.a.Zones[zone]); held != "" {
		return held
	}
	for _, u := range b.o.Unmet {
		if u.Zone == zone {
			if b.a.Ahead()[docking].Date < u.Date {
				return "not planned"
			}
			return "cannot be held"
		}
	}
	l, ok := b.o.Action(zone, docking)
	switch {
	case !ok:
		return "-"
	case l.Action == renewal.Keep:
		return "keep"
	case l.Action == renewal.Renew:
		return "renew: " + pieces(l.Count, l.Pattern)
	}
	return string(l.Action) + " " + pieces(l.Count, l.Pattern)
}

func percentWords(share float64) string {
	return strconv.FormatFloat(share*100, 'f', decimalsOf(share*100), 64) + " %"
}

// decimalsOf returns the decimals worth showing of a percentage.
func decimalsOf(percent float64) int {
	if r := percent - math.Floor(percent); r < 0.05 || r > 0.95 {
		return 0
	}
	return 1
}

// money returns a heading with the currency beside it.
func (b *book) money(heading string) string {
	if b.a.Currency == "" {
		return heading + ", no currency named"
	}
	return heading + ", " + clean(b.a.Currency)
}

// sure says how sure a figure is; what stands from memory asks to be checked.
func sure(confidence string) string {
	c := strings.TrimSuffix(strings.TrimSuffix(confidence, ", to be checked"), ": check")
	if strings.Contains(c, "from memory") {
		return c + ": check"
	}
	return c
}

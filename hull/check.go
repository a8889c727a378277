package hull

import (
	"fmt"
	"math"
	"reflect"
	"strings"
)

// Check looks for everything that keeps the asset from being computed. An
// asset without faults is valid: no later stage has to ask again.
func Check(a *Asset) Faults {
	var fs Faults
	checkFields(reflect.ValueOf(a).Elem(), "", &fs)
	c := checker{
		a: a, fs: &fs,
		waterIDs:   named(a.Waters, func(w Water) string { return w.ID }),
		zoneIDs:    named(a.Zones, func(z Zone) string { return z.ID }),
		patternIDs: named(a.Patterns, func(p Pattern) string { return p.ID }),
	}
	c.ids()
	c.waters()
	c.dates()
	c.patterns()
	for i := range a.Zones {
		c.zone(i)
	}
	c.hosts()
	c.dockings()
	c.readings()
	c.closed()
	c.ledger()
	return fs
}

// checker checks an asset. A reference into a list is only a fault of its own
// where every item of the list has an id: else the missing one is the mistake.
type checker struct {
	a                             *Asset
	fs                            *Faults
	waterIDs, zoneIDs, patternIDs bool
}

// named reports whether a list has items and each of them an id.
func named[T any](list []T, id func(T) string) bool {
	for _, item := range list {
		if strings.TrimSpace(id(item)) == "" {
			return false
		}
	}
	return len(list) > 0
}

// ids: every id once, and stock of known patterns.
func (c checker) ids() {
	unique := func(list string, n int, id func(int) string) {
		seen := map[string]int{}
		for i := range n {
			if j, ok := seen[id(i)]; ok && id(i) != "" {
				c.fs.add(fmt.Sprintf("%s[%d].id", list, i), fmt.Sprintf("an id that is not yet used by %s[%d]", list, j), "%q", id(i))
			} else {
				seen[id(i)] = i
			}
		}
	}
	unique("waters", len(c.a.Waters), func(i int) string { return c.a.Waters[i].ID })
	unique("zones", len(c.a.Zones), func(i int) string { return c.a.Zones[i].ID })
	unique("patterns", len(c.a.Patterns), func(i int) string { return c.a.Patterns[i].ID })
	for i, s := range c.a.Stock {
		c.pattern(fmt.Sprintf("stock[%d].pattern", i), s.Pattern)
	}
}

func (c checker) waters() {
	for i, w := range c.a.Waters {
		path := fmt.Sprintf("waters[%d]", i)
		if w.Resistivity == nil && w.Salinity == nil && w.Conductivity25 == nil {
			c.fs.add(path, "salinity, resistivity_ohm_m or conductivity_25c_us_cm", "none of them")
		}
		needsT := w.Medium == Seawater || w.Resistivity == nil
		if needsT && w.Temperature == nil {
			c.fs.add(path+".temperature_c", "a number: the water's resistivity or climate follows from it", "nothing")
		}
		if w.Resistivity == nil && w.Salinity != nil && w.Temperature != nil && (*w.Temperature < -2 || *w.Temperature > 40) {
			c.fs.add(path+".temperature_c", "a number from -2 to 40 where resistivity follows from salinity", "%v", *w.Temperature)
		}
		if c.a.Basis.Densities == SeaArea && w.Medium == Seawater {
			if _, ok := seaAreaRow(w); !ok {
				c.fs.add(path+".name", "a sea area of the class rule, since densities are by sea area: "+seaAreaNames(), "%s", quoteGot(w.Name))
			}
		}
	}
}

func (c checker) dates() {
	a := c.a
	if a.InService.IsZero() || a.Horizon.IsZero() {
		return
	}
	last := a.Start()
	if !a.LastDocking.IsZero() && a.LastDocking < a.InService {
		c.fs.add("last_docking", "a date not before in_service "+a.InService.String(), "%s", a.LastDocking)
	}
	if a.Horizon <= last {
		c.fs.add("horizon", "a date after the last docking "+last.String(), "%s", a.Horizon)
	}
	for i, d := range a.Dockings {
		path := fmt.Sprintf("dockings[%d].date", i)
		switch {
		case d.Date.IsZero():
		case i > 0 && d.Date <= a.Dockings[i-1].Date:
			c.fs.add(path, "dockings in the order of their dates, each after "+a.Dockings[i-1].Date.String(), "%s", d.Date)
		case d.Date >= a.Horizon && a.Horizon > last:
			c.fs.add(path, "a date before the horizon "+a.Horizon.String(), "%s", d.Date)
		}
	}
	c.service("service", a.Service)
	if b := a.Basis; b.Decay == OwnDecay {
		for name, x := range map[string]*float64{"decay_c": b.DecayC, "decay_d": b.DecayD} {
			if x == nil {
				c.fs.add("basis."+name, "a number: the constant of a decay law of one's own", "nothing")
			}
		}
	}
}

func (c checker) service(path string, ss []Service) {
	for i, s := range ss {
		p := fmt.Sprintf("%s[%d]", path, i)
		if i > 0 && !s.From.IsZero() && s.From <= ss[i-1].From {
			c.fs.add(p+".from", "changes in the order of their dates, each after "+ss[i-1].From.String(), "%s", s.From)
		}
		if len(s.Waters) == 0 && s.UnderWayFactor == nil {
			c.fs.add(p, "waters or under_way_factor: what changes from that date on", "neither")
		}
		if len(s.Waters) > 0 {
			c.shares(p+".waters", s.Waters)
		}
	}
}

// shares checks a mix of waters and returns its medium, if it has one.
func (c checker) shares(path string, ws []WaterShare) (Medium, bool) {
	var sum float64
	var medium Medium
	for i, s := range ws {
		sum += s.Share
		w, ok := c.a.Water(s.Water)
		if !ok {
			if c.waterIDs {
				c.fs.add(fmt.Sprintf("%s[%d].water", path, i), "the id of one of the asset's waters", "%s", quoteGot(s.Water))
			}
			return "", false
		}
		if medium != "" && w.Medium != medium {
			c.fs.add(fmt.Sprintf("%s[%d].water", path, i), "waters of one medium ("+string(medium)+"): steel in two media is two zones", "%s", w.Medium)
		}
		if medium == "" {
			medium = w.Medium
		}
	}
	if len(ws) > 0 && math.Abs(sum-1) > 1e-6 {
		c.fs.add(path, "shares that add up to 1", "%s", number(math.Round(sum*1e9)/1e9))
	}
	return medium, true
}

func (c checker) pattern(path, id string) {
	if _, ok := c.a.Pattern(id); !ok && c.patternIDs {
		c.fs.add(path, "the id of one of the asset's patterns", "%s", quoteGot(id))
	}
}

func (c checker) zoneID(path, id string) {
	if _, ok := c.a.Zone(id); !ok && c.zoneIDs {
		c.fs.add(path, "the id of one of the asset's zones", "%s", quoteGot(id))
	}
}

func (c checker) patterns() {
	for i, p := range c.a.Patterns {
		path := fmt.Sprintf("patterns[%d]", i)
		need := func(name string, x float64) {
			if x <= 0 {
				c.fs.add(path+"."+name, "a number above 0 for the shape "+string(p.Shape), "%v", x)
			}
		}
		for name, x := range map[string]float64{
			"length_m": p.Length, "width_m": p.Width, "height_m": p.Height, "radius_m": p.Radius, "girth_m": p.Girth, "diameter_m": p.Diameter,
		} {
			if x > 0 && x < 0.001 {
				c.fs.add(path+"."+name, "a size of at least 1 mm, 0.001", "%v", x)
			}
		}
		for name, x := range map[string]float64{
			"exposed_area_m2": p.ExposedArea, "shape_factor_per_m": p.ShapeFactor, "shape_factor_worn_per_m": p.ShapeFactorWorn,
		} {
			if x > 0 && x < 1e-6 {
				c.fs.add(path+"."+name, "a number of at least 0.000001", "%v", x)
			}
		}
		switch p.Shape {
		case LongSlender, ShortSlender:
			need("length_m", p.Length)
			if p.Radius <= 0 && p.Girth <= 0 {
				c.fs.add(path+".radius_m", "radius_m or girth_m above 0 for the shape "+string(p.Shape), "neither")
			}
		case LongFlush:
			need("length_m", p.Length)
			need("width_m", p.Width)
		case ShortFlush, Bracelet:
			if p.ExposedArea <= 0 {
				if p.Length <= 0 && p.Width <= 0 {
					c.fs.add(path+".exposed_area_m2", "exposed_area_m2, or length_m, width_m and height_m of the block", "neither")
					continue
				}
				need("length_m", p.Length)
				need("width_m", p.Width)
				need("height_m", p.Height)
			}
		case SoilRod:
			need("length_m", p.Length)
			need("diameter_m", p.Diameter)
			if p.Length > 0 && p.Diameter > 0 && p.Length < 2*p.Diameter {
				c.fs.add(path+".length_m", "a rod at least twice as long as its diameter", "%v", p.Length)
			}
		case Stated:
			need("shape_factor_per_m", p.ShapeFactor)
			need("shape_factor_worn_per_m", p.ShapeFactorWorn)
		}
		if p.GrossMass > 0 && p.GrossMass < p.NetMass {
			c.fs.add(path+".gross_mass_kg", "a mass not below the net mass "+number(p.NetMass), "%v", p.GrossMass)
		}
	}
}

func (c checker) zone(i int) {
	z := &c.a.Zones[i]
	path := fmt.Sprintf("zones[%d]", i)
	if z.BareArea > z.WettedArea && z.WettedArea > 0 {
		c.fs.add(path+".bare_area_m2", "an area not above wetted_area_m2 "+number(z.WettedArea)+", of which it is part", "%v", z.BareArea)
	}
	medium, ok := c.shares(path+".waters", z.Waters)
	c.service(path+".service", z.Service)
	for k, s := range z.Service {
		for j, w := range s.Waters {
			if sw, found := c.a.Water(w.Water); ok && found && sw.Medium != medium {
				c.fs.add(fmt.Sprintf("%s.service[%d].waters[%d].water", path, k, j), "a water of the zone's medium "+string(medium), "%s", sw.Medium)
			}
		}
	}
	c.coating(path+".coating", z.Coating.Category, z.Coating.A, z.Coating.B)
	tooEarly := !c.a.LastDocking.IsZero() && c.a.LastDocking < c.a.InService // the last docking is the mistake
	if z.Coating.Applied > c.a.Start() && !c.a.Start().IsZero() && !tooEarly {
		c.fs.add(path+".coating.applied", "a date not after the last docking "+c.a.Start().String()+"; a later coat is a work of its docking", "%s", z.Coating.Applied)
	}
	for j, id := range z.Patterns {
		c.pattern(fmt.Sprintf("%s.patterns[%d]", path, j), id)
	}
	if z.MaxCount != nil && *z.MaxCount < z.MinCount {
		c.fs.add(path+".max_count", fmt.Sprintf("a count not below min_count %d", z.MinCount), "%d", *z.MaxCount)
	}
	for j, f := range z.Fitted {
		p := fmt.Sprintf("%s.fitted[%d]", path, j)
		c.pattern(p+".pattern", f.Pattern)
		if !c.a.LastDocking.IsZero() && f.Fitted > c.a.LastDocking && !tooEarly {
			c.fs.add(p+".fitted", "a date not after the last docking "+c.a.LastDocking.String(), "%s", f.Fitted)
		}
	}
	if z.HeldBy != "" {
		if len(z.Fitted) > 0 {
			c.fs.add(path+".fitted", "nothing: a zone held by another carries no anodes", "%d", len(z.Fitted))
		}
		if z.Protection != nil {
			c.fs.add(path+".protection", "either held_by or protection", "both")
		}
	}
	if c.a.Basis.Densities == OwnDensities && z.OwnDensities == nil {
		c.fs.add(path+".densities_ma_m2", "the zone's own densities, since the basis says own", "nothing")
	}
	if p := z.Protection; p != nil {
		switch {
		case p.Kind == ZincCoat && p.Thickness <= 0:
			c.fs.add(path+".protection.thickness_um", "a number above 0 for a zinc coat", "%v", p.Thickness)
		case p.Kind == ZincCoat && p.Class == "":
			c.fs.add(path+".protection.class", "the exposure of the zinc coat", "nothing")
		case p.Kind == ImpressedCurrent && p.Anode == "":
			c.fs.add(path+".protection.anode", "the material of the impressed-current anodes", "nothing")
		}
	}
}

func (c checker) coating(path string, cat Category, a, b *float64) {
	if cat == CategoryOwn && a == nil {
		c.fs.add(path+".a", "a number from 0 to 1 for a coating with own constants", "nothing")
	}
	if cat == CategoryOwn && b == nil {
		c.fs.add(path+".b", "a number from 0 to 1 for a coating with own constants", "nothing")
	}
}

// hosts: held_by names a zone, and following it ends.
func (c checker) hosts() {
	index := map[string]int{}
	for i, z := range c.a.Zones {
		if _, twice := index[z.ID]; !twice {
			index[z.ID] = i
		}
	}
	for i, z := range c.a.Zones {
		path := fmt.Sprintf("zones[%d].held_by", i)
		if z.HeldBy == "" {
			continue
		}
		if _, ok := index[z.HeldBy]; !ok {
			if c.zoneIDs {
				c.fs.add(path, "the id of another zone", "%s", quoteGot(z.HeldBy))
			}
			continue
		}
		at, steps := i, 0
		for c.a.Zones[at].HeldBy != "" && steps <= len(c.a.Zones) {
			next, ok := index[c.a.Zones[at].HeldBy]
			if !ok {
				break
			}
			at = next
			steps++
		}
		if steps > len(c.a.Zones) {
			c.fs.add(path, "a zone that is not held, in the end, by this one", "%q", z.HeldBy)
		}
	}
}

func (c checker) dockings() {
	for i, d := range c.a.Dockings {
		path := fmt.Sprintf("dockings[%d]", i)
		if d.Kind == Campaign && d.DayRate > 0 && d.PiecesPerDay <= 0 {
			c.fs.add(path+".pieces_per_day", "a number above 0 where a campaign has a day rate", "%v", d.PiecesPerDay)
		}
		for j, w := range d.Works {
			p := fmt.Sprintf("%s.works[%d]", path, j)
			c.zoneID(p+".zone", w.Zone)
			c.work(p, w)
		}
	}
}

// work: what its kind needs.
func (c checker) work(path string, w Work) {
	if (w.Coating == TouchUp || w.Coating == PartRecoat) && w.Share == nil {
		c.fs.add(path+".share", "a number from 0 to 1: the share of the coated area", "nothing")
	}
	if w.Coating == Found && w.Breakdown == nil {
		c.fs.add(path+".breakdown", "a number from 0 to 1: the breakdown that the survey found", "nothing")
	}
	if w.Coating == Recoat || w.Coating == PartRecoat {
		c.coating(path, w.Category, w.A, w.B)
	}
}

func (c checker) readings() {
	for i, r := range c.a.Readings {
		path := fmt.Sprintf("readings[%d]", i)
		c.zoneID(path+".zone", r.Zone)
		if r.Pattern != "" {
			c.pattern(path+".pattern", r.Pattern)
		}
		if !r.Withdrawn.IsZero() && r.Withdrawn < r.Date {
			c.fs.add(path+".withdrawn", "a date not before the reading's own, "+r.Date.String(), "%s", r.Withdrawn)
		}
		kinds := 0
		for _, given := range []bool{len(r.WeighedWastage) > 0, len(r.Measured) > 0, len(r.Percent) > 0, r.Grades != nil} {
			if given {
				kinds++
			}
		}
		if kinds > 1 {
			c.fs.add(path, "one of weighed_wastage, measured, percent and grades", "%d of them", kinds)
		}
		if g := r.Grades; g != nil {
			if len(g.Bounds) != len(g.Counts) {
				c.fs.add(path+".grades.counts", fmt.Sprintf("one count for each of the %d classes", len(g.Bounds)), "%d", len(g.Counts))
			}
			for k := 1; k < len(g.Bounds); k++ {
				if g.Bounds[k] <= g.Bounds[k-1] {
					c.fs.add(fmt.Sprintf("%s.grades.bounds[%d]", path, k), "bounds that rise", "%v", g.Bounds[k])
				}
			}
		}
	}
}

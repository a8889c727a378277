package renewal

import (
	"fmt"
	"math"
	"slices"

	"anodewright/anodes"
	"anodewright/hull"
)

// Pin is an action that stays as it is while the rest of the plan is chosen.
type Pin struct {
	Zone    string    `json:"zone"`
	Docking hull.Date `json:"docking"`
	// Action is what is done there; Keep means that nothing is done.
	Action  Action `json:"action"`
	Pattern string `json:"pattern,omitempty"` // of a renew or an add; empty: any
	Count   int    `json:"count,omitempty"`   // at least what is needed; 0: as sized
}

// Pinned is what became of a pin.
type Pinned struct {
	Pin
	// Cost is what the plan would save without this pin, the others standing.
	// It is NaN for a pin that cannot stand.
	Cost float64
	// Refused says why the pin cannot stand; the plan is then made without it.
	Refused string
}

// allows reports whether a set leaves every pinned action of the zone as it is.
func (z *zone) allows(s *stock) bool {
	for b, p := range z.pins {
		touches := s.from == b || s.to == b
		passes := s.from < b && b < s.to
		switch {
		case p.Action == Keep && (touches || s.add == b),
			p.Action == Renew && (passes || s.from == b && !p.means(s.piece)),
			p.Action == Add && (touches || passes && (s.add != b || !p.means(s.addPiece))):
			return false
		}
	}
	return true
}

// means reports whether the pin is of this pattern.
func (p Pin) means(m *piece) bool { return p.Pattern == "" || p.Pattern == m.p.ID }

// pinnedCount returns the count pinned for an action at a boundary, 0 without.
func (z *zone) pinnedCount(b int, do Action, m *piece) int {
	if p, ok := z.pins[b]; ok && p.Action == do && p.means(m) {
		return p.Count
	}
	return 0
}

// newPinned is newSet with a pinned count in place of the least.
func (z *zone) newPinned(m *piece, i, j int) (stock, bool) {
	s, ok := z.newSet(m, i, j)
	n := z.pinnedCount(i, Renew, m)
	if !ok || n == 0 || n == s.count {
		return s, ok
	}
	least := s.count
	s.count, s.piece, s.governs = n, m.inRow(n), "pinned"
	return s, n > least && z.upToMultiple(n) == n && z.belowMax(n)
}

// addPinned is onto with a pinned count in place of the least.
func (z *zone) addPinned(s stock, o *old, m *piece, i, j int) (stock, bool) {
	t, ok := z.onto(s, o, m, i, j)
	n := z.pinnedCount(i, Add, m)
	if !ok || n == 0 || n == t.addCount {
		return t, ok
	}
	least := t.addCount
	t.addCount, t.addPiece, t.addWord = n, m.inRow(n), "pinned"
	return t, n > least && z.upToMultiple(n) == n && z.belowMax(s.pieces()+n)
}

// pinnedSpans lists the spans of a zone under its pins. Pins that leave no way
// to the horizon are given up, and refused says why: those that alone leave
// none, else all of them.
func (z *zone) pinnedSpans(pins map[int]Pin) (o options, refused map[int]string) {
	z.pins = pins
	o = z.spans()
	if o.reach() == z.end() {
		return o, nil
	}
	refused = map[int]string{}
	var stand []int
	for b, p := range pins {
		z.pins = map[int]Pin{b: p}
		if alone := z.spans(); alone.reach() < z.end() {
			refused[b] = z.whyNot(b, p)
		} else {
			stand = append(stand, b)
		}
	}
	z.pins = map[int]Pin{}
	for _, b := range stand {
		z.pins[b] = pins[b]
	}
	o = z.spans()
	if len(stand) > 0 && o.reach() < z.end() {
		for _, b := range stand {
			refused[b] = "each of the zone's pins can stand alone, but together they leave no way to hold the zone up to the horizon"
		}
		z.pins = nil
		o = z.spans()
	}
	return o, refused
}

// whyNot says why a pin alone leaves no way to hold the zone.
func (z *zone) whyNot(b int, p Pin) string {
	k := slices.IndexFunc(z.offered, func(m *piece) bool { return m.p.ID == p.Pattern })
	switch {
	case p.Action == Keep:
		return "no set fitted before can stay past this docking as it is"
	case p.Pattern == "":
		return fmt.Sprintf("no pattern offered to the zone leaves a way to %s there", p.Action)
	case k < 0:
		_, refused := anodes.Offered(z.a, z.z)
		if why := refused[p.Pattern]; why != "" {
			return fmt.Sprintf("%s is not offered to the zone: %s", p.Pattern, why)
		}
		return p.Pattern + " is not offered to the zone"
	case !z.mayFit(z.offered[k], b):
		return p.Pattern + " may not be fitted afloat"
	case p.Count > 0 && z.upToMultiple(p.Count) != p.Count:
		return fmt.Sprintf("%d is no multiple of %d", p.Count, z.z.CountMultiple)
	case p.Action == Renew:
		s, ok := z.newSet(z.offered[k], b, b+1)
		switch {
		case !ok:
			return fmt.Sprintf("%d pieces of %s are needed up to %s, more than may be fitted", s.count, p.Pattern, z.date(b+1))
		case p.Count > 0 && p.Count < s.count:
			return fmt.Sprintf("%d pieces of %s are too few: %d are needed up to %s", p.Count, p.Pattern, s.count, z.date(b+1))
		case p.Count > 0 && !z.belowMax(p.Count):
			return fmt.Sprintf("%d pieces are more than the %d that may be fitted", p.Count, *z.z.MaxCount)
		}
		return "no row of sets leads from there to the horizon"
	}
	return z.whyNoAdd(b, z.offered[k], p.Count)
}

// whyNoAdd says why nothing can be added at boundary b.
func (z *zone) whyNoAdd(b int, m *piece, count int) string {
	held, open, least := false, false, math.MaxInt
	try := func(s stock, ok bool) {
		if !ok {
			return
		}
		held = true
		t, ok := z.addTo(s, m, b, b+1)
		open = open || ok
		if ok {
			least = min(least, t.addCount)
		}
	}
	try(z.keep(b))
	for i := 1; i < b; i++ {
		for _, before := range z.offered {
			try(z.newSet(before, i, b))
		}
	}
	switch {
	case !held:
		return "no set lasts up to this docking, so that there is none to add to"
	case !open:
		return fmt.Sprintf("no set that is there at this docking may be added to: it is wasted above the renewal limit of %g %%, of another alloy, or the sum is more than may be fitted", 100*z.a.Basis.RenewAbove)
	case count > 0 && count < least:
		return fmt.Sprintf("%d pieces of %s are too few: %d are needed up to %s", count, m.p.ID, least, z.date(b+1))
	}
	return "no row of sets leads from there to the horizon"
}

// place finds a pin in the asset: its zone and boundary, or why it has none.
func (p Pin) place(a *hull.Asset) (zone, boundary int, why string) {
	zone = slices.IndexFunc(a.Zones, func(z hull.Zone) bool { return z.ID == p.Zone })
	if zone < 0 {
		return 0, 0, "the asset has no such zone"
	}
	docking := slices.IndexFunc(a.Ahead(), func(d hull.Docking) bool { return d.Date == p.Docking })
	if docking < 0 {
		return 0, 0, "the asset has no docking ahead on this day"
	}
	if _, own := a.Zones[zone].Hold().(hull.ByAnodes); !own {
		return 0, 0, "the zone is not held by anodes of its own"
	}
	switch p.Action {
	case Keep:
		if p.Pattern != "" || p.Count != 0 {
			return 0, 0, "a keep has no pattern and no count"
		}
	case Renew, Add:
	default:
		return 0, 0, fmt.Sprintf("want keep, renew or add, got %q", p.Action)
	}
	if p.Count < 0 {
		return 0, 0, "the count is below 0"
	}
	return zone, docking + 1, ""
}

package hull

import "slices"

// Before returns the asset as it was before its i-th closed docking was done,
// with that docking and the later ones ahead: what it carried follows from the
// ledger's facts up to then, and its start is the date of the latest of them.
// It reports false where the ledger does not reach back so far. All else is as
// it is now; a zone whose coating was applied later had another one then: see
// [Asset.CoatKnown].
func (a *Asset) Before(i int) (*Asset, bool) {
	closed := a.Closed[i]
	var facts []Fact
	var start Date
	for _, f := range a.Ledger {
		if f.Date < closed.Date {
			facts = append(facts, f)
			start = max(start, f.Date)
		}
	}
	if i > 0 {
		start = max(start, a.Closed[i-1].Date)
	}
	if len(facts) == 0 {
		return nil, false
	}
	past := *a
	past.LastDocking, past.Today, past.Ledger, past.Closed = start, closed.Date, facts, a.Closed[:i:i]
	past.Dockings = nil
	for _, c := range a.Closed[i:] {
		past.Dockings = append(past.Dockings, Docking{Date: c.Date, Kind: c.Kind, Works: c.Works})
	}
	past.Dockings = append(past.Dockings, a.Ahead()...)
	sets, faults := FittedSets(facts)
	past.Zones = slices.Clone(a.Zones)
	for k := range past.Zones {
		past.Zones[k].Fitted = sets[past.Zones[k].ID]
	}
	return &past, len(faults) == 0
}

// CoatKnown reports whether the zone's coating is older than the start of the
// plan, as it always is but in an asset as it was: see [Asset.Before].
func (a *Asset) CoatKnown(z *Zone) bool { return z.Coating.Applied <= a.Start() }

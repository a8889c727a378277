package plan

import (
	"slices"

	"anodewright/anodes/survey"
	"anodewright/hull"
)

// pastFound is what was found on the anodes of a zone before the last docking.
type pastFound struct {
	zone  int
	found []survey.Observation
}

// pastReadings gathers what was found on the anodes of each zone up to every
// closed docking and at it, each beside what the design figures made of it
// from the docking before: closing a docking loses nothing that was learned.
// Circuits with a coating that is newer than that are left out, for their
// demand then is not known.
func (o *Outcome) pastReadings() (all []pastFound) {
	for i := range o.Asset.Closed {
		a, ok := o.Asset.Before(i)
		if !ok {
			continue
		}
		a.Readings = append(slices.Clone(a.Readings), foundAt(a, o.Asset, o.Asset.Closed[i].Date)...)
		past := &Outcome{Asset: a, Today: a.Today, Intervals: a.Intervals(), Zones: o.Zones, taught: o.coated(a)}
		dates := past.readingDates()
		known := past.coatsKnown()
		for zone := range dates {
			if name, _ := past.circuitOf(&a.Zones[zone]); !known[name] {
				delete(dates, zone)
			}
		}
		if len(dates) == 0 {
			continue
		}
		g := survey.Gather(a, past.Today, past.circuitOf, past.history(dates).predicted, nil)
		for c, zones := range g.Zones {
			for k, zone := range zones {
				if found := g.Circuits[c].Zones[k].Found; len(found) > 0 {
					all = append(all, pastFound{zone, found})
				}
			}
		}
	}
	return all
}

// coatsKnown says of each circuit whether the coatings of all its zones are
// known.
func (o *Outcome) coatsKnown() map[string]bool {
	known := map[string]bool{}
	for i := range o.Asset.Zones {
		z := &o.Asset.Zones[i]
		if name, in := o.circuitOf(z); in {
			before, seen := known[name]
			known[name] = (before || !seen) && o.Asset.CoatKnown(z)
		}
	}
	return known
}

// foundAt returns as readings what the ledger of an asset says was found by
// looking at a closed docking, of sets without readings taken in dock: one
// figure a set, since nobody noted how many pieces it is the mean of. past is
// the asset as it was before.
func foundAt(past, a *hull.Asset, docking hull.Date) (readings []hull.Reading) {
	last := map[hull.SetKey]hull.Fact{}
	var order []hull.SetKey
	for _, f := range a.Ledger {
		if f.Date == docking && f.Deed == hull.WasFound && f.Fitted < docking {
			if _, twice := last[f.Key()]; !twice {
				order = append(order, f.Key())
			}
			last[f.Key()] = f
		}
	}
	for _, key := range order {
		f := last[key]
		read := func(r hull.Reading) bool {
			return survey.Stands(&r) && r.Zone == f.Zone && (r.Pattern == "" || r.Pattern == f.Pattern) && (r.Fitted.IsZero() || r.Fitted == f.Fitted) &&
				r.Date >= docking-inDock && r.Date <= docking
		}
		if f.How == hull.Forecasted || f.Count == 0 || slices.ContainsFunc(past.Readings, read) {
			continue
		}
		readings = append(readings, hull.Reading{Date: docking, Zone: f.Zone, Pattern: f.Pattern, Fitted: f.Fitted, Percent: []float64{100 * f.Wastage}})
	}
	return readings
}

// addPast adds to what the readings since the last docking tell what was found
// before, of zones that carry anodes now.
func (o *Outcome) addPast(g *survey.Gathered) {
	for _, p := range o.past {
		if circuit, place := g.Find(o.Asset, p.zone); place >= 0 {
			z := &g.Circuits[circuit].Zones[place]
			z.Found = append(z.Found, p.found...)
		}
	}
}

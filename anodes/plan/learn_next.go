package plan

import (
	"cmp"
	"math"
	"slices"

	"anodewright/anodes/survey"
	"anodewright/hull"
)

// Suggestion is a reading that could be taken today, with what it promises.
type Suggestion struct {
	Zone    int
	Set     int // index among the zone's fitted sets
	Pieces  int // to be weighed
	Demand  Factor
	After   Factor  // expected: the range about today's median
	Narrows float64 // share of the range of ln(demand factor) that goes

	// Until is the docking after the next, or the horizon: what has to be decided
	// at the next is whether the set may stay to then. Wrong is the chance that
	// the likelier answer is wrong, WrongAfter that expected after the reading.
	Until             hull.Date
	Wrong, WrongAfter float64
}

// suggested is how many pieces of a set a suggestion weighs at most.
const suggested = 4

// NextReadings returns the readings that could be taken today, one a fitted
// set: first the one that would take away most of the chance of deciding wrong
// at the next docking, and of those that take away as much, the one that
// narrows the demand factor of its circuit most. It is empty where the forecast
// does not reach today.
func (o *Outcome) NextReadings() []Suggestion {
	if o.Today <= o.Asset.Start() || o.Today > o.Asset.Horizon {
		return nil
	}
	dates := o.readingDates()
	for zone := range o.Asset.Zones {
		dates[zone] = append(dates[zone], o.Today)
	}
	h := o.history(dates)
	l := o.learnFrom(h)
	decision := o.nextDecision()
	var candidates []survey.Candidate
	var all []Suggestion
	for zone := range o.Asset.Zones {
		circuit, place := l.gathered.Find(o.Asset, zone)
		if place < 0 {
			continue
		}
		z := &o.Asset.Zones[zone]
		for set := range z.Fitted {
			p := h.predicted(zone, set, o.Today)
			n := min(suggested, survey.Count(o.Asset, z, set, o.Today).Live)
			if p == nil || n == 0 {
				continue
			}
			candidates = append(candidates, survey.Candidate{Circuit: circuit, Zone: place, Predicted: p, Pieces: n})
			all = append(all, Suggestion{Zone: zone, Set: set, Pieces: n})
		}
	}
	var sorted []Suggestion
	for _, g := range l.learned.NextReading(candidates) {
		s := all[g.Candidate]
		d := l.learned.Circuits[candidates[g.Candidate].Circuit].Demand
		s.Demand.Median, s.After.Median = d.Median(), d.Median()
		s.Demand.Low, s.Demand.High = d.Range()
		reach := normalQuantile(0.95) * g.After
		s.After.Low, s.After.High = d.Median()*math.Exp(-reach), d.Median()*math.Exp(reach)
		if g.Before > 0 {
			s.Narrows = 1 - g.After/g.Before
		}
		c := candidates[g.Candidate]
		local := l.learned.Circuits[c.Circuit].Zones[c.Zone].Factor
		if limit, ok := decision.limit(s.Zone, s.Set); ok {
			s.Until = decision.until
			s.Wrong, s.WrongAfter = survey.Misjudged(local.Mean, local.SD, g.LocalAfter, limit)
		}
		sorted = append(sorted, s)
	}
	slices.SortStableFunc(sorted, func(a, b Suggestion) int {
		const alike = 0.005 // of the chance
		x, y := a.Wrong-a.WrongAfter, b.Wrong-b.WrongAfter
		return cmp.Compare(math.Round(y/alike), math.Round(x/alike))
	})
	return sorted
}

// decision is what has to be decided of the fitted sets at the next docking:
// whether they may stay to the one after it.
type decision struct {
	at, until hull.Date
	h         *history
}

// nextDecision lets the fitted sets waste over the next docking, left alone.
func (o *Outcome) nextDecision() *decision {
	next, ok := o.NextDocking()
	if !ok {
		return nil
	}
	d := &decision{at: next.Date, until: o.Asset.Horizon}
	for _, iv := range o.Intervals {
		if iv.From == d.at {
			d.until = iv.To
		}
	}
	dates := map[int][]hull.Date{}
	for zone := range o.Asset.Zones {
		dates[zone] = []hull.Date{d.at, d.until}
	}
	d.h = o.history(dates)
	return d
}

// limit returns the logarithm of the zone's factor up to which a set may stay:
// neither wasted above the renewal limit at the docking nor spent at its end.
func (d *decision) limit(zone, set int) (float64, bool) {
	if d == nil {
		return 0, false
	}
	a := d.h.o.Asset
	at, until := d.h.predicted(zone, set, d.at), d.h.predicted(zone, set, d.until)
	p, ok := a.Pattern(a.Zones[zone].Fitted[set].Pattern)
	if at == nil || until == nil || !ok {
		return 0, false
	}
	low, high := -4.0, 4.0
	for range 50 {
		if mid := (low + high) / 2; at(mid) <= a.Basis.RenewAbove && until(mid) <= p.Utilisation {
			low = mid
		} else {
			high = mid
		}
	}
	return low, true
}

// Predicted returns the wastage that the design figures make of the set of a
// reading on its day, and whether they make one.
func (o *Outcome) Predicted(reading int) (float64, bool) {
	r := &o.Asset.Readings[reading]
	if o.learned == nil || !survey.Usable(o.Asset, r, o.Today) {
		return 0, false
	}
	for zone := range o.Asset.Zones {
		if z := &o.Asset.Zones[zone]; z.ID == r.Zone {
			if p := o.learned.design.predicted(zone, survey.Set(z, r), r.Date); p != nil {
				return p(0), true
			}
		}
	}
	return 0, false
}

// Before returns the demand factor without any reading.
func (o *Outcome) Before() Factor { return priorFactor(o.Asset.Basis.ConfidenceLevel()) }

// Pieces returns how many pieces of a zone's fitted set still give current by
// the readings up to today, and how many were fitted.
func (o *Outcome) Pieces(zone, set int) (giving, fitted int) {
	p := survey.Count(o.Asset, o.Zones[zone].Zone, set, o.Today)
	return p.Giving, p.Fitted
}

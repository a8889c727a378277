package plan

import (
	"math"

	"anodewright/anodes/survey"
)

// Suggestion is a reading that could be taken today, with what it promises.
type Suggestion struct {
	Zone    int
	Set     int // index among the zone's fitted sets
	Pieces  int // to be weighed
	Demand  Factor
	After   Factor  // expected: the range about today's median
	Narrows float64 // share of the range of ln(demand factor) that goes
}

// suggested is how many pieces of a set a suggestion weighs at most.
const suggested = 4

// NextReadings returns the readings that could be taken today, one a fitted
// set, the one first that narrows the demand factor of its circuit most. It is
// empty where the forecast does not reach today.
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
		sorted = append(sorted, s)
	}
	return sorted
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

// Questions are the doubts about the asset's readings, for the surveyor to
// settle.
func (o *Outcome) Questions() []survey.Question { return survey.Questions(o.Asset, o.Today) }

// Before returns the demand factor without any reading.
func (o *Outcome) Before() Factor { return priorFactor(o.Asset.Basis.ConfidenceLevel()) }

// Pieces returns how many pieces of a zone's fitted set still give current by
// the readings up to today, and how many were fitted.
func (o *Outcome) Pieces(zone, set int) (giving, fitted int) {
	p := survey.Count(o.Asset, o.Zones[zone].Zone, set, o.Today)
	return p.Giving, p.Fitted
}

package plan

import (
	"math"
	"sync"

	"anodewright/anodes/renewal"
	"anodewright/anodes/survey"
	"anodewright/hull"
)

// Option changes how [Compute] plans.
type Option func(*options)

type options struct {
	readings bool
	pins     []renewal.Pin
	limits   renewal.Limits
	quay     map[string]int
	staging  bool
	memo     *renewal.Memo
}

// WithReadings lets the plan use the demand factors that the asset's readings
// teach in place of that of the design figures.
func WithReadings() Option { return func(o *options) { o.readings = true } }

// LearnedFactor is the demand factor of a zone after the asset's readings:
// that of its circuit times what the zone's anodes give more than their share
// by the model. A zone without anodes has that of its circuit.
type LearnedFactor struct {
	Factor
	Readings int // of the circuit; 0: it is learned from other circuits alone
	Anodes   int // that these readings looked at
}

// learning is what the readings of an asset teach.
type learning struct {
	gathered *survey.Gathered
	learned  *survey.Learned
	history  *history
	design   *history // by the coatings as designed, at a factor of 1
}

// learn infers the demand factors from the usable readings and from what was
// found up to closed dockings; nil where there is nothing. It needs no plan:
// the readings are of sets fitted at the last docking.
func (o *Outcome) learn() *learning {
	o.past = o.pastReadings()
	dates := o.readingDates()
	if len(dates)+len(o.past) == 0 {
		return nil
	}
	if o.Today > o.Asset.Start() && o.Today <= o.Asset.Horizon {
		for _, p := range o.past { // so that the shares of its circuit's charge are known
			dates[p.zone] = append(dates[p.zone], o.Today)
		}
	}
	l := o.learnFrom(o.history(dates))
	if l.learned.Anodes == 0 {
		return nil
	}
	if l.design = l.history; o.bySurveys() != o.Asset {
		l.design = o.historyOf(o.Asset, []float64{0}, dates)
	}
	return l
}

func (o *Outcome) learnFrom(h *history) *learning {
	g := survey.Gather(o.Asset, o.Today, o.circuitOf, h.predicted, func(zone int) float64 { return h.charge[zone] })
	o.addPast(g)
	return &learning{gathered: g, learned: survey.Learn(survey.Standard(), g.Circuits), history: h}
}

// readingDates are those of the usable readings, by zone.
func (o *Outcome) readingDates() map[int][]hull.Date {
	dates := map[int][]hull.Date{}
	for i := range o.Asset.Readings {
		r := &o.Asset.Readings[i]
		if !survey.Usable(o.Asset, r, o.Today) {
			continue
		}
		for zone := range o.Asset.Zones {
			if o.Asset.Zones[zone].ID == r.Zone {
				dates[zone] = append(dates[zone], r.Date)
			}
		}
	}
	return dates
}

// posterior returns what is known of a zone's factor, and the place of its
// circuit and of the zone in it; the prior where l is nil or no circuit of
// anodes holds the zone.
func (l *learning) posterior(a *hull.Asset, zone int) (p survey.Posterior, circuit, place int) {
	if l == nil {
		return prior(), -1, -1
	}
	circuit, place = l.gathered.Find(a, zone)
	switch {
	case circuit < 0:
		return prior(), -1, -1
	case place < 0:
		return l.learned.Circuits[circuit].Demand, circuit, place
	}
	return l.learned.Circuits[circuit].Zones[place].Factor, circuit, place
}

// prior is the demand factor without any reading.
var prior = sync.OnceValue(func() survey.Posterior {
	return survey.Learn(survey.Standard(), []survey.Circuit{{Zones: make([]survey.Zone, 1)}}).Circuits[0].Demand
})

// factor returns what is learned of a zone's demand factor, nil where nothing
// is.
func (l *learning) factor(a *hull.Asset, zone int) *LearnedFactor {
	p, circuit, _ := l.posterior(a, zone)
	if circuit < 0 {
		return nil
	}
	f := &LearnedFactor{Factor: Factor{Median: p.Median(), Used: p.Quantile(a.Basis.ConfidenceLevel())}}
	f.Low, f.High = p.Range()
	for _, z := range l.gathered.Circuits[circuit].Zones {
		f.Readings += len(z.Found)
	}
	f.Anodes = l.learned.Circuits[circuit].Anodes
	return f
}

// weights are the demand factor that a zone's circuit is forecast with and the
// zone's current factor.
func (l *learning) weights(a *hull.Asset, zone int) (theta, current float64) {
	_, circuit, place := l.posterior(a, zone)
	if circuit < 0 {
		return 1, 1
	}
	c := &l.learned.Circuits[circuit]
	if place < 0 {
		return c.Demand.Median(), 1
	}
	return c.Demand.Median(), c.Zones[place].Current
}

// history is how the fitted sets waste from the last docking on while nothing
// is done, by node of the demand factor.
type history struct {
	o       *Outcome
	nodes   []float64
	wastage map[setAt][]float64 // by node
	charge  []float64           // Ah that a zone's anodes gave at the design figures
}

type setAt struct {
	zone, set int
	date      hull.Date
}

// history lets the fitted sets of every circuit waste to the dates wanted in
// its zones.
func (o *Outcome) history(dates map[int][]hull.Date) *history {
	return o.historyOf(o.bySurveys(), survey.Nodes(), dates)
}

// historyOf is history with the coatings of a variant of the asset and at some
// nodes.
func (o *Outcome) historyOf(steel *hull.Asset, nodes []float64, dates map[int][]hull.Date) *history {
	h := &history{o, nodes, map[setAt][]float64{}, make([]float64, len(o.Asset.Zones))}
	course := hull.NewCourse(steel)
	for node, x := range nodes {
		idle := o.bare(math.Exp(x))
		for _, c := range idle.circuits() {
			var wanted []hull.Date
			for _, zone := range c.zones {
				wanted = append(wanted, dates[zone]...)
			}
			if len(wanted) > 0 && len(c.groups) > 0 {
				h.run(idle, c, course, wanted, node, x == 0)
			}
		}
	}
	return h
}

// bare is the outcome as it would be with a demand factor known and the
// coatings as the readings teach them, without a plan.
func (o *Outcome) bare(theta float64) *Outcome {
	b := &Outcome{Asset: o.Asset, Today: o.Today, Intervals: o.Intervals, Learns: true, taught: o.taught, lots: o.lots, Zones: make([]Zone, len(o.Asset.Zones))}
	for i := range b.Zones {
		b.Zones[i].theta, b.Zones[i].current = theta, 1
	}
	return b
}

// run lets one circuit waste up to the last of the dates, by one node.
func (h *history) run(o *Outcome, c *circuit, course *hull.Course, dates []hull.Date, node int, design bool) {
	var last hull.Date
	for _, d := range dates {
		last = max(last, d)
	}
	for k, iv := range o.Intervals {
		if iv.From >= last {
			return
		}
		var stops []float64
		for _, d := range dates {
			if d > iv.From && d < iv.To {
				stops = append(stops, d.Years(iv.From))
			}
		}
		points := o.run(c, course, k, stops)
		for _, d := range dates {
			for _, p := range points {
				if d > iv.From && d <= iv.To && math.Abs(p.Time-d.Years(iv.From)) < 1e-9 {
					h.keep(c, d, node, p.Wastage)
				}
			}
		}
		if design {
			for j, g := range c.groups {
				h.charge[g.zone] += float64(g.Count) * g.Pattern.NetMass * g.metal.Capacity * (g.Wastage - points[0].Wastage[j])
			}
		}
	}
}

// keep notes the wastage of a circuit's sets: that of the pieces which stay as
// they were fitted, the first of theirs.
func (h *history) keep(c *circuit, date hull.Date, node int, wastage []float64) {
	for j, g := range c.groups {
		if g.Set < 0 || j > 0 && c.groups[j-1].zone == g.zone && c.groups[j-1].Set == g.Set {
			continue
		}
		at := setAt{g.zone, g.Set, date}
		if h.wastage[at] == nil {
			h.wastage[at] = make([]float64, len(h.nodes))
		}
		h.wastage[at][node] = wastage[j]
	}
}

// predicted is the wastage of a fitted set at a date by the demand factor, nil
// where the forecast does not reach, and of a set that was spent at the last
// docking, of which no factor can be told.
func (h *history) predicted(zone, set int, date hull.Date) survey.Predicted {
	f := h.o.Asset.Zones[zone].Fitted[set]
	w := h.wastage[setAt{zone, set, date}]
	p, ok := h.o.Asset.Pattern(f.Pattern)
	if w == nil || !ok || f.Wastage >= p.Utilisation {
		return nil
	}
	return survey.Interpolate(h.nodes, w, p.Utilisation)
}

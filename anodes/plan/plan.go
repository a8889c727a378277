// Package plan puts the parts together: from an asset and today's date to one
// immutable Outcome that the app, the command and the workbook all show.
package plan

import (
	"math"

	"anodewright/anodes"
	"anodewright/anodes/order"
	"anodewright/anodes/protection"
	"anodewright/anodes/renewal"
	"anodewright/anodes/survey"
	"anodewright/assets"
	"anodewright/hull"
)

// Outcome is all that is known about an asset's plan. It is not to be
// changed.
type Outcome struct {
	Asset     *hull.Asset
	Today     hull.Date
	Intervals []hull.Interval
	Zones     []Zone // in the order of the asset's zones
	Schedule  []renewal.Line
	Order     []order.Line
	Staged    []order.Staged // nil unless asked for: see [WithStaging] and [Stage]
	Money     Money
	Unmet     []renewal.Unmet
	Pins      []renewal.Pinned // in the order in which they were given
	Asked     renewal.Limits   // that the plan was to keep to
	Limits    renewal.Limits   // that it keeps to
	Quay      map[string]int   // the stock of the first docking ahead that the plan keeps to; nil: no limit
	// OverLimits says why the plan does not keep to the limits asked for; it is
	// empty where it does.
	OverLimits string
	Lacks      []renewal.Lack // what is short on the quay, where that is why
	Cautions   []Caution
	// Learns says that the plan uses what the readings teach.
	Learns bool

	learned *learning        // nil without usable readings
	past    []pastFound      // before the last docking
	lots    [][][]survey.Lot // by zone and set; nil: not yet divided

	coatings []*LearnedCoating // by zone; nil where no reading tells of it
	taught   *hull.Asset       // with these coatings; nil: the asset itself
}

// Zone is the outcome of one zone.
type Zone struct {
	Zone      *hull.Zone
	Factor    Factor          // that the plan uses
	Learned   *LearnedFactor  // by the readings; nil where they teach nothing
	Coating   *LearnedCoating // by the readings; nil where none tells of it
	Intervals []ZoneInterval
	Refused   map[string]string // pattern id -> why it is not offered

	// Protection is the result of what holds or burdens the zone beside
	// anodes in water; nil where nothing does.
	Protection *protection.Result

	// The demand factor that the zone's circuit is forecast with, and the
	// zone's current factor.
	theta, current float64
}

// Factor is the demand factor: the true demand over the design figure, its
// median and 90 % range, and the value that the plan uses at the chosen
// confidence.
type Factor struct{ Median, Low, High, Used float64 }

// ZoneInterval is one zone in one docking interval.
type ZoneInterval struct {
	hull.Interval
	Breakdown  hull.Breakdown
	Demand     hull.Current  // the zone's own, before the demand factor
	Total      hull.Current  // with what the zone holds for others
	ByCode     hull.Current  // Demand by the offshore code
	ByPractice *hull.Current // Demand by ship practice; nil where it has no figure
	BySeaArea  *hull.Current // Demand by the class rule; nil where it has no figure
	Fitted     []Group       // at the interval's end, under the plan
	Output     float64       // A that the groups can give at the interval's end
	State      State
	Cause      string  // of a state other than sound
	Potential  float64 // V at the interval's end; NaN where no circuit holds the zone
	SteelLoss  float64 // mm of bare steel lost within the interval, while short
	Repolarise Repolarise
	// SpentProbability is that of all the zone's anodes being spent at the
	// interval's end; nil without any.
	SpentProbability *float64
	// ShortWaters are those of the zone's waters in which its anodes are short
	// of output at the interval's end.
	ShortWaters []ShortWater
}

// Money is what the plan costs, discounted to the last docking, in the
// asset's currency. A NaN is a figure that does not exist.
type Money struct {
	Total, LowerBound float64
	Docking           []float64 // shared cost of each docking ahead
	RenewAll, AsLate  float64   // the two simple rules
	Free              float64   // the total without pins
	Proven            bool
}

// Compute plans an asset. The asset has to be valid: see hull.Check. today is
// used where the asset does not state its own. Unless an option says
// otherwise, readings change neither plan nor forecast: what they teach stands
// beside them.
func Compute(a *hull.Asset, today hull.Date, opts ...Option) *Outcome {
	var how options
	for _, opt := range opts {
		opt(&how)
	}
	if !a.Today.IsZero() {
		today = a.Today
	}
	o := &Outcome{Asset: a, Today: today, Intervals: a.Intervals(), Learns: how.readings, Asked: how.limits, lots: allLots(a)}
	o.learnCoatings()
	o.learned = o.learn()
	steel := o.steel()
	demand := hull.Demand(steel)
	code := hull.DemandBy(steel, hull.OffshoreCode)
	practice := hull.DemandBy(steel, hull.HullPractice)
	area := hull.DemandBy(steel, hull.SeaArea)
	o.factors()

	totals := make([][]hull.Current, len(a.Zones))
	factors := make([]float64, len(a.Zones))
	for i := range a.Zones {
		totals[i], factors[i] = demand[i].Total, o.Zones[i].Factor.Used
	}
	r := o.solveWithin(renewal.Problem{Asset: a, Demand: totals, Factors: factors, Keeps: o.keeps(), Pins: how.pins, Limits: how.limits, Quay: how.quay, Memo: how.memo})

	for i := range a.Zones {
		z := &o.Zones[i]
		_, z.Refused = anodes.Offered(a, z.Zone)
		for k, iv := range o.Intervals {
			zi := ZoneInterval{
				Potential: math.NaN(),
				Interval:  iv, Breakdown: demand[i].Breakdown[k], Demand: demand[i].Own[k],
				Total: demand[i].Total[k], ByCode: code[i].Own[k],
			}
			if hull.PracticeApplies(a, z.Zone) {
				zi.ByPractice = &practice[i].Own[k]
			}
			if hull.SeaAreaApplies(a, z.Zone) {
				zi.BySeaArea = &area[i].Own[k]
			}
			z.Intervals = append(z.Intervals, zi)
		}
	}
	o.Schedule, o.Unmet, o.Pins = r.Best.Lines, r.Best.Unmet, r.Pins
	o.foresee()
	o.risk()
	o.shortWaters()
	o.protect(demand)
	o.Order = order.Lines(a, o.Schedule, today)
	o.Money = Money{
		Total: r.Best.Total, LowerBound: r.LowerBound, Docking: r.Best.Docking,
		RenewAll: r.RenewAll, AsLate: r.AsLate, Proven: r.Proven(), Free: r.Free,
	}
	o.Cautions = cautions(o)
	if how.staging {
		o.Staged = Stage(o)
	}
	return o
}

// factors gives every zone its demand factors, and that which the plan uses.
func (o *Outcome) factors() {
	factor := priorFactor(o.Asset.Basis.ConfidenceLevel())
	for i := range o.Asset.Zones {
		z := Zone{Zone: &o.Asset.Zones[i], Factor: factor, theta: factor.Median, current: 1}
		z.Learned = o.learned.factor(o.Asset, i)
		if o.coatings != nil {
			z.Coating = o.coatings[i]
		}
		if o.Learns && z.Learned != nil {
			z.Factor = z.Learned.Factor
			z.theta, z.current = o.learned.weights(o.Asset, i)
		}
		o.Zones = append(o.Zones, z)
	}
}

// priorFactor returns the demand factor without any reading: lognormal about
// 1 with the scatter that surveys of offshore structures show.
func priorFactor(confidence float64) Factor {
	tau := assets.Get("demand-factor").Value("tau", "tau")
	at := func(p float64) float64 { return math.Exp(tau * normalQuantile(p)) }
	return Factor{Median: 1, Low: at(0.05), High: at(0.95), Used: at(confidence)}
}

// normalQuantile returns z with a standard normal probability p below it.
func normalQuantile(p float64) float64 { return math.Sqrt2 * math.Erfinv(2*p-1) }

// NextDocking returns the first docking ahead that is not before today, and
// whether there is one.
func (o *Outcome) NextDocking() (hull.Docking, bool) {
	for _, d := range o.Asset.Ahead() {
		if d.Date >= o.Today {
			return d, true
		}
	}
	return hull.Docking{}, false
}

// OrderBy returns the earliest order-by date of what has to be bought, and
// whether anything has.
func (o *Outcome) OrderBy() (hull.Date, bool) {
	var first hull.Date
	for _, l := range o.Order {
		if l.Ordered > 0 && l.Docking >= o.Today && (first == 0 || l.OrderBy < first) {
			first = l.OrderBy
		}
	}
	return first, first != 0
}

// Action returns what the plan does with a zone at a docking ahead.
func (o *Outcome) Action(zone, docking int) (renewal.Line, bool) {
	for _, l := range o.Schedule {
		if l.Zone == zone && l.Docking == docking {
			return l, true
		}
	}
	return renewal.Line{}, false
}

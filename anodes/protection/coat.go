package protection

import (
	"fmt"
	"slices"

	"anodewright/assets"
	"anodewright/hull"
)

// ZincCoat is the result of a galvanised or sprayed coat of zinc: when it
// will be gone, and what the steel asks for from then on.
type ZincCoat struct {
	Thickness  float64            `json:"thickness_um"`
	Class      hull.ExposureClass `json:"class"`
	Applied    hull.Date          `json:"applied"`
	LossLow    float64            `json:"loss_low_um_per_year"`
	Loss       float64            `json:"loss_um_per_year"` // the upper bound, which the plan counts with
	Years      float64            `json:"years_until_bare"`
	YearsMost  *float64           `json:"years_until_bare_at_most"` // null: no end
	Bare       *hull.Date         `json:"bare_from"`                // null: not within 300 years
	BareLatest *hull.Date         `json:"bare_from_at_latest"`
	Intervals  []CoatInterval     `json:"intervals"`
	SteelLoss  *float64           `json:"steel_loss_bare_um_per_year"` // at most; null: no figure for this medium
}

// CoatInterval is a zinc coat in one docking interval, by the planning figure.
type CoatInterval struct {
	From      hull.Date `json:"from"`
	To        hull.Date `json:"to"`
	State     CoatState `json:"state"`
	Left      float64   `json:"zinc_left_um"` // at the interval's end
	BareFrom  hull.Date `json:"bare_from,omitzero"`
	Demand    *Triple   `json:"demand_a"`      // of the steel while it is bare; null: the zinc holds
	SteelLoss *float64  `json:"steel_loss_mm"` // at most, while nobody holds the bare steel
}

// CoatState is a zinc coat's state over an interval.
type CoatState string

// The states of a zinc coat.
const (
	CoatWhole CoatState = "whole"        // to the interval's end
	CoatWorn  CoatState = "worn through" // within the interval
	CoatBare  CoatState = "bare"         // all the time
)

// ZincLoss returns the range in um per year that a zinc coat loses in a
// class: in the atmosphere the bounds of its class of ISO 9223, Table 2 (the
// lower bound is the upper one of the class before), under seawater the range
// of ISO 14713. Planning counts with the upper end. The first year's loss is
// taken for every year, which errs on the safe side.
func ZincLoss(class hull.ExposureClass) (low, high float64, source, confidence string) {
	if t := assets.Get("immersed-zinc-loss"); class.Immersed() {
		r, _ := t.Row(string(class))
		return t.Value(r.Name, "low"), t.Value(r.Name, "high"), t.Source(), r.Confidence
	}
	t := assets.Get("atmosphere-loss")
	for i, r := range t.Rows {
		if r.Name == string(class) {
			if i > 0 {
				low = t.Value(t.Rows[i-1].Name, "zinc")
			}
			return low, t.Value(r.Name, "zinc"), t.Source() + ", " + r.Name, r.Confidence
		}
	}
	panic("protection: no loss for class " + string(class))
}

// bareSteelLoss returns what bare steel loses at most in a year in a class's
// exposure.
func bareSteelLoss(class hull.ExposureClass, medium hull.Medium) *float64 {
	if !class.Immersed() {
		x := assets.Get("atmosphere-loss").Value(string(class), "steel")
		return &x
	}
	return freeCorrosion(medium)
}

// zincCoat computes the result of zone i, whose protection is a zinc coat.
func (c *calculation) zincCoat(i int) *ZincCoat {
	z := &c.a.Zones[i]
	p := z.Protection
	low, high, source, confidence := ZincLoss(p.Class)
	r := &ZincCoat{
		Thickness: p.Thickness, Class: p.Class, Applied: z.Coating.Applied, LossLow: low, Loss: high,
		Years: p.Thickness / high, SteelLoss: bareSteelLoss(p.Class, c.a.Medium(z)),
	}
	if r.Applied.IsZero() {
		r.Applied = c.a.InService
	}
	c.trace.Add(hull.Step{
		Figure: "zinc loss, planning", Value: high, Unit: "um/year", Formula: "upper bound of the class " + string(p.Class),
		Inputs: []hull.Input{{Name: "lower bound", Value: low, Unit: "um/year"}}, Source: source, Confidence: confidence,
	})
	c.trace.Add(hull.Step{
		Figure: "zinc coat, years until bare", Value: r.Years, Unit: "years", Formula: "thickness / loss",
		Inputs: []hull.Input{{Name: "thickness", Value: p.Thickness, Unit: "um"}, {Name: "loss", Value: high, Unit: "um/year"}},
		Source: source, Confidence: confidence,
	})
	r.Bare = after(r.Applied, r.Years)
	if low > 0 {
		most := p.Thickness / low
		r.YearsMost, r.BareLatest = &most, after(r.Applied, most)
	}
	bare := c.a.Horizon
	if r.Bare != nil {
		bare = *r.Bare
	}
	ivs, demand := bareDemand(c.a, i, bare)
	for _, iv := range c.ivs {
		ci := CoatInterval{From: iv.From, To: iv.To, State: CoatWhole, Left: max(0, p.Thickness-high*iv.To.Years(r.Applied))}
		if bare < iv.To {
			ci.State, ci.BareFrom, ci.Left = CoatWorn, max(bare, iv.From), 0
			if bare <= iv.From {
				ci.State = CoatBare
			}
			k := slices.IndexFunc(ivs, func(v hull.Interval) bool { return v.From == ci.BareFrom })
			d := Triple(demand.Own[k])
			ci.Demand = &d
			if r.SteelLoss != nil {
				loss := *r.SteelLoss / 1000 * iv.To.Years(ci.BareFrom)
				ci.SteelLoss = &loss
			}
			c.trace.Add(hull.Step{
				Figure: fmt.Sprintf("demand once the zinc is gone, mean, %s to %s", ci.BareFrom, iv.To), Value: d.Mean, Unit: "A",
				Formula: "as bare or painted carbon steel", Source: "DNV-RP-B401, 7.4", Confidence: "read in a secondary text",
			})
		}
		r.Intervals = append(r.Intervals, ci)
	}
	return r
}

// bareDemand returns the demand of zone i as the steel below its zinc, in
// intervals of which one begins on the date the zinc is gone.
func bareDemand(a *hull.Asset, i int, bare hull.Date) ([]hull.Interval, hull.ZoneDemand) {
	b := *a
	b.Zones = slices.Clone(a.Zones)
	z := &b.Zones[i]
	z.Protection = nil
	if z.Surface == hull.Galvanised {
		z.Surface = hull.CarbonSteel
	}
	if at, found := slices.BinarySearchFunc(a.Dockings, bare, func(d hull.Docking, on hull.Date) int { return int(d.Date - on) }); !found && bare > a.Start() && bare < a.Horizon {
		b.Dockings = slices.Insert(slices.Clone(a.Dockings), at, hull.Docking{Date: bare, Kind: hull.DryDock})
	}
	return b.Intervals(), hull.Demand(&b)[i]
}

// after returns the date some years after another, nothing beyond 300 years.
func after(d hull.Date, years float64) *hull.Date {
	if years > 300 {
		return nil
	}
	on := d + hull.Date(years*hull.DaysPerYear)
	return &on
}

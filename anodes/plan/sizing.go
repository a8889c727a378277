package plan

import (
	"fmt"
	"math"
	"strings"

	"anodewright/anodes/forecast"
	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// keeps returns the judge of sets for a plan that is sized by the forecast,
// nil where the basis sizes by the code: a set is fit when the zone, with what
// it holds as a circuit alone and at the demand factor of the chosen
// confidence, is sound at the end of every interval, and wasted above the
// renewal limit at no docking that it passes.
func (o *Outcome) keeps() renewal.Keeps {
	if o.Asset.Basis.Sizing != hull.ForecastSizing {
		return nil
	}
	course := hull.NewCourse(o.steel())
	return func(t renewal.Trial) bool {
		c := &circuit{
			zones: append([]int{t.Zone}, o.Asset.Held(t.Zone)...),
			state: forecast.State{Potential: math.NaN()},
			theta: o.Zones[t.Zone].Factor.Used,
		}
		if t.Kept {
			c.groups = o.fitted(t.Zone)
		} else {
			c.groups = append(c.groups, o.group(t.Zone, t.Pattern, t.Count, 0))
		}
		for k := t.From; k < t.To; k++ {
			if t.Add > 0 && k == t.Add {
				c.groups = append(c.groups, o.group(t.Zone, t.AddTo, t.AddCount, 0))
			}
			o.waste(c, course, k, nil)
			if k >= t.JudgeFrom && c.verdict(o, course, k).state().State != Sound {
				return false
			}
			// A docking is passed when the set goes on behind it; what comes
			// before an add is bound by the set that is added to.
			if k+1 < t.To && (t.Add == 0 || k+1 < t.Add) && c.wasted() > o.Asset.Basis.RenewAbove*(1+1e-9) {
				return false
			}
		}
		return true
	}
}

// verdict judges a circuit of one zone's anodes at the end of interval k.
func (c *circuit) verdict(o *Outcome, course *hull.Course, k int) verdict {
	v := verdict{bare: !c.carries(o.Intervals[k].To), potential: c.state.Potential, reserve: o.Asset.Basis.Reserve}
	for j, g := range c.groups {
		if !c.giving[j] {
			continue
		}
		v.own = true
		z := &o.Asset.Zones[g.zone]
		v.gives += g.output(o.Asset.Resistivity(z, o.Intervals[k].To-1), z.Shielding)
		full := float64(g.Count) * g.Pattern.NetMass * g.metal.Capacity
		v.usable += full * g.Pattern.Utilisation
		v.left += full * max(0, g.Pattern.Utilisation-g.Wastage)
	}
	end := o.Intervals[k].Years()
	for _, i := range c.zones {
		_, last := course.Line(i, k, end*(1-1e-9), end)
		v.asks += c.factor(o) * last
	}
	return v
}

// wasted is the share gone of a circuit's anodes that give current together,
// by charge.
func (c *circuit) wasted() float64 {
	full, gone := 0.0, 0.0
	for j, g := range c.groups {
		if !c.giving[j] {
			continue
		}
		charge := float64(g.Count) * g.Pattern.NetMass * g.metal.Capacity
		full, gone = full+charge, gone+charge*g.Wastage
	}
	if full == 0 {
		return 0
	}
	return gone / full
}

// notSound names the zones that a plan sized by the forecast does not keep
// sound once they share their circuits.
func (c *raiser) notSound() {
	for i, z := range c.o.Zones {
		if !own(z.Zone) {
			continue
		}
		for _, iv := range z.Intervals[1:] {
			if iv.State != "" && iv.State != Sound {
				c.add("not-sound", i, fmt.Sprintf("Sized by the forecast alone; in its circuit with the others it is %s by %s.", strings.TrimSpace(string(iv.State)+" "+iv.Cause), iv.To), "forecast", "computed")
				break
			}
		}
	}
}

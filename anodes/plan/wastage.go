package plan

import (
	"math"

	"anodewright/anodes"
	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// State is how safe a zone is: sound, thin (sound, with a reserve below the
// threshold of the basis), short (of current) or spent; or nothing where the
// zone has no anodes of its own.
type State string

// The states, from the best to the worst.
const (
	Sound State = "sound"
	Thin  State = "thin"
	Short State = "short"
	Spent State = "spent"
)

// Rank orders states from 0, none, to 4, spent.
func (s State) Rank() int {
	return map[State]int{Sound: 1, Thin: 2, Short: 3, Spent: 4}[s]
}

// Group is equal pieces fitted at one time.
type Group struct {
	Pattern *hull.Pattern
	Count   int
	Wastage float64 // share of the net mass gone

	metal anodes.Metal
}

// waste lets the zone's anodes waste through all intervals under the plan, by
// the charge of the code's figures: in every interval the mean demand times
// the median demand factor, as far as the anodes can give it, shared in
// proportion to their output. Output falls from new to worn in proportion to
// the wastage.
func (o *Outcome) waste(z *Zone, index int) {
	if _, own := z.Zone.Hold().(hull.ByAnodes); !own {
		return
	}
	a, medium := o.Asset, o.Asset.Medium(z.Zone)
	group := func(p *hull.Pattern, n int, w float64) Group {
		return Group{Pattern: p, Count: n, Wastage: w, metal: anodes.MetalOf(p, medium)}
	}
	var groups []Group
	for _, f := range z.Zone.Fitted {
		p, _ := a.Pattern(f.Pattern)
		groups = append(groups, group(p, f.Count, f.Wastage))
	}
	for k := range z.Intervals {
		zi := &z.Intervals[k]
		if k > 0 {
			if l, ok := o.Action(index, k-1); ok && l.Action != renewal.Keep {
				if l.Action == renewal.Renew {
					groups = nil
				}
				groups = append(groups, group(l.Pattern, l.Count, 0))
			}
		}
		rho := a.Resistivity(z.Zone, zi.From)
		groups = wasted(groups, zi.Total.Mean*z.Factor.Median, zi.Hours(), medium, rho, z.Zone.Shielding)
		zi.Fitted = groups
		_, zi.Output = outputsOf(groups, medium, a.Resistivity(z.Zone, zi.To-1), z.Zone.Shielding)
		zi.State, zi.Cause = stateOf(groups, zi.Output, zi.Total.Final*z.Factor.Median, a.Basis.Reserve)
	}
}

// wasted returns the groups after giving a current for some hours, as far as
// they can. A group that reaches its utilisation factor gives no more, and
// what it gave goes over to the others.
func wasted(groups []Group, demand, hours float64, medium hull.Medium, rho, shielding float64) []Group {
	groups = append([]Group(nil), groups...)
	for hours > 0 {
		outputs, total := outputsOf(groups, medium, rho, shielding)
		if total == 0 {
			break
		}
		current := min(demand, total)
		// Until the first group is spent, or to the end.
		step := hours
		for g := range groups {
			if rate := groups[g].rate(current * outputs[g] / total); rate > 0 {
				step = min(step, (groups[g].Pattern.Utilisation-groups[g].Wastage)/rate)
			}
		}
		for g := range groups {
			groups[g].Wastage += step * groups[g].rate(current*outputs[g]/total)
		}
		hours -= step
		if step <= 1e-9*hours {
			break
		}
	}
	return groups
}

// rate is the share of the net mass per hour that a current takes.
func (g Group) rate(current float64) float64 {
	return current / (float64(g.Count) * g.Pattern.NetMass * g.metal.Capacity)
}

// outputsOf returns the current in A that each group and all together can
// give to steel at the protective potential.
func outputsOf(groups []Group, medium hull.Medium, rho, shielding float64) (each []float64, total float64) {
	each = make([]float64, len(groups))
	for i, g := range groups {
		if g.spent() {
			continue
		}
		isNew, worn := anodes.OutputNew(g.Pattern, medium, rho, shielding), anodes.OutputWorn(g.Pattern, medium, rho, shielding)
		each[i] = float64(g.Count) * (isNew + (worn-isNew)*g.Wastage/g.Pattern.Utilisation)
		total += each[i]
	}
	return each, total
}

func (g Group) spent() bool { return g.Wastage >= g.Pattern.Utilisation*(1-1e-9) }

// stateOf judges a zone's anodes: what is left of their usable mass, and
// their output against the current that the steel asks for.
func stateOf(groups []Group, output, demand, reserve float64) (State, string) {
	usable, left := 0.0, 0.0
	for _, g := range groups {
		full := float64(g.Count) * g.Pattern.NetMass * g.metal.Capacity
		usable += full * g.Pattern.Utilisation
		left += full * math.Max(0, g.Pattern.Utilisation-g.Wastage)
	}
	switch {
	case len(groups) == 0:
		return Short, "no anodes are fitted"
	case left <= 1e-9*usable:
		return Spent, "wasted to the utilisation factor"
	case output < demand*(1-1e-9):
		return Short, "of current"
	case left < reserve*usable:
		return Thin, "of mass"
	case output < demand*(1+reserve):
		return Thin, "of current"
	}
	return Sound, ""
}

package plan

import (
	"math"

	"anodewright/anodes"
	"anodewright/anodes/forecast"
	"anodewright/anodes/protection"
	"anodewright/anodes/renewal"
	"anodewright/anodes/survey"
	"anodewright/hull"
)

// State is how safe a zone is: sound, thin (sound, with a reserve below the
// threshold of the basis), short (of current) or spent; or nothing where
// neither anodes of its own nor a circuit hold the zone.
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
	Low     float64 // end of the wastage's 90 % range: what a survey may well find
	High    float64
	Current float64 // A that one piece gives
	Set     int     // among the zone's fitted sets; -1: the plan's own
	Painted bool    // painted over: it gives nothing until it is cleaned

	zone    int
	metal   anodes.Metal
	current float64    // the zone's current factor
	lot     survey.Lot // of a fitted set: what readings tell of its pieces
	row     int        // how many pieces give current beside it, itself among them
}

// Repolarise is the second verdict on a zone's circuit: what its anodes could
// give at their wastage, and what it would take to polarise the steel anew by
// the initial densities, both in A.
type Repolarise struct{ Gives, Asks float64 }

// Could reports whether the anodes could polarise the steel anew.
func (r Repolarise) Could() bool { return r.Gives >= r.Asks*(1-1e-9) }

// circuit is zones that share water and metal, with their anodes.
type circuit struct {
	zones  []int
	groups []Group
	giving []bool // of the groups: what gives current at the last point
	state  forecast.State
	theta  float64 // the demand factor; 0: that of its first zone
}

// foresee lets the anodes of every circuit waste through all intervals under
// the plan, at the median demand factor of the circuit, and judges every zone at the end of
// each.
func (o *Outcome) foresee() {
	course := hull.NewCourse(o.steel())
	for _, c := range o.circuits() {
		for k := range o.Intervals {
			loss := c.state.SteelLoss
			o.run(c, course, k, nil)
			o.judge(c, course, k, c.state.SteelLoss-loss)
		}
	}
}

// circuits gathers the zones that anodes hold by their circuits: see
// circuitOf.
func (o *Outcome) circuits() []*circuit {
	var all []*circuit
	byName := map[string]*circuit{}
	for i := range o.Asset.Zones {
		z := &o.Asset.Zones[i]
		name, ok := o.circuitOf(z)
		if !ok {
			continue
		}
		c := byName[name]
		if c == nil {
			c = &circuit{state: forecast.State{Potential: math.NaN()}}
			byName[name] = c
			all = append(all, c)
		}
		c.zones = append(c.zones, i)
		c.groups = append(c.groups, o.fitted(i)...)
	}
	return all
}

// fitted returns the groups that a zone carries at the last docking: its sets,
// divided by what readings tell of their pieces.
func (o *Outcome) fitted(zone int) (all []Group) {
	z := &o.Asset.Zones[zone]
	for set, f := range z.Fitted {
		p, _ := o.Asset.Pattern(f.Pattern)
		for _, lot := range o.lotsOf(zone, set) {
			g := o.group(zone, p, lot.Count, f.Wastage)
			g.Set, g.lot = set, lot
			all = append(all, g)
		}
	}
	return all
}

// lotsOf returns what readings tell of the pieces of a fitted set.
func (o *Outcome) lotsOf(zone, set int) []survey.Lot {
	if o.lots == nil {
		return survey.Lots(o.Asset, &o.Asset.Zones[zone], set)
	}
	return o.lots[zone][set]
}

// allLots divides every zone's fitted sets.
func allLots(a *hull.Asset) [][][]survey.Lot {
	all := make([][][]survey.Lot, len(a.Zones))
	for i := range a.Zones {
		for set := range a.Zones[i].Fitted {
			all[i] = append(all[i], survey.Lots(a, &a.Zones[i], set))
		}
	}
	return all
}

// circuitOf names the circuit that a zone is forecast in, if it is in one.
// Zones under impressed current or with a coat of zinc are in none, nor are
// those that impressed current holds in the end, or that hang on a zone that
// is not bonded to its host. A zone with anodes of its own that is not bonded
// makes a circuit with what hangs on it.
func (o *Outcome) circuitOf(z *hull.Zone) (name string, ok bool) {
	root := z
	for range o.Asset.Zones {
		if root.HeldBy == "" || !root.Bonded {
			break
		}
		root, _ = o.Asset.Zone(root.HeldBy)
	}
	_, impressed := root.Hold().(hull.ByImpressedCurrent)
	switch {
	case z.Protection != nil, impressed, !root.Bonded && root.HeldBy != "":
		return "", false
	case !root.Bonded && root.Protection == nil:
		return root.ID + " (not bonded)", true
	}
	return o.Asset.CircuitName(z), true
}

func (o *Outcome) group(zone int, p *hull.Pattern, n int, wastage float64) Group {
	return Group{Pattern: p, Count: n, Wastage: wastage, Set: -1, zone: zone, row: n, metal: anodes.MetalOf(p, o.Asset.Medium(&o.Asset.Zones[zone])), current: o.Zones[zone].current}
}

// dock takes off and puts on what the plan says at a docking ahead.
func (c *circuit) dock(o *Outcome, docking int) {
	for _, i := range c.zones {
		l, ok := o.Action(i, docking)
		if !ok || l.Action == renewal.Keep {
			continue
		}
		if l.Action == renewal.Renew {
			var kept []Group
			for _, g := range c.groups {
				if g.zone != i {
					kept = append(kept, g)
				}
			}
			c.groups = kept
		}
		c.groups = append(c.groups, o.group(i, l.Pattern, l.Count, 0))
	}
}

// run does what the plan says at the docking that starts interval k and lets
// the circuit's anodes waste through it. It returns the states at the ends of
// stretches: at each break of the demand's course, and at the times besides,
// in years since the interval's start.
func (o *Outcome) run(c *circuit, course *hull.Course, k int, times []float64) []point {
	if k > 0 {
		c.dock(o, k-1)
	}
	return o.waste(c, course, k, times)
}

// factor is the demand factor that the circuit is forecast with.
func (c *circuit) factor(o *Outcome) float64 {
	if c.theta > 0 {
		return c.theta
	}
	return o.Zones[c.zones[0]].theta
}

// judge writes what a circuit's zones are like at the end of an interval.
func (o *Outcome) judge(c *circuit, course *hull.Course, k int, loss float64) {
	a, end, theta, potential := o.Asset, o.Intervals[k].Years(), c.factor(o), c.state.Potential
	var total, demand, again float64
	output := make([]float64, len(c.groups))
	for j, g := range c.groups {
		if c.giving[j] {
			z := &a.Zones[g.zone]
			output[j] = g.output(a.Resistivity(z, o.Intervals[k].To-1), z.Shielding)
			total += output[j]
		}
	}
	for _, i := range c.zones {
		_, last := course.Line(i, k, end*(1-1e-9), end)
		demand += theta * last
		again += theta * course.Repolarising(i, k, end)
	}
	for _, i := range c.zones {
		zi := &o.Zones[i].Intervals[k]
		zi.Potential, zi.SteelLoss = potential, loss
		zi.Repolarise = Repolarise{total, again}
		zi.Fitted, zi.Output = c.there(i, o.Intervals[k].To), 0
		usable, left, pieces := 0.0, 0.0, 0
		for j, g := range c.groups {
			if g.zone != i || !c.giving[j] {
				continue
			}
			pieces += g.Count
			zi.Output += output[j]
			full := float64(g.Count) * g.Pattern.NetMass * g.metal.Capacity
			usable += full * g.Pattern.Utilisation
			left += full * max(0, g.Pattern.Utilisation-g.Wastage)
		}
		_, byAnodes := a.Zones[i].Hold().(hull.ByAnodes)
		v := verdict{
			own: byAnodes && pieces > 0, bare: !c.carries(o.Intervals[k].To), potential: potential,
			usable: usable, left: left, gives: total, asks: demand, reserve: a.Basis.Reserve,
		}.state()
		zi.State, zi.Cause = v.State, v.Cause
	}
}

// shape is resistance over resistivity of one piece as it wastes, 1/m, in its
// row where rods in soil hinder each other.
func (g Group) shape() func(float64) float64 {
	alone := anodes.ShapeOf(g.Pattern)
	if g.Pattern.Shape != hull.SoilRod || g.Pattern.Spacing <= 0 {
		return alone
	}
	row := float64(g.row) * protection.GroupFactor(g.row) / g.Pattern.Spacing
	return func(w float64) float64 { return alone(w) + row }
}

// output is the current in A that the group can give to steel at the
// protective potential in water of rho ohm m.
func (g Group) output(rho, shielding float64) float64 {
	if g.spent() {
		return 0
	}
	resistance := rho*g.shape()(g.Wastage) + g.Pattern.SeriesResist
	return float64(g.Count) * shielding * (anodes.Protective() - g.metal.Potential) / resistance
}

// outputOf is the output in A of several groups of one zone.
func outputOf(groups []Group, rho, shielding float64) (total float64) {
	for _, g := range groups {
		total += g.output(rho, shielding)
	}
	return total
}

func (g Group) spent() bool { return g.Wastage >= g.Pattern.Utilisation*(1-1e-9) }

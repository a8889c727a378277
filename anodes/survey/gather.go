package survey

import "anodewright/hull"

// Gathered is an asset's readings by circuit, ready to learn from.
type Gathered struct {
	Names    []string // of the circuits
	Circuits []Circuit
	Zones    [][]int // index in the asset of each circuit's zones with anodes

	circuit func(z *hull.Zone) (string, bool)
}

// Gather brings the usable readings of an asset to the circuits of its zones.
// Zones without anodes are not among the zones of theirs.
//
// circuit names the circuit of a zone, if it is in one; nil stands for the
// asset's own names, with zones under impressed current, with a coat of zinc
// or without bonding in none.
//
// predicted gives the wastage of one of a zone's fitted sets at a date, by the
// demand factor of the circuit, all current factors 1; nil leaves a reading
// out. share gives the charge that the zone's anodes give by the model, in any
// unit; nil stands for equal shares.
func Gather(a *hull.Asset, today hull.Date, circuit func(z *hull.Zone) (string, bool), predicted func(zone, set int, date hull.Date) Predicted, share func(zone int) float64) *Gathered {
	if circuit == nil {
		circuit = func(z *hull.Zone) (string, bool) { return a.CircuitName(z), z.Protection == nil && z.Bonded }
	}
	g := &Gathered{circuit: circuit}
	byName := map[string]int{}
	for i := range a.Zones {
		z := &a.Zones[i]
		name, in := circuit(z)
		if !in {
			continue
		}
		c, ok := byName[name]
		if !ok {
			c = len(g.Names)
			byName[name] = c
			g.Names = append(g.Names, name)
			g.Circuits = append(g.Circuits, Circuit{})
			g.Zones = append(g.Zones, nil)
		}
		if len(z.Fitted) == 0 {
			continue
		}
		found := Zone{Found: observations(a, i, today, predicted)}
		if share != nil {
			found.Share = share(i)
		}
		g.Circuits[c].Zones = append(g.Circuits[c].Zones, found)
		g.Zones[c] = append(g.Zones[c], i)
	}
	return g
}

// observations turns the usable readings of a zone into what they tell. What
// cannot be used of a reading is among [Questions].
func observations(a *hull.Asset, zone int, today hull.Date, predicted func(zone, set int, date hull.Date) Predicted) (all []Observation) {
	z := &a.Zones[zone]
	for i := range a.Readings {
		r := &a.Readings[i]
		if r.Zone != z.ID || !Usable(a, r, today) {
			continue
		}
		set := Set(z, r)
		p, ok := a.Pattern(z.Fitted[set].Pattern)
		if !ok {
			continue
		}
		o, _ := Observe(p, r)
		if o.pieces() == 0 {
			continue
		}
		if o.Predicted = predicted(zone, set, r.Date); o.Predicted != nil {
			all = append(all, o)
		}
	}
	return all
}

// Find returns where a zone of the asset is: its circuit, -1 where it is in
// none, and its place among the circuit's zones, -1 where it has no anodes.
func (g *Gathered) Find(a *hull.Asset, zone int) (circuit, place int) {
	name, in := g.circuit(&a.Zones[zone])
	if !in {
		return -1, -1
	}
	for c, n := range g.Names {
		if n != name {
			continue
		}
		for k, i := range g.Zones[c] {
			if i == zone {
				return c, k
			}
		}
		return c, -1
	}
	return -1, -1
}

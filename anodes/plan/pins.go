package plan

import (
	"fmt"

	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// WithPins makes actions stay as they are while the rest of the plan is
// chosen. Pins that cannot stand are told in the outcome with the reason, and
// the plan is made without them.
func WithPins(pins []renewal.Pin) Option { return func(o *options) { o.pins = pins } }

// PinAt returns what became of the pin of a zone at a docking ahead, and
// whether there is one.
func (o *Outcome) PinAt(zone, docking int) (renewal.Pinned, bool) {
	for _, p := range o.Pins {
		if p.Zone == o.Asset.Zones[zone].ID && p.Docking == o.Asset.Ahead()[docking].Date {
			return p, true
		}
	}
	return renewal.Pinned{}, false
}

// Pin returns the pin that keeps what the plan does with a zone at a docking
// ahead.
func (o *Outcome) Pin(zone, docking int) renewal.Pin {
	p := renewal.Pin{Zone: o.Asset.Zones[zone].ID, Docking: o.Asset.Ahead()[docking].Date, Action: renewal.Keep}
	if l, ok := o.Action(zone, docking); ok && l.Action != renewal.Keep {
		p.Action, p.Pattern = l.Action, l.Pattern.ID
	}
	return p
}

// problem is the choice of sets that the outcome's plan solves.
func (o *Outcome) problem() renewal.Problem {
	p := renewal.Problem{Asset: o.Asset, Demand: make([][]hull.Current, len(o.Zones)), Factors: make([]float64, len(o.Zones)), Keeps: o.keeps(), Limits: o.Limits, Quay: o.Quay}
	for i, z := range o.Zones {
		for _, iv := range z.Intervals {
			p.Demand[i] = append(p.Demand[i], iv.Total)
		}
		p.Factors[i] = z.Factor.Used
	}
	for _, pin := range o.Pins {
		p.Pins = append(p.Pins, pin.Pin)
	}
	return p
}

// pinText says what a pin holds on to and what it costs.
func (o *Outcome) pinText(p renewal.Pinned) string {
	name := p.Zone
	if z, ok := o.Asset.Zone(p.Zone); ok {
		name = z.Name
	}
	does := string(p.Action)
	if p.Count > 0 {
		does += fmt.Sprintf(" %d", p.Count)
	}
	if p.Pattern != "" {
		does += " " + p.Pattern
	}
	return fmt.Sprintf("%s on %s is pinned to %s, which costs %.0f %s", name, p.Docking, does, p.Cost, o.Asset.Currency)
}

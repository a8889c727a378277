package hull

import (
	"slices"
	"strings"

	"anodewright/assets"
	"anodewright/hull/water"
)

// Start returns the date that the plan starts from: the last docking, else
// the latest fitting date, else the date in service.
func (a *Asset) Start() Date {
	if !a.LastDocking.IsZero() {
		return a.LastDocking
	}
	var last Date
	for i := range a.Zones {
		for _, f := range a.Zones[i].Fitted {
			last = max(last, f.Fitted)
		}
	}
	if last != 0 {
		return last
	}
	return a.InService
}

// Ahead returns the dockings that count: those after the last docking.
func (a *Asset) Ahead() []Docking {
	start := a.Start()
	i := slices.IndexFunc(a.Dockings, func(d Docking) bool { return d.Date > start })
	if i < 0 {
		return nil
	}
	return a.Dockings[i:]
}

// Interval is the time between two dockings, or up to the horizon.
type Interval struct{ From, To Date }

// Hours returns the interval's length in hours.
func (iv Interval) Hours() float64 { return float64(iv.To-iv.From) * 24 }

// Years returns the interval's length in years of 365 days.
func (iv Interval) Years() float64 { return iv.To.Years(iv.From) }

// Intervals returns the docking intervals from the last docking over the
// dockings ahead to the horizon: one more than there are dockings ahead.
func (a *Asset) Intervals() []Interval {
	from := a.Start()
	var ivs []Interval
	for _, d := range a.Ahead() {
		ivs = append(ivs, Interval{from, d.Date})
		from = d.Date
	}
	return append(ivs, Interval{from, a.Horizon})
}

// Water returns the water of this id.
func (a *Asset) Water(id string) (*Water, bool) {
	for i := range a.Waters {
		if a.Waters[i].ID == id {
			return &a.Waters[i], true
		}
	}
	return nil, false
}

// Zone returns the zone of this id.
func (a *Asset) Zone(id string) (*Zone, bool) {
	for i := range a.Zones {
		if a.Zones[i].ID == id {
			return &a.Zones[i], true
		}
	}
	return nil, false
}

// Pattern returns the anode pattern of this id.
func (a *Asset) Pattern(id string) (*Pattern, bool) {
	for i := range a.Patterns {
		if a.Patterns[i].ID == id {
			return &a.Patterns[i], true
		}
	}
	return nil, false
}

// Medium returns what the zone lies in.
func (a *Asset) Medium(z *Zone) Medium {
	w, ok := a.Water(z.Waters[0].Water)
	if !ok {
		panic("hull: zone " + z.ID + " in unknown water")
	}
	return w.Medium
}

// Resist returns the water's resistivity in ohm m: as measured, else from
// the conductivity at 25 degC, else from salinity and temperature (PSS-78);
// of a sediment of known porosity that of its water times the formation
// factor.
func (w *Water) Resist() float64 {
	if w.Resistivity != nil {
		return *w.Resistivity
	}
	var rho float64
	if w.Conductivity25 != nil {
		rho = water.FreshResistivity(*w.Conductivity25, *w.Temperature)
	} else {
		// Water of no salt at all is held at the conductivity of salinity
		// 0.01, so that no output is a division by zero.
		rho = water.Resistivity(max(*w.Salinity, 0.01), *w.Temperature)
	}
	if w.Medium == Sediment && w.Porosity != nil {
		rho *= water.FormationFactor(*w.Porosity)
	}
	return rho
}

// seaAreaRow finds the row of the class rule's table that the water's name
// or id names, whatever the case of its letters.
func seaAreaRow(w Water) (string, bool) {
	for _, r := range assets.Get("class-densities").Rows {
		if strings.EqualFold(r.Name, w.Name) || strings.EqualFold(r.Name, w.ID) {
			return r.Name, true
		}
	}
	return "", false
}

func seaAreaNames() string {
	var names []string
	for _, r := range assets.Get("class-densities").Rows {
		if !strings.HasPrefix(r.Name, "mud") { // no sea area
			names = append(names, r.Name)
		}
	}
	return strings.Join(names, "; ")
}

// Hold is how a zone is held: ByAnodes, ByZone, ByImpressedCurrent or ByCoat.
type Hold interface{ hold() }

// ByAnodes: the zone carries its own anodes.
type ByAnodes struct{}

// ByZone: the anodes of another zone hold it.
type ByZone struct{ Host string }

// ByImpressedCurrent: rectifier and inert anodes hold it, but for the share
// of the time that they are off.
type ByImpressedCurrent struct {
	Anode    ImpressedAnode
	OffShare float64
}

// ByCoat: a coat of zinc holds it while it lasts.
type ByCoat struct {
	Thickness float64 // um
	Class     ExposureClass
}

func (ByAnodes) hold()           {}
func (ByZone) hold()             {}
func (ByImpressedCurrent) hold() {}
func (ByCoat) hold()             {}

// Hold returns how the zone is held.
func (z *Zone) Hold() Hold {
	switch {
	case z.HeldBy != "":
		return ByZone{z.HeldBy}
	case z.Protection == nil:
		return ByAnodes{}
	case z.Protection.Kind == ImpressedCurrent:
		return ByImpressedCurrent{z.Protection.Anode, z.Protection.OffShare}
	}
	return ByCoat{z.Protection.Thickness, z.Protection.Class}
}

// CircuitName returns the circuit that the zone belongs to: as given, else
// its host's, else the zone alone.
func (a *Asset) CircuitName(z *Zone) string {
	for range a.Zones {
		if z.Circuit != "" || z.HeldBy == "" {
			break
		}
		z, _ = a.Zone(z.HeldBy)
	}
	if z.Circuit != "" {
		return z.Circuit
	}
	return z.ID
}

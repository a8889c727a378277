package plan

import (
	"fmt"
	"strings"

	"anodewright/hull"
)

// ShortWater is a water of a zone's service in an interval in which its
// anodes, as they are at the interval's end, give less than the steel would
// ask for there at that time.
type ShortWater struct {
	Water  *hull.Water
	Share  float64 // of the interval's time that the zone spends in it
	Output float64 // A, at this water's own resistivity
	Mean   float64 // A asked for at this water's own densities, on average
	Final  float64 // and at the interval's end; Output is below it
}

// Name returns the water's name, else its id.
func (s ShortWater) Name() string {
	if s.Water.Name != "" {
		return s.Water.Name
	}
	return s.Water.ID
}

// shortWaters finds for every zone with anodes of its own and every interval
// the waters in which it is short of output. The plan weighs all waters of a
// zone together; a ship that lies in the worst of them does not.
func (o *Outcome) shortWaters() {
	a := o.steel()
	demands := map[string][]hull.ZoneDemand{} // by water, all zones that ever lie in it
	resist := map[string]float64{}
	for i := range o.Zones {
		z := &o.Zones[i]
		if _, own := z.Zone.Hold().(hull.ByAnodes); !own {
			continue
		}
		for k := range z.Intervals {
			zi := &z.Intervals[k]
			rho := a.Resistivity(z.Zone, zi.To-1)
			full := outputOf(zi.Fitted, rho, z.Zone.Shielding)
			for _, s := range timeShares(a, z.Zone, zi.Interval) {
				w, _ := a.Water(s.Water)
				demand, known := demands[w.ID]
				if !known {
					demand = hull.Demand(allIn(a, w))
					demands[w.ID], resist[w.ID] = demand, w.Resist()
				}
				asked := demand[i].Total[k].Times(z.Factor.Median)
				output := 0.0
				if full > 0 {
					here := outputOf(zi.Fitted, resist[w.ID], z.Zone.Shielding)
					output = zi.Output * here / full
				}
				if output < asked.Final*(1-1e-9) {
					zi.ShortWaters = append(zi.ShortWaters, ShortWater{w, s.Share, output, asked.Mean, asked.Final})
				}
			}
		}
	}
}

// timeShares returns the waters that a zone lies in during an interval, each
// with its share of the interval's time over all changes of service.
func timeShares(a *hull.Asset, z *hull.Zone, iv hull.Interval) []hull.WaterShare {
	var shares []hull.WaterShare
	add := func(id string, share float64) {
		for i := range shares {
			if shares[i].Water == id {
				shares[i].Share += share
				return
			}
		}
		shares = append(shares, hull.WaterShare{Water: id, Share: share})
	}
	for from := iv.From; from < iv.To; {
		to := iv.To
		for _, list := range [][]hull.Service{a.Service, z.Service} {
			for _, s := range list {
				if s.From > from && s.From < to {
					to = s.From
				}
			}
		}
		mix, _ := a.ServiceAt(z, from)
		for _, s := range mix {
			add(s.Water, s.Share*float64(to-from)/float64(iv.To-iv.From))
		}
		from = to
	}
	return shares
}

// allIn returns the asset with every zone that ever lies in a water lying in
// it all the time. Under-way factors change as they did.
func allIn(a *hull.Asset, w *hull.Water) *hull.Asset {
	b := *a
	b.Zones = append([]hull.Zone(nil), a.Zones...)
	only := []hull.WaterShare{{Water: w.ID, Share: 1}}
	for i := range b.Zones {
		z := &b.Zones[i]
		if !everIn(a, z, w) {
			continue
		}
		// A change of the zone's own outlives the asset's.
		service := []hull.Service{{From: 1, Waters: only}}
		for _, s := range z.Service {
			if s.UnderWayFactor != nil {
				service = append(service, hull.Service{From: s.From, UnderWayFactor: s.UnderWayFactor})
			}
		}
		z.Waters, z.Service = only, service
	}
	return &b
}

// everIn reports whether a zone lies in a water at any time.
func everIn(a *hull.Asset, z *hull.Zone, w *hull.Water) bool {
	in := func(mix []hull.WaterShare) bool {
		for _, s := range mix {
			if s.Water == w.ID {
				return true
			}
		}
		return false
	}
	if in(z.Waters) {
		return true
	}
	for _, s := range z.Service {
		if in(s.Waters) {
			return true
		}
	}
	if a.Medium(z) == w.Medium {
		for _, s := range a.Service {
			if in(s.Waters) {
				return true
			}
		}
	}
	return false
}

// ShortText names the waters in which the zone is short of output, with their
// shares of the time: "short in Baltic proper (30 %)"; nothing when in none.
func (zi ZoneInterval) ShortText() string {
	var names []string
	for _, s := range zi.ShortWaters {
		names = append(names, fmt.Sprintf("%s (%.0f %%)", s.Name(), 100*s.Share))
	}
	if names == nil {
		return ""
	}
	return "short in " + strings.Join(names, ", ")
}

// shortWater raises one caution for a zone whose fitted anodes are short in
// some water, each water in the interval in which it is worst there. A zone
// that has no anodes or spent ones is short everywhere, and says so elsewhere.
func (c *raiser) shortWater(i int) {
	worst := map[string]ShortWater{}
	until := map[string]hull.Date{}
	var order []string
	for _, zi := range c.o.Zones[i].Intervals {
		if len(zi.Fitted) == 0 || zi.State == Spent {
			continue
		}
		for _, s := range zi.ShortWaters {
			w, seen := worst[s.Water.ID]
			if !seen {
				order = append(order, s.Water.ID)
			}
			if !seen || s.Output*w.Final < w.Output*s.Final {
				worst[s.Water.ID], until[s.Water.ID] = s, zi.To
			}
		}
	}
	if order == nil {
		return
	}
	var parts []string
	for _, id := range order {
		s := worst[id]
		part := fmt.Sprintf("in %s, %s, the anodes give %s of %s by %s", s.Name(), shareOfYear(s.Share), ampere(s.Output), ampere(s.Final), until[id])
		if s.Output < s.Mean {
			part += fmt.Sprintf(" (less than the mean of %s)", ampere(s.Mean))
		}
		parts = append(parts, part)
	}
	c.add("short-water", i, "Short of output: "+strings.Join(parts, "; ")+".", "output at the water's own resistivity against the demand at its own densities", "computed")
}

func shareOfYear(x float64) string {
	if x > 0.995 {
		return "all the year"
	}
	return fmt.Sprintf("%.0f %% of the year", 100*x)
}

// ampere writes a current with three figures.
func ampere(x float64) string {
	switch {
	case x < 9.995:
		return fmt.Sprintf("%.2f A", x)
	case x < 99.95:
		return fmt.Sprintf("%.1f A", x)
	}
	return fmt.Sprintf("%.0f A", x)
}

package anodes

import (
	"fmt"
	"sort"
	"strings"

	"anodewright/assets"
	"anodewright/hull"
)

// Ambient is the temperature in degC up to which the code's capacities hold
// (DNV-RP-B401, Table 10-6; warmer in ISO 15589-2 and DNV-RP-F103).
const Ambient = 30.0

// Concern is what a person has to know before a pattern is fitted somewhere.
// It bars nothing: see [Refused] for that.
type Concern struct {
	ID         string
	Text       string
	Source     string
	Confidence string
}

// Concerns returns what speaks against a pattern in a zone: the alloy in the
// zone's medium, and its capacity at the zone's temperature.
//
// Of fresh water the code says nothing. The model counts the alloys there as
// in seawater, so that a plan can be made, and this says what it leaves out:
// aluminium may passivate, zinc drives little current through water of a high
// resistivity, magnesium is the usual choice.
func Concerns(a *hull.Asset, z *hull.Zone, p *hull.Pattern) []Concern {
	var cs []Concern
	const trade, common = "trade", "common practice, no source"
	switch medium := a.Medium(z); {
	case medium == hull.Fresh && p.Alloy == hull.Aluminium:
		cs = append(cs, Concern{"fresh-aluminium", fmt.Sprintf("%s: aluminium needs chlorides to stay active; in fresh water it may passivate and give nothing. It is counted here as in seawater. Magnesium suits fresh water.", p.ID), trade, common})
	case medium == hull.Fresh && p.Alloy == hull.Zinc:
		cs = append(cs, Concern{"fresh-zinc", fmt.Sprintf("%s: zinc is weak in fresh water: little driving voltage for a high resistivity. It is counted here at its seawater potential. Magnesium suits fresh water.", p.ID), trade, common})
	case medium == hull.Soil && p.Alloy == hull.Aluminium:
		cs = append(cs, Concern{"soil-aluminium", fmt.Sprintf("%s: aluminium is not used in soil: without chlorides it passivates. Magnesium, or zinc in soil of a low resistivity.", p.ID), trade, common})
	}
	if c, ok := hot(a, z, p); ok {
		cs = append(cs, c)
	}
	return cs
}

// hot: the ambient capacity is counted although the zone is warmer.
func hot(a *hull.Asset, z *hull.Zone, p *hull.Pattern) (Concern, bool) {
	t := Hottest(a, z)
	if p.Capacity != nil || p.Alloy == hull.Magnesium || t <= Ambient {
		return Concern{}, false
	}
	medium := a.Medium(z)
	used := MetalOf(p, medium).Capacity
	w, ok := AtTemperature(p.Alloy, medium, t)
	table := assets.Get("alloy-temperature")
	c := Concern{ID: "hot-capacity", Source: table.Source(), Confidence: table.Confidence}
	if ok {
		c.Text = fmt.Sprintf("%s: at %.0f °C about %.0f Ah/kg instead of the %.0f Ah/kg counted here, and %.2f V. To plan with it give the pattern a capacity and a potential of its own.", p.ID, t, w.Capacity, used, w.Potential)
	} else {
		c.Text = fmt.Sprintf("%s: the %.0f Ah/kg counted here hold up to %.0f °C; for %.0f °C the table has no figure. Ask for tests at that temperature.", p.ID, used, Ambient, t)
	}
	return c, true
}

// Warm is an alloy at a temperature.
type Warm struct {
	Capacity  float64 // Ah/kg, the lower of the two documents
	Potential float64 // V Ag/AgCl/seawater
}

// AtTemperature returns what ISO 15589-2 and DNV-RP-F103 give for an alloy
// whose surface has a temperature in degC: the figure up to 30 degC, and
// straight lines between the table's temperatures; for zinc, of which there is
// one figure from 30 to 50 degC, that. It is not ok where the table has no
// figure: magnesium, zinc in seawater above 30 degC, anything
// above the last temperature. Fresh water counts as seawater, soil as
// sediment.
func AtTemperature(alloy hull.Alloy, medium hull.Medium, t float64) (w Warm, ok bool) {
	name := string(alloy) + " seawater "
	if medium == hull.Sediment || medium == hull.Soil {
		name = string(alloy) + " sediment "
	}
	type point struct{ t, capacity, potential float64 }
	var ps []point
	for _, r := range assets.Get("alloy-temperature").Rows {
		if strings.HasPrefix(r.Name, name) {
			ps = append(ps, point{*r.Values[0], min(*r.Values[1], *r.Values[2]), *r.Values[3]})
		}
	}
	sort.Slice(ps, func(i, j int) bool { return ps[i].t < ps[j].t })
	if len(ps) == 0 || t > ps[len(ps)-1].t {
		return Warm{}, false
	}
	for i, p := range ps {
		if t > p.t {
			continue
		}
		if i == 0 || alloy == hull.Zinc {
			return Warm{p.capacity, p.potential}, true
		}
		q := ps[i-1]
		part := (t - q.t) / (p.t - q.t)
		return Warm{q.capacity + part*(p.capacity-q.capacity), q.potential + part*(p.potential-q.potential)}, true
	}
	return Warm{}, false
}

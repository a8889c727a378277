package plan

import (
	"slices"

	"anodewright/anodes/forecast"
	"anodewright/hull"
)

// ZoneState is how a zone is on one day, and the cause of a state other than
// sound. The state is empty where no circuit holds the zone.
type ZoneState struct {
	State State
	Cause string
}

// States is how all zones are from the last docking to the horizon. It is
// worked out once by Outcome.States; asking it for a day is cheap.
type States struct {
	tracks [][]stateFrom // by zone, rising; nil where no circuit holds the zone
}

// stateFrom is a state that lasts from a day until the next one.
type stateFrom struct {
	from hull.Date
	ZoneState
}

// States follows every circuit's forecast and judges its zones as often as a
// Course has samples. On the day of a docking it tells what the docking leaves,
// on the day before how the zones come to it.
func (o *Outcome) States() *States {
	all := &States{tracks: make([][]stateFrom, len(o.Zones))}
	course := hull.NewCourse(o.steel())
	for _, c := range o.circuits() {
		for k, iv := range o.Intervals {
			var times []float64
			for n := 1; n < samples; n++ {
				times = append(times, iv.Years()*float64(n)/samples)
			}
			points := o.run(c, course, k, times)
			last := iv.To
			if k+1 < len(o.Intervals) {
				last--
			}
			for _, p := range points {
				day := min(iv.From+hull.Date(p.Time*hull.DaysPerYear+0.5), last)
				for n, s := range o.statesOf(c, course, k, p) {
					all.add(c.zones[n], stateFrom{day, s})
				}
			}
		}
	}
	return all
}

// add puts a state at the end of a zone's track. Of two on one day the later
// one counts.
func (s *States) add(zone int, next stateFrom) {
	t := s.tracks[zone]
	if n := len(t); n > 0 && t[n-1].from == next.from {
		t = t[:n-1]
	}
	if n := len(t); n == 0 || t[n-1].ZoneState != next.ZoneState {
		t = append(t, next)
	}
	s.tracks[zone] = t
}

// At returns every zone's state on a day, in the order of the asset's zones.
// A day before the last docking counts as that docking's.
func (s *States) At(day hull.Date) []ZoneState {
	out := make([]ZoneState, len(s.tracks))
	for i, t := range s.tracks {
		n, found := slices.BinarySearchFunc(t, day, func(f stateFrom, d hull.Date) int { return int(f.from - d) })
		if !found {
			n--
		}
		if len(t) > 0 {
			out[i] = t[max(n, 0)].ZoneState
		}
	}
	return out
}

// statesOf judges the zones of a circuit, in the circuit's order, at a point of
// interval k.
func (o *Outcome) statesOf(c *circuit, course *hull.Course, k int, p point) []ZoneState {
	a, iv := o.Asset, o.Intervals[k]
	day := min(iv.From+hull.Date(p.Time*hull.DaysPerYear+0.5), iv.To-1)
	var total, demand float64
	for _, i := range c.zones {
		now, _ := course.Line(i, k, min(p.Time, iv.Years()*(1-1e-9)), iv.Years())
		demand += c.factor(o) * now
	}
	usable, left, fitted := map[int]float64{}, map[int]float64{}, map[int]int{}
	for j, g := range c.groups {
		if !p.giving[j] {
			continue
		}
		g.Wastage = p.Wastage[j]
		z := &a.Zones[g.zone]
		total += g.output(a.Resistivity(z, day), z.Shielding)
		full := float64(g.Count) * g.Pattern.NetMass * g.metal.Capacity
		usable[g.zone] += full * g.Pattern.Utilisation
		left[g.zone] += full * max(0, g.Pattern.Utilisation-g.Wastage)
		fitted[g.zone]++
	}
	out := make([]ZoneState, len(c.zones))
	for n, i := range c.zones {
		_, own := a.Zones[i].Hold().(hull.ByAnodes)
		out[n] = verdict{
			own: own && fitted[i] > 0, bare: !c.carries(day), potential: p.Potential,
			usable: usable[i], left: left[i], gives: total, asks: demand, reserve: a.Basis.Reserve,
		}.state()
	}
	return out
}

// verdict is what a zone's state depends on.
type verdict struct {
	own          bool    // it carries anodes of its own
	bare         bool    // nothing in its circuit carries any
	potential    float64 // V
	usable, left float64 // charge of its anodes when new and now, Ah
	gives, asks  float64 // of the circuit at the protective potential, A
	reserve      float64 // share
}

func (v verdict) state() ZoneState {
	switch {
	case v.own && v.left <= 1e-9*v.usable:
		return ZoneState{Spent, "wasted to the utilisation factor"}
	case v.potential > forecast.Protective+1e-9 && v.bare:
		return ZoneState{Short, "no anodes are fitted"}
	case v.potential > forecast.Protective+1e-9:
		return ZoneState{Short, "of current"}
	case v.own && v.left < v.reserve*v.usable:
		return ZoneState{Thin, "of mass"}
	case v.gives < v.asks*(1+v.reserve):
		return ZoneState{Thin, "of current"}
	}
	return ZoneState{State: Sound}
}

package plan

import (
	"slices"

	"anodewright/hull"
)

// Sample is a zone at one time of the forecast.
type Sample struct {
	Date      hull.Date
	Potential float64 // V
	// Asks is the mean current in A that the zone's whole circuit takes at the
	// protective potential, Gives what its anodes can give there.
	Asks, Gives float64
	// Of the zone's anodes that give current together, 0 without any, and of
	// the most wasted group of them.
	Wastage, Most float64
	// Piece is the current in A that one piece gives, on average of those of the
	// zone that give any; 0 without.
	Piece float64
}

// samples is into how many parts each interval is cut for a course.
const samples = 24

// Course returns the forecast of a zone in time, rising from the last docking
// to the horizon, with two samples on the day of a docking: before and after.
// It is nil where no circuit holds the zone.
func (o *Outcome) Course(zone int) []Sample {
	course := hull.NewCourse(o.steel())
	for _, c := range o.circuits() {
		if !slices.Contains(c.zones, zone) {
			continue
		}
		var all []Sample
		for k, iv := range o.Intervals {
			var times []float64
			for n := 1; n < samples; n++ {
				times = append(times, iv.Years()*float64(n)/samples)
			}
			for _, p := range o.run(c, course, k, times) {
				s := Sample{Date: iv.From + hull.Date(p.Time*hull.DaysPerYear+0.5), Potential: p.Potential}
				for _, i := range c.zones {
					asks, _ := course.Line(i, k, min(p.Time, iv.Years()*(1-1e-9)), iv.Years())
					s.Asks += c.factor(o) * asks
				}
				mass, gone, pieces := 0.0, 0.0, 0
				for j, g := range c.groups {
					if !p.giving[j] {
						continue
					}
					g.Wastage = p.Wastage[j]
					z := &o.Asset.Zones[g.zone]
					s.Gives += g.output(o.Asset.Resistivity(z, min(s.Date, iv.To-1)), z.Shielding)
					if g.zone == zone {
						m := float64(g.Count) * g.Pattern.NetMass
						mass, gone = mass+m, gone+m*g.Wastage
						s.Piece += p.Current[j]
						pieces += g.Count
						s.Most = max(s.Most, g.Wastage)
					}
				}
				if mass > 0 {
					s.Wastage = gone / mass
					s.Piece /= float64(pieces)
				}
				all = append(all, s)
			}
		}
		return all
	}
	return nil
}

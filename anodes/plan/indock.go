package plan

import (
	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// InDock plans a docking anew from what was found at it, before anything is
// done: the closing says the day, the sets as found and the coating works.
// quay is what lies there, pieces by pattern id, as the only stock of this
// docking; nil stands for what is ordered in time. The docking is the first
// ahead of the outcome returned, whose asset is for looking at only. more are
// further options, as the pins of what was done already. Faults are of the
// closing's fields.
func (o *Outcome) InDock(c hull.Closing, quay map[string]int, more ...Option) (*Outcome, hull.Faults) {
	a, faults := hull.InDock(o.Asset, c)
	if len(faults) > 0 {
		return nil, faults
	}
	opts := []Option{WithLimits(o.Limits), WithQuay(quay)}
	if o.Learns {
		opts = append(opts, WithReadings())
	}
	return Compute(a, c.Date, append(opts, more...)...), nil
}

// FollowIn writes what this outcome, made by [Outcome.InDock], does at its
// docking into the closing: what is put on and what comes off. What was
// planned before the docking stays in the closing as it is.
func (o *Outcome) FollowIn(c *hull.Closing) {
	renewed := map[string]bool{}
	c.On = nil
	for _, l := range o.Schedule {
		zone := o.Asset.Zones[l.Zone].ID
		if l.Docking != 0 || l.Pattern == nil || l.Action == renewal.Keep {
			continue
		}
		renewed[zone] = l.Action == renewal.Renew
		c.On = append(c.On, hull.PutOn{Zone: zone, Pattern: l.Pattern.ID, Count: l.Count})
	}
	sets := make([]hull.ClosingSet, len(c.Sets))
	for i, s := range c.Sets {
		s.Off = 0
		if renewed[s.Zone] {
			s.Off = s.Found
		}
		sets[i] = s
	}
	c.Sets = sets
}

// LeftOnQuay returns what of the quay's pieces this outcome, made by
// [Outcome.InDock], leaves there, by pattern id.
func (o *Outcome) LeftOnQuay() map[string]int {
	left := map[string]int{}
	for id, n := range o.Quay {
		left[id] = n
	}
	for _, l := range o.Schedule {
		if l.Docking == 0 && l.Pattern != nil && l.Action != renewal.Keep && o.Quay != nil {
			left[l.Pattern.ID] -= l.Count
		}
	}
	return left
}

package hull

import "slices"

// InDock returns a valid asset as it stands in dock on the date of a closing,
// with what was found on its anodes and nothing done yet: its start is the day
// before, and the docking, with the closing's works, is the first ahead; what
// was read in dock that day is of the day before as well, for what it found is
// in the closing's sets. It is for planning the docking anew from what was found; what is taken off and put
// on is left out. Faults are those of [Close].
func InDock(a *Asset, c Closing) (*Asset, Faults) {
	k := closer{a: a, c: &c}
	k.date()
	if len(k.fs) > 0 {
		return nil, k.fs
	}
	docking := k.listed
	docking.Date, docking.Works = c.Date, slices.Clone(c.Works)

	found := Closing{Date: c.Date - 1, Docking: c.Docking, By: c.By, Next: c.Date, Horizon: c.Horizon, Expected: c.Expected}
	for _, s := range c.Sets {
		s.Off = 0
		found.Sets = append(found.Sets, s)
	}
	next, faults := Close(a, found)
	if len(faults) > 0 {
		return nil, faults
	}
	next.Dockings = slices.DeleteFunc(slices.Clone(next.Dockings), func(d Docking) bool {
		return d.Date <= c.Date && d.Date > next.LastDocking
	})
	if c.Next > c.Date {
		further := docking
		further.Date, further.Works = c.Next, nil
		next.Dockings = append(next.Dockings, further)
	}
	next.Dockings = append(next.Dockings, docking)
	slices.SortFunc(next.Dockings, func(x, y Docking) int { return int(x.Date) - int(y.Date) })
	next.Readings = slices.Clone(next.Readings)
	for i := range next.Readings {
		if r := &next.Readings[i]; r.Date == c.Date {
			r.Date--
		}
	}
	if faults := Check(next); len(faults) > 0 {
		return nil, faults
	}
	return next, nil
}

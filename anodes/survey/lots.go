package survey

import (
	"slices"

	"anodewright/hull"
)

// Lot is pieces of one fitted set that fare alike from the last docking on.
type Lot struct {
	Count   int
	Leaves  hull.Date // the day from which they are gone or fallen; 0: never
	Painted []Span    // when they are painted over
}

// Span is the time from the day on which pieces were found painted over to the
// docking that cleans them; a zero Cleaned is none.
type Span struct{ From, Cleaned hull.Date }

// Lots divides one of a zone's fitted sets by what the readings tell of its
// pieces in time: see [Count]. The first lot is what stays as it was fitted,
// where any does. A set without such readings is one lot.
func Lots(a *hull.Asset, z *hull.Zone, set int) []Lot {
	lots := []Lot{{Count: z.Fitted[set].Count}}
	counts := func(r hull.Reading) bool { return r.Zone == z.ID && r.Gone+r.Fallen+r.Painted > 0 }
	if !slices.ContainsFunc(a.Readings, counts) {
		return lots
	}
	clean := a.CleanedOn(z.ID)
	turns := append(slices.Clone(clean), a.Start())
	for _, day := range days(a, z, set) {
		turns = append(turns, a.Readings[day[0]].Date)
	}
	slices.Sort(turns)
	for _, day := range slices.Compact(turns) {
		if slices.Contains(clean, day) {
			for i := range lots {
				if lots[i].PaintedOn(day) {
					lots[i].Painted[len(lots[i].Painted)-1].Cleaned = day
				}
			}
		}
		if day < a.Start() {
			continue
		}
		known := Count(a, z, set, day)
		live, painted := 0, 0
		for _, l := range lots {
			if l.LiveOn(day) {
				live += l.Count
				if l.PaintedOn(day) {
					painted += l.Count
				}
			}
		}
		lots = split(lots, day, live-known.Live, func(l *Lot) { l.Leaves = day })
		lots = split(lots, day, known.Painted-painted, func(l *Lot) {
			l.Painted = append(slices.Clone(l.Painted), Span{From: day})
		})
	}
	return slices.DeleteFunc(lots, func(l Lot) bool { return l.Count == 0 })
}

// split parts n pieces from the lots that are there on a day, those that give
// current first: they have wasted most.
func split(lots []Lot, day hull.Date, n int, change func(*Lot)) []Lot {
	for _, painted := range []bool{false, true} {
		for i := range lots {
			if n > 0 && lots[i].Count > 0 && lots[i].LiveOn(day) && lots[i].PaintedOn(day) == painted {
				part := lots[i]
				part.Count = min(n, part.Count)
				lots[i].Count -= part.Count
				n -= part.Count
				change(&part)
				lots = append(lots, part)
			}
		}
	}
	return lots
}

// LiveOn reports whether the pieces are still there on a day.
func (l *Lot) LiveOn(day hull.Date) bool { return l.Leaves == 0 || day < l.Leaves }

// PaintedOn reports whether the pieces are painted over on a day, after what
// is done at a docking of that day.
func (l *Lot) PaintedOn(day hull.Date) bool {
	for _, s := range l.Painted {
		if s.From <= day && (s.Cleaned == 0 || day < s.Cleaned) {
			return true
		}
	}
	return false
}

// Gives reports whether the pieces give current on a day. before asks how they
// come to a docking of that day: still painted over where it cleans them.
func (l *Lot) Gives(day hull.Date, before bool) bool {
	if !l.LiveOn(day) {
		return false
	}
	for _, s := range l.Painted {
		if s.From <= day && (s.Cleaned == 0 || day < s.Cleaned || before && day == s.Cleaned) {
			return false
		}
	}
	return true
}

// Alike reports whether two lots of one set have fared alike up to a day.
func (l *Lot) Alike(m *Lot, day hull.Date) bool {
	past := func(s Span) bool { return s.From > day }
	return slices.Equal(slices.DeleteFunc(slices.Clone(l.Painted), past), slices.DeleteFunc(slices.Clone(m.Painted), past))
}

// Turns returns the days after one and up to another on which the pieces leave
// or cease to give current.
func (l *Lot) Turns(after, upTo hull.Date) (all []hull.Date) {
	add := func(d hull.Date) {
		if after < d && d <= upTo {
			all = append(all, d)
		}
	}
	add(l.Leaves)
	for _, s := range l.Painted {
		add(s.From)
	}
	return all
}

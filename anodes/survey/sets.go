package survey

import (
	"slices"

	"anodewright/anodes"
	"anodewright/hull"
)

func density(p *hull.Pattern) float64 { return anodes.MetalOf(p, hull.Seawater).Density }

// Set returns the index of the zone's fitted set that a reading is about:
// the first whose pattern and fitting date are those that it states, -1 if
// none is.
func Set(z *hull.Zone, r *hull.Reading) int {
	for i, f := range z.Fitted {
		if (r.Pattern == "" || r.Pattern == f.Pattern) && (r.Fitted.IsZero() || r.Fitted == f.Fitted) {
			return i
		}
	}
	return -1
}

// Stands reports whether a reading counts: one that was withdrawn is only kept.
func Stands(r *hull.Reading) bool { return r.Withdrawn.IsZero() }

// Usable reports whether the factor can be learned from a reading: it stands,
// is of a set that is fitted, and neither after today nor before the start of the
// plan, at which the wastage of every set is stated. A zero today is not
// looked at.
func Usable(a *hull.Asset, r *hull.Reading, today hull.Date) bool {
	z, ok := a.Zone(r.Zone)
	return ok && Stands(r) && Set(z, r) >= 0 && r.Date > a.Start() && (today.IsZero() || r.Date <= today)
}

// Pieces is what is known of the pieces of a set.
type Pieces struct {
	Fitted  int
	Gone    int // nothing left of them but the insert
	Fallen  int
	Painted int // painted over, and not cleaned since
	NotSeen int // at the last reading
	// Live pieces are still there, painted ones among them.
	Live int
	// Giving pieces are live and not painted over.
	Giving int
}

// Count returns what the readings up to a date leave of one of a zone's sets.
// Gone and fallen pieces leave it for good from the day of the reading, each
// reading naming those not named before. Painted ones stay so until a docking
// cleans them: the most found at once count. Readings up to the start of the
// plan change nothing, for the set is stated as it was then; but where the
// start is a docking that was closed here, it is known what was cleaned there,
// and what was found painted over before and not cleaned since still is.
func Count(a *hull.Asset, z *hull.Zone, set int, at hull.Date) Pieces {
	f := z.Fitted[set]
	p := Pieces{Fitted: f.Count}
	cleaned := hull.Date(0)
	for _, d := range a.CleanedOn(z.ID) {
		if d <= at {
			cleaned = max(cleaned, d)
		}
	}
	recorded := slices.ContainsFunc(a.Closed, func(c hull.Closed) bool { return c.Date == a.Start() })
	for _, day := range days(a, z, set) {
		date := a.Readings[day[0]].Date
		if date > at || date <= a.Start() && !(recorded && date > f.Fitted) {
			continue
		}
		painted := 0
		for _, i := range day {
			painted += a.Readings[i].Painted
		}
		if date > cleaned {
			p.Painted = max(p.Painted, painted)
		}
		if date <= a.Start() {
			continue
		}
		p.NotSeen = 0
		for _, i := range day {
			r := &a.Readings[i]
			p.Gone += r.Gone
			p.Fallen += r.Fallen
			p.NotSeen += r.NotSeen
		}
	}
	p.Live = max(0, p.Fitted-p.Gone-p.Fallen)
	p.Painted = min(p.Painted, p.Live)
	p.Giving = p.Live - p.Painted
	return p
}

// pieces is how many pieces a reading accounts for.
func pieces(r *hull.Reading) int {
	n := len(r.WeighedWastage) + len(r.Measured) + len(r.Percent) + r.Gone + r.NotWasted + r.Fallen + r.Painted + r.NotSeen
	if r.Grades != nil {
		for _, c := range r.Grades.Counts {
			n += c
		}
	}
	return n
}

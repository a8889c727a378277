package plan

import (
	"cmp"
	"fmt"
	"slices"

	"anodewright/hull"
)

// AsBuilt sets a closed docking beside what was planned for it.
type AsBuilt struct {
	Closed *hull.Closed
	Sets   []FoundSet  // by zone and set, as they were found
	Pieces []PutOn     // by zone and pattern, what was planned or put on
	Cost   *SpentMoney // nil where either is not known
	// Ordered and PutOn are the net mass in kg of what was bought for the
	// docking and of what was put on at it; Unused is the share of what was
	// bought that was not put on, at least 0. All are 0 where no order is kept.
	Ordered, PutOn, Unused float64
	// TakenOff is the net mass in kg that the pieces taken off had when they
	// were new, Left the share of it that was still there.
	TakenOff, Left float64
}

// FoundSet is one set, expected and found.
type FoundSet struct {
	Zone, Name, Pattern string
	Fitted              hull.Date
	Expected            *hull.Expectation // nil where no forecast is kept
	Found               int               // pieces
	Wastage             float64
	How                 hull.Evidence
	Off                 int // pieces taken off
	Verdict             Verdict
}

// Verdict is how a wastage found compares with what was expected; empty where
// nobody looked or nothing was expected.
type Verdict string

// The verdicts: within the 90 % range expected, or outside of it.
const (
	AsExpected Verdict = "as expected"
	LessWasted Verdict = "less wasted than expected"
	MoreWasted Verdict = "more wasted than expected"
)

// PutOn is pieces of one pattern on one zone, planned and put on.
type PutOn struct {
	Zone, Name, Pattern string
	Planned, PutOn      int
}

// SpentMoney is the money of a docking, planned and spent, undiscounted.
type SpentMoney struct{ Planned, Spent float64 }

// CompareClosed compares what was planned for the i-th closed docking of an
// asset with what was found and done, by its ledger. A fact that corrects the
// docking's later counts in place of what it corrects.
func CompareClosed(a *hull.Asset, i int) *AsBuilt {
	d := &a.Closed[i]
	b := &AsBuilt{Closed: d}
	name := func(zone string) string {
		if z, ok := a.Zone(zone); ok {
			return z.Name
		}
		return zone
	}
	mass := func(pattern string) float64 {
		if p, ok := a.Pattern(pattern); ok {
			return p.NetMass
		}
		return 0
	}
	sets := map[hull.SetKey]int{}
	pieces := map[[2]string]int{}
	put := func(zone, pattern string) *PutOn {
		at, ok := pieces[[2]string{zone, pattern}]
		if !ok {
			at = len(b.Pieces)
			pieces[[2]string{zone, pattern}] = at
			b.Pieces = append(b.Pieces, PutOn{Zone: zone, Name: name(zone), Pattern: pattern})
		}
		return &b.Pieces[at]
	}
	for _, p := range d.Planned {
		if p.Action != "keep" {
			put(p.Zone, p.Pattern).Planned += p.Count
		}
	}
	for _, f := range a.Ledger {
		switch {
		case f.Date != d.Date:
		case f.Fitted == d.Date && f.Deed == hull.WasFitted:
			put(f.Zone, f.Pattern).PutOn += f.Count
		case f.Fitted == d.Date && f.Deed == hull.WasFound:
			put(f.Zone, f.Pattern).PutOn = f.Count
		case f.Deed == hull.WasFound:
			at, ok := sets[f.Key()]
			if !ok {
				at = len(b.Sets)
				sets[f.Key()] = at
				b.Sets = append(b.Sets, FoundSet{Zone: f.Zone, Name: name(f.Zone), Pattern: f.Pattern, Fitted: f.Fitted})
			}
			s := &b.Sets[at]
			s.Found, s.Wastage, s.How = f.Count+s.Off, f.Wastage, cmp.Or(f.How, hull.Surveyed)
		case f.Deed == hull.WasRemoved:
			if at, ok := sets[f.Key()]; ok {
				b.Sets[at].Off += f.Count
			}
		}
	}
	for i := range b.Sets {
		s := &b.Sets[i]
		at := slices.IndexFunc(d.Expected, func(e hull.Expectation) bool {
			return e.Zone == s.Zone && e.Pattern == s.Pattern && e.Fitted == s.Fitted
		})
		if at >= 0 {
			s.Expected = &d.Expected[at]
			s.Verdict = s.verdict()
		}
		m := float64(s.Off) * mass(s.Pattern)
		b.TakenOff += m
		b.Left += m * (1 - s.Wastage)
	}
	if b.TakenOff > 0 {
		b.Left /= b.TakenOff
	}
	for _, o := range d.Ordered {
		b.Ordered += float64(o.Count) * mass(o.Pattern)
	}
	for _, p := range b.Pieces {
		b.PutOn += float64(p.PutOn) * mass(p.Pattern)
	}
	if b.Ordered > 0 {
		b.Unused = max(0, 1-b.PutOn/b.Ordered)
	}
	if d.Cost != nil && d.PlannedCost != nil {
		b.Cost = &SpentMoney{*d.PlannedCost, *d.Cost}
	}
	return b
}

// verdict compares with the range expected, to the half per cent that a survey
// tells apart.
func (s *FoundSet) verdict() Verdict {
	const told = 0.005
	switch e := s.Expected; {
	case s.How != hull.Surveyed || s.Found == 0:
		return ""
	case s.Wastage < e.Low-told:
		return LessWasted
	case s.Wastage > e.High+told:
		return MoreWasted
	}
	return AsExpected
}

// Words says in sentences how what was found differs from what was planned.
func (b *AsBuilt) Words() []string {
	var lines []string
	say := func(format string, args ...any) { lines = append(lines, fmt.Sprintf(format, args...)) }
	for _, s := range b.Sets {
		set := fmt.Sprintf("%s: %d × %s fitted on %s", s.Name, s.Found, s.Pattern, s.Fitted)
		switch {
		case s.How == hull.Forecasted:
			say("%s were not looked at; the forecast says %s wasted.", set, wasted(s.Wastage))
		case s.Expected == nil:
			say("%s were found %s wasted; no forecast was kept.", set, wasted(s.Wastage))
		default:
			say("%s were found %s wasted, %s was expected (%s): %s.", set, wasted(s.Wastage), wasted(s.Expected.Median), wasted(s.Expected.Low)+" to "+wasted(s.Expected.High), s.Verdict)
		}
		if s.Expected != nil && s.Expected.Count > s.Found {
			say("%s: %s of %s fitted on %s had gone or fallen.", s.Name, counted(s.Expected.Count-s.Found, "piece", "pieces"), s.Pattern, s.Fitted)
		}
	}
	for _, p := range b.Pieces {
		if p.PutOn == p.Planned {
			say("%s: %d × %s were put on, as planned.", p.Name, p.PutOn, p.Pattern)
		} else {
			say("%s: %d × %s were put on, %d were planned.", p.Name, p.PutOn, p.Pattern, p.Planned)
		}
	}
	if b.TakenOff > 0 {
		say("Of the metal taken off, %s was still there.", wasted(b.Left))
	}
	if b.Ordered > 0 {
		say("Of the metal ordered, %.0f kg, %s was not put on.", b.Ordered, wasted(b.Unused))
	}
	if c := b.Cost; c != nil {
		switch diff := c.Spent - c.Planned; {
		case diff > 0.5:
			say("It cost %.0f, %.0f more than planned.", c.Spent, diff)
		case diff < -0.5:
			say("It cost %.0f, %.0f less than planned.", c.Spent, -diff)
		default:
			say("It cost %.0f, as planned.", c.Spent)
		}
	}
	return lines
}

func wasted(share float64) string { return fmt.Sprintf("%.0f %%", 100*share) }

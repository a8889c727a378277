package session

import (
	"slices"
	"strings"

	"anodewright/anodes/order"
	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// Outlook is what the fleet's list and the fleet's orders need of an asset's
// outcome. Of a large fleet no more is kept: see keptMost.
type Outlook struct {
	Today   hull.Date
	Docking hull.Date // the next; none is zero
	OrderBy hull.Date // the earliest; zero where nothing has to be ordered
	// State is the worst of all zones at the end of the interval that Today
	// lies in, By that end. The cause is without its "of".
	State plan.State
	Cause string
	By    hull.Date
	Order []order.Line

	of *plan.Outcome // what it is of, and nothing of what was found
}

// outlookOf returns the outlook of an outcome.
func outlookOf(o *plan.Outcome) *Outlook {
	l := &Outlook{Today: o.Today, Order: slices.Clone(o.Order)}
	l.of = &plan.Outcome{Asset: o.Asset, Today: o.Today, Learns: o.Learns, Asked: o.Asked, Pins: slices.Clone(o.Pins)}
	if d, ok := o.NextDocking(); ok {
		l.Docking = d.Date
	}
	l.OrderBy, _ = o.OrderBy()
	for _, z := range o.Zones {
		for _, iv := range z.Intervals {
			if o.Today < iv.To {
				if iv.State.Rank() > l.State.Rank() {
					l.State, l.Cause, l.By = iv.State, strings.TrimPrefix(iv.Cause, "of "), iv.To
				}
				break
			}
		}
	}
	return l
}

// keptMost is of how many assets the whole outcome is kept: those that were
// open last. Of the others it is made anew when they are opened, which takes
// some hundredths of a second; a thousand of them would take 300 MB.
const keptMost = 12

// computed takes the outcome of an entry. The caller holds the lock.
func (s *Session) computed(e *entry, o *plan.Outcome) {
	e.outcome, e.outlook = o, outlookOf(o)
	if e == s.open || len(s.kept) < keptMost || slices.Contains(s.kept, e) {
		s.keep(e)
	} else {
		e.forget()
	}
}

// keep keeps an entry's outcome for as long as no keptMost others are opened.
// The caller holds the lock.
func (s *Session) keep(e *entry) {
	s.kept = slices.DeleteFunc(s.kept, func(k *entry) bool { return k == e || s.find(k.id) != k })
	if s.kept = append(s.kept, e); len(s.kept) > keptMost {
		for i, k := range s.kept {
			if k != s.open {
				k.forget()
				s.kept = slices.Delete(s.kept, i, i+1)
				return
			}
		}
	}
}

// forget lets go of all that an entry's plan is made with but its outlook.
func (e *entry) forget() {
	e.outcome, e.decisions, e.decided, e.memo = nil, nil, nil, new(renewal.Memo)
}

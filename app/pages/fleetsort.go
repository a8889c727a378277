package pages

import (
	"cmp"
	"slices"

	"fyne.io/fyne/v2"

	"anodewright/app/say"
	"anodewright/app/session"
	"anodewright/hull"
)

// fleetSort is how the list of the fleet is sorted. It is kept in the
// settings by its word; an empty or unknown one means by order date.
type fleetSort string

const (
	byOrder   fleetSort = "order-by date"
	byDocking fleetSort = "next docking"
	byState   fleetSort = "worst state"
)

// fleetSorts are all of them, in the order in which they follow each other.
var fleetSorts = []fleetSort{byOrder, byDocking, byState}

func (s fleetSort) words() string {
	switch s {
	case byDocking:
		return say.T("by next docking")
	case byState:
		return say.T("by worst state")
	}
	return say.T("by order date")
}

func (s fleetSort) next() fleetSort {
	i := max(slices.Index(fleetSorts, s), 0)
	return fleetSorts[(i+1)%len(fleetSorts)]
}

// sortKey is what an asset is sorted by: the smaller first.
type sortKey struct {
	rank int // 0 what has a date or a state, 1 what has none, 2 what is not computed
	date hull.Date
}

func (s fleetSort) key(o *session.Outlook) sortKey {
	if o == nil {
		return sortKey{rank: 2}
	}
	switch s {
	case byDocking:
		if !o.Docking.IsZero() {
			return sortKey{date: o.Docking}
		}
	case byState:
		if o.State != "" {
			return sortKey{rank: -o.State.Rank(), date: o.By}
		}
	default:
		if !o.OrderBy.IsZero() {
			return sortKey{date: o.OrderBy}
		}
	}
	return sortKey{rank: 1}
}

// in returns the fleet sorted; assets with equal keys keep their order.
func (s fleetSort) in(fleet []session.Summary) []session.Summary {
	keys := make(map[string]sortKey, len(fleet))
	for _, item := range fleet {
		keys[item.ID] = s.key(item.Outlook)
	}
	slices.SortStableFunc(fleet, func(a, b session.Summary) int {
		x, y := keys[a.ID], keys[b.ID]
		return cmp.Or(cmp.Compare(x.rank, y.rank), cmp.Compare(x.date, y.date))
	})
	return fleet
}

// sortBy sorts the list another way and keeps the choice.
func (l *fleetList) sortBy(s fleetSort) {
	l.sort = s
	l.f.s.SetSetting("fleet sort", string(s))
	l.f.Update()
}

// sortItem is the menu of the ways in which the list is sorted.
func (f *Frame) sortItem() *fyne.MenuItem {
	m := fyne.NewMenuItem(say.T("Sort the fleet"), nil)
	var items []*fyne.MenuItem
	for _, s := range fleetSorts {
		items = append(items, f.lookItem(fyne.NewMenuItem(s.words(), func() { f.fleet.sortBy(s) }), func() bool {
			return f.fleet.sort.words() == s.words()
		}))
	}
	m.ChildMenu = fyne.NewMenu("", items...)
	return m
}

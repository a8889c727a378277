package order

import (
	"cmp"
	"slices"

	"anodewright/hull"
)

// Member is an asset of a fleet with what has to be bought for it.
type Member struct {
	Name     string
	Currency string
	Today    hull.Date
	Costs    hull.Costs
	Lines    []Line
}

// Due is one line that a member has to order.
type Due struct {
	Member int // among the fleet's
	Line
}

// Money is a sum in one currency.
type Money struct {
	Currency string
	Price    float64
	Freight  float64
}

// Share is what one member has to order in one month.
type Share struct {
	Member int
	By     hull.Date // the first order-by date
	Pieces int       // bought
	Gross  float64   // kg
	Money
}

// Month is what a fleet has to order in one month, by order-by dates.
type Month struct {
	First  hull.Date // of the month; 0: what is late already
	Shares []Share   // by member, in the fleet's order
	Pieces int
	Gross  float64 // kg
	Money  []Money // by currency, in the order of the members
}

// Join is one order that several members could place together: the same
// pattern, order-by dates close to each other.
type Join struct {
	Pattern *hull.Pattern
	By      hull.Date // the earliest of its order-by dates
	Last    hull.Date // and the latest
	Lines   []Due     // by order-by date
	Pieces  int       // bought one by one
	Joined  int       // bought together: full multiples of the sum only
	Gross   float64   // kg, joined
}

// Calendar is what a whole fleet has to order and until when.
type Calendar struct {
	Late   []Due // the latest first; lines of dockings still to come
	Months []Month
	Joins  []Join
}

// CalendarOf makes the calendar of a fleet: what has to be bought for dockings that
// still lie ahead of each member's today. Lines of one pattern whose order-by
// dates lie within so many weeks are joined.
func CalendarOf(fleet []Member, weeks float64) Calendar {
	var c Calendar
	due := Sorted(fleet)
	for _, d := range due {
		if d.LateDays > 0 {
			c.Late = append(c.Late, d)
		}
	}
	slices.SortStableFunc(c.Late, func(a, b Due) int { return b.LateDays - a.LateDays })
	c.Months = months(fleet, due)
	c.Joins = joins(due, hull.Date(7*weeks))
	return c
}

// Sorted returns what has to be bought for dockings that still lie ahead of
// each member's today, by order-by date.
func Sorted(fleet []Member) []Due {
	var due []Due
	for i, m := range fleet {
		for _, l := range m.Lines {
			if l.Ordered > 0 && l.Docking >= m.Today {
				due = append(due, Due{i, l})
			}
		}
	}
	slices.SortStableFunc(due, func(a, b Due) int { return cmp.Compare(a.OrderBy, b.OrderBy) })
	return due
}

// monthOf is the first day of the month that a line has to be ordered in, 0
// where it is late.
func (d Due) monthOf() hull.Date {
	if d.LateDays > 0 {
		return 0
	}
	t := d.OrderBy.Time()
	return hull.NewDate(t.Year(), t.Month(), 1)
}

func months(fleet []Member, due []Due) []Month {
	byMonth := map[hull.Date]map[int]*Share{}
	ordered := map[[2]int]bool{} // member and docking whose freight of an order is counted
	for _, d := range due {
		first, m := d.monthOf(), fleet[d.Member]
		if byMonth[first] == nil {
			byMonth[first] = map[int]*Share{}
		}
		s := byMonth[first][d.Member]
		if s == nil {
			s = &Share{Member: d.Member, By: d.OrderBy, Money: Money{Currency: m.Currency}}
			byMonth[first][d.Member] = s
		}
		s.Pieces, s.Gross, s.Price, s.Freight = s.Pieces+d.Ordered, s.Gross+d.Gross, s.Price+d.Price, s.Freight+d.Freight
		if at := [2]int{d.Member, int(d.Docking)}; !ordered[at] {
			ordered[at] = true
			s.Freight += m.Costs.FreightPerOrder
		}
	}
	var all []Month
	for first, shares := range byMonth {
		month := Month{First: first}
		for i := range fleet {
			if s := shares[i]; s != nil {
				month.Shares = append(month.Shares, *s)
				month.Pieces, month.Gross = month.Pieces+s.Pieces, month.Gross+s.Gross
				month.Money = AddMoney(month.Money, s.Money)
			}
		}
		all = append(all, month)
	}
	slices.SortFunc(all, func(a, b Month) int { return cmp.Compare(a.First, b.First) })
	return all
}

// AddMoney adds a sum to sums by currency.
func AddMoney(sums []Money, m Money) []Money {
	for i := range sums {
		if sums[i].Currency == m.Currency {
			sums[i].Price, sums[i].Freight = sums[i].Price+m.Price, sums[i].Freight+m.Freight
			return sums
		}
	}
	return append(sums, m)
}

// joins finds the lines of one casting, of several members, that could go out
// together: from the earliest on, all whose order-by dates follow within a
// number of days.
func joins(due []Due, within hull.Date) []Join {
	type casting struct {
		id         string
		alloy      hull.Alloy
		shape      hull.Shape
		net, gross float64
	}
	var keys []casting
	byPattern := map[casting][]Due{}
	for _, d := range due {
		p := d.Pattern
		key := casting{p.ID, p.Alloy, p.Shape, p.NetMass, p.Gross()}
		if byPattern[key] == nil {
			keys = append(keys, key)
		}
		byPattern[key] = append(byPattern[key], d)
	}
	var all []Join
	for _, key := range keys {
		lines := byPattern[key]
		for len(lines) > 0 {
			n := 1
			for n < len(lines) && lines[n].OrderBy-lines[0].OrderBy <= within {
				n++
			}
			if j, ok := join(lines[:n]); ok {
				all = append(all, j)
			}
			lines = lines[n:]
		}
	}
	slices.SortStableFunc(all, func(a, b Join) int { return cmp.Compare(a.By, b.By) })
	return all
}

// join makes one order of lines, if they are of more than one member.
func join(lines []Due) (Join, bool) {
	p := lines[0].Pattern
	j := Join{Pattern: p, By: lines[0].OrderBy, Last: lines[len(lines)-1].OrderBy, Lines: slices.Clone(lines)}
	several, need, multiple := false, 0, 1
	for _, d := range lines {
		several = several || d.Member != lines[0].Member
		need += d.Pieces + d.Spares - d.FromStock
		j.Pieces += d.Ordered
		multiple = max(multiple, d.Pattern.OrderMultiple)
	}
	j.Joined = upTo(need, multiple)
	j.Gross = float64(j.Joined) * p.Gross()
	return j, several
}

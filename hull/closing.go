package hull

import (
	"cmp"
	"fmt"
	"reflect"
	"slices"
)

// Closing is what was found and done at a docking: all that [Close] writes
// into an asset.
type Closing struct {
	Date    Date         `json:"date" need:"yes"` // in dock
	Docking Date         `json:"docking"`         // as listed; absent: the next one ahead
	By      string       `json:"by"`
	Note    string       `json:"note"`
	Sets    []ClosingSet `json:"sets"` // one for every set that the asset carries
	On      []PutOn      `json:"on"`
	Works   []Work       `json:"works"`
	Cleaned []string     `json:"cleaned"` // zones whose painted anodes were cleaned
	Ordered []Stock      `json:"ordered"` // pieces bought for this docking; what is not put on goes on the shelf
	Cost    *float64     `json:"cost" want:"0..1000000000000"`

	// What was planned, kept beside what was done.
	PlannedCost *float64      `json:"planned_cost" want:"0..1000000000000"`
	Planned     []Planned     `json:"planned"`
	Expected    []Expectation `json:"expected"`

	// Next is a further docking to list, and Horizon the plan's new end; both
	// may be absent where the asset has a docking ahead after this one.
	Next    Date `json:"next"`
	Horizon Date `json:"horizon"`
}

// ClosingSet is one set of anodes as it was found, and how much of it was
// taken off.
type ClosingSet struct {
	Zone    string   `json:"zone" need:"yes"`
	Pattern string   `json:"pattern" need:"yes"`
	Fitted  Date     `json:"fitted" need:"yes"`
	Found   int      `json:"found" need:"yes" want:"0..1000000"` // pieces, those taken off among them
	Wastage float64  `json:"wastage" want:"0..1"`                // mean share of the net mass gone
	How     Evidence `json:"how"`                                // absent: surveyed
	Off     int      `json:"off" want:"0..1000000"`
}

// PutOn is new pieces of one pattern on one zone.
type PutOn struct {
	Zone    string `json:"zone" need:"yes"`
	Pattern string `json:"pattern" need:"yes"`
	Count   int    `json:"count" need:"yes" want:"1..1000000"`
}

// Close closes a docking of a valid asset and returns the asset after it,
// which shares with the old one what did not change. What was found, taken off
// and put on enters the ledger, which begins with what the asset carried
// before; the fitted sets follow from it. The docking leaves the list of those
// to come, with those passed over, and is kept with its works, its cost and
// its plan; its date is the last docking. Faults are of the closing's own
// fields, or of the asset's that would come of it, and then there is no asset.
func Close(a *Asset, c Closing) (*Asset, Faults) {
	k := closer{a: a, c: &c}
	checkFields(reflect.ValueOf(&c).Elem(), "", &k.fs)
	k.date()
	k.sets()
	k.references()
	if len(k.fs) > 0 {
		return nil, k.fs
	}
	next := *a
	next.Ledger = k.ledger()
	next.Stock = k.stock()
	next.LastDocking = c.Date
	if !a.Today.IsZero() {
		next.Today = max(a.Today, c.Date)
	}
	k.dockings(&next)
	next.Closed = append(slices.Clone(a.Closed), Closed{
		Date: c.Date, Kind: k.listed.Kind, By: c.By, Note: c.Note, Works: slices.Clone(c.Works), Cleaned: slices.Clone(c.Cleaned),
		Cost: c.Cost, PlannedCost: c.PlannedCost, Planned: slices.Clone(c.Planned), Ordered: slices.Clone(c.Ordered), Expected: slices.Clone(c.Expected),
	})
	sets, faults := FittedSets(next.Ledger)
	next.Zones = slices.Clone(a.Zones)
	for i := range next.Zones {
		z := &next.Zones[i]
		z.Fitted = sets[z.ID]
		if a.Start() < a.InService && z.Coating.Applied.IsZero() {
			z.Coating.Applied = a.Start() // as it was counted from so far
		}
	}
	if faults = append(faults, Check(&next)...); len(faults) > 0 {
		return nil, faults
	}
	return &next, nil
}

// closer is the closing of one docking.
type closer struct {
	a      *Asset
	c      *Closing
	listed Docking
	fs     Faults
}

// date: after the last docking, and of a docking in the list.
func (k *closer) date() {
	a, c := k.a, k.c
	if !c.Date.IsZero() && c.Date <= a.Start() {
		k.fs.add("date", "a date after the last docking "+a.Start().String(), "%s", c.Date)
	}
	SetDefaults(&k.listed)
	ahead := a.Ahead()
	switch at := slices.IndexFunc(ahead, func(d Docking) bool { return d.Date == c.Docking }); {
	case at >= 0:
		k.listed = ahead[at]
	case !c.Docking.IsZero():
		k.fs.add("docking", "the date of one of the asset's dockings ahead", "%s", c.Docking)
	case len(ahead) > 0:
		k.listed = ahead[0]
	}
	later := func(d Docking) bool { return d.Date > c.Date && d.Date != k.listed.Date }
	switch left := slices.ContainsFunc(ahead, later); {
	case c.Date.IsZero():
	case !left && c.Next.IsZero():
		k.fs.add("next", "the date of the next docking: none is listed after "+c.Date.String(), "nothing")
	case !c.Next.IsZero() && c.Next <= c.Date:
		k.fs.add("next", "a date after this docking's, "+c.Date.String(), "%s", c.Next)
	}
	horizon, last := a.Horizon, max(c.Date, c.Next)
	if !c.Horizon.IsZero() {
		horizon = c.Horizon
	}
	if horizon <= last && !c.Date.IsZero() {
		got := a.Horizon.String() + " as before"
		if !c.Horizon.IsZero() {
			got = c.Horizon.String()
		}
		k.fs.add("horizon", "a date after "+last.String(), "%s", got)
	}
}

// sets: every set of the asset once, and no more taken off than was found.
func (k *closer) sets() {
	seen := map[SetKey]int{}
	for i, s := range k.c.Sets {
		path := fmt.Sprintf("sets[%d]", i)
		key := SetKey{s.Zone, s.Pattern, s.Fitted}
		if at, twice := seen[key]; twice {
			k.fs.add(path, fmt.Sprintf("another set than that of sets[%d]", at), "%s", setWords([]Fitted{{Pattern: s.Pattern, Fitted: s.Fitted, Count: s.Found}}))
		}
		seen[key] = i
		if s.Off > s.Found {
			k.fs.add(path+".off", fmt.Sprintf("at most the %d pieces found", s.Found), "%d", s.Off)
		}
		if !s.Fitted.IsZero() && s.Fitted >= k.c.Date && k.c.Date > k.a.Start() { // else the date is the mistake
			k.fs.add(path+".fitted", "a date before this docking's, "+k.c.Date.String(), "%s", s.Fitted)
		}
	}
	for _, z := range k.a.Zones {
		for _, f := range joined(z.Fitted) {
			if _, ok := seen[SetKey{z.ID, f.Pattern, f.Fitted}]; !ok {
				k.fs.add("sets", "what was found of every set; none is missing", "nothing of %s in %s", setWords([]Fitted{f}), z.ID)
			}
		}
	}
}

// references: zones that carry anodes, known patterns, works that are whole.
func (k *closer) references() {
	c := checker{a: k.a, fs: &k.fs, zoneIDs: true, patternIDs: true}
	carries := func(path, id string) {
		z, ok := k.a.Zone(id)
		switch {
		case !ok:
			c.zoneID(path, id)
		case z.HeldBy != "":
			k.fs.add(path, "a zone that carries anodes of its own", "%q, which %s holds", id, z.HeldBy)
		}
	}
	for i, s := range k.c.Sets {
		carries(fmt.Sprintf("sets[%d].zone", i), s.Zone)
		c.pattern(fmt.Sprintf("sets[%d].pattern", i), s.Pattern)
	}
	for i, p := range k.c.On {
		carries(fmt.Sprintf("on[%d].zone", i), p.Zone)
		c.pattern(fmt.Sprintf("on[%d].pattern", i), p.Pattern)
	}
	for i, o := range k.c.Ordered {
		c.pattern(fmt.Sprintf("ordered[%d].pattern", i), o.Pattern)
	}
	for i, w := range k.c.Works {
		path := fmt.Sprintf("works[%d]", i)
		c.zoneID(path+".zone", w.Zone)
		c.work(path, w)
	}
	for i, id := range k.c.Cleaned {
		c.zoneID(fmt.Sprintf("cleaned[%d]", i), id)
	}
}

// ledger is the asset's with the facts of the closing: found, then taken off,
// then put on.
func (k *closer) ledger() []Fact {
	facts := slices.Clone(k.a.Ledger)
	if len(facts) == 0 {
		facts = Opening(k.a)
	}
	fact := Fact{Date: k.c.Date, By: k.c.By}
	for _, s := range k.c.Sets {
		f := fact
		f.Zone, f.Pattern, f.Fitted = s.Zone, s.Pattern, s.Fitted
		f.Deed, f.Count, f.Wastage, f.How = WasFound, s.Found, s.Wastage, cmp.Or(s.How, Surveyed)
		facts = append(facts, f)
	}
	for _, s := range k.c.Sets {
		if s.Off > 0 {
			f := fact
			f.Zone, f.Pattern, f.Fitted = s.Zone, s.Pattern, s.Fitted
			f.Deed, f.Count = WasRemoved, s.Off
			facts = append(facts, f)
		}
	}
	for _, p := range k.c.On {
		f := fact
		f.Zone, f.Pattern, f.Fitted = p.Zone, p.Pattern, k.c.Date
		f.Deed, f.Count = WasFitted, p.Count
		facts = append(facts, f)
	}
	return facts
}

// stock is what lies on the shelf afterwards: what lay there and what was
// bought, less what was put on.
func (k *closer) stock() []Stock {
	left := slices.Clone(k.a.Stock)
	at := func(pattern string) *Stock {
		i := slices.IndexFunc(left, func(s Stock) bool { return s.Pattern == pattern })
		if i < 0 {
			left, i = append(left, Stock{Pattern: pattern}), len(left)
		}
		return &left[i]
	}
	for _, o := range k.c.Ordered {
		at(o.Pattern).Count += o.Count
	}
	for _, p := range k.c.On {
		for i, n := 0, p.Count; i < len(left) && n > 0; i++ {
			if left[i].Pattern == p.Pattern {
				take := min(n, left[i].Count)
				left[i].Count, n = left[i].Count-take, n-take
			}
		}
	}
	return slices.DeleteFunc(left, func(s Stock) bool { return s.Count == 0 && !slices.Contains(k.a.Stock, s) })
}

// dockings takes this docking, and those passed over, off the list; a further
// one is like this one, without works.
func (k *closer) dockings(next *Asset) {
	start, c := k.a.Start(), k.c
	next.Dockings = nil
	for _, d := range k.a.Dockings {
		if d.Date <= start || d.Date > c.Date && d.Date != k.listed.Date {
			next.Dockings = append(next.Dockings, d)
		}
	}
	if !c.Next.IsZero() && !slices.ContainsFunc(next.Dockings, func(d Docking) bool { return d.Date == c.Next }) {
		d := k.listed
		d.Date, d.Works = c.Next, nil
		next.Dockings = append(next.Dockings, d)
		slices.SortFunc(next.Dockings, func(x, y Docking) int { return int(x.Date) - int(y.Date) })
	}
	if !c.Horizon.IsZero() {
		next.Horizon = c.Horizon
	}
}

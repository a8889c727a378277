package hull

import (
	"fmt"
	"math"
	"slices"
	"strings"
)

// Fact is one entry of the as-built ledger: at a date, so many pieces of a set
// were fitted, found or removed. A set is the pieces of one pattern that were
// fitted in one zone on one date. Facts are only ever added: a mistake is put
// right by a later fact.
type Fact struct {
	Date    Date     `json:"date" need:"yes"`
	Deed    Deed     `json:"deed" need:"yes"`
	Zone    string   `json:"zone" need:"yes"`
	Pattern string   `json:"pattern" need:"yes"`
	Fitted  Date     `json:"fitted" need:"yes"`
	Count   int      `json:"count" need:"yes" want:"0..1000000"`
	Wastage float64  `json:"wastage" want:"0..1"` // of what was found: mean share of the net mass gone
	How     Evidence `json:"how"`
	By      string   `json:"by"`
	Note    string   `json:"note"`
}

// Closed is a docking that was done and closed, with what was planned for it.
type Closed struct {
	Date        Date          `json:"date" need:"yes"`
	Kind        DockingKind   `json:"kind" default:"dry-dock"`
	By          string        `json:"by"`
	Note        string        `json:"note"`
	Works       []Work        `json:"works"`   // they stay in force for coatings applied before
	Cleaned     []string      `json:"cleaned"` // zones whose painted anodes were cleaned, beside works clean
	Cost        *float64      `json:"cost" want:"0..1000000000000"`
	PlannedCost *float64      `json:"planned_cost" want:"0..1000000000000"` // undiscounted
	Planned     []Planned     `json:"planned"`
	Ordered     []Stock       `json:"ordered"` // pieces bought for it, spares among them
	Expected    []Expectation `json:"expected"`
}

// Planned is what the plan wanted done with a zone's anodes at a docking.
type Planned struct {
	Zone    string        `json:"zone" need:"yes"`
	Action  PlannedAction `json:"action" need:"yes"`
	Pattern string        `json:"pattern"`
	Count   int           `json:"count" want:"0..1000000"`
	Until   Date          `json:"until"`
}

// Expectation is what the forecast said would be found of a set: pieces still
// there and their wastage, its median and 90 % range.
type Expectation struct {
	Zone    string  `json:"zone" need:"yes"`
	Pattern string  `json:"pattern" need:"yes"`
	Fitted  Date    `json:"fitted" need:"yes"`
	Count   int     `json:"count" need:"yes" want:"0..1000000"`
	Low     float64 `json:"wastage_low" want:"0..1"`
	Median  float64 `json:"wastage" want:"0..1"`
	High    float64 `json:"wastage_high" want:"0..1"`
}

// SetKey tells the sets of an asset apart.
type SetKey struct {
	Zone, Pattern string
	Fitted        Date
}

// Key returns which set the fact is about.
func (f Fact) Key() SetKey { return SetKey{f.Zone, f.Pattern, f.Fitted} }

// FittedSets returns the sets that follow from a ledger, by zone, in the order
// in which the ledger first names them: fitted adds pieces, removed takes them
// off, found replaces count and wastage. A fault names the fact that takes off
// more than there is.
func FittedSets(ledger []Fact) (map[string][]Fitted, Faults) {
	var faults Faults
	sets, places := map[string][]Fitted{}, map[SetKey]int{}
	for i, f := range ledger {
		at, known := places[f.Key()]
		if !known {
			at = len(sets[f.Zone])
			places[f.Key()] = at
			sets[f.Zone] = append(sets[f.Zone], Fitted{Pattern: f.Pattern, Fitted: f.Fitted})
		}
		s := &sets[f.Zone][at]
		switch f.Deed {
		case WasFitted:
			s.join(f.Count, 0)
		case WasFound:
			s.Count, s.Wastage = f.Count, f.Wastage
		case WasRemoved:
			if f.Count > s.Count {
				faults.add(fmt.Sprintf("ledger[%d].count", i), fmt.Sprintf("at most the %d pieces that the ledger leaves of %s fitted on %s in %s", s.Count, f.Pattern, f.Fitted, f.Zone), "%d", f.Count)
			}
			s.Count = max(0, s.Count-f.Count)
		}
	}
	for zone, all := range sets {
		sets[zone] = slices.DeleteFunc(all, func(s Fitted) bool { return s.Count == 0 })
		if len(sets[zone]) == 0 {
			delete(sets, zone)
		}
	}
	return sets, faults
}

// join adds pieces to a set; its wastage becomes their common mean.
func (f *Fitted) join(count int, wastage float64) {
	n := f.Count + count
	if n > 0 {
		f.Wastage = (float64(f.Count)*f.Wastage + float64(count)*wastage) / float64(n)
	}
	f.Count = n
}

// joined returns sets with those of one pattern and fitting date as one, which
// is how a ledger knows them.
func joined(sets []Fitted) []Fitted {
	var all []Fitted
	places := map[SetKey]int{}
	for _, f := range sets {
		key := SetKey{"", f.Pattern, f.Fitted}
		at, known := places[key]
		if !known {
			places[key] = len(all)
			all = append(all, f)
			continue
		}
		all[at].join(f.Count, f.Wastage)
	}
	return all
}

// sameSets reports whether two zones carry the same, in whatever order. Each of
// their sets is there once.
func sameSets(x, y []Fitted) bool {
	if len(x) != len(y) {
		return false
	}
	of := map[SetKey]Fitted{}
	for _, f := range y {
		of[SetKey{"", f.Pattern, f.Fitted}] = f
	}
	for _, f := range x {
		if !f.same(of[SetKey{"", f.Pattern, f.Fitted}]) {
			return false
		}
	}
	return true
}

func (f Fitted) same(s Fitted) bool {
	return f.Pattern == s.Pattern && f.Fitted == s.Fitted && f.Count == s.Count && math.Abs(f.Wastage-s.Wastage) < 1e-9
}

// setWords writes sets for a fault: 24 al-45 fitted on 2024-03-15, 10 % wasted.
func setWords(sets []Fitted) string {
	var parts []string
	for _, f := range sets {
		s := fmt.Sprintf("%d %s fitted on %s", f.Count, f.Pattern, f.Fitted)
		if f.Wastage > 0 {
			s += fmt.Sprintf(", %.4g %% wasted", 100*f.Wastage)
		}
		parts = append(parts, s)
	}
	if parts == nil {
		return "nothing"
	}
	return strings.Join(parts, "; ")
}

// Opening returns the facts with which the ledger of an asset begins: what it
// carries at its last docking, as its zones say.
func Opening(a *Asset) (facts []Fact) {
	for _, z := range a.Zones {
		for _, f := range joined(z.Fitted) {
			fact := Fact{Date: f.Fitted, Deed: WasFitted, Zone: z.ID, Pattern: f.Pattern, Fitted: f.Fitted, Count: f.Count, Note: "opening"}
			facts = append(facts, fact)
			if f.Wastage > 0 || f.Fitted < a.Start() {
				fact.Date, fact.Deed, fact.Wastage = a.Start(), WasFound, f.Wastage
				facts = append(facts, fact)
			}
		}
	}
	return facts
}

// Correct adds to an asset's ledger what makes it agree with what the zones
// say is fitted, after somebody changed that: facts of what was found at the
// last docking. An asset without a ledger stays as it is.
func Correct(a *Asset, by, note string) {
	if len(a.Ledger) == 0 {
		return
	}
	sets, _ := FittedSets(a.Ledger)
	found := func(zone string, f Fitted, count int) {
		a.Ledger = append(a.Ledger, Fact{
			Date: max(a.Start(), f.Fitted), Deed: WasFound, Zone: zone, Pattern: f.Pattern, Fitted: f.Fitted,
			Count: count, Wastage: f.Wastage, By: by, Note: note,
		})
	}
	correct := func(zone string, want []Fitted) {
		for _, f := range sets[zone] {
			if !slices.ContainsFunc(want, func(s Fitted) bool { return s.Pattern == f.Pattern && s.Fitted == f.Fitted }) {
				found(zone, f, 0)
			}
		}
		for _, f := range want {
			if !slices.ContainsFunc(sets[zone], f.same) {
				found(zone, f, f.Count)
			}
		}
		delete(sets, zone)
	}
	for i := range a.Zones {
		z := &a.Zones[i]
		z.Fitted = joined(z.Fitted)
		correct(z.ID, z.Fitted)
	}
	for _, f := range slices.Clone(a.Ledger) { // zones that are there no more, in the ledger's order
		if len(sets[f.Zone]) > 0 {
			correct(f.Zone, nil)
		}
	}
}

// CleanedOn returns the dates, rising, on which the painted anodes of a zone
// were or will be cleaned: at closed dockings and those of the list.
func (a *Asset) CleanedOn(zone string) []Date {
	var dates []Date
	clean := func(w Work) bool { return w.Zone == zone && w.Coating == Clean }
	for _, d := range a.Closed {
		if slices.Contains(d.Cleaned, zone) || slices.ContainsFunc(d.Works, clean) {
			dates = append(dates, d.Date)
		}
	}
	for _, d := range a.Dockings {
		if slices.ContainsFunc(d.Works, clean) {
			dates = append(dates, d.Date)
		}
	}
	slices.Sort(dates)
	return slices.Compact(dates)
}

// ledger: facts of known things, in no order but that no more comes off than
// there is, and the zones' fitted sets as they follow from them.
func (c checker) ledger() {
	if len(c.a.Ledger) == 0 {
		return
	}
	sets, faults := FittedSets(c.a.Ledger)
	for i, f := range c.a.Ledger {
		path := fmt.Sprintf("ledger[%d]", i)
		if len(sets[f.Zone]) > 0 {
			c.zoneID(path+".zone", f.Zone) // of a zone taken out of the asset, nothing may be left
		}
		c.pattern(path+".pattern", f.Pattern)
		switch last := c.a.LastDocking; {
		case f.Date.IsZero() || f.Fitted.IsZero():
		case f.Fitted > f.Date:
			c.fs.add(path+".fitted", "a date not after the fact's own, "+f.Date.String(), "%s", f.Fitted)
		case !last.IsZero() && f.Date > last:
			c.fs.add(path+".date", "a date not after the last docking "+last.String()+"; what is seen later is a reading", "%s", f.Date)
		}
		if f.Deed != WasFound && f.Wastage != 0 {
			c.fs.add(path+".wastage", "nothing: only what was found states a wastage", "%v", f.Wastage)
		}
	}
	*c.fs = append(*c.fs, faults...)
	for i, z := range c.a.Zones {
		if want := sets[z.ID]; len(faults) == 0 && !sameSets(want, joined(z.Fitted)) {
			c.fs.add(fmt.Sprintf("zones[%d].fitted", i), "what follows from the ledger: "+setWords(want), "%s", setWords(z.Fitted))
		}
	}
}

// closed: dockings done, in their order, none after the last docking.
func (c checker) closed() {
	for i, d := range c.a.Closed {
		path := fmt.Sprintf("closed[%d]", i)
		switch {
		case d.Date.IsZero():
		case i > 0 && d.Date <= c.a.Closed[i-1].Date:
			c.fs.add(path+".date", "closed dockings in the order of their dates, each after "+c.a.Closed[i-1].Date.String(), "%s", d.Date)
		case d.Date > c.a.Start():
			c.fs.add(path+".date", "a date not after the last docking "+c.a.Start().String(), "%s", d.Date)
		}
		for j, w := range d.Works {
			c.work(fmt.Sprintf("%s.works[%d]", path, j), w)
		}
	}
}

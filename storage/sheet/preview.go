package sheet

import (
	"fmt"
	"reflect"
	"strings"

	"anodewright/anodes/survey"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// Preview is what a file says, before anything of it is stored.
type Preview struct {
	Asset    string    // the name on the sheet; empty in a CSV file without it
	Docking  hull.Date // the docking that the sheet was made for; 0: not said
	Readings []Understood
	Faults   []Fault  // cells that were not understood
	Warnings []string // about the file as a whole, and its sets
}

// Understood is one reading that was understood.
type Understood struct {
	Reading hull.Reading
	Boxes   []Box // where it comes from
	Status  Status
	Of      int      // the reading of the asset that it equals or differs from; -1: none
	Doubts  []string // what contradicts itself, for the surveyor to settle
}

// Status is what would become of a reading.
type Status int

// The statuses.
const (
	New     Status = iota // it is stored
	Differs               // it is stored, and can take the place of one of the set and day with other figures
	There                 // the same is stored already; nothing is to be done
	Faulty                // it cannot be stored
)

// String writes the status for people.
func (s Status) String() string {
	switch s {
	case New:
		return "new"
	case Differs:
		return "differs from one stored"
	case There:
		return "already there"
	}
	return "cannot be stored"
}

// ToStore returns the readings that are not there yet.
func (p *Preview) ToStore() (list []hull.Reading) {
	for _, u := range p.Readings {
		if u.Status == New || u.Status == Differs {
			list = append(list, u.Reading)
		}
	}
	return list
}

// Store adds to an asset the readings that are not there yet. Those that they
// differ from are withdrawn from that day on where correct says so: they are
// kept, and count no more. The preview is judged anew before.
func (p *Preview) Store(a *hull.Asset, today hull.Date, correct bool) {
	p.Judge(a, today)
	for _, u := range p.Readings {
		if u.Status != New && u.Status != Differs {
			continue
		}
		if u.Status == Differs && correct {
			r := &a.Readings[u.Of]
			r.Withdrawn = max(r.Date, today)
		}
		a.Readings = append(a.Readings, u.Reading)
	}
}

// Count returns how many readings have a status.
func (p *Preview) Count(s Status) (n int) {
	for _, u := range p.Readings {
		if u.Status == s {
			n++
		}
	}
	return n
}

func (p *Preview) fault(c content, why string) {
	p.Faults = append(p.Faults, Fault{Box: c.Box, Found: strings.TrimSpace(c.text), Why: why})
}

func (p *Preview) warn(format string, args ...any) {
	p.Warnings = append(p.Warnings, fmt.Sprintf(format, args...))
}

// Judge compares the readings with those of an asset: which are there already,
// which cannot be stored, and what contradicts itself. Before something is
// stored it is judged again, as the asset may have changed since.
func (p *Preview) Judge(a *hull.Asset, today hull.Date) {
	if !a.Today.IsZero() {
		today = a.Today
	}
	with := assetfile.Clone(a)
	own := map[int]int{} // place among the readings of with -> of p
	used := map[int]bool{}
	for i := range p.Readings {
		u := &p.Readings[i]
		u.Doubts, u.Of = nil, -1
		if u.Status == Faulty {
			continue
		}
		u.Status = New
		for k := range a.Readings {
			r := &a.Readings[k]
			if used[k] || !aboutTheSame(&u.Reading, r) {
				continue
			}
			if same(&u.Reading, r) {
				u.Status, u.Of = There, k
				break
			}
			if u.Of < 0 && survey.Stands(r) {
				u.Status, u.Of = Differs, k
			}
		}
		if u.Of >= 0 {
			used[u.Of] = true
		}
		if u.Status == There {
			if r := &a.Readings[u.Of]; !survey.Stands(r) {
				u.Doubts = append(u.Doubts, fmt.Sprintf("It is there, but was withdrawn on %s.", r.Withdrawn))
			}
			continue
		}
		own[len(with.Readings)] = i
		with.Readings = append(with.Readings, u.Reading)
	}
	for _, f := range hull.Check(with) {
		k := -1
		if n, _ := fmt.Sscanf(f.Path, "readings[%d]", &k); n != 1 {
			continue
		}
		i, ok := own[k]
		if !ok || p.Readings[i].Status == Faulty {
			continue
		}
		_, field, _ := strings.Cut(f.Path, "]")
		f.Path = strings.TrimPrefix(field, ".")
		p.Readings[i].Status = Faulty
		p.Faults = append(p.Faults, Fault{Box: p.Readings[i].Boxes[0], Why: f.Error()})
	}
	for _, q := range survey.Questions(with, today) {
		if i, ok := own[q.Reading]; ok {
			p.Readings[i].Doubts = append(p.Readings[i].Doubts, q.Text)
		}
	}
}

// aboutTheSame reports whether two readings are of one set and day and tell of
// it in the same way.
func aboutTheSame(x, y *hull.Reading) bool {
	return x.Date == y.Date && x.Zone == y.Zone && x.Pattern == y.Pattern && x.Fitted == y.Fitted && kind(x) == kind(y)
}

// kind is how a reading tells of wastage.
func kind(r *hull.Reading) string {
	switch {
	case len(r.WeighedWastage) > 0:
		return "weighed"
	case len(r.Measured) > 0:
		return "measured"
	case len(r.Percent) > 0:
		return "seen"
	case r.Grades != nil:
		return "graded"
	}
	return ""
}

// same reports whether two readings say the same. Who found it and by which
// means does not matter, nor whether it was withdrawn since.
func same(x, y *hull.Reading) bool {
	a, b := bare(x), bare(y)
	return reflect.DeepEqual(a, b)
}

// bare is a reading without what same leaves aside, and without lists that are
// there but empty.
func bare(r *hull.Reading) hull.Reading {
	b := *r
	b.By, b.How, b.Withdrawn = "", "", 0
	v := reflect.ValueOf(&b).Elem()
	for i := range v.NumField() {
		if f := v.Field(i); f.Kind() == reflect.Slice && f.Len() == 0 {
			f.SetZero()
		}
	}
	b.Potentials = nil
	for _, m := range r.Potentials {
		if m.Electrode == "" {
			m.Electrode = hull.SilverChloride
		}
		b.Potentials = append(b.Potentials, m)
	}
	return b
}

// setsNow compares the sets of a sheet with those that are fitted.
func (p *Preview) setsNow(a *hull.Asset, keys []key) {
	told := map[key]bool{}
	for _, k := range keys {
		k.part = countPart
		if told[k] || k.pattern == "" {
			continue
		}
		told[k] = true
		z, ok := a.Zone(k.zone)
		if !ok {
			p.warn("The zone %s is no longer there.", k.zone)
			continue
		}
		i := survey.Set(z, &hull.Reading{Pattern: k.pattern, Fitted: k.fitted})
		switch {
		case i < 0:
			p.warn("%s: the %d pieces of %s fitted on %s are no longer fitted.", z.Name, k.count, k.pattern, k.fitted)
		case k.count > 0 && z.Fitted[i].Count != k.count:
			p.warn("%s: the sheet has %d pieces of %s fitted on %s, now there are %d.", z.Name, k.count, k.pattern, k.fitted, z.Fitted[i].Count)
		}
	}
}

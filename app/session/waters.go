package session

import (
	"errors"
	"fmt"

	"anodewright/app/say"
	"anodewright/hull"
	reference "anodewright/hull/water"
)

// AddWaterFrom adds a copy of an entry of the reference tables to the open
// asset's waters, to be edited like any other, and returns its place. The
// copy has the entry's mean figures; temperature, where given, wins over the
// table's. medium is that of the zones that will lie in it; empty: the
// entry's. A river may be copied as seawater, for zones that also lie in the
// sea.
func (s *Session) AddWaterFrom(e reference.Entry, temperature *float64, medium hull.Medium) (int, error) {
	at := -1
	err := s.Do("add "+e.Name, func(a *hull.Asset) error {
		w, err := waterFrom(a, e, temperature, medium)
		if err != nil {
			return err
		}
		at = len(a.Waters)
		a.Waters = append(a.Waters, w)
		return nil
	})
	if err != nil {
		return -1, err
	}
	return at, nil
}

// waterFrom makes a water of an entry, with an id that the asset has free.
func waterFrom(a *hull.Asset, e reference.Entry, temperature *float64, medium hull.Medium) (hull.Water, error) {
	w := hull.Water{Name: e.Name, ID: freeWaterID(a, e.ID)}
	hull.SetDefaults(&w)
	w.Medium = hull.Medium(e.Medium)
	if medium != "" && medium != w.Medium {
		if w.Medium != hull.Fresh || medium != hull.Seawater {
			return w, fmt.Errorf("%s is %s: it cannot be copied as %s", e.Name, e.Medium, medium)
		}
		w.Medium = medium
	}
	switch {
	case e.Stated:
		w.Resistivity = copyOf(e.Resistivity.Mean)
	case e.Conductivity25 != nil:
		w.Conductivity25 = copyOf(e.Conductivity25.Mean)
	default:
		w.Salinity = copyOf(e.Salinity.Mean)
	}
	switch {
	case temperature != nil:
		w.Temperature = copyOf(*temperature)
	case e.Temperature != nil:
		w.Temperature = copyOf(e.Temperature.Mean)
	case NeedsTemperature(e):
		return w, errors.New("the table has no temperature for " + e.Name + ": enter its annual mean")
	}
	return w, nil
}

// NeedsTemperature reports whether an entry can be copied only with a
// temperature that the user gives: the table has none, and resistivity or
// climate follow from it.
func NeedsTemperature(e reference.Entry) bool {
	return e.Temperature == nil && (!e.Stated || e.Medium == string(hull.Seawater) || e.Medium == string(hull.Fresh))
}

func copyOf(x float64) *float64 { return &x }

// freeWaterID returns the id, or the first of id-2, id-3 and so on that no
// water has.
func freeWaterID(a *hull.Asset, id string) string {
	free := id
	for n := 2; ; n++ {
		if _, taken := a.Water(free); !taken {
			return free
		}
		free = fmt.Sprintf("%s-%d", id, n)
	}
}

// RangeText writes a range of SI figures in the unit shown, with its mean: "7.08 (6.18–8.70)"; a dash for one
// that is not known, and the mean alone where nothing ranges.
func RangeText(q say.Quantity, r *reference.Range, decimals int) string {
	switch {
	case r == nil:
		return "–"
	case r.Low == r.High:
		return Shown(q, r.Mean, decimals)
	}
	return Shown(q, r.Mean, decimals) + " (" + Shown(q, r.Low, decimals) + "–" + Shown(q, r.High, decimals) + ")"
}

// ResistivityText writes a range of resistivity in ohm m with the decimals
// that it deserves.
func ResistivityText(r reference.Range) string {
	decimals := 3
	switch {
	case r.Mean >= 100:
		decimals = 0
	case r.Mean >= 10:
		decimals = 1
	case r.Mean >= 1:
		decimals = 2
	}
	return RangeText(say.Resistivity, &r, decimals)
}

// WaterNote says what follows from the i-th water of an asset: its
// resistivity and climate, and the range of the table's entry of its name.
func WaterNote(a *hull.Asset, i int) string {
	if a == nil || i < 0 || i >= len(a.Waters) {
		return ""
	}
	w := &a.Waters[i]
	text := fmt.Sprintf("%s: %s %s", w.ID, ResistivityText(reference.Range{Low: w.Resist(), Mean: w.Resist(), High: w.Resist()}), say.Resistivity.Unit())
	if w.Resistivity == nil && w.Temperature != nil {
		text += " " + say.T("at %s", ShownWith(say.Temperature, *w.Temperature, 1))
	}
	switch {
	case w.Medium == hull.Soil:
		text += ", " + say.T(reference.Severity(w.Resist()))
	case w.Medium == hull.Seawater && w.Climate() != "":
		text += ", " + say.T("climate %s", say.T(w.Climate()))
	}
	e, ok := reference.Find(w.Name)
	if !ok {
		e, ok = reference.Find(w.ID)
	}
	if ok {
		text += ". " + say.T("Table: %s %s; %s (%s)", ResistivityText(e.Resistivity), say.Resistivity.Unit(), say.Sentence(e.Source), say.Sentence(e.Confidence))
	}
	return text + "."
}

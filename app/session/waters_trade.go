package session

import (
	"errors"
	"fmt"
	"slices"
	"strings"

	"anodewright/hull"
	reference "anodewright/hull/water"
	"anodewright/storage/assetfile"
	"anodewright/storage/trade"
)

// TradePlace is a place of a trading pattern with the water that the user
// takes it for: one of the asset's, an entry of the table to be copied, or
// none. Undecided places have neither and are not left out.
type TradePlace struct {
	Name    string
	Days    float64
	Water   string // id of an asset's water
	Entry   string // id of an entry of the table
	LeftOut bool
}

// Decided reports whether it is known what to do with the place.
func (p TradePlace) Decided() bool { return p.Water != "" || p.Entry != "" || p.LeftOut }

// Trade is a trading pattern as it is to be used: for which zones, and either
// as their waters or, from a date on, as a change of service.
type Trade struct {
	Places []TradePlace
	Zones  []string // ids
	From   hull.Date
}

// Places returns the places of a pattern with the waters found for them, those
// that are not known undecided.
func Places(p trade.Pattern, a *hull.Asset) []TradePlace {
	var places []TradePlace
	for _, m := range p.Match(a) {
		places = append(places, TradePlace{Name: m.Name, Days: m.Days, Water: m.Water, Entry: m.Entry})
	}
	return places
}

// ApplyTrade gives the zones of the open asset the shares of a trading
// pattern, copying what it needs from the table, in one step.
func (s *Session) ApplyTrade(t Trade) error {
	return s.Do("trading pattern", func(a *hull.Asset) error { return t.apply(a) })
}

// Preview returns the shares that ApplyTrade would give, as text, or why it
// would not.
func (t Trade) Preview(a *hull.Asset) (string, error) {
	next := assetfile.Clone(a)
	if err := t.apply(next); err != nil {
		return "", err
	}
	if err := hull.Check(next).Err(); err != nil {
		return "", err
	}
	z, _ := next.Zone(t.Zones[0])
	if t.From.IsZero() {
		return sharesText(z.Waters), nil
	}
	shares, _ := next.ServiceAt(z, t.From)
	return sharesText(shares), nil
}

func (t Trade) apply(a *hull.Asset) error {
	var open []string
	for _, p := range t.Places {
		if !p.Decided() {
			open = append(open, p.Name)
		}
	}
	if open != nil {
		return errors.New("not known: " + strings.Join(open, ", ") + ". Choose the water that each is, or leave it out")
	}
	medium, err := t.medium(a)
	if err != nil {
		return err
	}
	var weights []trade.Weight
	copies := map[string]string{} // ids of waters by ids of entries
	for _, p := range t.Places {
		if p.LeftOut {
			continue
		}
		id := p.Water
		if id == "" {
			if id = copies[p.Entry]; id == "" {
				w, err := tradeWater(a, p.Entry, medium)
				if err != nil {
					return err
				}
				id, copies[p.Entry] = w.ID, w.ID
				a.Waters = append(a.Waters, w)
			}
		} else if w, ok := a.Water(id); !ok {
			return fmt.Errorf("%s: the asset has no water %s", p.Name, id)
		} else if w.Medium != medium {
			return fmt.Errorf("%s is %s, and the zones lie in %s: choose another water for %s, or a copy of the table's", id, w.Medium, medium, p.Name)
		}
		weights = append(weights, trade.Weight{Water: id, Days: p.Days})
	}
	shares := trade.Shares(weights)
	if shares == nil {
		return errors.New("want at least one place that is not left out")
	}
	for i := range a.Zones {
		if z := &a.Zones[i]; slices.Contains(t.Zones, z.ID) {
			if t.From.IsZero() {
				z.Waters = slices.Clone(shares)
			} else {
				z.Service = withChange(z.Service, t.From, slices.Clone(shares))
			}
		}
	}
	return nil
}

// medium returns the one medium of the zones.
func (t Trade) medium(a *hull.Asset) (hull.Medium, error) {
	var medium hull.Medium
	for _, id := range t.Zones {
		z, ok := a.Zone(id)
		if !ok {
			return "", errors.New("the asset has no zone " + id)
		}
		m := a.Medium(z)
		if medium != "" && m != medium {
			return "", fmt.Errorf("want zones in one medium: %s lies in %s, others in %s", z.Name, m, medium)
		}
		medium = m
	}
	if medium == "" {
		return "", errors.New("want at least one zone")
	}
	return medium, nil
}

// tradeWater copies an entry of the table for zones in a medium.
func tradeWater(a *hull.Asset, entry string, medium hull.Medium) (hull.Water, error) {
	e, ok := reference.Find(entry)
	if !ok {
		return hull.Water{}, errors.New("the table has no " + entry)
	}
	return waterFrom(a, e, nil, medium)
}

// withChange puts a change of waters into a list in the order of its dates. A
// change of that date keeps its under-way factor.
func withChange(ss []hull.Service, from hull.Date, shares []hull.WaterShare) []hull.Service {
	i := 0
	for ; i < len(ss) && ss[i].From <= from; i++ {
		if ss[i].From == from {
			changed := slices.Clone(ss)
			changed[i].Waters = shares
			return changed
		}
	}
	return slices.Insert(slices.Clone(ss), i, hull.Service{From: from, Waters: shares})
}

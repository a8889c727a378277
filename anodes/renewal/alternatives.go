package renewal

import (
	"maps"
	"math"
	"slices"
)

// Alternative is the cheapest plan that does something else with a zone at a
// docking than the best plan does.
type Alternative struct {
	Instead Line // of the best plan
	Does    Pin
	Total   float64
}

// Alternatives returns for every renewal and add of the best plan the cheapest
// plan with another action or another pattern there, where one costs at most a
// share within more than the best. Pinned actions have no alternative.
func (p Problem) Alternatives(best Plan, within float64) []Alternative {
	s := newSolver(p)
	pins := make([]Pinned, len(p.Pins))
	for i, pin := range p.Pins {
		pins[i].Pin = pin
	}
	at := s.place(pins)
	if _, unmet := s.prepare(at); len(unmet) > 0 || best.Total <= 0 {
		return nil
	}
	for i, why := range s.refused {
		if why != "" {
			for _, pins := range at {
				maps.DeleteFunc(pins, func(_, n int) bool { return n == i })
			}
		}
	}
	// The last pin is the one that is tried.
	tried := len(s.Pins)
	s.Pins = append(slices.Clone(s.Pins), Pin{})
	s.refused = append(s.refused, "")
	var all []Alternative
	for _, l := range best.Lines {
		if _, pinned := at[l.Zone][l.Docking+1]; pinned || l.Action == Keep {
			continue
		}
		here := slices.Clone(at)
		here[l.Zone] = map[int]int{l.Docking + 1: tried}
		maps.Copy(here[l.Zone], at[l.Zone])
		found := Alternative{Instead: l, Total: math.Inf(1)}
		limit := best.Total * (1 + within)
		for _, does := range s.others(l) {
			s.Pins[tried], s.refused[tried] = does, ""
			for key := range s.known {
				if s.known[key].z.index == l.Zone {
					delete(s.known, key) // listed with another pin tried
				}
			}
			total := s.total(here, limit)
			if s.refused[tried] == "" && total < found.Total-tie {
				found.Does, found.Total = does, total
				limit = total
			}
		}
		for key := range s.known {
			if s.known[key].z.index == l.Zone {
				delete(s.known, key)
			}
		}
		if !math.IsInf(found.Total, 1) {
			all = append(all, found)
		}
	}
	return all
}

// others are the pins that do something else than a line.
func (s *solver) others(l Line) []Pin {
	p := Pin{Zone: s.Asset.Zones[l.Zone].ID, Docking: l.Date, Action: Keep}
	pins := []Pin{p}
	for _, m := range s.zones[l.Zone].offered {
		for _, p.Action = range []Action{Renew, Add} {
			p.Pattern = m.p.ID
			if p.Action != l.Action || p.Pattern != l.Pattern.ID {
				pins = append(pins, p)
			}
		}
	}
	return pins
}

package trade

import (
	"math"
	"slices"
	"strings"

	"anodewright/hull"
	"anodewright/hull/water"
)

// Match is one place of a pattern and the water that it is.
type Match struct {
	Name  string
	Days  float64 // of all its stays
	Share float64 // of the pattern's days
	Lines []int   // of the file
	Water string  // id of the asset's water of this name or id
	Entry string  // else id of the reference table's entry of this name or id
	Why   string  // else why it is not known
}

// Match adds up the stays by place, in the order of the file, and looks each
// place up by its exact name or id, whatever the case of its letters: first
// among the asset's waters, then in the reference table of sea areas, rivers
// and lakes. Nothing is guessed.
func (p Pattern) Match(a *hull.Asset) []Match {
	var ms []Match
	total := 0.0
	at := map[string]int{}
	for _, s := range p.Stays {
		key := strings.ToLower(s.Name)
		i, seen := at[key]
		if !seen {
			i = len(ms)
			at[key] = i
			ms = append(ms, Match{Name: s.Name})
		}
		ms[i].Days += s.Days
		ms[i].Lines = append(ms[i].Lines, s.Line)
		total += s.Days
	}
	for i := range ms {
		ms[i].Share = ms[i].Days / total
		ms[i].lookUp(a)
	}
	return ms
}

func (m *Match) lookUp(a *hull.Asset) {
	byName := 0
	for i := range a.Waters {
		w := &a.Waters[i]
		if strings.EqualFold(w.ID, m.Name) {
			m.Water = w.ID
			return
		}
		if w.Name != "" && strings.EqualFold(w.Name, m.Name) {
			m.Water = w.ID
			byName++
		}
	}
	switch {
	case byName == 1:
		return
	case byName > 1:
		m.Water, m.Why = "", "several waters of the asset have this name"
		return
	}
	e, ok := water.Find(m.Name)
	switch {
	case !ok || e.Medium != string(hull.Seawater) && e.Medium != string(hull.Fresh):
		m.Why = "neither a water of the asset nor in the table"
	case e.Temperature == nil:
		m.Why = "the table has no temperature for it: add it as a water first"
	default:
		m.Entry = e.ID
	}
}

// Weight is the days that a pattern gives to a water.
type Weight struct {
	Water string
	Days  float64
}

// Shares turns days into shares of waters that add up to 1: in hundredths of
// a per cent by largest remainders, each water once, at least one hundredth.
func Shares(ws []Weight) []hull.WaterShare {
	const units = 10000
	var sum []Weight
	total := 0.0
	for _, w := range ws {
		if !(w.Days > 0) {
			continue
		}
		total += w.Days
		if i := slices.IndexFunc(sum, func(s Weight) bool { return s.Water == w.Water }); i >= 0 {
			sum[i].Days += w.Days
		} else {
			sum = append(sum, w)
		}
	}
	parts, rests := make([]int, len(sum)), make([]float64, len(sum))
	left := units
	for i, w := range sum {
		exact := w.Days / total * units
		parts[i] = max(1, int(math.Floor(exact)))
		rests[i] = exact - float64(parts[i])
		left -= parts[i]
	}
	for ; left != 0 && len(sum) > 0; left -= sign(left) {
		best := 0
		for i := range sum {
			if left > 0 && rests[i] > rests[best] || left < 0 && parts[i] > parts[best] {
				best = i
			}
		}
		parts[best] += sign(left)
		rests[best] -= float64(sign(left))
	}
	var shares []hull.WaterShare
	for i, w := range sum {
		shares = append(shares, hull.WaterShare{Water: w.Water, Share: float64(parts[i]) / units})
	}
	return shares
}

func sign(n int) int {
	if n < 0 {
		return -1
	}
	return 1
}

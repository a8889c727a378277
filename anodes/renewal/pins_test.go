package renewal

import (
	"math"
	"math/rand/v2"
	"slices"
	"strings"
	"testing"

	"anodewright/hull"
)

// problem is that of an asset by its own demand and a demand factor of 1.
func problem(a *hull.Asset, pins ...Pin) Problem {
	p := Problem{Asset: a, Pins: pins}
	for _, d := range hull.Demand(a) {
		p.Demand, p.Factors = append(p.Demand, d.Total), append(p.Factors, 1)
	}
	return p
}

// holds reports whether the actions of one zone leave a pin as it is.
func (p Pin) holds(a *hull.Asset, lines []Line) bool {
	for _, l := range lines {
		if a.Zones[l.Zone].ID == p.Zone && l.Date == p.Docking && l.Action != Keep {
			return l.Action == p.Action && l.Pattern.ID == p.Pattern
		}
	}
	return p.Action == Keep
}

// Under any pins the plan is the cheapest of all plans that can be listed and
// leave them as they are, and each pin costs what is saved without it.
func TestPinnedPlanIsTheCheapestOfAll(t *testing.T) {
	solved, refused, dear := 0, 0, 0
	for seed := range uint64(700) {
		a := randomAsset(t, seed, 1+int(seed%4), seed%7 == 0)
		r := rand.New(rand.NewPCG(seed, 2))
		var pins []Pin
		for range 1 + r.IntN(3) {
			p := Pin{Zone: a.Zones[r.IntN(len(a.Zones))].ID, Docking: a.Ahead()[r.IntN(len(a.Ahead()))].Date, Action: []Action{Keep, Renew, Add}[r.IntN(3)]}
			if p.Action != Keep {
				p.Pattern = a.Patterns[r.IntN(len(a.Patterns))].ID
			}
			same := func(q Pin) bool { return q.Zone == p.Zone && q.Docking == p.Docking }
			if !slices.ContainsFunc(pins, same) {
				pins = append(pins, p)
			}
		}
		_, zones := solve(a)
		cheapestOf := func(pins []Pin) (float64, bool) {
			per, all := make([][]candidate, len(zones)), 1
			for i, z := range zones {
				per[i] = candidates(a, z, func(ls []Line) bool {
					return !slices.ContainsFunc(pins, func(p Pin) bool { return p.Zone == z.z.ID && !p.holds(a, ls) })
				})
				all *= max(1, len(per[i]))
			}
			if all > 50_000 {
				return 0, false
			}
			best, _ := brute(a, zones, per)
			return best.total, true
		}
		free, ok := cheapestOf(nil)
		if !ok || math.IsInf(free, 1) {
			continue
		}
		got := problem(a, pins...).Solve()
		var stand []Pin
		for _, p := range got.Pins {
			if p.Refused == "" {
				stand = append(stand, p.Pin)
				continue
			}
			refused++
			if alone, _ := cheapestOf([]Pin{p.Pin}); !math.IsInf(alone, 1) && !strings.Contains(p.Refused, "together") {
				t.Errorf("seed %d: %+v is refused, but a plan of %v has it: %s", seed, p.Pin, alone, p.Refused)
			}
		}
		want, _ := cheapestOf(stand)
		near := 1e-6 * max(1, want)
		if math.Abs(got.Best.Total-want) > near || math.Abs(got.LowerBound-want) > near {
			t.Errorf("seed %d: %+v: total %v, bound %v, cheapest of all %v", seed, stand, got.Best.Total, got.LowerBound, want)
		}
		if math.Abs(got.Free-free) > near {
			t.Errorf("seed %d: the free total is %v, want %v", seed, got.Free, free)
		}
		for _, p := range stand {
			if !p.holds(a, got.Best.Lines) {
				t.Errorf("seed %d: the plan does not do %+v", seed, p)
			}
		}
		for _, p := range got.Pins {
			if p.Refused != "" {
				continue
			}
			without, _ := cheapestOf(slices.DeleteFunc(slices.Clone(stand), func(q Pin) bool { return p.Pin == q }))
			if math.Abs(p.Cost-(want-without)) > near || p.Cost < -near {
				t.Errorf("seed %d: %+v costs %v, want %v", seed, p.Pin, p.Cost, want-without)
			}
			if p.Cost > 1 {
				dear++
			}
		}
		solved++
	}
	t.Logf("%d solved, %d pins refused, %d at a cost", solved, refused, dear)
	if solved < 350 || refused < 60 || dear < 100 {
		t.Errorf("%d solved, %d pins refused, %d at a cost: too few to say anything", solved, refused, dear)
	}
}

// Pinning what the plan does anyway costs nothing; a larger count is kept. It
// may save money, since a set that the plan does not enlarge for it may then be
// added to.
func TestPinnedCounts(t *testing.T) {
	same, larger := 0, 0
	for seed := range uint64(300) {
		a := randomAsset(t, seed, 2+int(seed%3), false)
		free := problem(a).Solve()
		if len(free.Best.Unmet) > 0 {
			continue
		}
		for _, l := range free.Best.Lines {
			if l.Action == Keep {
				continue
			}
			p := Pin{Zone: a.Zones[l.Zone].ID, Docking: l.Date, Action: l.Action, Pattern: l.Pattern.ID, Count: l.Count}
			got := problem(a, p).Solve()
			if got.Pins[0].Refused != "" || math.Abs(got.Best.Total-free.Best.Total) > 1e-6 || math.Abs(got.Pins[0].Cost) > 1e-6 {
				t.Errorf("seed %d: pinning %+v gives %v and %+v, without %v", seed, p, got.Best.Total, got.Pins, free.Best.Total)
			}
			same++
			p.Count += a.Zones[l.Zone].CountMultiple
			got = problem(a, p).Solve()
			if got.Pins[0].Refused != "" {
				continue // more than may be fitted
			}
			larger++
			i := slices.IndexFunc(got.Best.Lines, func(k Line) bool { return k.Zone == l.Zone && k.Docking == l.Docking })
			if i < 0 || got.Best.Lines[i].Count != p.Count || math.Abs(got.Best.Total-free.Best.Total-got.Pins[0].Cost) > 1e-6 {
				t.Errorf("seed %d: pinning %+v gives %v at %v, without %v", seed, p, got.Best.Lines, got.Best.Total, free.Best.Total)
			}
		}
	}
	if same < 200 || larger < 150 {
		t.Errorf("only %d and %d compared", same, larger)
	}
}

// A pin that cannot stand says why, and the plan is made without it.
func TestPinsThatCannotStand(t *testing.T) {
	a := randomAsset(t, 8, 2, false)
	most := 400
	a.Zones = a.Zones[:1]
	a.Zones[0].MaxCount, a.Zones[0].MinCount, a.Zones[0].CountMultiple = &most, 0, 2
	a.Dockings[0].Kind = hull.InWater
	a.Patterns = a.Patterns[:1]
	a.Patterns[0].Afloat = false
	a.Dockings[1].Kind = hull.DryDock
	a.Zones[0].Fitted = []hull.Fitted{{Pattern: a.Patterns[0].ID, Count: 400, Fitted: a.LastDocking}}
	free := problem(a).Solve()
	if len(free.Best.Unmet) > 0 {
		t.Fatal(free.Best.Unmet)
	}
	zone, first, second := a.Zones[0].ID, a.Dockings[0].Date, a.Dockings[1].Date
	pattern := a.Patterns[0].ID
	for _, c := range []struct {
		pin  Pin
		want string
	}{
		{Pin{Zone: "none", Docking: first, Action: Keep}, "no such zone"},
		{Pin{Zone: zone, Docking: first + 1, Action: Keep}, "no docking ahead on this day"},
		{Pin{Zone: zone, Docking: first, Action: "paint"}, "want keep, renew or add"},
		{Pin{Zone: zone, Docking: first, Action: Renew, Pattern: "none"}, "not offered"},
		{Pin{Zone: zone, Docking: first, Action: Renew, Pattern: pattern}, "may not be fitted afloat"},
		{Pin{Zone: zone, Docking: second, Action: Renew, Pattern: pattern, Count: 33}, "no multiple of 2"},
		{Pin{Zone: zone, Docking: second, Action: Renew, Pattern: pattern, Count: 2}, "too few"},
		{Pin{Zone: zone, Docking: second, Action: Renew, Pattern: pattern, Count: 402}, "more than the 400"},
	} {
		got := problem(a, c.pin).Solve()
		if !strings.Contains(got.Pins[0].Refused, c.want) {
			t.Errorf("%+v: %q, want %q", c.pin, got.Pins[0].Refused, c.want)
		}
		if math.Abs(got.Best.Total-free.Best.Total) > 1e-9 || !math.IsNaN(got.Pins[0].Cost) {
			t.Errorf("%+v: total %v and cost %v, want %v and none", c.pin, got.Best.Total, got.Pins[0].Cost, free.Best.Total)
		}
	}
}

// A pin without a pattern leaves the choice of the pattern open: pinned as the
// plan has it, nothing changes.
func TestPinWithoutAPattern(t *testing.T) {
	pinned := 0
	for seed := range uint64(40) {
		a := randomAsset(t, seed, 2, false)
		free := problem(a).Solve()
		if len(free.Best.Unmet) > 0 {
			continue
		}
		for _, l := range free.Best.Lines {
			if l.Action == Keep {
				continue
			}
			pinned++
			r := problem(a, Pin{Zone: a.Zones[l.Zone].ID, Docking: l.Date, Action: l.Action}).Solve()
			if len(r.Pins) != 1 || r.Pins[0].Refused != "" || math.Abs(r.Best.Total-free.Best.Total) > 1e-6*max(1, free.Best.Total) {
				t.Errorf("seed %d, %s of %s: %+v, total %.2f, want %.2f", seed, l.Action, a.Zones[l.Zone].ID, r.Pins, r.Best.Total, free.Best.Total)
			}
		}
	}
	if pinned < 20 {
		t.Errorf("only %d actions were pinned", pinned)
	}
}

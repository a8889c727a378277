package plan_test

import (
	"math"
	"slices"
	"strings"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/anodes/renewal"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

var december = hull.NewDate(2026, 12, 1)

// decided returns an asset's plan, its decisions, and one of them by the
// beginning of its text.
func decided(t *testing.T, demo int) (*hull.Asset, *plan.Outcome, func(text string) plan.Decision) {
	t.Helper()
	a, err := assetfile.Decode(assets.Demo()[demo])
	if err != nil {
		t.Fatal(err)
	}
	o := plan.Compute(a, december)
	all := plan.Decisions(o)
	return a, o, func(text string) plan.Decision {
		t.Helper()
		for _, d := range all {
			if strings.HasPrefix(d.Text, text) {
				return d
			}
		}
		t.Fatalf("nothing is said of %q in %+v", text, all)
		return plan.Decision{}
	}
}

func same(t *testing.T, what string, got, want float64) {
	t.Helper()
	if !(math.Abs(got-want) <= 1e-6*max(1, math.Abs(want))) {
		t.Errorf("%s: %v, want %v", what, got, want)
	}
}

// A docking left out costs what the plan costs with nothing pinned there.
func TestDecisionsOnDockings(t *testing.T) {
	a, o, find := decided(t, 0)
	left := 0
	for _, docking := range a.Ahead() {
		var pins []renewal.Pin
		for i := range a.Zones {
			if _, own := a.Zones[i].Hold().(hull.ByAnodes); own {
				pins = append(pins, renewal.Pin{Zone: a.Zones[i].ID, Docking: docking.Date, Action: renewal.Keep})
			}
		}
		pinned := plan.Compute(a, december, plan.WithPins(pins))
		stand := 0
		for _, p := range pinned.Pins {
			if p.Refused == "" {
				stand++
			}
		}
		if stand < len(pins) {
			if d := find(docking.Date.String() + " cannot be left out"); !math.IsNaN(d.Difference) {
				t.Errorf("%s: difference %v", d.Text, d.Difference)
			}
			continue
		}
		if pinned.Money.Total > o.Money.Total+1e-6 {
			left++
			same(t, docking.Date.String(), find("no anodes fitted on "+docking.Date.String()).Difference, pinned.Money.Total-o.Money.Total)
		}
	}
	if left < 2 {
		t.Errorf("only %d dockings can be left out at a cost", left)
	}
	less := find("one docking less").Difference
	same(t, "one docking less", less, find("no anodes fitted on 2029-10-29").Difference)
	if less > find("no anodes fitted on 2032-04-26").Difference {
		t.Errorf("one docking less costs %v, more than to leave out one of them", less)
	}
}

// One pattern only costs what the asset costs that has no other.
func TestDecisionOnOnePattern(t *testing.T) {
	a, o, find := decided(t, 2)
	least := math.Inf(1)
	for i := range a.Patterns {
		b, everywhere := assetfile.Clone(a), true
		for k := range b.Zones {
			z := &b.Zones[k]
			if _, own := z.Hold().(hull.ByAnodes); own {
				everywhere = everywhere && (len(z.Patterns) == 0 || slices.Contains(z.Patterns, b.Patterns[i].ID))
				z.Patterns = []string{b.Patterns[i].ID}
			}
		}
		if !everywhere {
			continue
		}
		if p := plan.Compute(b, december); len(p.Unmet) == 0 {
			least = min(least, p.Money.Total)
		}
	}
	same(t, "one pattern", find("one pattern only, Stand-off 290 kg").Difference, least-o.Money.Total)
}

// The price of confidence is that of the asset with another confidence.
func TestDecisionsOnConfidence(t *testing.T) {
	a, o, find := decided(t, 3)
	for _, c := range []struct {
		text string
		at   float64
	}{{"every zone at 60 %", 0.6}, {"every zone at 95 %", 0.95}, {"every zone at 99 %", 0.99}} {
		b := assetfile.Clone(a)
		b.Basis.Confidence = &c.at
		same(t, c.text, find(c.text).Difference, plan.Compute(b, december).Money.Total-o.Money.Total)
	}
	all, alone := find("every zone at 99 %").Difference, find("Sheet-pile return wall, water side alone at 99 %").Difference
	if alone <= 0 || alone >= all {
		t.Errorf("one zone alone costs %v of %v", alone, all)
	}
}

// The regret is what holding on to the first order costs once the dates have
// moved: never less than nothing, and what pins make of it.
func TestDecisionsOnMovedDates(t *testing.T) {
	a, o, find := decided(t, 2)
	d := find("horizon 30 months later")
	b := assetfile.Clone(a)
	b.Horizon = b.Horizon.AddMonths(30)
	best := plan.Compute(b, december)
	var pins []renewal.Pin
	for _, l := range o.Schedule {
		if l.Docking == 0 && l.Action != renewal.Keep {
			pin := o.Pin(l.Zone, l.Docking)
			pin.Count = l.Count
			pins = append(pins, pin)
		}
	}
	held := plan.Compute(b, december, plan.WithPins(pins))
	same(t, d.Text, d.Difference, held.Money.Total-best.Money.Total)
	if !(d.Difference > 0) || !strings.Contains(d.Text, "instead of 39 × pod-6x180 + 41 × standoff-290") {
		t.Errorf("%+v", d)
	}
	_, _, find = decided(t, 4)
	if d := find("next docking six months later (2027-10-12)"); d.Difference != 0 || !strings.Contains(d.Text, "stays 14 × rod-mg-15") {
		t.Errorf("%+v", d)
	}
	_, _, find = decided(t, 3)
	if d := find("next docking six months later"); !math.IsNaN(d.Difference) || !strings.Contains(d.Text, "6 pieces of standoff-127 are too few: 8 are needed") {
		t.Errorf("%+v", d)
	}
}

// Next-best plans cost at most 3 % more, and what pins make of them.
func TestNextBestPlans(t *testing.T) {
	a, o, _ := decided(t, 1)
	n := 0
	for _, d := range plan.Decisions(o) {
		if d.Topic != plan.NextBest {
			continue
		}
		n++
		if d.Difference < 0 || d.Difference > 0.03*o.Money.Total {
			t.Errorf("%+v of a total of %v", d, o.Money.Total)
		}
	}
	if n < 3 {
		t.Fatalf("only %d", n)
	}
	_, _, find := decided(t, 1)
	d := find("2029-06-04, Water ballast tank 4 starboard: do nothing")
	for i := range a.Zones {
		if a.Zones[i].Name == "Water ballast tank 4 starboard" {
			pin := renewal.Pin{Zone: a.Zones[i].ID, Docking: hull.NewDate(2029, 6, 4), Action: renewal.Keep}
			same(t, d.Text, d.Difference, plan.Compute(a, december, plan.WithPins([]renewal.Pin{pin})).Money.Total-o.Money.Total)
		}
	}
}

// A pin of a zone that was removed since stands for nothing, also with dates
// moved.
func TestDecisionsWithAPinOfAZoneThatIsGone(t *testing.T) {
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			t.Fatal(err)
		}
		var pins []renewal.Pin
		for _, d := range a.Dockings {
			pins = append(pins,
				renewal.Pin{Zone: "gone", Docking: d.Date, Action: renewal.Keep},
				renewal.Pin{Zone: "gone", Docking: d.Date.AddMonths(6), Action: renewal.Keep})
		}
		without := plan.Decisions(plan.Compute(a, december))
		with := plan.Decisions(plan.Compute(a, december, plan.WithPins(pins)))
		if len(with) < len(without) {
			t.Errorf("%s: %d decisions with such pins, %d without", a.Name, len(with), len(without))
		}
	}
}

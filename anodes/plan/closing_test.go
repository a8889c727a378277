package plan_test

import (
	"math"
	"slices"
	"strings"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// fleet is the demo assets.
func fleet(t *testing.T) (all []*hull.Asset) {
	t.Helper()
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			t.Fatal(err)
		}
		all = append(all, a)
	}
	return all
}

// Of every demo asset the next docking can be closed as drafted, on the day
// listed or another, and no zone is worse held afterwards.
func TestDraftClosesEveryDemoDocking(t *testing.T) {
	for _, a := range fleet(t) {
		a.Readings = nil // they speak of the pieces up to the docking
		o := plan.Compute(a, december)
		listed := a.Ahead()[0].Date
		for _, late := range []hull.Date{0, 47} {
			next, faults := hull.Close(a, o.DraftClosing(listed, listed+late))
			if len(faults) > 0 {
				t.Errorf("%s, %d days late:\n%v", a.Name, late, faults)
				continue
			}
			after := plan.Compute(next, december)
			if after.Asset.Start() != listed+late || len(after.Unmet) > len(o.Unmet) {
				t.Errorf("%s: starts %s, unmet %v", a.Name, after.Asset.Start(), after.Unmet)
			}
			c := next.Closed[len(next.Closed)-1]
			for _, e := range c.Expected {
				if !(0 <= e.Low && e.Low <= e.Median && e.Median <= e.High && e.High <= 1) {
					t.Errorf("%s: expected %+v", a.Name, e)
				}
			}
			if c.Cost == nil || *c.Cost != *c.PlannedCost {
				t.Errorf("%s: cost %v, planned %v", a.Name, c.Cost, c.PlannedCost)
			}
		}
	}
}

// The draft is the plan: its pieces, what comes off, its works and its money.
func TestDraftIsThePlan(t *testing.T) {
	a := fleet(t)[0]
	a.Costs.DiscountRate = 0.08
	o := plan.Compute(a, december)
	d := a.Ahead()[0]
	c := o.DraftClosing(d.Date, 0)
	cost, on := 0.0, 0
	for _, l := range o.Schedule {
		if l.Docking != 0 || l.Action == "keep" {
			continue
		}
		on += l.Count
		fit, each := a.Costs.FitPerPiece, l.Pattern.Price
		if l.Pattern.FitPerPiece != nil {
			fit = *l.Pattern.FitPerPiece
		}
		cost += float64(l.Count)*(each+fit) + float64(l.Removed)*a.Costs.RemovePerPiece + a.Costs.PerZone
	}
	cost += d.FixedCost
	drafted, off := 0, 0
	for _, p := range c.On {
		drafted += p.Count
	}
	for _, s := range c.Sets {
		off += s.Off
	}
	if c.Date != d.Date || drafted != on || on == 0 || off == 0 || len(c.Works) != len(d.Works) {
		t.Errorf("%s: %d put on, planned %d; %d off; works %v", c.Date, drafted, on, off, c.Works)
	}
	if math.Abs(*c.PlannedCost-cost) > 0.01 {
		t.Errorf("planned cost %v, by the prices %v", *c.PlannedCost, cost)
	}
	for _, s := range c.Sets {
		if s.How != hull.Forecasted {
			t.Errorf("nobody looked, but %+v", s)
		}
	}
}

// A reading in dock is what was found: its mean, and the pieces that are left.
func TestDraftTakesTheDocksReadings(t *testing.T) {
	a := fleet(t)[0]
	z := &a.Zones[slices.IndexFunc(a.Zones, func(z hull.Zone) bool { return len(z.Fitted) > 0 })]
	f := z.Fitted[0]
	date := a.Ahead()[0].Date
	a.Readings = []hull.Reading{
		{Date: date - 300, Zone: z.ID, Pattern: f.Pattern, Fitted: f.Fitted, Percent: []float64{10}},
		{Date: date + 1, Zone: z.ID, Pattern: f.Pattern, Fitted: f.Fitted, WeighedWastage: []float64{0.3, 0.4}, Fallen: 1,
			Grades: nil, NotWasted: 0},
		{Date: date + 2, Zone: z.ID, Pattern: f.Pattern, Fitted: f.Fitted, WeighedWastage: []float64{0.9}, Withdrawn: date + 3},
	}
	o := plan.Compute(a, date+5)
	c := o.DraftClosing(date, 0)
	s := c.Sets[0]
	// What was expected was so before the survey: it knows the older reading
	// alone.
	a.Readings = a.Readings[:1]
	if e := plan.Compute(a, date+5).DraftClosing(date, c.Date).Expected[0]; math.Abs(e.Median-c.Expected[0].Median) > 1e-9 || math.Abs(e.High-c.Expected[0].High) > 1e-9 {
		t.Errorf("expected %+v, before the survey %+v", c.Expected[0], e)
	}
	if c.Date != date+1 { // the survey's, so that none of it is counted again afterwards
		t.Errorf("in dock on %s", c.Date)
	}
	if s.How != hull.Surveyed || math.Abs(s.Wastage-0.35) > 1e-12 || s.Found != f.Count-1 || c.Expected[0].Count != f.Count {
		t.Errorf("drafted %+v, expected %+v", s, c.Expected[0])
	}
}

func TestPlannedAgainstFound(t *testing.T) {
	a := fleet(t)[0]
	a.Readings = nil
	o := plan.Compute(a, december)
	c := o.DraftClosing(a.Ahead()[0].Date, 0)
	c.Sets[0].How, c.Sets[0].Wastage = hull.Surveyed, c.Expected[0].Low-0.01
	c.Sets[0].Found--
	c.On[0].Count -= 2
	*c.Cost += 700
	next, faults := hull.Close(a, c)
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	b := plan.CompareClosed(next, 0)
	s := b.Sets[0]
	if s.Verdict != plan.LessWasted || s.Found != c.Sets[0].Found || s.Expected.Count != s.Found+1 || b.Sets[1].Verdict != "" {
		t.Errorf("%+v, %+v", s, b.Sets[1])
	}
	if p := b.Pieces[0]; p.Planned != p.PutOn+2 {
		t.Errorf("%+v", p)
	}
	if math.Abs(b.Cost.Spent-b.Cost.Planned-700) > 1e-9 {
		t.Errorf("%+v", b.Cost)
	}
	ordered, on := 0.0, 0.0
	for _, x := range c.Ordered {
		p, _ := a.Pattern(x.Pattern)
		ordered += float64(x.Count) * p.NetMass
	}
	for _, x := range c.On {
		p, _ := a.Pattern(x.Pattern)
		on += float64(x.Count) * p.NetMass
	}
	if b.Ordered != ordered || math.Abs(b.Unused-(1-on/ordered)) > 1e-12 || b.Unused <= 0 {
		t.Errorf("ordered %v kg, unused %v; want %v and %v", b.Ordered, b.Unused, ordered, 1-on/ordered)
	}
	mass, left := 0.0, 0.0
	for _, x := range c.Sets {
		p, _ := a.Pattern(x.Pattern)
		mass += float64(x.Off) * p.NetMass
		left += float64(x.Off) * p.NetMass * (1 - x.Wastage)
	}
	if math.Abs(b.TakenOff-mass) > 1e-9 || math.Abs(b.Left-left/mass) > 1e-12 || mass == 0 {
		t.Errorf("taken off %v kg, %v left; want %v and %v", b.TakenOff, b.Left, mass, left/mass)
	}
	words := strings.Join(b.Words(), "\n")
	for _, want := range []string{": less wasted than expected.", "1 piece of", "were not looked at", "were planned", "700 more than planned", "was still there", "was not put on"} {
		if !strings.Contains(words, want) {
			t.Errorf("the words do not say %q:\n%s", want, words)
		}
	}
	// A correction counts in place of what it corrects.
	next.Zones = slices.Clone(next.Zones)
	for i := range next.Zones {
		for k, f := range next.Zones[i].Fitted {
			if next.Zones[i].ID == s.Zone && f.Pattern == s.Pattern && f.Fitted == s.Fitted {
				next.Zones[i].Fitted[k].Wastage = s.Expected.High + 0.01
			}
		}
	}
	hull.Correct(next, "", "")
	if again := plan.CompareClosed(next, 0).Sets[0]; s.Off == 0 && (again.Verdict != plan.MoreWasted || again.Found != s.Found) {
		t.Errorf("after a correction: %+v", again)
	}
}

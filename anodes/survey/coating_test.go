package survey

import (
	"math"
	"testing"

	"anodewright/hull"
)

// Where the model's breakdown goes with the factor, percentages combine like
// normal distributions, by hand; words are intervals.
func TestLearnCoating(t *testing.T) {
	m := StandardCoating()
	linear := func(k float64) float64 { return 0.05 * k }
	exact := func(y float64) CoatingFound { return CoatingFound{Above: y, UpTo: y, Predicted: linear} }
	p := LearnCoating(m, []CoatingFound{exact(0.10), exact(0.12)})
	tau2, s2 := m.Scatter*m.Scatter, m.Reading*m.Reading/2
	found := (math.Log(0.10/0.05) + math.Log(0.12/0.05)) / 2
	near(t, "mean", p.Mean, found*tau2/(tau2+s2), 1e-6)
	near(t, "sd", p.SD, math.Sqrt(tau2*s2/(tau2+s2)), 1e-5)
	near(t, "median", math.Log(p.Median()), p.Mean, 1e-4)

	none := LearnCoating(m, nil)
	near(t, "without a reading", none.Mean, 0, 1e-9)
	near(t, "its sd", none.SD, m.Scatter, 1e-4)

	word := func(from, to float64) Posterior {
		return LearnCoating(m, []CoatingFound{{Above: from, UpTo: to, Predicted: linear}})
	}
	good, fair, poor := word(0, 0.03), word(0.03, 0.2), word(0.2, math.Inf(1))
	if !(good.Mean < fair.Mean && fair.Mean < poor.Mean) || good.Mean > -0.3 || poor.Mean < 0.8 || math.Abs(fair.Mean) > 0.4 {
		t.Errorf("GOOD %.3f, FAIR %.3f, POOR %.3f", good.Mean, fair.Mean, poor.Mean)
	}
	// The likelihood of a word by hand: the normal probability of its range.
	var sum, first float64
	for i := range 20001 {
		x := -3.5 + 7*float64(i)/20000
		z := (math.Log(0.2/0.05) - x) / m.Reading
		w := math.Exp(-x*x/(2*tau2)) * 0.5 * math.Erfc(z/math.Sqrt2)
		sum, first = sum+w, first+w*x
	}
	near(t, "POOR", poor.Mean, first/sum, 1e-4)

	// A coating that is broken down altogether tells of no rate beyond.
	capped := func(k float64) float64 { return min(1, 0.5*k) }
	if all := LearnCoating(m, []CoatingFound{{Above: 1, UpTo: 1, Predicted: capped}}); all.Mean < 0.4 || all.SD < 0.2 || math.IsNaN(all.SD) {
		t.Errorf("all of it: %.3f, sd %.3f", all.Mean, all.SD)
	}
}

func TestCoatingReadings(t *testing.T) {
	percent := func(x float64) *float64 { return &x }
	day := func(y int) hull.Date { return hull.NewDate(y, 6, 1) }
	a := lotAsset([]hull.Reading{
		{Date: day(2018), Zone: "side", CoatingPercent: percent(50)}, // before the paint
		{Date: day(2025), Zone: "side", CoatingPercent: percent(4), CoatingWord: "FAIR"},
		{Date: day(2025), Zone: "side", CoatingPercent: percent(9)},
		{Date: day(2026), Zone: "side", CoatingWord: "POOR"},
		{Date: day(2026), Zone: "side", CoatingWord: "GOOD", Withdrawn: day(2026)},
		{Date: day(2026), Zone: "elsewhere", CoatingWord: "GOOD"},
		{Date: day(2028), Zone: "side", CoatingPercent: percent(0)},
		{Date: day(2031), Zone: "side", CoatingPercent: percent(20)}, // of the next coat
		{Date: day(2032), Zone: "side", CoatingPercent: percent(20)}, // after today
	})
	a.Zones[0].Coating = hull.Coating{Category: hull.CategoryIII}
	a.Dockings = []hull.Docking{{Date: hull.NewDate(2030, 1, 1), Works: []hull.Work{{Zone: "side", Coating: hull.Recoat, Category: hull.CategoryIII}}}}
	got := CoatingReadings(a, &a.Zones[0], day(2031))
	want := []CoatingFound{{Date: day(2025), Above: 0.06, UpTo: 0.06}, {Date: day(2026), Above: 0.2, UpTo: math.Inf(1)}, {Date: day(2028), UpTo: leastBroken}}
	if len(got) != len(want) {
		t.Fatalf("%+v, want %+v", got, want)
	}
	for i := range want {
		if got[i].Date != want[i].Date || math.Abs(got[i].Above-want[i].Above) > 1e-12 || got[i].UpTo != want[i].UpTo && math.Abs(got[i].UpTo-want[i].UpTo) > 1e-12 {
			t.Errorf("%+v, want %+v", got[i], want[i])
		}
	}
}

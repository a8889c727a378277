package plan_test

import (
	"math"
	"strings"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/hull"
)

// The steel below -0.80 V takes what its curve says: by the level one the mean
// demand, by the straight one more, by the sigmoid more above -1.00 V and its
// mean there.
func TestSteelCurves(t *testing.T) {
	wasted := map[hull.SteelCurve]float64{}
	volts := map[hull.SteelCurve]float64{}
	at := func(curve hull.SteelCurve, count int) {
		a := lively(t)
		a.Basis.SteelCurve = curve
		a.Zones[0].Fitted[0].Count = count
		iv := plan.Compute(a, 0).Zones[0].Intervals[0]
		wasted[curve], volts[curve] = iv.Fitted[0].Wastage*float64(count), iv.Potential
	}
	for _, curve := range []hull.SteelCurve{hull.LevelCurve, hull.StraightCurve, hull.SigmoidCurve} {
		at(curve, 70)
	}
	if !(wasted["straight"] > 1.3*wasted["level"] && volts["straight"] > volts["level"]) {
		t.Errorf("wasted %v at %v V", wasted, volts)
	}
	// Held near -1.00 V by plenty of anodes the sigmoid asks about its mean.
	if x := wasted["sigmoid"] / wasted["level"]; volts["sigmoid"] > -0.95 || x < 1 || x > 1.5 {
		t.Errorf("sigmoid: wasted %.4f at %.3f V, level %.4f", wasted["sigmoid"], volts["sigmoid"], wasted["level"])
	}
	// Fewer, which hold the steel by the level curve, do not get over its peak.
	at(hull.SigmoidCurve, 24)
	at(hull.LevelCurve, 24)
	if volts["level"] > -0.8 || volts["sigmoid"] < -0.8 {
		t.Errorf("24 pieces: %v V", volts)
	}
}

// With a decay law the bare steel takes 10^c T^d: by hand for one zone without
// paint that is held below -0.80 V from its docking on.
func TestDecayLaw(t *testing.T) {
	a := lively(t)
	a.Zones = a.Zones[:1]
	z := &a.Zones[0]
	z.Coating = hull.Coating{Category: hull.CategoryNone}
	z.WettedArea, z.BareArea, z.MinCount, z.CountMultiple = 50, 0, 0, 1
	a.Basis.Decay = "cold-water"
	o := plan.Compute(a, 0)
	iv := o.Zones[0].Intervals[0]
	const c, d, first = 2.82, -0.23, 24.0
	hours := iv.Hours()
	charge := 50 * math.Pow(10, c) / 1000 * (math.Pow(first, d)*first + (math.Pow(hours, d+1)-math.Pow(first, d+1))/(d+1))
	if got, want := iv.Fitted[0].Wastage, charge/(24*45*2000); iv.Potential > -0.8 || math.Abs(got-want) > 1e-7 {
		t.Errorf("wasted %.8f at %.3f V, by hand %.8f", got, iv.Potential, want)
	}
	// Demand and plan are the code's with and without.
	without := lively(t)
	without.Zones = without.Zones[:1]
	without.Zones[0] = *z
	if flat := plan.Compute(without, 0); flat.Zones[0].Intervals[0].Demand != iv.Demand || flat.Money.Total != o.Money.Total {
		t.Error("the law changes the code's plan")
	}
	text := ""
	for _, s := range o.Explain(0) {
		text += s.Figure + " " + s.Source + " " + s.Confidence + "\n"
	}
	for _, want := range []string{"steel curve of the forecast", "density of bare steel in the forecast, to 2027-03-15", "cold-water published"} {
		if !strings.Contains(text, want) {
			t.Errorf("no %q in\n%s", want, text)
		}
	}
	// One's own constants win, and a set is sized by them where the forecast sizes.
	own := func(c float64) int {
		b := lively(t)
		b.Zones = b.Zones[:1]
		b.Zones[0] = *z
		b.Basis.Sizing, b.Basis.Decay, b.Basis.DecayC = hull.ForecastSizing, "warm-water", &c
		b.Zones[0].Fitted = nil
		n := 0
		for _, l := range plan.Compute(b, 0).Schedule {
			n += l.Count
		}
		return n
	}
	if few, many := own(2.8), own(3.4); few >= many || few == 0 {
		t.Errorf("%d pieces for the lower density, %d for the higher", few, many)
	}
}

package hull

import (
	"math"
	"testing"
)

// laidUp is bare steel of 100 m2 in seawater, under way at 1.2, and laid up in
// fresh water from a date within the first interval, without way on, up to a
// later date in it.
func laidUp(t *testing.T) (*Asset, Date, Date) {
	t.Helper()
	sea, salinity, river, conductivity := 15.0, 35.0, 10.0, 500.0
	start := NewDate(2024, 1, 1)
	from, to := start+300, start+400
	one, working := 1.0, 1.2
	a := &Asset{
		InService: start, LastDocking: start, Horizon: start + 3*365,
		Waters: []Water{
			{ID: "sea", Medium: Seawater, Temperature: &sea, Salinity: &salinity},
			{ID: "river", Medium: Seawater, Temperature: &river, Conductivity25: &conductivity},
		},
		Zones: []Zone{{
			ID: "side", Surface: CarbonSteel, WettedArea: 100, Depth: 5, Coating: Coating{Category: CategoryNone},
			Waters: []WaterShare{{"sea", 1}}, UnderWayFactor: working, ImmersedShare: 1, Bonded: true, Shielding: 1,
		}},
		Dockings: []Docking{{Date: start + 2*365}},
		Basis:    Basis{Densities: OffshoreCode, OutputWater: MeanWater},
	}
	a.Service = []Service{
		{From: from, Waters: []WaterShare{{"river", 1}}, UnderWayFactor: &one},
		{From: to, Waters: []WaterShare{{"sea", 1}}, UnderWayFactor: &working},
	}
	return a, from, to
}

// The mean demand of an interval with a lay-up in it is the mean of its
// stretches by their time: the densities of sub-tropical and of temperate water
// (DNV-RP-B401, Table 10-1), times the under-way factor of each.
func TestLayUpWithinAnInterval(t *testing.T) {
	a, from, to := laidUp(t)
	code := densityRow("code-densities", "sub-tropical 0-30")
	cold := densityRow("code-densities", "temperate 0-30")
	d := Demand(a)[0].Own
	days := float64(2 * 365)
	laid := float64(to - from)
	want := 100.0 / 1000 * (code.Mean*1.2*(days-laid) + cold.Mean*laid) / days
	if math.Abs(d[0].Mean-want) > 1e-9 {
		t.Errorf("mean demand %g A, want %g A", d[0].Mean, want)
	}
	if w := 0.1 * code.Initial * 1.2; math.Abs(d[0].Initial-w) > 1e-9 {
		t.Errorf("initial demand %g A, want %g A: the lay-up had not begun", d[0].Initial, w)
	}
	if w := 0.1 * code.Final * 1.2; math.Abs(d[0].Final-w) > 1e-9 {
		t.Errorf("final demand %g A, want %g A: the lay-up was over", d[0].Final, w)
	}
	if w := 0.1 * code.Mean * 1.2; math.Abs(d[1].Mean-w) > 1e-9 {
		t.Errorf("mean demand of the next interval %g A, want %g A", d[1].Mean, w)
	}
}

// In the river the anodes' resistivity is the river's, from the day of the
// lay-up to the day before it ends.
func TestLayUpResistivity(t *testing.T) {
	a, from, to := laidUp(t)
	z := &a.Zones[0]
	sea, river := a.Waters[0].Resist(), a.Waters[1].Resist()
	if river < 50*sea {
		t.Fatalf("river of %g ohm m, sea of %g ohm m", river, sea)
	}
	for d, want := range map[Date]float64{from - 1: sea, from: river, to - 1: river, to: sea} {
		if got := a.Resistivity(z, d); math.Abs(got-want) > 1e-12 {
			t.Errorf("%s: %g ohm m, want %g", d, got, want)
		}
	}
}

// Two halves of an interval have, weighed by their time, the mean of the
// whole, wherever the lay-up lies.
func TestLayUpMeansAddUp(t *testing.T) {
	whole, from, _ := laidUp(t)
	split, _, _ := laidUp(t)
	cut := from + 37
	split.Dockings = []Docking{{Date: cut}, split.Dockings[0]}
	one, two := Demand(whole)[0].Own, Demand(split)[0].Own
	first, second := float64(cut-split.LastDocking), float64(whole.Dockings[0].Date-cut)
	got := (two[0].Mean*first + two[1].Mean*second) / (first + second)
	if math.Abs(got-one[0].Mean) > 1e-9 {
		t.Errorf("mean of the parts %g A, of the whole %g A", got, one[0].Mean)
	}
}

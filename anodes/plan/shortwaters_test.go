package plan_test

import (
	"encoding/json"
	"math"
	"strings"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// trading is the ship of testdata, 60 % of the time in the North Sea, 40 % in
// the Baltic.
func trading(t *testing.T) *hull.Asset {
	t.Helper()
	a, err := assetfile.Read("../../testdata/assets/tern-passage.json")
	if err != nil {
		t.Fatal(err)
	}
	temperature, salinity := 8.35, 7.08
	a.Waters = append(a.Waters, hull.Water{ID: "baltic", Name: "Baltic proper", Medium: hull.Seawater, Temperature: &temperature, Salinity: &salinity})
	for i := range a.Zones {
		a.Zones[i].Waters = []hull.WaterShare{{Water: "north-sea", Share: 0.6}, {Water: "baltic", Share: 0.4}}
	}
	return a
}

func compute(t *testing.T, a *hull.Asset) *plan.Outcome {
	t.Helper()
	if err := hull.Check(a).Err(); err != nil {
		t.Fatal(err)
	}
	return plan.Compute(a, hull.NewDate(2026, 12, 1))
}

func TestShortWaterHasItsOwnOutputAndDemand(t *testing.T) {
	a := trading(t)
	baltic := assetfile.Clone(a)
	for i := range baltic.Zones {
		baltic.Zones[i].Waters = []hull.WaterShare{{Water: "baltic", Share: 1}}
	}
	alone := hull.Demand(baltic)
	w, _ := a.Water("baltic")
	north, _ := a.Water("north-sea")
	mean := 1 / (0.6/north.Resist() + 0.4/w.Resist())
	found := 0
	for k, zi := range compute(t, a).Zones[0].Intervals {
		for _, s := range zi.ShortWaters {
			if s.Water.ID != "baltic" {
				continue
			}
			found++
			if math.Abs(s.Share-0.4) > 1e-12 {
				t.Errorf("interval %d: share %g, want 0.4", k, s.Share)
			}
			if want := alone[0].Total[k]; math.Abs(s.Final-want.Final) > 1e-9 || math.Abs(s.Mean-want.Mean) > 1e-9 {
				t.Errorf("interval %d: demand %g mean and %g final, want %g and %g", k, s.Mean, s.Final, want.Mean, want.Final)
			}
			// A slab's output is in proportion to the water's conductivity.
			if want := zi.Output * mean / w.Resist(); math.Abs(s.Output-want) > 1e-9*want {
				t.Errorf("interval %d: output %g, want %g", k, s.Output, want)
			}
			if s.Output >= s.Final {
				t.Errorf("interval %d: %g A of %g A is not short", k, s.Output, s.Final)
			}
			if text := zi.ShortText(); !strings.Contains(text, "Baltic proper (40 %)") {
				t.Errorf("interval %d: %q does not name the water and its share", k, text)
			}
		}
	}
	if found == 0 {
		t.Error("the Baltic with five times the resistivity is never short")
	}
}

// A water that a zone lies in all the time is short when the zone is.
func TestShortWaterOfOneWaterIsTheState(t *testing.T) {
	a := trading(t)
	for _, id := range []string{"north-sea", "baltic"} {
		for i := range a.Zones {
			a.Zones[i].Waters = []hull.WaterShare{{Water: id, Share: 1}}
		}
		for _, count := range []int{4, 24, 60} {
			a.Zones[0].Fitted[0].Count = count
			for k, zi := range compute(t, a).Zones[0].Intervals {
				short := zi.State == plan.Short || zi.State == plan.Spent
				if len(zi.ShortWaters) > 0 != short {
					t.Errorf("%s, %d pieces, interval %d: %s, short in %d waters", id, count, k, zi.State, len(zi.ShortWaters))
				}
			}
		}
	}
}

// A held zone has no output to be short of.
func TestShortWatersOnlyOfOwnAnodes(t *testing.T) {
	for k, zi := range compute(t, trading(t)).Zones[1].Intervals {
		if zi.ShortWaters != nil {
			t.Errorf("the held propeller is short in interval %d", k)
		}
	}
}

// Six months of lay-up in a river in an interval of three years of North Sea.
func TestShortWaterOfLayUp(t *testing.T) {
	a := trading(t)
	temperature, conductivity := 12.0, 500.0
	a.Waters = append(a.Waters, hull.Water{ID: "river", Medium: hull.Seawater, Temperature: &temperature, Conductivity25: &conductivity})
	for i := range a.Zones {
		a.Zones[i].Waters = []hull.WaterShare{{Water: "north-sea", Share: 1}}
	}
	from := hull.NewDate(2025, 3, 15)
	days := 180.0
	a.Service = []hull.Service{
		{From: from, Waters: []hull.WaterShare{{Water: "river", Share: 1}}},
		{From: from + 180, Waters: []hull.WaterShare{{Water: "north-sea", Share: 1}}},
	}
	o := compute(t, a)
	zi := o.Zones[0].Intervals[0]
	if len(zi.ShortWaters) != 1 || zi.ShortWaters[0].Water.ID != "river" {
		t.Fatalf("short in %q, want in the river alone", zi.ShortText())
	}
	if want := days / float64(zi.To-zi.From); math.Abs(zi.ShortWaters[0].Share-want) > 1e-12 {
		t.Errorf("share %g, want %g", zi.ShortWaters[0].Share, want)
	}
	if later := o.Zones[0].Intervals[1].ShortText(); strings.Contains(later, "river") {
		t.Errorf("short in the river after the lay-up: %s", later)
	}
	ids := at(a, 0)
	for _, want := range []string{"short-water", "fresh-water"} {
		if !strings.Contains(strings.Join(ids, " "), want) {
			t.Errorf("cautions %v lack %s", ids, want)
		}
	}
}

func TestShortWatersInJSON(t *testing.T) {
	text := func(a *hull.Asset) string {
		b, err := json.Marshal(compute(t, a))
		if err != nil {
			t.Fatal(err)
		}
		return string(b)
	}
	if s := text(trading(t)); !strings.Contains(s, `"short_waters":[{"water":"baltic","share":0.4,"output_a":`) {
		t.Error("the JSON does not name the Baltic under short_waters")
	}
	b := bare(t)
	if s := text(b); strings.Contains(s, "short_waters") {
		t.Error("short_waters is there though no zone is short")
	}
}

func TestPotentialCautions(t *testing.T) {
	date := hull.NewDate(2026, 6, 1)
	strong := 690.0
	for _, c := range []struct {
		what  string
		m     []hull.Measure
		yield *float64
		want  string
	}{
		{"within", []hull.Measure{{Potential: -0.95}, {Potential: -0.86, Electrode: hull.CopperSulphate}}, nil, ""},
		{"copper sulphate, short", []hull.Measure{{Potential: -0.84, Electrode: hull.CopperSulphate}}, nil, "under-protected"},
		{"beyond", []hull.Measure{{Potential: -1.15}}, nil, "over-protected"},
		{"high strength beyond its limit", []hull.Measure{{Potential: -1.00}}, &strong, "over-protected"},
		{"one of several", []hull.Measure{{Potential: -0.9}, {Potential: 0.3, Electrode: hull.ZincElectrode}}, nil, "under-protected"},
	} {
		a := bare(t)
		a.Zones[0].Yield = c.yield
		a.Readings = []hull.Reading{{Date: date, Zone: a.Zones[0].ID, Potentials: c.m}}
		for zone := range a.Zones {
			got := ""
			for _, id := range at(a, zone) {
				if strings.HasSuffix(id, "-protected") {
					got += id
				}
			}
			want := c.want
			if zone > 0 {
				want = ""
			}
			if got != want {
				t.Errorf("%s, zone %d: %q, want %q", c.what, zone, got, want)
			}
		}
	}
}

func TestCoatingConditionCaution(t *testing.T) {
	for word, want := range map[hull.Condition]bool{"GOOD": false, "FAIR": true, "POOR": true} {
		a := bare(t)
		// Category III, nine months old: 2.9 % broken down.
		a.Readings = []hull.Reading{{Date: hull.NewDate(2024, 12, 1), Zone: a.Zones[0].ID, CoatingWord: word}}
		got := strings.Contains(strings.Join(at(a, 0), " "), "coating-condition")
		if got != want {
			t.Errorf("%s: caution %v, want %v", word, got, want)
		}
	}
}

package area

import (
	"errors"
	"math"
	"strings"
	"testing"

	"anodewright/hull"
)

// get returns the estimate; the inputs of the caller are right.
func get(t *testing.T) func(Estimate, error) Estimate {
	return func(e Estimate, err error) Estimate {
		t.Helper()
		if err != nil {
			t.Fatal(err)
		}
		return e
	}
}

func near(t *testing.T, what string, got, want, within float64) {
	t.Helper()
	if !(math.Abs(got-want) <= within) {
		t.Errorf("%s: got %.6g, want %.6g within %g", what, got, want, within)
	}
}

// Holtrop and Mennen 1982, worked example: 7381.45 m2.
func TestHoltropMennenExample(t *testing.T) {
	near(t, "example", get(t)(HoltropMennen(205, 32, 10, 37500, 0.98, 0.75, 20)).Area, 7381.45, 0.005)
}

// Nicholls's Seamanship and Nautical Knowledge, p. 482: 400 x 54 x 15 ft,
// block coefficient 0.8, gives 27 480 ft2.
func TestDennyMumfordExample(t *testing.T) {
	near(t, "example in ft2", get(t)(DennyMumford(400, 15, 0.8*400*54*15)).Area, 27480, 0.5)
}

// Benchmark hulls with a published wetted surface: the default form within 2 %,
// Denny-Mumford 1.5 to 5.5 % low. Measured figures stand beside them.
func TestBenchmarkHulls(t *testing.T) {
	measured := map[string]struct{ byType, denny float64 }{
		"KCS":    {1.24, -4.07},
		"KVLCC1": {1.10, -3.55},
		"JBC":    {-0.04, -4.56},
	}
	for _, h := range Benchmarks() {
		byType := 100 * (get(t)(ByType(h.Particulars, 0)).Area/h.Surface - 1)
		denny := 100 * (get(t)(DennyMumford(h.LengthPP, h.Draught, h.Volume)).Area/h.Surface - 1)
		near(t, h.Name+" by type, % off", byType, measured[h.Name].byType, 0.01)
		near(t, h.Name+" by Denny-Mumford, % off", denny, measured[h.Name].denny, 0.01)
		if math.Abs(byType) > 2 {
			t.Errorf("%s: by type is off by %.2f %%, want at most 2 %%", h.Name, byType)
		}
		if denny > -1.5 || denny < -5.5 {
			t.Errorf("%s: Denny-Mumford is off by %.2f %%, want 1.5 to 5.5 %% low", h.Name, denny)
		}
	}
}

// What a person is told: formula, source, how sure, and how far off.
func TestEstimatesSayWhereTheyComeFrom(t *testing.T) {
	kcs := Benchmarks()[0].Particulars
	kcs.Waterplane = 0.82
	list, missing := Wetted(kcs, 0)
	if missing != nil || len(list) != 4 {
		t.Fatalf("got %d estimates and %v, want 4 and nothing missing", len(list), missing)
	}
	for _, e := range list {
		if e.Name == "" || e.Formula == "" || e.Source == "" || e.Confidence == "" || e.Benchmark == "" || len(e.Inputs) < 3 {
			t.Errorf("incomplete: %+v", e)
		}
		if s := e.Step(); s.Value != e.Area || s.Formula != e.Formula || s.Unit != "m2" {
			t.Errorf("step %+v does not tell the estimate %+v", s, e)
		}
	}
	for i, want := range []string{"KCS", "KVLCC1", "example", "JBC"} {
		if !strings.Contains(list[i].Benchmark, want) {
			t.Errorf("%s: benchmark %q does not name %s", list[i].Name, list[i].Benchmark, want)
		}
	}
	if got := get(t)(ByType(Benchmarks()[2].Particulars, 0)).Benchmark; strings.Contains(got, "KCS") || !strings.Contains(got, "within") {
		t.Errorf("bulk carrier: %q: a container ship says nothing about its formula", got)
	}
	other := kcs
	other.ShipType = "other"
	if e := get(t)(ByType(other, 0)); e.Benchmark != unchecked || e.Confidence == read {
		t.Errorf("other ships: %q, %q, want an unchecked formula named as such", e.Benchmark, e.Confidence)
	}
}

// The draught correction of each ship type: k (Td - T)(Lwl + B).
func TestDraughtCorrection(t *testing.T) {
	p := hull.Particulars{LengthPP: 280, LengthWL: 285, Beam: 45, Draught: 16.5, Volume: 178369.9}
	for kind, k := range map[hull.ShipType]float64{
		"bulk-carrier": 2.0, "tanker": 2.0, "general-cargo": 2.0, "": 2.0, "container": 2.4, "ro-ro-twin-screw": 2.5, "other": 3.0,
	} {
		p.ShipType = kind
		design, light := get(t)(ByType(p, 0)).Area, get(t)(ByType(p, 15)).Area
		near(t, string(kind), design-light, k*1.5*(285+45), 1e-9*design)
		near(t, string(kind)+" at the design draught", get(t)(ByType(p, 16.5)).Area, design, 0)
	}
	if _, err := ByType(p, 30); err == nil {
		t.Error("a draught far above the design's was taken")
	}
	if list, _ := Wetted(p, 15); len(list) != 1 {
		t.Errorf("at another draught: %d estimates, want the default alone", len(list))
	}
}

// A faulty input is named; nothing becomes an area.
func TestFaultyInputs(t *testing.T) {
	for _, c := range []struct {
		want string
		err  error
	}{
		{"draught T", second(DennyMumford(100, 0, 1000))},
		{"volume V", second(DennyMumford(100, 5, math.NaN()))},
		{"waterline length Lwl", second(ByType(hull.Particulars{LengthPP: 100, Beam: 20, Draught: 5, Volume: 5000}, 0))},
		{"midship coefficient CM", second(HoltropMennen(205, 32, 10, 37500, 1.2, 0.75, 20))},
		{"bulb's transverse area ABT", second(HoltropMennen(205, 32, 10, 37500, 0.98, 0.75, -1))},
		{"diameter D", second(Tubular(math.Inf(1), 2))},
		{"number n", second(BilgeKeels(0, 10, 1))},
		{"grating's share s", second(SeaChest(1, 1, 1, 1.5))},
		{"developed area f", second(SheetPiling(10, 10, 0.5))},
		{"area", second(Entered("tank", -4))},
	} {
		var faults hull.Faults
		var fault hull.Fault
		switch {
		case errors.As(c.err, &faults):
			fault = faults[0]
		case !errors.As(c.err, &fault):
			t.Errorf("%s: got %v, want a fault", c.want, c.err)
			continue
		}
		if fault.Path != c.want {
			t.Errorf("got %v, want a fault of %s", fault, c.want)
		}
	}
}

func second(_ Estimate, err error) error { return err }

// The parts of a wetted surface add up to it, and the boot-top is inside it.
func TestSplitAddsUp(t *testing.T) {
	for _, h := range Benchmarks() {
		s := get(t)(ByType(h.Particulars, 0))
		for _, bootTop := range []float64{0, 0.8, 2.5} {
			p, err := Split(s, h.Particulars, bootTop)
			if err != nil {
				t.Fatal(err)
			}
			near(t, h.Name, p.FlatBottom.Area+p.Sides.Area+p.BootTop.Area, s.Area, 1e-9*s.Area)
			near(t, h.Name+" boot-top", p.BootTop.Area, 2*bootTop*(h.LengthPP+h.Beam/2), 1e-9)
			if p.Sides.Area < 0.2*s.Area || p.FlatBottom.Area < 0.2*s.Area {
				t.Errorf("%s: bottom %.0f and sides %.0f of %.0f m2 are no ship", h.Name, p.FlatBottom.Area, p.Sides.Area, s.Area)
			}
		}
		if _, err := Split(s, h.Particulars, h.Draught); err == nil {
			t.Errorf("%s: a boot-top as high as the draught was taken", h.Name)
		}
	}
}

// The paint trade's figures are a cross-check: within 10 % on every hull.
func TestPaintBottom(t *testing.T) {
	for _, h := range Benchmarks() {
		got := get(t)(PaintBottom(h.Particulars)).Area
		near(t, h.Name, got, h.Surface, 0.10*h.Surface)
	}
	near(t, "boot-top", get(t)(PaintBootTop(118, 18.2, 0.8)).Area, 2*0.8*(118+9.1), 1e-9)
}

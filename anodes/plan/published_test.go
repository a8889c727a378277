package plan_test

import (
	"bytes"
	"encoding/json"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"testing"
)

const publishedDir = "../../testdata/published"

// publishedCase is one file of testdata/published: figures of one source that
// one runner of the program recomputes.
type publishedCase struct {
	What   string `json:"what"`
	Source struct {
		Document string `json:"document"`
		Section  string `json:"section"`
		Page     string `json:"page"`
	} `json:"source"`
	Ours     []string         `json:"ours"` // what the source does not give
	Computes string           `json:"computes"`
	Checks   []publishedCheck `json:"checks"`
}

type publishedCheck struct {
	Inputs  map[string]quantity `json:"inputs"`
	Results map[string]stated   `json:"results"`
}

// quantity is an input in the source's unit, or a word.
type quantity struct {
	Value float64 `json:"value"`
	Unit  string  `json:"unit"`
	Text  string  `json:"text"`
}

// stated is a result as its source states it. Where the source slips,
// Recomputed is what its own inputs give and Slip a word on it.
type stated struct {
	Stated     string   `json:"stated"`
	Unit       string   `json:"unit"`
	Tolerance  *float64 `json:"tolerance"`
	Recomputed *float64 `json:"recomputed"`
	Slip       string   `json:"slip"`
	Note       string   `json:"note"`
}

// units gives what one of each unit is in the program's own. A "lb/A-year" is
// kept as a rate: kg/A-year.
var units = map[string]float64{
	"": 1, "years": 1, "m": 1, "m2": 1, "m3": 1, "kg": 1, "kg/m3": 1, "A": 1, "V": 1, "ohm": 1, "ohm m": 1, "mA/m2": 1, "Ah/kg": 1,
	"degC": 1, "dbar": 1, "mS/cm": 1, "1/year": 1, "kg/A-year": 1, "mm": 1e-3, "mm/year": 1,
	"ft": 0.3048, "in": 0.0254, "ft2": 0.3048 * 0.3048, "lb": 0.45359237, "lb/A-year": 0.45359237,
	"mA": 1e-3, "A/m2": 1000, "mA-year/lb": 8.76 / 0.45359237, "mA/ft2": 1 / (0.3048 * 0.3048), "ohm cm": 0.01, "1/cm": 100,
}

// given is the inputs of one check, in the program's units. It notes which
// were asked for.
type given struct {
	t      *testing.T
	inputs map[string]quantity
	used   map[string]bool
}

// has reports whether the check gives an input.
func (g given) has(name string) bool {
	_, ok := g.inputs[name]
	return ok
}

// number returns an input that has to be there.
func (g given) number(name string) float64 {
	g.t.Helper()
	q, ok := g.inputs[name]
	if !ok {
		g.t.Fatalf("input %s is missing", name)
	}
	g.used[name] = true
	unit, known := units[q.Unit]
	if !known {
		g.t.Fatalf("input %s: unknown unit %q", name, q.Unit)
	}
	return q.Value * unit
}

// or returns an input, or what its absence means.
func (g given) or(name string, absent float64) float64 {
	if !g.has(name) {
		return absent
	}
	return g.number(name)
}

func (g given) text(name string) string {
	g.used[name] = true
	return g.inputs[name].Text
}

// TestPublished runs every case file. A word without a runner, a file without
// an assertion, an input that the program makes no use of and a slip that is
// none are failures.
func TestPublished(t *testing.T) {
	files, err := filepath.Glob(publishedDir + "/*.json")
	if err != nil || len(files) < 20 {
		t.Fatalf("%d case files, %v", len(files), err)
	}
	ran := map[string]bool{}
	for _, file := range files {
		t.Run(filepath.Base(file), func(t *testing.T) {
			text, err := os.ReadFile(file)
			if err != nil {
				t.Fatal(err)
			}
			var c publishedCase
			d := json.NewDecoder(bytes.NewReader(text))
			d.DisallowUnknownFields()
			if err := d.Decode(&c); err != nil {
				t.Fatal(err)
			}
			if c.What == "" || c.Source.Document == "" || c.Source.Section == "" {
				t.Error("what it is, the document and the section are to be named")
			}
			run, ok := runners[c.Computes]
			if !ok {
				t.Fatalf("no runner computes %q", c.Computes)
			}
			ran[c.Computes] = true
			asserted := 0
			for i, check := range c.Checks {
				g := given{t, check.Inputs, map[string]bool{}}
				got := run(t, g)
				for name := range check.Inputs {
					if !g.used[name] {
						t.Errorf("check %d: input %s is not used", i, name)
					}
				}
				for name, want := range check.Results {
					x, ok := got[name]
					if !ok {
						t.Errorf("check %d: %s does not give %s", i, c.Computes, name)
						continue
					}
					want.assert(t, i, name, x)
					asserted++
				}
			}
			if asserted == 0 {
				t.Error("asserts nothing")
			}
		})
	}
	for word := range runners {
		if !ran[word] {
			t.Errorf("no case file computes %q", word)
		}
	}
}

// assert compares a figure of the program, in its own unit, with the stated
// one, or with the recomputed one where the source slips.
func (s stated) assert(t *testing.T, check int, name string, x float64) {
	t.Helper()
	unit, known := units[s.Unit]
	printed, err := strconv.ParseFloat(s.Stated, 64)
	if !known || err != nil || s.Tolerance == nil {
		t.Errorf("check %d: %s: unit %q, stated %q and tolerance have to be given", check, name, s.Unit, s.Stated)
		return
	}
	got, want := x/unit, printed
	if s.Recomputed != nil {
		if want = *s.Recomputed; s.Slip == "" || math.Abs(want-printed) <= *s.Tolerance {
			t.Errorf("check %d: %s: %g recomputed for %s stated is no slip, or has no word on it", check, name, want, s.Stated)
		}
	}
	// The tolerance is the source's; the little more is that of the sum itself.
	if math.IsNaN(got) || math.Abs(got-want) > *s.Tolerance+1e-12*math.Abs(want) {
		t.Errorf("check %d: %s: got %.9g %s, want %.9g within %g", check, name, got, s.Unit, want, *s.Tolerance)
	}
}

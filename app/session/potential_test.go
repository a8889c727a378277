package session_test

import (
	"math"
	"slices"
	"strings"
	"testing"

	"anodewright/anodes"
	"anodewright/app/session"
	"anodewright/hull"
)

func TestPotentialsAsEntered(t *testing.T) {
	ms, err := session.ParsePotentials("-0,92; −0.85 V cse;-0.80 SCE ; 0.21 Zinc;")
	must(t, err)
	want := []hull.Measure{
		{Potential: -0.92, Electrode: hull.SilverChloride}, {Potential: -0.85, Electrode: hull.CopperSulphate},
		{Potential: -0.80, Electrode: hull.Calomel}, {Potential: 0.21, Electrode: hull.ZincElectrode},
	}
	if !slices.Equal(ms, want) {
		t.Fatalf("got %v, want %v", ms, want)
	}
	text := session.PotentialsText(ms)
	if text != "-0.92 Ag/AgCl; -0.85 Cu/CuSO4; -0.8 SCE; 0.21 zinc" {
		t.Errorf("written as %q", text)
	}
	again, err := session.ParsePotentials(text)
	if must(t, err); !slices.Equal(again, ms) {
		t.Errorf("%q is read as %v", text, again)
	}
	for i, v := range []float64{-0.92, -0.80, -0.809, -0.84} {
		if got := anodes.Potential(ms[i]); math.Abs(got-v) > 1e-12 {
			t.Errorf("%v is %g V against Ag/AgCl, want %g", ms[i], got, v)
		}
	}
}

func TestPotentialFaults(t *testing.T) {
	for text, want := range map[string]string{
		"about -0.9":    "want volts and an electrode",
		"-0.9 hydrogen": "want one of the electrodes Ag/AgCl, Cu/CuSO4, SCE, zinc",
		"-0.9; cse":     "want volts and an electrode",
	} {
		if _, err := session.ParsePotentials(text); err == nil || !strings.Contains(err.Error(), want) {
			t.Errorf("%q: %v, want %q", text, err, want)
		}
	}
	if ms, err := session.ParsePotentials(" "); ms != nil || err != nil {
		t.Errorf("nothing is read as %v, %v", ms, err)
	}
}

package forecast

import (
	"encoding/json"
	"math"
	"os"
	"testing"
)

// Recorded runs of an independent integrator, scipy's solve_ivp; the script
// that made them lies beside the file.
func TestAgainstSolveIVP(t *testing.T) {
	text, err := os.ReadFile("../../testdata/forecast/solve-ivp.json")
	if err != nil {
		t.Fatal(err)
	}
	var file struct {
		Cases []struct {
			Name, Curve string
			Rho, Years  float64
			Demand      [2]float64
			Groups      []struct{ Count, Wastage, Potential, Utilisation float64 }
			Wastage     []float64
			Potential   float64
		}
	}
	if err := json.Unmarshal(text, &file); err != nil {
		t.Fatal(err)
	}
	if len(file.Cases) < 6 {
		t.Fatalf("only %d cases", len(file.Cases))
	}
	for _, c := range file.Cases {
		curve := Level()
		if c.Curve == "straight" {
			curve = Straight()
		}
		var groups []Group
		var rho []float64
		for _, g := range c.Groups {
			r := rod()
			r.Count, r.Wastage, r.Potential, r.Utilisation = g.Count, g.Wastage, g.Potential, g.Utilisation
			groups, rho = append(groups, r), append(rho, c.Rho)
		}
		p := Run(curve, groups, []Stretch{{
			From: 0, To: c.Years, Resistivity: rho,
			Demand: func(t float64) float64 { return c.Demand[0] + c.Demand[1]*t },
		}}, State{Potential: math.NaN()})
		for j, want := range c.Wastage {
			near(t, c.Name+": wastage", p[1].Wastage[j], want, 1e-6)
		}
		near(t, c.Name+": potential", p[1].Potential, c.Potential, 1e-6)
	}
}

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
			Peak        float64
			From        *float64 `json:"from_v"`
			Bare        float64  `json:"bare_m2"`
			C, D        float64
			Immersed    float64 `json:"immersed_hours"`
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
	if len(file.Cases) < 13 {
		t.Fatalf("only %d cases", len(file.Cases))
	}
	for _, c := range file.Cases {
		curve := Level()
		switch c.Curve {
		case "straight":
			curve = Straight()
		case "sigmoid":
			curve = Sigmoid(c.Peak)
		}
		var groups []Group
		var rho []float64
		for _, g := range c.Groups {
			r := rod()
			r.Count, r.Wastage, r.Potential, r.Utilisation = g.Count, g.Wastage, g.Potential, g.Utilisation
			groups, rho = append(groups, r), append(rho, c.Rho)
		}
		demand := func(t float64) float64 {
			d := c.Demand[0] + c.Demand[1]*t
			if c.Bare > 0 {
				d += c.Bare * math.Pow(10, c.C) * math.Pow(max(24, c.Immersed+t*HoursPerYear), c.D) / 1000
			}
			return d
		}
		from := State{Potential: math.NaN()}
		if c.From != nil {
			from.Potential = *c.From
		}
		p := Run(curve, groups, []Stretch{ // the falling density begins after a day
			{From: 0, To: 24. / HoursPerYear, Resistivity: rho, Demand: demand},
			{From: 24. / HoursPerYear, To: c.Years, Resistivity: rho, Demand: demand},
		}, from)
		last, lost := p[2], 0.0
		for j, g := range groups {
			lost += g.Count * g.Mass * g.Capacity * (last.Wastage[j] - g.Wastage)
		}
		near(t, c.Name+": charge taken", last.Charge, lost, 1e-7)
		for j, want := range c.Wastage {
			near(t, c.Name+": wastage", last.Wastage[j], want, 1e-6)
		}
		near(t, c.Name+": potential", last.Potential, c.Potential, 1e-6)
	}
}

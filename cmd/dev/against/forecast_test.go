package against

import (
	"bytes"
	"encoding/json"
	"math"
	"os"
	"os/exec"
	"testing"
	"time"

	"anodewright/anodes/forecast"
)

// python returns a Python that has scipy: Debian's own, whatever else is on
// the PATH.
func python(b *testing.B) string {
	b.Helper()
	for _, name := range []string{"/usr/bin/python3", "python3"} {
		if exec.Command(name, "-c", "import scipy.integrate").Run() == nil {
			return name
		}
	}
	b.Skip("no Python with scipy on this machine: Debian's package python3-scipy has it")
	return ""
}

// circuit is what both integrate.
type circuit struct {
	Count       []float64  `json:"count"`
	Wastage     []float64  `json:"wastage"`
	Demand      [2]float64 `json:"demand"` // A, and A more a year
	Years       float64    `json:"years"`
	Level       bool       `json:"level"` // the steel's curve
	Spent       bool       `json:"spent"` // groups are spent on the way
	Utilisation float64    `json:"utilisation"`
	Runs        int        `json:"runs"`
}

// BenchmarkForecast is one circuit of 20 groups over 25 years against scipy's
// solve_ivp, both to 1e-10 a step; the starts of programs are not counted.
func BenchmarkForecast(b *testing.B) {
	plenty := circuit{Demand: [2]float64{20, 1}, Years: 25, Utilisation: 0.95, Runs: 15}
	scarce := circuit{Demand: [2]float64{60, 3}, Years: 25, Utilisation: 0.9, Runs: 15, Level: true, Spent: true}
	for i := range 20 {
		plenty.Count, plenty.Wastage = append(plenty.Count, float64(20+i%5)), append(plenty.Wastage, 0.01*float64(i))
		scarce.Count, scarce.Wastage = append(scarce.Count, float64(2+i%5)), append(scarce.Wastage, 0.02*float64(i))
	}
	b.Run("straight curve, none spent", func(b *testing.B) { againstScipy(b, plenty) })
	b.Run("level curve, groups spent", func(b *testing.B) { againstScipy(b, scarce) })
}

func againstScipy(b *testing.B, p circuit) {
	const l, r0, density = 2.0, 0.09, 2700.0
	var groups []forecast.Group
	var rho []float64
	for i, n := range p.Count {
		groups = append(groups, forecast.Group{
			Count: n, Mass: math.Pi * r0 * r0 * l * density, Capacity: 2500, Potential: -1.05, Utilisation: p.Utilisation, Factor: 1,
			Wastage: p.Wastage[i],
			Shape: func(w float64) float64 {
				return (math.Log(4*l/(r0*math.Sqrt(max(1e-12, 1-w)))) - 1) / (2 * math.Pi * l)
			},
		})
		rho = append(rho, 0.25)
	}
	curve := forecast.Straight()
	if p.Level {
		curve = forecast.Level()
	}
	stretch := []forecast.Stretch{{From: 0, To: p.Years, Resistivity: rho, Demand: func(t float64) float64 { return p.Demand[0] + p.Demand[1]*t }}}
	var points []forecast.Point
	run := func() { points = forecast.Run(curve, groups, stretch, forecast.State{Potential: math.NaN()}) }
	run()
	input, err := json.Marshal(p)
	if err != nil {
		b.Fatal(err)
	}
	py := python(b)
	var theirs struct{ Seconds, Wastage []float64 }
	for b.Loop() {
		cmd := exec.Command(py, "testdata/solve_ivp.py")
		cmd.Stdin, cmd.Stderr = bytes.NewReader(input), os.Stderr
		out, err := cmd.Output()
		if err != nil {
			b.Fatal(err)
		}
		if err := json.Unmarshal(out, &theirs); err != nil {
			b.Fatal(err)
		}
	}
	spent := false
	for j, want := range theirs.Wastage {
		if got := points[len(points)-1].Wastage[j]; math.Abs(got-want) > 1e-7 {
			b.Fatalf("group %d: wastage %.12f, scipy %.12f", j, got, want)
		}
		spent = spent || want >= p.Utilisation-1e-9
	}
	if spent != p.Spent {
		b.Fatalf("groups are spent: %v, the case says %v", spent, p.Spent)
	}
	ours, _ := best(100, func() time.Duration { return once(5, run) }, func() time.Duration { return 0 })
	faster(b, ours, time.Duration(theirs.Seconds[0]*float64(time.Second)))
}

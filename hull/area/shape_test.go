package area

import (
	"math"
	"strings"
	"testing"
)

// Every shape makes an area of its usual sizes, twice as much for two, and
// refuses a size below 0.
func TestShapes(t *testing.T) {
	for _, s := range Shapes() {
		var x []float64
		for _, size := range s.Sizes {
			x = append(x, size.Usual)
		}
		once, err := s.Estimates(1, x)
		if err != nil || len(once) == 0 {
			t.Fatalf("%s: %v", s.Name, err)
		}
		twice, _ := s.Estimates(2, x)
		for i, e := range once {
			near(t, s.Name, twice[i].Area, 2*e.Area, 1e-9*e.Area)
			if e.Area <= 0 || e.Formula == "" || len(once) == 1 && len(e.Inputs) < len(s.Sizes) {
				t.Errorf("%s: %+v", s.Name, e)
			}
		}
		x[0] = -1
		if _, err := s.Estimates(1, x); err == nil {
			t.Errorf("%s of a size below 0 was made", s.Name)
		}
	}
	cone, _ := Cone(2, 1, 3)
	near(t, "cone", cone.Area, 14.3322, 5e-5)
}

// A leg from 5 m above water to 60 m below, in 40 m of water: 30 m in the first
// band, 10 m in the next, 20 m in the sea bed. Growth changes no area.
func TestByElevation(t *testing.T) {
	for _, growth := range []float64{0, 0.1} {
		es, err := ByElevation(1, 5, -60, -40, 0, growth)
		if err != nil || len(es) != 3 {
			t.Fatalf("%v, %v", es, err)
		}
		for i, want := range []struct {
			length float64
			name   string
		}{{30, "in the water, 0 to 30 m"}, {10, "in the water, 30 to 40 m"}, {20, "in the sea bed, 40 to 60 m"}} {
			near(t, want.name, es[i].Area, math.Pi*want.length, 1e-9)
			if !strings.Contains(es[i].Name, want.name) {
				t.Errorf("part %d is named %q", i, es[i].Name)
			}
			if strings.Contains(es[i].Benchmark, "growth") != (growth > 0) {
				t.Errorf("growth of %g m: %q", growth, es[i].Benchmark)
			}
		}
	}
	batter, _ := ByElevation(1, 0, -40, -40, 44, 0)
	near(t, "inclined", batter[0].Area+batter[1].Area, math.Pi*44, 1e-9)
	for _, bad := range [][3]float64{{0, 5, -40}, {5, -60, 1}, {5, -60, -40}} {
		length := 0.0
		if bad == [3]float64{5, -60, -40} {
			length = 10 // shorter than it is high
		}
		if _, err := ByElevation(1, bad[0], bad[1], bad[2], length, 0); err == nil {
			t.Errorf("%v, length %g was made", bad, length)
		}
	}
}

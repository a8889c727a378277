package area

import "testing"

// Every shape makes an area of its usual sizes, twice as much for two, and
// refuses a size below 0.
func TestShapes(t *testing.T) {
	for _, s := range Shapes() {
		var x []float64
		for _, size := range s.Sizes {
			x = append(x, size.Usual)
		}
		one := get(t)(s.Estimate(1, x))
		near(t, s.Name, get(t)(s.Estimate(2, x)).Area, 2*one.Area, 1e-9*one.Area)
		if one.Area <= 0 || one.Formula == "" || len(one.Inputs) < len(s.Sizes) {
			t.Errorf("%s: %+v", s.Name, one)
		}
		x[0] = -1
		if _, err := s.Estimate(1, x); err == nil {
			t.Errorf("%s of a size below 0 was made", s.Name)
		}
	}
	near(t, "cone", get(t)(Shapes()[1].Estimate(1, []float64{2, 1, 3})).Area, 14.3322, 5e-5)
}

package hull_test

import (
	"math"
	"testing"

	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// The integral of the course over an interval is the mean demand times its
// length.
func TestCourseAddsUpToTheMean(t *testing.T) {
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			t.Fatal(err)
		}
		course, demand := hull.NewCourse(a), hull.Demand(a)
		for i := range a.Zones {
			for k, iv := range a.Intervals() {
				sum := 0.0
				breaks := course.Breaks([]int{i}, k)
				for b := 1; b < len(breaks); b++ {
					first, last := course.Line(i, k, breaks[b-1], breaks[b])
					sum += (first + last) / 2 * (breaks[b] - breaks[b-1])
				}
				want := demand[i].Own[k].Mean * iv.Years()
				if math.Abs(sum-want) > 1e-9*want {
					t.Errorf("%s, %s, interval %d: the course gives %.9g A years, the mean %.9g", a.Name, a.Zones[i].ID, k, sum, want)
				}
			}
		}
	}
}

//go:build e2e && !ci && linux

package main_test

import (
	"slices"
	"testing"

	"anodewright/hull"
)

// A survey is entered from the keyboard alone: Insert adds a reading of the
// next set, and the keyboard is where its figures go.
func TestReadingsByKeyboardAlone(t *testing.T) {
	w := start(t)
	before := len(w.fleet()[0].Readings)
	w.key("ctrl+3")
	w.still()
	for k, figures := range []string{"30 33", "41.5"} {
		w.key("Insert")
		n := before + k + 1
		w.waitFor("a new reading", func(fleet []*hull.Asset) bool { return len(fleet[0].Readings) == n })
		w.still()
		w.enter(figures)
	}
	w.waitFor("the figures of both", func(fleet []*hull.Asset) bool {
		r := fleet[0].Readings
		return slices.Equal(r[before].WeighedWastage, []float64{0.30, 0.33}) && slices.Equal(r[before+1].WeighedWastage, []float64{0.415})
	})
	w.key("ctrl+z")
	w.waitFor("the last figure undone", func(fleet []*hull.Asset) bool { return len(fleet[0].Readings[before+1].WeighedWastage) == 0 })
	w.close()
}

//go:build e2e && !ci && linux

package main_test

import (
	"math"
	"strconv"
	"testing"

	"anodewright/app/say"
	"anodewright/hull"
	"anodewright/storage"
)

// In the dialog of settings the language has the keyboard first; units, dates,
// decimal sign, theme, text size, Cancel and Use follow by Tab.
const fromUnitsToUse = 6

// switchUnits opens the settings, chooses the next of the units and uses it.
func (w *window) switchUnits() {
	w.t.Helper()
	w.key("ctrl+comma")
	w.still()
	w.key("Tab")
	w.key("Right")
	for range fromUnitsToUse {
		w.key("Tab")
	}
	w.key("Return")
	w.wait("the units", func() bool {
		r, err := storage.Open(w.register, storage.ForReading())
		if err != nil {
			return false
		}
		defer r.Close()
		units, err := r.Setting("units")
		return err == nil && units == "us"
	})
	w.still()
}

func TestUnitSwitch(t *testing.T) {
	w := start(t)
	before := demo(t)[0].Zones[0]
	w.switchUnits()

	// What is shown and entered again unchanged is no edit: the area's own text
	// is opened, and Enter pressed.
	w.toArea()
	w.key("F2")
	w.key("Return")
	w.key("Up")
	w.still()

	// A figure is typed in square feet and stored in square metres.
	w.write("10763.91")
	w.key("Return")
	w.waitFor("1000 m²", func(fleet []*hull.Asset) bool {
		return len(fleet) > 0 && math.Abs(fleet[0].Zones[0].WettedArea-1000) < 0.001
	})
	w.key("ctrl+z")
	w.waitFor("the area as it was, to the last figure", func(fleet []*hull.Asset) bool {
		return fleet[0].Zones[0].WettedArea == before.WettedArea
	})
	w.close()

	// The choice lasts.
	w = again(t, w)
	w.toArea()
	say.UseUS(true)
	feet := say.Area.Show(2000)
	say.UseUS(false)
	w.enter(strconv.FormatFloat(feet, 'f', 6, 64))
	w.waitFor("2000 m²", func(fleet []*hull.Asset) bool { return math.Abs(fleet[0].Zones[0].WettedArea-2000) < 1e-6 })
	w.close()
}

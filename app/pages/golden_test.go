package pages

import (
	"fmt"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/test"

	"anodewright/anodes/plan"
	"anodewright/app/chart"
	"anodewright/app/look"
	"anodewright/storage/assetfile"
)

// drawnAs renders an object in a size, in both palettes and at two scales, and
// compares it with the pictures of that name in testdata. Pictures that differ
// are written to testdata/failed; to take them over copy them.
func drawnAs(t *testing.T, name string, size fyne.Size, make func() fyne.CanvasObject) {
	t.Helper()
	for mode, word := range map[look.Mode]string{look.Light: "light", look.Dark: "dark"} {
		for _, scale := range []float32{1, 2} {
			look.Apply(test.NewTempApp(t), mode, 1)
			w := test.NewTempWindow(t, nil)
			w.SetPadded(false)
			w.Canvas().(test.WindowlessCanvas).SetScale(scale)
			w.SetContent(make())
			w.Resize(size)
			test.AssertImageMatches(t, fmt.Sprintf("%s-%s-%g.png", name, word, scale), w.Canvas().Capture())
		}
	}
}

// The states of a drawing's zones are dealt out, so that all are to be seen
// and no plan is needed.
func TestPicturesLookAsTheyDid(t *testing.T) {
	states := []plan.ZoneState{{State: plan.Sound}, {State: plan.Thin, Cause: "of mass"}, {State: plan.Short, Cause: "of current"}, {State: plan.Spent, Cause: "wasted to the utilisation factor"}}
	for i, name := range map[int]string{0: "ship", 2: "jacket", 4: "sealine"} {
		a, err := assetfile.Decode(fleet()[i])
		must(t, err)
		dealt := make([]plan.ZoneState, len(a.Zones))
		for z := range dealt {
			dealt[z] = states[z%len(states)]
		}
		drawnAs(t, name, fyne.NewSize(560, 110), func() fyne.CanvasObject {
			v := newPictureView(func(int) {}, func(int) {})
			v.set(a, dealt, 1)
			return v
		})
	}
}

func TestChartLooksAsItDid(t *testing.T) {
	c := &chart.Chart{
		Title: "Wasted, % of the net mass", From: 0, To: 100, Most: 100, Letters: 4,
		Series: []chart.Series{
			{Name: "most", Role: chart.First, X: []float64{0, 60, 60, 100}, Y: []float64{10, 80, 0, 45}},
			{Name: "all", Role: chart.Second, X: []float64{0, 60, 60, 100}, Y: []float64{8, 60, 0, 38}},
			chart.Steps("steps", chart.Third, []float64{0, 60, 100}, []float64{20, 30}),
		},
		Levels: []chart.Level{{Y: 80, Text: "renewal limit"}},
		Marks:  []chart.Mark{{X: 60, Role: chart.Event}, {X: 25, Text: "today", Role: chart.Today}},
		Dots:   []chart.Dot{{X: 20, Y: 30, Low: 22, High: 41}},
		XTicks: []chart.Tick{{At: 0, Text: "2024"}, {At: 50, Text: "2025"}, {At: 100, Text: "2026"}},
	}
	drawnAs(t, "chart", fyne.NewSize(420, 150), func() fyne.CanvasObject {
		v := newChartView(func(float64) {})
		v.set(c)
		v.point(40, true)
		return v
	})
}

// The texts and places of a window without assets.
func TestWelcomeMarkup(t *testing.T) {
	f := shown(t, look.Light, 1, small)
	test.AssertObjectRendersToMarkup(t, "welcome.xml", f.welcome)
}

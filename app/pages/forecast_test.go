package pages

import (
	"bytes"
	"image/png"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"

	"anodewright/anodes/plan"
	"anodewright/app/chart"
	"anodewright/app/look"
	"anodewright/hull"
)

// forecastOf opens the forecast of the demo fleet's tanker, which has readings.
func forecastOf(t *testing.T) (*Frame, *forecastPage) {
	f := shown(t, look.Light, 1, roomy, fleet()[1])
	return f, f.open(t, "Forecast").(*forecastPage)
}

func TestForecastShowsDemandStepsAndReadings(t *testing.T) {
	f, p := forecastOf(t)
	o := f.s.Outcome()
	p.circuit.SetChecked(false)
	charts := p.made()
	steps := charts[0].Series[0]
	z := o.Zones[p.zone.chosen]
	if n := len(o.Intervals); len(steps.Y) != 2*n {
		t.Fatalf("%d points for %d intervals", len(steps.Y), n)
	}
	for k, iv := range z.Intervals {
		if want := z.Factor.Used * iv.Total.Initial; steps.Y[2*k] != want || steps.X[2*k] != float64(iv.From) {
			t.Errorf("interval %d: step of %v at %v, want %v at %v", k, steps.Y[2*k], steps.X[2*k], want, iv.From)
		}
	}
	dots := 0
	for zone := range o.Zones {
		dots += len(readDots(o, zone))
	}
	if dots == 0 {
		t.Error("no reading is marked on any zone's wastage")
	}
}

func TestForecastIsReadByKeyboard(t *testing.T) {
	f, p := forecastOf(t)
	if f.win.Canvas().Focused() != fyne.Focusable(p.charts[0]) {
		t.Fatal("the chart has not the keyboard")
	}
	before := p.read.String()
	key(f, fyne.KeyPageDown)
	if want := today.AddMonths(12); f.cursor != want || p.charts[2].cursor != float64(want) {
		t.Errorf("a year on the cursor is at %v, the chart's at %v", f.cursor, p.charts[2].cursor)
	}
	if p.read.String() == before || !strings.Contains(p.read.String(), "1 Dec 2027: asks ") {
		t.Errorf("it reads %q", p.read.String())
	}
	c := p.made()[0]
	for _, r := range "++" {
		f.win.Canvas().Focused().TypedRune(r)
	}
	if zoomed := p.made()[0]; zoomed.To-zoomed.From > 0.26*(c.To-c.From) {
		t.Errorf("+ twice shows %v of %v days", zoomed.To-zoomed.From, c.To-c.From)
	}
	key(f, fyne.KeyEnd)
	if w := p.window; f.cursor != f.s.Asset().Horizon || w.To < float64(f.cursor) {
		t.Errorf("the cursor at %v has left the charts, which end at %v", f.cursor, w.To)
	}
	f.win.Canvas().Focused().TypedRune('0')
	if !p.window.Whole() {
		t.Error("0 does not show all of the time")
	}
}

func TestForecastMouse(t *testing.T) {
	f, p := forecastOf(t)
	v := p.charts[1]
	x := v.drawing.Cursor(float64(today + 700)).X1
	v.MouseMoved(&desktop.MouseEvent{PointEvent: fyne.PointEvent{Position: fyne.NewPos(x, 20)}})
	if f.cursor != today || math.Abs(p.charts[0].cursor-float64(today+700)) > 2 {
		t.Errorf("pointing moved the cursor to %v, the reading line to %v", f.cursor, p.charts[0].cursor)
	}
	v.MouseDown(&desktop.MouseEvent{PointEvent: fyne.PointEvent{Position: fyne.NewPos(x, 20)}})
	if d := f.cursor - (today + 700); d < -2 || d > 2 {
		t.Errorf("a press took the cursor to %v", f.cursor)
	}
	v.Scrolled(&fyne.ScrollEvent{PointEvent: fyne.PointEvent{Position: fyne.NewPos(x, 20)}, Scrolled: fyne.NewDelta(0, 10)})
	if p.window.Whole() {
		t.Error("the wheel does not zoom")
	}
}

func TestForecastTableHasTheChartsFigures(t *testing.T) {
	f, p := forecastOf(t)
	p.tabs.buttons[1].OnTapped()
	if len(p.samples.cells) != len(p.course) || len(p.course) < 50 {
		t.Fatalf("%d rows for %d samples", len(p.samples.cells), len(p.course))
	}
	text := p.times.CopyAll()
	if !strings.Contains(text, "Steel asks [whole circuit, A]") || !strings.Contains(text, amperes(p.course[7].Gives)) {
		t.Errorf("copied: %.300s", text)
	}
	_ = f
}

func TestForecastIsSavedInThreeForms(t *testing.T) {
	f, p := forecastOf(t)
	dir := t.TempDir()
	for ending, begins := range map[string]string{".pdf": "%PDF-1.4", ".svg": "<svg ", ".png": "\x89PNG"} {
		p.save()
		path := filepath.Join(dir, "charts"+ending)
		typed(f, path)
		key(f, fyne.KeyReturn)
		wants(t, f, "Written: ")
		key(f, fyne.KeyReturn)
		data, err := os.ReadFile(path)
		if err != nil || !bytes.HasPrefix(data, []byte(begins)) {
			t.Fatalf("%s: %v, begins %.20q", ending, err, data)
		}
		if ending == ".png" {
			img, err := png.Decode(bytes.NewReader(data))
			if err != nil || img.Bounds().Dx() != sheetWidth*sheetDots {
				t.Errorf("the picture: %v", err)
			}
		}
		if ending == ".svg" && !strings.Contains(string(data), "Turnstone Fairway: ") {
			t.Error("the heading is not in the SVG")
		}
	}
}

func TestSampleAtLiesBetweenItsNeighbours(t *testing.T) {
	course := []plan.Sample{{Date: 100, Wastage: 0.2}, {Date: 200, Wastage: 0.6}, {Date: 200, Wastage: 0}, {Date: 300, Wastage: 0.4}}
	for day, want := range map[hull.Date]float64{50: 0.2, 100: 0.2, 125: 0.3, 199: 0.596, 200: 0, 250: 0.2, 400: 0.4} {
		if s, ok := sampleAt(course, day); !ok || math.Abs(s.Wastage-want) > 1e-9 {
			t.Errorf("day %d: %v, want %v", day, s.Wastage, want)
		}
	}
	if _, ok := sampleAt(nil, 100); ok {
		t.Error("no course is read")
	}
}

func TestTimeTicks(t *testing.T) {
	at := func(y, m, d int) float64 { return float64(hull.NewDate(y, 1, 1).AddMonths(m-1)) + float64(d-1) }
	words := func(ticks []chart.Tick) string {
		var all []string
		for _, x := range ticks {
			all = append(all, x.Text)
		}
		return strings.Join(all, " ")
	}
	if got := words(timeTicks(at(2024, 3, 1), at(2028, 2, 1))); got != "2025 2026 2027 2028" {
		t.Errorf("four years: %s", got)
	}
	if got := words(timeTicks(at(2026, 11, 5), at(2027, 3, 5))); got != "Dec 2027 Feb Mar" {
		t.Errorf("four months: %s", got)
	}
	if got := len(timeTicks(at(2000, 1, 1), at(2050, 1, 1))); got > 17 {
		t.Errorf("fifty years: %d labels", got)
	}
}

// In the smallest window all three charts have room while the tables below are
// folded; with the tables open one has it, and which one can be chosen.
func TestForecastChartsHaveRoom(t *testing.T) {
	for _, scale := range []float32{1, 1.5} {
		f := shown(t, look.Light, scale, small, fleet()[1])
		p := f.open(t, "Forecast").(*forecastPage)
		check := func(when string) {
			t.Helper()
			seen := 0
			for i, v := range p.charts {
				if !v.Visible() {
					continue
				}
				seen++
				if h := v.Size().Height; h < look.Px(80) {
					t.Errorf("text scale %g, %s: chart %d is %v high", scale, when, i, h)
				}
			}
			if want := p.one; (want < 0) != (seen == 3) || want >= 0 && seen != 1 {
				t.Errorf("text scale %g, %s: %d charts, shown alone %d", scale, when, seen, want)
			}
			if p.which.SelectedIndex() != p.one+1 {
				t.Errorf("%s: the choice says %q, shown alone is %d", when, p.which.Selected, p.one)
			}
		}
		if p.drawer.open {
			t.Errorf("text scale %g: the tables begin open", scale)
		}
		check("folded")
		if scale == 1 && p.one >= 0 {
			t.Error("the folded page does not show all charts")
		}
		key(f, fyne.KeyF7)
		check("open")
		if p.one != 0 {
			t.Errorf("text scale %g: with the tables open chart %d is shown", scale, p.one)
		}
		p.which.SetSelectedIndex(2)
		check("wastage chosen")
		if !p.charts[1].Visible() || p.focus() != fyne.Focusable(p.charts[1]) {
			t.Error("the chosen chart is not shown, or has not the keyboard")
		}
		p.which.SetSelectedIndex(0)
		check("all chosen")
		if p.drawer.open || scale == 1 && p.one >= 0 {
			t.Errorf("text scale %g: all chosen: tables open %v, shown alone %d", scale, p.drawer.open, p.one)
		}
	}
}

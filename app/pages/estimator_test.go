package pages

import (
	"math"
	"strings"
	"testing"

	"fyne.io/fyne/v2"

	"anodewright/app/look"
)

// openEstimator opens the estimates of the open asset for a zone.
func openEstimator(f *Frame, zone int) *estimator {
	e := &estimator{f: f, zone: zone, list: &fixed{}, targets: &fixed{}}
	e.build()
	e.d.Show()
	e.pick(max(e.first(zone), 0))
	return e
}

// The zone's own estimate is chosen first; another estimate suggests its zone;
// using it changes the area in one step that can be undone.
func TestEstimatorEntersAnArea(t *testing.T) {
	f := shown(t, look.Light, 1, small, fleet()[0])
	e := openEstimator(f, 0)
	if got := e.all[e.row].Name; !strings.HasPrefix(got, "Vertical sides") {
		t.Errorf("for the sides it starts at %s", got)
	}
	for i, x := range e.all {
		if strings.HasPrefix(x.Name, "Propeller") {
			e.pick(i)
		}
	}
	zone := f.s.Asset().Zones[e.zone]
	if zone.Region != "propeller" || !strings.HasPrefix(e.use.Text, "Use ") || !strings.HasSuffix(e.use.Text, zone.Name) {
		t.Fatalf("the propeller's estimate is offered to %s by %q", zone.Name, e.use.Text)
	}
	for _, want := range []string{"2 (AE/A0)", "Source: geometry", "Off: "} {
		if !strings.Contains(e.said.Text(), want) {
			t.Errorf("%q does not say %q", e.said.Text(), want)
		}
	}
	before := zone.WettedArea
	e.enter()
	if got := f.s.Asset().Zones[e.zone].WettedArea; math.Abs(got-e.all[e.row].Area) > 0.05 || got == before {
		t.Errorf("the zone's area is %g m2, want %g", got, e.all[e.row].Area)
	}
	if err := f.s.Undo(); err != nil || f.s.Asset().Zones[e.zone].WettedArea != before {
		t.Errorf("undo: %v, %g m2", err, f.s.Asset().Zones[e.zone].WettedArea)
	}
}

// The three hull forms stand side by side, each with its error; another draught
// moves the first.
func TestEstimatorSideBySide(t *testing.T) {
	f := shown(t, look.Light, 1, small, fleet()[0])
	e := openEstimator(f, 0)
	for i, want := range []string{"by ship type", "Denny-Mumford"} {
		if !strings.Contains(e.list.cells[i][0].Text, want) || !strings.Contains(e.list.cells[i][3].Text, "within") {
			t.Errorf("row %d: %v", i, e.list.cells[i])
		}
	}
	design := e.all[0].Area
	e.draught.SetText("6.1")
	if got, want := design-e.all[0].Area, 2.0*(7.1-6.1)*(120.5+18.2); math.Abs(got-want) > 1e-6 {
		t.Errorf("a metre less of draught takes %g m2 off, want %g", got, want)
	}
	e.draught.SetText("deep")
	if len(e.all) != 0 || !e.use.Disabled() || !strings.Contains(e.about.Text(), "want a number") {
		t.Errorf("a draught that is no number: %d estimates, %q", len(e.all), e.about.Text())
	}
	e.draught.TypedKey(&fyne.KeyEvent{Name: fyne.KeyEscape})
	if f.win.Canvas().Overlays().Top() != nil {
		t.Error("Escape does not close the estimates")
	}
}

// An asset with nothing to estimate from says so.
func TestEstimatorWithoutParticulars(t *testing.T) {
	f := shown(t, look.Light, 1, small, fleet()[2]) // a jacket with entered areas
	e := openEstimator(f, 0)
	if len(e.all) != 0 || !e.use.Disabled() || !strings.Contains(e.about.Text(), "nothing to estimate") {
		t.Errorf("%d estimates, %q", len(e.all), e.about.Text())
	}
}

// A shape of entered sizes stands first and can be used for any zone of any
// asset; a size that is none is named.
func TestEstimatorOfAShape(t *testing.T) {
	f := shown(t, look.Light, 1, small, fleet()[2]) // a jacket with entered areas
	e := openEstimator(f, 2)
	e.shape.choice.buttons[2].OnTapped() // a cone, of 2 to 1 m by 3 m
	if len(e.all) != 1 || math.Abs(e.all[0].Area-14.3322) > 5e-5 || e.zone != 2 {
		t.Fatalf("a cone: %+v for zone %d", e.all, e.zone)
	}
	e.shape.pieces.SetText("4")
	e.shape.entries[2].SetText("6")
	want := 4 * math.Pi * 1.5 * math.Hypot(6, 0.5)
	if math.Abs(e.all[0].Area-want) > 1e-9 {
		t.Errorf("four cones of 6 m: %g m2, want %g", e.all[0].Area, want)
	}
	e.enter()
	if got := f.s.Asset().Zones[2].WettedArea; math.Abs(got-want) > 0.5 {
		t.Errorf("the zone has %g m2, want %g", got, want)
	}
	for text, name := range map[string]string{"0": "height h", "tall": "height"} {
		e.shape.entries[2].SetText(text)
		if len(e.all) != 0 || !e.use.Disabled() || !strings.Contains(e.about.Text(), name+": want a number") {
			t.Errorf("a height of %s: %d estimates, %q", text, len(e.all), e.about.Text())
		}
	}
}

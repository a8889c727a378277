//go:build e2e && !ci && linux

package main_test

import (
	"image"
	"image/color"
	"math"
	"strconv"
	"testing"
	"time"

	"anodewright/app/session"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage"
	"anodewright/storage/assetfile"
)

// day is the date that journeys plan as of.
const day = "2026-12-01"

// start opens the app over a new register and waits until it shows the demo
// fleet with the keyboard in the table of zones.
func start(t *testing.T) *window {
	t.Helper()
	w := open(t, "-demo", "-today", day)
	w.still()
	return w
}

// again opens the app once more over a register that was used before.
func again(t *testing.T, before *window) *window {
	t.Helper()
	w := openIn(t, before.home, "-today", day)
	w.still()
	return w
}

// still waits until the window no longer changes: everything is computed and
// drawn. It does not come to rest while an entry has the keyboard, whose
// cursor blinks.
func (w *window) still() {
	w.t.Helper()
	var last image.Image
	w.wait("the window to come to rest", func() bool {
		now, err := w.picture()
		if err != nil {
			return false
		}
		same := last != nil && len(changed(last, now)) == 0
		last = now
		time.Sleep(100 * time.Millisecond)
		return same
	})
}

// changed returns the points in which two pictures differ.
func changed(a, b image.Image) []image.Point {
	var points []image.Point
	box := a.Bounds().Union(b.Bounds())
	for y := box.Min.Y; y < box.Max.Y; y++ {
		for x := box.Min.X; x < box.Max.X; x++ {
			if a.At(x, y) != b.At(x, y) {
				points = append(points, image.Pt(x, y))
			}
		}
	}
	return points
}

// ring returns the middle of the ring around the selected cell, which is found
// by moving the selection one cell to the left and comparing pictures.
func (w *window) ring() image.Point {
	w.t.Helper()
	w.still()
	here, err := w.picture()
	if err != nil {
		w.t.Fatal(err)
	}
	w.key("Left")
	w.still()
	left, err := w.picture()
	if err != nil {
		w.t.Fatal(err)
	}
	accent := color.NRGBA{R: 0x0f, G: 0x5c, B: 0x73, A: 0xff}
	var box image.Rectangle
	for _, p := range changed(here, left) {
		if near(here.At(p.X, p.Y), accent) {
			box = box.Union(image.Rect(p.X, p.Y, p.X+1, p.Y+1))
		}
	}
	if box.Dx() < 20 || box.Dy() < 10 {
		w.t.Fatalf("no ring was found, only %v", box)
	}
	return box.Min.Add(box.Max).Div(2)
}

func near(a, b color.Color) bool {
	r1, g1, b1, _ := a.RGBA()
	r2, g2, b2, _ := b.RGBA()
	off := func(x, y uint32) float64 { return math.Abs(float64(x) - float64(y)) }
	return off(r1, r2)+off(g1, g2)+off(b1, b2) < 0x3000
}

// fleet returns the assets that the register holds, in their order.
func (w *window) fleet() []*hull.Asset {
	w.t.Helper()
	all, err := w.stored()
	if err != nil {
		w.t.Fatal(err)
	}
	return all
}

func (w *window) stored() (all []*hull.Asset, err error) {
	r, err := storage.Open(w.register, storage.ForReading())
	if err != nil {
		return nil, err
	}
	defer r.Close()
	list, err := r.List()
	for _, e := range list {
		a, _, lerr := r.Load(e.ID)
		if lerr != nil {
			return nil, lerr
		}
		all = append(all, a)
	}
	return all, err
}

// revision returns the newest revision of the asset at a place of the fleet.
func (w *window) revision(place int) int64 {
	w.t.Helper()
	r, err := storage.Open(w.register, storage.ForReading())
	if err != nil {
		w.t.Fatal(err)
	}
	defer r.Close()
	list, err := r.List()
	if err != nil || place >= len(list) {
		w.t.Fatalf("%d assets, %v", len(list), err)
	}
	_, rev, err := r.Load(list[place].ID)
	if err != nil {
		w.t.Fatal(err)
	}
	return rev
}

// waitFor waits until the register holds a fleet that fits; the app may be
// writing it.
func (w *window) waitFor(what string, fits func(fleet []*hull.Asset) bool) {
	w.t.Helper()
	w.wait("the register to hold "+what, func() bool {
		all, err := w.stored()
		return err == nil && fits(all)
	})
}

// waitForArea waits until the first zone of the first asset has an area.
func (w *window) waitForArea(m2 float64) {
	w.t.Helper()
	w.waitFor("an area of "+strconv.FormatFloat(m2, 'f', -1, 64)+" m²", func(fleet []*hull.Asset) bool {
		return len(fleet) > 0 && fleet[0].Zones[0].WettedArea == m2
	})
}

// toArea moves the selection from the first cell of the table of zones to the
// wetted area of the first zone.
func (w *window) toArea() {
	w.t.Helper()
	w.key("ctrl+Home")
	for _, f := range session.ZoneColumns() {
		if f.Key == "wetted_area_m2" {
			return
		}
		w.key("Right")
	}
}

// enter types a text and Enter.
func (w *window) enter(text string) {
	w.t.Helper()
	w.write(text)
	w.key("Return")
}

// drafts returns the faulty texts that the register keeps of the first asset.
func (w *window) drafts() map[string]string {
	w.t.Helper()
	r, err := storage.Open(w.register, storage.ForReading())
	if err != nil {
		w.t.Fatal(err)
	}
	defer r.Close()
	list, err := r.List()
	if err != nil || len(list) == 0 {
		w.t.Fatal("no asset: ", err)
	}
	drafts, err := r.Drafts(list[0].ID)
	if err != nil {
		w.t.Fatal(err)
	}
	return drafts
}

// demo returns the demo fleet as it is shipped.
func demo(t *testing.T) []*hull.Asset {
	t.Helper()
	var all []*hull.Asset
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			t.Fatal(err)
		}
		all = append(all, a)
	}
	return all
}

// same fails unless two assets are equal.
func same(t *testing.T, what string, got, want *hull.Asset) {
	t.Helper()
	if g, w := string(assetfile.Encode(got)), string(assetfile.Encode(want)); g != w {
		t.Errorf("%s is\n%s\nwant\n%s", what, g, w)
	}
}

package anodes

import (
	"strings"
	"testing"

	"anodewright/hull"
)

// ISO 15589-2 (2004) and DNV-RP-F103 (2010), from memory; the lower of both.
func TestAtTemperature(t *testing.T) {
	for _, c := range []struct {
		alloy    hull.Alloy
		medium   hull.Medium
		t        float64
		ok       bool
		capacity float64
	}{
		{hull.Aluminium, hull.Seawater, 5, true, 2000},
		{hull.Aluminium, hull.Seawater, 30, true, 2000},
		{hull.Aluminium, hull.Seawater, 45, true, 1750},
		{hull.Aluminium, hull.Seawater, 80, true, 720},
		{hull.Aluminium, hull.Seawater, 81, false, 0},
		{hull.Aluminium, hull.Soil, 70, true, 500},
		{hull.Aluminium, hull.Sediment, 60, true, 680},
		{hull.Zinc, hull.Seawater, 30, true, 780},
		{hull.Zinc, hull.Seawater, 31, false, 0},
		{hull.Zinc, hull.Sediment, 31, true, 580},
		{hull.Zinc, hull.Sediment, 50, true, 580},
		{hull.Magnesium, hull.Soil, 20, false, 0},
	} {
		w, ok := AtTemperature(c.alloy, c.medium, c.t)
		if ok != c.ok || ok && w.Capacity != c.capacity {
			t.Errorf("%s in %s at %g °C: %+v %v, want %g %v", c.alloy, c.medium, c.t, w, ok, c.capacity, c.ok)
		}
	}
}

func TestConcerns(t *testing.T) {
	warm, cool, own := 55.0, 20.0, 1500.0
	pattern := func(alloy hull.Alloy) hull.Pattern { return hull.Pattern{ID: "p", Alloy: alloy} }
	stated := pattern(hull.Aluminium)
	stated.Capacity = &own
	for _, c := range []struct {
		what   string
		medium hull.Medium
		inside *float64
		p      hull.Pattern
		want   string
	}{
		{"aluminium in the sea", hull.Seawater, &cool, pattern(hull.Aluminium), ""},
		{"aluminium in a river", hull.Fresh, nil, pattern(hull.Aluminium), "fresh-aluminium"},
		{"zinc in a river", hull.Fresh, nil, pattern(hull.Zinc), "fresh-zinc"},
		{"magnesium in a river", hull.Fresh, &warm, pattern(hull.Magnesium), ""},
		{"aluminium in soil", hull.Soil, nil, pattern(hull.Aluminium), "soil-aluminium"},
		{"zinc in soil", hull.Soil, nil, pattern(hull.Zinc), ""},
		{"aluminium on a hot riser", hull.Seawater, &warm, pattern(hull.Aluminium), "hot-capacity"},
		{"aluminium with its own figure", hull.Seawater, &warm, stated, ""},
		{"zinc on a hot riser", hull.Seawater, &warm, pattern(hull.Zinc), "hot-capacity"},
	} {
		a := &hull.Asset{Waters: []hull.Water{{ID: "w", Medium: c.medium, Temperature: &cool}}}
		z := &hull.Zone{Waters: []hull.WaterShare{{Water: "w", Share: 1}}, InsideTemperature: c.inside}
		got := ""
		for _, x := range Concerns(a, z, &c.p) {
			got += x.ID
			if x.Text == "" || x.Source == "" || x.Confidence == "" {
				t.Errorf("%s: %+v", c.what, x)
			}
		}
		if got != c.want {
			t.Errorf("%s: %q, want %q", c.what, got, c.want)
		}
	}
}

// The caution offers the figure and leaves the sizing alone.
func TestHotCapacityOffersTheFigure(t *testing.T) {
	inside := 45.0
	a := &hull.Asset{Waters: []hull.Water{{ID: "w", Medium: hull.Seawater}}}
	z := &hull.Zone{Waters: []hull.WaterShare{{Water: "w", Share: 1}}, InsideTemperature: &inside}
	p := hull.Pattern{ID: "p", Alloy: hull.Aluminium}
	text := Concerns(a, z, &p)[0].Text
	if !strings.Contains(text, "1750 Ah/kg") || !strings.Contains(text, "2000 Ah/kg") {
		t.Error(text)
	}
	if got := MetalOf(&p, hull.Seawater).Capacity; got != 2000 {
		t.Errorf("sizing counts with %g Ah/kg", got)
	}
}

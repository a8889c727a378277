package session

import (
	"math"
	"testing"

	"anodewright/app/say"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

func demoAssets(t *testing.T) []*hull.Asset {
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

// Typing what is shown changes nothing, in every way of writing figures and
// dates and in every language.
func TestShownTextTypedAgainKeepsTheValue(t *testing.T) {
	t.Cleanup(func() {
		say.Use("en")
		say.UseUS(false)
		say.UseComma(false)
		say.UseDates(say.InWords)
	})
	for _, c := range []struct {
		language  string
		us, comma bool
		dates     say.Dates
	}{{"en", true, false, say.MonthDayYear}, {"es", false, true, say.DayMonthYear}, {"es", true, true, say.ISO}, {"en", false, false, say.InWords}} {
		say.Use(c.language)
		say.UseUS(c.us)
		say.UseComma(c.comma)
		say.UseDates(c.dates)
		for _, a := range demoAssets(t) {
			before := string(assetfile.Encode(a))
			for _, list := range []List{Whole, Zones, Waters, Dockings, Patterns, Readings} {
				for i := range lengthOf(a, list) {
					for _, f := range fieldsOf(list) {
						text := f.Get(a, i)
						if err := f.Set(a, i, text); err != nil {
							t.Errorf("%+v: %s: %s %q: %v", c, a.Name, f.Key, text, err)
						}
						if again := f.Get(a, i); again != text {
							t.Errorf("%+v: %s: %s %q becomes %q", c, a.Name, f.Key, text, again)
						}
					}
				}
			}
			if after := string(assetfile.Encode(a)); after != before {
				t.Errorf("%+v: %s is not what it was", c, a.Name)
			}
		}
	}
}

func TestFiguresAreTypedInTheUnitShown(t *testing.T) {
	t.Cleanup(func() { say.UseUS(false) })
	say.UseUS(true)
	a := demoAssets(t)[0]
	for _, c := range []struct {
		list       List
		key, text  string
		unit       string
		value      func() float64
		want, tiny float64
	}{
		{Zones, "wetted_area_m2", "10763.91", "ft²", func() float64 { return a.Zones[0].WettedArea }, 1000, 1e-3},
		{Zones, "depth_m", "10", "ft", func() float64 { return a.Zones[0].Depth }, 3.048, 1e-12},
		{Zones, "densities_ma_m2", "10 / 5 / 7.5", "mA/ft²", func() float64 { return a.Zones[0].OwnDensities.Mean }, 53.8195520835, 1e-6},
		{Waters, "temperature_c", "59", "°F", func() float64 { return *a.Waters[0].Temperature }, 15, 1e-12},
		{Waters, "resistivity_ohm_m", "25", "Ω cm", func() float64 { return *a.Waters[0].Resistivity }, 0.25, 1e-12},
		{Patterns, "net_mass_kg", "100", "lb", func() float64 { return a.Patterns[0].NetMass }, 45.359237, 1e-9},
		{Patterns, "length_m", "36", "in", func() float64 { return a.Patterns[0].Length }, 0.9144, 1e-12},
	} {
		for _, f := range fieldsOf(c.list) {
			if f.Key != c.key {
				continue
			}
			if err := f.Set(a, 0, c.text); err != nil {
				t.Errorf("%s: %v", c.key, err)
			} else if got := c.value(); math.Abs(got-c.want) > c.tiny {
				t.Errorf("%s: %s %s is stored as %v, want %v", c.key, c.text, c.unit, got, c.want)
			}
			if f.ShownUnit() != c.unit {
				t.Errorf("%s: the unit shown is %q, want %q", c.key, f.ShownUnit(), c.unit)
			}
			if again := f.Get(a, 0); again != c.text {
				t.Errorf("%s: %q typed is shown as %q", c.key, c.text, again)
			}
		}
	}
}

func TestDecimalCommaReadsBothWays(t *testing.T) {
	t.Cleanup(func() { say.UseComma(false) })
	say.UseComma(true)
	for text, want := range map[string]float64{"1,234": 1.234, "12,5": 12.5, "0.585": 0.585, "1 234,5": 1234.5, "1.234,5": 1234.5} {
		if got, err := ParseNumber(text); err != nil || got != want {
			t.Errorf("%q is read as %v, %v, want %v", text, got, err, want)
		}
	}
	if x, err := ParseNumber("1.234"); err == nil {
		t.Errorf("1.234 can mean both and is read as %v", x)
	}
	if got := Figure(1234.56, 1); got != "1\u00a0234,6" {
		t.Errorf("got %q", got)
	}
	if got := Number(0.585); got != "0,585" {
		t.Errorf("got %q", got)
	}
}

package plan_test

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"anodewright/anodes/order"
	"anodewright/anodes/plan"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// scatter is the published sd of the logarithm of the demand factor.
const scatter = 0.53

// bareZones is an asset of bare zones without anodes, a docking and then the
// horizon, so that each zone's only action is a renewal whose need is in
// proportion to the demand factor. circuits names the circuit of each zone.
func bareZones(t *testing.T, circuits ...string) *hull.Asset {
	t.Helper()
	var zones []string
	for i, c := range circuits {
		zones = append(zones, fmt.Sprintf(`{"id": "z%d", "name": "Zone %d", "region": "sheet-piling", "surface": "carbon-steel",
			"wetted_area_m2": %d, "depth_m": 5, "circuit": %q, "coating": {"category": "none"}, "waters": [{"water": "w"}]}`, i, i, 150+70*i, c))
	}
	a, err := assetfile.Decode([]byte(`{"format": "anodewright-asset", "version": 1, "minor": 0, "name": "Quay", "kind": "harbour",
		"today": "2026-12-01", "in_service": "2020-01-01", "last_docking": "2024-01-01", "horizon": "2034-01-01",
		"waters": [{"id": "w", "temperature_c": 10, "salinity": 34}], "zones": [` + strings.Join(zones, ",") + `],
		"patterns": [{"id": "p", "alloy": "al-zn-in", "shape": "long-flush", "length_m": 1, "width_m": 0.15, "height_m": 0.12,
			"net_mass_kg": 45, "utilisation": 0.85, "price": 300}],
		"dockings": [{"date": "2028-01-01"}], "stock": [{"pattern": "p", "count": 5}]}`))
	if err != nil {
		t.Fatal(err)
	}
	return a
}

// quotients are the exact pieces that each zone's renewal asks for at the
// demand factor 1.
func quotients(t *testing.T, a *hull.Asset) []float64 {
	t.Helper()
	q := make([]float64, len(a.Zones))
	for _, l := range plan.Compute(a, 0).Schedule {
		q[l.Zone], _ = l.Need.Largest()
	}
	return q
}

// below is the probability of a demand factor of at most f.
func below(f float64) float64 { return (1 + math.Erf(math.Log(f)/scatter/math.Sqrt2)) / 2 }

// factorBelow is the demand factor that the true one is below with p.
func factorBelow(p float64) float64 { return math.Exp(scatter * math.Sqrt2 * math.Erfinv(2*p-1)) }

// The need of one zone is its quotient times a lognormal factor, rounded up,
// so that the fractile's quantity has the newsvendor's closed form.
func TestStagedNeedOfOneZone(t *testing.T) {
	a := bareZones(t, "one")
	q := quotients(t, a)[0]
	for _, rush := range []float64{1.25, 2, 3, 11} {
		a.Costs.RushFactor, a.Costs.Recovered = &rush, 0.25
		staged := plan.Stage(plan.Compute(a, 0))
		if len(staged) != 1 {
			t.Fatalf("%d lines: %+v", len(staged), staged)
		}
		s := staged[0]
		for n := 1; n < 4*int(q); n++ {
			if got, want := s.Need.UpTo(n), below(float64(n)/q); math.Abs(got-want) > 0.006 {
				t.Errorf("at most %d pieces: probability %.4f, want %.4f", n, got, want)
			}
		}
		fractile := (rush - 1) * 300 / ((rush-1)*300 + 0.75*300)
		if got := s.Wrong.Fractile(); math.Abs(got-fractile) > 1e-12 {
			t.Errorf("rush factor %g: fractile %g, want %g", rush, got, fractile)
		}
		// The factor is cut in 101 parts, so the quantity is that of a
		// probability within half a part.
		low, high := int(math.Ceil(q*factorBelow(fractile-0.006))), int(math.Ceil(q*factorBelow(fractile+0.006)))
		if s.Now < low || s.Now > high {
			t.Errorf("rush factor %g: %d pieces now, by the closed form %d to %d", rush, s.Now, low, high)
		}
		if s.FromStock != min(5, s.Now) || s.Ordered != s.Now-s.FromStock || s.Planned != int(math.Ceil(q-1e-9)) {
			t.Errorf("rush factor %g: %+v", rush, s)
		}
	}
}

// In one circuit the zones share their factor, so that quantiles add up; in
// two they are independent, and the sum is that of every pair of counts.
func TestStagedNeedOverCircuits(t *testing.T) {
	together, apart := bareZones(t, "one", "one"), bareZones(t, "one", "two")
	q := quotients(t, together)
	one := plan.Stage(plan.Compute(together, 0))[0].Need
	for _, p := range []float64{0.05, 0.3, 0.5, 0.8, 0.95} {
		low := math.Ceil(q[0]*factorBelow(p-0.006)) + math.Ceil(q[1]*factorBelow(p-0.006))
		high := math.Ceil(q[0]*factorBelow(p+0.006)) + math.Ceil(q[1]*factorBelow(p+0.006))
		if got := float64(one.Quantile(p)); got < low || got > high {
			t.Errorf("one circuit, %g: %g pieces, want %g to %g", p, got, low, high)
		}
	}
	const parts = 101
	pairs := map[int]float64{}
	for i := range parts {
		for k := range parts {
			f, g := factorBelow((float64(i)+0.5)/parts), factorBelow((float64(k)+0.5)/parts)
			pairs[int(math.Ceil(q[0]*f-1e-9)+math.Ceil(q[1]*g-1e-9))] += 1.0 / (parts * parts)
		}
	}
	two := plan.Stage(plan.Compute(apart, 0))[0].Need
	for k, p := range two.P {
		if math.Abs(p-pairs[two.From+k]) > 1e-9 {
			t.Errorf("two circuits, %d pieces: probability %g, by enumeration %g", two.From+k, p, pairs[two.From+k])
		}
	}
	if one.Quantile(0.95) <= two.Quantile(0.95) {
		t.Errorf("independent circuits spread as far as one: %d and %d pieces at 95 %%", two.Quantile(0.95), one.Quantile(0.95))
	}
}

// A sharper factor needs less beyond its median; what readings teach is used
// only where the plan uses it.
func TestStagedFollowsTheReadings(t *testing.T) {
	a, err := assetfile.Decode(assets.Demo()[3])
	if err != nil {
		t.Fatal(err)
	}
	today := hull.NewDate(2026, 12, 1)
	wide := func(opts ...plan.Option) float64 {
		for _, s := range plan.Stage(plan.Compute(a, today, opts...)) {
			if s.Pattern.ID == "slab-50" && s.Planned > 0 {
				return float64(s.AtMost-s.Surely) / float64(s.Planned)
			}
		}
		t.Fatal("no slabs are planned")
		return 0
	}
	if before, after := wide(), wide(plan.WithReadings()); after > 0.6*before {
		t.Errorf("the need spreads over %.2f of what is planned before the readings and %.2f after", before, after)
	}
}

// Of every demo asset: probabilities add up, quantities are in order, stock is
// used once, and no planned pattern is missing.
func TestStagedOfTheDemoFleet(t *testing.T) {
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			t.Fatal(err)
		}
		for _, opts := range [][]plan.Option{{plan.WithStaging()}, {plan.WithStaging(), plan.WithReadings()}} {
			o := plan.Compute(a, hull.NewDate(2026, 12, 1), opts...)
			stock := order.InStock(a)
			seen := map[string]bool{}
			for _, s := range o.Staged {
				sum := 0.0
				for _, p := range s.Need.P {
					sum += p
				}
				if math.Abs(sum-1) > 1e-9 || s.Surely > s.AtMost || s.Now < s.Need.From || s.Ordered < s.Now-s.FromStock || s.Enough() < s.Wrong.Fractile()-1e-9 {
					t.Errorf("%s, %s for %s: %+v", a.Name, s.Pattern.ID, s.Docking, s)
				}
				stock[s.Pattern.ID] -= s.FromStock
				seen[s.Docking.String()+s.Pattern.ID] = true
			}
			for id, n := range stock {
				if n < 0 {
					t.Errorf("%s: %d more of %s are used than lie in stock", a.Name, -n, id)
				}
			}
			for _, l := range o.Order {
				if l.Docking >= o.Today && !seen[l.Docking.String()+l.Pattern.ID] {
					t.Errorf("%s: %s for %s is ordered, but not staged", a.Name, l.Pattern.ID, l.Docking)
				}
			}
		}
	}
}

// A plan sized by the forecast is staged by the forecast.
func TestStagedByTheForecast(t *testing.T) {
	a := bareZones(t, "one")
	a.Basis.Sizing = hull.ForecastSizing
	half := 0.5
	a.Basis.Confidence = &half
	o := plan.Compute(a, 0, plan.WithStaging())
	if len(o.Staged) != 1 {
		t.Fatalf("%d lines", len(o.Staged))
	}
	s := o.Staged[0]
	if middle := s.Need.Quantile(0.5); middle != s.Planned || s.Surely >= middle || s.AtMost <= middle {
		t.Errorf("planned %d at the median, the need is %d, %d and %d at 5, 50 and 95 %%", s.Planned, s.Surely, middle, s.AtMost)
	}
}

func BenchmarkStage(b *testing.B) {
	a, err := assetfile.Decode(assets.Demo()[0])
	if err != nil {
		b.Fatal(err)
	}
	o := plan.Compute(a, hull.NewDate(2026, 12, 1), plan.WithReadings())
	for b.Loop() {
		plan.Stage(o)
	}
}

// A jump of the need is told: the set may prove too worn to be added to. Where
// all is renewed anyway there is none.
func TestStagedTellsOfWornSets(t *testing.T) {
	for _, s := range plan.Stage(plan.Compute(bareZones(t, "one"), 0)) {
		if s.Worn != 0 {
			t.Errorf("a bare zone has worn sets with %g", s.Worn)
		}
	}
	a, err := assetfile.Decode(assets.Demo()[0])
	if err != nil {
		t.Fatal(err)
	}
	told := 0
	for _, s := range plan.Stage(plan.Compute(a, hull.NewDate(2026, 12, 1))) {
		if s.Worn < 0 || s.Worn > 1 {
			t.Errorf("%s: worn with %g", s.Pattern.ID, s.Worn)
		}
		// Nothing is planned: what is needed is for kept sets that fail.
		if s.Planned == 0 && s.Worn > 1-s.Need.UpTo(0)+1e-9 {
			t.Errorf("%s: worn with %g, needed with %g", s.Pattern.ID, s.Worn, 1-s.Need.UpTo(0))
		}
		if s.Worn > 0.01 {
			told++
		}
	}
	if told == 0 {
		t.Error("no line of the demo ship tells of worn sets")
	}
}

package plan

import (
	"testing"

	"anodewright/anodes/renewal"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// A plan sized by the forecast is proven, and each of its new sets is the
// least that the forecast keeps sound: one step fewer is not.
func TestForecastSizing(t *testing.T) {
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			t.Fatal(err)
		}
		a.Basis.Sizing = hull.ForecastSizing
		half := 0.5
		a.Basis.Confidence = &half
		o := Compute(a, hull.NewDate(2026, 12, 1))
		t.Logf("%s: %.0f %s, unmet %v", a.Name, o.Money.Total, a.Currency, o.Unmet)
		if len(o.Unmet) == 0 && !o.Money.Proven {
			t.Errorf("%s: %.2f, bound %.2f", a.Name, o.Money.Total, o.Money.LowerBound)
		}
		boundary := func(d hull.Date) int {
			for k, iv := range o.Intervals {
				if iv.From == d {
					return k
				}
			}
			return len(o.Intervals)
		}
		keeps := o.keeps()
		sets := 0
		for _, l := range o.Schedule {
			if l.Action != renewal.Renew {
				continue
			}
			z := &a.Zones[l.Zone]
			until := boundary(l.Until)
			for _, add := range o.Schedule {
				if add.Zone == l.Zone && add.Action == renewal.Add && add.Date > l.Date && add.Date < l.Until {
					until = boundary(add.Date) // sized to the add
				}
			}
			trial := renewal.Trial{Zone: l.Zone, From: boundary(l.Date), To: until, JudgeFrom: boundary(l.Date), Pattern: l.Pattern, Count: l.Count}
			sets++
			if l.Governs != "forecast" || !keeps(trial) {
				t.Errorf("%s, %s: %d pieces by %s are not kept sound", a.Name, z.ID, l.Count, l.Governs)
			}
			trial.Count -= z.CountMultiple
			if trial.Count >= max(1, z.MinCount) && keeps(trial) {
				t.Errorf("%s, %s: %d pieces would do, not %d", a.Name, z.ID, trial.Count, l.Count)
			}
		}
		t.Logf("%s: %d new sets", a.Name, sets)
	}
}

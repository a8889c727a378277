package session_test

import (
	"testing"

	"anodewright/app/session"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// Whatever is entered first of a protection or a nobler metal, the asset
// stands; emptied, it is gone.
func TestProtectionEnteredFieldByField(t *testing.T) {
	field := map[string]session.Field{}
	for _, f := range session.ZoneDetails() {
		field[f.Key] = f
	}
	for key, text := range map[string]string{
		"protection.kind": "zinc coat", "protection.class": "C4", "protection.thickness_um": "120", "protection.anode": "graphite",
		"protection.off_share": "0.1", "protection.anode_count": "8", "protection.life_years": "20", "protection.anode_mass_kg": "30",
		"protection.anode_rating_a": "5", "protection.back_emf_v": "1.5", "nobler.metal": "copper", "nobler.area_m2": "3.5",
	} {
		a := assetfile.Clone(demo(t)[0])
		a.Zones[0].Fitted = nil
		f, ok := field[key]
		if !ok {
			t.Errorf("no field %s", key)
			continue
		}
		if f.Get(a, 0) != "" {
			t.Errorf("%s of a zone without: %q", key, f.Get(a, 0))
		}
		if err := f.Set(a, 0, text); err != nil || f.Get(a, 0) != text {
			t.Errorf("%s: %v, %q becomes %q", key, err, text, f.Get(a, 0))
		}
		if fs := hull.Check(a); len(fs) > 0 {
			t.Errorf("%s: %v", key, fs)
		}
		for _, part := range []string{"protection.kind", "nobler.metal"} {
			if err := field[part].Set(a, 0, ""); err != nil {
				t.Error(err)
			}
		}
		if z := a.Zones[0]; z.Protection != nil || z.Nobler != nil {
			t.Errorf("%s: left %+v %+v", key, z.Protection, z.Nobler)
		}
	}
}

func TestProtectionNumberThatIsNone(t *testing.T) {
	for _, f := range session.ZoneDetails() {
		if f.Key == "protection.thickness_um" || f.Key == "protection.anode_count" || f.Key == "nobler.area_m2" {
			a := assetfile.Clone(demo(t)[0])
			if err := f.Set(a, 0, "much"); err == nil {
				t.Errorf("%s takes %q", f.Key, "much")
			}
		}
	}
}

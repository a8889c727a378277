package plan_test

import (
	"bytes"
	"strings"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// Whatever zones, patterns and the asset are called, nothing of it gets into
// the LP text, where it could be read as a row.
func FuzzLPNames(f *testing.F) {
	base := demo(f)
	zone, pattern := base.Zones[0].ID, base.Patterns[0].ID
	want := plan.Compute(base, december).LP()
	for _, text := range []string{"side", "Minimize\n obj: 0", "\\ comment", "End\n", "x1 >= 7", "\u202eرقم", "a\x00b", "1e9", "=1+1", strings.Repeat("long ", 100)} {
		f.Add(text)
	}
	f.Fuzz(func(t *testing.T, text string) {
		a := assetfile.Clone(base)
		a.Name, a.Zones[0].Name, a.Patterns[0].Name, a.Waters[0].Name, a.Currency = text, text, text, text, text
		for i := range a.Zones {
			z := &a.Zones[i]
			if z.ID == zone {
				z.ID = text
			}
			if z.HeldBy == zone {
				z.HeldBy = text
			}
			for k := range z.Patterns {
				if z.Patterns[k] == pattern {
					z.Patterns[k] = text
				}
			}
			for k := range z.Fitted {
				if z.Fitted[k].Pattern == pattern {
					z.Fitted[k].Pattern = text
				}
			}
		}
		a.Patterns[0].ID = text
		for i := range a.Dockings {
			for k := range a.Dockings[i].Works {
				if a.Dockings[i].Works[k].Zone == zone {
					a.Dockings[i].Works[k].Zone = text
				}
			}
		}
		for i := range a.Readings {
			r := &a.Readings[i]
			if r.Zone == zone {
				r.Zone = text
			}
			if r.Pattern == pattern {
				r.Pattern = text
			}
		}
		for i := range a.Stock {
			if a.Stock[i].Pattern == pattern {
				a.Stock[i].Pattern = text
			}
		}
		if hull.Check(a).Err() != nil {
			return // empty, or one that is taken
		}
		if got := plan.Compute(a, december).LP(); !bytes.Equal(got, want) {
			t.Errorf("named %q the LP text is another one:\n%s", text, got)
		}
	})
}

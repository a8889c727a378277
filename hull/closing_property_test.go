package hull_test

import (
	"slices"
	"testing"

	"pgregory.net/rapid"

	"anodewright/hull"
)

// Whatever is found, taken off and put on: the closed asset is valid, its
// ledger begins with the one before, no piece appears or vanishes but by a
// fact, and the asset as it was can be had back from the ledger.
func TestClosingsKeepTheBooks(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a := carrier()
		for range 2 {
			c := hull.Closing{Date: a.Ahead()[0].Date + hull.Date(rapid.IntRange(-200, 200).Draw(t, "days off")), Next: on("2033-01-01")}
			pieces := 0
			for _, z := range a.Zones {
				for _, f := range z.Fitted {
					s := hull.ClosingSet{Zone: z.ID, Pattern: f.Pattern, Fitted: f.Fitted, Wastage: rapid.Float64Range(0, 1).Draw(t, "wastage")}
					s.Found = rapid.IntRange(0, f.Count+2).Draw(t, "found")
					s.Off = rapid.IntRange(0, s.Found).Draw(t, "off")
					pieces += s.Found - s.Off
					c.Sets = append(c.Sets, s)
				}
			}
			for range rapid.IntRange(0, 3).Draw(t, "lots put on") {
				p := hull.PutOn{Zone: rapid.SampledFrom(a.Zones).Draw(t, "on").ID, Pattern: "slab", Count: rapid.IntRange(1, 40).Draw(t, "pieces")}
				pieces += p.Count
				c.On = append(c.On, p)
			}
			next, faults := hull.Close(a, c)
			if len(faults) > 0 {
				t.Fatalf("not closed:\n%v", faults)
			}
			if faults := hull.Check(next); len(faults) > 0 {
				t.Fatalf("the closed asset is at fault:\n%v", faults)
			}
			if n := len(a.Ledger); !slices.Equal(next.Ledger[:n], a.Ledger) {
				t.Fatal("the ledger before was changed")
			}
			left := 0
			for _, z := range next.Zones {
				for _, f := range z.Fitted {
					left += f.Count
				}
			}
			if left != pieces {
				t.Fatalf("%d pieces are fitted, want %d", left, pieces)
			}
			was, ok := next.Before(len(next.Closed) - 1)
			if !ok || was.Start() != a.Start() || len(was.Closed) != len(a.Closed) {
				t.Fatalf("as it was: %v, start %s, want %s", ok, was.Start(), a.Start())
			}
			for i, z := range a.Zones {
				if !slices.Equal(was.Zones[i].Fitted, z.Fitted) {
					t.Fatalf("as it was, %s carried %v, want %v", z.ID, was.Zones[i].Fitted, z.Fitted)
				}
			}
			a = next
		}
	})
}

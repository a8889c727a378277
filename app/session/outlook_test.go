package session

import (
	"fmt"
	"path/filepath"
	"slices"
	"testing"

	"anodewright/anodes/plan"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage"
	"anodewright/storage/assetfile"
)

// Of a fleet larger than keptMost only the assets that were open last keep
// their outcomes; the list, the calendar and an asset opened again tell the
// same as ever.
func TestLargeFleetKeepsFewOutcomes(t *testing.T) {
	r, err := storage.Open(filepath.Join(t.TempDir(), "fleet.anodewright"))
	if err != nil {
		t.Fatal(err)
	}
	defer r.Close()
	today := hull.NewDate(2026, 12, 1)
	s, err := Open(r, today)
	if err != nil {
		t.Fatal(err)
	}
	var all []*hull.Asset
	for i := range 3 * keptMost {
		a, err := assetfile.Decode(assets.Demo()[i%5])
		if err != nil {
			t.Fatal(err)
		}
		a.Name = fmt.Sprint(a.Name, " ", i)
		all = append(all, a)
	}
	if err := s.AddFleet(all, "added", func() bool { return false }); err != nil {
		t.Fatal(err)
	}
	s.Wait()
	few := func() {
		t.Helper()
		kept := 0
		for _, e := range s.fleet {
			if e.outcome != nil {
				kept++
			}
		}
		if kept > keptMost || s.open.outcome == nil {
			t.Errorf("%d outcomes are kept, that of the open asset: %v", kept, s.open.outcome != nil)
		}
	}
	few()
	if n, of, _ := s.FleetProgress(); n != of || of != 3*keptMost {
		t.Errorf("%d of %d are computed", n, of)
	}
	for i, item := range s.Fleet() {
		want := outlookOf(plan.Compute(all[i], today))
		got := item.Outlook
		if got.State != want.State || got.Cause != want.Cause || got.By != want.By || got.Docking != want.Docking || got.OrderBy != want.OrderBy || len(got.Order) != len(want.Order) {
			t.Errorf("%s: %+v, want %+v", item.Asset.Name, got, want)
		}
	}
	for _, item := range s.Fleet() {
		s.Select(item.ID)
		s.Wait()
		if o := s.Outcome(); o == nil || o.Asset != item.Asset {
			t.Fatalf("%s, opened, has no outcome", item.Asset.Name)
		}
		few()
	}
	last := s.Fleet()[3*keptMost-2]
	before := s.find(last.ID).outcome
	if s.Select(last.ID); s.Outcome() == nil || s.Outcome() != before {
		t.Error("the asset that was open before is computed anew")
	}
	for s.FleetOrders(4) == nil {
		s.Wait()
	}
	if o := s.FleetOrders(4); len(o.Fleet) != 3*keptMost || slices.Contains(o.IDs, "") {
		t.Errorf("the calendar is of %d assets", len(o.Fleet))
	}
	// An edit of the asset makes its outlook anew.
	edit := func(a *hull.Asset) error {
		for i := range a.Patterns {
			a.Patterns[i].LeadWeeks += 3
		}
		return nil
	}
	if err := s.Do("later to be had", edit); err != nil {
		t.Fatal(err)
	}
	s.Wait()
	if now := s.Fleet()[3*keptMost-2].Outlook; now.OrderBy >= last.Outlook.OrderBy {
		t.Errorf("ordered by %v, after three weeks more of lead by %v", last.Outlook.OrderBy, now.OrderBy)
	}
}

package storage

import (
	"errors"
	"reflect"
	"strings"
	"sync"
	"testing"
	"time"

	"anodewright/hull"
)

func TestAssetComesBackAsItWasStored(t *testing.T) {
	path := newPath(t)
	r, id := added(t, path)
	r.Close()

	r = opened(t, path)
	got, rev, err := r.Load(id)
	if err != nil || rev != 1 {
		t.Fatalf("revision %d, error %v", rev, err)
	}
	if want := sample(t); !reflect.DeepEqual(got, want) {
		t.Errorf("got %+v\nwant %+v", got, want)
	}
	list, err := r.List()
	if err != nil {
		t.Fatal(err)
	}
	want := []Entry{{ID: id, Rev: 1, Name: "Tern Passage", Kind: hull.Ship, Changed: day}}
	if !reflect.DeepEqual(list, want) {
		t.Errorf("list %+v, want %+v", list, want)
	}
}

func TestEmptyUntilTheFirstAssetEverAdded(t *testing.T) {
	r := opened(t, newPath(t))
	if empty, err := r.Empty(); err != nil || !empty {
		t.Fatalf("new register: empty %v, error %v", empty, err)
	}
	id, err := r.Add(sample(t), "")
	if err != nil {
		t.Fatal(err)
	}
	if err := r.Remove(id, 1); err != nil {
		t.Fatal(err)
	}
	if empty, err := r.Empty(); err != nil || empty {
		t.Errorf("after an asset came and went: empty %v, error %v", empty, err)
	}
}

func TestOnlyFaultlessAssetsAreStored(t *testing.T) {
	r, id := added(t, newPath(t))
	bad := sample(t)
	bad.Zones[0].WettedArea = -1

	_, err := r.Save(id, 1, bad, "")
	var faults hull.Faults
	if !errors.Is(err, ErrInvalid) || !errors.As(err, &faults) || faults[0].Path != "zones[0].wetted_area_m2" {
		t.Errorf("save: %v", err)
	}
	if _, err := r.Add(bad, ""); !errors.Is(err, ErrInvalid) {
		t.Errorf("add: %v", err)
	}
	if _, err := r.Add(new(hull.Asset), ""); err == nil || !strings.HasPrefix(err.Error(), "cannot add an asset without a name to ") {
		t.Errorf("add of nothing: %v", err)
	}
	if list, _ := r.List(); len(list) != 1 || list[0].Rev != 1 {
		t.Errorf("the register changed: %+v", list)
	}
}

func TestSavingWhatIsStoredIsNoEdit(t *testing.T) {
	r, id := added(t, newPath(t))
	if rev := save(t, r, id, 1, sample(t), "nothing"); rev != 1 {
		t.Errorf("revision %d, want 1", rev)
	}
	if h, _ := r.History(id); len(h) != 1 {
		t.Errorf("%d revisions, want 1", len(h))
	}
}

func TestClash(t *testing.T) {
	path := newPath(t)
	here, id := added(t, path)
	there := opened(t, path, User("Jon"), Clock(func() time.Time { return day.Add(time.Hour) }))

	if rev := save(t, there, id, 1, renamed(t, "Tern"), "shorter name"); rev != 2 {
		t.Fatalf("revision %d, want 2", rev)
	}
	_, err := here.Save(id, 1, renamed(t, "Passage"), "")
	var clash *Clash
	if !errors.Is(err, ErrClash) || !errors.As(err, &clash) {
		t.Fatalf("got %v, want a clash", err)
	}
	want := "Tern was changed by Jon at 2026-12-01 10:30 UTC (revision 2) after revision 1 was opened here; nothing was overwritten"
	if err.Error() != want {
		t.Errorf("got  %s\nwant %s", err, want)
	}
	if err := here.Remove(id, 1); !errors.Is(err, ErrClash) {
		t.Errorf("remove: %v", err)
	}
	if a, rev, _ := here.Load(id); rev != 2 || a.Name != "Tern" {
		t.Errorf("stored: %s at revision %d", a.Name, rev)
	}

	if err := there.Remove(id, 2); err != nil {
		t.Fatal(err)
	}
	if _, err = here.Save(id, 2, renamed(t, "Passage"), ""); !errors.As(err, &clash) || !clash.Removed {
		t.Errorf("save of a removed asset: %v", err)
	}
	if _, err = here.Save("nobody", 1, sample(t), ""); !errors.Is(err, ErrNoAsset) {
		t.Errorf("save of an asset that never was: %v", err)
	}
}

// Two programs edit one asset at once, each until it has its share of edits
// in: every edit is there, none twice.
func TestTwoRegistersOnOneFile(t *testing.T) {
	const each = 12
	path := newPath(t)
	first, id := added(t, path)
	var both sync.WaitGroup
	for i, r := range []*Register{first, opened(t, path, User("Jon"))} {
		both.Go(func() {
			for n := range each {
				for {
					a, rev, err := r.Load(id)
					if err != nil {
						t.Error(err)
						return
					}
					a.Costs.PerZone = float64(1000 + 100*i + n)
					_, err = r.Save(id, rev, a, "cost")
					if err == nil {
						break
					}
					if !errors.Is(err, ErrClash) {
						t.Error(err)
						return
					}
				}
			}
		})
	}
	both.Wait()
	history, err := first.History(id)
	if err != nil || len(history) != 1+2*each {
		t.Fatalf("%d revisions, error %v, want %d", len(history), err, 1+2*each)
	}
	by := map[string]int{}
	for _, v := range history[1:] {
		by[v.Who]++
	}
	if by["Ines"] != each || by["Jon"] != each {
		t.Errorf("edits by %v", by)
	}
}

func TestRemoveAndRestore(t *testing.T) {
	r, id := added(t, newPath(t))
	other, err := r.Add(renamed(t, "Skua Rest"), "")
	if err != nil {
		t.Fatal(err)
	}
	save(t, r, id, 1, renamed(t, "Tern"), "")
	if _, err := r.Restore(id); !errors.Is(err, ErrNotRemoved) {
		t.Errorf("restore of an asset that is there: %v", err)
	}
	if err := r.Remove(id, 2); err != nil {
		t.Fatal(err)
	}
	if _, _, err := r.Load(id); !errors.Is(err, ErrNoAsset) {
		t.Errorf("load of a removed asset: %v", err)
	}
	removed, err := r.Removed()
	if err != nil || len(removed) != 1 || removed[0].ID != id || removed[0].Name != "Tern" || removed[0].Rev != 3 {
		t.Errorf("removed %+v, error %v", removed, err)
	}
	rev, err := r.Restore(id)
	if err != nil || rev != 4 {
		t.Fatalf("revision %d, error %v", rev, err)
	}
	if a, rev, err := r.Load(id); err != nil || rev != 4 || !reflect.DeepEqual(a, renamed(t, "Tern")) {
		t.Errorf("restored %+v at revision %d, error %v", a, rev, err)
	}
	if list, _ := r.List(); len(list) != 2 || list[0].ID != other || list[1].ID != id {
		t.Errorf("order %+v", list)
	}
	if removed, _ := r.Removed(); len(removed) != 0 {
		t.Errorf("still removed: %+v", removed)
	}
	if _, err := r.Restore("nobody"); !errors.Is(err, ErrNoAsset) {
		t.Errorf("restore of an asset that never was: %v", err)
	}
}

func TestArrange(t *testing.T) {
	r := opened(t, newPath(t))
	var ids []string
	for _, name := range []string{"a", "b", "c", "d"} {
		id, err := r.Add(renamed(t, name), "")
		if err != nil {
			t.Fatal(err)
		}
		ids = append(ids, id)
	}
	if err := r.Arrange([]string{ids[3], ids[1]}); err != nil {
		t.Fatal(err)
	}
	list, err := r.List()
	if err != nil {
		t.Fatal(err)
	}
	names := ""
	for _, e := range list {
		names += e.Name
	}
	if names != "dbac" {
		t.Errorf("order %s, want dbac", names)
	}
}

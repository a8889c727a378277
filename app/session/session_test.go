package session_test

import (
	"bytes"
	"errors"
	"os"
	"path/filepath"
	"strings"
	"sync/atomic"
	"testing"

	"anodewright/app/session"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage"
	"anodewright/storage/assetfile"
)

// tester is a *testing.T or a *rapid.T.
type tester interface {
	Helper()
	Fatal(...any)
	Fatalf(string, ...any)
}

var today = hull.NewDate(2026, 12, 1)

// register opens a register in the test's own folder.
func register(t *testing.T, path string, options ...storage.Option) *storage.Register {
	t.Helper()
	r, err := storage.Open(path, append([]storage.Option{storage.User("tester")}, options...)...)
	if err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() { r.Close() })
	return r
}

func open(t *testing.T, store session.Store) *session.Session {
	t.Helper()
	s, err := session.Open(store, today)
	if err != nil {
		t.Fatal(err)
	}
	t.Cleanup(s.Wait)
	return s
}

// ship is a session over a new register that holds the first demo asset.
func ship(t *testing.T) (*session.Session, *storage.Register) {
	t.Helper()
	r := register(t, filepath.Join(t.TempDir(), "fleet.anodewright"))
	s := open(t, r)
	must(t, s.Add(demo(t)[0], "test"))
	return s, r
}

// demo returns the demo assets.
func demo(t tester) []*hull.Asset {
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

func must(t tester, err error) {
	t.Helper()
	if err != nil {
		t.Fatal(err)
	}
}

func equal(a, b *hull.Asset) bool { return bytes.Equal(assetfile.Encode(a), assetfile.Encode(b)) }

// stored returns what the register holds of the open asset.
func stored(t tester, s *session.Session, r *storage.Register) *hull.Asset {
	t.Helper()
	a, _, err := r.Load(openID(t, s))
	must(t, err)
	return a
}

func openID(t tester, s *session.Session) string {
	t.Helper()
	for _, item := range s.Fleet() {
		if item.Open {
			return item.ID
		}
	}
	t.Fatal("no asset is open")
	return ""
}

// field finds a field by its key.
func field(t tester, fields []session.Field, key string) session.Field {
	t.Helper()
	for _, f := range fields {
		if f.Key == key {
			return f
		}
	}
	t.Fatalf("no field %s", key)
	return session.Field{}
}

func zoneField(t tester, key string) session.Field {
	return field(t, append(session.ZoneColumns(), session.ZoneDetails()...), key)
}

func TestEditIsStoredAtOnce(t *testing.T) {
	s, r := ship(t)
	must(t, s.SetText(session.Zones, 0, zoneField(t, "wetted_area_m2"), "2 345,5"))
	if got := s.Asset().Zones[0].WettedArea; got != 2345.5 {
		t.Errorf("shown area %v", got)
	}
	if got := stored(t, s, r).Zones[0].WettedArea; got != 2345.5 {
		t.Errorf("stored area %v", got)
	}
	history, err := r.History(openID(t, s))
	must(t, err)
	if last := history[len(history)-1]; last.What != s.Asset().Zones[0].Name+": Wetted" {
		t.Errorf("the history says %q", last.What)
	}
}

func TestSameValueIsNoStep(t *testing.T) {
	s, r := ship(t)
	area := zoneField(t, "wetted_area_m2")
	must(t, s.SetText(session.Zones, 0, area, "1111"))
	before := s.Asset()
	for _, text := range []string{"1111", "1 111,0", " 1111 "} {
		must(t, s.SetText(session.Zones, 0, area, text))
	}
	if s.Asset() != before {
		t.Error("there is a new state")
	}
	if h, _ := r.History(openID(t, s)); len(h) != 2 {
		t.Errorf("the history has %d entries", len(h))
	}
}

func TestFleetOrderAndSelectionAreKept(t *testing.T) {
	path := filepath.Join(t.TempDir(), "fleet.anodewright")
	r := register(t, path)
	s := open(t, r)
	must(t, session.AddDemo(s))
	list := s.Fleet()
	if len(list) != len(assets.Demo()) || !list[0].Open {
		t.Fatalf("%d assets, the first one open: %v", len(list), list[0].Open)
	}
	s.Select(list[2].ID)
	s.Select("no such asset")
	s.Wait()
	must(t, r.Close())

	again := open(t, register(t, path))
	for i, item := range again.Fleet() {
		if item.ID != list[i].ID || item.Open != (i == 2) {
			t.Errorf("place %d: %s, open %v", i, item.Asset.Name, item.Open)
		}
	}
}

func TestRemoveOpensTheNeighbour(t *testing.T) {
	r := register(t, filepath.Join(t.TempDir(), "fleet.anodewright"))
	s := open(t, r)
	if s.Asset() != nil || s.Outcome() != nil || s.Remove() == nil || s.Undo() == nil {
		t.Error("an empty fleet has an asset")
	}
	must(t, session.AddDemo(s))
	list := s.Fleet()
	s.Select(list[len(list)-1].ID)
	for n := len(list); n > 0; n-- {
		if got := s.Asset().Name; got != list[n-1].Asset.Name {
			t.Errorf("with %d left %s is open", n, got)
		}
		must(t, s.Remove())
	}
	if len(s.Fleet()) != 0 || s.Asset() != nil {
		t.Error("the fleet is not empty")
	}
}

func TestOutcomesFollowTheNewestAsset(t *testing.T) {
	r := register(t, filepath.Join(t.TempDir(), "fleet.anodewright"))
	s := open(t, r)
	must(t, session.AddDemo(s))
	var calls atomic.Int64
	s.Notify(func() { calls.Add(1) })
	area := zoneField(t, "wetted_area_m2")
	for _, text := range []string{"1500", "1600", "1700"} {
		must(t, s.SetText(session.Zones, 0, area, text))
	}
	s.Wait()
	for _, item := range s.Fleet() {
		if item.Outlook == nil || item.Outlook.Today.IsZero() || item.Open && s.Outcome().Asset != item.Asset {
			t.Errorf("%s has no outcome of its newest state", item.Asset.Name)
		}
	}
	if got := s.Outcome().Asset.Zones[0].WettedArea; got != 1700 {
		t.Errorf("the outcome is that of %v m²", got)
	}
	if calls.Load() < 3 {
		t.Errorf("told of %d changes", calls.Load())
	}
}

func TestReadOnlyRegisterRefusesInWords(t *testing.T) {
	path := filepath.Join(t.TempDir(), "fleet.anodewright")
	r := register(t, path)
	must(t, open(t, r).Add(demo(t)[0], "test"))
	must(t, r.Close())
	before, err := os.ReadFile(path)
	must(t, err)

	s := open(t, register(t, path, storage.ForReading()))
	area := zoneField(t, "wetted_area_m2")
	_, addErr := s.AddZone(0)
	for what, err := range map[string]error{
		"a value": s.SetText(session.Zones, 0, area, "77"), "a faulty value": s.SetText(session.Zones, 0, area, "x"),
		"a zone": addErr, "removal": s.Remove(), "an asset": s.Add(demo(t)[1], "test"),
	} {
		if err == nil || !strings.Contains(err.Error(), "it was opened for reading") {
			t.Errorf("%s: error %v", what, err)
		}
	}
	if text, fault := s.Text(session.Zones, 0, area); text == "x" || text == "77" || fault != "" {
		t.Errorf("the field shows %q, %q", text, fault)
	}
	if after, _ := os.ReadFile(path); !bytes.Equal(before, after) {
		t.Error("the file was changed")
	}
}

func TestClashIsToldAndLosesNothing(t *testing.T) {
	s, r := ship(t)
	other := open(t, register(t, r.Path(), storage.User("colleague")))
	depth, area := zoneField(t, "depth_m"), zoneField(t, "wetted_area_m2")
	must(t, s.SetText(session.Zones, 0, depth, "4.5"))

	err := other.SetText(session.Zones, 0, area, "1234")
	if !errors.Is(err, storage.ErrClash) || !strings.Contains(err.Error(), "changed by tester") {
		t.Fatalf("error %v", err)
	}
	if a := stored(t, s, r); a.Zones[0].Depth != 4.5 || a.Zones[0].WettedArea == 1234 {
		t.Errorf("stored: depth %v, area %v", a.Zones[0].Depth, a.Zones[0].WettedArea)
	}
	if other.Asset().Zones[0].Depth != 4.5 {
		t.Error("the newer state is not shown")
	}
	text, fault := other.Text(session.Zones, 0, area)
	if text != "1234" || !strings.Contains(fault, "not in the plan yet") {
		t.Errorf("the typed text is gone: %q, %q", text, fault)
	}
	must(t, other.SetText(session.Zones, 0, area, "1234"))
	if a := stored(t, other, r); a.Zones[0].Depth != 4.5 || a.Zones[0].WettedArea != 1234 || other.Drafts() != 0 {
		t.Errorf("after the second try: depth %v, area %v, %d drafts", a.Zones[0].Depth, a.Zones[0].WettedArea, other.Drafts())
	}
}

func TestAssetRemovedElsewhere(t *testing.T) {
	s, r := ship(t)
	other := open(t, register(t, r.Path()))
	must(t, s.Remove())
	err := other.SetText(session.Zones, 0, zoneField(t, "depth_m"), "4.5")
	if !errors.Is(err, storage.ErrClash) || !strings.Contains(err.Error(), "no longer in the fleet") {
		t.Errorf("error %v", err)
	}
	if other.Asset() != nil {
		t.Error("the removed asset is still open")
	}
}

package storage

import (
	"errors"
	"maps"
	"testing"
)

func wantDrafts(t *testing.T, r *Register, id string, want map[string]string) {
	t.Helper()
	if got, err := r.Drafts(id); err != nil || !maps.Equal(got, want) {
		t.Errorf("drafts %v, error %v, want %v", got, err, want)
	}
}

func TestDraftsOutliveTheProgramButNotTheAsset(t *testing.T) {
	path := newPath(t)
	r, id := added(t, path)
	for path, text := range map[string]string{"zones[0].depth_m": "6,,2", "horizon": "20x4", "name": ""} {
		if err := r.SetDraft(id, path, text); err != nil {
			t.Fatal(err)
		}
	}
	if err := r.SetDraft(id, "horizon", "2034-13-01"); err != nil {
		t.Fatal(err)
	}
	r.Close()

	r = opened(t, path)
	wantDrafts(t, r, id, map[string]string{"zones[0].depth_m": "6,,2", "horizon": "2034-13-01", "name": ""})
	if err := r.ClearDraft(id, "name"); err != nil {
		t.Fatal(err)
	}
	rev := save(t, r, id, 1, renamed(t, "Tern"), "")
	wantDrafts(t, r, id, map[string]string{"zones[0].depth_m": "6,,2", "horizon": "2034-13-01"})
	if err := r.SetDrafts(id, map[string]string{"zones[1].depth_m": "6,,2"}); err != nil {
		t.Fatal(err)
	}
	wantDrafts(t, r, id, map[string]string{"zones[1].depth_m": "6,,2"})

	if err := r.Remove(id, rev); err != nil {
		t.Fatal(err)
	}
	if _, err := r.Restore(id); err != nil {
		t.Fatal(err)
	}
	wantDrafts(t, r, id, map[string]string{})
	if err := r.SetDraft("nobody", "name", ""); !errors.Is(err, ErrNoAsset) {
		t.Errorf("draft of no asset: %v", err)
	}
}

func TestSettings(t *testing.T) {
	path := newPath(t)
	r := opened(t, path)
	if v, err := r.Setting("window"); err != nil || v != "" {
		t.Errorf("unset: %q, %v", v, err)
	}
	for _, size := range []string{"1280x800", "1440x900"} {
		if err := r.SetSetting("window", size); err != nil {
			t.Fatal(err)
		}
	}
	r.Close()
	if v, err := opened(t, path).Setting("window"); err != nil || v != "1440x900" {
		t.Errorf("got %q, %v", v, err)
	}
}

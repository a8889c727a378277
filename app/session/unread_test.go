package session_test

import (
	"errors"
	"path/filepath"
	"strings"
	"testing"

	"anodewright/app/session"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage"
	"anodewright/storage/assetfile"
)

// oneUnread is a register of which one asset cannot be read.
type oneUnread struct {
	*storage.Register
	id string
}

func (s oneUnread) Load(id string) (*hull.Asset, int64, error) {
	if id == s.id {
		return nil, 0, errors.New("the stored asset cannot be read: zones[0].wetted_area_m2: want a number")
	}
	return s.Register.Load(id)
}

// One asset that cannot be read does not lock up the fleet.
func TestOneUnreadAssetLeavesTheOthers(t *testing.T) {
	r, err := storage.Open(filepath.Join(t.TempDir(), "fleet.anodewright"))
	if err != nil {
		t.Fatal(err)
	}
	defer r.Close()
	var ids []string
	for _, text := range assets.Demo()[:2] {
		a, err := assetfile.Decode(text)
		if err != nil {
			t.Fatal(err)
		}
		id, err := r.Add(a, "test")
		if err != nil {
			t.Fatal(err)
		}
		ids = append(ids, id)
	}
	s, err := session.Open(oneUnread{r, ids[0]}, hull.NewDate(2026, 12, 1))
	if err != nil {
		t.Fatal(err)
	}
	defer s.Wait()
	if fleet := s.Fleet(); len(fleet) != 1 || fleet[0].ID != ids[1] {
		t.Errorf("the fleet has %d assets, want the second alone", len(fleet))
	}
	unread := s.Unread()
	if len(unread) != 1 || unread[0].Name != "Tern Passage" || !strings.Contains(unread[0].Why, "wetted_area_m2") {
		t.Errorf("unread: %+v", unread)
	}
}

package session_test

import (
	"errors"
	"os"
	"path/filepath"
	"runtime"
	"strings"
	"testing"

	"anodewright/app/session"
	"anodewright/hull"
	"anodewright/storage"
)

// failing is a register whose disk fails.
type failing struct {
	session.Store
	kind error // of the failure; nil: it works
}

func (f *failing) fail(doing string) error {
	if f.kind == nil {
		return nil
	}
	return &storage.Error{Doing: doing, Path: "fleet.anodewright", Kind: f.kind}
}

func (f *failing) Save(id string, rev int64, a *hull.Asset, what string) (int64, error) {
	if err := f.fail("save " + a.Name + " in"); err != nil {
		return rev, err
	}
	return f.Store.Save(id, rev, a, what)
}

func (f *failing) SetDraft(id, path, text string) error {
	if err := f.fail("keep a draft in"); err != nil {
		return err
	}
	return f.Store.SetDraft(id, path, text)
}

// What cannot be stored is told, never shown as stored, and not lost: a typed
// text waits in its field until the disk works again.
func TestWhatCannotBeStoredIsToldAndWaits(t *testing.T) {
	for _, kind := range []error{storage.ErrDiskFull, storage.ErrDisk, storage.ErrMoved, storage.ErrBusy, storage.ErrReadOnly} {
		t.Run(kind.Error(), func(t *testing.T) {
			r := register(t, filepath.Join(t.TempDir(), "fleet.anodewright"))
			store := &failing{Store: r}
			s := open(t, store)
			must(t, s.Add(demo(t)[0], "test"))
			area := zoneField(t, "wetted_area_m2")
			must(t, s.SetText(session.Zones, 0, area, "1000"))
			before := s.Asset()

			store.kind = kind
			_, added := s.AddZone(0)
			for deed, err := range map[string]error{"typed": s.SetText(session.Zones, 0, area, "1234"), "added": added, "undone": s.Undo()} {
				if !errors.Is(err, kind) || !strings.HasPrefix(err.Error(), "cannot save "+before.Name+" in fleet.anodewright: ") {
					t.Errorf("%s: told %v", deed, err)
				}
			}
			if s.Asset() != before || !equal(stored(t, s, r), before) {
				t.Error("something is shown or stored that was refused")
			}
			text, fault := s.Text(session.Zones, 0, area)
			if text != "1234" || !strings.Contains(fault, "not in the plan yet") {
				t.Errorf("the typed text is gone: %q, %q", text, fault)
			}
			if undo, redo := s.CanUndo(); !strings.HasSuffix(undo, ": Wetted") || redo != "" {
				t.Errorf("undo %q, redo %q", undo, redo)
			}

			store.kind = nil
			must(t, s.SetText(session.Zones, 0, area, "1234"))
			if got := stored(t, s, r).Zones[0].WettedArea; got != 1234 || s.Drafts() != 0 {
				t.Errorf("after it works again: area %v, %d drafts", got, s.Drafts())
			}
			must(t, s.Undo())
			if got := stored(t, s, r).Zones[0].WettedArea; got != 1000 {
				t.Errorf("undone: %v", got)
			}
		})
	}
}

// A register whose folder vanishes while the program is open: edits are
// refused in words, what is shown stays, and it goes on once the folder is
// back.
func TestRegisterThatVanishes(t *testing.T) {
	if runtime.GOOS == "windows" {
		t.Skip("Windows does not let the folder of an open file be renamed")
	}
	folder := filepath.Join(t.TempDir(), "fleet")
	r := register(t, filepath.Join(folder, "fleet.anodewright"))
	s := open(t, r)
	must(t, s.Add(demo(t)[0], "test"))
	before := s.Asset()
	must(t, os.Rename(folder, folder+".away"))
	area := zoneField(t, "wetted_area_m2")
	err := s.SetText(session.Zones, 0, area, "1234")
	if !errors.Is(err, storage.ErrMoved) || !strings.Contains(err.Error(), "moved, renamed or deleted since it was opened; nothing was stored") {
		t.Errorf("told %v", err)
	}
	if s.Asset() != before {
		t.Error("the refused edit is shown")
	}
	if _, err := s.Notice(); err != nil {
		t.Errorf("looking for others' edits: %v", err)
	}
	must(t, os.Rename(folder+".away", folder))
	must(t, s.SetText(session.Zones, 0, area, "1234"))
	if got := stored(t, s, r).Zones[0].WettedArea; got != 1234 {
		t.Errorf("stored %v", got)
	}
}

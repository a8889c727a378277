package session_test

import (
	"fmt"
	"strings"
	"testing"

	"anodewright/app/session"
	"anodewright/hull"
)

func TestBlockIsOneStep(t *testing.T) {
	s, _ := ship(t)
	before := s.Asset()
	zones := len(before.Zones)
	name, wetted := zoneField(t, "name"), zoneField(t, "wetted_area_m2")
	var cells []session.Cell
	for i := range 50 {
		cells = append(cells, session.Cell{Item: i, Field: name, Text: fmt.Sprintf("Zone %d", i+1)}, session.Cell{Item: i, Field: wetted, Text: fmt.Sprint(100 + i)})
	}
	faults, err := s.SetBlock(session.Zones, cells)
	if err != nil || faults != 0 {
		t.Fatalf("%d faults, %v", faults, err)
	}
	after := s.Asset()
	if len(after.Zones) != 50 || after.Zones[49].WettedArea != 149 || after.Zones[49].Name != "Zone 50" {
		t.Fatalf("%d zones, the last %q of %v", len(after.Zones), after.Zones[len(after.Zones)-1].Name, after.Zones[len(after.Zones)-1].WettedArea)
	}
	ids := map[string]bool{}
	for _, z := range after.Zones {
		if ids[z.ID] {
			t.Errorf("the id %s is there twice", z.ID)
		}
		ids[z.ID] = true
	}
	if err := s.Undo(); err != nil {
		t.Fatal(err)
	}
	if got := s.Asset(); len(got.Zones) != zones || got.Zones[0].Name != before.Zones[0].Name {
		t.Errorf("one undo leaves %d zones, the first %q", len(got.Zones), got.Zones[0].Name)
	}
}

func TestFaultyCellsOfABlockWait(t *testing.T) {
	s, _ := ship(t)
	wetted, depth := zoneField(t, "wetted_area_m2"), zoneField(t, "depth_m")
	old := s.Asset().Zones[0].WettedArea
	faults, err := s.SetBlock(session.Zones, []session.Cell{{Item: 0, Field: wetted, Text: "-5"}, {Item: 0, Field: depth, Text: "3,5"}})
	if err != nil || faults != 1 {
		t.Fatalf("%d faults, %v", faults, err)
	}
	if z := s.Asset().Zones[0]; z.WettedArea != old || z.Depth != 3.5 {
		t.Errorf("area %v, depth %v", z.WettedArea, z.Depth)
	}
	if text, fault := s.Text(session.Zones, 0, wetted); text != "-5" || !strings.Contains(fault, "want a number from") || s.Drafts() != 1 {
		t.Errorf("the cell shows %q: %q; %d drafts", text, fault, s.Drafts())
	}
}

func TestZonesAreMovedAndDuplicated(t *testing.T) {
	s, _ := ship(t)
	names := func() string {
		var all []string
		for _, z := range s.Asset().Zones {
			all = append(all, z.Name)
		}
		return strings.Join(all, "|")
	}
	first := names()
	at, err := s.MoveZone(0, 1)
	if err != nil || at != 1 || names() == first {
		t.Errorf("moved to %d, %v: %s", at, err, names())
	}
	if _, err := s.MoveZone(1, -1); err != nil || names() != first {
		t.Errorf("moved back: %v, %s", err, names())
	}
	if _, err := s.MoveZone(0, -1); err == nil {
		t.Error("the first zone moved up")
	}
	at, err = s.DuplicateZone(0)
	a := s.Asset()
	if err != nil || at != 1 || len(a.Zones[1].Fitted) != len(a.Zones[0].Fitted) || a.Zones[1].ID == a.Zones[0].ID {
		t.Errorf("duplicated to %d, %v", at, err)
	}
	if err := hull.Check(a).Err(); err != nil {
		t.Error(err)
	}
}

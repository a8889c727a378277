package session_test

import (
	"errors"
	"testing"

	"anodewright/app/session"
	"anodewright/hull"
	"anodewright/storage"
)

// clashed is a session whose change of an area to 1234 met a change of the same
// zone's depth to 4.5, and of its area to 999, by another program.
func clashed(t *testing.T) (mine, theirs *session.Session, r *storage.Register, c *session.Clash) {
	t.Helper()
	theirs, r = ship(t)
	mine = open(t, register(t, r.Path(), storage.User("colleague")))
	must(t, theirs.SetText(session.Zones, 0, zoneField(t, "depth_m"), "4.5"))
	must(t, theirs.SetText(session.Zones, 0, zoneField(t, "wetted_area_m2"), "999"))
	err := mine.SetText(session.Zones, 0, zoneField(t, "wetted_area_m2"), "1234")
	if !errors.As(err, &c) || !errors.Is(err, storage.ErrClash) {
		t.Fatalf("error %v", err)
	}
	if mine.Clash() != c {
		t.Fatal("the clash is not kept")
	}
	return mine, theirs, r, c
}

// zone0 is the first zone's area and depth as stored.
func zone0(t *testing.T, s *session.Session, r *storage.Register) [2]float64 {
	t.Helper()
	z := stored(t, s, r).Zones[0]
	return [2]float64{z.WettedArea, z.Depth}
}

func TestClashShowsBothVersionsFieldByField(t *testing.T) {
	mine, _, _, c := clashed(t)
	before := demo(t)[0].Zones[0]
	zone := before.Name
	want := []session.Difference{
		{Item: zone, Field: zoneField(t, "wetted_area_m2").Title + ", m²", Before: session.Number(before.WettedArea), Theirs: "999", Mine: "1234"},
		{Item: zone, Field: zoneField(t, "depth_m").Title + ", m", Before: session.Number(before.Depth), Theirs: "4.5", Mine: session.Number(before.Depth)},
	}
	if len(c.Differences) != 2 || c.Differences[0] != want[0] || c.Differences[1] != want[1] {
		t.Errorf("got  %+v\nwant %+v", c.Differences, want)
	}
	if c.Who != "tester" || c.When.IsZero() || c.Name != mine.Asset().Name || c.What == "" || !c.CanBoth && !mine.Clash().CanBoth {
		t.Errorf("clash %+v", c)
	}
}

func TestClashResolved(t *testing.T) {
	for choice, want := range map[session.Choice][2]float64{
		session.Theirs: {999, 4.5},
		session.Mine:   {1234, demo(t)[0].Zones[0].Depth},
		session.Both:   {1234, 4.5},
	} {
		t.Run(string(choice), func(t *testing.T) {
			mine, _, r, c := clashed(t)
			if got := zone0(t, mine, r); got != [2]float64{999, 4.5} {
				t.Errorf("before the choice %v is stored", got)
			}
			must(t, mine.Resolve(c, choice))
			if got := zone0(t, mine, r); got != want {
				t.Errorf("stored %v, want %v", got, want)
			}
			if mine.Clash() != nil || mine.Drafts() != 0 {
				t.Errorf("left: clash %v, %d drafts", mine.Clash(), mine.Drafts())
			}
			if err := mine.Resolve(c, choice); err == nil {
				t.Error("decided twice")
			}
			if choice != session.Theirs {
				must(t, mine.Undo())
				if got := zone0(t, mine, r); got != [2]float64{999, 4.5} {
					t.Errorf("undone, %v is stored and not theirs", got)
				}
			} else if undo, _ := mine.CanUndo(); undo != "" {
				t.Errorf("theirs can be undone here: %q", undo)
			}
		})
	}
}

// Cancelled, nothing is lost: theirs is stored, mine can still be chosen.
func TestClashWaitsForADecision(t *testing.T) {
	mine, _, r, c := clashed(t)
	must(t, mine.SetText(session.Zones, 0, zoneField(t, "depth_m"), "5"))
	if mine.Clash() != c {
		t.Fatal("another edit drops the clash")
	}
	must(t, mine.Resolve(c, session.Both))
	if got := zone0(t, mine, r); got != [2]float64{1234, 5} {
		t.Errorf("stored %v", got)
	}
}

func TestClashWithARemovalBringsMineBack(t *testing.T) {
	theirs, r := ship(t)
	mine := open(t, register(t, r.Path()))
	must(t, theirs.Remove())
	var c *session.Clash
	if err := mine.SetText(session.Zones, 0, zoneField(t, "wetted_area_m2"), "1234"); !errors.As(err, &c) || !c.Removed {
		t.Fatalf("error %v", err)
	}
	if err := mine.Resolve(c, session.Both); err == nil {
		t.Error("made again on an asset that is not there")
	}
	must(t, mine.Resolve(c, session.Mine))
	if a := mine.Asset(); a == nil || a.Zones[0].WettedArea != 1234 {
		t.Errorf("asset %+v", a)
	}
	if got := zone0(t, mine, r); got[0] != 1234 {
		t.Errorf("stored %v", got)
	}
}

func TestClashOfItemsThatCameAndWent(t *testing.T) {
	theirs, r := ship(t)
	mine := open(t, register(t, r.Path()))
	if _, err := theirs.AddZone(0); err != nil {
		t.Fatal(err)
	}
	must(t, theirs.Do("stock", func(a *hull.Asset) error {
		a.Stock = append(a.Stock, hull.Stock{Pattern: a.Patterns[0].ID, Count: 7})
		return nil
	}))
	var c *session.Clash
	if err := mine.AddWater(); !errors.As(err, &c) {
		t.Fatalf("error %v", err)
	}
	found := map[string]bool{}
	for _, d := range c.Differences {
		switch {
		case d.Field == "stock" && d.Theirs != d.Mine:
			found["stock"] = true
		case d.Field == "the whole water" && d.Theirs == "not there" && d.Mine == "there":
			found["water"] = true
		case d.Field == "the whole zone" && d.Theirs == "there" && d.Mine == "not there" && d.Before == "not there":
			found["zone"] = true
		}
	}
	if len(found) != 3 || len(c.Differences) != 3 {
		t.Errorf("differences %+v", c.Differences)
	}
	zones, waters := len(mine.Asset().Zones), len(mine.Asset().Waters)
	must(t, mine.Resolve(c, session.Both))
	if a := stored(t, mine, r); len(a.Zones) != zones || len(a.Waters) != waters+1 || len(a.Stock) == 0 {
		t.Errorf("%d zones, %d waters, stock %v", len(a.Zones), len(a.Waters), a.Stock)
	}
}

func TestNoticeShowsWhatOthersStored(t *testing.T) {
	theirs, r := ship(t)
	mine := open(t, register(t, r.Path()))
	area := zoneField(t, "wetted_area_m2")
	notice := func(want bool) {
		t.Helper()
		if changed, err := mine.Notice(); err != nil || changed != want {
			t.Fatalf("noticed %v, error %v", changed, err)
		}
	}
	notice(false)
	must(t, mine.SetText(session.Zones, 0, area, "900"))
	notice(false) // an own edit
	if changed, err := theirs.Notice(); err != nil || !changed {
		t.Fatalf("the other noticed %v, error %v", changed, err)
	}
	must(t, theirs.SetText(session.Zones, 0, area, "901"))
	must(t, theirs.Add(demo(t)[1], "test"))
	told := 0
	mine.Notify(func() { told++ })
	id := mine.Fleet()[0].ID
	notice(true)
	fleet := mine.Fleet()
	if len(fleet) != 2 || fleet[0].ID != id || !fleet[0].Open || fleet[0].Asset.Zones[0].WettedArea != 901 || told == 0 {
		t.Errorf("%d assets, told %d times, area %v", len(fleet), told, fleet[0].Asset.Zones[0].WettedArea)
	}
	if undo, _ := mine.CanUndo(); undo != "" {
		t.Errorf("an edit of the other can be undone here: %q", undo)
	}
	must(t, mine.SetText(session.Zones, 0, area, "902")) // and no clash
	notice(false)

	theirs.Select(id)
	if _, err := theirs.Notice(); err != nil {
		t.Fatal(err)
	}
	must(t, theirs.Remove())
	notice(true)
	if fleet := mine.Fleet(); len(fleet) != 1 || !fleet[0].Open {
		t.Errorf("%d assets after one was removed, or none is open", len(fleet))
	}
}

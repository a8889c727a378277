package session_test

import (
	"errors"
	"fmt"
	"math"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"anodewright/app/session"
	"anodewright/hull"
	"anodewright/storage"
)

// floor is the dock floor of all that was typed.
func floor(t *testing.T, s *session.Session) *session.Floor {
	t.Helper()
	s.Wait()
	for range 100 {
		f, known := s.Floor()
		if known {
			return f
		}
		s.Wait()
	}
	t.Fatal("the dock floor is never known")
	return nil
}

// rowOf is the first row of a zone.
func rowOf(t *testing.T, s *session.Session, f *session.Floor, zone string) session.FloorRow {
	t.Helper()
	for _, r := range f.Rows {
		if s.Asset().Zones[r.Zone].ID == zone {
			return r
		}
	}
	t.Fatalf("no row of %s", zone)
	return session.FloorRow{}
}

func TestFloorBeginsAsPlanned(t *testing.T) {
	s, _ := ship(t)
	f := floor(t, s)
	c, err := s.DraftClosing(0, 0)
	must(t, err)
	if len(f.Rows) == 0 || f.Plan == nil || len(f.Faults)+len(f.Wrong) > 0 || s.FloorTyped() != 0 {
		t.Fatalf("%d rows, faults %v %v", len(f.Rows), f.Faults, f.Wrong)
	}
	if len(f.Closing.Sets) != len(c.Sets) || len(f.Closing.Works) != len(c.Works) || *f.Closing.PlannedCost != *c.PlannedCost {
		t.Errorf("drafted %+v, on the floor %+v", c, f.Closing)
	}
	pieces := func(on []hull.PutOn) (n int) {
		for _, p := range on {
			n += p.Count
		}
		return n
	}
	if got, want := pieces(f.Closing.On), pieces(c.On); got != want || math.Abs(*f.Closing.Cost-*c.Cost) > 0.5 {
		t.Errorf("%d pieces for %v, planned %d for %v", got, *f.Closing.Cost, want, *c.Cost)
	}
	there := 0
	for _, q := range f.Quay {
		there += q.There
		if q.Lacking() > 0 {
			t.Errorf("%s lacks %d of what was ordered for it", q.Pattern.ID, q.Lacking())
		}
	}
	ordered := 0
	for _, o := range append(c.Ordered, s.Asset().Stock...) {
		ordered += o.Count
	}
	if there != ordered || there == 0 {
		t.Errorf("%d on the quay, %d ordered and in stock", there, ordered)
	}
}

// keptSet is a row whose anodes the plan keeps.
func keptSet(t *testing.T, f *session.Floor) session.FloorRow {
	t.Helper()
	for _, r := range f.Rows {
		if r.Key.Pattern != "" && r.Zoned.Line.Action == "keep" {
			return r
		}
	}
	t.Fatal("the plan keeps nothing")
	return session.FloorRow{}
}

func TestWastageFoundChangesWhatIsDone(t *testing.T) {
	s, _ := ship(t)
	r := keptSet(t, floor(t, s))
	must(t, s.SetFloor(session.FloorWastage(r.Key), "93 97"))
	f := floor(t, s)
	now := rowOf(t, s, f, r.Key.Zone)
	if now.Set.Wastage != 0.95 || now.Set.How != hull.Surveyed || now.Zoned.Line.Action != "renew" || now.Set.Off != now.Set.Found {
		t.Errorf("found 95 %% wasted: %+v, %+v", now.Set, now.Zoned)
	}
	if len(now.Zoned.On) != 1 || now.Zoned.Done {
		t.Errorf("put on: %+v", now.Zoned)
	}
	// With nothing on the quay it is lacking, and the plan says so in words.
	for _, q := range f.Quay {
		must(t, s.SetFloor(session.FloorStock(q.Pattern.ID), "0"))
	}
	f = floor(t, s)
	if f.Short == "" || !strings.Contains(f.Short, "lacks") {
		t.Errorf("over the quay: %q", f.Short)
	}
	must(t, s.SetFloor(session.FloorOnly, "no"))
	if f = floor(t, s); f.Short != "" || f.Only {
		t.Errorf("with anything to be had: %q", f.Short)
	}
	must(t, s.SetFloor(session.FloorOnly, "yes"))
	for _, q := range f.Quay {
		must(t, s.SetFloor(session.FloorStock(q.Pattern.ID), "500"))
	}
	if f = floor(t, s); f.Short != "" {
		t.Errorf("with 500 on the quay: %q", f.Short)
	}
	must(t, s.SetFloor(session.FloorWastage(r.Key), ""))
	if again := rowOf(t, s, floor(t, s), r.Key.Zone); again.Zoned.Line.Action != "keep" || again.Set.How != r.Set.How {
		t.Errorf("with nothing typed: %+v", again)
	}
}

func TestWhatIsDoneWinsOverThePlan(t *testing.T) {
	s, _ := ship(t)
	f := floor(t, s)
	r := keptSet(t, f)
	must(t, s.SetFloor(session.FloorOn(r.Key.Zone), "2 × "+r.Key.Pattern))
	must(t, s.SetFloor(session.FloorStock(r.Key.Pattern), "60"))
	f = floor(t, s)
	now := rowOf(t, s, f, r.Key.Zone)
	if !now.Zoned.Done || len(now.Zoned.On) != 1 || now.Zoned.On[0].Count != 2 || now.Zoned.Off != 0 {
		t.Errorf("as done: %+v", now.Zoned)
	}
	// All taken off and nothing put on cannot hold the zone; it is done all the same.
	must(t, s.SetFloor(session.FloorOn(r.Key.Zone), "1"))
	must(t, s.SetFloor(session.FloorOff(r.Key), "999"))
	if f = floor(t, s); !strings.Contains(f.Wrong[session.FloorOff(r.Key)], "at most") {
		t.Errorf("taken off 999: %v", f.Wrong)
	}
	must(t, s.SetFloor(session.FloorOff(r.Key), session.Number(float64(r.Set.Found))))
	f = floor(t, s)
	now = rowOf(t, s, f, r.Key.Zone)
	if now.Zoned.Refused == "" || now.Zoned.Off != r.Set.Found || now.Zoned.On[0].Count != 1 || len(f.Wrong) > 0 {
		t.Errorf("one in place of all: %+v, %v", now.Zoned, f.Wrong)
	}
	for _, q := range f.Quay {
		used := 0
		for _, p := range f.Closing.On {
			if p.Pattern == q.Pattern.ID {
				used += p.Count
			}
		}
		if q.Used != used || q.Left() != max(0, q.There-used) {
			t.Errorf("quay: %+v, used %d", q, used)
		}
	}
}

func TestFloorSurvivesRestartAndCloses(t *testing.T) {
	s, r := ship(t)
	row := keptSet(t, floor(t, s))
	must(t, s.SetFloor(session.FloorWastage(row.Key), "31"))
	must(t, s.SetFloor(session.FloorBy, "superintendent"))
	must(t, s.SetFloor(session.FloorCost, "12500"))
	again := open(t, r)
	again.Select(openID(t, s))
	if text, typed := again.FloorText(session.FloorWastage(row.Key)); !typed || text != "31" || again.FloorTyped() != 3 {
		t.Fatalf("after a restart %q", text)
	}
	f := floor(t, again)
	must(t, again.CloseFloor())
	a := again.Asset()
	if a.LastDocking != f.Closing.Date || len(a.Closed) != 1 || a.Closed[0].By != "superintendent" || *a.Closed[0].Cost != 12500 {
		t.Fatalf("closed %+v", a.Closed)
	}
	found := false
	for _, fact := range a.Ledger {
		found = found || fact.Deed == hull.WasFound && fact.Key() == row.Key && fact.Wastage == 0.31 && fact.How == hull.Surveyed
	}
	if !found || again.FloorTyped() != 0 {
		t.Errorf("found in the ledger %v, %d still typed", found, again.FloorTyped())
	}
	must(t, again.Undo())
	if again.FloorTyped() != 3 || again.Asset().LastDocking == f.Closing.Date {
		t.Errorf("undone, %d are typed", again.FloorTyped())
	}
	must(t, again.DiscardFloor())
	if again.FloorTyped() != 0 {
		t.Error("discarded, something is still typed")
	}
}

func TestFaultyFloorClosesNothing(t *testing.T) {
	s, _ := ship(t)
	f := floor(t, s)
	before := s.Asset()
	for field, text := range map[session.FloorField]string{
		session.FloorWastage(f.Rows[0].Key): "130", session.FloorDate: "2001-01-01", session.FloorCost: "-3", session.FloorOn(f.Rows[0].Key.Zone): "some",
		session.FloorStock(f.Quay[0].Pattern.ID): "many", session.FloorOnly: "perhaps",
	} {
		must(t, s.SetFloor(field, text))
		if got := floor(t, s); got.Wrong[field] == "" || len(got.Wrong) != 1 {
			t.Errorf("%s %q: %v", field, text, got.Wrong)
		}
		err := s.CloseFloor()
		if err == nil || !strings.Contains(err.Error(), f.Name(field)) || s.Asset() != before {
			t.Errorf("%s %q: closed with %v", field, text, err)
		}
		if kept, _ := s.FloorText(field); kept != text {
			t.Errorf("%s: %q is kept of %q", field, kept, text)
		}
		must(t, s.SetFloor(field, ""))
	}
	must(t, s.SetFloor(session.FloorNext, "2020-01-01"))
	var faults hull.Faults
	if err := s.CloseFloor(); !errors.As(err, &faults) || !strings.Contains(err.Error(), "Next docking") {
		t.Errorf("a next docking in the past: %v", err)
	}
}

func TestWorksNotDoneAreNotClosed(t *testing.T) {
	s, _ := ship(t)
	f := floor(t, s)
	if len(f.Works) < 2 {
		t.Fatalf("works %+v", f.Works)
	}
	must(t, s.SetFloor(session.FloorWorkDone(f.Works[0].Work), "no"))
	share := -1
	for i, w := range f.Works {
		if i > 0 && w.Work.Share != nil {
			share = i
			must(t, s.SetFloor(session.FloorWorkDone(w.Work), "12.5 %"))
			break
		}
	}
	now := floor(t, s)
	if len(now.Closing.Works) != len(f.Closing.Works)-1 || now.Works[0].Done {
		t.Errorf("works %+v", now.Closing.Works)
	}
	if share > 0 && *now.Works[share].Work.Share != 0.125 {
		t.Errorf("the share: %+v", now.Works[share])
	}
}

func TestNoDockingAheadHasNoFloor(t *testing.T) {
	s, _ := ship(t)
	must(t, s.Do("no dockings", func(a *hull.Asset) error { a.LastDocking = a.Ahead()[len(a.Ahead())-1].Date; return nil }))
	s.Wait()
	if f, known := s.Floor(); f != nil || !known {
		t.Errorf("a floor %+v, known %v", f, known)
	}
	if err := s.CloseFloor(); err == nil {
		t.Error("a docking was closed")
	}
}

// BenchmarkFloor types wastages found on the dock floor: how long until the
// text is kept, and until what is done is planned anew.
func BenchmarkFloor(b *testing.B) {
	for _, zones := range []int{10, 200} {
		b.Run(fmt.Sprint(zones), func(b *testing.B) {
			r, err := storage.Open(filepath.Join(b.TempDir(), "fleet.anodewright"))
			must(b, err)
			defer r.Close()
			s, err := session.Open(r, today)
			must(b, err)
			must(b, s.Add(wide(b, zones), "bench"))
			s.Wait()
			s.Floor()
			s.Wait()
			f, _ := s.Floor()
			var kept, planned times
			for i := 0; b.Loop(); i++ {
				begin := time.Now()
				must(b, s.SetFloor(session.FloorWastage(f.Rows[i%len(f.Rows)].Key), fmt.Sprint(20+i%60)))
				kept = append(kept, time.Since(begin))
				s.Floor()
				s.Wait()
				planned = append(planned, time.Since(begin))
			}
			kept.report(b, "kept")
			planned.report(b, "planned")
		})
	}
}

package session_test

import (
	"reflect"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"anodewright/app/session"
	"anodewright/hull"
	"anodewright/storage"
)

func readingField(t tester, key string) session.Field {
	t.Helper()
	for _, f := range session.ReadingFields() {
		if f.Key == key {
			return f
		}
	}
	t.Fatalf("readings have no field %s", key)
	return session.Field{}
}

// withReadings is the ship with these readings of its first fitted zone.
func withReadings(t *testing.T, rs ...hull.Reading) (*session.Session, *storage.Register, int) {
	s, r := ship(t)
	zone := -1
	for i, z := range s.Asset().Zones {
		if len(z.Fitted) > 0 && zone < 0 {
			zone = i
		}
	}
	must(t, s.Do("readings", func(a *hull.Asset) error {
		a.Readings = nil
		for _, r := range rs {
			r.Date, r.Zone = a.Start().AddMonths(12), a.Zones[zone].ID
			a.Readings = append(a.Readings, r)
		}
		return nil
	}))
	return s, r, zone
}

func TestReadingTexts(t *testing.T) {
	s, _, zone := withReadings(t, hull.Reading{})
	for _, c := range []struct{ key, typed, shown string }{
		{"date", "2025-06-01", "2025-06-01"},
		{"zone", strings.ToUpper(s.Asset().Zones[zone].Name), s.Asset().Zones[zone].Name},
		{"by", " Divers ", "Divers"},
		{"weighed_wastage", "11, 14 9.5", "11 14 9.5"},
		{"weighed_wastage", "0.5 % 11%; 28", "0.5% 11 28"},
		{"weighed_wastage", "", ""},
		{"percent", "20 25 0", "20 25 0"},
		{"percent", "", ""},
		{"measured", "0.585 x 2.34; 0.605 × 2.36", "0.585 × 2.34; 0.605 × 2.36"},
		{"measured", "", ""},
		{"grades", "0 5 3 0", "0-25-50-75: 0 5 3 0"},
		{"grades", "0-12.5-55: 1, 2, 3", "0-12.5-55: 1 2 3"},
		{"gone", "2", "2"},
		{"gone", "0", ""},
		{"painted", "3", "3"},
		{"painted", "", ""},
		{"potentials", "-0.92; -0.85 cse; 0.2 V zinc", "-0.92 Ag/AgCl; -0.85 Cu/CuSO4; 0.2 zinc"},
		{"coating_percent", "12 %", "12 %"},
		{"coating_percent", "fair", "FAIR"},
		{"coating_percent", "12 fair", "12 % FAIR"},
		{"coating_percent", "", ""},
	} {
		f := readingField(t, c.key)
		must(t, s.SetText(session.Readings, 0, f, c.typed))
		if text, fault := s.Text(session.Readings, 0, f); text != c.shown || fault != "" {
			t.Errorf("%s: typed %q, shown %q (%s), want %q", c.key, c.typed, text, fault, c.shown)
		}
	}
	r := s.Asset().Readings[0]
	if r.Potentials[1] != (hull.Measure{Potential: -0.85, Electrode: hull.CopperSulphate}) {
		t.Errorf("potentials are not kept as entered: %+v", r.Potentials)
	}
	if r.Grades.Bounds[1] != 0.125 || r.Grades.Counts[2] != 3 {
		t.Errorf("grades %+v", r.Grades)
	}
}

// A faulty text stays where it was typed, and the reading as it was.
func TestFaultyReadings(t *testing.T) {
	s, _, _ := withReadings(t, hull.Reading{Percent: []float64{20}}, hull.Reading{})
	before := s.Asset()
	for _, c := range []struct{ key, typed, fault string }{
		{"date", "yesterday", "want"},
		{"zone", "Keel cooler", "the id of one of the asset's zones"},
		{"pattern", "none-such", "want"},
		{"weighed_wastage", "11", "one of weighed_wastage, measured, percent and grades"},
		{"percent", "0.2", "write the sign"},
		{"percent", "20 140", "140"},
		{"percent", "some", "want per cent"},
		{"measured", "0.5", "girth × length"},
		{"grades", "0 5", "a count for each class"},
		{"grades", "50-25: 1 1", "bounds that rise"},
		{"gone", "-1", "want"},
		{"gone", "few", "want"},
		{"potentials", "-0.9 gold", "electrodes"},
		{"coating_percent", "140", "want per cent"},
		{"coating_percent", "awful", "GOOD, FAIR or POOR"},
	} {
		f := readingField(t, c.key)
		row := 0
		if c.key == "grades" {
			row = 1
		}
		must(t, s.SetText(session.Readings, row, f, c.typed))
		if text, fault := s.Text(session.Readings, row, f); text != c.typed || !strings.Contains(fault, c.fault) {
			t.Errorf("%s: typed %q, shown %q with the fault %q, want %q", c.key, c.typed, text, fault, c.fault)
		}
		must(t, s.SetText(session.Readings, row, f, f.Get(s.Asset(), row)))
	}
	if s.Drafts() != 0 || !equal(s.Asset(), before) {
		t.Errorf("%d drafts left, or the asset changed", s.Drafts())
	}
}

// The drafts of two readings of one day and zone are told apart, and stay when
// the day is corrected.
func TestReadingDrafts(t *testing.T) {
	s, _, _ := withReadings(t, hull.Reading{}, hull.Reading{})
	gone := readingField(t, "gone")
	must(t, s.SetText(session.Readings, 1, gone, "few"))
	if text, _ := s.Text(session.Readings, 0, gone); text != "" {
		t.Errorf("the first reading shows %q", text)
	}
	must(t, s.SetText(session.Readings, 1, readingField(t, "date"), s.Asset().Start().AddMonths(13).String()))
	if text, fault := s.Text(session.Readings, 1, gone); text != "few" || fault == "" {
		t.Errorf("after the day was corrected: %q (%s)", text, fault)
	}
}

// Written and read back a reading's texts are the same, whatever the figures.
func TestWastagesAreReadBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		values := rapid.SliceOfN(rapid.Float64Range(0, 1), 1, 6).Draw(t, "values")
		a := &hull.Asset{Readings: []hull.Reading{{WeighedWastage: values}}}
		for _, percent := range []bool{false, true} {
			key, list := "weighed_wastage", &a.Readings[0].WeighedWastage
			if percent {
				key, list = "percent", &a.Readings[0].Percent
				for i := range values {
					*list = append(*list, 100*values[i])
				}
			}
			want := append([]float64(nil), *list...)
			f := readingField(t, key)
			if err := f.Set(a, 0, f.Get(a, 0)); err != nil {
				t.Fatal(err)
			}
			for i, x := range *list {
				if d := x - want[i]; d > 1e-12 || d < -1e-12 || len(*list) != len(want) {
					t.Fatalf("%v were read back as %v", want, *list)
				}
			}
		}
	})
}

func TestAddReadingGoesOnToTheNextSet(t *testing.T) {
	s, r := ship(t)
	must(t, s.Do("none", func(a *hull.Asset) error { a.Readings = nil; return nil }))
	type set struct{ zone, pattern string }
	want := map[set]bool{}
	n := 0
	for _, z := range s.Asset().Zones {
		for _, f := range z.Fitted {
			want[set{z.ID, f.Pattern + f.Fitted.String()}] = true
			n++
		}
	}
	for k := range n {
		at, err := s.AddReading(k - 1)
		must(t, err)
		if at != k {
			t.Fatalf("reading %d is at %d", k, at)
		}
		if k == 0 {
			must(t, s.SetText(session.Readings, 0, readingField(t, "by"), "Divers"))
			must(t, s.SetText(session.Readings, 0, readingField(t, "date"), s.Asset().Start().AddMonths(9).String()))
		}
	}
	for k, got := range stored(t, s, r).Readings {
		delete(want, set{got.Zone, got.Pattern + got.Fitted.String()})
		if got.By != "Divers" || got.Date != s.Asset().Start().AddMonths(9) {
			t.Errorf("reading %d is by %q of %s", k, got.By, got.Date)
		}
	}
	if len(want) != 0 {
		t.Errorf("sets without a reading: %v", want)
	}
	must(t, s.RemoveReading(0))
	if got := len(stored(t, s, r).Readings); got != n-1 {
		t.Errorf("%d readings are left of %d", got, n)
	}
	if s.RemoveReading(n) == nil || s.RemoveReading(-1) == nil {
		t.Error("a reading that is not there was removed")
	}
	must(t, s.Undo())
	if got := len(s.Asset().Readings); got != n {
		t.Errorf("undo brought back %d of %d readings", got, n)
	}
	must(t, s.Do("bare", func(a *hull.Asset) error {
		for i := range a.Zones {
			a.Zones[i].Fitted = nil
		}
		a.Readings = nil
		return nil
	}))
	if _, err := s.AddReading(-1); err == nil || !strings.Contains(err.Error(), "no zone carries anodes") {
		t.Errorf("error %v", err)
	}
}

// Planning with readings is kept with the register, per asset, and plans anew.
func TestPlanningWithReadingsIsKept(t *testing.T) {
	s, r, zone := withReadings(t, hull.Reading{WeighedWastage: []float64{0.6, 0.62, 0.58, 0.6}})
	s.Wait()
	if o := s.Outcome(); s.Learns() || o.Learns || o.Zones[zone].Learned == nil || o.Zones[zone].Factor.Median != 1 {
		t.Fatalf("a new asset learns: %v, %+v", s.Learns(), o.Zones[zone].Factor)
	}
	must(t, s.SetLearns(true))
	s.Wait()
	if o := s.Outcome(); !s.Learns() || !o.Learns || o.Zones[zone].Factor != o.Zones[zone].Learned.Factor {
		t.Errorf("learns %v, factor %+v, learned %+v", o.Learns, o.Zones[zone].Factor, o.Zones[zone].Learned)
	}
	if again := open(t, r); !again.Learns() {
		t.Error("opened again it does not learn")
	}
	must(t, s.SetLearns(false))
	s.Wait()
	if s.Outcome().Learns {
		t.Error("it still learns")
	}
}

// A reading that is corrected stays as it was and counts no more; its copy is
// put right.
func TestCorrectedReadingIsKept(t *testing.T) {
	s, r := ship(t)
	must(t, s.Do("a reading", func(a *hull.Asset) error {
		a.Readings = []hull.Reading{{Date: a.Start().AddMonths(12), Zone: a.Zones[0].ID, By: "diver", Percent: []float64{80}}}
		return nil
	}))
	old := s.Asset().Readings[0]
	at, err := s.CorrectReading(0)
	must(t, err)
	got := s.Asset().Readings
	if at != 1 || len(got) != 2 || got[0].Withdrawn != today || !got[1].Withdrawn.IsZero() {
		t.Fatalf("at %d: %+v", at, got)
	}
	must(t, s.SetText(session.Readings, at, readingField(t, "percent"), "8"))
	must(t, s.SetText(session.Readings, at, readingField(t, "note"), "a slip of the pen"))
	if err := s.SetText(session.Readings, 0, readingField(t, "percent"), "9"); err == nil || !strings.Contains(err.Error(), "kept as it was") {
		t.Errorf("the withdrawn one was changed: %v", err)
	}
	if _, err := s.CorrectReading(0); err == nil {
		t.Error("withdrawn twice")
	}
	got = stored(t, s, r).Readings
	old.Withdrawn = today
	if !reflect.DeepEqual(got[0], old) || got[1].Percent[0] != 8 || got[1].Note == "" || got[1].By != "diver" {
		t.Errorf("%+v", got)
	}
	s.Wait()
	if l := s.Outcome().Zones[0].Learned; l == nil || l.Readings != 1 {
		t.Errorf("learned from %+v, want the one that stands", l)
	}
}

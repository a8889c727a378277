package session_test

import (
	"strings"
	"testing"

	"anodewright/anodes"
	"anodewright/app/session"
	"anodewright/hull"
)

func TestPatternsFromTheLibrary(t *testing.T) {
	s, r := ship(t)
	before := len(s.Asset().Patterns)
	for _, p := range anodes.Library() {
		at, err := s.AddPattern(p)
		must(t, err)
		if got := s.Asset().Patterns[at]; got.NetMass != p.NetMass || !strings.HasPrefix(got.ID, p.ID) {
			t.Errorf("%s became %+v", p.ID, got)
		}
	}
	first := anodes.Library()[0]
	at, err := s.AddPattern(first)
	must(t, err)
	if got := s.Asset().Patterns[at].ID; got != first.ID+"-2" {
		t.Errorf("a second %s is called %s", first.ID, got)
	}
	if got := len(stored(t, s, r).Patterns); got != before+len(anodes.Library())+1 {
		t.Errorf("%d patterns are stored", got)
	}
	must(t, s.Undo())
	if got := len(s.Asset().Patterns); got != before+len(anodes.Library()) {
		t.Errorf("%d patterns after undo", got)
	}
}

func TestDuplicateAndRemovePattern(t *testing.T) {
	s, _ := ship(t)
	before := s.Asset()
	at, err := s.DuplicatePattern(0)
	must(t, err)
	if got := s.Asset().Patterns[1]; at != 1 || got.ID == before.Patterns[0].ID || got.Name != before.Patterns[0].Name {
		t.Errorf("at %d: %+v", at, got)
	}
	must(t, s.RemovePattern(1))
	if !equal(s.Asset(), before) {
		t.Error("the asset is not as before")
	}
	if _, err := s.DuplicatePattern(99); err == nil {
		t.Error("a pattern that is not there was duplicated")
	}
}

// A pattern in use stays, and the refusal says what uses it.
func TestUsedPatternStays(t *testing.T) {
	s, _ := ship(t)
	must(t, s.Do("use it", func(a *hull.Asset) error {
		a.Stock = []hull.Stock{{Pattern: a.Patterns[0].ID, Count: 7}}
		return nil
	}))
	before, id := s.Asset(), s.Asset().Patterns[0].ID
	err := s.RemovePattern(0)
	if err == nil || !equal(s.Asset(), before) {
		t.Fatalf("removed: %v", err)
	}
	for _, want := range []string{id + " is still in use", "are fitted in", "offers it", "7 lie in stock", "a reading of"} {
		if !strings.Contains(err.Error(), want) {
			t.Errorf("%q does not say %q", err, want)
		}
	}
	if err := s.RemovePattern(-1); err == nil {
		t.Error("no pattern was removed")
	}
}

// Everything that names a pattern follows its new id.
func TestRenamedPatternKeepsItsUses(t *testing.T) {
	s, _ := ship(t)
	id := field(t, session.PatternFields(), "id")
	old := s.Asset().Patterns[0].ID
	uses := strings.Join(session.PatternUses(s.Asset(), old), "; ")
	must(t, s.SetText(session.Patterns, 0, id, "new-name"))
	a := s.Asset()
	if got := strings.Join(session.PatternUses(a, "new-name"), "; "); got != uses || uses == "" {
		t.Errorf("uses %q, before %q", got, uses)
	}
	if left := session.PatternUses(a, old); len(left) > 0 {
		t.Errorf("the old name is still used: %v", left)
	}
	must(t, s.SetText(session.Patterns, 0, id, a.Patterns[1].ID))
	if text, fault := s.Text(session.Patterns, 0, id); text != a.Patterns[1].ID || !strings.Contains(fault, "not yet used") {
		t.Errorf("%q, fault %q", text, fault)
	}
	if !equal(s.Asset(), a) {
		t.Error("a taken id changed the asset")
	}
}

func TestFaultyPatternFieldIsADraft(t *testing.T) {
	s, r := ship(t)
	mass, before := field(t, session.PatternFields(), "net_mass_kg"), s.Asset()
	must(t, s.SetText(session.Patterns, 0, mass, "heavy"))
	for _, s := range []*session.Session{s, open(t, r)} {
		if text, fault := s.Text(session.Patterns, 0, mass); text != "heavy" || !strings.HasPrefix(fault, "want a number") || s.Drafts() != 1 {
			t.Errorf("%q, fault %q, %d drafts", text, fault, s.Drafts())
		}
	}
	if !equal(s.Asset(), before) {
		t.Error("the asset changed")
	}
}

// The parts of a fitted set are edited one by one through the zone's field.
func TestFittedParts(t *testing.T) {
	s, _ := ship(t)
	other := s.Asset().Patterns[1].ID
	must(t, s.AddFitted(0, other))
	sets := s.Asset().Zones[0].Fitted
	n := len(sets) - 1
	if got := sets[n]; n < 1 || got.Pattern != other || got.Count != 1 || got.Fitted != s.Asset().Start() {
		t.Fatalf("%+v", sets)
	}
	must(t, s.SetFitted(0, n, session.FittedCount, "14"))
	must(t, s.SetFitted(0, n, session.FittedDate, "15 Mar 2020"))
	must(t, s.SetFitted(0, n, session.FittedWastage, "12,5 %"))
	must(t, s.SetFitted(0, n, session.FittedPattern, s.Asset().Patterns[0].ID))
	want := hull.Fitted{Pattern: s.Asset().Patterns[0].ID, Count: 14, Fitted: hull.NewDate(2020, 3, 15), Wastage: 0.125}
	if got := s.Asset().Zones[0].Fitted; got[n] != want || got[0] != sets[0] {
		t.Errorf("%+v", got)
	}
	must(t, s.RemoveFitted(0, n))
	if got := s.Asset().Zones[0].Fitted; len(got) != n || got[0] != sets[0] {
		t.Errorf("%+v", got)
	}
	if err := s.RemoveFitted(0, 9); err == nil {
		t.Error("a set that is not there was removed")
	}
}

// A fault shows in the part that has it and nowhere else, and goes when the
// part is put right or put back.
func TestFaultyFittedPart(t *testing.T) {
	for c, part := range map[session.FittedColumn]struct{ text, fault string }{
		session.FittedPattern: {"no-such", "the id of one of the asset's patterns"}, session.FittedCount: {"2.5", `want a whole number, got "2.5"`},
		session.FittedDate: {"2027-13-01", "want a date such as"}, session.FittedWastage: {"half of it", `want a share such as 50 %, got "half of it"`},
	} {
		text := part.text
		s, _ := ship(t)
		must(t, s.AddFitted(0, s.Asset().Patterns[0].ID))
		before := s.Asset()
		n := len(before.Zones[0].Fitted) - 1
		was, _ := s.FittedText(0, n, c)
		must(t, s.SetFitted(0, n, c, text))
		for i := range before.Zones[0].Fitted {
			for k := session.FittedPattern; k <= session.FittedWastage; k++ {
				got, fault := s.FittedText(0, i, k)
				if own := i == n && k == c; (fault != "") != own || own && got != text {
					t.Errorf("%q in part %d: set %d, part %d shows %q, fault %q", text, c, i, k, got, fault)
				}
			}
		}
		if _, fault := s.FittedText(0, n, c); !strings.Contains(fault, part.fault) {
			t.Errorf("%q: fault %q", text, fault)
		}
		if !equal(s.Asset(), before) || s.Drafts() != 1 {
			t.Errorf("%q: %d drafts, or the asset changed", text, s.Drafts())
		}
		must(t, s.SetFitted(0, n, c, was))
		if got, fault := s.FittedText(0, n, c); got != was || fault != "" || s.Drafts() != 0 {
			t.Errorf("put back: %q, fault %q, %d drafts", got, fault, s.Drafts())
		}
	}
}

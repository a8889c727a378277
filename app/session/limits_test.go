package session_test

import (
	"math"
	"strings"
	"testing"

	"anodewright/anodes/renewal"
	"anodewright/hull"
)

// Limits change the plan, are kept with the register and are no edit; ones
// that no plan keeps leave the plan as it is without them, and say so.
func TestLimitsAreKept(t *testing.T) {
	s, r, _ := withReadings(t, hull.Reading{WeighedWastage: []float64{0.1, 0.12, 0.11, 0.1}})
	s.Wait()
	free := s.Outcome()
	before, _ := s.CanUndo()
	most := 0
	for k := range s.Asset().Ahead() {
		n := 0
		for _, l := range free.Schedule {
			if l.Docking == k && l.Action != renewal.Keep {
				n += l.Count
			}
		}
		most = max(most, n)
	}
	limits := renewal.Limits{Pieces: most - 1}
	must(t, s.SetLimits(limits))
	s.Wait()
	o := s.Outcome()
	if o.Limits != limits || o.Money.Total < free.Money.Total {
		t.Errorf("within %d pieces the plan costs %v, without limits %v; %s", most-1, o.Money.Total, free.Money.Total, o.OverLimits)
	}
	for k := range s.Asset().Ahead() {
		n := 0
		for _, l := range o.Schedule {
			if l.Docking == k && l.Action != renewal.Keep {
				n += l.Count
			}
		}
		if n > limits.Pieces {
			t.Errorf("docking %d: %d pieces", k, n)
		}
	}
	if got := open(t, r).Limits(); got != limits {
		t.Errorf("opened again: %+v", got)
	}
	if undo, _ := s.CanUndo(); undo != before {
		t.Errorf("undo would take back %q, want %q", undo, before)
	}

	must(t, s.SetLimits(renewal.Limits{Pieces: 1}))
	s.Wait()
	if o := s.Outcome(); !strings.Contains(o.OverLimits, "pieces") || o.Money.Total != free.Money.Total || o.Limits != (renewal.Limits{}) {
		t.Errorf("one piece at a docking: %q, %v", o.OverLimits, o.Money.Total)
	}
	for _, bad := range []renewal.Limits{{Pieces: -1}, {Patterns: -1}, {Budget: -1}, {Budget: math.NaN()}} {
		if s.SetLimits(bad) == nil {
			t.Errorf("%+v was taken", bad)
		}
	}
	must(t, s.SetLimits(renewal.Limits{}))
	if open(t, r).Limits() != (renewal.Limits{}) {
		t.Error("limits are left")
	}
}

package session_test

import (
	"math"
	"testing"

	"anodewright/app/session"
	"anodewright/hull"
)

// lookBack is what is known of the last docking.
func lookBack(t *testing.T, s *session.Session) *session.LastTime {
	t.Helper()
	s.Wait()
	for range 100 {
		l, known := s.LastTime()
		if known {
			return l
		}
		s.Wait()
	}
	t.Fatal("last time is never known")
	return nil
}

func TestLastTimeWithoutAClosedDocking(t *testing.T) {
	s, _ := ship(t)
	l := lookBack(t, s)
	if l == nil || l.Closed != nil || l.Known || len(l.PutOn) == 0 || l.Date.IsZero() {
		t.Fatalf("last time %+v", l)
	}
	count := 0
	for _, z := range s.Asset().Zones {
		for _, f := range z.Fitted {
			if f.Fitted > l.Date {
				t.Errorf("%s was fitted after %s", f.Pattern, l.Date)
			}
			if f.Fitted == l.Date {
				count += f.Count
			}
		}
	}
	for _, o := range l.Ordered {
		count -= o.Count
	}
	if count != 0 || l.Left <= 0 || l.Left >= 1 {
		t.Errorf("%d pieces are missing, %v left", count, l.Left)
	}
}

func TestLastTimeAfterAClosing(t *testing.T) {
	s, c := docked(t, func(c *hull.Closing) { c.Ordered = append(c.Ordered, hull.Stock{Pattern: c.On[0].Pattern, Count: 7}) })
	l := lookBack(t, s)
	if l.Closed == nil || l.Date != c.Date || !l.Known || len(l.Ordered) != len(c.Ordered) || l.Next.Date != s.Asset().Ahead()[0].Date {
		t.Fatalf("last time %+v", l)
	}
	again := 0.0
	for _, o := range c.Ordered {
		p, _ := s.Asset().Pattern(o.Pattern)
		again += float64(o.Count) * p.Price
	}
	planned := 0.0
	for _, line := range s.Outcome().Order {
		if line.Docking == l.Next.Date {
			planned += line.Price
		}
	}
	if math.Abs(l.Again-again) > 1e-6 || math.Abs(l.Planned-planned) > 1e-6 {
		t.Errorf("the same again %v of %v, planned %v of %v", l.Again, again, l.Planned, planned)
	}
	// The plan is the cheapest: the same pieces again never cost less.
	if l.Over < -1e-6 || math.IsNaN(l.Over) && len(l.Refused) == 0 {
		t.Errorf("over the plan by %v, refused %+v", l.Over, l.Refused)
	}
}

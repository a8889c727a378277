package plan_test

import (
	"testing"

	"anodewright/anodes/plan"
	"anodewright/assets"
	"anodewright/hull"
	"anodewright/storage/assetfile"
)

// The states in time end every interval as the outcome says, begin the next
// with what the docking leaves, and cover all days.
func TestStatesAgreeWithTheIntervals(t *testing.T) {
	seen := map[plan.State]bool{}
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			t.Fatal(err)
		}
		o := plan.Compute(a, hull.NewDate(2026, 12, 1))
		states := o.States()
		for k, iv := range o.Intervals {
			end := iv.To
			if k+1 < len(o.Intervals) {
				end-- // on the day itself the docking has been
			}
			at := states.At(end)
			for i, z := range o.Zones {
				want := z.Intervals[k]
				// A state may turn on the very last day only.
				if at[i].State != want.State && states.At(iv.To)[i].State != want.State {
					t.Errorf("%s, %s at %v: %q %q, the interval ends %q %q", a.Name, z.Zone.Name, end, at[i].State, at[i].Cause, want.State, want.Cause)
				}
				seen[want.State] = true
			}
		}
		for i, s := range states.At(a.Horizon + 10000) {
			if s != states.At(a.Horizon)[i] {
				t.Errorf("%s: zone %d changes after the horizon", a.Name, i)
			}
			if first := states.At(a.Start() - 10000)[i]; first != states.At(a.Start())[i] {
				t.Errorf("%s: zone %d is %v before the last docking", a.Name, i, first)
			}
		}
	}
	for _, s := range []plan.State{plan.Sound, plan.Thin} {
		if !seen[s] {
			t.Errorf("no demo zone is ever %s", s)
		}
	}
}

// A zone that wastes is first sound, then thin; its state never betters
// without a docking.
func TestStatesWorsenBetweenDockings(t *testing.T) {
	for _, text := range assets.Demo() {
		a, err := assetfile.Decode(text)
		if err != nil {
			t.Fatal(err)
		}
		o := plan.Compute(a, hull.NewDate(2026, 12, 1))
		states := o.States()
		changes := 0
		for i, z := range o.Zones {
			if len(a.Service) > 0 || len(z.Zone.Service) > 0 {
				continue // another trade may better it
			}
			for _, iv := range o.Intervals {
				last := 0
				for d := iv.From; d < iv.To; d += 20 {
					rank := states.At(d)[i].State.Rank()
					// Current may recover with the water; mass does not.
					if rank < last && states.At(d)[i].Cause == "of mass" {
						t.Errorf("%s, %s betters on %v", a.Name, z.Zone.Name, d)
					}
					if rank != last {
						changes++
					}
					last = rank
				}
			}
		}
		if changes == 0 && len(a.Service) == 0 {
			t.Errorf("%s: no state ever changes", a.Name)
		}
	}
}

func BenchmarkStates(b *testing.B) {
	a, err := assetfile.Decode(assets.Demo()[0])
	if err != nil {
		b.Fatal(err)
	}
	o := plan.Compute(a, hull.NewDate(2026, 12, 1))
	for b.Loop() {
		o.States()
	}
}

// What makes a state: a reserve of mass or of current below the threshold, a
// potential above the criterion, anodes spent.
func TestStateAndCause(t *testing.T) {
	state := func(count int, wastage float64) (plan.State, string) {
		a := ternPassage(t)
		a.Zones[0].Fitted[0].Count, a.Zones[0].Fitted[0].Wastage = count, wastage
		iv := plan.Compute(a, 0).Zones[0].Intervals[0]
		return iv.State, iv.Cause
	}
	for _, c := range []struct {
		count   int
		wastage float64
		state   plan.State
		cause   string
	}{
		{60, 0, plan.Sound, ""},
		{60, 0.70, plan.Thin, "of mass"}, // 0.06 more goes, and 0.15 * 0.85 should be left
		{60, 0.64, plan.Sound, ""},
		{12, 0, plan.Short, "of current"},
		{16, 0, plan.Thin, "of current"},
		{60, 0.84, plan.Spent, "wasted to the utilisation factor"},
	} {
		if state, cause := state(c.count, c.wastage); state != c.state || cause != c.cause {
			t.Errorf("%d pieces %.0f %% wasted: %s %q, want %s %q", c.count, 100*c.wastage, state, cause, c.state, c.cause)
		}
	}
}

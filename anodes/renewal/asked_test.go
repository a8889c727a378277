package renewal

import (
	"testing"

	"anodewright/hull"
)

// At the plan's own factor every zone asks for what is planned and no more; at
// a larger one renewals never ask for less.
func TestAskedAtThePlansFactorIsThePlan(t *testing.T) {
	lines := 0
	for seed := range uint64(120) {
		a := randomAsset(t, seed, 1+int(seed%4), false)
		p := Problem{Asset: a, Demand: demandOf(a), Factors: make([]float64, len(a.Zones))}
		for i := range p.Factors {
			p.Factors[i] = 0.6 + 0.2*float64((seed+uint64(i))%5)
		}
		plan := p.Solve().Best.Lines
		for zone := range a.Zones {
			asker := p.Asker(zone, plan)
			var want []Line
			for _, l := range plan {
				if l.Zone == zone && l.Action != Keep {
					want = append(want, l)
				}
			}
			if asker == nil {
				if len(want) > 0 {
					t.Fatalf("seed %d, zone %d: nothing is asked", seed, zone)
				}
				continue
			}
			got := asker.At(p.Factors[zone], nil)
			if len(got) != len(want) {
				t.Fatalf("seed %d, zone %d: asked %+v, planned %+v", seed, zone, got, want)
			}
			more := asker.At(1.7*p.Factors[zone], nil)
			for k, l := range want {
				if got[k] != (Asked{l.Docking, l.Pattern, l.Count, false}) {
					t.Errorf("seed %d, zone %d: asked %+v, planned %+v", seed, zone, got[k], l)
				}
				lines++
				for _, m := range more {
					if l.Action == Renew && m.Docking == l.Docking && m.Pattern == l.Pattern && m.Count < l.Count {
						t.Errorf("seed %d, zone %d: %d pieces at 1.7 times the demand of %d", seed, zone, m.Count, l.Count)
					}
				}
			}
		}
	}
	if lines < 100 {
		t.Errorf("only %d actions were tried", lines)
	}
}

// A fitted set that would not last as long as planned asks for pieces at the
// last docking that it does last to; where it lasts it asks for none.
func TestAskedOfAKeptSet(t *testing.T) {
	short := 0
	for seed := range uint64(200) {
		a := randomAsset(t, seed, 3, false)
		p := Problem{Asset: a, Demand: demandOf(a), Factors: make([]float64, len(a.Zones))}
		for i := range p.Factors {
			p.Factors[i] = 0.3
		}
		plan := p.Solve().Best.Lines
		for zone := range a.Zones {
			asker := p.Asker(zone, plan)
			if asker == nil || asker.lines[0].Action != Keep {
				continue
			}
			keep := asker.lines[0]
			for _, factor := range []float64{0.1, 0.3, 1.5, 4} {
				before := -1 // the docking of what is asked before the keep ends
				for _, x := range asker.At(factor, nil) {
					if x.Docking < asker.z.boundary(keep.Until)-1 && (len(asker.lines) == 1 || x.Docking < asker.lines[1].Docking) {
						before = x.Docking
						if x.Count < 1 {
							t.Errorf("seed %d, zone %d, factor %g: %+v", seed, zone, factor, x)
						}
					}
				}
				end := asker.z.boundary(keep.Until)
				if len(asker.lines) > 1 {
					end = asker.lines[1].Docking + 1
				}
				_, lasts := asker.z.keep(end)
				if lasts != (before < 0) && len(asker.z.offered) > 0 {
					// Afloat dockings may offer nothing; then nothing is asked.
					if _, ok := asker.z.patternAt(1); ok {
						t.Errorf("seed %d, zone %d, factor %g: the set lasts to its end: %v, asked at docking %d", seed, zone, factor, lasts, before)
					}
				}
				if before >= 0 {
					short++
					if _, ok := asker.z.keep(before + 1); !ok {
						t.Errorf("seed %d, zone %d, factor %g: the set does not even last to docking %d", seed, zone, factor, before)
					}
				}
			}
		}
	}
	if short < 20 {
		t.Errorf("only %d sets fell short", short)
	}
}

func demandOf(a *hull.Asset) [][]hull.Current {
	var all [][]hull.Current
	for _, d := range hull.Demand(a) {
		all = append(all, d.Total)
	}
	return all
}

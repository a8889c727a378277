package renewal

import (
	"math"
	"slices"
	"testing"
)

// item is one thing of an abstract problem: the spans that lead on from every
// boundary, those of boundary 0 from what is there at the start.
type item [][]span

// solveAbstract returns the least cost of all items, the shared cost of every
// docking used among it, and the dockings used, from 0. It is the search of
// the plan without zones, sets and patterns.
func solveAbstract(items []item, fixed []float64) (float64, []int) {
	var all []options
	for _, spans := range items {
		all = append(all, options{end: len(fixed) + 1, start: spans[0], from: spans})
	}
	s := newSearch(all, fixed, len(fixed), nil)
	s.run()
	var used []int
	for i, open := range s.chosen {
		if i > 0 && open {
			used = append(used, i-1)
		}
	}
	return s.best, used
}

// abstractSpan returns a span of an abstract item.
func abstractSpan(from, to int, cost float64) span {
	return span{stock: stock{from: from, to: to, kept: from == 0}, cost: cost}
}

// Wagner and Whitin, Management Science 5 (1958): lot sizes of twelve months,
// the stock carried over costs 1 a piece and month.
func TestWagnerWhitin(t *testing.T) {
	demand := []float64{69, 29, 36, 61, 61, 26, 34, 67, 45, 67, 79, 56}
	setUp := []float64{85, 102, 102, 101, 98, 114, 105, 86, 119, 110, 98, 114}
	lots := make(item, len(demand)+1)
	lots[0] = []span{abstractSpan(0, 1, 0)} // nothing in stock
	for i := 1; i <= len(demand); i++ {
		carried := 0.0
		for j := i + 1; j <= len(demand)+1; j++ {
			carried += demand[j-2] * float64(j-1-i)
			lots[i] = append(lots[i], abstractSpan(i, j, carried))
		}
	}
	if got, _ := solveAbstract([]item{lots}, setUp); math.Abs(got-864) > 1e-9 {
		t.Errorf("the cheapest lots cost %v, want 864", got)
	}
}

// generator is a linear congruential generator modulo 2^31.
type generator uint64

func (g *generator) between(low, high int) int {
	*g = (*g*1103515245 + 12345) % (1 << 31)
	return low + int(*g/65536)%(high-low+1)
}

// jointReplacement draws a problem of groups of units that are replaced at
// dockings: each lasts a number of dockings, the fitted one has less left.
func jointReplacement(seed, groups, dockings int) (items []item, fixed []float64) {
	g := generator(seed)
	for range dockings {
		fixed = append(fixed, float64(100*g.between(200, 600)))
	}
	for range groups {
		lasts := g.between(2, 4)
		left := g.between(0, lasts-1)
		base := g.between(20, 200)
		unit := make(item, dockings+1)
		for j := 1; j <= left+1; j++ {
			unit[0] = append(unit[0], abstractSpan(0, j, 0))
		}
		for at := 1; at <= dockings; at++ {
			cost := float64(base * g.between(80, 120))
			for to := at + 1; to <= min(at+lasts, dockings+1); to++ {
				unit[at] = append(unit[at], abstractSpan(at, to, cost))
			}
		}
		items = append(items, unit)
	}
	return items, fixed
}

func TestJointReplacement(t *testing.T) {
	for _, c := range []struct {
		seed, groups, dockings int
		want                   float64
		at                     []int
	}{{1, 3, 5, 178433, []int{1, 3}}, {2, 6, 6, 230697, nil}, {3, 10, 8, 447965, nil}} {
		items, fixed := jointReplacement(c.seed, c.groups, c.dockings)
		got, at := solveAbstract(items, fixed)
		if math.Abs(got-c.want) > 1e-6 {
			t.Errorf("seed %d: total %v, want %v", c.seed, got, c.want)
		}
		if c.at != nil && !slices.Equal(at, c.at) {
			t.Errorf("seed %d: dockings %v, want %v", c.seed, at, c.at)
		}
	}
}
